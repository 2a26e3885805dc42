"""Dose by depth: against the transport itself, and what a light's colours do to it."""

from itertools import pairwise

import pytest
from farside.clinic.lamp import Band
from farside.clinic.optics import known_initiators
from farside.physics.light.initiators import Initiator, dose_weight
from farside.physics.light.paste import Paste, absorption_at, scattering_at
from farside.physics.light.transport import half_space_fluence
from farside.trace.curves import STEP_MM, dose_curve, light_nodes, paste_light

CQ = known_initiators()["camphorquinone"]
PASTE = Paste(0.1, 1.0, 460.0, 1.5, ((CQ, 0.02),))
# The initiator that peaks deepest in the violet.
VIOLET = min(known_initiators().values(), key=lambda initiator: initiator.peak_nm)


def direct(nodes, depth_mm, step_mm=STEP_MM):
    """Weighted fluence at a depth straight from the transport, a fresh table for each wavelength."""
    index = round(depth_mm / step_mm)
    return sum(
        share
        * dose_weight(PASTE.parts, wavelength, CQ)
        * half_space_fluence(
            absorption_at(PASTE, wavelength),
            scattering_at(PASTE, wavelength),
            refractive_index=1.5,
            step_mm=step_mm,
            count=index + 1,
        )[index]
        for wavelength, share in nodes
    )


@pytest.mark.parametrize("depth_mm", [0.0, 0.05, 1.0, 2.0, 6.0, 20.0])
def test_on_its_own_depths_it_is_the_transports_value(depth_mm):
    nodes = ((450.0, 0.3), (470.0, 0.7))
    assert dose_curve(PASTE, nodes).at(depth_mm) == pytest.approx(direct(nodes, depth_mm), rel=1e-9)


@pytest.mark.parametrize("depth_mm", [0.025, 0.125, 1.025, 3.975])
def test_between_its_depths_it_is_within_a_thousandth(depth_mm):
    nodes = ((460.0, 1.0),)
    assert dose_curve(PASTE, nodes).at(depth_mm) == pytest.approx(direct(nodes, depth_mm, 0.025), rel=1e-3)


def test_it_falls_with_depth():
    curve = paste_light(PASTE, (Band(460, 22, 1),)).curve
    values = [curve.at(step / 10) for step in range(3, 200)]
    assert all(deeper < above for above, deeper in pairwise(values))


def test_light_that_no_initiator_takes_up_has_no_curve_and_gives_no_dose():
    narrow = Initiator("narrow", 300.0, 0.5, 380.0, 500.0, 2.0, 2.0)
    light = paste_light(Paste(0.1, 1.0, 460.0, 1.5, ((narrow, 0.02),)), (Band(540, 5, 1),))
    assert light.curve is None
    assert light.dose_j_cm2(1000, 20, 1.0) == 0.0
    assert light.violet_share_at(1.0) is None


def test_the_violet_part_and_the_rest_make_the_whole():
    both = Paste(0.1, 1.0, 460.0, 1.5, ((CQ, 0.02), (VIOLET, 0.01)))
    light = paste_light(both, (Band(405, 15, 0.4), Band(460, 22, 0.6)))
    rest = dose_curve(both, tuple(node for node in light.nodes if node[0] >= 430))
    share = light.violet_share_at(2.0)
    assert 0 < share < 1
    assert rest.at(2.0) / light.curve.at(2.0) == pytest.approx(1 - share, rel=1e-9)


def test_violet_light_is_used_up_nearer_the_surface():
    both = Paste(0.1, 1.0, 460.0, 1.5, ((CQ, 0.02), (VIOLET, 0.01)))
    light = paste_light(both, (Band(405, 15, 0.4), Band(460, 22, 0.6)))
    assert light.violet_share_at(0.2) > light.violet_share_at(1.0) > light.violet_share_at(4.0)


@pytest.mark.parametrize("initiator", [CQ, VIOLET])
@pytest.mark.parametrize("width_nm", [5, 22, 60])
def test_nodes_share_out_all_of_the_light_and_are_more_where_an_initiator_is_steep(initiator, width_nm):
    bands = (Band(405, width_nm, 0.3), Band(460, width_nm, 0.7))
    nodes = light_nodes(bands, Paste(0.1, 1.0, 460.0, 1.5, ((initiator, 0.02),)))
    assert sum(share for _, share in nodes) == pytest.approx(1)
    assert len(nodes) >= len(light_nodes(bands, PASTE)) >= 6
