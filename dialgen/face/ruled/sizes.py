"""How large everything of a scale is, in millimetres: by its own size, or by the reading distance."""

from __future__ import annotations

import math
from dataclasses import dataclass

from dialgen.dialfile.models import Scale
from dialgen.face.ruled.divisions import Rank
from dialgen.looks import Look

_LEAST_BASE_MM = 18.0
_MOST_BASE_MM = 150.0
_LEAST_NUMERAL_MM = 1.8
_WIDE = 2.0
_ROUND = 1.2

# Visual angles in minutes of arc, for sizes by reading distance.  Numerals: NUREG-0700 rev. 2,
# 1.3.1-4 (20 to 22 preferred, never below 16).  Lengths and widths of marks and the gap between
# them: the figures of MIL-STD-1472 for 710 mm as angles (5.6, 4.1, 2.5, 0.32 and 0.9 mm, from memory).
NUMERAL_MINUTES = 20.0
LEAST_NUMERAL_MINUTES = 16.0
GAP_MINUTES = 4.4
_LENGTH_MINUTES = {Rank.NUMBERED: 27.0, Rank.MIDDLE: 20.0, Rank.FINE: 12.0}
_FINE_WIDTH_MINUTES = 1.5

LEAST_WHITE = 0.75
"""The least white between two marks, in widths of the finer."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Sizes:
    """Sizes of one scale, in millimetres.

    Args:
        numeral_mm: height of a numeral.
        numbered_mm, middle_mm, fine_mm: lengths of the marks by rank.
        numbered_width_mm, middle_width_mm, fine_width_mm: their widths.
        line_width_mm: width of the scale line.
        space_mm: clear space between a mark's end and its numeral.
        clear_mm: least clear space between numerals side by side.
        stacked_mm: least clear space between numerals one above the other.
        unit_mm: height of the unit.
        gap_mm: least distance between marks.
        base_mm: the radius that all sizes follow.
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
    gap_mm: float
    base_mm: float

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


def sizes_for(scale: Scale, look: Look, length_mm: float) -> Sizes:
    """Return the sizes of a scale whose line is ``length_mm`` long.

    Without a reading distance they follow the radius of a quarter-circle scale of that length, for
    a reader stands back from a large meter; a flat arc about a far pivot is no larger an instrument
    for that, and a round dial has room for more.  The proportions were drawn by eye on plates of 20
    to 120 mm radius; common practice.
    """
    base = _base_mm(scale, length_mm)
    letters, lengths, weights = look.letter_scale, look.length_scale, look.weight_scale
    if look.distance is None:
        numeral = max(0.55 + 0.048 * base, _LEAST_NUMERAL_MM) * letters
        marks = (0.5 + 0.053 * base, 0.4 + 0.039 * base, 0.3 + 0.027 * base)
        widths = (0.14 + 0.0060 * base, 0.12 + 0.0042 * base, 0.09 + 0.0023 * base)
        line_width = 0.10 + 0.0032 * base
        unit = (0.6 + 0.078 * base if scale.line is None else 0.6 + 0.055 * base) * letters
        space, clear, stacked = 0.45 + 0.012 * base, 0.5 + 0.016 * base, 0.25 + 0.006 * base
        gap = scale.gap
    else:
        numeral = seen_mm(NUMERAL_MINUTES, look.distance) * letters
        longest, middle, fine = (seen_mm(minutes, look.distance) for minutes in _LENGTH_MINUTES.values())
        marks = (longest, middle, fine)
        hair = seen_mm(_FINE_WIDTH_MINUTES, look.distance)
        widths, line_width = (2.0 * hair, 1.4 * hair, hair), 1.2 * hair
        unit = 1.5 * numeral
        space, clear, stacked = 0.35 * numeral, 0.45 * numeral, 0.2 * numeral
        gap = max(scale.gap, seen_mm(GAP_MINUTES, look.distance))
    numbered_width, fine_width = (
        given or width * weights
        for given, width in ((look.numbered_width, widths[0]), (look.fine_width, widths[2]))
    )
    # Heavy marks need room for white between them as well.
    gap = max(gap, (numbered_width + fine_width) / 2 + LEAST_WHITE * fine_width)
    return Sizes(
        numeral_mm=look.numeral or numeral,
        numbered_mm=look.numbered or marks[0] * lengths,
        middle_mm=look.middle or marks[1] * lengths,
        fine_mm=look.fine or marks[2] * lengths,
        numbered_width_mm=numbered_width,
        middle_width_mm=look.middle_width or widths[1] * weights,
        fine_width_mm=fine_width,
        line_width_mm=look.line_width or line_width * weights,
        space_mm=look.space or space,
        clear_mm=clear * letters,
        stacked_mm=stacked * letters,
        unit_mm=look.unit or unit,
        gap_mm=gap,
        base_mm=base,
    )


def seen_mm(minutes: float, distance_mm: float) -> float:
    """Return the height that subtends an angle in minutes of arc at a distance.

    The formula of NUREG-0700 rev. 2, 1.3.1-4: h = 6.283·D·MA/21600.

    >>> round(seen_mm(20.0, 500.0), 3)
    2.909
    """
    return 2 * math.pi * distance_mm * minutes / 21600


def minutes_seen(height_mm: float, distance_mm: float) -> float:
    """Return the minutes of arc that a height subtends; the inverse of `seen_mm`."""
    return height_mm * 21600 / (2 * math.pi * distance_mm)


def _base_mm(scale: Scale, length_mm: float) -> float:
    quarter_mm = length_mm / (math.pi / 2)
    radius_mm = scale.radius or quarter_mm
    base = min(radius_mm * (_ROUND if quarter_mm > _WIDE * radius_mm else 1.0), quarter_mm)
    return min(max(base, _LEAST_BASE_MM), _MOST_BASE_MM)
