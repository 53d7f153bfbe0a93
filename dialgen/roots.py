"""Roots of a monotone function on whole arrays, each kept between two places that bracket it."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]

_STEPS = 120


def bracketed_roots(function: Callable[[Array], Array], places: Array, wanted: Array) -> Array:
    """Return where ``function`` takes each wanted value; NaN where the places do not bracket it.

    Args:
        function: continuous and strictly monotone over the places.
        places: ascending places that bracket the wanted values between them.
        wanted: values of the function, any shape.

    Each root is narrowed by Chandrupatla's method (Adv. Eng. Software 28 (1997) 145): inverse
    quadratic interpolation where that is safe, bisection where it is not.
    """
    values = function(places)
    sign = 1.0 if values[-1] > values[0] else -1.0
    right = np.clip(np.searchsorted(sign * values, sign * wanted), 1, len(places) - 1)
    low, high = places[right - 1], places[right]
    bracketed = (sign * wanted >= sign * values[0]) & (sign * wanted <= sign * values[-1])
    roots = _chandrupatla(lambda x: function(x) - wanted, low, high)
    return np.where(bracketed, roots, np.nan)


def _chandrupatla(miss: Callable[[Array], Array], low: Array, high: Array) -> Array:
    b, a = np.array(low, dtype=float), np.array(high, dtype=float)
    c = a
    fa, fb = miss(a), miss(b)
    fc = fa
    share = np.full(np.shape(a), 0.5)
    eps = np.finfo(float).eps
    # What has settled stays, so that a root does not depend on its neighbours in the array.
    settled = np.zeros(np.shape(a), dtype=bool)
    roots = np.zeros(np.shape(a))
    with np.errstate(divide="ignore", invalid="ignore"):
        for _ in range(_STEPS):
            fresh = a + share * (b - a)
            f_fresh = miss(fresh)
            same = np.sign(f_fresh) == np.sign(fa)
            c, fc = np.where(same, a, b), np.where(same, fa, fb)
            b, fb = np.where(same, b, a), np.where(same, fb, fa)
            a, fa = fresh, f_fresh
            best = np.where(np.abs(fa) < np.abs(fb), a, b)
            tolerance = 0.5 * (2 * eps * np.abs(best) + 5e-324)
            limit = tolerance / np.abs(b - a)
            near = (limit > 0.5) | (fa == 0) | (fb == 0)
            roots = np.where(settled, roots, np.where(fa == 0, a, np.where(fb == 0, b, best)))
            settled |= near
            if settled.all():
                break
            xi, phi = (a - b) / (c - b), (fa - fb) / (fc - fb)
            quadratic = (phi**2 < xi) & ((1 - phi) ** 2 < 1 - xi)
            inverse = fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb)
            share = np.clip(np.where(quadratic & np.isfinite(inverse), inverse, 0.5), limit, 1 - limit)
            share = np.where(np.isfinite(share), share, 0.5)
    return roots
