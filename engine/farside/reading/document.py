"""Reads one YAML or JSON file into plain data that knows the place of everything in it."""

import math
from collections.abc import Mapping
from typing import Any, Final

from farside.reading.characters import BYTE_ORDER_MARK, LARGEST, is_half, lines_of, text_of, unwelcome_in_text
from farside.reading.faults import Fault
from farside.reading.json_text import NotJson, grow_from_json
from farside.reading.messages import MESSAGES
from farside.reading.problems import Path, Place, Problem, Refused, named_character, path_text, shown_line
from farside.reading.tree import DEEPEST, MOST_VALUES, At, Tree, copy_of, plain_word, type_word

_LEAVES: Final = (str, int, float, bool, type(None))


class Document:
    """A file's data, and where each key and value of it stands.

    `name` is what messages call the file; `data` is a mapping of text, numbers, true or false, None, lists and
    mappings, which is the reader's own.
    """

    __slots__ = ("_key_places", "_lines", "_places", "data", "name")

    def __init__(
        self,
        name: str,
        data: dict[str, Any],
        lines: list[str],
        places: Mapping[Path, At],
        key_places: Mapping[Path, At],
    ) -> None:
        self.name = name
        self.data = data
        self._lines = lines
        self._places = places
        self._key_places = key_places

    @classmethod
    def of(cls, data: object, name: str) -> "Document":
        """A document of data given by a program, copied; its places have line 0.

        Raises
        ------
        Refused
            For what no file could hold: numbers that are not finite, keys that are not text, other types,
            data too deep or too large.
        """
        document = cls(name, {}, [], {}, {})
        problem = _first_fault(document, data)
        if problem is not None:
            raise Refused([problem])
        document.data = copy_of(data)
        return document

    def place(self, path: Path) -> Place:
        """Where the value at a path stands, or its nearest ancestor that is there."""
        while path and path not in self._places:
            path = path[:-1]
        return self._place(self._places.get(path))

    def key_place(self, path: Path) -> Place:
        """Where the key at the end of a path stands; an entry of a list has its value's place."""
        at = self._key_places.get(path)
        return self.place(path) if at is None else self._place(at)

    def problem(
        self, catalogue: Mapping[str, str], key: str, path: Path, /, *, at_key: bool = False, **values: object
    ) -> Problem:
        """A problem of this file, by a key of a catalogue of messages.

        `where`, if its template wants it and no value gives it, is the path as text.
        """
        values.setdefault("where", path_text(path))
        place = self.key_place(path) if at_key else self.place(path)
        return Problem(key, values, catalogue[key], place, path)

    def _place(self, at: At | None) -> Place:
        if at is None:
            return Place(self.name, 0, 0, "")
        return _place(self.name, self._lines, at)


def read_document(text: str | bytes, name: str) -> Document:
    """The document of a YAML or JSON text; `name` is what messages call it.

    Raises
    ------
    Refused
        With one placed problem, whatever is wrong: encoding, syntax, size, depth, aliases, tags, duplicate
        keys, numbers that are not finite, or no mapping at the top.
    """
    lines: list[str] = []
    try:
        try:
            whole = text_of(text)
        except Fault:
            lines = _lines_of_refused(text)
            raise
        lines = lines_of(whole)
        tree = _tree(whole, name)
    except Fault as fault:
        place = _place(name, lines, (fault.line, fault.column))
        raise Refused([Problem(fault.key, fault.values, MESSAGES[fault.key], place, ())]) from None
    return Document(name, tree.data, lines, tree.places, tree.key_places)


def _tree(text: str, name: str) -> Tree:
    begins = text.lstrip()[:1]
    meant_as_json = name.lower().endswith(".json") or _begins_as_json(text)
    if begins in {"{", "["}:
        try:
            return _with_mapping(grow_from_json(text))
        except NotJson as not_json:
            if meant_as_json:
                raise not_json.fault from None
    from .yaml_text import grow_from_yaml  # slow to import, and the page opens no YAML to start

    return _with_mapping(grow_from_yaml(text))


def _begins_as_json(text: str) -> bool:
    """Whether quoted keys in braces, and a tab or a line of its own for the first, speak for JSON."""
    body = text.lstrip()
    return body[:1] == "{" and body[1:].lstrip()[:1] in {'"', ""}


def _with_mapping(tree: Tree) -> Tree:
    if tree.data is None:
        raise Fault("empty", 0, 0)
    if not isinstance(tree.data, dict):
        raise Fault("top-not-mapping", *tree.places[()], found=type_word(tree.data))
    return tree


def _lines_of_refused(text: str | bytes) -> list[str]:
    """The lines of what was refused for its characters, for the message alone."""
    if len(text) > LARGEST or text[:2] in {b"\xff\xfe", b"\xfe\xff"}:
        return []
    whole = text if isinstance(text, str) else text.decode("utf-8", "replace")
    return lines_of(whole.removeprefix(BYTE_ORDER_MARK))


def _place(name: str, lines: list[str], at: At) -> Place:
    line, column = at
    text = shown_line(lines[line], column + 1) if line < len(lines) else ""
    return Place(name, line + 1, column + 1, text)


def _first_fault(document: Document, data: object) -> Problem | None:
    """The first thing in a program's data that no file could hold; walked without recursion."""
    if not isinstance(data, dict):
        return document.problem(MESSAGES, "top-not-mapping", (), found=type_word(data))
    left: list[tuple[Path, Any]] = [((), data)]
    count = 0
    while left:
        path, value = left.pop()
        count += 1
        if count > MOST_VALUES:
            return document.problem(MESSAGES, "too-many", path, most=MOST_VALUES)
        if len(path) > DEEPEST or (len(path) == DEEPEST and isinstance(value, (dict, list))):
            return document.problem(MESSAGES, "too-deep", path[:4], most=DEEPEST)
        if isinstance(value, dict):
            if (problem := _bad_key(document, path, value)) is not None:
                return problem
            count += len(value)
            left.extend(((*path, key), part) for key, part in value.items())
        elif isinstance(value, list):
            left.extend(((*path, index), part) for index, part in enumerate(value))
        elif type(value) not in _LEAVES:
            return document.problem(MESSAGES, "not-data", path, found=type(value).__name__)
        elif (problem := _bad_leaf(document, path, value)) is not None:
            return problem
    return None


def _bad_key(document: Document, path: Path, mapping: Mapping[Any, Any]) -> Problem | None:
    for key in mapping:
        if type(key) is not str:
            return document.problem(MESSAGES, "key-not-text", path, name=plain_word(key), found=type_word(key))
        if (problem := _bad_leaf(document, path, key)) is not None:
            return problem
    return None


def _bad_leaf(document: Document, path: Path, value: str | float | None) -> Problem | None:
    if isinstance(value, float) and not math.isfinite(value):
        return document.problem(MESSAGES, "not-finite", path, value=value)
    if isinstance(value, str) and (character := unwelcome_in_text(value)):
        key = "half-character" if is_half(character) else "character-in-text"
        return document.problem(MESSAGES, key, path, character=named_character(character))
    return None
