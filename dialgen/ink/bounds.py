"""Ink that leaves a figure, such as the plate."""

from __future__ import annotations

from collections.abc import Callable, Sequence

import numpy as np
from numpy.typing import NDArray

from dialgen.drawing import Point
from dialgen.ink.shapes import Shape
from dialgen.stage import Array

Holds = Callable[[Array, Array], NDArray[np.bool_]]
"""Whether a figure holds each of some points, given by their x and their y."""


def strays(shapes: Sequence[Shape], holds: Holds) -> list[tuple[int, Point]]:
    """Return the shapes that are not wholly within a figure, each with its first corner outside.

    Args:
        shapes: the areas; what is returned goes by their numbers, counted from 0.
        holds: the figure; it is asked about all corners at once.  Where it has no hollows, a shape
            with all its corners within lies within.
    """
    if not shapes:
        return []
    corners = np.concatenate([shape.corners for shape in shapes], axis=1)
    out = np.flatnonzero(np.logical_not(holds(corners[0], corners[1])))
    ends = np.cumsum([shape.ends[-1] for shape in shapes])
    found, first = np.unique(np.searchsorted(ends, out, side="right"), return_index=True)
    places = corners[:, out[first]].T.tolist()
    return [(number, (x, y)) for number, (x, y) in zip(found.tolist(), places, strict=True)]
