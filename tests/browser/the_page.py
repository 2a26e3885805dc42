"""The front page as a person meets it: opened, answered, its fields by their labels."""

import re

from playwright.sync_api import BrowserContext, Locator, Page, expect

ANSWERED = ".verdict:not(.busy):not(.none)"


def opened(context: BrowserContext, home: str) -> Page:
    """The page with its first verdict, without waiting for the site to be kept."""
    page = context.new_page()
    page.goto(home)
    answered(page)
    return page


def answered(page: Page) -> Locator:
    """The verdict, once it is of the plan as it stands."""
    verdict = page.locator(ANSWERED)
    expect(verdict).to_be_visible()
    return verdict


def number(page: Page, label: str) -> Locator:
    """The first field of that label."""
    return page.get_by_role("textbox", name=label, exact=True).first


def group(page: Page, name: str) -> None:
    """Opens one group of fields."""
    page.get_by_role("tab", name=name).click()


def example(page: Page, title: str) -> None:
    """Opens one of the example clinic's plans."""
    page.get_by_role("button", name="Plans", exact=True).click()
    page.get_by_role("button", name=title).click()
    expect(page.get_by_role("heading", level=1)).to_have_text(title)
    answered(page)


def far_side(page: Page, increment: int) -> float:
    """The share of need at an increment's far side, as the drawing's own table says it."""
    row = page.locator(".section table tbody tr").nth(increment - 1)
    return float(row.locator("td").nth(2).inner_text())


def shown_rules(page: Page) -> list[str]:
    """The ids of the rules whose findings are shown, in order, the clear ones left out."""
    links = page.locator(".finding .rule").all()
    return [re.sub(r".*rules/([^/]+)/.*", r"\1", link.get_attribute("href") or "") for link in links]
