"""How a scale looks: sizes and inks, in proportion to the scale where the file does not say."""

from __future__ import annotations

import math
from dataclasses import dataclass

from dialgen.dialfile.models import Scale
from dialgen.face.divisions import Rank

_LEAST_BASE_MM = 18.0
_MOST_BASE_MM = 150.0
_LEAST_NUMERAL_MM = 1.8
_WIDE = 2.0
_ROUND = 1.2


@dataclass(frozen=True, slots=True, kw_only=True)
class Look:
    """Sizes in millimetres and colours of one scale.

    Args:
        numeral_mm: height of a numeral.
        numbered_mm, middle_mm, fine_mm: lengths of the marks by rank.
        numbered_width_mm, middle_width_mm, fine_width_mm: their widths.
        line_width_mm: width of the scale line.
        space_mm: clear space between a mark's end and its numeral.
        clear_mm: least clear space between numerals side by side.
        stacked_mm: least clear space between numerals one above the other.
        unit_mm: height of the unit.
        base_mm: the radius that all sizes follow.
        ink: colour of all of it.
    """

    numeral_mm: float
    numbered_mm: float
    middle_mm: float
    fine_mm: float
    numbered_width_mm: float
    middle_width_mm: float
    fine_width_mm: float
    line_width_mm: float
    space_mm: float
    clear_mm: float
    stacked_mm: float
    unit_mm: float
    base_mm: float
    ink: str = "#000000"

    def length_mm(self, rank: Rank) -> float:
        """Return the length of a mark."""
        return {
            Rank.NUMBERED: self.numbered_mm,
            Rank.MIDDLE: self.middle_mm,
            Rank.FINE: self.fine_mm,
        }[rank]

    def width_mm(self, rank: Rank) -> float:
        """Return the width of a mark."""
        return {
            Rank.NUMBERED: self.numbered_width_mm,
            Rank.MIDDLE: self.middle_width_mm,
            Rank.FINE: self.fine_width_mm,
        }[rank]


def look_for(scale: Scale, length_mm: float) -> Look:
    """Return the plain look of a scale whose line is ``length_mm`` long.

    Sizes follow the radius of a quarter-circle scale of that length, for a reader stands back from
    a large meter; a flat arc about a far pivot is no larger an instrument for that, and a round
    dial has room for more.  The proportions were drawn by eye on plates of 20 to 120 mm radius;
    common practice.
    """
    quarter_mm = length_mm / (math.pi / 2)
    radius_mm = scale.radius or quarter_mm
    base = min(radius_mm * (_ROUND if quarter_mm > _WIDE * radius_mm else 1.0), quarter_mm)
    base = min(max(base, _LEAST_BASE_MM), _MOST_BASE_MM)
    return Look(
        numeral_mm=max(0.55 + 0.048 * base, _LEAST_NUMERAL_MM),
        numbered_mm=0.5 + 0.053 * base,
        middle_mm=0.4 + 0.039 * base,
        fine_mm=0.3 + 0.027 * base,
        numbered_width_mm=0.14 + 0.0060 * base,
        middle_width_mm=0.11 + 0.0036 * base,
        fine_width_mm=0.09 + 0.0023 * base,
        line_width_mm=0.10 + 0.0032 * base,
        space_mm=0.45 + 0.012 * base,
        clear_mm=0.5 + 0.016 * base,
        stacked_mm=0.25 + 0.006 * base,
        unit_mm=0.6 + 0.078 * base if scale.line is None else 0.6 + 0.055 * base,
        base_mm=base,
    )
