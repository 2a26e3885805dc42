"""The registry itself: names, units, words and inputs of every quantity."""

import pytest
from farside.protocol.messages import INPUTS
from farside.quantities.inputs import origin
from farside.quantities.reach import _INPUTS
from farside.quantities.registry import QUANTITIES, visible
from farside.quantities.subject import ABOUT, ENCLOSING, subjects
from unit.made import ADHESIVE, CARDS, PLAN, traced

UNIT_OF_ENDING = {
    "_mm": "mm", "_s": "s", "_days": "days", "_nm": "nm", "_lx": "lx", "_deg": "°", "_c": "°C", "_k": "K",
    "_mw_cm2": "mW/cm²", "_j_cm2": "J/cm²", "_per_mm": "1/mm", "_share": "", "_ratio": "", "_count": "",
}  # fmt: skip
NAMED_OTHERWISE = {
    "increment_number": "", "is_last": "", "timer_fit": "", "baseline_comparable": "", "reading_meter": "",
    "reading_sleeve": "", "days_to_expiry": "days",
}  # fmt: skip

every_quantity = pytest.mark.parametrize("quantity", QUANTITIES, ids=lambda q: f"{q.about}-{q.name}")


def whole_trace():
    """A plan with every sort of subject."""
    layer = {"exposures": [{"time_s": 10}]}
    liner = {**ADHESIVE, "kind": "liner", "id": "base"}
    plan = {**PLAN, "adhesive": {"card": "bond", **layer}, "liner": {"card": "base", **layer}, "after": [{"time_s": 9}]}
    return traced(plan, [*CARDS, liner])


def test_no_two_of_one_subject_share_a_name():
    names = [(quantity.about, quantity.name) for quantity in QUANTITIES]
    assert len(set(names)) == len(names)


@every_quantity
def test_the_name_ends_in_its_unit(quantity):
    ending = max((end for end in UNIT_OF_ENDING if quantity.name.endswith(end)), key=len, default=None)
    assert quantity.unit == (NAMED_OTHERWISE[quantity.name] if ending is None else UNIT_OF_ENDING[ending])


@every_quantity
def test_it_says_what_it_means_and_its_label_carries_no_unit(quantity):
    assert len(quantity.means) > 5
    assert quantity.label
    assert not any(quantity.label.endswith(f" {unit}") for unit in ("mm", "s", "mw cm2", "j cm2", "deg", "lx", "days"))


@every_quantity
def test_its_inputs_are_known_and_have_words(quantity):
    assert set(quantity.reads) <= INPUTS.keys()
    trace = whole_trace()
    for subject in subjects(trace, quantity.about):
        for name in quantity.reads:
            assert origin(name, subject) in {None, "measured", "maker", "published", "assumed"}
    assert set(quantity.reach or ()) <= _INPUTS.keys()


def test_a_subject_sees_its_own_and_what_encloses_it_the_innermost_first():
    for about in ABOUT:
        sorts = {quantity.about for quantity in visible(about).values()}
        assert sorts <= set(ENCLOSING[about])
    assert visible("exposure")["tip_distance_mm"].about == "exposure"
    assert visible("increment")["tip_distance_mm"].about == "increment"
    assert visible("exposure")["surface_irradiance_mw_cm2"].about == "exposure"
    assert visible("exposure")["far_dose_ratio"].about == "increment"
    assert "far_dose_ratio" not in visible("plan")
    assert "remaining_dentine_mm" not in visible("composite")


def test_the_names_of_the_vocabulary_are_there():
    names = {quantity.name for quantity in QUANTITIES}
    assert names >= {
        "chair_time_s", "fill_gap_mm", "eye_day_share", "room_weighted_mw_cm2", "assumed_input_count",
        "reading_age_days", "output_of_baseline_share", "radiant_exitance_mw_cm2", "thickness_mm", "tip_distance_mm",
        "surface_irradiance_mw_cm2", "surface_radiant_exposure_j_cm2", "far_dose_j_cm2", "needed_far_dose_j_cm2",
        "far_dose_ratio", "edge_dose_ratio", "far_radiant_exposure_j_cm2", "spectrum_match_ratio", "working_window_s",
        "placing_of_window_share", "time_s", "tilt_deg", "footprint_share",
    }  # fmt: skip


def test_subjects_come_in_the_order_of_the_chair():
    trace = whole_trace()
    found = [subject.where() for subject in subjects(trace, "exposure")]
    assert [where["layer"] for where in found] == ["adhesive", "liner", "increment", "after"]
    assert [where["increment"] for where in found] == [None, None, 1, None]
    assert [where["composite"] for where in found] == [None, None, "paste", None]


def test_nothing_encloses_an_adhesives_exposure_but_plan_and_lamp():
    first = next(subjects(whole_trace(), "exposure"))
    assert first.enclosing("increment") is None
    assert first.enclosing("composite") is None
    assert first.enclosing("plan").about == "plan"
    assert first.enclosing("lamp").about == "lamp"
    assert first.enclosing("exposure") is first
    assert first.layer.id == "bond"
