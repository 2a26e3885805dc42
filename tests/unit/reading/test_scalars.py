"""Plain words mean what YAML 1.2's core schema says, and nothing else."""

import pytest
from farside.reading.scalars import NotFinite, TooLong, resolved

MEANINGS = {
    "": None, "~": None, "null": None, "Null": None, "NULL": None, "nUll": "nUll",
    "true": True, "True": True, "TRUE": True, "false": False, "FALSE": False,
    "yes": "yes", "no": "no", "on": "on", "off": "off", "y": "y",
    "0": 0, "-19": -19, "+12": 12, "007": 7, "0o14": 12, "0x1F": 31, "0b11": "0b11", "-0x1f": "-0x1f",
    "1_000": "1_000", "1e-05": 1e-05, "1e3": 1000.0, "12.": 12.0, ".5": 0.5, "-.5": -0.5, "1.5E+3": 1500.0,
    ".": ".", "-": "-", "1e": "1e", "12:30": "12:30", "2026-11-30": "2026-11-30", "2,5": "2,5", "20 s": "20 s",
    "1.2.3": "1.2.3", "٣": "٣", "=": "=",
}  # fmt: skip


@pytest.mark.parametrize("word", MEANINGS)
def test_meaning(word):
    found = resolved(word)
    assert found == MEANINGS[word]
    assert type(found) is type(MEANINGS[word])


@pytest.mark.parametrize("word", [".inf", "-.Inf", "+.INF", ".nan", ".NaN", "1e999", "-1e999"])
def test_not_finite(word):
    with pytest.raises(NotFinite):
        resolved(word)


@pytest.mark.parametrize("word", ["9" * 101, "0x" + "f" * 200, "1." + "0" * 100])
def test_too_long(word):
    with pytest.raises(TooLong):
        resolved(word)


def test_a_number_of_a_hundred_characters_is_read():
    assert resolved("9" * 100) == int("9" * 100)
