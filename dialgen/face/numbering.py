"""Which values get a numeral, when the file leaves it to the program.

An even scale gets one numeral step of 1, 2 or 5·10^n (2.5 only where the ends allow no other).  A
crowding scale is numbered by a shortest path: nodes are round values, an edge joins two values
1, 2, 3, 4 or 5·10^n apart that leave room between their numerals, and the cost of a path weighs
how round its numerals are against how evenly they fill the line.  The ends, zero and infinity are
on every path.

The number of numerals wanted for a length follows GOST 27626-88 (reference_values.md, section 15);
1-2-5 steps are the rule of ASME B40.100 and MIL-HDBK-759B.
"""

from __future__ import annotations

import math
from bisect import bisect_left
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.face.ruler import Ruler, decimal_value, multiples

_COUNTS = ((50.0, 3, 5), (100.0, 4, 6), (150.0, 5, 8), (200.0, 6, 10), (math.inf, 6, 12))
_MISFIT = 3.0
_QUARTERS = 0.6
_GAPS = (1, 2, 3, 4, 5)
_GAP_COST = (0.0, 0.0, 0.35, 0.5, 0.0)
_DIGIT_COST = (0.0, 0.0, 0.25, 0.6, 0.6, 0.2, 0.9, 1.2, 0.9, 1.2)
_ODD_END = 0.5


def auto_numbered(ruler: Ruler) -> tuple[float, ...]:
    """Return the values to number, ascending, infinity last."""
    forced = _forced(ruler)
    return _even_steps(ruler, forced) if ruler.is_even() else _shortest_path(ruler, forced)


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


def _stepped(ruler: Ruler, step: float, forced: tuple[float, ...]) -> tuple[tuple[float, ...], int]:
    """Return the multiples of a step with the ends, less those that crowd an end, and the misfits."""
    inside = multiples(step, ruler.start, ruler.end)
    odd_ends = [end for end in (ruler.start, ruler.end) if not any(_same(end, v) for v in inside)]
    for end in odd_ends:
        beside = [v for v in inside if not _roomy(ruler, v, end) and v not in forced]
        inside = [v for v in inside if v not in beside]
    inner = [v for v in inside if not _same(v, ruler.start) and not _same(v, ruler.end)]
    return (ruler.start, *inner, ruler.end), len(odd_ends)


def _roomy(ruler: Ruler, one: float, other: float) -> bool:
    pair = np.array([one, other])
    places, widths = ruler.place_mm(pair), ruler.width_mm(pair)
    return bool(abs(places[1] - places[0]) >= widths.sum() / 2 + ruler.clear_mm)


def _same(one: float, other: float) -> bool:
    return abs(one - other) <= 1e-9 * max(abs(one), abs(other))


@dataclass(frozen=True, slots=True)
class _Nodes:
    """Candidate values as whole counts of 10^exponent (None for an end that is not round)."""

    values: list[float]
    counts: list[int | None]
    exponent: int


def _candidates(ruler: Ruler, least_mm: float) -> tuple[dict[int, float], int]:
    """Return round values with a numeral's room around them, keyed by their count of 10^exponent."""
    finite = ruler.along[np.isfinite(ruler.along)]
    cell_mm = ruler.length_mm / (len(ruler.along) - 1)
    units = []
    for low, high in zip(finite, finite[1:], strict=False):
        # Five units must take at least a numeral's room, or no legal gap ends on such a value.
        unit = (high - low) / cell_mm * least_mm / 5
        units.append(math.ceil(math.log10(unit) - 1e-9))
    exponent = min(units, default=0)
    found: dict[int, float] = {}
    for low, high, power in zip(finite, finite[1:], units, strict=False):
        ratio = 10 ** (power - exponent)
        scale = decimal_value(1, power)
        first, last = math.ceil(low / scale - 1e-9), math.floor(high / scale + 1e-9)
        for count in range(first, last + 1):
            found[count * ratio] = decimal_value(count, power)
    return found, exponent


def _shortest_path(ruler: Ruler, forced: tuple[float, ...]) -> tuple[float, ...]:
    least_mm = float(ruler.width_mm(np.array([1.0]))[0]) + ruler.clear_mm
    found, exponent = _candidates(ruler, least_mm)
    counted = {v: c for c, v in found.items() if ruler.start < v < ruler.end}
    values = sorted({*counted, *forced})
    unit = decimal_value(1, exponent)
    counts = [counted.get(v, _count(v, unit)) for v in values]
    array = np.array(values)
    graph = _Graph(
        ruler.place_mm(array).tolist(),
        ruler.width_mm(array).tolist(),
        counts,
        [_node_cost(c) if v not in forced else 0.0 for v, c in zip(values, counts, strict=True)],
        ruler.clear_mm,
        _wanted_gap_mm(ruler, least_mm),
        max((abs(c) for c in counts if c), default=1),
    )
    path = [0]
    for stop in forced[1:]:
        path += graph.path(path[-1], values.index(stop))[1:]
    return tuple(values[i] for i in path)


def _wanted_gap_mm(ruler: Ruler, least_mm: float) -> float:
    least, most = wanted_count(ruler.length_mm)
    # A crowding scale needs more numerals than an even one to be read between them.
    return max(ruler.length_mm / (1.5 * (least + most) / 2), 1.15 * least_mm)


def _count(value: float, unit: float) -> int | None:
    if not math.isfinite(value):
        return None
    count = round(value / unit)
    return count if abs(count * unit - value) <= 1e-9 * abs(value) else None


def _node_cost(count: int | None) -> float:
    """Return how far from round a numeral is: by its digits, then by which digit it is."""
    if not count:
        return 0.0
    digits = str(abs(count)).rstrip("0")
    if len(digits) == 1:
        return _DIGIT_COST[int(digits)]
    return 1.5 * (len(digits) - 1) + (0.0 if digits[-1] == "5" else 0.6)


@dataclass(frozen=True, slots=True)
class _Graph:
    """Candidates in order of place, and what it costs to number one after another."""

    places: list[float]
    widths: list[float]
    counts: list[int | None]
    node_costs: list[float]
    clear_mm: float
    wanted_mm: float
    largest: int

    def path(self, first: int, last: int) -> list[int]:
        """Return the cheapest way from one node to another, by dynamic programming in order of place."""
        best = [math.inf] * (last + 1)
        back = [first] * (last + 1)
        best[first] = 0.0
        by_count = {c: i for i, c in enumerate(self.counts[: last + 1]) if c is not None and i >= first}
        for here in range(first, last):
            if best[here] == math.inf:
                continue
            for there, extra in self._edges(here, first, last, by_count):
                cost = best[here] + extra + self.node_costs[there]
                if cost < best[there]:
                    best[there], back[there] = cost, here
        if best[last] == math.inf:
            return [first, last]
        path = [last]
        while path[-1] != first:
            path.append(back[path[-1]])
        return path[::-1]

    def _edges(self, here: int, first: int, last: int, by_count: dict[int, int]) -> list[tuple[int, float]]:
        count = self.counts[here]
        found = [] if count is None else self._legal(here, count, by_count)
        if here == first and self._odd(here, count):
            near = bisect_left(self.places, self.places[here] + 2.5 * self.wanted_mm)
            found += [
                (there, _ODD_END + self._length_cost(here, there))
                for there in range(here + 1, min(near, last))
                if self._roomy(here, there)
            ]
        if self._odd(last, self.counts[last]) and self._roomy(here, last):
            found.append((last, self._length_cost(here, last)))
        return found

    def _legal(self, here: int, count: int, by_count: dict[int, int]) -> list[tuple[int, float]]:
        """Return the edges of 1 to 5 units, for every unit of which the value is a multiple."""
        found = []
        unit = 1
        while count % unit == 0 and unit <= self.largest:
            for gap, gap_cost in zip(_GAPS, _GAP_COST, strict=True):
                there = by_count.get(count + gap * unit)
                if there is not None and self._roomy(here, there):
                    found.append((there, gap_cost + self._length_cost(here, there)))
            unit *= 10
        return found

    def _odd(self, node: int, count: int | None) -> bool:
        """Return whether a node is an end that no legal gap need reach: not round, or infinite."""
        return count is None or len(str(abs(count)).rstrip("0")) > 1

    def _roomy(self, here: int, there: int) -> bool:
        room = self.places[there] - self.places[here]
        return room >= (self.widths[here] + self.widths[there]) / 2 + self.clear_mm

    def _length_cost(self, here: int, there: int) -> float:
        """Return the cost of a gap: dear where much longer than wanted, and somewhat where shorter."""
        ratio = (self.places[there] - self.places[here]) / self.wanted_mm
        off = math.log2(ratio)
        return off * off * (1.5 * ratio if off > 0 else 0.7)
