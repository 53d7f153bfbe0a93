"""What a look says: its choices, its colours, and its sizes in proportion to the ordinary ones."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum
from pathlib import Path
from typing import Annotated

COLOUR = "colour"
FACTOR = "factor"
LENGTH = "length"
WIDTH = "width"
DISTANCE = "distance"
FONT = "font"

Colour = Annotated[str, COLOUR]
"""A colour as #rrggbb."""
Factor = Annotated[float, FACTOR]
"""A factor on the ordinary size, above zero."""
LengthMm = Annotated[float | None, LENGTH]
"""A length in millimetres; None follows from the scale."""
WidthMm = Annotated[float | None, WIDTH]
"""A stroke's width in millimetres; None follows from the scale."""
DistanceMm = Annotated[float | None, DISTANCE]
"""A reading distance in millimetres."""
FontFile = Annotated[Path | None, FONT]
"""A font file."""


class LineForm(StrEnum):
    """How the scale line is drawn: one line, two with the fine marks between them, or none."""

    SINGLE = "single"
    DOUBLE = "double"
    NONE = "none"


class MarkShape(StrEnum):
    """The outline of a mark: of one width, or narrowing towards the scale line."""

    BAR = "bar"
    TAPER = "taper"


class Turn(StrEnum):
    """How numerals stand: upright, along the pointer, or across it."""

    UPRIGHT = "upright"
    ALONG = "along"
    ACROSS = "across"


class End(StrEnum):
    """How a mark ends."""

    SQUARE = "square"
    ROUND = "round"


class Outside(StrEnum):
    """How the scale line runs outside the effective range."""

    PLAIN = "plain"
    BROKEN = "broken"
    NONE = "none"


class Lettering(StrEnum):
    """Whether letters are filled outlines or single strokes."""

    OUTLINE = "outline"
    STROKE = "single stroke"


class Decimal(StrEnum):
    """The decimal sign."""

    POINT = "point"
    COMMA = "comma"


@dataclass(frozen=True, slots=True, kw_only=True)
class Look:
    """A look: every field is a key of the dial file's ``[look]``.

    A size in millimetres that is None follows from the scale, times its factor; ``distance`` sets
    sizes by visual angle instead.

    Args:
        ink, ground, accent: colours of lettering and marks, of the plate, and of limits.
        line, blocks, mark_shape, mark_ends, outside: forms of the line and the marks; ``blocks``
            fills every second division of a double line.
        turn, lettering, font: how letters stand, how they are made, and a font file asked first.
        decimal, thousands, fold: how a numeral is written: its decimal sign, whether groups of
            three digits are spaced from five digits up, and whether a prefix is folded into the
            unit where numerals would be long.
        letter_scale, length_scale, weight_scale: factors on the heights of letters, the lengths of
            marks, the widths of strokes.
        distance: from the eye to the plate, mm.
        numeral, unit: heights of capitals, mm.
        numbered, middle, fine: lengths of marks by rank, mm.
        numbered_width, middle_width, fine_width, line_width: widths of strokes, mm.
        space: clear space between a mark's end and its numeral, mm.
    """

    ink: Colour = "#000000"
    ground: Colour = "#ffffff"
    accent: Colour = "#c8201e"
    line: LineForm = LineForm.SINGLE
    blocks: bool = False
    mark_shape: MarkShape = MarkShape.BAR
    mark_ends: End = End.SQUARE
    outside: Outside = Outside.BROKEN
    turn: Turn = Turn.UPRIGHT
    lettering: Lettering = Lettering.OUTLINE
    font: FontFile = None
    decimal: Decimal = Decimal.POINT
    thousands: bool = True
    fold: bool = True
    letter_scale: Factor = 1.0
    length_scale: Factor = 1.0
    weight_scale: Factor = 1.0
    distance: DistanceMm = None
    numeral: LengthMm = None
    unit: LengthMm = None
    numbered: LengthMm = None
    middle: LengthMm = None
    fine: LengthMm = None
    numbered_width: WidthMm = None
    middle_width: WidthMm = None
    fine_width: WidthMm = None
    line_width: WidthMm = None
    space: LengthMm = None
