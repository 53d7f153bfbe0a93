"""Reads a circuit back out of its picture: what is joined to what, and what it then does."""

from __future__ import annotations

import math
from itertools import pairwise

from dialgen.circuit.network import Branch
from dialgen.schematic.pieces import TERMINAL_MM, Bar, Joint, Kind, Sign, Terminal, Wire

NEAR_MM = 1e-6


class Net:
    """Points of a picture, joined to nodes by wires, dots, terminals and a switch's arm."""

    def __init__(self, pieces):
        """Join all that is drawn joined."""
        self.wires = [piece for piece in pieces if isinstance(piece, Wire)]
        self.dots = [piece.at for piece in pieces if isinstance(piece, Joint)]
        self.signs = [piece for piece in pieces if isinstance(piece, Sign)]
        self.terminals = [piece for piece in pieces if isinstance(piece, Terminal)]
        self.arms = [piece for piece in pieces if isinstance(piece, Bar) and piece.arrow]
        self.above = {}
        for wire in self.wires:
            for a, b in pairwise(wire.points):
                self.join(a, b)
        for dot in self.dots:
            for a, b in self.stretches():
                if between(dot, a, b):
                    self.join(dot, a)
        for terminal in self.terminals:
            for end in [*self.ends(), *(end for arm in self.arms for end in arm.points)]:
                if abs(math.dist(end, terminal.at) - TERMINAL_MM) < NEAR_MM:
                    self.join(terminal.at, end)
        for arm in self.arms:
            self.join(*arm.points)

    def stretches(self):
        """Every straight stretch of wire."""
        return [pair for wire in self.wires for pair in pairwise(wire.points)]

    def ends(self):
        """Both ends of every wire."""
        return [end for wire in self.wires for end in (wire.points[0], wire.points[-1])]

    def node(self, point):
        """The name of the node that a point belongs to."""
        key = (round(point[0], 5) + 0.0, round(point[1], 5) + 0.0)
        while key in self.above:
            key = self.above[key]
        return key

    def join(self, a, b):
        """Make one node of two."""
        one, other = self.node(a), self.node(b)
        if one != other:
            self.above[one] = other

    def terminal(self, text):
        """The node of the terminal with that text."""
        (found,) = [terminal for terminal in self.terminals if terminal.name == text]
        return str(self.node(found.at))

    def branches(self, ohms):
        """Every sign that has ohms as a branch, named by its part."""
        return [
            Branch(sign.part, str(self.node(sign.start)), str(self.node(sign.end)), ohms[sign.part])
            for sign in self.signs
            if sign.part in ohms
        ]

    def ends_of(self, part):
        """The nodes of the sign that stands for a part."""
        (sign,) = [sign for sign in self.signs if sign.part == part]
        return str(self.node(sign.start)), str(self.node(sign.end))

    def kinds(self, kind):
        """The nodes of all signs of a kind, from start to end."""
        found = [sign for sign in self.signs if sign.kind is kind]
        return [(str(self.node(sign.start)), str(self.node(sign.end))) for sign in found]

    def loose_ends(self):
        """Ends of wires and signs with nothing at them."""
        signed = [end for sign in self.signs for end in (sign.start, sign.end)]
        all_ends = [*self.ends(), *signed]
        return [
            end
            for end in all_ends
            if sum(math.dist(end, other) < NEAR_MM for other in all_ends) < 2
            and not any(math.dist(end, dot) < NEAR_MM for dot in self.dots)
            and not any(abs(math.dist(end, t.at) - TERMINAL_MM) < NEAR_MM for t in self.terminals)
        ]

    def undotted(self):
        """Places where three or more wires and signs meet without a dot, or a wire ends on another."""
        signed = [end for sign in self.signs if sign.kind is not Kind.EARTH for end in (sign.start, sign.end)]
        all_ends = [*self.ends(), *signed]
        found = []
        for end in all_ends:
            met = sum(math.dist(end, other) < NEAR_MM for other in all_ends)
            passed = 2 * sum(between(end, a, b) and not at_end(end, a, b) for a, b in self.stretches())
            if met + passed > 2 and not any(math.dist(end, dot) < NEAR_MM for dot in self.dots):
                found.append(end)
        return found

    def pieces_apart(self):
        """How many separate nets there are, every sign joining its two ends."""
        for sign in self.signs:
            self.join(sign.start, sign.end)
        return len({self.node(end) for end in self.ends()})


def at_end(point, a, b):
    """Whether a point is an end of a stretch."""
    return min(math.dist(point, a), math.dist(point, b)) < NEAR_MM


def between(point, a, b):
    """Whether a point is on a stretch, its ends included."""
    return abs(math.dist(a, point) + math.dist(point, b) - math.dist(a, b)) < NEAR_MM
