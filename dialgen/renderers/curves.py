"""Primitives as path steps, for formats that know only straight lines and Bezier curves.

A circle is no Bezier curve; one curve per quarter circle is 0.012 mm out at 45 mm radius.  So a
circle is split until the curves leave it by less than ``ROUNDNESS_MM``.  Steps are those of
``drawing.PathStep``, in millimetres here.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator
from itertools import pairwise
from typing import assert_never

from dialgen.drawing import Arc, Circle, Outline, PathStep, Placed, Point
from dialgen.renderers.runs import Lines

ROUNDNESS_MM = 2e-5
"""How far a Bezier curve may leave its circle: a fifth of what is promised, the rest is rounding."""

_WIDEST_DEG = 30.0


def steps(item: Lines | Arc | Circle | Outline) -> Iterator[PathStep]:
    """Yield ``item`` as moves, lines, cubic curves and closings."""
    match item:
        case Lines():
            for line in item.lines:
                yield "M", line.start
                yield "L", line.end
        case Arc():
            yield "M", item.point(item.start_deg)
            yield from _beziers(item)
        case Circle():
            arc = Arc(item.centre, item.radius_mm, 0.0, 360.0, item.style)
            yield "M", arc.point(0.0)
            yield from _beziers(arc)
            yield "Z", ()
        case Outline():
            yield from _outline(item)
        case _:
            assert_never(item)


def stops(arc: Arc, widest_deg: float, *, backwards: bool = False) -> list[Point]:
    """Return points along ``arc`` from end to end, evenly spaced, at most ``widest_deg`` apart."""
    sweep_deg = arc.end_deg - arc.start_deg
    count = max(1, math.ceil(sweep_deg / widest_deg - 1e-9))
    points = [arc.point(arc.start_deg + sweep_deg * index / count) for index in range(count + 1)]
    return points[::-1] if backwards else points


def placed_steps(placed: Placed) -> Iterator[PathStep]:
    """Yield the glyph's outline where it stands, in millimetres."""
    turn = math.radians(placed.angle_deg)
    along, across = placed.size_mm * math.cos(turn), placed.size_mm * math.sin(turn)
    for code, ems in placed.glyph.path:
        points = zip(ems[::2], ems[1::2], strict=True)
        yield (
            code,
            tuple(
                value
                for x, y in points
                for value in (placed.x + along * x + across * y, placed.y - across * x + along * y)
            ),
        )


def cubic(path: Iterable[PathStep]) -> Iterator[PathStep]:
    """Yield ``path`` with every quadratic curve written as the cubic one that is the same."""
    here = start = (0.0, 0.0)
    for code, values in path:
        if code == "Q":
            cx, cy, x, y = values
            near = (here[0] + 2 * cx) / 3, (here[1] + 2 * cy) / 3
            far = (x + 2 * cx) / 3, (y + 2 * cy) / 3
            yield "C", (*near, *far, x, y)
        else:
            yield code, values
        here = start if code == "Z" else (values[-2], values[-1])
        start = here if code == "M" else start


def flattened(path: Iterable[PathStep], sagitta: float) -> list[list[Point]]:
    """Return the closed contours of ``path`` as corners, nowhere further than ``sagitta`` from it.

    Args:
        path: a glyph's outline; an open contour counts as closed, as it does when filled.
        sagitta: the greatest distance of a chord from its curve, in the path's own unit.
    """
    contours = chorded(path, sagitta)
    for contour in contours:
        if is_closed(contour):
            contour.pop()
    return [contour for contour in contours if len(contour) > 1]


def chorded(path: Iterable[PathStep], sagitta: float) -> list[list[Point]]:
    """Return the contours of ``path`` as they run, as points no further than ``sagitta`` from it.

    One that closes ends on the point where it starts; a lone move is nothing.
    """
    contours: list[list[Point]] = []
    for code, values in cubic(path):
        if code == "M":
            contours.append([(values[0], values[1])])
        elif code == "L":
            contours[-1].append((values[0], values[1]))
        elif code == "C":
            contours[-1].extend(_chords(contours[-1][-1], values, sagitta))
        elif not is_closed(contours[-1]):
            contours[-1].append(contours[-1][0])
    return [contour for contour in contours if len(contour) > 1]


def is_closed(contour: list[Point]) -> bool:
    """Return whether a contour ends on the point where it starts."""
    return len(contour) > 1 and math.dist(contour[0], contour[-1]) < 1e-9


def _outline(outline: Outline) -> Iterator[PathStep]:
    yield "M", (outline.vertices[0].x, outline.vertices[0].y)
    for here, there, arc in outline.edges():
        corner = there.x, there.y
        if arc is None:
            yield "L", corner
        else:
            *inner, (code, values) = _beziers(arc, backwards=here.turn_deg < 0)
            yield from inner
            # The corner itself, not its neighbour by rounding, so that the figure closes without
            # a sliver of an edge whose mitre would stick out.
            yield code, (*values[:4], *corner)
    yield "Z", ()


def _beziers(arc: Arc, *, backwards: bool = False) -> Iterator[PathStep]:
    points = stops(arc, _widest_deg(arc.radius_mm), backwards=backwards)
    piece = math.radians((arc.end_deg - arc.start_deg) / (len(points) - 1))
    # The curve that touches the circle at both ends and half way between.
    reach = 4 / 3 * math.tan(piece / 4) * (-1 if backwards else 1)
    cx, cy = arc.centre
    for (x1, y1), (x2, y2) in pairwise(points):
        # The clockwise tangent at a point is its spoke turned by a quarter: (dx, dy) -> (dy, -dx).
        leaving = x1 + reach * (y1 - cy), y1 - reach * (x1 - cx)
        arriving = x2 - reach * (y2 - cy), y2 + reach * (x2 - cx)
        yield "C", (*leaving, *arriving, x2, y2)


def _widest_deg(radius_mm: float) -> float:
    """Return the widest piece of a circle that one Bezier curve follows closely enough.

    The curve leaves the circle by 2/27 sin^6(a/4) / cos^2(a/4) of the radius at most, which goes
    with the sixth power of the piece a: 3.8e-7 at 30 degrees.
    """
    at_30_mm = 3.8e-7 * radius_mm
    return _WIDEST_DEG * min(1.0, (ROUNDNESS_MM / at_30_mm) ** (1 / 6)) if at_30_mm else _WIDEST_DEG


def _chords(start: Point, curve: tuple[float, ...], sagitta: float) -> Iterator[Point]:
    # A chord over a step h of the parameter stays within h^2/8 of the largest second derivative.
    (x0, y0), (x1, y1, x2, y2, x3, y3) = start, curve
    bend = 6 * max(
        math.hypot(x0 - 2 * x1 + x2, y0 - 2 * y1 + y2), math.hypot(x1 - 2 * x2 + x3, y1 - 2 * y2 + y3)
    )
    count = max(1, math.ceil(math.sqrt(bend / (8 * sagitta))))
    for index in range(1, count):
        t = index / count
        s = 1 - t
        b0, b1, b2, b3 = s * s * s, 3 * s * s * t, 3 * s * t * t, t * t * t
        yield b0 * x0 + b1 * x1 + b2 * x2 + b3 * x3, b0 * y0 + b1 * y1 + b2 * y2 + b3 * y3
    yield x3, y3
