"""Cards by kind and id, from folders or from data, each read once."""

from collections.abc import Callable, Iterable, Mapping
from pathlib import Path
from typing import Final

from farside.clinic.lamp import Lamp
from farside.clinic.materials import Composite, Layer
from farside.clinic.read_cards import read_composite, read_lamp, read_layer
from farside.clinic.reading import read_file, refuse, unknown_card
from farside.reading.document import Document

_BESIDE_A_PLAN: Final = (".", "../lamps", "../composites", "../adhesives", "../liners")
_ENDINGS: Final = frozenset({".yaml", ".yml", ".json"})

_READERS: Final[Mapping[str, Callable[[Document], Lamp | Composite | Layer]]] = {
    "lamp": read_lamp,
    "composite": read_composite,
    "adhesive": read_layer,
    "liner": read_layer,
}
CARD_KINDS: Final = tuple(_READERS)


def read_card(document: Document) -> Lamp | Composite | Layer:
    """A card of any kind as a record. Refused where it cannot be meant."""
    return _READERS[document.data["kind"]](document)


class Cards:
    """The cards at hand. A card is turned into a record when a plan first asks for it.

    Parameters
    ----------
    documents : iterable of Document
        Files or data of any kind; what is no card is passed over.

    Raises
    ------
    Refused
        When two cards of one kind have one id.
    """

    def __init__(self, documents: Iterable[Document]) -> None:
        self._documents: dict[tuple[str, str], Document] = {}
        self._records: dict[tuple[str, str], Lamp | Composite | Layer] = {}
        for document in documents:
            kind, card_id = document.data.get("kind"), document.data.get("id")
            if kind not in CARD_KINDS or not isinstance(card_id, str):
                continue
            held = self._documents.setdefault((kind, card_id), document)
            if held is not document:
                refuse(document, "card-twice", ("id",), kind=kind, id=card_id, other=held.name)

    def lamp(self, card_id: str, asked_by: Document, path: tuple[str | int, ...]) -> Lamp:
        """The lamp of that id. Refused, placed in `asked_by`, where there is none."""
        found = self._record("lamp", card_id, asked_by, path)
        assert isinstance(found, Lamp)
        return found

    def composite(self, card_id: str, asked_by: Document, path: tuple[str | int, ...]) -> Composite:
        """The composite of that id. Refused, placed in `asked_by`, where there is none."""
        found = self._record("composite", card_id, asked_by, path)
        assert isinstance(found, Composite)
        return found

    def layer(self, kind: str, card_id: str, asked_by: Document, path: tuple[str | int, ...]) -> Layer:
        """The adhesive or liner of that id. Refused, placed in `asked_by`, where there is none."""
        found = self._record(kind, card_id, asked_by, path)
        assert isinstance(found, Layer)
        return found

    def _record(
        self, kind: str, card_id: str, asked_by: Document, path: tuple[str | int, ...]
    ) -> Lamp | Composite | Layer:
        key = (kind, card_id)
        if key not in self._documents:
            known = [known_id for known_kind, known_id in self._documents if known_kind == kind]
            unknown_card(asked_by, path, kind, card_id, known)
        if key not in self._records:
            self._records[key] = read_card(self._documents[key])
        return self._records[key]


def card_folders(plan: Path, named: Iterable[Path]) -> tuple[Path, ...]:
    """Where a plan's cards are looked for: the folders named, beside the plan, and the clinic's folders next to it."""
    beside = (plan.parent / folder for folder in _BESIDE_A_PLAN)
    return (*named, *(folder for folder in beside if folder.is_dir()))


def card_documents(folders: Iterable[Path], passed_over: Path | None = None) -> list[Document]:
    """Every readable file in some folders, each once however many ways lead to it.

    Only the folders themselves are listed: no name from a plan or a card ever becomes a path. The plan itself is
    passed over.

    Raises
    ------
    Refused
        When a file in a card folder cannot be read as YAML or JSON.
    """
    met = set() if passed_over is None else {passed_over.resolve()}
    found = []
    for folder in folders:
        for path in sorted(folder.iterdir()):
            if path.suffix not in _ENDINGS or not path.is_file() or path.resolve() in met:
                continue
            met.add(path.resolve())
            found.append(read_file(path))
    return found


def documents_of(cards: Iterable[Mapping[str, object]]) -> list[Document]:
    """Cards given as data by a program."""
    return [Document.of(dict(card), str(card.get("id", f"card {number}"))) for number, card in enumerate(cards, 1)]
