"""Light off the axis and deep in a paste against a 3-D Monte Carlo of our own."""

import csv
from collections.abc import Iterator
from functools import partial
from pathlib import Path
from typing import Final

from farside.physics.light.beam import on_axis_share
from farside.physics.light.edge import smoothing_length_mm
from farside.trace.aim import wall_share
from reference.checks import Check, Figure, Group, Point

DATA: Final = Path(__file__).parent / "data" / "edge.csv"
SOURCE: Final = "Monte Carlo of our own, 600 000 photons"
BAND: Final = 0.15
NOTE: Final = (
    "Each paste has one smoothing length for all depths, too long near the surface and too short deep down: from 4 mm "
    "too much light is counted beside the axis, the unsafe side."
)
NOTE_FACTOR: Final = "The smoothing length's factor was chosen by an earlier Monte Carlo, not by these figures."
NOTE_MIDDLE: Final = (
    "The middle's dose is that of an endless beam; what the rim takes from it is not counted. The need is worked out "
    "in the same way, so it is unsafe only where a plan is deeper, or its beam narrower, than its maker's."
)
RULES: Final = ("edge-dose",)
MISSES: Final = {
    "edge-touching-0.1-0.5-1-0-6-3": -0.0707,
    "edge-touching-0.1-0.5-1-0-8-2": -0.1206,
    "edge-middle-0.1-0.5-1-2-8-0": 0.1956,
    "edge-middle-0.1-0.5-1-4-8-0": 0.2053,
    "edge-middle-0.1-0.5-1-8-8-0": 0.1459,
    "edge-middle-0.1-0.5-2-2-8-0": 0.2608,
    "edge-middle-0.1-0.5-2-4-8-0": 0.2732,
    "edge-middle-0.1-0.5-2-8-8-0": 0.1947,
    "edge-touching-0.1-0.5-4-0-6-1.5": 0.1915,
    "edge-touching-0.1-0.5-4-0-6-3": 0.057,
    "edge-touching-0.1-0.5-4-0-8-2": 0.1125,
    "edge-touching-0.1-0.5-4-0-8-4": 0.0542,
    "edge-middle-0.1-0.5-4-2-8-0": 0.4139,
    "edge-inside-0.1-0.5-4-2-8-2": 0.1256,
    "edge-middle-0.1-0.5-4-4-8-0": 0.4192,
    "edge-inside-0.1-0.5-4-4-8-2": 0.1085,
    "edge-middle-0.1-0.5-4-8-8-0": 0.3011,
    "edge-middle-0.2-1-2-2-8-0": 0.1369,
    "edge-middle-0.2-1-2-4-8-0": 0.1639,
    "edge-touching-0.2-1-4-0-6-1.5": 0.2349,
    "edge-touching-0.2-1-4-0-6-3": 0.0754,
    "edge-touching-0.2-1-4-0-8-2": 0.2229,
    "edge-middle-0.2-1-4-2-8-0": 0.2638,
    "edge-inside-0.2-1-4-2-8-2": 0.176,
    "edge-middle-0.2-1-4-4-8-0": 0.2857,
    "edge-inside-0.2-1-4-4-8-2": 0.1446,
    "edge-middle-0.2-1-4-8-8-0": 0.1946,
    "edge-touching-0.4-2-4-0-6-1.5": 0.234,
    "edge-touching-0.4-2-4-0-6-3": 0.0919,
    "edge-touching-0.4-2-4-0-8-2": 0.14,
    "edge-touching-0.4-2-4-0-8-4": 0.064,
    "edge-inside-0.4-2-4-2-8-2": 0.1431,
    "edge-middle-0.4-2-4-4-8-0": 0.1611,
    "edge-inside-0.4-2-4-4-8-2": 0.1164,
}
"""What is counted too much where the model lies outside its band, by the check's id."""
Row = dict[str, float]


def rows() -> Iterator[Row]:
    """The rows of the Monte Carlo's file."""
    with DATA.open(encoding="utf-8") as file:
        for row in csv.DictReader(file):
            yield {key: float(cell) for key, cell in row.items()}


def beside_axis(row: Row) -> float:
    """Our share of the endless beam's light at a row's place: the smoothed beam over its irradiance on the axis."""
    tip = (row["tip_diameter_mm"], row["spread_exponent"])
    length_mm = smoothing_length_mm(row["absorption_per_mm"], row["reduced_scattering_per_mm"])
    smoothed = wall_share(row["tip_distance_mm"], row["offset_mm"], 0.0, *tip, length_mm)
    return smoothed / on_axis_share(row["tip_distance_mm"], *tip)


def beam_of(row: Row) -> str:
    """A row's beam in words."""
    if row["tip_distance_mm"] == 0.0:
        return f"an even disc {row['tip_diameter_mm']:g} mm wide"
    return f"an 8 mm tip {row['tip_distance_mm']:g} mm off, spread exponent {row['spread_exponent']:g}"


def group_of(row: Row) -> str | None:
    """Group that a row belongs to; None for the middle of a touching tip, which the model takes as the tip's own."""
    touching = row["tip_distance_mm"] == 0.0
    if row["offset_mm"] == 0.0:
        return None if touching else "edge-middle"
    if touching:
        return "edge-touching"
    return "edge-rim" if row["offset_mm"] == row["tip_diameter_mm"] / 2.0 else "edge-inside"


def _checks() -> Iterator[Check]:
    for row in rows():
        group = group_of(row)
        if group is None:
            continue
        optics = row["absorption_per_mm"], row["reduced_scattering_per_mm"]
        numbers = (*optics, row["depth_mm"], row["tip_distance_mm"], row["tip_diameter_mm"], row["offset_mm"])
        name = f"{group}-" + "-".join(f"{number:g}" for number in numbers)
        misses_by, middle = MISSES.get(name), group == "edge-middle"
        yield Check(
            id=name,
            topic="transport",
            source=SOURCE,
            says=f"light {row['depth_mm']:g} mm deep and {row['offset_mm']:g} mm off the axis over an endless beam's: "
            f"{beam_of(row)}; absorption {optics[0]:g} and scattering {optics[1]:g} per mm",
            published=row["share"],
            unit="",
            band=BAND,
            kind="miss" if misses_by is not None else "plausibility" if middle else "counted",
            misses_by=misses_by,
            note=NOTE_MIDDLE if middle else NOTE if misses_by is not None else NOTE_FACTOR,
            rules=("far-side-dose", "first-increment-deep") if middle else RULES,
            group=group if misses_by is None else f"{group}-missed",
            computed=(lambda: 1.0) if middle else partial(beside_axis, row),
            point=Point("edge", f"{group.removeprefix('edge-')}, {beam_of(row)}", row["share"]),
        )


GROUPS: Final = (
    Group("edge-rim", "Light 1 to 4 mm deep at a wall under the rim of an 8 mm tip that is 2 to 8 mm off"),
    Group("edge-inside", "Light 1 to 4 mm deep at a wall 2 mm off the axis of an 8 mm tip that is 2 to 8 mm off"),
    Group("edge-inside-missed", "Light at a wall 2 mm off the axis, where it misses: 4 mm deep, the tip 2 to 4 mm off"),
    Group("edge-touching", "Light 1 to 4 mm deep off the axis of a tip of 6 or 8 mm that touches the paste"),
    Group(
        "edge-touching-missed",
        "Light off the axis of a tip that touches, where it misses: mostly 4 mm deep, and 1 mm in a clear paste",
    ),
    Group(
        "edge-middle", "Light 1 to 4 mm deep on the axis of an 8 mm tip 2 to 8 mm off, taken as that of an endless beam"
    ),
    Group(
        "edge-middle-missed",
        "Light on the axis taken as an endless beam's, where it misses: the deeper and the clearer, the more",
    ),
)
FIGURES: Final = (Figure("edge", "Light off the axis, deep in a paste", "Monte Carlo", "Farside"),)
CHECKS: Final = tuple(_checks())
