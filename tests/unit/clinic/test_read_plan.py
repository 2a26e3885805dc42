"""A plan as a record: its lamp's mode, its layers and exposures, its day."""

from datetime import date

import pytest
from farside.reading.problems import Refused
from unit.made import ADHESIVE, CARDS, COMPOSITE, PLAN, edited, read


def test_the_day_is_the_callers_then_the_plans_then_today():
    assert read(PLAN, on=date(2027, 1, 2)).on == date(2027, 1, 2)
    assert read(PLAN).on == date(2026, 11, 30)
    assert abs((read(edited(PLAN, {"on": None})).on - date.today()).days) <= 1


def test_defaults_of_the_schema_are_filled_in():
    exposure = read(PLAN).increments[0].exposures[0]
    assert (exposure.tilt_deg, exposure.aim_offset_mm, exposure.from_side, exposure.through_share) == (0, 0, False, 1)
    assert exposure.fields["from"] == "above"
    assert read(PLAN).fields["perfusion"] == "resting"
    assert read(PLAN).after == ()


def test_nothing_else_has_a_default():
    plan = read(PLAN)
    assert plan.room is None
    assert plan.remaining_dentine_mm is None
    assert plan.adhesive is None
    assert (plan.increments[0].placing_s, plan.increments[0].exposures[0].rest_before_s) == (None, None)
    assert not {"matrix", "site", "team"} & plan.fields.keys()


def test_distances_follow_from_what_is_filled():
    plan = read(edited(PLAN, {"gap_mm": 1.5, "increments": [{"composite": "paste", "thickness_mm": 0.8}] * 2}))
    assert plan.distance_after_mm(-1) == pytest.approx(3.5)
    assert plan.distance_after_mm(0) == pytest.approx(2.7)
    assert plan.distance_after_mm(1) == pytest.approx(1.9)


def test_overlays_multiply_and_an_unknown_one_makes_all_unknown():
    def share(*shares):
        through = [{"what": "ceramic", **({} if s is None else {"transmittance_share": s})} for s in shares]
        return (
            read(edited(PLAN, {"increments/0/exposures/0/through": through})).increments[0].exposures[0].through_share
        )

    assert share(0.5, 0.4) == pytest.approx(0.2)
    assert share(0.5, None) is None
    assert share(0.0) == 0.0


def test_exposures_come_in_the_order_of_the_chair():
    plan = read(
        {
            **PLAN,
            "adhesive": {"card": "bond", "exposures": [{"time_s": 1}]},
            "liner": {"card": "base", "exposures": [{"time_s": 2}]},
            "after": [{"time_s": 5}],
            "increments": [
                {"composite": "paste", "thickness_mm": 1, "exposures": [{"time_s": 3}, {"time_s": 3.5}]},
                {"composite": "paste", "thickness_mm": 1, "exposures": [{"time_s": 4}]},
            ],
        },
        [*CARDS, {**ADHESIVE, "kind": "liner", "id": "base"}],
    )
    assert [exposure.time_s for exposure in plan.exposures()] == [1, 2, 3, 3.5, 4, 5]


def test_composites_are_listed_once_in_placing_order():
    entries = [{"composite": name, "thickness_mm": 0.5} for name in ("other", "paste", "other")]
    plan = read(edited(PLAN, {"increments": entries}), [*CARDS, {**COMPOSITE, "id": "other"}])
    assert [composite.id for composite in plan.composites()] == ["other", "paste"]


def test_room_lights_have_no_filter_unless_they_say_so():
    sources = [{"what": "halogen", "illuminance_lx": 10}, {"what": "window", "illuminance_lx": 5, "filter": "yellow"}]
    assert [light.filter for light in read({**PLAN, "room": {"sources": sources}}).room] == ["none", "yellow"]
    assert read({**PLAN, "room": {"sources": []}}).room == ()
    assert read({**PLAN, "room": {}}).room is None


@pytest.mark.parametrize(
    ("what", "says"), [("halogn", 'did you mean "halogen"?'), ("torch", "those known are operating-light-led, halogen")]
)
def test_a_light_that_no_table_has_is_refused(what, says):
    with pytest.raises(Refused, match=f'no light of a room is called "{what}"') as refused:
        read(
            {
                **PLAN,
                "room": {"sources": [{"what": "window", "illuminance_lx": 1}, {"what": what, "illuminance_lx": 1}]},
            }
        )
    assert says in str(refused.value)
    assert refused.value.problems[0].path == ("room", "sources", 1, "what")


def test_an_unknown_mode_is_named_with_those_there_are():
    with pytest.raises(Refused, match='lamp "lamp" has no mode "boost"; it has on') as refused:
        read(edited(PLAN, {"lamp/mode": "boost"}))
    assert refused.value.problems[0].path == ("lamp", "mode")


def test_another_kind_of_file_is_no_plan():
    with pytest.raises(Refused, match="this is a composite; a plan is needed here"):
        read(COMPOSITE)
