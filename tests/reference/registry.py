"""All outside checks of the physics, in one tuple: what the tests run and what a page of them would show."""

from typing import Final

from reference import transport_checks
from reference.checks import Check

CHECKS: Final[tuple[Check, ...]] = (*transport_checks.CHECKS,)
