"""The power rating to buy for a resistor that is to stay cool."""

from __future__ import annotations

import math

SOLD_W = (0.125, 0.25, 0.5, 1.0)
"""Small ratings as they are sold (common practice)."""
MARGIN = 2.0
"""A resistor is bought for at least twice what it dissipates (common practice)."""
USUAL_RATINGS_V = {0.25: 250.0, 0.5: 350.0}
"""The voltage that small film resistors stand, by their watts.  Common practice, from memory."""
_FIGURES = 9


def rating_w(watts: float, margin: float = MARGIN) -> float:
    """Return the rating to buy: ``margin`` times the dissipation, rounded up to what is sold.

    Up to a watt that is an eighth, a quarter, a half or one; above, whole watts to two figures.

    >>> rating_w(2.999925), rating_w(0.25), rating_w(61.5)
    (6.0, 0.5, 130.0)
    """
    # A billionth is rounding in the working, not heat: it must not buy the next size.
    needed_w = float(f"{watts * margin:.{_FIGURES}g}")
    for sold_w in SOLD_W:
        if needed_w <= sold_w:
            return sold_w
    step_w = 10.0 ** max(math.floor(math.log10(needed_w)) - 1, 0)
    return math.ceil(needed_w / step_w) * step_w
