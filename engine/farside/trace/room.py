"""The room's light on the paste: how much it counts, how long it leaves a composite workable."""

from collections.abc import Mapping, Sequence
from functools import cache
from typing import Final

from farside import shipped
from farside.clinic.assumed import value
from farside.clinic.materials import Composite
from farside.clinic.plan import RoomSource
from farside.physics.room.window import room_weighted_mw_cm2, working_window_s

_NO_FILTER: Final = "none"


@cache
def weights() -> Mapping[tuple[str, str], float]:
    """What each light is worth to camphorquinone behind each filter. [mW/cm² per 1 000 lx]"""
    return {
        (row["id"], behind): float(weight)
        for row in shipped.table("room-lights")["rows"]
        for behind, weight in row["weighted_mw_cm2_per_klx"].items()
    }


def weighted_mw_cm2(sources: Sequence[RoomSource]) -> float:
    """The room's lights on the paste as camphorquinone sees them, all together. [mW/cm²]"""
    return room_weighted_mw_cm2(_weighed(sources))


def unfiltered_lx(sources: Sequence[RoomSource]) -> float:
    """The room's light on the paste that passes no filter. [lx]"""
    return sum((light.illuminance_lx for light in sources if light.filter == _NO_FILTER), start=0.0)


def working_window_of(composite: Composite, sources: Sequence[RoomSource]) -> float | None:
    """Seconds that a composite may be handled under the room's lights; None in the dark, where nothing ends it.

    Where its card has no ambient figure, the least that the standard asks of any composite stands in. Daylight stands
    for the light of the test.
    """
    ambient = composite.ambient
    tested_lx = value("ambient-test", "illuminance") if ambient is None else ambient.illuminance_lx
    tested_s = value("ambient-test", "time") if ambient is None else ambient.time_s
    weighed = _weighed(sources)
    if not any(illuminance_lx * weight for illuminance_lx, weight in weighed):
        return None
    return working_window_s(tested_lx, tested_s, weights()["window", _NO_FILTER], weighed)


def _weighed(sources: Sequence[RoomSource]) -> tuple[tuple[float, float], ...]:
    return tuple((light.illuminance_lx, weights()[light.what, light.filter]) for light in sources)
