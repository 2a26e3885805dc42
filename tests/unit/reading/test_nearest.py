"""The nearest key is one that a slip of the finger turns into what was written."""

import pytest
from farside.reading.nearest import nearest

KEYS = ["thickness_mm", "time_s", "tilt_deg", "title", "placing_s"]


@pytest.mark.parametrize(
    ("word", "meant"),
    [
        ("thicknes_mm", "thickness_mm"),
        ("Thickness-mm", "thickness_mm"),
        ("tiem_s", "time_s"),
        ("titel", "title"),
        ("tme_s", "time_s"),
        ("patient", None),
        ("x", None),
        ("", None),
        ("thickness_mm" * 50, None),
    ],
)
def test_nearest(word, meant):
    assert nearest(word, KEYS) == meant


def test_of_equals_the_first_in_order():
    assert nearest("bat", ["cat", "rat"]) == "cat"
    assert nearest("bat", ["rat", "cat"]) == "cat"


def test_without_candidates():
    assert nearest("a", []) is None
