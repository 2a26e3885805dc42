"""The report of each example plan as the command line prints it in JSON, and the file that it is kept in."""

from collections.abc import Iterable
from datetime import date
from difflib import unified_diff
from pathlib import Path
from typing import Any, Final

import farside
from farside.cli.check import as_json
from unit.made import example, example_cards, example_plan

KEPT: Final = Path(__file__).parent / "reports"
ON: Final = date(2026, 11, 30)


def kept_in(plan: str) -> Path:
    """Where a plan's report is kept."""
    return KEPT / f"{plan}.json"


def report_text(plan: str, cards: Iterable[Any] | None = None) -> str:
    """A plan's whole report with the example clinic's cards, or others, and its usual values."""
    at_hand = example_cards() if cards is None else cards
    return as_json(farside.check(example_plan(plan), at_hand, clinic=example("clinic.yaml"), on=ON))


def differences(plan: str, text: str, most: int = 40) -> list[str]:
    """The first lines in which a report differs from the kept one, none where it is the same to the byte."""
    kept = kept_in(plan).read_bytes()
    if kept == text.encode():
        return []
    lines = unified_diff(kept.decode().splitlines(), text.splitlines(), "kept", "now", n=1, lineterm="")
    return list(lines)[:most] or ["the same lines, with other line ends"]
