"""Seconds a day for the eyes against measured ones: by distance from a lamp, and off a tooth."""

from functools import partial
from typing import Final

from farside.physics.eyes.hazard import blue_light_weight, day_limit_s, reflected_radiance_w_m2_sr
from farside.physics.light.beam import on_axis_share
from reference import tables
from reference.checks import Check, Figure, Group, Point

TIP_MM: Final = 8.0
USUAL: Final = 2.5
MINUTE_S: Final = 60.0
RULES: Final = ("eye-day-share",)
MCCUSKER: Final = "direct view of the strongest of 11 lamps: 2.5, 22.1 and 88.8 min at 10, 30 and 60 cm"


def carried_min(distance_mm: float) -> float:
    """Minutes at a distance, when those at 10 cm are the published 2.5: what reaches the eye sets them."""
    at_ten_cm = 1e6 / (2.5 * MINUTE_S)
    reaching = on_axis_share(distance_mm, TIP_MM, USUAL) / on_axis_share(100.0, TIP_MM, USUAL)
    return day_limit_s(at_ten_cm * reaching) / MINUTE_S


def off_tooth_min(irradiance_mw_cm2: float, reflectance_share: float) -> float:
    """Minutes a day of looking at a tooth lit at 460 nm."""
    weight = blue_light_weight(tables.hazard_weights(), 460.0)
    return day_limit_s(reflected_radiance_w_m2_sr(irradiance_mw_cm2, reflectance_share, weight)) / MINUTE_S


GROUPS: Final[tuple[Group, ...]] = ()
FIGURES: Final = (
    Figure("eyes", "Minutes a day in direct view", "Distance, cm", "Minutes a day", log_x=True, log_y=True),
)
CHECKS: Final = (
    *(
        Check(
            id=f"eyes-by-distance-{distance:g}",
            topic="eyes",
            source="mccusker-2013",
            says=f"{MCCUSKER}; from 10 to {distance:g} cm",
            published=minutes,
            unit="min",
            band=0.03,
            how_sure="seen",
            computed=partial(carried_min, distance * 10.0),
            note="The 2.5 min at 10 cm are taken over, with an 8 mm tip and the usual beam; what is checked is how "
            "the model's far beam thins out.",
            point=Point("eyes", "carried from 10 cm", distance),
        )
        for distance, minutes in ((30.0, 22.1), (60.0, 88.8))
    ),
    Check(
        id="eyes-off-tooth",
        topic="eyes",
        source="price-2016",
        says="light thrown back from a tooth, 40 cm away, no loupes: about 11 min a day",
        published=11.0,
        unit="min",
        band=0.5,
        kind="plausibility",
        note="The lamp's irradiance is not known here: 1 000 mW/cm² at 460 nm and the usual reflectance of 0.4 are "
        "taken, and the lamp was held at 45°. Half as much again of either would give the 11 min; if both "
        "were as taken, too long a time is allowed: the unsafe side.",
        rules=RULES,
        how_sure="seen",
        computed=partial(off_tooth_min, 1000.0, 0.4),
    ),
    Check(
        id="eyes-off-bright-tooth",
        topic="eyes",
        source="price-2016",
        says="light thrown back from a tooth, 40 cm away, no loupes: about 11 min a day",
        published=11.0,
        unit="min",
        band=0.5,
        kind="plausibility",
        note="As above with a reflectance of 0.6.",
        rules=RULES,
        how_sure="seen",
        computed=partial(off_tooth_min, 1000.0, 0.6),
    ),
)
