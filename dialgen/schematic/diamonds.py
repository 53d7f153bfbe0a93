"""Two diamonds: the rectifier's about its movement, and Wheatstone's bridge."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise

from dialgen.drawing import Point
from dialgen.schematic.pieces import GAP_MM, Item, Joint, Piece, Pieces, Sign, Wire, stack
from dialgen.schematic.placing import LEAD_MM, PAD_MM, column, in_line, reach_mm

_LEAST_MM = 20.0
_CLEAR_MM = 3.0
_ASIDE_MM = 7.0
"""How far from the middle the movement and its shunt stand, side by side."""

_BAR_MM = 9.5
"""How far above and below the middle they are joined."""

Arms = tuple[Item, Item, Item, Item]
"""The items from the left corner over the top to the right, then from the right over the foot to the left."""


@dataclass(frozen=True, slots=True)
class Rectifying:
    """The block that ends a rectifier instrument: four arms, and the coil's part from top to foot.

    Args:
        arms: of the diamond; an item's start is where one going round clockwise comes from.
        inner: what is between top and foot, side by side: the movement last.
    """

    arms: Arms
    inner: tuple[Item, ...]

    @property
    def depth_mm(self) -> float:
        """Room for the lower half of the diamond, and the return below it."""
        return self._half_mm + 2 * LEAD_MM

    @property
    def _half_mm(self) -> float:
        """Half of the diamond's diagonal."""
        aside = _ASIDE_MM if len(self.inner) > 1 else 0.0
        wide = max(aside + reach_mm((item,)) + item.label.height_mm / 2 for item in self.inner)
        return max(_LEAST_MM, wide + _CLEAR_MM, aside + _BAR_MM + _CLEAR_MM)

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set the diamond with its left corner on the upper rail, its right one joined to the lower."""
        half = self._half_mm
        beside = max(label_reach_mm(item) for item in self.arms) - half / 2 + PAD_MM
        left = x + max(LEAD_MM, beside)
        middle, right = left + half, left + 2 * half
        back = right + max(2 * LEAD_MM, beside)
        pieces = (
            *diamond((middle, 0.0), half, self.arms),
            *_inside(middle, half, self.inner),
            Wire(((x, 0.0), (left, 0.0))),
            Wire(((right, 0.0), (back, 0.0), (back, -depth_mm), (x, -depth_mm))),
        )
        return pieces, back


def diamond(middle: Point, half: float, arms: Sequence[Item]) -> Pieces:
    """Return four arms about a middle, and the dots at the corners."""
    x, y = middle
    corners = (x - half, y), (x, y + half), (x + half, y), (x, y - half), (x - half, y)
    pieces: list[Piece] = [Joint(corner) for corner in corners[1:]]
    for item, (start, end) in zip(arms, pairwise(corners), strict=True):
        pieces += oblique(item, start, end, middle)
    return tuple(pieces)


def oblique(item: Item, start: Point, end: Point, away_from: Point) -> Pieces:
    """Return a part in the middle of a wire at 45°, its label at the outside."""
    middle, half = ((start[0] + end[0]) / 2, (start[1] + end[1]) / 2), item.extent.length_mm / 2
    length = math.dist(start, end)
    x, y = ((end[0] - start[0]) / length, (end[1] - start[1]) / length)
    near, far = ((middle[0] + side * x * half, middle[1] + side * y * half) for side in (-1, 1))
    out = math.copysign(1.0, middle[0] - away_from[0]), math.copysign(1.0, middle[1] - away_from[1])
    aside = _corner_mm(item)
    at = middle[0] + out[0] * aside, middle[1] + out[1] * aside
    return (
        Wire((start, near)),
        Sign(item.kind, *((far, near) if item.turned else (near, far)), item.part),
        Wire((far, end)),
        *stack(item.label.lines, at, (0.5 - out[0] / 2, 0.5 - out[1] / 2)),
    )


def label_reach_mm(item: Item) -> float:
    """Return how far the label of an oblique part reaches to the side of the part's middle."""
    return _corner_mm(item) + item.label.width_mm if item.label.lines else 0.0


def _corner_mm(item: Item) -> float:
    """Return how far level and upright from a part's middle the next corner of its label is."""
    return (item.extent.half_mm + GAP_MM) / math.sqrt(2) + 0.3


def _inside(x: float, half: float, inner: Sequence[Item]) -> Pieces:
    """Return one item from the top to the foot, or two side by side."""
    if len(inner) == 1:
        return column(x, half, -half, inner)
    first, second = inner
    left, right = x - _ASIDE_MM, x + _ASIDE_MM
    pieces: list[Piece] = [
        *column(left, _BAR_MM, -_BAR_MM, (first,), left=True),
        *column(right, _BAR_MM, -_BAR_MM, (second,)),
    ]
    for side in (1, -1):
        y = side * _BAR_MM
        pieces += (Wire(((left, y), (right, y))), Wire(((x, y), (x, side * half))), Joint((x, y)))
    return tuple(pieces)


def wheatstone(arms: Arms, movement: Item, supply: Item) -> Pieces:
    """Return a bridge with the movement from corner to corner, and its supply at the left."""
    lines_mm = movement.extent.half_mm + GAP_MM + movement.label.height_mm
    tallest = max(_corner_mm(item) + item.label.height_mm for item in arms)
    half = max(
        _LEAST_MM, lines_mm + movement.label.width_mm / 2 + _CLEAR_MM, 2 * (tallest + GAP_MM), _least_mm(arms)
    )
    left = min(-half, *(-half / 2 - label_reach_mm(item) for item in (arms[0], arms[3])))
    at_x = left - PAD_MM - reach_mm((supply,)) - PAD_MM
    return (
        *diamond((0.0, 0.0), half, arms),
        *in_line(movement, (-half, 0.0), half),
        *column(at_x, half, -half, (supply,)),
        Wire(((at_x, half), (0.0, half))),
        Wire(((at_x, -half), (0.0, -half))),
    )


def _least_mm(arms: Sequence[Item]) -> float:
    """Return the half diagonal at which every arm has wire at both its ends."""
    return max(item.extent.length_mm + 2 * LEAD_MM for item in arms) / math.sqrt(2)
