"""Sets up what is missing and runs every test and check; closes with a tally.

python3 tests/run.py            everything, the browser's tests too
python3 tests/run.py --quick    under three minutes: no browser, no Pyodide, few generated examples
"""

import argparse
import os
import subprocess
import sys
import time
from collections import Counter
from collections.abc import Callable, Sequence
from dataclasses import dataclass, field
from pathlib import Path
from xml.etree import ElementTree as ET

TOP = Path(__file__).resolve().parent.parent
sys.path.insert(0, str(TOP / "site"))

from browser import chromium
from making import environment
from making.environment import say
from making.places import BUILD, SITE

Command = Sequence[str | Path]

RESULTS = BUILD / "results"
PYTHON = sys.executable
FAST_TESTS = (
    "engine/farside",
    *(f"tests/{name}" for name in ("unit", "rules", "reference", "cli", "robustness", "house")),
)


@dataclass
class Tally:
    """What has been counted so far."""

    passed: int = 0
    failed: int = 0
    skipped: int = 0
    failures: list[str] = field(default_factory=list)

    def add(self, name: str, passed: int, failed: int, skipped: int = 0) -> None:
        self.passed += passed
        self.failed += failed
        self.skipped += skipped
        if failed:
            self.failures.append(name)


@dataclass(frozen=True)
class Step:
    """One thing to run: a command, or whatever gives true when it went well.

    Where it counts its own tests, `results` is the JUnit file that it leaves; otherwise it counts as one.
    """

    name: str
    run: Callable[[], bool]
    results: Path | None = None


def command(name: str, *words: str | Path, cwd: Path = TOP) -> Step:
    return Step(name, lambda: subprocess.run(words, cwd=cwd, check=False).returncode == 0)


def tests(name: str, *words: str | Path) -> Step:
    """A step that runs pytest."""
    results = RESULTS / f"{name}.xml"
    whole = [PYTHON, "-m", "pytest", "--quiet", f"--junit-xml={results}", *words]
    return Step(name, lambda: subprocess.run(whole, cwd=TOP, check=False).returncode == 0, results)


def steps(*, quick: bool) -> list[Step]:
    """All that is run, the quickest to fail first."""
    found = [
        command("ruff", PYTHON, "-m", "ruff", "check", "."),
        command("layout", PYTHON, "-m", "ruff", "format", "--check", "."),
        command("types", PYTHON, "-m", "mypy"),
        command("imports", Path(PYTHON).with_name("lint-imports")),
        command("page types", environment.node(), SITE / "node_modules" / "typescript" / "bin" / "tsc", "-p", SITE),
        tests("tests", "--numprocesses=2", *(name for name in FAST_TESTS if _has_tests(name))),
    ]
    if not quick:
        pyodide = RESULTS / "pyodide.xml"
        in_pyodide = [PYTHON, TOP / "tests" / "pyodide" / "run.py", pyodide]
        found += [
            Step("in Pyodide", lambda: subprocess.run(in_pyodide, cwd=TOP, check=False).returncode == 0, pyodide),
            command("site", PYTHON, SITE / "make.py"),
            Step("Chromium", chromium.bring),
            tests("in the browser", "tests/browser"),
        ]
    return found


def _has_tests(folder: str) -> bool:
    return any((TOP / folder).rglob("*.py"))


def counted(results: Path) -> tuple[int, int, int]:
    """Passed, failed and skipped of a JUnit file."""
    suites = ET.parse(results).getroot().iter("testsuite")
    total = failed = skipped = 0
    for suite in suites:
        total += int(suite.get("tests", 0))
        failed += int(suite.get("failures", 0)) + int(suite.get("errors", 0))
        skipped += int(suite.get("skipped", 0))
    return total - failed - skipped, failed, skipped


def evidence(results: Path) -> list[str]:
    """What a JUnit file says of the outside checks, by their kind, and of the rules' examples."""
    checks: Counter[str] = Counter()
    examples: Counter[bool] = Counter()
    for case in ET.parse(results).getroot().iter("testcase"):
        passed = not any(case.find(sign) is not None for sign in ("failure", "error", "skipped"))
        if case.get("name", "").startswith("test_example_gives_its_finding["):
            examples[passed] += 1
        for entry in case.iter("property"):
            if entry.get("name") == "outside-check":
                checks[f"{entry.get('value')}{'' if passed else ' FAILED'}"] += 1
    kinds = ", ".join(f"{count} {kind}" for kind, count in sorted(checks.items()))
    return [
        f"Outside checks: {checks.total()} ({kinds})",
        f"Rules' examples: {examples.total()}, {examples[True]} as stated",
    ]


def run(step: Step, tally: Tally) -> None:
    say(f"\n== {step.name}")
    if step.results:
        step.results.unlink(missing_ok=True)
    start = time.monotonic()
    try:
        well = step.run()
    except OSError as error:
        say(str(error))
        well = False
    passed, failed, skipped = int(well), int(not well), 0
    if step.results and step.results.exists():
        passed, failed, skipped = counted(step.results)
        if not well and not failed:
            failed = 1
        elif well and not passed:
            say("It ran no test.")
            failed = 1
    tally.add(step.name, passed, failed, skipped)
    say(f"-- {step.name}: {'well' if not failed else 'FAILED'}, {time.monotonic() - start:.0f} s")


def main() -> int:
    parser = argparse.ArgumentParser(description="Sets up what is missing and runs every test and check.")
    parser.add_argument("--quick", action="store_true", help="no browser, no Pyodide, few generated examples")
    parser.add_argument("--as-is", action="store_true", help="use this Python and Node, install nothing")
    given = parser.parse_args()
    environment.enter(as_is=given.as_is)

    RESULTS.mkdir(parents=True, exist_ok=True)
    os.environ["FARSIDE_EXAMPLES"] = "quick" if given.quick else os.environ.get("FARSIDE_EXAMPLES", "usual")
    if not given.quick:
        os.environ["FARSIDE_BUILT_SITE"] = str(BUILD / "site")
    start = time.monotonic()
    tally = Tally()
    for step in steps(quick=given.quick):
        run(step, tally)

    say(f"\nAll of it took {(time.monotonic() - start) / 60:.1f} minutes.")
    if (fast := RESULTS / "tests.xml").exists():
        for line in evidence(fast):
            say(line)
    if tally.failures:
        say(f"Failed: {', '.join(tally.failures)}")
    say(f"{tally.passed} passed, {tally.failed} failed, {tally.skipped} skipped")
    return 1 if tally.failed or not tally.passed else 0


if __name__ == "__main__":
    sys.exit(main())
