"""The clinic's usual values under a plan that says only what differs."""

import pytest
from farside.clinic.cards import Cards, documents_of
from farside.clinic.read_plan import read_plan
from farside.clinic.usual import with_usual
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from unit.made import CARDS, PLAN, edited, read


def clinic(**usual):
    return {"kind": "clinic", "title": "A clinic", "usual": usual}


def merged(plan, **usual):
    return with_usual(Document.of(plan, "plan"), Document.of(clinic(**usual), "clinic"))


def test_without_a_clinic_the_plan_is_as_it_was():
    assert with_usual(Document.of(PLAN, "plan"), None) == PLAN


def test_absent_keys_take_the_usual_value_and_given_ones_stay():
    found = merged({"site": "anterior"}, site="posterior", matrix="metal")
    assert found == {"site": "anterior", "matrix": "metal"}


def test_mappings_merge_key_by_key():
    found = merged({"lamp": {"mode": "boost"}}, lamp={"card": "usual", "mode": "on", "sleeve": "fitted"})
    assert found["lamp"] == {"card": "usual", "mode": "boost", "sleeve": "fitted"}


def test_lists_are_taken_whole():
    found = merged(
        {"team": {"filters_for": ["operator"]}}, team={"filters_for": ["operator", "assistant"], "loupes": True}
    )
    assert found["team"] == {"filters_for": ["operator"], "loupes": True}


def test_not_used_is_not_merged_with_a_usual_layer():
    assert merged({"adhesive": "not-used"}, adhesive={"card": "bond"})["adhesive"] == "not-used"


def test_the_usual_composite_serves_only_increments_that_name_none():
    found = merged({"increments": [{"thickness_mm": 1}, {"thickness_mm": 1, "composite": "own"}]}, composite="usual")
    assert [increment["composite"] for increment in found["increments"]] == ["usual", "own"]
    assert "composite" not in found


def test_merging_leaves_plan_and_clinic_as_they_were():
    plan, usual = Document.of({"lamp": {"mode": "on"}}, "plan"), Document.of(clinic(lamp={"card": "a"}), "clinic")
    with_usual(plan, usual)
    assert plan.data == {"lamp": {"mode": "on"}}
    assert usual.data["usual"] == {"lamp": {"card": "a"}}


def test_a_plan_of_what_differs_reads_as_the_whole_plan():
    short = {key: PLAN[key] for key in ("kind", "title", "on", "cavity", "gap_mm")}
    short["increments"] = [{"thickness_mm": 2, "exposures": [{"time_s": 20}]}]
    assert read(short, clinic=clinic(lamp=PLAN["lamp"], composite="paste")).fields == read(PLAN).fields


@pytest.mark.parametrize("path", ["lamp/card", "lamp/mode", "lamp/sleeve", "lamp", "cavity/depth_mm", "gap_mm"])
def test_what_neither_gives_is_named(path):
    with pytest.raises(Refused, match="neither the plan nor the clinic's usual values give it") as refused:
        read(edited(PLAN, {path: None}))
    assert refused.value.problems[0].values["what"].startswith(path.replace("/", "."))


def test_an_increment_without_any_composite_is_named():
    with pytest.raises(Refused, match=r'missing key "increments\[0\].composite"'):
        read(edited(PLAN, {"increments/0/composite": None}))


@pytest.mark.parametrize("layer", ["adhesive", "liner"])
def test_a_layer_in_use_needs_a_card(layer):
    with pytest.raises(Refused, match=f'missing key "{layer}.card"'):
        read({**PLAN, layer: {"exposures": [{"time_s": 20}]}})
    clinic_has_it = clinic(adhesive={"card": "bond"})
    assert read({**PLAN, "adhesive": {"exposures": []}}, clinic=clinic_has_it).adhesive.layer.id == "bond"


def test_what_is_no_clinic_file_is_refused_and_not_passed_over():
    with pytest.raises(Refused, match="this is a plan; a clinic is needed here"):
        read(PLAN, clinic=PLAN)


USUAL = """\
kind: clinic
title: A clinic
usual:
  lamp: {card: lamp, mode: boost, sleeve: none}
  adhesive: {card: nobody}
  composite: putty
  room: {sources: [{what: torch, illuminance_lx: 5}]}
"""


@pytest.mark.parametrize(
    ("edits", "line", "says"),
    [
        ({"lamp": None}, 4, 'no mode "boost"'),
        ({"increments/0/composite": None}, 6, 'no composite card has the id "putty"'),
        ({"adhesive": "not-used"}, 7, 'no light of a room is called "torch"'),
        ({"room": {"sources": []}}, 5, 'no adhesive card has the id "nobody"'),
    ],
)
def test_what_the_clinics_file_gave_is_refused_in_the_clinics_file(edits, line, says):
    clinic_file = read_document(USUAL, "clinic.yaml")
    with pytest.raises(Refused, match=says) as refused:
        read_plan(Document.of(edited(PLAN, edits), "plan"), Cards(documents_of(CARDS)), clinic_file)
    place = refused.value.problems[0].place
    assert (place.file, place.line) == ("clinic.yaml", line)


def test_what_the_plan_gave_is_refused_in_the_plan():
    clinic_file = read_document(USUAL.replace("torch", "window").replace("nobody", "bond"), "clinic.yaml")
    with pytest.raises(Refused, match='no mode "bost"') as refused:
        read_plan(Document.of(edited(PLAN, {"lamp/mode": "bost"}), "plan"), Cards(documents_of(CARDS)), clinic_file)
    assert refused.value.problems[0].place.file == "plan"
