"""Quantities of an increment: its dose against its need, its light, its thickness, its time in the room's light."""

import math
from collections.abc import Callable
from typing import Final

from farside.clinic.materials import MakerRow
from farside.clinic.plan import Exposure
from farside.quantities.quantity import Quantity, Value, entered
from farside.quantities.reach import BEAM_REACH, LIGHT_REACH
from farside.quantities.subject import Subject
from farside.trace.aim import share_lit
from farside.trace.curves import paste_light, transmitted_share
from farside.trace.exposed import ExposureLight, known_sum
from farside.trace.light import IncrementLight
from farside.trace.room import working_window_of

_COVERED: Final = 0.8

_LAMP: Final = ("lamp.readings",)
_ARRIVING: Final = (*_LAMP, "lamp.beam", "increment.through")
_PASTE: Final = ("composite.optics", "composite.initiators", "composite.resin_weight_share")
_NEED: Final = (*_PASTE, "composite.maker_instructions")
_DOSE: Final = (*_ARRIVING, *_PASTE)


def _of(read: Callable[[IncrementLight], Value | None]) -> Callable[[Subject], Value | None]:
    """A reader of a subject from a reader of its increment."""

    def value(subject: Subject) -> Value | None:
        return None if subject.increment is None else read(subject.increment)

    return value


def _of_row(read: Callable[[IncrementLight, MakerRow], float | None]) -> Callable[[Subject], Value | None]:
    """A reader of a subject from a reader of its increment and the maker's row chosen for it."""
    return _of(lambda light: None if light.row is None else read(light, light.row))


def _over_need(light: IncrementLight, dose: float | None) -> float | None:
    return None if dose is None or light.needed_dose_j_cm2 is None else dose / light.needed_dose_j_cm2


def _from_above(light: IncrementLight) -> tuple[ExposureLight, ...]:
    """The exposures that shine down on an increment; one from a side adds to them and replaces none."""
    return tuple(exposure for exposure in light.exposures if not exposure.exposure.from_side)


def _strongest(light: IncrementLight) -> float | None:
    arriving = [exposure.axis_mw_cm2 for exposure in _from_above(light)]
    known = [value for value in arriving if value is not None]
    return max(known) if known and len(known) == len(arriving) else None


def _radiant_exposure(light: IncrementLight) -> float | None:
    return known_sum(exposure.axis_j_cm2 for exposure in light.exposures)


def _transmitted(light: IncrementLight) -> float | None:
    given = known_sum(exposure.middle_j_cm2 for exposure in light.exposures)
    if given is None:
        return None
    paste, nodes = light.increment.composite.paste, light.paste_light.nodes
    return given * transmitted_share(paste, nodes, light.increment.thickness_mm)


def _spectrum_match(light: IncrementLight, row: MakerRow) -> float | None:
    asked = paste_light(light.increment.composite.paste, (row.band,)).surface_weight
    return light.paste_light.surface_weight / asked if asked > 0.0 else None


def _cover(light: IncrementLight) -> float | None:
    lit = zip(*(exposure.shares_across for exposure in _from_above(light)), strict=True)
    widest = tuple(max(shares) for shares in lit)
    return share_lit(widest, _COVERED) if widest else None


def _shadow(subject: Subject) -> Value | None:
    """The share of the floor in the wall's shadow under every exposure: what no exposure's shadow leaves out."""
    increment = subject.increment
    exposures = () if increment is None else _from_above(increment)
    if not exposures:
        return None
    wall_mm, width_mm = _unfilled_above_mm(subject), subject.trace.plan.width_mm
    left, right = 1.0, 1.0
    for light in exposures:
        shaded = min(1.0, wall_mm * math.tan(math.radians(abs(light.exposure.tilt_deg))) / width_mm)
        left = min(left, shaded if light.exposure.tilt_deg > 0 else 0.0)
        right = min(right, shaded if light.exposure.tilt_deg < 0 else 0.0)
    return max(left, right)


def _tip_distance_mm(subject: Subject) -> Value | None:
    if subject.increment is None or subject.index is None:
        return None
    follows = subject.trace.plan.distance_after_mm(subject.index)
    return max((light.tip_distance_mm for light in subject.increment.exposures), default=follows)


def _unfilled_above_mm(subject: Subject) -> float:
    plan = subject.trace.plan
    assert subject.index is not None, "asked of an increment"
    return max(0.0, plan.distance_after_mm(subject.index) - plan.gap_mm)


def _above_mm(subject: Subject) -> Value | None:
    assert subject.index is not None, "asked of an increment"
    return float(sum(increment.thickness_mm for increment in subject.trace.plan.increments[subject.index + 1 :]))


def _window_s(subject: Subject) -> Value | None:
    plan = subject.trace.plan
    if plan.room is None or subject.composite is None:
        return None
    return working_window_of(subject.composite, plan.room)


def _share_of_window(*names: str) -> Callable[[Subject], Value | None]:
    def value(subject: Subject) -> Value | None:
        spent = [subject.field(f"increment.{name}") for name in names]
        if subject.trace.plan.room is None or subject.composite is None or None in spent:
            return None
        window_s = _window_s(subject)
        # In the dark no window ends, and none of it is used.
        return 0.0 if window_s is None else sum(map(float, spent)) / float(window_s)

    return value


def _open_time_s(subject: Subject) -> Value | None:
    spent = [subject.field("increment.dispensed_s"), subject.field("increment.placing_s")]
    return None if None in spent else float(sum(spent))


def _total_s(exposures: tuple[Exposure, ...]) -> float:
    return float(sum(exposure.time_s for exposure in exposures))


def _exitance_share(subject: Subject) -> Value | None:
    light = subject.increment
    exitance = subject.trace.exitance_mw_cm2
    return None if light is None or light.row is None or exitance is None else exitance / light.row.irradiance_mw_cm2


OF_INCREMENT: Final[tuple[Quantity, ...]] = (
    Quantity(
        "far_dose_ratio",
        "increment",
        "",
        "dose that the increment's own exposures give its far side, over its need",
        _of(lambda light: _over_need(light, light.far_dose_j_cm2)),
        reads=(*_DOSE, "composite.maker_instructions"),
        reach=LIGHT_REACH,
        formula="far_dose_j_cm2 / needed_far_dose_j_cm2",
    ),
    Quantity(
        "edge_dose_ratio",
        "increment",
        "",
        "the same at the far plane where it meets the wall, the worse of the two",
        _of(lambda light: _over_need(light, light.edge_dose_j_cm2)),
        reads=(*_DOSE, "composite.maker_instructions"),
        reach=LIGHT_REACH,
        formula="far dose × beam at half the width, spread sideways by the paste / need",
    ),
    Quantity(
        "far_dose_j_cm2",
        "increment",
        "J/cm²",
        "dose that the increment's own exposures give its far side",
        _of(lambda light: light.far_dose_j_cm2),
        reads=_DOSE,
        reach=LIGHT_REACH,
        formula="Σ over exposures and wavelengths of fluence rate × seconds × how well the initiators use them",
    ),
    Quantity(
        "needed_far_dose_j_cm2",
        "increment",
        "J/cm²",
        "dose that the maker's own instruction gives at its thickness",
        _of(lambda light: light.needed_dose_j_cm2),
        reads=_NEED,
        reach=LIGHT_REACH,
        formula="as far_dose_j_cm2, under the maker's irradiance, seconds, thickness and colour",
    ),
    Quantity(
        "surface_irradiance_mw_cm2",
        "increment",
        "mW/cm²",
        "what arrives on its surface, strongest exposure, on axis",
        _of(_strongest),
        reads=_ARRIVING,
        reach=BEAM_REACH,
        formula="exitance × sleeve × overlay × cosine of the tilt × (1 − cos^(m+1) of the angle to the tip's rim)",
    ),
    Quantity(
        "surface_radiant_exposure_j_cm2",
        "increment",
        "J/cm²",
        "irradiance times seconds on its surface, all exposures",
        _of(_radiant_exposure),
        reads=_ARRIVING,
        reach=BEAM_REACH,
        formula="Σ surface irradiance × time_s",
    ),
    Quantity(
        "far_radiant_exposure_j_cm2",
        "increment",
        "J/cm²",
        "light that would leave its far side in air; shown, never a limit",
        _of(_transmitted),
        reads=_DOSE,
        reach=LIGHT_REACH,
        formula="surface radiant exposure × transmittance of a slab in air",
    ),
    Quantity(
        "spectrum_match_ratio",
        "increment",
        "",
        "how well its initiators use this lamp's colours, over the maker's",
        _of_row(_spectrum_match),
        reads=("composite.initiators", "composite.maker_instructions"),
        formula="initiator-weighted light per mW of this lamp / of a lamp at the maker's peak",
    ),
    Quantity(
        "violet_far_share",
        "increment",
        "",
        "share of the far side's dose that comes from under 430 nm",
        _of(lambda light: light.paste_light.violet_share_at(light.increment.thickness_mm)),
        reads=_PASTE,
        reach=LIGHT_REACH,
    ),
    Quantity("thickness_mm", "increment", "mm", "as planned, along the light", entered("increment.thickness_mm")),
    Quantity(
        "tip_distance_mm",
        "increment",
        "mm",
        "tip to its surface, the largest of its exposures",
        _tip_distance_mm,
        formula="gap_mm + cavity depth − all that is filled once it is placed",
    ),
    Quantity(
        "thickness_of_maker_share",
        "increment",
        "",
        "its thickness over the maker's",
        _of_row(lambda light, row: row.thickness_mm and light.increment.thickness_mm / row.thickness_mm),
        reads=("composite.maker_instructions",),
    ),
    Quantity(
        "thickness_off_maker_mm",
        "increment",
        "mm",
        "its thickness less the maker's",
        _of_row(lambda light, row: row.thickness_mm and light.increment.thickness_mm - row.thickness_mm),
        reads=("composite.maker_instructions",),
    ),
    Quantity(
        "time_total_s",
        "increment",
        "s",
        "seconds of all its own exposures",
        _of(lambda light: _total_s(light.increment.exposures)),
    ),
    Quantity(
        "time_of_maker_share",
        "increment",
        "",
        "seconds of all its own exposures over the maker's",
        _of_row(lambda light, row: _total_s(light.increment.exposures) / row.time_s),
        reads=("composite.maker_instructions",),
    ),
    Quantity(
        "exitance_of_maker_share",
        "increment",
        "",
        "what leaves the lamp, through its sleeve, over the maker's irradiance",
        _exitance_share,
        reads=(*_LAMP, "composite.maker_instructions"),
    ),
    Quantity(
        "cover_share",
        "increment",
        "",
        "share of its width that its exposures together light to 0.8 of the axis",
        _of(_cover),
        reads=("lamp.beam",),
        reach=BEAM_REACH,
    ),
    Quantity(
        "shadow_share",
        "increment",
        "",
        "share of its floor that every exposure leaves in the wall's shadow",
        _shadow,
        formula="unfilled wall above × tan(tilt) / cavity width",
    ),
    Quantity(
        "exposure_count",
        "increment",
        "",
        "exposures of its own",
        _of(lambda light: float(len(light.exposures))),
    ),
    Quantity(
        "increment_number",
        "increment",
        "",
        "its place in the plan, 1 on the floor",
        lambda subject: None if subject.index is None else float(subject.index + 1),
    ),
    Quantity(
        "is_last",
        "increment",
        "",
        "whether nothing is placed over it",
        lambda subject: subject.index == len(subject.trace.increments) - 1,
    ),
    Quantity(
        "unfilled_above_mm",
        "increment",
        "mm",
        "unfilled wall above it once it is placed",
        _unfilled_above_mm,
        formula="cavity depth − all that is filled",
    ),
    Quantity("cap_thickness_mm", "increment", "mm", "composite placed over it later", _above_mm),
    Quantity(
        "undercut_mm",
        "increment",
        "mm",
        "depth of any part that no straight line from the tip can reach",
        entered("increment.undercut_mm"),
        reads=("increment.undercut_mm",),
    ),
    Quantity(
        "composite_temperature_c",
        "increment",
        "°C",
        "the composite's temperature at exposure",
        entered("increment.composite_temperature_c"),
        reads=("increment.composite_temperature_c",),
    ),
    Quantity(
        "working_window_s",
        "increment",
        "s",
        "seconds that its composite may be handled under this room's light",
        _window_s,
        reads=("plan.room.sources", "composite.ambient"),
        formula="tested lux × seconds × the test light's weight / Σ lux × weight of the room's sources",
    ),
    Quantity(
        "placing_of_window_share",
        "increment",
        "",
        "placing time over the working window",
        _share_of_window("placing_s"),
        reads=("plan.room.sources", "composite.ambient", "increment.placing_s"),
        formula="placing_s / working_window_s",
    ),
    Quantity(
        "open_time_s",
        "increment",
        "s",
        "from dispensing to the end of placing",
        _open_time_s,
        reads=("increment.dispensed_s", "increment.placing_s"),
    ),
    Quantity(
        "open_of_window_share",
        "increment",
        "",
        "time open to the room's light over the working window",
        _share_of_window("dispensed_s", "placing_s"),
        reads=("plan.room.sources", "composite.ambient", "increment.dispensed_s", "increment.placing_s"),
    ),
)
