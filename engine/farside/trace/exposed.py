"""What one exposure does: irradiance on the surface it is aimed at, dose at the far side and at the walls."""

from collections.abc import Iterable
from dataclasses import dataclass
from typing import Final

from farside.clinic.plan import Exposure, Plan
from farside.physics.light.beam import surface_share
from farside.trace.aim import share_lit, shares_across, wall_share
from farside.trace.clock import Layer
from farside.trace.curves import TO_J, PasteLight

_HALF: Final = 0.5


def known_sum(parts: Iterable[float | None]) -> float | None:
    """The sum of some parts; None where one of them is not known."""
    total = 0.0
    for part in parts:
        if part is None:
            return None
        total += part
    return total


@dataclass(frozen=True, slots=True)
class ExposureLight:
    """What one exposure does; irradiances and doses are None where the lamp's output or an overlay is not known.

    `axis_mw_cm2` is the irradiance on the axis at the surface, `middle_mw_cm2` at the middle of the cavity's width.
    The doses are at the far plane, at the middle and at the two walls; only an increment has them.
    """

    layer: Layer
    index: int | None
    number: int
    exposure: Exposure
    tip_distance_mm: float
    shares_across: tuple[float, ...]
    axis_mw_cm2: float | None
    middle_mw_cm2: float | None
    far_dose_j_cm2: float | None
    edge_doses_j_cm2: tuple[float, float] | None

    @property
    def axis_j_cm2(self) -> float | None:
        """Radiant exposure on the axis at the surface; None where the irradiance is not known."""
        return None if self.axis_mw_cm2 is None else self.axis_mw_cm2 * self.exposure.time_s * TO_J

    @property
    def middle_j_cm2(self) -> float | None:
        """Radiant exposure at the middle of the cavity's width; None where the irradiance is not known."""
        return None if self.middle_mw_cm2 is None else self.middle_mw_cm2 * self.exposure.time_s * TO_J

    @property
    def footprint_share(self) -> float:
        """Share of the width that gets at least half the axis's irradiance. [-]"""
        return share_lit(self.shares_across, _HALF)


@dataclass(frozen=True, slots=True)
class Aimed:
    """An exposure at a surface: the plan, what leaves its lamp, where the surface is and what paste lies there."""

    plan: Plan
    exitance_mw_cm2: float | None
    surface_index: int
    paste_light: PasteLight | None = None
    thickness_mm: float = 0.0

    def lit(self, layer: Layer, number: int, exposure: Exposure) -> ExposureLight:
        """What that exposure does here."""
        lamp = self.plan.lamp
        distance_mm = exposure.tip_distance_mm
        if distance_mm is None:
            distance_mm = self.plan.distance_after_mm(self.surface_index)
        tilt_deg, offset_mm = exposure.tilt_deg, exposure.aim_offset_mm
        beam = (lamp.tip_diameter_mm, lamp.beam.spread_exponent)
        axis, middle, far, edges = None, None, None, None
        if self.exitance_mw_cm2 is not None and exposure.through_share is not None:
            arriving = self.exitance_mw_cm2 * exposure.through_share
            axis = arriving * surface_share(distance_mm, 0.0, tilt_deg, *beam)
            middle = arriving * surface_share(distance_mm, -offset_mm, tilt_deg, *beam)
            if self.paste_light is not None:
                far, edges = self._doses(self.paste_light, exposure, distance_mm, arriving, middle)
        return ExposureLight(
            layer=layer,
            index=self.surface_index if layer == "increment" else None,
            number=number,
            exposure=exposure,
            tip_distance_mm=distance_mm,
            shares_across=shares_across(distance_mm, offset_mm, tilt_deg, *beam, self.plan.width_mm),
            axis_mw_cm2=axis,
            middle_mw_cm2=middle,
            far_dose_j_cm2=far,
            edge_doses_j_cm2=edges,
        )

    def _doses(
        self, paste_light: PasteLight, exposure: Exposure, distance_mm: float, arriving: float, middle: float
    ) -> tuple[float, tuple[float, float]]:
        """Dose at the middle of the far side and at the far ends of the two walls."""
        half_mm, time_s = self.plan.width_mm / 2, exposure.time_s
        if exposure.from_side:
            # From a side the light crosses half the width to the middle, and all of it to the wall away from the lamp.
            away = paste_light.dose_j_cm2(middle, time_s, 2 * half_mm)
            return paste_light.dose_j_cm2(middle, time_s, half_mm), (away, away)
        lamp = self.plan.lamp
        walls = (-half_mm - exposure.aim_offset_mm, half_mm - exposure.aim_offset_mm)
        left, right = (
            wall_share(
                distance_mm,
                wall,
                exposure.tilt_deg,
                lamp.tip_diameter_mm,
                lamp.beam.spread_exponent,
                paste_light.smoothing_length_mm,
            )
            for wall in walls
        )
        whole = paste_light.dose_j_cm2(arriving, time_s, self.thickness_mm)
        return paste_light.dose_j_cm2(middle, time_s, self.thickness_mm), (whole * left, whole * right)
