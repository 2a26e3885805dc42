"""Where a value came from, and which of several origins is the worst."""

from collections.abc import Iterable
from typing import Final, Literal, cast

Provenance = Literal["measured", "maker", "published", "assumed"]

BEST_FIRST: Final[tuple[Provenance, ...]] = ("measured", "maker", "published", "assumed")


def provenance(name: str) -> Provenance:
    """The provenance of that name; the schemas let no other through."""
    return cast(Provenance, name)


def worst(origins: Iterable[Provenance]) -> Provenance:
    """The worst of some origins; `measured` when there are none, a count being its own measurement."""
    return max(origins, key=BEST_FIRST.index, default="measured")
