"""Monotone interpolation through given points, and its exact inverse.

The interpolant is the piecewise cubic of Fritsch and Carlson (SIAM J. Numer. Anal. 17 (1980) 238)
with the slopes of Fritsch and Butland (SIAM J. Sci. Stat. Comput. 5 (1984) 300): inside, the
weighted harmonic mean of the neighbouring chords; at the ends, the shape-preserving three-point
formula.  It never overshoots, so points that move one way give a curve that moves one way.  The
same slopes are used by scipy's PchipInterpolator, which referees it in the tests.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise

import numpy as np
from numpy.typing import NDArray

from dialgen.errors import InputError
from dialgen.stage import Array, Span

_NEWTON_STEPS = 64
_NEAR = 4 * np.finfo(float).eps
_FEW_KNOTS = 40
_FEW_PLACES = 1000


@dataclass(frozen=True, slots=True, eq=False)
class Monotone:
    """A piecewise cubic through knots, going on straight beyond the first and the last.

    Piece i holds from ``knots[i - 1]`` to ``knots[i]``; pieces 0 and n are the straight ends.
    A piece is ((c3·d + c2)·d + c1)·d + c0 in the distance d from its own origin.
    """

    knots: Array
    values: Array
    origins: Array
    coefficients: Array
    domain: Span
    image: Span

    def forward(self, x: Array) -> Array:
        """Return the curve at ``x``."""
        x = np.asarray(x, dtype=float)
        piece = _piece(self.knots, x)
        distance = x - self.origins.take(piece, mode="clip")
        c0, c1, c2, c3 = (c.take(piece, mode="clip") for c in self.coefficients)
        return np.asarray(((c3 * distance + c2) * distance + c1) * distance + c0)

    def inverse(self, y: Array) -> Array:
        """Return the place at which the curve is ``y``, to the rounding of ``y``."""
        y = np.asarray(y, dtype=float)
        sign = 1.0 if self.values[-1] > self.values[0] else -1.0
        piece = _piece(sign * self.values, sign * y)
        c0, c1, c2, c3 = (c.take(piece) for c in self.coefficients)
        wanted = y - c0
        last = len(self.knots)
        straight = (piece == 0) | (piece == last)
        low = np.zeros_like(wanted)
        steps = np.diff(self.knots)
        high = np.concatenate(([0.0], steps, [0.0])).take(piece)
        with np.errstate(divide="ignore", invalid="ignore"):
            distance = np.where(straight & (wanted != 0), wanted / c1, 0.0)
        curved = ~straight
        if curved.any():
            distance[curved] = _solve(
                (c1[curved], c2[curved], c3[curved]), wanted[curved], low[curved], high[curved], sign
            )
        return np.asarray(self.origins.take(piece) + distance)


def _piece(knots: Array, x: Array) -> NDArray[np.intp]:
    """Return how many knots lie at or below each ``x``."""
    if len(knots) > _FEW_KNOTS or x.size < _FEW_PLACES:
        return np.searchsorted(knots, x, side="right")
    # A few knots are counted faster than they are searched, a byte for each place.
    count = np.zeros(x.shape, dtype=np.int8)
    for knot in knots:
        count += (x >= knot).view(np.int8)
    return count.astype(np.intp)


@np.errstate(over="ignore", invalid="ignore", divide="ignore")  # such points are refused below
def through(x: Sequence[float], y: Sequence[float], *, ends: float | None = None) -> Monotone:
    """Return the monotone curve through the points (x[i], y[i]).

    Args:
        x: strictly ascending places, at least one.
        y: values that move strictly one way, as many; a single point needs ``ends``.
        ends: the slope beyond the first and the last point; None goes on along the end slopes.

    Raises:
        InputError: fewer than two points without ``ends``, places that do not ascend, or values
            that do not move strictly one way.  The message names the first culprit.
    """
    places, values = np.array(x, dtype=float), np.array(y, dtype=float)
    if len(places) < 2 and ends is None:
        raise InputError("one point gives no curve; give at least two points")
    _check_ascending(places)
    _check_one_way(values)
    slopes = pchip_slopes(places, values) if len(places) > 1 else np.array([ends or 0.0])
    widths = np.diff(places)
    chords = np.diff(values) / widths
    c2 = (3 * chords - 2 * slopes[:-1] - slopes[1:]) / widths
    c3 = (slopes[:-1] + slopes[1:] - 2 * chords) / widths**2
    first, last = (float(slopes[0]), float(slopes[-1])) if ends is None else (ends, ends)
    coefficients = np.array(
        [
            np.concatenate((values[:1], values)),
            np.concatenate(([first], slopes[:-1], [last])),
            np.concatenate(([0.0], c2, [0.0])),
            np.concatenate(([0.0], c3, [0.0])),
        ]
    )
    if not np.isfinite(coefficients).all():
        raise InputError("the points are too steep or too far apart for a curve; check their size")
    origins = np.concatenate((places[:1], places))
    domain = (-math.inf if first else float(places[0]), math.inf if last else float(places[-1]))
    reach = [-math.inf if first else float(values[0]), math.inf if last else float(values[-1])]
    if values[-1] < values[0] or (len(values) == 1 and (ends or 0) < 0):
        reach = [-math.inf if last else float(values[-1]), math.inf if first else float(values[0])]
    return Monotone(places, values, origins, coefficients, domain, (reach[0], reach[1]))


def pchip_slopes(x: Array, y: Array) -> Array:
    """Return the slope at each of two or more points (Fritsch and Butland 1984; see the module)."""
    widths = np.diff(x)
    chords = np.diff(y) / widths
    if len(chords) == 1:
        return np.array([chords[0], chords[0]])
    before, after = 2 * widths[1:] + widths[:-1], widths[1:] + 2 * widths[:-1]
    inside = (before + after) / (before / chords[:-1] + after / chords[1:])
    first = _end_slope(widths[0], widths[1], chords[0], chords[1])
    last = _end_slope(widths[-1], widths[-2], chords[-1], chords[-2])
    return np.concatenate(([first], inside, [last]))


def _end_slope(near_width: float, far_width: float, near: float, far: float) -> float:
    # Three-point end formula, kept to the shape: never against the first chord.  The chords have
    # one sign here, so the other special case of the usual routine cannot arise.
    slope = ((2 * near_width + far_width) * near - near_width * far) / (near_width + far_width)
    return float(slope) if slope * near > 0 else 0.0


def _solve(cubic: tuple[Array, Array, Array], wanted: Array, low: Array, high: Array, sign: float) -> Array:
    """Return d in [low, high] where the rising (times sign) cubic reaches ``wanted``.

    Newton's step is taken where it stays inside the bracket and bisection elsewhere, so a flat
    spot can slow it down but not mislead it.
    """
    c1, c2, c3 = cubic
    tolerance = _NEAR * high
    rise = ((c3 * high + c2) * high + c1) * high
    place = np.clip(high * wanted / rise, low, high)
    # What has settled stays, so that a place does not depend on its neighbours in the array.
    settled = np.zeros(np.shape(place), dtype=bool)
    for _ in range(_NEWTON_STEPS):
        miss = ((c3 * place + c2) * place + c1) * place - wanted
        below = miss * sign < 0
        low, high = np.where(below, place, low), np.where(below, high, place)
        slope = (3 * c3 * place + 2 * c2) * place + c1
        with np.errstate(divide="ignore", invalid="ignore"):
            step = place - miss / slope
        inside = (step > low) & (step < high)
        fresh = np.where(miss == 0, place, np.where(inside, step, (low + high) / 2))
        near = np.abs(fresh - place) <= tolerance
        place = np.where(settled, place, fresh)
        settled |= near
        if settled.all():
            break
    return np.asarray(place)


def _check_ascending(places: Array) -> None:
    for before, after in pairwise(places):
        if not after > before:
            raise InputError(f"{after:g} follows {before:g}; the points must stand in ascending order")


def _check_one_way(values: Array) -> None:
    steps = np.diff(values)
    turned = np.flatnonzero(np.sign(steps) != np.sign(steps[0])) if len(steps) else np.array([], dtype=int)
    if len(steps) and (steps[0] == 0 or len(turned)):
        at = int(turned[0]) if len(turned) and steps[0] != 0 else 0
        raise InputError(
            f"the values turn at {values[at]:g}, {values[at + 1]:g}; they must move strictly one way"
        )
