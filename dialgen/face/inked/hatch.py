"""Hatching: even oblique strokes across a band, cut off at its edges."""

from __future__ import annotations

import math
from collections.abc import Iterator
from itertools import pairwise

from dialgen.drawing import Line, Point, Style
from dialgen.face.inked.courses import Course

_LEAST_LENGTH = 1.5


def hatch(outer: Course, inner: Course, pitch_mm: float, slant: float, style: Style) -> Iterator[Line]:
    """Yield strokes at 45 degrees to the band between two courses; they end on its edges.

    Where the band is bent they follow it, so that they are oblique to it everywhere; its ends are
    the straight lines between the ends of the courses, as those of `bands.between` are.

    Args:
        outer: the outer edge of the band.
        inner: the inner edge.
        pitch_mm: from stroke to stroke, square to them.
        slant: 1 where the strokes lean clockwise outwards, -1 for the other way.
        style: how they are drawn.
    """
    unit_mm = (outer.unit_mm + inner.unit_mm) / 2
    low, high = min(outer.low, inner.low), max(outer.high, inner.high)
    lean = slant * min(_height_mm(outer, inner) / unit_mm, _most_lean(outer, inner))
    step = pitch_mm * math.sqrt(2) / unit_mm
    # The strokes stand as far from one end of the band as from the other.
    middle, count = (low + high) / 2, math.ceil((high - low + abs(lean)) / 2 / step)
    for number in range(-count, count + 1):
        at = middle + number * step
        stroke = _cut(outer, inner, at + lean / 2, at - lean / 2)
        if stroke and math.dist(*stroke) > _LEAST_LENGTH * style.width_mm:
            yield Line(*stroke, style)


def slants(colours: list[str]) -> list[float]:
    """Return a slant for each of a row of bands, turned about wherever the colour changes.

    >>> slants(["#2e8b3d", "#c8201e", "#c8201e", "#2e8b3d"])
    [1.0, -1.0, -1.0, 1.0]
    """
    found = [1.0][: len(colours)]
    for before, colour in pairwise(colours):
        found.append(found[-1] if before == colour else -found[-1])
    return found


def _height_mm(outer: Course, inner: Course) -> float:
    return math.dist(outer.point(outer.low), inner.point(outer.low))


def _most_lean(outer: Course, inner: Course) -> float:
    """Return how far a straight stroke may lean in all before it would cut into the inner edge."""
    bend = inner.unit_mm / outer.unit_mm
    return 0.9 * math.degrees(math.acos(bend)) if bend < 1 else math.inf


def _cut(outer: Course, inner: Course, top: float, foot: float) -> tuple[Point, Point] | None:
    """Return the part within the band of the stroke from a place outside to a place inside; None for none."""
    start, end = inner.point(foot), outer.point(top)
    for low in (True, False):
        edge = (
            (inner.point(inner.low), outer.point(outer.low))
            if low
            else (inner.point(inner.high), outer.point(outer.high))
        )
        foot_out = foot < inner.low if low else foot > inner.high
        top_out = top < outer.low if low else top > outer.high
        if foot_out and top_out:
            return None
        if foot_out:
            start = _crossing((start, end), edge)
        if top_out:
            end = _crossing((start, end), edge)
    return start, end


def _crossing(one: tuple[Point, Point], other: tuple[Point, Point]) -> Point:
    """Return where two straight lines cross."""
    (px, py), (qx, qy) = one[0], other[0]
    rx, ry, sx, sy = one[1][0] - px, one[1][1] - py, other[1][0] - qx, other[1][1] - qy
    share = ((qx - px) * sy - (qy - py) * sx) / (rx * sy - ry * sx)
    return px + share * rx, py + share * ry
