"""Every report keeps to the schema that is published for it."""

import json

import farside
import pytest
from farside import shipped
from farside.reading.document import Document
from farside.reading.problems import Refused
from farside.reading.schema import check_schema
from unit.made import ADHESIVE, CARDS, PLAN, PLANS, edited, example, example_cards, example_plan

SPARSE = {
    "no cards' details": (PLAN, [{k: v for k, v in card.items() if k not in {"readings", "beam", "optics",
                          "initiators", "maker_instructions"}} for card in CARDS]),
    "no exposures": (edited(PLAN, {"increments/0/exposures": []}), CARDS),
    "beyond reach": ({**PLAN, "gap_mm": 30}, CARDS),
    "every layer": (
        {
            **PLAN,
            "adhesive": {"card": "bond", "exposures": [{"time_s": 10}]},
            "liner": {"card": "base", "exposures": [{"time_s": 10}]},
            "after": [{"time_s": 20, "from": "side", "side": "buccal", "tip_distance_mm": 2}],
        },
        [*CARDS, {**ADHESIVE, "kind": "liner", "id": "base"}],
    ),
}  # fmt: skip


def keeps(report):
    data = report.as_data()
    assert json.loads(json.dumps(data, allow_nan=False)) == data
    check_schema(Document.of(data, "report"), shipped.schema("report"), tuple(shipped.schemas().values()))


@pytest.mark.parametrize("name", PLANS)
def test_of_every_example_plan(name):
    keeps(farside.check(example_plan(name), example_cards(), clinic=example("clinic.yaml")))


@pytest.mark.parametrize("name", SPARSE)
def test_of_plans_with_little_and_with_much(name):
    plan, cards = SPARSE[name]
    keeps(farside.check(plan, cards))


def test_the_schema_would_notice():
    data = farside.check(PLAN, CARDS).as_data()
    schemas = tuple(shipped.schemas().values())
    for damage in ({"verdict": "fine"}, {"extra": 1}, {"findings": [{}]}, {"format": 2}, {"layers": {}}):
        with pytest.raises(Refused):
            check_schema(Document.of({**data, **damage}, "report"), shipped.schema("report"), schemas)
