"""The cheapest path along a scale, from numeral to numeral."""

from __future__ import annotations

import math
import operator
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from dialgen.stage import Array

Indices = NDArray[np.intp]

UNLIKE = 0.5
"""What a path pays for a doubling or halving from one gap to the next, in badly placed numerals."""


@dataclass(frozen=True, slots=True, eq=False)
class Edges:
    """Pairs of places, by their numbers, that may follow each other, and what that costs."""

    here: Indices
    there: Indices
    costs: Array


def cheapest_path(places: Array, edges: Sequence[Edges]) -> tuple[float, list[int]]:
    """Return the cheapest path from the first place to the last and its cost, infinite where there is none.

    Edges lead upwards only, so those taken in the order of their start find all that lead there
    already settled (dynamic programming).  What a path pays from gap to gap for their unlike
    lengths makes the edges, not the nodes, the steps of the programme.
    """
    here = np.concatenate([e.here for e in edges])
    there = np.concatenate([e.there for e in edges])
    order = np.argsort(here, kind="stable")
    sizes = np.log2(places[there] - places[here])
    columns = (here, there, np.concatenate([e.costs for e in edges]), sizes)
    arrivals: list[list[_Arrival]] = [[] for _ in places]
    for start, end, cost, size in zip(*(c[order].tolist() for c in columns), strict=True):
        if start == 0:
            arrivals[end].append((cost, size, 0, None))
        elif arrivals[start]:
            total, before = min([(a[0] + UNLIKE * abs(size - a[1]), a) for a in arrivals[start]], key=_first)
            arrivals[end].append((total + cost, size, start, before))
    if not arrivals[-1]:
        return math.inf, []
    step: _Arrival | None = min(arrivals[-1], key=_first)
    cost, path = step[0] if step else math.inf, [len(places) - 1]
    while step:
        path.append(step[2])
        step = step[3]
    return cost, path[::-1]


_Arrival = tuple[float, float, int, "_Arrival | None"]
"""A way to a node: its cost, the size of its last gap, where that began, and how it got there."""

_first = operator.itemgetter(0)
