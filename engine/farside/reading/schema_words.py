"""How types, ranges and choices of a schema are called in a message."""

import re
from collections.abc import Mapping
from typing import Any, Final, NamedTuple

from farside.reading.tree import plain_word

_TYPES: Final = {
    "string": "text",
    "number": "a number",
    "integer": "a whole number",
    "boolean": "true or false",
    "array": "a list",
    "object": "a mapping of keys and values",
    "null": "nothing",
}
ANSWERS: Final = {"yes": "true", "on": "true", "y": "true", "no": "false", "off": "false", "n": "false"}
_NUMBER: Final = re.compile(r"([-+]?)([0-9][0-9 \u00a0\u202f]*)(?:([.,])([0-9]+))?\s*(.*)\Z", re.DOTALL)
_UNIT: Final = re.compile(r"[a-zA-Zµ°%/²³ ^0-9]{1,12}\Z")
# Letters taken for the digits 0 and 1, which are no unit after a number.
_LIKE_DIGITS: Final = ("O", "o", "I")


class Meant(NamedTuple):
    """A number that a text seems to mean, as a file would write it, and what is wrong with how it is written."""

    written: str
    why: str


def wanted_word(types: str | list[str]) -> str:
    """What a schema's `type` asks for."""
    return choices_word([_TYPES[types]] if isinstance(types, str) else [_TYPES[name] for name in types])


def range_word(schema: Mapping[str, Any]) -> str:
    """A schema's range: "above 0 and at most 20"."""
    parts = [
        f"{word} {shown_value(schema[key])}"
        for key, word in (
            ("minimum", "at least"),
            ("exclusiveMinimum", "above"),
            ("maximum", "at most"),
            ("exclusiveMaximum", "below"),
        )
        if key in schema
    ]
    return " and ".join(parts)


def choices_word(choices: list[Any]) -> str:
    """Some words to choose from: "none, metal or clear"."""
    words = [plain_word(choice) for choice in choices]
    return words[0] if len(words) == 1 else f"{', '.join(words[:-1])} or {words[-1]}"


def shown_value(value: object) -> str:
    """A number as a message shows it, never longer than a line bears."""
    return plain_word(value) if isinstance(value, (bool, int)) and abs(value) < 10**15 else f"{value}"


def looks_like_number(text: str) -> Meant | None:
    """The number that a text means: with a decimal comma, with its unit, or in quotes; else None."""
    if len(text) > 60 or not (found := _NUMBER.match(text.strip())):
        return None
    sign, whole, mark, part, rest = found.groups()
    written = sign.removeprefix("+") + re.sub(r"\s", "", whole) + (f".{part}" if part else "")
    if (rest and not _UNIT.match(rest)) or text.strip().endswith(_LIKE_DIGITS):
        return None
    if mark == ",":
        return Meant(written, "comma")
    if rest:
        return Meant(written, "unit")
    return Meant(written, "spaces" if re.search(r"\s", whole.strip()) else "quotes")
