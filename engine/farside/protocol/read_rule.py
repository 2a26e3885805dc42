"""A rule file to a rule: what only its own limits, the quantities and the fields of cards can refuse, placed."""

from collections.abc import Iterable, Iterator, Mapping
from typing import Any, Final

from farside.clinic.reading import Path, checked
from farside.protocol.fields import fields
from farside.protocol.messages import MESSAGES
from farside.protocol.rule import GRADES, Rule, rule_of
from farside.protocol.wording import placeholders
from farside.quantities.registry import visible
from farside.reading.document import Document
from farside.reading.problems import Problem, Refused
from farside.reading.schema import nearest

_NUMBER: Final = "number"
_WORDS: Final = ("says", "do")


def read_rule(document: Document, topic: str) -> Rule:
    """A rule from its file.

    Parameters
    ----------
    document : Document
        The file as read.
    topic : str
        What the rule belongs to, such as `light-dose`; the name of the folder that it stands in.

    Raises
    ------
    Refused
        With each problem at its place: what breaks the schema, else names of no quantity, field or limit, words that
        no field ever has, and levels out of order.
    """
    checked(document, "rule")
    problems = [*_of_conditions(document), *_of_words(document), *_of_order(document)]
    if problems:
        raise Refused(problems)
    return rule_of(document.data, topic)


def _of_conditions(document: Document) -> Iterator[Problem]:
    data = document.data
    conditions: list[tuple[Path, Any]] = [((key,), data[key]) for key in ("applies", "open_when") if key in data]
    conditions += [(("levels", index, "when"), level["when"]) for index, level in enumerate(data["levels"])]
    for path, condition in conditions:
        for name, test, at in _tests(condition, path):
            yield from _of_test(document, name, test, at)


def _of_test(document: Document, name: str, test: Mapping[str, Any], path: Path) -> Iterator[Problem]:
    yield from _of_name(document, name, path, at_key=True)
    ((how, operand),) = test.items()
    for part, at in _parts(operand, (*path, how)):
        if isinstance(part, Mapping):
            ((sort, of),) = part.items()
            if sort != "limit":
                yield from _of_name(document, of, (*at, sort))
            elif of not in document.data.get("limits", {}):
                yield document.problem(MESSAGES, "rule-limit-unknown", (*at, sort), name=of)
        elif how in {"is", "one_of"}:
            yield from _of_value(document, name, part, at)


def _of_name(document: Document, name: str, path: Path, *, at_key: bool = False) -> Iterator[Problem]:
    about = document.data["about"]
    known = {*visible(about), *fields(about)}
    if name not in known:
        near = nearest(name, sorted(known))
        key = "rule-name-unknown" if near is None else "rule-name-near"
        yield document.problem(MESSAGES, key, path, at_key=at_key, name=name, about=about, near=near)


def _of_value(document: Document, name: str, value: Any, path: Path) -> Iterator[Problem]:
    """What a field with a closed list of words is held against must be one of them."""
    words = fields(document.data["about"]).get(name, {}).get("enum")
    if words and value not in words:
        yield document.problem(MESSAGES, "rule-value-unknown", path, value=value, name=name, known=words)


def _of_words(document: Document) -> Iterator[Problem]:
    data = document.data
    known = {_NUMBER, *visible(data["about"]), *fields(data["about"]), *data.get("limits", {})}
    places: list[tuple[Path, Mapping[str, Any]]] = [((), data)]
    places += [(("levels", index), level) for index, level in enumerate(data["levels"])]
    for path, held in places:
        for key in _WORDS:
            for name in placeholders(held.get(key, "")):
                if name not in known:
                    yield document.problem(MESSAGES, "rule-word-unknown", (*path, key), name=name)


def _of_order(document: Document) -> Iterator[Problem]:
    grades = [level["finding"] for level in document.data["levels"]]
    for index in range(1, len(grades)):
        above, grade = grades[index - 1], grades[index]
        if GRADES.index(grade) < GRADES.index(above):
            path = ("levels", index, "finding")
            yield document.problem(MESSAGES, "rule-levels-order", path, worse=grade, milder=above)


def _tests(condition: Any, path: Path) -> Iterator[tuple[str, Mapping[str, Any], Path]]:
    """Every test inside a condition's data: the name that it tests, how, and where it stands."""
    if not isinstance(condition, Mapping):
        return
    ((key, inner),) = condition.items()
    if key in {"all", "any"}:
        for index, part in enumerate(inner):
            yield from _tests(part, (*path, key, index))
    elif key == "not":
        yield from _tests(inner, (*path, key))
    else:
        yield key, inner, (*path, key)


def _parts(operand: Any, path: Path) -> Iterable[tuple[Any, Path]]:
    if isinstance(operand, list):
        return [(part, (*path, index)) for index, part in enumerate(operand)]
    return [(operand, path)]
