"""What a refusal prints: place, message, line; short and printable whatever the file held."""

import pytest
from farside.reading.document import read_document
from farside.reading.problems import LINE_LENGTH, Place, Problem, Refused, path_text, printable, shown_line


def problem(text="x", file="a.yaml", line=3, shown="the line"):
    return Problem("key", {"value": text}, "it is {value}", Place(file, line, 7, shown), ())


def test_place_message_and_line():
    assert str(problem()) == "a.yaml:3:7: it is x\n  3 | the line"


def test_without_a_place_only_the_name_stands():
    assert str(problem(line=0, shown="")) == "a.yaml: it is x"


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("a\tb\nc", "a\\tb\\nc"),
        ("a\u202eb", "a\\u202eb"),
        ("\x1b[31mred", "\\x1b[31mred"),
        ("a\u200bb\u2028c", "a\\u200bb\\u2028c"),
        ("1\u00a0000", "1 000"),
        ("Größe ½ 齒 😀", "Größe ½ 齒 😀"),
        ("<b>&amp;</b>", "<b>&amp;</b>"),
        ("\ud83d", "\\ud83d"),
    ],
)
def test_printable(text, shown):
    assert printable(text) == shown
    assert problem(text).message == f"it is {shown}"


def test_long_text_is_cut():
    assert printable("x" * 500, 10) == "xxxxxxxxx…"
    assert len(problem("x" * 5_000).message) < 200
    assert len(printable("\u202e" * 500, 20)) == 20


def test_braces_in_a_value_are_only_text():
    assert problem("{value.__class__} {0}").message == "it is {value.__class__} {0}"


@pytest.mark.parametrize("column", [1, 60, 61, 500, 900, 941, 1000])
def test_a_long_line_is_cut_around_its_place(column):
    line = "".join(chr(0x4E00 + index) for index in range(1_000))
    shown = shown_line(line, column)
    assert len(shown) == LINE_LENGTH
    assert line[column - 1] in shown


def test_a_short_line_is_whole():
    assert shown_line("    thicknes_mm: 2.0", 5) == "    thicknes_mm: 2.0"


def test_path_text():
    assert path_text(()) == "the file"
    assert path_text(("increments", 0, "thickness_mm")) == "increments[0].thickness_mm"
    assert path_text(("a\u202eb",)) == "a\\u202eb"


def test_at_most_five_problems_and_two_thousand_characters():
    seven = str(Refused([problem(str(number)) for number in range(7)]))
    assert seven.count("it is") == 5
    assert seven.endswith("\nand 2 more")
    long = str(Refused([problem("y" * 5_000, "f" * 5_000, shown="z" * 120)] * 9))
    assert len(long) < 2_000
    assert " more" in long


def test_a_hostile_file_name_is_shown_as_text():
    with pytest.raises(Refused) as refused:
        read_document("", "a\n\u202eb.yaml")
    assert str(refused.value).startswith("a\\n\\u202eb.yaml:1:1: ")
