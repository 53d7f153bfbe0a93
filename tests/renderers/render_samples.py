"""Drawings made by hand, and ways to make many at random, for the tests of the renderers."""

from __future__ import annotations

import math

from hypothesis import settings
from hypothesis import strategies as st

from dialgen.drawing import (
    Arc,
    Cap,
    Circle,
    Drawing,
    Glyph,
    Layer,
    Letters,
    Line,
    Outline,
    Placed,
    Primitive,
    Purpose,
    Style,
    Vertex,
    polar,
)

many = settings(max_examples=60, deadline=None)
few = settings(max_examples=20, deadline=None)  # where the library takes its time

INK = Style(stroke="#000000", width_mm=0.3)
FINE = Style(stroke="#000000", width_mm=0.15)
ROUND = Style(stroke="#0000ff", width_mm=0.4, cap=Cap.ROUND)
CUT = Style(stroke="#ff0000", width_mm=0.1)
BLACK = Style(fill="#000000")
ZONE = Style(fill="#cc2200")

BAR = Glyph(
    "bar",
    (("M", (0.1, 0.0)), ("L", (0.3, 0.0)), ("L", (0.3, 0.7)), ("L", (0.1, 0.7)), ("Z", ())),
    (0.1, 0.0, 0.3, 0.7),
)
"""An upright bar from (0.1, 0) to (0.3, 0.7) ems."""

HOOK = Glyph(
    "hook",
    (
        ("M", (0.0, 0.0)),
        ("Q", (0.5, 0.0, 0.5, 0.5)),
        ("C", (0.5, 0.8, 0.2, 0.8, 0.0, 0.5)),
        ("L", (0.1, 0.4)),
        ("Z", ()),
        ("M", (0.2, 0.2)),
        ("Q", (0.2, 0.4, 0.3, 0.3)),
    ),
    (0.0, 0.0, 0.5, 0.73),
)
"""Both kinds of curve, two contours, the second left open."""

PEN = Style(stroke="#112233", width_mm=0.31, cap=Cap.ROUND)

STAFF = Glyph(
    "staff",
    (
        ("M", (0.1, 0.1)),
        ("L", (0.1, 0.6)),
        ("L", (0.4, 0.1)),
        ("M", (0.5, 0.1)),
        ("C", (0.9, 0.1, 0.9, 0.6, 0.5, 0.6)),
    ),
    (0.05, 0.05, 0.85, 0.65),
    stroked=True,
)
"""Two single strokes: one with a sharp corner, one bent."""

RING = Glyph(
    "ring",
    (
        ("M", (0.3, 0.6)),
        ("Q", (0.6, 0.6, 0.6, 0.35)),
        ("Q", (0.6, 0.1, 0.3, 0.1)),
        ("Q", (0.0, 0.1, 0.0, 0.35)),
        ("Q", (0.0, 0.6, 0.3, 0.6)),
    ),
    (-0.05, 0.05, 0.65, 0.65),
    stroked=True,
)
"""A single stroke that comes back to where it starts."""

SPACE = Glyph("space", (), (0.0, 0.0, 0.0, 0.0))
"""A glyph without ink."""


def page(*items: Primitive, **more: object) -> Drawing:
    """Return an odd-sized page with the pivot off its middle and ``items`` in one printed layer."""
    layer = Layer(name="scale", purpose=Purpose.PRINT, items=items)
    options = {"left": -50.0, "bottom": -12.5, "width": 103.7, "height": 71.3, "layers": (layer,)} | more
    return Drawing(**options)


def face() -> Drawing:
    """Return a face of 120 marks, 3 arcs and 40 two-letter numerals, a plate to cut and a hole."""
    marks = tuple(
        Line(polar((0, 0), 44.0, a), polar((0, 0), 48.0 if i % 10 == 0 else 46.0, a), INK)
        for i, a in enumerate(-45 + 90 * i / 119 for i in range(120))
    )
    arcs = (
        Arc((0.0, 0.0), 44.0, -45.0, 45.0, INK),
        Arc((0.0, -3.0), 40.0, -40.0, 40.0, FINE),
        Arc((0.0, 5.0), 2.0, 0.0, 360.0, ROUND),
    )
    numerals = tuple(_numeral(i, -44 + 88 * i / 39) for i in range(40))
    zone = Outline(
        tuple(
            Vertex(*polar((0, 0), radius, angle), turn)
            for radius, angle, turn in ((44, 20, 25), (44, 45, 0), (42, 45, -25), (42, 20, 0))
        ),
        ZONE,
    )
    plate = Outline(_rounded(-49.0, -11.5, 52.0, 58.0, 4.0), CUT)
    return Drawing(
        left=-50.0,
        bottom=-12.5,
        width=103.7,
        height=71.3,
        title="Ampères & <volts>",
        layers=(
            Layer(name="scale 1", purpose=Purpose.PRINT, items=(zone, *marks, *arcs, *numerals)),
            Layer(name="plate", purpose=Purpose.CUT, items=(plate, Circle((-40.0, 0.0), 1.6, CUT))),
            Layer(name="pivot", purpose=Purpose.GUIDE, items=(Line((-3, 0), (3, 0), FINE),)),
        ),
    )


def _numeral(index: int, angle_deg: float) -> Letters:
    x, y = polar((0, 0), 50.0, angle_deg)
    turn = math.radians(angle_deg)
    placed = (
        Placed(HOOK, x, y, 3.2, angle_deg),
        Placed(SPACE, x, y, 3.2, angle_deg),
        Placed(BAR, x + 1.8 * math.cos(turn), y - 1.8 * math.sin(turn), 3.2, angle_deg),
    )
    return Letters(f"{index} A", placed, BLACK)


def _rounded(left: float, bottom: float, right: float, top: float, r: float) -> tuple[Vertex, ...]:
    return (
        Vertex(left + r, top),
        Vertex(right - r, top, 90.0),
        Vertex(right, top - r),
        Vertex(right, bottom + r, 90.0),
        Vertex(right - r, bottom),
        Vertex(left + r, bottom, 90.0),
        Vertex(left, bottom + r),
        Vertex(left, top - r, 90.0),
    )


millimetres = st.floats(-60, 60, allow_nan=False)
points = st.tuples(millimetres, millimetres)
lines = st.builds(Line, points, points, st.sampled_from([INK, FINE, ROUND]))


@st.composite
def arcs(draw: st.DrawFn, least_deg: float = 1.0) -> Arc:
    """Draw an arc of 1 to 100 mm radius, anything from a degree to the whole circle."""
    start = draw(st.floats(-360, 360))
    sweep = draw(st.one_of(st.floats(least_deg, 360), st.sampled_from([90.0, 179.999, 180.0, 359.9, 360.0])))
    return Arc(draw(points), draw(st.floats(1, 100)), start, start + sweep, INK)


@st.composite
def outlines(draw: st.DrawFn) -> Outline:
    """Draw a polygon about the pivot with corners apart, each edge straight or turning either way."""
    count = draw(st.integers(3, 7))
    turns = st.one_of(st.just(0.0), st.floats(1, 200), st.floats(-200, -1))
    corners = (
        polar((0, 0), draw(st.floats(5, 40)), 360 * (i + draw(st.floats(-0.3, 0.3))) / count)
        for i in range(count)
    )
    return Outline(tuple(Vertex(x, y, draw(turns)) for x, y in corners), CUT)
