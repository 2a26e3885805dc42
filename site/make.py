"""Builds the site: the engine for the browser, the page, the written pages, and what keeps it all offline.

python3 site/make.py [--out FOLDER] [--as-is]
"""

import argparse
import shutil
import subprocess
import sys
import time
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))

from making import bundle, engine_zip, environment
from making.environment import say
from making.places import BUILD, BUILT_SITE, SITE, TOP


def build(out: Path = BUILT_SITE) -> Path:
    """Builds into a folder beside out and puts it in out's place once it is whole. Returns out.

    Raises
    ------
    subprocess.CalledProcessError
        When a step fails; its own message has been shown.
    """
    node = environment.node()
    next_one = out.with_name(out.name + ".next")
    shutil.rmtree(next_one, ignore_errors=True)
    assets = next_one / "assets"

    with _step("written pages"):
        pages = [sys.executable, "-m", "mkdocs", "build", "--strict"]
        subprocess.run([*pages, "-f", SITE / "mkdocs.yml", "-d", next_one], check=True, cwd=TOP)
    with _step("the engine as bytecode"):
        engine = engine_zip.build_engine(assets, node)
    with _step("the page's scripts"):
        bundle.copy_core(assets)
        bundle.bundle(assets, engine.name, node)
    with _step("what keeps it offline"):
        subprocess.run([node, SITE / "making" / "offline.mjs", next_one], check=True, cwd=SITE)

    shutil.rmtree(out, ignore_errors=True)
    next_one.rename(out)
    return out


@contextmanager
def _step(what: str) -> Iterator[None]:
    """Says what is being built and how long it took."""
    say(f"  building {what} ...")
    start = time.monotonic()
    yield
    say(f"    done in {time.monotonic() - start:.1f} s")


def main() -> int:
    parser = argparse.ArgumentParser(description="Builds the site.")
    parser.add_argument("--out", type=Path, default=BUILT_SITE, help="where to (default .build/site)")
    parser.add_argument("--as-is", action="store_true", help="use this Python and Node, install nothing")
    given = parser.parse_args()
    environment.enter(as_is=given.as_is)
    BUILD.mkdir(exist_ok=True)
    say("Building the site")
    try:
        out = build(given.out.resolve())
    except subprocess.CalledProcessError as error:
        say(f"The build failed at: {' '.join(map(str, error.cmd))[:200]}")
        return 1
    say(f"Built: {out}")
    return 0


if __name__ == "__main__":
    sys.exit(main())
