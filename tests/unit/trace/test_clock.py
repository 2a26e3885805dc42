"""The chair clock, and the most that falls within a window of it."""

import pytest
from farside.trace.clock import chair_clock, largest_in_window
from hypothesis import given
from hypothesis import strategies as st
from unit.made import PLAN, read


def test_the_clock_runs_in_the_order_of_the_chair():
    plan = {
        **PLAN,
        "adhesive": {"card": "bond", "exposures": [{"time_s": 10, "rest_before_s": 15}]},
        "after": [{"time_s": 7}],
        "increments": [
            {"composite": "paste", "thickness_mm": 1, "placing_s": 40, "exposures": [{"time_s": 20}]},
            {"composite": "paste", "thickness_mm": 1, "exposures": [{"time_s": 5}, {"time_s": 6, "rest_before_s": 2}]},
        ],
    }
    spells = chair_clock(read(plan))
    assert [(s.layer, s.index, s.what, s.start_s, s.length_s) for s in spells] == [
        ("adhesive", None, "rest", 0, 15),
        ("adhesive", None, "expose", 15, 10),
        ("increment", 0, "place", 25, 40),
        ("increment", 0, "expose", 65, 20),
        ("increment", 1, "expose", 85, 5),
        ("increment", 1, "rest", 90, 2),
        ("increment", 1, "expose", 92, 6),
        ("after", None, "expose", 98, 7),
    ]
    assert spells[-1].end_s == 105


@pytest.mark.parametrize(
    ("spells", "most"),
    [
        ([], 0),
        ([(0, 20, 1.0)], 20),
        ([(0, 200, 0.5)], 30),
        ([(0, 20, 1.0), (25, 20, 1.0), (50, 20, 1.0)], 50),  # any 60 s hold two gaps of 5 s at most
        ([(0, 40, 1.0), (80, 40, 1.0)], 40),  # from 20 or so: 20 of one and 20 of the other
        ([(0, 30, 1.0), (100, 30, 3.0)], 90),
    ],
)
def test_the_most_in_a_minute_by_hand(spells, most):
    assert largest_in_window(spells) == pytest.approx(most)


SPELLS = st.lists(st.tuples(st.integers(0, 40), st.integers(1, 60), st.sampled_from([0.5, 1.0, 2.5])), max_size=5)


@given(SPELLS)
def test_no_window_tried_one_second_apart_holds_more(gaps):
    spells, now = [], 0
    for rest, length, rate in gaps:
        spells.append((float(now + rest), float(length), rate))
        now += rest + length
    rates = [0.0] * (now + 121)
    for start, length, rate in spells:
        for second in range(int(start), int(start + length)):
            rates[second + 60] = rate
    tried = max(sum(rates[second : second + 60]) for second in range(now + 61))
    assert largest_in_window(spells) == pytest.approx(tried)
