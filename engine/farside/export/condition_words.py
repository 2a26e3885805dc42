"""Conditions of rules in words, as a rule's page gives them."""

from collections.abc import Mapping
from typing import Any, Final

from farside.export.markdown import code, link, plain
from farside.quantities.quantity import Quantity
from farside.quantities.registry import QUANTITIES

_BY_NAME: Final[Mapping[str, Quantity]] = {quantity.name: quantity for quantity in reversed(QUANTITIES)}
_TESTS: Final[Mapping[str, str]] = {
    "at_least": "is at least",
    "at_most": "is at most",
    "above": "is above",
    "below": "is below",
    "is": "is",
    "one_of": "is one of",
    "holds_all": "holds all of",
}


def in_words(when: Any, limits: Mapping[str, Any]) -> str:
    """A condition as one phrase.

    Parameters
    ----------
    when : str or Mapping
        The condition as a rule's file has it.
    limits : Mapping
        The rule's limits by name, for their values.
    """
    if when == "always":
        return "always"
    ((key, inside),) = when.items()
    if key in {"all", "any"}:
        joint = " and " if key == "all" else " or "
        return joint.join(_bracketed(part, limits) for part in inside)
    if key == "not":
        return f"it does not hold that {_bracketed(inside, limits)}"
    return f"{name_in_words(key)} {_test(inside, key, limits)}"


def name_in_words(name: str) -> str:
    """A quantity by its label, with its page; a field as it is written."""
    quantity = _BY_NAME.get(name)
    return code(name) if quantity is None else link(plain(quantity.label), f"../quantities/{name}.md")


def bare_name(name: str) -> str:
    """A quantity by its label, anything else by its own words; without a link."""
    quantity = _BY_NAME.get(name)
    return name.replace("_", " ") if quantity is None else quantity.label


def value_in_words(value: Any, name: str) -> str:
    """A value with the unit of the quantity or field that it belongs to."""
    if isinstance(value, bool):
        return "yes" if value else "no"
    if isinstance(value, list):
        return ", ".join(plain(item) for item in value) or "nobody and nothing"
    unit = unit_of(name) if isinstance(value, int | float) else ""
    return f"{plain(value)} {unit}".strip()


def unit_of(name: str) -> str:
    """The unit of a quantity; nothing for what has none."""
    quantity = _BY_NAME.get(name)
    return "" if quantity is None else quantity.unit


def _bracketed(when: Any, limits: Mapping[str, Any]) -> str:
    words = in_words(when, limits)
    return f"({words})" if isinstance(when, Mapping) and {"all", "any"} & when.keys() else words


def _test(test: Mapping[str, Any], name: str, limits: Mapping[str, Any]) -> str:
    ((kind, operand),) = test.items()
    if kind == "given":
        return "is entered" if operand else "is not entered"
    if kind == "between":
        low, high = (_operand(each, name, limits) for each in operand)
        return f"lies between {low} and {high}"
    return f"{_TESTS[kind]} {_operand(operand, name, limits)}"


def _operand(operand: Any, name: str, limits: Mapping[str, Any]) -> str:
    if not isinstance(operand, Mapping):
        return value_in_words(operand, name)
    ((kind, target),) = operand.items()
    if kind == "limit":
        return f"*{plain(target)}* ({value_in_words(limits[target]['value'], name)})"
    return name_in_words(target)
