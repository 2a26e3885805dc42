"""All outside checks in one tuple, the rows they are shown as, and the figures they are drawn in.

What the tests run and a page of trust shows: `ROWS` for its table, `points(figure)` for its plots. Working out all
of them takes some seconds (SciPy and colour-science give some published values); each is worked out once.
"""

from collections import defaultdict
from collections.abc import Iterator
from typing import Final

from reference import (
    ambient_checks,
    beam_checks,
    dose_checks,
    edge_checks,
    eye_checks,
    paste_checks,
    room_and_eye_checks,
    spread_checks,
    tooth_checks,
    transport_checks,
)
from reference.checks import Check, Figure, Group, Row

_MODULES: Final = (
    transport_checks,
    beam_checks,
    spread_checks,
    dose_checks,
    edge_checks,
    paste_checks,
    tooth_checks,
    room_and_eye_checks,
    ambient_checks,
    eye_checks,
)

CHECKS: Final[tuple[Check, ...]] = tuple(check for module in _MODULES for check in module.CHECKS)
GROUPS: Final[tuple[Group, ...]] = tuple(group for module in _MODULES for group in module.GROUPS)
FIGURES: Final[tuple[Figure, ...]] = tuple(figure for module in _MODULES for figure in module.FIGURES)


def _rows() -> Iterator[Row]:
    says = {group.id: group.says for group in GROUPS}
    gathered: dict[str, list[Check]] = defaultdict(list)
    for check in CHECKS:
        gathered[check.group or check.id].append(check)
    for name, checks in gathered.items():
        yield Row(name, says.get(name, checks[0].says), tuple(checks))


ROWS: Final[tuple[Row, ...]] = tuple(_rows())
"""A row for each group and for each check that stands alone, in the order of the checks."""


def points(figure: str) -> tuple[Check, ...]:
    """The checks that are drawn in a figure, series by series and along x."""
    drawn = [check for check in CHECKS if check.point and check.point.figure == figure]
    return tuple(sorted(drawn, key=lambda check: check.point[1:] if check.point else ()))
