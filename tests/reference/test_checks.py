"""Every outside check lies within its band, and says where it comes from."""

from operator import attrgetter

import pytest
from reference.checks import Check
from reference.registry import CHECKS


@pytest.mark.parametrize("check", CHECKS, ids=attrgetter("id"))
def test_within_band(check: Check) -> None:
    assert check.computed() == pytest.approx(check.expected(), abs=check.allowed(), rel=0.0)


def test_ids_are_unique() -> None:
    ids = [check.id for check in CHECKS]
    assert len(set(ids)) == len(ids)


def test_every_check_names_its_source() -> None:
    assert all(check.source and check.says and check.band > 0.0 for check in CHECKS)
