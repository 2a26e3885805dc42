"""The build's own look at the evidence: each fault on data that has it, and none in what ships."""

from typing import Any

import pytest
from farside.export.evidence import Cited, cited_by_rule, cited_by_table, faults_of_limits, faults_of_sources

SOURCE = {"cite": "somebody-2001", "supports": "the figure"}


def rule_with(limit: dict[str, Any]) -> dict[str, dict[str, Any]]:
    return {"heat/made.yaml": {"id": "made", "limits": {"most": {"value": 1, **limit}}}}


@pytest.mark.parametrize("strength", ["standard", "consensus", "clinical", "bench"])
def test_a_strong_limit_without_a_source_is_a_fault_even_with_a_reason(strength: str) -> None:
    (fault,) = faults_of_limits(rule_with({"strength": strength, "why": "It is known."}))
    assert fault == f'heat/made.yaml: limit "most" is said to be {strength} and has no source'
    assert not list(faults_of_limits(rule_with({"strength": strength, "sources": [SOURCE]})))
    assert list(faults_of_limits(rule_with({"strength": strength, "sources": []})))


@pytest.mark.parametrize("strength", ["common-practice", "ours"])
def test_any_other_limit_has_a_reason_or_a_source(strength: str) -> None:
    (fault,) = faults_of_limits(rule_with({"strength": strength}))
    assert "neither a source nor a reason" in fault
    assert not list(faults_of_limits(rule_with({"strength": strength, "why": "It was chosen."})))


def test_a_rule_without_limits_is_held_to_the_same() -> None:
    assert list(faults_of_limits({"a.yaml": {"id": "a", "strength": "clinical"}}))
    assert not list(faults_of_limits({"a.yaml": {"id": "a", "strength": "clinical", "sources": [SOURCE]}}))


def test_a_source_that_nothing_rests_on_is_a_fault() -> None:
    cited = [Cited("somebody-2001", rule="made")]
    sources = {"somebody-2001": {}, "nobody-1999": {}}
    assert list(faults_of_sources(sources, cited)) == ['sources.yaml: nothing rests on "nobody-1999"']
    assert not list(faults_of_sources(sources, cited, checked={"nobody-1999"}))


def test_a_source_that_is_cited_and_not_known_is_a_fault() -> None:
    cited = [Cited("nobody-1999", rule="made", limit="most"), Cited("nobody-2000", table="made")]
    assert list(faults_of_sources({}, cited, checked={"nobody-2001"})) == [
        'rule made, limit "most", cites "nobody-1999", which is no source',
        'table made cites "nobody-2000", which is no source',
        'an outside check cites "nobody-2001", which is no source',
    ]


def test_every_citation_of_a_rule_and_a_table_is_found() -> None:
    rule = {"id": "made", "limits": {"most": {"sources": [SOURCE]}}, "sources": [{"cite": "b", "supports": "all"}]}
    assert list(cited_by_rule(rule)) == [
        Cited("somebody-2001", rule="made", limit="most", supports="the figure"),
        Cited("b", rule="made", supports="all"),
    ]
    table = {
        "id": "t",
        "sources": {"all": {"cite": "a", "says": "whole"}},
        "rows": [{"id": "r", "cite": "b", "means": "row"}, {"id": "s", "sources": {"x": {"cite": "c"}}}, [1, 2]],
    }
    assert list(cited_by_table(table)) == [
        Cited("a", table="t", supports="whole"),
        Cited("b", table="t", row="r", supports="row"),
        Cited("c", table="t", row="s"),
    ]
