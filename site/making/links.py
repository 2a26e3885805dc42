"""Finds dead links in the built pages: to pages, files and anchors that are not there. Other hosts are not asked."""

from collections.abc import Iterable, Iterator
from html.parser import HTMLParser
from pathlib import Path
from typing import Final
from urllib.parse import unquote, urljoin, urlsplit

# Brought by the page's own build, after the written pages.
LATER: Final = ("assets/",)
_HERE: Final = "http://site.invalid/"


class _Page(HTMLParser):
    """The links and the anchors of one page."""

    def __init__(self) -> None:
        super().__init__()
        self.links: list[str] = []
        self.anchors: set[str] = set()

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:  # noqa: ARG002
        given = dict(attrs)
        self.links += [value for key in ("href", "src") if (value := given.get(key)) is not None]
        self.anchors |= {value for key in ("id", "name") if (value := given.get(key))}


def dead_links(folder: Path, later: Iterable[str] = LATER) -> Iterator[str]:
    """Each dead link of a built site, with the page that it stands on.

    Parameters
    ----------
    folder : Path
        The built site.
    later : iterable of str
        Beginnings of paths that are not there yet.
    """
    pages = {path: _read(path) for path in sorted(folder.rglob("*.html"))}
    for path, page_read in pages.items():
        page = path.relative_to(folder).as_posix()
        for link in page_read.links:
            fault = _fault(folder, page, link, tuple(later), pages)
            if fault:
                yield f'{page}: the link "{link}" leads to {fault}'


def dead_links_of_the_app(folder: Path, links: Iterable[str]) -> Iterator[str]:
    """Each dead one of the links that the app makes from the front page, such as `rules/far-side-dose/#sources`."""
    pages = {path: _read(path) for path in sorted(folder.rglob("*.html"))}
    for link in links:
        if fault := _fault(folder, "", link, (), pages):
            yield f'the app\'s link "{link}" leads to {fault}'


def _read(path: Path) -> _Page:
    page = _Page()
    page.feed(path.read_text(encoding="utf-8"))
    return page


def _fault(folder: Path, page: str, link: str, later: tuple[str, ...], pages: dict[Path, _Page]) -> str:
    parts = urlsplit(urljoin(_HERE + page, link))
    if f"{parts.scheme}://{parts.netloc}/" != _HERE:
        return ""
    name = unquote(parts.path).lstrip("/")
    if name.startswith(later):
        return ""
    target = _target(folder, name)
    if target is None:
        return f"no page or file: {name}"
    anchor = unquote(parts.fragment)
    if anchor and target in pages and anchor not in pages[target].anchors:
        return f"no such place on its page: #{anchor}"
    return ""


def _target(folder: Path, name: str) -> Path | None:
    """The file that a path of the site stands for, a folder's being its index."""
    path = folder / name
    found = path / "index.html" if path.is_dir() or not name or name.endswith("/") else path
    return found if found.is_file() else None
