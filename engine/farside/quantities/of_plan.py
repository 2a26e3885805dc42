"""Quantities of the whole plan: cavity, adhesive and liner, room, eyes, what is assumed and what is beyond reach."""

from typing import Final

from farside.clinic.materials import chosen_row
from farside.clinic.plan import LayerUse
from farside.quantities.inputs import origin
from farside.quantities.quantity import Quantity, Value, entered
from farside.quantities.reach import ADHESIVE_REACH, BEAM_REACH, LIGHT_REACH, beyond
from farside.quantities.subject import Subject, subjects
from farside.trace.clock import largest_in_window
from farside.trace.curves import TO_J
from farside.trace.exposed import known_sum
from farside.trace.eyes import day_share
from farside.trace.room import unfiltered_lx, weighted_mw_cm2

# Sums of entered millimetres are freed of binary dust, so that what adds up on paper adds up here.
_DECIMALS: Final = 9
_LAYER: Final = ("lamp.readings", "lamp.beam", "adhesive.through", "plan.adhesive", "adhesive.maker_instructions")


def _time_s(use: LayerUse | None) -> float | None:
    return None if use is None else float(sum(exposure.time_s for exposure in use.exposures))


def _time_of_maker(subject: Subject, use: LayerUse | None) -> float | None:
    time_s = _time_s(use)
    if use is None or time_s is None:
        return None
    if time_s == 0.0:
        return 0.0
    row = chosen_row(use.layer.rows, subject.trace.exitance_mw_cm2)
    return None if row is None else time_s / row.time_s


def _adhesive_dose_ratio(subject: Subject) -> Value | None:
    use, lights = subject.trace.plan.adhesive, subject.trace.adhesive
    if use is None:
        return None
    row = chosen_row(use.layer.rows, subject.trace.exitance_mw_cm2)
    given = known_sum(light.middle_j_cm2 for light in lights)
    return None if row is None or given is None else given / (row.irradiance_mw_cm2 * row.time_s * TO_J)


def _at_one_site(subject: Subject) -> Value | None:
    trace = subject.trace
    arriving = {(light.layer, light.index, light.number): light.axis_mw_cm2 for light in trace.exposures()}
    rates: list[tuple[float, float, float]] = []
    for spell in trace.clock:
        if spell.what == "expose" and spell.number is not None:
            rate = arriving[spell.layer, spell.index, spell.number]
            if rate is None:
                return None
            rates.append((spell.start_s, spell.length_s, rate * TO_J))
    return largest_in_window(rates)


def _chair_time_s(subject: Subject) -> Value | None:
    if origin("plan.placing_times", subject) is None:
        return None
    clock = subject.trace.clock
    return clock[-1].end_s if clock else None


def _fill_gap_mm(subject: Subject) -> Value | None:
    plan = subject.trace.plan
    return round(plan.depth_mm - sum(increment.thickness_mm for increment in plan.increments), _DECIMALS)


def _assumed_count(subject: Subject) -> Value | None:
    plan = subject.trace.plan
    origins = [plan.lamp.beam.provenance]
    for composite in plan.composites():
        origins += [composite.optics_provenance, composite.initiators_provenance, composite.resin_provenance]
        origins += ["assumed" if row.band_assumed else row.provenance for row in composite.rows]
    return float(origins.count("assumed"))


def _beyond_count(subject: Subject) -> Value | None:
    reasons = {reason for inner in subjects(subject.trace, "increment") for reason in beyond(LIGHT_REACH, inner)}
    reasons |= {reason for inner in subjects(subject.trace, "exposure") for reason in beyond(BEAM_REACH, inner)}
    return float(len(reasons))


OF_PLAN: Final[tuple[Quantity, ...]] = (
    Quantity(
        "remaining_dentine_mm",
        "plan",
        "mm",
        "between cavity floor and pulp, as entered",
        entered("plan.cavity.remaining_dentine_mm"),
        reads=("plan.cavity.remaining_dentine_mm",),
    ),
    Quantity("cavity_depth_mm", "plan", "mm", "as entered", entered("plan.cavity.depth_mm")),
    Quantity("gap_mm", "plan", "mm", "tip to the cavity's opening, as entered", entered("plan.gap_mm")),
    Quantity(
        "fill_gap_mm",
        "plan",
        "mm",
        "cavity depth less all increments",
        _fill_gap_mm,
        formula="cavity depth − Σ thickness_mm",
    ),
    Quantity(
        "floor_distance_mm",
        "plan",
        "mm",
        "tip to the cavity's floor",
        lambda subject: subject.trace.plan.distance_after_mm(-1),
        formula="gap_mm + cavity depth",
    ),
    Quantity(
        "chair_time_s",
        "plan",
        "s",
        "from the first exposure or placing to the last",
        _chair_time_s,
        reads=("plan.placing_times",),
    ),
    Quantity(
        "adhesive_time_s",
        "plan",
        "s",
        "seconds of the adhesive's own exposures",
        lambda subject: _time_s(subject.trace.plan.adhesive),
        reads=("plan.adhesive",),
    ),
    Quantity(
        "adhesive_time_of_maker_share",
        "plan",
        "",
        "seconds of the adhesive's own exposures over its maker's",
        lambda subject: _time_of_maker(subject, subject.trace.plan.adhesive),
        reads=("plan.adhesive", "adhesive.maker_instructions"),
    ),
    Quantity(
        "adhesive_dose_ratio",
        "plan",
        "",
        "radiant exposure of the adhesive at the floor over its maker's",
        _adhesive_dose_ratio,
        reads=_LAYER,
        reach=ADHESIVE_REACH,
        formula="Σ irradiance at the floor × time_s / maker's irradiance × seconds",
    ),
    Quantity(
        "liner_time_of_maker_share",
        "plan",
        "",
        "seconds of the liner's own exposures over its maker's",
        lambda subject: _time_of_maker(subject, subject.trace.plan.liner),
        reads=("plan.liner", "liner.maker_instructions"),
    ),
    Quantity(
        "site_radiant_exposure_j_cm2",
        "plan",
        "J/cm²",
        "the most that one spot gets in any 60 s, all exposures counted",
        _at_one_site,
        reads=("lamp.readings", "lamp.beam", "plan.through"),
        reach=BEAM_REACH,
        formula="largest Σ irradiance × seconds in a window of 60 s",
    ),
    Quantity(
        "side_after_count",
        "plan",
        "",
        "sides exposed once the matrix is off",
        lambda subject: float(len({e.fields.get("side") for e in subject.trace.plan.after if e.from_side})),
    ),
    Quantity(
        "unfiltered_illuminance_lx",
        "plan",
        "lx",
        "room light on the paste that passes no filter",
        lambda subject: None if subject.trace.plan.room is None else unfiltered_lx(subject.trace.plan.room),
        reads=("plan.room.sources",),
    ),
    Quantity(
        "room_weighted_mw_cm2",
        "plan",
        "mW/cm²",
        "room light on the paste as camphorquinone sees it",
        lambda subject: None if subject.trace.plan.room is None else weighted_mw_cm2(subject.trace.plan.room),
        reads=("plan.room.sources",),
        formula="Σ lux × weight of each source behind its filter",
    ),
    Quantity(
        "eye_day_share",
        "plan",
        "",
        "share of a day's blue-light limit that the day's planned exposures use",
        lambda subject: day_share(subject.trace),
        reads=("lamp.readings", "lamp.beam", "plan.through", "plan.team.exposures_today_count"),
        reach=BEAM_REACH,
        formula="exposures × mean seconds × filter / seconds to 1e6 J/(m² sr) of light thrown back by the tooth",
    ),
    Quantity("assumed_input_count", "plan", "", "inputs that no card gives and that were assumed", _assumed_count),
    Quantity(
        "beyond_reach_count",
        "plan",
        "",
        "inputs outside the range over which the model was checked",
        _beyond_count,
    ),
)
