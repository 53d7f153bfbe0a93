"""Where a pointer meets a scale line: arcs about any centre, and straight lines.

A pointer ray leaves the pivot (the origin) at an angle, 0 straight up, clockwise positive.  Marks
lie along the ray, not along the radius of the arc, so an arc off the pivot still reads true.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import Protocol

import numpy as np

from dialgen.errors import InputError
from dialgen.stage import Array

_LONGEST = 4.0


class ScaleLine(Protocol):
    """The line on which the marks stand; angles in degrees, lengths in millimetres."""

    def meets(self, angle_deg: Array) -> Array:
        """Return whether the pointer at each angle meets the line in front of the pivot."""
        ...

    def points(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return x and y of the meeting points; NaN where there is none, see `meets`."""
        ...

    def along(self, angle_deg: Array) -> Array:
        """Return the meeting points' places along the line, rising with the angle."""
        ...

    def directions(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return the unit vectors along which marks are drawn, away from the pivot."""
        ...

    def away(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return the unit vectors along which numerals stand off from the ends of their marks."""
        ...

    def stretch(self, angle_deg: Array) -> Array:
        """Return how much longer a mark is drawn so that all of a rank end at one height."""
        ...

    def offset(self, outward_mm: float) -> ScaleLine:
        """Return the line that runs beside this one, farther from the pivot by ``outward_mm``."""
        ...

    def beside(self, angle_deg: Array, outward_mm: float) -> tuple[Array, Array]:
        """Return x and y of where marks at each angle cross the line that runs beside this one."""
        ...


@dataclass(frozen=True, slots=True)
class ArcLine:
    """A circle of ``radius_mm`` about ``centre``; the pointer meets it at its farther crossing."""

    radius_mm: float
    centre: tuple[float, float] = (0.0, 0.0)

    def _reach(self, angle_deg: Array) -> Array:
        # |t·u - c| = R has the roots t = u·c ± sqrt((u·c)² - c² + R²); the larger is the farther.
        x, y = _ray(angle_deg)
        towards = x * self.centre[0] + y * self.centre[1]
        square = towards**2 - (self.centre[0] ** 2 + self.centre[1] ** 2) + self.radius_mm**2
        reach = towards + np.sqrt(np.where(square < 0, np.nan, square))
        return np.where(reach > 0, reach, np.nan)

    def meets(self, angle_deg: Array) -> Array:
        """Return whether the pointer at each angle meets the arc."""
        return np.asarray(~np.isnan(self._reach(angle_deg)))

    def points(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return x and y of the farther crossing."""
        x, y = _ray(angle_deg)
        reach = self._reach(angle_deg)
        return x * reach, y * reach

    def along(self, angle_deg: Array) -> Array:
        """Return the arc length from straight above the centre."""
        return np.asarray(self.radius_mm * np.radians(self.about_centre(angle_deg)))

    def about_centre(self, angle_deg: Array) -> Array:
        """Return the meeting points' angles about the arc's own centre, in degrees."""
        if self.centre == (0.0, 0.0):
            return np.asarray(angle_deg, dtype=float)
        x, y = self.points(angle_deg)
        turned = np.degrees(np.arctan2(x - self.centre[0], y - self.centre[1]))
        # Seen from inside the circle the angle about the centre follows the pointer's, within half
        # a turn; the pointer's own turns are put back.
        return np.asarray(turned + 360 * np.round((angle_deg - turned) / 360))

    def directions(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return the pointer's own direction."""
        return _ray(angle_deg)

    def away(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return the pointer's own direction."""
        return _ray(angle_deg)

    def stretch(self, angle_deg: Array) -> Array:
        """Return 1 over the cosine of the mark's lean, so that all of a rank end on one circle.

        That circle is about the arc's own centre; a mark of length L that leans by a misses it by
        (L·tan a)²/2R, a few micrometres.  Where the pointer all but grazes the arc a mark grows to
        four times its length and no longer: it would run along the line.
        """
        if self.centre == (0.0, 0.0):
            return np.ones(np.shape(angle_deg))
        (x, y), (ux, uy) = self.points(angle_deg), _ray(angle_deg)
        cosine = (ux * (x - self.centre[0]) + uy * (y - self.centre[1])) / self.radius_mm
        return np.asarray(1.0 / np.maximum(cosine, 1.0 / _LONGEST))

    def offset(self, outward_mm: float) -> ArcLine:
        """Return the circle about the same centre, larger by ``outward_mm``."""
        return ArcLine(self.radius_mm + outward_mm, self.centre)

    def beside(self, angle_deg: Array, outward_mm: float) -> tuple[Array, Array]:
        """Return x and y of the pointer's farther crossing with that circle."""
        return self.offset(outward_mm).points(angle_deg)


@dataclass(frozen=True, slots=True)
class StraightLine:
    """The straight line through ``start`` and ``end``, which may go on beyond both.

    Args:
        start: one point of it, in millimetres from the pivot.
        end: another.
        square: marks stand square to the line instead of along the pointer.
        curve_mm: the radius of a curved edgewise plate laid flat: the distance along the line is
            radius times angle, from the foot of straight up.

    Raises:
        InputError: both points are one, or a curved plate's line has no foot above the pivot.
    """

    start: tuple[float, float]
    end: tuple[float, float]
    square: bool = False
    curve_mm: float | None = None

    def __post_init__(self) -> None:
        if math.dist(self.start, self.end) < 1e-6:
            raise InputError("both ends of the line are one point; give two points", ("line",))
        if self.curve_mm is not None and not self._foot()[1] > 0:
            raise InputError(
                "a curved plate's line must cross straight up, above the pivot; move the line", ("line",)
            )

    def _unit(self) -> tuple[float, float]:
        # Turned so that places rise with the pointer's angle: clockwise, seen from the pivot.
        x, y = self.end[0] - self.start[0], self.end[1] - self.start[1]
        length = math.hypot(x, y) * (1 if self.start[1] * x - self.start[0] * y >= 0 else -1)
        return x / length, y / length

    def _foot(self) -> tuple[float, float]:
        ux, uy = self._unit()
        if abs(ux) < 1e-12:
            return 0.0, math.nan
        return 0.0, self.start[1] - self.start[0] * uy / ux

    def _reach(self, angle_deg: Array) -> Array:
        x, y = _ray(angle_deg)
        ux, uy = self._unit()
        across = x * uy - y * ux
        # Straight enough to parallel that the crossing would lie kilometres away counts as none.
        with np.errstate(divide="ignore", invalid="ignore"):
            reach = (self.start[0] * uy - self.start[1] * ux) / across
        return np.where((np.abs(across) > 1e-9) & (reach > 0), reach, np.nan)

    def meets(self, angle_deg: Array) -> Array:
        """Return whether the pointer at each angle meets the line."""
        if self.curve_mm is not None:
            return np.ones(np.shape(angle_deg), dtype=bool)
        return np.asarray(~np.isnan(self._reach(angle_deg)))

    def points(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return x and y of the crossing, or of the place on the plate laid flat."""
        if self.curve_mm is None:
            x, y = _ray(angle_deg)
            reach = self._reach(angle_deg)
            return x * reach, y * reach
        distance = self.curve_mm * np.radians(angle_deg)
        (ux, uy), (fx, fy) = self._unit(), self._foot()
        return fx + distance * ux, fy + distance * uy

    def along(self, angle_deg: Array) -> Array:
        """Return the distance along the line from its point nearest the pivot."""
        x, y = self.points(angle_deg)
        ux, uy = self._unit()
        return np.asarray(x * ux + y * uy)

    def directions(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return the pointer's direction, or square to the line and away from the pivot."""
        if not self.square and self.curve_mm is None:
            return _ray(angle_deg)
        return self.away(angle_deg)

    def away(self, angle_deg: Array) -> tuple[Array, Array]:
        """Return square to the line, so that numerals stand in one row."""
        ux, uy = self._unit()
        shape = np.shape(angle_deg)
        return np.full(shape, -uy), np.full(shape, ux)

    def stretch(self, angle_deg: Array) -> Array:
        """Return 1 over the cosine of the mark's lean, so that all of a rank end on one parallel."""
        (x, y), (nx, ny) = self.directions(angle_deg), self.away(angle_deg)
        return np.asarray(1.0 / (x * nx + y * ny))

    def offset(self, outward_mm: float) -> StraightLine:
        """Return the parallel, away from the pivot by ``outward_mm``."""
        ux, uy = self._unit()
        dx, dy = -uy * outward_mm, ux * outward_mm
        return replace(
            self,
            start=(self.start[0] + dx, self.start[1] + dy),
            end=(self.end[0] + dx, self.end[1] + dy),
        )

    def beside(self, angle_deg: Array, outward_mm: float) -> tuple[Array, Array]:
        """Return x and y of where marks, along the pointer or square to the line, cross the parallel."""
        (x, y), (dx, dy) = self.points(angle_deg), self.directions(angle_deg)
        reach = outward_mm * self.stretch(angle_deg)
        return x + dx * reach, y + dy * reach


def _ray(angle_deg: Array) -> tuple[Array, Array]:
    turn = np.radians(angle_deg)
    return np.sin(turn), np.cos(turn)
