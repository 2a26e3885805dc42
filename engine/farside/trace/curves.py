"""Dose by depth in a composite under one light: made once for each pair, then kept."""

import math
import sys
from collections.abc import Iterable
from dataclasses import dataclass
from functools import lru_cache
from typing import Final

from farside.clinic.lamp import Band
from farside.clinic.optics import known_initiators
from farside.physics.light.bands import band_nodes, nodes_needed
from farside.physics.light.edge import smoothing_length_mm
from farside.physics.light.initiators import dose_weight
from farside.physics.light.paste import Paste, absorption_at, scattering_at
from farside.physics.light.transport import half_space_fluence, slab

STEP_MM: Final = 0.05
DEEPEST_MM: Final = 20.0
VIOLET_BELOW_NM: Final = 430.0

TO_J: Final = 1e-3
# What a strong absorber leaves at 20 mm can be less than a double holds; its logarithm must still stand in the table.
_FAINTEST: Final = sys.float_info.min
# An initiator that peaks below this meets every lamp on the steep flank of its absorption: the acylphosphine oxides.
_FLANK_BELOW_NM: Final = 390.0
_COUNT: Final = round(DEEPEST_MM / STEP_MM) + 1

Nodes = tuple[tuple[float, float], ...]


@dataclass(frozen=True, slots=True)
class DoseCurve:
    """Initiator-weighted fluence rate over irradiance at every `STEP_MM` of depth, kept as logarithms."""

    logs: tuple[float, ...]

    def at(self, depth_mm: float) -> float:
        """Weighted fluence rate over irradiance at a depth from 0 to `DEEPEST_MM`. [-]

        Between the depths of the table its logarithm runs straight: within 0.1 % of the transport's own value.
        """
        place = depth_mm / STEP_MM
        index = min(int(place), len(self.logs) - 2)
        low, high = self.logs[index], self.logs[index + 1]
        return math.exp(low + (high - low) * (place - index))


@dataclass(frozen=True, slots=True)
class PasteLight:
    """One light in one paste: its nodes, dose by depth in all and in the violet, how far the paste spreads it [mm].

    A curve is None where the initiators take up none of that light.
    """

    nodes: Nodes
    curve: DoseCurve | None
    violet_curve: DoseCurve | None
    smoothing_length_mm: float
    surface_weight: float

    def dose_j_cm2(self, irradiance_mw_cm2: float, time_s: float, depth_mm: float) -> float:
        """Dose at a depth for an irradiance over some seconds. [J/cm²]"""
        return 0.0 if self.curve is None else irradiance_mw_cm2 * time_s * TO_J * self.curve.at(depth_mm)

    def violet_share_at(self, depth_mm: float) -> float | None:
        """Share of the dose at a depth that comes from the violet; None where there is no dose. [-]"""
        if self.curve is None:
            return None
        return 0.0 if self.violet_curve is None else self.violet_curve.at(depth_mm) / self.curve.at(depth_mm)


@lru_cache(maxsize=256)
def paste_light(paste: Paste, bands: tuple[Band, ...]) -> PasteLight:
    """Some bands of light in a paste. The spread sideways is that at the wavelength which the initiators use most."""
    nodes = light_nodes(bands, paste)
    best_nm, _ = max(nodes, key=lambda node: node[1] * weight_at(paste, node[0]))
    return PasteLight(
        nodes=nodes,
        curve=dose_curve(paste, nodes),
        violet_curve=dose_curve(paste, tuple(node for node in nodes if node[0] < VIOLET_BELOW_NM)),
        smoothing_length_mm=smoothing_length_mm(absorption_at(paste, best_nm), scattering_at(paste, best_nm)),
        surface_weight=sum(share * weight_at(paste, wavelength) for wavelength, share in nodes),
    )


def light_nodes(bands: Iterable[Band], paste: Paste) -> Nodes:
    """Wavelengths and shares that stand for some bands where a paste takes them up."""
    on_flank = any(initiator.peak_nm < _FLANK_BELOW_NM for initiator, _ in paste.parts)
    return tuple(
        node
        for band in bands
        for node in band_nodes(band.peak_nm, band.width_nm, band.share, nodes_needed(band.width_nm, on_flank))
    )


@lru_cache(maxsize=256)
def dose_curve(paste: Paste, nodes: Nodes) -> DoseCurve | None:
    """Dose by depth for a radiant exposure of 1 under some light; None where the paste's initiators take up none."""
    weighted = [(wavelength, share * weight_at(paste, wavelength)) for wavelength, share in nodes]
    sums = [0.0] * _COUNT
    for wavelength, weight in weighted:
        if weight > 0.0:
            optics = absorption_at(paste, wavelength), scattering_at(paste, wavelength)
            table = fluence_table(*optics, paste.refractive_index)
            sums = [total + weight * fluence for total, fluence in zip(sums, table, strict=True)]
    if sums[0] <= 0.0:
        return None
    return DoseCurve(tuple(math.log(max(total, _FAINTEST)) for total in sums))


@lru_cache(maxsize=256)
def fluence_table(absorption_per_mm: float, scattering_per_mm: float, refractive_index: float) -> tuple[float, ...]:
    """Fluence rate over irradiance in a half-space at every `STEP_MM` down to `DEEPEST_MM`."""
    return tuple(
        half_space_fluence(
            absorption_per_mm, scattering_per_mm, refractive_index=refractive_index, step_mm=STEP_MM, count=_COUNT
        )
    )


@lru_cache(maxsize=1024)
def transmitted_share(paste: Paste, nodes: Nodes, thickness_mm: float) -> float:
    """Share of some light that leaves the far side of an increment held in air. [-]"""
    return sum(
        share
        * slab(
            thickness_mm,
            absorption_at(paste, wavelength),
            scattering_at(paste, wavelength),
            refractive_index=paste.refractive_index,
        ).transmittance
        for wavelength, share in nodes
    )


@lru_cache(maxsize=1024)
def weight_at(paste: Paste, wavelength_nm: float) -> float:
    """How well a paste's initiators use a wavelength, camphorquinone at its peak being 1. [-]"""
    return dose_weight(paste.parts, wavelength_nm, known_initiators()["camphorquinone"])
