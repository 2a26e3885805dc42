"""Bundles the page's TypeScript into one script for the page and one for the engine's thread; copies Python's core."""

import json
import shutil
import subprocess
from pathlib import Path

from making.places import SITE

PYODIDE = SITE / "node_modules" / "pyodide"
CORE = ("pyodide.asm.mjs", "pyodide.asm.wasm")


def pyodide_folder() -> str:
    """The folder of Python's core beside the scripts; its name carries the version, since its files never change."""
    return f"pyodide-{json.loads((PYODIDE / 'package.json').read_text())['version']}"


def copy_core(assets: Path) -> None:
    """Copies what Pyodide fetches as it starts; its own library and package list are not among it."""
    folder = assets / pyodide_folder()
    folder.mkdir(parents=True, exist_ok=True)
    for name in CORE:
        shutil.copyfile(PYODIDE / name, folder / name)


def bundle(assets: Path, engine_zip: str, node: str, entry: Path = SITE / "app" / "main.tsx") -> None:
    """Writes app.js and worker.js into assets, with the names of the files that they ask for written in."""
    core = pyodide_folder()
    names = {
        "PYODIDE_FOLDER": f"{core}/",
        "ENGINE_ZIP": engine_zip,
        "ENGINE_FILES": ["worker.js", *(f"{core}/{name}" for name in CORE), engine_zip],
    }
    script, worker = SITE / "making" / "bundle.mjs", SITE / "app" / "worker.ts"
    subprocess.run([node, script, entry, worker, assets, json.dumps(names)], check=True, cwd=SITE)
