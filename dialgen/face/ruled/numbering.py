"""Which values get a numeral, when the file leaves it to the program.

An even scale gets one numeral step of 1, 2 or 5·10^n (2.5 only where the ends allow no other).  A
crowding scale is numbered by a shortest path over round values, see `dialgen.face.ruled.crowding`.  The
ends, zero and infinity are always numbered.

The number of numerals wanted for a length follows GOST 27626-88 (known from a listing of its values);
1-2-5 steps are the rule of ASME B40.100 and MIL-HDBK-759B.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass, replace
from enum import IntEnum
from itertools import pairwise

import numpy as np

from dialgen.face.ruled.crowding import cheapest_numerals
from dialgen.face.ruled.ruler import Ruler, decimal_value, digits, multiples

_COUNTS = ((50.0, 3, 5), (100.0, 4, 6), (150.0, 5, 8), (200.0, 6, 10), (math.inf, 6, 12))

# What a step pays, in doublings of the pitch.  Tuned by eye over ranges from 0-1 to 0-1000 and
# radii from 20 to 110 mm.
_PITCH_MM = 12.0
_MISFIT = 2.0
_HALF_MISFIT = 1.0
_EXCESS = 0.5
_DIGITS = 0.7
_MOST_STEPS = 14
_HAIR_MM = 1e-9


def auto_numbered(ruler: Ruler) -> tuple[float, ...]:
    """Return the values to number, ascending, infinity last."""
    forced = _forced(ruler)
    if ruler.is_even():
        return _even_steps(ruler, forced)
    return cheapest_numerals(ruler, forced, _wanted_gap_mm(ruler))


def wanted_count(length_mm: float) -> tuple[int, int]:
    """Return the least and most numbered marks for a scale of this length."""
    return next((least, most) for limit, least, most in _COUNTS if length_mm <= limit)


def _forced(ruler: Ruler) -> tuple[float, ...]:
    zero = (0.0,) if ruler.start < 0 < ruler.end else ()
    return (ruler.start, *zero, ruler.end)


class _Order(IntEnum):
    """Which steps are asked first: 1-2-5 steps that fit both ends, then 2.5, then those that do not fit."""

    WHOLE = 0
    QUARTERS = 1
    ODD = 2


@dataclass(frozen=True, slots=True)
class _Choice:
    """The values that one step numbers, and what it costs that the ends do not fit it."""

    order: _Order
    values: tuple[float, ...]
    misfit: float


def _even_steps(ruler: Ruler, forced: tuple[float, ...]) -> tuple[float, ...]:
    """Return the numerals of the best step that leaves them room; a step that fits both ends first."""
    least, most = wanted_count(ruler.length_mm)

    def cost(choice: _Choice) -> tuple[int, float]:
        count = len(choice.values)
        pitch_mm = ruler.length_mm / (count - 1)
        excess = max(least - count, count - most, 0)
        long_numerals = any(len(digits(v)) > 1 for v in choice.values[1:-1])
        doublings = abs(math.log2(pitch_mm / _PITCH_MM)) + excess * _EXCESS + long_numerals * _DIGITS
        return choice.order, doublings + choice.misfit

    roomy = _roomy(ruler, list(_choices(ruler)), forced)
    return min(roomy, key=cost, default=_Choice(_Order.ODD, forced, 0.0)).values


def _choices(ruler: Ruler) -> Iterator[_Choice]:
    """Yield the steps of 1, 2 and 5·10^n that number a bearable count of values, then of 2.5·10^n."""
    span = ruler.end - ruler.start
    magnitude = math.floor(math.log10(span))
    for mantissa in (10, 20, 50, 25):
        for exponent in range(magnitude - 2, magnitude + 1):
            step = decimal_value(mantissa, exponent - 1)
            if 1 <= span / step <= _MOST_STEPS:
                values, misfit = _stepped(ruler, step)
                order = _Order.ODD if misfit else _Order.QUARTERS if mantissa == 25 else _Order.WHOLE
                if order is not _Order.ODD or mantissa != 25:
                    yield _Choice(order, values, misfit)


def _roomy(ruler: Ruler, choices: Sequence[_Choice], forced: tuple[float, ...]) -> Iterator[_Choice]:
    """Yield the choices whose numerals are clear of each other, less those that crowd an odd end.

    Only two values that must both stand may crowd each other.
    """
    # All choices are placed and measured in one call: the chain works on arrays.
    every = np.array(sorted({v for choice in choices for v in choice.values}))
    places, widths = ruler.place_mm(every), ruler.width_mm(every)
    rows = zip(every.tolist(), places.tolist(), widths.tolist(), strict=True)
    needed = {value: (place, width / 2) for value, place, width in rows}

    def clear(one: float, other: float) -> bool:
        (p, half), (q, other_half) = needed[one], needed[other]
        room_mm: float = abs(q - p) - half - other_half
        return room_mm >= ruler.clear_mm - _HAIR_MM

    for choice in choices:
        values = list(choice.values)
        for end, beside in ((0, 1), (-1, -2)) if choice.misfit else ():
            while len(values) > 2 and values[beside] not in forced and not clear(values[end], values[beside]):
                del values[beside]
        if all(clear(a, b) or (a in forced and b in forced) for a, b in pairwise(values)):
            yield replace(choice, values=tuple(values))


def _stepped(ruler: Ruler, step: float) -> tuple[tuple[float, ...], float]:
    """Return the multiples of a step with the ends and zero, and what the ends' misfit costs."""
    ends = (ruler.start, ruler.end)
    inner = [v for v in multiples(step, *ends) if not _same(v, ends[0]) and not _same(v, ends[1])]
    odd_ends = [end for end in ends if not multiples(step, end, end)]
    misfit = sum(_HALF_MISFIT if multiples(step / 2, end, end) else _MISFIT for end in odd_ends)
    return (ruler.start, *inner, ruler.end), misfit


def _same(one: float, other: float) -> bool:
    return abs(one - other) <= 1e-9 * max(abs(one), abs(other))


def _wanted_gap_mm(ruler: Ruler) -> float:
    least, most = wanted_count(ruler.length_mm)
    # A crowding scale needs more numerals than an even one to be read between them.
    return max(ruler.length_mm / (0.95 * (least + most)), 1.15 * (ruler.digit_mm + ruler.clear_mm))
