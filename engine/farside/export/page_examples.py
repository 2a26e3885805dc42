"""A rule's examples as its page shows them: run through the engine when the page is made."""

from collections.abc import Iterator, Mapping, Sequence
from typing import Any, Final

from farside.export.condition_words import bare_name, value_in_words
from farside.export.markdown import code, plain
from farside.protocol.examples import NOT_APPLIED, Given
from farside.protocol.rule import Outcome, Rule, judged
from farside.protocol.wording import filled, placeholders, shown, with_unit
from farside.quantities.registry import visible

_MARKS: Final = {"stop": "■", "revise": "◆", "open": "◇", "watch": "●", "clear": "○", NOT_APPLIED: "–"}
_NUMBER: Final = "1"


class ExampleFails(ValueError):
    """An example that no longer gives the finding that its file says."""


def example_rows(rule: Rule) -> Iterator[Sequence[str]]:
    """For each example: its name, what is given, the finding that the engine gives, and what it says.

    Raises
    ------
    ExampleFails
        When the engine gives another finding than the file says.
    """
    for example in rule.data["examples"]:
        given = Given(example["given"])
        outcome = judged(rule, given)
        finding = NOT_APPLIED if outcome is None else outcome.finding
        if finding != example["finding"]:
            raise ExampleFails(f'rule {rule.id}: example "{example["name"]}" gives {finding}, not {example["finding"]}')
        yield plain(example["name"]), _given(example["given"]), marked(finding), _says(rule, outcome, given)


def marked(finding: str) -> str:
    """A finding's mark and word."""
    return f"{_MARKS[finding]} {finding.replace('-', ' ')}"


def _given(given: Mapping[str, Any]) -> str:
    parts = [f"{_named(name)}: {value_in_words(value, name)}" for name, value in given.items()]
    return "; ".join(parts) or "nothing"


def _named(name: str) -> str:
    """A quantity by its label, a field as it is written; what the rule reads is linked elsewhere on its page."""
    return code(name) if "." in name else plain(bare_name(name))


def _says(rule: Rule, outcome: Outcome | None, given: Given) -> str:
    if outcome is None or outcome.finding == "clear":
        return ""
    if outcome.missing:
        return f"Missing: {', '.join(map(_named, outcome.missing))}"
    words = rule.says if outcome.level is None else outcome.level.says
    return plain(filled(words, dict(_values(rule, words, given))))


def _values(rule: Rule, words: str, given: Given) -> Iterator[tuple[str, str]]:
    limits = rule.limit_values
    for name in placeholders(words):
        if name == "number":
            yield name, str(given.get("increment_number") or _NUMBER)
        elif name in limits:
            yield name, shown(limits[name])
        elif (value := given.get(name)) is not None:
            against = [limit for limit in limits.values() if isinstance(limit, int | float)]
            yield name, with_unit(value, visible(rule.about).get(name), against)
