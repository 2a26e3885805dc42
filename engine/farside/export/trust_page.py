"""The page that says how far to trust the model: every figure from outside beside the model's own, misses shown."""

from collections.abc import Iterator, Sequence
from typing import Final

from farside import shipped
from farside.export.compared import Compared, Outside, by_row, by_topic, topic_name
from farside.export.markdown import link, page, plain, table, under
from farside.export.page_plots import curves, figure, scatter, shares
from farside.export.references import short
from farside.protocol.protocol import base_protocol

TITLE: Final = "How far to trust it"
_HUNDRED: Final = 100.0
_MANY: Final = 8
_NOTHING: Final = 1e-3
_HEAD: Final = ("What", "Published", "Computed", "Difference", "Outcome")


def trust_page(outside: Outside) -> str:
    """The page's Markdown, of the outside checks as they came out."""
    checks = outside.checks
    if not checks:
        return page(TITLE, "The outside checks were not run when this page was made.")
    return page(
        TITLE,
        *_intro(checks),
        under("Misses", *_misses([check for check in checks if check.missed])),
        under("Figures that set a parameter", *_setting([check for check in checks if check.kind == "set-by"])),
        *(_topic(topic, group, outside) for topic, group in by_topic(checks).items()),
    )


def tally(checks: Sequence[Compared]) -> str:
    """The counts in one sentence."""
    counted = [check for check in checks if check.counted]
    missed = sum(check.missed for check in counted)
    within = f"{_count(len(counted) - missed)} of {_count(len(counted))} counted checks lie within their band"
    misses = f"{missed} {'misses' if missed == 1 else 'miss'} it" if missed else "none misses it"
    return f"{within}; {misses}."


def _intro(checks: Sequence[Compared]) -> Iterator[str]:
    yield (
        "A check holds a figure that was had outside the model against what the model computes: a figure in print, "
        "from somebody else's program, or from one of ours that was written apart from the model and shares nothing "
        "with it. Each has a band: how far off is still right. All of it was computed when this page was made, from "
        "the same list that the tests run on."
    )
    yield (
        f"**{tally(checks)}** Not counted: figures that set a parameter of the model, which prove nothing, and those "
        "so loose that they show the order of size only."
    )
    rows = []
    for topic, group in by_topic(checks).items():
        counted = [check for check in group if check.counted]
        missed = sum(check.missed for check in counted)
        within = f"{_count(len(counted) - missed)} of {_count(len(counted))}" if counted else "–"
        apart = _count(len(group) - len(counted))
        rows.append((link(plain(topic_name(topic)), f"#{topic}"), within, _count(missed), apart))
    yield table(("Topic", "Within", "Missed", "Not counted"), rows)
    yield (
        "What no check covers is not trusted: a quantity is given only over the ranges on its own page, under "
        f"{link('Quantities', 'quantities/index.md')}. Nothing here was measured by us, and nothing here says that a "
        "composite has set."
    )


def _misses(missed: Sequence[Compared]) -> Iterator[str]:
    if not missed:
        yield "No check lies outside its band."
        return
    yield "Shown as they are; no band was widened to hide one. In the plots a miss is a cross."
    for checks in by_row(missed).values():
        worst = max(checks, key=lambda check: abs(check.share_of_band))
        rules = ", ".join(_rule(rule) for rule in worst.rules) or "none"
        band = f", band {_band(worst)}" if worst.band else ""
        head = f"**{_capital(worst.says)}**"
        if len(checks) > 1:
            head = f"**{_capital(worst.row_says)}: {_count(len(checks))} points.** The worst: {plain(worst.says)}"
        yield (
            f"- {head} ({_source(worst)}). Published {_published(worst)}{band}; "
            f"computed {_with_unit(worst, worst.computed)}, off by {_difference(worst)}. {_note(worst)}"
            f"Rules that depend on it: {rules}."
        )


def _setting(checks: Sequence[Compared]) -> Iterator[str]:
    if not checks:
        yield "None."
        return
    yield "The model was given these; that it gives them back is no proof of anything."
    for row in by_row(checks).values():
        sets = ", ".join(f"*{plain(name)}*" for name in row[0].sets)
        yield f"- {_capital(row[0].row_says)} ({_source(row[0])}) sets {sets}."


def _topic(topic: str, group: Sequence[Compared], outside: Outside) -> str:
    rules = list(dict.fromkeys(rule for check in group for rule in check.rules))
    depend = f"Rules that depend on it: {', '.join(_rule(rule) for rule in rules)}." if rules else ""
    rows = [_row(checks) for checks in by_row(group).values()]
    parts = [f"## {topic_name(topic)} {{: #{topic} }}", depend, _plots(group, outside), table(_HEAD, rows)]
    return "\n\n".join(part for part in parts if part)


def _plots(group: Sequence[Compared], outside: Outside) -> str:
    """The topic's figures, computed against published for each long row, and where in its band each check falls."""
    made = []
    for drawn in outside.figures:
        points = [check for check in group if check.figure == drawn.id]
        if points:
            over_published = all(check.x == check.published for check in points)
            made.append(scatter(drawn.title, points) if over_published else curves(drawn, points))
    rows = [checks for checks in by_row(group).values() if len(checks) >= _MANY]
    made += [scatter(checks[0].row_says, checks) for checks in rows if not any(check.figure for check in checks)]
    counted = [check for check in group if check.counted]
    if len(counted) >= _MANY:
        made.append(shares(f"Where in its band each of the {_count(len(counted))} counted checks falls", counted))
    return f'<div class="plots">{"".join(made)}</div>' if made else ""


def _row(checks: Sequence[Compared]) -> Sequence[str]:
    """One check; or many, of which the one that lies furthest out in its band speaks."""
    worst = max(checks, key=lambda check: abs(check.share_of_band))
    missed = sum(check.missed for check in checks)
    outcome = "**missed**" if missed else "within"
    what = f"{_capital(worst.says)}. {_note(worst)}"
    if len(checks) > 1:
        many = f"**{_capital(worst.row_says)}: {_count(len(checks))} points.**"
        what = f"{many} The worst: {plain(worst.says)}. {_note(worst)}"
        outcome = f"**{missed} missed**" if missed else "all within"
    if worst.kind == "set-by":
        outcome = "sets a parameter"
    elif not worst.counted:
        outcome += ", order of size only"
    return (
        f"{what.strip()}<br>*{_source(worst)}*",
        f"{_published(worst)}<br>{_band(worst)}",
        _with_unit(worst, worst.computed),
        _difference(worst),
        outcome,
    )


def _source(check: Compared) -> str:
    known = check.source in shipped.sources()
    name = link(plain(short(check.source)), f"sources.md#{check.source}") if known else plain(check.source)
    return f"{name}, from memory" if check.how_sure == "from memory" else name


def _rule(rule: str) -> str:
    return link(plain(base_protocol().rule(rule).title), f"rules/{rule}.md")


def _note(check: Compared) -> str:
    return f"{_capital(check.note).rstrip('.')}. " if check.note else ""


def _published(check: Compared) -> str:
    if check.low == check.high:
        return _with_unit(check, check.low)
    return f"{figure(check.low)} to {_with_unit(check, check.high)}"


def _with_unit(check: Compared, value: float) -> str:
    return f"{figure(value)}\u00a0{plain(check.unit)}".strip()


def _band(check: Compared) -> str:
    if not check.band:
        return "no more"
    return (
        f"±\u00a0{figure(100 * check.band, 2)}\u00a0%" if check.relative else f"±\u00a0{_with_unit(check, check.band)}"
    )


def _difference(check: Compared) -> str:
    if check.low != check.high and check.difference == 0.0:
        return "none"
    if 0.0 < abs(check.share_of_band) < _NOTHING:
        return "under a thousandth of the band"
    if check.relative and check.band:
        return _signed(100.0 * check.difference / abs(check.low), "%")
    return _signed(check.difference, check.unit)


def _signed(value: float, unit: str) -> str:
    text = figure(value, 2 if abs(value) < _HUNDRED else 3)
    sign = "" if text[0] == "−" or value == 0.0 else "+"
    return f"{sign}{text}\u00a0{plain(unit)}".strip()


def _capital(words: str) -> str:
    return plain(words[:1].upper() + words[1:])


def _count(number: int) -> str:
    return f"{number:,}".replace(",", "\u00a0")
