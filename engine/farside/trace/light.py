"""The light of a whole plan: what leaves the lamp, arrives on each surface and reaches each far side."""

from dataclasses import dataclass

from farside.clinic.assumed import value
from farside.clinic.lamp import Reading
from farside.clinic.materials import MakerRow, chosen_row
from farside.clinic.plan import Increment, LayerUse, Plan
from farside.trace.clock import Layer, Spell, chair_clock
from farside.trace.curves import PasteLight, paste_light
from farside.trace.exposed import Aimed, ExposureLight, known_sum


@dataclass(frozen=True, slots=True)
class IncrementLight:
    """What an increment's own exposures give it, and what its maker's instruction would have given.

    `row` is None where the card has no complete row, and the need with it.
    """

    increment: Increment
    paste_light: PasteLight
    row: MakerRow | None
    needed_dose_j_cm2: float | None
    exposures: tuple[ExposureLight, ...]

    @property
    def far_dose_j_cm2(self) -> float | None:
        """Dose at the middle of the far side; None where an exposure's cannot be had."""
        return known_sum(light.far_dose_j_cm2 for light in self.exposures)

    @property
    def edge_dose_j_cm2(self) -> float | None:
        """Dose at the far plane at the worse of the two walls; None where an exposure's cannot be had."""
        known = [light.edge_doses_j_cm2 for light in self.exposures if light.edge_doses_j_cm2 is not None]
        if len(known) < len(self.exposures):
            return None
        return min(sum(left for left, _ in known), sum(right for _, right in known))

    def dose_at_j_cm2(self, depth_mm: float) -> float | None:
        """Dose at the middle of the width, at a depth below the increment's lit face."""
        return known_sum(self._dose_of(light, depth_mm) for light in self.exposures)

    def _dose_of(self, light: ExposureLight, depth_mm: float) -> float | None:
        if light.exposure.from_side or light.middle_mw_cm2 is None:
            return light.far_dose_j_cm2
        return self.paste_light.dose_j_cm2(light.middle_mw_cm2, light.exposure.time_s, depth_mm)


@dataclass(frozen=True, slots=True)
class LightTrace:
    """A plan's light in the order of the chair.

    `bare_exitance_mw_cm2` leaves the lamp's tip, `exitance_mw_cm2` its sleeve as well; both are None where no reading
    in the plan's mode was taken by the day of the plan. `readings` are those that were, earliest first.
    """

    plan: Plan
    readings: tuple[Reading, ...]
    bare_exitance_mw_cm2: float | None
    exitance_mw_cm2: float | None
    adhesive: tuple[ExposureLight, ...]
    liner: tuple[ExposureLight, ...]
    increments: tuple[IncrementLight, ...]
    after: tuple[ExposureLight, ...]
    clock: tuple[Spell, ...]

    def exposures(self) -> tuple[ExposureLight, ...]:
        """All exposures in the order of the chair."""
        own = tuple(light for increment in self.increments for light in increment.exposures)
        return (*self.adhesive, *self.liner, *own, *self.after)


def trace_light(plan: Plan) -> LightTrace:
    """Walk a plan's light.

    The lamp's output is its latest reading in the plan's mode, freed of the sleeve that it was read through. Need and
    plan read one table of the composite's half-space, so that what lies under an increment cancels between them.
    """
    readings = plan.lamp.readings_until(plan.on, plan.mode.id)
    bare = bare_exitance_mw_cm2(readings[-1]) if readings else None
    exitance = None if bare is None else bare * value("sleeves", plan.sleeve)
    count = len(plan.increments)
    top = Aimed(plan, exitance, count - 1)
    return LightTrace(
        plan=plan,
        readings=readings,
        bare_exitance_mw_cm2=bare,
        exitance_mw_cm2=exitance,
        adhesive=_on_floor(plan, exitance, "adhesive", plan.adhesive),
        liner=_on_floor(plan, exitance, "liner", plan.liner),
        increments=tuple(_increment(plan, exitance, index) for index in range(count)),
        after=tuple(top.lit("after", number, exposure) for number, exposure in enumerate(plan.after, start=1)),
        clock=chair_clock(plan),
    )


def bare_exitance_mw_cm2(reading: Reading) -> float:
    """What left the tip itself when a reading was taken through a sleeve. [mW/cm²]"""
    return reading.radiant_exitance_mw_cm2 / value("sleeves", reading.sleeve)


def _increment(plan: Plan, exitance: float | None, index: int) -> IncrementLight:
    increment = plan.increments[index]
    light = paste_light(increment.composite.paste, plan.mode.bands)
    aimed = Aimed(plan, exitance, index, light, increment.thickness_mm)
    row = chosen_row(increment.composite.complete_rows(), exitance)
    return IncrementLight(
        increment=increment,
        paste_light=light,
        row=row,
        needed_dose_j_cm2=None if row is None else _needed_dose_j_cm2(increment, row),
        exposures=tuple(
            aimed.lit("increment", number, exposure) for number, exposure in enumerate(increment.exposures, start=1)
        ),
    )


def _needed_dose_j_cm2(increment: Increment, row: MakerRow) -> float | None:
    """The dose at the far side under the maker's own row; None where the initiators use none of the maker's light."""
    assert row.thickness_mm is not None, "a complete row has a thickness"
    light = paste_light(increment.composite.paste, (row.band,))
    return light.dose_j_cm2(row.irradiance_mw_cm2, row.time_s, row.thickness_mm) or None


def _on_floor(plan: Plan, exitance: float | None, layer: Layer, use: LayerUse | None) -> tuple[ExposureLight, ...]:
    floor = Aimed(plan, exitance, -1)
    exposures = () if use is None else use.exposures
    return tuple(floor.lit(layer, number, exposure) for number, exposure in enumerate(exposures, start=1))
