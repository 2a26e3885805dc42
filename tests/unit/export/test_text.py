"""The report as text: worst first, measured against limit, what to do, what is clear in one line."""

import re
from datetime import date

import farside
import pytest
from farside.export.text import as_text, spoken_date
from farside.protocol.rule import GRADES
from unit.made import PLANS, edited, example, example_cards, example_plan

MARKS = {"■": "stop", "◆": "revise", "◇": "open", "●": "watch", "○": "clear"}


def text_of(plan, cards=None, clinic=None):
    return as_text(farside.check(plan, example_cards() if cards is None else cards, clinic=clinic))


def marked(text):
    """The marks of a text's findings in order; the second line, the verdict, is not one of them."""
    return [line for line in text.splitlines()[3:] if line[:1] in MARKS]


@pytest.fixture(scope="module")
def deep_box():
    return text_of(example_plan("deep-box"))


def test_the_head_names_plan_day_protocol_and_verdict(deep_box):
    head, _, verdict = deep_box.splitlines()[:3]
    assert re.fullmatch(r"Lower molar, mesial box · for 30 November 2026 · protocol base \S+ \([0-9a-f]{8}\)", head)
    assert verdict == "■ Do not expose increment 1 yet"


def test_the_worst_comes_first_measured_against_its_limits(deep_box):
    block = deep_box.split("\n\n")[2]
    assert block.startswith("■ stop    Do not expose increment 1 yet: its far side gets 0.7")
    flat = " ".join(block.split())
    assert re.search(r"far dose ratio 0\.\d+: stop below 0\.8, revise below 1\.0, watch below 1\.2", flat)
    assert "increment 1 · far-side-dose" in flat
    assert "Expose longer, place a thinner increment, or bring the tip closer." in flat
    assert "warms the pulp" in flat


@pytest.mark.parametrize("name", PLANS)
def test_every_text_runs_from_the_worst_to_one_clear_line(name):
    text = text_of(example_plan(name), clinic=example("clinic.yaml"))
    grades = [MARKS[line[0]] for line in marked(text)]
    assert grades == sorted(grades, key=GRADES.index)
    assert grades.count("clear") == 1
    assert re.fullmatch(r"○ clear   \d+ (other )?checks, by these rules and these inputs\.", marked(text)[-1])
    for line in marked(text):
        assert line[2:].startswith(MARKS[line[0]])
    assert max(map(len, text.splitlines()[1:])) <= 100
    assert text.endswith(" Clear never means that it has set.\n")


def test_a_rules_id_is_never_broken_over_two_lines():
    report = farside.check(example_plan("deep-box"), example_cards())
    text = as_text(report)
    for finding in report.findings:
        if finding.finding != "clear":
            assert re.search(rf"(^|\s){finding.rule.id}$", text, re.MULTILINE)


def test_a_caution_stands_under_what_can_hurt_and_not_under_the_rest(deep_box):
    report = farside.check(example_plan("deep-box"), example_cards())
    flat = " ".join(deep_box.split())
    for finding in report.findings:
        if finding.rule.caution and finding.finding in {"stop", "revise"}:
            assert " ".join(finding.rule.caution.split()) in flat
    watched = [f.rule.caution for f in report.findings if f.finding == "watch" and f.rule.caution]
    alarmed = {f.rule.caution for f in report.findings if f.finding in {"stop", "revise"}}
    assert watched
    assert not any(" ".join(words.split()) in flat for words in set(watched) - alarmed)


def test_a_clear_plan_says_how_many_checks_and_no_other():
    text = text_of(example_plan("shallow-clear"))
    assert text.splitlines()[2] == "○ Clear by these rules and these inputs"
    assert len(marked(text)) == 1
    assert " other " not in marked(text)[0]


def test_what_is_open_says_what_is_missing():
    text = text_of(edited(example_plan("shallow-clear"), {"cavity/remaining_dentine_mm": None}))
    assert "◇ open    Not judged: the remaining dentine is missing." in text
    assert text.splitlines()[2] == "◇ Not judged to the end: something is missing or out of range"


def test_assumed_optics_are_said_once_a_composite(deep_box):
    findings = farside.check(example_plan("deep-box"), example_cards()).findings
    assert sum(finding.rule.id == "assumed-optics" and finding.finding == "watch" for finding in findings) == 3
    assert deep_box.count("assumed-optics") == 1


def test_markup_in_a_title_is_only_text():
    title = "<b>bold</b> [link](x) {plan.title} %s"
    assert text_of(edited(example_plan("shallow-clear"), {"title": title})).startswith(title + " · for ")


def test_dates_as_people_say_them():
    assert spoken_date(date(2026, 11, 3)) == "3 November 2026"


def test_what_stands_whatever_the_plan_is_said_once_with_its_remedy(deep_box):
    assert deep_box.count("Assumed: how Universal, medium passes light.") == 1
    blocks = deep_box.split("\n\n")
    told = next(index for index, block in enumerate(blocks) if "Assumed: how" in block)
    assert "Measure one disc" in blocks[told]
    assert blocks[told + 1].startswith("○ clear"), "after all that the plan itself gives"


def test_a_revise_of_a_standing_rule_is_told_in_its_place():
    thick = edited(example_plan("deep-box"), {"increments/0/thickness_mm": 2.6, "increments/1/thickness_mm": 1.4})
    text = text_of(thick)
    assert "thicker than its maker's row" in " ".join(text.split())
    assert text.index("thicker than") < text.index("● watch")
