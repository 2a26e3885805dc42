"""Three-valued conditions: truth tables, every way of testing, and that what is known stays so."""

from itertools import product

import pytest
from farside.protocol.conditions import ALWAYS, NEVER, parsed
from hypothesis import given
from hypothesis import strategies as st

T, F, U = True, False, None
LIMITS = {"low": 1, "high": 3, "words": ["a", "b"]}
# Values that make the test of a name true, false or unknown.
PUT = {T: 1, F: 0, U: None}


def judged(data, **values):
    return parsed(data).judged(values, LIMITS)


def one(name):
    return {name: {"is": 1}}


def test_always_and_never():
    assert parsed("always") is ALWAYS
    assert ALWAYS.judged({}, {}) is True
    assert NEVER.judged({}, {}) is False
    assert (list(ALWAYS.tests()), list(NEVER.tests())) == ([], [])


@pytest.mark.parametrize(
    ("left", "right", "both", "either"),
    [
        (T, T, T, T), (T, F, F, T), (T, U, U, T),
        (F, T, F, T), (F, F, F, F), (F, U, F, U),
        (U, T, U, T), (U, F, F, U), (U, U, U, U),
    ],
)  # fmt: skip
def test_all_and_any(left, right, both, either):
    values = {"a": PUT[left], "b": PUT[right]}
    assert judged({"all": [one("a"), one("b")]}, **values) is both
    assert judged({"any": [one("a"), one("b")]}, **values) is either


@pytest.mark.parametrize(("inner", "outer"), [(T, F), (F, T), (U, U)])
def test_not(inner, outer):
    assert judged({"not": one("a")}, a=PUT[inner]) is outer


@pytest.mark.parametrize("outcomes", list(product((T, F, U), repeat=3)))
def test_what_holds_for_all_is_what_fails_for_none(outcomes):
    """De Morgan, in three values."""
    values = dict(zip("abc", map(PUT.get, outcomes), strict=True))
    every = {"all": [one(name) for name in "abc"]}
    none = {"not": {"any": [{"not": one(name)} for name in "abc"]}}
    assert judged(every, **values) is judged(none, **values)


@pytest.mark.parametrize(
    ("test", "below", "on", "above"),
    [
        ({"below": 2}, T, F, F), ({"at_most": 2}, T, T, F), ({"above": 2}, F, F, T), ({"at_least": 2}, F, T, T),
        ({"is": 2}, F, T, F), ({"one_of": [2, 5]}, F, T, F), ({"between": [2, 2.5]}, F, T, F),
    ],
)  # fmt: skip
def test_a_number_below_on_and_above_its_limit(test, below, on, above):
    assert [judged({"x": test}, x=value) for value in (1, 2, 3)] == [below, on, above]
    assert judged({"x": test}) is U


@pytest.mark.parametrize(("value", "holds"), [(1, T), (2, T), (3, T), (0.999, F), (3.001, F)])
def test_between_holds_at_both_its_ends(value, holds):
    assert judged({"x": {"between": [{"limit": "low"}, {"limit": "high"}]}}, x=value) is holds


def test_against_a_limit_a_field_and_another_quantity():
    assert judged({"x": {"below": {"limit": "high"}}}, x=2) is T
    condition = {"x": {"below": {"field": "composite.cap_mm"}}}
    assert parsed(condition).judged({"x": 1, "composite.cap_mm": 2}, {}) is T
    assert parsed(condition).judged({"x": 1}, {}) is U
    assert judged({"x": {"above": {"quantity": "y"}}}, x=2, y=1) is T
    assert judged({"x": {"above": {"quantity": "y"}}}, y=1) is U


def test_lists():
    assert judged({"x": {"holds_all": ["a", "b"]}}, x=["b", "c", "a"]) is T
    assert judged({"x": {"holds_all": ["a", "b"]}}, x=["a"]) is F
    assert judged({"x": {"holds_all": {"limit": "words"}}}, x=[]) is F
    assert judged({"x": {"one_of": {"limit": "words"}}}, x="b") is T
    assert judged({"x": {"holds_all": ["a"]}}) is U


@pytest.mark.parametrize(("value", "given_true"), [(0, T), ("", T), (False, T), ([], T), (None, F)])
def test_whether_a_value_is_given_is_never_unknown(value, given_true):
    assert judged({"x": {"given": True}}, x=value) is given_true
    assert judged({"x": {"given": False}}, x=value) is not given_true


def test_a_word_is_neither_above_nor_below_a_number():
    assert judged({"x": {"below": 2}}, x="few") is U
    assert judged({"x": {"at_least": 1}}, x=True) is U


def test_the_unknowns_of_a_condition_are_what_could_still_decide_it():
    def unknowns(data, **values):
        return list(dict.fromkeys(parsed(data).unknowns(values, LIMITS)))

    assert unknowns({"any": [one("a"), one("b")]}, a=0) == ["b"]
    assert unknowns({"any": [one("a"), one("b")]}, a=1) == []
    assert unknowns({"all": [one("a"), one("b")]}) == ["a", "b"]
    assert unknowns({"all": [one("a"), {"any": [one("b"), one("c")]}]}, b=1) == ["a"]
    assert unknowns({"not": one("a")}) == ["a"]
    assert unknowns({"x": {"below": {"quantity": "y"}}}, x=1) == ["y"]


def test_live_tests_are_those_beside_which_nothing_else_fails():
    def live(data, **values):
        return [test.name for test in parsed(data).live(values, LIMITS)]

    both = {"all": [{"x": {"below": 2}}, one("site")]}
    assert live(both, x=5, site=1) == ["x"]
    assert live(both, x=1, site=0) == ["site"]
    assert live(both, x=1, site=1) == ["x", "site"]
    assert live(both, x=5, site=0) == []
    assert live({"any": [both, {"y": {"below": 2}}]}, x=1, site=0, y=3) == ["site", "y"]


NAMES = ("a", "b", "c")
LEAVES = st.builds(lambda name, how, limit: {name: {how: limit}}, st.sampled_from(NAMES),
                   st.sampled_from(["below", "at_least", "is", "at_most", "above"]), st.integers(0, 2))  # fmt: skip
CONDITIONS = st.recursive(
    LEAVES,
    lambda inner: st.one_of(
        st.builds(lambda parts: {"all": parts}, st.lists(inner, min_size=1, max_size=3)),
        st.builds(lambda parts: {"any": parts}, st.lists(inner, min_size=1, max_size=3)),
        st.builds(lambda part: {"not": part}, inner),
    ),
    max_leaves=8,
)
SOME_VALUES = st.fixed_dictionaries({name: st.sampled_from([None, 0, 1, 2]) for name in NAMES})


def fillings(values, options=(0, 1, 2)):
    """Every way to fill in what is missing."""
    missing = [name for name, value in values.items() if value is None]
    for chosen in product(options, repeat=len(missing)):
        yield {**values, **dict(zip(missing, chosen, strict=True))}


@given(CONDITIONS, SOME_VALUES)
def test_a_known_outcome_never_changes_when_an_unknown_is_filled_in(data, values):
    condition = parsed(data)
    outcome = condition.judged(values, {})
    if outcome is not None:
        assert {condition.judged(filled, {}) for filled in fillings(values)} == {outcome}


@given(CONDITIONS, SOME_VALUES)
def test_an_unknown_outcome_names_something_that_is_missing(data, values):
    condition = parsed(data)
    unknowns = set(condition.unknowns(values, {}))
    assert bool(unknowns) == (condition.judged(values, {}) is None)
    assert all(values[name] is None for name in unknowns)


@given(CONDITIONS, SOME_VALUES)
def test_with_everything_known_nothing_is_unknown(data, values):
    full = next(fillings(values))
    assert parsed(data).judged(full, {}) is not None
