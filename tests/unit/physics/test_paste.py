"""Initiators, bands, paste and edge: shares add up, inversions come back, weights are one where they should be."""

import math

import pytest
from farside.physics.light.bands import band_nodes
from farside.physics.light.edge import smoothed_share, smoothing_length_mm
from farside.physics.light.initiators import Initiator, absorption_per_mm, dose_weight, molar_absorption
from farside.physics.light.paste import (
    OWN_SLOPE_PER_NM,
    Paste,
    absorption_at,
    absorption_from_transmittance,
    own_absorption,
    scattering_at,
)
from farside.physics.light.transport import slab
from hypothesis import given
from hypothesis import strategies as st

CAMPHORQUINONE = Initiator("camphorquinone", 166.22, 0.07, 469.0, 46.0, 38.0, 21.0)
VIOLET = Initiator("violet", 348.38, 0.6, 381.0, 550.0, 25.0, 17.0)
wavelengths = st.floats(360.0, 520.0)


@given(st.floats(360.0, 520.0), st.floats(1.0, 60.0), st.floats(0.0, 1.0), st.sampled_from((3, 5, 9)))
def test_nodes_keep_the_share_the_middle_and_the_width(peak: float, width: float, share: float, count: int) -> None:
    nodes = band_nodes(peak, width, share, count)
    assert len(nodes) == count
    assert sum(part for _, part in nodes) == pytest.approx(share, abs=1e-12)
    assert sum(nm * part for nm, part in nodes) == pytest.approx(peak * share, abs=1e-9)
    variance = width**2 / (8.0 * math.log(2.0))
    assert sum((nm - peak) ** 2 * part for nm, part in nodes) == pytest.approx(variance * share, abs=1e-6)


def test_a_half_width_halves_the_absorption() -> None:
    for away in (-38.0, 21.0):
        assert molar_absorption(CAMPHORQUINONE, 469.0 + away) == pytest.approx(23.0)
    assert molar_absorption(CAMPHORQUINONE, 469.0) == 46.0


@given(wavelengths, st.floats(0.001, 0.1), st.floats(0.1, 10.0))
def test_only_proportions_of_initiators_count(wavelength: float, amount: float, factor: float) -> None:
    parts = ((CAMPHORQUINONE, amount), (VIOLET, 0.01))
    scaled = tuple((initiator, part * factor) for initiator, part in parts)
    weight = dose_weight(parts, wavelength, CAMPHORQUINONE)
    assert dose_weight(scaled, wavelength, CAMPHORQUINONE) == pytest.approx(weight, rel=1e-9)
    alone = [dose_weight(((initiator, 1.0),), wavelength, CAMPHORQUINONE) for initiator, _ in parts]
    assert min(alone) * (1 - 1e-9) <= weight <= max(alone) * (1 + 1e-9)


def test_the_reference_at_its_peak_weighs_one() -> None:
    assert dose_weight(((CAMPHORQUINONE, 0.3),), 469.0, CAMPHORQUINONE) == 1.0


@given(st.floats(0.15, 1.0), st.floats(0.001, 0.012), st.floats(440.0, 480.0))
def test_a_card_total_comes_back_at_its_wavelength(total: float, amount: float, at_nm: float) -> None:
    parts = ((CAMPHORQUINONE, amount),)
    paste = Paste(own_absorption(total, at_nm, parts), 1.0, at_nm, 1.5, parts)
    assert absorption_at(paste, at_nm) == pytest.approx(total, rel=1e-12)
    assert scattering_at(paste, at_nm) == pytest.approx(1.0, rel=1e-12)


def test_own_part_falls_to_the_red_and_initiators_follow_their_shape() -> None:
    parts = ((CAMPHORQUINONE, 0.01),)
    paste = Paste(0.1, 1.0, 460.0, 1.5, parts)
    own = 0.1 * math.exp(OWN_SLOPE_PER_NM * 50.0)
    assert absorption_at(paste, 410.0) == pytest.approx(own + absorption_per_mm(CAMPHORQUINONE, 0.01, 410.0))


def test_initiators_beyond_the_total_show_as_negative() -> None:
    assert own_absorption(0.05, 469.0, ((CAMPHORQUINONE, 0.0132),)) < 0.0


@given(st.floats(0.05, 1.0), st.floats(0.5, 3.0), st.floats(0.5, 2.5), st.sampled_from((1.4, 1.5, 1.6)))
def test_absorption_comes_back_from_its_transmittance(
    absorption: float, scattering: float, thickness: float, index: float
) -> None:
    passed = slab(thickness, absorption, scattering, index).transmittance
    found = absorption_from_transmittance(passed, thickness, scattering, index)
    assert found == pytest.approx(absorption, rel=1e-3)


@pytest.mark.parametrize("share", [0.99, 0.0, 1e-12])
def test_a_transmittance_that_no_absorption_gives_is_refused(share: float) -> None:
    with pytest.raises(ValueError, match="no absorption passes"):
        absorption_from_transmittance(share, 2.0, 1.0, 1.5)


@given(st.floats(0.2, 3.0), st.floats(-3.0, 3.0))
def test_smoothing_keeps_what_is_straight_and_bends_what_is_round(length: float, at_mm: float) -> None:
    assert smoothed_share(lambda along, _: 2.0 + along, at_mm, length) == pytest.approx(2.0 + at_mm, abs=1e-9)
    # The kernel's mean square distance is 2 length squared.
    bowl = smoothed_share(lambda along, across: along**2 + across**2, at_mm, length)
    assert bowl == pytest.approx(at_mm**2 + 2.0 * length**2, rel=1e-9)


def test_more_scattering_smooths_over_less() -> None:
    assert smoothing_length_mm(0.2, 2.0) < smoothing_length_mm(0.2, 1.0)
