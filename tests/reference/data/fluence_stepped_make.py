"""Makes fluence_stepped.csv: fluence inside pastes of index 1.5 by Monte Carlo, for the transport's checks.

Photons enter along the normal, scatter by Henyey-Greenstein, meet Fresnel's surfaces, and leave their weight where
they are absorbed; fluence is what a bin absorbs over its absorption. A slab of 40 mm stands for a half-space.
Run it by hand with NumPy:
python tests/reference/data/fluence_stepped_make.py > tests/reference/data/fluence_stepped.csv
"""

import numpy as np

PHOTONS, BATCHES = 200_000, 8
G, INDEX, ENDLESS_MM = 0.8, 1.5, 40.0
BIN_MM = 0.1
# absorption, reduced scattering, thickness, middles of the bins written out
CASES = (
    (0.2, 1.0, 2.0, (0.05, 0.45, 0.95, 1.45, 1.95)),
    (0.5, 2.0, 2.0, (0.05, 0.45, 0.95, 1.45, 1.95)),
    (0.2, 1.0, ENDLESS_MM, (0.05, 0.95, 1.95, 2.95, 3.95)),
    (0.4, 2.0, ENDLESS_MM, (0.05, 0.95, 1.95, 2.95)),
    (0.1, 0.5, ENDLESS_MM, (0.05, 0.95, 1.95, 3.95)),
)


def reflected_inside(cosine: np.ndarray) -> np.ndarray:
    """Fresnel, from the paste to air, unpolarised."""
    sine_out = INDEX * np.sqrt(1.0 - cosine**2)
    outside = np.sqrt(np.clip(1.0 - sine_out**2, 0.0, None))
    across = ((INDEX * cosine - outside) / (INDEX * cosine + outside)) ** 2
    along = ((INDEX * outside - cosine) / (INDEX * outside + cosine)) ** 2
    return np.where(sine_out >= 1.0, 1.0, (across + along) / 2.0)


def absorbed(rng: np.random.Generator, absorption: float, reduced: float, thickness: float) -> np.ndarray:
    """Share of the light that each bin of depth absorbs."""
    extinction = absorption + reduced / (1.0 - G)
    albedo = 1.0 - absorption / extinction
    kept = np.zeros(round(thickness / BIN_MM))
    depth, cosine = np.zeros(PHOTONS), np.ones(PHOTONS)
    weight = np.full(PHOTONS, 1.0 - ((INDEX - 1.0) / (INDEX + 1.0)) ** 2)
    while depth.size:
        depth = depth + cosine * rng.exponential(1.0 / extinction, depth.size)
        alive = np.ones(depth.size, bool)
        out = (depth < 0.0) | (depth > thickness)
        while out.any():
            places = np.flatnonzero(out & alive)
            if not places.size:
                break
            escapes = rng.random(places.size) >= reflected_inside(np.abs(cosine[places]))
            alive[places[escapes]] = False
            back = places[~escapes]
            depth[back] = np.where(depth[back] < 0.0, -depth[back], 2.0 * thickness - depth[back])
            cosine[back] = -cosine[back]
            out = (depth < 0.0) | (depth > thickness)
        depth, cosine, weight = depth[alive], cosine[alive], weight[alive]
        bins = np.minimum((depth / BIN_MM).astype(int), kept.size - 1)
        kept += np.bincount(bins, weight * (1.0 - albedo), kept.size)
        weight = weight * albedo
        # scatter: Henyey-Greenstein about the old direction, its cosine to the normal alone is followed
        turn = (1.0 + G**2 - ((1.0 - G**2) / (1.0 - G + 2.0 * G * rng.random(depth.size))) ** 2) / (2.0 * G)
        around = np.cos(2.0 * np.pi * rng.random(depth.size))
        cosine = cosine * turn + np.sqrt(np.clip((1.0 - cosine**2) * (1.0 - turn**2), 0.0, None)) * around
        cosine = np.clip(cosine, -1.0, 1.0)
        # roulette keeps the faint few without bias
        faint = weight < 1e-3
        stays = ~faint | (rng.random(depth.size) < 0.1)
        weight = np.where(faint, weight * 10.0, weight)
        depth, cosine, weight = depth[stays], cosine[stays], weight[stays]
    return kept / PHOTONS


def main() -> None:
    rng = np.random.default_rng(20261130)
    print("absorption_per_mm,reduced_scattering_per_mm,thickness_mm,from_mm,to_mm,fluence,standard_error")
    for absorption, reduced, thickness, middles in CASES:
        runs = np.array([absorbed(rng, absorption, reduced, thickness) for _ in range(BATCHES)])
        runs /= absorption * BIN_MM
        fluence, error = runs.mean(axis=0), runs.std(axis=0, ddof=1) / np.sqrt(BATCHES)
        for middle in middles:
            place = int(middle / BIN_MM)
            print(
                f"{absorption},{reduced},{'' if thickness == ENDLESS_MM else thickness},"
                f"{place * BIN_MM:.1f},{(place + 1) * BIN_MM:.1f},{fluence[place]:.5g},{error[place]:.2g}"
            )


if __name__ == "__main__":
    main()
