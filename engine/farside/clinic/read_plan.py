"""A plan document and the cards it names to one record, with what only the whole plan can refuse."""

import math
from collections.abc import Mapping, Sequence
from datetime import date
from typing import Any, Final, NoReturn

from farside import shipped
from farside.clinic.cards import Cards
from farside.clinic.plan import Exposure, Increment, LayerUse, Plan, RoomSource
from farside.clinic.reading import Path, checked, day, filled, refuse
from farside.clinic.usual import Merged, with_usual
from farside.reading.document import Document
from farside.reading.schema import nearest

_NEEDED: Final = (
    ("lamp", "card"),
    ("lamp", "mode"),
    ("lamp", "sleeve"),
    ("cavity", "depth_mm"),
    ("cavity", "width_mm"),
    ("gap_mm",),
)
_LAYERS: Final = ("adhesive", "liner")
_NOT_USED: Final = "not-used"
# Where nothing is at the side: from above, or once the matrix is off.
_OFF: Final = "off"


def read_plan(document: Document, cards: Cards, clinic: Document | None = None, on: date | None = None) -> Plan:
    """A plan as a record.

    Parameters
    ----------
    document : Document
        The plan as written.
    cards : Cards
        The cards at hand.
    clinic : Document, optional
        The clinic's usual values.
    on : date, optional
        The day that the plan is for, before the plan's own; today where neither says.

    Raises
    ------
    Refused
        When the plan, merged with the usual values, lacks a needed value, names a card or mode that is not there, or
        does not fit its own cavity.
    """
    checked(document, "plan")
    if clinic is not None:
        checked(clinic, "clinic")
    data = filled(with_usual(document, clinic), "plan")
    merged = Merged(document, clinic)
    _refuse_missing(merged, data)
    lamp = cards.lamp(data["lamp"]["card"], *merged.giver(("lamp", "card")))
    mode = next((mode for mode in lamp.modes if mode.id == data["lamp"]["mode"]), None)
    if mode is None:
        known = ", ".join(mode.id for mode in lamp.modes)
        _refuse(merged, "mode-unknown", ("lamp", "mode"), lamp=lamp.id, mode=data["lamp"]["mode"], known=known)
    increments = tuple(
        _increment(merged, cards, entry, ("increments", index), data.get("matrix"))
        for index, entry in enumerate(data["increments"])
    )
    _refuse_unfit(merged, data, increments)
    return Plan(
        title=data["title"],
        on=on or day(data.get("on")) or date.today(),
        lamp=lamp,
        mode=mode,
        sleeve=data["lamp"]["sleeve"],
        depth_mm=float(data["cavity"]["depth_mm"]),
        width_mm=float(data["cavity"]["width_mm"]),
        remaining_dentine_mm=_number(data["cavity"], "remaining_dentine_mm"),
        gap_mm=float(data["gap_mm"]),
        adhesive=_layer_use(merged, cards, data, "adhesive"),
        liner=_layer_use(merged, cards, data, "liner"),
        room=_room(merged, data.get("room", {}).get("sources")),
        increments=increments,
        after=_exposures(merged, data.get("after", ()), ("after",), _OFF),
        fields=data,
    )


def _refuse(merged: Merged, key: str, path: Path, **values: object) -> NoReturn:
    """Refuse a value of the plan at its place in the file that gave it."""
    document, place = merged.giver(path)
    refuse(document, key, place, **values)


def _refuse_missing(merged: Merged, data: Mapping[str, Any]) -> None:
    for path in _NEEDED:
        found: Any = data
        for step in path:
            found = found.get(step) if isinstance(found, Mapping) else None
        if found is None:
            _refuse(merged, "missing-after-usual", path, what=".".join(path))
    for index, increment in enumerate(data["increments"]):
        if "composite" not in increment:
            what = f"increments[{index}].composite"
            _refuse(merged, "missing-after-usual", ("increments", index, "composite"), what=what)
    for kind in _LAYERS:
        if isinstance(data.get(kind), Mapping) and "card" not in data[kind]:
            _refuse(merged, "missing-after-usual", (kind, "card"), what=f"{kind}.card")


def _refuse_unfit(merged: Merged, data: Mapping[str, Any], increments: tuple[Increment, ...]) -> None:
    depth_mm = float(data["cavity"]["depth_mm"])
    tip_mm = depth_mm + float(data["gap_mm"])
    filled_mm = 0.0
    for index, increment in enumerate(increments):
        path: Path = ("increments", index, "thickness_mm")
        if increment.thickness_mm > depth_mm:
            _refuse(
                merged,
                "thicker-than-cavity",
                path,
                what=f"increments[{index}].thickness_mm",
                thickness=f"{increment.thickness_mm:g}",
                depth=f"{depth_mm:g}",
            )
        filled_mm += increment.thickness_mm
        if filled_mm > tip_mm + 1e-9:
            _refuse(merged, "fills-past-tip", path, filled=f"{filled_mm:g}", tip=f"{tip_mm:g}")


def _increment(merged: Merged, cards: Cards, data: Mapping[str, Any], path: Path, matrix: str | None) -> Increment:
    return Increment(
        composite=cards.composite(data["composite"], *merged.giver((*path, "composite"))),
        thickness_mm=float(data["thickness_mm"]),
        placing_s=_number(data, "placing_s"),
        dispensed_s=_number(data, "dispensed_s"),
        exposures=_exposures(merged, data.get("exposures", ()), (*path, "exposures"), matrix),
        fields=data,
    )


def _layer_use(merged: Merged, cards: Cards, data: Mapping[str, Any], kind: str) -> LayerUse | None:
    use = data.get(kind)
    if use is None or use == _NOT_USED:
        return None
    layer = cards.layer(kind, use["card"], *merged.giver((kind, "card")))
    return LayerUse(layer, _exposures(merged, use.get("exposures", ()), (kind, "exposures"), data.get("matrix")))


def _room(merged: Merged, sources: Any) -> tuple[RoomSource, ...] | None:
    """The room's lights; None where the plan does not say, none at all where it is dark."""
    if sources is None:
        return None
    known = [row["id"] for row in shipped.table("room-lights")["rows"]]
    for index, light in enumerate(sources):
        what, path = light["what"], ("room", "sources", index, "what")
        if what not in known and (near := nearest(what, known)) is not None:
            _refuse(merged, "light-unknown-near", path, what=what, near=near)
        if what not in known:
            _refuse(merged, "light-unknown", path, what=what, known=", ".join(known))
    return tuple(RoomSource(light["what"], float(light["illuminance_lx"]), light["filter"]) for light in sources)


def _exposures(merged: Merged, entries: Any, path: Path, matrix: str | None) -> tuple[Exposure, ...]:
    return tuple(_exposure(merged, entry, (*path, index), matrix) for index, entry in enumerate(entries))


def _exposure(merged: Merged, data: Mapping[str, Any], path: Path, matrix: str | None) -> Exposure:
    from_side = data["from"] == "side"
    distance_mm = _number(data, "tip_distance_mm")
    if from_side and distance_mm is None:
        _refuse(merged, "side-distance", path)
    return Exposure(
        time_s=float(data["time_s"]),
        tilt_deg=float(data["tilt_deg"]),
        aim_offset_mm=float(data["aim_offset_mm"]),
        from_side=from_side,
        tip_distance_mm=distance_mm,
        through_share=_through_share(data["through"], matrix if from_side else _OFF),
        rest_before_s=_number(data, "rest_before_s"),
        fields=data,
    )


def _through_share(layers: Sequence[Mapping[str, Any]], matrix: str | None) -> float | None:
    """What passes all that lies before the paste; None where it is not known.

    Metal at the side passes nothing. Else a side has a wall of tooth, a strip or a gum before it, so that a plan which
    names nothing there leaves it open.
    """
    if matrix == "metal":
        return 0.0
    known = [float(layer["transmittance_share"]) for layer in layers if "transmittance_share" in layer]
    if len(known) < len(layers) or (not layers and matrix != _OFF):
        return None
    return math.prod(known)


def _number(data: Mapping[str, Any], key: str) -> float | None:
    return None if data.get(key) is None else float(data[key])
