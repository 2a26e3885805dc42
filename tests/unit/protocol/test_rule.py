"""How a rule is judged: the first level that holds, and open exactly where something missing could change that."""

from itertools import product

import pytest
from farside.protocol.rule import GRADES, judged, rule_of
from hypothesis import given
from hypothesis import strategies as st

LIMIT = {"strength": "ours", "why": "for the test"}


def rule(levels, **more):
    limits = {"least": {"value": 1, **LIMIT}, "need": {"value": 2, **LIMIT}, "margin": {"value": 3, **LIMIT}}
    data = {
        "kind": "rule", "id": "made", "title": "Made for the test", "about": "plan", "limits": limits, "why": "",
        "levels": [{"finding": finding, "when": when} for finding, when in levels], "says": "", "do": "",
    }  # fmt: skip
    return rule_of({**data, **more}, "plan")


def below(name, limit):
    return {name: {"below": {"limit": limit}}}


STAIRS = [("stop", below("x", "least")), ("revise", below("x", "need")), ("watch", below("x", "margin"))]


@pytest.mark.parametrize(
    ("x", "finding"),
    [(0.9, "stop"), (1, "revise"), (1.9, "revise"), (2, "watch"), (3, "clear"), (9, "clear"), (None, "open")],
)
def test_the_first_level_that_holds_is_the_finding(x, finding):
    assert judged(rule(STAIRS), {"x": x}).finding == finding


def test_what_is_missing_is_named_once():
    outcome = judged(rule([("stop", {"all": [below("x", "least"), below("y", "need")]}), *STAIRS[1:]]), {})
    assert (outcome.finding, outcome.level, outcome.missing) == ("open", None, ("x", "y"))


def test_a_milder_level_does_not_answer_for_a_worse_one_that_is_unknown():
    made = rule([("stop", below("x", "least")), ("watch", below("y", "need"))])
    assert judged(made, {"y": 1}).finding == "open"
    assert judged(made, {"x": 5, "y": 1}).finding == "watch"
    assert judged(made, {"x": 0}).finding == "stop"


def test_applies():
    made = rule(STAIRS, applies={"self_cure": {"is": False}})
    assert judged(made, {"self_cure": True, "x": 0}) is None
    assert judged(made, {"self_cure": False, "x": 0}).finding == "stop"
    assert judged(made, {"x": 0}).finding == "open"
    assert judged(made, {"x": 0}).missing == ("self_cure",)
    assert judged(made, {"x": 5}).finding == "clear"


def test_open_when_is_tried_before_the_levels():
    made = rule(STAIRS, open_when=below("known", "need"))
    assert judged(made, {"known": 0, "x": 0}).finding == "open"
    assert judged(made, {"known": 5, "x": 0}).finding == "stop"
    assert judged(made, {"x": 9}).missing == ("known",)


def test_a_rule_takes_its_best_supported_limit_and_each_source_once():
    cited = {"strength": "bench", "sources": [{"cite": "a"}, {"cite": "b"}]}
    limits = {"low": {"value": 1, **LIMIT}, "high": {"value": 2, **cited}}
    made = rule([("stop", below("x", "low"))], limits=limits, sources=[{"cite": "b"}, {"cite": "c"}])
    assert (made.strength, made.sources) == ("bench", ("a", "b", "c"))


# Levels as files.md has them: one shape of condition, its thresholds rising from level to level, so each is nested in
# the next; every name once in it.
NAMES = ("p", "q", "r")
VALUES = (0, 1, 2, 3, 4)
SHAPES = st.sampled_from(
    [
        lambda p, q, r: {"all": [p, q, r]},
        lambda p, q, r: {"any": [p, q, r]},
        lambda p, q, r: {"any": [p, {"all": [q, r]}]},
        lambda p, q, r: {"all": [p, {"any": [q, r]}]},
        lambda p, q, r: {"not": {"all": [{"not": p}, {"not": {"any": [q, r]}}]}},
    ]
)
THRESHOLDS = st.lists(st.sets(st.integers(1, 4), min_size=3, max_size=3).map(sorted), min_size=3, max_size=3)
SOME = st.fixed_dictionaries({name: st.sampled_from([None, *VALUES]) for name in NAMES})
MAYBE = st.sampled_from([None, 0, 1])


def nested(shape, thresholds):
    for index, finding in enumerate(("stop", "revise", "watch")):
        parts = ({name: {"below": steps[index]}} for name, steps in zip(NAMES, thresholds, strict=True))
        yield finding, shape(*parts)


def answers(made, values):
    """What the rule gives over every filling; not applied counts as clear, having nothing to say either."""
    options = {**dict.fromkeys(NAMES, VALUES), "in_use": (0, 1), "doubt": (0, 1)}
    missing = [name for name, value in values.items() if value is None]
    for chosen in product(*(options[name] for name in missing)):
        outcome = judged(made, {**values, **dict(zip(missing, chosen, strict=True))})
        yield "clear" if outcome is None else outcome.finding


@given(SHAPES, THRESHOLDS, SOME)
def test_open_exactly_where_some_filling_changes_the_answer(shape, thresholds, values):
    made = rule(nested(shape, thresholds))
    found, possible = judged(made, values).finding, set(answers(made, values))
    assert found == ("open" if len(possible) > 1 else possible.pop())


@given(SHAPES, THRESHOLDS, SOME, MAYBE, MAYBE)
def test_so_too_with_applies_and_open_when(shape, thresholds, values, in_use, doubt):
    made = rule(nested(shape, thresholds), applies={"in_use": {"is": 1}}, open_when={"doubt": {"is": 1}})
    values = {**values, "in_use": in_use, "doubt": doubt}
    outcome, possible = judged(made, values), set(answers(made, values))
    found = "clear" if outcome is None else outcome.finding
    assert found == ("open" if len(possible) > 1 else possible.pop())


@given(SHAPES, THRESHOLDS, SOME)
def test_filling_in_all_that_is_named_missing_leaves_nothing_open(shape, thresholds, values):
    made = rule(nested(shape, thresholds))
    for _ in NAMES:
        outcome = judged(made, values)
        if outcome.finding != "open":
            break
        assert outcome.missing
        assert all(values[name] is None for name in outcome.missing)
        values = {**values, **dict.fromkeys(outcome.missing, 2)}
    assert judged(made, values).finding != "open"


def test_grades_run_from_the_worst():
    assert GRADES == ("stop", "revise", "open", "watch", "clear")
