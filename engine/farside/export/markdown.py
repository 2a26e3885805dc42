"""Markdown from data: text made harmless, tables, links between the made pages."""

import re
from collections.abc import Iterable, Sequence
from typing import Any, Final

_SPECIAL: Final = re.compile(r"([\\`*_{}\[\]|#])")


def plain(value: Any) -> str:
    """A value as text that Markdown and HTML leave as it is."""
    text = str(value).replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;")
    return _SPECIAL.sub(r"\\\1", text).replace("\n", " ")


def code(value: Any) -> str:
    """A name as it is written in files."""
    return f"`{str(value).replace('`', '')}`"


def link(text: str, target: str) -> str:
    """A link whose text is Markdown already."""
    return f"[{text}]({target})"


def table(head: Sequence[str], rows: Iterable[Sequence[str]]) -> str:
    """A table of cells that are Markdown already."""
    lines = [head, ["---"] * len(head), *rows]
    return "\n".join(f"| {' | '.join(cells)} |" for cells in lines)


def bullets(items: Iterable[str]) -> str:
    """A list of items that are Markdown already."""
    return "\n".join(f"- {item}" for item in items)


def page(title: str, *parts: str | None) -> str:
    """A page: its title and its parts, those that are empty left out."""
    return "\n\n".join([f"# {plain(title)}", *(part for part in parts if part)]) + "\n"


def under(heading: str, *parts: str | None) -> str | None:
    """A heading with what stands under it; None where nothing does."""
    kept = [part for part in parts if part]
    return "\n\n".join([f"## {heading}", *kept]) if kept else None
