"""A page for each quantity that a rule can speak of: unit, meaning, what it reads, over what range it was checked."""

from collections.abc import Iterator, Sequence
from itertools import groupby
from typing import Final

from farside.export.markdown import bullets, code, link, page, plain, table, under
from farside.protocol.protocol import base_protocol
from farside.quantities.quantity import Quantity
from farside.quantities.registry import QUANTITIES
from farside.quantities.subject import ABOUT

_NO_UNIT: Final = "none (a number, a share or a ratio)"


def quantity_pages() -> Iterator[tuple[str, str]]:
    """The path of each page below the site's pages, and its Markdown."""
    yield "quantities/index.md", _index()
    for name, entries in groupby(sorted(QUANTITIES, key=lambda quantity: quantity.name), key=lambda each: each.name):
        yield f"quantities/{name}.md", _page(name, list(entries))


def _page(name: str, entries: Sequence[Quantity]) -> str:
    heads = [_entry(quantity, heading=len(entries) > 1) for quantity in entries]
    used = [rule for rule in base_protocol().rules if any(test.name == name for test in rule.tests())]
    rules = bullets(link(plain(rule.title), f"../rules/{rule.id}.md") for rule in used)
    intro = f"{code(name)} in files, reports and rules."
    return page(_sentence(entries[0].label), intro, *heads, under("Rules that use it", rules))


def _entry(quantity: Quantity, *, heading: bool) -> str:
    parts = [
        f"## Of each {quantity.about}" if heading else f"Of each {quantity.about}.",
        f"{_sentence(plain(quantity.means))}.",
        f"Unit: {plain(quantity.unit) if quantity.unit else _NO_UNIT}.",
        f"Formula: {plain(quantity.formula)}" if quantity.formula else "",
        f"Reads {', '.join(code(name) for name in quantity.reads)}." if quantity.reads else "Reads what was entered.",
        _reach(quantity),
    ]
    return "\n\n".join(part for part in parts if part)


def _sentence(words: str) -> str:
    return words[:1].upper() + words[1:]


def _reach(quantity: Quantity) -> str:
    if quantity.reach is None:
        return "Reach: wherever its inputs are given; it is arithmetic on them."
    rows = [(code(name), plain(f"{low:g}"), plain(f"{high:g}")) for name, (low, high) in quantity.reach.items()]
    return "Reach: given only where the model was checked.\n\n" + table(("Input", "From", "To"), rows)


def _index() -> str:
    parts = []
    for about in ABOUT:
        rows = [
            (link(plain(quantity.label), f"{quantity.name}.md"), plain(quantity.unit) or "–", plain(quantity.means))
            for quantity in QUANTITIES
            if quantity.about == about
        ]
        parts.append(under(f"Of each {about}", table(("Quantity", "Unit", "Means"), rows) if rows else None))
    return page("Quantities", "What a rule can speak of, each with its unit, its meaning and its reach.", *parts)
