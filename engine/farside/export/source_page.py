"""The page of sources: every work once, where its figures were seen, and which rules and tables rest on it."""

from collections.abc import Iterator, Mapping
from typing import Any, Final

from farside import shipped
from farside.export.markdown import code, link, page, plain
from farside.export.rule_pages import cited_rules, reference

_SEEN: Final = {
    "seen": "Its figures were read in the work or in an abstract or page that reports it.",
    "memory": "Its figures are from memory and were not seen.",
    "computed": "Its figures were worked out from a formula or open data.",
}


def source_page() -> str:
    """The page's Markdown."""
    rules, tables = cited_rules(), _cited_tables()
    parts = []
    for cite, source in shipped.sources().items():
        used = [link(plain(rule), f"rules/{rule}.md") for rule in rules.get(cite, ())]
        used += [f"table {code(name)}" for name in tables.get(cite, ())]
        lines = [
            reference(cite),
            f"Kind: {plain(source['kind'])}. {_SEEN[source['seen']]}",
            plain(source["note"]) if "note" in source else "",
            f"Used by {', '.join(used)}." if used else "Used by the model or its checks.",
        ]
        parts.append("\n\n".join([f"## {plain(cite)} {{: #{cite} }}", *filter(None, lines)]))
    intro = (
        "Every source once. What a work is about is said in our words and is not its printed title; "
        "authors that were not seen are left out. A link to a DOI needs the network."
    )
    return page("Sources", intro, *parts)


def _cited_tables() -> dict[str, list[str]]:
    """For each source, the ids of the tables that cite it anywhere."""
    found: dict[str, list[str]] = {}
    for document in shipped.documents("tables"):
        for cite in dict.fromkeys(_cites(document.data)):
            found.setdefault(cite, []).append(document.data["id"])
    return found


def _cites(part: Any) -> Iterator[str]:
    if isinstance(part, Mapping):
        for key, inside in part.items():
            if key == "cite":
                yield str(inside)
            else:
                yield from _cites(inside)
    elif isinstance(part, list):
        for item in part:
            yield from _cites(item)
