"""Packs Python's library, the engine, its libraries and the rules as one zip of bytecode for the browser."""

import hashlib
import importlib.metadata
import json
import shutil
import subprocess
import sys
import zipfile
from collections.abc import Iterable, Iterator
from pathlib import Path

from making.places import BUILD, ENGINE, SITE

LIBRARIES = (
    "PyYAML",
    "jsonschema",
    "jsonschema-specifications",
    "referencing",
    "attrs",
    "pyrsistent",
    "pyrsistent-as-rpds-py",
)

RPDS = '''"""Stands in for a compiled library of this name, which jsonschema and referencing import."""

from pyrsistent_as_rpds.pure import *
'''

# What the engine, its libraries and Pyodide's start never import: the network, other data formats, developers' tools.
LEFT_OUT = frozenset(
    """
    __hello__ __phello__ _aix_support _android_support _apple_support _pyio _pyrepl antigravity argparse bdb
    cProfile code cmd compileall configparser ctypes curses dbm doctest email ensurepip filecmp fileinput ftplib
    getopt getpass gettext hmac html http imaplib lib2to3 mailbox mimetypes modulefinder multiprocessing netrc
    nturl2path optparse pdb pickletools plistlib poplib profile pstats pty py_compile pyclbr pydoc pydoc_data
    rlcompleter sched shelve smtplib socketserver sqlite3 ssl stringprep symtable tabnanny tarfile this timeit
    tomllib trace tty turtle unittest venv wave webbrowser wsgiref xml xmlrpc zipapp zoneinfo
    """.split()
)
KEPT_ENCODINGS = frozenset("__init__ aliases ascii cp437 latin_1 utf_8 utf_8_sig utf_16 utf_16_le utf_16_be".split())

_STAGE = BUILD / "engine" / "source"
_COMPILERS = tuple(
    SITE / name for name in ("making/bytecode.mjs", "making/bytecode.py", "node_modules/pyodide/package.json")
)


def build_engine(out: Path, node: str) -> Path:
    """Writes `engine-<hash>.zip` into the folder out and returns its path; made anew only if something has changed."""
    _stage(_STAGE)
    staged = sorted(path for path in _STAGE.rglob("*") if path.is_file())
    compilers = _digest_of(_COMPILERS, SITE)
    digest = hashlib.sha256((compilers + _digest_of(staged, _STAGE)).encode()).hexdigest()
    target = out / f"engine-{digest[:12]}.zip"
    kept = BUILD / "engine" / target.name
    if not kept.exists():
        for old in kept.parent.glob("engine-*.zip"):
            old.unlink()
        half = kept.with_suffix(".part")
        compiled = kept.parent / f"compiled-{compilers[:12]}"
        compiled.mkdir(exist_ok=True)
        subprocess.run([node, SITE / "making" / "bytecode.mjs", _STAGE, compiled, half], check=True, cwd=SITE)
        half.rename(kept)
    out.mkdir(parents=True, exist_ok=True)
    shutil.copyfile(kept, target)
    return target


def _stage(folder: Path) -> None:
    shutil.rmtree(folder, ignore_errors=True)
    for name, content in _files():
        target = folder / name
        target.parent.mkdir(parents=True, exist_ok=True)
        target.write_bytes(content)


def _files() -> Iterator[tuple[str, bytes]]:
    """Everything that goes in, by its name in the zip."""
    yield from _standard_library()
    for library in LIBRARIES:
        yield from library_files(library)
    yield "rpds.py", RPDS.encode()
    for path in sorted(ENGINE.rglob("*.py")):
        name = path.relative_to(ENGINE.parent)
        if name.parts[1] != "cli":
            yield name.as_posix(), path.read_bytes()
    yield "farside/shipped.json", _compiled_rules()


def _standard_library() -> Iterator[tuple[str, bytes]]:
    with zipfile.ZipFile(SITE / "node_modules" / "pyodide" / "python_stdlib.zip") as archive:
        for name in archive.namelist():
            top, _, rest = name.partition("/")
            left_out = top.removesuffix(".py") in LEFT_OUT
            foreign = top == "encodings" and rest.removesuffix(".py") not in KEPT_ENCODINGS
            if name.endswith(".py") and not left_out and not foreign:
                yield name, archive.read(name)


def library_files(name: str) -> Iterator[tuple[str, bytes]]:
    """The Python and data files of an installed library, without its tests and without what is compiled."""
    for file in importlib.metadata.distribution(name).files or ():
        inside = file.parts[0] != ".." and not file.parts[0].endswith(".dist-info")
        if inside and file.suffix in {".py", ".json", ""} and not {"tests", "benchmarks"} & set(file.parts):
            yield file.as_posix(), file.read_binary()


def _compiled_rules() -> bytes:
    sys.path.insert(0, str(ENGINE.parent))
    from farside.shipped import compiled_form

    return json.dumps(compiled_form(), ensure_ascii=False, separators=(",", ":")).encode()


def _digest_of(files: Iterable[Path], below: Path) -> str:
    digest = hashlib.sha256()
    for path in files:
        content = path.read_bytes()
        digest.update(f"{path.relative_to(below).as_posix()}:{len(content)}:".encode())
        digest.update(content)
    return digest.hexdigest()
