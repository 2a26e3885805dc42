"""The clinic's usual values, laid under a plan that says only what differs."""

from collections.abc import Mapping
from typing import Any, Final

from farside.reading.document import Document

_COMPOSITE: Final = "composite"


def with_usual(plan: Document, clinic: Document | None) -> dict[str, Any]:
    """A plan's data over the clinic's usual values.

    Parameters
    ----------
    plan : Document
        The plan as written.
    clinic : Document or None
        The clinic's defaults; None leaves the plan as it is.

    Returns
    -------
    dict
        The plan in which every absent key takes the usual value, mappings key by key and lists whole. The usual
        composite serves the increments that name none.
    """
    if clinic is None:
        return dict(plan.data)
    usual = dict(clinic.data.get("usual", {}))
    composite = usual.pop(_COMPOSITE, None)
    merged = _laid_under(plan.data, usual)
    if composite is not None and isinstance(merged.get("increments"), list):
        merged["increments"] = [
            {_COMPOSITE: composite, **increment} if isinstance(increment, Mapping) else increment
            for increment in merged["increments"]
        ]
    return merged


def _laid_under(over: Mapping[str, Any], under: Mapping[str, Any]) -> dict[str, Any]:
    merged = {**under, **over}
    for key in over.keys() & under.keys():
        if isinstance(over[key], Mapping) and isinstance(under[key], Mapping):
            merged[key] = _laid_under(over[key], under[key])
    return merged
