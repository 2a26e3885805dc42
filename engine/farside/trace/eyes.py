"""What a day's exposures use of the limit for blue light thrown back by the tooth."""

from functools import cache
from typing import Final

from farside import shipped
from farside.clinic.assumed import assumption
from farside.clinic.lamp import Mode
from farside.physics.eyes.hazard import band_weight, day_limit_s, reflected_radiance_w_m2_sr
from farside.physics.light.bands import band_nodes
from farside.trace.light import LightTrace

_WATCHING: Final = frozenset({"operator", "assistant"})


@cache
def hazard_weights() -> tuple[tuple[float, float], ...]:
    """The blue-light hazard weights by wavelength [nm]."""
    return tuple((float(row["wavelength_nm"]), float(row["weight"])) for row in shipped.table("hazard-weights")["rows"])


def mode_weight(mode: Mode) -> float:
    """How much a mode's light counts towards harm to the retina. [-]"""
    nodes = [node for band in mode.bands for node in band_nodes(band.peak_nm, band.width_nm, band.share)]
    return band_weight(hazard_weights(), nodes)


def day_share(trace: LightTrace) -> float | None:
    """The share of a day's limit that the day's exposures use, seen without a filter unless one is known.

    A filter counts where operator and assistant both wear it. The day's exposures take this plan's mean seconds each,
    at this plan's largest irradiance. None where the count of the day or an irradiance is not known, or the plan
    exposes nothing.
    """
    team = trace.plan.fields.get("team", {})
    count = team.get("exposures_today_count")
    lights = trace.exposures()
    arriving = [light.axis_mw_cm2 for light in lights if light.axis_mw_cm2 is not None]
    if count is None or not lights or len(arriving) < len(lights):
        return None
    mean_s = sum(light.exposure.time_s for light in lights) / len(lights)
    radiance = reflected_radiance_w_m2_sr(
        max(arriving), assumption("tooth-reflectance-share"), mode_weight(trace.plan.mode)
    )
    worn = _WATCHING.issubset(team.get("filters_for", ()))
    seen = radiance * float(team.get("filter_transmittance_share", 1.0) if worn else 1.0)
    return float(count) * mean_s / day_limit_s(seen) if seen > 0.0 else 0.0
