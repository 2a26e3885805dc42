"""A schema whose references are replaced by what they name judges as the one that refers."""

from collections.abc import Iterator
from typing import Any

import pytest
from farside import shipped
from farside.clinic.reading import KINDS
from farside.reading.document import Document
from farside.reading.problems import Refused
from farside.reading.schema import Validator, check_by, validator_of

ANNOTATIONS = {"title", "description", "default", "examples"}
OTHERS = ("text", -1, {"strange_key": 1})


def parts(data: Any) -> Iterator[dict[str, Any] | list[Any]]:
    """Every mapping and list inside some data, itself first."""
    if isinstance(data, dict | list):
        yield data
        for inner in data.values() if isinstance(data, dict) else data:
            yield from parts(inner)


def spoilt(data: dict[str, Any]) -> Iterator[dict[str, Any]]:
    """A document with one value after the other taken away or replaced; given back whole between them."""
    for part in list(parts(data)):
        for key in list(part) if isinstance(part, dict) else range(len(part)):
            kept = part[key]
            for other in OTHERS:
                part[key] = other
                yield data
            if isinstance(part, dict):
                del part[key]
                yield data
                part[f"{key}s"] = kept
                yield data
                del part[f"{key}s"]
            part[key] = kept


def problems(document: Document, validator: Validator) -> list[str]:
    try:
        check_by(validator, document)
    except Refused as refused:
        return [str(problem) for problem in refused.problems]
    return []


@pytest.mark.parametrize("kind", KINDS)
def test_beside_a_reference_stands_nothing_that_judges(kind: str) -> None:
    referring = [part for part in parts(shipped.schema(kind)) if isinstance(part, dict) and "$ref" in part]
    assert all(set(part) - {"$ref"} <= ANNOTATIONS for part in referring)


@pytest.mark.parametrize(
    "name",
    [
        "example-clinic/plans/deep-box.yaml",
        "example-clinic/lamps/chair-3-wide.yaml",
        "example-clinic/composites/bulk-fill.yaml",
        "example-clinic/adhesives/clinic-adhesive.yaml",
        "base/light-dose/far-side-dose.yaml",
    ],
)
def test_spoilt_documents_get_the_same_problems(name: str) -> None:
    kept = Document.of(shipped.document(name).data, name)
    kind = kept.data["kind"]
    others = shipped.schemas().values()
    whole, referring = validator_of(shipped.whole_schema(kind), others), validator_of(shipped.schema(kind), others)
    assert problems(kept, whole) == []
    count = 0
    for data in spoilt(kept.data):
        document = Document.of(data, name)
        found = problems(document, whole)
        assert found == problems(document, referring)
        count += bool(found)
    assert count > 20


def test_a_plan_refers_to_nothing_any_more() -> None:
    assert "$ref" in str(shipped.schema("plan"))
    assert "$ref" not in str(shipped.whole_schema("plan"))
