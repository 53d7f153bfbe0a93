"""Marks in a gap at a scale's end that no division cuts evenly, as that from 32 to 200.

They go on from the gap beside it; on a scale that crowds too much for that, and before infinity, they
stand at 1, 2 and 5·10^n (common practice).
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from dialgen.face.ruled.divisions import MOST_PARTS, Division, Rank, coarser_steps
from dialgen.face.ruled.ruler import Ruler, decimal_value

_MOST_MARKS = 2 * MOST_PARTS
_DECADES = 3
_ROOM = 2.0
"""How many least gaps apart the marks at 1, 2 and 5·10^n stand."""

Marks = list[tuple[float, Rank]]


@dataclass(frozen=True, slots=True, kw_only=True)
class EndGap:
    """A gap at a scale's end and the divided one beside it.

    Args:
        end: the numeral at the scale's end.
        inner: the numeral that both gaps share.
        size: the size of the gap beside it.
        division: how that is divided.
    """

    end: float
    inner: float
    size: float
    division: Division

    @property
    def step(self) -> float:
        """The step of the gap beside it."""
        return self.size / self.division.parts

    @property
    def is_cut_off(self) -> bool:
        """Whether it is a piece of a gap like that beside it, whose other numeral lies beyond the scale."""
        return abs(self.end - self.inner) < self.size * (1 - 1e-9) and not _is_multiple(self.end, self.size)


def going_on(ruler: Ruler, gap: EndGap) -> Marks:
    """Return the marks of an end gap at the step of that beside it, ascending; none without room.

    Where that step crowds, the next one that its inner numeral is a multiple of.  A mark too near to an
    end between two multiples is left out.
    """
    for step, middle, origin in _steps(gap):
        low, high = sorted((gap.end, gap.inner))
        if step >= ruler.least_step(low, high) * (1 - 1e-9):
            values = _with_room(ruler, gap, step)
            if values is not None:
                ranks = (_middle_or_fine(value - origin, middle) for value in values)
                return sorted(zip(values, ranks, strict=True))
    return []


def _steps(gap: EndGap) -> Iterator[tuple[float, float, float]]:
    """Yield steps, each with the step of its middle marks (0 for none) and what these are counted from."""
    yield gap.step, gap.step * gap.division.middle_every, gap.inner
    for step, middle in coarser_steps(gap.step, abs(gap.end - gap.inner)):
        if _is_multiple(gap.inner, step):
            yield step, middle, 0.0


def _inside(gap: EndGap, step: float) -> list[float]:
    """Return the values a whole number of steps from the inner numeral, from there to before the end."""
    count = math.ceil(abs(gap.end - gap.inner) / step - 1e-6) - 1
    way = math.copysign(step, gap.end - gap.inner)
    values = [gap.inner + i * way for i in range(1, min(count, _MOST_MARKS) + 1)]
    # What is left of a sum that should be zero is rounding, however many digits it has.
    return [0.0 if abs(v) < 1e-9 * step else float(f"{v:.12g}") for v in values]


def _with_room(ruler: Ruler, gap: EndGap, step: float) -> list[float] | None:
    """Return the values whose marks have room; None if there are none, too many, or some that crowd."""
    values = _inside(gap, step)
    if not values or len(values) >= _MOST_MARKS:
        return None
    places = ruler.place_mm(np.array([gap.inner, *values, gap.end]))
    roomy = np.abs(np.diff(places)) >= ruler.gap_mm * (1 - 1e-9)
    if not roomy[:-1].all():
        return None
    if roomy[-1]:
        return values
    return None if _is_multiple(gap.end - gap.inner, step) else values[:-1] or None


def towards(ruler: Ruler, last: float, end: float) -> Marks:
    """Return middle marks at 1, 2 and 5·10^n after a numeral, up to the scale's end or infinity.

    They stand while there is room from one to the next and to the end; twice that before infinity.
    """
    if last <= 0:
        return []
    power = math.floor(math.log10(last))
    series = [decimal_value(count, p) for p in range(power, power + _DECADES) for count in (1, 2, 5)]
    values = [last, *(v for v in series if last * (1 + 1e-9) < v < end * (1 - 1e-9)), end]
    places = ruler.place_mm(np.array(values)).tolist()
    room_mm = _ROOM * ruler.gap_mm
    before_end_mm = 2 * room_mm if math.isinf(end) else room_mm
    found: Marks = []
    for value, before, here in zip(values[1:-1], places, places[1:], strict=False):
        if here - before < room_mm or places[-1] - here < before_end_mm:
            break
        found.append((value, Rank.MIDDLE))
    return found


def _middle_or_fine(distance: float, middle: float) -> Rank:
    return Rank.MIDDLE if middle and _is_multiple(distance, middle) else Rank.FINE


def _is_multiple(value: float, step: float) -> bool:
    count = value / step
    return abs(count - round(count)) < 1e-6
