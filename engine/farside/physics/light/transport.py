"""How much light a paste reflects, passes and holds: adding-doubling, with the fluence inside.

Light is followed in six directions a half-range, split at the critical angle. Against a 16-point
reference the transmittance of a slab in air is within 1 % and its reflectance within 0.003 over the
reach of the model, and the fluence rate within 2 %; four directions would leave 5 % in the transmittance.
"""

from collections.abc import Sequence
from operator import mul
from typing import Final, NamedTuple

from farside.physics.light.layers import Layer, delta_scaled, endless, layer
from farside.physics.light.matrix import Matrix, Vector, applied, identity_less, product, solved, total
from farside.physics.light.streams import Streams, streams

_DOUBLINGS_OF_LEAP: Final = 5


class Slab(NamedTuple):
    """Shares of the light on a slab in air, for a beam along the normal and for diffuse light. [-]"""

    reflectance: float
    transmittance: float
    diffuse_reflectance: float
    diffuse_transmittance: float


def slab(
    thickness_mm: float,
    absorption_per_mm: float,
    reduced_scattering_per_mm: float,
    refractive_index: float = 1.5,
    anisotropy: float = 0.8,
) -> Slab:
    """Reflectance and transmittance of a slab with air on both sides.

    Parameters
    ----------
    thickness_mm : float
        Above 0. [mm]
    absorption_per_mm : float
        0 or more. [1/mm]
    reduced_scattering_per_mm : float
        Above 0. [1/mm]
    refractive_index : float
        Of the slab, 1 or more. [-]
    anisotropy : float
        Mean cosine of scattering (Henyey-Greenstein), 0 to 0.9. [-]

    Returns
    -------
    Slab
        What the surface reflects is in the reflectance.

    Examples
    --------
    >>> made = slab(2.0, 0.2, 1.0)
    >>> round(made.reflectance, 3), round(made.transmittance, 3)
    (0.184, 0.145)
    """
    along = streams(refractive_index)
    made = layer(thickness_mm, delta_scaled(absorption_per_mm, reduced_scattering_per_mm, anisotropy), along)
    back, through = _over_air(made, along)
    beam, diffuse = _beam(along), _diffuse(along, refractive_index)
    shares: list[float] = []
    for entering in (beam, diffuse):
        down = _lit_from_above(back, along, entering)
        at_surface = sum(along.weights[i] * along.cosines[i] * entering[i] for i in range(len(down)))
        shares.append(1.0 - at_surface + _escaping(applied(back, down), along))
        shares.append(_escaping(applied(through, down), along))
    return Slab(*shares)


def slab_fluence(
    depths_mm: Sequence[float],
    thickness_mm: float,
    absorption_per_mm: float,
    reduced_scattering_per_mm: float,
    refractive_index: float = 1.5,
    anisotropy: float = 0.8,
) -> tuple[float, ...]:
    """Fluence rate inside a slab in air over the irradiance of a beam along its normal.

    Parameters
    ----------
    depths_mm : sequence of float
        From the lit face, 0 to the thickness. [mm]
    thickness_mm, absorption_per_mm, reduced_scattering_per_mm, refractive_index, anisotropy
        As for ``slab``.

    Returns
    -------
    tuple of float
        One for each depth; above 1 near a lit face, since scattered light passes again. [-]

    Examples
    --------
    >>> [round(share, 2) for share in slab_fluence((0.0, 1.0, 2.0), 2.0, 0.2, 1.0)]
    [2.41, 1.64, 0.99]
    """
    along = streams(refractive_index)
    medium = delta_scaled(absorption_per_mm, reduced_scattering_per_mm, anisotropy)
    back, _ = _over_air(layer(thickness_mm, medium, along), along)
    entering = _lit_from_above(back, along, _beam(along))
    shares: list[float] = []
    for depth_mm in depths_mm:
        above = layer(depth_mm, medium, along)
        below, _ = _over_air(layer(thickness_mm - depth_mm, medium, along), along)
        down = applied(_onward(above, below), entering)
        shares.append(sum(map(mul, _gathering(below, along), down)))
    return tuple(shares)


def half_space_fluence(
    absorption_per_mm: float,
    reduced_scattering_per_mm: float,
    refractive_index: float = 1.5,
    anisotropy: float = 0.8,
    step_mm: float = 0.05,
    count: int = 201,
) -> list[float]:
    """Fluence rate down a half-space under air over the irradiance of a beam along its normal.

    With itself below, every slice of the paste meets the same reflection, so one matrix carries
    the downward light across each step and serves the whole table.

    Parameters
    ----------
    absorption_per_mm, reduced_scattering_per_mm, refractive_index, anisotropy
        As for ``slab``.
    step_mm : float
        Between the depths, above 0. [mm]
    count : int
        Depths in the table, from the surface on. [-]

    Returns
    -------
    list of float
        At 0, ``step_mm``, twice ``step_mm`` and so on. [-]

    Examples
    --------
    >>> table = half_space_fluence(0.2, 1.0, step_mm=1.0, count=4)
    >>> [round(share, 2) for share in table]
    [2.38, 1.58, 0.74, 0.33]
    """
    along = streams(refractive_index)
    step = layer(step_mm, delta_scaled(absorption_per_mm, reduced_scattering_per_mm, anisotropy), along)
    below = endless(step)
    onward = _onward(step, below)
    gathering = _gathering(below, along)
    down = _lit_from_above(below, along, _beam(along))
    # What each of the next depths gathers from the light here; then one leap carries the light past them all.
    rows, leap = [gathering], onward
    for _ in range(_DOUBLINGS_OF_LEAP):
        rows += product(rows, leap)
        leap = product(leap, leap)
    table: list[float] = []
    while len(table) < count:
        table += applied(rows, down)
        down = applied(leap, down)
    return table[:count]


def _beam(along: Streams) -> Vector:
    """Radiance that a beam of irradiance 1 along the normal sends in through the surface."""
    entering = [0.0] * len(along.cosines)
    entering[-1] = (1.0 - along.reflected[-1]) / (along.cosines[-1] * along.weights[-1])
    return entering


def _diffuse(along: Streams, refractive_index: float) -> Vector:
    """The same for an irradiance of 1 that comes from all of the air's hemisphere."""
    return [2.0 * refractive_index**2 * (1.0 - reflected) for reflected in along.reflected]


def _over_air(made: Layer, along: Streams) -> tuple[Matrix, Matrix]:
    """Reflection of a layer whose far face meets air, and what reaches that face from inside."""
    at_face = solved(
        identity_less([list(map(mul, row, along.reflected)) for row in made.reflect]),
        made.transmit,
    )
    returned = [[reflected * a for a in row] for reflected, row in zip(along.reflected, at_face, strict=True)]
    return total(made.reflect, product(made.transmit, returned)), at_face


def _lit_from_above(below: Matrix, along: Streams, entering: Vector) -> Vector:
    """Downward radiance just under the surface, with what the surface throws back."""
    again = [[reflected * a for a in row] for reflected, row in zip(along.reflected, below, strict=True)]
    return [row[0] for row in solved(identity_less(again), [[a] for a in entering])]


def _onward(above: Layer, below: Matrix) -> Matrix:
    """Downward radiance under a layer per downward radiance on it, given what lies below."""
    return solved(identity_less(product(above.reflect, below)), above.transmit)


def _gathering(below: Matrix, along: Streams) -> Vector:
    """Fluence rate per downward radiance, the upward light that follows from it included."""
    upward = [sum(map(mul, along.weights, column)) for column in zip(*below, strict=True)]
    return [a + b for a, b in zip(along.weights, upward, strict=True)]


def _escaping(outward: Vector, along: Streams) -> float:
    """Flux that leaves through a face, of the radiance that reaches it from inside."""
    return sum(
        (1.0 - reflected) * cosine * weight * radiance
        for reflected, cosine, weight, radiance in zip(
            along.reflected, along.cosines, along.weights, outward, strict=True
        )
    )
