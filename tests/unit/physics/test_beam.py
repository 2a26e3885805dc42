"""The beam: on and off the axis are one, tilt takes its cosine, a fit finds what made the readings."""

import math

import pytest
from farside.physics.light.beam import (
    WIDEST_FIT,
    fitted_spread_exponent,
    off_axis_share,
    on_axis_share,
    surface_share,
)
from hypothesis import given
from hypothesis import strategies as st

distances = st.floats(0.5, 15.0)
offsets = st.floats(-8.0, 8.0)
diameters = st.floats(6.0, 12.0)
spreads = st.floats(0.0, 14.0)


@given(distances, diameters, spreads)
def test_the_axis_is_off_axis_by_nothing(distance: float, diameter: float, spread: float) -> None:
    share = on_axis_share(distance, diameter, spread)
    assert off_axis_share(distance, 0.0, diameter, spread) == pytest.approx(share, abs=1e-12)
    assert 0.0 < share <= 1.0


@given(distances, offsets, diameters, spreads)
def test_light_falls_to_the_side_alike_on_both(distance: float, offset: float, diameter: float, spread: float) -> None:
    share = off_axis_share(distance, offset, diameter, spread)
    assert share == off_axis_share(distance, -offset, diameter, spread)
    assert share <= off_axis_share(distance, 0.0, diameter, spread) + 1e-5


@pytest.mark.parametrize("distance", [0.01, 0.2])
@pytest.mark.parametrize(("offset", "share"), [(0.0, 1.0), (2.0, 1.0), (6.0, 0.0)])
def test_near_the_tip_the_rim_shows(distance: float, offset: float, share: float) -> None:
    assert off_axis_share(distance, offset, 8.0, 3.5) == pytest.approx(share, abs=0.01)
    assert off_axis_share(0.0, offset, 8.0, 3.5) == share


@pytest.mark.parametrize("spread", [0.0, 1.0, 5.0])
def test_all_light_arrives_somewhere(spread: float) -> None:
    """Over a wide plane the irradiance adds up to what leaves the tip in that cone."""
    step = 0.05
    radii = [step * (place + 0.5) for place in range(2400)]
    power = sum(2.0 * math.pi * r * step * off_axis_share(3.0, r, 8.0, spread) for r in radii)
    beyond = (3.0 / math.hypot(3.0, 120.0)) ** (spread + 1.0)
    assert power / (math.pi * 16.0) == pytest.approx(1.0 - beyond, abs=2e-3)


@given(distances, st.floats(0.0, 60.0), spreads)
def test_tilt_takes_its_cosine(distance: float, tilt: float, spread: float) -> None:
    straight = surface_share(distance, 0.0, 0.0, 8.0, spread)
    tilted = surface_share(distance, 0.0, tilt, 8.0, spread)
    assert tilted == pytest.approx(straight * math.cos(math.radians(tilt)), rel=1e-12)


@given(distances, st.floats(-4.0, 4.0), st.floats(-45.0, 45.0))
def test_tilt_and_offset_mirror(distance: float, offset: float, tilt: float) -> None:
    one = surface_share(distance, offset, tilt, 8.0, 2.5)
    assert one == pytest.approx(surface_share(distance, -offset, -tilt, 8.0, 2.5), rel=1e-12)


def test_a_place_past_the_tip_is_taken_at_the_tip() -> None:
    assert surface_share(1.0, -4.0, 45.0, 8.0, 2.5) == pytest.approx(math.cos(math.pi / 4.0))


def test_aside_counts_as_distance_from_the_axis() -> None:
    assert surface_share(4.0, 3.0, 0.0, 8.0, 2.5, aside_mm=4.0) == off_axis_share(4.0, 5.0, 8.0, 2.5)


@given(st.floats(0.2, 13.0), diameters)
def test_a_fit_finds_the_beam(spread: float, diameter: float) -> None:
    for places in ((0.0, 6.0), (2.0, 8.0), (0.0, 3.0, 6.0, 10.0), (1.0, 4.0, 9.0)):
        readings = [870.0 * on_axis_share(place, diameter, spread) for place in places]
        assert fitted_spread_exponent(places, readings, diameter) == pytest.approx(spread, rel=1e-3)


def test_readings_that_do_not_fall_end_at_the_bound() -> None:
    assert fitted_spread_exponent((0.0, 8.0), (500.0, 600.0), 8.0) == pytest.approx(WIDEST_FIT, rel=1e-4)
    assert fitted_spread_exponent((0.0, 8.0), (1000.0, 1.0), 8.0) == pytest.approx(0.0, abs=1e-4)


def test_one_distance_is_no_beam() -> None:
    with pytest.raises(ValueError, match="two different distances"):
        fitted_spread_exponent((3.0, 3.0), (700.0, 710.0), 8.0)
