"""From a text to data with places, and from a schema's errors to placed messages; knows no domain."""

from farside.reading.document import Document, read_document
from farside.reading.problems import Path, Place, Problem, Refused, printable

__all__ = ["Document", "Path", "Place", "Problem", "Refused", "printable", "read_document"]
