"""Grows a tree from JSON, which a YAML parser reads almost but not quite (tabs, surrogate pairs)."""

import json
import re
from bisect import bisect_right
from typing import Final

from farside.reading.faults import Fault
from farside.reading.tree import At, Tree

_TOKEN: Final = re.compile(
    r"(?P<mark>[{}\[\],:])"
    r'|(?P<text>"[^"\\\x00-\x1f]*(?:\\.[^"\\\x00-\x1f]*)*")'
    r"|(?P<plain>-?(?:0|[1-9][0-9]*)(?:\.[0-9]+)?(?:[eE][-+]?[0-9]+)?(?![\w.+-])|(?:true|false|null)(?![\w.+-]))"
    r"|(?P<endless>(?:-?Infinity|NaN)(?![\w.+-]))"
)
_SPACE: Final = re.compile(r"[ \t\r\n]*")
_LINE_END: Final = re.compile("\r\n|\r|\n")
_OPEN_TEXT: Final = re.compile(r'"(?:[^"\\\x00-\x1f]|\\.)*\\?')
_WHOLE_AND_COMMA: Final = re.compile(r"([0-9]+),\Z")
_CLOSES: Final = {"{": "}", "[": "]"}


class NotJson(Exception):
    """The text is not JSON; `fault` says why, should it have been meant as JSON."""

    def __init__(self, fault: Fault) -> None:
        super().__init__()
        self.fault = fault


def grow_from_json(text: str) -> Tree:
    """The tree of a JSON text.

    Raises
    ------
    NotJson
        When it is not JSON, though it may be YAML.
    Fault
        For what a tree refuses.
    """
    return _Reader(text).read()


class _Reader:
    def __init__(self, text: str) -> None:
        self.text = text
        self.tree = Tree()
        self.starts = [0, *(end.end() for end in _LINE_END.finditer(text))]
        self.opened: list[tuple[str, At]] = []

    def read(self) -> Tree:
        """Walks the tokens once; `wanted` is what the grammar allows next."""
        text, tree = self.text, self.tree
        index = _space(text, 0)
        wanted = "value"
        while index < len(text):
            token = _TOKEN.match(text, index)
            at = self.at(index)
            if token is None:
                raise NotJson(self.no_token(index, wanted, at))
            wanted = self.step(token, wanted, at)
            index = _space(text, token.end())
        if wanted != "end":
            raise NotJson(self.cut_off(self.at(len(text))))
        return tree

    def step(self, token: re.Match[str], wanted: str, at: At) -> str:
        """Takes one token and gives what may follow."""
        word = token.group()
        if token.lastgroup == "mark":
            return self.mark(word, wanted, at)
        if token.lastgroup == "text":
            if wanted in {"key", "key or }"}:
                self.tree.text(self.unescaped(word, at), at)
                return ":"
            if wanted in {"value", "value or ]"}:
                self.tree.text(self.unescaped(word, at), at)
                return self.after_value()
        elif wanted in {"value", "value or ]"}:
            if token.lastgroup == "endless":
                self.tree.refuse_number(word, at)
            self.tree.plain(word, at)
            return self.after_value()
        elif wanted == "key" and (before := _WHOLE_AND_COMMA.search(self.text, 0, token.start())):
            raise NotJson(Fault("decimal-comma", *at, written=f"{before[1]}.{word}"))
        raise NotJson(self.why(wanted, at))

    def mark(self, mark: str, wanted: str, at: At) -> str:
        """Takes a bracket, comma or colon and gives what may follow."""
        if mark in _CLOSES and wanted in {"value", "value or ]"}:
            self.tree.open({} if mark == "{" else [], at)
            self.opened.append((mark, at))
            return "key or }" if mark == "{" else "value or ]"
        if mark == ":" and wanted == ":":
            return "value"
        if mark == "," and wanted == ",":
            return "key" if self.opened[-1][0] == "{" else "value"
        closes = bool(self.opened) and mark == _CLOSES[self.opened[-1][0]]
        if closes and (wanted == "," or wanted.endswith(mark)):
            self.opened.pop()
            self.tree.close()
            return self.after_value()
        raise NotJson(self.why(wanted, at))

    def after_value(self) -> str:
        return "," if self.opened else "end"

    def unescaped(self, quoted: str, at: At) -> str:
        try:
            text: str = json.loads(quoted)
        except ValueError:
            raise NotJson(Fault("bad-escape", *at)) from None
        return text

    def why(self, wanted: str, at: At) -> Fault:
        if wanted == "end":
            return Fault("after-the-end", *at)
        if wanted == ",":
            mark, opened = self.opened[-1]
            return Fault("comma-missing", *at, bracket=_CLOSES[mark], opened=opened[0] + 1)
        if wanted == ":":
            return Fault("colon-missing", *at)
        return Fault("key-in-quotes" if wanted.startswith("key") else "value-expected", *at)

    def no_token(self, index: int, wanted: str, at: At) -> Fault:
        if self.text[index] != '"':
            return self.why(wanted, at)
        opened = _OPEN_TEXT.match(self.text, index)
        ends = opened is None or opened.end() == len(self.text)
        return Fault("quote-not-closed" if ends else "quote-over-lines", *at)

    def cut_off(self, at: At) -> Fault:
        if not self.opened:
            return Fault("ends-early", *at)
        mark, opened = self.opened[-1]
        return Fault("bracket-not-closed", *opened, bracket=mark)

    def at(self, index: int) -> At:
        line = bisect_right(self.starts, index) - 1
        return line, index - self.starts[line]


def _space(text: str, index: int) -> int:
    found = _SPACE.match(text, index)
    return found.end() if found else index
