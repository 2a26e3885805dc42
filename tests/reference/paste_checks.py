"""The usual pastes and the tooth against what was measured on real ones: order of magnitude, not proof."""

import math
from functools import partial
from typing import Final

from farside.physics.light.bands import band_nodes
from farside.physics.light.paste import absorption_at, scattering_at
from farside.physics.light.transport import slab
from reference import tables
from reference.checks import Check, Figure, Group

CAMPHORQUINONE: Final = ("camphorquinone", 0.005)
THICKNESSES_MM: Final = tuple(step / 10.0 for step in range(1, 41, 3))


def passed(group: str, thickness_mm: float, peak_nm: float, width_nm: float) -> float:
    """Share of a band that leaves the far side of a slab of a usual paste in air."""
    paste = tables.usual_paste(group, CAMPHORQUINONE)
    return sum(
        share * slab(thickness_mm, absorption_at(paste, nm), scattering_at(paste, nm)).transmittance
        for nm, share in band_nodes(peak_nm, width_nm, 1.0)
    )


def violet_over_blue_per_mm() -> float:
    """How much more a medium paste attenuates violet than blue, through 4 mm."""
    return math.log(passed("medium", 4.0, 460.0, 20.0) / passed("medium", 4.0, 405.0, 20.0)) / 4.0


def straightness() -> float:
    """r² of the logarithm of the transmittance against thickness, 0.1 to 4 mm."""
    logs = [math.log(passed("medium", thickness, 455.0, 22.0)) for thickness in THICKNESSES_MM]
    middle, mean = sum(THICKNESSES_MM) / len(logs), sum(logs) / len(logs)
    across = sum((x - middle) * (y - mean) for x, y in zip(THICKNESSES_MM, logs, strict=True))
    spread = sum((x - middle) ** 2 for x in THICKNESSES_MM)
    return across**2 / (spread * sum((y - mean) ** 2 for y in logs))


def apparent_per_mm(group: str, thickness_mm: float) -> float:
    """Attenuation that a transmittance seems to say when the surface's loss is counted in."""
    return -math.log(passed(group, thickness_mm, 460.0, 20.0)) / thickness_mm


GROUPS: Final[tuple[Group, ...]] = ()
FIGURES: Final[tuple[Figure, ...]] = ()
CHECKS: Final = (
    Check(
        id="violet-against-blue",
        topic="paste",
        source="harlow-2016",
        says="violet attenuated 0.43 to 0.68 per mm more than blue over 4 mm",
        published=0.555,
        unit="1/mm",
        band=0.02,
        kind="set-by",
        sets=("own_absorption.slope",),
        how_sure="seen",
        computed=violet_over_blue_per_mm,
    ),
    Check(
        id="decay-looks-exponential",
        topic="paste",
        source="harlow-2016",
        says="from 0.1 to 4 mm the decay fits an exponential with an r² above 0.98",
        published=0.99,
        unit="",
        band=0.01,
        band_is="absolute",
        how_sure="seen",
        computed=straightness,
    ),
    Check(
        id="apparent-attenuation-2-mm",
        topic="paste",
        source="oper-dent-2018-e19",
        says="conventional composites, 2 and 4 mm: apparently 0.90 to 1.24 per mm; the usual medium paste, 2 mm",
        published=1.07,
        unit="1/mm",
        band=0.17,
        band_is="absolute",
        kind="plausibility",
        note="The shades of the source are not known here.",
        how_sure="seen",
        computed=partial(apparent_per_mm, "medium", 2.0),
    ),
    Check(
        id="tooth-attenuation",
        topic="tooth",
        source="uusitalo-2016",
        says="37.6 and 6.2 mW/cm² behind 5.6 and 8.2 mm of whole tooth",
        published=math.log(37.6 / 6.2) / (8.2 - 5.6),
        unit="1/mm",
        band=0.01,
        kind="set-by",
        sets=("tooth.attenuation_per_mm",),
        how_sure="seen",
        computed=lambda: float(tables.row("tissues", "tooth")["attenuation_per_mm"]),
    ),
)
