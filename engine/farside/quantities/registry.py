"""Every quantity, in one tuple: scroll it once and know all that a rule can speak of."""

from collections.abc import Mapping
from functools import cache
from typing import Final

from farside.quantities.of_exposure import OF_EXPOSURE
from farside.quantities.of_increment import OF_INCREMENT
from farside.quantities.of_lamp import OF_COMPOSITE, OF_LAMP
from farside.quantities.of_plan import OF_PLAN
from farside.quantities.quantity import Quantity
from farside.quantities.subject import ENCLOSING, About

QUANTITIES: Final[tuple[Quantity, ...]] = (*OF_PLAN, *OF_LAMP, *OF_COMPOSITE, *OF_INCREMENT, *OF_EXPOSURE)


@cache
def visible(about: About) -> Mapping[str, Quantity]:
    """The quantities that a rule about something may use, by name; the innermost of two that share a name."""
    found: dict[str, Quantity] = {}
    for sort in ENCLOSING[about]:
        for quantity in QUANTITIES:
            if quantity.about == sort:
                found.setdefault(quantity.name, quantity)
    return found
