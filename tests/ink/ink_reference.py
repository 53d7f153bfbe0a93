"""What primitives cover according to shapely, from curves far finer than ours, and primitives to try."""

from __future__ import annotations

import math
from dataclasses import replace
from itertools import pairwise

import numpy as np
import shapely
from hypothesis import strategies as st
from shapely import LinearRing, LineString, Point, Polygon, affinity

from dialgen.drawing import (
    Arc,
    Cap,
    Circle,
    Glyph,
    Letters,
    Line,
    Outline,
    Placed,
    Style,
    Vertex,
    polar,
)
from dialgen.lettering import letters

BLACK = "#000000"
_FINE = 16


def covered(item):
    """Return the area of a primitive as a shapely geometry; empty where nothing is inked."""
    return {Line: _line, Arc: _arc, Circle: _circle, Outline: _outline, Letters: _letters}[type(item)](item)


def polygon_of(shape):
    """Return one of our shapes as a shapely geometry, by its non-zero rule."""
    # Contours of one stroke run along each other but for rounding; a grid makes one edge of two.
    rings = shapely.union_all([LinearRing(contour) for contour in shape.contours], grid_size=1e-7)
    faces = shapely.polygonize([rings]).geoms
    return shapely.union_all([face for face in faces if winding(shape, face.representative_point())])


def winding(shape, point):
    """Return how often the contours go around a point, by the angles under which it sees their edges."""
    spokes = [contour - (point.x, point.y) for contour in shape.contours]
    ways = [np.arctan2(y, x) for x, y in (spoke.T for spoke in spokes)]
    steps = np.concatenate([np.diff(way, append=way[0]) for way in ways])
    return round(float(np.sum((steps + np.pi) % (2 * np.pi) - np.pi)) / (2 * np.pi))


def _stroked(path, style, join="round"):
    if style.stroke is None or style.width_mm <= 0:
        return Polygon()
    cap = "round" if style.cap is Cap.ROUND else "flat"
    return path.buffer(style.width_mm / 2, quad_segs=_FINE, cap_style=cap, join_style=join, mitre_limit=10)


def _line(line):
    return _stroked(LineString([line.start, line.end]), line.style)


def _arc_points(arc):
    count = max(2, math.ceil(arc.end_deg - arc.start_deg))
    angles = np.linspace(arc.start_deg, arc.end_deg, count + 1).tolist()
    # Square ends and corners lean with the last chord, so that is short.
    angles[1:-1] = [arc.start_deg + 0.02, *angles[1:-1], arc.end_deg - 0.02]
    return [arc.point(angle) for angle in angles]


def _arc(arc):
    # The ring between two circles, cut out by a fan: the square ends of a buffer are not exact.
    middle, half = Point(*arc.centre), arc.style.width_mm / 2
    ring = middle.buffer(arc.radius_mm + half, 4 * _FINE) - middle.buffer(arc.radius_mm - half, 4 * _FINE)
    fan = Polygon([arc.centre, *_arc_points(replace(arc, radius_mm=2 * arc.radius_mm))])
    ends = [Point(*arc.point(angle)).buffer(half, 2 * _FINE) for angle in (arc.start_deg, arc.end_deg)]
    return shapely.union_all([ring & fan, *(ends if arc.style.cap is Cap.ROUND else [])])


def _circle(circle):
    half = circle.style.width_mm / 2 if circle.style.stroke else 0.0
    centre = Point(*circle.centre)
    outer = centre.buffer(circle.radius_mm + half, quad_segs=4 * _FINE)
    if circle.style.fill:
        return outer
    return outer.difference(centre.buffer(max(circle.radius_mm - half, 0), quad_segs=4 * _FINE))


def _outline(outline):
    corners = []
    for here, _, arc in outline.edges():
        points = [] if arc is None else _arc_points(arc)[1:-1]
        corners += [(here.x, here.y), *(points if here.turn_deg > 0 else points[::-1])]
    fill = Polygon(corners) if outline.style.fill else Polygon()
    return fill.union(_stroked(LinearRing(corners), outline.style, join="mitre"))


def _letters(word):
    return shapely.union_all([_placed(placed, word.style) for placed in word.glyphs]).simplify(2e-4)


def _placed(placed, style):
    paths = _paths(placed.glyph.path)
    if placed.glyph.stroked:
        lines = [LineString([(x * placed.size_mm, y * placed.size_mm) for x, y in path]) for path in paths]
        ink = shapely.union_all([_stroked(line, style) for line in lines])
    else:
        ink = Polygon()
        for path in paths:
            ink = ink.symmetric_difference(Polygon(path))
        ink = affinity.scale(ink, placed.size_mm, placed.size_mm, origin=(0, 0))
    return affinity.translate(affinity.rotate(ink, -placed.angle_deg, origin=(0, 0)), placed.x, placed.y)


def _paths(path):
    paths = []
    for code, values in path:
        if code == "M":
            paths.append([values])
        elif code == "L":
            paths[-1].append(values)
        elif code in "QC":
            poles = np.array([paths[-1][-1], *zip(values[::2], values[1::2], strict=True)])
            paths[-1] += [tuple(_casteljau(poles, t)) for t in np.linspace(0, 1, 33)[1:]]
        elif code == "Z" and paths[-1][0] != paths[-1][-1]:
            paths[-1].append(paths[-1][0])
    return paths


def _casteljau(poles, t):
    while len(poles) > 1:
        poles = poles[:-1] * (1 - t) + poles[1:] * t
    return poles[0]


def bends(points):
    """Return by how much a closed figure turns at each corner, in degrees."""
    ring = [points[-1], *points, points[0]]
    ways = [math.atan2(y2 - y1, x2 - x1) for (x1, y1), (x2, y2) in pairwise(ring)]
    return [abs(math.degrees(math.remainder(b - a, 2 * math.pi))) for a, b in pairwise(ways)]


# Without numbers so small that the referee is lost.
coordinates = st.floats(-10, 10).map(lambda x: round(x, 6))
points = st.tuples(coordinates, coordinates)
widths = st.floats(0.1, 1.5)
angles = st.floats(-180, 180)
caps = st.sampled_from(Cap)
strokes = st.builds(lambda w, cap: Style(stroke=BLACK, width_mm=w, cap=cap), widths, caps)
fills = st.just(Style(fill=BLACK))
both = st.builds(lambda w: Style(stroke=BLACK, width_mm=w, fill=BLACK), widths)


@st.composite
def lines(draw):
    """Draw marks and longer lines, 0.2 to 20 mm."""
    start = draw(points)
    return Line(start, polar(start, draw(st.floats(0.2, 20)), draw(angles)), draw(strokes))


@st.composite
def arcs(draw):
    """Draw arcs of 1 to 359 degrees, wider than their stroke."""
    start = draw(angles)
    sweep_deg = draw(st.floats(1, 359))
    return Arc(draw(points), draw(st.floats(2, 15)), start, start + sweep_deg, draw(strokes))


@st.composite
def circles(draw):
    """Draw rings, discs and both."""
    return Circle(draw(points), draw(st.floats(0.3, 10)), draw(st.one_of(strokes, fills, both)))


@st.composite
def wedges(draw):
    """Draw triangles without sharp corners, on which referees cut mitres off differently."""
    centre, turn = draw(points), draw(angles)
    places = [0, draw(st.floats(70, 150)), draw(st.floats(210, 290))]
    corners = [polar(centre, draw(st.floats(2, 8)), turn + at) for at in places]
    corners = corners if draw(st.booleans()) else corners[::-1]
    triangle = Outline(tuple(Vertex(x, y) for x, y in corners), draw(st.one_of(strokes, fills, both)))
    return triangle if max(bends(corners)) < 160 else Outline(triangle.vertices, Style(fill=BLACK))


@st.composite
def zones(draw):
    """Draw bands between two radii, as coloured zones are, with a clockwise and an anticlockwise edge."""
    centre, start, sweep = draw(points), draw(angles), draw(st.floats(5, 300))
    inner = draw(st.floats(2, 10))
    outer = inner + draw(st.floats(1, 4))
    (a, b), (c, d) = [[polar(centre, r, at) for at in (start, start + sweep)] for r in (outer, inner)]
    corners = (Vertex(*a, sweep), Vertex(*b), Vertex(*d, -sweep), Vertex(*c))
    return Outline(corners, draw(st.one_of(strokes, fills, both)))


@st.composite
def words(draw):
    """Draw lettering with and without holes, from small to large enough that a mark fits in a hole."""
    text = draw(st.sampled_from(["0", "8", "%", "106", "Ω", "1.5", "Hz", "∞"]))
    return letters(text, draw(st.floats(1.5, 12)), draw(points), Style(fill=BLACK), angle_deg=draw(angles))


HOOK = Glyph(
    "test-hook",
    (("M", (0.1, 0.7)), ("L", (0.4, 0.7)), ("Q", (0.6, 0.4, 0.3, 0.2)), ("C", (0.1, 0.1, 0.2, 0.0, 0.5, 0.0)),
     ("M", (0.1, 0.3)), ("L", (0.2, 0.4)), ("L", (0.2, 0.2)), ("Z", ()))
    , (0.1, 0.0, 0.5, 0.7), stroked=True,
)  # fmt: skip


@st.composite
def single_strokes(draw):
    """Draw a letter of a single stroke, open and closed, straight and curved."""
    width_mm = draw(st.floats(0.1, 0.3))
    style = Style(stroke=BLACK, width_mm=width_mm, cap=Cap.ROUND)
    x, y = draw(points)
    return Letters("h", (Placed(HOOK, x, y, draw(st.floats(4, 10)), draw(angles)),), style)


primitives = st.one_of(lines(), arcs(), circles(), wedges(), zones(), words(), single_strokes())
