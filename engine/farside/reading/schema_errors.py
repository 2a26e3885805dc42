"""Turns the errors of a JSON Schema validator into placed problems that name what was meant."""

import re
from collections.abc import Iterable, Iterator, Mapping
from itertools import islice
from typing import Any, Final

from farside.reading.document import Document
from farside.reading.messages import MESSAGES
from farside.reading.nearest import nearest
from farside.reading.problems import Path, Problem, path_text
from farside.reading.schema_words import ANSWERS, choices_word, looks_like_number, range_word, shown_value, wanted_word
from farside.reading.tree import type_word

RANGE: Final = frozenset({"minimum", "maximum", "exclusiveMinimum", "exclusiveMaximum"})
MOST_KEYS: Final = 50
CHOICES: Final = frozenset({"oneOf", "anyOf"})


def problems_of(document: Document, errors: Iterable[Any]) -> list[Problem]:
    """The problems behind a validator's errors, each once, in the order of the file.

    A file of another kind than its schema has that one problem; a key that is missing because it was misspelt has
    only the misspelling's.
    """
    found: dict[tuple[str, Path, str], Problem] = {}
    for error in errors:
        for problem in _problems(document, error, ()):
            found.setdefault((problem.key, problem.path, problem.message), problem)
    problems = list(found.values())
    other_kind = [problem for problem in problems if problem.path == ("kind",)]
    if other_kind:
        return other_kind
    meant = {
        (problem.path[:-1], problem.values.get("near")) for problem in problems if problem.key == "unknown-key-near"
    }
    kept = [
        problem
        for problem in problems
        if not (problem.key == "missing" and (problem.path, problem.values["name"]) in meant)
    ]
    return sorted(kept, key=lambda problem: (problem.place.line, problem.place.column))


def _problems(document: Document, error: Any, above: Path) -> Iterator[Problem]:
    path: Path = (*above, *error.relative_path)
    if error.validator in CHOICES:
        yield from _branches(document, error, path)
    elif error.validator == "additionalProperties":
        yield from _unknown_keys(document, error, path)
    elif error.validator == "required":
        for name in error.validator_value:
            if name not in error.instance:
                yield document.problem(MESSAGES, "missing", path, name=name)
    elif "propertyNames" in error.relative_schema_path:
        form = error.schema.get("x-form", "another name")
        at = (*path, error.instance)
        yield document.problem(
            MESSAGES, "key-form", at, at_key=True, where=path_text(path), name=error.instance, form=form
        )
    else:
        yield _single(document, error, path)


def _single(document: Document, error: Any, path: Path) -> Problem:
    """The problem of one value at one place."""
    rule, value, schema = error.validator, error.instance, error.schema

    def problem(key: str, **values: Any) -> Problem:
        return document.problem(MESSAGES, key, path, **values)

    if rule in RANGE:
        return problem("range", value=shown_value(value), range=range_word(schema))
    if rule == "type":
        return _wrong_type(document, value, error.validator_value, path)
    if rule in {"enum", "const"}:
        return _wrong_choice(
            document, value, [error.validator_value] if rule == "const" else error.validator_value, path
        )
    if rule == "pattern":
        return problem("form", value=value, form=schema.get("x-form", "of another form"))
    if rule == "format":
        return problem("no-such-day", value=value)
    limit = error.validator_value
    if rule in {"maxLength", "maxItems", "maxProperties"}:
        key = {"maxLength": "text-long", "maxItems": "list-long", "maxProperties": "keys-many"}[rule]
        return problem(key, length=len(value), most=limit)
    if rule in {"minLength", "minItems", "minProperties"}:
        key = {"minLength": "text-short", "minItems": "list-short", "minProperties": "keys-few"}[rule]
        return problem(key, length=len(value), least=limit)
    if rule == "uniqueItems":
        return problem("list-twice")
    return problem("not-allowed" if error.validator is None else "unfit")


def _wrong_type(document: Document, value: object, wanted: str | list[str], path: Path) -> Problem:
    word = wanted_word(wanted)
    kinds = {wanted} if isinstance(wanted, str) else set(wanted)
    if isinstance(value, str) and kinds & {"number", "integer"} and (number := looks_like_number(value)):
        key = f"type-{number.why}"
        return document.problem(MESSAGES, key, path, wanted=word, value=value, number=number.written)
    if isinstance(value, str) and kinds == {"boolean"} and (written := ANSWERS.get(value.lower())):
        return document.problem(MESSAGES, "type-answer", path, wanted=word, written=written)
    if isinstance(value, str) and kinds & {"number", "integer"} and "object" not in kinds:
        return document.problem(MESSAGES, "type-word", path, wanted=word, value=value)
    if kinds == {"string"} and isinstance(value, (bool, int, float)):
        return document.problem(MESSAGES, "type-text", path, found=type_word(value))
    found = shown_value(value) if kinds == {"integer"} and isinstance(value, float) else type_word(value)
    return document.problem(MESSAGES, "type", path, found=found, wanted=word)


def _wrong_choice(document: Document, value: object, choices: list[Any], path: Path) -> Problem:
    words = choices_word(choices)
    if not isinstance(value, str):
        return document.problem(MESSAGES, "choice-type", path, found=type_word(value), choices=words)
    near = nearest(value, [choice for choice in choices if isinstance(choice, str)])
    if near is None or len(choices) == 1:
        return document.problem(MESSAGES, "choice", path, value=value, choices=words)
    return document.problem(MESSAGES, "choice-near", path, value=value, choices=words, near=near)


def _unknown_keys(document: Document, error: Any, path: Path) -> Iterator[Problem]:
    schema = error.schema
    known: Mapping[str, Any] = schema.get("properties", {})
    patterns = [re.compile(pattern) for pattern in schema.get("patternProperties", {})]
    strange = (key for key in error.instance if key not in known and not any(form.search(key) for form in patterns))
    for name in islice(strange, MOST_KEYS):
        values: dict[str, Any] = {"name": name, "where": path_text(path)}
        near = nearest(name, (key for key in known if key not in error.instance))
        if name == "<<":
            key = "merge-key"
        elif near is not None:
            # a letter of another script may look the same, so it is shown as its code
            key, values = "unknown-key-near", {**values, "name": _in_ascii(name), "near": near}
        elif patterns and "x-form" in schema:
            key, values = "key-form", {**values, "form": schema["x-form"]}
        elif 0 < len(known) <= 8:
            key, values = "unknown-key-of", {**values, "known": list(known)}
        else:
            key = "unknown-key"
        yield document.problem(MESSAGES, key, (*path, name), at_key=True, **values)


def _in_ascii(text: str) -> str:
    return text.encode("ascii", "backslashreplace").decode("ascii")


def _branches(document: Document, error: Any, path: Path) -> Iterator[Problem]:
    """The problems of the branch that was meant, told by type first and by its keys second."""
    branches: dict[int, list[Any]] = {}
    for inner in error.context:
        branches.setdefault(inner.relative_schema_path[0], []).append(inner)
    fitting = [errors for errors in branches.values() if not any(map(_at_its_root, errors))]
    if not fitting:
        yield _no_branch(document, error, branches, path)
        return
    names = [_missing_alone(errors) for errors in fitting]
    if len(fitting) > 1 and all(names):
        yield document.problem(MESSAGES, "missing-either", path, names=" or ".join(filter(None, names)))
        return
    meant = min(fitting, key=_strangeness)
    others = [errors for errors in fitting if errors is not meant]
    for inner in meant:
        for problem in _problems(document, inner, path):
            yield _not_together(document, problem, error.instance, others) or problem


def _at_its_root(error: Any) -> bool:
    return not error.relative_path and error.validator in {"type", "const", "enum"}


def _strangeness(errors: list[Any]) -> tuple[int, int, int]:
    """How far a mapping is from a branch: keys strange to it, then keys missing, then errors in all."""
    strange = missing = 0
    for error in errors:
        if error.relative_path:
            continue
        if error.validator == "additionalProperties":
            known = error.schema.get("properties", {})
            names = islice((name for name in error.instance if name not in known), MOST_KEYS)
            strange += sum(1 if nearest(name, known) else 2 for name in names)
        missing += error.validator == "required"
    return strange, missing, len(errors)


def _missing_alone(errors: list[Any]) -> str | None:
    """The first key that a branch wants, where nothing but wanted keys is wrong."""
    wanted = [
        name
        for error in errors
        if error.validator == "required" and not error.relative_path
        for name in error.validator_value
        if name not in error.instance
    ]
    alone = all(error.validator == "required" and not error.relative_path for error in errors)
    return f'"{wanted[0]}"' if wanted and alone else None


def _not_together(document: Document, problem: Problem, instance: Any, others: list[list[Any]]) -> Problem | None:
    """A key that is strange to the branch meant and at home in another stands in the wrong company."""
    if not problem.key.startswith("unknown-key"):
        return None
    name = problem.path[-1]
    for errors in others:
        for error in errors:
            if error.validator == "additionalProperties" and name in error.schema.get("properties", {}):
                mine = [key for key in instance if key not in error.schema["properties"]]
                if mine:
                    where = path_text(problem.path[:-1])
                    return document.problem(
                        MESSAGES, "not-together", problem.path, at_key=True, name=mine[0], other=name, where=where
                    )
    return None


def _no_branch(document: Document, error: Any, branches: dict[int, list[Any]], path: Path) -> Problem:
    """What a value could have been, where its type fits no branch."""
    words: list[str] = []
    names: list[str] = []
    for errors in branches.values():
        root = next(inner for inner in errors if _at_its_root(inner))
        if root.validator == "type":
            words.append(wanted_word(root.validator_value))
        else:
            chosen = [root.validator_value] if root.validator == "const" else root.validator_value
            names.extend(choice for choice in chosen if isinstance(choice, str))
            words.append(choices_word(chosen))
    value, choices = error.instance, " or ".join(dict.fromkeys(words))
    if not names:
        return document.problem(MESSAGES, "type", path, found=type_word(value), wanted=choices)
    if not isinstance(value, str):
        return document.problem(MESSAGES, "choice-type", path, found=type_word(value), choices=choices)
    near = nearest(value, names)
    if near is None:
        return document.problem(MESSAGES, "choice", path, value=value, choices=choices)
    return document.problem(MESSAGES, "choice-near", path, value=value, choices=choices, near=near)
