"""The marks of a scale as ink: bars or wedges, square or rounded at their free ends."""

from __future__ import annotations

import math
from collections.abc import Callable

from dialgen.drawing import Cap, Line, Outline, Point, Primitive, Style, Vertex
from dialgen.face.inked.numerals import mark_lines, reaches
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import End, LineForm, MarkShape

_TAPER = 0.45
_MOST_PULL = 0.4
_STEEPEST = 0.9

Draw = Callable[[Point, Point], Primitive]
"""Draws a mark between its inner and its outer end."""

Maker = Callable[[float, float, str], Draw]
"""Returns what draws the marks of a rank: of its widths at both ends in mm, and its colour."""


def mark_items(scale: RuledScale) -> list[Primitive]:
    """Return a primitive for each mark, those of one rank together so that a renderer may join them.

    A mark of one width is a single line.
    """
    draws = {rank: _draw(scale, rank) for rank in Rank}
    pulls = {rank: _pulls_mm(scale, rank) for rank in Rank}
    marks = [
        (mark.rank, draws[mark.rank](*_pulled(inner, outer, pulls[mark.rank])))
        for mark, inner, outer in mark_lines(scale)
    ]
    return [item for rank in Rank for of, item in marks if of is rank]


def end_widths_mm(scale: RuledScale, rank: Rank) -> tuple[float, float]:
    """Return the widths of a mark at its inner and its outer end; no wedge gets finer than the fine marks."""
    width_mm = scale.sizes.width_mm(rank)
    if scale.look.mark_shape is MarkShape.BAR:
        return width_mm, width_mm
    narrow_mm = max(_TAPER * width_mm, min(width_mm, scale.sizes.fine_width_mm))
    # A wedge is broad where its numeral stands, and narrow on the scale line.
    return (width_mm, narrow_mm) if scale.spec.marks == "inward" else (narrow_mm, width_mm)


def width_at_mm(scale: RuledScale, rank: Rank, outward_mm: float) -> float:
    """Return how wide a mark is where it crosses what runs beside the line; 0 where it does not reach."""
    inner, outer = reaches(scale.spec.marks, scale.sizes)[rank]
    if not inner - 1e-9 <= outward_mm <= outer + 1e-9:
        return 0.0
    near, far = end_widths_mm(scale, rank)
    return near + (far - near) * (outward_mm - inner) / (outer - inner)


def _draw(scale: RuledScale, rank: Rank) -> Draw:
    inner_mm, outer_mm = end_widths_mm(scale, rank)
    shape = MarkShape.TAPER if inner_mm != outer_mm else MarkShape.BAR
    return _MAKERS[shape, scale.look.mark_ends](inner_mm, outer_mm, scale.ink)


def _pulls_mm(scale: RuledScale, rank: Rank) -> tuple[float, float]:
    """Return by how much rounded ends are drawn in, so that round and square marks reach as far.

    The end on the scale line stays on it.
    """
    if scale.look.mark_ends is End.SQUARE:
        return 0.0, 0.0
    lined = scale.look.line is not LineForm.NONE
    most_mm = _MOST_PULL * scale.sizes.length_mm(rank)
    inner, outer = (
        0.0 if lined and reach == 0 else min(width / 2, most_mm)
        for reach, width in zip(
            reaches(scale.spec.marks, scale.sizes)[rank], end_widths_mm(scale, rank), strict=True
        )
    )
    return inner, outer


def _pulled(inner: Point, outer: Point, pulls_mm: tuple[float, float]) -> tuple[Point, Point]:
    if pulls_mm == (0.0, 0.0):
        return inner, outer
    (x, y), (near, far) = _towards(inner, outer), pulls_mm
    return (inner[0] + near * x, inner[1] + near * y), (outer[0] - far * x, outer[1] - far * y)


def _bar(_inner_mm: float, outer_mm: float, ink: str) -> Draw:
    style = Style(stroke=ink, width_mm=outer_mm)
    return lambda inner, outer: Line(inner, outer, style)


def _rounded_bar(_inner_mm: float, outer_mm: float, ink: str) -> Draw:
    style = Style(stroke=ink, width_mm=outer_mm, cap=Cap.ROUND)
    return lambda inner, outer: Line(inner, outer, style)


def _wedge(inner_mm: float, outer_mm: float, ink: str) -> Draw:
    """Return what draws wedges with square ends, clockwise."""
    style, near, far = Style(fill=ink), inner_mm / 2, outer_mm / 2

    def draw(inner: Point, outer: Point) -> Outline:
        x, y = _towards(inner, outer)
        return Outline(
            (
                Vertex(inner[0] - near * y, inner[1] + near * x),
                Vertex(outer[0] - far * y, outer[1] + far * x),
                Vertex(outer[0] + far * y, outer[1] - far * x),
                Vertex(inner[0] + near * y, inner[1] - near * x),
            ),
            style,
        )

    return draw


def _rounded_wedge(inner_mm: float, outer_mm: float, ink: str) -> Draw:
    """Return what draws two discs about the ends, and all between their common tangents, clockwise."""
    style, near, far = Style(fill=ink), inner_mm / 2, outer_mm / 2
    square = _wedge(inner_mm, outer_mm, ink)

    def draw(inner: Point, outer: Point) -> Primitive:
        x, y = _towards(inner, outer)
        sin = (far - near) / math.dist(inner, outer)
        if abs(sin) > _STEEPEST:
            return square(inner, outer)
        # The tangents touch where the radii are square to them, which lean back from the outer end.
        cos, turn_deg = math.sqrt(1 - sin**2), 2 * math.degrees(math.asin(sin))
        left, right = (-cos * y - sin * x, cos * x - sin * y), (cos * y - sin * x, -cos * x - sin * y)
        return Outline(
            (
                Vertex(inner[0] + near * left[0], inner[1] + near * left[1]),
                Vertex(outer[0] + far * left[0], outer[1] + far * left[1], 180.0 + turn_deg),
                Vertex(outer[0] + far * right[0], outer[1] + far * right[1]),
                Vertex(inner[0] + near * right[0], inner[1] + near * right[1], 180.0 - turn_deg),
            ),
            style,
        )

    return draw


def _towards(inner: Point, outer: Point) -> Point:
    length = math.dist(inner, outer)
    return (outer[0] - inner[0]) / length, (outer[1] - inner[1]) / length


_MAKERS: dict[tuple[MarkShape, End], Maker] = {
    (MarkShape.BAR, End.SQUARE): _bar,
    (MarkShape.BAR, End.ROUND): _rounded_bar,
    (MarkShape.TAPER, End.SQUARE): _wedge,
    (MarkShape.TAPER, End.ROUND): _rounded_wedge,
}
