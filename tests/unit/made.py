"""Plans and cards that tests start from: invented, small, every value in sight; and the example clinic's own."""

import copy
from collections.abc import Iterable
from datetime import date
from pathlib import Path
from typing import Any

from farside.clinic.cards import Cards, documents_of
from farside.clinic.plan import Plan
from farside.clinic.read_plan import read_plan
from farside.reading.document import Document, read_document
from farside.trace.light import LightTrace, trace_light

TOP = Path(__file__).parents[2]
EXAMPLE = TOP / "rules" / "example-clinic"
PLANS = sorted(path.stem for path in (EXAMPLE / "plans").glob("*.yaml"))

LAMP = {
    "kind": "lamp",
    "id": "lamp",
    "title": "A lamp",
    "tip_diameter_mm": 8,
    "beam": {"spread_exponent": 3, "provenance": "measured"},
    "modes": [{"id": "on", "times_s": [10, 20], "bands": [{"peak_nm": 460, "width_nm": 22, "share": 1}]}],
    "readings": [
        {"on": "2026-11-01", "mode": "on", "radiant_exitance_mw_cm2": 1000, "meter": "laboratory", "sleeve": "none"}
    ],
}
COMPOSITE = {
    "kind": "composite",
    "id": "paste",
    "title": "A composite",
    "shade": {"group": "medium", "translucency": "regular"},
    "maker_instructions": [
        {
            "irradiance_mw_cm2": 1000,
            "time_s": 20,
            "thickness_mm": 2,
            "peak_nm": 460,
            "width_nm": 22,
            "provenance": "maker",
        }
    ],
    "initiators": [{"what": "camphorquinone", "weight_share_of_resin": 0.003, "provenance": "maker"}],
    "optics": {"absorption_per_mm": 0.2, "reduced_scattering_per_mm": 1, "at_nm": 460, "provenance": "measured"},
    "resin_weight_share": 0.2,
}
ADHESIVE = {
    "kind": "adhesive",
    "id": "bond",
    "title": "An adhesive",
    "cure": "light",
    "maker_instructions": [{"irradiance_mw_cm2": 500, "time_s": 10, "provenance": "maker"}],
}
CARDS = (LAMP, COMPOSITE, ADHESIVE)
PLAN = {
    "kind": "plan",
    "title": "A plan",
    "on": "2026-11-30",
    "lamp": {"card": "lamp", "mode": "on", "sleeve": "none"},
    "cavity": {"depth_mm": 2, "width_mm": 4},
    "gap_mm": 0,
    "increments": [{"composite": "paste", "thickness_mm": 2, "exposures": [{"time_s": 20}]}],
}


def edited(data: Any, edits: dict[str, Any]) -> Any:
    """A copy of some data with values put in by their paths; None takes the key out."""
    data = copy.deepcopy(data)
    for path, value in edits.items():
        at = data
        *steps, last = (int(step) if step.isdigit() else step for step in path.split("/"))
        for step in steps:
            at = at[step]
        if value is None:
            del at[last]
        else:
            at[last] = value
    return data


def read(plan: Any = PLAN, cards: Iterable[Any] = CARDS, clinic: Any = None, on: date | None = None) -> Plan:
    """The record of a plan given as data."""
    usual = None if clinic is None else Document.of(clinic, "clinic")
    return read_plan(Document.of(plan, "plan"), Cards(documents_of(cards)), usual, on)


def traced(plan: Any = PLAN, cards: Iterable[Any] = CARDS) -> LightTrace:
    """The light of a plan given as data."""
    return trace_light(read(plan, cards))


def example(path: str) -> Any:
    """A file of the example clinic as data."""
    return read_document((EXAMPLE / path).read_bytes(), path).data


def example_plan(name: str) -> Any:
    """A plan of the example clinic as data."""
    return example(f"plans/{name}.yaml")


def example_cards() -> list[Any]:
    """All cards of the example clinic as data."""
    folders = ("lamps", "composites", "adhesives", "liners")
    return [example(f"{folder}/{path.name}") for folder in folders for path in sorted((EXAMPLE / folder).iterdir())]
