"""Points along the ink of placed letters, for whoever must know how near something comes to it."""

from __future__ import annotations

import cmath
import math
from collections.abc import Iterator
from functools import lru_cache
from itertools import pairwise

import numpy as np
from numpy.typing import NDArray

from dialgen.drawing import Glyph, Letters
from dialgen.lettering.fonts import EM_CAPS

FARTHEST_CAPS = 0.03
"""How far along the edge any point of it may be from one of the points, in heights of a capital."""

_STEP_EMS = 2 * FARTHEST_CAPS / EM_CAPS

Array = NDArray[np.float64]


def ink_points(letters: Letters) -> Array:
    """Return points along the edge of the ink, in millimetres, as an array (n, 2).

    No point of the edge is farther along it than 0.03 heights of a capital from one of them.  For
    strokes the points lie on the centre line, and half the style's width is to be added.
    """
    placed = [
        points * cmath.rect(spot.size_mm, -math.radians(spot.angle_deg)) + complex(spot.x, spot.y)
        for spot in letters.glyphs
        if len(points := _points(spot.glyph))
    ]
    if not placed:
        return np.empty((0, 2))
    return np.concatenate(placed).view(np.float64).reshape(-1, 2)


@lru_cache(maxsize=4096)
def _points(glyph: Glyph) -> NDArray[np.complex128]:
    """Return points along a glyph's path in ems, x + iy; the array can only be read."""
    found = np.array(list(_along(glyph)), dtype=np.complex128)
    found.setflags(write=False)
    return found


def _along(glyph: Glyph) -> Iterator[complex]:
    home = here = 0j
    for kind, numbers in glyph.path:
        points = [complex(x, y) for x, y in zip(numbers[0::2], numbers[1::2], strict=True)]
        if kind == "M":
            home = here = points[0]
            yield here
        else:
            ends = points or [home]
            yield from _pieces([here, *ends])
            here = ends[-1]


def _pieces(points: list[complex]) -> Iterator[complex]:
    """Yield points along a straight line or a Bezier curve, without its start."""
    degree = len(points) - 1
    # Nowhere does a curve run faster than its degree times the longest side of its control polygon.
    fastest = degree * max(abs(b - a) for a, b in pairwise(points))
    count = math.ceil(fastest / _STEP_EMS)
    for index in range(1, count + 1):
        t = index / count
        level = points
        while len(level) > 1:
            level = [a + (b - a) * t for a, b in pairwise(level)]
        yield level[0]
