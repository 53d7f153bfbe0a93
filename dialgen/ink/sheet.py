"""Many shapes laid out in one sheet, so that numpy may look at all of them at once.

A sheet has three levels, each in boxes: the shapes, their pieces of a few edges, and the edges.
Whoever looks for what lies near what goes down them, and at each level leaves behind all pairs
whose boxes are clear of each other: of millions of pairs of edges on a face, some hundreds are left.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from dialgen.ink.edges import boxes, near
from dialgen.ink.shapes import Shape
from dialgen.stage import Array

Indices = NDArray[np.intp]

PIECE = 8
"""How many edges at most share a piece; more of them make larger boxes, fewer more boxes."""


@dataclass(frozen=True, slots=True, eq=False)
class Level:
    """Boxes (4, n) as rows left, bottom, right, top, and where the children of each parent start.

    The children of parent i are those from ``first[i]`` up to ``first[i + 1]``.
    """

    boxes: Array
    first: Indices


@dataclass(frozen=True, slots=True, eq=False)
class Sheet:
    """Shapes as one row of edges.

    Args:
        edges: (4, n) as rows x1, y1, x2, y2.
        shapes: boxes (4, n) of the shapes.
        pieces: of the shapes.
        fine: the boxes of the edges, as children of the pieces.
        contours: the number of each contour's first edge, all shapes' one after the other.
        first_contour: where the contours of each shape start.
    """

    edges: Array
    shapes: Array
    pieces: Level
    fine: Level
    contours: Indices
    first_contour: Indices


def lay_out(shapes: Sequence[Shape]) -> Sheet:
    """Return the sheet of at least one shape."""
    per_shape = np.array([len(shape.ends) for shape in shapes])
    before = _starts(np.array([shape.ends[-1] for shape in shapes]))[:-1]
    ends = np.array([end for shape in shapes for end in shape.ends]) + np.repeat(before, per_shape)
    starts = np.append(0, ends[:-1])
    edges = np.empty((4, ends[-1]))
    np.concatenate([shape.corners for shape in shapes], axis=1, out=edges[:2])
    edges[2:, :-1] = edges[:2, 1:]
    edges[2:, ends - 1] = edges[:2, starts]
    fine = boxes(edges)
    per_contour = -(-(ends - starts) // PIECE)
    owner, number = counted(per_contour)
    first_edge = starts[owner] + PIECE * number
    first_contour = _starts(per_shape)
    pieces = np.concatenate((
        np.minimum.reduceat(fine[:2], first_edge, axis=1), np.maximum.reduceat(fine[2:], first_edge, axis=1)
    ))  # fmt: skip
    return Sheet(
        edges=edges,
        shapes=np.array([shape.box for shape in shapes]).T,
        pieces=Level(pieces, _starts(per_contour)[first_contour]),
        fine=Level(fine, np.append(first_edge, ends[-1])),
        contours=starts,
        first_contour=first_contour,
    )


def counted(counts: Indices) -> tuple[Indices, Indices]:
    """Return, for each of ``counts[i]`` things of owner i, its owner and its number from 0.

    >>> [row.tolist() for row in counted(np.array([2, 0, 3]))]
    [[0, 0, 2, 2, 2], [0, 1, 0, 1, 2]]
    """
    owner = np.repeat(np.arange(len(counts)), counts)
    return owner, np.arange(len(owner)) - _starts(counts)[owner]


def children(first: Indices, parents: Indices) -> tuple[Indices, Indices]:
    """Return the children of each of ``parents``: which of those each belongs to, and its number."""
    start = first[parents]
    row, number = counted(first[parents + 1] - start)
    return row, start[row] + number


def descend(
    level: Level, parents: Array, one: Indices, other: Indices, reach_mm: float
) -> tuple[Indices, Indices, Indices]:
    """Return the pairs of children that are near each other, of pairs of parents.

    Args:
        level: the children.
        parents: the parents' boxes (4, n).
        one: the first parent of each pair.
        other: its second parent.
        reach_mm: how far apart boxes may be.

    Returns:
        For each pair of children the number of its parents' pair, in order, and the two children.
    """
    row, first = _facing(level, parents, one, other, reach_mm)
    other_row, second = _facing(level, parents, other, one, reach_mm)
    theirs = np.bincount(other_row, minlength=len(one))
    # Each child on the one side meets all those on the other side of its own pair.
    of, number = counted(theirs[row])
    pair, left, right = row[of], first[of], second[_starts(theirs)[row[of]] + number]
    keep = near(level.boxes[:, left], level.boxes[:, right], reach_mm)
    return pair[keep], left[keep], right[keep]


def _facing(
    level: Level, parents: Array, of: Indices, facing: Indices, reach_mm: float
) -> tuple[Indices, Indices]:
    """Return the children of each parent that are near the parent it is paired with."""
    row, child = children(level.first, of)
    keep = near(level.boxes[:, child], parents[:, facing[row]], reach_mm)
    return row[keep], child[keep]


def _starts(counts: Indices) -> Indices:
    return np.concatenate((np.zeros(1, dtype=np.intp), np.cumsum(counts)))
