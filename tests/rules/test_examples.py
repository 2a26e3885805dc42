"""Every rule's own examples: the finding that each gives, and that they show what a reader looks for."""

from pathlib import Path

import pytest
from farside.protocol.examples import Given, outcome
from farside.protocol.protocol import base_protocol
from farside.protocol.rule import Rule

RULES = base_protocol().rules
BASE = Path(__file__).parents[2] / "rules" / "base"
EXAMPLES = [(rule, example) for rule in RULES for example in rule.data["examples"]]

# Rules with no clear example, since they mark whatever they apply to.
ALWAYS_MARK = {"assumed-optics", "initiator-unknown", "self-setting-part"}
# Rules whose every input is always there, or whose silence is itself an answer: nothing can be open.
NEVER_OPEN = {"expired", "lamp-timer", "self-setting-part", "tilt", "tip-clean", "undercut"}


@pytest.mark.parametrize(("rule", "example"), EXAMPLES, ids=[f"{r.id}: {e['name']}" for r, e in EXAMPLES])
def test_example_gives_its_finding(rule: Rule, example: dict) -> None:
    assert outcome(rule, example["given"]) == example["finding"]


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_examples_show_every_finding(rule: Rule) -> None:
    shown = {example["finding"] for example in rule.data["examples"]}
    possible = {level.finding for level in rule.levels}
    possible |= set() if rule.id in ALWAYS_MARK else {"clear"}
    possible |= set() if rule.id in NEVER_OPEN else {"open"}
    if rule.id == "beyond-model":
        possible -= {"watch"}  # what would be watched is open already
    assert shown - {"not-applied"} == possible


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_levels_are_nested(rule: Rule) -> None:
    """Where a worse level holds, so do the milder ones after it, over all of the rule's examples."""
    for example in rule.data["examples"]:
        values, limits = Given(example["given"]), rule.limit_values
        held = [(level.finding, level.when.judged(values, limits)) for level in rule.levels]
        first = next((finding for finding, holds in held if holds), None)
        milder = held[[holds for _, holds in held].index(True) :] if first else []
        assert all(holds for finding, holds in milder if finding != first), example["name"]


@pytest.mark.parametrize("rule", [r for r in RULES if any(v.finding == "stop" for v in r.levels)], ids=lambda r: r.id)
def test_a_stop_says_what_not_to_do(rule: Rule) -> None:
    for level in rule.levels:
        if level.finding == "stop":
            assert level.says.startswith("Do not "), level.says


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_a_rule_with_a_stop_has_a_caution(rule: Rule) -> None:
    if any(level.finding == "stop" for level in rule.levels):
        assert rule.caution


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_common_practice_is_owned_up_to(rule: Rule) -> None:
    """A rule that cites nobody and rests on more than its maker's word says so in its first words."""
    if not rule.sources and rule.strength == "common-practice" and "maker" not in str(rule.data).lower():
        assert rule.data["why"].startswith("Common practice, no source.")


def test_one_file_one_rule() -> None:
    files = {path.stem: path.parent.name for path in BASE.glob("*/*.yaml")}
    assert files == {rule.id: rule.topic for rule in RULES}
