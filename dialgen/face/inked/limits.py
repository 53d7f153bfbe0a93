"""Limits of a scale as ink: a line across it, or a triangle that points at it."""

from __future__ import annotations

from collections.abc import Callable, Sequence

from dialgen.dialfile.models import Limit, Zone
from dialgen.drawing import Line, Outline, Primitive, Style, Vertex
from dialgen.face.inked.sides import Side, free_side, mark_reach_mm, place_of, taken_mm
from dialgen.face.ruled.ruling import RuledScale

_WIDTH = 1.25
_PAST = 0.3
_WITHIN = 0.2
_HEIGHT = 1.0
_BREADTH = 0.9
_HAIR_MM = 0.5


def limit_items(limits: Sequence[Limit], zones: Sequence[Zone], scale: RuledScale) -> list[Primitive]:
    """Return what marks each limit.

    Args:
        limits: the limits of the scale.
        zones: its zones, which a triangle keeps clear of.
        scale: the scale.
    """
    return [_SHAPES[limit.shape](limit, zones, scale) for limit in limits]


def _line(limit: Limit, _zones: Sequence[Zone], scale: RuledScale) -> Line:
    """Return a line from the scale line over the marks to just past the numbered ones."""
    width_mm = _WIDTH * scale.sizes.numbered_width_mm
    reaches = [_crossing_mm(scale, side) for side in (Side.INSIDE, Side.OUTSIDE)]
    start, end = map(place_of(scale, limit.at).beside, reaches)
    return Line(start, end, Style(stroke=_colour(limit, scale), width_mm=width_mm))


def _crossing_mm(scale: RuledScale, side: Side) -> float:
    """Return how far outwards a limit's line ends on one side; where no marks are, within the scale line."""
    marks_mm, sizes = mark_reach_mm(scale, side), scale.sizes
    return side * (marks_mm + _PAST * sizes.space_mm if marks_mm else _WITHIN * sizes.line_width_mm)


def _triangle(limit: Limit, zones: Sequence[Zone], scale: RuledScale) -> Outline:
    """Return a triangle on the free side whose tip is clear of line, marks and zones by a hair."""
    side, height_mm = free_side(scale), _HEIGHT * scale.sizes.middle_mm
    half_mm = _BREADTH * height_mm / 2
    tip_mm = taken_mm(scale, zones, side, limit.at, half_mm) + _HAIR_MM
    place = place_of(scale, limit.at)
    (x, y), (ux, uy) = place.beside(side * tip_mm), place.direction
    base_x, base_y = x + side * height_mm * ux, y + side * height_mm * uy
    across_x, across_y = side * half_mm * uy, -side * half_mm * ux
    corners = (
        (x, y), (base_x + across_x, base_y + across_y), (base_x - across_x, base_y - across_y)
    )  # fmt: skip
    return Outline(tuple(Vertex(*corner) for corner in corners), Style(fill=_colour(limit, scale)))


def _colour(limit: Limit, scale: RuledScale) -> str:
    return limit.colour or scale.look.accent


_Draw = Callable[[Limit, Sequence[Zone], RuledScale], Primitive]

_SHAPES: dict[str, _Draw] = {"line": _line, "triangle": _triangle}
