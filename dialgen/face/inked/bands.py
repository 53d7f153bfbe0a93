"""Bands: closed figures along a scale line, such as zones, filled blocks and slots."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from itertools import pairwise

from dialgen.drawing import Outline, Style, Vertex
from dialgen.errors import InputError
from dialgen.face.inked.courses import Course, courses
from dialgen.geometry.lines import ScaleLine

_WIDEST_DEG = 180.0


def band(
    line: ScaleLine, start_deg: float, end_deg: float, inner_mm: float, outer_mm: float, style: Style
) -> Outline:
    """Return the band beside a line between two angles of the pointer, whichever is the larger.

    Its long sides are parts of the line's parallels, arcs where the line is one; its ends lie along
    the marks that would stand there.

    Args:
        line: the scale line.
        start_deg: the pointer's angle at one end.
        end_deg: the pointer's angle at the other.
        inner_mm: how much farther from the pivot than the line its inner side runs.
        outer_mm: how much farther its outer side does.
        style: how it is inked.

    Raises:
        InputError: the pointer does not meet a side at an end.
    """
    return bands(line, [start_deg], [end_deg], inner_mm, outer_mm, style)[0]


def bands(
    line: ScaleLine,
    starts_deg: Sequence[float],
    ends_deg: Sequence[float],
    inner_mm: float,
    outer_mm: float,
    style: Style,
) -> list[Outline]:
    """Return the band between each start and its end; see `band`."""
    sides = [courses(line, starts_deg, ends_deg, side) for side in (outer_mm, inner_mm)]
    return [between(outer, inner, style) for outer, inner in zip(*sides, strict=True)]


def between(outer: Course, inner: Course, style: Style) -> Outline:
    """Return what lies between two courses, their ends joined straight across; clockwise."""
    return Outline((*_edge(outer, outer.low, outer.high), *_edge(inner, inner.high, inner.low)), style)


def slot(course: Course, width_mm: float, style: Style) -> Outline:
    """Return a slot along a course, closed by half a circle about each of its ends; clockwise.

    Raises:
        InputError: an arc too small for the width, or so long that the ends meet.
    """
    if width_mm >= course.room_mm:
        raise InputError(f"a slot {width_mm:g} mm wide does not fit its arc; make it narrower or shorter")
    low, high, half_mm = course.low, course.high, width_mm / 2
    sides = (*_edge(course, low, high, half_mm), *_edge(course, high, low, -half_mm))
    count = len(sides) // 2
    # What ends a side starts the half circle to the other one.
    round_ends = {count - 1, 2 * count - 1}
    return Outline(
        tuple(Vertex(v.x, v.y, 180.0) if i in round_ends else v for i, v in enumerate(sides)), style
    )


def _edge(course: Course, first: float, last: float, outward_mm: float = 0.0) -> Iterator[Vertex]:
    """Yield the corners along a side, the last one as the start of a straight edge."""
    pieces = max(1, math.ceil(abs(course.turn_deg(first, last)) / _WIDEST_DEG - 1e-9))
    places = [first + (last - first) * i / pieces for i in range(pieces + 1)]
    for here, there in pairwise(places):
        yield Vertex(*course.point(here, outward_mm), course.turn_deg(here, there))
    yield Vertex(*course.point(last, outward_mm))
