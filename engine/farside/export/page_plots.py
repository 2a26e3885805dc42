"""Plots for the made pages as SVG without style or script: the page's own sheet gives ink and paper, light or dark."""

import math
from collections.abc import Iterator, Sequence
from html import escape
from typing import Final

from farside.export.compared import Compared, Drawn

_WIDTH: Final = 360
_HEIGHT: Final = 300
_LEFT: Final = 58
_RIGHT: Final = 12
_TOP: Final = 10
_BOTTOM: Final = 46
_LOG_FROM: Final = 30.0
"""Figures that span more than so many times their least are drawn on axes of powers of ten."""
_STEPS: Final = 48
_DASHES: Final = ("unbroken", "dashed", "dotted", "dashes and dots", "long dashes")
_POWERS: Final = str.maketrans("-0123456789", "⁻⁰¹²³⁴⁵⁶⁷⁸⁹")


class Axis:
    """A scale from figures to places along a side of the plot, with its ticks."""

    def __init__(self, low: float, high: float, *, log: bool, start: float, end: float) -> None:
        self.low, self.high, self.log = low, high, log
        self._start, self._end = start, end

    def at(self, value: float) -> float:
        """The place of a figure; what lies outside stands on the edge."""
        low, high, here = (self._drawn(each) for each in (self.low, self.high, max(value, self.low)))
        share = min(max((here - low) / (high - low), 0.0), 1.0)
        return self._start + share * (self._end - self._start)

    def ticks(self) -> list[float]:
        """Round figures inside the scale: powers of ten, or steps of 1, 2 or 5."""
        if self.log:
            powers = range(math.ceil(math.log10(self.low) - 1e-9), math.floor(math.log10(self.high) + 1e-9) + 1)
            return [10.0**power for power in powers]
        rough = (self.high - self.low) / 6.0
        unit = 10.0 ** math.floor(math.log10(rough))
        step = next(unit * times for times in (1.0, 2.0, 5.0, 10.0) if unit * times >= rough)
        first = math.ceil(self.low / step - 1e-9)
        return [step * count for count in range(first, math.floor(self.high / step + 1e-9) + 1)]

    def places(self) -> Iterator[float]:
        """Figures along the scale, close enough to draw a curve through."""
        for step in range(_STEPS + 1):
            share = step / _STEPS
            if self.log:
                yield self.low * (self.high / self.low) ** share
            else:
                yield self.low + (self.high - self.low) * share

    def _drawn(self, value: float) -> float:
        return math.log10(value) if self.log else value


def figure(value: float, digits: int = 4) -> str:
    """A figure in few digits, very large and very small ones with a power of ten.

    Examples
    --------
    >>> figure(0.0324567), figure(1018.6), figure(2.1e-5), figure(0.0)
    ('0.03246', '1019', '2.1×10⁻⁵', '0')
    """
    text = f"{value:.{digits}g}"
    if "e" not in text:
        return text.replace("-", "−")
    mantissa, _, power = text.partition("e")
    return f"{mantissa}×10{str(int(power)).translate(_POWERS)}".replace("-", "−", 1)


def scatter(title: str, checks: Sequence[Compared]) -> str:
    """Computed against published, with the line of agreement and the band of the first.

    Misses are crosses, and what set a parameter is a square.
    """
    low, high, log = _range([value for check in checks for value in (check.published, check.computed)])
    across = Axis(low, high, log=log, start=_LEFT, end=_WIDTH - _RIGHT)
    up = Axis(low, high, log=log, start=_HEIGHT - _BOTTOM, end=_TOP)
    first, unit = checks[0], f", {checks[0].unit}" if checks[0].unit else ""
    off = [(place, first.band * (abs(place) if first.relative else 1.0)) for place in across.places()]
    band = [(place, place + allowed) for place, allowed in off]
    band += reversed([(place, place - allowed) for place, allowed in off])
    corners = " ".join(f"{across.at(x):.1f},{up.at(y):.1f}" for x, y in band)
    parts = [
        f'<polygon class="band" points="{corners}"/>',
        *_frame(across, up, f"published{unit}", f"computed{unit}"),
        f'<path class="same" d="M{across.at(low):.1f} {up.at(low):.1f}L{across.at(high):.1f} {up.at(high):.1f}"/>',
        *(_point(across.at(check.published), up.at(check.computed), check) for check in checks),
    ]
    said = f"{title}: computed against published, {len(checks)} points from {figure(low, 2)} to {figure(high, 2)}"
    return _figure(title, said, parts)


def curves(drawn: Drawn, checks: Sequence[Compared]) -> str:
    """Published as points with their band and computed as a line, both over what the figure's axis says."""
    x_low, x_high, _ = _range([check.x for check in checks], log=drawn.log_x)
    ends = [value for check in checks for value in (check.low, check.high, check.computed)]
    y_low, y_high, _ = _range(ends, log=drawn.log_y)
    across = Axis(x_low, x_high, log=drawn.log_x, start=_LEFT, end=_WIDTH - _RIGHT)
    up = Axis(y_low, y_high, log=drawn.log_y, start=_HEIGHT - _BOTTOM, end=_TOP)
    parts = list(_frame(across, up, drawn.x_says, drawn.y_says))
    series: dict[str, list[Compared]] = {}
    for check in sorted(checks, key=lambda check: check.x):
        series.setdefault(check.series, []).append(check)
    for number, points in enumerate(series.values()):
        places = [f"{across.at(check.x):.1f} {up.at(check.computed):.1f}" for check in points]
        parts.append(f'<path class="line of-{number % len(_DASHES)}" d="M{"L".join(places)}"/>')
        parts += [_whisker(across.at(check.x), up, check) for check in points]
    named = zip(_DASHES * len(series), series, strict=False)
    names = "; ".join(f"{dash}: {name}" for dash, name in named) if len(series) > 1 else ""
    caption = f"{drawn.title}. Points: published, with the band; lines: computed." + (
        f" {names[:1].upper()}{names[1:]}." if names else ""
    )
    said = f"{drawn.title}: {len(checks)} published figures with their bands, and what is computed"
    return _figure(caption, said, parts)


def shares(title: str, checks: Sequence[Compared]) -> str:
    """How many checks fall where in their band: bars from one edge of the band to the other, misses outside."""
    edges = [-1.2 + 0.1 * step for step in range(25)]
    counts = [0] * (len(edges) - 1)
    for check in checks:
        place = math.floor((min(max(check.share_of_band, -1.19), 1.19) + 1.2) / 0.1 + 1e-9)
        counts[place] += 1
    across = Axis(-1.2, 1.2, log=False, start=_LEFT, end=_WIDTH - _RIGHT)
    up = Axis(0.0, max(counts) * 1.05, log=False, start=_HEIGHT - _BOTTOM, end=_TOP)
    left, right = across.at(-1.0), across.at(1.0)
    parts = [
        f'<path class="band" d="M{left:.1f} {_TOP}H{right:.1f}V{_HEIGHT - _BOTTOM}H{left:.1f}"/>',
        *_frame(across, up, "difference over the band (−1 and 1 are its edges)", "checks"),
        *(
            f'<rect class="bar" x="{across.at(edge) + 0.5:.1f}" y="{up.at(count):.1f}" '
            f'width="{across.at(edge + 0.1) - across.at(edge) - 1:.1f}" height="{up.at(0.0) - up.at(count):.1f}"/>'
            for edge, count in zip(edges, counts, strict=False)
            if count
        ),
    ]
    missed = sum(check.missed for check in checks)
    said = f"{title}: where in its band each of {len(checks)} checks falls; {missed} outside"
    return _figure(title, said, parts)


def _figure(title: str, said: str, parts: Sequence[str]) -> str:
    return (
        f'<figure class="plot"><svg viewBox="0 0 {_WIDTH} {_HEIGHT}" role="img" aria-label="{escape(said)}">'
        f"{''.join(parts)}</svg><figcaption>{escape(title)}</figcaption></figure>"
    )


def _range(values: Sequence[float], *, log: bool | None = None) -> tuple[float, float, bool]:
    """The ends of an axis that shows some figures, and whether it goes by powers of ten."""
    low, high = min(values), max(values)
    if log is None:
        log = low > 0.0 and high / low > _LOG_FROM
    if log:
        return 10.0 ** math.floor(math.log10(low) + 1e-9), 10.0 ** math.ceil(math.log10(high) - 1e-9), True
    room = 0.08 * (high - low) or 0.1 * abs(high) or 1.0
    near_nothing = 0.0 <= low < 0.25 * high
    return (0.0 if near_nothing else low - room), high + room, False


def _whisker(x: float, up: Axis, check: Compared) -> str:
    """A published figure: its band or range upright, and the point in the middle of it."""
    top, bottom = up.at(check.high + check.allowed), up.at(check.low - check.allowed)
    return f'<path class="whisker" d="M{x:.1f} {top:.1f}V{bottom:.1f}"/>' + _point(x, up.at(check.published), check)


def _frame(across: Axis, up: Axis, below: str, beside: str) -> Iterator[str]:
    bottom, right = _HEIGHT - _BOTTOM, _WIDTH - _RIGHT
    for tick in across.ticks():
        x = across.at(tick)
        yield f'<line class="tick" x1="{x:.1f}" y1="{_TOP}" x2="{x:.1f}" y2="{bottom}"/>'
        yield f'<text x="{x:.1f}" y="{bottom + 16}" text-anchor="middle">{_tick(tick, log=across.log)}</text>'
    for tick in up.ticks():
        y = up.at(tick)
        yield f'<line class="tick" x1="{_LEFT}" y1="{y:.1f}" x2="{right}" y2="{y:.1f}"/>'
        yield f'<text x="{_LEFT - 6}" y="{y + 4:.1f}" text-anchor="end">{_tick(tick, log=up.log)}</text>'
    yield f'<path class="axis" d="M{_LEFT} {_TOP}V{bottom}H{right}"/>'
    middle = (_TOP + bottom) / 2
    yield f'<text x="{(_LEFT + right) / 2}" y="{_HEIGHT - 8}" text-anchor="middle">{escape(below)}</text>'
    yield f'<text x="14" y="{middle}" text-anchor="middle" transform="rotate(-90 14 {middle})">{escape(beside)}</text>'


def _tick(value: float, *, log: bool) -> str:
    if log and not 0.01 <= value <= 1000.0:
        return f"10{str(round(math.log10(value))).translate(_POWERS)}"
    return figure(round(value, 9))


def _point(x: float, y: float, check: Compared) -> str:
    if check.missed:
        return f'<path class="missed" d="M{x - 4:.1f} {y - 4:.1f}l8 8m0 -8l-8 8"/>'
    if check.kind == "set-by":
        return f'<rect class="sets" x="{x - 3.5:.1f}" y="{y - 3.5:.1f}" width="7" height="7"/>'
    return f'<circle class="point" cx="{x:.1f}" cy="{y:.1f}" r="3"/>'
