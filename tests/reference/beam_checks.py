"""The beam against direct integration of the tip's emission by SciPy, and its closed form."""

import math
from collections.abc import Iterator
from functools import partial
from typing import Final

from farside.physics.light.beam import off_axis_share, on_axis_share
from reference.checks import Check, Figure, Group

TIP_MM: Final = 8.0
PLACES: Final = tuple(
    (distance, offset, spread)
    for spread in (0.0, 1.0, 2.5, 5.0, 14.0)
    for distance, offset in ((0.5, 0.0), (2.0, 2.0), (3.0, 4.5), (6.0, 0.0), (6.0, 5.0), (10.0, 2.0))
)


def summed_over_disc(distance_mm: float, offset_mm: float, spread_exponent: float) -> float:
    """Irradiance over exitance: every point of the disc, its cos^m, its distance squared and its slant."""
    from scipy.integrate import dblquad

    def arriving(angle: float, radius: float) -> float:
        square = distance_mm**2 + offset_mm**2 + radius**2 - 2.0 * offset_mm * radius * math.cos(angle)
        cosine = distance_mm / math.sqrt(square)
        return float((spread_exponent + 1.0) / (2.0 * math.pi) * cosine ** (spread_exponent + 1.0) / square * radius)

    return 2.0 * float(dblquad(arriving, 0.0, TIP_MM / 2.0, 0.0, math.pi, epsabs=1e-9, epsrel=1e-8)[0])


def closed(distance_mm: float, offset_mm: float) -> float:
    """View factor of a disc, any handbook of radiometry: the spread exponent 1."""
    radius = TIP_MM / 2.0
    whole = offset_mm**2 + distance_mm**2 + radius**2
    apart = offset_mm**2 + distance_mm**2 - radius**2
    return (1.0 - apart / math.sqrt(whole**2 - 4.0 * radius**2 * offset_mm**2)) / 2.0


def _integrated() -> Iterator[Check]:
    for distance, offset, spread in PLACES:
        yield Check(
            id=f"beam-{distance:g}-{offset:g}-{spread:g}",
            topic="beam",
            group="beam-integrated",
            source="SciPy, dblquad",
            says=f"share {distance:g} mm under an 8 mm tip, {offset:g} mm off the axis, spread exponent {spread:g}",
            published=partial(summed_over_disc, distance, offset, spread),
            unit="",
            band=1e-5,
            computed=partial(off_axis_share, distance, offset, TIP_MM, spread),
        )
        if offset == 0.0:
            yield Check(
                id=f"beam-on-axis-{distance:g}-{spread:g}",
                topic="beam",
                group="beam-on-axis",
                source="SciPy, dblquad",
                says=f"share {distance:g} mm under an 8 mm tip on the axis, spread exponent {spread:g}",
                published=partial(summed_over_disc, distance, 0.0, spread),
                unit="",
                band=1e-6,
                computed=partial(on_axis_share, distance, TIP_MM, spread),
            )


def _closed() -> Iterator[Check]:
    for distance in (0.5, 1.0, 3.0, 10.0):
        for offset in (0.0, 2.0, 4.0, 6.0):
            yield Check(
                id=f"beam-closed-{distance:g}-{offset:g}",
                topic="beam",
                group="beam-closed",
                source="view factor of a disc",
                says=f"share {distance:g} mm under a Lambertian 8 mm tip, {offset:g} mm off the axis",
                published=partial(closed, distance, offset),
                unit="",
                band=1e-5,
                band_is="absolute",
                computed=partial(off_axis_share, distance, offset, TIP_MM, 1.0),
            )


GROUPS: Final = (
    Group("beam-integrated", "Share that arrives under an 8 mm tip, on and off the axis, spread exponents 0 to 14"),
    Group("beam-on-axis", "Share that arrives on the axis of an 8 mm tip, spread exponents 0 to 14"),
    Group("beam-closed", "Share that arrives under a Lambertian 8 mm tip, on and off the axis"),
)
FIGURES: Final[tuple[Figure, ...]] = ()
CHECKS: Final = (*_integrated(), *_closed())
