"""Makes edge.csv: how much of the middle's light an off-axis place deep in a paste has, by 3-D Monte Carlo.

Photons enter a half-space at one point along its normal, scatter by Henyey-Greenstein and meet Fresnel's surface.
What they leave at a depth is spread over the beam afterwards: light that entered at one point and is found at a
distance stands, by symmetry, for light of the whole beam found at one point. So each deposit counts with the beam's
mean over a circle of that distance round the place looked at. A row's share is the fluence there over that under an
endless beam of the axis's irradiance.

Beams: an even disc that ends at the wall, and an 8 mm tip some way off whose points emit as cos^m, its share summed
over the disc here. Run it by hand with NumPy (some minutes):
python tests/reference/data/edge_make.py > tests/reference/data/edge.csv
"""

from collections.abc import Callable, Iterator

import numpy as np

PHOTONS, BATCHES, SEED = 100_000, 6, 20261201
G, INDEX = 0.8, 1.5
DEPTHS_MM, HALF_BIN_MM, DEEPEST_MM, WIDEST_MM = (1.0, 2.0, 4.0), 0.1, 30.0, 30.0
OPTICS = ((0.1, 0.5), (0.2, 1.0), (0.4, 2.0))
# tip's distance (0: an even disc), its diameter, spread exponent, places along the width
BEAMS = (
    (0.0, 6.0, 0.0, (0.0, 1.5, 3.0)),
    (0.0, 8.0, 0.0, (0.0, 2.0, 4.0)),
    (2.0, 8.0, 2.5, (0.0, 2.0, 4.0)),
    (4.0, 8.0, 3.5, (0.0, 2.0, 4.0)),
    (8.0, 8.0, 2.5, (0.0, 2.0, 4.0)),
)
ROUND = np.cos(np.pi * (np.arange(180) + 0.5) / 180)
AWAY_MM = np.linspace(0.0, WIDEST_MM, 601)


def tip_share(distance: float, offsets: np.ndarray, diameter: float, exponent: float) -> np.ndarray:
    """Irradiance over exitance at some offsets: every point of the tip, its cos^m, distance and slant."""
    if distance == 0.0:
        return (offsets <= diameter / 2.0).astype(float)
    rings = (np.arange(100) + 0.5) / 100 * diameter / 2.0
    square = distance**2 + offsets[:, None, None] ** 2 + rings[:, None] ** 2
    square = square - 2.0 * offsets[:, None, None] * rings[:, None] * ROUND
    arriving = (exponent + 1.0) / (2.0 * np.pi) * (distance / np.sqrt(square)) ** (exponent + 1.0) / square
    return (arriving.mean(axis=2) * rings * 2.0 * np.pi).sum(axis=1) * diameter / 2.0 / 100


def mean_on_circles(beam: Callable[[np.ndarray], np.ndarray], place: float) -> np.ndarray:
    """Mean of a round beam over circles of `AWAY_MM` about a place beside its axis."""
    reach = np.sqrt(np.clip(AWAY_MM[:, None] ** 2 + place**2 + 2.0 * AWAY_MM[:, None] * place * ROUND, 0.0, None))
    return beam(reach).mean(axis=1)


def circles() -> dict[tuple[float, float, float, float], np.ndarray]:
    """Those means for every beam and place, over the beam's irradiance on the axis."""
    made = {}
    for distance, diameter, exponent, places in BEAMS:
        offsets = np.linspace(0.0, 2.0 * WIDEST_MM, 1201)
        shares = tip_share(distance, offsets, diameter, exponent)
        for place in places:
            if distance == 0.0:
                mean = mean_on_circles(lambda reach, edge=diameter / 2.0: (reach <= edge).astype(float), place)
            else:
                mean = mean_on_circles(lambda reach, at=offsets, table=shares: np.interp(reach, at, table), place)
            made[distance, diameter, exponent, place] = mean / shares[0]
    return made


def reflected_inside(cosine: np.ndarray) -> np.ndarray:
    """Fresnel, from the paste to air, unpolarised."""
    sine_out = INDEX * np.sqrt(1.0 - cosine**2)
    outside = np.sqrt(np.clip(1.0 - sine_out**2, 0.0, None))
    across = ((INDEX * cosine - outside) / (INDEX * cosine + outside)) ** 2
    along = ((INDEX * outside - cosine) / (INDEX * outside + cosine)) ** 2
    return np.where(sine_out >= 1.0, 1.0, (across + along) / 2.0)


def turned(rng: np.random.Generator, way: np.ndarray) -> np.ndarray:
    """Directions after a scattering each."""
    count = way.shape[1]
    turn = (1.0 + G**2 - ((1.0 - G**2) / (1.0 - G + 2.0 * G * rng.random(count))) ** 2) / (2.0 * G)
    side = np.sqrt(1.0 - turn**2)
    around = 2.0 * np.pi * rng.random(count)
    lean = np.sqrt(np.clip(1.0 - way[2] ** 2, 1e-18, None))
    one = np.array([way[0] * way[2], way[1] * way[2], -(lean**2)]) / lean
    other = np.array([-way[1], way[0], np.zeros(count)]) / lean
    new = way * turn + side * (np.cos(around) * one + np.sin(around) * other)
    upright = lean < 1e-6
    new[:, upright] = [
        (side * np.cos(around))[upright],
        (side * np.sin(around))[upright],
        (turn * np.sign(way[2]))[upright],
    ]
    return new / np.sqrt((new**2).sum(axis=0))


def deposits(
    rng: np.random.Generator, absorption: float, reduced: float
) -> Iterator[tuple[int, np.ndarray, np.ndarray]]:
    """Index of a depth, distances from the axis and weights of what photons leave there, step by step."""
    extinction = absorption + reduced / (1.0 - G)
    albedo = 1.0 - absorption / extinction
    at, way = np.zeros((3, PHOTONS)), np.zeros((3, PHOTONS))
    way[2] = 1.0
    weight = np.ones(PHOTONS)
    while weight.size:
        at = at + way * rng.exponential(1.0 / extinction, weight.size)
        out = at[2] < 0.0
        back = rng.random(weight.size) < reflected_inside(np.abs(way[2]))
        turned_in = out & back
        at[2, turned_in] *= -1.0
        way[2, turned_in] *= -1.0
        alive = (~out | back) & (at[2] < DEEPEST_MM)
        at, way, weight = at[:, alive], way[:, alive], weight[alive]
        for index, depth in enumerate(DEPTHS_MM):
            here = np.abs(at[2] - depth) < HALF_BIN_MM
            yield index, np.hypot(at[0, here], at[1, here]), weight[here]
        weight = weight * albedo
        way = turned(rng, way)
        faint = weight < 1e-3
        stays = ~faint | (rng.random(weight.size) < 0.1)
        weight = np.where(faint, weight * 10.0, weight)
        at, way, weight = at[:, stays], way[:, stays], weight[stays]


def main() -> None:
    rng, means = np.random.default_rng(SEED), circles()
    print(
        "absorption_per_mm,reduced_scattering_per_mm,depth_mm,tip_distance_mm,tip_diameter_mm,spread_exponent,"
        "offset_mm,share,standard_error"
    )
    for absorption, reduced in OPTICS:
        lit = np.zeros((BATCHES, len(DEPTHS_MM), len(means)))
        endless = np.zeros((BATCHES, len(DEPTHS_MM), 1))
        for batch in range(BATCHES):
            for index, away, weight in deposits(rng, absorption, reduced):
                endless[batch, index] += weight.sum()
                for column, mean in enumerate(means.values()):
                    lit[batch, index, column] += (weight * np.interp(away, AWAY_MM, mean)).sum()
        shares = lit / endless
        error = shares.std(axis=0, ddof=1) / np.sqrt(BATCHES)
        share = lit.sum(axis=0) / endless.sum(axis=0)
        for index, depth in enumerate(DEPTHS_MM):
            for column, beam in enumerate(means):
                numbers = ",".join(f"{number:g}" for number in (absorption, reduced, depth, *beam))
                print(f"{numbers},{share[index, column]:.5g},{error[index, column]:.2g}")


if __name__ == "__main__":
    main()
