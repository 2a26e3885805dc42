"""Makes fluence_matched.csv: fluence inside slabs without a step in index, by discrete ordinates.

Run it by hand with PythonicDISORT 1.8:
python tests/reference/data/fluence_matched_make.py > tests/reference/data/fluence_matched.csv
"""

import math

import numpy as np

STREAMS = 64  # g^64 is 6e-7, so the phase function needs no scaling
G = 0.8
SLABS = ((0.1, 1.0, 2.0), (0.2, 1.0, 2.0), (0.05, 3.0, 1.0), (0.5, 2.0, 2.0), (1.0, 1.0, 3.0), (0.05, 0.5, 0.5))


def fluence_shares(absorption: float, reduced: float, thickness: float, depths: list[float]) -> list[float]:
    """Fluence rate over the irradiance of a beam along the normal."""
    from PythonicDISORT.pydisort import pydisort  # only who makes the file anew needs it

    extinction = absorption + reduced / (1.0 - G)
    made = pydisort(
        np.array([extinction * thickness]),
        np.array([1.0 - absorption / extinction]),
        STREAMS,
        np.array([[G**k for k in range(STREAMS)]]),
        1.0,
        1.0,
        0.0,
        only_flux=True,
    )
    cosines, mean_radiance = made[0], made[3]
    nodes, weights = np.polynomial.legendre.leggauss(STREAMS // 2)
    assert np.allclose(cosines[: STREAMS // 2], (nodes + 1.0) / 2.0)
    halves = weights / 2.0
    shares = []
    for depth in depths:
        radiance = mean_radiance(extinction * depth)
        diffuse = 2.0 * math.pi * (halves @ radiance[: STREAMS // 2] + halves @ radiance[STREAMS // 2 :])
        shares.append(float(diffuse) + math.exp(-extinction * depth))
    return shares


def main() -> None:
    print("refractive_index,anisotropy,absorption_per_mm,reduced_scattering_per_mm,thickness_mm,depth_mm,fluence")
    for absorption, reduced, thickness in SLABS:
        depths = [thickness * share for share in (0.0, 0.25, 0.5, 0.75, 1.0)]
        for depth, share in zip(depths, fluence_shares(absorption, reduced, thickness, depths), strict=True):
            print(f"1.0,{G},{absorption},{reduced},{thickness},{depth},{share:.6g}")


if __name__ == "__main__":
    main()
