"""Working times under room light against what was measured, and the standard's ambient test under its own light."""

from functools import partial
from typing import Final

from farside.physics.room.window import working_window_s
from reference import tables
from reference.checks import Check, Figure, Group, Point
from reference.room_and_eye_checks import weighted_mw_cm2

RULES: Final = ("left-out", "placing-in-window")
LANE: Final = "23 composites: 162 ± 49 s at 8 000 lx, 54 ± 14 s in a clinic at 24 000 lx"


def weight(light: str) -> float:
    """What 1 000 lx of one of the table's lights are worth to camphorquinone. [mW/cm²]"""
    return float(tables.row("room-lights", light)["weighted_mw_cm2_per_klx"]["none"])


def of_test(key: str) -> float:
    """One figure of the standard's ambient test."""
    return float(tables.row("ambient-test", key)["value"])


def window_s(seconds: float, illuminance_lx: float, light: str) -> float:
    """Working window of a composite that stood some seconds of the standard's test, under another light."""
    return working_window_s(of_test("illuminance"), seconds, weight("window"), ((illuminance_lx, weight(light)),))


def standard_window_s(illuminance_lx: float, light: str) -> float:
    """The same for a composite of which only the standard's least is known."""
    return window_s(of_test("time"), illuminance_lx, light)


def _scaled_s(light: str, illuminant: str) -> Check:
    return Check(
        id=f"ambient-test-scaled-{light}",
        topic="room",
        source="cie-illuminants",
        says=f"60 s under 8 000 lx of D65, carried to 8 000 lx of {illuminant} by the illuminants' spectra",
        published=lambda: 60.0 * weighted_mw_cm2("D65", 0.0) / weighted_mw_cm2(illuminant, 0.0),
        unit="s",
        band=0.005,
        kind="set-by",
        sets=("room-lights",),
        rules=RULES,
        computed=partial(standard_window_s, 8000.0, light),
    )


GROUPS: Final[tuple[Group, ...]] = ()
FIGURES: Final = (Figure("working-time", "Working time under room light", "Illuminance, lx", "Seconds"),)
CHECKS: Final = (
    Check(
        id="ambient-test",
        topic="room",
        source="iso-4049",
        says="stays homogeneous for 60 s under 8 000 lx: a window of just that under the test's own light",
        published=60.0,
        unit="s",
        band=1e-9,
        kind="set-by",
        sets=("ambient-test",),
        rules=RULES,
        how_sure="seen",
        computed=partial(standard_window_s, 8000.0, "window"),
    ),
    _scaled_s("operating-light-led", "LED-B3"),
    _scaled_s("halogen", "A"),
    _scaled_s("fluorescent", "FL2"),
    Check(
        id="working-time-standard-is-least",
        topic="room",
        source="lane-1998",
        says=f"{LANE}; the mean less two deviations, 64 s, against the standard's least that stands in for a bare card",
        published=162.0 - 2.0 * 49.0,
        unit="s",
        band=0.1,
        kind="plausibility",
        note="That the 23 times are spread evenly round their mean is taken.",
        rules=RULES,
        how_sure="seen",
        computed=partial(standard_window_s, 8000.0, "window"),
        point=Point("working-time", "the standard's least, daylight", 8000.0),
    ),
    Check(
        id="working-time-constant-product",
        topic="room",
        source="lane-1998",
        says=f"{LANE}: illuminance times time is constant, 1.296 million lx s",
        published=1.296e6,
        unit="lx s",
        band=1e-6,
        kind="set-by",
        sets=("working window: illuminance times time is constant",),
        rules=RULES,
        how_sure="seen",
        computed=lambda: 24000.0 * window_s(162.0, 24000.0, "window"),
    ),
    Check(
        id="working-time-in-clinic",
        topic="room",
        source="lane-1998",
        says=f"{LANE}: from the first to the second, under light of one kind",
        published=(54.0 - 14.0, 54.0 + 14.0),
        unit="s",
        band=0.0,
        kind="set-by",
        sets=("working window: illuminance times time is constant",),
        rules=RULES,
        how_sure="seen",
        computed=partial(window_s, 162.0, 24000.0, "window"),
        point=Point("working-time", "light of one kind", 24000.0),
    ),
    *(
        Check(
            id=f"working-time-in-clinic-{light}",
            topic="room",
            source="lane-1998",
            says=f"{LANE}: from the first, taken as daylight, to the second, taken as {kind}",
            published=(54.0 - 14.0, 54.0 + 14.0),
            unit="s",
            band=0.0,
            kind="miss",
            misses_by=misses_by,
            note="Which lights stood there is not known here. If they differed as taken, weighing light by its colour "
            "gives too long a window: the unsafe side. If they were alike, the published times follow.",
            rules=RULES,
            how_sure="seen",
            computed=partial(window_s, 162.0, 24000.0, light),
            point=Point("working-time", f"from daylight to {kind}", 24000.0),
        )
        for light, kind, misses_by in (
            ("halogen", "a halogen lamp", 90.5),
            ("operating-light-led", "an LED operating light", 28.7),
        )
    ),
)
