"""Which values of a crowding scale get a numeral: a shortest path over round values.

Nodes are round values; an edge joins two that are 1, 2, 3, 4 or 5·10^n apart, both multiples of
10^n, with room between their numerals.  A path pays for every numeral that is not round, for gaps
much longer or shorter than wanted, and for gaps that no division would fit.  The cheapest path
from end to end is found over the whole scale at once.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from dialgen.face.ruled.divisions import legal_divisions
from dialgen.face.ruled.paths import Edges, Indices, cheapest_path
from dialgen.face.ruled.ruler import Ruler, decimal_value, digits
from dialgen.stage import Array

# What a path pays, in units of about one badly placed numeral.  Tuned by eye over ohms, decibel,
# square-law, logarithmic and standing-wave scales of 30 to 200 mm.
_GAP_COST = {1: 0.0, 2: 0.0, 3: 0.05, 4: 0.5, 5: 0.0}  # by the units of a gap
_DIGIT_COST = (0.0, 0.0, 0.1, 0.35, 0.35, 0.1, 0.5, 1.1, 0.5, 1.1)  # of a numeral of one digit, by it
_HALF_DIGIT = 1.5  # of a second digit that is 5, as 1.5 or 25
_MORE_DIGITS = 2.2  # of any other further digit
_LONG = 0.8  # of a doubling of the wanted gap, squared
_SHORT = 0.7  # of a halving of it, squared
_TOO_LONG = 3.0  # times the wanted gap: from here on a long gap costs steeply more
_UNDIVIDED = 1.5  # of a gap that even its coarsest division would crowd
_SPARSE = 3.0  # of a doubling of the wanted gap without a mark, squared
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
    cost, path = cheapest_path(nodes.places, edges)
    if cost > 2 * _NOT_LEGAL:
        cost, path = cheapest_path(nodes.places, [*edges, _any_edges(nodes)])
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
    along: Array
    along_mm: Array
    stops: Indices
    clear_mm: float
    gap_mm: float
    wanted_mm: float
    foot: bool


def _nodes(ruler: Ruler, values: Array, forced: tuple[float, ...], wanted_mm: float) -> _Nodes:
    places = ruler.place_mm(values)
    along = ruler.along[np.isfinite(ruler.along)]
    cell_mm = ruler.length_mm / (len(ruler.along) - 1)
    along_mm: Array = cell_mm * np.arange(len(along), dtype=np.float64)
    slopes = np.interp(values, along, np.gradient(along_mm, along, edge_order=2))
    costs = np.array([0.0 if v in forced else _roundness(v) for v in values.tolist()])
    stops = np.searchsorted(values, np.array(forced))
    return _Nodes(
        values,
        places,
        ruler.width_mm(values),
        costs,
        slopes,
        along,
        along_mm,
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


def _legal_edges(nodes: _Nodes) -> Iterator[Edges]:
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


def _end_edges(nodes: _Nodes) -> Iterator[Edges]:
    """Yield edges from an end to any node: a fair one to an end that is not round or is infinite.

    To a round end they are dear, and taken only where the ends crowd so much that the legal gaps
    would leave half the scale without a numeral.
    """
    last = len(nodes.values) - 1
    others = np.arange(1, last)
    first, end = np.zeros_like(others), np.full_like(others, last)
    yield _roomy(nodes, first, others, _end_costs(nodes, first, others, nodes.values[0]))
    yield _roomy(nodes, others, end, _end_costs(nodes, others, end, nodes.values[last]))


def _end_costs(nodes: _Nodes, here: Indices, there: Indices, end: float) -> Array:
    """Return what gaps to an end pay that are not legal."""
    if math.isfinite(end) and _is_odd(end):
        return np.full(len(here), _ODD_END)
    # A gap to infinity, or to a round end that nothing cuts, has hardly a mark: the shorter, the better.
    bare = _BARE * (nodes.places[there] - nodes.places[here]) / nodes.wanted_mm
    if math.isinf(end):
        return _ODD_END + bare
    return bare + np.where(_are_whole(nodes, here, there), _WIDE, _NOT_LEGAL)


def _is_odd(value: float) -> bool:
    return not math.isfinite(value) or len(digits(value)) > 1


def _any_edges(nodes: _Nodes) -> Edges:
    """Return edges between any nodes not too far apart, dear but for 6 to 9 units of a power of ten."""
    here, there = np.triu_indices(len(nodes.values), 1)
    near = nodes.places[there] - nodes.places[here] < 4 * nodes.wanted_mm
    here, there = (
        here[near & np.isfinite(nodes.values[there])],
        there[near & np.isfinite(nodes.values[there])],
    )
    decades = np.array([digits(v) == "1" for v in nodes.values.tolist()])
    whole = _are_whole(nodes, here, there)
    costs = np.where(decades[here] & decades[there], _DECADE, np.where(whole, _WIDE, _NOT_LEGAL))
    return _roomy(nodes, here, there, costs)


def _are_whole(nodes: _Nodes, here: Indices, there: Indices) -> NDArray[np.bool_]:
    """Return which gaps are 1 to 9 units of a power of ten between multiples of it."""
    low, gaps = nodes.values[here], nodes.values[there] - nodes.values[here]
    units = 10.0 ** np.floor(np.log10(gaps) + 1e-9)
    counts = np.stack([gaps / units, low / units])
    return np.asarray(np.all(np.abs(counts - np.round(counts)) < 1e-6, axis=0))


def _roomy(
    nodes: _Nodes,
    here: Indices,
    there: Indices,
    cost: float | Array,
    *,
    gap: float = 0.0,
) -> Edges:
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
        # Scales crowd towards their ends; only there so many are far apart that it is worth asking.
        far = np.flatnonzero((lengths > nodes.wanted_mm) & ((here == 0) | (there == len(nodes.values) - 1)))
        if len(far):
            costs[far] += _SPARSE * _sparse(nodes, here[far], there[far], gap)
    return Edges(here, there, costs)


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


def _sparse(nodes: _Nodes, here: Indices, there: Indices, gap: float) -> Array:
    """Return how much farther apart than numerals are wanted marks stand in each gap: doublings, squared.

    So they are where a gap crowds at its one end alone, and no division has room but the coarsest.
    """
    longest = nodes.places[there] - nodes.places[here]
    low = nodes.values[here]
    # From the coarsest to the finest: the last that has room is the one that will be drawn.
    for division in reversed(legal_divisions(gap)):
        cuts = low[:, None] + np.linspace(0.0, gap, division.parts + 1)
        steps = np.diff(np.interp(cuts, nodes.along, nodes.along_mm), axis=1)
        # At the foot of a scale the first marks may be left out.
        roomy = (steps.min(axis=1) >= nodes.gap_mm) | (nodes.foot & (here == 0))
        longest = np.where(roomy, steps.max(axis=1), longest)
    doublings = np.log2(np.maximum(longest / nodes.wanted_mm, 1.0))
    return np.asarray(doublings**2)
