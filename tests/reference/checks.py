"""What an outside check is: a published or independent value, what the model makes of it, and the band allowed."""

from collections.abc import Callable
from dataclasses import dataclass
from functools import cache
from typing import Final, Literal, NamedTuple

Topic = Literal["beam", "transport", "paste", "tooth", "room", "eyes", "arithmetic"]
Kind = Literal["counted", "set-by", "plausibility", "miss"]

TOPICS: Final[tuple[Topic, ...]] = ("beam", "transport", "paste", "tooth", "room", "eyes", "arithmetic")
KINDS: Final[dict[Kind, str]] = {
    "counted": "Nothing in the model was set by it, so it counts as a check.",
    "set-by": "The source set what the model uses here: shown, not counted.",
    "plausibility": "So loose, or so much had to be taken as known, that it shows the order of size only.",
    "miss": "The model lies outside what was found, by about as much as stated.",
}


class Point(NamedTuple):
    """Where a check stands in a figure: the figure's id, the series that it belongs to, its place along the x axis."""

    figure: str
    series: str
    x: float


class Result(NamedTuple):
    """What a check came to, all in its unit. A single published value has low and high alike."""

    computed: float
    low: float
    high: float
    allowed: float

    @property
    def difference(self) -> float:
        """Computed less published; from the nearer end of a published range, 0 inside it."""
        return self.computed - min(max(self.computed, self.low), self.high)

    @property
    def within(self) -> bool:
        """Whether the difference is allowed."""
        return abs(self.difference) <= self.allowed

    @property
    def strain(self) -> float:
        """Share of what is allowed that the difference takes up."""
        if self.difference == 0.0:
            return 0.0
        return abs(self.difference) / self.allowed if self.allowed else float("inf")


@dataclass(frozen=True, slots=True)
class Check:
    """One value from outside, beside the model's own.

    id : unique, kebab-case.
    topic : the part of the model that it looks at.
    source : key of the source in `rules/sources.yaml`, or the independent program that gave the value.
    says : what the source says, in words.
    published : the source's value, its range, or a function where another library works it out.
    unit : of all values; empty for a pure number.
    band : how far the model may be off; 0 where a range is published.
    computed : the model's value.
    kind : see `KINDS`.
    sets : names of the parameters that this source set; just those of the kind "set-by" have any.
    misses_by : how far off a miss is, in its unit, as last looked at; just misses have one.
    note : what had to be taken as known, or why it misses and on which side.
    rules : ids of the rules whose finding moves with this value.
    band_is : whether the band is a share of the published value or in its unit.
    how_sure : the published value was seen in print, computed by an independent program, or recalled.
    group : id of the many that are shown as one row; empty for a row of its own.
    point : its place in a figure, if it has one.
    """

    id: str
    topic: Topic
    source: str
    says: str
    published: float | tuple[float, float] | Callable[[], float]
    unit: str
    band: float
    computed: Callable[[], float]
    kind: Kind = "counted"
    sets: tuple[str, ...] = ()
    misses_by: float | None = None
    note: str = ""
    rules: tuple[str, ...] = ()
    band_is: Literal["relative", "absolute"] = "relative"
    how_sure: Literal["seen", "computed", "from memory"] = "computed"
    group: str = ""
    point: Point | None = None

    def result(self) -> Result:
        """Both sides, worked out once."""
        return _result(self)


@cache
def _result(check: Check) -> Result:
    published = check.published() if callable(check.published) else check.published
    low, high = published if isinstance(published, tuple) else (published, published)
    allowed = check.band * (abs(low) if check.band_is == "relative" else 1.0)
    return Result(check.computed(), low, high, allowed)


@dataclass(frozen=True, slots=True)
class Group:
    """Many checks of one kind that are shown as one row: what they have in common, in words."""

    id: str
    says: str


@dataclass(frozen=True, slots=True)
class Row:
    """A row of a table of checks: one check, or a group of which the worst speaks."""

    id: str
    says: str
    checks: tuple[Check, ...]

    def worst(self) -> Check:
        """The check whose difference takes up most of what is allowed."""
        return max(self.checks, key=lambda check: check.result().strain)


@dataclass(frozen=True, slots=True)
class Figure:
    """A plot of computed against published: what its axes say, and which of them are logarithmic."""

    id: str
    title: str
    x_says: str
    y_says: str
    log_x: bool = False
    log_y: bool = False
