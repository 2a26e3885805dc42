"""From the bytes of a file to text that may be parsed: size, encoding, and characters that cannot be seen."""

import re
from typing import Final

from farside.reading.faults import Fault
from farside.reading.problems import named_character

LARGEST: Final = 1_000_000
BYTE_ORDER_MARK: Final = "\ufeff"

# YAML 1.1's extra line ends are among them: they would count as lines for a parser and not for an editor.
_UNWELCOME: Final = re.compile("[\x00-\x08\x0b\x0c\x0e-\x1f\x7f-\x9f\u2028\u2029\ud800-\udfff\ufeff\ufffe\uffff]")
_UNWELCOME_IN_TEXT: Final = re.compile("[\x00-\x08\x0b\x0c\x0e-\x1f\x7f-\x9f\ud800-\udfff\ufeff\ufffe\uffff]")
_HALF: Final = re.compile("[\ud800-\udfff]")
_LINE_END: Final = re.compile("\r\n|\r|\n")


def text_of(source: str | bytes) -> str:
    """The text of a file, a leading byte order mark taken off.

    Raises
    ------
    Fault
        For more than 1 000 000 bytes, another encoding than UTF-8, and control characters.
    """
    size = len(source)
    if size <= LARGEST and isinstance(source, str):
        size = len(source.encode("utf-8", "surrogatepass"))
    if size > LARGEST:
        raise Fault("too-large", 0, 0, size=size, most=LARGEST)
    text = (source if isinstance(source, str) else _decoded(source)).removeprefix(BYTE_ORDER_MARK)
    if bad := _UNWELCOME.search(text):
        line, column = line_and_column(text, bad.start())
        raise Fault("character", line, column, character=named_character(bad.group()))
    return text


def lines_of(text: str) -> list[str]:
    """The lines of a text, ended by line feed, carriage return or both."""
    return _LINE_END.split(text)


def line_and_column(text: str, index: int) -> tuple[int, int]:
    """Line and column, both from 0, of a character."""
    before = lines_of(text[:index])
    return len(before) - 1, len(before[-1])


def whole_text(text: str) -> str:
    """A text whose escapes were read one by one, each surrogate pair in it made one character."""
    if _HALF.search(text):
        return text.encode("utf-16-le", "surrogatepass").decode("utf-16-le", "surrogatepass")
    return text


def unwelcome_in_text(text: str) -> str:
    """The first character of a text that cannot stand in one: a control character or half a pair; or nothing."""
    bad = _UNWELCOME_IN_TEXT.search(text)
    return bad.group() if bad else ""


def is_half(character: str) -> bool:
    """Whether it is one half of a surrogate pair."""
    return _HALF.match(character) is not None


def _decoded(source: bytes) -> str:
    if source.startswith((b"\xff\xfe", b"\xfe\xff")):
        raise Fault("utf-16", 0, 0)
    try:
        return source.decode("utf-8")
    except UnicodeDecodeError as error:
        line, column = line_and_column(source[: error.start].decode("utf-8"), error.start)
        raise Fault("not-utf-8", line, column, byte=f"0x{source[error.start]:02x}") from None
