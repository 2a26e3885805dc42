"""The published schemas are valid, closed and described, and their references lead somewhere."""

import json
import re
from pathlib import Path

import pytest
from farside.reading.document import read_document
from farside.reading.problems import Refused
from farside.reading.schema import check_schema
from jsonschema import Draft202012Validator

RULES = Path(__file__).parents[3] / "rules"
SCHEMAS = {
    path.stem: json.loads(path.read_text(encoding="utf-8")) for path in sorted((RULES / "schema" / "v1").glob("*.json"))
}
BY_URN = {schema["$id"]: schema for schema in SCHEMAS.values()}
LAMP = {
    "kind": "lamp", "id": "a", "title": "A", "tip_diameter_mm": 8,
    "modes": [{"id": "m", "bands": [{"peak_nm": 455, "width_nm": 22, "share": 1}]}],
}  # fmt: skip


def parts(schema):
    """Every schema inside a schema."""
    if isinstance(schema, dict):
        yield schema
        for key, inner in schema.items():
            if key in {"properties", "patternProperties", "$defs"}:
                for named in inner.values():
                    yield from parts(named)
            elif key not in {"default", "const", "enum"}:
                yield from parts(inner)
    elif isinstance(schema, list):
        for inner in schema:
            yield from parts(inner)


def followed(reference, base):
    urn, _, pointer = reference.partition("#")
    found = BY_URN[urn or base]
    for step in filter(None, pointer.split("/")):
        found = found[step]
    return found


def test_every_kind_has_a_schema():
    assert set(SCHEMAS) == {
        "common", "plan", "lamp", "composite", "adhesive", "liner", "clinic",
        "rule", "protocol", "sources", "table", "report",
    }  # fmt: skip


@pytest.mark.parametrize("kind", SCHEMAS)
def test_valid_and_named(kind):
    schema = SCHEMAS[kind]
    Draft202012Validator.check_schema(schema)
    assert schema["$schema"] == "https://json-schema.org/draft/2020-12/schema"
    assert schema["$id"] == f"urn:farside:schema:{kind}:1"
    if kind != "common":
        assert schema["properties"]["kind"]["const"] == kind
        assert "kind" in schema["required"]


@pytest.mark.parametrize("kind", SCHEMAS)
def test_every_property_is_described_or_refers_to_what_is(kind):
    for part in parts(SCHEMAS[kind]):
        for name, inner in part.get("properties", {}).items():
            if set(inner) <= {"enum", "minItems"}:
                continue  # a condition on a property that is described above it
            described = inner
            while "description" not in described and "$ref" in described:
                described = followed(described["$ref"], SCHEMAS[kind]["$id"])
            assert described.get("description", "").endswith((".", "]")), f"{kind}: {name}"


@pytest.mark.parametrize("kind", SCHEMAS)
def test_references_lead_somewhere(kind):
    for part in parts(SCHEMAS[kind]):
        if "$ref" in part:
            assert isinstance(followed(part["$ref"], SCHEMAS[kind]["$id"]), dict)


@pytest.mark.parametrize("kind", sorted(set(SCHEMAS) - {"common"}))
def test_top_is_closed(kind):
    assert SCHEMAS[kind]["additionalProperties"] is False


@pytest.mark.parametrize("kind", SCHEMAS)
def test_numbers_say_their_unit(kind):
    units = {"mm": "[mm]", "s": "[s]", "nm": "[nm]", "lx": "[lx]", "deg": "[°]", "c": "[°C]", "cm2": "[mW/cm²]"}
    for part in parts(SCHEMAS[kind]):
        for name, inner in part.get("properties", {}).items():
            unit = units.get(name.rpartition("_")[2]) if "_" in name else None
            if unit and "per" not in name:
                described = inner
                while "description" not in described:
                    described = followed(described["$ref"], SCHEMAS[kind]["$id"])
                assert unit in described["description"], f"{kind}: {name}"


def refused(data, kind):
    with pytest.raises(Refused) as refusal:
        check_schema(read_document(json.dumps(data), "given.json"), SCHEMAS[kind], SCHEMAS.values())
    return str(refusal.value)


def plan(**changes):
    return {"kind": "plan", "title": "A plan", "increments": [{"thickness_mm": 2.0}], **changes}


def passes(data):
    check_schema(read_document(json.dumps(data), "given.json"), SCHEMAS[data["kind"]], SCHEMAS.values())


@pytest.mark.parametrize("key", ["gap_mm", "cavity", "lamp", "room", "team", "adhesive", "liner", "after"])
def test_a_plan_may_leave_to_the_usual_values(key):
    full = plan(gap_mm=1, cavity={}, lamp={}, room={}, team={}, adhesive="not-used", liner={}, after=[])
    del full[key]
    passes(full)


@pytest.mark.parametrize(
    ("reading", "word"),
    [(40_000, "at most 10000"), (0.5, "at least 1"), (-1, "at least 1")],
)
def test_impossible_exitance_is_refused_with_its_range(reading, word):
    entry = {"on": "2026-11-27", "mode": "m", "radiant_exitance_mw_cm2": reading, "meter": "unknown", "sleeve": "none"}
    assert word in refused({**LAMP, "readings": [entry]}, "lamp")
    passes({**LAMP, "readings": [{**entry, "radiant_exitance_mw_cm2": 9_999}]})


@pytest.mark.parametrize(
    "change",
    [
        {"increments": [{"thickness_mm": 0.1}]}, {"increments": [{"thickness_mm": 12, "exposures": []}]},
        {"increments": [{"thickness_mm": 2, "composite_temperature_c": 68}]}, {"gap_mm": 25}, {"gap_mm": 0},
        {"cavity": {"depth_mm": 14, "width_mm": 15, "remaining_dentine_mm": 0}},
        {"after": [{"time_s": 0.5, "tilt_deg": -75}, {"time_s": 600}]},
        {"room": {"sources": [{"what": "window", "illuminance_lx": 160_000}]}},
    ],
)  # fmt: skip
def test_unusual_but_possible_values_are_left_to_the_rules(change):
    passes(plan(**change))


@pytest.mark.parametrize(
    "card", ["../secret", "/etc/passwd", "a/b", "a\\b", "..", "A", "", "a.yaml", "-a", "a\n", "x" * 65]
)
def test_a_card_name_is_never_a_path(card):
    assert "lamp.card is" in refused(plan(lamp={"card": card}), "plan")


KINDS = re.compile(r"^kind: (\w+)", re.MULTILINE)
FILES = [path for path in sorted(RULES.rglob("*.yaml")) if KINDS.search(path.read_text(encoding="utf-8"))]


@pytest.mark.parametrize("path", FILES, ids=lambda path: path.relative_to(RULES).as_posix())
def test_every_shipped_file_keeps_to_its_schema(path):
    document = read_document(path.read_bytes(), path.name)
    check_schema(document, SCHEMAS[document.data["kind"]], SCHEMAS.values())
