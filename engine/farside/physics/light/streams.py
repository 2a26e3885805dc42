"""Directions that the transported light is followed in, their weights, and what the surface reflects."""

import math
from collections.abc import Sequence
from typing import Final, NamedTuple

from farside.physics.light.matrix import Matrix

STREAM_COUNT: Final = 6
"""Directions a half-range. Four leave 5 % in the transmittance where n is 1.4, six under 1 %."""

# Nodes and weights on -1 to 1. Radau's keep the end at 1, which is the direction of the beam.
_GAUSS_3: Final = ((-math.sqrt(0.6), 5 / 9), (0.0, 8 / 9), (math.sqrt(0.6), 5 / 9))
_RADAU_3: Final = (
    ((-1 - math.sqrt(6)) / 5, (16 - math.sqrt(6)) / 18),
    ((-1 + math.sqrt(6)) / 5, (16 + math.sqrt(6)) / 18),
    (1.0, 2 / 9),
)
_RADAU_6: Final = (
    (-0.9203802858970625, 0.2015883852534782),
    (-0.6039731642527836, 0.4169013343119078),
    (-0.12405037950522784, 0.5209267831895755),
    (0.3909285467072722, 0.4853871884689699),
    (0.8029298284023469, 0.3196407532205107),
    (1.0, 0.05555555555555555),
)


class Streams(NamedTuple):
    """Half-range directions, the last of them along the beam.

    cosines : of the angle from the surface's normal, rising. [-]
    weights : of each in an integral over the cosine from 0 to 1. [-]
    reflected : share that the surface sends back inside, per stream. [-]
    """

    cosines: tuple[float, ...]
    weights: tuple[float, ...]
    reflected: tuple[float, ...]


def streams(refractive_index: float) -> Streams:
    """The streams of a paste under air, split at the critical angle.

    Light flatter than the critical angle is wholly reflected, so the radiance has a step there,
    and each side gets its own nodes: three of Gauss below, three of Radau above. Just past the
    critical angle the reflection falls too steeply for three nodes, so the stream next to it
    reflects what makes the sum over all angles right. Without a step in index all six are Radau's.

    Parameters
    ----------
    refractive_index : float
        Of the paste against air, 1 or more. [-]

    Examples
    --------
    >>> [round(cosine, 3) for cosine in streams(1.5).cosines]
    [0.084, 0.373, 0.661, 0.785, 0.91, 1.0]
    >>> round(sum(streams(1.5).weights), 12)
    1.0
    """
    critical = math.sqrt(1.0 - 1.0 / refractive_index**2)
    below = _spread(_GAUSS_3, 0.0, critical) if critical > 0.0 else []
    above = _spread(_RADAU_3 if critical > 0.0 else _RADAU_6, critical, 1.0)
    passing = [reflected_inside(cosine, refractive_index) for cosine, _ in above]
    if critical > 0.0:
        hemisphere = 2.0 * refractive_index**2
        counted = math.fsum(
            hemisphere * cosine * weight * share for (cosine, weight), share in zip(above, passing, strict=True)
        )
        cosine, weight = above[0]
        passing[0] += (diffuse_reflected(refractive_index) - counted) / (hemisphere * cosine * weight)
    nodes = below + above
    return Streams(
        tuple(cosine for cosine, _ in nodes), tuple(weight for _, weight in nodes), (*(1.0 for _ in below), *passing)
    )


def reflected_inside(cosine: float, refractive_index: float) -> float:
    """Share of unpolarised light that a surface reflects back into the paste (Fresnel).

    Parameters
    ----------
    cosine : float
        Of the angle from the normal, inside the paste, above 0. [-]
    refractive_index : float
        Of the paste against air, 1 or more. [-]

    Examples
    --------
    >>> round(reflected_inside(1.0, 1.5), 4)
    0.04
    >>> reflected_inside(0.5, 1.5)
    1.0
    """
    sine_outside_squared = refractive_index**2 * (1.0 - cosine**2)
    if sine_outside_squared >= 1.0:
        return 1.0
    outside = math.sqrt(1.0 - sine_outside_squared)
    across = (refractive_index * cosine - outside) / (refractive_index * cosine + outside)
    along = (refractive_index * outside - cosine) / (refractive_index * outside + cosine)
    return (across**2 + along**2) / 2.0


def diffuse_reflected(refractive_index: float) -> float:
    """Share of diffuse light from the air that a surface reflects.

    Parameters
    ----------
    refractive_index : float
        Of the paste against air, above 1. [-]

    Examples
    --------
    >>> round(diffuse_reflected(1.5), 4)
    0.0918

    References
    ----------
    Fresnel's reflection integrated over the hemisphere, in Walsh's closed form as `iadpython` 0.5 has it in
    `fresnel.py`; checked against numerical integration.
    """
    n = refractive_index
    square, fourth = n**2, n**4
    return (
        0.5
        + (n - 1.0) * (3.0 * n + 1.0) / (6.0 * (n + 1.0) ** 2)
        + square * (square - 1.0) ** 2 / (square + 1.0) ** 3 * math.log((n - 1.0) / (n + 1.0))
        - 2.0 * n**3 * (square + 2.0 * n - 1.0) / ((square + 1.0) * (fourth - 1.0))
        + 8.0 * fourth * (fourth + 1.0) / ((square + 1.0) * (fourth - 1.0) ** 2) * math.log(n)
    )


def scattering(moments: Sequence[float], cosines: Sequence[float]) -> tuple[Matrix, Matrix]:
    """Phase function between streams, averaged round the normal: onward and back.

    Parameters
    ----------
    moments : sequence of float
        Legendre moments of the phase function, the first being 1. [-]
    cosines : sequence of float
        Of the streams. [-]

    Returns
    -------
    tuple of Matrix
        For pairs of streams on the same side and on opposite sides of the normal's plane.

    Examples
    --------
    >>> scattering([1.0, 0.5], [1.0])
    ([[2.5]], [[-0.5]])
    """
    degrees = range(len(moments))
    values = [_legendre(cosine, len(moments)) for cosine in cosines]
    even = [[(2 * k + 1) * moments[k] * row[k] if k % 2 == 0 else 0.0 for k in degrees] for row in values]
    odd = [[(2 * k + 1) * moments[k] * row[k] if k % 2 == 1 else 0.0 for k in degrees] for row in values]
    onward, back = [], []
    for even_row, odd_row in zip(even, odd, strict=True):
        evens = [math.fsum(map(float.__mul__, even_row, other)) for other in values]
        odds = [math.fsum(map(float.__mul__, odd_row, other)) for other in values]
        onward.append([e + o for e, o in zip(evens, odds, strict=True)])
        back.append([e - o for e, o in zip(evens, odds, strict=True)])
    return onward, back


def _spread(nodes: Sequence[tuple[float, float]], low: float, high: float) -> list[tuple[float, float]]:
    half = (high - low) / 2.0
    return [(low + half * (1.0 + node), half * weight) for node, weight in nodes]


def _legendre(cosine: float, count: int) -> list[float]:
    values = [1.0, cosine]
    for degree in range(1, count - 1):
        values.append(((2 * degree + 1) * cosine * values[-1] - degree * values[-2]) / (degree + 1))
    return values[:count]
