"""The page of sources: every work once, where its figures were seen, and all that rests on it."""

from collections.abc import Iterator, Sequence
from itertools import groupby
from typing import Final

from farside import shipped
from farside.export.compared import NOTHING, Compared, Outside, by_topic, topic_name
from farside.export.evidence import Cited, shipped_citations
from farside.export.markdown import bullets, code, link, page, plain
from farside.export.references import reference, short
from farside.protocol.protocol import base_protocol

_SEEN: Final = {
    "seen": "Its figures were read in the work or in an abstract or page that reports it.",
    "memory": "Its figures are from memory and were not seen.",
    "computed": "Its figures were worked out from a formula or open data.",
}


def source_page(outside: Outside = NOTHING) -> str:
    """The page's Markdown, with the outside checks as they came out."""
    cited: dict[str, list[Cited]] = {}
    for place in shipped_citations():
        cited.setdefault(place.cite, []).append(place)
    parts = []
    for cite, source in shipped.sources().items():
        rests = [*_rules(cited.get(cite, ())), *_tables(cited.get(cite, ()))]
        rests += _checks([check for check in outside.checks if check.source == cite])
        lines = [
            reference(cite),
            f"{code(cite)} · {plain(source['kind'])} · {_SEEN[source['seen']]}",
            plain(source["note"]) if "note" in source else "",
            f"What rests on it:\n\n{bullets(rests)}" if rests else "",
        ]
        parts.append("\n\n".join([f"## {plain(short(cite))} {{: #{cite} }}", *filter(None, lines)]))
    intro = (
        "Every source once, with all that rests on it: limits of rules, tables that the model reads, outside checks. "
        "What a work is about is said in our words and is not its printed title; "
        "authors that were not seen are left out. A link to a DOI needs the network."
    )
    return page("Sources", intro, *parts)


def _rules(places: Sequence[Cited]) -> Iterator[str]:
    for rule, group in groupby((place for place in places if place.rule), key=lambda place: place.rule):
        title = link(plain(base_protocol().rule(str(rule)).title), f"rules/{rule}.md")
        said = (
            f"*{plain(place.limit)}*, {plain(place.supports)}" if place.limit else plain(place.supports)
            for place in group
        )
        yield f"Rule {title}: {'; '.join(said)}"


def _tables(places: Sequence[Cited]) -> Iterator[str]:
    for table, group in groupby((place for place in places if place.table), key=lambda place: place.table):
        said = (": ".join(plain(word) for word in (place.row, place.supports) if word) for place in group)
        told = "; ".join(part for part in said if part)
        title = plain(shipped.table(str(table))["title"])
        yield f"Table *{title}*: {told}" if told else f"Table *{title}*"


def _checks(checks: Sequence[Compared]) -> Iterator[str]:
    for topic, group in by_topic(checks).items():
        sets = [name for check in group for name in check.sets]
        counted = sum(check.counted for check in group)
        said = f"{counted} outside {'check' if counted == 1 else 'checks'}" if counted else "no counted check"
        said += f"; sets {', '.join(plain(name) for name in dict.fromkeys(sets))}" if sets else ""
        yield f"{link(plain(topic_name(topic)), f'trust.md#{topic}')}: {said}"
