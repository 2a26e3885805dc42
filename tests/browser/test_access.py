"""WCAG 2.2 AA as far as axe can tell, in light and dark, at three sizes; letters, touch, reflow and enlargement."""

import re

import pytest
from axe_playwright_python.sync_playwright import Axe
from browser.the_page import ANSWERED, answered, group, opened
from playwright.sync_api import Browser, BrowserContext, Page, expect

RULES = {"runOnly": ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa", "best-practice"]}
SIZES = {"lying": (1180, 820), "standing": (820, 1180), "telephone": (390, 844), "narrowest": (320, 640)}
WRITTEN = (
    "cautions/",
    "how-to-use/",
    "offline/",
    "rules/",
    "rules/far-side-dose/",
    "quantities/",
    "formats/plan/",
    "sources/",
    "trust/",
)


def sized(browser: Browser, home: str, size: str, look: str = "light") -> Page:
    width, height = SIZES[size]
    scheme = "dark" if look == "dark" else "light"
    context = browser.new_context(viewport={"width": width, "height": height}, color_scheme=scheme)
    page = opened(context, home)
    expect(page.locator("html")).to_have_attribute("data-look", look)
    return page


def faults(page: Page) -> list[str]:
    found = Axe().run(page, options=RULES)
    return [
        f"{each['id']}: {node['target']} {node['failureSummary']}"
        for each in found.response["violations"]
        for node in each["nodes"]
    ]


@pytest.mark.parametrize("look", ["light", "dark"])
@pytest.mark.parametrize("size", ["lying", "standing", "telephone"])
def test_axe_finds_nothing_on_the_page(browser: Browser, home: str, size: str, look: str) -> None:
    page = sized(browser, home, size, look)
    assert faults(page) == []
    for name in ("Cavity, tip", "Lamp", "Adhesive, liner", "Room, team"):
        group(page, name)
        assert faults(page) == [], name
    page.get_by_role("button", name="Plans", exact=True).click()
    assert faults(page) == []
    page.context.close()


@pytest.mark.parametrize("look", ["light", "dark"])
def test_axe_finds_nothing_on_the_written_pages(browser: Browser, home: str, look: str) -> None:
    context = browser.new_context(color_scheme="dark" if look == "dark" else "light")
    page = context.new_page()
    for path in WRITTEN:
        page.goto(home + path)
        assert faults(page) == [], path
    context.close()


@pytest.mark.parametrize("size", SIZES)
def test_nothing_is_wider_than_the_screen(browser: Browser, home: str, size: str) -> None:
    page = sized(browser, home, size)
    assert page.evaluate("document.documentElement.scrollWidth") <= SIZES[size][0]
    page.context.close()


@pytest.mark.parametrize("size", ["lying", "standing", "telephone"])
def test_the_verdict_is_in_sight_without_scrolling(browser: Browser, home: str, size: str) -> None:
    page = sized(browser, home, size)
    expect(page.locator(ANSWERED)).to_be_in_viewport(ratio=1)
    page.context.close()


@pytest.mark.parametrize("size", ["lying", "telephone"])
def test_letters_half_as_large_again_lose_nothing(browser: Browser, home: str, size: str) -> None:
    page = sized(browser, home, size)
    page.evaluate("document.documentElement.style.fontSize = '150%'")
    answered(page)
    assert page.evaluate("document.documentElement.scrollWidth") <= SIZES[size][0]
    cut = page.evaluate(
        """() => [...document.querySelectorAll("button, .tabs button, .verdict, label, h1, h2, h3, p")]
            .filter((element) => element.offsetParent && !element.closest(".unseen, dialog, .gap"))
            .filter((element) => getComputedStyle(element).display !== "inline")
            .filter((element) => element.scrollWidth > element.clientWidth + 1)
            .map((element) => element.outerHTML.slice(0, 80))"""
    )
    assert cut == []
    page.context.close()


def test_what_is_touched_is_large_enough(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    for name in ("Increments", "Cavity, tip", "Lamp", "Adhesive, liner", "Room, team"):
        group(page, name)
        small = page.evaluate(
            """() => [...document.querySelectorAll("button, select, summary, .head a, input:not([type=checkbox])")]
                .filter((element) => !element.closest("dialog"))
                .map((element) => [element, element.getBoundingClientRect()])
                .filter(([, box]) => box.width > 0 && (box.height < 47.5 || box.width < 34))
                .map(([element]) => element.outerHTML.slice(0, 80))"""
        )
        assert small == [], name


def test_body_text_is_15_pixels_or_more(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    small = page.evaluate(
        """() => [...document.querySelectorAll("body *")]
            .filter((element) => !element.closest("svg, .unseen"))
            .filter((element) => [...element.childNodes].some((node) => node.nodeType === 3 && node.data.trim()))
            .filter((element) => parseFloat(getComputedStyle(element).fontSize) < 15)
            .map((element) => element.outerHTML.slice(0, 80))"""
    )
    assert [each for each in small if not each.startswith("<code")] == []


def test_the_verdict_is_announced_politely_and_once(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    live = page.locator('[role="status"][aria-live="polite"]')
    expect(live).to_have_text(re.compile("Do not expose"))


def test_the_look_is_chosen_by_hand_and_kept(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    page.get_by_role("button", name="Light or dark").click()
    expect(page.locator("html")).to_have_attribute("data-look", "dark")
    page.goto(home + "cautions/")
    expect(page.locator("html")).to_have_attribute("data-look", "dark")


def test_drawings_have_words(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    expect(page.get_by_role("table", name="The section as a table")).to_have_count(1)
    expect(page.get_by_role("table", name="The chair clock as a table")).to_have_count(1)
    for number in (1, 2, 3):
        expect(
            page.get_by_role("button", name=re.compile(rf"Increment {number}: far side [\d.]+ of its need"))
        ).to_have_count(1)
