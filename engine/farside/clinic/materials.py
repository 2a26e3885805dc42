"""Composite, adhesive and liner cards as records."""

from collections.abc import Mapping
from dataclasses import dataclass
from datetime import date
from typing import Any

from farside.clinic.lamp import Band
from farside.clinic.provenance import Provenance
from farside.physics.light.paste import Paste, absorption_at


@dataclass(frozen=True, slots=True)
class MakerRow:
    """One row of a maker's leaflet: this irradiance for these seconds, for a composite to this thickness."""

    irradiance_mw_cm2: float
    time_s: float
    thickness_mm: float | None
    band: Band
    band_assumed: bool
    provenance: Provenance


@dataclass(frozen=True, slots=True)
class Ambient:
    """Room light that a composite was shown to stand: illuminance [lx] for seconds [s]."""

    illuminance_lx: float
    time_s: float
    provenance: Provenance


@dataclass(frozen=True, slots=True)
class Composite:
    """A light-cured composite as its card has it, its optics resolved to a paste that light can be sent through."""

    id: str
    title: str
    rows: tuple[MakerRow, ...]
    paste: Paste
    optics_provenance: Provenance
    initiators_provenance: Provenance
    resin_provenance: Provenance
    ambient: Ambient | None
    expires: date | None
    fields: Mapping[str, Any]

    def absorption_per_mm(self) -> float:
        """What its paste absorbs in all, at the wavelength that the card's optics are for. [1/mm]"""
        return absorption_at(self.paste, self.paste.at_nm)

    def complete_rows(self) -> tuple[MakerRow, ...]:
        """The maker's rows that say a thickness, and so what the far side needs."""
        return tuple(row for row in self.rows if row.thickness_mm is not None)


@dataclass(frozen=True, slots=True)
class Layer:
    """An adhesive or a liner as its card has it; `cure` is light, self or dual, None where the card is silent."""

    id: str
    title: str
    rows: tuple[MakerRow, ...]
    cure: str | None
    expires: date | None
    fields: Mapping[str, Any]


def chosen_row(rows: tuple[MakerRow, ...], exitance_mw_cm2: float | None) -> MakerRow | None:
    """The row of a leaflet that a lamp is held to.

    Of the rows whose irradiance the lamp reaches, the one that asks for most; where it reaches none, or its output
    is not known, the one that asks for least. Of two with one irradiance it is the one with more seconds.
    """
    reached = [r for r in rows if exitance_mw_cm2 is not None and r.irradiance_mw_cm2 <= exitance_mw_cm2]
    if reached:
        return max(reached, key=lambda row: (row.irradiance_mw_cm2, row.time_s))
    return min(rows, key=lambda row: (row.irradiance_mw_cm2, -row.time_s), default=None)
