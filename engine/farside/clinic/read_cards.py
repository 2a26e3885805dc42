"""Lamp, composite, adhesive and liner documents to records, with what only a domain can refuse."""

from collections.abc import Mapping
from typing import Any, Final

from farside.clinic.assumed import assumption
from farside.clinic.lamp import Band, Beam, Lamp, Mode, Reading
from farside.clinic.materials import Ambient, Composite, Layer, MakerRow
from farside.clinic.optics import initiator_parts, resolved_paste
from farside.clinic.provenance import provenance
from farside.clinic.reading import checked, day, filled, refuse
from farside.physics.light.beam import fitted_spread_exponent
from farside.reading.document import Document

_SHARES_WITHIN: Final = 0.02


def read_lamp(document: Document) -> Lamp:
    """A lamp card as a record.

    Raises
    ------
    Refused
        When the card does not keep to its schema, two modes share a name, a mode's bands do not add up to its light,
        or its beam readings fit no beam.
    """
    data = filled(checked(document).data, "lamp")
    seen: set[str] = set()
    for index, mode in enumerate(data["modes"]):
        if mode["id"] in seen:
            refuse(document, "mode-twice", ("modes", index, "id"), mode=mode["id"])
        seen.add(mode["id"])
        total = sum(band["share"] for band in mode["bands"])
        if abs(total - 1.0) > _SHARES_WITHIN:
            refuse(document, "share-sum", ("modes", index, "bands"), sum=f"{total:g}")
    beam = _beam(document, data)
    fields = {**data, "beam": {**data.get("beam", {}), "provenance": beam.provenance}}
    return Lamp(
        id=data["id"],
        title=data["title"],
        tip_diameter_mm=float(data["tip_diameter_mm"]),
        beam=beam,
        stated_exitance_mw_cm2=data.get("stated_exitance_mw_cm2"),
        tip_checked_on=day(data.get("tip", {}).get("checked_on")),
        modes=tuple(_mode(mode) for mode in data["modes"]),
        readings=tuple(_reading(entry) for entry in data.get("readings", ())),
        fields=fields,
    )


def read_composite(document: Document) -> Composite:
    """A composite card as a record, its optics resolved.

    Raises
    ------
    Refused
        When the card does not keep to its schema, names an initiator that no table knows, gives a transmittance that
        no paste has, or initiators that absorb more than its measured total.
    """
    data = filled(checked(document).data, "composite")
    parts, initiators_from, resin_from = initiator_parts(document, data)
    amount_assumed = "assumed" in {initiators_from, resin_from}
    paste, optics_from = resolved_paste(document, data, parts, initiators_assumed=amount_assumed)
    fields = {**data, "optics": {**data.get("optics", {}), "provenance": optics_from}}
    ambient = data.get("ambient")
    return Composite(
        id=data["id"],
        title=data["title"],
        rows=_rows(data),
        paste=paste,
        optics_provenance=optics_from,
        initiators_provenance=initiators_from,
        resin_provenance=resin_from,
        ambient=ambient and Ambient(ambient["illuminance_lx"], ambient["time_s"], provenance(ambient["provenance"])),
        expires=day(data.get("expires")),
        fields=fields,
    )


def read_layer(document: Document) -> Layer:
    """An adhesive or liner card as a record.

    Raises
    ------
    Refused
        When the card does not keep to its schema.
    """
    data = filled(checked(document).data, document.data["kind"])
    return Layer(
        id=data["id"],
        title=data["title"],
        rows=_rows(data),
        cure=data.get("cure"),
        expires=day(data.get("expires")),
        fields=data,
    )


def _beam(document: Document, data: Mapping[str, Any]) -> Beam:
    beam = data.get("beam")
    if beam is None:
        return Beam(assumption("spread-exponent"), "assumed")
    if "spread_exponent" in beam:
        return Beam(float(beam["spread_exponent"]), provenance(beam["provenance"]))
    distances = [float(entry["distance_mm"]) for entry in beam["readings"]]
    irradiances = [float(entry["irradiance_mw_cm2"]) for entry in beam["readings"]]
    by_distance = sorted(zip(distances, irradiances, strict=True))
    (nearest_mm, strongest), (farthest_mm, weakest) = by_distance[0], by_distance[-1]
    if nearest_mm == farthest_mm or weakest >= strongest:
        refuse(document, "beam-readings", ("beam", "readings"))
    exponent = fitted_spread_exponent(distances, irradiances, float(data["tip_diameter_mm"]))
    return Beam(exponent, provenance(beam["provenance"]))


def _mode(data: Mapping[str, Any]) -> Mode:
    bands = tuple(Band(float(b["peak_nm"]), float(b["width_nm"]), float(b["share"])) for b in data["bands"])
    return Mode(data["id"], bands, tuple(float(time_s) for time_s in data.get("times_s", ())))


def _reading(data: Mapping[str, Any]) -> Reading:
    on = day(data["on"])
    assert on is not None, "the schema requires the date"
    return Reading(on, data["mode"], float(data["radiant_exitance_mw_cm2"]), data["meter"], data["sleeve"])


def _rows(data: Mapping[str, Any]) -> tuple[MakerRow, ...]:
    return tuple(
        MakerRow(
            irradiance_mw_cm2=float(row["irradiance_mw_cm2"]),
            time_s=float(row["time_s"]),
            thickness_mm=None if row.get("thickness_mm") is None else float(row["thickness_mm"]),
            band=Band(
                peak_nm=float(row.get("peak_nm", assumption("maker-peak-nm"))),
                width_nm=float(row.get("width_nm", assumption("band-width-nm"))),
                share=1.0,
            ),
            band_assumed="peak_nm" not in row,
            provenance=provenance(row["provenance"]),
        )
        for row in data.get("maker_instructions", ())
        if "irradiance_mw_cm2" in row and "time_s" in row
    )
