"""The plans that are timed, and their cards, made from the example clinic."""

from typing import Any

from farside import shipped
from farside.clinic.cards import Cards
from farside.clinic.plan import Plan
from farside.clinic.read_plan import read_plan
from farside.reading.document import Document

CLINIC = "example-clinic"
FOLDERS = ("lamps", "composites", "adhesives", "liners")
COMPOSITES = ("bulk-fill", "universal-dark", "universal-medium", "universal-light")


def four_increments(first_mm: float = 1.5) -> dict[str, Any]:
    """A deep box in four increments of four composites: each paste under the lamp and under its maker's light."""
    deep_box = shipped.document(f"{CLINIC}/plans/deep-box.yaml").data
    increment = deep_box["increments"][0]
    increments = [{**increment, "composite": name, "thickness_mm": 1.5} for name in COMPOSITES]
    increments[0]["thickness_mm"] = first_mm
    return {**deep_box, "title": "Four increments", "increments": increments}


def awkward_plan() -> dict[str, Any]:
    """Tilted, off-centre and sideways exposures, one touching, under a lamp of two bands and a violet initiator."""
    plan = four_increments()
    exposures = [
        [{"time_s": 12, "tilt_deg": 25, "aim_offset_mm": 1.5}, {"time_s": 7, "tilt_deg": -10, "aim_offset_mm": -0.5}],
        [{"time_s": 20, "from": "side", "side": "buccal", "tip_distance_mm": 1.0}, {"time_s": 10}],
        [{"time_s": 20, "tip_distance_mm": 0.0}],
        [{"time_s": 5, "tip_distance_mm": 3.0, "aim_offset_mm": -2.0}],
    ]
    names = ("extra-light", "masking-opaque", "extra-light", "universal-medium")
    plan["increments"] = [
        {**increment, "composite": name, "exposures": own}
        for increment, name, own in zip(plan["increments"], names, exposures, strict=True)
    ]
    plan["lamp"] = {"card": "chair-1-two-band", "mode": "standard", "sleeve": "fitted"}
    return plan


def request(plan: dict[str, Any]) -> dict[str, Any]:
    """What the page asks of the bridge for a plan, all cards of the clinic with it."""
    cards = [card.data for folder in FOLDERS for card in shipped.documents(f"{CLINIC}/{folder}")]
    clinic = shipped.document(f"{CLINIC}/clinic.yaml").data
    return {"do": "check", "plan": plan, "cards": cards, "clinic": clinic, "on": "2026-11-30"}


def plan_of(data: dict[str, Any]) -> Plan:
    """A plan as a record, with the clinic's cards and usual values."""
    cards = Cards(card for folder in FOLDERS for card in shipped.documents(f"{CLINIC}/{folder}"))
    return read_plan(Document.of(data, data["title"]), cards, shipped.document(f"{CLINIC}/clinic.yaml"))
