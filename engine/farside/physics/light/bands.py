"""A lamp's band as a few wavelengths that stand for it."""

import math
from typing import Final

# Gauss-Hermite nodes and weights, the weights summing to 1.
_NODES: Final = {
    3: ((-1.224744871391589, 1 / 6), (0.0, 2 / 3), (1.224744871391589, 1 / 6)),
    5: (
        (-2.020182870456086, 0.011257411327720674),
        (-0.9585724646138185, 0.22207592200561266),
        (0.0, 0.5333333333333333),
        (0.9585724646138185, 0.22207592200561266),
        (2.020182870456086, 0.011257411327720674),
    ),
}


def band_nodes(peak_nm: float, width_nm: float, share: float, count: int = 3) -> tuple[tuple[float, float], ...]:
    """Wavelengths, each with its share of the light, that stand for a bell-shaped band.

    Parameters
    ----------
    peak_nm : float
        Of the band. [nm]
    width_nm : float
        Full width at half the peak's height, 0 or more. [nm]
    share : float
        Of the lamp's light in this band, 0 to 1. [-]
    count : int
        3, or 5 where what is weighted changes fast inside the band: an acylphosphine initiator under a
        band wider than 25 nm.

    Returns
    -------
    tuple of (float, float)
        Wavelength and share, by rising wavelength. [nm, -]

    Examples
    --------
    >>> [(round(nm, 1), round(share, 3)) for nm, share in band_nodes(455.0, 22.0, 0.9)]
    [(438.8, 0.15), (455.0, 0.6), (471.2, 0.15)]

    References
    ----------
    Gauss-Hermite quadrature (any handbook of numerical methods); the bell is ours.
    """
    stretch_nm = width_nm / (2.0 * math.sqrt(math.log(2.0)))
    return tuple((peak_nm + stretch_nm * node, share * weight) for node, weight in _NODES[count])
