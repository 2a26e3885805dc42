"""A page for each rule, and the page that lists them: requirement, limits and sources, examples run, what it reads."""

from collections.abc import Iterator, Mapping, Sequence
from itertools import groupby
from typing import Any, Final

from farside.export.compared import NOTHING, Compared, Outside, by_row, by_topic, topic_name
from farside.export.condition_words import bare_name, in_words, unit_of, value_in_words
from farside.export.markdown import bullets, code, link, page, plain, table, under
from farside.export.page_examples import example_rows, marked
from farside.export.page_inputs import inputs
from farside.export.references import doi_link, reference, short
from farside.protocol.protocol import base_protocol
from farside.protocol.rule import Rule

NO_SOURCE: Final = "common practice, no source"
_STRENGTHS: Final = {
    "standard": "A standard, such as ISO's.",
    "consensus": "What a body or a review recommends.",
    "clinical": "What was seen in people's mouths.",
    "bench": "What was measured in a laboratory.",
    "common practice": "The maker's word, or what is usually done; no study is cited.",
    "ours": "Nobody else: it was chosen here, and the reason is given.",
}
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


def rule_pages(outside: Outside = NOTHING) -> Iterator[tuple[str, str]]:
    """The path of each page below the site's pages, and its Markdown, with the outside checks as they came out."""
    rules = base_protocol().rules
    yield "rules/index.md", _index(rules)
    for rule in rules:
        yield f"rules/{rule.id}.md", rule_page(rule, outside)


def rule_page(rule: Rule, outside: Outside = NOTHING) -> str:
    """One rule's page.

    Raises
    ------
    ExampleFails
        When an example does not give the finding that it says.
    """
    data = rule.data
    limits: Mapping[str, Any] = data.get("limits", {})
    return page(
        rule.title,
        _first_line(rule),
        f"Rule {code(rule.id)} · {_TOPICS[rule.topic]} · judged once for each {rule.about} · "
        f"{link('strength', 'index.md#what-strengths-mean')}: {_strength(rule.strength, bool(rule.sources))}",
        f"> **Caution.** {plain(rule.caution)}" if rule.caution else None,
        under("Requirement", _levels(data, limits)),
        under("Why", plain(data["why"])),
        under("What it says", f"“{_template(data['says'])}”", f"What to do: {_template(data['do'])}"),
        under("Limits", table(("Limit", "Value", "Strength", "Rests on"), _limit_rows(data)) if limits else None),
        under(
            "Examples",
            "Run through the engine when this page was made. Each is also a test of the rule.",
            table(("Case", "Given", "Finding", "Says"), example_rows(rule)),
        ),
        under("What it reads", inputs(rule)),
        under("Outside checks", _bearing([check for check in outside.checks if rule.id in check.rules])),
        under("History", _history(data)),
        under("Sources", _sources(rule)),
    )


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
        rests = [_cited(each["cite"], each["supports"]) for each in sources]
        rests += [plain(limit["why"])] if "why" in limit else []
        value = value_in_words(limit["value"], _held_against(name, data))
        yield f"*{plain(name)}*", value, _strength(limit["strength"], bool(sources)), "<br>".join(rests)


def _cited(cite: str, supports: str) -> str:
    """A citation in a table: who, with the way to it on this page, what it supports, and its DOI."""
    doi = doi_link(cite)
    return f"{link(plain(short(cite)), '#' + cite)}: {plain(supports)}" + (f" ({doi})" if doi else "")


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

    conditions = [*(level["when"] for level in data["levels"]), data.get("applies"), data.get("open_when")]
    return next((name for name in search(conditions, "") if unit_of(name)), "")


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
    return "".join(f"*{plain(bare_name(part[1:-1]))}*" if part[:1] == "{" else plain(part) for part in parts)


def _bearing(checks: Sequence[Compared]) -> str:
    """The outside checks that a rule depends on, by topic, misses in full."""
    if not checks:
        return "None is tied to this rule."
    lines = []
    for topic, group in by_topic(checks).items():
        counted = [check for check in group if check.counted]
        missed = [check for check in counted if check.missed]
        said = (
            f"{len(counted) - len(missed)} of {len(counted)} within their band" if counted else "none that is counted"
        )
        lines.append(f"{link(plain(topic_name(topic)), f'../trust.md#{topic}')}: {said}.")
        lines += [f"**Missed**: {_missed(checks)}" for checks in by_row(missed).values()]
    return bullets(lines)


def _missed(checks: Sequence[Compared]) -> str:
    """One check, or how many of a row, with what is known of why."""
    head = checks[0].says if len(checks) == 1 else f"{len(checks)} points of: {checks[0].row_says}"
    return f"{plain(head)}. {plain(checks[0].note)}".strip()


def _history(data: Mapping[str, Any]) -> str | None:
    changes = data.get("history", ())
    return bullets(f"Edition {plain(each['edition'])}: {plain(each['says'])}" for each in changes) if changes else None


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
        "its limits with their sources, the examples that are its tests, what it reads and the outside checks that "
        "bear on it."
    )
    strengths = table(("Strength", "What a limit of it rests on"), _STRENGTHS.items())
    return page("Rules", intro, *parts, under("What strengths mean", strengths))
