"""What an initiator absorbs at a wavelength, and what each wavelength's light is worth to it."""

import math
from dataclasses import dataclass
from typing import Final

PASTE_DENSITY_G_L: Final = 2000.0
"""Ours: a filled paste weighs about twice as much as water."""


@dataclass(frozen=True, slots=True)
class Initiator:
    """An initiator's absorption as two half-bells that meet at its peak.

    name : as the tables have it.
    molar_mass_g_mol : [g/mol]
    quantum_yield : starting radicals per photon absorbed. [-]
    peak_nm : where it absorbs most, of the band that a lamp can reach. [nm]
    peak_molar_absorption : there, decadic. [L/(mol cm)]
    half_width_blue_nm, half_width_red_nm : from the peak to half its height, to shorter and to longer waves. [nm]
    """

    name: str
    molar_mass_g_mol: float
    quantum_yield: float
    peak_nm: float
    peak_molar_absorption: float
    half_width_blue_nm: float
    half_width_red_nm: float


def molar_absorption(initiator: Initiator, wavelength_nm: float) -> float:
    """Decadic molar absorption at a wavelength, in L/(mol cm).

    Examples
    --------
    >>> camphorquinone = Initiator("camphorquinone", 166.22, 0.07, 469.0, 46.0, 38.0, 21.0)
    >>> molar_absorption(camphorquinone, 469.0), round(molar_absorption(camphorquinone, 490.0), 9)
    (46.0, 23.0)
    """
    away_nm = wavelength_nm - initiator.peak_nm
    half_width_nm = initiator.half_width_red_nm if away_nm > 0.0 else initiator.half_width_blue_nm
    return initiator.peak_molar_absorption * math.exp2(-((away_nm / half_width_nm) ** 2))


def absorption_per_mm(initiator: Initiator, concentration_mol_l: float, wavelength_nm: float) -> float:
    """Absorption coefficient (to base e) that an initiator gives a paste, per mm.

    Examples
    --------
    >>> camphorquinone = Initiator("camphorquinone", 166.22, 0.07, 469.0, 46.0, 38.0, 21.0)
    >>> round(absorption_per_mm(camphorquinone, 0.0132, 469.0), 3)
    0.14
    """
    return math.log(10.0) * molar_absorption(initiator, wavelength_nm) * concentration_mol_l / 10.0


def concentration_mol_l(weight_share_of_resin: float, resin_weight_share: float, molar_mass_g_mol: float) -> float:
    """Initiator in the paste from its share of the resin and the resin's share of the paste, both by weight.

    Examples
    --------
    >>> round(concentration_mol_l(0.005, 0.22, 166.22), 5)
    0.01324
    """
    return weight_share_of_resin * resin_weight_share * PASTE_DENSITY_G_L / molar_mass_g_mol


def dose_weight(parts: tuple[tuple[Initiator, float], ...], wavelength_nm: float, reference: Initiator) -> float:
    """What a unit of fluence at a wavelength is worth, one of the reference initiator's at its peak being 1.

    Photons per unit of energy rise with the wavelength; of those, each initiator starts radicals by its
    absorption and its quantum yield.

    Parameters
    ----------
    parts : tuple of (Initiator, float)
        Initiators and their amounts, as mole shares or concentrations: only their proportions count.
    wavelength_nm : float
        Of the light. [nm]
    reference : Initiator
        Camphorquinone.

    Returns
    -------
    float
        Weight of a fluence. [-]

    Examples
    --------
    >>> camphorquinone = Initiator("camphorquinone", 166.22, 0.07, 469.0, 46.0, 38.0, 21.0)
    >>> dose_weight(((camphorquinone, 0.013),), 469.0, camphorquinone)
    1.0
    >>> round(dose_weight(((camphorquinone, 0.013),), 431.0, camphorquinone), 3)
    0.459
    """
    whole = math.fsum(amount for _, amount in parts)
    used = math.fsum(
        amount / whole * molar_absorption(initiator, wavelength_nm) * initiator.quantum_yield
        for initiator, amount in parts
    )
    return wavelength_nm / reference.peak_nm * used / (reference.peak_molar_absorption * reference.quantum_yield)
