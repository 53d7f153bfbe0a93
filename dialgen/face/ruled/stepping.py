"""Marks at the multiples of steps that the file gives."""

from __future__ import annotations

import math
from collections.abc import Sequence

import numpy as np

from dialgen.errors import InputError
from dialgen.face.ruled.divisions import MOST_MARKS, Division, Rank, legal_divisions, middle_every
from dialgen.face.ruled.ruler import multiples


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
        return division.rank(round((value - low) / step)) if division else Rank.FINE


def _stepped_division(gap: float, step: float) -> Division | None:
    parts = gap / step
    if math.isinf(gap) or abs(parts - round(parts)) > 1e-6 or round(parts) < 2:
        return None
    legal = [division.parts for division in legal_divisions(gap)]
    return Division(round(parts), middle_every(round(parts), legal or [2]))
