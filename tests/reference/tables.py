"""The shipped tables as the checks read them: rows by id."""

from functools import cache
from pathlib import Path
from typing import Any, Final

import yaml
from farside.physics.light.initiators import Initiator, concentration_mol_l
from farside.physics.light.paste import Parts, Paste, own_absorption

TABLES: Final = Path(__file__).parents[2] / "rules" / "tables"
_INITIATOR_VALUES: Final = (
    "molar_mass_g_mol",
    "quantum_yield",
    "peak_nm",
    "peak_molar_absorption",
    "half_width_blue_nm",
    "half_width_red_nm",
)


@cache
def table(name: str) -> list[dict[str, Any]]:
    """Rows of a table, in its order."""
    with (TABLES / f"{name}.yaml").open(encoding="utf-8") as file:
        rows: list[dict[str, Any]] = yaml.safe_load(file)["rows"]
    return rows


def row(name: str, key: str) -> dict[str, Any]:
    """One row by its id."""
    return next(entry for entry in table(name) if entry["id"] == key)


def initiator(name: str) -> Initiator:
    """One initiator of the table."""
    found = row("initiators", name)
    return Initiator(name, *(float(found[value]) for value in _INITIATOR_VALUES))


def usual_paste(group: str, *amounts: tuple[str, float]) -> Paste:
    """A usual paste of the table, its resin 0.22, with initiators by their share of the resin."""
    optics = row("pastes", group)
    parts: Parts = tuple(
        (initiator(name), concentration_mol_l(share, 0.22, initiator(name).molar_mass_g_mol)) for name, share in amounts
    )
    own = own_absorption(optics["absorption_per_mm"], optics["at_nm"], parts)
    return Paste(max(own, 0.0), optics["reduced_scattering_per_mm"], optics["at_nm"], 1.5, parts)


def hazard_weights() -> tuple[tuple[float, float], ...]:
    """Blue-light hazard weights by wavelength."""
    return tuple((float(entry["wavelength_nm"]), float(entry["weight"])) for entry in table("hazard-weights"))
