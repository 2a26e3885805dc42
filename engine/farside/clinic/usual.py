"""The clinic's usual values, laid under a plan that says only what differs."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any, Final

from farside.clinic.reading import Path
from farside.reading.document import Document

_COMPOSITE: Final = "composite"
_USUAL: Final = "usual"


@dataclass(frozen=True, slots=True)
class Merged:
    """A plan over the clinic's usual values, and which of the two files gave what."""

    plan: Document
    clinic: Document | None

    def giver(self, path: Path) -> tuple[Document, Path]:
        """The file that gave a value of the plan, and the value's path in it; the plan where neither did."""
        if self.clinic is None or _holds(self.plan.data, path):
            return self.plan, path
        usual = (_USUAL, _COMPOSITE) if path[-1] == _COMPOSITE else (_USUAL, *path)
        return (self.clinic, usual) if _holds(self.clinic.data, usual) else (self.plan, path)


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
    usual = dict(clinic.data.get(_USUAL, {}))
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


def _holds(data: Any, path: Path) -> bool:
    try:
        for step in path:
            data = data[step]
    except (KeyError, IndexError, TypeError):
        return False
    return True
