"""The site's made pages: one for each rule, quantity and file format, and the sources, all from the shipped data."""

from farside.export.format_pages import format_pages
from farside.export.quantity_pages import quantity_pages
from farside.export.rule_pages import rule_pages
from farside.export.source_page import source_page


def pages() -> dict[str, str]:
    """Markdown by path below the site's pages, such as `rules/far-side-dose.md`."""
    return {**dict(rule_pages()), **dict(quantity_pages()), **dict(format_pages()), "sources.md": source_page()}
