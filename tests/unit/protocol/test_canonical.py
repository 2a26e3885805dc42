"""Canonical JSON against another implementation and the standard's own samples, and what a digest rests on."""

import copy
import json

import pytest
from farside.protocol.canonical import canonical, digest
from farside.protocol.protocol import base_protocol, protocol_of
from farside.protocol.rule import rule_of
from hypothesis import example, given
from hypothesis import strategies as st

TEXT = st.text(st.characters(codec="utf-8"), max_size=8)
NUMBERS = st.one_of(st.floats(allow_nan=False, allow_infinity=False), st.integers(-(2**53) + 1, 2**53 - 1))
DATA = st.recursive(
    st.one_of(st.none(), st.booleans(), NUMBERS, TEXT),
    lambda inner: st.one_of(st.lists(inner, max_size=4), st.dictionaries(TEXT, inner, max_size=4)),
    max_leaves=12,
)


@given(DATA)
@example({"\ufb33": 1, "\U0001f600": 2, "\r": 3, "1": 4, "\x80": 5, "ö": 6, "€": 7})
@example([1e21, 1e-7, 123456789012345680000.0, 0.1, -0.0, 5e-324, 1.7976931348623157e308, 1e20, 1e-6])
def test_it_is_what_another_implementation_writes(data):
    other = pytest.importorskip("rfc8785")
    assert canonical(data) == other.dumps(data)


@given(DATA)
def test_it_reads_back_as_the_same_data(data):
    assert json.loads(canonical(data), parse_int=float) == data


@pytest.mark.parametrize(
    ("value", "text"),
    [
        # RFC 8785, appendix B: numbers as ECMAScript writes them.
        (0.0, "0"), (-0.0, "0"), (5e-324, "5e-324"), (-5e-324, "-5e-324"), (1.7976931348623157e308,
        "1.7976931348623157e+308"), (9007199254740992, "9007199254740992"), (295147905179352830000.0,
        "295147905179352830000"), (9.999999999999997e22, "9.999999999999997e+22"), (1e23, "1e+23"),
        (1.0000000000000001e23, "1.0000000000000001e+23"), (999999999999999700000.0, "999999999999999700000"),
        (1e21, "1e+21"), (9.999999999999997e-7, "9.999999999999997e-7"), (0.000001, "0.000001"),
        (333333333.3333332, "333333333.3333332"), (-0.0000033333333333333333, "-0.0000033333333333333333"),
    ],
)  # fmt: skip
def test_the_standards_numbers(value, text):
    assert canonical(value).decode() == text


@pytest.mark.parametrize("value", [float("nan"), float("inf"), 2**53 + 1, {1, 2}, object()])
def test_what_json_cannot_hold_is_refused(value):
    with pytest.raises(ValueError):
        canonical([value])


def test_a_digest_is_64_hexadecimal_digits_of_the_bytes():
    assert digest({}) == "44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a"


HEAD = {"id": "base", "title": "Base", "edition": "1"}
RULE = {
    "kind": "rule", "id": "made", "title": "Made", "about": "plan", "says": "It is.", "do": "Mend it.", "why": "So.",
    "limits": {"why": {"value": 1.0, "strength": "bench", "why": "Ours.", "sources": [{"cite": "a", "supports": "x"}]}},
    "levels": [{"finding": "stop", "when": {"gap_mm": {"above": {"limit": "why"}}}}],
    "examples": [{"name": "one", "given": {"gap_mm": 2}, "finding": "stop"}],
    "sources": [{"cite": "b", "supports": "y"}],
}  # fmt: skip


def as_it_is(_rule):
    pass


def digest_with(edit=as_it_is, **head):
    rule = copy.deepcopy(RULE)
    edit(rule)
    return protocol_of({**HEAD, **head}, (rule_of(rule, "plan"),)).digest


@pytest.mark.parametrize(
    "edit",
    [
        lambda rule: rule.update(why="Otherwise."),
        lambda rule: rule["examples"].clear(),
        lambda rule: rule.update(history=[{"edition": "2", "says": "More."}]),
        lambda rule: rule["limits"]["why"].update(why="Theirs."),
        lambda rule: rule["limits"]["why"]["sources"][0].update(supports="z"),
        lambda rule: rule["sources"][0].update(supports="z"),
        lambda rule: rule["limits"]["why"].update(value=1),
    ],
    ids=["why", "examples", "history", "why of a limit", "support of a limit", "support", "1.0 written 1"],
)
def test_what_explains_leaves_the_digest_as_it_was(edit):
    assert digest_with(edit) == digest_with()


@pytest.mark.parametrize(
    "edit",
    [
        lambda rule: rule["limits"]["why"].update(value=1.1),
        lambda rule: rule["limits"]["why"].update(strength="ours"),
        lambda rule: rule["limits"]["why"]["sources"][0].update(cite="c"),
        lambda rule: rule["levels"][0].update(finding="revise"),
        lambda rule: rule.update(applies={"gap_mm": {"above": 0}}),
        lambda rule: rule.update(says="It is not."),
        lambda rule: rule.update(id="other"),
    ],
    ids=["limit", "strength", "source", "finding", "applies", "words", "id"],
)
def test_what_requires_changes_it(edit):
    assert digest_with(edit) != digest_with()


def test_edition_counts_and_title_and_order_do_not():
    assert digest_with(edition="2") != digest_with()
    assert digest_with(title="Other") == digest_with()
    base = base_protocol()
    head = {"id": base.id, "title": base.title, "edition": base.edition}
    assert protocol_of(head, tuple(reversed(base.rules))).digest == base.digest
    assert [rule.id for rule in base.rules] == sorted(rule.id for rule in base.rules)
