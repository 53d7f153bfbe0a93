"""Resistances that fall as they warm: Steinhart and Hart's equation, and beta's law within it.

1/T = a + b·ln R + c·(ln R)³ (J. S. Steinhart, S. R. Hart, Deep-Sea Research 15 (1968) 497).  With c = 0
it is beta's law, R = R25·exp(beta·(1/T - 1/T25)).
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.quantity import ZERO_CELSIUS_K
from dialgen.roots import bracketed_roots
from dialgen.stage import Array, Span

HOTTEST_C = 1000.0
_T25_K = ZERO_CELSIUS_K + 25.0
_PLACES = 129
_LOG_LIMIT = math.log(1e18)
"""Nothing is sought beyond 1e18 Ω, nor below 1e-18 Ω."""


@dataclass(frozen=True, slots=True)
class SteinhartHart:
    """The equation with T in kelvin and R in ohms."""

    a: float
    b: float
    c: float

    def reciprocal(self, logs: Array) -> Array:
        """Return 1/T at natural logarithms of the resistance."""
        return self.a + logs * (self.b + self.c * logs * logs)

    def falling(self) -> Span | None:
        """Return over which logarithms the resistance falls as it warms; None where it never does.

        Where the equation turns, the stretch between its turns or the one of high resistance is meant.
        """
        if self.b <= 0 and self.c <= 0:
            return None
        turn = math.sqrt(-self.b / self.c / 3.0) if self.b * self.c < 0 else math.inf
        low, high = (-turn, turn) if self.b > 0 else (turn if self.b else 0.0, math.inf)
        return max(low, -_LOG_LIMIT), min(high, _LOG_LIMIT)


def by_beta(r25_ohm: float, beta_k: float) -> SteinhartHart:
    """Return the equation that is beta's law through a resistance at 25 °C."""
    return SteinhartHart(1.0 / _T25_K - math.log(r25_ohm) / beta_k, 1.0 / beta_k, 0.0)


def through_points(kelvins: Sequence[float], ohms: Sequence[float]) -> SteinhartHart | None:
    """Return the equation through three points; None where none goes through them and falls between.

    Divided differences of 1/T over ln R: the cubic without its square is one straight line in them.

    Args:
        kelvins: three temperatures.
        ohms: the resistance at each.
    """
    (u1, u2, u3), (x1, x2, x3) = (1.0 / k for k in kelvins), (math.log(ohm) for ohm in ohms)
    try:
        first, second = (u2 - u1) / (x2 - x1), (u3 - u1) / (x3 - x1)
        c = (second - first) / (x3 - x2) / (x1 + x2 + x3)
    except ZeroDivisionError:
        return None
    b = first - c * (x1 * x1 + x1 * x2 + x2 * x2)
    made = SteinhartHart(u1 - x1 * (b + c * x1 * x1), b, c)
    falling = made.falling()
    fits = falling is not None and falling[0] <= min(x1, x2, x3) and max(x1, x2, x3) <= falling[1]
    return made if fits else None


@dataclass(frozen=True, slots=True, eq=False)
class FallingResistance:
    """The equation as a stage from °C to ohms, over ascending logarithms of the resistance."""

    equation: SteinhartHart
    logs: Array
    domain: Span

    @property
    def image(self) -> Span:
        """The resistance at the hot end and at the cold one."""
        cold_ohm, hot_ohm = self.forward(np.array(self.domain)).tolist()
        return hot_ohm, cold_ohm

    def forward(self, x: Array) -> Array:
        """Return ohms."""
        u = 1.0 / (np.asarray(x, dtype=float) + ZERO_CELSIUS_K)
        ends = self.equation.reciprocal(self.logs[[0, -1]])
        return np.exp(bracketed_roots(self.equation.reciprocal, self.logs, np.clip(u, *ends)))

    def inverse(self, y: Array) -> Array:
        """Return temperatures in °C."""
        return 1.0 / self.equation.reciprocal(np.log(y)) - ZERO_CELSIUS_K


def falling_resistance(equation: SteinhartHart) -> FallingResistance | None:
    """Return the equation as a stage as far as it falls, up to 1000 °C; None where it never does.

    It falls at no temperature where its coefficients are not positive, or are off by powers of ten.
    """
    falling = equation.falling()
    if falling is None:
        return None
    logs = np.linspace(*falling, _PLACES)
    hot, cold = equation.reciprocal(logs[[0, -1]]).tolist()
    least = 1.0 / (HOTTEST_C + ZERO_CELSIUS_K)
    if not least < cold < math.inf:
        return None
    hottest_c = HOTTEST_C if hot <= least else 1.0 / hot - ZERO_CELSIUS_K
    return FallingResistance(equation, logs, (1.0 / cold - ZERO_CELSIUS_K, hottest_c))
