"""The build of the pages: it ends on a dead link and on evidence that does not hold; its checks are the tests' own."""

import json
import shutil
import subprocess
import sys
from dataclasses import asdict
from pathlib import Path

import hooks
import pytest
from farside import shipped
from farside.protocol.protocol import base_protocol
from making.links import dead_links, dead_links_of_the_app
from making.outside_checks import cited_keys, compared, outside_checks
from making.places import SITE, TOP
from reference.registry import CHECKS, FIGURES, ROWS


def site(folder: Path, **pages: str) -> Path:
    """A built site of a few pages, by their names."""
    for name, body in pages.items():
        path = folder / name.replace("__", "/") / "index.html" if name != "index" else folder / "index.html"
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(f"<!doctype html><title>x</title><body>{body}")
    return folder


def test_links_that_lead_somewhere_are_no_fault(tmp_path: Path) -> None:
    built = site(
        tmp_path,
        index='<h1 id="top">x</h1><a href="rules/">r</a><a href="#top">t</a><script src="assets/app.js"></script>',
        rules='<h2 id="heat">x</h2><a href="..">home</a><a href="./#heat">h</a><a href="https://doi.org/10.1/x">d</a>',
    )
    assert list(dead_links(built)) == []


@pytest.mark.parametrize(
    ("link", "fault"),
    [
        ("gone/", "no page or file: rules/gone/"),
        ("../css/gone.css", "no page or file: css/gone.css"),
        ("#gone", "no such place on its page: #gone"),
        ("../#gone", "no such place on its page: #gone"),
        ("../../gone", "no page or file: gone"),
    ],
)
def test_a_dead_link_is_found(tmp_path: Path, link: str, fault: str) -> None:
    built = site(tmp_path, index="<h1>x</h1>", rules=f'<a href="{link}">x</a>')
    assert list(dead_links(built)) == [f'rules/index.html: the link "{link}" leads to {fault}']


def test_a_dead_link_of_the_app_is_found(tmp_path: Path) -> None:
    built = site(tmp_path, index="x", rules__made='<h2 id="sources">x</h2>')
    links = ["rules/made/", "rules/made/#sources", "rules/gone/", "rules/made/#gone"]
    assert list(dead_links_of_the_app(built, links)) == [
        'the app\'s link "rules/gone/" leads to no page or file: rules/gone/',
        'the app\'s link "rules/made/#gone" leads to no such place on its page: #gone',
    ]


@pytest.fixture
def checkout(tmp_path: Path) -> Path:
    """A copy of what the pages are made of."""
    for name in ("rules", "engine", "tests/reference"):
        shutil.copytree(TOP / name, tmp_path / name, ignore=shutil.ignore_patterns("__pycache__"))
    (tmp_path / "site").mkdir()
    shutil.copy(TOP / "tests" / "constraints.txt", tmp_path / "tests")
    for name in ("pages", "theme", "making", "app/views"):
        shutil.copytree(SITE / name, tmp_path / "site" / name)
    for name in ("mkdocs.yml", "hooks.py"):
        shutil.copy(SITE / name, tmp_path / "site")
    return tmp_path


RULE, SOURCES, PAGE = "rules/base/heat/close-to-pulp.yaml", "rules/sources.yaml", "site/pages/offline.md"


@pytest.mark.parametrize(
    ("file", "old", "new", "said"),
    [
        (RULE, "cite: murray-2003", "cite: nobody-1999", 'cites "nobody-1999", which is no source'),
        (RULE, "    sources: [{cite: murray-2003", "    # [{cite: murray-2003", "clinical and has no source"),
        (SOURCES, "\n  murray-2003:", "\n  nobody-1999: {title: x}\n  murray-2003:", 'nothing rests on "nobody-1999"'),
        (RULE, "{remaining_dentine_mm: 2.0}, finding: clear", "{}, finding: clear", '"plenty" gives open, not clear'),
    ],
    ids=["unknown source", "limit without a source", "orphaned source", "example that fails"],
)
def test_evidence_that_does_not_hold_ends_the_build(checkout: Path, file: str, old: str, new: str, said: str) -> None:
    change(checkout / file, old, new)
    done = built(checkout)
    assert done.returncode != 0
    assert said in done.stdout + done.stderr


def test_dead_links_end_the_build_written_or_made(checkout: Path) -> None:
    dead = '[a](gone.md) [b](cautions.md#gone) <a href="../gone/">c</a> <a href="../rules/far-side-dose/#gone">d</a>'
    change(checkout / PAGE, "# Offline", f"# Offline\n\n{dead}")
    change(checkout / "engine/farside/export/rule_pages.py", "'index.md#what-", "'index.md#whatever-")
    change(checkout / "site/app/views/tools.tsx", 'href="how-to-use/"', 'href="how-to-go/"')
    done = built(checkout)
    said = done.stdout + done.stderr
    assert done.returncode != 0
    for link in ("gone.md", "../cautions/#gone", "../gone/", "../rules/far-side-dose/#gone", "how-to-go/"):
        assert f'link "{link}" leads to no' in said
    assert said.count('#whatever-strengths-mean" leads to no such place') == len(base_protocol().rules)


def test_the_checks_of_the_page_are_the_tests_own() -> None:
    made = outside_checks()
    assert made.checks == tuple(compared(check, row) for row in ROWS for check in row.checks)
    assert sorted(check.id for check in made.checks) == sorted(check.id for check in CHECKS)
    assert [figure.id for figure in made.figures] == [figure.id for figure in FIGURES]


def test_what_the_checks_cite_counts_as_used() -> None:
    cited = cited_keys(outside_checks(), shipped.sources())
    assert {"uusitalo-2016", "lane-1998"} <= cited <= set(shipped.sources())


def test_cells_of_a_table_of_words_carry_their_columns_names() -> None:
    row = "<tr><td>far</td><td>What is said of it in <b>more</b> than a few words here</td></tr>"
    table = f"<table><tr><th>Case</th><th>Says</th></tr>{row}{row}</table>"
    named = hooks.on_page_content(f"<p>x</p>{table}<table><tr><th>a</th></tr><tr><td>1</td></tr></table>")
    assert named.count('<td data-column="Case">far</td><td data-column="Says">What') == 2
    assert named.startswith('<p>x</p><table class="wordy">')
    assert named.endswith("<table><tr><th>a</th></tr><tr><td>1</td></tr></table>")


def change(file: Path, old: str, new: str) -> None:
    text = file.read_text(encoding="utf-8")
    assert old in text
    file.write_text(text.replace(old, new, 1), encoding="utf-8")


def built(checkout: Path) -> "subprocess.CompletedProcess[str]":
    """MkDocs as the site's build calls it; the outside checks are taken as they came out for the true checkout."""
    kept = checkout / ".build" / "checks" / "kept.json"
    kept.parent.mkdir(parents=True)
    kept.write_text(json.dumps(asdict(outside_checks())), encoding="utf-8")
    script = (
        f"import sys; sys.path.insert(0, {str(checkout / 'site')!r})\n"
        "from making import outside_checks; outside_checks._digest = lambda: 'kept'\n"
        "from mkdocs.__main__ import cli; cli()"
    )
    words = ["build", "--strict", "-f", checkout / "site" / "mkdocs.yml", "-d", checkout / "out"]
    command = [sys.executable, "-c", script, *words]
    return subprocess.run(command, cwd=checkout, capture_output=True, text=True, check=False, timeout=120)
