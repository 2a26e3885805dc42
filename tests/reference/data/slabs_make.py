"""Makes slabs.csv: reflectance and transmittance of slabs in air by iadpython, for the transport's checks.

Run it by hand with iadpython 0.5.3: python tests/reference/data/slabs_make.py > tests/reference/data/slabs.csv
"""

from itertools import product

LEAST_TRANSMITTANCE = 1e-5

# index, g, absorptions, reduced scatterings, thicknesses: the model's reach, then a few steps beside it.
GRIDS = (
    (1.0, 0.8, (0.05, 0.1, 0.2, 0.5, 1.0), (0.5, 1.0, 2.0, 4.0), (0.5, 1.0, 2.0, 3.0, 4.0, 5.0)),
    (1.5, 0.8, (0.05, 0.1, 0.2, 0.5, 1.0), (0.5, 1.0, 2.0, 4.0), (0.5, 1.0, 2.0, 3.0, 4.0, 5.0)),
    (1.4, 0.8, (0.05, 0.2, 1.0), (0.5, 1.0, 4.0), (0.5, 2.0, 5.0)),
    (1.6, 0.8, (0.05, 0.2, 1.0), (0.5, 1.0, 4.0), (0.5, 2.0, 5.0)),
    (1.5, 0.0, (0.05, 0.2, 1.0), (0.5, 1.0, 4.0), (0.5, 2.0, 5.0)),
    (1.5, 0.9, (0.05, 0.2, 1.0), (0.5, 1.0, 4.0), (0.5, 2.0, 5.0)),
)


def main() -> None:
    import iadpython  # only who makes the file anew needs it

    print(
        "refractive_index,anisotropy,absorption_per_mm,reduced_scattering_per_mm,thickness_mm,"
        "reflectance,transmittance,diffuse_reflectance,diffuse_transmittance"
    )
    for index, g, absorptions, scatterings, thicknesses in GRIDS:
        for absorption, reduced, thickness in product(absorptions, scatterings, thicknesses):
            scattering = reduced / (1.0 - g)
            sample = iadpython.Sample(
                a=scattering / (scattering + absorption),
                b=(scattering + absorption) * thickness,
                g=g,
                n=index,
                n_above=1.0,
                n_below=1.0,
                quad_pts=16,
            )
            reflected, passed, diffuse_reflected, diffuse_passed = sample.rt()
            if passed >= LEAST_TRANSMITTANCE:
                print(
                    f"{index},{g},{absorption},{reduced},{thickness},"
                    f"{reflected:.6g},{passed:.6g},{diffuse_reflected:.6g},{diffuse_passed:.6g}"
                )


if __name__ == "__main__":
    main()
