"""Every reader and the bridge, given shipped files that were damaged: kept or refused at a place, and never a fault."""

import copy
import json

import pytest
from farside import bridge, shipped
from farside.clinic.cards import CARD_KINDS, read_card
from farside.clinic.reading import checked
from farside.export.yaml_file import as_yaml
from farside.protocol.examples import outcome
from farside.protocol.protocol import base_protocol
from farside.protocol.read_rule import read_rule
from farside.reading.document import Document, read_document
from farside.reading.problems import Refused
from farside.reading.schema import check_schema
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st
from unit.made import PLANS, example, example_cards, example_plan

CARDS = example_cards()
CLINIC = example("clinic.yaml")
RULES = [copy.deepcopy(dict(rule.data)) for rule in base_protocol().rules]
TABLES = [shipped.document(name).data for name in shipped.names("tables")]
SOURCES = shipped.document("sources.yaml").data
PROTOCOL = {
    "kind": "protocol",
    "id": "invented",
    "title": "Invented for a test",
    "edition": "1",
    "stands_on": {"base": "2026.1", "protocols": []},
}

WORDS = [
    "",
    "no",
    "not-used",
    "2,5",
    "20 s",
    "always",
    "chair-2-blue",
    "universal-medium",
    "side",
    "<b>",
    "\u202ex",
    "{x}",
]
NUMBERS = [0, -1, 0.5, 1, 2.0, 21, 600, 1e-9, 1e9, 10**20, -1e300, 5e-324]
LEAVES = st.sampled_from([None, True, False, *NUMBERS, *WORDS]) | st.floats(-1e3, 1e3) | st.text(max_size=8)
KEYS = st.sampled_from(["kind", "id", "time_s", "exposures", "readings", "composite", "all", "not", "limit", "x", "<<"])
VALUES = st.recursive(
    LEAVES,
    lambda inner: st.lists(inner, max_size=3) | st.dictionaries(KEYS, inner, max_size=3),
    max_leaves=6,
)


def paths_of(value, path=()):
    parts = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    for key, part in parts:
        yield (*path, key)
        yield from paths_of(part, (*path, key))


@st.composite
def damaged(draw, of, most=3):
    """One of some files' data, up to three values of it exchanged, doubled, taken out or put in."""
    data = copy.deepcopy(draw(of if isinstance(of, st.SearchStrategy) else st.sampled_from(of)))
    for _ in range(draw(st.integers(0, most))):
        paths = sorted(paths_of(data), key=str)
        if not paths:
            break
        path = draw(st.sampled_from(paths))
        holds = data
        for step in path[:-1]:
            holds = holds[step]
        what = draw(st.sampled_from(["exchange", "exchange", "take out", "double", "put in"]))
        if what == "take out":
            del holds[path[-1]]
        elif what == "double" and isinstance(holds, list):
            holds.append(copy.deepcopy(holds[path[-1]]))
        elif what == "put in" and isinstance(holds, dict):
            holds[draw(KEYS)] = draw(VALUES)
        else:
            holds[path[-1]] = draw(VALUES)
    return data


def placed(refused, name):
    """A refusal whose every problem has a place in a file, and which can be printed."""
    assert refused.problems
    for problem in refused.problems:
        assert problem.place.file == name
        assert problem.message.isprintable()
    assert len(str(refused)) < 2_000


def both_ways(data):
    """Data as a program gives it and as its file is read; where no file could hold it, neither."""
    try:
        return [Document.of(data, "given"), read_document(json.dumps(data), "given")]
    except Refused as refused:
        placed(refused, "given")
        return []


@given(damaged(CARDS))
def test_a_card(data):
    for document in both_ways(data):
        try:
            checked(document)
            if document.data["kind"] in CARD_KINDS:
                read_card(document)
        except Refused as refused:
            placed(refused, "given")


@given(damaged([CLINIC, PROTOCOL, example_plan("deep-box")]))
def test_a_clinic_protocol_or_plan_by_itself(data):
    for document in both_ways(data):
        try:
            checked(document)
        except Refused as refused:
            placed(refused, "given")


@given(damaged(RULES))
def test_a_rule_and_its_examples(data):
    for document in both_ways(data):
        try:
            rule = read_rule(document, "light-dose")
        except Refused as refused:
            placed(refused, "given")
        else:
            for example in rule.data["examples"]:
                outcome(rule, example["given"])


@given(damaged([SOURCES, *TABLES]))
def test_sources_and_tables(data):
    for document in both_ways(data):
        kind = "sources" if data.get("kind") == "sources" else "table"
        try:
            check_schema(document, shipped.schema(kind), shipped.schemas().values())
        except Refused as refused:
            placed(refused, "given")


@settings(suppress_health_check=[HealthCheck.too_slow, HealthCheck.data_too_large])
@given(
    damaged([example_plan(plan) for plan in PLANS]),
    st.lists(damaged(CARDS, most=1), max_size=2),
    st.none() | damaged([CLINIC]),
)
def test_a_check(plan, changed, clinic):
    """Whatever is in the plan, its cards and the usual values: a report that JSON can hold, or a refusal."""
    ids = {(str(card.get("kind")), str(card.get("id"))) for card in changed}
    cards = [*changed, *(card for card in CARDS if (card["kind"], card["id"]) not in ids)]
    request = {"do": "check", "plan": plan, "cards": cards, "clinic": clinic, "on": "2026-11-30"}
    answer = json.loads(bridge.call(json.dumps(request)))
    assert "fault" not in answer
    if not answer["ok"]:
        assert all(problem["message"].isprintable() and problem["file"] for problem in answer["problems"])


@given(
    st.lists(
        st.tuples(st.sampled_from(["a.yaml", "b.json", "\ud83d"]), damaged([*CARDS, CLINIC, PROTOCOL])), max_size=3
    )
)
def test_opening_files(files):
    given_files = [{"name": name, "text": json.dumps(data)} for name, data in files]
    answer = json.loads(bridge.call(json.dumps({"do": "open", "files": given_files, "cards": CARDS, "clinic": CLINIC})))
    assert "fault" not in answer
    for problem in answer.get("problems", ()):
        assert problem["line"] >= 1
        assert problem["column"] >= 1
        assert problem["text"]


@given(damaged([example_plan(plan) for plan in PLANS], most=1), st.text(max_size=30))
def test_what_is_written_opens_as_it_was(plan, title):
    """A plan through the bridge's writing and opening, and through JSON, is the plan that it was."""
    plan["title"] = title
    request = {"do": "open", "files": [{"name": "a.json", "text": json.dumps(plan)}], "cards": CARDS, "clinic": CLINIC}
    opened = json.loads(bridge.call(json.dumps(request)))
    if opened["ok"]:
        assert opened["plan"] == plan
        written = json.loads(bridge.call(json.dumps({"do": "write", "data": plan})))
        request["files"] = [{"name": "a.yaml", "text": written["text"]}]
        assert json.loads(bridge.call(json.dumps(request)))["plan"] == plan


TEXTS = st.text(
    st.characters(exclude_categories=["Cc", "Cs"], exclude_characters="\ufeff\ufffe\uffff")
) | st.sampled_from(
    [
        "no",
        "1e-3",
        "0o7",
        "~",
        ".inf",
        "2026-11-30",
        "12:30",
        "- a",
        "a: b",
        "#",
        " a ",
        "'",
        '"',
        "a\nb",
        "<<",
        "=",
        "%a",
    ]
)
NUMBERS_OF_ANY_SIZE = st.integers(-(10**30), 10**30) | st.floats(allow_nan=False, allow_infinity=False)
DATA = st.recursive(
    st.none() | st.booleans() | NUMBERS_OF_ANY_SIZE | TEXTS,
    lambda inner: st.lists(inner, max_size=4) | st.dictionaries(TEXTS, inner, max_size=4),
    max_leaves=10,
)


@given(st.dictionaries(TEXTS, DATA, min_size=1, max_size=4))
def test_what_yaml_writes_is_read_back(data):
    assert read_document(as_yaml(data), "a.yaml").data == data
    assert read_document(json.dumps(data), "a.json").data == data


REQUESTS = st.one_of(
    st.text(max_size=40),
    VALUES.map(json.dumps),
    st.fixed_dictionaries(
        {"do": st.sampled_from(["start", "check", "open", "write", "x", None, 1])},
        optional=dict.fromkeys(("plan", "cards", "clinic", "on", "files", "data"), VALUES),
    ).map(json.dumps),
    st.integers(90, 3_000).map(lambda depth: "[" * depth),
)


@given(REQUESTS)
def test_any_request_is_answered(text):
    """What the page would never ask is still answered in JSON, with what was wrong."""
    answer = json.loads(bridge.call(text))
    assert answer["ok"] or answer.get("problems") or answer["fault"]


@pytest.mark.parametrize("kind", ["plan", "lamp", "composite", "adhesive", "liner", "clinic", "rule", "protocol"])
def test_a_file_of_every_kind_is_tried_here(kind):
    tried = [*CARDS, CLINIC, PROTOCOL, *RULES, example_plan("deep-box")]
    assert kind in {data["kind"] for data in tried}
