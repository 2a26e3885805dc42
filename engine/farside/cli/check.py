"""`farside check`: one plan against the protocol."""

import argparse
import json
import sys
from collections.abc import Callable, Mapping
from datetime import date
from pathlib import Path
from typing import TYPE_CHECKING, Final

from farside.check import check
from farside.clinic.cards import card_documents, card_folders
from farside.clinic.reading import read_file
from farside.export.csv_table import as_csv
from farside.export.text import as_text
from farside.protocol.report import Report
from farside.reading.characters import LARGEST
from farside.reading.document import Document, read_document

if TYPE_CHECKING:
    Commands = argparse._SubParsersAction[argparse.ArgumentParser]

_STANDARD_INPUT: Final = "-"
_FINE: Final = frozenset({"clear", "watch"})


def as_json(report: Report) -> str:
    """A report as JSON, ending in a line break."""
    return json.dumps(report.as_data(), ensure_ascii=False, allow_nan=False, indent=2) + "\n"


FORMATS: Final[Mapping[str, Callable[[Report], str]]] = {"text": as_text, "json": as_json, "csv": as_csv}


def add_to(commands: "Commands") -> None:
    """Add the subcommand to a parser."""
    parser = commands.add_parser(
        "check",
        help="check a plan",
        description="Check a plan. Exit status: 0 clear or watch, 1 stop, revise or open, 2 wrong input or call.",
    )
    parser.add_argument("plan", help='the plan, YAML or JSON; "-" reads standard input')
    parser.add_argument(
        "--cards",
        action="append",
        default=[],
        type=_folder,
        metavar="DIR",
        help="a folder of cards, before the plan's own",
    )
    parser.add_argument(
        "--clinic", type=Path, metavar="FILE", help="the clinic's usual values; ../clinic.yaml if absent"
    )
    parser.add_argument("--on", type=_day, metavar="DATE", help="the day the plan is for, as 2026-11-30")
    parser.add_argument("--format", choices=sorted(FORMATS), default="text", help="how the report is printed")
    parser.set_defaults(run=run)


def run(called: argparse.Namespace) -> int:
    """Check the plan and print its report."""
    plan, beside = _plan(called.plan)
    cards = card_documents(card_folders(beside, called.cards), passed_over=beside)
    report = check(plan, cards, on=called.on, clinic=_clinic(called.clinic, beside))
    sys.stdout.write(FORMATS[called.format](report))
    return 0 if report.verdict in _FINE else 1


def _plan(name: str) -> tuple[Document, Path]:
    """The plan, and the path that its cards are looked for beside."""
    if name == _STANDARD_INPUT:
        return read_document(sys.stdin.buffer.read(LARGEST + 1), "standard input"), Path.cwd() / "plan"
    path = Path(name)
    return read_file(path), path


def _clinic(named: Path | None, plan: Path) -> Document | None:
    usual = plan.parent.parent / "clinic.yaml"
    if named is not None:
        return read_file(named)
    return read_file(usual) if usual.is_file() else None


def _folder(text: str) -> Path:
    path = Path(text)
    if not path.is_dir():
        raise argparse.ArgumentTypeError(f"{text} is no folder")
    return path


def _day(text: str) -> date:
    try:
        return date.fromisoformat(text)
    except ValueError:
        raise argparse.ArgumentTypeError(f"{text} is no date; write it as 2026-11-30") from None
