"""A problem in a file: what is wrong, where it stands, and how both are shown."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Final

Path = tuple[str | int, ...]

LINE_LENGTH: Final = 120
VALUE_LENGTH: Final = 160
PATH_LENGTH: Final = 120
LIST_LENGTH: Final = 400
MESSAGE_LENGTH: Final = 700
SHOWN_PROBLEMS: Final = 5
WHOLE_LENGTH: Final = 1_950
PLAIN_SPACES: Final = frozenset("\u00a0\u2009\u202f")


@dataclass(frozen=True, slots=True)
class Place:
    """Where something stands: file, line and column from 1, and the line's text, cut and printable.

    Line 0 means no place: the data came from a program.
    """

    file: str
    line: int
    column: int
    text: str

    def __str__(self) -> str:
        name = printable(self.file, VALUE_LENGTH)
        return f"{name}:{self.line}:{self.column}" if self.line else name


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing wrong in a file: a message's key and values, the message's template, and the place."""

    key: str
    values: Mapping[str, object]
    template: str
    place: Place
    path: Path

    @property
    def message(self) -> str:
        """The message in English, on one line and printable."""
        said = self.template.format_map({name: shown(value) for name, value in self.values.items()})
        return cut(said, MESSAGE_LENGTH)

    def __str__(self) -> str:
        head = f"{self.place}: {self.message}"
        return f"{head}\n  {self.place.line} | {self.place.text}" if self.place.text else head


class Refused(ValueError):
    """A file was refused; `problems` says why, in the order of the file."""

    def __init__(self, problems: Sequence[Problem]) -> None:
        super().__init__()
        self.problems = tuple(problems)

    def __str__(self) -> str:
        said: list[str] = []
        length = 0
        for problem in self.problems[:SHOWN_PROBLEMS]:
            text = str(problem)
            length += len(text) + 1
            if said and length > WHOLE_LENGTH - 20:
                break
            said.append(cut(text, WHOLE_LENGTH - 20))
        left = len(self.problems) - len(said)
        return "\n".join([*said, f"and {left} more"] if left else said)


def printable(text: str, length: int = VALUE_LENGTH) -> str:
    """Text from a file on one line, with what cannot be seen written as its code, cut to a length.

    Control characters and those that turn the direction of writing become `\\u202e` and the like.
    """
    text = text[: length + 1]
    if not text.isprintable():
        text = "".join(map(_seen, text))
    return cut(text, length)


def cut(text: str, length: int) -> str:
    """Text of at most so many characters, an ellipsis standing for the rest."""
    return text if len(text) <= length else text[: length - 1] + "…"


def shown_line(line: str, column: int) -> str:
    """A line of a file as a message shows it: printable, at most 120 characters around a column (from 1)."""
    if len(line) > LINE_LENGTH:
        first = min(max(0, column - LINE_LENGTH // 2), len(line) - LINE_LENGTH)
        head, tail = "…" * (first > 0), "…" * (first + LINE_LENGTH < len(line))
        line = head + line[first + len(head) : first + LINE_LENGTH - len(tail)] + tail
    return printable(line, LINE_LENGTH)


def shown(value: object) -> str:
    """A value as a message shows it."""
    if isinstance(value, str):
        return printable(value)
    if isinstance(value, (list, tuple)):
        return cut(", ".join(map(shown, value)), LIST_LENGTH)
    return printable(str(value))


def path_text(path: Path) -> str:
    """A path as a message shows it: `increments[0].thickness_mm`, and "the file" for its top."""
    if not path:
        return "the file"
    parts = [f"[{part}]" if isinstance(part, int) else f".{printable(part, 40)}" for part in path]
    return cut("".join(parts).removeprefix("."), PATH_LENGTH)


def _seen(character: str) -> str:
    if character.isprintable():
        return character
    if character in PLAIN_SPACES:
        return " "
    return named_character(character)


def named_character(character: str) -> str:
    """A character's code, such as `\\t` or `\\u202e`, for what cannot be shown as itself."""
    return character.encode("unicode_escape").decode("ascii")
