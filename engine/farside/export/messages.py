"""The words around a report: key to English."""

from collections.abc import Mapping
from typing import Final

from farside.protocol.messages import MESSAGES as OF_FINDINGS

MARKS: Final[Mapping[str, str]] = {"stop": "■", "revise": "◆", "open": "◇", "watch": "●", "clear": "○"}

MESSAGES: Final[Mapping[str, str]] = {
    "head": "{title} · for {on} · protocol {protocol} {edition} ({digest})",
    "grade-stop": "stop",
    "grade-revise": "revise",
    "grade-open": "open",
    "grade-watch": "watch",
    "grade-clear": "clear",
    "measured": "{label} {value}: {limits}",
    "side-below": "{finding} below {value}",
    "side-above": "{finding} above {value}",
    "side-at_most": "{finding} at {value} or less",
    "side-at_least": "{finding} at {value} or more",
}


def text(key: str, **values: object) -> str:
    """One of the words around a report."""
    return {**OF_FINDINGS, **MESSAGES}[key].format(**values)
