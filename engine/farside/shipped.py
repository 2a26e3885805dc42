"""Finds and parses what ships with the package: rules, sources, tables, schemas, the example clinic.

The files stand beside the package in a wheel, at the top of a checkout, and as one compiled JSON in the browser.
"""

import json
from collections.abc import Iterator, Mapping
from functools import cache
from pathlib import Path
from typing import Any, Final

from farside.reading.document import Document, read_document

_PACKAGE: Final = Path(__file__).parent
_COMPILED: Final = "shipped.json"


@cache
def _compiled() -> Mapping[str, Any] | None:
    """The compiled form where the package carries one; read through the loader, since it may lie inside a zip."""
    loader = globals()["__loader__"]
    try:
        text: bytes = loader.get_data(str(_PACKAGE / _COMPILED))
    except OSError:
        return None
    return dict(json.loads(text))


@cache
def folder() -> Path:
    """The folder `rules/`, in the wheel or in the checkout.

    Raises
    ------
    FileNotFoundError
        When the package was installed without it.
    """
    for candidate in (_PACKAGE / "rules", _PACKAGE.parent.parent / "rules"):
        if (candidate / "schema").is_dir():
            return candidate
    raise FileNotFoundError("farside is installed without its rules")


@cache
def names(under: str = ".") -> tuple[str, ...]:
    """The paths of all shipped files below a folder of `rules/`, or of all there are, in order."""
    compiled = _compiled()
    if compiled is not None:
        return tuple(sorted(name for name in compiled if under == "." or name.startswith(under + "/")))
    found = (path for path in (folder() / under).rglob("*") if path.suffix in {".yaml", ".json"})
    return tuple(sorted(path.relative_to(folder()).as_posix() for path in found))


@cache
def document(name: str) -> Document:
    """One shipped file, parsed, by its path below `rules/`. Treat it as frozen."""
    compiled = _compiled()
    if compiled is not None:
        return Document.of(compiled[name], name)
    return read_document((folder() / name).read_bytes(), name)


def documents(under: str) -> Iterator[Document]:
    """Every shipped file below a folder of `rules/`, in order of its path."""
    return (document(name) for name in names(under))


@cache
def schema(kind: str) -> Mapping[str, Any]:
    """The JSON Schema of a kind of file: plan, lamp, composite, adhesive, liner, clinic, rule, ...

    Its references are absolute, so that any part of it can be followed on its own.
    """
    data = document(f"schema/v1/{kind}.json").data
    return dict(_absolute(data, data["$id"]))


@cache
def schemas() -> Mapping[str, Mapping[str, Any]]:
    """All shipped schemas by their `$id`."""
    found = (schema(name.rpartition("/")[2].removesuffix(".json")) for name in names("schema"))
    return {entry["$id"]: entry for entry in found}


def referred(reference: str) -> Mapping[str, Any]:
    """The part of the shipped schemas that an absolute `$ref` names: `urn:farside:schema:plan:1#/$defs/increment`."""
    urn, _, pointer = reference.partition("#")
    found: Any = schemas()[urn]
    for step in filter(None, pointer.split("/")):
        found = found[step]
    return dict(found)


@cache
def whole_schema(kind: str) -> Mapping[str, Any]:
    """The JSON Schema of a kind of file with each reference replaced by what it names, which is quicker to check by.

    A part that holds itself keeps the reference.
    """
    return dict(_whole(schema(kind), ()))


def _whole(part: Any, inside: tuple[str, ...]) -> Any:
    if isinstance(part, list):
        return [_whole(item, inside) for item in part]
    if not isinstance(part, Mapping):
        return part
    reference = part.get("$ref")
    if reference is None:
        return {key: _whole(value, inside) for key, value in part.items()}
    if reference in inside:
        return part
    own = {key: value for key, value in part.items() if key != "$ref"}
    return {**_whole(referred(reference), (*inside, reference)), **own}


def _absolute(part: Any, base: str) -> Any:
    if isinstance(part, Mapping):
        return {
            key: base + value if key == "$ref" and value.startswith("#") else _absolute(value, base)
            for key, value in part.items()
        }
    return [_absolute(item, base) for item in part] if isinstance(part, list) else part


def table(name: str) -> Mapping[str, Any]:
    """One published table by its id, such as `initiators`."""
    return document(f"tables/{name}.yaml").data


@cache
def sources() -> Mapping[str, Any]:
    """Every source by its key."""
    return dict(document("sources.yaml").data["sources"])


def compiled_form() -> dict[str, Any]:
    """Every shipped file as plain data by its path: what the browser's build writes as one JSON."""
    return {name: document(name).data for name in names()}
