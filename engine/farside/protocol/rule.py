"""A rule as a record, and how it is judged on values."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any, Final, Literal

from farside.protocol.conditions import NEVER, Condition, Test, Values, parsed
from farside.protocol.wording import placeholders
from farside.quantities.subject import About

Grade = Literal["stop", "revise", "open", "watch", "clear"]
"""What a finding can be, worst first."""

GRADES: Final[tuple[Grade, ...]] = ("stop", "revise", "open", "watch", "clear")
STRENGTHS: Final = ("standard", "consensus", "clinical", "bench", "common-practice", "ours")


@dataclass(frozen=True, slots=True)
class Limit:
    """One named limit: its value, how strongly it is supported, by which sources, and why where by none."""

    name: str
    value: Any
    strength: str
    sources: tuple[Mapping[str, str], ...]
    why: str | None


@dataclass(frozen=True, slots=True)
class Level:
    """One grade of finding, when it holds, and its own words where the rule's do not serve."""

    finding: Grade
    when: Condition
    says: str
    do: str


@dataclass(frozen=True, slots=True)
class Rule:
    """One requirement.

    `reads` names what its conditions and words use. A watch of a `standing` rule is about a card and stands whatever
    the plan. `data` is the file itself, for pages and digest.
    """

    id: str
    title: str
    topic: str
    about: About
    applies: Condition
    limits: Mapping[str, Limit]
    limit_values: Mapping[str, Any]
    open_when: Condition
    levels: tuple[Level, ...]
    reads: tuple[str, ...]
    says: str
    do: str
    caution: str | None
    sources: tuple[str, ...]
    strength: str
    standing: bool
    data: Mapping[str, Any]

    def conditions(self) -> Iterator[Condition]:
        """Every condition of the rule."""
        yield self.applies
        yield self.open_when
        yield from (level.when for level in self.levels)

    def tests(self) -> Iterator[Test]:
        """Every test of the rule."""
        for condition in self.conditions():
            yield from condition.tests()


@dataclass(frozen=True, slots=True)
class Outcome:
    """What a rule gives for one subject: a grade, the level that held, and for `open` the names that are missing."""

    finding: Grade
    level: Level | None
    missing: tuple[str, ...]


def rule_of(data: Mapping[str, Any], topic: str) -> Rule:
    """A rule from its data, which keeps to the schema of rules."""
    limits = {name: _limit(name, entry) for name, entry in data.get("limits", {}).items()}
    cited = [source["cite"] for limit in limits.values() for source in limit.sources]
    cited += [source["cite"] for source in data.get("sources", ())]
    strengths = [limit.strength for limit in limits.values()] or [data.get("strength", "ours")]
    applies = parsed(data.get("applies", "always"))
    open_when = parsed(data["open_when"]) if "open_when" in data else NEVER
    levels = tuple(
        Level(level["finding"], parsed(level["when"]), level.get("says", data["says"]), level.get("do", data["do"]))
        for level in data["levels"]
    )
    tested = (test.name for when in (applies, open_when, *(level.when for level in levels)) for test in when.tests())
    return Rule(
        id=data["id"],
        title=data["title"],
        topic=topic,
        about=data["about"],
        applies=applies,
        limits=limits,
        limit_values={name: limit.value for name, limit in limits.items()},
        open_when=open_when,
        levels=levels,
        reads=tuple(dict.fromkeys([*tested, *placeholders(data["says"])])),
        says=data["says"],
        do=data["do"],
        caution=data.get("caution"),
        sources=tuple(dict.fromkeys(cited)),
        strength=min(strengths, key=STRENGTHS.index),
        standing=data.get("standing", False),
        data=data,
    )


def judged(rule: Rule, values: Values) -> Outcome | None:
    """What a rule gives for some values; None where it does not apply.

    The first level that holds is the finding. Where a missing value could have made a worse one hold, or could decide
    whether the rule applies to what is otherwise a finding, the outcome is `open` and names what is missing.
    """
    limits = rule.limit_values
    applies = rule.applies.judged(values, limits)
    if applies is False:
        return None
    unknown = [] if applies else [rule.applies]
    if rule.open_when.judged(values, limits):
        return Outcome("open", None, ())
    if rule.open_when.judged(values, limits) is None:
        unknown.append(rule.open_when)
    found: Level | None = None
    for level in rule.levels:
        holds = level.when.judged(values, limits)
        if holds:
            found = level
            break
        if holds is None:
            unknown.append(level.when)
    harmless = found is None and unknown == [rule.applies]
    if unknown and not harmless:
        missing = (name for condition in unknown for name in condition.unknowns(values, limits))
        return Outcome("open", None, tuple(dict.fromkeys(missing)))
    return Outcome("clear", None, ()) if found is None else Outcome(found.finding, found, ())


def _limit(name: str, data: Mapping[str, Any]) -> Limit:
    return Limit(name, data["value"], data["strength"], tuple(data.get("sources", ())), data.get("why"))
