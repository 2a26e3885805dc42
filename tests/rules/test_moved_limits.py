"""Every rule's examples notice when a limit of it, or a level's condition, is not what it was: one change at a time.

Limits of numbers move by 1 % both ways; by one step where they count, are days, or are zero. Lists lose each word and
gain one. Conditions, and the numbers and words that stand in them, are changed too.
"""

import copy
from collections.abc import Iterator
from typing import Any

import pytest
from farside.protocol.examples import Given, outcome
from farside.protocol.fields import fields
from farside.protocol.protocol import base_protocol
from farside.protocol.rule import Rule, judged, rule_of

RULES = base_protocol().rules
Path = tuple[str | int, ...]
COUNTED = ("_count", "_days", "_number", "days_to_expiry")
ALWAYS: Any = "always"
NEVER: Any = {"any": []}

# What cannot matter, and why.
WITHOUT_EFFECT: dict[tuple[str, str], str] = {
    ("beyond-model", "levels.0.when -> never"): "what it would find is open already",
    ("sensitive-person", "none ['no'] -> ['no', 'yes']"): "a yes is a stop already",
    (
        "lamp-timer",
        "levels.2.when.any.1.all.1.timer_fit.one_of ['sum', 'neither'] -> ['sum']",
    ): "a time that cannot be had is to be revised already",
    (
        "tip-clean",
        "levels.1.when.any.0.all.0.lamp.tip.state.given True -> False",
    ): "a tip that is spoilt is to be revised already",
}


def unnoticed(rule: Rule, what: str, data: dict[str, Any]) -> bool:
    """Whether each of a rule's examples still gives its finding after a change; of levels, its words too."""
    changed = rule_of(data, rule.topic)
    if any(outcome(changed, example["given"]) != example["finding"] for example in rule.data["examples"]):
        return False
    return not what.startswith("levels.") or words(changed) == words(rule)


def words(rule: Rule) -> list[str | None]:
    """What each of a rule's examples is told: two levels may find the same in other words."""
    found = [judged(rule, Given(example["given"])) for example in rule.data["examples"]]
    return [one.level.says if one and one.level else None for one in found]


def changes(rule: Rule) -> Iterator[tuple[str, dict[str, Any]]]:
    """Each change of a rule: what it is, and the rule's data with it."""
    for path, value in changed_parts(rule):
        data = copy.deepcopy(dict(rule.data))
        held: Any = data
        for step in path[:-1]:
            held = held[step]
        was = held[path[-1]]
        held[path[-1]] = value
        name = ".".join(map(str, path)).removeprefix("limits.").removesuffix(".value")
        if path[-1] in {"when", "applies", "open_when"}:
            yield f"{name} -> {'always' if value is ALWAYS else 'never'}", data
        else:
            yield f"{name} {was} -> {value}", data


def changed_parts(rule: Rule) -> Iterator[tuple[Path, Any]]:
    """Where a rule's data is changed, and to what."""
    data = rule.data
    for name, limit in data.get("limits", {}).items():
        held_against = {test.name for test in rule.tests() for part in test.operands if part.of == name}
        for value in moved(rule, limit["value"], held_against):
            yield ("limits", name, "value"), value
    places: list[Path] = [(key,) for key in ("applies", "open_when") if key in data]
    places += [("levels", index, "when") for index in range(len(data["levels"]))]
    for path in places:
        found: Any = data
        for step in path:
            found = found[step]
        for value in (ALWAYS, NEVER):
            if not (found == "always" and value is ALWAYS):
                yield path, value
        yield from in_condition(rule, found, path)


def in_condition(
    rule: Rule, condition: Any, path: tuple[str | int, ...]
) -> Iterator[tuple[tuple[str | int, ...], Any]]:
    """The numbers and words that stand in a condition themselves, changed."""
    if condition == "always":
        return
    ((key, inner),) = condition.items()
    if key in {"all", "any"}:
        for index, part in enumerate(inner):
            yield from in_condition(rule, part, (*path, key, index))
    elif key == "not":
        yield from in_condition(rule, inner, (*path, key))
    else:
        ((how, operand),) = inner.items()
        if isinstance(operand, bool):
            yield (*path, key, how), not operand
        elif not isinstance(operand, dict) and how != "between":
            for value in moved(rule, operand, {key}):
                yield (*path, key, how), value


def moved(rule: Rule, value: Any, held_against: set[str]) -> list[Any]:
    """The values that a limit takes in turn."""
    if isinstance(value, str):
        return [other_word(rule, [value], held_against)]
    if isinstance(value, list):
        fewer = [[word for word in value if word != left_out] for left_out in value]
        return [*fewer, [*value, other_word(rule, value, held_against)]]
    if any(name.endswith(COUNTED) for name in held_against):
        step = 1.0
    elif value == 0:
        step = 0.1 if all(name.endswith("_mm") for name in held_against) else 0.01
    else:
        step = abs(value) * 0.01
    return [value - step, value + step]


def other_word(rule: Rule, words: list[str], held_against: set[str]) -> str:
    """A word of the same field's that is not among some."""
    for name in held_against:
        schema = fields(rule.about).get(name, {})
        for word in schema.get("enum", schema.get("items", {}).get("enum", ())):
            if word not in words:
                return str(word)
        for example in rule.data["examples"]:
            seen = example["given"].get(name)
            for word in seen if isinstance(seen, list) else [seen]:
                if isinstance(word, str) and word not in words:
                    return word
    return "another"


CHANGES = [(rule, what, data) for rule in RULES for what, data in changes(rule)]


@pytest.mark.parametrize(("rule", "what", "data"), CHANGES, ids=[f"{rule.id}: {what}" for rule, what, _ in CHANGES])
def test_an_example_notices(rule: Rule, what: str, data: dict[str, Any]) -> None:
    assert unnoticed(rule, what, data) is ((rule.id, what) in WITHOUT_EFFECT)


def test_what_is_without_effect_is_a_change() -> None:
    assert set(WITHOUT_EFFECT) <= {(rule.id, what) for rule, what, _ in CHANGES}


def test_every_limit_is_moved_and_is_one_that_a_condition_holds_something_against() -> None:
    for rule in RULES:
        named = {part.of for test in rule.tests() for part in test.operands if part.sort == "limit"}
        assert named == set(rule.limits)
        assert {name for name in named if any(what.startswith(f"{name} ") for _, what, _ in CHANGES)} == named
