"""What a user installs: the sdist, the wheel built from it, and the command it brings, away from the checkout."""

import json
import shutil
import subprocess
import sys
import tarfile
import zipfile
from pathlib import Path

import pytest
from making.places import TOP

BIN = "Scripts" if sys.platform == "win32" else "bin"


def run(*words: str | Path, cwd: Path) -> subprocess.CompletedProcess[str]:
    return subprocess.run(words, cwd=cwd, capture_output=True, text=True, check=False)


@pytest.fixture(scope="module")
def built(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """A folder with the sdist and the wheel that was built from it."""
    out = tmp_path_factory.mktemp("built")
    done = run(sys.executable, "-m", "build", "--outdir", out, TOP, cwd=out)
    assert done.returncode == 0, done.stdout + done.stderr
    return out


@pytest.fixture(scope="module")
def installed(built: Path, tmp_path_factory: pytest.TempPathFactory) -> Path:
    """A new environment, outside the checkout, with nothing in it but the wheel and what it needs."""
    folder = tmp_path_factory.mktemp("installed")
    (wheel,) = built.glob("*.whl")
    done = run(sys.executable, "-m", "venv", "--without-pip", folder / "venv", cwd=folder)
    assert done.returncode == 0, done.stderr
    python = folder / "venv" / BIN / "python"
    done = run(sys.executable, "-m", "pip", "--python", python, "install", "--quiet", f"{wheel}[cli]", cwd=folder)
    assert done.returncode == 0, done.stderr
    shutil.copytree(TOP / "rules" / "example-clinic", folder / "clinic")
    return folder


def files_below(folder: Path) -> set[str]:
    return {path.relative_to(folder).as_posix() for path in folder.rglob("*") if path.suffix in {".yaml", ".json"}}


def test_wheel_holds_every_rule_and_nothing_else(built: Path) -> None:
    (wheel,) = built.glob("*.whl")
    with zipfile.ZipFile(wheel) as archive:
        names = {name for name in archive.namelist() if ".dist-info/" not in name}
    assert all(name.startswith("farside/") for name in names)
    carried = {name.removeprefix("farside/rules/") for name in names if name.startswith("farside/rules/")}
    assert files_below(TOP / "rules") <= carried


def test_sdist_holds_what_the_wheel_is_built_from(built: Path) -> None:
    (sdist,) = built.glob("*.tar.gz")
    with tarfile.open(sdist) as archive:
        tops = {name.split("/")[1] for name in archive.getnames()}
    assert {"engine", "rules", "pyproject.toml", "README.md"} <= tops
    assert not tops & {"site", "tests", ".build", ".environment"}


def test_installed_command_stops_the_deep_box(installed: Path) -> None:
    command = installed / "venv" / BIN / "farside"
    done = run(command, "check", "clinic/plans/deep-box.yaml", "--format", "json", cwd=installed)
    assert done.returncode == 1, done.stderr
    assert json.loads(done.stdout)["verdict"] == "stop"


def test_installed_package_needs_two_libraries(installed: Path) -> None:
    """Only PyYAML and jsonschema are asked for; what they bring themselves is theirs."""
    code = "import importlib.metadata as m;print(sorted(r for r in m.requires('farside') if 'extra' not in r))"
    done = run(installed / "venv" / BIN / "python", "-c", code, cwd=installed)
    assert done.stdout.strip() == "['jsonschema>=4.21', 'pyyaml>=6.0']"
