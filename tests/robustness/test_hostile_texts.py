"""No text, however long, deep or strange, does more than be refused at a place, after bounded work."""

import json
import string
from pathlib import Path

import pytest
import yaml
from farside.clinic.reading import checked
from farside.reading import yaml_text
from farside.reading.characters import LARGEST
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from farside.reading.tree import MOST_VALUES
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


MOST = yaml_text.LARGEST
HOSTILE = {
    "brackets": ("[" * MOST, "too-deep"),
    "braces": ("{a: " * (MOST // 4), "too-deep"),
    "indented": ("".join(" " * depth + "a:\n" for depth in range(500)), "too-deep"),
    "dashes": ("- " * (MOST // 2), "too-deep"),
    "entries": ("a: [" + "1," * (MOST // 2 - 4) + "]", "too-many"),
    "empty mappings": ("a: [" + "{}," * (MOST // 3 - 4) + "]", "too-many"),
    "empty entries": ("a:\n" + "-\n" * (MOST // 2 - 2), "too-many"),
    "keys": ("".join(f"k{number}: 1\n" for number in range(MOST // 10)), "too-many"),
    "a key at the end again": ("".join(f"k{n}: 1\n" for n in range(4_500)) + "k0: 1\n", "duplicate-key"),
    "json entries": ('{"a": [' + "{}," * 300_000, "too-many"),
    "json brackets": ('{"a":' * 150_000, "too-deep"),
    "json text without end": ('{"a": "' + "x" * 900_000, "quote-not-closed"),
    "over the size": ("a: " + "x" * 1_000_000, "too-large"),
    "over the size in bytes": ("a: " + "é" * 500_000, "too-large"),
    "over the size for YAML": ("a: " + "x" * (MOST - 2), "too-large-yaml"),
    "aliases of aliases": (
        "a0: &a0 [x, x]\n" + "".join(f"a{n}: &a{n} [*a{n - 1}, *a{n - 1}]\n" for n in range(1, 200)), "too-many"
    ),
    "a long alias": ("a: &a [" + "1," * 4_000 + "]\nb: *a\nc: *a\n", "too-many"),
    "anchors": ("a: [" + ", ".join(f"&a{number} x" for number in range(9_000)) + ", *b]", "alias-unknown"),
    "directives": ("%a\n" * (MOST // 3 - 4) + "---\na: 1\n", "directives"),
    "a tag of escapes": ("a: !" + "%41" * (MOST // 3 - 4) + " 1", "tag"),
    "a number of digits": ("a: " + "9" * (MOST - 3), "number-too-long"),
    "a long key": ("a" * (MOST - 3) + ": 1", "stray-colon"),
}  # fmt: skip
# Read to the end, since nothing is wrong with them but their size.
LONG = {
    "words": "a: " + "a " * (MOST // 2 - 2),
    "lines of words": "a: " + "a\n  " * (MOST // 4 - 2),
    "words in quotes": 'a: "' + "a " * (MOST // 2 - 4) + '"',
    "escapes": 'a: "' + "\\n" * (MOST // 2 - 4) + '"',
    "blank lines": "\n" * (MOST - 4) + "a: 1",
    "comments": "#\n" * (MOST // 2 - 2) + "a: 1",
    "a text of lines": "a: |\n" + "  a\n" * (MOST // 4 - 4),
    "just the size": "a: " + "x" * (MOST - 3),
}


class Counting(yaml.SafeLoader):
    """The pure parser, counting what it was asked for."""

    events = 0

    def get_event(self):
        Counting.events += 1
        return super().get_event()


@pytest.mark.parametrize("name", HOSTILE)
def test_hostile_text_is_refused(name):
    text, key = HOSTILE[name]
    assert outcome(text).key == key


@pytest.mark.parametrize("name", HOSTILE)
def test_hostile_text_is_refused_after_bounded_work(name, monkeypatch):
    """However long the text, the slow parser is asked for no more than the values of one file and their brackets."""
    monkeypatch.setattr(Counting, "events", 0)
    monkeypatch.setattr(yaml_text, "_PURE", Counting)
    monkeypatch.setattr(yaml_text, "_QUICK", None)
    outcome(HOSTILE[name][0])
    assert Counting.events <= 2 * MOST_VALUES + 10


@pytest.mark.parametrize("name", LONG)
def test_a_long_text_within_the_size_is_read(name):
    assert len(LONG[name]) <= MOST
    assert list(outcome(LONG[name]).data) == ["a"]


def test_json_of_just_the_size_is_read():
    text = '{"a": "' + "x" * (LARGEST - 9) + '"}'
    assert len(text) == LARGEST
    assert len(outcome(text).data["a"]) == LARGEST - 9


def test_a_list_that_is_too_long_is_not_looked_into():
    """Its entries could each be wrong in many ways; one problem is told, however many they are."""
    text = json.dumps({"kind": "rule", "applies": {"all": [{"a": {"is": number}} for number in range(1_000)]}})
    with pytest.raises(Refused) as refused:
        checked(outcome(text))
    assert [p.key for p in refused.value.problems if p.path[:1] == ("applies",)] == ["list-long"]
