"""Quantities of one exposure: its aim, its irradiance, its timer, its rest, what it gives the soft tissue."""

from collections.abc import Callable
from typing import Final

from farside.clinic.materials import MakerRow
from farside.physics.light.beam import on_axis_share
from farside.quantities.quantity import Quantity, Value
from farside.quantities.reach import BEAM_REACH
from farside.quantities.subject import Subject
from farside.trace.curves import TO_J
from farside.trace.exposed import ExposureLight

_LONGEST_SUM: Final = 6
_RESTED_S: Final = 600.0


def _of(read: Callable[[ExposureLight], Value | None]) -> Callable[[Subject], Value | None]:
    """A reader of a subject from a reader of its exposure."""

    def value(subject: Subject) -> Value | None:
        return None if subject.light is None else read(subject.light)

    return value


def _rows(subject: Subject) -> tuple[MakerRow, ...]:
    layer = subject.layer
    if layer is not None:
        return layer.rows
    return () if subject.composite is None else subject.composite.rows


def _vouching_rows(subject: Subject) -> Value | None:
    exitance, light = subject.trace.exitance_mw_cm2, subject.light
    if exitance is None or light is None:
        return None
    met = (row.time_s <= light.exposure.time_s and row.irradiance_mw_cm2 <= exitance for row in _rows(subject))
    return float(sum(met))


def _timer_fit(subject: Subject) -> Value | None:
    """`one` press of the timer, a `sum` of several, or `neither`."""
    times, light = subject.trace.plan.mode.times_s, subject.light
    if not times or light is None:
        return None
    wanted = light.exposure.time_s
    sums = {0.0}
    for presses in range(1, _LONGEST_SUM + 1):
        sums = {total + time_s for total in sums for time_s in times}
        if wanted in sums:
            return "one" if presses == 1 else "sum"
    return "neither"


def _rest_before_s(subject: Subject) -> Value | None:
    """Seconds since the last exposure ended; the first of all counts as rested."""
    light = subject.light
    if light is None:
        return None
    exposures = [spell for spell in subject.trace.clock if spell.what == "expose"]
    for before, spell in zip([None, *exposures], exposures, strict=False):
        if (spell.layer, spell.index, spell.number) == (light.layer, light.index, light.number):
            return _RESTED_S if before is None else min(_RESTED_S, spell.start_s - before.end_s)
    return None


def _soft_tissue(subject: Subject) -> Value | None:
    distance_mm, exitance, light = (
        subject.field("plan.cavity.soft_tissue_mm"), subject.trace.exitance_mw_cm2, subject.light,
    )  # fmt: skip
    if distance_mm is None or exitance is None or light is None:
        return None
    lamp = subject.trace.plan.lamp
    share = on_axis_share(float(distance_mm), lamp.tip_diameter_mm, lamp.beam.spread_exponent)
    return exitance * share * light.exposure.time_s * TO_J


OF_EXPOSURE: Final[tuple[Quantity, ...]] = (
    Quantity("time_s", "exposure", "s", "seconds that the lamp is on", _of(lambda light: light.exposure.time_s)),
    Quantity(
        "tilt_deg",
        "exposure",
        "°",
        "angle between the light and the square to the surface, signed along the width",
        _of(lambda light: light.exposure.tilt_deg),
    ),
    Quantity(
        "tip_distance_mm",
        "exposure",
        "mm",
        "tip to the surface that it lights",
        _of(lambda light: light.tip_distance_mm),
        formula="gap_mm + cavity depth − all that is filled, unless the exposure says its own",
    ),
    Quantity(
        "surface_irradiance_mw_cm2",
        "exposure",
        "mW/cm²",
        "what arrives on its surface, on axis",
        _of(lambda light: light.axis_mw_cm2),
        reads=("lamp.readings", "lamp.beam", "exposure.through"),
        reach=BEAM_REACH,
        formula="exitance × sleeve × overlay × cosine of the tilt × (1 − cos^(m+1) of the angle to the tip's rim)",
    ),
    Quantity(
        "footprint_share",
        "exposure",
        "",
        "share of the width that gets at least half the axis's irradiance",
        _of(lambda light: light.footprint_share),
        reads=("lamp.beam",),
        reach=BEAM_REACH,
    ),
    Quantity(
        "through_share",
        "exposure",
        "",
        "share of the light that passes what lies before the increment",
        _of(lambda light: light.exposure.through_share),
        reads=("exposure.through",),
    ),
    Quantity(
        "timer_fit",
        "exposure",
        "",
        "whether the lamp's timer gives its seconds in one press, a sum, or neither",
        _timer_fit,
        reads=("lamp.modes",),
    ),
    Quantity(
        "vouching_rows_count",
        "exposure",
        "",
        "maker's rows whose seconds and irradiance this exposure meets",
        _vouching_rows,
        reads=("lamp.readings",),
    ),
    Quantity(
        "rest_before_s",
        "exposure",
        "s",
        "since the last exposure of this tooth ended; 600 for the first",
        _rest_before_s,
    ),
    Quantity(
        "soft_tissue_radiant_exposure_j_cm2",
        "exposure",
        "J/cm²",
        "what gum, cheek or lip would get, from its distance",
        _soft_tissue,
        reads=("lamp.readings", "lamp.beam", "plan.cavity.soft_tissue_mm"),
        reach=BEAM_REACH,
    ),
)
