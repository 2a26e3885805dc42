"""The word that was probably meant."""

from collections.abc import Iterable


def nearest(word: str, candidates: Iterable[str]) -> str | None:
    """The candidate that differs least from a word, None where none is near.

    Counted are letters put in, left out, changed, or two neighbours exchanged; near is a third of the word's length
    or less. Of equals the first in order is taken.

    Examples
    --------
    >>> nearest("thicknes_mm", ["time_s", "thickness_mm"])
    'thickness_mm'
    >>> nearest("colour", ["time_s", "thickness_mm"]) is None
    True
    """
    folded = _folded(word)
    allowed = max(1, len(folded) // 3)
    best: tuple[int, str] | None = None
    for candidate in candidates:
        other = _folded(candidate)
        if abs(len(other) - len(folded)) > allowed or len(other) > 200:
            continue
        steps = _steps(folded, other)
        if steps <= allowed and (best is None or (steps, candidate) < best):
            best = (steps, candidate)
    return None if best is None else best[1]


def _folded(word: str) -> str:
    return word[:200].casefold().replace("-", "_").replace(" ", "_")


def _steps(word: str, other: str) -> int:
    before: list[int] = []
    row = list(range(len(other) + 1))
    for i, letter in enumerate(word, 1):
        older, before, row = before, row, [i]
        for j, its in enumerate(other, 1):
            cost = min(before[j] + 1, row[j - 1] + 1, before[j - 1] + (letter != its))
            if i > 1 and j > 1 and letter == other[j - 2] and word[i - 2] == its:
                cost = min(cost, older[j - 2] + 1)
            row.append(cost)
    return row[-1]
