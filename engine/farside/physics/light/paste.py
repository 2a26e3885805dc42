"""What a paste does to light at a wavelength: its absorption (from a measured transmittance too) and its scattering."""

import math
from dataclasses import dataclass
from typing import Final, TypeAlias

from farside.physics.light.initiators import Initiator, absorption_per_mm
from farside.physics.light.transport import slab

Parts: TypeAlias = tuple[tuple[Initiator, float], ...]
"""Initiators of a paste with their concentrations. [mol/L]"""

OWN_SLOPE_PER_NM: Final = 0.036
"""Fall of the paste's own absorption towards longer waves, as the rate of an exponential. [1/nm]

Set by Harlow 2016, whose violet light is attenuated 0.43 to 0.68 per mm more than the blue over 4 mm, so that
source is no check of it. With the medium default paste (0.20 and 1.0 per mm at 460 nm, camphorquinone 0.005 of a
resin that is 0.22 of the paste), bands of 20 nm at 405 and 460 nm (ours) and 4 mm slabs in air, transport gives
0.43 at a slope of 0.032, 0.55, the middle, at 0.036, and 0.69 at 0.040.
"""

DARKEST_PER_MM: Final = 3.0
"""Absorption past which none is looked for behind a measured transmittance. [1/mm]"""

CLOSE_ENOUGH: Final = 1e-5
"""Share of a measured transmittance by which an inverted one may be off: far under any meter's error."""


@dataclass(frozen=True, slots=True)
class Paste:
    """Optics of a composite.

    own_absorption_per_mm : at ``at_nm``, without its initiators. [1/mm]
    reduced_scattering_per_mm : at ``at_nm``. [1/mm]
    at_nm : wavelength of these two. [nm]
    refractive_index : [-]
    parts : initiators and their concentrations in the paste. [mol/L]
    """

    own_absorption_per_mm: float
    reduced_scattering_per_mm: float
    at_nm: float
    refractive_index: float
    parts: Parts


def own_absorption(total_absorption_per_mm: float, at_nm: float, parts: Parts) -> float:
    """What initiators leave of a paste's total absorption at a wavelength, per mm.

    Negative where they absorb more than the total: an error if the total was measured, for the caller to judge.

    Examples
    --------
    >>> camphorquinone = Initiator("camphorquinone", 166.22, 0.07, 469.0, 46.0, 38.0, 21.0)
    >>> round(own_absorption(0.20, 460.0, ((camphorquinone, 0.01324),)), 4)
    0.0651
    """
    return total_absorption_per_mm - _of_initiators(parts, at_nm)


def absorption_at(paste: Paste, wavelength_nm: float) -> float:
    """Absorption at a wavelength, initiators included, per mm.

    Examples
    --------
    >>> plain = Paste(0.2, 1.0, 460.0, 1.5, ())
    >>> absorption_at(plain, 460.0), absorption_at(plain, 405.0) > 0.2
    (0.2, True)
    """
    own = paste.own_absorption_per_mm * math.exp(OWN_SLOPE_PER_NM * (paste.at_nm - wavelength_nm))
    return own + _of_initiators(paste.parts, wavelength_nm)


def scattering_at(paste: Paste, wavelength_nm: float) -> float:
    """Reduced scattering at a wavelength, per mm: inverse to the wavelength (ours).

    Examples
    --------
    >>> round(scattering_at(Paste(0.2, 1.0, 460.0, 1.5, ()), 405.0), 3)
    1.136
    """
    return paste.reduced_scattering_per_mm * paste.at_nm / wavelength_nm


def absorption_from_transmittance(
    transmittance_share: float, thickness_mm: float, reduced_scattering_per_mm: float, refractive_index: float
) -> float:
    """Absorption with which a slab in air passes what was measured of a beam along its normal.

    Parameters
    ----------
    transmittance_share : float
        Measured, surface reflection being part of the loss, above 0 and under 1. [-]
    thickness_mm : float
        Of the slab, above 0. [mm]
    reduced_scattering_per_mm : float
        Taken as known, above 0. [1/mm]
    refractive_index : float
        Of the paste, 1 or more. [-]

    Returns
    -------
    float
        Total absorption, with which the transmittance comes right to ``CLOSE_ENOUGH`` of itself. [1/mm]

    Raises
    ------
    ValueError
        Where no absorption to about ``DARKEST_PER_MM`` gives that transmittance.

    Examples
    --------
    >>> passed = slab(2.0, 0.2, 1.0).transmittance
    >>> round(absorption_from_transmittance(passed, 2.0, 1.0, 1.5), 3)
    0.2
    """

    def excess(root: float) -> float:
        made = slab(thickness_mm, root**2, reduced_scattering_per_mm, refractive_index)
        return math.log(made.transmittance / transmittance_share)

    refusal = f"no absorption passes {transmittance_share} of the light through {thickness_mm} mm"
    if transmittance_share <= 0.0 or (above := excess(0.0)) < 0.0:
        raise ValueError(refusal)
    low, high = 0.0, 0.25
    while (below := excess(high)) > 0.0:
        if high**2 > DARKEST_PER_MM:
            raise ValueError(refusal)
        low, above, high = high, below, 2.0 * high
    # The logarithm of the transmittance bends little over the root of the absorption: a few chords land on it.
    while abs(below) > CLOSE_ENOUGH:
        chord = (low * below - high * above) / (below - above)
        low, above, high, below = high, below, chord, excess(chord)
    return high**2


def _of_initiators(parts: Parts, wavelength_nm: float) -> float:
    return math.fsum(absorption_per_mm(initiator, amount, wavelength_nm) for initiator, amount in parts)
