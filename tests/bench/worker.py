"""How long one check of a four-increment plan takes in the browser's worker: first, and with tables kept.

    python tests/bench/worker.py [--rounds 9]

The built site's own worker answers what the page would ask of it, in a headless Chromium; the times include the way to
the worker and back, and the JSON on both sides. Each round starts a new worker and asks it for rules and cards, as the
page does, and then for checks: "first" is truly the first, and imports what checks a file against its schema, which
CPython has behind it here. CPython is asked the same in between, so that a busy machine slows both alike.
"""

import argparse
import os
import statistics
import sys
import tempfile
import time
from functools import partial
from pathlib import Path

TOP = Path(__file__).resolve().parents[2]
sys.path[:0] = [str(TOP / "engine"), str(TOP / "site"), str(TOP / "tests")]

from bench.check import answered, asked, changed_mm, empty_kept, milliseconds
from bench.start import PAGE
from browser import chromium
from making.places import BUILT_SITE
from making.server import Server
from playwright.sync_api import CDPSession, Page, sync_playwright

SITE = Path(os.environ.get("FARSIDE_BUILT_SITE", BUILT_SITE))
WORKER = "/assets/worker.js"
START = """
(script) => new Promise((resolve, reject) => {
    window.worker = new Worker(script, { type: "module" });
    worker.onerror = (event) => reject(new Error(event.message));
    worker.onmessage = ({ data }) => {
        if (data.step === "ready") resolve();
        if (data.trouble) reject(new Error(data.detail));
    };
})
"""
ASK = """
(text) => new Promise((resolve, reject) => {
    const request = JSON.parse(text);
    const start = performance.now();
    worker.onmessage = ({ data }) => {
        const answer = data.text && JSON.parse(data.text);
        if (answer?.ok) resolve(performance.now() - start);
        else reject(new Error(data.failed ?? answer.fault ?? JSON.stringify(answer.problems)));
    };
    worker.postMessage({ id: 1, text: JSON.stringify(request) });
})
"""


def processor_ms(session: CDPSession) -> float:
    """Processor's time that the pages and their workers have used so far, all their threads together."""
    used = session.send("SystemInfo.getProcessInfo")["processInfo"]
    return sum(process["cpuTime"] for process in used if process["type"] == "renderer") * 1e3


def in_worker(
    page: Page, session: CDPSession, texts: dict[str, str], times: dict[str, list[float]], used: dict[str, list[float]]
) -> None:
    """One round: a new worker, asked each text in turn."""
    page.evaluate(START, WORKER)
    page.evaluate(ASK, '{"do": "start"}')
    for name, text in texts.items():
        before = processor_ms(session)
        times.setdefault(name, []).append(page.evaluate(ASK, text))
        used.setdefault(name, []).append(processor_ms(session) - before)
    page.evaluate("worker.terminate()")


def in_cpython(texts: dict[str, str], times: dict[str, list[float]]) -> None:
    """The same round here, without the start."""
    empty_kept()
    for name, text in texts.items():
        times.setdefault(name, []).append(milliseconds(partial(answered, text), time.perf_counter))


def main() -> int:
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("--rounds", type=int, default=9)
    rounds = parser.parse_args().rounds
    if not SITE.is_dir():
        print("Build the site first: python3 site/make.py")
        return 1
    answered(asked())  # imports what is only imported when needed, parses what ships
    worker: dict[str, list[float]] = {}
    used: dict[str, list[float]] = {}
    cpython: dict[str, list[float]] = {}
    with tempfile.TemporaryDirectory() as name, sync_playwright() as playwright:
        folder = Path(name)
        (folder / "assets").symlink_to(SITE / "assets")
        (folder / "index.html").write_text(PAGE)
        browser = playwright.chromium.launch(executable_path=chromium.find(), args=chromium.arguments())
        with Server(folder) as server:
            page, session = browser.new_page(), browser.new_browser_cdp_session()
            page.goto(server.address)
            for number in range(rounds):
                changed = asked(changed_mm(number))
                texts = {"first": asked(), "a thickness changed": changed, "nothing changed": changed}
                in_worker(page, session, texts, worker, used)
                in_cpython(texts, cpython)
        browser.close()

    print(f"Four increments in the worker: milliseconds, median of {rounds} (least to most);")
    print("of the processor: all threads of page and worker, the compiling of what runs for the first time with them")
    for name, own in worker.items():
        middle, here = statistics.median(own), statistics.median(cpython[name])
        print(
            f"  {name:20} {middle:7.1f}  ({min(own):.1f} to {max(own):.1f}), of the processor"
            f" {statistics.median(used[name]):.1f}, CPython {here:.1f}, worker over CPython {middle / here:.2f}"
        )
    return 0


if __name__ == "__main__":
    sys.exit(main())
