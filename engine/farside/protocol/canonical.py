"""Canonical JSON (RFC 8785) and the digest over it: the same bytes in every runtime."""

import hashlib
import json
import math
from collections.abc import Mapping, Sequence
from typing import Any


def digest(data: Any) -> str:
    """SHA-256 over the canonical JSON of some data, as 64 hexadecimal digits."""
    return hashlib.sha256(canonical(data)).hexdigest()


def canonical(data: Any) -> bytes:
    """Data as canonical JSON.

    Raises
    ------
    ValueError
        When a number is not finite or a whole number is past what a double holds exactly.

    References
    ----------
    RFC 8785, JSON Canonicalization Scheme; numbers as ECMAScript writes them.

    Examples
    --------
    >>> canonical({"b": [1.0, 1e21, 1e-7], "a": "é"}).decode()
    '{"a":"é","b":[1,1e+21,1e-7]}'
    """
    return _written(data).encode("utf-8")


def _written(data: Any) -> str:
    if data is None or isinstance(data, bool | str):
        return json.dumps(data, ensure_ascii=False)
    if isinstance(data, int | float):
        return _number(data)
    if isinstance(data, Mapping):
        keys = sorted(data, key=lambda key: key.encode("utf-16-be"))
        return "{" + ",".join(f"{_written(key)}:{_written(data[key])}" for key in keys) + "}"
    if isinstance(data, Sequence):
        return "[" + ",".join(map(_written, data)) + "]"
    raise ValueError(f"{type(data).__name__} has no place in JSON")


def _number(value: float) -> str:
    if isinstance(value, int) and abs(value) > 2**53:
        raise ValueError("a whole number past what a double holds")
    value = float(value)
    if not math.isfinite(value):
        raise ValueError("a number that is not finite")
    if value == 0.0:
        return "0"
    sign, digits, exponent = ("-" if value < 0 else ""), *_shortest(abs(value))
    return sign + _laid_out(digits, exponent)


def _shortest(value: float) -> tuple[str, int]:
    """The shortest digits that give a number back, and the place of the point counted from before the first."""
    mantissa, _, power = f"{value!r}".partition("e")
    whole, _, fraction = mantissa.partition(".")
    fraction = "" if fraction == "0" else fraction
    digits = (whole + fraction).lstrip("0")
    leading = len(whole) if whole != "0" else -(len(fraction) - len(fraction.lstrip("0")))
    return digits.rstrip("0") or "0", leading + int(power or 0)


def _laid_out(digits: str, point: int) -> str:
    """Digits with their point as ECMAScript lays them out: plain from 1e-6 up to 1e21."""
    if len(digits) <= point <= 21:
        return digits + "0" * (point - len(digits))
    if 0 < point <= 21:
        return f"{digits[:point]}.{digits[point:]}"
    if -6 < point <= 0:
        return "0." + "0" * -point + digits
    mantissa = digits if len(digits) == 1 else f"{digits[0]}.{digits[1:]}"
    return f"{mantissa}e{point - 1:+d}"
