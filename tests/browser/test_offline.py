"""After the first visit the page works without a network, and a new version waits for the user's word."""

import shutil
import subprocess
from collections.abc import Iterator
from pathlib import Path

import pytest
from browser.conftest import OFFLINE, Watch
from making.environment import node
from making.places import SITE
from making.server import Server
from playwright.sync_api import Browser, BrowserContext, Page, expect

UPDATE = ".update"
VERDICT = ".verdict"


def test_first_visit_gives_a_verdict(page: Page) -> None:
    expect(page.locator(VERDICT).first).to_be_visible()


def test_works_with_the_network_off(page: Page, context: BrowserContext) -> None:
    said = page.locator(VERDICT).first.inner_text()
    context.set_offline(True)
    page.reload()
    expect(page.locator(OFFLINE)).to_be_attached()
    expect(page.locator(VERDICT).first).to_have_text(said, use_inner_text=True)


def test_every_page_is_kept(page: Page, context: BrowserContext, built_site: Path, home: str) -> None:
    context.set_offline(True)
    pages = sorted(path.parent.relative_to(built_site).as_posix() for path in built_site.rglob("index.html"))
    assert len(pages) > 1
    for name in pages:
        answer = page.goto(home if name == "." else f"{home}{name}/", wait_until="domcontentloaded")
        assert answer is not None
        assert answer.ok, name


def test_every_file_is_kept(page: Page, built_site: Path) -> None:
    """Only the service worker itself, and what no page asks for, may be missing from what it keeps."""
    kept = page.evaluate(
        """async () => {
            const names = await caches.keys();
            const all = await Promise.all(names.map(async (name) => (await caches.open(name)).keys()));
            return all.flat().map((request) => decodeURI(new URL(request.url).pathname.slice(1)));
        }"""
    )
    built = {path.relative_to(built_site).as_posix() for path in built_site.rglob("*") if path.is_file()}
    assert built - set(kept) <= {"sw.js", "sitemap.xml", "sitemap.xml.gz"}


@pytest.fixture
def two_versions(built_site: Path, tmp_path: Path) -> Path:
    """A copy of the site that may be changed under the browser's feet."""
    return shutil.copytree(built_site, tmp_path / "site")


@pytest.fixture
def changing_home(two_versions: Path) -> Iterator[str]:
    with Server(two_versions) as server:
        yield server.address


def publish_another(site: Path) -> None:
    """Changes the front page and writes the service worker anew, as a build does."""
    front = site / "index.html"
    front.write_text(front.read_text().replace("<head>", '<head><meta name="edition" content="another">', 1))
    subprocess.run([node(), SITE / "making" / "offline.mjs", site], check=True, cwd=SITE)


def test_a_new_version_waits_for_the_word(browser: Browser, two_versions: Path, changing_home: str) -> None:
    watch = Watch(changing_home)
    context = browser.new_context()
    watch.follow(context)
    page = context.new_page()
    another = page.locator('meta[name="edition"]')
    page.goto(changing_home)
    expect(page.locator(OFFLINE)).to_be_attached()
    expect(page.locator(UPDATE)).to_have_count(0)

    publish_another(two_versions)
    page.reload()
    expect(page.locator(UPDATE)).to_be_visible()
    page.reload()
    expect(page.locator(UPDATE)).to_be_visible()
    expect(another).to_have_count(0)  # still the old one, however often it is loaded

    page.locator(UPDATE).get_by_role("button").click()
    expect(another).to_have_count(1)
    expect(page.locator(OFFLINE)).to_be_attached()
    expect(page.locator(UPDATE)).to_have_count(0)
    context.close()
    assert watch.troubles == []
