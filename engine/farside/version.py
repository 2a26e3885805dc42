"""The version of the engine, as reports carry it."""

from typing import Final

VERSION: Final = "0.1.0"
