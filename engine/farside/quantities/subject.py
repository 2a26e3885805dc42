"""What a rule is about: the plan, its lamp, a composite, an increment or an exposure, and what encloses it."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any, Final, Literal

from farside.clinic.materials import Composite, Layer
from farside.clinic.plan import LayerUse
from farside.trace.exposed import ExposureLight
from farside.trace.light import IncrementLight, LightTrace

About = Literal["plan", "lamp", "composite", "increment", "exposure"]
ABOUT: Final[tuple[About, ...]] = ("plan", "lamp", "composite", "increment", "exposure")

# Whose quantities a subject has besides its own: what encloses it, never what lies inside it.
ENCLOSING: Final[Mapping[About, tuple[About, ...]]] = {
    "plan": ("plan", "lamp"),
    "lamp": ("lamp",),
    "composite": ("composite",),
    "increment": ("increment", "composite", "plan", "lamp"),
    "exposure": ("exposure", "increment", "composite", "plan", "lamp"),
}


@dataclass(frozen=True, slots=True)
class Subject:
    """One thing that rules run on.

    `index` counts increments from 0; an exposure of the adhesive, the liner or after the matrix has none.
    """

    about: About
    trace: LightTrace
    index: int | None = None
    composite: Composite | None = None
    light: ExposureLight | None = None

    @property
    def increment(self) -> IncrementLight | None:
        """The increment that this is or lies in."""
        return None if self.index is None else self.trace.increments[self.index]

    @property
    def layer(self) -> Layer | None:
        """The adhesive or liner whose exposure this is."""
        use = self._layer_use(self.light.layer) if self.light is not None else None
        return None if use is None else use.layer

    def where(self) -> dict[str, str | int | None]:
        """The place of this in the plan, as reports give it."""
        return {
            "layer": self.light.layer if self.light else "increment" if self.about == "increment" else None,
            "increment": None if self.index is None else self.index + 1,
            "exposure": self.light.number if self.light else None,
            "composite": self.composite.id if self.composite else None,
            "lamp": self.trace.plan.lamp.id if self.about == "lamp" else None,
        }

    def enclosing(self, about: About) -> "Subject | None":
        """This subject or the one of that sort which encloses it; None where there is none."""
        if about == self.about:
            return self
        if about not in ENCLOSING[self.about]:
            return None
        if about in {"increment", "composite"} and self.composite is None:
            return None
        inner = about in {"increment", "composite"}
        return Subject(
            about,
            self.trace,
            index=self.index if about == "increment" else None,
            composite=self.composite if inner else None,
        )

    def field(self, path: str) -> Any:
        """A card's or the plan's field by its dotted path, as `composite.shade.group`; None where it is absent."""
        head, *steps = path.split(".")
        found: Any = self._fields(head)
        for step in steps:
            found = found.get(step) if isinstance(found, Mapping) else None
        return found

    def _fields(self, head: str) -> Mapping[str, Any] | None:
        plan = self.trace.plan
        if head in {"adhesive", "liner"}:
            use = self._layer_use(head)
            return None if use is None else use.layer.fields
        if head == "composite":
            return None if self.composite is None else self.composite.fields
        if head == "increment":
            return None if self.increment is None else self.increment.increment.fields
        if head == "exposure":
            return None if self.light is None else self.light.exposure.fields
        return {"plan": plan.fields, "lamp": plan.lamp.fields}.get(head)

    def _layer_use(self, layer: str) -> LayerUse | None:
        return {"adhesive": self.trace.plan.adhesive, "liner": self.trace.plan.liner}.get(layer)


def subjects(trace: LightTrace, about: About) -> Iterator[Subject]:
    """The subjects of one sort in a plan, in the order of the chair."""
    if about in {"plan", "lamp"}:
        yield Subject(about, trace)
    elif about == "composite":
        for composite in trace.plan.composites():
            yield Subject(about, trace, composite=composite)
    elif about == "increment":
        for index, increment in enumerate(trace.increments):
            yield Subject(about, trace, index=index, composite=increment.increment.composite)
    else:
        for light in trace.exposures():
            held = None if light.index is None else trace.increments[light.index].increment.composite
            yield Subject(about, trace, index=light.index, composite=held, light=light)
