"""How lamps' light falls with distance against what was measured: all lamps within the reach, and the usual one."""

from collections.abc import Iterator
from functools import partial
from typing import Final

from farside.physics.light.beam import fitted_spread_exponent, on_axis_share
from reference.checks import Check, Figure, Group, Point

TIP_MM: Final = 8.0
NARROWEST: Final = 14.0
"""Largest spread exponent of the model's reach; 0 is the least."""
USUAL: Final = 2.5
RULES: Final = ("edge-dose", "far-side-dose", "first-increment-deep", "irradiance-floor", "thin-dentine-strong-lamp")
TIP_TAKEN: Final = "The lamps' tips are taken to be 8 mm wide."
# source, distance, share left, lamp, the end of the reach that it set
MEASURED: Final = (
    ("strassler-2013", 4.0, 0.29, "the widest beam of three lamps", "0"),
    ("strassler-2013", 4.0, 0.36, "the middle one of three lamps", ""),
    ("strassler-2013", 4.0, 0.85, "the narrowest beam of three lamps", ""),
    ("meyer-2002", 10.0, 0.17, "the second LED lamp", ""),
    ("meyer-2002", 10.0, 0.32, "the first LED lamp", ""),
    ("meyer-2002", 10.0, 0.56, "a halogen lamp, tapered guide", ""),
    ("meyer-2002", 10.0, 0.58, "the third LED lamp", ""),
    ("meyer-2002", 10.0, 0.62, "a halogen lamp, straight guide", ""),
    ("meyer-2002", 10.0, 0.67, "another halogen lamp, straight guide", "14"),
)


def nearest_share(distance_mm: float, share: float) -> float:
    """What comes nearest to a share left at a distance, of all spread exponents within the reach."""
    readings = (0.0, distance_mm), (1.0, share)
    exponent = min(fitted_spread_exponent(*readings, TIP_MM), NARROWEST)
    return on_axis_share(distance_mm, TIP_MM, exponent)


def carried_share(from_mm: float, share: float, to_mm: float) -> float:
    """What a beam that is fitted to one distance leaves at another."""
    return on_axis_share(to_mm, TIP_MM, fitted_spread_exponent((0.0, from_mm), (1.0, share), TIP_MM))


def _spanned() -> Iterator[Check]:
    for source, distance, share, lamp, end in MEASURED:
        yield Check(
            id=f"spread-{distance:g}-{share * 100:g}",
            topic="beam",
            source=source,
            says=f"{share:.0%} left {distance:g} mm away: {lamp}".replace("%", " %"),
            published=share,
            unit="",
            band=0.015,
            kind="set-by" if end else "plausibility",
            sets=(f"reach of the spread exponent: {end}",) if end else (),
            note=f"Some exponent from 0 to {NARROWEST:g} has to give it. {TIP_TAKEN}",
            rules=RULES,
            how_sure="seen",
            computed=partial(nearest_share, distance, share),
            point=Point("spread", "set the reach" if end else "spanned by the reach", distance),
        )


def _mean_lamp() -> Iterator[Check]:
    for distance, lost, misses_by in ((7.0, 0.25, -0.360), (10.0, 0.34, -0.431)):
        yield Check(
            id=f"spread-usual-{distance:g}",
            topic="beam",
            source="oper-dent-2021-271",
            says=f"{lost:.0%} lost {distance:g} mm away, by a review".replace("%", " %"),
            published=1.0 - lost,
            unit="",
            band=0.15,
            kind="miss",
            misses_by=misses_by,
            note=f"The usual beam (spread exponent {USUAL:g}, taken where a card has no second reading) is wider than "
            f"the review's lamps. It counts too little light: safe for setting, not for heat. {TIP_TAKEN}",
            rules=RULES,
            how_sure="seen",
            computed=partial(on_axis_share, distance, TIP_MM, USUAL),
            point=Point("spread", "usual beam against a review", distance),
        )


GROUPS: Final[tuple[Group, ...]] = ()
FIGURES: Final = (Figure("spread", "What is left at a distance", "Tip to surface, mm", "Share of the tip's light"),)
CHECKS: Final = (
    *_spanned(),
    *_mean_lamp(),
    Check(
        id="spread-carried-7-to-10",
        topic="beam",
        source="oper-dent-2021-271",
        says="25 and 34 % lost 7 and 10 mm away: the beam is fitted at 7 mm and has to tell what is left at 10 mm",
        published=0.66,
        unit="",
        band=0.15,
        kind="miss",
        misses_by=-0.143,
        note="Means over several lamps with tips of several widths; no beam of an 8 mm tip has both. What is fitted "
        "near falls too fast farther off: safe for setting, not for heat.",
        rules=RULES,
        how_sure="seen",
        computed=partial(carried_share, 7.0, 0.75, 10.0),
    ),
)
