"""What stands where: the top of the checkout, the lock file, the server's manners."""

import json
import subprocess
import urllib.error
import urllib.request
from pathlib import Path

import pytest
from making.places import SITE, TOP
from making.server import Server

VISIBLE = {"README.md", "DEVELOPERS.md", "pyproject.toml", "rules", "engine", "site", "tests"}


def tracked() -> list[str]:
    done = subprocess.run(["git", "ls-files"], cwd=TOP, capture_output=True, text=True, check=False)
    if done.returncode:
        pytest.skip("not a git checkout")
    return done.stdout.splitlines()


def test_the_top_holds_what_a_newcomer_expects_and_nothing_else() -> None:
    assert {name.split("/")[0] for name in tracked() if not name.startswith(".")} == VISIBLE


def test_the_lock_file_names_no_address_of_a_package() -> None:
    packages = json.loads((SITE / "package-lock.json").read_text())["packages"]
    assert packages
    assert [name for name, package in packages.items() if "resolved" in package] == []


def test_every_npm_package_is_asked_for_by_its_exact_version() -> None:
    package = json.loads((SITE / "package.json").read_text())
    asked = {**package["dependencies"], **package["devDependencies"]}
    assert asked
    assert [name for name, version in asked.items() if not version[0].isdigit()] == []


@pytest.fixture
def home(tmp_path: Path):
    (tmp_path / "assets").mkdir()
    for name in ("index.html", "sw.js", "assets/engine-0a.zip"):
        (tmp_path / name).write_text("x")
    with Server(tmp_path) as server:
        yield server.address


@pytest.mark.parametrize(
    ("name", "caching"),
    [
        ("", "no-cache"),
        ("sw.js", "no-cache"),
        ("assets/engine-0a.zip", "public, max-age=31536000, immutable"),
    ],
)
def test_only_files_named_after_their_content_may_be_kept(home: str, name: str, caching: str) -> None:
    with urllib.request.urlopen(home + name) as answer:
        assert answer.headers["Cache-Control"] == caching


def test_the_server_stays_inside_its_folder(home: str) -> None:
    with pytest.raises(urllib.error.HTTPError) as refused:
        urllib.request.urlopen(home + "../../../etc/passwd")
    assert refused.value.code == 404
