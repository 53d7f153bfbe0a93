"""Fake scales for the divider's tests (closed-form places, widths by counting), and exact arithmetic."""

from __future__ import annotations

import math
from collections.abc import Callable
from fractions import Fraction

import numpy as np
from hypothesis import strategies as st

from dialgen.face.ruled.ruler import Ruler

DIGIT_MM = 1.6
CLEAR_MM = 1.0


def width_mm(values: np.ndarray) -> np.ndarray:
    """A numeral's width: so much for every character that it takes."""
    return np.array([DIGIT_MM * len("0" if math.isinf(v) else f"{v:.12g}") for v in np.ravel(values)])


def ruler(
    start: float,
    end: float,
    length: float,
    share: Callable[[np.ndarray], np.ndarray],
    value: Callable[[np.ndarray], np.ndarray],
) -> Ruler:
    """A ruler whose place is ``length`` times ``share(value)``, with ``value(share)`` the inverse."""
    along = value(np.linspace(0.0, 1.0, 97))
    along[0], along[-1] = start, end
    return Ruler(
        start=start,
        end=end,
        place_mm=lambda values: length * share(np.asarray(values, dtype=float)),
        along=along,
        width_mm=width_mm,
        digit_mm=DIGIT_MM,
        gap_mm=0.8,
        clear_mm=CLEAR_MM,
    )


def even(start: float, end: float, length: float) -> Ruler:
    """Equal lengths for equal steps."""
    span = end - start
    return ruler(start, end, length, lambda v: (v - start) / span, lambda s: start + s * span)


def powered(end: float, exponent: float, length: float) -> Ruler:
    """A power law from zero; 2 is the square law of a moving iron."""
    return ruler(0.0, end, length, lambda v: (v / end) ** exponent, lambda s: end * s ** (1 / exponent))


def ohms(half: float, length: float, end: float = math.inf) -> Ruler:
    """The ohms law to infinity or to a finite end, zero at the start."""
    top = 1.0 if math.isinf(end) else end / (end + half)

    def share(values: np.ndarray) -> np.ndarray:
        finite = np.where(np.isinf(values), 0.0, values)
        return np.where(np.isinf(values), 1.0, finite / (finite + half)) / top

    def value(shares: np.ndarray) -> np.ndarray:
        with np.errstate(divide="ignore"):
            return half * shares * top / (1.0 - shares * top)

    return ruler(0.0, end, length, share, value)


def decibels(start: float, end: float, length: float) -> Ruler:
    """Decibels of an amplitude: stretched towards the end."""
    low, high = 10 ** (start / 20), 10 ** (end / 20)

    def value(shares: np.ndarray) -> np.ndarray:
        return 20 * np.log10(low + shares * (high - low))

    return ruler(start, end, length, lambda v: (10 ** (v / 20) - low) / (high - low), value)


def logarithmic(start: float, end: float, length: float) -> Ruler:
    """Equal lengths for equal ratios."""
    ratio = math.log(end / start)
    return ruler(start, end, length, lambda v: np.log(v / start) / ratio, lambda s: start * np.exp(s * ratio))


def centred(end: float, length: float, bend: float) -> Ruler:
    """Symmetric about zero, crowding towards both ends."""
    top = math.asinh(bend)
    return ruler(
        -end,
        end,
        length,
        lambda v: 0.5 + np.arcsinh(bend * v / end) / top / 2,
        lambda s: end * np.sinh((s - 0.5) * 2 * top) / bend,
    )


def thermistor(low: float, high: float, length: float) -> Ruler:
    """A thermistor thermometer in °C by its beta of 3950 K: wide when cold, crowding when hot."""
    beta, zero = 3950.0, 273.15
    cold, hot = (math.exp(beta / (zero + t)) for t in (low, high))

    def value(shares: np.ndarray) -> np.ndarray:
        return beta / np.log(cold + shares * (hot - cold)) - zero

    return ruler(low, high, length, lambda v: (np.exp(beta / (zero + v)) - cold) / (hot - cold), value)


ROUND_ENDS = (1.0, 1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 7.5, 8.0, 10.0, 12.0, 15.0, 25.0, 30.0, 60.0)
lengths = st.floats(20.0, 400.0).map(lambda v: round(v, 1))
tops = st.builds(
    lambda m, e: float(f"{m}e{e}"), st.sampled_from([*ROUND_ENDS, 37.0, 9.3, 17.0, 110.0]), st.integers(-3, 3)
)

even_rulers = st.one_of(
    st.builds(lambda top, length: even(0.0, top, length), tops, lengths),
    st.builds(lambda top, length: even(-top, top, length), tops, lengths),
    st.builds(
        even,
        st.sampled_from((3.0, 7.0, 12.0, -4.0, -17.5)),
        st.sampled_from((37.0, 41.0, 19.3, 100.0, 50.0)),
        lengths,
    ),
    st.builds(even, st.just(0.7), st.just(9.3), lengths),
)
crowding_rulers = st.one_of(
    st.builds(powered, tops, st.sampled_from((2.0, 1.8, 0.5, 3.0)), lengths),
    st.builds(ohms, tops, lengths),
    st.builds(lambda half, length: ohms(half, length, 20 * half), tops, lengths),
    st.builds(
        decibels,
        st.sampled_from((-20.0, -40.0, -10.0, -17.0)),
        st.sampled_from((3.0, 0.0, 6.0, 10.0)),
        lengths,
    ),
    st.builds(lambda top, n, length: logarithmic(top / 10**n, top, length), tops, st.integers(1, 6), lengths),
    st.builds(centred, tops, lengths, st.sampled_from((3.0, 20.0))),
)


def exact(value: float) -> Fraction:
    """A decimal value as the fraction it is meant to be."""
    return Fraction(f"{value:.12g}")


def mantissa(size: Fraction) -> Fraction:
    """A size brought between 1 and 10 by a power of ten."""
    while size >= 10:
        size /= 10
    while size < 1:
        size *= 10
    return size


def legal_parts(gap: Fraction) -> list[int]:
    """Into how many equal parts of 1, 2 or 5·10^n a gap may be cut with at most nine marks, finest first."""
    return [n for n in range(10, 1, -1) if mantissa(gap / n) in (1, 2, 5)]
