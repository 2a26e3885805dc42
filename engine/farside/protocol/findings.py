"""Findings: what each rule says of each subject, with what was measured against which limits."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from typing import Any, Final

from farside.protocol.rule import GRADES, Grade, Level, Outcome, Rule, judged
from farside.protocol.wording import filled, of_input, placeholders, said, shown, with_unit
from farside.quantities.quantity import NotHad
from farside.quantities.reach import OUTSIDE
from farside.quantities.values import SubjectValues

Where = Mapping[str, str | int | None]

_SIDES: Final = frozenset({"below", "above", "at_least", "at_most"})


@dataclass(frozen=True, slots=True)
class Against:
    """One limit that a value was held against: its name, and the finding on its wrong side."""

    limit: str
    value: float
    shown: str
    finding: Grade
    side: str


@dataclass(frozen=True, slots=True)
class Measured:
    """The value that a rule turns on, and its limits from the worst finding down."""

    name: str
    value: float
    shown: str
    unit: str
    label: str
    against: tuple[Against, ...]


@dataclass(frozen=True, slots=True)
class Finding:
    """A rule's outcome for one subject, in words and in figures."""

    rule: Rule
    finding: Grade
    where: Where
    where_says: str
    values: Mapping[str, Any]
    missing: tuple[str, ...]
    says: str
    do: str
    measured: Measured | None

    @property
    def standing(self) -> bool:
        """Whether it stands whatever the plan, and so need be said only once."""
        return self.rule.standing and self.finding == "watch"

    def as_data(self) -> dict[str, Any]:
        """The finding as the report's JSON has it."""
        return {
            "rule": self.rule.id,
            "title": self.rule.title,
            "topic": self.rule.topic,
            "finding": self.finding,
            "standing": self.standing,
            "about": self.rule.about,
            "where": dict(self.where),
            "where_says": self.where_says,
            "values": dict(self.values),
            "limits": dict(self.rule.limit_values),
            "measured": None if self.measured is None else _measured_data(self.measured),
            "missing": list(self.missing),
            "says": self.says,
            "do": self.do,
            "sources": list(self.rule.sources),
            "strength": self.rule.strength,
            "caution": self.rule.caution,
            "changed": None,
        }


def finding_of(rule: Rule, values: SubjectValues) -> Finding | None:
    """What a rule says of a subject; None where it does not apply."""
    outcome = judged(rule, values)
    if outcome is None:
        return None
    where = values.subject.where()
    missing = tuple(dict.fromkeys(name for name in outcome.missing for name in _inputs(name, values)))
    says, do = _words(rule, outcome, missing, values)
    return Finding(
        rule=rule,
        finding=outcome.finding,
        where=where,
        where_says=_where_words(rule, where, values),
        values={name: value for name in rule.reads if (value := values.get(name)) is not None},
        missing=missing,
        says=says,
        do=do,
        measured=_measured(rule, outcome, values),
    )


def sorted_findings(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Findings by severity, then by their place in the plan, then by the rule's id."""
    layers = {None: 0, "adhesive": 1, "liner": 2, "increment": 3, "after": 4}

    def place(finding: Finding) -> tuple[int, int, int, int, str]:
        where = finding.where
        return (
            GRADES.index(finding.finding),
            layers[where["layer"]],  # type: ignore[index]
            int(where["increment"] or 0),
            int(where["exposure"] or 0),
            finding.rule.id,
        )

    return tuple(sorted(findings, key=place))


def _where_words(rule: Rule, where: Where, values: SubjectValues) -> str:
    if rule.about == "exposure":
        return said(f"where-{where['layer']}", increment=where["increment"], exposure=where["exposure"])
    if rule.about == "composite" and values.subject.composite is not None:
        return said("where-composite", title=values.subject.composite.title)
    return said(f"where-of-{rule.about}", increment=where["increment"], title=values.subject.trace.plan.lamp.title)


def _inputs(name: str, values: SubjectValues) -> tuple[str, ...]:
    """The inputs for want of which a name has no value; a field is its own input."""
    if values.quantity(name) is None:
        return (name,)
    outcome = values.found(name)
    return (*outcome.missing, *outcome.beyond) or (name,) if isinstance(outcome, NotHad) else ()


def _words(rule: Rule, outcome: Outcome, missing: tuple[str, ...], values: SubjectValues) -> tuple[str, str]:
    if outcome.finding == "clear":
        return rule.title, ""
    if outcome.finding == "open" and missing:
        reasons = [_reason(name) for name in missing]
        remedy = "open-beyond-do" if all(map(_is_beyond, missing)) else "open-missing-do"
        return said("open-missing", missing="; ".join(reasons)), said(remedy)
    level = outcome.level or Level(outcome.finding, rule.open_when, rule.says, rule.do)
    return _filled(level.says, rule, values), _filled(level.do, rule, values)


def _reason(name: str) -> str:
    return said("beyond-reach", input=name) if _is_beyond(name) else said("input-missing", input=of_input(name))


def _is_beyond(name: str) -> bool:
    return OUTSIDE in name


def _filled(words: str, rule: Rule, values: SubjectValues) -> str:
    limits = rule.limit_values
    found: dict[str, str] = {}
    for name in placeholders(words):
        if name == "number":
            where = values.subject.where()
            found[name] = str(where["increment"] or where["exposure"] or "")
        elif name in limits:
            found[name] = shown(limits[name])
        elif (value := values.get(name)) is not None:
            against = [limit for limit in limits.values() if isinstance(limit, int | float)]
            found[name] = with_unit(value, values.quantity(name), against)
    return filled(words, found)


def _measured(rule: Rule, outcome: Outcome, values: SubjectValues) -> Measured | None:
    """The number that a finding turns on, with every limit of the rule that it is held against.

    Of the numbers that the level at hand tests it is the one with the most limits; where no level holds, any level's.
    """
    against = _held_against(rule, values)
    levels = rule.levels if outcome.level is None else (outcome.level,)
    tested = dict.fromkeys(test.name for level in levels for test in level.when.tests() if test.name in against)
    numbers = [name for name in tested if _is_number(values.get(name)) and values.quantity(name) is not None]
    name = max(numbers, key=lambda name: len(against[name]), default=None)
    quantity = None if name is None else values.quantity(name)
    if name is None or quantity is None:
        return None
    limits = against[name]
    return Measured(
        name=name,
        value=float(values.get(name)),
        shown=shown(values.get(name), quantity.unit, [value for value, _, _ in limits.values()], quantity.digits),
        unit=quantity.unit,
        label=quantity.label,
        against=tuple(
            Against(limit, value, shown(value, quantity.unit), finding, side)
            for limit, (value, finding, side) in limits.items()
        ),
    )


def _held_against(rule: Rule, values: SubjectValues) -> dict[str, dict[str, tuple[float, Grade, str]]]:
    """By quantity, the limits that it is held against, each with its value, finding and side, worst first."""
    found: dict[str, dict[str, tuple[float, Grade, str]]] = {}
    for level in rule.levels:
        for test in level.when.live(values, rule.limit_values):
            operand = test.operands[0]
            if test.how in _SIDES and operand.sort == "limit" and _is_number(rule.limits[operand.of].value):
                entry = (float(rule.limits[operand.of].value), level.finding, test.how)
                found.setdefault(test.name, {}).setdefault(operand.of, entry)
    return found


def _is_number(value: Any) -> bool:
    return isinstance(value, int | float) and not isinstance(value, bool)


def _measured_data(measured: Measured) -> dict[str, Any]:
    return {
        "name": measured.name,
        "value": measured.value,
        "shown": measured.shown,
        "unit": measured.unit,
        "label": measured.label,
        "against": [
            {"limit": a.limit, "value": a.value, "shown": a.shown, "finding": a.finding, "side": a.side}
            for a in measured.against
        ],
    }
