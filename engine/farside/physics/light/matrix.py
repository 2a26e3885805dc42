"""Products and solutions of the six by six matrices that transport works with, as lists of rows.

Written out for six columns, which halves the time of a general product.
"""

from collections.abc import Sequence
from typing import TypeAlias

Vector: TypeAlias = list[float]
Matrix: TypeAlias = list[Vector]


def product(left: Matrix, right: Matrix) -> Matrix:
    """Matrix product of six columns by six rows.

    >>> product([[1.0, 2.0, 0.0, 0.0, 0.0, 0.0]], [[1.0], [3.0], [0.0], [0.0], [0.0], [0.0]])
    [[7.0]]
    """
    columns = list(zip(*right, strict=True))
    return [
        [a * u + b * v + c * w + d * x + e * y + f * z for u, v, w, x, y, z in columns] for a, b, c, d, e, f in left
    ]


def applied(matrix: Matrix, vector: Sequence[float]) -> Vector:
    """Matrix of six columns times a vector of six.

    >>> applied([[1.0, 2.0, 0.0, 0.0, 0.0, 0.0]], [3.0, 4.0, 0.0, 0.0, 0.0, 0.0])
    [11.0]
    """
    u, v, w, x, y, z = vector
    return [a * u + b * v + c * w + d * x + e * y + f * z for a, b, c, d, e, f in matrix]


def total(left: Matrix, right: Matrix) -> Matrix:
    """Sum of two matrices.

    >>> total([[1.0]], [[2.0]])
    [[3.0]]
    """
    return [[a + b for a, b in zip(row, other, strict=True)] for row, other in zip(left, right, strict=True)]


def identity_less(matrix: Matrix) -> Matrix:
    """The identity minus a matrix.

    >>> identity_less([[0.25, 0.5], [1.0, 0.25]])
    [[0.75, -0.5], [-1.0, 0.75]]
    """
    rest = [[-a for a in row] for row in matrix]
    for place, row in enumerate(rest):
        row[place] += 1.0
    return rest


def solved(matrix: Matrix, right: Matrix) -> Matrix:
    """X of ``matrix X = right``, by elimination without exchange of rows.

    Safe for what transport asks of it: the identity minus something that light makes smaller,
    whose pivots cannot vanish. Each round uses up the first row and column, and puts the row,
    now solved for its own unknown, last.

    >>> solved([[2.0, 0.0], [1.0, 1.0]], [[2.0], [3.0]])
    [[1.0], [2.0]]
    """
    rows = [[*row, *other] for row, other in zip(matrix, right, strict=True)]
    for _ in matrix:
        (pivot, *first), *others = rows
        head = [a / pivot for a in first]
        rows = [[a - factor * b for a, b in zip(rest, head, strict=True)] for factor, *rest in others]
        rows.append(head)
    return rows
