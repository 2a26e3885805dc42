"""What a plain word in a file means: YAML 1.2's core schema, and no other.

`no`, `12:30` and `2026-11-30` are text; `1e-05`, `0o14` and `0x1f` are numbers.
"""

import re
from typing import Final

Scalar = str | int | float | bool | None

WORDS: Final[dict[str, bool | None]] = {
    **dict.fromkeys(("", "~", "null", "Null", "NULL"), None),
    **dict.fromkeys(("true", "True", "TRUE"), True),
    **dict.fromkeys(("false", "False", "FALSE"), False),
}
BEGINS_A_NUMBER: Final = frozenset("+-.0123456789")
LONGEST_NUMBER: Final = 100
BASE: Final = {"0o": 8, "0x": 16}

_WHOLE: Final = re.compile(r"[-+]?[0-9]+\Z")
_OTHER_BASE: Final = re.compile(r"0o[0-7]+\Z|0x[0-9a-fA-F]+\Z")
_DECIMAL: Final = re.compile(r"[-+]?(?:\.[0-9]+|[0-9]+(?:\.[0-9]*)?)(?:[eE][-+]?[0-9]+)?\Z")
_NOT_FINITE: Final = re.compile(r"[-+]?\.(?:inf|Inf|INF)\Z|\.(?:nan|NaN|NAN)\Z")


class NotFinite(ValueError):
    """A number that is infinite, or no number, or too large for one."""


class TooLong(ValueError):
    """A number of more characters than any measurement has."""


def resolved(word: str) -> Scalar:
    """The value of a plain scalar.

    Raises
    ------
    NotFinite
        For `.inf`, `.nan` and numbers beyond the largest finite one.
    TooLong
        For numbers of more than 100 characters.
    """
    if word in WORDS:
        return WORDS[word]
    if word[0] not in BEGINS_A_NUMBER:
        return word
    return _number(word)


def _number(word: str) -> Scalar:
    whole, other = _WHOLE.match(word), _OTHER_BASE.match(word)
    if not (whole or other or _DECIMAL.match(word)):
        if _NOT_FINITE.match(word):
            raise NotFinite(word)
        return word
    if len(word) > LONGEST_NUMBER:
        raise TooLong(word)
    if whole:
        return int(word)
    if other:
        return int(word[2:], BASE[word[:2]])
    number = float(word)
    if number - number != 0.0:
        raise NotFinite(word)
    return number
