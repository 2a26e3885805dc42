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
    9: (
        (-3.1909932017815272, 2.2345844007746817e-05),
        (-2.2665805845318427, 0.002789141321231776),
        (-1.468553289216668, 0.049916406765218),
        (-0.7235510187528374, 0.24409750289493934),
        (0.0, 0.40634920634920624),
        (0.7235510187528374, 0.24409750289493934),
        (1.468553289216668, 0.049916406765218),
        (2.2665805845318427, 0.002789141321231776),
        (3.1909932017815272, 2.2345844007746817e-05),
    ),
}


WIDE_NM: Final = 25.0
"""Width from which on the red tail of a violet band, which alone reaches deep, needs nodes of its own."""


def nodes_needed(width_nm: float, meets_acylphosphine: bool) -> int:
    """How many wavelengths keep a band's dose within 1.2 % of its integral, 1 to 4 mm deep.

    Three do, except where an acylphosphine oxide absorbs: its absorption falls so steeply across the band that three
    are 9 % off behind 4 mm for a band of 20 nm, and five are 9 % off for one of 30 nm.

    Examples
    --------
    >>> nodes_needed(22.0, False), nodes_needed(20.0, True), nodes_needed(30.0, True)
    (3, 5, 9)
    """
    if not meets_acylphosphine:
        return 3
    return 9 if width_nm > WIDE_NM else 5


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
        3, 5 or 9, as ``nodes_needed`` says.

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
