"""The page keeps to its policy: nothing from another host, no code from text, nothing inline."""

import re
import urllib.request
from html import unescape
from pathlib import Path

import pytest
from browser.conftest import Watch
from making.server import POLICY
from playwright.sync_api import BrowserContext, Page, expect

META = re.compile(r'<meta http-equiv="Content-Security-Policy" content="([^"]*)">')
INLINE = re.compile(r"<script(?![^>]*\bsrc=)[^>]*>|<style\b|\sstyle=|\son[a-z]+=", re.IGNORECASE)


def pages(site: Path) -> list[Path]:
    return sorted(site.rglob("*.html"))


def test_pages_carry_the_policy_that_the_server_sends(built_site: Path) -> None:
    """All but frame-ancestors, which a <meta> may not hold."""
    expected = [part for part in POLICY.split("; ") if not part.startswith("frame-ancestors")]
    assert pages(built_site)
    for path in pages(built_site):
        found = META.search(path.read_text())
        assert found, path
        assert unescape(found[1]).split("; ") == expected, path


def test_nothing_is_inline(built_site: Path) -> None:
    for path in pages(built_site):
        assert INLINE.findall(path.read_text()) == [], path


@pytest.mark.parametrize("name", ["", "sw.js", "assets/app.js", "assets/worker.js"])
def test_every_file_is_sent_with_the_policy(home: str, name: str) -> None:
    with urllib.request.urlopen(home + name) as answer:
        assert answer.headers["Content-Security-Policy"] == POLICY
        assert answer.headers["X-Content-Type-Options"] == "nosniff"


def test_wasm_is_sent_as_wasm(home: str, built_site: Path) -> None:
    (wasm,) = built_site.rglob("*.wasm")
    with urllib.request.urlopen(home + wasm.relative_to(built_site).as_posix()) as answer:
        assert answer.headers["Content-Type"] == "application/wasm"


def test_the_visit_asks_only_its_own_host(page: Page, watch: Watch) -> None:
    """The fixture fails the test on any trouble; here, that something was watched at all."""
    assert any(url.endswith("assets/worker.js") for url in watch.requests)
    assert any(url.endswith(".wasm") for url in watch.requests)


def test_a_violation_would_be_seen(page: Page, watch: Watch) -> None:
    """The watch itself works: text is not run as code, another host is not asked, and both are noticed."""
    page.evaluate(
        """() => {
            const script = document.createElement("script");
            script.textContent = "document.title = 'run'";
            document.head.append(script);
        }"""
    )
    assert page.title() != "run"
    assert page.evaluate("() => fetch('http://127.0.0.2:9/').then(() => 'asked', () => 'refused')") == "refused"
    found = [trouble for trouble in watch.troubles if "Content Security Policy" in trouble]
    assert len(found) >= 2
    watch.troubles.clear()


def test_text_is_not_run_later_either(page: Page, watch: Watch) -> None:
    """The policy has no 'unsafe-eval'. What a test evaluates itself is exempt from it; a timer's text is not."""
    page.evaluate("""() => { setTimeout("document.title = 'run'", 0); }""")
    page.wait_for_timeout(300)
    assert page.title() != "run"
    assert any("unsafe-eval" in trouble for trouble in watch.troubles)
    watch.troubles.clear()


def test_a_blocked_engine_says_what_is_wrong(context: BrowserContext, home: str, watch: Watch) -> None:
    """A file that cannot be had hangs the start in silence, but for the watchdog."""
    context.route("**/*.wasm", lambda route: route.fulfill(status=404, body=""))
    page = context.new_page()
    page.goto(home)
    expect(page.get_by_role("alert")).to_contain_text("wasm", timeout=40_000)
    watch.troubles.clear()
