"""The made pages: one for each rule, quantity and format, each saying what its data say and no more."""

import re

import pytest
from farside import shipped
from farside.export.markdown import plain
from farside.export.page_examples import ExampleFails
from farside.export.pages import pages
from farside.export.rule_pages import NO_SOURCE
from farside.export.rule_pages import rule_page as rule_made
from farside.protocol.protocol import base_protocol
from farside.protocol.rule import Rule, rule_of
from farside.quantities.registry import QUANTITIES, visible

RULES = base_protocol().rules
PAGES = pages()


def rule_page(rule: Rule) -> str:
    return PAGES[f"rules/{rule.id}.md"]


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_a_rules_page_gives_everything_of_the_rule(rule: Rule) -> None:
    page = rule_page(rule)
    assert page.startswith(f"# {plain(rule.title)}\n")
    assert plain(rule.data["why"]) in page
    for name, limit in rule.limits.items():
        assert f"| *{plain(name)}* |" in page
        if limit.why:
            assert plain(limit.why) in page
    for level in rule.levels:
        assert re.search(rf"^- \*\*. {level.finding}\*\* where ", page, re.MULTILINE)
    for example in rule.data["examples"]:
        assert f"| {plain(example['name'])} |" in page
    if rule.caution:
        assert plain(rule.caution) in page


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_what_has_no_source_is_said_in_the_first_line(rule: Rule) -> None:
    bare = [limit for limit in rule.limits.values() if limit.strength == "common-practice" and not limit.sources]
    first = rule_page(rule).split("\n")[2].lower()
    unsourced = not rule.limits and rule.strength == "common-practice" and not rule.sources
    assert (NO_SOURCE in first) == bool(bare or unsourced)


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_every_source_is_there_with_its_doi(rule: Rule) -> None:
    for cite in rule.sources:
        doi = shipped.sources()[cite].get("doi")
        assert f"{{: #{cite} }}" in rule_page(rule)
        if doi:
            assert f"(https://doi.org/{doi})" in rule_page(rule)


@pytest.mark.parametrize("rule", RULES, ids=lambda rule: rule.id)
def test_a_rules_page_gives_what_the_rule_reads(rule: Rule) -> None:
    page = rule_page(rule).partition("## What it reads")[2]
    for test in rule.tests():
        quantity = visible(rule.about).get(test.name)
        if quantity is None:
            assert f"[`{test.name}`](../formats/" in page
        else:
            assert f"](../quantities/{quantity.name}.md)" in page
            assert plain(quantity.formula).rstrip(".") in page


def test_an_example_that_gives_another_finding_ends_the_making_of_its_page() -> None:
    rule = base_protocol().rule("close-to-pulp")
    examples = [{"name": "plenty", "given": {"remaining_dentine_mm": 2.0}, "finding": "watch"}]
    with pytest.raises(ExampleFails, match='close-to-pulp: example "plenty" gives clear, not watch'):
        rule_made(rule_of({**rule.data, "examples": examples}, rule.topic))


def test_an_example_says_what_the_engine_says() -> None:
    page = PAGES["rules/close-to-pulp.md"]
    assert "| ◆ revise | 0.4 mm of dentine remains over the pulp. |" in page


def test_a_rules_history_is_told() -> None:
    rule = base_protocol().rule("close-to-pulp")
    history = [{"edition": "2026.1", "says": "Two limits became one."}]
    page = rule_made(rule_of({**rule.data, "history": history}, rule.topic))
    assert "## History\n\n- Edition 2026.1: Two limits became one." in page


def test_rules_about_heat_say_that_none_is_computed() -> None:
    stand_in = [rule for rule in RULES if rule.topic == "heat" and rule.id != "air-spray-safely"]
    assert len(stand_in) > 3
    for rule in stand_in:
        assert re.search(r"No temperature is computed: .* for it\.", rule.data["why"]), rule.id


def test_every_quantity_has_a_page_with_unit_meaning_and_reach() -> None:
    for quantity in QUANTITIES:
        page = PAGES[f"quantities/{quantity.name}.md"]
        assert plain(quantity.means)[1:] in page
        assert "Reach: " in page
        assert f"Unit: {plain(quantity.unit)}" in page


def test_every_format_has_a_page_with_its_keys_described() -> None:
    for name in shipped.names("schema"):
        kind = name.rpartition("/")[2].removesuffix(".json")
        page = PAGES[f"formats/{kind}.md"]
        for key in shipped.schema(kind).get("properties", {}):
            assert re.search(rf"^\| `{key}`( \(required\))? \| [^|]+ \| [^|]*\S[^|]* \|$", page, re.MULTILINE), (
                kind,
                key,
            )


def test_every_source_is_listed_once() -> None:
    headings = re.findall(r"^## .* \{: #(\S+) \}$", PAGES["sources.md"], re.MULTILINE)
    assert headings == list(shipped.sources())


def test_no_line_becomes_a_numbered_list() -> None:
    for name, page in PAGES.items():
        assert not re.search(r"^\d+[.)] ", page, re.MULTILINE), name


def test_text_of_the_data_is_text() -> None:
    assert plain("<b>a|b*c_[d](e)") == r"&lt;b&gt;a\|b\*c\_\[d\](e)"


def test_no_page_holds_markup() -> None:
    for name, page in PAGES.items():
        assert not re.search(r"<(?!br>)[a-z/!]", page), name
