"""Marks between the numerals.

Between two numerals the division is 1, 2 or 5·10^n and constant: the finest with at most nine marks
(MIL-HDBK-759B) of which none stand nearer than the least gap.  So a crowding scale coarsens from
numeral to numeral, never between.  Nor is a division finer than the instrument's class justifies.
A gap at the scale's end that cannot be cut so goes on from the one beside it.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import replace
from itertools import pairwise

import numpy as np

from dialgen.face.ruled.divisions import MOST_PARTS, Division, Rank, legal_divisions
from dialgen.face.ruled.ends import EndGap, Marks, going_on, towards
from dialgen.face.ruled.ruler import Ruler
from dialgen.stage import Array

_FOOT_PARTS = 4 * MOST_PARTS
_FOOT_MARKS = MOST_PARTS
"""At the foot one mark more than nine may stand: the first, where the pointer begins to move."""
_BARE, _FINER_BARE = 2 / 3, 1 / 3
"""Which share of a foot is left bare at most, by a division of up to ten parts and by a finer one.

Tuned by eye over square laws and rectifiers; where none leaves so little, the one that leaves least is taken.
"""

Gap = tuple[float, float]


def divide(ruler: Ruler, numbered: Sequence[float]) -> list[tuple[float, Rank]]:
    """Return the marks between neighbouring numbered values, ascending, without the numbered ones."""
    gaps = [(a, b) for a, b in pairwise(numbered) if math.isfinite(b)]
    choices = [_choices(ruler, gap) for gap in gaps]
    chosen = _finest_roomy(ruler, gaps, choices)
    even = ruler.is_even()
    if even:
        chosen = _levelled(gaps, choices, chosen)
    marks = [_cut(gap, division) if division else [] for gap, division in zip(gaps, chosen, strict=True)]
    for at, gap in _end_gaps(gaps, chosen).items():
        if not marks[at] or (even and gap.is_cut_off):
            marks[at] = going_on(ruler, gap) or marks[at]
    if gaps and not marks[-1] and not even:
        marks[-1] = towards(ruler, *gaps[-1])
    if len(numbered) > 1 and math.isinf(numbered[-1]):
        marks.append(towards(ruler, numbered[-2], math.inf))
    return [mark for inside in marks for mark in inside]


def _end_gaps(gaps: Sequence[Gap], chosen: Sequence[Division | None]) -> dict[int, EndGap]:
    """Return the first and the last gap, by their places, where those beside them are divided."""
    found: dict[int, EndGap] = {}
    if len(gaps) > 1:
        (start, first), (low, high) = gaps[0], gaps[-1]
        (_, second), (before, _) = gaps[1], gaps[-2]
        if chosen[1]:
            found[0] = EndGap(end=start, inner=first, size=second - first, division=chosen[1])
        if chosen[-2]:
            found[len(gaps) - 1] = EndGap(end=high, inner=low, size=low - before, division=chosen[-2])
    return found


def _cut(gap: Gap, division: Division) -> Marks:
    low, high = gap
    step = (high - low) / division.parts
    marks = [(low + i * step, division.rank(i)) for i in range(1 + division.skipped, division.parts)]
    # What is left of a sum that should be zero is rounding, however many digits it has.
    return [(0.0 if abs(v) < 1e-9 * step else float(f"{v:.12g}"), rank) for v, rank in marks]


def _is_foot(ruler: Ruler, gap: Gap) -> bool:
    return ruler.foot and gap[0] == ruler.start


def _choices(ruler: Ruler, gap: Gap) -> list[Division]:
    """Return the divisions of a gap; finer ones as well at a foot, whose first marks are left out."""
    return legal_divisions(gap[1] - gap[0], _FOOT_PARTS if _is_foot(ruler, gap) else MOST_PARTS)


def _finest_roomy(
    ruler: Ruler, gaps: Sequence[Gap], choices: Sequence[Sequence[Division]]
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
    for gap, legal in zip(gaps, choices, strict=True):
        least = ruler.least_step(*gap) * (1 - 1e-9)
        # The list is used up whole, so that every gap reads its own distances.
        measured = [(division, next(pieces)) for division in legal]
        fitting = [(d, mm) for d, mm in measured if (gap[1] - gap[0]) / d.parts >= least]
        if _is_foot(ruler, gap):
            chosen.append(_foot(fitting, gap_mm))
        else:
            chosen.append(next((division for division, mm in fitting if mm.min() >= gap_mm), None))
    return chosen


def _foot(measured: Sequence[tuple[Division, Array]], gap_mm: float) -> Division | None:
    """Return the division of a foot, its first marks left out; None where none has room.

    The finest that leaves little of it bare, or else the one that leaves least.
    """
    roomy = []
    for division, steps_mm in measured:
        at_foot = _from_room_on(division, steps_mm, gap_mm)
        if 0 < at_foot.shown <= _FOOT_MARKS:
            roomy.append((float(steps_mm[: at_foot.skipped + 1].sum() / steps_mm.sum()), at_foot))
    little = (d for bare, d in roomy if bare <= (_BARE if d.parts <= MOST_PARTS else _FINER_BARE))
    least = min(roomy, key=lambda found: found[0], default=(1.0, None))[1]
    return next(little, least)


def _from_room_on(division: Division, steps_mm: Array, gap_mm: float) -> Division:
    """Return a division without the marks up to its last narrow step, and clear of the scale's start."""
    narrow = np.flatnonzero(steps_mm < gap_mm)
    skipped = int(narrow[-1]) if len(narrow) else 0
    # The end of that step is kept, but for where it is still too near the start.
    if steps_mm[: skipped + 1].sum() < gap_mm:
        skipped += 1
    return replace(division, skipped=skipped)


def _levelled(
    gaps: Sequence[Gap],
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
