"""Places spread over a scale, and the check that a law moves one way over them."""

from __future__ import annotations

import math

import numpy as np

from dialgen.errors import InputError
from dialgen.stage import Array, Span, Stage


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
    signals = stage.forward(places)
    if not np.isfinite(signals).all():
        bad = float(places[~np.isfinite(signals)][0])
        raise InputError(f"the law has no signal at {bad:.6g}; it must hold over the whole scale")
    steps = np.diff(signals)
    turned = np.flatnonzero(np.sign(steps) != np.sign(signals[-1] - signals[0]))
    if len(turned) or signals[-1] == signals[0]:
        at = int(turned[0]) if len(turned) else 0
        raise InputError(
            f"the law turns or stands still between {places[at]:.6g} and {places[at + 1]:.6g}; "
            "it must move strictly one way over the scale"
        )
