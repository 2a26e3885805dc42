"""Runs the engine's unit tests on the Python that the browser runs: Pyodide, under Node.

python tests/pyodide/run.py [RESULTS.xml] [PYTEST ARGUMENT ...]
"""

import shutil
import subprocess
import sys
from pathlib import Path

TOP = Path(__file__).resolve().parents[2]
sys.path.insert(0, str(TOP / "site"))

from making.engine_zip import LIBRARIES, RPDS, library_files
from making.environment import node
from making.places import BUILD

TEST_LIBRARIES = ("pytest", "pluggy", "iniconfig", "packaging", "Pygments", "hypothesis", "sortedcontainers")
TESTS = ("engine/farside", "tests/unit", "tests/rules")
PACKAGES = BUILD / "pyodide" / "packages"


def lay_packages(folder: Path) -> None:
    """Lays the pure Python of the engine's libraries and of pytest in one folder."""
    shutil.rmtree(folder, ignore_errors=True)
    for name in (*LIBRARIES, *TEST_LIBRARIES):
        for path, content in library_files(name):
            target = folder / path
            target.parent.mkdir(parents=True, exist_ok=True)
            target.write_bytes(content)
    (folder / "rpds.py").write_text(RPDS)


def main() -> int:
    results, *arguments = sys.argv[1:] or [str(BUILD / "results" / "pyodide.xml")]
    Path(results).parent.mkdir(parents=True, exist_ok=True)
    lay_packages(PACKAGES)
    script = Path(__file__).with_name("run.mjs")
    words = [node(), script, TOP, PACKAGES, Path(results).resolve(), *(arguments or TESTS)]
    return subprocess.run(words, cwd=TOP, check=False).returncode


if __name__ == "__main__":
    sys.exit(main())
