"""The findings as CSV: one row each, parsed back whole, nothing that a spreadsheet would run."""

import csv
import io

import farside
import pytest
from farside.export.csv_table import COLUMNS, as_csv
from unit.made import PLANS, edited, example, example_cards, example_plan


def rows_of(plan, clinic=None):
    report = farside.check(plan, example_cards(), clinic=clinic)
    text = as_csv(report)
    return report, text, list(csv.reader(io.StringIO(text, newline="")))


@pytest.mark.parametrize("name", PLANS)
def test_a_header_and_a_row_for_each_finding(name):
    report, text, (header, *rows) = rows_of(example_plan(name), example("clinic.yaml"))
    assert tuple(header) == COLUMNS
    assert len(rows) == len(report.findings)
    assert all(len(row) == len(COLUMNS) for row in rows)
    assert text.endswith("\r\n")
    for row, finding in zip(rows, report.findings, strict=True):
        cells = dict(zip(COLUMNS, row, strict=True))
        assert (cells["rule"], cells["finding"], cells["says"]) == (finding.rule.id, finding.finding, finding.says)
        assert cells["increment"] == str(finding.where["increment"] or "")
        assert (cells["verdict"], cells["on"]) == (report.verdict, "2026-11-30")
        assert cells["missing"] == " ".join(finding.missing)
        assert cells["digest"] == report.protocol.digest
        if finding.measured:
            assert float(cells["value"]) == finding.measured.value
            assert (cells["measured"], cells["unit"]) == (finding.measured.name, finding.measured.unit)
        else:
            assert cells["measured"] == cells["value"] == ""


@pytest.mark.parametrize("title", ["=1+1", "+1", "-1", "@SUM(A1)", '=HYPERLINK("x")', "=cmd|' /C calc'!A0"])
def test_a_title_that_looks_like_a_formula_is_led_by_an_apostrophe(title):
    _, _, (_, *rows) = rows_of(edited(example_plan("shallow-clear"), {"title": title}))
    assert {row[1] for row in rows} == {f"'{title}"}


@pytest.mark.parametrize("title", ['He said "so", then; left', "a,b,c", "1 = 1", "Zähne, 歯"])
def test_other_titles_come_back_as_they_were(title):
    _, _, (_, *rows) = rows_of(edited(example_plan("shallow-clear"), {"title": title}))
    assert {row[1] for row in rows} == {title}
