"""A source in words: whole on one line, in a few words, or as its DOI alone."""

from typing import Final

from farside import shipped
from farside.export.markdown import link, plain

_LONG: Final = 32


def reference(cite: str) -> str:
    """A source on one line: authors, year, what it is about, where, with its DOI."""
    source = shipped.sources()[cite]
    authors, title, year = (plain(source[key]) if key in source else "" for key in ("authors", "title", "year"))
    # A line that begins with a year and a full stop would be a numbered list.
    said = [authors, title] if authors else [title]
    said[0] += f", {year}" if year else ""
    where = ". ".join(plain(source[key]) for key in ("journal", "number") if key in source)
    parts = [*said, where, doi_link(cite)]
    return ". ".join(part for part in parts if part) + "."


def doi_link(cite: str) -> str:
    """A link to a source's DOI; empty where it has none."""
    doi = shipped.sources()[cite].get("doi")
    return link(f"doi:{plain(doi)}", f"https://doi.org/{doi}") if doi else ""


def short(cite: str) -> str:
    """A source in a few words: first author and year, a long-named body's number or key, else where it stands."""
    source = shipped.sources()[cite]
    if "authors" not in source:
        where = source.get("journal", source.get("number", cite))
        return f"{where}, {source['year']}" if "year" in source else str(where)
    authors = str(source["authors"]).removesuffix(" and others").split(", ")
    if len(authors) == 1 and len(authors[0]) > _LONG:
        return str(source.get("number", cite.replace("-", " ").upper()))
    first = authors[0] + (" and others" if len(authors) > 1 or "and others" in str(source["authors"]) else "")
    return f"{first} {source['year']}" if "year" in source else first
