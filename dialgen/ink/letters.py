"""Inked letters: each glyph's contours are made once in ems, and set down where the letter stands."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import lru_cache
from itertools import accumulate

import numpy as np

from dialgen.drawing import Cap, Glyph, Letters, Placed, Point
from dialgen.ink.rounds import disc
from dialgen.ink.strokes import Corner, ribbon, signed_area, without_repeats
from dialgen.renderers.curves import chorded, flattened, is_closed
from dialgen.stage import Array

_SAGITTA_MM = 0.004
_COARSEST_EMS = 0.001


@dataclass(frozen=True, slots=True, eq=False)
class _Cut:
    """A glyph's corners in ems as rows (2, n), one contour after the other, and where each ends."""

    corners: Array
    ends: tuple[int, ...]


def letters_ink(letters: Letters) -> tuple[Array, tuple[int, ...]]:
    """Return the corners of the letters' contours where they stand, (2, n), and where each ends.

    Nothing ends where there is no ink.
    """
    inked = [(placed, cut) for placed in letters.glyphs if (cut := _cut_of(placed, letters)).ends]
    if not inked:
        return _NOTHING.corners, _NOTHING.ends
    ems = np.concatenate([cut.corners for _, cut in inked], axis=1)
    stands = np.array([_stand(placed) for placed, _ in inked]).T
    x, y, along, across = np.repeat(stands, [cut.ends[-1] for _, cut in inked], axis=1)
    corners = np.empty_like(ems)
    corners[0] = along * ems[0] + across * ems[1] + x
    corners[1] = along * ems[1] - across * ems[0] + y
    before = accumulate((cut.ends[-1] for _, cut in inked), initial=0)
    ends = [first + end for first, (_, cut) in zip(before, inked, strict=False) for end in cut.ends]
    return corners, tuple(ends)


def _stand(placed: Placed) -> tuple[float, float, float, float]:
    """Return where a glyph stands, and how far its em reaches along x and against y."""
    turn = math.radians(placed.angle_deg)
    return placed.x, placed.y, placed.size_mm * math.cos(turn), placed.size_mm * math.sin(turn)


def _cut_of(placed: Placed, letters: Letters) -> _Cut:
    style, sagitta = letters.style, _sagitta_ems(placed.size_mm)
    if not placed.glyph.stroked:
        return _NOTHING if style.fill is None else _filled(placed.glyph, sagitta)
    if style.stroke is None or style.width_mm <= 0:
        return _NOTHING
    return _stroked(placed.glyph, style.width_mm / 2 / placed.size_mm, style.cap, sagitta)


def _sagitta_ems(size_mm: float) -> float:
    """Return how far a chord may leave its curve; in halves, so that few sizes make a cut each."""
    return _COARSEST_EMS * 0.5 ** max(0, math.ceil(math.log2(_COARSEST_EMS * size_mm / _SAGITTA_MM)))


@lru_cache(maxsize=4096)
def _filled(glyph: Glyph, sagitta: float) -> _Cut:
    contours = [np.array(contour) for contour in flattened(glyph.path, sagitta)]
    # The outer contours of TrueType go clockwise, those of PostScript the other way.
    if sum(signed_area(contour) for contour in contours) < 0:
        contours = [contour[::-1] for contour in contours]
    return _cut(contours)


@lru_cache(maxsize=4096)
def _stroked(glyph: Glyph, half: float, cap: Cap, sagitta: float) -> _Cut:
    strokes = chorded(glyph.path, sagitta)
    return _cut([contour for stroke in strokes for contour in _stroke(stroke, half, cap)])


def _stroke(stroke: list[Point], half: float, cap: Cap) -> list[Array]:
    """Return the contours of one stroke; its corners are round, and one of no length is a dot."""
    closed = is_closed(stroke)
    corners = without_repeats(np.array(stroke), closed=closed)
    if len(corners) > 1:
        return ribbon(corners, half, closed=closed, corner=Corner.ROUND, cap=cap)
    return [disc(stroke[0], half)] if cap is Cap.ROUND else []


def _cut(contours: list[Array]) -> _Cut:
    if not contours:
        return _NOTHING
    rows = np.ascontiguousarray(np.concatenate(contours).T)
    return _Cut(rows, tuple(accumulate(len(contour) for contour in contours)))


_NOTHING = _Cut(np.empty((2, 0)), ())
