"""All that the page may call: one request as JSON in, one answer as JSON out, never an exception."""

import json
import re
from collections.abc import Callable, Mapping
from datetime import date
from functools import lru_cache
from typing import Any, Final

from farside import shipped
from farside.check import check
from farside.clinic.cards import Cards, documents_of
from farside.clinic.opened import open_files
from farside.export.drawing import as_drawing
from farside.export.yaml_file import as_yaml
from farside.protocol.protocol import base_protocol
from farside.protocol.wording import said
from farside.reading.document import Document
from farside.reading.problems import Problem, Refused
from farside.version import VERSION

_CLINIC: Final = "example-clinic"
_DEEPEST: Final = 100
# Text in quotes, in which no bracket counts, and brackets.
_MARKS: Final = re.compile(r'"[^"\\]*(?:\\.[^"\\]*)*"|[\[\]{}]', re.DOTALL)
_STEPS: Final = {"[": 1, "{": 1, "]": -1, "}": -1}


def call(text: str) -> str:
    """Answer one request.

    Parameters
    ----------
    text : str
        A JSON mapping whose `do` is `start`, `check`, `open` or `write`.

    Returns
    -------
    str
        A JSON mapping: `ok` true with the answer, or false with `problems`, each with its place and whole text, or
        with `fault`, a defect of the engine itself.
    """
    try:
        request = json.loads(_shallow(text))
        answer = _ANSWERS[request["do"]](request)
    except Refused as refused:
        answer = {"ok": False, "problems": [_problem(problem) for problem in refused.problems]}
    except Exception as fault:  # the page must say what went wrong, whatever it was
        answer = {"ok": False, "fault": f"{type(fault).__name__}: {fault}"}
    return json.dumps(answer, allow_nan=False)  # in ASCII: half a character in a file's name does no harm


def _shallow(text: str) -> str:
    """The text, unless it is nested too deep: the browser's stack would end the engine before Python could object."""
    depth = 0
    for mark in _MARKS.finditer(text):
        depth += _STEPS.get(mark[0], 0)
        if depth > _DEEPEST:
            raise ValueError(f"a request is nested at most {_DEEPEST} deep")
    return text


def _start(_: Mapping[str, Any]) -> dict[str, Any]:
    protocol = base_protocol()
    plans = [(name.rpartition("/")[2].removesuffix(".yaml"), name) for name in shipped.names(f"{_CLINIC}/plans")]
    folders = ("lamps", "composites", "adhesives", "liners")
    cards = [name for folder in folders for name in shipped.names(f"{_CLINIC}/{folder}")]
    return {
        "ok": True,
        "engine": VERSION,
        "protocol": protocol.named(),
        "rules": [
            {"id": rule.id, "title": rule.title, "topic": rule.topic, "page": f"rules/{rule.id}/"}
            for rule in protocol.rules
        ],
        "plans": [{"name": name, "data": shipped.document(path).data} for name, path in plans],
        "cards": [shipped.document(name).data for name in cards],
        "clinic": shipped.document(f"{_CLINIC}/clinic.yaml").data,
        "caution": said("caution"),
    }


def _check(request: Mapping[str, Any]) -> dict[str, Any]:
    on = request.get("on")
    report = check(
        Document.of(request["plan"], "plan"),
        _cards(json.dumps(request.get("cards", ()))),
        clinic=request.get("clinic"),
        on=None if on is None else date.fromisoformat(on),
    )
    return {"ok": True, "report": report.as_data(), "drawing": as_drawing(report)}


@lru_cache(maxsize=8)
def _cards(text: str) -> Cards:
    """Cards given as JSON: the page sends the same ones with every change of a plan, and each is read once."""
    return Cards(documents_of(json.loads(text)))


def _open(request: Mapping[str, Any]) -> dict[str, Any]:
    clinic = request.get("clinic")
    opened = open_files(
        [(file["name"], file["text"]) for file in request["files"]],
        documents_of(request.get("cards", ())),
        None if clinic is None else Document.of(clinic, "clinic"),
    )
    return {
        "ok": True,
        "plan": opened.plan and opened.plan.data,
        "cards": [card.data for card in opened.cards],
        "clinic": opened.clinic and opened.clinic.data,
    }


def _write(request: Mapping[str, Any]) -> dict[str, Any]:
    return {"ok": True, "text": as_yaml(request["data"])}


def _problem(problem: Problem) -> dict[str, Any]:
    place = problem.place
    return {
        "file": place.file,
        "line": place.line,
        "column": place.column,
        "path": list(problem.path),
        "message": problem.message,
        "text": place.text,
        "shown": str(problem),
    }


_ANSWERS: Final[Mapping[str, Callable[[Mapping[str, Any]], dict[str, Any]]]] = {
    "start": _start,
    "check": _check,
    "open": _open,
    "write": _write,
}
