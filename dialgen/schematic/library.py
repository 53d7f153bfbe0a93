"""The signs, taken from schemdraw's library of elements, as primitives of our own display list.

Only the shapes are schemdraw's: what its elements are made of is taken over line for line and arc
for arc, at true size, and lettered and written by our own hands.  So every format comes from one list
and needs no other library to draw.  It is imported when a picture is asked for, and no sooner.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from itertools import pairwise
from typing import TYPE_CHECKING

from dialgen.drawing import Arc, Cap, Circle, Line, Outline, Point, Primitive, Style, Vertex
from dialgen.errors import DialgenError
from dialgen.schematic.pieces import EXTENTS, Kind, Sign

if TYPE_CHECKING:
    from schemdraw.segments import SegmentType

INK = "#000000"
SIGN_MM = 0.5
_HEAD_MM = (2.4, 1.5)
"""An arrowhead's length and width."""

_STROKE = Style(stroke=INK, width_mm=SIGN_MM, cap=Cap.ROUND)


@dataclass(frozen=True, slots=True)
class _Shape:
    """An element of the library by its name.

    Args:
        element: the name of its class.
        across_mm: what a unit across the sign becomes; None for the same as along it.
        filled: whether its closed figures are inked all over.
        upright: whether it stands upright whichever way its wires run.
        rising: whether it has a stroke across it that should rise to the right, whichever way it lies.
    """

    element: str
    across_mm: float | None = None
    filled: bool = False
    upright: bool = False
    rising: bool = False


_SHAPES = {
    Kind.RESISTOR: _Shape("ResistorIEC", 7.0),
    Kind.ADJUSTABLE: _Shape("ResistorVarIEC", 7.0, rising=True),
    Kind.SENSOR: _Shape("Thermistor", 7.0, rising=True),
    Kind.DIODE: _Shape("Diode", filled=True),
    Kind.ZENER: _Shape("Zener", filled=True),
    Kind.CELL: _Shape("BatteryCell"),
    Kind.MOVEMENT: _Shape("MeterArrow", upright=True),
    Kind.WINDING: _Shape("Inductor"),
    Kind.EARTH: _Shape("Ground", 8.0, upright=True),
}
"""IEC 60617's shapes where it has them (boxes for resistors); a movement is a circle with a pointer."""


def ink(sign: Sign) -> tuple[Primitive, ...]:
    """Return what a sign is drawn with, its ends where the sign's are."""
    shape = _SHAPES[sign.kind]
    return tuple(item for segment in _segments(sign, shape) for item in _inked(segment, shape.filled))


def _segments(sign: Sign, shape: _Shape) -> list[SegmentType]:
    """Return the library's segments, in millimetres."""
    import schemdraw
    from schemdraw import elements

    start, end = sign.start, sign.end
    if shape.rising and (end[0] < start[0] or end[1] < start[1]):
        start, end = end, start
    turn_deg = math.degrees(math.atan2(end[1] - start[1], end[0] - start[0]))
    if shape.upright:
        length_mm = EXTENTS[sign.kind].length_mm
        middle = (start[0] + end[0]) / 2, (start[1] + end[1]) / 2
        start, turn_deg = (middle[0], middle[1] - length_mm / 2), 90.0 if length_mm else 0.0
    if sign.kind is Kind.EARTH:
        element = elements.Ground(lead=False).scale(shape.across_mm or 1.0)
    else:
        element = getattr(elements, shape.element)(extend=False)
        unit_mm = EXTENTS[sign.kind].length_mm / element.segments[0].path[-1][0]
        element.scalex(unit_mm).scaley(shape.across_mm or unit_mm)
        if shape.rising and start[0] == end[0]:
            element.flip()
    drawing = schemdraw.Drawing(show=False)
    drawing.add(element.at(start).theta(turn_deg))
    return drawing.get_segments()


def _inked(segment: SegmentType, filled: bool) -> Iterator[Primitive]:
    from schemdraw import segments

    match segment:
        case segments.Segment():
            for run in _runs(segment.path):
                yield from _stroked(run, segment.arrow == "->")
        case segments.SegmentPoly():
            corners = tuple(Vertex(x, y) for x, y in segment.verts)
            yield Outline(corners, Style(stroke=INK, width_mm=SIGN_MM, fill=INK if filled else None))
        case segments.SegmentCircle():
            yield Circle(_point(segment.center), segment.radius, _STROKE)
        case segments.SegmentArc() if math.isclose(segment.width, segment.height):
            # The library's angles are anticlockwise from the right, ours clockwise from above.
            first_deg, last_deg = (90 - segment.angle - each for each in (segment.theta2, segment.theta1))
            span_deg = (last_deg - first_deg) % 360 or 360.0
            yield Arc(_point(segment.center), segment.width / 2, first_deg, first_deg + span_deg, _STROKE)
        case _:
            raise DialgenError(
                f"the library of signs draws with a {type(segment).__name__}, which is not known here; "
                "install the version of schemdraw that pyproject.toml asks for"
            )


def _point(given: Sequence[float]) -> Point:
    return given[0], given[1]


def _runs(path: Sequence[Sequence[float]]) -> Iterator[list[Point]]:
    """Yield the unbroken stretches of a path; a point that is no number breaks it."""
    run: list[Point] = []
    for x, y in (*path, (math.nan, math.nan)):
        if not math.isnan(x):
            run.append((x, y))
        elif run:
            yield run
            run = []


def _stroked(run: list[Point], arrow: bool) -> Iterator[Primitive]:
    if len(run) > 3 and math.dist(run[0], run[-1]) < 1e-9:
        yield Outline(tuple(Vertex(x, y) for x, y in run[:-1]), Style(stroke=INK, width_mm=SIGN_MM))
        return
    if arrow:
        base, head = arrowhead(run[-2], run[-1])
        yield head
        run = [*run[:-1], base]
    for a, b in pairwise(run):
        if a != b:
            yield Line(a, b, _STROKE)


def arrowhead(start: Point, tip: Point) -> tuple[Point, Outline]:
    """Return where the line of an arrow from ``start`` ends, and the head at its tip."""
    long_mm, wide_mm = _HEAD_MM
    length_mm = math.dist(start, tip)
    x, y = (tip[0] - start[0]) / length_mm, (tip[1] - start[1]) / length_mm
    base = tip[0] - x * long_mm, tip[1] - y * long_mm
    sides = [(base[0] - y * half, base[1] + x * half) for half in (wide_mm / 2, -wide_mm / 2)]
    return base, Outline(tuple(Vertex(*corner) for corner in (tip, *sides)), Style(fill=INK))
