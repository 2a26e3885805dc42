"""No text, however long, deep or strange, does more than be refused at a place, in bounded time."""

import json
import string
import time
from pathlib import Path

import pytest
from farside.reading import yaml_text
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from hypothesis import example, given
from hypothesis import strategies as st

EXAMPLES = Path(__file__).parents[2] / "rules" / "example-clinic"
SEEDS = tuple(path.read_text(encoding="utf-8") for path in sorted(EXAMPLES.rglob("*.yaml")))

PARTS = st.sampled_from(
    [
        *"{}[],:&*!|>'\"%@`#-? \n\t\\~.0a<=\r\0",
        "\n  ",
        "- ",
        ": ",
        "? ",
        "&a ",
        "*a",
        "<<: ",
        "---\n",
        "...\n",
        "!!int ",
        "%YAML 1.2\n",
        "|\n  ",
        ">-\n",
        "\ufeff",
        "\u2028",
        "\u202e",
        "\ud83d",
        "é",
        "😀",
        "\\ud83d",
        "\\U00110000",
        "9" * 60,
    ]
)
ANY_TEXT = st.one_of(st.text(), st.lists(PARTS, max_size=40).map("".join), st.text(string.printable, max_size=80))


@st.composite
def damaged(draw):
    """One of the example clinic's files, cut and struck."""
    text = draw(st.sampled_from(SEEDS))
    for _ in range(draw(st.integers(1, 4))):
        at = draw(st.integers(0, len(text)))
        gone = draw(st.integers(0, 6))
        text = text[:at] + draw(st.one_of(st.just(""), PARTS)) + text[at + gone :]
    return text[draw(st.integers(0, 40)) :] if draw(st.booleans()) else text


def outcome(text, name="a.yaml"):
    """What reading gives: a document, or the one placed problem that it was refused with."""
    try:
        document = read_document(text, name)
    except Refused as refused:
        return placed(refused)
    assert isinstance(document.data, dict)
    return document


def placed(refused):
    """The one problem of a refusal, which has a place and can be printed."""
    (problem,) = refused.problems
    assert problem.place.line >= 1
    assert problem.place.column >= 1
    assert len(str(refused)) < 2_000
    assert str(refused).encode("utf-8")
    return problem


@given(ANY_TEXT)
@example("a: \ud800")
@example("a: &a [*a]")
@example("%YAML " + "9" * 5_000 + ".1\n---\na: 1")
@example('{"a": "\\ud83d"}')
@example('{"a": ' + "9" * 5_000 + "}")
@example("a: !%GG x")
def test_any_text_is_read_or_refused_at_a_place(text):
    outcome(text)


@given(st.binary(max_size=200))
def test_any_bytes_are_read_or_refused_at_a_place(content):
    outcome(content)


@given(damaged())
def test_a_damaged_file_is_read_or_refused_at_a_place(text):
    outcome(text)


@pytest.mark.skipif(yaml_text._QUICK is None, reason="PyYAML has no compiled parser here, so there is one answer only")
@given(damaged())
def test_both_parsers_give_the_same(text):
    quick = outcome(text)
    kept, yaml_text._QUICK = yaml_text._QUICK, None
    try:
        pure = outcome(text)
    finally:
        yaml_text._QUICK = kept
    if isinstance(quick, Document):
        assert isinstance(pure, Document)
        assert (quick.data, quick._places, quick._key_places) == (pure.data, pure._places, pure._key_places)
    else:
        assert quick == pure


TEXTS = st.text(st.characters(exclude_categories=["Cc", "Cs", "Zl", "Zp"], exclude_characters="\ufeff\ufffe\uffff"))
LEAVES = st.none() | st.booleans() | st.integers(-(10**15), 10**15) | st.floats(-1e300, 1e300) | TEXTS
DATA = st.recursive(LEAVES, lambda inner: st.lists(inner, max_size=4) | st.dictionaries(TEXTS, inner, max_size=4))


@given(st.dictionaries(TEXTS, DATA, max_size=4), st.sampled_from([None, 2, "\t"]), st.booleans())
def test_what_json_writes_is_read_back(data, indent, ascii_only):
    text = json.dumps(data, indent=indent, ensure_ascii=ascii_only)
    assert outcome(text).data == data
    assert outcome(text.encode(), "a.json").data == data


HOSTILE = {
    "brackets": ("[" * 900_000, "too-deep"),
    "braces": ("{a: " * 200_000, "too-deep"),
    "indented": ("".join(" " * depth + "a:\n" for depth in range(1_200)), "too-deep"),
    "dashes": ("- " * 450_000, "too-deep"),
    "entries": ("a: [" + "1," * 440_000 + "]", "too-many"),
    "keys": ("".join(f"k{number}: 1\n" for number in range(70_000)), "too-many"),
    "json entries": ('{"a": [' + "{}," * 300_000, "too-many"),
    "json brackets": ('{"a":' * 150_000, "too-deep"),
    "json text without end": ('{"a": "' + "x" * 900_000, "quote-not-closed"),
    "over the size": ("a: " + "x" * 1_000_000, "too-large"),
    "over the size in bytes": ("a: " + "é" * 500_000, "too-large"),
    "aliases of aliases": (
        "a0: &a0 [x, x]\n" + "".join(f"a{n}: &a{n} [*a{n - 1}, *a{n - 1}]\n" for n in range(1, 200)), "too-many"
    ),
    "anchors": ("a: [" + ", ".join(f"&a{number} x" for number in range(49_000)) + ", *b]", "alias-unknown"),
}  # fmt: skip


@pytest.mark.parametrize("name", HOSTILE)
def test_hostile_text_is_refused_soon(name):
    text, key = HOSTILE[name]
    began = time.monotonic()
    assert outcome(text).key == key
    assert time.monotonic() - began < 20


def test_a_file_of_just_the_size_is_read():
    text = "a: " + "x" * (1_000_000 - 3)
    assert len(outcome(text).data["a"]) == 999_997
