"""Every outside check lies within its band or misses by what is stated, and says where it comes from."""

from collections.abc import Callable
from operator import attrgetter

import pytest
import yaml
from reference.checks import KINDS, TOPICS, Check, Row
from reference.registry import CHECKS, FIGURES, GROUPS, ROWS, points
from reference.tables import TABLES

HITS = tuple(check for check in CHECKS if check.kind != "miss")
MISSES = tuple(check for check in CHECKS if check.kind == "miss")
RULES = {path.stem for path in (TABLES.parent / "base").glob("*/*.yaml")}
SAME_IN_A_GROUP = attrgetter("topic", "source", "unit", "kind", "sets", "rules", "band_is", "how_sure")


@pytest.mark.parametrize("check", HITS, ids=attrgetter("id"))
def test_within_band(check: Check, record_property: Callable[[str, str], None]) -> None:
    record_property("outside-check", check.kind)
    result = check.result()
    assert result.within, f"{result.difference:.6g} {check.unit} off, {result.allowed:.6g} allowed"


@pytest.mark.parametrize("check", MISSES, ids=attrgetter("id"))
def test_still_misses_by_what_is_stated(check: Check, record_property: Callable[[str, str], None]) -> None:
    record_property("outside-check", check.kind)
    result = check.result()
    assert not result.within, "it hits now: say so"
    assert result.difference == pytest.approx(check.misses_by, rel=0.03)


def test_ids_are_unique() -> None:
    ids = [check.id for check in CHECKS]
    assert len(set(ids)) == len(ids)


@pytest.mark.parametrize("row", ROWS, ids=attrgetter("id"))
def test_kind_fits(row: Row) -> None:
    for check in row.checks:
        assert check.kind in KINDS
        assert check.topic in TOPICS
        assert (check.kind == "set-by") == bool(check.sets)
        assert (check.kind == "miss") == (check.misses_by is not None)
        assert check.note or check.kind not in ("miss", "plausibility"), "what was taken as known, or why it misses"
        assert check.band > 0.0 or isinstance(check.published, tuple)
        assert set(check.rules) <= RULES


def test_what_was_read_is_among_the_sources() -> None:
    with (TABLES.parent / "sources.yaml").open(encoding="utf-8") as file:
        known = set(yaml.safe_load(file)["sources"])
    read = {check.source for check in CHECKS if check.how_sure != "computed"}
    assert read <= known


def test_a_miss_names_the_rules_that_depend_on_it() -> None:
    assert all(check.rules for check in MISSES)


@pytest.mark.parametrize("row", ROWS, ids=attrgetter("id"))
def test_a_row_is_of_one_piece(row: Row) -> None:
    assert len({SAME_IN_A_GROUP(check) for check in row.checks}) == 1


def test_every_group_and_figure_is_filled() -> None:
    assert {group.id for group in GROUPS} == {check.group for check in CHECKS if check.group}
    assert {figure.id for figure in FIGURES} == {check.point.figure for check in CHECKS if check.point}
    assert all(len(points(figure.id)) > 1 for figure in FIGURES)
