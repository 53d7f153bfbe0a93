"""Marks between the numerals.

Between two numerals the division is 1, 2 or 5·10^n and constant: the finest with at most nine marks
(MIL-HDBK-759B) of which none stand nearer than the least gap.  So a crowding scale coarsens from
numeral to numeral, never between.  Nor is a division finer than the instrument's class justifies.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace
from enum import StrEnum
from itertools import pairwise

import numpy as np

from dialgen.errors import InputError
from dialgen.face.ruled.ruler import Ruler, decimal_value, multiples
from dialgen.stage import Array

MOST_PARTS = 10
MOST_MARKS = 3000
_DECADES = 3
_BEFORE_INFINITY = 2.0


class Rank(StrEnum):
    """How much a mark stands out."""

    NUMBERED = "numbered"
    MIDDLE = "middle"
    FINE = "fine"


@dataclass(frozen=True, slots=True)
class Division:
    """A gap cut into equal parts: how many, and after how many of them a middle mark stands.

    At the foot of a scale the first ``skipped`` marks are left out.
    """

    parts: int
    middle_every: int
    skipped: int = 0


def legal_divisions(gap: float) -> list[Division]:
    """Return the divisions by 1, 2 or 5·10^n that cut ``gap`` evenly into 2 to 10 parts, finest first.

    >>> [d.parts for d in legal_divisions(2.0)]
    [10, 4, 2]
    """
    magnitude = math.floor(math.log10(gap))
    parts = []
    for exponent in (magnitude - 1, magnitude):
        for mantissa in (1, 2, 5):
            count = gap / (mantissa * 10.0**exponent)
            if 1.5 < count < MOST_PARTS + 0.5 and abs(count - round(count)) < 1e-6:
                parts.append(round(count))
    return [Division(n, _middle_every(n, parts)) for n in parts]


def _middle_every(parts: int, legal: Sequence[int]) -> int:
    """Return the step of the middle marks: the coarsest legal division that this one refines."""
    if parts == 2:
        return 1
    coarser = [n for n in legal if n < parts and parts % n == 0]
    return parts // min(coarser) if coarser else 0


def divide(ruler: Ruler, numbered: Sequence[float]) -> list[tuple[float, Rank]]:
    """Return the marks between neighbouring numbered values, ascending, without the numbered ones."""
    gaps = [(a, b) for a, b in pairwise(numbered) if math.isfinite(b)]
    choices = [legal_divisions(b - a) for a, b in gaps]
    chosen = _finest_roomy(ruler, gaps, choices)
    if ruler.is_even():
        chosen = _levelled(gaps, choices, chosen)
    marks = []
    for (low, high), division in zip(gaps, chosen, strict=True):
        if division:
            cut = list(enumerate(_cut(low, high, division.parts), 1))
            marks += [(v, _rank(i, division)) for i, v in cut[division.skipped :]]
    return [*marks, *_towards_infinity(ruler, numbered)]


def _towards_infinity(ruler: Ruler, numbered: Sequence[float]) -> list[tuple[float, Rank]]:
    """Return middle marks at 1, 2 and 5·10^n after the last finite numeral, where infinity follows it.

    No constant division exists there.  They stand while there is room from one to the next and, twice
    that, to infinity (common practice).
    """
    if len(numbered) < 2 or math.isfinite(numbered[-1]) or numbered[-2] <= 0:
        return []
    last = numbered[-2]
    power = math.floor(math.log10(last))
    series = [decimal_value(count, p) for p in range(power, power + _DECADES) for count in (1, 2, 5)]
    values = [last, *(v for v in series if v > last * (1 + 1e-9)), math.inf]
    places = ruler.place_mm(np.array(values)).tolist()
    found, room_mm = [], _BEFORE_INFINITY * ruler.gap_mm
    for value, before, here in zip(values[1:-1], places, places[1:], strict=False):
        if here - before < room_mm or places[-1] - here < 2 * room_mm:
            break
        found.append((value, Rank.MIDDLE))
    return found


def _rank(index: int, division: Division) -> Rank:
    return Rank.MIDDLE if division.middle_every and index % division.middle_every == 0 else Rank.FINE


def _cut(low: float, high: float, parts: int) -> list[float]:
    step = (high - low) / parts
    values = [low + i * step for i in range(1, parts)]
    # What is left of a sum that should be zero is rounding, however many digits it has.
    return [0.0 if abs(v) < 1e-9 * step else float(f"{v:.12g}") for v in values]


def _finest_roomy(
    ruler: Ruler, gaps: Sequence[tuple[float, float]], choices: Sequence[Sequence[Division]]
) -> list[Division | None]:
    """Return for each gap its finest division whose marks are no nearer than the least gap."""
    # All marks of all choices are placed in one call: the chain works on arrays.
    cuts = [
        np.linspace(low, high, division.parts + 1)
        for (low, high), legal in zip(gaps, choices, strict=True)
        for division in legal
    ]
    if not cuts:
        return [None] * len(gaps)
    steps = np.diff(ruler.place_mm(np.concatenate(cuts)))
    # Within a cut its steps stand one after another; the step from cut to cut is passed over.
    starts = np.cumsum([0, *(len(cut) for cut in cuts[:-1])])
    pieces = iter([steps[at : at + len(cut) - 1] for at, cut in zip(starts, cuts, strict=True)])
    gap_mm = ruler.gap_mm * (1 - 1e-9)
    chosen: list[Division | None] = []
    for (low, high), legal in zip(gaps, choices, strict=True):
        least = ruler.least_step(low, high) * (1 - 1e-9)
        # The list is used up whole, so that every gap reads its own distances.
        foot = ruler.foot and low == ruler.start
        roomy = [d for division in legal if (d := _with_room(division, next(pieces), gap_mm, foot))]
        fitting = [d for d in roomy if (high - low) / d.parts >= least]
        chosen.append(fitting[0] if fitting else None)
    return chosen


def _with_room(division: Division, steps_mm: Array, gap_mm: float, foot: bool) -> Division | None:
    """Return a division whose marks have room, at a scale's foot by leaving out the first; None if none."""
    narrow = np.flatnonzero(steps_mm < gap_mm)
    if not len(narrow):
        return division
    # All that is narrow must lie at the foot: the marks from the last narrow step on are kept, but for
    # its own end where that is still too near the start.
    skipped = int(narrow[-1])
    if steps_mm[: skipped + 1].sum() < gap_mm:
        skipped += 1
    return replace(division, skipped=skipped) if foot and skipped < division.parts - 1 else None


def _levelled(
    gaps: Sequence[tuple[float, float]],
    choices: Sequence[Sequence[Division]],
    chosen: Sequence[Division | None],
) -> list[Division | None]:
    """Return one division for all gaps of one size: on an even scale the coarsest that any needs."""
    sizes = [float(f"{b - a:.9g}") for a, b in gaps]
    coarsest: dict[float, int] = {}
    for size, division in zip(sizes, chosen, strict=True):
        parts = division.parts if division else 1
        coarsest[size] = min(parts, coarsest.get(size, MOST_PARTS))
    return [
        next((d for d in legal if d.parts == coarsest[size]), None)
        for size, legal in zip(sizes, choices, strict=True)
    ]


def stepped(
    start: float, end: float, pieces: Sequence[tuple[float, float]], numbered: Sequence[float]
) -> list[tuple[float, Rank]]:
    """Return marks at the multiples of given steps, ascending, without the numbered values.

    Args:
        start: the scale's first value.
        end: its last.
        pieces: (to, step) in ascending order; each step holds from the piece before up to ``to``.
        numbered: the numbered values.

    Raises:
        InputError: more than 3000 marks in all, or pieces that do not ascend within the scale.
    """
    marks: dict[float, float] = {}
    low = start
    for i, (high, step) in enumerate(pieces):
        if not low < high or high > end:
            raise InputError(
                f"a piece to {high:g} does not follow {low:g} within the scale; "
                f"let the pieces ascend up to {end:g}",
                (i, "to"),
            )
        if math.isinf(high):
            raise InputError("a step never reaches inf; write pieces up to a finite to", (i, "every"))
        if len(marks) + (high - low) / step > MOST_MARKS:
            raise InputError(
                f"a step of {step:g} gives over {MOST_MARKS} marks; take a larger one", (i, "every")
            )
        marks.update(dict.fromkeys(multiples(step, low, high), step))
        low = high
    values = np.array(sorted(marks))
    shown = np.array(sorted(numbered))
    if not len(shown):
        return [(value, Rank.FINE) for value in values.tolist()]
    after = np.searchsorted(shown, values)
    nearest = np.minimum(
        np.abs(values - shown[np.maximum(after - 1, 0)]),
        np.abs(values - shown[np.minimum(after, len(shown) - 1)]),
    )
    plain = nearest > 1e-9 * np.maximum(np.abs(values), 1e-12)
    ranks = _GapRanks(shown.tolist())
    rows = zip(values[plain].tolist(), after[plain].tolist(), strict=True)
    return [(value, ranks.rank(value, marks[value], gap)) for value, gap in rows]


class _GapRanks:
    """The ranks of explicit marks: middle where the gap's own coarser legal division has a mark."""

    def __init__(self, numbered: Sequence[float]) -> None:
        self.numbered = numbered
        self.divisions: dict[tuple[int, float], Division | None] = {}

    def rank(self, value: float, step: float, after: int) -> Rank:
        """Return the rank of a mark of a step that stands before the ``after``-th numbered value."""
        if len(self.numbered) < 2:
            return Rank.FINE
        # Before the first numeral and after the last, marks go on as in the gap beside them.
        after = min(max(after, 1), len(self.numbered) - 1)
        low, high = self.numbered[after - 1], self.numbered[after]
        if (after, step) not in self.divisions:
            self.divisions[after, step] = _stepped_division(high - low, step)
        division = self.divisions[after, step]
        return _rank(round((value - low) / step), division) if division else Rank.FINE


def _stepped_division(gap: float, step: float) -> Division | None:
    parts = gap / step
    if math.isinf(gap) or abs(parts - round(parts)) > 1e-6 or round(parts) < 2:
        return None
    legal = [division.parts for division in legal_divisions(gap)]
    return Division(round(parts), _middle_every(round(parts), legal or [2]))
