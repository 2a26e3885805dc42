"""Conditions as data: parsed once, then judged true, false or unknown."""

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass
from typing import Any, Final, Protocol

Known = bool | None
"""A condition's outcome: None where a missing value could make it either."""


class Values(Protocol):
    """What conditions are judged on: quantities by bare name, fields by dotted path."""

    def get(self, name: str) -> Any:
        """The value of that name, None where it is missing."""


Limits = Mapping[str, Any]


@dataclass(frozen=True, slots=True)
class Operand:
    """What a value is held against: itself, or a limit, a field or a quantity by name."""

    sort: str
    of: Any

    def value(self, values: Values, limits: Limits) -> Any:
        """The value held against; None where it is missing."""
        if self.sort == "limit":
            return limits[self.of]
        return self.of if self.sort == "value" else values.get(self.of)


@dataclass(frozen=True, slots=True)
class Test:
    """One value held against an operand, or against two for `between`."""

    name: str
    how: str
    operands: tuple[Operand, ...]

    def judged(self, values: Values, limits: Limits) -> Known:
        """Whether it holds."""
        value = values.get(self.name)
        if self.how == "given":
            return (value is not None) is self.operands[0].of
        against = [operand.value(values, limits) for operand in self.operands]
        if value is None or None in against:
            return None
        return _HOW[self.how](value, *against)

    def tests(self) -> Iterator["Test"]:
        """Itself."""
        yield self

    def live(self, _values: Values, _limits: Limits) -> Iterator["Test"]:
        """Itself."""
        yield self

    def unknowns(self, values: Values, limits: Limits) -> Iterator[str]:
        """The names whose absence leaves it unknown."""
        if self.judged(values, limits) is None:
            named = (operand.of for operand in self.operands if operand.sort in {"field", "quantity"})
            yield from (name for name in (self.name, *named) if values.get(name) is None)


@dataclass(frozen=True, slots=True)
class Group:
    """Several conditions of which one outcome decides: false where all must hold, true where any may."""

    parts: tuple["Condition", ...]
    decides: bool

    def judged(self, values: Values, limits: Limits) -> Known:
        """Whether it holds."""
        outcomes = [part.judged(values, limits) for part in self.parts]
        if self.decides in outcomes:
            return self.decides
        return None if None in outcomes else not self.decides

    def tests(self) -> Iterator[Test]:
        """The tests of all its parts."""
        for part in self.parts:
            yield from part.tests()

    def live(self, values: Values, limits: Limits) -> Iterator[Test]:
        """The tests that could still decide it: not those beside which something else already fails."""
        outcomes = [part.judged(values, limits) for part in self.parts]
        for index, part in enumerate(self.parts):
            beside = outcomes[:index] + outcomes[index + 1 :]
            if self.decides or False not in beside:
                yield from part.live(values, limits)

    def unknowns(self, values: Values, limits: Limits) -> Iterator[str]:
        """The names whose absence leaves it unknown."""
        if self.judged(values, limits) is None:
            for part in self.parts:
                yield from part.unknowns(values, limits)


@dataclass(frozen=True, slots=True)
class Not:
    """Holds where its part does not."""

    part: "Condition"

    def judged(self, values: Values, limits: Limits) -> Known:
        """Whether it holds."""
        outcome = self.part.judged(values, limits)
        return None if outcome is None else not outcome

    def tests(self) -> Iterator[Test]:
        """The tests of its part."""
        yield from self.part.tests()

    def live(self, values: Values, limits: Limits) -> Iterator[Test]:
        """The tests of its part that could still decide it."""
        yield from self.part.live(values, limits)

    def unknowns(self, values: Values, limits: Limits) -> Iterator[str]:
        """The names whose absence leaves it unknown."""
        yield from self.part.unknowns(values, limits)


Condition = Test | Group | Not

ALWAYS: Final = Group((), decides=False)
NEVER: Final = Group((), decides=True)


def parsed(data: Any) -> Condition:
    """A condition from its data, which keeps to the schema of rules."""
    if data == "always":
        return ALWAYS
    ((key, inner),) = data.items()
    if key == "all":
        return Group(tuple(map(parsed, inner)), decides=False)
    if key == "any":
        return Group(tuple(map(parsed, inner)), decides=True)
    if key == "not":
        return Not(parsed(inner))
    ((how, operand),) = inner.items()
    operands = tuple(map(_operand, operand)) if how == "between" else (_operand(operand),)
    return Test(key, how, operands)


def _operand(data: Any) -> Operand:
    if isinstance(data, Mapping):
        ((sort, name),) = data.items()
        return Operand(sort, name)
    return Operand("value", data)


def _of_numbers(compare: Callable[[float, float], bool]) -> Callable[[Any, Any], Known]:
    """A comparison that is unknown where either side is no number."""

    def judged(value: Any, against: Any) -> Known:
        return compare(value, against) if _is_number(value) and _is_number(against) else None

    return judged


def _is_number(value: Any) -> bool:
    return isinstance(value, int | float) and not isinstance(value, bool)


_HOW: Final[Mapping[str, Callable[..., Known]]] = {
    "at_least": _of_numbers(lambda value, limit: value >= limit),
    "at_most": _of_numbers(lambda value, limit: value <= limit),
    "above": _of_numbers(lambda value, limit: value > limit),
    "below": _of_numbers(lambda value, limit: value < limit),
    "between": lambda value, low, high: low <= value <= high if all(map(_is_number, (value, low, high))) else None,
    "is": lambda value, wanted: value == wanted,
    "one_of": lambda value, wanted: value in wanted,
    "holds_all": lambda value, wanted: set(wanted) <= set(value) if isinstance(value, list | tuple) else None,
}
