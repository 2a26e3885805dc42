"""The outside checks as they came out, worked out once per state of the engine, the rules and the checks themselves."""

import hashlib
import json
import sys
from collections.abc import Iterable
from dataclasses import asdict
from pathlib import Path
from typing import TYPE_CHECKING, Any

from making.places import BUILD, ENGINE, TOP

if TYPE_CHECKING:
    from farside.export.compared import Compared, Outside

_CHECKS = TOP / "tests" / "reference"
_ALIKE = ("id", "topic", "source", "says", "unit", "band", "kind", "how_sure", "sets", "note", "rules")
_DRAWN = ("id", "title", "x_says", "y_says", "log_x", "log_y")


def outside_checks(kept: Path = BUILD / "checks") -> "Outside":
    """Every check of the list that the tests run on, both of its sides worked out, and the figures they are drawn in.

    The answer is kept in a folder under the digest of all that it rests on, so that a build that changes none of it
    need not wait.
    """
    from farside.export.compared import Compared, Drawn, Outside

    file = kept / f"{_digest()}.json"
    if not file.exists():
        kept.mkdir(parents=True, exist_ok=True)
        for old in kept.glob("*.json"):
            old.unlink()
        half = file.with_suffix(".part")
        half.write_text(json.dumps(asdict(_worked_out())), encoding="utf-8")
        half.rename(file)
    data = json.loads(file.read_text(encoding="utf-8"))
    rows = ({**row, "sets": tuple(row["sets"]), "rules": tuple(row["rules"])} for row in data["checks"])
    return Outside(tuple(Compared(**row) for row in rows), tuple(Drawn(**row) for row in data["figures"]))


def cited_keys(outside: "Outside", sources: Iterable[str]) -> set[str]:
    """The sources that checks cite by key: what a program worked out names the program, where that is no source."""
    known = set(sources)
    return {check.source for check in outside.checks if check.source in known or check.how_sure != "computed"}


def _worked_out() -> "Outside":
    """Works all of them out, for some seconds, since SciPy and others are asked."""
    from farside.export.compared import Drawn, Outside

    if str(TOP / "tests") not in sys.path:
        sys.path.append(str(TOP / "tests"))
    from reference.registry import FIGURES, ROWS

    checks = tuple(compared(check, row) for row in ROWS for check in row.checks)
    return Outside(checks, tuple(Drawn(*(getattr(figure, name) for name in _DRAWN)) for figure in FIGURES))


def compared(check: Any, row: Any) -> "Compared":
    """A check of the tests' list, of one of its rows, with both of its sides worked out."""
    from farside.export.compared import Compared

    result = check.result()
    point = check.point
    return Compared(
        **{name: getattr(check, name) for name in _ALIKE},
        low=result.low,
        high=result.high,
        computed=result.computed,
        allowed=result.allowed,
        relative=check.band_is == "relative",
        row=row.id,
        row_says=row.says,
        figure=point.figure if point else "",
        series=point.series if point else "",
        x=point.x if point else 0.0,
    )


def _digest() -> str:
    """Over every file that the figures rest on."""
    digest = hashlib.sha256(sys.version.encode())
    files = [*ENGINE.rglob("*.py"), *_CHECKS.rglob("*.*"), *(TOP / "rules").rglob("*.yaml")]
    files += [TOP / "tests" / "constraints.txt", Path(__file__)]
    for file in sorted(file for file in files if file.suffix in {".py", ".csv", ".yaml", ".json", ".txt"}):
        digest.update(file.relative_to(TOP).as_posix().encode() + b"\0" + file.read_bytes())
    return digest.hexdigest()[:16]
