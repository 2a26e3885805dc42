"""Finds Chromium for the browser's tests, and brings it from Debian where it is missing and that is allowed."""

import os
import shutil
import subprocess
from pathlib import Path

NAMES = ("chromium", "chromium-browser", "google-chrome", "google-chrome-stable")
ARGUMENTS = (
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
)
"""Keeps the browser itself from calling out while the page's own requests are watched."""


def find() -> str | None:
    """The path of a Chromium, from FARSIDE_CHROMIUM or the usual names."""
    named = os.environ.get("FARSIDE_CHROMIUM")
    if named:
        return named if Path(named).exists() else None
    return next(filter(None, map(shutil.which, NAMES)), None)


def arguments() -> list[str]:
    """The arguments to start it with; its sandbox does not work for root."""
    return [*ARGUMENTS, *(["--no-sandbox"] if getattr(os, "geteuid", lambda: 1)() == 0 else [])]


def bring() -> bool:
    """Installs Chromium from Debian's packages if there is none. Says what it does; true when there is one."""
    if find():
        return True
    root = _as_root()
    if root is None or not shutil.which("apt-get"):
        print("No Chromium was found. Install it, or name one in FARSIDE_CHROMIUM; --quick does without.", flush=True)
        return False
    print("No Chromium was found: installing Debian's (a minute or two)", flush=True)
    quietly = {**os.environ, "DEBIAN_FRONTEND": "noninteractive"}
    for words in (["update", "-qq"], ["install", "-y", "-qq", "--no-install-recommends", "chromium"]):
        done = subprocess.run([*root, "apt-get", *words], env=quietly, stdout=subprocess.DEVNULL, check=False)
        if done.returncode:
            print(f"apt-get {' '.join(words)} failed.", flush=True)
            return False
    return find() is not None


def _as_root() -> list[str] | None:
    """What to put before a command that needs root, None if root is not to be had without a password."""
    if os.geteuid() == 0:
        return []
    if (
        shutil.which("sudo")
        and subprocess.run(["sudo", "-n", "true"], capture_output=True, check=False).returncode == 0
    ):
        return ["sudo", "-n"]
    return None
