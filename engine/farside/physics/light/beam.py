"""How much of the lamp's light arrives: by distance, off the axis, under tilt, and the fit of a beam to readings.

The tip is a uniform disc whose every point emits as cos^m of the angle from the axis, its exitance fixed.
"""

import math
from collections.abc import Callable, Sequence
from typing import Final

RIM_POINTS: Final = 48
"""Points on half the tip's rim: within 2e-6 from 0.5 mm off an 8 mm tip, 0.003 from 0.2 mm off, worst near the rim."""

_RIM_COSINES: Final = tuple(math.cos(math.pi * (place + 0.5) / RIM_POINTS) for place in range(RIM_POINTS))

WIDEST_FIT: Final = 30.0
"""Largest spread exponent that a fit tries: far past any lamp, so a fit that ends there says the readings are odd."""


def on_axis_share(distance_mm: float, tip_diameter_mm: float, spread_exponent: float) -> float:
    """Share of the tip's exitance that arrives on axis at a distance.

    Parameters
    ----------
    distance_mm : float
        Tip to surface, 0 or more. [mm]
    tip_diameter_mm : float
        Lit diameter of the tip, above 0. [mm]
    spread_exponent : float
        m: 1 is Lambertian, larger is narrower, 0 or more. [-]

    Returns
    -------
    float
        Irradiance over exitance, 0 to 1. [-]

    Examples
    --------
    >>> round(on_axis_share(6.0, 8.0, 1.0), 4)
    0.3077
    >>> round(on_axis_share(6.0, 8.0, 5.0), 4)
    0.6682

    References
    ----------
    Integral of cos^m emission over a disc; for m = 1 the view factor of a disc (any radiometry handbook).
    """
    cosine = distance_mm / math.hypot(distance_mm, tip_diameter_mm / 2.0)
    return 1.0 - math.pow(cosine, spread_exponent + 1.0)


def off_axis_share(distance_mm: float, offset_mm: float, tip_diameter_mm: float, spread_exponent: float) -> float:
    """Share of the tip's exitance that arrives beside the axis, on a plane parallel to the tip.

    Along a ray from the point under which one stands, the integral over the disc is closed, so what
    is left is a sum round the rim. It is periodic and smooth, hence few points serve.

    Parameters
    ----------
    distance_mm : float
        Tip to plane, 0 or more. [mm]
    offset_mm : float
        From the axis, either sign. [mm]
    tip_diameter_mm : float
        Lit diameter of the tip, above 0. [mm]
    spread_exponent : float
        m, 0 or more. [-]

    Returns
    -------
    float
        Irradiance over exitance, 0 to 1; at the tip itself 1 inside the rim, 0.5 on it, 0 outside. [-]

    Examples
    --------
    >>> round(off_axis_share(6.0, 2.0, 8.0, 1.0), 5)
    0.27639
    >>> round(off_axis_share(6.0, 5.0, 8.0, 1.0), 5)
    0.15803
    >>> off_axis_share(0.0, 4.0, 8.0, 3.0)
    0.5
    """
    radius_mm = tip_diameter_mm / 2.0
    offset_mm = abs(offset_mm)
    if distance_mm == 0.0:
        return 1.0 if offset_mm < radius_mm else 0.5 if offset_mm == radius_mm else 0.0
    height_squared, radius_squared = distance_mm**2, radius_mm**2
    middle, swing, power = radius_squared + offset_mm**2, radius_mm * offset_mm, (spread_exponent + 1.0) / 2.0
    gathered: float = sum(
        [
            (radius_squared - swing * cosine)
            / (reach_squared := middle - 2.0 * swing * cosine)
            * (1.0 - (height_squared / (reach_squared + height_squared)) ** power)
            for cosine in _RIM_COSINES
        ]
    )
    return min(max(gathered / RIM_POINTS, 0.0), 1.0)


def surface_share(
    distance_mm: float,
    offset_mm: float,
    tilt_deg: float,
    tip_diameter_mm: float,
    spread_exponent: float,
    aside_mm: float = 0.0,
) -> float:
    """Share of the tip's exitance that arrives on a surface which the lamp's axis meets at a tilt.

    Parameters
    ----------
    distance_mm : float
        Tip to surface along the axis, 0 or more. [mm]
    offset_mm : float
        Along the width from where the axis meets the surface, signed. [mm]
    tilt_deg : float
        Of the axis from the surface's normal, along the width, signed: positive moves positive offsets
        away from the tip. [degrees]
    tip_diameter_mm : float
        Lit diameter of the tip, above 0. [mm]
    spread_exponent : float
        m, 0 or more. [-]
    aside_mm : float
        Across the width, where no tilt acts. [mm]

    Returns
    -------
    float
        Irradiance over exitance, 0 to 1. The tilt's cosine is the least loss: shadows come on top. [-]

    Examples
    --------
    >>> round(surface_share(6.0, 0.0, 60.0, 8.0, 1.0), 4)
    0.1538
    >>> surface_share(6.0, 2.0, 20.0, 8.0, 1.0) < surface_share(6.0, -2.0, 20.0, 8.0, 1.0)
    True
    """
    tilt = math.radians(tilt_deg)
    axial_mm = max(distance_mm + offset_mm * math.sin(tilt), 0.0)
    lateral_mm = math.hypot(offset_mm * math.cos(tilt), aside_mm)
    return math.cos(tilt) * off_axis_share(axial_mm, lateral_mm, tip_diameter_mm, spread_exponent)


def fitted_spread_exponent(
    distances_mm: Sequence[float], irradiances_mw_cm2: Sequence[float], tip_diameter_mm: float
) -> float:
    """Spread exponent that comes nearest to on-axis readings, by least squares of their logarithms.

    Parameters
    ----------
    distances_mm : sequence of float
        Tip to meter, at least two different ones. [mm]
    irradiances_mw_cm2 : sequence of float
        What the meter read there, above 0. Readings at the tip fix the exitance; without one the
        exitance is fitted too. [mW/cm²]
    tip_diameter_mm : float
        Lit diameter of the tip, above 0. [mm]

    Returns
    -------
    float
        m, 0 to ``WIDEST_FIT``. Readings that do not fall with distance end at the upper bound. [-]

    Raises
    ------
    ValueError
        With fewer than two different distances.

    Examples
    --------
    >>> readings = [1000.0 * on_axis_share(distance, 8.0, 3.5) for distance in (0.0, 8.0)]
    >>> round(fitted_spread_exponent((0.0, 8.0), readings, 8.0), 3)
    3.5
    """
    if len(set(distances_mm)) < 2:
        raise ValueError("a beam needs readings at two different distances")
    at_tip = [distance == 0.0 for distance in distances_mm]

    def misfit(widening: float) -> float:
        gaps = [
            math.log(irradiance / on_axis_share(distance, tip_diameter_mm, math.exp(widening) - 1.0))
            for distance, irradiance in zip(distances_mm, irradiances_mw_cm2, strict=True)
        ]
        fixing = [gap for gap, here in zip(gaps, at_tip, strict=True) if here] or gaps
        exitance = math.fsum(fixing) / len(fixing)
        return math.fsum((gap - exitance) ** 2 for gap in gaps)

    return math.exp(_lowest(misfit, 0.0, math.log(WIDEST_FIT + 1.0))) - 1.0


def _lowest(of: Callable[[float], float], low: float, high: float) -> float:
    """Place of a function's one minimum between two bounds, by the golden section."""
    golden = (math.sqrt(5.0) - 1.0) / 2.0
    left, right = high - golden * (high - low), low + golden * (high - low)
    at_left, at_right = of(left), of(right)
    while high - low > 1e-7:
        if at_left < at_right:
            high, right, at_right = right, left, at_left
            left = high - golden * (high - low)
            at_left = of(left)
        else:
            low, left, at_left = left, right, at_right
            right = low + golden * (high - low)
            at_right = of(right)
    return (low + high) / 2.0
