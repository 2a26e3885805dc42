"""Room lights from the CIE's illuminants by colour-science, blue-light weights and seconds a day by hand."""

import warnings
from collections.abc import Iterator
from functools import cache, partial
from typing import TYPE_CHECKING, Any, Final

from farside.physics.eyes.hazard import blue_light_weight, day_limit_s, reflected_radiance_w_m2_sr
from farside.physics.light.initiators import molar_absorption
from reference import tables
from reference.checks import Check, Figure, Group

if TYPE_CHECKING:
    from numpy.typing import NDArray

LUMENS_PER_W: Final = 683.0


@cache
def _wavelengths() -> "NDArray[Any]":
    import numpy as np

    return np.arange(380.0, 781.0)


@cache
def irradiance_per_klx(illuminant: str) -> "NDArray[Any]":
    """Spectral irradiance of 1 000 lx of a CIE illuminant. [mW/(cm² nm)]"""
    import numpy as np

    with warnings.catch_warnings():
        warnings.simplefilter("ignore")
        import colour

        shape = colour.SpectralShape(380, 780, 1)
        power = colour.SDS_ILLUMINANTS[illuminant].copy().align(shape).values
        eye = colour.SDS_LEFS["CIE 1924 Photopic Standard Observer"].copy().align(shape).values
    lumens_per_w = LUMENS_PER_W * np.trapezoid(power * eye, _wavelengths())
    return np.asarray(power * 1000.0 / lumens_per_w / 10.0)


def blue_mw_cm2(illuminant: str) -> float:
    """Irradiance from 400 to 500 nm in 1 000 lx."""
    import numpy as np

    blue = (_wavelengths() >= 400.0) & (_wavelengths() <= 500.0)
    return float(np.trapezoid(irradiance_per_klx(illuminant)[blue], _wavelengths()[blue]))


def weighted_mw_cm2(illuminant: str, edge_nm: float) -> float:
    """What 1 000 lx is worth to camphorquinone behind a filter that passes all from its edge on."""
    import numpy as np

    camphorquinone = tables.initiator("camphorquinone")
    taken = np.array([molar_absorption(camphorquinone, float(nm)) for nm in _wavelengths()])
    passed = np.where(_wavelengths() >= edge_nm, irradiance_per_klx(illuminant), 0.0)
    return float(np.trapezoid(passed * taken, _wavelengths()) / camphorquinone.peak_molar_absorption)


def _room_lights() -> Iterator[Check]:
    for light in tables.table("room-lights"):
        cie = light["cie"]
        values = {
            "from 400 to 500 nm": (partial(blue_mw_cm2, cie), light["blue_mw_cm2_per_klx"]),
            "as camphorquinone takes it up": (
                partial(weighted_mw_cm2, cie, 0.0),
                light["weighted_mw_cm2_per_klx"]["none"],
            ),
            "as camphorquinone takes it up behind an edge at 500 nm": (
                partial(weighted_mw_cm2, cie, 500.0),
                light["weighted_mw_cm2_per_klx"]["yellow"],
            ),
        }
        for place, (what, (worked_out, tabled)) in enumerate(values.items()):
            name = ("blue", "weighted", "yellow")[place]
            yield Check(
                id=f"room-{light['id']}-{name}",
                topic="room",
                group=f"room-light-{name}",
                source="cie-illuminants",
                says=f"1 000 lx of CIE illuminant {cie}, {what}",
                kind="set-by",
                sets=("room-lights",),
                published=worked_out,
                unit="mW/cm²",
                band=0.003,
                computed=partial(float, tabled),
            )


def _eye_weights() -> Iterator[Check]:
    for wavelength in (500.0, 525.0, 550.0, 575.0, 600.0):
        yield Check(
            id=f"blue-light-weight-{wavelength:g}",
            topic="eyes",
            group="blue-light-weight",
            kind="set-by",
            sets=("hazard-weights",),
            source="icnirp-2013",
            says=f"from 500 to 600 nm the weight is 10^((450 - nm)/50); at {wavelength:g} nm",
            published=10.0 ** ((450.0 - wavelength) / 50.0),
            unit="",
            band=1e-9,
            how_sure="seen",
            computed=partial(blue_light_weight, tables.hazard_weights(), wavelength),
        )


def _day_limit_s(irradiance_mw_cm2: float, reflectance_share: float, wavelength_nm: float) -> float:
    return day_limit_s(_radiance(irradiance_mw_cm2, reflectance_share, wavelength_nm))


def _radiance(irradiance_mw_cm2: float, reflectance_share: float, wavelength_nm: float) -> float:
    weight = blue_light_weight(tables.hazard_weights(), wavelength_nm)
    return reflected_radiance_w_m2_sr(irradiance_mw_cm2, reflectance_share, weight)


GROUPS: Final = (
    Group("room-light-blue", "Blue irradiance of 1 000 lx of each room light"),
    Group("room-light-weighted", "What 1 000 lx of each room light are worth to camphorquinone"),
    Group("room-light-yellow", "The same behind a yellow filter whose edge lies at 500 nm"),
    Group("blue-light-weight", "Blue-light weights from 500 to 600 nm"),
)
FIGURES: Final[tuple[Figure, ...]] = ()
CHECKS: Final = (
    *_room_lights(),
    *_eye_weights(),
    Check(
        id="tooth-radiance",
        topic="arithmetic",
        source="worked by hand",
        says="weight 0.80 at 460 nm; 1 000 mW/cm² on a matt tooth that sends back 0.4: 1 018.6",
        published=1018.6,
        unit="W/(m² sr)",
        band=1e-4,
        computed=partial(_radiance, 1000.0, 0.4, 460.0),
    ),
    Check(
        id="tooth-day-limit",
        topic="arithmetic",
        source="worked by hand",
        says="10^6 J/(m² sr) a day over 1 018.6 W/(m² sr): 981.7 s",
        published=981.7,
        unit="s",
        band=1e-4,
        computed=partial(_day_limit_s, 1000.0, 0.4, 460.0),
    ),
)
