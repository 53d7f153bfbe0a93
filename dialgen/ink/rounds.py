"""Round ink: discs, rings and strokes along a circle, as contours true to a few micrometres."""

from __future__ import annotations

import math

import numpy as np

from dialgen.drawing import Arc, Point
from dialgen.stage import Array

SAGITTA_MM = 0.0025
"""How far a chord may leave its circle, and the corner of a stroke its place."""

_WIDEST_DEG = 12.0
"""The widest chord of a small circle: one of 30 corners has 0.7 % less area than the disc."""


def along(
    centre: Point, radius_mm: float, start_deg: float, end_deg: float, reach_mm: float, half_mm: float = 0.0
) -> Array:
    """Return points on a circle from one angle clockwise to another, both included, (n, 2).

    Args:
        centre: of the circle.
        radius_mm: of the circle; below zero, the points lie across the centre.
        start_deg: angle of the first point.
        end_deg: angle of the last point.
        reach_mm: the largest radius about the centre at which chords must be true.
        half_mm: half the width of a stroke that will be laid along the chords.
    """
    step_deg = _step_deg(reach_mm)
    if half_mm:
        # The end of a stroke, and the tip of its corner, lean by half of what the last chord spans.
        step_deg = min(step_deg, 2 * math.degrees(SAGITTA_MM / half_mm))
    count = max(1, math.ceil((end_deg - start_deg) / step_deg - 1e-9))
    return _points(centre, radius_mm, np.linspace(math.radians(start_deg), math.radians(end_deg), count + 1))


def disc(centre: Point, radius_mm: float) -> Array:
    """Return the contour of a disc, anticlockwise."""
    return _whole(centre, radius_mm, radius_mm)[::-1]


def ring(centre: Point, inner_mm: float, outer_mm: float) -> list[Array]:
    """Return the contours of what lies between two circles; a disc where the inner one is none."""
    rim = disc(centre, outer_mm)
    if inner_mm <= 0:
        return [rim]
    return [rim, _whole(centre, inner_mm, outer_mm)]


def sectors(arc: Arc, half_mm: float) -> list[Array]:
    """Return the contours of a stroke reaching ``half_mm`` to both sides of ``arc``, square ends."""
    if arc.end_deg <= arc.start_deg:
        return []
    outer_mm, inner_mm = arc.radius_mm + half_mm, arc.radius_mm - half_mm
    outer = along(arc.centre, outer_mm, arc.start_deg, arc.end_deg, outer_mm)
    if inner_mm > 0:
        inner = along(arc.centre, inner_mm, arc.start_deg, arc.end_deg, outer_mm)
        return [np.concatenate((inner, outer[::-1]))]
    # A stroke broader than its circle covers the centre, and a smaller sector across from it.
    middle = np.array([arc.centre])
    across = along(arc.centre, inner_mm, arc.start_deg, arc.end_deg, outer_mm)
    pieces = (outer, across) if inner_mm < 0 else (outer,)
    return [np.concatenate((middle, piece[::-1])) for piece in pieces]


def _whole(centre: Point, radius_mm: float, reach_mm: float) -> Array:
    """Return points all around a circle, clockwise, among them those farthest to its four sides."""
    count = 4 * math.ceil(90.0 / _step_deg(reach_mm))
    return _points(centre, radius_mm, np.linspace(0.0, 2 * math.pi, count, endpoint=False))


def _points(centre: Point, radius_mm: float, angles: Array) -> Array:
    points = np.empty((len(angles), 2))
    np.multiply(np.sin(angles), radius_mm, out=points[:, 0])
    np.multiply(np.cos(angles), radius_mm, out=points[:, 1])
    points += centre
    return points


def _step_deg(radius_mm: float) -> float:
    """Return the widest chord, as the angle it spans, that stays within the sagitta of its circle."""
    if radius_mm <= SAGITTA_MM:
        return _WIDEST_DEG
    return min(_WIDEST_DEG, 2 * math.degrees(math.acos(1 - SAGITTA_MM / radius_mm)))
