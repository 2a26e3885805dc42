"""The fields of plans and cards that rules may use: by dotted path, what each subject sees, where its schema stands."""

from collections.abc import Iterator, Mapping
from functools import cache
from typing import Any, Final

from farside import shipped
from farside.quantities.subject import ENCLOSING, About
from farside.reading.defaults import followed

# Where the schema of a field's first word stands: of a card as a whole, or of a part of the plan's.
SCHEMAS: Final[Mapping[str, str]] = {
    "plan": "urn:farside:schema:plan:1",
    "lamp": "urn:farside:schema:lamp:1",
    "composite": "urn:farside:schema:composite:1",
    "adhesive": "urn:farside:schema:adhesive:1",
    "liner": "urn:farside:schema:liner:1",
    "increment": "urn:farside:schema:plan:1#/$defs/increment",
    "exposure": "urn:farside:schema:plan:1#/$defs/exposure",
}


@cache
def fields(about: About) -> Mapping[str, Mapping[str, Any]]:
    """Every field that a rule about something may use, by its path, with its schema; the plan brings its layers."""
    heads = [*ENCLOSING[about], *(("adhesive", "liner") if "plan" in ENCLOSING[about] else ())]
    return {path: schema for head in heads for path, schema in _below(head, shipped.referred(SCHEMAS[head]))}


def _below(path: str, schema: Mapping[str, Any]) -> Iterator[tuple[str, Mapping[str, Any]]]:
    """The fields inside mappings, whichever of several shapes they may have; lists are fields whole."""
    schema = followed(schema, shipped.referred)
    for choice in (*schema.get("oneOf", ()), *schema.get("anyOf", ())):
        yield from _below(path, choice)
    for key, inner in schema.get("properties", {}).items():
        found = followed(inner, shipped.referred)
        yield f"{path}.{key}", found
        yield from _below(f"{path}.{key}", found)
