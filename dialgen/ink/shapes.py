"""The area that a primitive inks, as closed contours.

A shape is covered where its contours wind about a point any number of times but none (the non-zero
rule).  Contours go anticlockwise around ink and clockwise around a hole in it.  They may overlap:
a stroke is often laid in several pieces, and what several pieces cover is simply covered.  Every
edge therefore lies on ink, if not always on its rim.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import accumulate, pairwise
from typing import assert_never

import numpy as np

from dialgen.drawing import Arc, Cap, Circle, Letters, Line, Outline, Point, Primitive
from dialgen.ink.letters import letters_ink
from dialgen.ink.rounds import along, disc, ring, sectors
from dialgen.ink.strokes import Corner, anticlockwise, bar, ribbon, without_repeats
from dialgen.stage import Array

Box = tuple[float, float, float, float]
"""Left, bottom, right and top in millimetres."""


@dataclass(frozen=True, slots=True, eq=False)
class Shape:
    """An inked area.

    Args:
        corners: of all contours, one contour after the other: x and y as rows (2, n), in mm, read-only.
        ends: where each contour ends among them, which is where the next one starts.
        box: left, bottom, right and top of them all.
    """

    corners: Array
    ends: tuple[int, ...]
    box: Box

    @property
    def contours(self) -> tuple[Array, ...]:
        """The closed contours as read-only arrays of corners (n, 2), the last joined to the first.

        Covered is what they wind about a number of times that is not zero.
        """
        rows = self.corners.T
        return tuple(rows[first:last] for first, last in pairwise((0, *self.ends)))


def shape(item: Primitive) -> Shape | None:
    """Return the area that ``item`` inks, true to 0.005 mm; None where it inks nothing.

    Any colour is ink, white too.

    >>> from dialgen.drawing import Style
    >>> shape(Line((0.0, 0.0), (4.0, 0.0), Style(stroke="#000000", width_mm=0.5))).box
    (0.0, -0.25, 4.0, 0.25)
    """
    match item:
        case Line():
            return _line(item)
        case Letters():
            return _laid(*letters_ink(item))
        case Arc():
            return _shape(_arc(item))
        case Circle():
            return _shape(_circle(item))
        case Outline():
            return _shape(_outline(item))
        case _:
            assert_never(item)


def _shape(contours: list[Array]) -> Shape | None:
    if not contours:
        return None
    ends = accumulate(len(contour) for contour in contours)
    return _laid(np.ascontiguousarray(np.concatenate(contours).T), tuple(ends))


def _laid(corners: Array, ends: tuple[int, ...]) -> Shape | None:
    if not ends:
        return None
    corners.setflags(write=False)
    left, bottom = corners.min(axis=1).tolist()
    right, top = corners.max(axis=1).tolist()
    return Shape(corners, ends, (left, bottom, right, top))


def _strokes(item: Line | Arc | Circle | Outline) -> bool:
    return item.style.stroke is not None and item.style.width_mm > 0


def _line(line: Line) -> Shape | None:
    if not _strokes(line):
        return None
    half = line.style.width_mm / 2
    if line.style.cap is Cap.BUTT:
        return None if line.start == line.end else _butt_line(line.start, line.end, half)
    contours = [disc(line.start, half), disc(line.end, half)]
    if line.start != line.end:
        contours.append(np.array(bar(line.start, line.end, half)))
    return _shape(contours)


def _butt_line(start: Point, end: Point, half: float) -> Shape:
    """Return a square ended line, in plain numbers: three of four things on a face are such marks."""
    xs, ys = zip(*bar(start, end, half), strict=True)
    corners = np.array((xs, ys))
    corners.setflags(write=False)
    return Shape(corners, (4,), (min(xs), min(ys), max(xs), max(ys)))


def _arc(arc: Arc) -> list[Array]:
    if not _strokes(arc):
        return []
    half = arc.style.width_mm / 2
    if arc.end_deg - arc.start_deg >= 360.0:
        return ring(arc.centre, arc.radius_mm - half, arc.radius_mm + half)
    contours = sectors(arc, half)
    if arc.style.cap is Cap.ROUND:
        contours += [disc(arc.point(arc.start_deg), half), disc(arc.point(arc.end_deg), half)]
    return contours


def _circle(circle: Circle) -> list[Array]:
    half = circle.style.width_mm / 2 if _strokes(circle) else 0.0
    if circle.radius_mm <= 0 or (half == 0 and circle.style.fill is None):
        return []
    if circle.style.fill is not None:
        return [disc(circle.centre, circle.radius_mm + half)]
    return ring(circle.centre, circle.radius_mm - half, circle.radius_mm + half)


def _outline(outline: Outline) -> list[Array]:
    half = outline.style.width_mm / 2 if _strokes(outline) else 0.0
    corners = without_repeats(_corners(outline, half), closed=True)
    if len(corners) < 2:
        return []
    contours = [] if outline.style.fill is None or len(corners) < 3 else [anticlockwise(corners)]
    if half:
        contours += ribbon(corners, half, closed=True, corner=Corner.MITRE, cap=Cap.BUTT)
    return contours


def _corners(outline: Outline, half_mm: float) -> Array:
    """Return the outline as corners, arcs split finely enough for a stroke about them as well."""
    corners: list[Point] = []
    for here, _, arc in outline.edges():
        # A corner itself stands for the end of its arc, which is the same but for rounding.
        corners.append((here.x, here.y))
        if arc is not None:
            ends_deg, reach_mm = (arc.start_deg, arc.end_deg), arc.radius_mm + half_mm
            points = along(arc.centre, arc.radius_mm, *ends_deg, reach_mm, half_mm)
            corners += (points[1:-1] if here.turn_deg > 0 else points[-2:0:-1]).tolist()
    return np.array(corners)
