"""Data of the wrong shape is refused by its schema in messages, whatever stands where, and from programs too."""

import copy
import json
import math
from pathlib import Path

import pytest
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from farside.reading.schema import check_schema
from hypothesis import given
from hypothesis import strategies as st

TOP = Path(__file__).parents[2] / "rules"
SCHEMAS = {path.stem: json.loads(path.read_text(encoding="utf-8")) for path in (TOP / "schema" / "v1").glob("*.json")}
FILES = tuple(
    read_document(path.read_bytes(), path.name).data
    for folder in ("example-clinic", "base", "tables")
    for path in sorted((TOP / folder).rglob("*.yaml"))
)
KEYS = sorted({key for schema in SCHEMAS.values() for key in schema.get("properties", {})} | {"all", "not", "readings"})
LEAVES = st.none() | st.booleans() | st.integers(-9, 10**6) | st.floats(-1e9, 1e9) | st.text(max_size=20)
VALUES = st.recursive(
    LEAVES | st.sampled_from(["always", "not-used", "2,5", "20 s", "yes"]),
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(st.sampled_from(KEYS), inner, max_size=3),
    max_leaves=12,
)


def paths_of(value, path=()):
    yield path
    parts = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    for key, part in parts:
        yield from paths_of(part, (*path, key))


@st.composite
def damaged(draw):
    """A shipped file's data with up to three values put out, put in or exchanged."""
    data = copy.deepcopy(draw(st.sampled_from(FILES)))
    for _ in range(draw(st.integers(1, 3))):
        path = draw(st.sampled_from(sorted(paths_of(data), key=str)))
        if not path:
            data[draw(st.sampled_from(KEYS))] = draw(VALUES)
            continue
        holds = data
        for step in path[:-1]:
            holds = holds[step]
        if draw(st.booleans()):
            holds[path[-1]] = draw(VALUES)
        else:
            del holds[path[-1]]
    return data


def problems_of(data, kind):
    try:
        document = Document.of(data, "given")
        check_schema(document, SCHEMAS[kind], SCHEMAS.values())
    except Refused as refused:
        printed = str(refused)
        return refused.problems, printed
    return (), ""


@given(damaged(), st.sampled_from(["own", *sorted(set(SCHEMAS) - {"common"})]))
def test_damaged_data_is_kept_or_refused_in_words(data, kind):
    own = str(data.get("kind"))
    chosen = kind if kind != "own" else own if own in SCHEMAS else "plan"
    problems, printed = problems_of(data, chosen)
    assert len(printed) < 2_000
    for problem in problems:
        assert problem.place.line == 0
        assert "given schemas" not in problem.message
        assert not problem.message.endswith("what is expected here")
        assert problem.message.isprintable()


def nested(depth):
    inner = {}
    for _ in range(depth):
        inner = {"a": inner}
    return inner


NO_FILE_HOLDS = {
    "not a mapping": ([], "top-not-mapping"),
    "infinite": ({"a": [1.0, math.inf]}, "not-finite"),
    "not a number": ({"a": math.nan}, "not-finite"),
    "number as key": ({"a": {1: 2}}, "key-not-text"),
    "tuple": ({"a": (1, 2)}, "not-data"),
    "bytes": ({"a": b"x"}, "not-data"),
    "half a character": ({"a": "\ud83d"}, "half-character"),
    "half a character in a key": ({"\ud83d": 1}, "half-character"),
    "control character": ({"a": "x\0"}, "character-in-text"),
    "too deep": (nested(50), "too-deep"),
    "too many": ({"a": [0] * 60_000}, "too-many"),
}


@pytest.mark.parametrize("name", NO_FILE_HOLDS)
def test_a_program_cannot_give_what_no_file_holds(name):
    data, key = NO_FILE_HOLDS[name]
    with pytest.raises(Refused) as refused:
        Document.of(data, "given")
    (problem,) = refused.value.problems
    assert problem.key == key
    assert str(refused.value).startswith("given: ")


def test_data_that_holds_itself_is_refused():
    data = {}
    data["a"] = data
    with pytest.raises(Refused) as refused:
        Document.of(data, "given")
    assert refused.value.problems[0].key == "too-deep"


def test_a_document_of_given_data_is_a_copy():
    data = {"a": [1]}
    document = Document.of(data, "given")
    data["a"].append(2)
    assert document.data == {"a": [1]}
