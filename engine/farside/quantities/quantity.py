"""A quantity: one entry of the registry, and how its value is taken from a subject."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Final

from farside.clinic.provenance import Provenance, worst
from farside.quantities.inputs import origin
from farside.quantities.reach import Reach, beyond
from farside.quantities.subject import About, Subject

Value = float | str | bool

_DIGITS: Final = 6
_MODEL_DIGITS: Final = 2
_ENTERED_DIGITS: Final = 3
_UNIT_WORDS: Final[Mapping[str, list[str]]] = {
    "mm": ["mm"], "s": ["s"], "days": ["days"], "lx": ["lx"], "°": ["deg"], "°C": ["c"],
    "mW/cm²": ["mw", "cm2"], "J/cm²": ["j", "cm2"],
}  # fmt: skip


@dataclass(frozen=True, slots=True)
class Quantity:
    """What a rule can speak of.

    `reads` names the inputs whose provenance it carries; `reach` the inputs' ranges over which it was checked, None
    where it is arithmetic on what was entered. `value` gives None where it cannot be had.
    """

    name: str
    about: About
    unit: str
    means: str
    value: Callable[[Subject], Value | None]
    reads: tuple[str, ...] = ()
    reach: Reach | None = None
    formula: str = ""

    @property
    def digits(self) -> int:
        """To how many digits it is shown: what the model computes is not known to more than two."""
        return _MODEL_DIGITS if self.reach is not None else _ENTERED_DIGITS

    @property
    def label(self) -> str:
        """The name as words show it, without its unit."""
        words = self.name.split("_")
        unit = self.unit_words()
        kept = words[: len(words) - len(unit)] if unit and words[-len(unit) :] == unit else words
        return " ".join(kept)

    def unit_words(self) -> list[str]:
        """The words that the unit adds to the name."""
        return _UNIT_WORDS.get(self.unit, [])


@dataclass(frozen=True, slots=True)
class Found:
    """A quantity's value for one subject: rounded once, with the worst origin of what it read."""

    value: Value
    provenance: Provenance
    assumed: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class NotHad:
    """A quantity that cannot be had: the inputs that are missing, and those that lie beyond its reach."""

    missing: tuple[str, ...]
    beyond: tuple[str, ...]


def entered(path: str) -> Callable[[Subject], Value | None]:
    """A reader of a number as it was entered, by its field's dotted path."""

    def value(subject: Subject) -> Value | None:
        number = subject.field(path)
        return None if number is None else float(number)

    return value


def found(quantity: Quantity, subject: Subject) -> Found | NotHad:
    """A quantity's value for a subject of its own sort."""
    outside = () if quantity.reach is None else beyond(quantity.reach, subject)
    value = None if outside else quantity.value(subject)
    origins = {name: origin(name, subject) for name in quantity.reads}
    if value is None:
        return NotHad(tuple(name for name, known in origins.items() if known is None), outside)
    known = {name: source for name, source in origins.items() if source is not None}
    assumed = tuple(name for name, source in known.items() if source == "assumed")
    return Found(rounded(value), worst(known.values()), assumed)


def rounded(value: Value) -> Value:
    """A number at 6 significant digits: the one value that rules, report and text all use."""
    return float(f"{value:.{_DIGITS}g}") if isinstance(value, float) else value
