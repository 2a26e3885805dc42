"""A plan as a record, its cards found: cavity, tip, adhesive, increments and exposures in placing order."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from datetime import date
from typing import Any

from farside.clinic.lamp import Lamp, Mode
from farside.clinic.materials import Composite, Layer


@dataclass(frozen=True, slots=True)
class Exposure:
    """One time the lamp is on, at one aim.

    `tip_distance_mm` is None where it follows from the cavity; `through_share` is the share that passes all that lies
    before the increment, 1 with nothing there and None where one of these is not known.
    """

    time_s: float
    tilt_deg: float
    aim_offset_mm: float
    from_side: bool
    tip_distance_mm: float | None
    through_share: float | None
    rest_before_s: float | None
    fields: Mapping[str, Any]


@dataclass(frozen=True, slots=True)
class Increment:
    """One portion of composite, placed and exposed before the next."""

    composite: Composite
    thickness_mm: float
    placing_s: float | None
    dispensed_s: float | None
    exposures: tuple[Exposure, ...]
    fields: Mapping[str, Any]


@dataclass(frozen=True, slots=True)
class LayerUse:
    """An adhesive or a liner on the cavity floor, with exposures of its own."""

    layer: Layer
    exposures: tuple[Exposure, ...]


@dataclass(frozen=True, slots=True)
class RoomSource:
    """One light of the room on the paste: what it is, how bright there [lx], behind which filter."""

    what: str
    illuminance_lx: float
    filter: str


@dataclass(frozen=True, slots=True)
class Plan:
    """One proposed restoration with the cards it names.

    `adhesive` and `liner` are None where the plan has none; whether it said so stands in `fields`, which is the plan
    as written with the clinic's usual values and the schema's defaults.
    """

    title: str
    on: date
    lamp: Lamp
    mode: Mode
    sleeve: str
    depth_mm: float
    width_mm: float
    remaining_dentine_mm: float | None
    gap_mm: float
    adhesive: LayerUse | None
    liner: LayerUse | None
    room: tuple[RoomSource, ...] | None
    increments: tuple[Increment, ...]
    after: tuple[Exposure, ...]
    fields: Mapping[str, Any]

    def composites(self) -> tuple[Composite, ...]:
        """The composites of the plan, each once, in placing order."""
        return tuple({increment.composite.id: increment.composite for increment in self.increments}.values())

    def distance_after_mm(self, index: int) -> float:
        """Tip to the top of increment `index` once it is placed; -1 is the bare cavity floor. [mm]"""
        filled_mm = sum(increment.thickness_mm for increment in self.increments[: index + 1])
        return max(0.0, self.gap_mm + self.depth_mm - filled_mm)

    def exposures(self) -> Iterator[Exposure]:
        """All exposures in the order of the chair: adhesive, liner, increments, once the matrix is off."""
        for use in (self.adhesive, self.liner):
            if use is not None:
                yield from use.exposures
        for increment in self.increments:
            yield from increment.exposures
        yield from self.after
