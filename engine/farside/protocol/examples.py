"""A rule's own examples: the finding that given values get, fields taking their schemas' defaults."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any, Final

from farside import shipped
from farside.protocol.fields import SCHEMAS
from farside.protocol.rule import Rule, judged
from farside.reading.defaults import default_at

NOT_APPLIED: Final = "not-applied"


@dataclass(frozen=True, slots=True)
class Given:
    """Values as an example gives them."""

    values: Mapping[str, Any]

    def get(self, name: str) -> Any:
        """The value given for a name, else what the fields under that name make up, else its schema's default."""
        if name in self.values:
            return self.values[name]
        inside = f"{name}."
        below = {key.removeprefix(inside): value for key, value in self.values.items() if key.startswith(inside)}
        if below:
            return below
        above, _, key = name.rpartition(".")
        if isinstance(held := self.values.get(above), Mapping):
            return held.get(key)
        head, *path = name.split(".")
        return default_at(path, shipped.referred(SCHEMAS[head]), shipped.referred) if path else None


def outcome(rule: Rule, given: Mapping[str, Any]) -> str:
    """The finding that a rule gives for an example's values; `not-applied` where it does not apply."""
    found = judged(rule, Given(given))
    return NOT_APPLIED if found is None else found.finding
