"""Which values get a numeral, when the file leaves it to the program.

An even scale gets one numeral step of 1, 2 or 5·10^n (2.5 only where the ends allow no other).  A
crowding scale is numbered by a shortest path over round values, see `dialgen.face.crowding`.  The
ends, zero and infinity are always numbered.

The number of numerals wanted for a length follows GOST 27626-88 (known from a listing of its values);
1-2-5 steps are the rule of ASME B40.100 and MIL-HDBK-759B.
"""

from __future__ import annotations

import math
from collections.abc import Sequence

import numpy as np

from dialgen.face.crowding import cheapest_numerals
from dialgen.face.ruler import Ruler, decimal_value, multiples

_COUNTS = ((50.0, 3, 5), (100.0, 4, 6), (150.0, 5, 8), (200.0, 6, 10), (math.inf, 6, 12))
_MISFIT = 2.0
_HALF_MISFIT = 1.0
_EXCESS = 0.45
_OFF_MIDDLE = 0.1
_QUARTERS = 0.6


def auto_numbered(ruler: Ruler) -> tuple[float, ...]:
    """Return the values to number, ascending, infinity last."""
    forced = _forced(ruler)
    return _even_steps(ruler, forced) if ruler.is_even() else cheapest_numerals(ruler, forced, _wanted_gap_mm(ruler))


def wanted_count(length_mm: float) -> tuple[int, int]:
    """Return the least and most numbered marks for a scale of this length."""
    return next((least, most) for limit, least, most in _COUNTS if length_mm <= limit)


def _forced(ruler: Ruler) -> tuple[float, ...]:
    zero = (0.0,) if ruler.start < 0 < ruler.end else ()
    return (ruler.start, *zero, ruler.end)


def _clear(ruler: Ruler, values: Sequence[float], forced: Sequence[float]) -> bool:
    """Return whether no two neighbours crowd each other, but for two that must both stand."""
    array = np.array(values)
    places, widths = ruler.place_mm(array), ruler.width_mm(array)
    room = np.diff(places) - (widths[1:] + widths[:-1]) / 2 - ruler.clear_mm
    both = np.isin(array, forced)
    return bool(((room >= 0) | (both[1:] & both[:-1])).all())


def _even_steps(ruler: Ruler, forced: tuple[float, ...]) -> tuple[float, ...]:
    least, most = wanted_count(ruler.length_mm)
    best: tuple[float, tuple[float, ...]] = (math.inf, forced)
    whole_fits = False
    span = ruler.end - ruler.start
    magnitude = math.floor(math.log10(span))
    for mantissa, exponent in ((m, e) for m in (10, 20, 50, 25) for e in range(magnitude - 3, magnitude + 1)):
        step = decimal_value(mantissa, exponent - 1)
        if not 1 <= span / step <= 60 or (mantissa == 25 and whole_fits):
            continue
        values, misfit = _stepped(ruler, step, forced)
        if not _clear(ruler, values, forced):
            continue
        count = len(values)
        excess = max(least - count, count - most, 0)
        whole_fits = whole_fits or not (misfit or excess)
        cost = (
            excess + misfit * _MISFIT + (mantissa == 25) * _QUARTERS + 0.1 * abs(count - (least + most) / 2)
        )
        best = min(best, (cost, values), key=lambda item: item[0])
    return best[1]


def _stepped(ruler: Ruler, step: float, forced: tuple[float, ...]) -> tuple[tuple[float, ...], float]:
    """Return the multiples of a step with the ends, less those that crowd an end, and what misfits cost."""
    inside = multiples(step, ruler.start, ruler.end)
    odd_ends = [end for end in (ruler.start, ruler.end) if not any(_same(end, v) for v in inside)]
    for end in odd_ends:
        beside = [v for v in inside if not _roomy(ruler, v, end) and v not in forced]
        inside = [v for v in inside if v not in beside]
    inner = [v for v in inside if not _same(v, ruler.start) and not _same(v, ruler.end)]
    misfit = sum(_HALF_MISFIT if multiples(step / 2, end, end) else _MISFIT for end in odd_ends)
    return (ruler.start, *inner, ruler.end), misfit


def _roomy(ruler: Ruler, one: float, other: float) -> bool:
    pair = np.array([one, other])
    places, widths = ruler.place_mm(pair), ruler.width_mm(pair)
    return bool(abs(places[1] - places[0]) >= widths.sum() / 2 + ruler.clear_mm)


def _same(one: float, other: float) -> bool:
    return abs(one - other) <= 1e-9 * max(abs(one), abs(other))


def _wanted_gap_mm(ruler: Ruler) -> float:
    least, most = wanted_count(ruler.length_mm)
    # A crowding scale needs more numerals than an even one to be read between them.
    return max(ruler.length_mm / (0.95 * (least + most)), 1.15 * (ruler.digit_mm + ruler.clear_mm))
