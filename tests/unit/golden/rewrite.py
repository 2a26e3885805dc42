"""Writes the kept reports anew, when they are meant to change: python tests/unit/golden/rewrite.py

Says which have changed; `git diff --stat tests/unit/golden` and a look at one of them belong to the change.
"""

import sys
from pathlib import Path

TOP = Path(__file__).resolve().parents[3]


def main() -> None:
    sys.path[:0] = [str(TOP / "engine"), str(TOP / "tests")]
    from unit.golden.made import KEPT, kept_in, report_text
    from unit.made import PLANS

    for stale in set(KEPT.glob("*.json")) - set(map(kept_in, PLANS)):
        stale.unlink()
        print(f"{stale.stem}: its plan is gone")
    for plan in PLANS:
        new, path = report_text(plan).encode(), kept_in(plan)
        if not path.exists() or path.read_bytes() != new:
            path.write_bytes(new)
            print(f"{plan}: changed")


if __name__ == "__main__":
    main()
