"""Builds data and the place of everything in it from what a parser meets, and refuses what may not be."""

from typing import Any, Final, NoReturn

from farside.reading.characters import is_half, unwelcome_in_text, whole_text
from farside.reading.faults import Fault
from farside.reading.problems import Path, named_character, path_text, printable
from farside.reading.scalars import LONGEST_NUMBER, NotFinite, Scalar, TooLong, resolved

At = tuple[int, int]

DEEPEST: Final = 40
MOST_VALUES: Final = 10_000


class _Anchor:
    """A part of a file that an alias may stand for: how much it holds, how deep, and whether it is complete."""

    __slots__ = ("complete", "height", "size", "value")

    def __init__(self, value: Any, complete: bool) -> None:
        self.value = value
        self.complete = complete
        self.size = 1
        self.height = 0


class _Level:
    """A list or mapping that is still open."""

    __slots__ = ("anchor", "began", "height", "holds", "key", "path")

    def __init__(self, holds: dict[str, Any] | list[Any], path: Path, began: int, anchor: _Anchor | None) -> None:
        self.holds = holds
        self.path = path
        self.began = began
        self.anchor = anchor
        self.height = 0
        self.key: str | None = None


class Tree:
    """Grows with each call; afterwards `data`, `places` and `key_places` hold all."""

    def __init__(self) -> None:
        self.data: Any = None
        self.places: dict[Path, At] = {}
        self.key_places: dict[Path, At] = {}
        self._levels: list[_Level] = []
        self._anchors: dict[str, _Anchor] = {}
        self._count = 0

    def open(self, holds: dict[str, Any] | list[Any], at: At, anchor: str | None = None) -> None:
        """A list or mapping begins."""
        if len(self._levels) == DEEPEST:
            raise Fault("too-deep", *at, most=DEEPEST)
        path = self._put(holds, at)
        kept = None
        if anchor is not None:
            kept = self._anchors[anchor] = _Anchor(holds, complete=False)
        self._levels.append(_Level(holds, path, self._count, kept))

    def close(self) -> None:
        """The innermost list or mapping ends."""
        level = self._levels.pop()
        if self._levels:
            self._levels[-1].height = max(self._levels[-1].height, level.height + 1)
        if level.anchor is not None:
            level.anchor.complete = True
            level.anchor.size = self._count - level.began + 1
            level.anchor.height = level.height + 1

    def plain(self, word: str, at: At, anchor: str | None = None) -> None:
        """A scalar without quotes; an empty one has its key's place."""
        if not word and self._levels and (key := self._levels[-1].key) is not None:
            at = self.key_places[(*self._levels[-1].path, key)]
        try:
            value = resolved(word)
        except NotFinite:
            self.refuse_number(word, at)
        except TooLong:
            raise Fault("number-too-long", *at, where=self._where(), digits=len(word), most=LONGEST_NUMBER) from None
        self._scalar(value, at, anchor)

    def refuse_number(self, word: str, at: At) -> NoReturn:
        """A number that is not finite."""
        raise Fault("not-finite", *at, where=self._where(), value=word) from None

    def text(self, text: str, at: At, anchor: str | None = None) -> None:
        """A scalar in quotes or a block of text."""
        value = whole_text(text)
        if character := unwelcome_in_text(value):
            key = "half-character" if is_half(character) else "character-in-text"
            raise Fault(key, *at, where=self._where(), character=named_character(character))
        self._scalar(value, at, anchor)

    def alias(self, name: str, at: At) -> None:
        """An alias: what it stands for is copied, counted and checked for depth."""
        anchor = self._anchors.get(name)
        if anchor is None:
            raise Fault("alias-unknown", *at, name=name)
        if not anchor.complete:
            raise Fault("alias-inside-itself", *at, name=name)
        if len(self._levels) + anchor.height > DEEPEST:
            raise Fault("too-deep", *at, most=DEEPEST)
        self._put(anchor.value, at, anchor.size, copied=True)
        if self._levels:
            self._levels[-1].height = max(self._levels[-1].height, anchor.height)

    def _scalar(self, value: Scalar, at: At, anchor: str | None) -> None:
        self._put(value, at)
        if anchor is not None:
            self._anchors[anchor] = _Anchor(value, complete=True)

    def _put(self, value: Any, at: At, size: int = 1, copied: bool = False) -> Path:
        self._count += size
        if self._count > MOST_VALUES:
            raise Fault("too-many", *at, most=MOST_VALUES)
        if copied:
            value = copy_of(value)
        if not self._levels:
            self.data = value
            self.places[()] = at
            return ()
        level = self._levels[-1]
        holds = level.holds
        if isinstance(holds, list):
            path = (*level.path, len(holds))
            holds.append(value)
        elif level.key is None:
            self._key(level, holds, value, at)
            return level.path
        else:
            path = (*level.path, level.key)
            holds[level.key] = value
            level.key = None
        self.places[path] = at
        return path

    def _key(self, level: _Level, holds: dict[str, Any], key: Any, at: At) -> None:
        if isinstance(key, (dict, list)):
            raise Fault("key-not-plain", *at, found=type_word(key), where=path_text(level.path))
        if not isinstance(key, str):
            before = next(reversed(holds.values()), None)
            if type(key) is int and type(before) is int:
                raise Fault("decimal-comma", *at, written=f"{before}.{key}")
            raise Fault("key-not-text", *at, name=plain_word(key), found=type_word(key))
        path = (*level.path, key)
        if key in holds:
            first = self.key_places[path][0] + 1
            raise Fault("duplicate-key", *at, name=key, where=path_text(level.path), first=first)
        self.key_places[path] = at
        level.key = key

    def _where(self) -> str:
        if not self._levels:
            return path_text(())
        level = self._levels[-1]
        if isinstance(level.holds, list):
            return path_text((*level.path, len(level.holds)))
        if level.key is None:
            return "a key"
        return path_text((*level.path, level.key))


def copy_of(value: Any) -> Any:
    """A copy that shares no list or mapping with its original; depth is bounded before."""
    if isinstance(value, dict):
        return {key: copy_of(part) for key, part in value.items()}
    if isinstance(value, list):
        return [copy_of(part) for part in value]
    return value


def type_word(value: object) -> str:
    """What a clinician would call a value's type."""
    if value is None:
        return "empty"
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, str):
        return "text"
    if isinstance(value, (int, float)):
        return "a number"
    if isinstance(value, dict):
        return "a mapping"
    return "a list" if isinstance(value, list) else f"of type {printable(type(value).__name__)}"


def plain_word(value: object) -> str:
    """A scalar as a file would write it."""
    if value is None:
        return "null"
    if isinstance(value, bool):
        return "true" if value else "false"
    return str(value)
