"""Which inks of many meet, or come near: boxes first, then edges, then one inside the other."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import NamedTuple

import numpy as np
from numpy.typing import ArrayLike

from dialgen.drawing import Point
from dialgen.ink.edges import gaps, near, turns
from dialgen.ink.shapes import Shape
from dialgen.ink.sheet import Indices, Sheet, children, counted, descend, lay_out
from dialgen.stage import Array

TOUCH_MM = 1e-9
"""Inks this near touch: what shares an edge or a corner does, whatever rounding left between."""

_AT_ONCE = 1 << 19
"""How many pairs are looked at together: what fits in some tens of megabytes."""


class Near(NamedTuple):
    """Two shapes by their numbers, the lower first; their distance; the point half way, or a shared one."""

    one: int
    other: int
    gap_mm: float
    place: Point


def touch(a: Shape, b: Shape) -> Point | None:
    """Return a point that two areas share or meet at; None where they are clear of each other."""
    met = meetings((a, b))
    return met[0][2] if met else None


def clearance(a: Shape, b: Shape) -> float:
    """Return the least distance between two areas, in mm; 0 where they touch."""
    sheet = lay_out((a, b))
    # Some of the corners of one and of the other are never nearer than the areas.
    corners = sheet.edges[:2, sheet.fine.first[:-1]]
    split = sheet.pieces.first[1]
    one, other = corners[:, :split, None], corners[:, None, split:]
    bound_mm = float(np.hypot(one[0] - other[0], one[1] - other[1]).min()) + TOUCH_MM
    return min(pair.gap_mm for pair in neighbours((a, b), bound_mm))


def meetings(
    shapes: Sequence[Shape], groups: Sequence[int] | None = None, apart: ArrayLike | None = None
) -> list[tuple[int, int, Point]]:
    """Return all pairs of shapes that touch though they must not, each with a point where they do.

    Args:
        shapes: the areas; what is returned goes by their numbers, counted from 0.
        groups: a number from 0 up for each shape; without them all are of group 0.
        apart: ``apart[g][h]`` is whether shapes of the groups g and h must stand apart, given in
            either order; ``apart[g][g]`` is for those within a group.  Without it all must.
    """
    return [(one, other, place) for one, other, _, place in neighbours(shapes, TOUCH_MM, groups, apart)]


def neighbours(
    shapes: Sequence[Shape],
    within_mm: float,
    groups: Sequence[int] | None = None,
    apart: ArrayLike | None = None,
    effort: int | None = None,
) -> list[Near]:
    """Return all pairs of shapes that touch, or come within a distance of each other, in order.

    Args:
        shapes: the areas.
        within_mm: the largest distance that counts; up to ``TOUCH_MM`` it is given as 0.
        groups: as in `meetings`.
        apart: as in `meetings`.
        effort: about how many pairs of edges to compare at most between any two groups; where more
            would be, pairs are left out, those first whose boxes have least in common.
    """
    if len(shapes) < 2:
        return []
    reach_mm = max(within_mm, TOUCH_MM)
    boxes = np.array([shape.box for shape in shapes]).T
    one, other = _near_boxes(boxes, reach_mm)
    group = np.zeros(len(shapes), dtype=np.intp) if groups is None else np.asarray(groups)
    if apart is not None:
        matrix = np.asarray(apart, dtype=np.bool_)
        keep = matrix[group[one], group[other]] | matrix[group[other], group[one]]
        one, other = one[keep], other[keep]
    if effort is not None:
        edges = np.array([shape.ends[-1] for shape in shapes])
        keep = _within_effort(
            boxes[:, one], boxes[:, other], group[one], group[other], edges[one] * edges[other], effort
        )
        one, other = one[keep], other[keep]
    return sorted(_within_reach(shapes, np.sort(np.stack((one, other)), axis=0), reach_mm))


def _within_effort(
    one: Array, other: Array, group: Indices, other_group: Indices, costs: Indices, effort: int
) -> Indices:
    """Return the numbers of the pairs to look at: of each two groups those that have most in common.

    Args:
        one: boxes (4, n), of the first of each pair.
        other: those of the second.
        group: the groups of the first.
        other_group: those of the second.
        costs: how many pairs of edges each pair stands for.
        effort: how many to compare of each two groups.
    """
    low, high = np.maximum(one[:2], other[:2]), np.minimum(one[2:], other[2:])
    common_mm = (high - low).min(axis=0)
    both = np.minimum(group, other_group) * (max(group.max(initial=0), other_group.max(initial=0)) + 1)
    both += np.maximum(group, other_group)
    order = np.lexsort((-common_mm, both))
    spent = np.cumsum(costs[order]) - costs[order]
    _, first, of = np.unique(both[order], return_index=True, return_inverse=True)
    return np.asarray(order[spent - spent[first][of] < effort])


def _within_reach(shapes: Sequence[Shape], pairs: Indices, reach_mm: float) -> Iterator[Near]:
    """Yield those of some pairs (2, n) that lie within reach, exactly."""
    if not pairs.size:
        return
    # Shapes whose boxes are clear of all the others never come to the sheet.
    used, numbers = np.unique(pairs, return_inverse=True)
    sheet = lay_out([shapes[i] for i in used.tolist()])
    counts = np.diff(sheet.pieces.first)
    one, other = numbers.reshape(pairs.shape)
    for block in _blocks(counts[one] * counts[other]):
        for found in _settled(sheet, one[block], other[block], reach_mm):
            yield found._replace(one=int(used[found.one]), other=int(used[found.other]))


def _near_boxes(boxes: Array, reach_mm: float) -> tuple[Indices, Indices]:
    """Return all pairs whose boxes are near each other, by a sweep from left to right."""
    order = boxes[0].argsort()
    upto = np.searchsorted(boxes[0][order], boxes[2][order] + reach_mm, side="right")
    counts = upto - np.arange(1, len(order) + 1)
    found = []
    for block in _blocks(counts):
        row, number = counted(counts[block])
        at = row + block.start
        one, other = order[at], order[at + 1 + number]
        keep = near(boxes[:, one], boxes[:, other], reach_mm)
        found.append((one[keep], other[keep]))
    ones, others = zip(*found, strict=True)
    return np.concatenate(ones), np.concatenate(others)


def _blocks(counts: Indices) -> Iterator[slice]:
    """Yield slices of rows that stand for at most ``_AT_ONCE`` pairs together, or a single row."""
    upto, start = np.cumsum(counts), 0
    while start < len(counts):
        before = int(upto[start - 1]) if start else 0
        end = max(start + 1, int(np.searchsorted(upto, before + _AT_ONCE, side="right")))
        yield slice(start, end)
        start = end


def _settled(sheet: Sheet, one: Indices, other: Indices, reach_mm: float) -> Iterator[Near]:
    """Yield those of some pairs that lie within reach, exactly."""
    gap, place = _edge_gaps(sheet, one, other, reach_mm)
    for inner, outer in ((one, other), (other, one)):
        clear = np.flatnonzero(gap > TOUCH_MM)
        lies, at = _contained(sheet, inner[clear], outer[clear])
        gap[clear[lies]], place[:, clear[lies]] = 0.0, at
    gap[gap <= TOUCH_MM] = 0.0
    kept = np.flatnonzero(gap <= reach_mm)
    rows = one[kept].tolist(), other[kept].tolist(), gap[kept].tolist(), place[:, kept].T.tolist()
    for i, j, gap_mm, (x, y) in zip(*rows, strict=True):
        yield Near(i, j, gap_mm, (x, y))


def _edge_gaps(sheet: Sheet, one: Indices, other: Indices, reach_mm: float) -> tuple[Array, Array]:
    """Return how near the edges of each pair come (n,), and where (2, n); inf beyond reach."""
    gap, place = np.full(len(one), np.inf), np.zeros((2, len(one)))
    of_pair, a, b = descend(sheet.pieces, sheet.shapes, one, other, reach_mm)
    of_pieces, a, b = descend(sheet.fine, sheet.pieces.boxes, a, b, reach_mm)
    distance, middle = gaps(sheet.edges[:, a], sheet.edges[:, b])
    pair = of_pair[of_pieces]
    nearest_first = np.lexsort((distance, pair))
    found, first = np.unique(pair[nearest_first], return_index=True)
    best = nearest_first[first]
    gap[found], place[:, found] = distance[best], middle[:, best]
    return gap, place


def _contained(sheet: Sheet, inner: Indices, outer: Indices) -> tuple[Indices, Array]:
    """Return which pairs have a contour of the one within the other, and a point of it (2, n).

    The edges of a pair are clear of each other here, so a contour lies within as a whole or not at
    all, and its first corner tells.
    """
    pair, contour = children(sheet.first_contour, inner)
    points = sheet.edges[:2, sheet.contours[contour]]
    boxed = near(np.concatenate((points, points)), sheet.shapes[:, outer[pair]], 0.0)
    pair, points = pair[boxed], points[:, boxed]
    of, piece = children(sheet.pieces.first, outer[pair])
    _, low, right, high = sheet.pieces.boxes[:, piece]
    ahead = (low <= points[1, of]) & (points[1, of] <= high) & (points[0, of] <= right)
    of, piece = of[ahead], piece[ahead]
    of_piece, edge = children(sheet.fine.first, piece)
    of = of[of_piece]
    winding = np.bincount(of, turns(sheet.edges[:, edge], points[:, of]), minlength=len(pair))
    lies = np.rint(winding) != 0
    found, first = np.unique(pair[lies], return_index=True)
    return found, points[:, lies][:, first]
