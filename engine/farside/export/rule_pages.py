"""A page for each rule, and the page that lists them: requirement, limits and sources, levels in words, examples."""

from collections.abc import Iterator, Mapping, Sequence
from itertools import groupby
from typing import Any, Final

from farside import shipped
from farside.export.condition_words import in_words, name_in_words, unit_of, value_in_words
from farside.export.markdown import bullets, code, link, page, plain, table, under
from farside.protocol.protocol import base_protocol
from farside.protocol.rule import Rule

NO_SOURCE: Final = "common practice, no source"
_MARKS: Final = {"stop": "■", "revise": "◆", "open": "◇", "watch": "●", "clear": "○", "not-applied": "–"}
_TOPICS: Final = {
    "light-dose": "Light dose",
    "spectrum": "Spectrum",
    "increment": "Increment",
    "heat": "Heat",
    "room-light": "Room light",
    "lamp-care": "Lamp care",
    "eyes": "Eyes",
    "plan": "Plan",
}


def rule_pages() -> Iterator[tuple[str, str]]:
    """The path of each page below the site's pages, and its Markdown."""
    rules = base_protocol().rules
    yield "rules/index.md", _index(rules)
    for rule in rules:
        yield f"rules/{rule.id}.md", rule_page(rule)


def rule_page(rule: Rule) -> str:
    """One rule's page."""
    data = rule.data
    limits: Mapping[str, Any] = data.get("limits", {})
    return page(
        rule.title,
        _first_line(rule),
        f"Rule {code(rule.id)}, judged once for each {rule.about}. Topic: {_TOPICS[rule.topic]}. "
        f"Strength: {_strength(rule.strength, bool(rule.sources))}.",
        f"> **Caution.** {plain(rule.caution)}" if rule.caution else None,
        under("Why", plain(data["why"])),
        under("Limits", table(("Limit", "Value", "Strength", "Rests on"), _limit_rows(data)) if limits else None),
        under("Findings", _levels(data, limits)),
        under("What it says", f"“{_template(data['says'])}”", f"What to do: {_template(data['do'])}"),
        under("Examples", "Each is also a test of the rule.", table(("Case", "Given", "Finding"), _examples(data))),
        under("Sources", _sources(rule)),
    )


def cited_rules() -> dict[str, list[str]]:
    """For each source, the ids of the rules that cite it."""
    found: dict[str, list[str]] = {}
    for rule in base_protocol().rules:
        for cite in dict.fromkeys(rule.sources):
            found.setdefault(cite, []).append(rule.id)
    return found


def reference(cite: str) -> str:
    """A source on one line: authors, year, what it is about, where, with its DOI."""
    source = shipped.sources()[cite]
    said = ", ".join(plain(source[key]) for key in ("authors", "year") if key in source)
    where = ". ".join(plain(source[key]) for key in ("journal", "number") if key in source)
    doi = source.get("doi")
    parts = [said, plain(source["title"]), where, link(f"doi:{plain(doi)}", f"https://doi.org/{doi}") if doi else ""]
    return ". ".join(part for part in parts if part) + "."


def marked(finding: str) -> str:
    """A finding's mark and word."""
    return f"{_MARKS[finding]} {finding.replace('-', ' ')}"


def _first_line(rule: Rule) -> str | None:
    """What limits have no source but common practice, where there are any."""
    bare = [name for name, limit in rule.limits.items() if limit.strength == "common-practice" and not limit.sources]
    if not rule.limits and rule.strength == "common-practice" and not rule.sources:
        return f"**{NO_SOURCE.capitalize()}.**"
    if not bare:
        return None
    if len(bare) == len(rule.limits):
        return f"**{NO_SOURCE.capitalize()}.**"
    return f"**{NO_SOURCE.capitalize()}**, for {', '.join(f'*{plain(name)}*' for name in bare)}."


def _strength(strength: str, sourced: bool) -> str:
    if strength == "common-practice":
        return "common practice" if sourced else NO_SOURCE
    return "ours, not from a source" if strength == "ours" else strength


def _limit_rows(data: Mapping[str, Any]) -> Iterator[Sequence[str]]:
    for name, limit in data["limits"].items():
        sources = limit.get("sources", ())
        rests = [f"{link(plain(each['cite']), '#' + each['cite'])}: {plain(each['supports'])}" for each in sources]
        rests += [plain(limit["why"])] if "why" in limit else []
        value = value_in_words(limit["value"], _held_against(name, data))
        yield f"*{plain(name)}*", value, _strength(limit["strength"], bool(sources)), "; ".join(rests)


def _held_against(limit: str, data: Mapping[str, Any]) -> str:
    """The name of a quantity with a unit that a limit is held against; empty where there is none."""

    def search(part: Any, name: str) -> Iterator[str]:
        if isinstance(part, Mapping):
            if part.get("limit") == limit:
                yield name
            for key, inside in part.items():
                named = key in {"all", "any", "not"} or key.startswith(("at_", "above", "below", "is", "between"))
                yield from search(inside, name if named else key)
        elif isinstance(part, list):
            for item in part:
                yield from search(item, name)

    return next((name for name in search([level["when"] for level in data["levels"]], "") if unit_of(name)), "")


def _levels(data: Mapping[str, Any], limits: Mapping[str, Any]) -> str:
    lines = [f"Applies where {in_words(data['applies'], limits)}."] if "applies" in data else []
    lines += [f"**{marked('open')}** where {in_words(data['open_when'], limits)}."] if "open_when" in data else []
    for level in data["levels"]:
        own = f" It says: “{_template(level['says'])}”" if "says" in level else ""
        lines.append(f"**{marked(level['finding'])}** where {in_words(level['when'], limits)}.{own}")
    lines.append(
        f"**{marked('clear')}** otherwise; **{marked('open')}** where what is missing could change the answer."
    )
    return bullets(lines)


def _template(words: str) -> str:
    """A sentence whose placeholders are shown as names."""
    parts = words.replace("{", "\0{").replace("}", "}\0").split("\0")
    return "".join(f"*{plain(part[1:-1].replace('_', ' '))}*" if part[:1] == "{" else plain(part) for part in parts)


def _examples(data: Mapping[str, Any]) -> Iterator[Sequence[str]]:
    for example in data["examples"]:
        given = [f"{name_in_words(name)}: {value_in_words(value, name)}" for name, value in example["given"].items()]
        yield plain(example["name"]), "; ".join(given) or "nothing", marked(example["finding"])


def _sources(rule: Rule) -> str:
    cites = list(dict.fromkeys(rule.sources))
    if not cites:
        return "None."
    return "\n\n".join(f"{reference(cite)} {link('More', f'../sources.md#{cite}')}\n{{: #{cite} }}" for cite in cites)


def _index(rules: Sequence[Rule]) -> str:
    order = list(_TOPICS)
    ranked = sorted(rules, key=lambda rule: (order.index(rule.topic), rule.title))
    parts = [
        under(
            _TOPICS[topic], bullets(f"{link(plain(each.title), f'{each.id}.md')} ({code(each.id)})" for each in group)
        )
        for topic, group in groupby(ranked, key=lambda rule: rule.topic)
    ]
    named = base_protocol().named()
    intro = (
        f"{len(rules)} rules of the base protocol, edition {plain(named['edition'])}. Each page gives the requirement, "
        "its limits with their sources, its findings in words and the examples that are its tests."
    )
    return page("Rules", intro, *parts)
