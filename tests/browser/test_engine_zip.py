"""The one zip that the browser starts from: all of the engine, only bytecode, the same bytes each time."""

import json
import subprocess
import zipfile
from pathlib import Path

import pytest
from farside.shipped import compiled_form
from making.environment import node
from making.places import ENGINE, SITE

SOURCE = """
NAMES = frozenset({"gap", "tip", "lamp", "cavity", "matrix", "sleeve"})


def known(name):
    return name in {"stop", "revise", "open", "watch", "clear"} or name in NAMES
"""


@pytest.fixture(scope="module")
def names(built_site: Path) -> dict[str, bytes]:
    (path,) = built_site.glob("assets/engine-*.zip")
    with zipfile.ZipFile(path) as archive:
        return {name: archive.read(name) for name in archive.namelist()}


def test_holds_the_whole_engine_but_the_command_line(names: dict[str, bytes]) -> None:
    modules = {path.relative_to(ENGINE.parent).as_posix() + "c" for path in ENGINE.rglob("*.py")}
    expected = {name for name in modules if not name.startswith("farside/cli/")}
    assert {name for name in names if name.startswith("farside/") and name.endswith(".pyc")} == expected


def test_holds_bytecode_alone(names: dict[str, bytes]) -> None:
    assert [name for name in names if name.endswith((".py", ".so", ".pyd"))] == []


def test_holds_the_rules_as_they_stand(names: dict[str, bytes]) -> None:
    assert json.loads(names["farside/shipped.json"]) == json.loads(json.dumps(compiled_form()))


def test_is_the_same_each_time(tmp_path: Path) -> None:
    source = tmp_path / "source"
    source.mkdir()
    (source / "words.py").write_text(SOURCE)
    made = []
    for name in ("one", "two"):
        kept = tmp_path / name
        kept.mkdir()
        out = tmp_path / f"{name}.zip"
        subprocess.run([node(), SITE / "making" / "bytecode.mjs", source, kept, out], check=True, cwd=SITE)
        made.append(out.read_bytes())
    assert made[0] == made[1]
