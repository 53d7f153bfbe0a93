"""The display list: what a face is made of, in millimetres, before any file format.

Why this shape.  A plate must come out the same in four file formats, and be measured, checked for
overlaps and cut.  So a face is first written down as plain data: layers of a few primitives.
Renderers turn the list into bytes; everything that measures reads the same list.  Arcs stay arcs
here and are only ever split by a renderer whose format has none.  There is no text: lettering
comes as glyph outlines, each defined once and placed many times, so a numeral looks the same on
every machine.

Coordinates are those of the dial file: origin at the pivot, x to the right, y **up**, in
millimetres.  Angles are degrees, 0 straight up, clockwise positive.  A renderer whose format has
y downwards flips it at its own edge.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass, replace
from enum import StrEnum

Point = tuple[float, float]
"""x and y in millimetres."""

PathStep = tuple[str, tuple[float, ...]]
"""One step of a glyph's outline in ems, y up: ``("M", (x, y))``, ``("L", (x, y))``,
``("Q", (cx, cy, x, y))``, ``("C", (cx, cy, dx, dy, x, y))`` or ``("Z", ())``."""


class Purpose(StrEnum):
    """What a layer is for: ink on the plate, a line to cut along, or help for fitting it."""

    PRINT = "print"
    CUT = "cut"
    GUIDE = "guide"


class Cap(StrEnum):
    """How a stroke ends: square at its end point, or rounded about it."""

    BUTT = "butt"
    ROUND = "round"


@dataclass(frozen=True, slots=True, kw_only=True)
class Style:
    """How a primitive is inked; colours are ``#rrggbb``, None draws nothing."""

    stroke: str | None = None
    width_mm: float = 0.0
    fill: str | None = None
    cap: Cap = Cap.BUTT


@dataclass(frozen=True, slots=True)
class Line:
    """A straight stroke from ``start`` to ``end``."""

    start: Point
    end: Point
    style: Style


@dataclass(frozen=True, slots=True)
class Arc:
    """A stroke along a circle from ``start_deg`` clockwise to ``end_deg`` (end not below start)."""

    centre: Point
    radius_mm: float
    start_deg: float
    end_deg: float
    style: Style

    def point(self, angle_deg: float) -> Point:
        """Return the point of the circle in the direction ``angle_deg`` from its centre."""
        return polar(self.centre, self.radius_mm, angle_deg)


@dataclass(frozen=True, slots=True)
class Circle:
    """A whole circle, stroked, filled or both."""

    centre: Point
    radius_mm: float
    style: Style


@dataclass(frozen=True, slots=True)
class Vertex:
    """A corner of an outline; the edge to the next corner turns clockwise by ``turn_deg``.

    0 is a straight edge, 90 a clockwise quarter circle, -90 an anticlockwise one.
    """

    x: float
    y: float
    turn_deg: float = 0.0


@dataclass(frozen=True, slots=True)
class Outline:
    """A closed figure of straight edges and circular arcs, stroked, filled or both."""

    vertices: tuple[Vertex, ...]
    style: Style

    def edges(self) -> Iterator[tuple[Vertex, Vertex, Arc | None]]:
        """Yield each edge's two corners, and its circle where it is an arc.

        The arc always runs clockwise; where the edge turns anticlockwise its start and end are
        therefore the edge's end and start.
        """
        for here, there in zip(self.vertices, self.vertices[1:] + self.vertices[:1], strict=True):
            yield here, there, _edge_arc(here, there, self.style) if here.turn_deg else None


@dataclass(frozen=True, slots=True)
class Glyph:
    """A letter in ems (1 em = the size it is placed at): a filled outline, or single strokes.

    ``name`` tells glyphs apart and is the same for the same letter of the same font.  ``path`` is
    an outline to be filled, non-zero winding, or with ``stroked`` the centre lines of strokes, left
    open.  ``box`` is the ink's (left, bottom, right, top) in ems; that of strokes includes half the
    width in which lettering draws them.
    """

    name: str
    path: tuple[PathStep, ...]
    box: tuple[float, float, float, float]
    stroked: bool = False

    def __hash__(self) -> int:
        """Hash the name alone, so that a renderer can keep what it made of a letter."""
        return hash(self.name)


@dataclass(frozen=True, slots=True)
class Placed:
    """A glyph with its origin at (x, y), ``size_mm`` to the em, turned clockwise by ``angle_deg``."""

    glyph: Glyph
    x: float
    y: float
    size_mm: float
    angle_deg: float = 0.0


@dataclass(frozen=True, slots=True)
class Letters:
    """A string as placed glyphs; ``text`` is kept for readers that cannot see outlines.

    The glyphs of one string are either all outlines, filled in the style's ``fill``, or all
    stroked, in its ``stroke`` and ``width_mm`` and with round corners.
    """

    text: str
    glyphs: tuple[Placed, ...]
    style: Style


Primitive = Line | Arc | Circle | Outline | Letters


@dataclass(frozen=True, slots=True, kw_only=True)
class Layer:
    """Primitives that belong together, in drawing order; ``name`` is unique within a drawing."""

    name: str
    purpose: Purpose
    items: tuple[Primitive, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Drawing:
    """A page: its box in plate coordinates (millimetres, lower left corner and size) and its layers."""

    left: float
    bottom: float
    width: float
    height: float
    layers: tuple[Layer, ...]
    title: str = ""

    @property
    def right(self) -> float:
        """The page's right edge."""
        return self.left + self.width

    @property
    def top(self) -> float:
        """The page's upper edge."""
        return self.bottom + self.height

    def with_margin(self, margin_mm: float) -> Drawing:
        """Return the same drawing on a page larger by ``margin_mm`` on every side."""
        return replace(
            self,
            left=self.left - margin_mm,
            bottom=self.bottom - margin_mm,
            width=self.width + 2 * margin_mm,
            height=self.height + 2 * margin_mm,
        )

    def only(self, purposes: frozenset[Purpose]) -> Drawing:
        """Return the same page with the layers of those purposes alone."""
        return replace(self, layers=tuple(la for la in self.layers if la.purpose in purposes))

    def glyphs(self) -> tuple[Glyph, ...]:
        """Return every glyph used, once each, in the order of first use."""
        found: dict[str, Glyph] = {}
        for layer in self.layers:
            for item in layer.items:
                if isinstance(item, Letters):
                    for placed in item.glyphs:
                        found.setdefault(placed.glyph.name, placed.glyph)
        return tuple(found.values())


def polar(centre: Point, radius_mm: float, angle_deg: float) -> Point:
    """Return the point ``radius_mm`` from ``centre`` in the direction ``angle_deg``.

    >>> polar((0.0, 0.0), 44.0, 90.0)[0]
    44.0
    """
    angle = math.radians(angle_deg)
    return centre[0] + radius_mm * math.sin(angle), centre[1] + radius_mm * math.cos(angle)


def _edge_arc(here: Vertex, there: Vertex, style: Style) -> Arc:
    half = math.radians(here.turn_deg) / 2
    chord_x, chord_y = there.x - here.x, there.y - here.y
    # The centre lies on the chord's bisector, to the right of a clockwise edge.
    offset = 0.5 / math.tan(half)
    centre = (
        (here.x + there.x) / 2 + chord_y * offset,
        (here.y + there.y) / 2 - chord_x * offset,
    )
    radius_mm = math.hypot(chord_x, chord_y) / (2 * abs(math.sin(half)))
    first = here if here.turn_deg > 0 else there
    start_deg = math.degrees(math.atan2(first.x - centre[0], first.y - centre[1]))
    return Arc(centre, radius_mm, start_deg, start_deg + abs(here.turn_deg), style)
