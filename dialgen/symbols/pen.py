"""The pen that symbols are drawn with: strokes, areas and letters in units of the symbol's height.

A shape is written once, in a frame of its own with the height as its unit and y up.  Where it
stands and how large is the pen's affair, so the same shape is measured with one pen and drawn with
another, and a sign that is made of two others draws each with a pen of its own.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass, replace
from itertools import pairwise

from dialgen.drawing import Arc, Cap, Circle, Line, Outline, Point, Primitive, Style, Vertex, polar
from dialgen.lettering import PLAIN, Fit, Hand, letters, measure

Figure = tuple[Primitive, ...]
"""What a shape draws, in order."""

STROKE = 0.1
"""Width of a line, in heights: 0.35 mm on a symbol 3.5 mm high (from memory of IEC 60051-1)."""

DIGIT = 0.66
"""Height of a digit that stands alone, in heights: its stems are then nearly as wide as a line."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Pen:
    """Where a shape stands, how large it is and how it is inked.

    Args:
        origin: where the shape's own origin falls, mm.
        unit_mm: the length of the shape's unit, mm.
        stroke: width of a line in the shape's units.
        ink: colour, ``#rrggbb``.
        hand: the hand of letters.
    """

    origin: Point = (0.0, 0.0)
    unit_mm: float = 1.0
    stroke: float = STROKE
    ink: str = "#000000"
    hand: Hand = PLAIN

    def at(self, x: float, y: float) -> Pen:
        """Return this pen with its origin moved to (x, y) of its own frame."""
        return replace(self, origin=self._to_mm((x, y)))

    def moved(self, x_mm: float, y_mm: float) -> Pen:
        """Return this pen moved by so many millimetres."""
        return replace(self, origin=(self.origin[0] + x_mm, self.origin[1] + y_mm))

    def fine(self, stroke: float) -> Pen:
        """Return this pen with lines ``stroke`` wide."""
        return replace(self, stroke=stroke)

    def line(self, start: Point, end: Point) -> Figure:
        """Return a stroke with square ends."""
        return (Line(self._to_mm(start), self._to_mm(end), self._line_style()),)

    def bent(self, *points: Point) -> Figure:
        """Return strokes from point to point, rounded at their ends and where they meet."""
        style = self._line_style(Cap.ROUND)
        placed = [self._to_mm(point) for point in points]
        return tuple(Line(start, end, style) for start, end in pairwise(placed))

    def arc(self, centre: Point, radius: float, start_deg: float, end_deg: float) -> Figure:
        """Return a stroke with rounded ends along a circle, clockwise."""
        style = self._line_style(Cap.ROUND)
        return (Arc(self._to_mm(centre), radius * self.unit_mm, start_deg, end_deg, style),)

    def ring(self, centre: Point, radius: float) -> Figure:
        """Return a circle as a line."""
        return (Circle(self._to_mm(centre), radius * self.unit_mm, self._line_style()),)

    def disc(self, centre: Point, radius: float) -> Figure:
        """Return a circle as an area."""
        return (Circle(self._to_mm(centre), radius * self.unit_mm, Style(fill=self.ink)),)

    def closed(self, *points: Point) -> Figure:
        """Return a closed figure of straight lines with sharp corners."""
        return (Outline(self._vertices(points), self._line_style()),)

    def area(self, *points: Point) -> Figure:
        """Return a filled figure of straight edges."""
        return (Outline(self._vertices(points), Style(fill=self.ink)),)

    def box(self, centre: Point, width: float, height: float, turn_deg: float = 0.0) -> Figure:
        """Return a rectangle of lines whose outer edges are ``width`` by ``height``.

        Args:
            centre: its middle.
            width: from outer edge to outer edge.
            height: likewise.
            turn_deg: turn about its middle, degrees clockwise.
        """
        across, up = (width - self.stroke) / 2, (height - self.stroke) / 2
        corners = ((-across, -up), (-across, up), (across, up), (across, -up))
        return self.closed(*[_turned(centre, corner, turn_deg) for corner in corners])

    def letters(self, text: str, at: Point, height: float, anchor: Point = (0.5, 0.5)) -> Figure:
        """Return a text whose capitals are ``height`` high.

        Args:
            text: what to write.
            at: where the anchor falls.
            height: of a digit or capital.
            anchor: of the box from the ink's left to its right and from the baseline to the height
                of a capital, as fractions.
        """
        height_mm, place, style = height * self.unit_mm, self._to_mm(at), Style(fill=self.ink)
        return (letters(text, height_mm, place, style, anchor=anchor, fit=Fit.LINE, hand=self.hand),)

    def text_width(self, text: str, height: float) -> float:
        """Return the width of a text's ink, in units."""
        extent = measure(text, height, hand=self.hand)
        return extent.right - extent.left

    def _line_style(self, cap: Cap = Cap.BUTT) -> Style:
        return Style(stroke=self.ink, width_mm=self.stroke * self.unit_mm, cap=cap)

    def _vertices(self, points: tuple[Point, ...]) -> tuple[Vertex, ...]:
        return tuple(Vertex(*self._to_mm(point)) for point in points)

    def _to_mm(self, point: Point) -> Point:
        return self.origin[0] + point[0] * self.unit_mm, self.origin[1] + point[1] * self.unit_mm


Shape = Callable[[Pen, str], Figure]
"""Draws a symbol with a pen; the text is the sign's parameter as it is lettered, "" for none."""


def _turned(centre: Point, point: Point, turn_deg: float) -> Point:
    radius = math.hypot(*point)
    return polar(centre, radius, math.degrees(math.atan2(*point)) + turn_deg)
