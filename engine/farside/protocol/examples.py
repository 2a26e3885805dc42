"""A rule's own examples: the finding that given values get, fields taking their schemas' defaults."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any, Final

from farside import shipped
from farside.protocol.rule import Rule, judged
from farside.reading.defaults import default_at

NOT_APPLIED: Final = "not-applied"

# Where the schema of a field's first word stands: of a card as a whole, or of a part of the plan's.
_SCHEMAS: Final[Mapping[str, str]] = {
    "plan": "urn:farside:schema:plan:1",
    "lamp": "urn:farside:schema:lamp:1",
    "composite": "urn:farside:schema:composite:1",
    "adhesive": "urn:farside:schema:adhesive:1",
    "liner": "urn:farside:schema:liner:1",
    "increment": "urn:farside:schema:plan:1#/$defs/increment",
    "exposure": "urn:farside:schema:plan:1#/$defs/exposure",
}


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
        return default_at(path, shipped.referred(_SCHEMAS[head]), shipped.referred) if path else None


def outcome(rule: Rule, given: Mapping[str, Any]) -> str:
    """The finding that a rule gives for an example's values; `not-applied` where it does not apply."""
    found = judged(rule, Given(given))
    return NOT_APPLIED if found is None else found.finding
