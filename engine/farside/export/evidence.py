"""What rests on each source, and what is wrong with that: limits without a source, sources unknown or unused."""

from collections.abc import Collection, Iterable, Iterator, Mapping
from dataclasses import dataclass
from typing import Any, Final

from farside import shipped

SOURCED: Final = ("standard", "consensus", "clinical", "bench")
"""The strengths that no limit has without a source."""

Data = Mapping[str, Any]


@dataclass(frozen=True, slots=True)
class Cited:
    """One place that rests on a source: a limit of a rule, a rule as a whole, or a row of a table.

    `limit` is None where the rule has no limit to carry the source; `supports` is what the source is cited for.
    """

    cite: str
    rule: str | None = None
    limit: str | None = None
    table: str | None = None
    row: str | None = None
    supports: str = ""


def cited_by_rule(rule: Data) -> Iterator[Cited]:
    """What a rule rests on, limit by limit, in the order of its file."""
    for name, limit in rule.get("limits", {}).items():
        for source in limit.get("sources", ()):
            yield Cited(source["cite"], rule=rule["id"], limit=name, supports=source["supports"])
    for source in rule.get("sources", ()):
        yield Cited(source["cite"], rule=rule["id"], supports=source["supports"])


def cited_by_table(table: Data) -> Iterator[Cited]:
    """What a table rests on: its sources as a whole, then those of each row."""
    for cite, says in _cites(table.get("sources", {})):
        yield Cited(cite, table=table["id"], supports=says)
    for row in table["rows"]:
        if isinstance(row, Mapping):
            for cite, says in _cites(row):
                yield Cited(cite, table=table["id"], row=row.get("title", row.get("id")), supports=says)


def shipped_citations() -> Iterator[Cited]:
    """Every place in the shipped rules and tables that rests on a source."""
    for rule in _rules().values():
        yield from cited_by_rule(rule)
    for document in shipped.documents("tables"):
        yield from cited_by_table(document.data)


def shipped_faults(checked: Collection[str] = ()) -> list[str]:
    """What is wrong with the shipped evidence; `checked` are the sources that the outside checks name."""
    return [*faults_of_limits(_rules()), *faults_of_sources(shipped.sources(), shipped_citations(), checked)]


def faults_of_limits(rules: Mapping[str, Data]) -> Iterator[str]:
    """Limits whose strength asks for a source that they do not have, and those with neither source nor reason.

    Parameters
    ----------
    rules : Mapping
        The rules' data by the name of their file.
    """
    for name, rule in rules.items():
        for limit, entry in rule.get("limits", {}).items():
            if not entry.get("sources"):
                if entry["strength"] in SOURCED:
                    yield f'{name}: limit "{limit}" is said to be {entry["strength"]} and has no source'
                elif not entry.get("why"):
                    yield f'{name}: limit "{limit}" has neither a source nor a reason'
        if rule.get("strength") in SOURCED and not rule.get("sources"):
            yield f"{name}: the rule is said to be {rule['strength']} and has no source"


def faults_of_sources(sources: Data, cited: Iterable[Cited], checked: Collection[str] = ()) -> Iterator[str]:
    """Sources that are cited and unknown, and sources that nothing rests on.

    Parameters
    ----------
    sources : Mapping
        Every source by its key.
    cited : iterable of Cited
        The places in rules and tables that rest on one.
    checked : collection of str
        The keys of sources that outside checks name.
    """
    used = set(checked)
    for place in cited:
        used.add(place.cite)
        if place.cite not in sources:
            yield f'{_where(place)} cites "{place.cite}", which is no source'
    yield from (f'an outside check cites "{cite}", which is no source' for cite in sorted(set(checked) - set(sources)))
    yield from (f'sources.yaml: nothing rests on "{cite}"' for cite in sources if cite not in used)


def _rules() -> dict[str, Data]:
    """The base protocol's rules by the names of their files."""
    return {name: shipped.document(name).data for name in shipped.names("base") if name != "base/protocol.yaml"}


def _where(place: Cited) -> str:
    if place.rule is None:
        return f"table {place.table}"
    return f"rule {place.rule}" + (f', limit "{place.limit}",' if place.limit else "")


def _cites(part: Any) -> Iterator[tuple[str, str]]:
    """Every citation inside some data, with what it is cited for where that is said; each source once."""
    found: dict[str, str] = {}

    def search(inside: Any) -> None:
        if isinstance(inside, Mapping):
            if "cite" in inside:
                cite, says = str(inside["cite"]), str(inside.get("says", inside.get("means", "")))
                known = found.setdefault(cite, says)
                if says and says not in known:
                    found[cite] = f"{known}; {says}" if known else says
            for value in inside.values():
                search(value)
        elif isinstance(inside, list):
            for item in inside:
                search(item)

    search(part)
    yield from found.items()
