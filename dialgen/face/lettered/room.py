"""The free area of a plate: whether a box may lie somewhere, and where it lies best."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property

import numpy as np

from dialgen.drawing import Point
from dialgen.face.lettered.cover import Box, Cover
from dialgen.face.lettered.raster import Field, Raster, rasterised
from dialgen.stage import Array

_STEP_CELLS = 2


@dataclass(frozen=True, slots=True)
class Wish:
    """A place that a box would like to have its middle at.

    Args:
        at: the place, mm.
        toll: how much worse than the best place it is, in millimetres astray.
        across, up: what a millimetre beside it and one above or below it costs.
    """

    at: Point
    toll: float = 0.0
    across: float = 1.0
    up: float = 1.0


@dataclass(frozen=True, slots=True)
class Found:
    """A place for the middle of a box, and what it costs, in millimetres astray."""

    at: Point
    cost: float


@dataclass(frozen=True, eq=False)
class Room:
    """What is free: whatever lies in all fields, not too near their edges, and is not covered.

    One place is looked at as it is.  To search for the best one the plate is laid out as a raster,
    which may call taken what is only nearly so, and never calls free what is not.

    Args:
        fields: the areas.
        cover: what is covered.
        margin_mm: how near to the edges of the fields nothing is free.
        before: the room that this is without a box, and that box; None where it is nobody's rest.
    """

    fields: tuple[Field, ...]
    cover: Cover
    margin_mm: float
    before: tuple[Room, Box] | None = None

    @cached_property
    def raster(self) -> Raster:
        """The raster, laid out on first use, and only once for all that is left of one room."""
        if self.before is None:
            return rasterised(self.fields, self.cover, self.margin_mm)
        room, box = self.before
        return room.raster.with_box(box)

    def free(self, at: Point, width_mm: float, height_mm: float) -> bool:
        """Return whether a box about its middle is free."""
        (x, y), across, up, margin_mm = at, width_mm / 2, height_mm / 2, self.margin_mm
        xs = np.array([x - across - margin_mm, x + across + margin_mm]).repeat(2)
        ys = np.array([y - up - margin_mm, y + up + margin_mm] * 2)
        inside = all(field.holds(xs, ys).all() for field in self.fields)
        return inside and not self.cover.meets((x - across, y - up, x + across, y + up))

    def with_box(self, box: Box) -> Room:
        """Return the room without a box."""
        return Room(self.fields, self.cover.with_box(box), self.margin_mm, (self, box))

    def best(
        self,
        width_mm: float,
        height_mm: float,
        wishes: Sequence[Wish],
        air_mm: float = 0.0,
        crowd: float = 0.0,
        reach_mm: float | None = None,
    ) -> Found | None:
        """Return the place for a box that costs least, None where there is none.

        Args:
            width_mm: of the box.
            height_mm: likewise.
            wishes: where it would like to be; a place costs what the cheapest of them says.
            air_mm: width of the margin that it likes to have free.
            crowd: what is added where all of that margin is taken, and in proportion where some is.
            reach_mm: how far outside of the box about all wishes is looked; None looks everywhere.
        """
        x = self._places(0, [wish.at[0] for wish in wishes], reach_mm)
        y = self._places(1, [wish.at[1] for wish in wishes], reach_mm)
        raster = self.raster
        free = raster.count(x, y, width_mm, height_mm) == 0
        if not free.any():
            return None
        cost = _tolls(x, y, wishes)
        if crowd and air_mm:
            wide, high = width_mm + 2 * air_mm, height_mm + 2 * air_mm
            margin_cells = 2 * air_mm * (wide + height_mm) / raster.cell_mm**2
            cost += raster.count(x, y, wide, high) * (crowd / margin_cells)
        cost[~free] = np.inf
        row, column = np.unravel_index(int(cost.argmin()), cost.shape)
        return Found((float(x[column]), float(y[row])), float(cost[row, column]))

    def _places(self, axis: int, wished: Sequence[float], reach_mm: float | None) -> Array:
        """Return the places along an axis that are tried: every other cell, and those wished for."""
        raster = self.raster
        start = (raster.left, raster.bottom)[axis]
        low, high = start, start + raster.taken.shape[1 - axis] * raster.cell_mm
        if reach_mm is not None:
            low, high = max(low, min(wished) - reach_mm), min(high, max(wished) + reach_mm)
        step = _STEP_CELLS * raster.cell_mm
        even = start + step * np.arange(
            math.ceil((low - start) / step), math.floor((high - start) / step) + 1
        )
        return np.concatenate([[place for place in wished if low < place < high], even])


def _tolls(x: Array, y: Array, wishes: Sequence[Wish]) -> Array:
    """Return what the cheapest wish costs at every x (columns) and y (rows)."""
    costs = [
        (wish.across * np.abs(x - wish.at[0]))[None, :]
        + (wish.toll + wish.up * np.abs(y - wish.at[1]))[:, None]
        for wish in wishes
    ]
    least = costs[0]
    for cost in costs[1:]:
        np.minimum(least, cost, out=least)
    return least
