"""Bands, edge and dose weight against dense integration by SciPy, and photon energies from its constants."""

import math
from collections.abc import Iterator
from functools import partial
from typing import Final

from farside.physics.light.bands import band_nodes
from farside.physics.light.beam import off_axis_share
from farside.physics.light.edge import smoothed_share
from farside.physics.light.initiators import Initiator, dose_weight
from farside.physics.light.paste import Paste, absorption_at, scattering_at
from farside.physics.light.transport import half_space_fluence
from reference import tables
from reference.checks import Check, Figure, Group

BLUE: Final = (("camphorquinone", 0.005),)
BOTH: Final = (("camphorquinone", 0.001), ("mono-acylphosphine-oxide", 0.006))
# paste, initiators, band's peak, its width, nodes
BANDS: Final = (
    ("medium", BLUE, 455.0, 22.0, 3),
    ("medium", BLUE, 470.0, 35.0, 3),
    ("opaque", BLUE, 455.0, 22.0, 3),
    ("light", BOTH, 405.0, 20.0, 5),
    ("light", BOTH, 405.0, 30.0, 9),
)
DEPTHS_MM: Final = (1.0, 2.0, 4.0)


def dose_at(paste: Paste, depth_mm: float, wavelength_nm: float) -> float:
    """Dose at a depth of a half-space for a radiant exposure of 1 at a wavelength."""
    fluence = half_space_fluence(
        absorption_at(paste, wavelength_nm), scattering_at(paste, wavelength_nm), step_mm=depth_mm, count=2
    )[1]
    return fluence * dose_weight(paste.parts, wavelength_nm, tables.initiator("camphorquinone"))


def _by_nodes(paste: Paste, depth_mm: float, peak_nm: float, width_nm: float, count: int) -> float:
    return sum(share * dose_at(paste, depth_mm, nm) for nm, share in band_nodes(peak_nm, width_nm, 1.0, count))


def _densely(paste: Paste, depth_mm: float, peak_nm: float, width_nm: float) -> float:
    """The same over the whole bell, a width and a half to either side, by SciPy's Simpson at every 1/20 of a width."""
    import numpy as np
    from scipy.integrate import simpson

    away = np.linspace(-1.5, 1.5, 61)
    bell = 0.5 ** (4.0 * away**2)
    doses = np.array([dose_at(paste, depth_mm, peak_nm + width_nm * step) for step in away])
    return float(simpson(bell * doses, x=away) / simpson(bell, x=away))


def _bands() -> Iterator[Check]:
    for group, amounts, peak, width, count in BANDS:
        paste = tables.usual_paste(group, *amounts)
        for depth in DEPTHS_MM:
            yield Check(
                id=f"band-{group}-{peak:g}-{width:g}-{count}-{depth:g}",
                topic="paste",
                group="band-nodes",
                source="SciPy, simpson",
                says=f"dose {depth:g} mm deep in the usual {group} paste, band of {width:g} nm at {peak:g} nm",
                published=partial(_densely, paste, depth, peak, width),
                unit="J/cm²",
                band=0.012,
                computed=partial(_by_nodes, paste, depth, peak, width, count),
            )


def _profile(along: float, across: float) -> float:
    return off_axis_share(4.0, math.hypot(along, across), 8.0, 3.5)


def _smoothed_densely(at_mm: float, length_mm: float) -> float:
    from scipy.integrate import dblquad

    def part(angle: float, ring: float) -> float:
        away = length_mm * ring
        return math.exp(-ring) / math.pi * _profile(at_mm + away * math.cos(angle), away * math.sin(angle))

    return float(dblquad(part, 0.0, 30.0, 0.0, math.pi, epsabs=1e-6, epsrel=1e-5)[0])


def _edges() -> Iterator[Check]:
    for at_mm in (0.0, 2.0, 3.0, 4.0):
        for length_mm in (0.7, 1.4):
            yield Check(
                id=f"edge-{at_mm:g}-{length_mm:g}",
                topic="arithmetic",
                group="edge-smoothing",
                source="SciPy, dblquad",
                says=f"beam smoothed over {length_mm:g} mm, {at_mm:g} mm off the axis, 4 mm under an 8 mm tip, m 3.5",
                published=partial(_smoothed_densely, at_mm, length_mm),
                unit="",
                band=0.02,
                computed=partial(smoothed_share, _profile, at_mm, length_mm),
            )


def photon_energy_kj_mol(wavelength_nm: float) -> float:
    """Energy of a mole of photons, from SciPy's constants."""
    from scipy import constants

    return float(constants.N_A * constants.h * constants.c / (wavelength_nm * 1e-9) / 1e3)


def _photons_counted(wavelength_nm: float) -> float:
    """What the dose weight makes of a photon's energy, with an initiator that takes all colours alike."""
    even = Initiator("even", 100.0, 1.0, 469.0, 50.0, 1e9, 1e9)
    return photon_energy_kj_mol(469.0) / dose_weight(((even, 1.0),), wavelength_nm, even)


GROUPS: Final = (
    Group("band-nodes", "Dose in usual pastes under a whole band, against that of its few nodes"),
    Group("edge-smoothing", "A beam's fall to the side smoothed over 0.7 and 1.4 mm, against dense integration"),
    Group("photon-energy", "Energy of a mole of photons, 365 to 470 nm, as the dose weight counts them"),
)
FIGURES: Final[tuple[Figure, ...]] = ()
CHECKS: Final = (
    *_bands(),
    *_edges(),
    *(
        Check(
            id=f"photon-{wavelength:g}",
            topic="arithmetic",
            group="photon-energy",
            source="SciPy, constants",
            says=f"energy of a mole of photons of {wavelength:g} nm, as the dose weight counts them",
            published=partial(photon_energy_kj_mol, wavelength),
            unit="kJ/mol",
            band=1e-9,
            computed=partial(_photons_counted, wavelength),
        )
        for wavelength in (365.0, 405.0, 450.0, 470.0)
    ),
)
