"""A scale as its divider sees it: values, their places along the line, and how wide a numeral is.

Nothing here knows of fonts, angles or files; tests hand in plain functions.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from dialgen.stage import Array

UNEVEN = 1.5
"""A scale whose densest part is this many times as dense as its widest is no longer even."""


@dataclass(frozen=True, slots=True, eq=False)
class Ruler:
    """A scale from ``start`` to ``end`` laid along a line.

    Args:
        start: its first value.
        end: its last value, or infinity.
        place_mm: places along the line of an array of values, rising from 0 at ``start``.
        along: values at equal steps of place from ``start`` to ``end``, both included.
        width_mm: the room along the line that the numerals of an array of values take.
        digit_mm: the room that a numeral of one digit takes, where it takes least.
        gap_mm: the least distance between marks.
        clear_mm: the least clear space between numerals.
        least_step: the least step of value that is justified between two values.
        foot: whether the pointer starts from rest and at first scarcely moves, so that the first
            marks may be left out while those after them stand.
    """

    start: float
    end: float
    place_mm: Callable[[Array], Array]
    along: Array
    width_mm: Callable[[Array], Array]
    digit_mm: float
    gap_mm: float
    clear_mm: float
    least_step: Callable[[float, float], float] = lambda low, high: 0.0
    foot: bool = False

    @property
    def length_mm(self) -> float:
        """The whole length."""
        return float(self.place_mm(np.array([self.end]))[0])

    def is_even(self) -> bool:
        """Return whether equal steps of value take about equal lengths all along."""
        if math.isinf(self.end):
            return False
        steps = np.diff(self.along)
        return bool(steps.max() <= UNEVEN * steps.min())


def decimal_value(count: int, exponent: int) -> float:
    """Return count·10^exponent as the nearest double, so that 3 tenths is 0.3 and not 3·0.1.

    >>> decimal_value(3, -1)
    0.3
    """
    return float(count * 10**exponent) if exponent >= 0 else count / 10**-exponent


def multiples(step: float, low: float, high: float) -> list[float]:
    """Return the multiples of ``step`` from ``low`` to ``high``, both included, rounded to 12 digits.

    >>> multiples(0.1, 0.25, 0.5)
    [0.3, 0.4, 0.5]
    """
    slack = 1e-9
    first, last = math.ceil(low / step - slack), math.floor(high / step + slack)
    return [float(f"{i * step:.12g}") for i in range(first, last + 1)]


def digits(value: float) -> str:
    """Return the digits of a value, without its power of ten: "" of 0 and infinity.

    >>> digits(0.15), digits(300.0)
    ('15', '3')
    """
    return f"{abs(value):.11e}".split("e")[0].replace(".", "").rstrip("0") if math.isfinite(value) else ""
