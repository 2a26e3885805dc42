"""Every value of the physics' tables has its source beside it."""

from pathlib import Path
from typing import Any

import pytest
import yaml
from reference.tables import TABLES

NAMES = ("initiators", "pastes", "tissues", "room-lights", "hazard-weights")
WORDS = {"id", "title", "cie", "note", "sources"}


def load(path: Path) -> dict[str, Any]:
    with path.open(encoding="utf-8") as file:
        data: dict[str, Any] = yaml.safe_load(file)
    return data


@pytest.mark.parametrize("name", NAMES)
def test_every_value_has_its_source(name: str) -> None:
    data = load(TABLES / f"{name}.yaml")
    shared = set(data.get("sources", {}))
    for row in data["rows"]:
        sourced = shared | set(row.get("sources", {}))
        values = set(row) - WORDS
        assert values
        if "all" not in sourced and "wavelength_nm" not in row:
            assert values == sourced, row["id"]


@pytest.mark.parametrize("name", NAMES)
def test_every_column_says_what_it_is(name: str) -> None:
    data = load(TABLES / f"{name}.yaml")
    for row in data["rows"]:
        assert set(row) - (WORDS - {"cie"}) <= set(data["columns"])


def test_hazard_weights_rise_in_wavelength() -> None:
    wavelengths = [row["wavelength_nm"] for row in load(TABLES / "hazard-weights.yaml")["rows"]]
    assert wavelengths == sorted(set(wavelengths))
