"""Findings: their order, their words, what was measured against which limits that still bear on it."""

import pytest
from farside.check import report_on
from farside.protocol.protocol import base_protocol, protocol_of
from farside.protocol.rule import GRADES, rule_of
from farside.protocol.wording import filled, of_input, placeholders, shown, with_unit
from farside.quantities.registry import visible
from unit.made import CARDS, LAMP, PLAN, PLANS, edited, example, example_cards, example_plan, read

LIMIT = {"strength": "ours", "why": "for the test"}


def findings(rule, plan=PLAN, cards=CARDS):
    made = {
        "kind": "rule", "id": "made", "title": "Made", "about": "increment", "why": "", "limits": {},
        "says": "Increment {number}: {thickness_mm} of {most}.", "do": "Mend.", "examples": [],
    }  # fmt: skip
    protocol = protocol_of({"id": "p", "title": "P", "edition": "1"}, (rule_of({**made, **rule}, "increment"),))
    return report_on(read(plan, cards), protocol).findings


def limits(**values):
    return {name: {"value": value, **LIMIT} for name, value in values.items()}


def level(finding, *when, **words):
    return {"finding": finding, "when": {"all": list(when)}, **words}


TOO_THICK = {"thickness_mm": {"above": {"limit": "most"}}}
FAR_TOO_THICK = {"thickness_mm": {"above": {"limit": "far_most"}}}
POSTERIOR = {"plan.site": {"is": "posterior"}}


def test_words_and_figures_of_a_finding():
    (found,) = findings({"limits": limits(most=1.5), "levels": [level("revise", TOO_THICK)]})
    assert (found.finding, found.says, found.do) == ("revise", "Increment 1: 2.0 mm of 1.5.", "Mend.")
    assert found.where_says == "increment 1"
    data = found.as_data()
    assert data["values"] == {"thickness_mm": 2.0}
    assert data["limits"] == {"most": 1.5}
    assert data["measured"] == {
        "name": "thickness_mm", "value": 2.0, "shown": "2.0", "unit": "mm", "label": "thickness",
        "against": [{"limit": "most", "value": 1.5, "shown": "1.5", "finding": "revise", "side": "above"}],
    }  # fmt: skip


def test_limits_are_listed_from_the_worst_down():
    rule = {"limits": limits(most=1.5, far_most=3), "levels": [level("stop", FAR_TOO_THICK), level("watch", TOO_THICK)]}
    (found,) = findings(rule)
    assert [(a.limit, a.finding) for a in found.measured.against] == [("far_most", "stop"), ("most", "watch")]


def test_a_limit_beside_which_something_else_already_fails_is_not_held_against():
    rule = {
        "limits": limits(most=1.5, far_most=3),
        "levels": [level("stop", FAR_TOO_THICK, POSTERIOR), level("watch", TOO_THICK)],
    }
    (anterior,) = findings(rule, {**PLAN, "site": "anterior"})
    assert [a.limit for a in anterior.measured.against] == ["most"]
    (posterior,) = findings(rule, {**PLAN, "site": "posterior"})
    assert [a.limit for a in posterior.measured.against] == ["far_most", "most"]


def test_a_rule_that_holds_no_number_against_a_limit_measures_nothing():
    (found,) = findings({"levels": [level("watch", POSTERIOR)], "says": "So."}, {**PLAN, "site": "posterior"})
    assert found.measured is None
    assert found.values == {"plan.site": "posterior"}


def test_a_level_may_have_words_of_its_own():
    rule = {"limits": limits(most=1.5), "levels": [level("stop", TOO_THICK, says="Do not, {number}.", do="Thin it.")]}
    (found,) = findings(rule)
    assert (found.says, found.do) == ("Do not, 1.", "Thin it.")


def test_an_open_finding_says_what_is_missing():
    (found,) = findings(
        {
            "limits": limits(most=1),
            "levels": [level("stop", {"far_dose_ratio": {"below": {"limit": "most"}}}, POSTERIOR)],
        },
        cards=[edited(LAMP, {"readings": None}), *CARDS[1:]],
    )
    assert found.finding == "open"
    assert found.missing == ("lamp.readings", "plan.site")
    assert found.says == (
        "Not judged: a reading of the lamp's output in this mode is missing; "
        "whether the tooth is anterior or posterior is missing."
    )
    assert found.measured is None


def test_beyond_reach_the_reason_is_the_range():
    rule = {"limits": limits(most=1), "levels": [level("stop", {"far_dose_ratio": {"below": {"limit": "most"}}})]}
    (found,) = findings(rule, {**PLAN, "gap_mm": 12})
    assert found.finding == "open"
    assert found.says == (
        "Not judged: tip distance 12 is outside 0 to 10 mm, the range over which the model was checked."
    )
    assert found.do.startswith("Look for a slip of the hand.")


def test_a_rule_that_applies_to_nothing_is_listed():
    made = rule_of(
        {
            "id": "made", "title": "", "about": "composite", "applies": {"composite.bulk_fill": {"is": True}},
            "levels": [{"finding": "stop", "when": "always"}], "says": "", "do": "",
        },
        "plan",
    )  # fmt: skip
    report = report_on(read(), protocol_of({"id": "p", "title": "P", "edition": "1"}, (made,)))
    assert (report.findings, report.not_applied, report.verdict) == ((), ("made",), "clear")


@pytest.fixture(scope="module", params=PLANS)
def report(request):
    return report_on(read(example_plan(request.param), example_cards(), example("clinic.yaml")), base_protocol())


LAYERS = (None, "adhesive", "liner", "increment", "after")


def test_findings_run_by_severity_then_plan_then_id(report):
    keys = [
        (
            GRADES.index(f.finding),
            LAYERS.index(f.where["layer"]),
            f.where["increment"] or 0,
            f.where["exposure"] or 0,
            f.rule.id,
        )
        for f in report.findings
    ]
    assert keys == sorted(keys)
    assert report.verdict == report.findings[0].finding


def test_every_rule_either_finds_something_or_is_listed_as_not_applied(report):
    found = {finding.rule.id for finding in report.findings}
    assert found | set(report.not_applied) == {rule.id for rule in base_protocol().rules}
    assert not found & set(report.not_applied)


def test_words_leave_no_placeholder_and_nothing_not_known(report):
    for finding in report.findings:
        if finding.finding != "clear":
            assert not placeholders(finding.says + finding.do)
            assert "not known" not in finding.says or "not known" in finding.rule.says


def numbers(data):
    """Every quantity's value in a report."""
    if isinstance(data, dict):
        if "provenance" in data and "value" in data:
            yield data["value"]
        else:
            for inner in data.values():
                yield from numbers(inner)
    elif isinstance(data, list):
        for inner in data:
            yield from numbers(inner)


def test_every_value_is_rounded_once_to_six_digits_and_findings_use_that_one(report):
    data = report.as_data()
    floats = [value for value in numbers(data) if isinstance(value, float)]
    assert len(floats) > 50
    assert all(float(f"{value:.6g}") == value for value in floats)
    for finding in data["findings"]:
        own = quantities_of(data, finding)
        for name, value in finding["values"].items():
            if name in own:
                assert value == own[name]["value"]
        if finding["measured"] and finding["measured"]["name"] in own:
            assert finding["measured"]["value"] == own[finding["measured"]["name"]]["value"]


def quantities_of(data, finding):
    where, about = finding["where"], finding["about"]
    if about == "increment":
        return data["increments"][where["increment"] - 1]["quantities"]
    if about == "exposure":
        layer = where["layer"]
        held = (
            data["increments"][where["increment"] - 1]["exposures"] if layer == "increment" else data["layers"][layer]
        )
        return held[where["exposure"] - 1]["quantities"]
    if about == "composite":
        return next(entry["quantities"] for entry in data["composites"] if entry["id"] == where["composite"])
    return data[about]["quantities"]


def test_what_fails_never_looks_like_its_limit(report):
    """Below a limit and shown as equal to it would puzzle anyone."""
    for finding in report.findings:
        for against in finding.measured.against if finding.measured else ():
            if finding.measured.value != against.value:
                assert finding.measured.shown != against.shown


@pytest.mark.parametrize(
    ("value", "unit", "against", "text"),
    [
        (0.77329, "", (), "0.773"), (0.9996, "", (1.0,), "0.9996"), (0.99999, "", (1.0,), "0.99999"),
        (1.0, "", (1.0,), "1.0"), (2.0, "mm", (), "2.0"), (12.0, "mm", (), "12"), (20.0, "s", (), "20"),
        (0.00012345, "", (), "0.000123"), (399.96, "mW/cm²", (400,), "399.96"), (True, "", (), "yes"),
        (["operator", "patient"], "", (), "operator, patient"), ("metal", "", (), "metal"), (-0.25, "mm", (), "-0.25"),
    ],
)  # fmt: skip
def test_how_a_value_is_shown(value, unit, against, text):
    assert shown(value, unit, against) == text


def test_units_stand_behind_and_a_degree_close():
    assert with_unit(2.0, visible("increment")["thickness_mm"]) == "2.0 mm"
    assert with_unit(15.0, visible("exposure")["tilt_deg"]) == "15°"
    assert with_unit(0.5, visible("increment")["far_dose_ratio"]) == "0.5"


def test_placeholders_without_a_value_say_so():
    assert filled("{a} and {b.c}", {"a": "1"}) == "1 and not known"
    assert of_input("composite.optics") == "how the composite passes light"
    assert of_input("what.ever") == '"what.ever"'


def test_what_the_model_computes_is_shown_to_two_digits_and_what_was_entered_to_three():
    computed, entered = visible("increment")["far_dose_ratio"], visible("increment")["thickness_mm"]
    assert with_unit(0.77329, computed) == "0.77"
    assert with_unit(0.9991, computed, against=[1.0]) == "0.999"
    assert with_unit(1.25, entered) == "1.25 mm"


def test_a_clear_finding_says_what_holds_and_asks_for_nothing():
    report = report_on(read(example_plan("shallow-clear"), example_cards()), base_protocol())
    clear = [finding for finding in report.findings if finding.finding == "clear"]
    assert len(clear) == len(report.findings)
    assert all((finding.says, finding.do) == (finding.rule.title, "") for finding in clear)
