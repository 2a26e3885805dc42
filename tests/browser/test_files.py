"""Files on the page: opened together, saved, refused with a place; what was open stays as it was."""

import json
from pathlib import Path
from typing import Any

import pytest
import yaml
from browser.the_page import answered, example, far_side, number, opened
from making.places import TOP
from playwright.sync_api import BrowserContext, Page, expect

EXAMPLES = TOP / "rules" / "example-clinic"
MARKUP = '<img src=x onerror="document.title=1"><b>bold</b>'


def choose(page: Page, *files: tuple[str, bytes]) -> None:
    """Opens the dialog and chooses files by name and content."""
    if page.locator("dialog[open]").count() == 0:
        page.get_by_role("button", name="Plans", exact=True).click()
    chosen: list[Any] = [{"name": name, "mimeType": "application/yaml", "buffer": content} for name, content in files]
    page.locator("input[type=file]").set_input_files(chosen)


def plan(**changes: Any) -> bytes:
    """The shallow example with some keys changed."""
    data = yaml.safe_load((EXAMPLES / "plans" / "shallow-clear.yaml").read_text())
    return yaml.safe_dump({**data, **changes}, allow_unicode=True).encode()


BROKEN = {
    "not YAML": (b"kind: plan\ntitle: [", "2:"),
    "an unknown key": (plan(thicknes_mm=2), "thicknes_mm"),
    "a key twice": (b"kind: plan\ntitle: A\ntitle: B\nincrements: [{thickness_mm: 1}]\n", "title"),
    "negative": (plan(gap_mm=-1), "gap_mm"),
    "not a number": (plan(gap_mm=float("nan")), "gap_mm"),
    "a word for a number": (plan(gap_mm="two"), "gap_mm"),
    "too large": (b"kind: plan\ntitle: x\n# " + b"x" * 1_100_000, "bad.yaml"),
    "not text": (b"kind: plan\ntitle: \xff\xfe\n", "UTF-8"),
    "a lamp nobody has": (plan(lamp={"card": "nowhere", "mode": "standard", "sleeve": "fitted"}), "nowhere"),
    "a path for a card": (plan(lamp={"card": "../../etc/passwd", "mode": "a", "sleeve": "none"}), "card"),
    "another kind": (b"kind: cooking\ntitle: x\n", "cooking"),
}


@pytest.mark.parametrize("what", BROKEN)
def test_a_bad_file_is_refused_with_its_place(context: BrowserContext, home: str, what: str) -> None:
    content, named = BROKEN[what]
    page = opened(context, home)
    share = far_side(page, 1)
    choose(page, ("bad.yaml", content))
    refusal = page.locator("dialog .refusal")
    expect(refusal).to_be_visible()
    expect(refusal).to_contain_text(named)
    assert len(refusal.inner_text()) < 2500
    page.get_by_role("button", name="Close").click()
    expect(page.get_by_role("heading", level=1)).to_have_text("Lower molar, mesial box")
    answered(page)
    assert far_side(page, 1) == share


def test_markup_in_a_title_is_text(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    choose(page, ("plan.yaml", plan(title=MARKUP)))
    page.get_by_role("button", name="Close").click()
    expect(page.get_by_role("heading", level=1)).to_have_text(MARKUP)
    answered(page)
    assert page.locator("h1 *").count() == 0
    assert page.title() != "1"


def test_markup_in_a_refused_file_is_text(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    choose(page, ("<b>bad.yaml", f"kind: plan\ntitle: x\n{MARKUP}: 1\nincrements: []\n".encode()))
    expect(page.locator("dialog .refusal pre").first).to_contain_text("onerror")
    assert page.locator("dialog .refusal img, dialog .refusal b").count() == 0


def test_a_plan_opens_with_its_own_cards(context: BrowserContext, home: str) -> None:
    lamp = yaml.safe_load((EXAMPLES / "lamps" / "chair-2-blue.yaml").read_text())
    lamp |= {"id": "borrowed", "title": "Borrowed lamp"}
    own = plan(title="With its lamp", lamp={"card": "borrowed", "mode": "standard", "sleeve": "fitted"})
    page = opened(context, home)
    choose(page, ("own.yaml", own), ("lamp.json", json.dumps(lamp).encode()))
    expect(page.locator(".opened")).to_contain_text("own.yaml, lamp.json")
    page.get_by_role("button", name="Close").click()
    expect(page.locator(".head")).to_contain_text("Borrowed lamp")
    answered(page)
    page.reload()
    answered(page)
    expect(page.locator(".head")).to_contain_text("Borrowed lamp")


def test_one_bad_file_of_several_opens_none(context: BrowserContext, home: str) -> None:
    page = opened(context, home)
    choose(page, ("good.yaml", plan(title="Good")), ("bad.yaml", b"kind: ["))
    expect(page.locator("dialog .refusal")).to_contain_text("bad.yaml")
    page.get_by_role("button", name="Close").click()
    expect(page.get_by_role("heading", level=1)).to_have_text("Lower molar, mesial box")


def test_a_saved_plan_opens_again_as_it_was(context: BrowserContext, home: str, tmp_path: Path) -> None:
    page = opened(context, home)
    number(page, "Exposure (s)").fill("33")
    answered(page)
    page.get_by_role("button", name="Plans", exact=True).click()
    with page.expect_download() as download:
        page.get_by_role("button", name="Save this plan as a file").click()
    saved = tmp_path / download.value.suggested_filename
    download.value.save_as(saved)
    assert saved.name == "lower-molar-mesial-box.yaml"
    data = yaml.safe_load(saved.read_text())
    assert data["increments"][0]["exposures"][0]["time_s"] == 33
    page.get_by_role("button", name="Close").click()
    example(page, "Upper premolar, shallow occlusal")
    choose(page, (saved.name, saved.read_bytes()))
    page.get_by_role("button", name="Close").click()
    expect(number(page, "Exposure (s)")).to_have_value("33")
