"""The ranges of inputs over which the model was checked; beyond them a quantity is not given."""

from collections.abc import Callable, Mapping
from typing import Final

from farside.quantities.subject import Subject
from farside.trace.exposed import ExposureLight

Reach = Mapping[str, tuple[float, float]]

OUTSIDE: Final = " is outside "
_UNITS: Final = {"_per_mm": "/mm", "_mw_cm2": "mW/cm²", "_mm": "mm", "_s": "s"}

LIGHT_REACH: Final[Reach] = {
    "exitance_mw_cm2": (100.0, 4000.0),
    "time_s": (1.0, 120.0),
    "tip_distance_mm": (0.0, 10.0),
    "tip_diameter_mm": (6.0, 12.0),
    "spread_exponent": (0.0, 14.0),
    "absorption_per_mm": (0.05, 1.0),
    "reduced_scattering_per_mm": (0.5, 4.0),
    "thickness_mm": (0.5, 5.0),
}
BEAM_REACH: Final[Reach] = {
    name: LIGHT_REACH[name] for name in ("exitance_mw_cm2", "tip_distance_mm", "tip_diameter_mm", "spread_exponent")
}
ADHESIVE_REACH: Final[Reach] = {
    **{name: LIGHT_REACH[name] for name in ("exitance_mw_cm2", "tip_diameter_mm", "spread_exponent")},
    "adhesive_tip_distance_mm": LIGHT_REACH["tip_distance_mm"],
}


def beyond(reach: Reach, subject: Subject) -> tuple[str, ...]:
    """The inputs of a subject that lie outside a reach, each with its value and range in words."""
    return tuple(
        f"{_label(name)} {value:g}{OUTSIDE}{low:g} to {high:g}{_unit(name)}"
        for name, (low, high) in reach.items()
        for value in _INPUTS[name](subject)
        if not low <= value <= high
    )


def _label(name: str) -> str:
    """An input's name as words have it, without its unit."""
    suffix = next((suffix for suffix in _UNITS if name.endswith(suffix)), "")
    return name.removesuffix(suffix).replace("_", " ")


def _unit(name: str) -> str:
    return next((f" {unit}" for suffix, unit in _UNITS.items() if name.endswith(suffix)), "")


def _exitance(subject: Subject) -> list[float]:
    exitance = subject.trace.exitance_mw_cm2
    return [] if exitance is None else [exitance]


def _times(subject: Subject) -> list[float]:
    return [light.exposure.time_s for light in _lights(subject)]


def _distances(subject: Subject) -> list[float]:
    return [light.tip_distance_mm for light in _lights(subject)]


def _absorption(subject: Subject) -> list[float]:
    if subject.composite is None:
        return []
    return [subject.composite.absorption_per_mm()]


def _scattering(subject: Subject) -> list[float]:
    return [] if subject.composite is None else [subject.composite.paste.reduced_scattering_per_mm]


def _thickness(subject: Subject) -> list[float]:
    return [] if subject.increment is None else [subject.increment.increment.thickness_mm]


def _lights(subject: Subject) -> tuple[ExposureLight, ...]:
    """The exposures that bear on a subject: itself, an increment's own, all of a plan's."""
    if subject.light is not None:
        return (subject.light,)
    if subject.about == "plan":
        return subject.trace.exposures()
    return () if subject.increment is None else subject.increment.exposures


_INPUTS: Final[Mapping[str, Callable[[Subject], list[float]]]] = {
    "exitance_mw_cm2": _exitance,
    "time_s": _times,
    "tip_distance_mm": _distances,
    "adhesive_tip_distance_mm": lambda subject: [light.tip_distance_mm for light in subject.trace.adhesive],
    "tip_diameter_mm": lambda subject: [subject.trace.plan.lamp.tip_diameter_mm],
    "spread_exponent": lambda subject: [subject.trace.plan.lamp.beam.spread_exponent],
    "absorption_per_mm": _absorption,
    "reduced_scattering_per_mm": _scattering,
    "thickness_mm": _thickness,
}
