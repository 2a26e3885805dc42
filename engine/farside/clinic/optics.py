"""A composite card's initiators and optics resolved to a paste, what is silent filled by assumptions."""

from collections.abc import Mapping
from functools import cache, lru_cache
from typing import Any

from farside import shipped
from farside.clinic.assumed import assumption
from farside.clinic.provenance import Provenance, provenance, worst
from farside.clinic.reading import refuse
from farside.physics.light.initiators import Initiator, concentration_mol_l
from farside.physics.light.paste import Paste, absorption_from_transmittance, own_absorption
from farside.reading.document import Document

Parts = tuple[tuple[Initiator, float], ...]


@cache
def known_initiators() -> dict[str, Initiator]:
    """The initiators of the shipped table by name."""
    return {
        row["id"]: Initiator(
            name=row["id"],
            molar_mass_g_mol=float(row["molar_mass_g_mol"]),
            quantum_yield=float(row["quantum_yield"]),
            peak_nm=float(row["peak_nm"]),
            peak_molar_absorption=float(row["peak_molar_absorption"]),
            half_width_blue_nm=float(row["half_width_blue_nm"]),
            half_width_red_nm=float(row["half_width_red_nm"]),
        )
        for row in shipped.table("initiators")["rows"]
    }


def initiator_parts(document: Document, data: Mapping[str, Any]) -> tuple[Parts, Provenance, Provenance]:
    """The initiators of a composite with their concentrations, and where they and the resin share came from.

    Raises
    ------
    Refused
        When the card names an initiator that no table knows.
    """
    known = known_initiators()
    resin = data.get("resin_weight_share")
    resin_share = assumption("resin-weight-share") if resin is None else float(resin)
    resin_from: Provenance = "assumed" if resin is None else "measured"
    entries = data.get("initiators")
    if not entries:
        standard = known["camphorquinone"]
        weight = assumption("camphorquinone-weight-share")
        return ((standard, concentration_mol_l(weight, resin_share, standard.molar_mass_g_mol)),), "assumed", resin_from
    for index, entry in enumerate(entries):
        if entry["what"] not in known:
            path = ("initiators", index, "what")
            refuse(document, "initiator-unknown", path, what=entry["what"], known=", ".join(sorted(known)))
    parts = tuple(
        (
            known[entry["what"]],
            concentration_mol_l(
                float(entry["weight_share_of_resin"]), resin_share, known[entry["what"]].molar_mass_g_mol
            ),
        )
        for entry in entries
    )
    return parts, worst(provenance(entry["provenance"]) for entry in entries), resin_from


def resolved_paste(
    document: Document, data: Mapping[str, Any], parts: Parts, *, initiators_assumed: bool
) -> tuple[Paste, Provenance]:
    """A composite's paste, and where its optics came from.

    A transmittance is turned into absorption with the card's scattering, else the usual one of its shade. With assumed
    optics the paste's own absorption is at least 0; where the amount of initiator is assumed, theirs is at most the
    total.

    Raises
    ------
    Refused
        When the initiators on the card absorb more than its measured total, or no paste has its transmittance.
    """
    usual = usual_optics(data["shade"])
    optics: Mapping[str, Any] = data.get("optics") or {**usual, "provenance": "assumed"}
    at_nm = float(optics.get("at_nm", usual["at_nm"]))
    index = float(optics.get("refractive_index", assumption("refractive-index")))
    scattering = float(optics.get("reduced_scattering_per_mm", usual["reduced_scattering_per_mm"]))
    if "transmittance_share" in optics:
        total = _inverted(document, optics, scattering, index)
    else:
        total = float(optics["absorption_per_mm"])
    own = own_absorption(total, at_nm, parts)
    origin = provenance(optics["provenance"])
    if own < 0.0:
        initiators = total - own
        if origin != "assumed" and not initiators_assumed:
            refuse(
                document,
                "initiators-absorb-more",
                ("optics",),
                initiators=f"{initiators:.3g}",
                at_nm=f"{at_nm:g}",
                total=f"{total:.3g}",
            )
        if origin != "assumed":
            parts = tuple((initiator, concentration * total / initiators) for initiator, concentration in parts)
    return Paste(max(0.0, own), scattering, at_nm, index, parts), origin


def usual_optics(shade: Mapping[str, Any]) -> Mapping[str, Any]:
    """The row of the shipped table of pastes that a shade falls under: opaque before its group."""
    group = "opaque" if shade.get("translucency") == "opaque" else shade["group"]
    found: Mapping[str, Any] = next(row for row in shipped.table("pastes")["rows"] if row["id"] == group)
    return found


def _inverted(document: Document, optics: Mapping[str, Any], scattering: float, index: float) -> float:
    share, at_mm = float(optics["transmittance_share"]), float(optics["at_mm"])
    try:
        return _absorption(share, at_mm, scattering, index)
    except ValueError:
        path = ("optics", "transmittance_share")
        refuse(document, "transmittance-impossible", path, share=f"{share:g}", at_mm=f"{at_mm:g}")


@lru_cache(maxsize=64)
def _absorption(share: float, at_mm: float, scattering: float, index: float) -> float:
    """Kept, since it takes several slabs and a card is read again whenever one beside it changes."""
    return absorption_from_transmittance(share, at_mm, scattering, index)
