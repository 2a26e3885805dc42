"""How long the engine takes to be ready in its thread, beside a bare stock Pyodide in the same run.

    python tests/bench/start.py [--rounds 5]

Both are started by the same page, from the same server, with the same caching, each time in a browser with a new
profile: "first" is the first visit of that profile, "later" its third. Times run from making the worker to its being
ready: for the engine that means imported with its rules, for stock Pyodide with nothing imported at all.
"""

import argparse
import shutil
import statistics
import sys
import tempfile
from pathlib import Path

TOP = Path(__file__).resolve().parents[2]
sys.path[:0] = [str(TOP / "site"), str(TOP / "tests")]

from browser import chromium
from making.bundle import PYODIDE
from making.places import BUILT_SITE
from making.server import Server
from playwright.sync_api import Playwright, sync_playwright

BARE = "assets/pyodide-bare"
BARE_WORKER = """
import { loadPyodide } from "./pyodide.mjs";
await loadPyodide();
postMessage({ step: "ready" });
"""
PAGE = '<!doctype html><html lang="en"><head><title>Start</title><link rel="icon" href="data:,"></head></html>'
TIME = """
(script) => new Promise((resolve, reject) => {
    const start = performance.now();
    const worker = new Worker(script, { type: "module" });
    worker.onerror = (event) => reject(new Error(event.message));
    worker.onmessage = ({ data }) => {
        if (data.step === "ready") resolve(performance.now() - start);
        if (data.trouble) reject(new Error(data.detail));
    };
})
"""
WORKERS = {"engine": "/assets/worker.js", "bare": f"/{BARE}/worker.js"}
VISITS = {"first": 0, "later": 2}


def lay_out(folder: Path) -> None:
    """The built scripts, stock Pyodide as it is published, and an empty page."""
    shutil.copytree(BUILT_SITE / "assets", folder / "assets")
    shutil.copytree(PYODIDE, folder / BARE, ignore=shutil.ignore_patterns("*.map", "*.html"))
    (folder / BARE / "worker.js").write_text(BARE_WORKER)
    (folder / "index.html").write_text(PAGE)


def visits(playwright: Playwright, home: str, script: str) -> list[float]:
    """Milliseconds of each visit of one new profile."""
    with tempfile.TemporaryDirectory() as profile:
        context = playwright.chromium.launch_persistent_context(
            profile, executable_path=chromium.find(), args=chromium.arguments()
        )
        times = []
        for _ in range(max(VISITS.values()) + 1):
            page = context.new_page()
            page.goto(home)
            times.append(page.evaluate(TIME, script))
            page.wait_for_timeout(1500)  # lets the browser keep the code that it has compiled
            page.close()
        context.close()
    return times


def main() -> int:
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--rounds", type=int, default=5)
    rounds = parser.parse_args().rounds
    if not BUILT_SITE.is_dir():
        print("Build the site first: python3 site/make.py")
        return 1
    times: dict[tuple[str, str], list[float]] = {(who, when): [] for who in WORKERS for when in VISITS}
    with tempfile.TemporaryDirectory() as name, sync_playwright() as playwright:
        lay_out(Path(name))
        with Server(Path(name)) as server:
            for _ in range(rounds):
                for who, script in WORKERS.items():
                    seen = visits(playwright, server.address, script)
                    for when, visit in VISITS.items():
                        times[who, when].append(seen[visit])

    print(f"Milliseconds from making the worker to ready, median of {rounds} (least to most)")
    for when in VISITS:
        middle = {who: statistics.median(times[who, when]) for who in WORKERS}
        for who in WORKERS:
            print(
                f"  {when:5}  {who:6}  {middle[who]:6.0f}  ({min(times[who, when]):.0f} to {max(times[who, when]):.0f})"
            )
        print(f"  {when:5}  engine over bare  {middle['engine'] / middle['bare']:.2f}")
    return 0


if __name__ == "__main__":
    sys.exit(main())
