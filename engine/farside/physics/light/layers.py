"""What a layer of paste reflects and passes, stream by stream: a thin start, then doubling."""

from typing import Final, NamedTuple

from farside.physics.light.matrix import Matrix, identity_less, product, solved, total
from farside.physics.light.streams import STREAM_COUNT, Streams, scattering

THIN_SHARE: Final = 0.6
"""Optical depth of the thin start over the flattest stream's cosine: halving it moves no result
by 1e-4."""


class Medium(NamedTuple):
    """Delta-scaled optics.

    extinction_per_mm : scattering and absorption together. [1/mm]
    albedo : share of the extinction that is scattering. [-]
    moments : Legendre moments of the phase function. [-]
    """

    extinction_per_mm: float
    albedo: float
    moments: tuple[float, ...]


class Layer(NamedTuple):
    """Radiance out of a homogeneous layer per radiance in: row = stream out, column = stream in."""

    reflect: Matrix
    transmit: Matrix


def delta_scaled(absorption_per_mm: float, reduced_scattering_per_mm: float, anisotropy: float) -> Medium:
    """Optics with the sharpest forward scattering counted as not scattered (delta-M).

    A Henyey-Greenstein phase function has the moments g^k. Six streams carry six of them; what
    the sixth leaves is a forward peak, taken out of scattering and extinction alike.

    Parameters
    ----------
    absorption_per_mm : float
        0 or more. [1/mm]
    reduced_scattering_per_mm : float
        Scattering times 1 - g, above 0. [1/mm]
    anisotropy : float
        g, the mean cosine of scattering, 0 or more and under 1. [-]

    Examples
    --------
    >>> medium = delta_scaled(0.2, 1.0, 0.8)
    >>> round(medium.extinction_per_mm, 4), round(medium.albedo, 4)
    (3.8893, 0.9486)

    References
    ----------
    Wiscombe's delta-M method (J Atmos Sci, volume 34), cited as `iadpython` 0.5 cites it in `redistribution.py`.
    """
    scattering_per_mm = reduced_scattering_per_mm / (1.0 - anisotropy)
    peak = anisotropy**STREAM_COUNT
    spread_per_mm = scattering_per_mm * (1.0 - peak)
    extinction_per_mm = absorption_per_mm + spread_per_mm
    moments = tuple((anisotropy**k - peak) / (1.0 - peak) for k in range(STREAM_COUNT))
    return Medium(extinction_per_mm, spread_per_mm / extinction_per_mm, moments)


def layer(thickness_mm: float, medium: Medium, along: Streams) -> Layer:
    """A layer of a thickness, from a thin one doubled until it is that thick.

    Parameters
    ----------
    thickness_mm : float
        0 or more. [mm]
    medium : Medium
        Its optics, delta-scaled.
    along : Streams
        Directions that the light is followed in.

    References
    ----------
    Van de Hulst's adding-doubling, with Fresnel's reflection at the faces as Prahl et al. added it (Appl Opt
    1993;32:559, cited as its own program's page cites it). The diamond start is the classical one.
    """
    depth = thickness_mm * medium.extinction_per_mm
    doublings = 0
    while depth > THIN_SHARE * along.cosines[0]:
        depth /= 2.0
        doublings += 1
    made = _thin(depth, medium, along)
    for _ in range(doublings):
        made = doubled(made)
    return made


def doubled(one: Layer) -> Layer:
    """Two like layers on each other."""
    between = solved(identity_less(product(one.reflect, one.reflect)), one.transmit)
    returned = product(one.transmit, product(one.reflect, between))
    return Layer(total(one.reflect, returned), product(one.transmit, between))


def endless(one: Layer) -> Matrix:
    """Reflection of a half-space, from any layer of it: doubled until nothing passes."""
    while max(map(max, one.transmit)) > 1e-6:
        one = doubled(one)
    return one.reflect


def _thin(depth: float, medium: Medium, along: Streams) -> Layer:
    """The diamond start: inside the layer every stream is the mean of its two ends."""
    onward, back = scattering(medium.moments, along.cosines)
    half = medium.albedo / 2.0
    lost: Matrix = []
    turned: Matrix = []
    for place, cosine in enumerate(along.cosines):
        steps = depth / (2.0 * cosine)
        shares = [half * steps * weight for weight in along.weights]
        lost.append([-a * b for a, b in zip(shares, onward[place], strict=True)])
        lost[place][place] += 1.0 + steps
        turned.append([a * b for a, b in zip(shares, back[place], strict=True)])
    sent_back = solved(lost, turned)
    kept = [
        [a - b for a, b in zip(row, other, strict=True)]
        for row, other in zip(lost, product(turned, sent_back), strict=True)
    ]
    size = len(along.cosines)
    twice = [[2.0 if row == column else 0.0 for column in range(size)] for row in range(size)]
    inside = solved(kept, twice)  # sums of the two ends of each onward stream
    passed = [[-a for a in row] for row in identity_less(inside)]
    return Layer(product(sent_back, inside), passed)
