"""A document's data and the place of every key and value, in YAML and in JSON alike."""

import json

import pytest
from farside.reading import yaml_text
from farside.reading.document import Document, read_document
from farside.reading.messages import MESSAGES
from farside.reading.problems import Refused

YAML = """\
kind: plan
"on": 2026-11-30
increments:
  - composite: a
    thickness_mm: 2.0
  - {composite: b, thickness_mm: 1.5}
gap_mm:
note: |
  two
  lines
"""
JSON = '{\n\t"kind": "plan",\n\t"increments": [\n\t\t{"composite": "a"}, {"thickness_mm": 1.5e0}\n\t]\n}\n'


@pytest.fixture(params=["quick", "pure"])
def parser(request, monkeypatch):
    """Both of PyYAML's parsers, where both are there."""
    if request.param == "pure":
        monkeypatch.setattr(yaml_text, "_QUICK", None)
    return request.param


def at(place):
    return place.line, place.column


def test_data(parser):
    assert read_document(YAML, "a.yaml").data == {
        "kind": "plan",
        "on": "2026-11-30",
        "increments": [{"composite": "a", "thickness_mm": 2.0}, {"composite": "b", "thickness_mm": 1.5}],
        "gap_mm": None,
        "note": "two\nlines\n",
    }


def test_places(parser):
    document = read_document(YAML, "a.yaml")
    assert at(document.place(())) == (1, 1)
    assert at(document.place(("on",))) == (2, 7)
    assert at(document.key_place(("on",))) == (2, 1)
    assert at(document.place(("increments",))) == (4, 3)
    assert at(document.place(("increments", 0, "thickness_mm"))) == (5, 19)
    assert at(document.key_place(("increments", 0, "thickness_mm"))) == (5, 5)
    assert at(document.place(("increments", 1))) == (6, 5)
    assert at(document.key_place(("increments", 1))) == (6, 5)
    assert at(document.place(("increments", 1, "thickness_mm"))) == (6, 34)
    assert at(document.place(("gap_mm",))) == (7, 1)
    assert document.place(("increments", 1, "thickness_mm")).text == "  - {composite: b, thickness_mm: 1.5}"


def test_what_is_not_there_has_its_nearest_ancestors_place(parser):
    document = read_document(YAML, "a.yaml")
    assert at(document.place(("increments", 0, "exposures", 3, "time_s"))) == (4, 5)
    assert at(document.key_place(("lamp", "card"))) == (1, 1)


def test_json_has_places_too():
    document = read_document(JSON, "a.json")
    assert document.data == {"kind": "plan", "increments": [{"composite": "a"}, {"thickness_mm": 1.5}]}
    assert at(document.key_place(("increments",))) == (3, 2)
    assert at(document.place(("increments", 1, "thickness_mm"))) == (4, 40)


def test_json_is_read_whatever_the_file_is_called():
    assert read_document(JSON, "a.yaml").data == read_document(JSON, "a.json").data == json.loads(JSON)


def test_surrogate_pairs_become_one_character(parser):
    assert read_document('{"title": "\\ud83d\\ude00"}', "a.json").data == {"title": "😀"}
    assert read_document('title: "\\ud83d\\ude00"', "a.yaml").data == {"title": "😀"}


def test_line_ends_of_every_system(parser):
    for end in ("\n", "\r\n", "\r"):
        document = read_document(f"a: 1{end}b:{end}  c: 2{end}", "a.yaml")
        assert document.data == {"a": 1, "b": {"c": 2}}
        assert at(document.place(("b", "c"))) == (3, 6)
        assert at(read_document(f'{{"a": 1,{end} "b": 2}}', "a.json").place(("b",))) == (2, 7)


def test_bytes_and_byte_order_mark(parser):
    document = read_document(b"\xef\xbb\xbftitle: Gr\xc3\xb6\xc3\x9fe\n", "a.yaml")
    assert document.data == {"title": "Größe"}
    assert at(document.key_place(("title",))) == (1, 1)


def test_aliases_are_copies(parser):
    document = read_document("a: &a {x: [1]}\nb: *a\nc: [*a, *a]\n", "a.yaml")
    assert document.data == {"a": {"x": [1]}, "b": {"x": [1]}, "c": [{"x": [1]}, {"x": [1]}]}
    document.data["a"]["x"].append(2)
    assert document.data["b"] == {"x": [1]}
    assert at(document.place(("c", 1, "x", 0))) == (3, 9)


def test_merge_keys_are_plain_keys(parser):
    assert read_document("a: &a {x: 1}\nb:\n  <<: *a\n", "a.yaml").data["b"] == {"<<": {"x": 1}}


def test_forty_levels_are_read_and_no_more(parser):
    assert read_document("a: " + "[" * 39 + "]" * 39, "a.yaml")
    with pytest.raises(Refused) as refused:
        read_document("a: " + "[" * 40 + "]" * 40, "a.yaml")
    assert refused.value.problems[0].key == "too-deep"


def test_a_problem_of_a_document():
    document = read_document(YAML, "a.yaml")
    problem = document.problem(MESSAGES, "missing", ("increments", 1), name="exposures")
    assert problem.message == '"exposures" is missing from increments[1]'
    assert problem.path == ("increments", 1)
    assert at(problem.place) == (6, 5)
    assert at(document.problem(MESSAGES, "unfit", ("gap_mm",), at_key=True).place) == (7, 1)


def test_data_given_by_a_program_has_no_line():
    document = Document.of({"kind": "plan", "gap_mm": 2}, "the page")
    problem = document.problem({"k": "no {value}"}, "k", ("gap_mm",), value=2)
    assert (problem.place.line, str(problem)) == (0, "the page: no 2")
