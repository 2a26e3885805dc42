"""The page of outside checks: counts, misses and plots are those of the checks that it is given."""

import re
import xml.etree.ElementTree as ET
from dataclasses import replace

import pytest
from farside.export.compared import Compared, Drawn, Outside
from farside.export.page_plots import curves, scatter, shares
from farside.export.rule_pages import rule_page
from farside.export.source_page import source_page
from farside.export.trust_page import tally, trust_page
from farside.protocol.protocol import base_protocol

HIT = Compared(
    id="hit",
    topic="tooth",
    source="uusitalo-2016",
    says="light behind a tooth",
    unit="mW/cm²",
    low=40.0,
    high=40.0,
    computed=41.0,
    allowed=2.0,
    band=0.05,
    relative=True,
    kind="counted",
    how_sure="seen",
    row="hit",
    row_says="light behind a tooth",
    rules=("close-to-pulp",),
)
MISS = replace(HIT, id="miss", says="light behind 1 mm", computed=60.0, kind="miss", row="miss", note="no surface")
SETS = replace(
    HIT, id="sets", says="slope", kind="set-by", sets=("tooth.attenuation_per_mm",), row="sets", row_says="slope"
)
LOOSE = replace(HIT, id="loose", kind="plausibility", row="loose")
RANGE = replace(HIT, id="range", low=30.0, high=50.0, band=0.0, allowed=0.0, row="range")
POINTS = tuple(
    replace(HIT, id=f"point-{value:g}", low=value, high=value, computed=1.02 * value, allowed=0.05 * value, row="many")
    for value in (10.0**power for power in range(9))
)


def page_of(*checks: Compared) -> str:
    """The page with its unbreakable blanks as plain ones."""
    return trust_page(Outside(checks)).replace("\u00a0", " ")


def test_only_what_counts_is_counted() -> None:
    assert tally([HIT, MISS, SETS, LOOSE]) == "1 of 2 counted checks lie within their band; 1 misses it."
    assert tally([HIT, RANGE]) == "2 of 2 counted checks lie within their band; none misses it."


def test_a_miss_is_shown_as_one_with_the_rules_that_depend_on_it() -> None:
    misses = page_of(HIT, MISS).partition("## Misses")[2].partition("## Figures")[0]
    assert "Light behind 1 mm" in misses
    assert "Published 40 mW/cm², band ± 5 %; computed 60 mW/cm², off by +50 %. No surface." in misses
    assert "(rules/close-to-pulp.md)" in misses
    assert "Light behind a tooth" not in misses
    assert "| **missed** |" in page_of(HIT, MISS)


def test_many_misses_of_a_row_are_told_at_once_by_the_worst() -> None:
    worse = replace(MISS, id="worse", says="light behind 2 mm", computed=99.0)
    misses = page_of(MISS, worse).partition("## Misses")[2].partition("## Figures")[0]
    assert misses.count("\n- ") == 1
    assert "Light behind a tooth: 2 points.** The worst: light behind 2 mm" in misses
    page = rule_page(base_protocol().rule("close-to-pulp"), Outside((MISS, worse)))
    assert "**Missed**: 2 points of: light behind a tooth. no surface" in page


def test_a_check_that_comes_to_lie_outside_its_band_is_a_miss_whatever_was_expected() -> None:
    assert "**missed**" in page_of(replace(HIT, computed=43.0))
    assert "**missed**" not in page_of(replace(MISS, computed=41.0))


def test_what_sets_a_parameter_says_which_and_is_no_miss() -> None:
    page = page_of(replace(SETS, computed=99.0))
    assert r"sets *tooth.attenuation\_per\_mm*" in page
    assert "**missed**" not in page


def test_a_range_holds_all_that_lies_inside_it() -> None:
    assert RANGE.within
    assert not replace(RANGE, computed=51.0).within
    assert replace(RANGE, computed=52.0).difference == pytest.approx(2.0)
    assert "| 30 to 50 mW/cm²<br>no more | 41 mW/cm² | none | within |" in page_of(RANGE)


def test_many_stand_in_one_row_of_which_the_worst_speaks() -> None:
    worst = replace(POINTS[3], id="worst", says="the odd one", computed=1.04e3)
    page = page_of(*POINTS, worst)
    rows = [line for line in page.splitlines() if line.startswith("| ") and "10 points" in line]
    assert len(rows) == 1
    assert "The worst: the odd one" in rows[0]
    assert "| +4 % | all within |" in rows[0]


@pytest.mark.parametrize(
    "made",
    [
        scatter("Nine <points>", [*POINTS, MISS, SETS]),
        shares("Where", [*POINTS, MISS]),
        curves(Drawn("f", "A figure", "depth, mm", "light", log_y=True), [replace(c, x=float(c.low)) for c in POINTS]),
        curves(Drawn("f", "A figure", "depth, mm", "light"), [RANGE, replace(RANGE, x=2.0, computed=80.0)]),
    ],
)
def test_a_plot_is_whole_and_has_words_and_no_style_or_script(made: str) -> None:
    figure = ET.fromstring(made)
    assert figure.find("svg").get("aria-label")
    assert figure.findtext("figcaption")
    assert not {element.tag for element in figure.iter()} & {"style", "script"}
    assert not any(name == "style" or name.startswith("on") for element in figure.iter() for name in element.attrib)
    numbers = [float(n) for element in figure.iter() for n in re.findall(r"-?\d+\.\d+", element.get("d") or "")]
    assert all(-10.0 <= number <= 370.0 for number in numbers)


def test_a_plot_marks_misses_apart() -> None:
    made = scatter("All", [*POINTS, MISS, SETS])
    assert (made.count('class="point"'), made.count('class="missed"'), made.count('class="sets"')) == (9, 1, 1)


def test_the_more_is_computed_the_higher_a_point_lies() -> None:
    made = scatter("Two", [HIT, replace(HIT, computed=39.0)])
    above, below = (float(y) for y in re.findall(r'cy="([\d.]+)"', made))
    assert above < below


def test_rules_and_sources_name_the_checks_that_bear_on_them() -> None:
    outside = Outside((HIT, MISS, SETS))
    page = rule_page(base_protocol().rule("close-to-pulp"), outside)
    assert "[Tooth](../trust.md#tooth): 1 of 2 within their band." in page
    assert "**Missed**: light behind 1 mm. no surface" in page
    assert "[Tooth](trust.md#tooth): 2 outside checks; sets tooth.attenuation" in source_page(outside).replace("\\", "")
