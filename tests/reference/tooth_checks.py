"""What a tooth lets through, against what was measured behind whole teeth and behind a millimetre of its tissues."""

import math
from typing import Final

from farside.physics.light.transport import slab
from reference import tables
from reference.checks import Check, Figure, Group, Point

UNSCATTERED: Final = 1e-6
"""Reduced scattering that stands for none: the table gives the tooth's fall with depth as a whole. [1/mm]"""
RULES: Final = ("through-overlay",)


def passed(thickness_mm: float) -> float:
    """Share of a beam that leaves the far side of some tooth in air, by the table's fall with depth."""
    return slab(thickness_mm, float(tables.row("tissues", "tooth")["attenuation_per_mm"]), UNSCATTERED).transmittance


def fall_per_mm(near_mm: float, far_mm: float) -> float:
    """Fall of the light between two thicknesses, to base e."""
    return math.log(passed(near_mm) / passed(far_mm)) / (far_mm - near_mm)


def _millimetre(tissue: str, published: float, misses_by: float) -> Check:
    return Check(
        id=f"tooth-millimetre-of-{tissue}",
        topic="tooth",
        source="uusitalo-2016",
        says=f"{published:.1%} of a lamp's light pass 1 mm of moist {tissue}".replace("%", " %"),
        published=published,
        unit="",
        band=0.15,
        kind="miss",
        misses_by=misses_by,
        note="One fall with depth for the whole tooth, set behind 5 mm and more, leaves out the light that is "
        "thrown back at once: too much passes a thin layer. The figure as measured stands in the table of tissues; no "
        "quantity computes with either yet.",
        rules=RULES,
        how_sure="seen",
        computed=lambda: passed(1.0),
        point=Point("tooth", tissue, 1.0),
    )


GROUPS: Final[tuple[Group, ...]] = ()
FIGURES: Final = (Figure("tooth", "Light through tooth", "Thickness, mm", "Share that passes", log_y=True),)
CHECKS: Final = (
    Check(
        id="tooth-attenuation",
        topic="tooth",
        source="uusitalo-2016",
        says="37.6 and 6.2 mW/cm² behind 5.6 and 8.2 mm of whole tooth",
        published=math.log(37.6 / 6.2) / (8.2 - 5.6),
        unit="1/mm",
        band=0.01,
        kind="set-by",
        sets=("tissues: tooth.attenuation_per_mm",),
        rules=RULES,
        how_sure="seen",
        computed=lambda: fall_per_mm(5.6, 8.2),
    ),
    _millimetre("enamel", 0.268, 0.194),
    _millimetre("dentine", 0.213, 0.249),
)
