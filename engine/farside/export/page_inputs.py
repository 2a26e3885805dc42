"""What a rule reads, as its page shows it: each quantity with formula and reach, each field with its meaning."""

from collections.abc import Iterator
from typing import Final

from farside.export.markdown import bullets, code, link, plain
from farside.protocol.fields import fields
from farside.protocol.rule import Rule
from farside.protocol.wording import placeholders
from farside.quantities.quantity import Quantity
from farside.quantities.reach import Reach
from farside.quantities.registry import visible

# Longest first, since "mm" ends others.
_ENDINGS: Final = (("_mw_cm2", "mW/cm²"), ("_per_mm", "/mm"), ("_mm", "mm"), ("_s", "s"))
# Parts of a plan that fields begin with; all other fields begin with the kind of a card.
_PARTS: Final = ("increment", "exposure")


def inputs(rule: Rule) -> str | None:
    """All that a rule's conditions and words speak of; None where that is nothing."""
    names = list(dict.fromkeys(_names(rule)))
    quantities, known = visible(rule.about), fields(rule.about)
    lines = [quantity_line(quantities[name]) for name in names if name in quantities]
    for name in names:
        if name in known and name not in quantities:
            head = name.split(".")[0]
            page = "plan.md#" + head if head in _PARTS else f"{head}.md"
            means = plain(known[name].get("description", "")).rstrip(".")
            lines.append(f"{link(code(name), f'../formats/{page}')}, as entered: {means[:1].lower() + means[1:]}.")
    return bullets(lines) if lines else None


def quantity_line(quantity: Quantity) -> str:
    """A quantity in one item: name, unit, meaning, formula, reach."""
    unit = f", {plain(quantity.unit)}" if quantity.unit else ""
    formula = f" Formula: {plain(quantity.formula).rstrip('.')}." if quantity.formula else ""
    means = plain(quantity.means).rstrip(".")
    name = link(plain(quantity.label), f"../quantities/{quantity.name}.md")
    return f"**{name}**{unit}: {means[:1].lower() + means[1:]}.{formula} {reach_in_words(quantity.reach)}"


def reach_in_words(reach: Reach | None) -> str:
    """The ranges over which a quantity was checked, as one sentence."""
    if reach is None:
        return "Reach: wherever its inputs are given; it is arithmetic on them."
    ranges = (f"{_input(name)[0]} {low:g} to {high:g} {_input(name)[1]}".strip() for name, (low, high) in reach.items())
    return f"Reach, beyond which it is not given: {', '.join(ranges)}."


def _input(name: str) -> tuple[str, str]:
    """An input's name in words, and its unit."""
    for ending, unit in _ENDINGS:
        if name.endswith(ending):
            return name.removesuffix(ending).replace("_", " "), unit
    return name.replace("_", " "), ""


def _names(rule: Rule) -> Iterator[str]:
    for test in rule.tests():
        yield test.name
        yield from (operand.of for operand in test.operands if operand.sort in {"quantity", "field"})
    yield from placeholders(rule.says)
    for level in rule.levels:
        yield from placeholders(level.says)
