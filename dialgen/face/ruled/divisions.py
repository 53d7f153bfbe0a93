"""What a division is: a gap cut by 1, 2 or 5·10^n, and which of its marks stand out."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from enum import StrEnum

MOST_PARTS = 10
MOST_MARKS = 3000

_NEXT_COARSER = {1: 5, 2: 5, 5: 2}
"""After how many steps of 1, 2 and 5·10^n middle marks stand where no gap says it: at 5, 10 and 10·10^n."""


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

    def rank(self, index: int) -> Rank:
        """Return the rank of the mark that stands after ``index`` parts."""
        return Rank.MIDDLE if self.middle_every and index % self.middle_every == 0 else Rank.FINE

    @property
    def shown(self) -> int:
        """How many marks stand in the gap."""
        return self.parts - 1 - self.skipped


def legal_divisions(gap: float, most_parts: int = MOST_PARTS) -> list[Division]:
    """Return the divisions by 1, 2 or 5·10^n that cut ``gap`` evenly, finest first.

    Args:
        gap: what is cut.
        most_parts: into how many parts at most; two at least.

    >>> [d.parts for d in legal_divisions(2.0)]
    [10, 4, 2]
    """
    parts: list[int] = []
    mantissas: list[int] = []
    for exponent in range(math.floor(math.log10(gap / most_parts)), math.floor(math.log10(gap)) + 1):
        for mantissa in (1, 2, 5):
            count = gap / (mantissa * 10.0**exponent)
            if 1.5 < count < most_parts + 0.5 and abs(count - round(count)) < 1e-6:
                parts.append(round(count))
                mantissas.append(mantissa)
    return [
        Division(n, middle_every(n, parts) if n <= MOST_PARTS else _NEXT_COARSER[mantissa])
        for n, mantissa in zip(parts, mantissas, strict=True)
    ]


def middle_every(parts: int, legal: Sequence[int]) -> int:
    """Return the step of the middle marks: the coarsest legal division that this one refines."""
    if parts == 2:
        return 1
    coarser = [n for n in legal if n < parts and parts % n == 0]
    return parts // min(coarser) if coarser else 0


def coarser_steps(step: float, most: float) -> list[tuple[float, float]]:
    """Return the steps of 1, 2 and 5·10^n between two, each with that of its middle marks.

    >>> coarser_steps(2.0, 60.0)
    [(5.0, 10.0), (10.0, 50.0), (20.0, 100.0), (50.0, 100.0)]
    """
    first = math.floor(math.log10(step) + 1e-9)
    steps = [(m, m * 10.0**e) for e in range(first, math.ceil(math.log10(most)) + 1) for m in (1, 2, 5)]
    return [(s, s * _NEXT_COARSER[m]) for m, s in steps if step * (1 + 1e-9) < s < most]
