"""A plan's light: what leaves the lamp, arrives, reaches the far side and the walls, and what the maker's row needs."""

import pytest
from farside.physics.light.beam import on_axis_share, surface_share
from farside.trace.curves import paste_light
from unit.made import ADHESIVE, CARDS, COMPOSITE, LAMP, PLAN, edited, traced

EXPOSURE = "increments/0/exposures/0"
ROW = "maker_instructions/0"


def reading(on, exitance, **more):
    return {
        "on": on, "mode": "on", "radiant_exitance_mw_cm2": exitance, "meter": "laboratory", "sleeve": "none", **more
    }  # fmt: skip


def with_lamp(plan=PLAN, **edits):
    return traced(plan, [edited(LAMP, edits), COMPOSITE, ADHESIVE])


def increment(edits=None, cards=CARDS):
    return traced(edited(PLAN, edits or {}), cards).increments[0]


@pytest.mark.parametrize(
    ("irradiance", "time_s", "thickness_mm", "peak_nm", "width_nm"),
    [(1000, 20, 2, 460, 22), (600, 40, 1.35, 475, 40), (1400, 10, 4, 445, 15)],
)
def test_at_the_makers_own_conditions_the_far_dose_is_exactly_the_need(
    irradiance, time_s, thickness_mm, peak_nm, width_nm
):
    row = {"irradiance_mw_cm2": irradiance, "time_s": time_s, "thickness_mm": thickness_mm, "peak_nm": peak_nm}
    card = edited(COMPOSITE, {ROW: {**row, "width_nm": width_nm, "provenance": "maker"}})
    lamp = edited(
        LAMP,
        {
            "readings/0/radiant_exitance_mw_cm2": irradiance,
            "modes/0/bands/0": {"peak_nm": peak_nm, "width_nm": width_nm, "share": 1},
        },
    )
    plan = edited(
        PLAN,
        {"cavity/depth_mm": thickness_mm, "increments/0/thickness_mm": thickness_mm, f"{EXPOSURE}/time_s": time_s},
    )
    found = traced(plan, [lamp, card]).increments[0]
    assert found.exposures[0].tip_distance_mm == 0.0
    assert found.far_dose_j_cm2 == found.needed_dose_j_cm2 > 0


def test_the_dose_is_linear_in_time():
    one, three = increment(), increment({f"{EXPOSURE}/time_s": 60})
    assert three.far_dose_j_cm2 == pytest.approx(3 * one.far_dose_j_cm2, rel=1e-12)
    assert three.edge_dose_j_cm2 == pytest.approx(3 * one.edge_dose_j_cm2, rel=1e-12)
    assert three.needed_dose_j_cm2 == one.needed_dose_j_cm2


def test_the_dose_is_linear_in_output_and_the_need_does_not_move():
    one = with_lamp().increments[0]
    more = with_lamp(readings=[reading("2026-11-01", 1700)]).increments[0]
    assert more.far_dose_j_cm2 == pytest.approx(1.7 * one.far_dose_j_cm2, rel=1e-12)
    assert more.needed_dose_j_cm2 == one.needed_dose_j_cm2


def test_exposures_of_an_increment_add_up():
    twice = increment({"increments/0/exposures": [{"time_s": 8}, {"time_s": 12}]})
    assert twice.far_dose_j_cm2 == pytest.approx(increment().far_dose_j_cm2, rel=1e-12)


def test_what_comes_after_is_not_counted():
    later = [{"time_s": 60}, {"time_s": 60, "from": "side", "tip_distance_mm": 1}]
    assert traced({**PLAN, "after": later}).increments[0].far_dose_j_cm2 == increment().far_dose_j_cm2


def test_an_increment_without_exposures_gets_nothing():
    found = increment({"increments/0/exposures": []})
    assert (found.far_dose_j_cm2, found.edge_dose_j_cm2) == (0, 0)


def test_later_increments_lie_nearer_the_tip():
    halves = [{"composite": "paste", "thickness_mm": 1, "exposures": [{"time_s": 20}]}] * 2
    first, second = traced(edited(PLAN, {"increments": halves, "gap_mm": 3})).increments
    assert [i.exposures[0].tip_distance_mm for i in (first, second)] == [4, 3]
    assert second.far_dose_j_cm2 > first.far_dose_j_cm2


def test_output_is_the_latest_reading_by_the_day_freed_of_its_sleeve():
    readings = [
        reading("2026-12-01", 5000), reading("2026-11-29", 880, sleeve="wrinkled"), reading("2026-11-02", 950)
    ]  # fmt: skip
    trace = with_lamp(edited(PLAN, {"lamp/sleeve": "fitted"}), readings=readings)
    assert trace.bare_exitance_mw_cm2 == pytest.approx(880 / 0.80)
    assert trace.exitance_mw_cm2 == pytest.approx(880 / 0.80 * 0.93)


def test_a_reading_on_the_day_itself_counts():
    assert with_lamp(readings=[reading("2026-11-30", 700)]).exitance_mw_cm2 == 700


@pytest.mark.parametrize("readings", [None, [reading("2026-12-01", 900)], [reading("2026-11-01", 900, mode="boost")]])
def test_without_a_reading_nothing_is_known_of_the_dose_but_the_need(readings):
    trace = with_lamp(readings=readings)
    found = trace.increments[0]
    assert trace.exitance_mw_cm2 is None
    assert (found.far_dose_j_cm2, found.edge_dose_j_cm2, found.exposures[0].axis_mw_cm2) == (None, None, None)
    assert found.needed_dose_j_cm2 > 0


def test_the_need_comes_from_the_row_that_the_lamp_reaches_through_its_sleeve():
    rows = [{**COMPOSITE["maker_instructions"][0], "irradiance_mw_cm2": mw} for mw in (500, 950)]
    card = edited(COMPOSITE, {"maker_instructions": rows})
    assert increment({}, [LAMP, card]).row.irradiance_mw_cm2 == 950
    assert increment({"lamp/sleeve": "fitted"}, [LAMP, card]).row.irradiance_mw_cm2 == 500


def test_a_row_without_a_thickness_gives_no_need():
    found = increment({}, [LAMP, edited(COMPOSITE, {f"{ROW}/thickness_mm": None})])
    assert (found.row, found.needed_dose_j_cm2) == (None, None)


def test_an_overlay_takes_its_share_and_one_not_known_leaves_nothing_known():
    half = increment({f"{EXPOSURE}/through": [{"what": "ceramic", "transmittance_share": 0.5}]})
    assert half.far_dose_j_cm2 == pytest.approx(increment().far_dose_j_cm2 / 2, rel=1e-12)
    unknown = increment({f"{EXPOSURE}/through": [{"what": "ceramic"}]})
    assert (unknown.far_dose_j_cm2, unknown.edge_dose_j_cm2, unknown.exposures[0].axis_mw_cm2) == (None, None, None)
    assert unknown.exposures[0].footprint_share > 0


@pytest.mark.parametrize("tilt_deg", [10, 25, 60])
def test_a_tilt_mirrored_gives_the_same(tilt_deg):
    left = increment({"gap_mm": 2, f"{EXPOSURE}/tilt_deg": tilt_deg})
    right = increment({"gap_mm": 2, f"{EXPOSURE}/tilt_deg": -tilt_deg})
    straight = increment({"gap_mm": 2})
    assert left.edge_dose_j_cm2 == pytest.approx(right.edge_dose_j_cm2, rel=1e-12)
    assert left.far_dose_j_cm2 == right.far_dose_j_cm2 < straight.far_dose_j_cm2
    assert left.edge_dose_j_cm2 < straight.edge_dose_j_cm2


def test_an_aim_off_the_middle_mirrored_gives_the_same_and_lights_one_wall_better():
    left, right = (increment({"gap_mm": 4, f"{EXPOSURE}/aim_offset_mm": offset}) for offset in (-1.5, 1.5))
    assert left.edge_dose_j_cm2 == pytest.approx(right.edge_dose_j_cm2, rel=1e-12)
    straight = increment({"gap_mm": 4})
    away, towards = right.exposures[0].edge_doses_j_cm2
    assert away < straight.edge_dose_j_cm2 < towards
    assert right.edge_dose_j_cm2 == away


def test_an_aim_off_the_middle_moves_the_axis():
    found = increment({"gap_mm": 4, f"{EXPOSURE}/aim_offset_mm": 1.5}).exposures[0]
    assert found.axis_mw_cm2 == pytest.approx(1000 * on_axis_share(4, 8, 3))
    assert found.middle_mw_cm2 == pytest.approx(1000 * surface_share(4, -1.5, 0, 8, 3))


def test_two_aims_make_up_for_each_other_at_the_walls():
    aims = [{"time_s": 10, "aim_offset_mm": offset} for offset in (-1, 1)]
    both = increment({"gap_mm": 4, "increments/0/exposures": aims})
    one_side = increment({"gap_mm": 4, "increments/0/exposures": [{"time_s": 20, "aim_offset_mm": 1}]})
    assert both.edge_dose_j_cm2 > one_side.edge_dose_j_cm2


def test_the_wall_gets_less_than_the_middle():
    found = increment({"gap_mm": 4, "cavity/width_mm": 6})
    assert 0 < found.edge_dose_j_cm2 < found.far_dose_j_cm2


def test_an_exposure_may_say_its_own_distance():
    found = increment({f"{EXPOSURE}/tip_distance_mm": 5}).exposures[0]
    assert found.tip_distance_mm == 5
    assert found.axis_mw_cm2 == pytest.approx(1000 * on_axis_share(5, 8, 3))


def test_from_a_side_the_light_crosses_half_the_width():
    bare = {"what": "strip", "transmittance_share": 1.0}
    side = {"time_s": 20, "from": "side", "tip_distance_mm": 1}
    found = increment({"increments/0/exposures": [{**side, "through": [bare]}]})
    curve = paste_light(found.increment.composite.paste, traced().plan.mode.bands).curve
    j_cm2 = 1000 * on_axis_share(1, 8, 3) * 20 * 1e-3
    assert found.far_dose_j_cm2 == pytest.approx(j_cm2 * curve.at(2.0))
    assert found.edge_dose_j_cm2 == pytest.approx(j_cm2 * curve.at(4.0))
    assert found.dose_at_j_cm2(0.3) == found.far_dose_j_cm2
    unsaid = increment({"increments/0/exposures": [side]})
    assert unsaid.far_dose_j_cm2 is None, "what lies at the side is not known"
    behind_metal = increment({"matrix": "metal", "increments/0/exposures": [{**side, "through": [bare]}]})
    assert behind_metal.far_dose_j_cm2 == 0.0


def test_the_dose_within_an_increment_ends_at_its_far_dose():
    found = increment({"gap_mm": 1})
    assert found.dose_at_j_cm2(2.0) == found.far_dose_j_cm2
    assert found.dose_at_j_cm2(0.5) > found.dose_at_j_cm2(1.0) > found.dose_at_j_cm2(2.0)


def test_the_adhesive_is_lit_on_the_bare_floor_and_what_comes_after_on_the_top():
    plan = {
        **PLAN, "gap_mm": 1.5, "adhesive": {"card": "bond", "exposures": [{"time_s": 10}]}, "after": [{"time_s": 20}]
    }  # fmt: skip
    trace = traced(plan)
    assert [light.tip_distance_mm for light in trace.exposures()] == [3.5, 1.5, 1.5]
    assert trace.adhesive[0].axis_mw_cm2 == pytest.approx(1000 * on_axis_share(3.5, 8, 3))
    assert [light.layer for light in trace.exposures()] == ["adhesive", "increment", "after"]
    assert trace.adhesive[0].far_dose_j_cm2 is None
