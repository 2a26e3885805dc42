"""The inputs that quantities read: whether each is there, and where it came from."""

from collections.abc import Callable, Iterable, Mapping
from typing import Final

from farside.clinic.materials import MakerRow
from farside.clinic.provenance import Provenance, worst
from farside.quantities.subject import Subject
from farside.trace.exposed import ExposureLight


def origin(name: str, subject: Subject) -> Provenance | None:
    """Where an input of a subject came from; None where it is missing.

    An input without a provenance of its own, such as a thickness in the plan, counts as measured once it is given.
    """
    special = _ORIGINS.get(name)
    if special is not None:
        return special(subject)
    return None if subject.field(name) is None else "measured"


def _readings(subject: Subject) -> Provenance | None:
    return "measured" if subject.trace.readings else None


def _optics(subject: Subject) -> Provenance | None:
    return subject.composite.optics_provenance if subject.composite else None


def _initiators(subject: Subject) -> Provenance | None:
    return subject.composite.initiators_provenance if subject.composite else None


def _initiators_known(subject: Subject) -> Provenance | None:
    # What is asked of a card's own list has no answer from an assumed one.
    known = _initiators(subject)
    return None if known == "assumed" else known


def _placing_times(subject: Subject) -> Provenance | None:
    known = all(increment.placing_s is not None for increment in subject.trace.plan.increments)
    return "measured" if known else None


def _resin(subject: Subject) -> Provenance | None:
    return subject.composite.resin_provenance if subject.composite else None


def _instructions(subject: Subject) -> Provenance | None:
    return None if subject.increment is None else _of_row(subject.increment.row)


def _of_row(row: MakerRow | None) -> Provenance | None:
    if row is None:
        return None
    return worst((row.provenance, "assumed" if row.band_assumed else "measured"))


def _layer_rows(layer: str) -> Callable[[Subject], Provenance | None]:
    def of_layer(subject: Subject) -> Provenance | None:
        plan = subject.trace.plan
        use = plan.adhesive if layer == "adhesive" else plan.liner
        return None if use is None else worst(row.provenance for row in use.layer.rows) if use.layer.rows else None

    return of_layer


def _ambient(subject: Subject) -> Provenance | None:
    # Where the card is silent the least that the standard asks of any composite stands in.
    if subject.composite is None:
        return None
    return "assumed" if subject.composite.ambient is None else subject.composite.ambient.provenance


def _through(lights: Callable[[Subject], Iterable[ExposureLight]]) -> Callable[[Subject], Provenance | None]:
    """What passes the overlays of some exposures; a plan gives it as it gives a thickness."""

    def of_lights(subject: Subject) -> Provenance | None:
        return None if any(light.exposure.through_share is None for light in lights(subject)) else "measured"

    return of_lights


_ORIGINS: Final[Mapping[str, Callable[[Subject], Provenance | None]]] = {
    "lamp.readings": _readings,
    "lamp.beam": lambda subject: subject.trace.plan.lamp.beam.provenance,
    "composite.optics": _optics,
    "composite.initiators": _initiators,
    "composite.initiators_known": _initiators_known,
    "plan.placing_times": _placing_times,
    "composite.resin_weight_share": _resin,
    "composite.maker_instructions": _instructions,
    "composite.ambient": _ambient,
    "adhesive.maker_instructions": _layer_rows("adhesive"),
    "liner.maker_instructions": _layer_rows("liner"),
    "exposure.through": _through(lambda subject: (subject.light,) if subject.light else ()),
    "increment.through": _through(lambda subject: subject.increment.exposures if subject.increment else ()),
    "adhesive.through": _through(lambda subject: subject.trace.adhesive),
    "plan.through": _through(lambda subject: subject.trace.exposures()),
}
