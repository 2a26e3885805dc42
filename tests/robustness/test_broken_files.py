"""Every broken file is refused with the messages that stand for it in broken.json, and at their places."""

import json
from pathlib import Path

import pytest
from farside.clinic.opened import open_files
from farside.clinic.reading import checked
from farside.protocol.read_rule import read_rule
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from unit.made import example_cards

HERE = Path(__file__).parent
EXPECTED = json.loads((HERE / "broken.json").read_text(encoding="utf-8"))


@pytest.fixture(scope="module")
def held():
    """The example clinic's cards, which a broken plan may name."""
    return [Document.of(card, card["id"]) for card in example_cards()]


def read(path, held):
    """A file as the page opens it; a rule as the protocol reads it."""
    document = read_document(path.read_bytes(), path.name)
    kind = document.data.get("kind")
    if kind == "rule":
        read_rule(document, "light-dose")
    elif kind == "protocol":
        checked(document)
    else:
        open_files([(path.name, path.read_bytes())], held)


def refusal_of(path, held):
    with pytest.raises(Refused) as refused:
        read(path, held)
    return refused.value


def test_every_broken_file_has_its_messages():
    assert sorted(path.name for path in (HERE / "broken").iterdir()) == sorted(EXPECTED)
    assert len(EXPECTED) >= 150


@pytest.mark.parametrize("name", sorted(EXPECTED))
def test_messages_and_places(name, held):
    refusal = refusal_of(HERE / "broken" / name, held)
    said = [f"{problem.place.line}:{problem.place.column} {problem.message}" for problem in refusal.problems]
    assert said == EXPECTED[name]


@pytest.mark.parametrize("name", sorted(EXPECTED))
def test_what_is_printed_is_short_and_printable(name, held):
    printed = str(refusal_of(HERE / "broken" / name, held))
    assert printed.startswith(f"{name}:")
    assert len(printed) < 2_000
    assert all(line.isprintable() for line in printed.split("\n"))
    assert max(map(len, printed.split("\n"))) < 500


def test_the_line_itself_is_shown_under_the_message(held):
    printed = str(refusal_of(HERE / "broken" / "misspelt-key.yaml", held))
    assert printed == (
        'misspelt-key.yaml:5:5: unknown key "thicknes_mm" in increments[0]; did you mean "thickness_mm"?\n'
        "  5 |     thicknes_mm: 2.0"
    )
