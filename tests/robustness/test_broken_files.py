"""Every broken file is refused with the messages that stand for it in broken.json, and at their places."""

import json
from pathlib import Path

import pytest
from farside.reading.document import read_document
from farside.reading.problems import Refused
from farside.reading.schema import check_schema

HERE = Path(__file__).parent
SCHEMAS = HERE.parents[1] / "rules" / "schema" / "v1"
EXPECTED = json.loads((HERE / "broken.json").read_text(encoding="utf-8"))


@pytest.fixture(scope="module")
def schemas():
    return {path.stem: json.loads(path.read_text(encoding="utf-8")) for path in SCHEMAS.glob("*.json")}


def read(path, schemas):
    document = read_document(path.read_bytes(), path.name)
    kind = document.data.get("kind")
    check_schema(document, schemas.get(kind, schemas["plan"]), schemas.values())


def refusal_of(path, schemas):
    with pytest.raises(Refused) as refused:
        read(path, schemas)
    return refused.value


def test_every_broken_file_has_its_messages():
    assert sorted(path.name for path in (HERE / "broken").iterdir()) == sorted(EXPECTED)
    assert len(EXPECTED) >= 40


@pytest.mark.parametrize("name", sorted(EXPECTED))
def test_messages_and_places(name, schemas):
    refusal = refusal_of(HERE / "broken" / name, schemas)
    said = [f"{problem.place.line}:{problem.place.column} {problem.message}" for problem in refusal.problems]
    assert said == EXPECTED[name]


@pytest.mark.parametrize("name", sorted(EXPECTED))
def test_what_is_printed_is_short_and_printable(name, schemas):
    printed = str(refusal_of(HERE / "broken" / name, schemas))
    assert printed.startswith(f"{name}:")
    assert len(printed) < 2_000
    assert all(line.isprintable() for line in printed.split("\n"))
    assert max(map(len, printed.split("\n"))) < 500


def test_the_line_itself_is_shown_under_the_message(schemas):
    printed = str(refusal_of(HERE / "broken" / "misspelt-key.yaml", schemas))
    assert printed == (
        'misspelt-key.yaml:5:5: unknown key "thicknes_mm" in increments[0]; did you mean "thickness_mm"?\n'
        "  5 |     thicknes_mm: 2.0"
    )
