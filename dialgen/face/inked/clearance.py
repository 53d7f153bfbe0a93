"""How far numerals must move from their marks to be clear of them, and back onto the plate.

A row of numerals is one array of points along their ink, with the counts that belong to each: a face
has a few dozen numerals, and asking numpy once for all is what keeps them cheap.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from dialgen.drawing import Point
from dialgen.face.plate import Outliner
from dialgen.stage import Array

_EDGE_MM = 0.8
_SLIDE_MM = 0.1
_FEW = 4
_MOST_MOVES = 8
_HAIR = 1e-9


@dataclass(frozen=True, slots=True, eq=False)
class Row:
    """A row of numerals about the origin, each with the end of its mark.

    Args:
        points: (n, 2), points along the ink of all numerals, one after another, mm.
        starts: where in ``points`` each numeral begins.
        ends: (k, 2), the ends of the marks, mm.
        aways: (k, 2), the unit vectors along which numerals stand off from them.
    """

    points: Array
    starts: NDArray[np.intp]
    ends: Array
    aways: Array

    @property
    def owners(self) -> NDArray[np.intp]:
        """The numeral that each point belongs to."""
        marked = np.zeros(len(self.points), dtype=np.intp)
        marked[self.starts[1:]] = 1
        return np.cumsum(marked)

    def ink(self, shifts: Array) -> list[Array]:
        """Return the points of each numeral where it stands, (n, 2) each."""
        return np.split(self.points + shifts[self.owners], self.starts[1:])


def clear_of_ends(row: Row, half_width_mm: float, space_mm: float) -> Array:
    """Return how far from its mark's end each numeral must lie for its ink to be just ``space_mm`` clear.

    Args:
        row: the numerals.
        half_width_mm: half the width of the marks, whose ends are square to the way to the numeral.
        space_mm: the least distance wanted between ink and mark.

    >>> points = np.array([[0.0, -1.0], [3.0, -1.0]])
    >>> row = Row(points, np.array([0]), np.zeros((1, 2)), np.array([[0.0, 1.0]]))
    >>> clear_of_ends(row, 0.2, 0.5).tolist()
    [1.5]
    """
    ux, uy = row.aways[row.owners].T
    x, y = row.points.T
    across = ux * y - uy * x
    beside = across - np.clip(across, -half_width_mm, half_width_mm)
    needed = _past(-(ux * x + uy * y), space_mm**2 - beside**2)
    return np.maximum(np.maximum.reduceat(needed, row.starts), 0.0)


def clear_of_others(row: Row, reaches_mm: Array, tips: Array, space_mm: float) -> Array:
    """Return reaches that keep every numeral clear of the ends of other marks than its own as well.

    Args:
        row: the numerals.
        reaches_mm: how far each lies from its own mark's end.
        tips: (m, 2), the ends of all marks, mm.
        space_mm: the least distance wanted between ink and those ends.
    """
    owners = row.owners
    low, high = np.minimum.reduceat(row.points, row.starts), np.maximum.reduceat(row.points, row.starts)
    found = reaches_mm.copy()
    pending = np.arange(len(found))
    # Few are near any: a wide numeral over close marks, which may come near others as it moves.
    for _ in range(_MOST_MOVES):
        shifts = (row.ends + found[:, None] * row.aways)[pending]
        above = tips > (low[pending] + shifts - space_mm)[:, None]
        near = np.all(above & (tips < (high[pending] + shifts + space_mm)[:, None]), axis=2)
        moved = []
        for i, beside in zip(pending.tolist(), near, strict=True):
            if np.any(beside):
                away = (float(row.aways[i, 0]), float(row.aways[i, 1]))
                needed = clear_of_ink(row.points[owners == i], tips[beside] - row.ends[i], away, space_mm)
                if needed > found[i]:
                    found[i] = needed
                    moved.append(i)
        if not moved:
            break
        pending = np.array(moved)
    return found


def clear_of_ink(points: Array, obstacles: Array, away: Point, space_mm: float) -> float:
    """Return how far points must move along ``away`` to be just clear of all obstacles.

    Args:
        points: (n, 2), what is moved, mm.
        obstacles: (m, 2), what it must be clear of, mm.
        away: the unit vector along which it is moved.
        space_mm: the least distance wanted between any of the points and any of the obstacles.

    >>> clear_of_ink(np.array([[0.0, -1.0], [3.0, -1.0]]), np.array([[0.0, 0.0]]), (0.0, 1.0), 0.5)
    1.5
    """
    rises, heights = points @ away, obstacles @ away
    # A few pairs say how far it is at least; the rest is between those that could ask for more.
    least_mm = _farthest(points[::_FEW], obstacles[::_FEW], away, space_mm)
    low = points[rises <= heights.max(initial=-np.inf) + space_mm - least_mm]
    high = obstacles[heights >= rises.min(initial=np.inf) - space_mm + least_mm]
    return max(least_mm, _farthest(low, high, away, space_mm))


def _farthest(points: Array, obstacles: Array, away: Point, space_mm: float) -> float:
    ux, uy = away
    dx, dy = (obstacles[None, :, i] - points[:, None, i] for i in (0, 1))
    needed = _past(ux * dx + uy * dy, space_mm**2 - (ux * dy - uy * dx) ** 2)
    return float(needed.max(initial=0.0))


def _past(along: Array, room: Array) -> Array:
    # |p + t·u - q| = space at t = (q - p)·u + sqrt(space² - across²): past the larger root it is clear.
    return np.where(room >= 0, along + np.sqrt(np.maximum(room, 0.0)), -np.inf)


def clear_as_numbers(
    points: Array, obstacles: Array, away: Point, turn_deg: float, least_mm: tuple[float, float]
) -> float:
    """Return how far a numeral must move along ``away`` not to be read as one with that before it.

    It is then above or below that, or stands well beside it.

    Args:
        points: (n, 2), the numeral's ink, mm.
        obstacles: (m, 2), the ink of the numeral before it, mm.
        away: the unit vector along which it is moved.
        turn_deg: how far both are turned clockwise.
        least_mm: the least space beside it, and that above or below it.

    >>> one = np.array([[-0.5, -1.0], [0.5, 1.0]])
    >>> [clear_as_numbers(one, one, away, 0.0, (1.2, 0.0)) for away in ((1.0, 0.0), (0.0, 1.0))]
    [2.2, 2.0]
    """
    turn = math.radians(turn_deg)
    frame = np.array([[math.cos(turn), math.sin(turn)], [-math.sin(turn), math.cos(turn)]])
    own, other, way = points @ frame, obstacles @ frame, np.array(away) @ frame
    # Turned level: so far it is to go past the other's end, and past its top.
    ahead = np.where(way > 0, other.max(axis=0) - own.min(axis=0), own.max(axis=0) - other.min(axis=0))
    shares = np.maximum(np.abs(way), _HAIR)
    return max(0.0, float(((ahead + np.array(least_mm)) / shares).min()))


def slides(plate: Outliner, row: Row, shifts: Array, tips: Array, space_mm: float) -> Array:
    """Return how far each numeral is slid along its scale to be on the plate; nowhere if that is far.

    Clear of the marks if there is such a place.

    Args:
        plate: the plate's outline.
        row: the numerals.
        shifts: (k, 2), where each is put, mm.
        tips: (m, 2), the ends of all marks, mm.
        space_mm: how near to them its box may come.
    """
    low = np.minimum.reduceat(row.points, row.starts) + shifts - _EDGE_MM
    high = np.maximum.reduceat(row.points, row.starts) + shifts + _EDGE_MM
    xs = np.stack([low[:, 0], low[:, 0], high[:, 0], high[:, 0]], axis=1)
    ys = np.stack([low[:, 1], high[:, 1], low[:, 1], high[:, 1]], axis=1)
    found = np.zeros_like(shifts)
    for i in np.flatnonzero(~plate.holds(xs, ys).all(axis=1)).tolist():
        farthest_mm = float((high[i] - low[i]).max())
        steps = np.arange(1, math.ceil(farthest_mm / _SLIDE_MM)) * _SLIDE_MM
        along = np.array([row.aways[i, 1], -row.aways[i, 0]])
        # Nearest first, to either side in turn.
        ways = np.stack([steps, -steps], axis=1).reshape(-1, 1) * along
        held = plate.holds(xs[i] + ways[:, :1], ys[i] + ways[:, 1:]).all(axis=1)
        rim = _EDGE_MM - space_mm
        above = tips > (low[i] + rim + ways)[:, None]
        over = np.any(np.all(above & (tips < (high[i] - rim + ways)[:, None]), axis=2), axis=1)
        # Off the plate a numeral is lost: rather than that it stands near a mark, for the review to tell.
        fits = [*np.flatnonzero(held & ~over), *np.flatnonzero(held)]
        if fits:
            found[i] = ways[fits[0]]
    return found
