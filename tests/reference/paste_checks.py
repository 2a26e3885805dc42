"""The usual pastes against what was measured on real ones: order of magnitude, not proof."""

import math
from collections.abc import Iterator
from functools import partial
from typing import Final

import yaml
from farside.physics.light.bands import band_nodes
from farside.physics.light.paste import absorption_at, absorption_from_transmittance, scattering_at
from farside.physics.light.transport import slab
from reference import tables
from reference.checks import Check, Figure, Group, Point
from reference.tables import TABLES

CAMPHORQUINONE: Final = ("camphorquinone", 0.005)
RULES: Final = ("assumed-optics", "edge-dose", "far-side-dose", "first-increment-deep")
# where the usual pastes lie outside the published range: by how much, and why
OUTSIDE: Final = {
    ("light", 2.0): (
        0.0194,
        "Passes a little more than the clearest of three: too much light is counted, if it is one.",
    ),
    ("opaque", 4.0): (
        -0.00568,
        "Darker than the darkest of three, none of which need have been opaque: the safe side.",
    ),
}
THICKNESSES_MM: Final = tuple(step / 10.0 for step in range(1, 41, 3))


def passed(group: str, thickness_mm: float, peak_nm: float, width_nm: float) -> float:
    """Share of a band that leaves the far side of a slab of a usual paste in air."""
    paste = tables.usual_paste(group, CAMPHORQUINONE)
    return sum(
        share * slab(thickness_mm, absorption_at(paste, nm), scattering_at(paste, nm)).transmittance
        for nm, share in band_nodes(peak_nm, width_nm, 1.0)
    )


def violet_over_blue_per_mm() -> float:
    """How much more a medium paste attenuates violet than blue, through 4 mm."""
    return math.log(passed("medium", 4.0, 460.0, 20.0) / passed("medium", 4.0, 405.0, 20.0)) / 4.0


def straightness() -> float:
    """r² of the logarithm of the transmittance against thickness, 0.1 to 4 mm."""
    logs = [math.log(passed("medium", thickness, 455.0, 22.0)) for thickness in THICKNESSES_MM]
    middle, mean = sum(THICKNESSES_MM) / len(logs), sum(logs) / len(logs)
    across = sum((x - middle) * (y - mean) for x, y in zip(THICKNESSES_MM, logs, strict=True))
    spread = sum((x - middle) ** 2 for x in THICKNESSES_MM)
    return across**2 / (spread * sum((y - mean) ** 2 for y in logs))


def violet_share(thickness_mm: float) -> float:
    """Violet share of what leaves a medium paste, when 15.4 % of what enters is violet."""
    violet = 0.154 * passed("medium", thickness_mm, 405.0, 20.0)
    return violet / (violet + 0.846 * passed("medium", thickness_mm, 460.0, 20.0))


def bulk_fill_passed(thickness_mm: float) -> float:
    """Share of blue light that passes the example clinic's bulk-fill, by the one transmittance on its card."""
    with (TABLES.parent / "example-clinic" / "composites" / "bulk-fill.yaml").open(encoding="utf-8") as file:
        card = yaml.safe_load(file)
    optics, scattering = card["optics"], tables.row("pastes", card["shade"]["group"])["reduced_scattering_per_mm"]
    absorption = absorption_from_transmittance(optics["transmittance_share"], optics["at_mm"], scattering, 1.5)
    return slab(thickness_mm, absorption, scattering).transmittance


def _transmittances() -> Iterator[Check]:
    for group in ("light", "medium", "dark", "opaque"):
        for thickness in (2.0, 4.0):
            misses_by, note = OUTSIDE.get((group, thickness), (None, "The shades of the source are not known here."))
            yield Check(
                id=f"passed-{group}-{thickness:g}",
                topic="paste",
                source="oper-dent-2018-e19",
                says="three conventional composites, 2 and 4 mm, two lamps: 0.7 to 16.7 % pass; "
                f"the usual {group} paste, {thickness:g} mm",
                published=(0.007, 0.167),
                unit="",
                band=0.0,
                kind="plausibility" if misses_by is None else "miss",
                misses_by=misses_by,
                note=note,
                rules=RULES,
                how_sure="seen",
                computed=partial(passed, group, thickness, 460.0, 20.0),
                point=Point("passed", f"usual {group} paste", thickness),
            )
    for thickness in (2.0, 4.0):
        yield Check(
            id=f"passed-bulk-fill-{thickness:g}",
            topic="paste",
            source="oper-dent-2018-e19",
            says="three bulk-fill composites, 2 and 4 mm, two lamps: 2.9 to 27 % pass; "
            f"the example clinic's bulk-fill, {thickness:g} mm",
            published=(0.029, 0.27),
            unit="",
            band=0.0,
            kind="plausibility",
            note="The card is invented; its transmittance is that of 4 mm, and what passes 2 mm follows from it.",
            rules=RULES,
            how_sure="seen",
            computed=partial(bulk_fill_passed, thickness),
            point=Point("passed", "the example clinic's bulk-fill", thickness),
        )


def _medium_shades() -> Iterator[Check]:
    for absorbance, misses_by in ((1.11, 0.0688), (1.21, 0.0848), (1.62, 0.1225)):
        yield Check(
            id=f"passed-medium-shade-{absorbance:g}",
            topic="paste",
            source="ilie-plenk-2018",
            says=f"three composites of one medium shade, 2 mm: absorbance 1.11, 1.21 and 1.62; this one {absorbance:g}",
            published=10.0**-absorbance,
            unit="",
            band=0.25,
            kind="miss",
            misses_by=misses_by,
            note="The usual medium paste passes more than all three: the unsafe side, as far as a plan strays from its "
            "maker's thickness, since the need is worked out with the same paste. The source's lamp gave violet too, "
            "of which less passes; only blue is counted here.",
            rules=RULES,
            how_sure="seen",
            computed=partial(passed, "medium", 2.0, 460.0, 20.0),
            point=Point("passed", "usual medium paste against three of one shade", 2.0),
        )


GROUPS: Final[tuple[Group, ...]] = ()
FIGURES: Final = (Figure("passed", "Light that passes a paste", "Thickness, mm", "Share that passes", log_y=True),)
CHECKS: Final = (
    Check(
        id="violet-against-blue",
        topic="paste",
        source="harlow-2016",
        says="violet attenuated 0.43 to 0.68 per mm more than blue over 4 mm",
        published=0.555,
        unit="1/mm",
        band=0.02,
        kind="set-by",
        sets=("own_absorption.slope",),
        rules=("violet-at-depth",),
        how_sure="seen",
        computed=violet_over_blue_per_mm,
    ),
    Check(
        id="decay-looks-exponential",
        topic="paste",
        source="harlow-2016",
        says="from 0.1 to 4 mm the decay fits an exponential with an r² above 0.98",
        published=(0.98, 1.0),
        unit="",
        band=0.0,
        how_sure="seen",
        computed=straightness,
    ),
    Check(
        id="violet-share-4-mm",
        topic="paste",
        source="harlow-2016",
        says="a violet share of 15.4 % at the tip is 1.2 to 3.1 % of what passes 4 mm",
        published=(0.012, 0.031),
        unit="",
        band=0.0,
        kind="set-by",
        sets=("own_absorption.slope",),
        rules=("violet-at-depth",),
        how_sure="seen",
        computed=partial(violet_share, 4.0),
    ),
    *_transmittances(),
    *_medium_shades(),
)
