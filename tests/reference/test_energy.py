"""Light is neither made nor lost: what a slab reflects, passes and absorbs is what fell on it."""

import csv
from itertools import pairwise

import pytest
from farside.physics.light.transport import slab_fluence
from reference.transport_checks import DATA, OPTICS, rows, slab_of

# Gauss's five points on 0 to 1.
POINTS = (0.046910077030668, 0.2307653449471585, 0.5, 0.7692346550528415, 0.953089922969332)
WEIGHTS = (0.11846344252809454, 0.23931433524968324, 0.28444444444444444, 0.23931433524968324, 0.11846344252809454)


def absorbed_share(row: dict[str, float]) -> float:
    """Absorption times fluence over the depth, in panels that grow away from the lit face."""
    thickness = row["thickness_mm"]
    shares = (0.0, 0.03, 0.3, 1.0)
    depths = [thickness * (low + (high - low) * point) for low, high in pairwise(shares) for point in POINTS]
    lengths = [thickness * (high - low) * weight for low, high in pairwise(shares) for weight in WEIGHTS]
    fluence = slab_fluence(depths, thickness, *(row[name] for name in OPTICS))
    return row["absorption_per_mm"] * sum(length * share for length, share in zip(lengths, fluence, strict=True))


@pytest.mark.parametrize(
    "row", list(rows("slabs.csv")), ids=lambda row: "-".join(f"{value:g}" for value in row.values())
)
def test_energy_is_kept(row: dict[str, float]) -> None:
    made = slab_of(row)
    assert made.reflectance + made.transmittance + absorbed_share(row) == pytest.approx(1.0, abs=1e-4)


def test_grid_is_as_wide_as_promised() -> None:
    with (DATA / "slabs.csv").open(encoding="utf-8") as file:
        grid = list(csv.DictReader(file))
    assert len(grid) >= 60
    assert {row["refractive_index"] for row in grid} >= {"1.0", "1.5"}
    assert min(float(row["transmittance"]) for row in grid) < 2e-5
