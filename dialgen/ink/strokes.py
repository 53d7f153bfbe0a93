"""Strokes along corners: the area within half a width of a line of straight pieces.

Where two pieces meet at an angle that both are long enough for, they share the corner's bisector,
so that a whole figure becomes one band.  Elsewhere a piece ends square and the corner is filled by
a patch of its own.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from enum import StrEnum

import numpy as np
from numpy.typing import NDArray

from dialgen.drawing import Cap, Point
from dialgen.ink.rounds import disc
from dialgen.stage import Array

_MITRE_LIMIT = 10.0
"""The longest mitre, in widths; a sharper corner is cut off.  All renderers draw with this limit."""

_ROUND_ENOUGH = 1 / math.cos(math.radians(7.5))
"""Up to a bend of 15 degrees a rounded corner may stand as a mitre: it is 0.9 % of half a width."""

_SAME = 1e-9


class Corner(StrEnum):
    """How a stroke goes around a corner."""

    MITRE = "mitre"
    ROUND = "round"


def bar(start: Point, end: Point, half: float) -> tuple[Point, Point, Point, Point]:
    """Return the corners of a straight stroke between two different points, square ends."""
    (x1, y1), (x2, y2) = start, end
    scale = half / math.hypot(x2 - x1, y2 - y1)
    across_x, across_y = (y1 - y2) * scale, (x2 - x1) * scale
    return (
        (x1 - across_x, y1 - across_y), (x2 - across_x, y2 - across_y),
        (x2 + across_x, y2 + across_y), (x1 + across_x, y1 + across_y),
    )  # fmt: skip


def anticlockwise(corners: Array) -> Array:
    """Return the corners of a figure in the order that goes anticlockwise around it."""
    return corners if signed_area(corners) >= 0 else corners[::-1]


def signed_area(corners: Array) -> float:
    """Return the area a contour winds about, positive when it goes anticlockwise."""
    # From the first corner, so that the edges at it add nothing, and rounding far from the pivot little.
    x, y = (corners - corners[0]).T
    return float(x[:-1] @ y[1:] - y[:-1] @ x[1:]) / 2


def without_repeats(corners: Array, *, closed: bool) -> Array:
    """Return the corners without those that stand on the one after them."""
    steps = _steps(corners)
    keep = np.hypot(steps[:, 0], steps[:, 1]) > _SAME
    if not closed:
        keep[-1] = True
    return corners[keep]


def ribbon(corners: Array, half: float, *, closed: bool, corner: Corner, cap: Cap) -> list[Array]:
    """Return the contours of a stroke along ``corners``, no two neighbours of which are the same.

    Args:
        corners: at least two, (n, 2).
        half: half of the stroke's width.
        closed: whether the last corner is joined to the first.
        corner: how it goes around corners.
        cap: how it ends where it is not closed.
    """
    steps = _steps(corners) if closed else _steps(corners)[:-1]
    lengths = np.hypot(steps[:, 0], steps[:, 1])
    left = np.column_stack((-steps[:, 1], steps[:, 0])) * (half / lengths)[:, None]
    joints = np.arange(len(corners)) if closed else np.arange(1, len(corners) - 1)
    tips, reaches = _tips(left[joints - 1], left[joints % len(left)], half)
    # The bisector cuts this much off the inner side of both pieces; half of each is its own to give.
    cut = half * np.sqrt(np.maximum(reaches**2 - 1, 0.0))
    room = np.minimum(lengths[joints - 1], lengths[joints % len(left)]) / 2
    limit = _MITRE_LIMIT if corner is Corner.MITRE else _ROUND_ENOUGH
    shared = np.zeros(len(corners), dtype=np.bool_)
    shared[joints] = (reaches <= limit) & (cut <= room)
    bisectors = np.zeros_like(corners)
    bisectors[joints] = tips
    contours = list(_bands(corners, left, bisectors, shared, closed=closed))
    for joint, tip, reach in zip(joints.tolist(), tips, reaches.tolist(), strict=True):
        if not shared[joint]:
            sharp = tip if reach <= _MITRE_LIMIT else None
            before, after = left[joint - 1], left[joint % len(left)]
            contours.append(
                disc(tuple(corners[joint].tolist()), half)
                if corner is Corner.ROUND
                else _patch(corners[joint], before, after, sharp)
            )
    if cap is Cap.ROUND and not closed:
        contours += [disc(tuple(corners[end].tolist()), half) for end in (0, -1)]
    return contours


def _steps(corners: Array) -> Array:
    """Return the way from each corner to the next, from the last to the first."""
    return np.concatenate((corners[1:], corners[:1])) - corners


def _tips(before: Array, after: Array, half: float) -> tuple[Array, Array]:
    """Return where the left sides of two pieces meet, from their corner, and how far in half widths.

    Both sides are parallel to their pieces at a distance of h, so with normals m and n of that
    length they meet at (m + n)·h²/(h² + m·n); opposite normals meet nowhere.
    """
    share = np.maximum(half**2 + (before * after).sum(axis=1), 1e-12 * half**2)
    tips = (before + after) * (half**2 / share)[:, None]
    return tips, np.sqrt(2 * half**2 / share)


def _patch(at: Array, before: Array, after: Array, tip: Array | None) -> Array:
    """Return what fills the outer side of a corner between two pieces that end square at it."""
    turns_left = before[0] * after[1] - before[1] * after[0] > 0
    first, last, side = (before, after, -1.0) if turns_left else (after, before, 1.0)
    points = [np.zeros(2), first, last] if tip is None else [np.zeros(2), first, tip, last]
    return at + side * np.array(points)


def _bands(
    corners: Array, left: Array, bisectors: Array, shared: NDArray[np.bool_], *, closed: bool
) -> Iterator[Array]:
    """Yield the contours of the pieces, those put together that share their bisectors."""
    if closed and shared.all():
        # The right side runs with the stroke, so that both go anticlockwise around what is inked.
        yield corners - bisectors
        yield (corners + bisectors)[::-1]
        return
    count = len(corners)
    breaks = np.flatnonzero(np.logical_not(shared)).tolist()
    ends = [*breaks[1:], breaks[0] + count] if closed else breaks[1:]
    for first, last in zip(breaks, ends, strict=False):
        run = np.arange(first, last + 1) % count
        side = bisectors[run]
        side[0], side[-1] = left[first], left[(last - 1) % count]
        yield np.concatenate((corners[run] - side, (corners[run] + side)[::-1]))
