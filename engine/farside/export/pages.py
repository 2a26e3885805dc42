"""The site's made pages: rules, quantities, formats and sources from the shipped data, checks as they came out."""

from farside.export.compared import NOTHING, Outside
from farside.export.format_pages import format_pages
from farside.export.quantity_pages import quantity_pages
from farside.export.rule_pages import rule_pages
from farside.export.source_page import source_page
from farside.export.trust_page import trust_page


def pages(outside: Outside = NOTHING) -> dict[str, str]:
    """Markdown by path below the site's pages, such as `rules/far-side-dose.md`.

    Parameters
    ----------
    outside : Outside
        The outside checks as they came out, which the tests hold; the engine itself has none.
    """
    return {
        **dict(rule_pages(outside)),
        **dict(quantity_pages()),
        **dict(format_pages()),
        "sources.md": source_page(outside),
        "trust.md": trust_page(outside),
    }
