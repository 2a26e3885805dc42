"""Checks a document against a JSON Schema and says what is wrong in placed messages."""

import re
from collections.abc import Iterable, Iterator, Mapping
from datetime import date
from functools import cache
from itertools import islice
from typing import Any, Final

from farside.reading.document import Document
from farside.reading.nearest import nearest
from farside.reading.problems import Refused
from farside.reading.schema_errors import problems_of

__all__ = ["check_by", "check_schema", "nearest", "validator_of"]

Schema = Mapping[str, Any]
Validator = Any

MOST_PROBLEMS: Final = 50
MOST_ERRORS: Final = 500


def check_schema(document: Document, schema: Schema, others: Iterable[Schema] = ()) -> None:
    """Lets a document pass that keeps to its schema.

    Parameters
    ----------
    document : Document
        What was read.
    schema : mapping
        A JSON Schema, 2020-12, with its `$id`.
    others : iterable of mapping
        The schemas that it refers to by their `$id`; nothing is fetched from anywhere.

    Raises
    ------
    Refused
        With each problem at its place, in the order of the file, at most 50.
    """
    check_by(validator_of(schema, others), document)


def check_by(validator: Validator, document: Document) -> None:
    """Lets a document pass that keeps to a schema made ready by `validator_of`; as `check_schema` in all else."""
    problems = problems_of(document, islice(validator.iter_errors(document.data), MOST_ERRORS))
    if problems:
        raise Refused(problems[:MOST_PROBLEMS])


def validator_of(schema: Schema, others: Iterable[Schema] = ()) -> Validator:
    """A schema made ready to check by, worth keeping where many documents keep to one schema."""
    from referencing import Registry
    from referencing.jsonschema import DRAFT202012

    parts = [(part["$id"], DRAFT202012.create_resource(part)) for part in (schema, *others)]
    registry: Any = Registry().with_resources(parts)
    kind, formats = _kind()
    return kind(schema, registry=registry, format_checker=formats)


@cache
def _kind() -> tuple[Any, Any]:
    """The validator's class and its formats; slow to import, and the page checks no file to start."""
    from jsonschema import Draft202012Validator, FormatChecker, ValidationError
    from jsonschema.validators import extend

    def pattern(_: Any, wanted: str, instance: object, __: Schema) -> Iterator[ValidationError]:
        if isinstance(instance, str) and not re.search(_to_the_end(wanted), instance):
            yield ValidationError("of another form")

    def unless_too_many(keyword: str, most: str) -> Any:
        """A keyword that does not look into what holds too many; that it does is problem enough."""
        usual: Any = Draft202012Validator.VALIDATORS[keyword]

        def look(validator: Any, wanted: Any, instance: Any, schema: Schema) -> Iterator[ValidationError]:
            if not isinstance(instance, (list, dict)) or len(instance) <= schema.get(most, len(instance)):
                yield from usual(validator, wanted, instance, schema)

        return look

    formats = FormatChecker(formats=())
    formats.checks("date", raises=ValueError)(_is_day)
    keywords = {
        "pattern": pattern,
        "items": unless_too_many("items", "maxItems"),
        "patternProperties": unless_too_many("patternProperties", "maxProperties"),
        "additionalProperties": unless_too_many("additionalProperties", "maxProperties"),
        "propertyNames": unless_too_many("propertyNames", "maxProperties"),
    }
    return extend(Draft202012Validator, keywords), formats  # type: ignore[no-untyped-call]


def _to_the_end(pattern: str) -> str:
    """A pattern whose last `$` is the end of the text, as JSON Schema has it, and not a line end before it."""
    return pattern.removesuffix("$") + r"\Z" if pattern.endswith("$") else pattern


def _is_day(value: object) -> bool:
    """Whether text of a date's form names a day that exists; other text is the pattern's to refuse."""
    if isinstance(value, str) and value.isascii() and len(value) == len("YYYY-MM-DD") and value[4] == value[7] == "-":
        date.fromisoformat(value)
    return True
