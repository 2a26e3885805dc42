"""Plans and cards that are well formed and cannot be meant are refused at their place, the range named; what is
unusual but possible is answered with a finding."""

from functools import cache

import farside
import pytest
from farside.export.text import as_text
from farside.reading.document import read_document
from farside.reading.problems import Refused
from unit.made import EXAMPLE, example_cards, example_plan

DEEP_BOX = "plans/deep-box.yaml"


@cache
def text_of(path):
    return (EXAMPLE / path).read_text(encoding="utf-8")


def refusal(path, old, new):
    """The problems of the deep box when one text of one file reads otherwise."""
    text = text_of(path)
    assert text.count(old) >= 1
    changed = read_document(text.replace(old, new, 1), path)
    cards = example_cards()
    plan = changed if path.startswith("plans") else example_plan("deep-box")
    kept = [card for card in cards if card["id"] != changed.data.get("id")]
    with pytest.raises(Refused) as refused:
        farside.check(plan, kept if plan is changed else [*kept, changed])
    line = next(number for number, row in enumerate(text.splitlines(), 1) if old.splitlines()[0] in row)
    return refused.value, line


REFUSED = [
    # path, text, what it becomes, what is said
    (DEEP_BOX, "thickness_mm: 2.0", "thickness_mm: -2.0", "increments[0].thickness_mm is -2.0; it must be above 0"),
    (DEEP_BOX, "thickness_mm: 2.0", "thickness_mm: 0", "increments[0].thickness_mm is 0; it must be above 0"),
    (DEEP_BOX, "thickness_mm: 2.0", "thickness_mm: 6.5", "6 mm deep, so it must be above 0 and at most 6"),
    (DEEP_BOX, "gap_mm: 2.3", "gap_mm: -1", "gap_mm is -1"),
    (DEEP_BOX, "time_s: 20", "time_s: 0", "time_s is 0"),
    (DEEP_BOX, "time_s: 20", "time_s: 601", "at most 600"),
    (DEEP_BOX, "width_mm: 4.0", "width_mm: 0", "above 0"),
    (DEEP_BOX, "depth_mm: 6.0", "depth_mm: 600", "at most 20"),
    (DEEP_BOX, "illuminance_lx: 12000", "illuminance_lx: -5", "at least 0"),
    (DEEP_BOX, "operating-light-led", "operating-light-lde", 'did you mean "operating-light-led"'),
    (DEEP_BOX, "side: buccal, tip_distance_mm: 1.0", "side: buccal", "needs its own tip_distance_mm"),
    (DEEP_BOX, "card: chair-2-blue", "card: chair-2-bleu", 'did you mean "chair-2-blue"'),
    (DEEP_BOX, "mode: standard", "mode: standart", 'lamp "chair-2-blue" has no mode "standart"'),
    (DEEP_BOX, "composite: universal-medium", "composite: universal-medum", 'did you mean "universal-medium"'),
    (DEEP_BOX, "card: clinic-adhesive", "card: nobody", "no adhesive card has the id"),
    (DEEP_BOX, '"2026-11-30"', '"2026-02-30"', "2026-02-30"),
    (DEEP_BOX, "kind: plan", "kind: lamp", ""),
    ("lamps/chair-2-blue.yaml", "tip_diameter_mm: 8", "tip_diameter_mm: -8", "tip_diameter_mm is -8"),
    ("lamps/chair-2-blue.yaml", "radiant_exitance_mw_cm2: ", "radiant_exitance_mw_cm2: 40", "at most 10000"),
    ("lamps/chair-2-blue.yaml", "share: 1.0", "share: 0.5", "they must add up to 1"),
    ("composites/universal-medium.yaml", "irradiance_mw_cm2: ", "irradiance_mw_cm2: 40", "at most 10000"),
    ("composites/universal-medium.yaml", "group: medium", "group: meduim", "medium"),
]  # fmt: skip


@pytest.mark.parametrize(
    ("path", "old", "new", "says"), REFUSED, ids=[f"{new} in {path}" for path, _, new, _ in REFUSED]
)
def test_what_cannot_be_meant_is_refused_at_its_line(path, old, new, says):
    refused, line = refusal(path, old, new)
    said = str(refused)
    assert says in said
    assert said.startswith(f"{path}:{line}:")
    assert len(said) < 2000


def test_increments_that_reach_past_the_tip_are_refused_at_the_one_that_does():
    text = text_of(DEEP_BOX).replace("thickness_mm: 2.0", "thickness_mm: 3.0")
    with pytest.raises(Refused) as refused:
        farside.check(read_document(text, "plan.yaml"), example_cards())
    (problem,) = refused.value.problems
    assert problem.message == "the increments reach 9 mm up from the floor, past the lamp's tip at 8.3 mm"
    assert problem.path == ("increments", 2, "thickness_mm")
    assert problem.place.line == [n for n, row in enumerate(text.splitlines(), 1) if "thickness_mm: 3.0" in row][2]


UNUSUAL = [
    ("a millimetre over the top", "thickness_mm: 2.0", "thickness_mm: 2.7", "fill-gap"),
    ("ten minutes of light", "exposures: [{time_s: 20, rest", "exposures: [{time_s: 600, rest", "beyond-model"),
    ("the tip at arm's length", "gap_mm: 2.3", "gap_mm: 40", "beyond-model"),
    ("no dentine left", "remaining_dentine_mm: 2.0", "remaining_dentine_mm: 0", "close-to-pulp"),
    ("a steep tilt", "exposures: [{time_s: 20, rest", "exposures: [{time_s: 20, tilt_deg: 80, rest", "tilt"),
    ("an aim at the next tooth", "exposures: [{time_s: 20, rest", "exposures: [{time_s: 20, aim_offset_mm: 30, rest",
     "far-side-dose"),
    ("a film of composite", "thickness_mm: 2.0", "thickness_mm: 0.01", "beyond-model"),
    ("no exposure at all", "exposures: [{time_s: 20, rest_before_s: 5, air: none}]", "exposures: []",
     "every-increment-exposed"),
    ("sun on the chair", "illuminance_lx: 12000", "illuminance_lx: 200000", "placing-in-window"),
]  # fmt: skip


@pytest.mark.parametrize(("old", "new", "rule"), [entry[1:] for entry in UNUSUAL], ids=[entry[0] for entry in UNUSUAL])
def test_what_is_unusual_is_answered_with_a_finding(old, new, rule):
    text = text_of(DEEP_BOX)
    assert old in text
    report = farside.check(read_document(text.replace(old, new, 1), "plan.yaml"), example_cards())
    assert rule in {finding.rule.id for finding in report.findings if finding.finding != "clear"}


def test_markup_in_titles_stays_text_all_the_way():
    title = '<img src=x onerror="alert(1)">'
    plan = {**example_plan("shallow-clear"), "title": title}
    cards = [{**card, "title": title} for card in example_cards()]
    data = farside.check(plan, cards).as_data()
    assert data["plan"]["title"] == title
    where = [finding["where_says"] for finding in data["findings"] if finding["about"] == "lamp"]
    assert where
    assert all(said == f"lamp {title}" for said in where)


@pytest.mark.parametrize("character", ["\x1b[31m", "\x07", "\x00", "\x9b"])
def test_a_title_that_would_drive_a_terminal_is_refused_and_the_refusal_does_not_drive_it(character):
    with pytest.raises(Refused) as refused:
        farside.check({**example_plan("shallow-clear"), "title": f"A{character}B"}, example_cards())
    assert all(line.isprintable() for line in str(refused.value).splitlines())


def test_a_title_that_turns_the_direction_of_writing_is_printed_as_a_code():
    plan = {**example_plan("shallow-clear"), "title": "A\u202eB"}
    text = as_text(farside.check(plan, example_cards()))
    assert text.startswith("A\\u202eB · for ")
    assert all(line.isprintable() for line in text.splitlines())
