"""A report: the verdict, the findings worst first, and every quantity of the plan that could be had."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any, Final

from farside.protocol.findings import Finding
from farside.protocol.protocol import Protocol
from farside.protocol.rule import GRADES, Grade
from farside.protocol.wording import said
from farside.quantities.quantity import Found, Value
from farside.quantities.registry import visible
from farside.quantities.subject import Subject, subjects
from farside.quantities.values import Valued
from farside.trace.light import LightTrace

FORMAT: Final = 1


@dataclass(frozen=True, slots=True)
class Report:
    """What a check gives. `as_data` is its JSON, which keeps to the published schema."""

    trace: LightTrace
    protocol: Protocol
    findings: tuple[Finding, ...]
    not_applied: tuple[str, ...]
    valued: Valued
    engine: str

    @property
    def verdict(self) -> Grade:
        """The most severe finding; clear where there is none."""
        return min((finding.finding for finding in self.findings), key=GRADES.index, default="clear")

    def verdict_says(self) -> str:
        """The verdict in words: for a stop, what not to do."""
        worst = next(iter(self.findings), None)
        if self.verdict == "stop" and worst is not None and worst.where["increment"] is not None:
            return said("verdict-stop-increment", number=worst.where["increment"])
        return said(f"verdict-{self.verdict}")

    def clear_says(self) -> str:
        """How many findings are clear, in words."""
        count = sum(finding.finding == "clear" for finding in self.findings)
        return said("clear-count-all" if count == len(self.findings) else "clear-count", count=count)

    def increment_value(self, index: int, name: str) -> Value | None:
        """A quantity of the increment of that place, counted from 0; None where it cannot be had."""
        subject = Subject("increment", self.trace, index, self.trace.increments[index].increment.composite)
        found = self.valued.found(visible("increment")[name], subject)
        return found.value if isinstance(found, Found) else None

    def as_data(self) -> dict[str, Any]:
        """The report as plain data, ready for JSON."""
        plan = self.trace.plan
        return {
            "kind": "report",
            "format": FORMAT,
            "verdict": self.verdict,
            "verdict_says": self.verdict_says(),
            "clear_says": self.clear_says(),
            "on": plan.on.isoformat(),
            "engine": self.engine,
            "protocol": self.protocol.named(),
            "plan": {"title": plan.title, "quantities": self._quantities(*subjects(self.trace, "plan"))},
            "lamp": {"id": plan.lamp.id, "quantities": self._quantities(*subjects(self.trace, "lamp"))},
            "composites": [
                {"id": subject.composite.id, "quantities": self._quantities(subject)}
                for subject in subjects(self.trace, "composite")
                if subject.composite is not None
            ],
            "layers": {
                layer: [self._exposure(subject) for subject in self._exposures(layer, None)]
                for layer in ("adhesive", "liner", "after")
            },
            "increments": [
                {
                    "number": index + 1,
                    "quantities": self._quantities(subject),
                    "exposures": [self._exposure(inner) for inner in self._exposures("increment", index)],
                }
                for index, subject in enumerate(subjects(self.trace, "increment"))
            ],
            "findings": [finding.as_data() for finding in self.findings],
            "not_applied": list(self.not_applied),
            "caution": said("caution"),
        }

    def _exposures(self, layer: str, index: int | None) -> list[Subject]:
        return [
            subject
            for subject in subjects(self.trace, "exposure")
            if subject.light is not None and (subject.light.layer, subject.index) == (layer, index)
        ]

    def _exposure(self, subject: Subject) -> dict[str, Any]:
        return {"number": subject.where()["exposure"], "quantities": self._quantities(subject)}

    def _quantities(self, subject: Subject) -> dict[str, Mapping[str, Any]]:
        return {name: _quantity_data(found) for name, found in self.valued.own(subject).items()}


def _quantity_data(found: Found) -> dict[str, Any]:
    data: dict[str, Any] = {"value": found.value, "provenance": found.provenance}
    return {**data, "assumed": list(found.assumed)} if found.assumed else data
