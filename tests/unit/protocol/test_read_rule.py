"""Reading a rule file: the shipped ones hold together, and a slip is refused at its place with the nearest name."""

import pytest
from farside import shipped
from farside.protocol.fields import fields
from farside.protocol.messages import INPUTS
from farside.protocol.protocol import base_protocol
from farside.protocol.read_rule import read_rule
from farside.quantities.registry import visible
from farside.reading.document import read_document
from farside.reading.problems import Refused

SHIPPED = [name for name in shipped.names("base") if name != "base/protocol.yaml"]

RULE = """\
kind: rule
id: made
title: Made for the test
about: increment
applies: {composite.self_cure: {is: false}}
limits:
  need: {value: 1.0, strength: ours, why: for the test}
levels:
  - {finding: stop, when: {all: [{far_dose_ratio: {below: {limit: need}}}, {not: {increment.cover: {one_of: [none]}}}]}}
  - {finding: watch, when: {thickness_mm: {above: {field: composite.cap_mm}}}}
says: "Increment {number} gets {far_dose_ratio}, not {need}; its shade is {composite.shade.group}."
do: "Expose longer."
why: For the test.
examples: [{name: enough, given: {far_dose_ratio: 1.0}, finding: clear}]
"""


def refusal(old, new):
    assert RULE.count(old) >= 1
    with pytest.raises(Refused) as refused:
        read_rule(read_document(RULE.replace(old, new), "made.yaml"), "plan")
    return refused.value.problems


def placed(old, new):
    (problem,) = refusal(old, new)
    return problem.place.line, problem.place.column, problem.message


@pytest.mark.parametrize("name", SHIPPED)
def test_every_shipped_rule_uses_only_names_that_there_are(name):
    topic = name.split("/")[1]
    rule = read_rule(shipped.document(name), topic)
    assert rule == base_protocol().rule(rule.id)


@pytest.mark.parametrize("rule", base_protocol().rules, ids=lambda rule: rule.id)
def test_whatever_a_shipped_rule_may_miss_has_words(rule):
    for test in rule.tests():
        names = [test.name, *(operand.of for operand in test.operands if operand.sort in {"field", "quantity"})]
        for name in names:
            quantity = visible(rule.about).get(name)
            assert set(quantity.reads if quantity else (name,)) <= INPUTS.keys()


@pytest.mark.parametrize("rule", base_protocol().rules, ids=lambda rule: rule.id)
def test_every_limit_of_a_shipped_rule_is_used(rule):
    in_conditions = {operand.of for test in rule.tests() for operand in test.operands if operand.sort == "limit"}
    in_words = {name for name in rule.limits if any(f"{{{name}}}" in words for words in _words(rule))}
    assert rule.limits.keys() <= in_conditions | in_words


def _words(rule):
    return [rule.says, rule.do, *(level.says for level in rule.levels), *(level.do for level in rule.levels)]


def test_the_rule_of_these_tests_is_itself_fine():
    assert read_rule(read_document(RULE, "made.yaml"), "plan").topic == "plan"


def test_an_unknown_quantity_is_refused_with_the_nearest():
    line, column, message = placed("far_dose_ratio: {below", "far_dose_ration: {below")
    assert (line, column) == (9, 1 + RULE.splitlines()[8].index("far_dose_ratio"))
    assert message.startswith('a condition uses "far_dose_ration", which is no quantity or field of increment; did you')
    assert message.endswith('mean "far_dose_ratio"?')


def test_a_name_like_no_other_is_refused_without_a_guess():
    line, _, message = placed("far_dose_ratio: {below", "brightness: {below")
    assert (line, message) == (9, 'a condition uses "brightness", which is no quantity or field of increment')


@pytest.mark.parametrize(
    ("old", "new", "near"),
    [
        ("composite.self_cure", "composite.self_curing", "composite.self_cure"),
        ("increment.cover", "increment.covr", "increment.cover"),
        ("composite.cap_mm", "composite.viscosity", None),
        ("composite.cap_mm", "composite.cap_m", "composite.cap_mm"),
    ],
)
def test_an_unknown_field_is_refused(old, new, near):
    (problem,) = refusal(old, new)
    assert problem.key == ("rule-name-near" if near else "rule-name-unknown")
    assert problem.values["near"] == near
    assert problem.place.line in {5, 9, 10}


def test_what_lies_inside_a_subject_is_none_of_its_names():
    problems = refusal("about: increment", "about: plan")
    assert {problem.values["name"] for problem in problems} == {
        "far_dose_ratio", "increment.cover", "thickness_mm", "composite.self_cure", "composite.cap_mm",
        "composite.shade.group",
    }  # fmt: skip


def test_a_limit_that_is_not_there_is_refused():
    assert placed("limit: need", "limit: needed")[::2] == (
        9,
        'a condition uses the limit "needed", which the rule does not have',
    )


def test_a_word_that_the_field_never_has_is_refused():
    assert placed("one_of: [none]", "one_of: [non]")[::2] == (
        9,
        "increment.cover is never non; it is one of none, strip, glycerine, finished-back",
    )


@pytest.mark.parametrize("word", ["{far_dose}", "{needed}", "{exposure.time_s}"])
def test_a_placeholder_of_nothing_is_refused(word):
    line, _, message = placed("not {need}", f"not {word}")
    assert (line, message) == (11, f'the words use "{word}", which is no quantity, limit or field here')


def test_levels_out_of_order_are_refused():
    turned = RULE.replace("finding: watch", "finding: stop").replace(
        "- {finding: stop, when: {all", "- {finding: revise, when: {all"
    )
    with pytest.raises(Refused, match="levels run from the worst finding down; stop stands below revise") as refused:
        read_rule(read_document(turned, "made.yaml"), "plan")
    assert refused.value.problems[0].place.line == 10


def test_breaking_the_schema_is_said_first():
    (problem,) = refusal("about: increment", "about: increments")
    assert problem.place.line == 4


def test_fields_come_from_the_schemas():
    seen = fields("exposure")
    assert {"exposure.air", "increment.cover", "composite.shade.group", "plan.adhesive.thinned", "lamp.tip.state",
            "adhesive.cure", "composite.optics.provenance", "plan.room.sources"} <= seen.keys()  # fmt: skip
    assert not any(path.startswith(("plan", "increment")) for path in fields("lamp"))
