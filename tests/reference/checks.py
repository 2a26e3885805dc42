"""What an outside check is: a published or independent value, what the model makes of it, and the band allowed."""

from collections.abc import Callable
from dataclasses import dataclass
from typing import Literal


@dataclass(frozen=True, slots=True)
class Check:
    """One value from outside, beside the model's own.

    id : unique, kebab-case.
    source : key of the source, as in the project's sources, or the independent program that gave the value.
    says : what the source says, in words.
    published : the source's value, or a function where another library works it out.
    unit : of both values; empty for a pure number.
    band : how far the model may be off.
    computed : the model's value.
    sets : names of the parameters that this source set; a check with any is shown as "set by", and not counted.
    band_is : whether the band is a share of the published value or in its unit.
    how_sure : seen in print, computed by an independent program, recalled, or so loose that it only shows the order.
    """

    id: str
    source: str
    says: str
    published: float | Callable[[], float]
    unit: str
    band: float
    computed: Callable[[], float]
    sets: tuple[str, ...] = ()
    band_is: Literal["relative", "absolute"] = "relative"
    how_sure: Literal["seen", "computed", "from memory", "plausibility"] = "computed"

    def expected(self) -> float:
        """The source's value, worked out where it is a function."""
        return self.published() if callable(self.published) else self.published

    def allowed(self) -> float:
        """How far the model may be off, in the value's own unit."""
        return self.band * abs(self.expected()) if self.band_is == "relative" else self.band
