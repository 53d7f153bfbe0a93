"""The plate's outline, and what lies on it."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Protocol

import numpy as np
from numpy.typing import ArrayLike, NDArray

from dialgen.dialfile.models import Plate
from dialgen.drawing import Circle, Outline, Point, Style, Vertex

_SLACK_MM = 1e-9


class Outliner(Protocol):
    """A plate's outline; coordinates from the pivot."""

    @property
    def box(self) -> tuple[float, float, float, float]:
        """Left, bottom, width and height in millimetres."""
        ...

    def holds(self, x: ArrayLike, y: ArrayLike) -> NDArray[np.bool_]:
        """Return whether each point lies on the plate."""
        ...

    def outline(self, style: Style) -> Outline | Circle:
        """Return the outline as a primitive."""
        ...


@dataclass(frozen=True, slots=True)
class Rectangle:
    """A rectangular plate with rounded corners."""

    box: tuple[float, float, float, float]
    corner_mm: float

    def holds(self, x: ArrayLike, y: ArrayLike) -> NDArray[np.bool_]:
        """Return whether each point is inside, corners rounded off."""
        left, bottom, width, height = self.box
        across = np.abs(np.subtract(x, left + width / 2)) - width / 2 + self.corner_mm
        upward = np.abs(np.subtract(y, bottom + height / 2)) - height / 2 + self.corner_mm
        # Distance from the rectangle shrunk by the corner radius, outside positive.
        outside = np.hypot(np.maximum(across, 0.0), np.maximum(upward, 0.0))
        outside = outside + np.minimum(np.maximum(across, upward), 0.0)
        return np.asarray(outside <= self.corner_mm + _SLACK_MM)

    def outline(self, style: Style) -> Outline:
        """Return the rectangle, clockwise from the lower left corner upwards."""
        return rounded_rectangle(self.box, self.corner_mm, style)


@dataclass(frozen=True, slots=True)
class Disc:
    """A round plate."""

    centre: Point
    radius_mm: float

    @property
    def box(self) -> tuple[float, float, float, float]:
        """The bounding square."""
        side = 2 * self.radius_mm
        return self.centre[0] - self.radius_mm, self.centre[1] - self.radius_mm, side, side

    def holds(self, x: ArrayLike, y: ArrayLike) -> NDArray[np.bool_]:
        """Return whether each point is within the circle."""
        distance = np.hypot(np.subtract(x, self.centre[0]), np.subtract(y, self.centre[1]))
        return np.asarray(distance <= self.radius_mm + _SLACK_MM)

    def outline(self, style: Style) -> Circle:
        """Return the circle."""
        return Circle(self.centre, self.radius_mm, style)


def outliner(plate: Plate) -> Outliner:
    """Return the outline that a plate's table describes."""
    x, y = plate.pivot
    if plate.size is not None:
        return Rectangle((-x, -y, *plate.size), plate.corner)
    radius_mm = (plate.diameter or 0.0) / 2
    return Disc((radius_mm - x, radius_mm - y), radius_mm)


def rounded_rectangle(box: tuple[float, float, float, float], corner_mm: float, style: Style) -> Outline:
    """Return a rectangle with rounded corners, clockwise."""
    left, bottom, width, height = box
    right, top, c = left + width, bottom + height, corner_mm
    if c == 0:
        corners = ((left, bottom), (left, top), (right, top), (right, bottom))
        return Outline(tuple(Vertex(x, y) for x, y in corners), style)
    vertices = (
        Vertex(left, bottom + c), Vertex(left, top - c, 90.0),
        Vertex(left + c, top), Vertex(right - c, top, 90.0),
        Vertex(right, top - c), Vertex(right, bottom + c, 90.0),
        Vertex(right - c, bottom), Vertex(left + c, bottom, 90.0),
    )  # fmt: skip
    # Where the corners meet there is no straight edge between them.
    return Outline(tuple(_distinct(vertices)), style)


def _distinct(vertices: tuple[Vertex, ...]) -> Iterator[Vertex]:
    following = vertices[1:] + vertices[:1]
    for here, there in zip(vertices, following, strict=True):
        if here.turn_deg or math.dist((here.x, here.y), (there.x, there.y)) > 1e-9:
            yield here
