"""The first thing that stops a file from being read, before it has a document to be placed in."""


class Fault(Exception):
    """A message's key and values, and line and column from 0."""

    def __init__(self, key: str, line: int, column: int, /, **values: object) -> None:
        super().__init__(key)
        self.key = key
        self.line = line
        self.column = column
        self.values = values
