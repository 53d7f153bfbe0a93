"""Broken lines: where their dashes lie, with a dash at the line's own end and a gap before what is whole.

Dashes are even, or keep to the marks where these are all but even.  Distances are counted from the
end where the dashes begin: the line's own end, if one of the two is that.
"""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

_PERIOD = 11.0
_DASH = 0.6
_LEAST_GAP = 1.5
_EVEN = 1.8

Spans = list[tuple[float, float]]
"""The ends of each dash, in millimetres."""


def dash_count(length_mm: float, width_mm: float) -> float:
    """Return how many dashes best break a line of a length and a width, not rounded."""
    return length_mm / (_PERIOD * width_mm)


def even_dashes(length_mm: float, count: float, near_mm: float | None, far_mm: float) -> Spans:
    """Return equal dashes with equal gaps between them.

    Args:
        length_mm: the length to break.
        count: how many dashes there are, to be rounded.
        near_mm: how far before the line's own end the first dash begins: half the width of the mark
            there.  None where the line goes on whole at this end too.
        far_mm: how far before the other end what is whole begins.

    >>> even_dashes(5.0, 5.2, 0.0, 0.0)[:2]
    [(0.0, 0.6), (1.0, 1.6)]
    """
    count = max(1, round(count))
    if near_mm is not None:
        period_mm, first = (length_mm - far_mm + near_mm) / count, -near_mm
    else:
        # The mark at the near end is taken to be as wide as that at the far one.
        period_mm = (length_mm - 2 * far_mm) / (count + 1 - _DASH)
        first = far_mm + (1 - _DASH) * period_mm
    starts = [first + number * period_mm for number in range(count)]
    return [(start, start + _DASH * period_mm) for start in starts]


def mark_dashes(
    places_mm: Sequence[float], count: float, lap_mm: float, near_mm: float, width_mm: float
) -> Spans:
    """Return dashes that begin at every mark, or reach from each second one to the next.

    Args:
        places_mm: where the marks stand, the first and the last at the ends of the length to break.
        count: about how many dashes there ought to be.
        lap_mm: how far dashes reach beyond the middles of their marks.
        near_mm: how far the first one reaches before the line's own end.
        width_mm: the width of the line, which says how wide a gap must be to be seen.

    Returns:
        The dashes; none where marks are too few, too near, or too uneven.

    >>> mark_dashes([0.0, 1.0, 2.0, 3.0, 4.0], 2.0, 0.1, 0.2, 0.1)
    [(-0.2, 1.1), (1.9, 3.1)]
    """
    steps = [there - here for here, there in pairwise(places_mm)]
    if len(steps) < 2 or max(steps) > _EVEN * min(steps):
        return []
    choices = [[(here, here + _DASH * step) for here, step in zip(places_mm, steps, strict=False)]]
    if len(steps) % 2 == 0:
        choices.append(list(zip(places_mm[:-1:2], places_mm[1::2], strict=True)))
    clear = [
        spans for spans in choices if _least_gap(spans, places_mm[-1]) > 2 * lap_mm + _LEAST_GAP * width_mm
    ]
    if not clear:
        return []
    chosen = min(clear, key=lambda spans: abs(len(spans) - count))
    lapped = [(start - lap_mm, end + lap_mm) for start, end in chosen]
    return [(min(lapped[0][0], -near_mm), lapped[0][1]), *lapped[1:]]


def _least_gap(spans: Spans, end_mm: float) -> float:
    starts = [*(start for start, _ in spans[1:]), end_mm]
    return min(start - end for (_, end), start in zip(spans, starts, strict=True))
