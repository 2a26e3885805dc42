"""A report's findings as CSV, one a row, for a spreadsheet."""

import csv
import io
from typing import Final

from farside.protocol.report import Report

COLUMNS: Final = (
    "on", "plan", "verdict", "finding", "rule", "about", "layer", "increment", "exposure", "composite",
    "measured", "value", "unit", "says", "do", "missing", "protocol", "edition", "digest",
)  # fmt: skip

# A cell that a spreadsheet would take for a formula is led by an apostrophe.
_FORMULA: Final = ("=", "+", "-", "@", "\t", "\r")


def as_csv(report: Report) -> str:
    """The findings as CSV with a header, lines ended as RFC 4180 has it."""
    out = io.StringIO()
    writer = csv.writer(out)
    writer.writerow(COLUMNS)
    plan, protocol = report.trace.plan, report.protocol
    for finding in report.findings:
        where, measured = finding.where, finding.measured
        writer.writerow(
            [
                plan.on.isoformat(), _inert(plan.title), report.verdict, finding.finding, finding.rule.id,
                finding.rule.about, where["layer"] or "", where["increment"] or "", where["exposure"] or "",
                where["composite"] or "", measured.name if measured else "", measured.value if measured else "",
                measured.unit if measured else "", _inert(finding.says), _inert(finding.do), " ".join(finding.missing),
                protocol.id, protocol.edition, protocol.digest,
            ]
        )  # fmt: skip
    return out.getvalue()


def _inert(cell: str) -> str:
    return f"'{cell}" if cell.startswith(_FORMULA) else cell
