"""A real diode: Shockley's exponential with a resistance in series.

In a loop with R ohms (the diodes' own resistances counted in) a current i needs the voltage
e(i) = R·i + w·ln(1 + i/Is), with w = count·n·kT/q: explicit in the current, not in the voltage.  So the
averages over the sine are taken by parts, along the current instead of the angle: the mean of i over the
half cycle is 2/π times the integral of arccos(e(i)/E) di from nothing to the peak current, which is where
e(i) = E.  With i = Is·(exp u - 1) and u = U·(1 - s²) the integrand is smooth in s, and Gauss's rule of 64
nodes leaves no more than rounding, with no root to find but the peak's.

For the whole scale the mean over the peak current is the form of the current's pulse, 2/π where the
resistance rules (and where the diode is still one), less between.  It is interpolated by Chebyshev
polynomials in U, so that a value costs one root for U and one polynomial, and the way back is exact.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cache
from typing import TYPE_CHECKING

import numpy as np

from dialgen.circuit.rectifiers.conduction import Averages, Curve, Figure, settled
from dialgen.stage import Array

if TYPE_CHECKING:
    from numpy.polynomial import Chebyshev

THERMAL_V = 1.380649e-23 * 298.15 / 1.602176634e-19
"""kT/q at 25 °C, by the exact constants of the SI (2019)."""

_NODES = 64
_SMALLEST = 1e-200
_TRIM = 1e-16
# The form changes over a unit of U here and there, whatever the loop.
_DEGREE, _DEGREE_PER_U = 32, 4


@dataclass(frozen=True, slots=True)
class Exponential:
    """A junction by its saturation current, ideality and series resistance, at 25 °C."""

    saturation_a: float
    ideality: float
    resistance_ohm: float = 0.0

    @property
    def threshold_v(self) -> float:
        """Nothing: it conducts a little from the first millivolt."""
        return 0.0

    @property
    def figures(self) -> tuple[Figure, ...]:
        """Saturation current, ideality and series resistance."""
        return (
            ("diode saturation current", self.saturation_a, "A"),
            ("diode ideality", self.ideality, ""),
            ("diode resistance", self.resistance_ohm, "Ω"),
        )

    def drop_v(self, current_a: float) -> float:
        """Return n·kT/q·ln(1 + i/Is) + i·r."""
        volts = self.ideality * THERMAL_V * math.log1p(current_a / self.saturation_a)
        return volts + current_a * self.resistance_ohm

    def averages(self, peak_v: Array, ohms: Array, count: int) -> Averages:
        """Return the averages by quadrature along the current."""
        loop = self._loop(ohms, count)
        return loop.averages(loop.exponent(peak_v))

    def curve(self, ohms: float, count: int, most_v: float) -> Curve:
        """Return the interpolated curve."""
        loop = self._loop(np.asarray(ohms, dtype=float), count)
        return _interpolated(loop, float(loop.exponent(np.asarray(most_v, dtype=float))))

    def _loop(self, ohms: Array, count: int) -> _Loop:
        return _Loop(ohms + count * self.resistance_ohm, count * self.ideality * THERMAL_V, self.saturation_a)


@dataclass(frozen=True, slots=True, eq=False)
class _Loop:
    """The loop, by the exponent U of its peak current Is·(exp U - 1)."""

    ohms: Array
    scale_v: float
    saturation_a: float

    def voltage(self, u: Array) -> Array:
        """Return the voltage that drives the current of exponent ``u``."""
        return self.ohms * self.saturation_a * np.expm1(u) + self.scale_v * u

    def exponent(self, peak_v: Array) -> Array:
        """Return the exponent of the current at the sine's peak.

        Either part of the voltage alone bounds it from above, and the voltage is convex in it, so that
        Newton's method comes down to it from there.
        """
        start = np.minimum(peak_v / self.scale_v, np.log1p(peak_v / (self.ohms * self.saturation_a)))
        first = self.ohms * self.saturation_a
        return settled(lambda u: u - (self.voltage(u) - peak_v) / (first * np.exp(u) + self.scale_v), start)

    def averages(self, top: Array) -> Averages:
        """Return the averages for the exponents ``top`` at the peak."""
        u, weighted, ohms = self._weighted(top)
        current_a = self.saturation_a * np.expm1(u)
        peak_a = self.saturation_a * np.expm1(top)
        # By parts, the mean of g(i) is the integral of arccos·g'(i); for g = e·i:
        slope = 2 * ohms * current_a + self.scale_v * (u - np.expm1(-u))
        return Averages(
            peak_a,
            peak_a * weighted.sum(-1),
            peak_a * (2 * current_a * weighted).sum(-1),
            peak_a * (slope * weighted).sum(-1),
        )

    def form(self, top: Array) -> Array:
        """Return the mean current over the peak current."""
        return np.asarray(self._weighted(top)[1].sum(-1))

    def _weighted(self, top: Array) -> tuple[Array, Array, Array]:
        """Return exponents along the pulse, and the weights of means over it divided by the peak current."""
        s, weights = _gauss()
        ohms = np.asarray(self.ohms)[..., None]
        whole = np.maximum(np.asarray(top)[..., None], _SMALLEST)
        below = whole * s**2
        u = whole - below
        first = ohms * self.saturation_a
        # Of 1 - e/E, without the cancellation at the peak; arccos(1 - x) = 2·arcsin(√(x/2)).
        short = first * np.exp(u) * np.expm1(below) + self.scale_v * below
        angle = 2 * np.arcsin(np.sqrt(short / (first * np.expm1(whole) + self.scale_v * whole) / 2))
        weighted = 2 / math.pi * angle * np.exp(u) / np.expm1(whole) * 2 * whole * s * weights
        return u, weighted, ohms


@dataclass(frozen=True, slots=True, eq=False)
class _Interpolated:
    loop: _Loop
    form: Chebyshev
    slope: Chebyshev
    most: float

    def mean_a(self, peak_v: Array) -> Array:
        u = self.loop.exponent(peak_v)
        return np.asarray(self.loop.saturation_a * np.expm1(u) * self.form(u))

    def peak_v(self, mean_a: Array) -> Array:
        relative = mean_a / self.loop.saturation_a

        def step(u: Array) -> Array:
            # Newton's method for u = ln(1 + relative/form(u)), whose right side hardly moves with u.
            form = self.form(u)
            turn = self.slope(u) / form * relative / (form + relative)
            return np.clip(u - (u - np.log1p(relative / form)) / (1.0 + turn), 0.0, self.most)

        return self.loop.voltage(settled(step, np.log1p(math.pi / 2 * relative)))


def _interpolated(loop: _Loop, most: float) -> _Interpolated:
    from numpy.polynomial import Chebyshev

    degree = math.ceil(_DEGREE + _DEGREE_PER_U * most)
    form = Chebyshev.interpolate(loop.form, degree, domain=[0.0, most]).trim(_TRIM)
    return _Interpolated(loop, form, form.deriv(), most)


@cache
def _gauss() -> tuple[Array, Array]:
    """Return the nodes and weights of Gauss's rule from 0 to 1."""
    from numpy.polynomial.legendre import leggauss

    nodes, weights = leggauss(_NODES)
    return (nodes + 1) / 2, weights / 2
