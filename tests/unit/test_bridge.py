"""All that the page may call: an answer to whatever it is sent."""

import json

import farside
import pytest
from farside.bridge import call
from farside.export.yaml_file import as_yaml
from farside.protocol.protocol import base_protocol
from farside.reading.document import read_document
from hypothesis import example as tried
from hypothesis import given
from hypothesis import strategies as st
from unit.made import CARDS, EXAMPLE, PLAN, PLANS, edited, example, example_cards, example_plan


def ask(**request):
    return json.loads(call(json.dumps(request)))


def problem_of(answer):
    assert answer["ok"] is False
    (problem,) = answer["problems"]
    return problem


def test_start_lists_what_the_page_begins_with():
    answer = ask(do="start")
    assert answer["ok"] is True
    assert {plan["name"]: plan["data"] for plan in answer["plans"]} == {name: example_plan(name) for name in PLANS}
    assert sorted(card["id"] for card in answer["cards"]) == sorted(card["id"] for card in example_cards())
    assert answer["clinic"] == example("clinic.yaml")
    assert answer["protocol"] == base_protocol().named()
    assert {rule["id"] for rule in answer["rules"]} == {rule.id for rule in base_protocol().rules}
    assert all(rule["page"] == f"rules/{rule['id']}/" for rule in answer["rules"])
    assert answer["engine"] == farside.VERSION
    assert "Clear never means that it has set." in answer["caution"]


@pytest.mark.parametrize("name", PLANS)
def test_every_plan_of_the_start_is_checked(name):
    start = ask(do="start")
    plan = next(plan["data"] for plan in start["plans"] if plan["name"] == name)
    answer = ask(do="check", plan=plan, cards=start["cards"], clinic=start["clinic"], on=None)
    report = farside.check(plan, example_cards(), clinic=example("clinic.yaml"))
    assert answer["report"] == report.as_data()
    assert len(answer["drawing"]["increments"]) == len(plan["increments"])


def test_check_takes_a_day_and_no_clinic():
    answer = ask(do="check", plan=PLAN, cards=CARDS, clinic=None, on="2026-12-05")
    assert answer["report"]["on"] == "2026-12-05"


def test_a_plan_that_cannot_be_meant_gives_problems_by_path():
    problem = problem_of(ask(do="check", plan=edited(PLAN, {"lamp/mode": "boost"}), cards=CARDS))
    assert problem["path"] == ["lamp", "mode"]
    assert problem["message"] == 'lamp "lamp" has no mode "boost"; it has on'
    assert (problem["line"], problem["shown"]) == (0, f"plan: {problem['message']}")
    answer = ask(do="check", plan=edited(PLAN, {"gap_mm": -1, "increments/0/thickness_mm": "thick"}), cards=CARDS)
    assert [problem["path"] for problem in answer["problems"]] == [["gap_mm"], ["increments", 0, "thickness_mm"]]


def opened(name, text, cards=(), clinic=None):
    return ask(do="open", files=[{"name": name, "text": text}], cards=list(cards), clinic=clinic)


def test_opening_a_good_file_gives_its_data():
    for path in sorted(EXAMPLE.rglob("*.yaml")):
        answer = opened(path.name, path.read_text(encoding="utf-8"), example_cards(), example("clinic.yaml"))
        data = example(path.relative_to(EXAMPLE).as_posix())
        kind = data["kind"] if data["kind"] in {"plan", "clinic"} else "cards"
        nothing = {"ok": True, "plan": None, "cards": [], "clinic": None}
        assert answer == {**nothing, kind: [data] if kind == "cards" else data}


@pytest.mark.parametrize(
    ("text", "line", "says"),
    [
        ("kind: plan\ntitle: [a\n", 2, ""),
        ("kind: plan\ntitle: A\nincrements:\n  - {thicknes_mm: 2.0}\n", 4, 'did you mean "thickness_mm"'),
        ("kind: plam\n", 1, '"plam" is no kind of file that is read here'),
        ("title: A\n", 1, "the file does not say its kind"),
        ("kind: lamp\nkind: plan\n", 2, "kind"),
        ('{"kind": "plan", "gap_mm": NaN}', 1, ""),
        ("", 1, ""),
    ],
)
def test_opening_a_bad_file_gives_placed_problems(text, line, says):
    answer = opened("a.yaml", text)
    assert answer["ok"] is False
    problem = answer["problems"][0]
    assert (problem["file"], problem["line"]) == ("a.yaml", line)
    assert any(says in entry["message"] for entry in answer["problems"])
    assert problem["shown"].startswith("a.yaml")
    assert problem["message"] in problem["shown"]
    assert all(len(entry["shown"]) < 2000 for entry in answer["problems"])


def files(**texts):
    return [{"name": f"{name}.yaml", "text": text} for name, text in texts.items()]


def test_files_opened_together_are_read_against_each_other():
    lamp = next(card for card in CARDS if card["kind"] == "lamp")
    brought = {**lamp, "id": "borrowed", "title": "Borrowed"}
    plan = edited(PLAN, {"lamp/card": "borrowed"})
    answer = ask(do="open", files=files(plan=json.dumps(plan), lamp=json.dumps(brought)), cards=CARDS)
    assert (answer["plan"], answer["cards"]) == (plan, [brought])
    alone = problem_of(ask(do="open", files=files(plan=json.dumps(plan, indent=1)), cards=CARDS))
    assert 'no lamp card has the id "borrowed"' in alone["message"]
    assert (alone["file"], alone["line"] > 1) == ("plan.yaml", True)
    assert '"borrowed"' in alone["text"]


def test_a_card_in_a_file_takes_the_place_of_a_held_one():
    lamp = next(card for card in CARDS if card["kind"] == "lamp")
    answer = ask(do="open", files=files(lamp=json.dumps({**lamp, "title": "Newer"})), cards=CARDS)
    assert answer["cards"][0]["title"] == "Newer"


def test_all_that_is_wrong_with_several_files_is_told_at_once():
    plan = json.dumps(PLAN)
    answer = ask(do="open", files=files(a=plan, b=plan, c="kind: rule\n", d="kind: lamp\nid: d\n"), cards=CARDS)
    assert answer["ok"] is False
    told = {problem["file"]: problem["message"] for problem in answer["problems"]}
    assert set(told) == {"b.yaml", "c.yaml", "d.yaml"}
    assert told["b.yaml"] == "a second plan among the files; open one plan at a time, with as many cards as it needs"
    assert told["c.yaml"].startswith("a rule cannot be opened here")


@pytest.mark.parametrize("data", [PLAN, *CARDS, *map(example_plan, PLANS), *example_cards()], ids=lambda d: d["title"])
def test_what_is_written_is_read_back_as_it_was(data):
    text = ask(do="write", data=data)["text"]
    answer = opened("written.yaml", text, [*CARDS, *example_cards()], example("clinic.yaml"))
    assert answer["plan"] == data if data["kind"] == "plan" else answer["cards"] == [data]


@pytest.mark.parametrize("title", ["no", "12:30", "1e-3", "2026-11-30", "a: b", "# c", "- d", "Zähne 歯", "{x}", "'"])
def test_titles_that_yaml_could_take_for_something_else_come_back(title):
    text = ask(do="write", data={**PLAN, "title": title})["text"]
    assert opened("written.yaml", text, CARDS)["plan"]["title"] == title


@given(st.text(st.characters(codec="utf-8", exclude_categories=["Cc", "Cs"]), min_size=1, max_size=12))
@tried("0x1F")
@tried(".inf")
@tried("9" * 101)
def test_any_text_that_a_file_may_hold_comes_back(text):
    found = read_document(as_yaml({"title": text, "list": [text, 1e-5, 1e20, True, None]}), "a.yaml").data
    assert found == {"title": text, "list": [text, 1e-5, 1e20, True, None]}


@pytest.mark.parametrize("depth", [98, 99])
def test_a_request_is_nested_at_most_100_deep(depth):
    answer = json.loads(call(f'{{"do": "write", "data": {"[" * depth}"]]]"{"]" * depth}}}'))
    assert answer["ok"] is True
    deeper = json.loads(call(f'{{"do": "write", "data": {"[" * 100}{"]" * 100}}}'))
    assert deeper == {"ok": False, "fault": "ValueError: a request is nested at most 100 deep"}


JSON = st.recursive(
    st.one_of(st.none(), st.booleans(), st.integers(-10, 10**20), st.floats(), st.text(max_size=5)),
    lambda inner: st.one_of(st.lists(inner, max_size=3), st.dictionaries(st.text(max_size=5), inner, max_size=3)),
    max_leaves=6,
)
REQUESTS = st.fixed_dictionaries(
    {"do": st.one_of(st.sampled_from(["start", "check", "open", "write"]), JSON)},
    optional={"plan": JSON, "cards": JSON, "clinic": JSON, "on": JSON, "files": JSON, "data": JSON},
)


def answers(text):
    answer = json.loads(call(text).encode("utf-8"))
    assert isinstance(answer["ok"], bool)
    if not answer["ok"]:
        assert ("problems" in answer) != ("fault" in answer)


@given(st.text())
@tried("")
@tried("[" * 100_000)
@tried('{"do": "write", "data": ' + "[" * 900 + "]" * 900 + "}")
@tried('{"do": "write", "data": {"a": ' + "9" * 5000 + "}}")
@tried('{"do": "open", "files": [{"name": "\\ud800", "text": "a: 1"}]}')
@tried('{"do": "write", "data": {"a": "\\ud800"}}')
@tried('{"do": "\\ud800"}')
def test_whatever_text_it_gets_it_answers(text):
    answers(text)


@given(REQUESTS)
def test_whatever_is_asked_it_answers(request):
    answers(json.dumps(request))


PARTS = st.sampled_from(["kind", "lamp", "lamp/card", "cavity", "cavity/depth_mm", "gap_mm", "increments", "title",
                         "increments/0", "increments/0/composite", "increments/0/exposures",
                         "increments/0/exposures/0", "increments/0/exposures/0/time_s"])  # fmt: skip


@given(PARTS, JSON)
def test_a_plan_damaged_anywhere_is_answered_in_words(part, value):
    answer = ask(do="check", plan=edited(PLAN, {part: value}), cards=CARDS)
    assert "fault" not in answer
