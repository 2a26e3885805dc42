"""The main job: a plan, its cards and a protocol to a report."""

from collections.abc import Iterable, Mapping
from datetime import date
from typing import Any

from farside.clinic.cards import Cards, documents_of
from farside.clinic.plan import Plan
from farside.clinic.read_plan import read_plan
from farside.protocol.findings import Finding, finding_of, sorted_findings
from farside.protocol.protocol import Protocol, base_protocol
from farside.protocol.report import Report
from farside.quantities.subject import ABOUT, subjects
from farside.quantities.values import Valued
from farside.reading.document import Document
from farside.trace.light import trace_light
from farside.version import VERSION


def check(
    plan: Mapping[str, Any] | Document,
    cards: Iterable[Mapping[str, Any] | Document] | Cards = (),
    protocol: Protocol | None = None,
    *,
    on: date | None = None,
    clinic: Mapping[str, Any] | Document | None = None,
) -> Report:
    """Check a plan.

    Parameters
    ----------
    plan : mapping or Document
        The plan as its file has it.
    cards : iterable of mappings or Documents, or Cards
        Lamp, composite, adhesive and liner cards that the plan may name.
    protocol : Protocol, optional
        The rules; the base protocol if absent.
    on : date, optional
        The day that the plan is for, before the plan's own; today where neither says.
    clinic : mapping or Document, optional
        The clinic's usual values.

    Returns
    -------
    Report
        The verdict, every finding worst first, and every quantity that could be had.

    Raises
    ------
    farside.reading.problems.Refused
        When the plan or a card that it names cannot be meant, each problem at its place.
    """
    record = read_plan(
        _document(plan, "plan"),
        cards if isinstance(cards, Cards) else Cards(_documents(cards)),
        None if clinic is None else _document(clinic, "clinic"),
        on,
    )
    return report_on(record, protocol or base_protocol())


def report_on(plan: Plan, protocol: Protocol) -> Report:
    """The report on a plan that has been read."""
    trace = trace_light(plan)
    valued = Valued(trace)
    judged = {about: [valued.of(subject) for subject in subjects(trace, about)] for about in ABOUT}
    found: list[Finding] = []
    not_applied: list[str] = []
    for rule in protocol.rules:
        outcomes = [finding_of(rule, values) for values in judged[rule.about]]
        applied = [finding for finding in outcomes if finding is not None]
        found.extend(applied)
        if not applied:
            not_applied.append(rule.id)
    return Report(trace, protocol, sorted_findings(found), tuple(not_applied), valued, VERSION)


def _document(data: Mapping[str, Any] | Document, name: str) -> Document:
    return data if isinstance(data, Document) else Document.of(dict(data), name)


def _documents(cards: Iterable[Mapping[str, Any] | Document]) -> list[Document]:
    held = list(cards)
    as_data = documents_of(card for card in held if not isinstance(card, Document))
    return [card for card in held if isinstance(card, Document)] + as_data
