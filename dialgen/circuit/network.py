"""Resistors and sources between nodes, solved by Kirchhoff's laws.

The stages of the chain have closed formulas; a design is worked out from the network instead, so
that heat, drop, tolerance and temperature of every circuit come from one place, and the tests can
hold the formulas against it.
"""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.circuit.design import Load


@dataclass(frozen=True, slots=True)
class Branch:
    """A resistance between two nodes, with a source in series that drives current from start to end.

    A resistance of zero is a wire, of infinity an open place.
    """

    name: str
    start: str
    end: str
    ohms: float
    emf_v: float = 0.0


@dataclass(frozen=True, slots=True)
class Feed:
    """A current brought in at one node and taken out at another."""

    into: str
    out_of: str
    current_a: float


@dataclass(frozen=True, slots=True, eq=False)
class Solution:
    """Currents and voltages of a network at rest."""

    loads: Mapping[str, Load]
    volts: Mapping[str, float]

    def drop_v(self, start: str, end: str) -> float:
        """Return the voltage of one node over another."""
        return self.volts[start] - self.volts[end]


def solve(branches: Sequence[Branch], feed: Feed | None = None) -> Solution:
    """Return what flows in every branch, by Kirchhoff's two laws for nodes and branches at once.

    Unknown are the nodes' potentials over the first one, and the branches' currents (the sparse
    tableau of Hachtel, Brayton and Gustavson, IEEE Trans. Circuit Theory 18 (1971) 101), so that wires of
    no resistance need no special case.
    """
    closed = [branch for branch in branches if math.isfinite(branch.ohms)]
    ends = [node for branch in closed for node in (branch.start, branch.end)]
    nodes = list(dict.fromkeys([*ends, *((feed.into, feed.out_of) if feed else ())]))
    free = {node: i for i, node in enumerate(nodes[1:])}
    size = len(free) + len(closed)
    matrix, known = np.zeros((size, size)), np.zeros(size)
    for row, branch in enumerate(closed, len(free)):
        for node, sign in ((branch.start, 1.0), (branch.end, -1.0)):
            if node in free:
                matrix[row, free[node]] += sign  # the branch: potentials, source, resistance
                matrix[free[node], row] += sign  # the node: what leaves it
        matrix[row, row] -= branch.ohms
        known[row] -= branch.emf_v
    if feed:
        for node, current_a in ((feed.into, feed.current_a), (feed.out_of, -feed.current_a)):
            if node in free:
                known[free[node]] += current_a
    found = np.linalg.solve(matrix, known)
    volts = {node: float(found[free[node]]) if node in free else 0.0 for node in nodes}
    currents_a = dict(zip((b.name for b in closed), found[len(free) :].tolist(), strict=True))
    loads = {b.name: Load(currents_a.get(b.name, 0.0), b.ohms) for b in branches}
    return Solution(loads, volts)
