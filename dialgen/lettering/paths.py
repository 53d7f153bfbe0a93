"""Paths of letters: their ink box, and the same path larger or elsewhere.

A path is a tuple of the steps of ``drawing.PathStep``: M, L, Q, C and Z.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from itertools import pairwise

from dialgen.drawing import PathStep

Steps = tuple[PathStep, ...]
Box = tuple[float, float, float, float]


def ink_box(path: Steps) -> Box:
    """Return the left, bottom, right and top of the curves themselves; zeros for an empty path.

    The box in a font file spans the control points, which may lie beyond the curve.

    >>> ink_box((("M", (0.0, 0.0)), ("Q", (1.0, 2.0, 2.0, 0.0)), ("Z", ())))
    (0.0, 0.0, 2.0, 1.0)
    """
    if not path:
        return 0.0, 0.0, 0.0, 0.0
    left, right = _span([numbers[0::2] for _, numbers in path if numbers])
    bottom, top = _span([numbers[1::2] for _, numbers in path if numbers])
    return left, bottom, right, top


def moved(path: Steps, size: tuple[float, float], by: tuple[float, float] = (0.0, 0.0)) -> Steps:
    """Return ``path`` stretched by ``size`` in x and y about the origin, then moved."""
    (sx, sy), (dx, dy) = size, by
    return tuple(
        (
            kind,
            tuple(
                value
                for x, y in zip(numbers[0::2], numbers[1::2], strict=True)
                for value in (x * sx + dx, y * sy + dy)
            ),
        )
        for kind, numbers in path
    )


def _span(steps: list[tuple[float, ...]]) -> tuple[float, float]:
    """Return the least and the greatest of one coordinate along M, L, Q and C steps."""
    reached = [step[-1] for step in steps]
    for start, (*control, end) in zip(reached, steps[1:], strict=False):
        # A curve can turn back only if a control point lies beyond both of its ends.
        if any(not min(start, end) <= c <= max(start, end) for c in control):
            reached.extend(_turns(start, *control, end))
    return min(reached), max(reached)


def _turns(*points: float) -> Iterator[float]:
    """Yield one coordinate of a quadratic or cubic curve where it turns back between its ends."""
    # The derivative of a curve is one degree less, on the differences of its points.
    slopes = [later - earlier for earlier, later in pairwise(points)]
    for t in _roots(slopes):
        if 0 < t < 1:
            level = list(points)
            while len(level) > 1:
                level = [a + (b - a) * t for a, b in pairwise(level)]
            yield level[0]


def _roots(slopes: list[float]) -> tuple[float, ...]:
    """Return where a straight or quadratic Bezier curve of one coordinate is zero."""
    if len(slopes) == 2:
        first, last = slopes
        return () if first == last else (first / (first - last),)
    first, middle, last = slopes
    # a t^2 - 2 b t + first = 0, solved for 1/t where a is small against the rest.
    a, b = first - 2 * middle + last, first - middle
    square = b * b - a * first
    if square < 0:
        return ()
    lean = b + math.copysign(math.sqrt(square), b)
    return tuple(top / bottom for top, bottom in ((lean, a), (first, lean)) if bottom)
