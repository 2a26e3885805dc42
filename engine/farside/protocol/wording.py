"""Findings in words: placeholders filled, numbers shown to the digits that they deserve."""

import re
from collections.abc import Mapping, Sequence
from typing import Any, Final

from farside.protocol.messages import INPUTS, MESSAGES
from farside.quantities.quantity import Quantity

_PLACEHOLDER: Final = re.compile(r"\{([a-z][a-z0-9_.]*)\}")
_WHOLE: Final = frozenset({"s", "days", "lx", "mW/cm²"})
_DIGITS: Final = 3
_MOST_DIGITS: Final = 6


def said(key: str, **values: object) -> str:
    """One of the engine's own messages."""
    return MESSAGES[key].format(**values)


def placeholders(words: str) -> list[str]:
    """The names that some words hold a place for."""
    return _PLACEHOLDER.findall(words)


def filled(words: str, values: Mapping[str, str]) -> str:
    """Words with each placeholder given its value; one without a value reads "not known"."""
    return _PLACEHOLDER.sub(lambda match: values.get(match[1], "not known"), words)


def with_unit(value: Any, quantity: Quantity | None, against: Sequence[float] = ()) -> str:
    """A value as words show it, its unit behind it."""
    unit = quantity.unit if quantity else ""
    text = shown(value, unit, against, quantity.digits if quantity else _DIGITS)
    return f"{text} {unit}" if unit and unit != "°" else f"{text}{unit}"


def shown(value: Any, unit: str = "", against: Sequence[float] = (), digits: int = _DIGITS) -> str:
    """A value in figures: so many digits, or as many more as tell it from each limit that it is held against.

    Examples
    --------
    >>> shown(0.77329), shown(2.0), shown(463.975, "mW/cm²"), shown(1093.4, "mW/cm²")
    ('0.773', '2.0', '464', '1090')
    >>> shown(0.99987, against=[1.0])
    '0.9999'
    """
    if isinstance(value, bool):
        return "yes" if value else "no"
    if isinstance(value, list | tuple):
        return ", ".join(map(str, value))
    if not isinstance(value, int | float):
        return str(value)
    while digits < _MOST_DIGITS and any(
        limit != value and float(f"{limit:.{digits}g}") == float(f"{value:.{digits}g}") for limit in against
    ):
        digits += 1
    return _plain(float(f"{value:.{digits}g}"), unit)


def of_input(name: str) -> str:
    """An input as words name it."""
    return INPUTS.get(name, f'"{name}"')


def _plain(value: float, unit: str) -> str:
    if value == int(value):
        return f"{value:.0f}" if unit in _WHOLE or abs(value) >= 10 else f"{value:.1f}"
    return f"{value:.{_MOST_DIGITS + 4}f}".rstrip("0")
