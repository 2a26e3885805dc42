"""The defaults that a JSON Schema states, laid under data that keeps to it."""

from collections.abc import Callable, Mapping, Sequence
from typing import Any

Schema = Mapping[str, Any]
Resolve = Callable[[str], Schema]


def with_defaults(data: Any, schema: Schema, resolve: Resolve) -> Any:
    """A copy of `data` in which absent keys take the defaults of its schema.

    Parameters
    ----------
    data : Any
        What was read, already valid against the schema.
    schema : mapping
        Its JSON Schema; `$ref`, `properties`, `items` and, by the type of the data, `oneOf` and `anyOf` are followed.
    resolve : callable
        Gives the schema that a `$ref` names.

    Returns
    -------
    Any
        The same shape with defaults filled in, at every depth that the data has.
    """
    schema = branch_for(data, schema, resolve)
    if isinstance(data, Mapping):
        properties: Mapping[str, Schema] = schema.get("properties", {})
        filled = {key: with_defaults(value, properties.get(key, {}), resolve) for key, value in data.items()}
        for key, inner in properties.items():
            if key not in filled and "default" in (found := followed(inner, resolve)):
                filled[key] = found["default"]
        return filled
    if isinstance(data, list):
        items: Schema = schema.get("items", {})
        return [with_defaults(item, items, resolve) for item in data]
    return data


def default_at(path: Sequence[str], schema: Schema, resolve: Resolve) -> Any:
    """The default that a schema states for a path of keys, None where it states none."""
    for step in path:
        schema = branch_for({}, schema, resolve).get("properties", {}).get(step, {})
    return followed(schema, resolve).get("default")


def followed(schema: Schema, resolve: Resolve) -> Schema:
    """A schema with the target of its `$ref` beneath its own keys."""
    while "$ref" in schema:
        own = {key: value for key, value in schema.items() if key != "$ref"}
        schema = {**resolve(schema["$ref"]), **own}
    return schema


def branch_for(data: Any, schema: Schema, resolve: Resolve) -> Schema:
    """The branch of a `oneOf` or `anyOf` whose shape the data has, else the schema itself."""
    schema = followed(schema, resolve)
    for choice in (*schema.get("oneOf", ()), *schema.get("anyOf", ())):
        found = branch_for(data, choice, resolve)
        if isinstance(data, Mapping) and set(data) <= set(found.get("properties", ())):
            return found
        if isinstance(data, list) and "items" in found:
            return found
    return schema
