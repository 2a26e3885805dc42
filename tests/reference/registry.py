"""All outside checks of light, room and eyes in one tuple: what the tests run and what a page of them would show."""

from typing import Final

from reference import beam_checks, dose_checks, paste_checks, room_and_eye_checks, transport_checks
from reference.checks import Check

CHECKS: Final[tuple[Check, ...]] = (
    *transport_checks.CHECKS,
    *beam_checks.CHECKS,
    *dose_checks.CHECKS,
    *paste_checks.CHECKS,
    *room_and_eye_checks.CHECKS,
)
