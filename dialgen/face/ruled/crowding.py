"""Which values of a crowding scale get a numeral: a shortest path over round values.

Nodes are round values; an edge joins two that are 1, 2, 3, 4 or 5·10^n apart, both multiples of
10^n, with room between their numerals.  A path pays for every numeral that is not round, for gaps
much longer or shorter than wanted, and for gaps that no division would fit.  The cheapest path
from end to end is found over the whole scale at once.
"""

from __future__ import annotations

import math
import operator
from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from dialgen.face.ruled.divisions import legal_divisions
from dialgen.face.ruled.ruler import Ruler, decimal_value, digits
from dialgen.stage import Array

Indices = NDArray[np.intp]

# What a path pays, in units of about one badly placed numeral.  Tuned by eye over ohms, decibel,
# square-law, logarithmic and standing-wave scales of 30 to 200 mm.
_GAP_COST = {1: 0.0, 2: 0.0, 3: 0.05, 4: 0.5, 5: 0.0}  # by the units of a gap
_DIGIT_COST = (0.0, 0.0, 0.1, 0.35, 0.35, 0.1, 0.5, 1.1, 0.5, 1.1)  # of a numeral of one digit, by it
_HALF_DIGIT = 1.5  # of a second digit that is 5, as 1.5 or 25
_MORE_DIGITS = 2.2  # of any other further digit
_LONG = 0.8  # of a doubling of the wanted gap, squared
_SHORT = 0.7  # of a halving of it, squared
_TOO_LONG = 3.0  # times the wanted gap: from here on a long gap costs steeply more
_UNLIKE = 0.5  # of a doubling or halving from one gap to the next
_UNDIVIDED = 1.5  # of a gap that even its coarsest division would crowd
_BARE = 1.0  # of a wanted gap's length before infinity, where no marks can stand
_ODD_END = 2.5  # of any gap to an end that is not round, or is infinite
_NOT_LEGAL = 8.0  # of any gap to a round end, or where nothing legal has room
_WIDE = 3.0  # of 6 to 9 units there
_DECADE = 2.0  # of a whole decade there
_HAIR_MM = 1e-9


def cheapest_numerals(ruler: Ruler, forced: tuple[float, ...], wanted_mm: float) -> tuple[float, ...]:
    """Return the values to number, ascending.

    Args:
        ruler: the scale.
        forced: values that must be among them, ascending, both ends included.
        wanted_mm: the distance wanted from numeral to numeral.

    Where no path of legal gaps leaves room for all its numerals, as over many decades on a short
    logarithmic scale, any gap between round numerals is let in, at a price.
    """
    values = np.array(sorted({*round_values(ruler, wanted_mm), *forced}))
    nodes = _nodes(ruler, values, forced, wanted_mm)
    edges = [*_legal_edges(nodes), *_end_edges(nodes)]
    cost, path = _cheapest_path(nodes, edges)
    if cost > 2 * _NOT_LEGAL:
        cost, path = _cheapest_path(nodes, [*edges, _any_edges(nodes)])
    return tuple(values[path].tolist()) if cost < math.inf else forced


def round_values(ruler: Ruler, wanted_mm: float = 0.0) -> list[float]:
    """Return round values inside the scale, as fine as a numeral's room allows where they lie.

    On a scale far longer than its numerals ask for, no finer than a quarter of the distance wanted.
    """
    room_mm = max(ruler.digit_mm + ruler.clear_mm, wanted_mm / 4)
    finite = ruler.along[np.isfinite(ruler.along)]
    cell_mm = ruler.length_mm / (len(ruler.along) - 1)
    found: set[float] = set()
    # Five units must take at least a numeral's room, or no legal gap ends on such a value.
    units = np.diff(finite) / cell_mm * room_mm / 5
    powers = np.ceil(np.log10(units) - 1e-9).astype(int).tolist()
    for low, high, power in zip(finite.tolist(), finite[1:].tolist(), powers, strict=False):
        unit = decimal_value(1, power)
        first, last = math.ceil(low / unit - 1e-9), math.floor(high / unit + 1e-9)
        found.update(decimal_value(count, power) for count in range(first, last + 1))
    return [v for v in found if ruler.start < v < ruler.end]


@dataclass(frozen=True, slots=True, eq=False)
class _Nodes:
    """Candidates in order of place, and what a path pays for each."""

    values: Array
    places: Array
    widths: Array
    costs: Array
    slopes: Array
    stops: Indices
    clear_mm: float
    gap_mm: float
    wanted_mm: float
    foot: bool


@dataclass(frozen=True, slots=True, eq=False)
class _Edges:
    """Pairs of nodes that may follow each other, and what that costs."""

    here: Indices
    there: Indices
    costs: Array


def _nodes(ruler: Ruler, values: Array, forced: tuple[float, ...], wanted_mm: float) -> _Nodes:
    places = ruler.place_mm(values)
    along = ruler.along[np.isfinite(ruler.along)]
    cell_mm = ruler.length_mm / (len(ruler.along) - 1)
    slopes = np.interp(values, along, np.gradient(np.arange(len(along)) * cell_mm, along, edge_order=2))
    costs = np.array([0.0 if v in forced else _roundness(v) for v in values.tolist()])
    stops = np.searchsorted(values, np.array(forced))
    return _Nodes(
        values,
        places,
        ruler.width_mm(values),
        costs,
        slopes,
        stops,
        ruler.clear_mm,
        ruler.gap_mm,
        wanted_mm,
        ruler.foot,
    )


def _roundness(value: float) -> float:
    """Return how far from round a numeral is: by its digits, then by which digit it is."""
    shown = digits(value)
    if len(shown) <= 1:
        return _DIGIT_COST[int(shown or 0)]
    return (_HALF_DIGIT if shown[-1] == "5" else _MORE_DIGITS) * (len(shown) - 1)


def _legal_edges(nodes: _Nodes) -> Iterator[_Edges]:
    """Yield the edges of 1 to 5 units between multiples of that unit, for every power of ten."""
    finite = np.flatnonzero(np.isfinite(nodes.values))
    values = nodes.values[finite]
    if len(values) < 2:
        return
    sizes = np.abs(values[values != 0])
    steps = np.diff(values).min()
    for power in range(math.floor(math.log10(steps)), math.ceil(math.log10(sizes.max())) + 1):
        unit = decimal_value(1, power)
        whole = np.flatnonzero(np.abs(values - np.round(values / unit) * unit) <= 1e-9 * np.abs(values))
        for count, gap_cost in _GAP_COST.items():
            targets = values[whole] + count * unit
            there = np.searchsorted(values, targets - 1e-6 * unit)
            found = there < len(values)
            found[found] = np.abs(values[there[found]] - targets[found]) <= 1e-6 * unit
            yield _roomy(nodes, whole[found], there[found], gap_cost, gap=count * unit)


def _end_edges(nodes: _Nodes) -> Iterator[_Edges]:
    """Yield edges from an end to any node: a fair one to an end that is not round or is infinite.

    To a round end they are dear, and taken only where the ends crowd so much that the legal gaps
    would leave half the scale without a numeral.
    """
    last = len(nodes.values) - 1
    others = np.arange(1, last)
    first_cost, last_cost = (_ODD_END if _is_odd(v) else _NOT_LEGAL for v in nodes.values[[0, last]].tolist())
    yield _roomy(nodes, np.zeros_like(others), others, first_cost)
    # A gap to infinity can have no marks: the shorter, the better.
    bare = 0.0 if math.isfinite(nodes.values[last]) else _BARE
    lengths = nodes.places[last] - nodes.places[others]
    yield _roomy(nodes, others, np.full_like(others, last), last_cost + bare * lengths / nodes.wanted_mm)


def _is_odd(value: float) -> bool:
    return not math.isfinite(value) or len(digits(value)) > 1


def _any_edges(nodes: _Nodes) -> _Edges:
    """Return edges between any nodes not too far apart, dear but for 6 to 9 units of a power of ten."""
    here, there = np.triu_indices(len(nodes.values), 1)
    near = nodes.places[there] - nodes.places[here] < 4 * nodes.wanted_mm
    here, there = (
        here[near & np.isfinite(nodes.values[there])],
        there[near & np.isfinite(nodes.values[there])],
    )
    decades = np.array([digits(v) == "1" for v in nodes.values.tolist()])
    gaps = nodes.values[there] - nodes.values[here]
    units = 10.0 ** np.floor(np.log10(gaps) + 1e-9)
    whole = np.abs(gaps / units - np.round(gaps / units)) < 1e-6
    whole &= np.abs(nodes.values[here] / units - np.round(nodes.values[here] / units)) < 1e-6
    costs = np.where(decades[here] & decades[there], _DECADE, np.where(whole, _WIDE, _NOT_LEGAL))
    return _roomy(nodes, here, there, costs)


def _roomy(
    nodes: _Nodes,
    here: Indices,
    there: Indices,
    cost: float | Array,
    *,
    gap: float = 0.0,
) -> _Edges:
    """Return the edges that leave room between numerals and jump over no forced value, with costs."""
    lengths = nodes.places[there] - nodes.places[here]
    room = lengths - (nodes.widths[here] + nodes.widths[there]) / 2 - nodes.clear_mm
    after = np.searchsorted(nodes.stops, here, side="right")
    next_stop = nodes.stops[np.minimum(after, len(nodes.stops) - 1)]
    fits = (room >= -_HAIR_MM) & (there <= next_stop) & (there > here)
    here, there, lengths = here[fits], there[fits], lengths[fits]
    off = np.log2(lengths / nodes.wanted_mm)
    steep = np.maximum(1.0, (lengths / (_TOO_LONG * nodes.wanted_mm)) ** 1.5)
    costs = np.broadcast_to(cost, fits.shape)[fits] + nodes.costs[there]
    costs = costs + off**2 * np.where(off > 0, _LONG * steep, _SHORT)
    if gap:
        costs = costs + _UNDIVIDED * _undivided(nodes, here, there, gap)
    return _Edges(here, there, costs)


def _undivided(nodes: _Nodes, here: Indices, there: Indices, gap: float) -> NDArray[np.bool_]:
    """Return whether not even the coarsest division of each gap would leave its marks apart.

    Within a gap the scale is taken to stretch evenly from the density at one end to the other's.
    """
    coarsest = min(division.parts for division in legal_divisions(gap))
    low, high = nodes.slopes[here], nodes.slopes[there]
    share = (high - low) / (2 * coarsest)
    # At the foot of a scale the first marks may be left out.
    first = np.where(nodes.foot & (here == 0), math.inf, low + share)
    nearest = np.minimum(first, high - share) * gap / coarsest
    return np.asarray(nearest < nodes.gap_mm)


def _cheapest_path(nodes: _Nodes, edges: list[_Edges]) -> tuple[float, list[int]]:
    """Return the cheapest path from the first node to the last and its cost, infinite where there is none.

    Edges lead upwards only, so those taken in the order of their start find all that lead there
    already settled (dynamic programming).  What a path pays from gap to gap for their unlike
    lengths makes the edges, not the nodes, the steps of the programme.
    """
    here = np.concatenate([e.here for e in edges])
    there = np.concatenate([e.there for e in edges])
    order = np.argsort(here, kind="stable")
    sizes = np.log2(nodes.places[there] - nodes.places[here])
    columns = (here, there, np.concatenate([e.costs for e in edges]), sizes)
    arrivals: list[list[_Arrival]] = [[] for _ in nodes.values]
    for start, end, cost, size in zip(*(c[order].tolist() for c in columns), strict=True):
        if start == 0:
            arrivals[end].append((cost, size, 0, None))
        elif arrivals[start]:
            total, before = min([(a[0] + _UNLIKE * abs(size - a[1]), a) for a in arrivals[start]], key=_first)
            arrivals[end].append((total + cost, size, start, before))
    if not arrivals[-1]:
        return math.inf, []
    step: _Arrival | None = min(arrivals[-1], key=_first)
    cost, path = step[0] if step else math.inf, [len(nodes.values) - 1]
    while step:
        path.append(step[2])
        step = step[3]
    return cost, path[::-1]


_Arrival = tuple[float, float, int, "_Arrival | None"]
"""A way to a node: its cost, the size of its last gap, where that began, and how it got there."""

_first = operator.itemgetter(0)
