"""Adds the pages that are made from the shipped data to the site that MkDocs builds."""

import sys
from pathlib import Path

from mkdocs.config.defaults import MkDocsConfig
from mkdocs.structure.files import File, Files

sys.path.insert(0, str(Path(__file__).parent.parent / "engine"))

from farside.export.pages import pages


def on_files(files: Files, config: MkDocsConfig) -> Files:
    """Adds a page for each rule, quantity, file format, and the sources."""
    for path, text in pages().items():
        files.append(File.generated(config, path, content=text))
    return files
