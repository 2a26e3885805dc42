"""The light of a plan once more, vectorised in NumPy: a second opinion on the engine, and a measure of its speed.

It walks the same model on the same nodes and streams as `farside.trace.light`, all wavelengths of a plan at once as
batches of matrices and all exposures at once as arrays. Only the records and the choice of nodes, streams and the
maker's row are the engine's; whatever light does is written here anew.
"""

import math
from typing import NamedTuple

import numpy as np
from farside.clinic.assumed import value
from farside.clinic.lamp import Band
from farside.clinic.materials import chosen_row
from farside.clinic.optics import known_initiators
from farside.clinic.plan import Plan
from farside.physics.light.layers import THIN_SHARE
from farside.physics.light.paste import OWN_SLOPE_PER_NM, Paste
from farside.physics.light.streams import STREAM_COUNT, streams
from farside.trace.curves import DEEPEST_MM, STEP_MM, light_nodes
from farside.trace.light import bare_exitance_mw_cm2
from numpy.typing import NDArray

Array = NDArray[np.float64]
Light = tuple[Paste, tuple[Band, ...]]

ANISOTROPY = 0.8
COUNT = round(DEEPEST_MM / STEP_MM) + 1
RIM_COSINES = np.cos(np.pi * (np.arange(48) + 0.5) / 48)
RINGS, RING_WEIGHTS = np.polynomial.laguerre.laggauss(6)
ANGLES = np.pi * (np.arange(8) + 0.5) / 8
EYE = np.eye(STREAM_COUNT)


class Doses(NamedTuple):
    """What an increment needs and gets [J/cm²]; None where it cannot be had."""

    needed: float | None
    far: float | None
    edge: float | None


class Optics(NamedTuple):
    """One entry a node of every light, in one row."""

    absorption_per_mm: Array
    scattering_per_mm: Array
    refractive_index: Array
    share: Array
    weight: Array
    light: NDArray[np.intp]


class Curves(NamedTuple):
    """Logarithm of the dose by depth for a radiant exposure of 1, a row a light, and each light's smoothing length."""

    logs: Array
    smoothing_mm: Array

    def at(self, light: NDArray[np.intp], depth_mm: Array) -> Array:
        place = depth_mm / STEP_MM
        index = np.minimum(place.astype(np.intp), COUNT - 2)
        low = self.logs[light, index]
        return np.exp(low + (self.logs[light, index + 1] - low) * (place - index))


def plan_doses(plan: Plan) -> list[Doses]:
    """Needed, far and edge dose of each increment of a plan."""
    readings = plan.lamp.readings_until(plan.on, plan.mode.id)
    exitance = bare_exitance_mw_cm2(readings[-1]) * value("sleeves", plan.sleeve) if readings else None
    rows = [chosen_row(increment.composite.complete_rows(), exitance) for increment in plan.increments]
    pastes = [increment.composite.paste for increment in plan.increments]
    lights: dict[Light, int] = {}
    own = [lights.setdefault((paste, plan.mode.bands), len(lights)) for paste in pastes]
    makers = [
        None if row is None else lights.setdefault((paste, (row.band,)), len(lights))
        for paste, row in zip(pastes, rows, strict=True)
    ]
    curves = curves_of(list(lights))
    needed: list[float | None] = []
    for row, light in zip(rows, makers, strict=True):
        if row is None or light is None or row.thickness_mm is None:
            needed.append(None)
            continue
        reached = curves.at(np.array(light), np.array(row.thickness_mm))
        needed.append(row.irradiance_mw_cm2 * row.time_s * 1e-3 * float(reached) or None)
    far, edge = _received(plan, exitance, curves, np.array(own))
    return [Doses(*doses) for doses in zip(needed, far, edge, strict=True)]


def curves_of(lights: list[Light]) -> Curves:
    """Dose by depth of some lights in their pastes, all nodes of all lights in one batch."""
    optics = _optics(lights)
    tables = half_space_fluence(
        optics.absorption_per_mm, optics.scattering_per_mm, optics.refractive_index, STEP_MM, COUNT
    )
    used = optics.share * optics.weight
    by_light = np.where(optics.light == np.arange(len(lights))[:, None], used, 0.0)
    with np.errstate(divide="ignore"):  # a light that the initiators do not use has no dose
        logs = np.log(by_light @ tables)
    best = by_light.argmax(axis=1)
    absorption, scattering = optics.absorption_per_mm[best], optics.scattering_per_mm[best]
    return Curves(logs, 1.2 / np.sqrt(3.0 * absorption * (absorption + scattering)))


def half_space_fluence(absorption: Array, scattering: Array, index: Array, step_mm: float, count: int) -> Array:
    """Fluence rate over irradiance down half-spaces under air: a row a half-space, a column a depth."""
    each, which = np.unique(index, return_inverse=True)
    along = [streams(float(n)) for n in each]
    cosines, weights, reflected = (
        np.array([getattr(entry, name) for entry in along])[which] for name in ("cosines", "weights", "reflected")
    )
    reflect, transmit = _layers(step_mm, absorption, scattering, cosines, weights)
    below = _endless(reflect, transmit)
    onward = np.linalg.solve(EYE - reflect @ below, transmit)
    gathering = weights + np.einsum("ni,nij->nj", weights, below)
    entering = np.zeros_like(cosines)
    entering[:, -1] = (1.0 - reflected[:, -1]) / (cosines[:, -1] * weights[:, -1])
    down = np.linalg.solve(EYE - reflected[:, :, None] * below, entering[:, :, None])
    while down.shape[2] < count:  # twice as many depths each round
        down = np.concatenate((down, onward @ down), axis=2)
        onward = onward @ onward
    return np.einsum("ni,nid->nd", gathering, down[:, :, :count])


def surface_share(
    distance: Array, offset: Array, aside: Array | float, tilt: Array, tip_mm: float, exponent: float
) -> Array:
    """Irradiance over exitance on a tilted surface; everything in mm and radians, broadcast."""
    axial = np.maximum(distance + offset * np.sin(tilt), 0.0)
    lateral = np.hypot(offset * np.cos(tilt), aside)
    return np.cos(tilt) * _off_axis_share(axial, lateral, tip_mm / 2.0, exponent)


def _received(
    plan: Plan, exitance: float | None, curves: Curves, own: NDArray[np.intp]
) -> tuple[list[float | None], list[float | None]]:
    """Far and edge doses of every increment, all exposures of the plan in one batch."""
    count = len(plan.increments)
    pairs = [(index, exposure) for index, increment in enumerate(plan.increments) for exposure in increment.exposures]
    unknown = {index for index, exposure in pairs if exitance is None or exposure.through_share is None}
    if exitance is None or not pairs:
        known: list[float | None] = [None if index in unknown else 0.0 for index in range(count)]
        return known, known
    at = np.array([index for index, _ in pairs])
    thickness = np.array([increment.thickness_mm for increment in plan.increments])
    follows = np.maximum(0.0, plan.gap_mm + plan.depth_mm - np.cumsum(thickness))
    given = np.array([math.nan if e.tip_distance_mm is None else e.tip_distance_mm for _, e in pairs])
    distance = np.where(np.isnan(given), follows[at], given)
    tilt = np.radians([exposure.tilt_deg for _, exposure in pairs])
    aim = np.array([exposure.aim_offset_mm for _, exposure in pairs])
    side = np.array([exposure.from_side for _, exposure in pairs])
    exposure_j = 1e-3 * exitance * np.array([(e.through_share or 0.0) * e.time_s for _, e in pairs])
    beam = plan.lamp.tip_diameter_mm, plan.lamp.beam.spread_exponent

    middle = exposure_j * surface_share(distance, -aim, 0.0, tilt, *beam)
    light = own[at]
    far = middle * curves.at(light, np.where(side, plan.width_mm / 2.0, thickness[at]))

    walls = np.array([[-0.5], [0.5]]) * plan.width_mm - aim
    shape = (..., None, None)
    reach = (curves.smoothing_mm[light][:, None] * RINGS)[:, :, None]
    spread = surface_share(
        distance[shape], walls[shape] + reach * np.cos(ANGLES), reach * np.sin(ANGLES), tilt[shape], *beam
    )
    smoothed = np.einsum("r,wera->we", RING_WEIGHTS, spread) / len(ANGLES)
    to_walls = exposure_j * curves.at(light, thickness[at]) * smoothed
    away = middle * curves.at(light, np.full(len(pairs), plan.width_mm))
    to_walls = np.where(side, away, to_walls)

    fars = np.bincount(at, far, count)
    edges = np.minimum(*(np.bincount(at, wall, count) for wall in to_walls))
    return (
        [None if index in unknown else float(dose) for index, dose in enumerate(fars)],
        [None if index in unknown else float(dose) for index, dose in enumerate(edges)],
    )


def _optics(lights: list[Light]) -> Optics:
    nodes = [light_nodes(bands, paste) for paste, bands in lights]
    light = np.repeat(np.arange(len(lights)), [len(own) for own in nodes])
    wavelength, share = np.array([node for own in nodes for node in own]).T
    fixed = np.array(
        [
            (paste.own_absorption_per_mm, paste.reduced_scattering_per_mm, paste.at_nm, paste.refractive_index)
            for paste, _ in lights
        ]
    )
    own_absorption, own_scattering, at_nm, index = fixed[light].T
    known = list(known_initiators().values())
    places = {initiator: place for place, initiator in enumerate(known)}
    amounts = np.zeros((len(lights), len(known)))
    for row, (paste, _) in zip(amounts, lights, strict=True):
        for initiator, amount in paste.parts:
            row[places[initiator]] += amount
    peak, height, blue, red, yields = np.array(
        [
            (i.peak_nm, i.peak_molar_absorption, i.half_width_blue_nm, i.half_width_red_nm, i.quantum_yield)
            for i in known
        ]
    ).T
    away = wavelength[:, None] - peak
    molar = height * np.exp2(-((away / np.where(away > 0.0, red, blue)) ** 2))
    amount = amounts[light]
    standard = known_initiators()["camphorquinone"]
    used = (amount * molar * yields).sum(axis=1) / amount.sum(axis=1)
    return Optics(
        absorption_per_mm=own_absorption * np.exp(OWN_SLOPE_PER_NM * (at_nm - wavelength))
        + math.log(10.0) / 10.0 * (amount * molar).sum(axis=1),
        scattering_per_mm=own_scattering * at_nm / wavelength,
        refractive_index=index,
        share=share,
        weight=wavelength / standard.peak_nm * used / (standard.peak_molar_absorption * standard.quantum_yield),
        light=light,
    )


def _layers(
    thickness_mm: float, absorption: Array, scattering: Array, cosines: Array, weights: Array
) -> tuple[Array, Array]:
    """Reflection and transmission of one layer of each medium: delta-M, the diamond start, then doubling."""
    peak = ANISOTROPY**STREAM_COUNT
    spread = scattering / (1.0 - ANISOTROPY) * (1.0 - peak)
    extinction = absorption + spread
    depth = thickness_mm * extinction
    doublings = np.maximum(0.0, np.ceil(np.log2(depth / (THIN_SHARE * cosines[:, 0])))).astype(int)
    thin = depth / 2.0**doublings

    degrees = np.arange(STREAM_COUNT)
    moments = (2 * degrees + 1) * (ANISOTROPY**degrees - peak) / (1.0 - peak)
    legendre = np.polynomial.legendre.legvander(cosines, STREAM_COUNT - 1)
    onward = np.einsum("k,nik,njk->nij", moments, legendre, legendre)
    back = np.einsum("k,nik,njk->nij", moments * (-1.0) ** degrees, legendre, legendre)
    steps = thin[:, None] / (2.0 * cosines)
    shares = (spread / extinction / 2.0)[:, None, None] * steps[:, :, None] * weights[:, None, :]
    lost = EYE * (1.0 + steps[:, :, None]) - shares * onward
    turned = shares * back
    sent_back = np.linalg.solve(lost, turned)
    inside = np.linalg.solve(lost - turned @ sent_back, np.broadcast_to(2.0 * EYE, lost.shape))
    reflect, transmit = sent_back @ inside, inside - EYE
    for done in range(doublings.max(initial=0)):
        more = doublings > done
        reflect[more], transmit[more] = _doubled(reflect[more], transmit[more])
    return reflect, transmit


def _doubled(reflect: Array, transmit: Array) -> tuple[Array, Array]:
    between = np.linalg.solve(EYE - reflect @ reflect, transmit)
    return reflect + transmit @ reflect @ between, transmit @ between


def _endless(reflect: Array, transmit: Array) -> Array:
    """Reflection of the half-spaces that such layers make up."""
    reflect, transmit = reflect.copy(), transmit.copy()
    while (more := transmit.max(axis=(1, 2)) > 1e-6).any():
        reflect[more], transmit[more] = _doubled(reflect[more], transmit[more])
    return reflect


def _off_axis_share(distance: Array, offset: Array, radius: float, exponent: float) -> Array:
    """The rim sum; at the tip itself 1 inside the rim, a half on it, 0 outside."""
    offset = np.abs(offset)
    height = np.square(distance)[..., None]
    across = offset[..., None]
    reach = radius**2 + across**2 - 2.0 * radius * across * RIM_COSINES
    with np.errstate(divide="ignore", invalid="ignore"):  # at the tip a rim point may be the place itself
        turned = radius * (radius - across * RIM_COSINES) / reach
        gathered = (turned * (1.0 - (height / (reach + height)) ** ((exponent + 1.0) / 2.0))).mean(axis=-1)
    at_tip = np.where(offset < radius, 1.0, np.where(offset == radius, 0.5, 0.0))
    return np.where(distance == 0.0, at_tip, np.clip(gathered, 0.0, 1.0))
