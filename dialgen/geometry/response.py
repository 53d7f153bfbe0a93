"""How the movement's torque answers: from drive (1 = full-deflection current) to deflection."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.errors import InputError
from dialgen.geometry.monotone import Monotone, through
from dialgen.stage import POSITIVE, Affine, Array, Span, Stage

EVEN: Stage = Affine(1.0)
"""The response of a good moving coil in an even field: deflection equals drive."""


@dataclass(frozen=True, slots=True)
class Power:
    """deflection = drive^exponent; 2 is the ideal moving iron, with no sense of direction."""

    exponent: float
    domain: Span = POSITIVE
    image: Span = POSITIVE

    def forward(self, x: Array) -> Array:
        """Return the deflection for drives of at least 0."""
        return np.power(x, self.exponent)

    def inverse(self, y: Array) -> Array:
        """Return the drive for deflections of at least 0."""
        return np.power(y, 1.0 / self.exponent)


@dataclass(frozen=True, slots=True)
class Mirrored:
    """A response known for drives from 0 up, and the same the other way below."""

    half: Monotone
    at_zero: float
    domain: Span
    image: Span

    def forward(self, x: Array) -> Array:
        """Return the deflection; below 0 the mirror image about the resting point."""
        if x.size and x.min() >= 0:
            return self.half.forward(x)
        return self.at_zero + np.sign(x) * (self.half.forward(np.abs(x)) - self.at_zero)

    def inverse(self, y: Array) -> Array:
        """Return the drive."""
        beyond = y - self.at_zero
        return np.sign(beyond) * self.half.inverse(self.at_zero + np.abs(beyond))


def from_points(points: Sequence[tuple[float, float]]) -> Stage:
    """Return the response through (drive, deflection) points.

    Where no point has a negative drive, negative drives mirror the positive ones.

    Raises:
        InputError: fewer than two points, drives that do not ascend, or deflections that do not
            strictly rise.
    """
    drives, deflections = zip(*points, strict=True)
    curve = through(drives, deflections)
    if deflections[-1] < deflections[0]:
        raise InputError(
            "the deflections fall as the drive rises; swap rest and full of the movement instead"
        )
    if drives[0] < 0:
        return curve
    if curve.domain[0] > 0.0:
        raise InputError("the first points give no slope to go on by down to drive 0; add the point [0, 0]")
    at_zero = float(curve.forward(np.array(0.0)))
    reach, top = curve.domain[1], curve.image[1]
    mirrored_top = 2 * at_zero - top if math.isfinite(top) else -math.inf
    return Mirrored(curve, at_zero, (-reach, reach), (mirrored_top, top))
