"""For each rule a plan that it alone turns, and what must follow named beside it."""

import copy
from collections.abc import Iterator
from pathlib import Path
from typing import Any

import farside
import pytest
import yaml
from farside.protocol.protocol import base_protocol
from farside.reading.document import read_document

CLINIC = Path(__file__).parents[2] / "rules" / "example-clinic"
SEVERITY = ("stop", "revise", "open", "watch", "clear")


def data_of(path: Path) -> Any:
    return read_document(path.read_text(encoding="utf-8"), path.name).data


def cards() -> Iterator[dict]:
    for folder in ("lamps", "composites", "adhesives", "liners"):
        for path in sorted((CLINIC / folder).glob("*.yaml")):
            yield data_of(path)


TURNS = data_of(Path(__file__).with_name("turns.yaml"))
BASE_PLAN = data_of(CLINIC / "plans" / f"{TURNS['base']}.yaml")


def put(data: Any, path: str, value: Any) -> None:
    """Set one value by its path; None takes the key out."""
    *steps, last = (int(step) if step.isdigit() else step for step in path.split("/"))
    for step in steps:
        data = data[step]
    if value is None:
        del data[last]
    else:
        data[last] = value


def turned(turn: dict) -> tuple[dict, list[dict]]:
    """The plan and the cards of a turn."""
    plan, edited = copy.deepcopy(BASE_PLAN), [copy.deepcopy(card) for card in cards()]
    for path, value in turn.get("plan", {}).items():
        put(plan, path, value)
    by_id = {card["id"]: card for card in edited}
    for card, edits in turn.get("cards", {}).items():
        for path, value in edits.items():
            put(by_id[card], path, value)
    return plan, edited


def worst_by_rule(report: Any) -> dict[str, str]:
    """The worst finding of each rule that found something."""
    worst: dict[str, str] = {}
    for finding in report.findings:
        if finding.finding != "clear":
            known = worst.get(finding.rule.id, "clear")
            worst[finding.rule.id] = min(known, finding.finding, key=SEVERITY.index)
    return worst


def test_the_base_plan_is_clear() -> None:
    report = farside.check(BASE_PLAN, list(cards()))
    assert worst_by_rule(report) == {}
    assert report.verdict == "clear"


@pytest.mark.parametrize("turn", TURNS["turns"], ids=lambda turn: f"{turn['rule']}-{turn['finding']}")
def test_only_the_named_rules_turn(turn: dict) -> None:
    plan, edited = turned(turn)
    report = farside.check(plan, edited)
    expected = {turn["rule"]: turn["finding"], **turn.get("also", {})}
    assert worst_by_rule(report) == expected
    assert report.verdict == min(expected.values(), key=SEVERITY.index)


def test_every_rule_is_turned() -> None:
    assert {turn["rule"] for turn in TURNS["turns"]} == {rule.id for rule in base_protocol().rules}


@pytest.mark.parametrize(
    ("plan", "verdict"),
    [
        ("shallow-clear", "clear"),
        ("through-overlay", "watch"),
        ("bright-room", "revise"),
        ("dark-canine", "revise"),
        ("deep-box", "stop"),
        ("spare-lamp", "stop"),
        ("bulk-fill-wide", "stop"),
        ("extra-light-incisor", "stop"),
    ],
)
def test_example_plans_keep_their_verdicts(plan: str, verdict: str) -> None:
    clinic = data_of(CLINIC / "clinic.yaml")
    report = farside.check(data_of(CLINIC / "plans" / f"{plan}.yaml"), list(cards()), clinic=clinic)
    assert report.verdict == verdict


def test_the_deep_box_stops_on_its_first_increment_alone() -> None:
    report = farside.check(data_of(CLINIC / "plans" / "deep-box.yaml"), list(cards()))
    stops = [(finding.rule.id, finding.where["increment"]) for finding in report.findings if finding.finding == "stop"]
    assert stops == [("far-side-dose", 1)]


def test_files_read_the_same_by_another_reader() -> None:
    """What an editor's YAML makes of the example clinic is what Farside makes of it."""
    for path in CLINIC.rglob("*.yaml"):
        assert yaml.safe_load(path.read_text(encoding="utf-8")) == data_of(path), path.name
