"""The chair clock: what happens when, from the adhesive's exposure to the last one."""

from bisect import bisect_right
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import accumulate
from typing import Final, Literal

from farside.clinic.plan import Exposure, LayerUse, Plan

What = Literal["place", "rest", "expose"]
Layer = Literal["adhesive", "liner", "increment", "after"]

WINDOW_S: Final = 60.0


@dataclass(frozen=True, slots=True)
class Spell:
    """One stretch of the chair clock; `index` counts increments from 0, `number` the exposures of a layer from 1."""

    layer: Layer
    index: int | None
    number: int | None
    what: What
    start_s: float
    length_s: float

    @property
    def end_s(self) -> float:
        """When it is over. [s]"""
        return self.start_s + self.length_s


def chair_clock(plan: Plan) -> tuple[Spell, ...]:
    """The spells of a plan in order; a placing or a rest whose length is not known takes no time."""
    spells: list[Spell] = []
    now_s = 0.0
    for layer, index, number, what, length_s in _sequence(plan):
        if length_s > 0.0:
            spells.append(Spell(layer, index, number, what, now_s, length_s))
            now_s += length_s
    return tuple(spells)


def largest_in_window(spells: Sequence[tuple[float, float, float]], window_s: float = WINDOW_S) -> float:
    """The largest sum that some spells give within a window of time.

    Parameters
    ----------
    spells : sequence of (float, float, float)
        Start [s], length [s] and rate of each, one after the other.
    window_s : float
        Length of the window. [s]

    Returns
    -------
    float
        Rate times seconds, in the rate's unit times seconds.
    """
    starts = [start for start, _, _ in spells]
    before = [0.0, *accumulate(length * rate for _, length, rate in spells)]

    def until(moment_s: float) -> float:
        """The sum from the beginning to a moment."""
        index = bisect_right(starts, moment_s) - 1
        if index < 0:
            return 0.0
        start, length, rate = spells[index]
        return before[index] + rate * min(length, moment_s - start)

    # The sum is largest for some window that begins with a spell or ends with one.
    ends = (start + length for start, length, _ in spells)
    begins = (*starts, *(end - window_s for end in ends))
    return max((until(begin + window_s) - until(begin) for begin in begins), default=0.0)


def _sequence(plan: Plan) -> Iterator[tuple[Layer, int | None, int | None, What, float]]:
    layers: tuple[tuple[Layer, LayerUse | None], ...] = (("adhesive", plan.adhesive), ("liner", plan.liner))
    for layer, use in layers:
        if use is not None:
            yield from _exposed(layer, None, use.exposures)
    for index, increment in enumerate(plan.increments):
        yield "increment", index, None, "place", increment.placing_s or 0.0
        yield from _exposed("increment", index, increment.exposures)
    yield from _exposed("after", None, plan.after)


def _exposed(
    layer: Layer, index: int | None, exposures: tuple[Exposure, ...]
) -> Iterator[tuple[Layer, int | None, int | None, What, float]]:
    for number, exposure in enumerate(exposures, start=1):
        yield layer, index, number, "rest", exposure.rest_before_s or 0.0
        yield layer, index, number, "expose", exposure.time_s
