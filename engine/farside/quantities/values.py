"""The values that rules are judged on: a subject's quantities and fields, each worked out once a plan."""

from collections.abc import Mapping
from typing import Any

from farside.quantities.quantity import Found, NotHad, Quantity, found
from farside.quantities.registry import QUANTITIES, visible
from farside.quantities.subject import Subject
from farside.trace.light import LightTrace

_Key = tuple[object, ...]


class Valued:
    """Every quantity of a trace, worked out when first asked for."""

    def __init__(self, trace: LightTrace) -> None:
        self.trace = trace
        self._held: dict[_Key, dict[str, Found | NotHad]] = {}

    def of(self, subject: Subject) -> "SubjectValues":
        """What rules about a subject are judged on."""
        return SubjectValues(subject, self)

    def own(self, subject: Subject) -> Mapping[str, Found]:
        """All quantities of a subject's own sort that can be had, by name, in the registry's order."""
        names = (quantity.name for quantity in QUANTITIES if quantity.about == subject.about)
        outcomes = ((name, self.found(visible(subject.about)[name], subject)) for name in names)
        return {name: outcome for name, outcome in outcomes if isinstance(outcome, Found)}

    def found(self, quantity: Quantity, subject: Subject) -> Found | NotHad:
        """One quantity of a subject of its own sort."""
        light = subject.light
        key: _Key = (
            subject.about,
            subject.index,
            subject.composite and subject.composite.id,
            light and (light.layer, light.number),
        )
        held = self._held.setdefault(key, {})
        if quantity.name not in held:
            held[quantity.name] = found(quantity, subject)
        return held[quantity.name]


class SubjectValues:
    """The quantities of a subject and of what encloses it by bare name, and fields by dotted path."""

    def __init__(self, subject: Subject, valued: Valued) -> None:
        self.subject = subject
        self._valued = valued
        self._held: dict[str, Any] = {}

    def get(self, name: str) -> Any:
        """The value of that name; None where it is missing."""
        if name not in self._held:
            self._held[name] = self._taken(name)
        return self._held[name]

    def quantity(self, name: str) -> Quantity | None:
        """The quantity of that name which this subject sees; None for a field."""
        return visible(self.subject.about).get(name)

    def found(self, name: str) -> Found | NotHad:
        """How the quantity of that name came out.

        Raises
        ------
        KeyError
            When the name is no quantity.
        """
        quantity = visible(self.subject.about)[name]
        owner = self.subject.enclosing(quantity.about)
        return NotHad((), ()) if owner is None else self._valued.found(quantity, owner)

    def _taken(self, name: str) -> Any:
        if self.quantity(name) is None:
            return self.subject.field(name)
        outcome = self.found(name)
        return outcome.value if isinstance(outcome, Found) else None
