"""The shipped values that stand in where a card is silent, by name."""

from functools import cache

from farside import shipped


@cache
def value(table: str, row: str) -> float:
    """The value of one row of a shipped table of single values, such as `assumptions` or `sleeves`.

    Raises
    ------
    KeyError
        When the table has no such row.
    """
    return {entry["id"]: float(entry["value"]) for entry in shipped.table(table)["rows"]}[row]


def assumption(row: str) -> float:
    """One row of the table of assumptions."""
    return value("assumptions", row)
