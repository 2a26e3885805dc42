"""Room light and eyes, against arithmetic by hand from the tables."""

import math

import pytest
from farside.trace.eyes import day_share, mode_weight
from farside.trace.room import unfiltered_lx, weighted_mw_cm2, working_window_of
from unit.made import COMPOSITE, LAMP, PLAN, edited, read, traced

LED = {"what": "operating-light-led", "illuminance_lx": 12000}


def room(*sources, card=COMPOSITE):
    plan = read({**PLAN, "room": {"sources": list(sources)}}, [LAMP, card])
    return plan.increments[0].composite, plan.room


def test_the_window_under_an_operating_light_by_hand():
    # 8 000 lx for 60 s of daylight at 0.0942 per 1 000 lx, against 12 000 lx at 0.0526.
    assert working_window_of(*room(LED)) == pytest.approx(8000 * 60 * 0.0942 / (12000 * 0.0526), rel=1e-9)
    assert working_window_of(*room(LED)) == pytest.approx(71.6, abs=0.05)


def test_a_yellow_filter_lengthens_it_by_the_tables_ratio():
    filtered = working_window_of(*room({**LED, "filter": "yellow"}))
    assert filtered / working_window_of(*room(LED)) == pytest.approx(0.0526 / 0.00194)


def test_several_lights_add():
    composite, lights = room(LED, {"what": "window", "illuminance_lx": 1000})
    assert weighted_mw_cm2(lights) == pytest.approx(12 * 0.0526 + 0.0942)
    assert working_window_of(composite, lights) == pytest.approx(8 * 60 * 0.0942 / (12 * 0.0526 + 0.0942))


def test_the_cards_own_figure_is_used_before_the_standards():
    card = {**COMPOSITE, "ambient": {"illuminance_lx": 10000, "time_s": 90, "provenance": "maker"}}
    assert working_window_of(*room(LED, card=card)) == pytest.approx(10 * 90 * 0.0942 / (12 * 0.0526))


def test_in_daylight_as_bright_as_the_test_it_is_the_tests_own_time():
    assert working_window_of(*room({"what": "window", "illuminance_lx": 8000})) == pytest.approx(60)


@pytest.mark.parametrize("sources", [[], [{**LED, "illuminance_lx": 0}]])
def test_in_the_dark_nothing_ends_it(sources):
    assert working_window_of(*room(*sources)) is None


def test_only_unfiltered_light_counts_as_unfiltered():
    _, lights = room(LED, {**LED, "filter": "yellow"}, {"what": "window", "illuminance_lx": 300})
    assert unfiltered_lx(lights) == 12300


TEAM = {"exposures_today_count": 20}


def test_the_weight_of_a_mode_by_hand():
    """Three nodes of a band of 22 nm at 460 nm: sqrt(3) standard deviations to each side, weights 1/6, 2/3, 1/6."""
    off = math.sqrt(3) * 22 / (2 * math.sqrt(2 * math.log(2)))
    low = math.exp((460 - off - 440) / 5 * math.log(0.97))
    high = 0.55 * math.exp((460 + off - 475) / 5 * math.log(0.45 / 0.55))
    assert mode_weight(read().mode) == pytest.approx(low / 6 + 0.80 * 2 / 3 + high / 6, rel=1e-4)


def test_the_share_of_the_day_by_hand():
    """1 000 mW/cm² is 10 000 W/m²; the tooth throws back 0.4 over pi of it a steradian; 1e6 J/(m² sr) are a day's."""
    weighted_w_m2_sr = 10_000 * 0.4 / math.pi * mode_weight(read().mode)
    limit_s = 1e6 / weighted_w_m2_sr
    assert limit_s == pytest.approx(1002, rel=2e-3)
    assert day_share(traced({**PLAN, "team": TEAM})) == pytest.approx(20 * 20 / limit_s, rel=1e-9)


def test_the_days_seconds_are_the_mean_and_its_irradiance_the_largest():
    times = [{"time_s": 10, "tip_distance_mm": 5}, {"time_s": 40}]
    found = day_share(traced(edited({**PLAN, "team": TEAM}, {"increments/0/exposures": times})))
    assert found == pytest.approx(day_share(traced({**PLAN, "team": TEAM})) * 25 / 20)


def test_a_filter_counts_only_where_it_is_known_and_worn_and_loupes_never():
    bare = day_share(traced({**PLAN, "team": TEAM}))
    assert day_share(traced({**PLAN, "team": {**TEAM, "filters_for": ["operator"]}})) == bare
    assert day_share(traced({**PLAN, "team": {**TEAM, "loupes": True}})) == bare
    worn = {**TEAM, "filters_for": ["operator", "assistant"]}
    known = {**worn, "filter_transmittance_share": 0.001}
    assert day_share(traced({**PLAN, "team": known})) == pytest.approx(bare / 1000)
    assert day_share(traced({**PLAN, "team": {**known, "filters_for": ["operator", "patient"]}})) == bare
    assert day_share(traced({**PLAN, "team": {**worn, "filter_transmittance_share": 0}})) == 0


def test_without_the_days_count_or_the_lamps_output_there_is_no_share():
    assert day_share(traced({**PLAN, "team": {"loupes": True}})) is None
    assert day_share(traced()) is None
    assert day_share(traced({**PLAN, "team": TEAM}, [edited(LAMP, {"readings": None}), COMPOSITE])) is None
    assert day_share(traced({**edited(PLAN, {"increments/0/exposures": []}), "team": TEAM})) is None
