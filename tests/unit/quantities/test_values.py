"""Values of quantities: by hand, rounded once, with what they rest on, and what is missing where there is none."""

import math

import pytest
from farside.quantities.quantity import Found, NotHad, rounded
from farside.quantities.reach import ADHESIVE_REACH, BEAM_REACH, LIGHT_REACH
from farside.quantities.registry import visible
from farside.quantities.subject import subjects
from farside.quantities.values import Valued
from unit.made import ADHESIVE, CARDS, COMPOSITE, LAMP, PLAN, edited, traced

EXPOSURE = "increments/0/exposures/0"
UNKNOWN_OVERLAY = {f"{EXPOSURE}/through": [{"what": "glass-ceramic"}]}


def outcome(name, about="increment", plan=None, cards=CARDS, index=0):
    trace = traced(edited(PLAN, plan or {}), cards)
    subject = list(subjects(trace, about))[index]
    return Valued(trace).of(subject).found(name)


def value(name, about="increment", plan=None, cards=CARDS, index=0):
    found = outcome(name, about, plan, cards, index)
    return found.value if isinstance(found, Found) else None


def lamp(**edits):
    return [edited(LAMP, edits), COMPOSITE, ADHESIVE]


def paste(**edits):
    return [LAMP, edited(COMPOSITE, edits), ADHESIVE]


def reading(on, exitance, meter="laboratory", sleeve="none"):
    return {"on": on, "mode": "on", "radiant_exitance_mw_cm2": exitance, "meter": meter, "sleeve": sleeve}


@pytest.mark.parametrize(
    ("raw", "kept"), [(1.23456789, 1.23457), (123456.7, 123457.0), (0.000012345678, 1.23457e-05), (2.0, 2.0)]
)
def test_numbers_are_kept_to_six_digits(raw, kept):
    assert rounded(raw) == kept


def test_words_and_answers_are_kept_as_they_are():
    assert rounded(True) is True
    assert rounded("sum") == "sum"


def test_at_the_makers_own_conditions_the_ratio_is_one():
    assert value("far_dose_ratio") == 1.0
    assert value("spectrum_match_ratio") == pytest.approx(1.0)
    assert value("time_of_maker_share") == value("thickness_of_maker_share") == value("exitance_of_maker_share") == 1.0


def test_irradiance_and_radiant_exposure_by_hand():
    plan = {"gap_mm": 3, "increments/0/exposures": [{"time_s": 10}, {"time_s": 5, "tip_distance_mm": 0}]}
    at_3_mm = 1000 * (1 - (3 / 5) ** 4)  # a disc of radius 4 seen from 3 away, m = 3
    assert value("surface_irradiance_mw_cm2", plan=plan) == 1000.0
    assert value("surface_irradiance_mw_cm2", "exposure", plan) == pytest.approx(at_3_mm)
    assert value("surface_radiant_exposure_j_cm2", plan=plan) == pytest.approx((at_3_mm * 10 + 1000 * 5) / 1000)
    assert value("tip_distance_mm", plan=plan) == 3.0
    assert value("tip_distance_mm", "exposure", plan, index=1) == 0.0


def test_the_adhesives_dose_by_hand():
    plan = {"gap_mm": 1, "adhesive": {"card": "bond", "exposures": [{"time_s": 10}]}}
    share = 1 - (3 / 5) ** 4  # the floor is 3 mm away
    assert value("adhesive_dose_ratio", "plan", plan) == pytest.approx(1000 * share * 10 / (500 * 10), rel=1e-5)
    assert value("adhesive_time_of_maker_share", "plan", plan) == 1.0
    assert value("adhesive_dose_ratio", "plan") is None


def test_sums_of_millimetres_are_free_of_binary_dust():
    three = [{"composite": "paste", "thickness_mm": 0.7}] * 3
    assert value("fill_gap_mm", "plan", {"cavity/depth_mm": 2.1, "increments": three}) == 0.0
    assert value("fill_gap_mm", "plan", {"gap_mm": 1, "cavity/depth_mm": 2.0, "increments": three}) == -0.1


def test_the_chairs_time_and_the_most_in_a_minute():
    plan = {
        "increments/0/exposures": [{"time_s": 20}, {"time_s": 20, "rest_before_s": 30}],
        "increments/0/placing_s": 9,
    }
    assert value("chair_time_s", "plan", plan) == 79.0
    assert value("chair_time_s", "plan", {"increments/0/exposures": plan["increments/0/exposures"]}) is None
    assert value("site_radiant_exposure_j_cm2", "plan", plan) == 30.0  # 20 s and 10 s of the other at 1 W/cm²


def test_rest_is_counted_from_the_end_of_the_last_exposure():
    exposures = [{"time_s": 20}, {"time_s": 20, "rest_before_s": 7}]
    halves = [{"composite": "paste", "thickness_mm": 1, "placing_s": 30, "exposures": exposures}] * 2
    rests = [value("rest_before_s", "exposure", {"increments": halves}, index=index) for index in range(4)]
    assert rests == [600.0, 7.0, 30.0, 7.0]


@pytest.mark.parametrize(("time_s", "fit"), [(10, "one"), (20, "one"), (30, "sum"), (60, "sum"), (25, "neither")])
def test_what_the_timer_gives(time_s, fit):
    assert value("timer_fit", "exposure", {f"{EXPOSURE}/time_s": time_s}) == fit


def test_a_timer_not_known_fits_nothing_and_is_named():
    found = outcome("timer_fit", "exposure", cards=lamp(**{"modes/0/times_s": None}))
    assert isinstance(found, NotHad)


def test_the_lamps_log():
    readings = [reading("2026-06-01", 1200), reading("2026-11-20", 900)]
    assert value("reading_age_days", "lamp", cards=lamp(readings=readings)) == 10.0
    assert value("output_of_baseline_share", "lamp", cards=lamp(readings=readings)) == 0.75
    stated = lamp(readings=readings, stated_exitance_mw_cm2=1000)
    assert value("output_of_stated_share", "lamp", {"lamp/sleeve": "wrinkled"}, stated) == 0.9
    other_meter = [reading("2026-06-01", 1200), reading("2026-11-20", 900, meter="hand-held")]
    assert value("output_of_baseline_share", "lamp", cards=lamp(readings=other_meter)) is None
    assert value("baseline_comparable", "lamp", cards=lamp(readings=other_meter)) is False


def test_output_over_stated_is_bare_and_over_the_makers_row_through_the_sleeve():
    plan, cards = {"lamp/sleeve": "fitted"}, lamp(stated_exitance_mw_cm2=1000)
    assert value("radiant_exitance_mw_cm2", "lamp", plan, cards) == 1000.0
    assert value("output_of_stated_share", "lamp", plan, cards) == 1.0
    assert value("exitance_of_maker_share", "increment", plan, cards) == 0.93


def test_the_walls_shadow():
    plan = {"cavity/depth_mm": 4, f"{EXPOSURE}/tilt_deg": 20}
    assert value("unfilled_above_mm", plan=plan) == 2.0
    assert value("shadow_share", plan=plan) == pytest.approx(2 * math.tan(math.radians(20)) / 4, rel=1e-5)
    both = {"cavity/depth_mm": 4, "increments/0/exposures": [{"time_s": 9, "tilt_deg": t} for t in (20, -20)]}
    assert value("shadow_share", plan=both) == 0.0


def test_the_footprint_is_the_part_of_the_width_above_half():
    assert value("footprint_share", "exposure") == 1.0  # 4 mm under an 8 mm tip that touches
    wide = {"cavity/width_mm": 16}
    assert value("footprint_share", "exposure", wide) == pytest.approx(0.5, abs=0.03)


def test_room_light_over_the_placing_time():
    room = {"room": {"sources": [{"what": "window", "illuminance_lx": 8000}]}, "increments/0/placing_s": 45}
    assert value("working_window_s", plan=room) == 60.0
    assert value("placing_of_window_share", plan=room) == 0.75
    assert value("open_of_window_share", plan=room) is None
    dispensed = {**room, "increments/0/dispensed_s": 30}
    assert value("open_of_window_share", plan=dispensed) == 1.25
    assert value("open_time_s", plan=dispensed) == 75.0


def test_in_the_dark_there_is_no_window_and_none_of_it_is_used():
    dark = {"room": {"sources": []}, "increments/0/placing_s": 45, "increments/0/dispensed_s": 5}
    assert value("working_window_s", plan=dark) is None
    assert value("placing_of_window_share", plan=dark) == 0.0
    assert value("open_of_window_share", plan=dark) == 0.0


# What a value rests on


def test_a_value_is_as_good_as_the_worst_input_that_it_read():
    assert outcome("thickness_mm").provenance == "measured"
    assert outcome("surface_irradiance_mw_cm2").provenance == "measured"
    found = outcome("far_dose_ratio")
    assert (found.provenance, found.assumed) == ("maker", ())


def test_assumed_inputs_are_listed():
    found = outcome("far_dose_ratio", cards=paste(optics=None, resin_weight_share=None))
    assert found.provenance == "assumed"
    assert found.assumed == ("composite.optics", "composite.resin_weight_share")
    beam = outcome("surface_irradiance_mw_cm2", cards=lamp(beam=None))
    assert (beam.provenance, beam.assumed) == ("assumed", ("lamp.beam",))
    assert outcome("thickness_mm", cards=paste(optics=None)).provenance == "measured"


def test_the_count_of_what_is_assumed():
    assert value("assumed_input_count", "plan") == 0.0
    cards = [edited(LAMP, {"beam": None}), edited(COMPOSITE, {"optics": None, "initiators": None})]
    assert value("assumed_input_count", "plan", cards=cards) == 3.0


@pytest.mark.parametrize(
    ("name", "about", "plan", "cards", "missing"),
    [
        ("far_dose_ratio", "increment", {}, lamp(readings=None), ("lamp.readings",)),
        ("far_dose_ratio", "increment", {}, paste(maker_instructions=None), ("composite.maker_instructions",)),
        ("far_dose_ratio", "increment", UNKNOWN_OVERLAY, CARDS, ("increment.through",)),
        ("surface_irradiance_mw_cm2", "exposure", UNKNOWN_OVERLAY, CARDS, ("exposure.through",)),
        ("site_radiant_exposure_j_cm2", "plan", UNKNOWN_OVERLAY, CARDS, ("plan.through",)),
        ("eye_day_share", "plan", {}, CARDS, ("plan.team.exposures_today_count",)),
        ("eye_day_share", "plan", {}, lamp(readings=None), ("lamp.readings", "plan.team.exposures_today_count")),
        ("working_window_s", "increment", {}, CARDS, ("plan.room.sources",)),
        ("placing_of_window_share", "increment", {}, CARDS, ("plan.room.sources", "increment.placing_s")),
        ("remaining_dentine_mm", "plan", {}, CARDS, ("plan.cavity.remaining_dentine_mm",)),
        ("days_to_expiry", "composite", {}, CARDS, ("composite.expires",)),
        ("violet_initiator_count", "composite", {}, paste(initiators=None), ("composite.initiators_known",)),
        ("output_of_stated_share", "lamp", {}, CARDS, ("lamp.stated_exitance_mw_cm2",)),
        ("adhesive_dose_ratio", "plan", {}, CARDS, ("plan.adhesive", "adhesive.maker_instructions")),
    ],
)  # fmt: skip
def test_what_is_missing_is_named(name, about, plan, cards, missing):
    assert outcome(name, about, plan, cards) == NotHad(missing, ())


# How far the model reaches

OUTSIDE = [
    ("exitance_mw_cm2", {}, lamp(**{"readings/0/radiant_exitance_mw_cm2": 99}), "99 is outside 100 to 4000"),
    ("exitance_mw_cm2", {}, lamp(**{"readings/0/radiant_exitance_mw_cm2": 4001}), "4001 is outside 100 to 4000"),
    ("time_s", {f"{EXPOSURE}/time_s": 0.9}, CARDS, "0.9 is outside 1 to"),
    ("tip_distance_mm", {"gap_mm": 10.1}, CARDS, "10.1 is outside 0 to 10"),
    ("tip_diameter_mm", {}, lamp(tip_diameter_mm=5.9), "5.9 is outside 6 to 12"),
    ("spread_exponent", {}, lamp(**{"beam/spread_exponent": 14.5}), "14.5 is outside 0 to 14"),
    ("absorption_per_mm", {}, paste(**{"optics/absorption_per_mm": 1.1}), "1.1 is outside 0.05 to 1"),
    ("reduced_scattering_per_mm", {}, paste(**{"optics/reduced_scattering_per_mm": 0.4}), "0.4 is outside 0.5 to 4"),
    ("thickness_mm", {"increments/0/thickness_mm": 0.4}, CARDS, "0.4 is outside 0.5 to 5"),
]


@pytest.mark.parametrize(("name", "plan", "cards", "says"), OUTSIDE, ids=[f"{o[0]}-{o[3][:4]}" for o in OUTSIDE])
def test_beyond_its_reach_a_quantity_is_left_out_with_the_reason(name, plan, cards, says):
    found = outcome("far_dose_ratio", "increment", plan, cards)
    assert isinstance(found, NotHad)
    (reason,) = found.beyond
    label = name.removesuffix("_per_mm").removesuffix("_mw_cm2").removesuffix("_mm").removesuffix("_s")
    assert reason.startswith(f"{label.replace('_', ' ')} {says}")
    assert value("thickness_mm", "increment", plan, cards) is not None
    assert value("beyond_reach_count", "plan", plan, cards) >= 1


def test_at_the_ends_of_its_reach_it_is_given():
    cards = [
        edited(LAMP, {"tip_diameter_mm": 6, "beam/spread_exponent": 14, "readings/0/radiant_exitance_mw_cm2": 4000}),
        edited(COMPOSITE, {"optics/absorption_per_mm": 1.0, "optics/reduced_scattering_per_mm": 4}),
    ]
    plan = {"gap_mm": 10, "cavity/depth_mm": 5, "increments/0/thickness_mm": 5, f"{EXPOSURE}/time_s": 60}
    assert value("far_dose_ratio", plan=plan, cards=cards) > 0
    assert value("beyond_reach_count", "plan", plan, cards) == 0.0


def test_the_adhesives_dose_reaches_no_further_than_the_beam():
    adhesive = {"adhesive": {"card": "bond", "exposures": [{"time_s": 10}]}}
    near, far = {**adhesive, "gap_mm": 8}, {**adhesive, "gap_mm": 8.5}
    assert value("adhesive_dose_ratio", "plan", near) > 0
    assert outcome("adhesive_dose_ratio", "plan", far).beyond == ("adhesive tip distance 10.5 is outside 0 to 10 mm",)
    assert value("far_dose_ratio", plan=far) > 0
    assert value("beyond_reach_count", "plan", far) == 1.0


def test_no_reach_is_narrower_than_what_was_asked():
    asked = {
        "exitance_mw_cm2": (100, 4000), "time_s": (1, 60), "tip_distance_mm": (0, 10), "tip_diameter_mm": (6, 12),
        "spread_exponent": (0, 14), "absorption_per_mm": (0.05, 1), "reduced_scattering_per_mm": (0.5, 4),
        "thickness_mm": (0.5, 5), "adhesive_tip_distance_mm": (0, 10),
    }  # fmt: skip
    for reach in (LIGHT_REACH, BEAM_REACH, ADHESIVE_REACH):
        for name, (low, high) in reach.items():
            assert low <= asked[name][0]
            assert high >= asked[name][1]


def test_values_are_worked_out_once():
    trace = traced()
    valued = Valued(trace)
    subject = next(subjects(trace, "increment"))
    quantity = visible("increment")["far_dose_ratio"]
    assert valued.found(quantity, subject) is valued.found(quantity, subject)
