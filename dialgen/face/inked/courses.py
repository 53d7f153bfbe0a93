"""Scale lines as courses: what runs beside a line from one pointer angle to another, in pieces.

Courses beside one line share a coordinate, so that what stands at one place of each lies square
across: degrees about the centre of an arc, millimetres along a straight line.  It rises clockwise.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.drawing import Arc, Line, Point, Style, polar
from dialgen.errors import InputError
from dialgen.geometry.lines import ArcLine, ScaleLine
from dialgen.stage import Array

_PIVOT = (0.0, 0.0)


@dataclass(frozen=True, slots=True)
class ArcCourse:
    """A part of a circle; ``low`` and ``high`` are degrees about its centre."""

    centre: Point
    radius_mm: float
    low: float
    high: float

    @property
    def unit_mm(self) -> float:
        """How long one degree is."""
        return math.radians(self.radius_mm)

    @property
    def room_mm(self) -> float:
        """How wide a stroke along it may grow before it meets its own centre or its other end."""
        return min(2 * self.radius_mm, (360.0 - (self.high - self.low)) * self.unit_mm)

    def point(self, at: float, outward_mm: float = 0.0) -> Point:
        """Return the point at a place, or square beside it."""
        return polar(self.centre, self.radius_mm + outward_mm, at)

    def turn_deg(self, first: float, last: float) -> float:
        """Return by how much an edge from one place to another turns."""
        return last - first

    def piece(self, first: float, last: float, style: Style) -> Arc:
        """Return the stroke from one place to another."""
        return Arc(self.centre, self.radius_mm, first, last, style)


@dataclass(frozen=True, slots=True)
class LineCourse:
    """A part of a straight line; ``low`` and ``high`` are millimetres along it.

    Args:
        along: the unit vector along it.
        height_mm: how far it passes from the pivot.
        low, high: its ends.
    """

    along: Point
    height_mm: float
    low: float
    high: float

    @property
    def unit_mm(self) -> float:
        """One millimetre."""
        return 1.0

    @property
    def room_mm(self) -> float:
        """No end: a straight stroke may be as wide as it likes."""
        return math.inf

    def point(self, at: float, outward_mm: float = 0.0) -> Point:
        """Return the point at a place, or square beside it."""
        (x, y), height_mm = self.along, self.height_mm + outward_mm
        return at * x - height_mm * y, at * y + height_mm * x

    def turn_deg(self, first: float, last: float) -> float:
        """Return 0: nothing turns."""
        return 0.0

    def piece(self, first: float, last: float, style: Style) -> Line:
        """Return the stroke from one place to another."""
        return Line(self.point(first), self.point(last), style)


Course = ArcCourse | LineCourse


def course(line: ScaleLine, start_deg: float, end_deg: float, outward_mm: float) -> Course:
    """Return what runs beside a line between two angles of the pointer, whichever is the larger.

    Args:
        line: the scale line.
        start_deg: the pointer's angle at one end.
        end_deg: the pointer's angle at the other.
        outward_mm: how much farther from the pivot it runs than the line.

    Raises:
        InputError: the pointer does not meet it at an end.
    """
    return courses(line, [start_deg], [end_deg], outward_mm)[0]


def courses(
    line: ScaleLine, starts_deg: Sequence[float], ends_deg: Sequence[float], outward_mm: float
) -> list[Course]:
    """Return the course between each start and its end; see `course`."""
    ends = np.sort(np.array([starts_deg, ends_deg], dtype=float), axis=0)
    _check_room(line, ends, outward_mm)
    if isinstance(line, ArcLine):
        ring = line.offset(outward_mm)
        lows, highs = ring.about_centre(ends).tolist()
        return [
            ArcCourse(ring.centre, ring.radius_mm, low, high) for low, high in zip(lows, highs, strict=True)
        ]
    xs, ys = line.beside(ends, outward_mm)
    (away_x, away_y) = (float(part.flat[0]) for part in line.away(ends))
    lows, highs = (xs * away_y - ys * away_x).tolist()
    height_mm = float(xs.flat[0] * away_x + ys.flat[0] * away_y)
    return [
        LineCourse((away_y, -away_x), height_mm, low, high) for low, high in zip(lows, highs, strict=True)
    ]


def _check_room(line: ScaleLine, ends_deg: Array, outward_mm: float) -> None:
    beside = line.offset(outward_mm)
    if isinstance(beside, ArcLine):
        # A circle shrunk past its centre would come out on the other side.
        sound = beside.radius_mm > 0 and (beside.centre == _PIVOT or beside.meets(ends_deg).all())
    else:
        sound = beside.meets(ends_deg).all()
    if not sound:
        raise InputError(
            f"{-outward_mm:.3g} mm inside the scale line the pointer meets nothing; keep nearer to the line"
        )
