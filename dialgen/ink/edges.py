"""Two edges, exactly: how near they come and where; and whether edges wind about a point.

Everything here is on rows of numbers: the n-th edge of one list with the n-th of the other.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from dialgen.stage import Array

_TINY = 1e-30


def boxes(edges: Array) -> Array:
    """Return the box of each edge, (4, n) as rows left, bottom, right, top."""
    return np.concatenate((np.minimum(edges[:2], edges[2:]), np.maximum(edges[:2], edges[2:])))


def near(one: Array, other: Array, reach_mm: float) -> NDArray[np.bool_]:
    """Return whether boxes (4, n) lie within ``reach_mm`` of each other."""
    across = np.maximum(one[0] - other[2], other[0] - one[2])
    upward = np.maximum(one[1] - other[3], other[1] - one[3])
    apart = np.square(np.maximum(across, 0.0)) + np.square(np.maximum(upward, 0.0))
    return np.asarray(apart <= reach_mm * reach_mm)


def gaps(one: Array, other: Array) -> tuple[Array, Array]:
    """Return the least distance of each pair of edges, and its middle.

    Args:
        one: edges (4, n) as rows x1, y1, x2, y2.
        other: the edges to go with them.

    Returns:
        The distances (n,), 0 where the edges cross, and the points (2, n) half way between.
    """
    p, q = one[:2], other[:2]
    r, s = one[2:] - p, other[2:] - q
    # Edges that do not cross are nearest at an end of one of them.
    feet = np.empty((4, 2, one.shape[1]))
    tips = np.stack((q, other[2:], p, one[2:]))
    for foot, tip, start, along in zip(feet, tips, (p, p, q, q), (r, r, s, s), strict=True):
        foot[:] = _foot(tip, start, along)
    away = np.hypot(feet[:, 0] - tips[:, 0], feet[:, 1] - tips[:, 1])
    nearest, pair = away.argmin(axis=0), np.arange(one.shape[1])
    distance = away[nearest, pair]
    middle = (feet[nearest, :, pair] + tips[nearest, :, pair]).T / 2
    # Each has its ends strictly on two sides of the other; ends that only touch are 0 away already.
    # For edges in one line the sides are but rounding, so these must be beside each other as well.
    before, after = _cross(s, p - q), _cross(s, one[2:] - q)
    left, right = _cross(r, q - p), _cross(r, other[2:] - p)
    crossed = (before * after < 0) & (left * right < 0) & near(boxes(one), boxes(other), 0.0)
    share = before[crossed] / (before[crossed] - after[crossed])
    distance[crossed] = 0.0
    middle[:, crossed] = p[:, crossed] + share * r[:, crossed]
    return distance, middle


def turns(edges: Array, points: Array) -> NDArray[np.int_]:
    """Return what each edge adds to the winding number of its point: 1, -1 or 0.

    A ray from the point to the right is crossed upwards or downwards; the lower end of an edge
    belongs to it and the upper does not, so that a corner on the ray counts once (Sunday's
    formulation of the winding number).

    Args:
        edges: (4, n).
        points: (2, n).
    """
    x1, y1, x2, y2 = edges
    x, y = points
    side = (x2 - x1) * (y - y1) - (x - x1) * (y2 - y1)
    upwards = (y1 <= y) & (y < y2) & (side > 0)
    downwards = (y2 <= y) & (y < y1) & (side < 0)
    return np.asarray(upwards.astype(np.int_) - downwards)


def _foot(tip: Array, start: Array, along: Array) -> Array:
    """Return the point of each edge that is nearest to each tip."""
    share = ((tip - start) * along).sum(axis=0) / np.maximum((along * along).sum(axis=0), _TINY)
    return np.asarray(start + np.clip(share, 0.0, 1.0) * along)


def _cross(a: Array, b: Array) -> Array:
    return np.asarray(a[0] * b[1] - a[1] * b[0])
