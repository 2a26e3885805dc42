"""What ships: found the same as files and as one compiled form, its schemas followed to their ends."""

import json

import pytest
from farside import shipped
from farside.reading.document import read_document
from unit.made import TOP


def test_every_file_of_rules_ships():
    on_disk = {path.relative_to(TOP / "rules").as_posix() for path in (TOP / "rules").rglob("*.*") if path.is_file()}
    assert set(shipped.names()) == on_disk
    assert shipped.names() == tuple(sorted(shipped.names()))


def test_names_below_a_folder():
    assert set(shipped.names("tables")) == {name for name in shipped.names() if name.startswith("tables/")}
    assert "base/protocol.yaml" in shipped.names("base")


def test_the_compiled_form_gives_what_the_files_give(monkeypatch):
    """As the browser has it: one JSON text beside the package, and no files."""
    from_files = {name: shipped.document(name).data for name in shipped.names()}
    compiled = json.loads(json.dumps(shipped.compiled_form()))
    names, below = shipped.names(), shipped.names("example-clinic/plans")
    for cached in (shipped.names, shipped.document, shipped.schema, shipped.schemas, shipped.sources):
        cached.cache_clear()
    monkeypatch.setattr(shipped, "_compiled", lambda: compiled)
    try:
        assert (shipped.names(), shipped.names("example-clinic/plans")) == (names, below)
        assert {name: shipped.document(name).data for name in names} == from_files
    finally:
        for cached in (shipped.names, shipped.document, shipped.schema, shipped.schemas, shipped.sources):
            cached.cache_clear()


def test_schemas_are_by_id_and_their_references_lead_somewhere():
    schemas = shipped.schemas()
    assert {"urn:farside:schema:plan:1", "urn:farside:schema:report:1"} <= schemas.keys()
    references = [ref for schema in schemas.values() for ref in _references(schema)]
    assert len(references) > 50
    for reference in references:
        assert shipped.referred(reference)


def _references(part):
    if isinstance(part, dict):
        if isinstance(part.get("$ref"), str):
            yield part["$ref"]
        for inner in part.values():
            yield from _references(inner)
    elif isinstance(part, list):
        for inner in part:
            yield from _references(inner)


def test_one_schema_is_the_file_of_its_kind():
    assert shipped.schema("plan")["$id"] == "urn:farside:schema:plan:1"
    assert shipped.schema("plan")["properties"]["kind"] == {
        "description": "What kind of file this is.",
        "const": "plan",
    }


def test_tables_and_sources_by_name():
    assert {row["id"] for row in shipped.table("sleeves")["rows"]} == {"none", "fitted", "wrinkled"}
    assert "iso-4049" in shipped.sources()


def test_a_document_is_what_its_file_says():
    path = TOP / "rules" / "example-clinic" / "clinic.yaml"
    assert shipped.document("example-clinic/clinic.yaml").data == read_document(path.read_bytes(), "clinic").data


def test_a_file_that_does_not_ship_is_not_found():
    with pytest.raises(OSError):
        shipped.document("base/nothing.yaml")
