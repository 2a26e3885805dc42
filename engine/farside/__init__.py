"""Farside: does each increment of a light-cured filling get its light?"""

from farside.check import check
from farside.version import VERSION

__all__ = ["VERSION", "check"]
