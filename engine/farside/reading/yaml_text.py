"""Grows a tree from YAML, and turns a parser's complaint into one that a clinician can act on.

PyYAML's events are read one by one, never composed by recursion, so that depth and aliases are bounded first.
Its compiled parser is quicker and takes a few things differently; whatever it refuses, and any text with one of
those, the pure parser judges, so that both give the same data, places and messages.
"""

import re
from typing import Any, Final

import yaml

from farside.reading.faults import Fault
from farside.reading.tree import At, Tree

LARGEST: Final = 150_000
"""Characters of YAML that are read: more than a plan has, and a second's work for the pure parser."""

_PURE: Final[Any] = yaml.SafeLoader
_QUICK: Final[Any] = getattr(yaml, "CSafeLoader", None)

# By a part of the parser's problem: our key. The first that fits is taken.
_BY_PROBLEM: Final = (
    ("found unexpected end of stream", "quote-not-closed"),
    ("found unexpected document separator", "quote-not-closed"),
    ("could not find expected ':'", "colon-missing"),
    ("mapping values are not allowed here", "stray-colon"),
    ("sequence entries are not allowed here", "dash"),
    ("found unknown escape character", "bad-escape"),
    ("escape sequence of", "bad-escape"),
    ("expected <block end>", "indentation"),
    ("expected '<document start>'", "after-the-end"),
)
_COMMA: Final = re.compile(r"expected ',' or '([\]}])', but got (.*)", re.DOTALL)
_NO_TOKEN: Final = re.compile(r"found character '(.*)' that cannot start any token", re.DOTALL)
_TAKEN_DIFFERENTLY: Final = re.compile("[\\t?!]|[|>][-+0-9]*#")
_DIRECTIVE: Final = re.compile("^%", re.MULTILINE)
_MOST_DIRECTIVES: Final = 10
_OPENING: Final = {"]": "[", "}": "{"}


def grow_from_yaml(text: str) -> Tree:
    """The tree of a text of one YAML document; without any value its data is None.

    Raises
    ------
    Fault
        For all that is not YAML or that a tree refuses.
    """
    if len(text) > LARGEST:
        raise Fault("too-large-yaml", 0, 0, size=len(text), most=LARGEST)
    if len(directives := _DIRECTIVE.findall(text)) > _MOST_DIRECTIVES:
        raise Fault("directives", 0, 0, count=len(directives), most=_MOST_DIRECTIVES)
    if _QUICK is not None and not _TAKEN_DIFFERENTLY.search(text):
        try:
            return _grown(_QUICK(text))
        except (yaml.YAMLError, ValueError):
            pass
    loader = _PURE(text)
    try:
        return _grown(loader)
    except yaml.MarkedYAMLError as error:
        raise _fault(error) from None
    except (yaml.YAMLError, ValueError, OverflowError):
        # a code such as \UFFFFFFFF or a version of a thousand digits, which the parser passes on to Python
        raise Fault("bad-escape", loader.line, loader.column) from None


def _grown(loader: Any) -> Tree:
    tree = Tree()
    documents = 0
    while (event := loader.get_event()) is not None:
        mark = event.start_mark
        at = (mark.line, mark.column)
        kind = type(event)
        if kind is yaml.ScalarEvent:
            _refuse_tag(event.tag, at)
            if event.style:
                tree.text(event.value, at, event.anchor)
            else:
                tree.plain(event.value, at, event.anchor)
        elif kind is yaml.MappingStartEvent:
            _refuse_tag(event.tag, at)
            tree.open({}, at, event.anchor)
        elif kind is yaml.SequenceStartEvent:
            _refuse_tag(event.tag, at)
            tree.open([], at, event.anchor)
        elif kind is yaml.MappingEndEvent or kind is yaml.SequenceEndEvent:
            tree.close()
        elif kind is yaml.AliasEvent:
            tree.alias(event.anchor, at)
        elif kind is yaml.DocumentStartEvent:
            documents += 1
            if documents > 1:
                raise Fault("several-documents", *at)
    return tree


def _refuse_tag(tag: str | None, at: At) -> None:
    if tag is not None:
        raise Fault("tag", *at, tag=tag.replace("tag:yaml.org,2002:", "!!"))


def _fault(error: yaml.MarkedYAMLError) -> Fault:
    problem = error.problem or ""
    here = _at(error.problem_mark or error.context_mark)
    opened = _at(error.context_mark or error.problem_mark)
    if comma := _COMMA.match(problem):
        if comma[2] == "'<stream end>'":
            return Fault("bracket-not-closed", *opened, bracket=_OPENING[comma[1]])
        return Fault("comma-missing", *here, bracket=comma[1], opened=opened[0] + 1)
    if character := _NO_TOKEN.match(problem):
        if character[1] == "\\t":
            return Fault("tab", *here)
        return Fault("needs-quotes", *here, character=character[1].replace("\\\\", "\\"))
    for part, key in _BY_PROBLEM:
        if part in problem:
            return Fault(key, *(opened if key in {"quote-not-closed", "colon-missing"} else here))
    return Fault("syntax", *here)


def _at(mark: Any) -> At:
    return (mark.line, mark.column) if mark is not None else (0, 0)
