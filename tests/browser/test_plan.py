"""A plan on the page: built, changed, drawn, judged, printed, kept."""

import re

import yaml
from browser.the_page import answered, example, far_side, group, number, opened, shown_rules
from making.places import TOP
from playwright.sync_api import BrowserContext, Page, expect


def test_the_deep_box_is_stopped_and_says_why(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    expect(page.locator(".verdict.stop")).to_have_text(re.compile("increment 1"))
    assert shown_rules(page)[0] == "far-side-dose"
    worst = page.locator(".finding").first
    expect(worst.locator(".ruler svg")).to_have_attribute("aria-label", re.compile(r"Stop below 0\.8"))
    assert far_side(page, 1) < 0.8


def test_a_longer_exposure_changes_the_verdict(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    before = far_side(page, 1)
    number(page, "Exposure (s)").fill("40")
    expect(page.locator(".verdict.stop")).to_have_count(0)
    answered(page)
    assert far_side(page, 1) > 1.9 * before


def test_the_shallow_plan_is_clear(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    example(page, "Upper premolar, shallow occlusal")
    expect(page.locator(".verdict.clear")).to_be_visible()
    assert shown_rules(page) == []
    page.locator(".clear-ones summary").click()
    assert page.locator(".clear-ones li").count() > 10


def test_a_decimal_comma_is_a_number_and_nonsense_is_refused(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    thickness = number(page, "Thickness (mm)")
    thickness.fill("1,5")
    answered(page)
    expect(page.locator(".section table tbody tr").first.locator("td").first).to_have_text("4.5")
    for nonsense in ("abc", "1,500.2", "2 mm", "1e3", "-1", "400", ""):
        thickness.fill(nonsense)
        expect(thickness).to_have_attribute("aria-invalid", "true")
        expect(page.locator(".fault").first).to_be_visible()
    answered(page)
    expect(page.locator(".section table tbody tr").first.locator("td").first).to_have_text("4.5")
    thickness.fill("2")
    expect(thickness).to_have_attribute("aria-invalid", "false")


def test_increments_are_added_copied_moved_and_removed(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    picks = page.locator(".pick")
    number(page, "Thickness (mm)").fill("1")
    page.get_by_role("button", name="Copy").click()
    expect(picks).to_have_count(4)
    expect(number(page, "Thickness (mm)")).to_have_value("1")
    page.get_by_role("button", name="Move towards the opening").click()
    expect(picks.nth(2)).to_have_attribute("aria-pressed", "true")
    picks.nth(1).click()
    expect(number(page, "Thickness (mm)")).to_have_value("2")
    page.get_by_role("button", name="Remove", exact=True).first.click()
    expect(picks).to_have_count(3)
    page.get_by_role("button", name="Add", exact=True).click()
    expect(picks).to_have_count(4)
    for _ in range(3):
        page.get_by_role("button", name="Undo").click()
    expect(picks).to_have_count(4)
    page.get_by_role("button", name="Undo").click()
    expect(picks).to_have_count(3)
    page.get_by_role("button", name="Redo").click()
    expect(picks).to_have_count(4)


def test_an_increment_is_chosen_in_the_drawing(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    page.locator('.increment[data-number="3"]').click()
    expect(page.locator(".pick").nth(2)).to_have_attribute("aria-pressed", "true")


def test_the_drawing_is_to_scale(context: BrowserContext, home: str) -> None:
    """One scale both ways: the box 4 mm wide and 6 mm deep, the tip 8 mm across, on a grid of 1 mm."""
    page = opened(context, home)
    edges = [page.locator(f'.increment[data-number="{each}"] .increment-edge') for each in (1, 2, 3)]
    sizes = [(float(edge.get_attribute("width") or 0), float(edge.get_attribute("height") or 0)) for edge in edges]
    per_mm = sizes[0][0] / 4
    assert all(abs(height - 2 * per_mm) < 0.01 for _, height in sizes)
    grid = page.locator("#grid")
    assert abs(float(grid.get_attribute("width") or 0) - per_mm) < 0.01
    face = page.locator(".tip-face").bounding_box()
    assert face is not None
    assert abs(face["width"] - 8 * per_mm) < 0.5


def test_what_cannot_be_checked_is_said_beside_the_field(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    number(page, "Thickness (mm)").fill("15")
    expect(page.locator(".refusal")).to_be_visible()
    expect(page.locator(".verdict")).to_contain_text("Not checked")
    expect(page.locator(".section.stale")).to_be_visible()
    number(page, "Thickness (mm)").fill("2")
    expect(page.locator(".refusal")).to_have_count(0)
    answered(page)


def test_a_missing_answer_is_open(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    group(page, "Cavity, tip")
    number(page, "Dentine left (mm)").fill("")
    expect(page.locator(".finding.open").filter(has=page.locator('a[href="rules/close-to-pulp/"]'))).to_be_visible()
    answered(page)
    expect(page.locator(".pulp.unknown")).to_have_count(1)


def test_lamp_composite_and_adhesive_come_from_cards(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    before = far_side(page, 1)
    page.get_by_label("Composite").select_option(label="Universal, dark")
    answered(page)
    assert far_side(page, 1) != before
    group(page, "Lamp")
    page.locator("#lamp-card").select_option("drawer-spare")
    answered(page)
    expect(page.locator(".head")).to_contain_text("The spare in the drawer")
    group(page, "Adhesive, liner")
    page.locator("#adhesive-card").select_option("not-used")
    answered(page)
    expect(page.get_by_label("Thinned")).to_have_count(0)


def test_the_rooms_lights_are_those_of_the_table(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    group(page, "Room, team")
    offered = [
        option.get_attribute("value") for option in page.get_by_label("What", exact=True).first.locator("option").all()
    ]
    table = yaml.safe_load((TOP / "rules" / "tables" / "room-lights.yaml").read_text())
    assert offered == [row["id"] for row in table["rows"]]


def test_each_finding_leads_to_its_rule_and_source(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    page.locator(".finding .rule").first.click()
    expect(page.get_by_role("heading", level=1)).to_contain_text("far side")
    expect(page.get_by_role("heading", name="Sources")).to_be_visible()
    expect(page.locator('a[href^="https://doi.org/"]').first).to_be_visible()


def test_the_plan_is_kept_for_the_next_visit(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    number(page, "Exposure (s)").fill("35")
    answered(page)
    page.reload()
    answered(page)
    expect(number(page, "Exposure (s)")).to_have_value("35")


def test_what_is_kept_can_be_forgotten(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    number(page, "Exposure (s)").fill("35")
    answered(page)
    page.get_by_role("button", name="Plans", exact=True).click()
    page.get_by_role("button", name="Forget what this device keeps").click()
    answered(page)
    expect(number(page, "Exposure (s)")).to_have_value("20")


def test_a_new_plan_takes_the_clinics_usual_values(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    page.get_by_role("button", name="Plans", exact=True).click()
    page.get_by_role("button", name="New plan").click()
    expect(page.get_by_role("heading", level=1)).to_have_text("New plan")
    answered(page)
    expect(page.get_by_label("Composite").locator("option:checked")).to_contain_text("(usual)")
    group(page, "Lamp")
    expect(page.locator("#lamp-card")).to_have_value("chair-2-blue")


def test_the_form_does_not_wait_for_the_engine(context: BrowserContext, home: str) -> None:
    page = context.new_page()
    page.route("**/worker.js", lambda _: None)
    page.goto(home)
    number(page, "Thickness (mm)").fill("1.5")
    expect(page.locator("progress")).to_be_visible()
    page.get_by_role("button", name="Copy").click()
    expect(page.locator(".pick")).to_have_count(3)


def test_only_the_newest_question_is_answered(context: BrowserContext, home: str) -> None:
    """Twenty changes in a row: the verdict at rest is of the last one."""
    page = opened(context, home)
    exposure = number(page, "Exposure (s)")
    for seconds in range(20, 40):
        exposure.fill(str(seconds))
    expect(page.locator(".verdict.busy")).to_have_count(0)
    quick = far_side(page, 1)
    page.reload()
    answered(page)
    assert far_side(page, 1) == quick


def test_paper_holds_the_verdict_and_the_findings(page: Page) -> None:
    page.emulate_media(media="print")
    expect(page.locator(".verdict")).to_be_visible()
    expect(page.locator(".finding").first).to_be_visible()
    expect(page.locator(".foot")).to_be_visible()
    expect(page.locator(".panels")).to_be_hidden()


def test_what_the_cards_leave_open_is_said_once_and_folded(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    standing = page.locator(".standing-ones")
    sentence = standing.get_by_text("Assumed: how Universal, medium passes light.")
    expect(sentence).to_have_count(1)
    expect(sentence).to_be_hidden()
    standing.locator("summary").first.click()
    expect(sentence).to_be_visible()
    expect(standing.locator(".do")).to_have_text(re.compile("Measure one disc"))
