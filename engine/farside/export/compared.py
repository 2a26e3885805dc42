"""An outside check as it came out: the figure from outside, its band, and what the model makes of it."""

from collections.abc import Iterable
from dataclasses import dataclass
from typing import Final

TOPICS: Final = {
    "beam": "What arrives from the tip",
    "transport": "How a scattering layer passes light",
    "paste": "Composite",
    "tooth": "Tooth",
    "room": "Room light",
    "eyes": "Eyes",
    "arithmetic": "Sums over bands, edges and photons",
}

NOT_COUNTED: Final = ("set-by", "plausibility")
"""Kinds of checks that prove nothing: their source set a parameter, or they are too loose."""


@dataclass(frozen=True, slots=True)
class Compared:
    """One outside check, both sides worked out.

    id, topic, source, says, unit, band, relative, kind, sets, note, rules, how_sure : as the check has them.
    low, high : the ends of what was published, alike where it is one figure.
    computed : the model's figure.
    allowed : how far the model may be off, in the unit.
    row, row_says : the many that it is shown with as one row, and what they have in common; its own if it stands alone.
    figure, series, x : its place in a figure; an empty figure for none.
    """

    id: str
    topic: str
    source: str
    says: str
    unit: str
    low: float
    high: float
    computed: float
    allowed: float
    band: float
    relative: bool
    kind: str
    how_sure: str
    row: str
    row_says: str
    sets: tuple[str, ...] = ()
    note: str = ""
    rules: tuple[str, ...] = ()
    figure: str = ""
    series: str = ""
    x: float = 0.0

    @property
    def published(self) -> float:
        """The published figure, the middle of a range."""
        return (self.low + self.high) / 2.0

    @property
    def difference(self) -> float:
        """Computed less published, from the nearer end of a range; 0 inside it."""
        return self.computed - min(max(self.computed, self.low), self.high)

    @property
    def share_of_band(self) -> float:
        """The difference over what is allowed: from -1 to 1 within the band."""
        if self.difference == 0.0:
            return 0.0
        return self.difference / self.allowed if self.allowed else self.difference * float("inf")

    @property
    def within(self) -> bool:
        """Whether the model's figure lies in the band."""
        return abs(self.difference) <= self.allowed

    @property
    def counted(self) -> bool:
        """Whether it counts as a check."""
        return self.kind not in NOT_COUNTED

    @property
    def missed(self) -> bool:
        """Whether the model's figure lies outside the band, whatever was expected of it."""
        return not self.within and self.kind != "set-by"


@dataclass(frozen=True, slots=True)
class Drawn:
    """A figure in which checks stand: what its axes say, and which of them are logarithmic."""

    id: str
    title: str
    x_says: str
    y_says: str
    log_x: bool = False
    log_y: bool = False


@dataclass(frozen=True, slots=True)
class Outside:
    """All outside checks as they came out, and the figures that they are drawn in."""

    checks: tuple[Compared, ...] = ()
    figures: tuple[Drawn, ...] = ()


NOTHING: Final = Outside()


def by_topic(checks: Iterable[Compared]) -> dict[str, list[Compared]]:
    """Checks by their topic, in the order in which topics first come."""
    found: dict[str, list[Compared]] = {}
    for check in checks:
        found.setdefault(check.topic, []).append(check)
    return found


def by_row(checks: Iterable[Compared]) -> dict[str, list[Compared]]:
    """Checks by the row that they are shown in, in the order in which rows first come."""
    found: dict[str, list[Compared]] = {}
    for check in checks:
        found.setdefault(check.row, []).append(check)
    return found


def topic_name(topic: str) -> str:
    """A topic as its heading has it."""
    return TOPICS.get(topic, topic.replace("-", " ").capitalize())
