"""The small matrices: a solution solves, a product is the sum that it should be."""

import pytest
from farside.physics.light.matrix import applied, identity_less, product, solved
from hypothesis import given
from hypothesis import strategies as st

SIX = range(6)
shares = st.lists(st.lists(st.floats(0.0, 0.15), min_size=6, max_size=6), min_size=6, max_size=6)


@given(shares, shares)
def test_what_is_solved_multiplies_back(lost: list[list[float]], right: list[list[float]]) -> None:
    kept = identity_less(lost)
    back = product(kept, solved(kept, right))
    for row, expected in zip(back, right, strict=True):
        assert row == pytest.approx(expected, abs=1e-12)


@given(shares, shares)
def test_product_and_application_agree(left: list[list[float]], right: list[list[float]]) -> None:
    whole = product(left, right)
    for column in SIX:
        alone = applied(left, [row[column] for row in right])
        assert [row[column] for row in whole] == pytest.approx(alone, abs=1e-15)
    assert whole[2][3] == pytest.approx(sum(left[2][k] * right[k][3] for k in SIX), abs=1e-15)
