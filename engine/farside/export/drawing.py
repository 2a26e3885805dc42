"""The figures that a drawing of the plan needs: the cavity's section with dose by depth, and the chair clock."""

from itertools import pairwise
from typing import Any, Final

from farside.protocol.report import Report
from farside.protocol.rule import GRADES
from farside.protocol.wording import shown
from farside.quantities.registry import visible
from farside.trace.light import IncrementLight, LightTrace

_SLICES: Final = 24
_DIGITS: Final = 4
_SHOWN_DIGITS: Final = visible("increment")["far_dose_ratio"].digits


def as_drawing(report: Report) -> dict[str, Any]:
    """Section and chair clock of a report's plan, lengths in mm and times in s."""
    trace = report.trace
    plan = trace.plan
    return {
        "cavity": {
            "depth_mm": plan.depth_mm,
            "width_mm": plan.width_mm,
            "remaining_dentine_mm": plan.remaining_dentine_mm,
        },
        "tip": {
            "diameter_mm": plan.lamp.tip_diameter_mm,
            "gap_mm": plan.gap_mm,
            "spread_exponent": plan.lamp.beam.spread_exponent,
        },
        "increments": [_increment(report, index) for index in range(len(trace.increments))],
        "clock": _clock(trace),
        "clock_s": trace.clock[-1].end_s if trace.clock else 0.0,
        "window_s": _windows(report),
    }


def _increment(report: Report, index: int) -> dict[str, Any]:
    trace = report.trace
    light = trace.increments[index]
    bottom_mm = trace.plan.depth_mm - sum(i.thickness_mm for i in trace.plan.increments[:index])
    profile = _profile(light)
    ratio = _value(report, index, "far_dose_ratio")
    grades = [finding.finding for finding in report.findings if finding.where["increment"] == index + 1]
    return {
        "number": index + 1,
        "top_mm": round(bottom_mm - light.increment.thickness_mm, _DIGITS),
        "bottom_mm": round(bottom_mm, _DIGITS),
        "far_share": ratio,
        "far_shown": None if ratio is None else shown(ratio, against=[1.0], digits=_SHOWN_DIGITS),
        "finding": min(grades, key=GRADES.index, default="clear"),
        "profile": [] if ratio is None else profile,
        "short_from_mm": None if ratio is None else _short_from_mm(profile),
    }


def _profile(light: IncrementLight) -> list[list[float]]:
    """Depth below the lit face and share of the need there, from face to far side."""
    need = light.needed_dose_j_cm2
    points = []
    for step in range(_SLICES + 1):
        depth_mm = light.increment.thickness_mm * step / _SLICES
        dose = light.dose_at_j_cm2(depth_mm)
        if need is not None and dose is not None:
            points.append([round(depth_mm, _DIGITS), round(dose / need, _DIGITS)])
    return points


def _short_from_mm(profile: list[list[float]]) -> float | None:
    """Where the share of the need falls under 1, straight between the points of a profile; None where it does not."""
    for (above_mm, above), (below_mm, below) in pairwise(profile):
        if above < 1.0:
            return above_mm
        if below < 1.0:
            return round(above_mm + (below_mm - above_mm) * (above - 1.0) / (above - below), _DIGITS)
    return None


def _clock(trace: LightTrace) -> list[dict[str, Any]]:
    return [
        {
            "layer": spell.layer,
            "number": None if spell.index is None else spell.index + 1,
            "what": spell.what,
            "start_s": spell.start_s,
            "length_s": spell.length_s,
        }
        for spell in trace.clock
    ]


def _windows(report: Report) -> list[dict[str, Any]]:
    return [
        {
            "number": index + 1,
            "window_s": _value(report, index, "working_window_s"),
            "placing_s": light.increment.placing_s,
        }
        for index, light in enumerate(report.trace.increments)
    ]


def _value(report: Report, index: int, name: str) -> float | None:
    value = report.increment_value(index, name)
    return float(value) if isinstance(value, int | float) else None
