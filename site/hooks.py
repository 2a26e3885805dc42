"""Adds the made pages to the site that MkDocs builds, and lets no page out that has a dead link or rests on nothing."""

import itertools
import json
import re
import sys
from pathlib import Path

from mkdocs.config.defaults import MkDocsConfig
from mkdocs.exceptions import PluginError
from mkdocs.structure.files import File, Files

sys.path.insert(0, str(Path(__file__).parent))
sys.path.insert(0, str(Path(__file__).parent.parent / "engine"))

from farside import bridge, shipped
from farside.export.evidence import shipped_faults
from farside.export.page_examples import ExampleFails
from farside.export.pages import pages
from making.links import dead_links, dead_links_of_the_app
from making.outside_checks import cited_keys, outside_checks
from making.places import SITE

WORDY = 40
"""Letters in a cell from which on its table is one of words."""


def on_files(files: Files, config: MkDocsConfig) -> Files:
    """Adds a page for each rule, quantity, file format, the sources and the outside checks."""
    outside = outside_checks()
    refuse(shipped_faults(cited_keys(outside, shipped.sources())))
    try:
        made = pages(outside)
    except ExampleFails as fault:
        raise PluginError(str(fault)) from fault
    for path, text in made.items():
        files.append(File.generated(config, path, content=text))
    return files


def on_page_content(html: str, **_: object) -> str:
    """Tells each cell of a table of words the name of its column, by which narrow screens show it."""
    return re.sub(r"<table>.*?</table>", lambda found: named_cells(found[0]), html, flags=re.DOTALL)


def on_post_build(config: MkDocsConfig) -> None:
    """Follows every link of what was built, and every link that the app makes to it."""
    built = Path(config.site_dir)
    refuse([*dead_links(built), *dead_links_of_the_app(built, links_of_the_app())])


def links_of_the_app() -> list[str]:
    """Every link from the app to a page: those to rules and their sources, and those written into its views."""
    rules = [rule["page"] for rule in json.loads(bridge.call('{"do": "start"}'))["rules"]]
    views = sorted((SITE / "app" / "views").glob("*.tsx"))
    written = {link for view in views for link in re.findall(r'href="([a-z-]+/)"', view.read_text(encoding="utf-8"))}
    return [*rules, *(f"{page}#sources" for page in rules), *sorted(written)]


def named_cells(table: str) -> str:
    """A table whose cells carry their columns' names, if any cell holds more than a few words."""
    if max(len(re.sub("<[^>]*>", "", cell)) for cell in re.findall(r"<td>(.*?)</td>", table, re.DOTALL)) < WORDY:
        return table
    columns = [re.sub("<[^>]*>", "", head) for head in re.findall(r"<th>(.*?)</th>", table, re.DOTALL)]
    names = itertools.cycle(columns)
    named = re.sub("<td>", lambda _: f'<td data-column="{next(names)}">', table)
    return named.replace("<table>", '<table class="wordy">')


def refuse(faults: list[str]) -> None:
    """Ends the build where there is anything wrong, saying all of it.

    Raises
    ------
    PluginError
        With each fault on its own line.
    """
    if faults:
        raise PluginError("\n  ".join(["The site is not built, since:", *faults]))
