"""`farside rules` and `farside schema`: what is listed, shown whole, and readable by other programs."""

import json

import pytest
from farside import shipped
from farside.cli import main
from farside.protocol.protocol import base_protocol
from farside.version import VERSION


def out_of(capsys, *words):
    assert main(list(words)) == 0
    out, err = capsys.readouterr()
    assert err == ""
    return out


def test_rules_lists_every_rule_once_under_its_topic(capsys):
    out = out_of(capsys, "rules")
    base = base_protocol()
    assert out.startswith(f"Protocol base {base.edition} ({base.digest[:8]}): {len(base.rules)} rules\n")
    blocks = [block.splitlines() for block in out.split("\n\n")[1:]]
    listed = {line.split()[0]: topic for topic, *lines in blocks for line in lines}
    assert listed == {rule.id: rule.topic for rule in base.rules}
    assert len([line for _, *lines in blocks for line in lines]) == len(base.rules)


@pytest.mark.parametrize("rule", base_protocol().rules, ids=lambda rule: rule.id)
def test_a_rule_is_shown_with_its_limits_and_what_they_rest_on(capsys, rule):
    out = out_of(capsys, "rules", rule.id)
    assert out.splitlines()[:2] == [f"{rule.id} · {rule.topic} · about each {rule.about}", rule.title]
    assert rule.data["why"] in out
    for limit in rule.limits.values():
        assert f"  {limit.name} = {limit.value} ({limit.strength}" in out
        assert all(source["cite"] in out for source in limit.sources)
    assert (rule.caution or "") in out


def test_rules_as_json_are_the_files(capsys):
    rules = json.loads(out_of(capsys, "rules", "--format", "json"))
    assert rules == [rule.data for rule in base_protocol().rules]
    (one,) = json.loads(out_of(capsys, "rules", "far-side-dose", "--format", "json"))
    assert one["id"] == "far-side-dose"


def test_an_unknown_rule_is_said_on_standard_error(capsys):
    assert main(["rules", "far-side"]) == 2
    out, err = capsys.readouterr()
    assert (out, err) == ("", 'no rule has the id "far-side"; "farside rules" lists them\n')


def test_schema_lists_the_kinds_and_prints_each(capsys):
    kinds = out_of(capsys, "schema").split()
    assert {"plan", "lamp", "composite", "adhesive", "liner", "clinic", "rule", "report"} <= set(kinds)
    for kind in kinds:
        assert json.loads(out_of(capsys, "schema", kind)) == shipped.document(f"schema/v1/{kind}.json").data


def test_the_version(capsys):
    with pytest.raises(SystemExit) as left:
        main(["--version"])
    assert left.value.code == 0
    assert capsys.readouterr().out == f"farside {VERSION}\n"
