"""The box that the ink of a figure fills, strokes and their corners included."""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator
from functools import singledispatch

from dialgen.drawing import Arc, Cap, Circle, Letters, Line, Outline, Point, Primitive, Vertex

Box = tuple[float, float, float, float]
"""Left, bottom, right and top, mm."""


def box_of(figure: Iterable[Primitive]) -> Box:
    """Return the box of the ink of at least one primitive.

    Outlines must be of straight edges, with no corner sharper than the 12 degrees from which every
    renderer would blunt it.
    """
    points = [point for item in figure for point in _reach(item)]
    xs, ys = zip(*points, strict=True)
    return min(xs), min(ys), max(xs), max(ys)


@singledispatch
def _reach(item: Primitive) -> Iterator[Point]:
    """Yield points of a primitive's ink, the outermost in x and in y among them."""
    raise TypeError(f"a {type(item).__name__} is no primitive")


@_reach.register
def _(item: Line) -> Iterator[Point]:
    half = item.style.width_mm / 2
    length = math.dist(item.start, item.end)
    along_x, along_y = ((b - a) / length * half for a, b in zip(item.start, item.end, strict=True))
    for x, y in (item.start, item.end):
        if item.style.cap is Cap.ROUND:
            yield from _around((x, y), half)
        yield x - along_y, y + along_x
        yield x + along_y, y - along_x


@_reach.register
def _(item: Arc) -> Iterator[Point]:
    # Only arcs with rounded ends are drawn here.
    half = item.style.width_mm / 2
    yield from _around(item.point(item.start_deg), half)
    yield from _around(item.point(item.end_deg), half)
    first = math.ceil(item.start_deg / 90)
    for quarter in range(first, math.floor(item.end_deg / 90) + 1):
        x, y = item.centre
        reach = item.radius_mm + half
        yield x + reach * (0, 1, 0, -1)[quarter % 4], y + reach * (1, 0, -1, 0)[quarter % 4]


@_reach.register
def _(item: Circle) -> Iterator[Point]:
    return _around(item.centre, item.radius_mm + _half_stroke(item))


@_reach.register
def _(item: Outline) -> Iterator[Point]:
    half = _half_stroke(item)
    corners = item.vertices
    for before, corner, after in zip(
        corners[-1:] + corners[:-1], corners, corners[1:] + corners[:1], strict=True
    ):
        tip_x, tip_y = _mitre(before, corner, after)
        yield corner.x + tip_x * half, corner.y + tip_y * half


@_reach.register
def _(item: Letters) -> Iterator[Point]:
    for placed in item.glyphs:
        left, bottom, right, top = (edge * placed.size_mm for edge in placed.glyph.box)
        yield placed.x + left, placed.y + bottom
        yield placed.x + right, placed.y + top


def _half_stroke(item: Circle | Outline) -> float:
    return item.style.width_mm / 2 if item.style.stroke else 0.0


def _around(centre: Point, radius: float) -> Iterator[Point]:
    yield centre[0] - radius, centre[1] - radius
    yield centre[0] + radius, centre[1] + radius


def _mitre(before: Vertex, corner: Vertex, after: Vertex) -> Point:
    """Return the tip of a sharp corner from its vertex, in half widths of the line: away from both edges."""
    x1, y1 = _unit(before, corner)
    x2, y2 = _unit(after, corner)
    # Both point at the corner: their sum is along the bisector and 2 cos(angle / 2) long.  The tip is
    # 1 / sin(angle / 2) away, and the cross product is sin(angle) = 2 sin(angle / 2) cos(angle / 2).
    cross = abs(x1 * y2 - x2 * y1)
    return (x1 + x2) / cross, (y1 + y2) / cross


def _unit(start: Vertex, end: Vertex) -> Point:
    length = math.hypot(end.x - start.x, end.y - start.y)
    return (end.x - start.x) / length, (end.y - start.y) / length
