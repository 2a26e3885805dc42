"""The figures of the drawing: section, profile, clock, windows; one with the report's values."""

import farside
import pytest
from farside.export.drawing import as_drawing
from unit.made import CARDS, PLAN, PLANS, edited, example, example_cards, example_plan


def drawn(plan, cards=CARDS, clinic=None):
    report = farside.check(plan, cards, clinic=clinic)
    return report, as_drawing(report)


@pytest.fixture(scope="module", params=PLANS)
def both(request):
    return drawn(example_plan(request.param), example_cards(), example("clinic.yaml"))


def test_increments_stand_on_each_other_from_the_floor_up(both):
    report, drawing = both
    bottoms = [entry["bottom_mm"] for entry in drawing["increments"]]
    tops = [entry["top_mm"] for entry in drawing["increments"]]
    assert bottoms[0] == report.trace.plan.depth_mm
    assert bottoms[1:] == tops[:-1]
    for entry, increment in zip(drawing["increments"], report.trace.plan.increments, strict=True):
        assert entry["bottom_mm"] - entry["top_mm"] == pytest.approx(increment.thickness_mm)


def test_shares_are_the_reports_and_profiles_end_at_them(both):
    report, drawing = both
    for index, entry in enumerate(drawing["increments"]):
        assert entry["far_share"] == report.increment_value(index, "far_dose_ratio")
        if entry["far_share"] is None:
            assert (entry["profile"], entry["short_from_mm"], entry["far_shown"]) == ([], None, None)
            continue
        depths, shares = zip(*entry["profile"], strict=True)
        assert depths[0] == 0
        assert depths[-1] == pytest.approx(entry["bottom_mm"] - entry["top_mm"], abs=1e-4)
        assert shares[-1] == pytest.approx(entry["far_share"], rel=1e-3)
        assert (entry["short_from_mm"] is None) == (min(shares) >= 1)


def test_an_increments_finding_is_its_worst(both):
    report, drawing = both
    order = ("stop", "revise", "open", "watch", "clear")
    for entry in drawing["increments"]:
        found = [f.finding for f in report.findings if f.where["increment"] == entry["number"]]
        assert entry["finding"] == min(found, key=order.index)


def test_the_clock_has_no_holes(both):
    _, drawing = both
    ends = [spell["start_s"] + spell["length_s"] for spell in drawing["clock"]]
    assert [spell["start_s"] for spell in drawing["clock"]] == pytest.approx([0, *ends[:-1]])
    assert drawing["clock_s"] == pytest.approx(ends[-1])


def test_where_the_dose_falls_short_lies_between_two_points_of_the_profile():
    plan = edited(PLAN, {"increments/0/exposures/0/time_s": 10})
    entry = drawn(plan)[1]["increments"][0]
    assert entry["far_share"] == 0.5
    short_mm = entry["short_from_mm"]
    above = [share for depth, share in entry["profile"] if depth < short_mm]
    below = [share for depth, share in entry["profile"] if depth > short_mm]
    assert min(above) >= 1 > max(below)


def test_an_increment_that_is_short_from_its_lit_face_on():
    entry = drawn(edited(PLAN, {"increments/0/exposures/0/time_s": 1}))[1]["increments"][0]
    assert entry["short_from_mm"] == 0.0


def test_what_is_not_known_is_null():
    _, drawing = drawn(PLAN)
    assert drawing["cavity"] == {"depth_mm": 2.0, "width_mm": 4.0, "remaining_dentine_mm": None}
    assert drawing["window_s"] == [{"number": 1, "window_s": None, "placing_s": None}]
    assert drawing["tip"] == {"diameter_mm": 8.0, "gap_mm": 0.0, "spread_exponent": 3.0}
    empty = drawn(edited(PLAN, {"increments/0/exposures": []}))[1]
    assert (empty["clock"], empty["clock_s"]) == ([], 0.0)
