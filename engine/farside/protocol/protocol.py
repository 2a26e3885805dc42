"""A protocol: its rules in order of id, its edition, and the digest over what they require."""

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any, Final

from farside import shipped
from farside.protocol.canonical import digest
from farside.protocol.rule import Rule, rule_of

# Left out of the digest: what explains a rule, or one of its limits, and requires nothing.
_EXPLAINS: Final = frozenset({"examples", "why", "history"})
_EXPLAINS_LIMIT: Final = frozenset({"why", "sources"})


@dataclass(frozen=True, slots=True)
class Protocol:
    """A set of rules that plans are checked against."""

    id: str
    title: str
    edition: str
    rules: tuple[Rule, ...]
    digest: str

    def rule(self, rule_id: str) -> Rule:
        """The rule of that id.

        Raises
        ------
        KeyError
            When there is none.
        """
        return {rule.id: rule for rule in self.rules}[rule_id]

    def named(self) -> dict[str, str]:
        """Id, edition and digest, as reports carry them."""
        return {"id": self.id, "edition": self.edition, "digest": self.digest}


@cache
def base_protocol() -> Protocol:
    """The protocol that ships."""
    head = shipped.document("base/protocol.yaml").data
    rules = tuple(
        rule_of(shipped.document(name).data, topic=name.split("/")[1])
        for name in shipped.names("base")
        if name != "base/protocol.yaml"
    )
    return protocol_of(head, rules)


def protocol_of(head: Mapping[str, Any], rules: tuple[Rule, ...]) -> Protocol:
    """A protocol from its head and its rules."""
    ordered = tuple(sorted(rules, key=lambda rule: rule.id))
    whole = {"id": head["id"], "edition": head["edition"], "rules": [_required(rule.data) for rule in ordered]}
    return Protocol(head["id"], head["title"], head["edition"], ordered, digest(whole))


def _required(rule: Mapping[str, Any]) -> dict[str, Any]:
    """A rule's data without what explains it; a limit keeps its sources' keys."""
    required = {key: value for key, value in rule.items() if key not in _EXPLAINS}
    if "limits" in rule:
        required["limits"] = {name: _required_limit(limit) for name, limit in rule["limits"].items()}
    if "sources" in rule:
        required["sources"] = _cited(rule)
    return required


def _required_limit(limit: Mapping[str, Any]) -> dict[str, Any]:
    return {**{key: value for key, value in limit.items() if key not in _EXPLAINS_LIMIT}, "sources": _cited(limit)}


def _cited(entry: Mapping[str, Any]) -> list[str]:
    return [source["cite"] for source in entry.get("sources", ())]
