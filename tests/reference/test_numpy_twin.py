"""The engine's doses against a vectorised NumPy version of the same model, written apart from it."""

import itertools

import numpy as np
import pytest
from bench.four_increments import awkward_plan, four_increments
from bench.light_numpy import half_space_fluence, plan_doses
from farside import shipped
from farside.clinic.cards import Cards
from farside.clinic.read_plan import read_plan
from farside.physics.light import transport
from farside.reading.document import Document
from farside.trace.light import trace_light

WITHIN = 1e-6
FOLDERS = ("lamps", "composites", "adhesives", "liners")
PLANS = {name: shipped.document(name) for name in shipped.names("example-clinic/plans")}
MADE = {"four increments": four_increments(), "awkward aims": awkward_plan()}
GRID = itertools.product((0.05, 0.2, 1.0), (0.5, 1.0, 4.0), (1.0, 1.4, 1.55))


@pytest.mark.parametrize(
    "document",
    [*PLANS.values(), *(Document.of(data, name) for name, data in MADE.items())],
    ids=[*PLANS, *MADE],
)
def test_doses_of_a_plan(document: Document) -> None:
    cards = Cards(card for folder in FOLDERS for card in shipped.documents(f"example-clinic/{folder}"))
    plan = read_plan(document, cards, shipped.document("example-clinic/clinic.yaml"))
    for ours, theirs in zip(trace_light(plan).increments, plan_doses(plan), strict=True):
        assert theirs.needed == pytest.approx(ours.needed_dose_j_cm2, rel=WITHIN)
        assert theirs.far == pytest.approx(ours.far_dose_j_cm2, rel=WITHIN)
        assert theirs.edge == pytest.approx(ours.edge_dose_j_cm2, rel=WITHIN)


def test_tables_of_half_spaces() -> None:
    grid = list(GRID)
    theirs = half_space_fluence(*np.array(grid).T, step_mm=0.05, count=201)
    for (absorption, scattering, index), table in zip(grid, theirs, strict=True):
        ours = transport.half_space_fluence(absorption, scattering, index, step_mm=0.05, count=201)
        assert table == pytest.approx(np.array(ours), rel=WITHIN)
