"""What a sine drives through rectifying junctions and a resistance in series, averaged over a half cycle.

Every connection of a rectifier instrument comes down to this one loop (see `connections`): while a sine
of some peak is positive it drives a current through ``ohms`` and ``count`` junctions.  A moving coil
follows the mean of that current, heat its square.  A `Junction` says what a diode does in the loop;
here are the two that have closed forms, the real one is in `junction`.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import NamedTuple, Protocol

import numpy as np

from dialgen.stage import Array

_STEPS = 60
_ROUNDING = 4 * float(np.finfo(float).eps)

Figure = tuple[str, float, str]
"""A diode's property: its name, value and unit."""


class Averages(NamedTuple):
    """A loop's current over one whole half cycle of the sine, whatever part of it conducts.

    ``peak_a`` is its peak, ``mean_a`` its mean, ``square_a2`` the mean of its square, and ``power_w`` the
    mean of the driving voltage times it.
    """

    peak_a: Array
    mean_a: Array
    square_a2: Array
    power_w: Array


class Curve(Protocol):
    """The mean current of one loop by the peak of the sine, and back; for arrays of any shape."""

    def mean_a(self, peak_v: Array) -> Array:
        """Return the mean current over a half cycle."""
        ...

    def peak_v(self, mean_a: Array) -> Array:
        """Return the least peak that drives this mean current."""
        ...


class Junction(Protocol):
    """What a conducting diode does."""

    @property
    def threshold_v(self) -> float:
        """The voltage below which it passes nothing at all."""
        ...

    @property
    def figures(self) -> tuple[Figure, ...]:
        """What it is described by."""
        ...

    def drop_v(self, current_a: float) -> float:
        """Return the voltage across it."""
        ...

    def averages(self, peak_v: Array, ohms: Array, count: int) -> Averages:
        """Return the averages of the loop, for peaks and resistances of one shape."""
        ...

    def curve(self, ohms: float, count: int, most_v: float) -> Curve:
        """Return the loop's curve for peaks up to ``most_v``."""
        ...


def settled(step: Callable[[Array], Array], start: Array) -> Array:
    """Repeat a step from every start until it moves by rounding only.

    What has settled stays, so that a result does not depend on its neighbours in the array.
    """
    at, moving = start, np.ones(np.shape(start), dtype=bool)
    for _ in range(_STEPS):
        following = step(at)
        moves = np.abs(following - at) > _ROUNDING * np.abs(at)
        at = np.where(moving, following, at)
        moving &= moves
        if not moving.any():
            break
    return at


@dataclass(frozen=True, slots=True)
class Ideal:
    """A diode that drops nothing."""

    @property
    def threshold_v(self) -> float:
        """Nothing."""
        return 0.0

    @property
    def figures(self) -> tuple[Figure, ...]:
        """There are none."""
        return ()

    def drop_v(self, current_a: float) -> float:
        """Return nothing."""
        return 0.0

    def averages(self, peak_v: Array, ohms: Array, count: int) -> Averages:
        """Return those of half a sine: 2/π and 1/√2 of the peak."""
        peak_a = peak_v / ohms
        return Averages(peak_a, 2 / math.pi * peak_a, peak_a**2 / 2, peak_v * peak_a / 2)

    def curve(self, ohms: float, count: int, most_v: float) -> Curve:
        """Return the straight line through nothing."""
        return _Line(2 / math.pi / ohms)


@dataclass(frozen=True, slots=True)
class Threshold:
    """A diode that conducts above its drop, and drops just that.

    With D the drop of all junctions, s = √(E² - D²) and φ = arctan(s/D) the angle from the sine's peak E
    to where it conducts, the averages are integrals of powers of (E cos ψ - D)/R over -φ < ψ < φ.
    """

    drop: float

    @property
    def threshold_v(self) -> float:
        """The drop."""
        return self.drop

    @property
    def figures(self) -> tuple[Figure, ...]:
        """The drop."""
        return (("diode drop", self.drop, "V"),)

    def drop_v(self, current_a: float) -> float:
        """Return the drop, also where hardly anything flows."""
        return self.drop

    def averages(self, peak_v: Array, ohms: Array, count: int) -> Averages:
        """Return the averages in closed form; nothing flows from peaks below the drops."""
        drop_v = count * self.drop
        peak_v = np.maximum(peak_v, drop_v)
        s = np.sqrt((peak_v - drop_v) * (peak_v + drop_v))
        phi = np.arctan2(s, drop_v)
        area = s - drop_v * phi
        square = (peak_v**2 / 2 + drop_v**2) * phi - 1.5 * drop_v * s
        product = (peak_v**2 * phi - drop_v * s) / 2
        return Averages(
            (peak_v - drop_v) / ohms,
            2 / math.pi * area / ohms,
            # Where it barely conducts, rounding must not leave less than nothing.
            np.maximum(2 / math.pi * square / ohms**2, 0.0),
            np.maximum(2 / math.pi * product / ohms, 0.0),
        )

    def curve(self, ohms: float, count: int, most_v: float) -> Curve:
        """Return the closed form, and its inverse by Newton's method."""
        return _Above(count * self.drop, 2 / math.pi / ohms)


@dataclass(frozen=True, slots=True)
class _Line:
    slope: float

    def mean_a(self, peak_v: Array) -> Array:
        return peak_v * self.slope

    def peak_v(self, mean_a: Array) -> Array:
        return mean_a / self.slope


@dataclass(frozen=True, slots=True)
class _Above:
    """slope·D·(t - arctan t) with t = √((E/D)² - 1) above the drop D, nothing below."""

    drop_v: float
    slope: float

    def mean_a(self, peak_v: Array) -> Array:
        ratio = np.maximum(peak_v / self.drop_v, 1.0)
        t = np.sqrt((ratio - 1.0) * (ratio + 1.0))
        return self.slope * self.drop_v * (t - np.arctan(t))

    def peak_v(self, mean_a: Array) -> Array:
        wanted = mean_a / (self.slope * self.drop_v)
        resting = wanted <= 0
        wanted = np.where(resting, 1.0, wanted)
        # Both starts lie below the root; t - arctan t is convex, so that from the first step on
        # Newton's method comes down to it.
        start = np.maximum(np.cbrt(3.0 * wanted), wanted)
        t = settled(lambda t: t - (t - np.arctan(t) - wanted) * (1.0 + 1.0 / t**2), start)
        return np.where(resting, 0.0, self.drop_v * np.hypot(1.0, t))
