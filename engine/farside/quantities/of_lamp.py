"""Quantities of the lamp and of a composite's card: output, its history, colours, dates."""

from collections.abc import Callable
from datetime import date
from typing import Final

from farside.physics.light.initiators import Initiator, molar_absorption
from farside.quantities.quantity import Quantity, Value
from farside.quantities.subject import Subject
from farside.trace.curves import VIOLET_BELOW_NM

_READINGS: Final = ("lamp.readings",)
# An initiator still serves a blue lamp where it keeps this much of its peak above the violet: ours.
_TAIL_SHARE: Final = 0.05


def _days_since(day: date | None, subject: Subject) -> Value | None:
    """Days from a date to the plan's; None where there is none, or where it has not come yet."""
    on = subject.trace.plan.on
    return None if day is None or day > on else float((on - day).days)


def _reading_age(subject: Subject) -> Value | None:
    readings = subject.trace.readings
    return _days_since(readings[-1].on, subject) if readings else None


def _of_baseline(subject: Subject) -> Value | None:
    if not _comparable(subject):
        return None
    first, last = subject.trace.readings[0], subject.trace.readings[-1]
    return last.radiant_exitance_mw_cm2 / first.radiant_exitance_mw_cm2


def _comparable(subject: Subject) -> Value | None:
    readings = subject.trace.readings
    if not readings:
        return None
    return (readings[0].meter, readings[0].sleeve) == (readings[-1].meter, readings[-1].sleeve)


def _of_stated(subject: Subject) -> Value | None:
    stated, bare = subject.trace.plan.lamp.stated_exitance_mw_cm2, subject.trace.bare_exitance_mw_cm2
    return None if stated is None or bare is None else bare / stated


def _latest(read: str) -> Callable[[Subject], Value | None]:
    def value(subject: Subject) -> Value | None:
        readings = subject.trace.readings
        return str(getattr(readings[-1], read)) if readings else None

    return value


def _violet_share(subject: Subject) -> Value | None:
    return float(sum(band.share for band in subject.trace.plan.mode.bands if band.peak_nm < VIOLET_BELOW_NM))


def _initiators(violet: bool) -> Callable[[Subject], Value | None]:
    def value(subject: Subject) -> Value | None:
        if subject.composite is None or subject.composite.initiators_provenance == "assumed":
            return None
        known = [initiator for initiator, _ in subject.composite.paste.parts]
        if violet:
            return float(sum(initiator.peak_nm < VIOLET_BELOW_NM for initiator in known))
        return float(sum(map(_serves_blue, known)))

    return value


def _serves_blue(initiator: Initiator) -> bool:
    left = molar_absorption(initiator, VIOLET_BELOW_NM) / initiator.peak_molar_absorption
    return initiator.peak_nm >= VIOLET_BELOW_NM or left >= _TAIL_SHARE


def _to_expiry(subject: Subject) -> Value | None:
    if subject.composite is None or subject.composite.expires is None:
        return None
    return float((subject.composite.expires - subject.trace.plan.on).days)


OF_LAMP: Final[tuple[Quantity, ...]] = (
    Quantity(
        "radiant_exitance_mw_cm2",
        "lamp",
        "mW/cm²",
        "what leaves its bare tip in this mode, by the latest reading",
        lambda subject: subject.trace.bare_exitance_mw_cm2,
        reads=_READINGS,
        formula="latest reading not after the plan's day / what its sleeve passed",
    ),
    Quantity(
        "reading_age_days",
        "lamp",
        "days",
        "since the latest reading in this mode",
        _reading_age,
        reads=_READINGS,
    ),
    Quantity(
        "output_of_baseline_share",
        "lamp",
        "",
        "latest reading over the first, same meter and sleeve",
        _of_baseline,
        reads=_READINGS,
    ),
    Quantity(
        "baseline_comparable",
        "lamp",
        "",
        "whether first and latest reading share meter and sleeve",
        _comparable,
        reads=_READINGS,
    ),
    Quantity(
        "output_of_stated_share",
        "lamp",
        "",
        "bare output over the maker's stated exitance",
        _of_stated,
        reads=(*_READINGS, "lamp.stated_exitance_mw_cm2"),
    ),
    Quantity("reading_meter", "lamp", "", "meter of the latest reading", _latest("meter"), reads=_READINGS),
    Quantity("reading_sleeve", "lamp", "", "sleeve of the latest reading", _latest("sleeve"), reads=_READINGS),
    Quantity(
        "tip_check_age_days",
        "lamp",
        "days",
        "since the tip was looked at",
        lambda subject: _days_since(subject.trace.plan.lamp.tip_checked_on, subject),
        reads=("lamp.tip.checked_on",),
    ),
    Quantity("violet_share", "lamp", "", "share of the mode's light in bands that peak under 430 nm", _violet_share),
    Quantity(
        "band_count",
        "lamp",
        "",
        "bands of the mode",
        lambda subject: float(len(subject.trace.plan.mode.bands)),
    ),
)

OF_COMPOSITE: Final[tuple[Quantity, ...]] = (
    Quantity(
        "days_to_expiry",
        "composite",
        "days",
        "to the date on the pack",
        _to_expiry,
        reads=("composite.expires",),
    ),
    Quantity(
        "complete_maker_rows_count",
        "composite",
        "",
        "maker's rows with irradiance, seconds and thickness",
        lambda subject: float(
            sum(row.provenance == "maker" for row in subject.composite.complete_rows()) if subject.composite else 0
        ),
    ),
    Quantity(
        "violet_initiator_count",
        "composite",
        "",
        "initiators known to peak under 430 nm",
        _initiators(violet=True),
        reads=("composite.initiators_known",),
    ),
    Quantity(
        "blue_initiator_count",
        "composite",
        "",
        "initiators known to take up light from 430 nm on",
        _initiators(violet=False),
        reads=("composite.initiators_known",),
    ),
)
