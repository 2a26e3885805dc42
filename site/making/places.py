"""Where things stand in the checkout, and where what is built goes."""

from pathlib import Path

TOP = Path(__file__).resolve().parents[2]
SITE = TOP / "site"
ENGINE = TOP / "engine" / "farside"
BUILD = TOP / ".build"
BUILT_SITE = BUILD / "site"
