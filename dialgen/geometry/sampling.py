"""Places spread over a scale, and the check that a law moves one way over them."""

from __future__ import annotations

import math

import numpy as np

from dialgen.errors import InputError
from dialgen.stage import Array, Span, Stage

SAMPLES = 129
"""How many places are enough for a law that is smooth by nature."""


def sample_places(span: Span, count: int) -> Array:
    """Return ``count`` ascending places over a span; to infinity in equal steps of x/(x + width)."""
    low, high = span
    if math.isfinite(high):
        return np.linspace(low, high, count)
    share = np.linspace(0.0, 1.0, count)[:-1]
    return low + max(abs(low), 1.0) * share / (1.0 - share)


def check_one_way(stage: Stage, span: Span, count: int) -> None:
    """Refuse a law that does not move strictly one way over the scale.

    Raises:
        InputError: naming the values between which it turns, or where it has no signal.
    """
    places = sample_places(span, count)
    check_moves(places, stage.forward(places))


def check_moves(values: Array, signals: Array) -> None:
    """Refuse signals that do not move strictly one way as the values rise.

    Raises:
        InputError: naming the values between which they turn, or where there is none.
    """
    if not np.isfinite(signals).all():
        bad = float(values[~np.isfinite(signals)][0])
        raise InputError(f"the law has no signal at {bad:.6g}; it must hold over the whole scale")
    steps = signals[1:] - signals[:-1]
    # The first step says which way, so that what is named is where the law turns.
    turned = np.flatnonzero(steps <= 0 if signals[1] > signals[0] else steps >= 0)
    if len(turned):
        at = int(turned[0])
        raise InputError(
            f"the law turns or stands still between {values[at]:.6g} and {values[at + 1]:.6g}; "
            "it must move strictly one way over the scale"
        )
