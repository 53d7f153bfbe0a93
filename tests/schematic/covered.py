"""The area a primitive covers, by shapely alone."""

from __future__ import annotations

import numpy as np
from shapely import Polygon
from shapely.geometry import LineString
from shapely.geometry import Point as Spot

from dialgen.drawing import Arc, Circle, Line, Outline


def drawn(item):
    """What a primitive covers, by shapely alone."""
    match item:
        case Line():
            return LineString([item.start, item.end]).buffer(item.style.width_mm / 2)
        case Circle():
            return Spot(item.centre).buffer(item.radius_mm + item.style.width_mm / 2)
        case Arc():
            angles = np.linspace(item.start_deg, item.end_deg, 40)
            return LineString([item.point(angle) for angle in angles]).buffer(item.style.width_mm / 2)
        case Outline():
            return Polygon([(v.x, v.y) for v in item.vertices]).buffer(item.style.width_mm / 2)
    raise AssertionError(item)
