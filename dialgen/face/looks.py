"""How a scale looks: sizes and inks, in proportion to the scale where the file does not say."""

from __future__ import annotations

from dataclasses import dataclass

from dialgen.dialfile.models import Scale
from dialgen.face.divisions import Rank

_LEAST_BASE_MM = 18.0
_MOST_BASE_MM = 150.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Look:
    """Sizes in millimetres and colours of one scale.

    Args:
        numeral_mm: height of a numeral.
        numbered_mm, middle_mm, fine_mm: lengths of the marks by rank.
        numbered_width_mm, middle_width_mm, fine_width_mm: their widths.
        line_width_mm: width of the scale line.
        space_mm: clear space between a mark's end and its numeral.
        clear_mm: least clear space between numerals.
        unit_mm: height of the unit.
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
    unit_mm: float
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

    Sizes follow the radius: a reader stands back from a large meter.  The proportions were drawn
    by eye on plates of 25 to 120 mm radius; common practice.
    """
    base = min(max(scale.radius or 0.62 * length_mm, _LEAST_BASE_MM), _MOST_BASE_MM)
    return Look(
        numeral_mm=0.35 + 0.052 * base,
        numbered_mm=0.5 + 0.053 * base,
        middle_mm=0.4 + 0.039 * base,
        fine_mm=0.3 + 0.027 * base,
        numbered_width_mm=0.14 + 0.0060 * base,
        middle_width_mm=0.11 + 0.0036 * base,
        fine_width_mm=0.09 + 0.0023 * base,
        line_width_mm=0.10 + 0.0032 * base,
        space_mm=0.45 + 0.012 * base,
        clear_mm=0.5 + 0.016 * base,
        unit_mm=0.6 + 0.078 * base,
    )
