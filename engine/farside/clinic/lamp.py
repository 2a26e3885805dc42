"""A lamp card as a record: tip, beam, modes and the log of readings."""

from collections.abc import Mapping
from dataclasses import dataclass
from datetime import date
from typing import Any

from farside.clinic.provenance import Provenance


@dataclass(frozen=True, slots=True)
class Band:
    """One colour of a mode: peak and full width at half maximum [nm], share of the mode's light [-]."""

    peak_nm: float
    width_nm: float
    share: float


@dataclass(frozen=True, slots=True)
class Mode:
    """One setting of a lamp; `times_s` are the seconds that its timer offers, where known."""

    id: str
    bands: tuple[Band, ...]
    times_s: tuple[float, ...]


@dataclass(frozen=True, slots=True)
class Reading:
    """One entry of a lamp's log: what a meter showed through the sleeve fitted that day. [mW/cm²]"""

    on: date
    mode: str
    radiant_exitance_mw_cm2: float
    meter: str
    sleeve: str


@dataclass(frozen=True, slots=True)
class Beam:
    """How narrow the light leaves the tip: the exponent m of cos^m, and where that came from."""

    spread_exponent: float
    provenance: Provenance


@dataclass(frozen=True, slots=True)
class Lamp:
    """A curing light as its card has it; `fields` is the card itself with the schema's defaults, for rules."""

    id: str
    title: str
    tip_diameter_mm: float
    beam: Beam
    stated_exitance_mw_cm2: float | None
    tip_checked_on: date | None
    modes: tuple[Mode, ...]
    readings: tuple[Reading, ...]
    fields: Mapping[str, Any]

    def readings_until(self, on: date, mode: str) -> tuple[Reading, ...]:
        """The readings in one mode up to and with a day, earliest first."""
        return tuple(
            sorted((r for r in self.readings if r.mode == mode and r.on <= on), key=lambda reading: reading.on)
        )
