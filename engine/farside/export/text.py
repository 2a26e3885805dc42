"""A report as text for a terminal or a printer: worst first, measured against limit, what to do."""

from collections.abc import Iterable, Iterator
from datetime import date
from textwrap import wrap
from typing import Final

from farside.export.messages import MARKS, text
from farside.protocol.findings import Finding, Measured
from farside.protocol.report import Report
from farside.reading.problems import printable

_WIDTH: Final = 100
_INDENT: Final = 10
_LONGEST: Final = 400
_SHOWN_DIGITS: Final = 8


def as_text(report: Report) -> str:
    """A report as text, ending in a line break; what turns the direction of writing in a title is shown as its code."""
    lines = [_head(report), "", f"{MARKS[report.verdict]} {report.verdict_says()}", ""]
    for finding in report.findings:
        if finding.finding != "clear" and not finding.standing:
            lines += [*_finding(finding), ""]
    for finding in _once(finding for finding in report.findings if finding.standing):
        lines += [*_standing(finding), ""]
    lines += [_labelled("clear", report.clear_says()), "", *wrap(text("caution"), _WIDTH)]
    return "".join(f"{printable(line, _LONGEST)}\n" for line in lines)


def _head(report: Report) -> str:
    plan, protocol = report.trace.plan, report.protocol
    return text(
        "head",
        title=plan.title,
        on=spoken_date(plan.on),
        protocol=protocol.id,
        edition=protocol.edition,
        digest=protocol.digest[:_SHOWN_DIGITS],
    )


def spoken_date(day: date) -> str:
    """A date as people say it: 30 November 2026."""
    return f"{day.day} {day:%B %Y}"


def measured_words(measured: Measured) -> str:
    """What was measured against which limits, in one line."""
    unit = f" {measured.unit}" if measured.unit else ""
    limits = (
        text(f"side-{a.side}", finding=text(f"grade-{a.finding}"), value=f"{a.shown}{unit}") for a in measured.against
    )
    return text("measured", label=measured.label, value=f"{measured.shown}{unit}", limits=", ".join(limits))


def _finding(finding: Finding) -> Iterator[str]:
    yield from _labelled(finding.finding, finding.says).splitlines()
    measured = [measured_words(finding.measured)] if finding.measured and finding.finding != "open" else []
    yield from _indented(" · ".join([*measured, finding.where_says, finding.rule.id]))
    yield from _indented(finding.do)
    if finding.rule.caution and finding.finding in {"stop", "revise"}:
        yield from _indented(finding.rule.caution)


def _labelled(grade: str, words: str) -> str:
    head = f"{MARKS[grade]} {text(f'grade-{grade}')}".ljust(_INDENT)
    return "\n".join(_wrapped(words, head))


def _indented(words: str) -> Iterable[str]:
    return _wrapped(words, " " * _INDENT)


def _wrapped(words: str, head: str) -> list[str]:
    """Lines under a head; a rule's id stays whole, so that it can be searched for."""
    return wrap(words, _WIDTH, initial_indent=head, subsequent_indent=" " * _INDENT, break_on_hyphens=False)


def _standing(finding: Finding) -> Iterator[str]:
    yield from _labelled(finding.finding, finding.says).splitlines()
    yield from _indented(f"{finding.do} · {finding.rule.id}")


def _once(findings: Iterable[Finding]) -> Iterable[Finding]:
    """Of findings that say the same, the first."""
    return list({finding.says: finding for finding in findings}.values())
