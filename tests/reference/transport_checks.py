"""Transport against adding-doubling at 16 points, discrete ordinates, Monte Carlo and printed tables."""

import csv
from collections.abc import Iterator
from functools import cache, partial
from pathlib import Path
from typing import Final

from farside.physics.light.layers import delta_scaled, layer
from farside.physics.light.streams import streams
from farside.physics.light.transport import Slab, half_space_fluence, slab, slab_fluence
from reference.checks import Check, Figure, Group, Point

DATA: Final = Path(__file__).parent / "data"
OPTICS: Final = ("absorption_per_mm", "reduced_scattering_per_mm", "refractive_index", "anisotropy")
BAND_NODES: Final = (0.21132486540518713, 0.7886751345948129)  # Gauss's two, over a Monte Carlo bin


def rows(name: str) -> Iterator[dict[str, float]]:
    """The rows of a data file; an empty cell is left out."""
    with (DATA / name).open(encoding="utf-8") as file:
        for row in csv.DictReader(file):
            yield {key: float(cell) for key, cell in row.items() if cell}


def slab_of(row: dict[str, float]) -> Slab:
    """Our slab for a row of `slabs.csv`."""
    return _slab(row["thickness_mm"], *(row[name] for name in OPTICS))


_slab = cache(slab)


def _slabs() -> Iterator[Check]:
    for row in rows("slabs.csv"):
        name = "-".join(f"{row[key]:g}" for key in ("refractive_index", "anisotropy", *OPTICS[:2], "thickness_mm"))
        says = "slab in air: index {}, g {}, absorption {} and reduced scattering {} per mm, {} mm thick".format(
            *name.split("-")
        )
        bands: tuple[tuple[str, float, str], ...] = (
            ("transmittance", 0.03, "relative"),
            ("reflectance", 0.01, "absolute"),
            ("diffuse_transmittance", 0.03, "relative"),
            ("diffuse_reflectance", 0.01, "absolute"),
        )
        for what, band, band_is in bands:
            yield Check(
                id=f"slab-{what.replace('_', '-')}-{name}",
                topic="transport",
                group=f"slab-{what.replace('_', '-')}",
                point=Point(f"slab-{what}", f"index {row['refractive_index']:g}, g {row['anisotropy']:g}", row[what])
                if what in ("transmittance", "reflectance")
                else None,
                source="iadpython 0.5.3, 16 points",
                says=f"{what}, {says}",
                published=row[what],
                unit="",
                band=band,
                band_is=band_is,  # type: ignore[arg-type]
                computed=partial(_share, row, what),
            )


def _share(row: dict[str, float], what: str) -> float:
    return float(getattr(slab_of(row), what))


def _matched_fluence() -> Iterator[Check]:
    for row in rows("fluence_matched.csv"):
        optics = [row[name] for name in OPTICS]
        yield Check(
            id="fluence-matched-"
            + "-".join(f"{value:g}" for value in (*optics[:2], row["thickness_mm"], row["depth_mm"])),
            topic="transport",
            group="fluence-matched",
            source="PythonicDISORT 1.8, 64 streams",
            says=f"fluence over irradiance at {row['depth_mm']:g} mm in a slab of {row['thickness_mm']:g} mm, index 1",
            published=row["fluence"],
            unit="",
            band=0.02,
            computed=partial(_fluence, row["depth_mm"], row["thickness_mm"], *optics),
        )


def _fluence(depth_mm: float, thickness_mm: float, *optics: float) -> float:
    return slab_fluence((depth_mm,), thickness_mm, *optics)[0]


def _stepped_fluence() -> Iterator[Check]:
    for row in rows("fluence_stepped.csv"):
        thickness = row.get("thickness_mm")
        where = "a half-space" if thickness is None else f"a slab of {thickness:g} mm"
        optics = (row["absorption_per_mm"], row["reduced_scattering_per_mm"])
        ends = (row["from_mm"], row["to_mm"])
        yield Check(
            id="fluence-stepped-" + "-".join(f"{value:g}" for value in (*optics, thickness or 0.0, ends[0])),
            topic="transport",
            group="fluence-stepped",
            point=Point("fluence-stepped", _series(optics, thickness), sum(ends) / 2.0),
            source="Monte Carlo of our own, 1.6 million photons",
            says=f"fluence over irradiance from {ends[0]:g} to {ends[1]:g} mm in {where}, index 1.5",
            published=row["fluence"],
            unit="",
            band=0.02,
            computed=partial(_mean_fluence, ends, thickness, *optics),
        )


def _series(optics: tuple[float, float], thickness_mm: float | None) -> str:
    where = "half-space" if thickness_mm is None else f"slab of {thickness_mm:g} mm"
    return f"{where}, absorption {optics[0]:g}, scattering {optics[1]:g} per mm"


def _mean_fluence(ends: tuple[float, float], thickness_mm: float | None, *optics: float) -> float:
    depths = [ends[0] + (ends[1] - ends[0]) * node for node in BAND_NODES]
    if thickness_mm is not None:
        return sum(slab_fluence(depths, thickness_mm, *optics)) / 2.0
    return sum(half_space_fluence(*optics, step_mm=depth, count=2)[1] for depth in depths) / 2.0


def reflection_function(albedo: float, depth: float, cosine: float) -> float:
    """Reflection function R(cosine, 1) of an isotropically scattering layer without surfaces.

    Read between our streams by the polynomial through all six.
    """
    along = streams(1.0)
    made = layer(depth, delta_scaled(1.0 - albedo, albedo, 0.0), along)
    values = [row[-1] / (2.0 * along.cosines[-1] * along.weights[-1]) for row in made.reflect]
    whole = 0.0
    for place, (node, value) in enumerate(zip(along.cosines, values, strict=True)):
        for other, beside in enumerate(along.cosines):
            if other != place:
                value *= (cosine - beside) / (node - beside)
        whole += value
    return whole


def _depth_slab(albedo: float, depth: float, anisotropy: float, index: float) -> Slab:
    return slab(depth, 1.0 - albedo, albedo * (1.0 - anisotropy), index, anisotropy)


GROUPS: Final = (
    Group("slab-transmittance", "Share of a beam that passes a slab in air"),
    Group("slab-reflectance", "Share of a beam that a slab in air throws back"),
    Group("slab-diffuse-transmittance", "Share of diffuse light that passes a slab in air"),
    Group("slab-diffuse-reflectance", "Share of diffuse light that a slab in air throws back"),
    Group("fluence-matched", "Fluence rate over irradiance inside slabs of index 1"),
    Group("fluence-stepped", "Fluence rate over irradiance inside slabs and half-spaces of index 1.5"),
)
FIGURES: Final = (
    Figure("slab-transmittance", "Slabs: transmittance", "16-point reference", "Farside", log_x=True, log_y=True),
    Figure("slab-reflectance", "Slabs: reflectance", "16-point reference", "Farside"),
    Figure("fluence-stepped", "Light inside a paste", "Depth, mm", "Fluence rate over irradiance", log_y=True),
)
CHECKS: Final = (
    *_slabs(),
    *_matched_fluence(),
    *_stepped_fluence(),
    Check(
        id="reflection-function",
        topic="transport",
        source="van-de-hulst-1980",
        says="table 12: albedo 0.8, depth 2, isotropic: R(0.5, 1) = 0.28616",
        published=0.28616,
        unit="",
        band=0.005,
        how_sure="seen",
        computed=lambda: reflection_function(0.8, 2.0, 0.5),
    ),
    Check(
        id="forward-layer-reflectance",
        topic="transport",
        source="van-de-hulst-1980",
        says="albedo 0.9, depth 2, g 0.75, no surface: reflectance 0.0974",
        published=0.0974,
        unit="",
        band=0.01,
        band_is="absolute",
        how_sure="from memory",
        computed=lambda: _depth_slab(0.9, 2.0, 0.75, 1.0).reflectance,
    ),
    Check(
        id="forward-layer-transmittance",
        topic="transport",
        source="van-de-hulst-1980",
        says="albedo 0.9, depth 2, g 0.75, no surface: transmittance 0.6610",
        published=0.6610,
        unit="",
        band=0.03,
        how_sure="from memory",
        computed=lambda: _depth_slab(0.9, 2.0, 0.75, 1.0).transmittance,
    ),
    Check(
        id="half-space-reflectance",
        topic="transport",
        source="giovanelli-1955",
        says="half-space, albedo 0.9, isotropic, index 1.5: reflectance 0.2600",
        published=0.2600,
        unit="",
        band=0.01,
        band_is="absolute",
        how_sure="from memory",
        computed=lambda: _depth_slab(0.9, 60.0, 0.0, 1.5).reflectance,
    ),
)
