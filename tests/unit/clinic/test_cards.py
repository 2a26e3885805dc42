"""Finding cards: by kind and id, in folders or given as data."""

import pytest
from farside.clinic.cards import Cards, card_documents, card_folders, documents_of
from farside.reading.document import Document
from farside.reading.problems import Refused
from unit.made import COMPOSITE, LAMP, PLAN, edited, read

LAMP_TEXT = """\
kind: lamp
id: lamp
title: A lamp
tip_diameter_mm: 8
modes: [{id: "on", bands: [{peak_nm: 460, width_nm: 22, share: 1}]}]
"""


def asked():
    return Document.of(PLAN, "plan")


def write(folder, name, text=LAMP_TEXT):
    folder.mkdir(parents=True, exist_ok=True)
    (folder / name).write_text(text, encoding="utf-8")


def test_two_cards_of_one_id_are_refused_and_both_named():
    with pytest.raises(Refused, match='two lamp cards have the id "lamp": the other is first') as refused:
        Cards([Document.of(LAMP, "first"), Document.of(LAMP, "second")])
    assert refused.value.problems[0].place.file == "second"


def test_one_id_may_serve_two_kinds():
    cards = Cards(documents_of([LAMP, {**COMPOSITE, "id": "lamp"}]))
    assert cards.lamp("lamp", asked(), ()).title == "A lamp"
    assert cards.composite("lamp", asked(), ()).title == "A composite"


def test_other_kinds_are_passed_over():
    cards = Cards(documents_of([PLAN, {"kind": "clinic", "id": "lamp"}, {"some": "thing"}, LAMP]))
    assert cards.lamp("lamp", asked(), ()).id == "lamp"


def test_a_card_is_read_only_when_asked_for():
    broken = {"kind": "lamp", "id": "broken"}
    cards = Cards(documents_of([LAMP, broken]))
    assert cards.lamp("lamp", asked(), ()) is cards.lamp("lamp", asked(), ())
    with pytest.raises(Refused, match='"modes" is missing'):
        cards.lamp("broken", asked(), ())


@pytest.mark.parametrize(
    ("wanted", "says"),
    [("lamb", 'did you mean "lamp"?'), ("something-else", "those at hand are lamp")],
)
def test_an_unknown_card_is_named_with_what_there_is(wanted, says):
    with pytest.raises(Refused, match=f'no lamp card has the id "{wanted}"') as refused:
        read(edited(PLAN, {"lamp/card": wanted}))
    assert says in str(refused.value)
    assert refused.value.problems[0].path == ("lamp", "card")


def test_with_no_card_at_hand_none_is_offered():
    with pytest.raises(Refused, match='no lamp card has the id "lamp"; none is at hand'):
        read(PLAN, cards=())


def test_an_unknown_composite_is_placed_at_its_increment():
    with pytest.raises(Refused, match='did you mean "paste"') as refused:
        read(edited(PLAN, {"increments/0/composite": "past"}))
    assert refused.value.problems[0].path == ("increments", 0, "composite")


def test_folders_are_those_named_then_those_beside_the_plan(tmp_path):
    for folder in ("plans", "lamps", "composites", "liners", "own"):
        (tmp_path / folder).mkdir()
    found = card_folders(tmp_path / "plans" / "a.yaml", [tmp_path / "own"])
    assert [folder.resolve().name for folder in found] == ["own", "plans", "lamps", "composites", "liners"]


def test_a_file_reached_by_two_ways_is_one_card(tmp_path):
    write(tmp_path / "lamps", "a.yaml")
    (tmp_path / "plans").mkdir()
    plan = tmp_path / "plans" / "plan.yaml"
    (tmp_path / "lamps" / "again.yaml").symlink_to(tmp_path / "lamps" / "a.yaml")
    (tmp_path / "linked").symlink_to(tmp_path / "lamps")
    documents = card_documents(card_folders(plan, [tmp_path / "lamps", tmp_path / "linked"]))
    assert len(documents) == 1
    assert Cards(documents).lamp("lamp", asked(), ()).id == "lamp"


def test_a_copy_is_a_second_card(tmp_path):
    write(tmp_path, "a.yaml")
    write(tmp_path, "b.yaml")
    with pytest.raises(Refused, match="two lamp cards"):
        Cards(card_documents([tmp_path]))


def test_the_plan_itself_and_what_is_no_yaml_or_json_are_passed_over(tmp_path):
    write(tmp_path, "plan.yaml", "kind: [")
    write(tmp_path, "notes.txt", "kind: [")
    (tmp_path / "folder.yaml").mkdir()
    (tmp_path / "gone.yaml").symlink_to(tmp_path / "nothing")
    write(tmp_path, "a.yml")
    documents = card_documents([tmp_path], passed_over=tmp_path / "plan.yaml")
    assert [document.name for document in documents] == [str(tmp_path / "a.yml")]


def test_folders_inside_card_folders_are_not_entered(tmp_path):
    write(tmp_path / "inner", "a.yaml")
    assert card_documents([tmp_path]) == []


def test_an_unreadable_file_in_a_card_folder_is_refused_at_its_place(tmp_path):
    write(tmp_path, "a.yaml", "kind: lamp\nid: [a\n")
    with pytest.raises(Refused) as refused:
        card_documents([tmp_path])
    place = refused.value.problems[0].place
    assert place.file == str(tmp_path / "a.yaml")
    assert place.line >= 2


@pytest.mark.outside_browser
def test_a_huge_file_is_refused_without_being_read_whole(tmp_path):
    with (tmp_path / "huge.json").open("wb") as file:
        file.truncate(2**33)  # sparse: 8 GB that no machine here would hold
    with pytest.raises(Refused, match="at most 1000000 are read"):
        card_documents([tmp_path])


@pytest.mark.parametrize("wanted", ["../secret/lamp", "/etc/passwd", "..", "lamp.yaml", "a\\b", "lamp\0"])
def test_a_card_name_cannot_reach_outside(wanted):
    """Such a name is not even a name; and names are looked up among the ids read, never opened."""
    with pytest.raises(Refused) as refused:
        read(edited(PLAN, {"lamp/card": wanted}))
    assert refused.value.problems[0].path[:2] == ("lamp", "card")


def test_a_lamp_outside_the_folders_is_not_found(tmp_path):
    write(tmp_path / "outside", "lamp.yaml")
    (tmp_path / "clinic" / "plans").mkdir(parents=True)
    folders = card_folders(tmp_path / "clinic" / "plans" / "plan.yaml", [])
    with pytest.raises(Refused, match="none is at hand"):
        Cards(card_documents(folders)).lamp("lamp", asked(), ())
