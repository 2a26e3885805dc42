"""The made pages: one for each rule, quantity and format, each saying what its data say and no more."""

import re

import pytest
from farside import shipped
from farside.export.markdown import plain
from farside.export.pages import pages
from farside.export.rule_pages import NO_SOURCE
from farside.protocol.protocol import base_protocol
from farside.protocol.rule import Rule
from farside.quantities.registry import QUANTITIES

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


def test_text_of_the_data_is_text() -> None:
    assert plain("<b>a|b*c_[d](e)") == r"&lt;b&gt;a\|b\*c\_\[d\](e)"


def test_no_page_holds_markup() -> None:
    for name, page in PAGES.items():
        assert not re.search(r"<[a-z/!]", page), name
