"""The built site in a real Chromium: built once, served with its policy, watched for what should not happen."""

import os
from collections.abc import Iterator
from dataclasses import dataclass, field
from pathlib import Path

import make
import pytest
from browser import chromium
from making.places import BUILD
from making.server import Server
from playwright.sync_api import Browser, BrowserContext, ConsoleMessage, Page, Request, expect, sync_playwright

OFFLINE = 'html[data-offline="ready"]'

expect.set_options(timeout=30_000)  # the first start of the engine, on a busy machine


@dataclass
class Watch:
    """What the pages of a context said and asked for that they should not have."""

    home: str
    troubles: list[str] = field(default_factory=list)
    requests: list[str] = field(default_factory=list)

    def follow(self, context: BrowserContext) -> None:
        context.on("request", self._request)
        context.on("console", self._console)
        context.on("weberror", lambda error: self.troubles.append(f"uncaught: {error.error}"))

    def _request(self, request: Request) -> None:
        self.requests.append(request.url)
        if not request.url.startswith((self.home, "data:", "blob:")):
            self.troubles.append(f"asked another host: {request.url}")

    def _console(self, message: ConsoleMessage) -> None:
        """A violation of the policy is among the errors that Chromium puts on the console."""
        if message.type == "error":
            self.troubles.append(f"console: {message.text}")


@pytest.fixture(scope="session")
def built_site() -> Path:
    """The site: the one that FARSIDE_BUILT_SITE names, else built now."""
    given = os.environ.get("FARSIDE_BUILT_SITE")
    return Path(given) if given else make.build(BUILD / "site")


@pytest.fixture(scope="session")
def home(built_site: Path) -> Iterator[str]:
    """The address at which the site is served."""
    with Server(built_site) as server:
        yield server.address


@pytest.fixture(scope="session")
def browser() -> Iterator[Browser]:
    path = chromium.find()
    if path is None:
        pytest.fail("No Chromium: python3 tests/run.py brings it, or name one in FARSIDE_CHROMIUM.")
    with sync_playwright() as playwright:
        started = playwright.chromium.launch(executable_path=path, args=chromium.arguments())
        yield started
        started.close()


@pytest.fixture
def watch(home: str) -> Iterator[Watch]:
    """What is watched; the test fails if anything was found, unless it takes the finding away itself."""
    watching = Watch(home)
    yield watching
    assert watching.troubles == []


@pytest.fixture
def context(browser: Browser, watch: Watch) -> Iterator[BrowserContext]:
    """A browser that has never been here, at a tablet's size."""
    fresh = browser.new_context(viewport={"width": 1180, "height": 820})
    watch.follow(fresh)
    yield fresh
    fresh.close()


@pytest.fixture
def page(context: BrowserContext, home: str) -> Page:
    """The front page, with the engine ready and the whole site kept for offline use."""
    page = context.new_page()
    page.goto(home)
    expect(page.locator(OFFLINE)).to_be_attached()
    return page
