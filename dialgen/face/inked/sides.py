"""The two sides of a scale line: how far the marks reach on each, and which is free for other things."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from enum import IntEnum

import numpy as np

from dialgen.dialfile.models import Zone
from dialgen.drawing import Point
from dialgen.face.inked.numerals import reaches
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale

_ZONE_WIDTH = 0.9
_GAP = 0.5
_UNDER = 0.3
_ROW = 1.3


class Side(IntEnum):
    """A side of a scale line; its value times a distance counts outwards."""

    INSIDE = -1
    OUTSIDE = 1


SIDES = {"inside": Side.INSIDE, "outside": Side.OUTSIDE}


def mark_reach_mm(scale: RuledScale, side: Side) -> float:
    """Return how far the longest marks reach on one side of the line."""
    inner, outer = reaches(scale.spec.marks, scale.sizes)[Rank.NUMBERED]
    return outer if side is Side.OUTSIDE else -inner


def printed_reach_mm(scale: RuledScale, zones: Sequence[Zone], side: Side) -> float:
    """Return about how far marks, zones and numerals reach on one side of the line."""
    sizes = scale.sizes
    places = [SIDES[scale.spec.numerals]]
    for row in scale.spec.also:
        places.append(SIDES[row.numerals] if row.numerals else places[-1])
    row_mm = sizes.space_mm + _ROW * sizes.numeral_mm
    numerals_mm = max(mark_reach_mm(scale, side), sizes.line_width_mm / 2) + row_mm * places.count(side)
    return max([numerals_mm, *(side * edge for zone in zones for edge in zone_span_mm(zone, scale))])


def free_side(scale: RuledScale) -> Side:
    """Return the side free of numerals; where neither is, that with the shorter marks."""
    taken = numeral_sides(scale)
    return min(Side, key=lambda side: (side in taken, mark_reach_mm(scale, side), side is Side.OUTSIDE))


def numeral_sides(scale: RuledScale) -> set[Side]:
    """Return the sides on which the rows of numerals stand."""
    return {SIDES[side] for side in (scale.spec.numerals, *(row.numerals for row in scale.spec.also)) if side}


def zone_span_mm(zone: Zone, scale: RuledScale) -> tuple[float, float]:
    """Return between which distances outwards from the scale line a zone lies.

    On the line it is as high as the fine marks, if it has no width of its own, and stands as they
    do.  Beside the line it starts under the line's edge, or clear of the marks where there are any on
    that side.  Without a place of its own it lies on the free side, or on
    the line where both sides have numerals.
    """
    sizes = scale.sizes
    place = zone.place or ("line" if len(numeral_sides(scale)) == 2 else None)
    if place == "line":
        inner, outer = reaches(scale.spec.marks, sizes)[Rank.FINE]
        grown = 1.0 if zone.width is None else zone.width / sizes.fine_mm
        return inner * grown, outer * grown
    side = free_side(scale) if place is None else SIDES[place]
    reach_mm = mark_reach_mm(scale, side)
    near_mm = reach_mm + _GAP * sizes.space_mm if reach_mm else _UNDER * sizes.line_width_mm
    far_mm = near_mm + (zone.width or _ZONE_WIDTH * sizes.middle_mm)
    return min(side * near_mm, side * far_mm), max(side * near_mm, side * far_mm)


@dataclass(frozen=True, slots=True)
class Place:
    """Where a mark at a value would stand: its point on the line, its direction, how it is stretched."""

    angle_deg: float
    at: Point
    direction: Point
    stretch: float

    def beside(self, outward_mm: float) -> Point:
        """Return the point on the mark's way that lies so far outwards from the line."""
        reach_mm = outward_mm * self.stretch
        return self.at[0] + reach_mm * self.direction[0], self.at[1] + reach_mm * self.direction[1]


def place_of(scale: RuledScale, value: float) -> Place:
    """Return the place of a value on a scale."""
    angle_deg, line = scale.dial.chain.angle(np.array([value])), scale.line
    (x, y), (ux, uy) = line.points(angle_deg), line.directions(angle_deg)
    stretch = float(line.stretch(angle_deg)[0])
    return Place(float(angle_deg[0]), (float(x[0]), float(y[0])), (float(ux[0]), float(uy[0])), stretch)


def taken_mm(
    scale: RuledScale, zones: Sequence[Zone], side: Side, value: float, beside_mm: float = 0.0
) -> float:
    """Return how far from the line what is drawn at a value reaches on one side: line, marks and zones.

    Args:
        scale: the scale.
        zones: what is laid over it.
        side: the side in question.
        value: the value.
        beside_mm: how near along the line a zone may come before it counts.
    """
    reach_mm = max(scale.sizes.line_width_mm / 2, mark_reach_mm(scale, side))
    spans = [zone_span_mm(zone, scale) for zone in zones if _comes_near(scale, zone, value, beside_mm)]
    return max([reach_mm, *(side * edge for span in spans for edge in span)])


def _comes_near(scale: RuledScale, zone: Zone, value: float, beside_mm: float) -> bool:
    if zone.start <= value <= zone.end:
        return True
    if not beside_mm:
        return False
    edge = zone.start if value < zone.start else zone.end
    near, far = scale.line.along(scale.dial.chain.angle(np.array([value, edge]))).tolist()
    return bool(abs(far - near) < beside_mm)
