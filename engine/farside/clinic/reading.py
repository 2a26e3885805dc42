"""What every reader of a clinic's files shares: kind, schema, defaults, dates, and refusal with a place."""

from collections.abc import Mapping
from datetime import date
from functools import cache
from pathlib import Path as File
from typing import Any, Final, NoReturn

from farside import shipped
from farside.clinic.messages import MESSAGES
from farside.reading.characters import LARGEST
from farside.reading.defaults import with_defaults
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from farside.reading.schema import Validator, check_by, nearest, validator_of
from farside.reading.tree import type_word

KINDS: Final = ("plan", "lamp", "composite", "adhesive", "liner", "clinic", "rule", "protocol")

Path = tuple[str | int, ...]


def refuse(document: Document, key: str, path: Path, **values: object) -> NoReturn:
    """Refuse a document, the reason placed.

    Raises
    ------
    Refused
        Always.
    """
    raise Refused((document.problem(MESSAGES, key, path, at_key=False, **values),))


def kind_of(document: Document) -> str:
    """The kind that a document says it is.

    Raises
    ------
    Refused
        When it says none, or one that is not read here.
    """
    kind = document.data.get("kind")
    if kind is None:
        refuse(document, "kind-missing", ("kind",), kinds=", ".join(KINDS))
    if kind not in KINDS:
        if isinstance(kind, str) and (near := nearest(kind, KINDS)) is not None:
            refuse(document, "kind-unknown-near", ("kind",), found=kind, near=near)
        found = f'"{kind}"' if isinstance(kind, str) else type_word(kind)
        refuse(document, "kind-unknown", ("kind",), found=found, kinds=", ".join(KINDS))
    return str(kind)


def checked(document: Document, wanted: str | None = None) -> Document:
    """A document whose kind is known, or the one that is wanted, and which keeps to that kind's schema.

    Raises
    ------
    Refused
        With each problem at its place.
    """
    kind = kind_of(document)
    if wanted not in {None, kind}:
        refuse(document, "kind-other", ("kind",), found=kind, wanted=wanted)
    check_by(_validator(kind), document)
    return document


@cache
def _validator(kind: str) -> Validator:
    return validator_of(shipped.whole_schema(kind), shipped.schemas().values())


def read_file(file: File) -> Document:
    """One file of a clinic, parsed; of one that is too large no more is read than shows it.

    Raises
    ------
    Refused
        With one placed problem.
    OSError
        When it cannot be opened.
    """
    with file.open("rb") as opened:
        return read_document(opened.read(LARGEST + 1), str(file))


def filled(data: Mapping[str, Any], kind: str) -> dict[str, Any]:
    """Data of a kind with that kind's defaults filled in."""
    return dict(with_defaults(data, shipped.whole_schema(kind), shipped.referred))


def day(text: str | None) -> date | None:
    """The date that a checked text names, None where there is none."""
    return None if text is None else date.fromisoformat(text)


def unknown_card(document: Document, path: Path, kind: str, wanted: str, known: list[str]) -> NoReturn:
    """Refuse a document that names a card which is not at hand, with the nearest that is.

    Raises
    ------
    Refused
        Always.
    """
    near = nearest(wanted, known)
    if not known:
        refuse(document, "card-none", path, kind=kind, id=wanted)
    if near is None:
        refuse(document, "card-unknown", path, kind=kind, id=wanted, known=", ".join(sorted(known)))
    refuse(document, "card-unknown-near", path, kind=kind, id=wanted, near=near)
