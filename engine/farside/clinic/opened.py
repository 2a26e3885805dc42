"""Several files opened together: all of them, checked against each other, or none."""

from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass
from typing import Final, ParamSpec, TypeVar

from farside.clinic.cards import CARD_KINDS, Cards, read_card
from farside.clinic.read_plan import read_plan
from farside.clinic.reading import checked, kind_of, refuse
from farside.reading.document import Document, read_document
from farside.reading.problems import Problem, Refused

_OPENED: Final = ("plan", "clinic", *CARD_KINDS)

T = TypeVar("T")
P = ParamSpec("P")


@dataclass(frozen=True, slots=True)
class Opened:
    """What some files hold: at most one plan, any cards, at most one clinic's usual values."""

    plan: Document | None
    cards: tuple[Document, ...]
    clinic: Document | None


def open_files(
    files: Iterable[tuple[str, str]], held: Sequence[Document] = (), clinic: Document | None = None
) -> Opened:
    """Read files that are opened together.

    Parameters
    ----------
    files : iterable of (str, str)
        Name and text of each.
    held : sequence of Document
        The cards already at hand; one in a file takes the place of a held one of its kind and id.
    clinic : Document, optional
        The usual values already at hand, unless a file brings others.

    Raises
    ------
    Refused
        With the problems of every file: unreadable, against its schema, of a kind that is not opened here, a card that
        cannot be meant, a second plan, or a plan that does not go with the cards.
    """
    trials = _Trials()
    documents = [read for name, text in files if (read := trials.of(_read, name, text)) is not None]
    of_kind = {kind: [document for document in documents if document.data["kind"] == kind] for kind in _OPENED}
    plans, clinics = of_kind["plan"], of_kind["clinic"]
    cards = tuple(document for document in documents if document.data["kind"] in CARD_KINDS)
    for card in cards:
        trials.of(read_card, card)
    for second in (*plans[1:], *clinics[1:]):
        trials.of(_refuse_second, second)
    brought = {(card.data["kind"], card.data["id"]) for card in cards}
    kept = [card for card in held if (card.data.get("kind"), card.data.get("id")) not in brought]
    at_hand = trials.of(Cards, (*cards, *kept))
    if plans and at_hand is not None and not trials.problems:
        trials.of(read_plan, plans[0], at_hand, clinics[0] if clinics else clinic)
    if trials.problems:
        raise Refused(trials.problems)
    return Opened(plans[0] if plans else None, cards, clinics[0] if clinics else None)


class _Trials:
    """Calls that may be refused; their problems are gathered, so that all are told at once."""

    def __init__(self) -> None:
        self.problems: list[Problem] = []

    def of(self, read: Callable[P, T], *given: P.args, **named: P.kwargs) -> T | None:
        """What a call gives; None where it is refused."""
        try:
            return read(*given, **named)
        except Refused as refused:
            self.problems.extend(refused.problems)
            return None


def _refuse_second(document: Document) -> None:
    refuse(document, "one-at-a-time", ("kind",), kind=document.data["kind"])


def _read(name: str, text: str) -> Document:
    document = read_document(text, name)
    kind = kind_of(document)
    if kind not in _OPENED:
        refuse(document, "kind-not-opened", ("kind",), found=kind, kinds=", ".join(_OPENED))
    return checked(document)
