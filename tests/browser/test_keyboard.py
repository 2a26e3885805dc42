"""The whole of the page with the keyboard alone, and the focus in sight all the while."""

from browser.the_page import answered, number, opened
from playwright.sync_api import BrowserContext, Page, expect

FOCUSED = """() => {
    const element = document.activeElement;
    const box = element.getBoundingClientRect();
    const style = getComputedStyle(element);
    const edge = element.querySelector?.(".increment-edge");
    const seen = style.outlineStyle !== "none" || (edge && getComputedStyle(edge).strokeWidth === "5px")
        || element.closest(".button")?.matches(":focus-within");
    return {
        body: element === document.body,
        name: element.getAttribute("aria-label") || element.innerText || element.id || element.tagName,
        outlined: Boolean(seen), inside: box.top >= -1 && box.bottom <= innerHeight + 1,
    };
}"""


def tab_to(page: Page, name: str, most: int = 80) -> None:
    """Presses Tab until something of that name has the focus."""
    for _ in range(most):
        page.keyboard.press("Tab")
        if page.evaluate(FOCUSED)["name"].startswith(name):
            return
    raise AssertionError(f"{name} was not reached")


def test_every_stop_is_seen_and_the_round_ends(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    names = []
    for _ in range(120):
        page.keyboard.press("Tab")
        stop = page.evaluate(FOCUSED)
        if stop["body"]:
            break
        assert stop["outlined"], stop
        assert stop["inside"], stop
        names.append(stop["name"])
    else:
        raise AssertionError("the focus never came round")
    assert {"Plans", "Help", "Add", "Copy", "Remove"} <= set(names)


def test_a_plan_is_changed_and_judged_without_a_pointer(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    tab_to(page, "Increment 1")
    page.keyboard.press("Enter")
    tab_to(page, "increments-0-exposures-0-time_s")
    for _ in range(4):
        page.keyboard.press("ArrowUp")
    expect(number(page, "Exposure (s)")).to_have_value("40")
    expect(page.locator(".verdict.stop")).to_have_count(0)


def test_the_drawing_is_reached_and_chooses(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    page.locator('.increment[data-number="1"]').focus()
    page.locator('.increment[data-number="2"]').focus()
    page.keyboard.press("Enter")
    expect(page.locator(".pick").nth(1)).to_have_attribute("aria-pressed", "true")
    expect(page.locator('.increment[data-number="2"]')).to_be_focused()


def test_groups_turn_with_the_arrows(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    page.get_by_role("tab", name="Increments").focus()
    page.keyboard.press("ArrowRight")
    expect(page.get_by_role("tab", name="Cavity, tip")).to_be_focused()
    expect(number(page, "Depth (mm)")).to_be_visible()
    page.keyboard.press("ArrowLeft")
    page.keyboard.press("ArrowLeft")
    expect(page.get_by_role("tab", name="Room, team")).to_be_focused()


def test_the_dialog_opens_closes_and_gives_the_focus_back(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    tab_to(page, "Plans")
    page.keyboard.press("Enter")
    expect(page.locator("dialog[open]")).to_be_visible()
    page.keyboard.press("Escape")
    expect(page.locator("dialog[open]")).to_have_count(0)
    expect(page.get_by_role("button", name="Plans", exact=True)).to_be_focused()


def test_the_verdict_leads_to_the_findings(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    tab_to(page, "Do not expose")
    page.keyboard.press("Enter")
    expect(page.locator("#findings")).to_be_focused()
    answered(page)
