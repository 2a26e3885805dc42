"""Every example plan's report is, whole and to the byte, the one that is kept; in CPython and in Pyodide.

Where a report is meant to change, rewrite.py beside this writes the kept ones anew.
"""

import pytest
from unit.golden.made import KEPT, differences, kept_in, report_text
from unit.made import PLANS, edited, example_cards


@pytest.mark.parametrize("plan", PLANS)
def test_the_report_is_the_kept_one(plan):
    assert differences(plan, report_text(plan)) == []


def test_every_plan_has_a_kept_report_and_nothing_else_is_kept():
    assert sorted(KEPT.iterdir()) == sorted(map(kept_in, PLANS))


def test_a_reading_that_differs_by_a_thousandth_is_seen():
    """The comparison itself: one figure of one card, changed by less than any meter can tell, shows."""
    cards = example_cards()
    index = next(number for number, card in enumerate(cards) if card["id"] == "chair-2-blue")
    reading = cards[index]["readings"][-1]["radiant_exitance_mw_cm2"]
    path = f"readings/{len(cards[index]['readings']) - 1}/radiant_exitance_mw_cm2"
    cards[index] = edited(cards[index], {path: reading * 1.001})
    seen = differences("deep-box", report_text("deep-box", cards))
    assert any(line.startswith("+") and '"value"' in line for line in seen)


@pytest.mark.parametrize("plan", PLANS)
def test_a_last_digit_is_seen(plan):
    """Every figure counts: one digit of the last figure of a report, changed, is a difference."""
    text = report_text(plan)
    at = max(text.rfind(digit) for digit in "123456789")
    changed = text[:at] + str((int(text[at]) + 1) % 10) + text[at + 1 :]
    assert differences(plan, changed)
