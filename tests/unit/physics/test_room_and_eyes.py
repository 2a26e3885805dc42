"""Working window and blue-light hazard: scaling, the dark, and weights between the table's rows."""

import math

import pytest
from farside.physics.eyes.hazard import (
    DAY_LIMIT_J_M2_SR,
    band_weight,
    blue_light_weight,
    day_limit_s,
    reflected_radiance_w_m2_sr,
)
from farside.physics.room.window import room_weighted_mw_cm2, working_window_s
from hypothesis import given
from hypothesis import strategies as st

TABLE = ((380.0, 0.01), (440.0, 1.0), (460.0, 0.8), (500.0, 0.1), (600.0, 0.001))


@given(st.floats(100.0, 50_000.0), st.floats(0.01, 0.2), st.floats(1.1, 10.0))
def test_window_scales_with_the_light(illuminance: float, weight: float, factor: float) -> None:
    one = working_window_s(8000.0, 60.0, 0.0942, ((illuminance, weight),))
    assert working_window_s(8000.0, 60.0, 0.0942, ((illuminance * factor, weight),)) == pytest.approx(one / factor)
    assert working_window_s(8000.0, 60.0, 0.0942, ((illuminance, weight), (illuminance, weight))) == pytest.approx(
        one / 2.0
    )


def test_the_test_itself_gives_its_own_seconds() -> None:
    assert working_window_s(8000.0, 60.0, 0.0942, ((8000.0, 0.0942),)) == pytest.approx(60.0)


@pytest.mark.parametrize("sources", [(), ((0.0, 0.09),), ((500.0, 0.0),)])
def test_in_the_dark_there_is_no_end(sources: tuple[tuple[float, float], ...]) -> None:
    assert room_weighted_mw_cm2(sources) == 0.0
    assert working_window_s(8000.0, 60.0, 0.0942, sources) == math.inf


@given(st.floats(300.0, 700.0))
def test_weights_lie_between_their_rows(wavelength: float) -> None:
    weight = blue_light_weight(TABLE, wavelength)
    assert 0.001 <= weight <= 1.0
    if wavelength <= 380.0:
        assert weight == 0.01
    if wavelength >= 600.0:
        assert weight == 0.001


def test_rows_come_back_as_they_are() -> None:
    assert [blue_light_weight(TABLE, nm) for nm, _ in TABLE] == [weight for _, weight in TABLE]


def test_a_band_weighs_as_its_light() -> None:
    assert band_weight(TABLE, ((440.0, 0.25), (460.0, 0.25))) == pytest.approx(0.9)
    assert band_weight(TABLE, ((460.0, 0.1),)) == pytest.approx(0.8)


@given(st.floats(1.0, 4000.0), st.floats(0.05, 1.0), st.floats(0.001, 1.0))
def test_limit_and_radiance_make_the_day(irradiance: float, reflectance: float, weight: float) -> None:
    radiance = reflected_radiance_w_m2_sr(irradiance, reflectance, weight)
    assert radiance * day_limit_s(radiance) == pytest.approx(DAY_LIMIT_J_M2_SR)
    # A matt surface of radiance L sends out pi L.
    assert radiance * math.pi == pytest.approx(irradiance * 10.0 * reflectance * weight)


def test_no_light_no_limit() -> None:
    assert day_limit_s(0.0) == math.inf
