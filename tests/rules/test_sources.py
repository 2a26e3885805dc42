"""Every citation leads to a source, every source is cited, and every shipped file fits its schema."""

import json
import re
from collections.abc import Iterator
from pathlib import Path
from typing import Any

import pytest
from farside.reading.document import read_document
from farside.reading.schema import check_schema

TOP = Path(__file__).parents[2]
RULES = TOP / "rules"
FILES = sorted(RULES.rglob("*.yaml"))
SCHEMAS = {path.stem: json.loads(path.read_text(encoding="utf-8")) for path in (RULES / "schema" / "v1").glob("*.json")}
# Checks against published values name their source in code.
NAMED_IN_CODE = re.compile(r'source="([a-z0-9]+(?:-[a-z0-9]+)+)"')


def name(path: Path) -> str:
    return path.relative_to(RULES).as_posix()


def data_of(path: Path) -> Any:
    return read_document(path.read_bytes(), name(path)).data


def cited(data: Any) -> Iterator[str]:
    """Every key under `cite`, however deep."""
    if isinstance(data, dict):
        if isinstance(data.get("cite"), str):
            yield data["cite"]
        for value in data.values():
            yield from cited(value)
    elif isinstance(data, list):
        for value in data:
            yield from cited(value)


SOURCES = data_of(RULES / "sources.yaml")["sources"]
CITED = {key for path in FILES for key in cited(data_of(path))}
CHECKED = {
    key
    for path in (TOP / "tests" / "reference").glob("*.py")
    for key in NAMED_IN_CODE.findall(path.read_text(encoding="utf-8"))
}


@pytest.mark.parametrize("path", FILES, ids=name)
def test_every_file_fits_its_schema(path: Path) -> None:
    document = read_document(path.read_bytes(), name(path))
    check_schema(document, SCHEMAS[document.data["kind"]], SCHEMAS.values())


@pytest.mark.parametrize("path", [path for path in FILES if path.parent.name != "tables"], ids=name)
def test_every_file_names_its_schema_where_it_lies(path: Path) -> None:
    first = path.read_text(encoding="utf-8").splitlines()[0]
    given = first.removeprefix("# yaml-language-server: $schema=")
    assert (path.parent / given).resolve() == RULES / "schema" / "v1" / f"{data_of(path)['kind']}.json"


@pytest.mark.parametrize("key", sorted(CITED | CHECKED))
def test_every_citation_leads_to_a_source(key: str) -> None:
    assert key in SOURCES


def test_no_source_is_an_orphan() -> None:
    assert set(SOURCES) == CITED | CHECKED


@pytest.mark.parametrize("path", sorted((RULES / "example-clinic").rglob("*.yaml")), ids=name)
def test_the_example_clinic_says_that_it_is_invented(path: Path) -> None:
    assert "Invented" in path.read_text(encoding="utf-8").splitlines()[1]
