"""How much blue light comes back from a tooth to the eyes, and for how many seconds a day it may."""

import math
from bisect import bisect_right
from collections.abc import Sequence
from typing import Final

DAY_LIMIT_J_M2_SR: Final = 1e6
"""Weighted radiance times seconds in a day, up to 10 000 s (ICNIRP 2013, extended source)."""


def blue_light_weight(table: Sequence[tuple[float, float]], wavelength_nm: float) -> float:
    """Blue-light hazard weight at a wavelength, straight between the table's logarithms.

    Parameters
    ----------
    table : sequence of (float, float)
        Wavelength and weight above 0, by rising wavelength. [nm, -]
    wavelength_nm : float
        Of the light; outside the table the weight of its nearer end. [nm]

    Examples
    --------
    >>> table = ((450.0, 0.94), (455.0, 0.90), (500.0, 0.10), (600.0, 0.001))
    >>> blue_light_weight(table, 455.0)
    0.9
    >>> round(blue_light_weight(table, 550.0), 6)
    0.01
    """
    place = bisect_right(table, wavelength_nm, key=lambda row: row[0])
    if place in (0, len(table)):
        return table[min(place, len(table) - 1)][1]
    (low_nm, low), (high_nm, high) = table[place - 1], table[place]
    if wavelength_nm == low_nm:
        return low
    return math.exp(math.log(low) + (wavelength_nm - low_nm) / (high_nm - low_nm) * math.log(high / low))


def band_weight(table: Sequence[tuple[float, float]], nodes: Sequence[tuple[float, float]]) -> float:
    """Blue-light hazard weight of a lamp's light, given its wavelengths with their shares.

    Examples
    --------
    >>> band_weight(((450.0, 0.8), (460.0, 0.4)), ((450.0, 0.5), (460.0, 0.5)))
    0.6000000000000001
    """
    whole = math.fsum(share for _, share in nodes)
    return math.fsum(share * blue_light_weight(table, wavelength_nm) for wavelength_nm, share in nodes) / whole


def reflected_radiance_w_m2_sr(irradiance_mw_cm2: float, reflectance_share: float, weight: float) -> float:
    """Blue-light weighted radiance of a lit tooth, taken as a matt (Lambertian) surface.

    Parameters
    ----------
    irradiance_mw_cm2 : float
        On the tooth. [mW/cm²]
    reflectance_share : float
        What the tooth sends back, 0 to 1. [-]
    weight : float
        Blue-light weight of the light, times any filter's transmittance. [-]

    Examples
    --------
    >>> round(reflected_radiance_w_m2_sr(1000.0, 0.4, 0.80), 1)
    1018.6
    """
    return 10.0 * irradiance_mw_cm2 * reflectance_share * weight / math.pi


def day_limit_s(weighted_radiance_w_m2_sr: float) -> float:
    """Seconds a day for which a weighted radiance may be looked at.

    Past 10 000 s the standard limits the radiance alone, so a longer figure than that means little.

    Parameters
    ----------
    weighted_radiance_w_m2_sr : float
        0 or more. [W/(m² sr)]

    Returns
    -------
    float
        Seconds; infinite without light. [s]

    Examples
    --------
    >>> round(day_limit_s(1018.6), 1)
    981.7

    References
    ----------
    ICNIRP 2013, extended source.
    """
    return DAY_LIMIT_J_M2_SR / weighted_radiance_w_m2_sr if weighted_radiance_w_m2_sr > 0.0 else math.inf
