"""A page for each kind of file: its keys with their meaning, from the published schemas."""

from collections.abc import Iterator, Mapping, Sequence
from typing import Any, Final

from farside import shipped
from farside.export.markdown import bullets, code, link, page, plain, table

_ORDER: Final = (
    "plan",
    "lamp",
    "composite",
    "adhesive",
    "liner",
    "clinic",
    "protocol",
    "rule",
    "sources",
    "table",
    "report",
)
_KEYS: Final = ("Key", "Value", "Meaning")

Schema = Mapping[str, Any]


def format_pages() -> Iterator[tuple[str, str]]:
    """The path of each page below the site's pages, and its Markdown."""
    kinds = _kinds()
    yield "formats/index.md", _index(kinds)
    for kind in kinds:
        yield f"formats/{kind}.md", format_page(kind)


def format_page(kind: str) -> str:
    """One format's page: the file's own keys first, then those of each part that it holds."""
    schema = shipped.schema(kind)
    parts = [plain(schema["description"])] if "description" in schema else []
    parts += [f"Its schema is {code(schema['$id'])}.", *_object(schema, kind)]
    for name, part in schema.get("$defs", {}).items():
        parts += [f"## {_title(name)}", plain(part.get("description", "")), *_object(part, kind)]
    return page(schema.get("title", kind), *parts)


def _kinds() -> list[str]:
    found = {name.rpartition("/")[2].removesuffix(".json") for name in shipped.names("schema")}
    return [kind for kind in _ORDER if kind in found] + sorted(found - set(_ORDER))


def _index(kinds: Sequence[str]) -> str:
    entries = []
    for kind in kinds:
        schema = shipped.schema(kind)
        name = link(plain(schema.get("title", kind)), f"{kind}.md")
        entries.append(f"{name}: {plain(schema['description'])}" if "description" in schema else name)
    intro = (
        "YAML by hand, JSON by program; one schema for both. Keys that are not listed are refused with their place and "
        "the nearest key. Values carry their unit in the key's name."
    )
    return page("File formats", intro, bullets(entries))


def _object(schema: Schema, kind: str, prefix: str = "") -> list[str]:
    """The keys of a mapping as a table; of anything else, what value it takes."""
    rows = list(_rows(schema, kind, prefix))
    if rows:
        return [table(_KEYS, rows)]
    return [] if schema.get("type") == "object" and "patternProperties" not in schema else [_value(schema, kind)]


def _rows(schema: Schema, kind: str, prefix: str) -> Iterator[Sequence[str]]:
    required = set(schema.get("required", ()))
    for key, part in schema.get("properties", {}).items():
        needed = " (required)" if key in required else ""
        yield code(prefix + key) + needed, _value(part, kind), plain(_description(part))
        inner = part.get("items", part) if part.get("type") == "array" else part
        if "properties" in inner:
            yield from _rows(inner, kind, f"{prefix}{key}{'[]' if inner is not part else ''}.")


def _description(part: Schema) -> str:
    if "description" in part or "$ref" not in part:
        return str(part.get("description", ""))
    return _description(shipped.referred(part["$ref"]))


def _value(part: Schema, kind: str) -> str:
    """What a value may be, in words."""
    if "$ref" in part:
        return _referred(part["$ref"], kind)
    if "const" in part:
        return code(part["const"])
    if "enum" in part:
        return "one of " + ", ".join(code(word) for word in part["enum"])
    for joint in ("oneOf", "anyOf"):
        if any("required" not in choice or "type" in choice for choice in part.get(joint, ())):
            return " or ".join(_value(choice, kind) for choice in part[joint])
    words = _typed(part, kind)
    default = f"; {code(_shown(part['default']))} if absent" if "default" in part else ""
    return words + default


def _typed(part: Schema, kind: str) -> str:
    sort = part.get("type", "object")
    if isinstance(sort, list):
        return " or ".join(_typed({**part, "type": each}, kind) for each in sort)
    if sort in {"number", "integer"}:
        return ("number" if sort == "number" else "whole number") + _range(part)
    if sort == "array":
        inner = part.get("items", {})
        held = "" if "properties" in inner else f" of: {_value(inner, kind)}"
        return f"list{held}"
    if sort == "object":
        return "mapping"
    text = plain(part["x-form"]) if "x-form" in part else "text"
    return {"string": text, "boolean": "true or false", "null": "nothing"}[sort]


def _range(part: Schema) -> str:
    bounds = [
        f"above {part['exclusiveMinimum']:g}" if "exclusiveMinimum" in part else "",
        f"at least {part['minimum']:g}" if "minimum" in part else "",
        f"at most {part['maximum']:g}" if "maximum" in part else "",
    ]
    kept = [bound for bound in bounds if bound]
    return f", {', '.join(kept)}" if kept else ""


def _referred(reference: str, kind: str) -> str:
    """A short part in place; a long one by a link to where it is described."""
    part = shipped.referred(reference)
    urn, _, pointer = reference.partition("#")
    if not {"properties", "patternProperties", "oneOf", "anyOf"} & part.keys():
        return _value(part, kind)
    owner, name = urn.split(":")[3], pointer.rpartition("/")[2]
    anchor = f"#{_title(name).lower().replace(' ', '-')}" if "$defs" in pointer else ""
    return link(plain(name.replace("_", " ") or owner), anchor if owner == kind and anchor else f"{owner}.md{anchor}")


def _title(name: str) -> str:
    return name.replace("_", " ").capitalize()


def _shown(value: Any) -> str:
    return str(value) if value != [] else "[]"
