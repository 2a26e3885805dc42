"""Schema errors become messages with a place, the nearest key, the range, and the branch that was meant."""

import pytest
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from farside.reading.schema import check_schema

BASE = "urn:farside:schema:words:1"
WORDS = {
    "$id": BASE,
    "$defs": {
        "day": {"type": "string", "pattern": "^[0-9]{4}-[0-9]{2}-[0-9]{2}$", "format": "date", "x-form": "a date"},
        "id": {"type": "string", "pattern": "^[a-z]+$", "x-form": "small letters"},
    },
}
USE = {
    "type": "object",
    "additionalProperties": False,
    "required": ["card"],
    "properties": {"card": {"$ref": f"{BASE}#/$defs/id"}, "time_s": {"type": "number", "exclusiveMinimum": 0}},
}
ONE = {"type": "object", "required": ["a"], "additionalProperties": False, "properties": {"a": {"type": "number"}}}
TWO = {"type": "object", "required": ["b"], "additionalProperties": False, "properties": {"b": {"type": "number"}}}
SCHEMA = {
    "$id": "urn:farside:schema:thing:1",
    "type": "object",
    "additionalProperties": False,
    "required": ["kind"],
    "properties": {
        "kind": {"const": "thing"},
        "on": {"$ref": f"{BASE}#/$defs/day"},
        "name": {"type": "string", "minLength": 2, "maxLength": 5},
        "share": {"type": "number", "minimum": 0, "maximum": 1},
        "count": {"type": "integer", "minimum": 0},
        "loupes": {"type": "boolean"},
        "site": {"enum": ["anterior", "posterior"]},
        "list": {"type": "array", "minItems": 1, "maxItems": 2, "items": {"$ref": f"{BASE}#/$defs/id"}},
        "use": {"oneOf": [{"const": "not-used"}, USE]},
        "forms": {"anyOf": [ONE, TWO]},
        "named": {"type": "object", "propertyNames": {"$ref": f"{BASE}#/$defs/id"}},
    },
}


def messages(text):
    with pytest.raises(Refused) as refused:
        check_schema(read_document(text, "a.yaml"), SCHEMA, (WORDS,))
    return [problem.message for problem in refused.value.problems]


def test_what_keeps_to_the_schema_passes():
    text = "kind: thing\non: 2028-02-29\nname: abc\nshare: 1\ncount: 2.0\nlist: [a, b]\nuse: {card: a}\nforms: {b: 1}"
    check_schema(read_document(text, "a.yaml"), SCHEMA, (WORDS,))
    check_schema(read_document("kind: thing\nuse: not-used\nforms: {a: 1}", "a.yaml"), SCHEMA, (WORDS,))


@pytest.mark.parametrize(
    ("line", "said"),
    [
        ("shar: 1", 'unknown key "shar" in the file; did you mean "share"?'),
        ("colour: 1", 'unknown key "colour" in the file'),
        ("share: -0.5", "share is -0.5; it must be at least 0 and at most 1"),
        ("share: 1.5", "share is 1.5; it must be at least 0 and at most 1"),
        ("share: true", "share is true; a number is needed"),
        ("share: 0,5", 'share is text; a number is needed: write 0.5, with a point, for "0,5"'),
        ("share: 1 500,5 lx", 'share is text; a number is needed: write 1500.5, with a point, for "1 500,5 lx"'),
        ("share: 20 s", 'share is text; a number is needed: write 20 alone for "20 s", the unit is in the key'),
        ("share: '20'", "share is text; a number is needed: write 20 without quotes"),
        ("share: half", 'share is "half", which is text; a number is needed'),
        ("share:", "share is empty; a number is needed"),
        ("count: 2.5", "count is 2.5; a whole number is needed"),
        ("loupes: No", "loupes is text; true or false is needed: write false"),
        ("name: 46", "name is a number; text is needed, so put it in quotes"),
        ("name: a", "name is too short (1 characters); the least is 2"),
        ("name: abcdef", "name is too long (6 characters); the most is 5"),
        ("site: posteriour", 'site is "posteriour"; it must be anterior or posterior; did you mean "posterior"?'),
        ("site: 3", "site is a number; it must be anterior or posterior"),
        ("on: 30.11.2026", 'on is "30.11.2026"; it must be a date'),
        ("on: 2027-02-29", 'on is "2027-02-29"; there is no such day, a date is written YYYY-MM-DD'),
        ("list: []", "list has too few entries (0); the least is 1"),
        ("list: [a, b, c]", "list has too many entries (3); the most is 2"),
        ("list: a", "list is text; a list is needed"),
        ("list: [a, B]", 'list[1] is "B"; it must be small letters'),
        ('list: ["a\\n"]', 'list[0] is "a\\n"; it must be small letters'),
        (
            "use: notused",
            'use is "notused"; it must be not-used or a mapping of keys and values; did you mean "not-used"?',
        ),
        ("use: 3", "use is a number; it must be not-used or a mapping of keys and values"),
        ("use: {card: A}", 'use.card is "A"; it must be small letters'),
        ("use: {crad: a}", 'unknown key "crad" in use; did you mean "card"?'),
        ("use: {card: a, time_s: 0}", "use.time_s is 0; it must be above 0"),
        ("use: {time_s: 1}", '"card" is missing from use'),
        ("forms: {}", 'forms needs "a" or "b"'),
        ("forms: {a: 1, b: 2}", '"a" and "b" cannot stand together in forms; give one of them'),
        ("forms: {b: x}", 'forms.b is "x", which is text; a number is needed'),
        ("forms: x", "forms is text; a mapping of keys and values is needed"),
        ("named: {A: 1}", 'the key "A" in named does not fit; a key here is small letters'),
    ],
)
def test_message(line, said):
    assert messages(f"kind: thing\n{line}\n") == [said]


def test_all_problems_in_the_order_of_the_file():
    said = messages("count: -1\nshare: 2\nsite: x\n")
    assert [message.split()[0] for message in said] == ['"kind"', "count", "share", "site"]


def test_another_kind_is_the_only_problem():
    assert messages("kind: lamp\nshare: 2\ncolour: 1\n") == ['kind is "lamp"; it must be thing']


def test_a_misspelt_key_is_not_also_missing():
    assert messages("knid: thing\n") == ['unknown key "knid" in the file; did you mean "kind"?']


def test_places():
    with pytest.raises(Refused) as refused:
        check_schema(read_document("kind: thing\nlist:\n  - a\n  - B\n", "a.yaml"), SCHEMA, (WORDS,))
    (problem,) = refused.value.problems
    assert (problem.place.line, problem.place.column, problem.path) == (4, 5, ("list", 1))


def test_at_most_fifty_problems():
    strange = "".join(f"x{number}: 1\n" for number in range(200))
    assert len(messages(f"kind: thing\n{strange}")) == 50


def test_data_given_by_a_program():
    with pytest.raises(Refused, match=r"^given: share is 2; "):
        check_schema(Document.of({"kind": "thing", "share": 2}, "given"), SCHEMA, (WORDS,))


def test_nothing_is_fetched():
    elsewhere = {"$id": "urn:farside:schema:else:1", "properties": {"a": {"$ref": "https://example.invalid/schema"}}}
    with pytest.raises(Exception, match=r"Unresolvable: https://example\.invalid/schema"):
        check_schema(Document.of({"a": 1}, "given"), elsewhere)
