"""The main job: the documented call, and the two plans whose verdicts every change must keep."""

import copy
from datetime import date

import farside
import pytest
from farside.check import report_on
from farside.clinic.cards import Cards, documents_of
from farside.protocol.protocol import base_protocol, protocol_of
from farside.reading.document import Document
from farside.reading.problems import Refused
from unit.made import CARDS, LAMP, PLAN, edited, example, example_cards, example_plan, read


def quantity(report, name, increment=0):
    return report.as_data()["increments"][increment]["quantities"][name]


@pytest.fixture(scope="module")
def shallow():
    return farside.check(example_plan("shallow-clear"), example_cards())


@pytest.fixture(scope="module")
def deep():
    return farside.check(example_plan("deep-box"), example_cards())


def test_shallow_clear_is_clear_with_room_to_spare(shallow):
    assert shallow.verdict == "clear"
    assert {finding.finding for finding in shallow.findings} == {"clear"}
    assert quantity(shallow, "far_dose_ratio")["value"] >= 1.6
    assert shallow.trace.plan.remaining_dentine_mm >= 3


def test_shallow_clear_assumes_nothing(shallow):
    data = shallow.as_data()
    assert data["plan"]["quantities"]["assumed_input_count"]["value"] == 0
    held = [data["plan"], data["lamp"], *data["composites"], *data["increments"], *data["layers"]["adhesive"]]
    found = [quantity for entry in held for quantity in entry["quantities"].values()]
    assert len(found) > 40
    assert all(entry["provenance"] != "assumed" and "assumed" not in entry for entry in found)


def test_deep_box_stops_on_its_first_increments_far_side_and_on_nothing_else(deep):
    assert deep.verdict == "stop"
    stops = [(f.rule.id, f.where["increment"]) for f in deep.findings if f.finding == "stop"]
    assert stops == [("far-side-dose", 1)]
    assert quantity(deep, "far_dose_ratio")["value"] < 0.8
    assert deep.trace.plan.depth_mm == 6
    assert {increment.thickness_mm for increment in deep.trace.plan.increments} == {2.0}
    assert deep.trace.plan.remaining_dentine_mm >= 2


@pytest.mark.parametrize("name", ["shallow-clear", "deep-box"])
def test_the_clinics_usual_values_change_neither(name):
    alone = farside.check(example_plan(name), example_cards())
    beside = farside.check(example_plan(name), example_cards(), clinic=example("clinic.yaml"))
    assert beside.as_data() == alone.as_data()


def test_the_day_of_the_call_comes_first():
    assert farside.check(PLAN, CARDS, on=date(2026, 12, 24)).as_data()["on"] == "2026-12-24"
    assert farside.check(PLAN, CARDS).as_data()["on"] == "2026-11-30"


def test_a_later_day_ages_the_reading():
    def age(on):
        return farside.check(PLAN, CARDS, on=on).as_data()["lamp"]["quantities"]["reading_age_days"]["value"]

    assert age(date(2026, 12, 11)) - age(date(2026, 12, 1)) == 10


def test_a_day_before_the_lamps_first_reading_leaves_its_output_open():
    report = farside.check(PLAN, CARDS, on=date(2026, 1, 1))
    assert "radiant_exitance_mw_cm2" not in report.as_data()["lamp"]["quantities"]
    (dose,) = [finding for finding in report.findings if finding.rule.id == "far-side-dose"]
    assert (dose.finding, dose.missing) == ("open", ("lamp.readings",))


def test_data_documents_and_cards_give_the_same():
    whole = farside.check(PLAN, CARDS).as_data()
    assert farside.check(Document.of(PLAN, "plan"), documents_of(CARDS)).as_data() == whole
    assert farside.check(PLAN, Cards(documents_of(CARDS))).as_data() == whole
    assert farside.check(PLAN, iter([LAMP, *documents_of(CARDS[1:])])).as_data() == whole


def test_checking_twice_gives_the_same_and_leaves_the_data_as_it_was():
    plan, cards = edited(PLAN, {}), [edited(card, {}) for card in CARDS]
    assert farside.check(plan, cards).as_data() == farside.check(plan, cards).as_data()
    assert (plan, tuple(cards)) == (PLAN, CARDS)


def test_a_protocol_of_ones_own():
    base = base_protocol()
    head = {"id": "short", "title": "Short", "edition": "1"}
    report = farside.check(PLAN, CARDS, protocol_of(head, (base.rule("fill-gap"),)))
    assert [finding.rule.id for finding in report.findings] == ["fill-gap"]
    assert report.as_data()["protocol"]["id"] == "short"
    assert report.protocol.digest != base.digest


def test_every_finding_is_about_something_of_this_plan():
    plan = edited(PLAN, {"increments": PLAN["increments"] * 2, "cavity/depth_mm": 4})
    for finding in report_on(read(plan), base_protocol()).findings:
        where = finding.where
        assert where["increment"] in {None, 1, 2}
        assert (where["increment"] is not None) == (finding.rule.about == "increment" or where["layer"] == "increment")
        assert (where["exposure"] is not None) == (finding.rule.about == "exposure")
        assert where["lamp"] == ("lamp" if finding.rule.about == "lamp" else None)


def test_what_cannot_be_meant_is_refused():
    with pytest.raises(Refused, match="no lamp card"):
        farside.check(PLAN)


def test_an_exposure_from_the_side_clears_no_far_side_behind_metal():
    plan = copy.deepcopy(example_plan("deep-box"))
    assert plan["matrix"] == "metal"
    side = {"time_s": 60, "from": "side", "side": "buccal", "tip_distance_mm": 1}
    for increment in plan["increments"]:
        increment["exposures"].append({**side, "through": [{"what": "strip", "transmittance_share": 1.0}]})
    report = farside.check(plan, example_cards(), clinic=example("clinic.yaml"))
    far = [finding for finding in report.findings if finding.rule.id == "far-side-dose"]
    assert far[0].finding == "stop"
    assert report.increment_value(0, "far_dose_ratio") < 0.8
