"""How one exposure lights a plane across the cavity: towards the walls, and over how much of the width."""

from functools import lru_cache
from typing import Final

from farside.physics.light.beam import surface_share
from farside.physics.light.edge import smoothed_share

_SAMPLES: Final = 41


def wall_share(
    distance_mm: float, offset_mm: float, tilt_deg: float, tip_mm: float, exponent: float, length_mm: float
) -> float:
    """Share of the exitance that serves a place off the axis once the paste has spread it sideways. [-]

    `length_mm` is the paste's smoothing length; `offset_mm` is signed along the width, as the tilt is.
    """
    if (tilt_deg, offset_mm) < (0.0, 0.0):  # the other way round is the same thing in a mirror
        offset_mm, tilt_deg = -offset_mm, -tilt_deg
    return _wall_share(distance_mm, offset_mm, tilt_deg, tip_mm, exponent, length_mm)


@lru_cache(maxsize=4096)
def _wall_share(
    distance_mm: float, offset_mm: float, tilt_deg: float, tip_mm: float, exponent: float, length_mm: float
) -> float:
    def profile(x_mm: float, y_mm: float) -> float:
        return surface_share(distance_mm, x_mm, tilt_deg, tip_mm, exponent, aside_mm=y_mm)

    return smoothed_share(profile, offset_mm, length_mm)


@lru_cache(maxsize=1024)
def shares_across(
    distance_mm: float, aim_offset_mm: float, tilt_deg: float, tip_mm: float, exponent: float, width_mm: float
) -> tuple[float, ...]:
    """Irradiance across the width over that on the axis, at evenly spaced places from wall to wall. [-]"""
    on_axis = surface_share(distance_mm, 0.0, tilt_deg, tip_mm, exponent)
    places = (width_mm * (index / (_SAMPLES - 1) - 0.5) - aim_offset_mm for index in range(_SAMPLES))
    return tuple(surface_share(distance_mm, place, tilt_deg, tip_mm, exponent) / on_axis for place in places)


def share_lit(shares: tuple[float, ...], least: float) -> float:
    """How much of the width gets at least a given share of the axis's irradiance. [-]"""
    return sum(share >= least for share in shares) / len(shares)
