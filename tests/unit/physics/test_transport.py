"""Transport keeps to what is known without solving it: limits, order, and one answer by two ways."""

import math

import pytest
from farside.physics.light import layers
from farside.physics.light.streams import diffuse_reflected, reflected_inside, streams
from farside.physics.light.transport import half_space_fluence, slab, slab_fluence
from hypothesis import given
from hypothesis import strategies as st

absorptions = st.floats(0.05, 1.0)
scatterings = st.floats(0.5, 4.0)
indices = st.sampled_from((1.0, 1.4, 1.5, 1.6))


@pytest.mark.parametrize("index", [1.0, 1.3, 1.5, 1.7])
def test_streams_integrate_the_hemisphere(index: float) -> None:
    along = streams(index)
    assert sum(along.weights) == pytest.approx(1.0, abs=1e-12)
    assert sum(map(float.__mul__, along.weights, along.cosines)) == pytest.approx(0.5, abs=1e-12)
    assert along.cosines == tuple(sorted(along.cosines))
    assert along.cosines[-1] == 1.0


@pytest.mark.parametrize("index", [1.2, 1.4, 1.5, 1.6, 2.0])
def test_diffuse_reflection_is_the_integral_of_fresnel(index: float) -> None:
    count = 20_000
    critical = math.sqrt(1.0 - 1.0 / index**2)
    # The cosine outside runs evenly: 2 c dc is the same share of light on both sides of the surface.
    outside = [(place + 0.5) / count for place in range(count)]
    inside = [math.sqrt(1.0 - (1.0 - cosine**2) / index**2) for cosine in outside]
    assert min(inside) > critical - 1e-3
    total = sum(2.0 * c * reflected_inside(i, index) for c, i in zip(outside, inside, strict=True)) / count
    assert diffuse_reflected(index) == pytest.approx(total, abs=1e-6)


@pytest.mark.parametrize(("index", "share"), [(1.46, 0.0350), (1.50, 0.0400), (1.55, 0.0465)])
def test_normal_reflection(index: float, share: float) -> None:
    assert reflected_inside(1.0, index) == pytest.approx(share, abs=5e-5)


def test_almost_no_scattering_leaves_the_beam_alone() -> None:
    absorption, thickness, surface = 0.7, 2.0, 0.04
    once = math.exp(-absorption * thickness)
    passed = (1.0 - surface) ** 2 * once / (1.0 - (surface * once) ** 2)
    made = slab(thickness, absorption, 1e-9, 1.5, 0.0)
    assert made.transmittance == pytest.approx(passed, rel=5e-4)
    assert made.reflectance == pytest.approx(surface + surface * once * passed, rel=5e-4)


@given(scatterings, st.floats(0.2, 5.0), indices)
def test_nothing_is_lost_without_absorption(scattering: float, thickness: float, index: float) -> None:
    made = slab(thickness, 0.0, scattering, index)
    assert made.reflectance + made.transmittance == pytest.approx(1.0, abs=1e-6)
    assert made.diffuse_reflectance + made.diffuse_transmittance == pytest.approx(1.0, abs=1e-6)


@given(absorptions, scatterings, st.floats(0.5, 4.0), indices)
def test_more_of_anything_passes_less(absorption: float, scattering: float, thickness: float, index: float) -> None:
    passed = slab(thickness, absorption, scattering, index).transmittance
    assert slab(thickness * 1.1, absorption, scattering, index).transmittance < passed
    assert slab(thickness, absorption * 1.1, scattering, index).transmittance < passed
    assert slab(thickness, absorption, scattering * 1.1, index).transmittance < passed
    assert (
        slab(thickness, absorption * 1.1, scattering, index).reflectance
        < slab(thickness, absorption, scattering, index).reflectance
    )


@given(absorptions, scatterings, indices)
def test_half_space_is_the_top_of_a_thick_slab(absorption: float, scattering: float, index: float) -> None:
    table = half_space_fluence(absorption, scattering, index, step_mm=1.0, count=3)
    thick = slab_fluence((0.0, 1.0, 2.0), 60.0, absorption, scattering, index)
    assert table == pytest.approx(thick, rel=2e-3)


@given(absorptions, scatterings)
def test_the_step_does_not_matter(absorption: float, scattering: float) -> None:
    fine = half_space_fluence(absorption, scattering, step_mm=0.05, count=81)
    coarse = half_space_fluence(absorption, scattering, step_mm=1.0, count=5)
    assert fine[::20] == pytest.approx(coarse, rel=3e-4)


@given(st.floats(0.0, 10.0), st.floats(0.1, 10.0), indices)
def test_tables_stay_above_zero_far_down(absorption: float, scattering: float, index: float) -> None:
    table = half_space_fluence(absorption, scattering, index, count=401)
    assert all(0.0 < share < 30.0 for share in table)


@given(absorptions, scatterings, indices)
def test_past_the_surface_light_only_falls(absorption: float, scattering: float, index: float) -> None:
    table = half_space_fluence(absorption, scattering, index, count=201)[40:]
    assert table == sorted(table, reverse=True)


def test_fluence_under_the_surface_exceeds_the_irradiance() -> None:
    assert half_space_fluence(0.05, 4.0, count=1)[0] > 5.0
    assert 1.0 < half_space_fluence(1.0, 0.5, count=1)[0] < 2.0


def test_what_lies_under_an_increment_matters() -> None:
    on_air = slab_fluence((2.0,), 2.0, 0.2, 1.0)[0]
    on_itself = half_space_fluence(0.2, 1.0, step_mm=2.0, count=2)[1]
    assert abs(on_itself / on_air - 1.0) > 0.2


@pytest.mark.parametrize("index", [1.0, 1.5])
def test_a_thinner_start_changes_nothing(index: float, monkeypatch: pytest.MonkeyPatch) -> None:
    usual = slab(3.0, 0.3, 1.5, index)
    monkeypatch.setattr(layers, "THIN_SHARE", layers.THIN_SHARE / 4.0)
    assert slab(3.0, 0.3, 1.5, index) == pytest.approx(usual, rel=5e-4)
