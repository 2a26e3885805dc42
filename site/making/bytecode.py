"""Runs inside Pyodide: writes a folder as a zip of bytecode, the same bytes for the same sources."""

import importlib.util
import marshal
import zipfile
from pathlib import Path

UNCHECKED_HASH = (0b01).to_bytes(4, "little")
"""The .pyc flag for a file that is never compared with its source, which is not there."""

LONG_AGO = (1980, 1, 1, 0, 0, 0)


def bytecode(source: bytes, name: str, kept: Path) -> bytes:
    """The .pyc of a module, from the folder of those kept if it is there.

    Docstrings and asserts are left out of all but our own package.
    """
    file = kept / f"{name.replace('/', '.')}-{importlib.util.source_hash(source).hex()}"
    if not file.exists():
        file.write_bytes(_compiled(source, name))
    return file.read_bytes()


def _compiled(source: bytes, name: str) -> bytes:
    code = compile(source, name, "exec", dont_inherit=True, optimize=0 if name.startswith("farside/") else 2)
    head = importlib.util.MAGIC_NUMBER + UNCHECKED_HASH + importlib.util.source_hash(source)
    return head + marshal.dumps(code)


def write_zip(folder: str, kept: str, out: str) -> int:
    """Writes the zip; returns how many files it holds."""
    files = sorted(path for path in Path(folder).rglob("*") if path.is_file())
    with zipfile.ZipFile(out, "w") as archive:
        for path in files:
            name = path.relative_to(folder).as_posix()
            content = path.read_bytes()
            if path.suffix == ".py":
                content = bytecode(content, name, Path(kept))
                name += "c"
            entry = zipfile.ZipInfo(name, LONG_AGO)
            entry.compress_type = zipfile.ZIP_DEFLATED
            entry.external_attr = 0o644 << 16
            archive.writestr(entry, content, compresslevel=9)
    return len(files)
