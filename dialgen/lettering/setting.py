"""Setting type: from a text to glyphs on a line, and from the line to its place on the plate.

The unit on the line is the height of a capital, which is what a dial file gives in millimetres.
Barlow's flat-topped digits are exactly as tall as its capitals (700 of 1000 units; round ones
overshoot by up to 11), so ``height = 2.2`` gives digits and capitals 2.2 mm tall.  Each font is
sized by its own capitals, so a letter from another font is as tall as its neighbours.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from enum import StrEnum

from dialgen.drawing import Cap, Glyph, Letters, Placed, Point, Style
from dialgen.errors import InputError
from dialgen.lettering.fonts import EM_CAPS
from dialgen.lettering.hands import PLAIN, Hand
from dialgen.lettering.strokes import STROKE_WIDTH

_Spot = tuple[Glyph, float, float]
"""A glyph, and its x and y in capital heights."""

_Line = tuple[list[_Spot], float]
"""The glyphs with ink, and the advance of the whole text in capital heights."""


class Fit(StrEnum):
    """Which box an anchor is taken in: that of the ink, or in y from baseline to capital height.

    Use ``LINE`` for words and numerals that should share a baseline: ``(0.5, 0.0)`` is then the
    baseline, whether or not a letter hangs below it.
    """

    INK = "ink"
    LINE = "line"


@dataclass(frozen=True, slots=True)
class Extent:
    """The room a text takes: how far it advances, and its ink box from its origin, all in mm.

    The origin is where the text starts on its baseline.  A text without ink has an empty box there.
    """

    width_mm: float
    left: float
    bottom: float
    right: float
    top: float


def measure(text: str, height_mm: float, *, hand: Hand = PLAIN) -> Extent:
    """Return the room ``text`` takes; the ink of strokes reaches half their width to either side.

    Args:
        text: any characters of the hand.
        height_mm: height of a digit or capital, mm.
        hand: the hand it is lettered in.

    Raises:
        CharacterError: a character that no font has.
        InputError: a height that is not above zero.

    >>> extent = measure("1H", 7.0)
    >>> round(extent.top, 6), round(extent.bottom, 6)
    (7.0, 0.0)
    """
    _require_height(height_mm)
    spots, advance = _set(text, hand)
    left, bottom, right, top = _ink_box(spots)
    return Extent(
        advance * height_mm, left * height_mm, bottom * height_mm, right * height_mm, top * height_mm
    )


def numeral_width(text: str, height_mm: float, *, hand: Hand = PLAIN) -> float:
    """Return the ``width_mm`` that ``measure`` gives; for numerals without laying them out.

    Args:
        text: about 1 us for ``NUMERAL_CHARACTERS`` alone; any other text is measured in full.
        height_mm: height of a digit or capital, mm.
        hand: the hand it is lettered in.

    Raises:
        CharacterError: a character that no font has.
        InputError: a height that is not above zero.

    >>> numeral_width("100", 2.2) == numeral_width("888", 2.2)
    True
    """
    numerals = hand.numerals
    advances = numerals.advances
    try:
        units = sum([advances[character] for character in text])
    except KeyError:
        return measure(text, height_mm, hand=hand).width_mm
    _require_height(height_mm)
    return units / numerals.cap_units * height_mm


def letters(
    text: str,
    height_mm: float,
    at: Point,
    style: Style,
    *,
    anchor: Point = (0.5, 0.5),
    angle_deg: float = 0.0,
    fit: Fit = Fit.INK,
    hand: Hand = PLAIN,
) -> Letters:
    """Return ``text`` as placed glyphs.

    Args:
        text: any characters of the hand.
        height_mm: height of a digit or capital, mm.
        at: where the anchor falls on the plate, mm.
        style: how the glyphs are inked; strokes are drawn in its ``fill``, as wide as the hand's are.
        anchor: the point of the text's box that falls on ``at``, as fractions of its width and
            height: (0, 0) is its lower left corner, (0.5, 0.5) its centre.
        angle_deg: turn about ``at``, degrees clockwise.
        fit: which box the anchor is taken in.
        hand: the hand it is lettered in.

    Raises:
        CharacterError: a character that no font has.
        InputError: a height that is not above zero.

    >>> letters("0", 2.2, (0.0, 40.0), Style(fill="#000000")).glyphs[0].glyph.name
    'barlow-zero.tf'
    """
    _require_height(height_mm)
    spots, _ = _set(text, hand)
    left, bottom, right, top = _ink_box(spots)
    if fit is Fit.LINE:
        bottom, top = 0.0, 1.0
    anchor_x = left + anchor[0] * (right - left)
    anchor_y = bottom + anchor[1] * (top - bottom)
    # Turning clockwise by a takes (x, y) to (x cos a + y sin a, y cos a - x sin a).
    cos_mm = math.cos(math.radians(angle_deg)) * height_mm
    sin_mm = math.sin(math.radians(angle_deg)) * height_mm
    size_mm = EM_CAPS * height_mm
    at_x, at_y = at
    return Letters(
        text,
        tuple(
            [
                Placed(
                    glyph,
                    at_x + (x - anchor_x) * cos_mm + (y - anchor_y) * sin_mm,
                    at_y + (y - anchor_y) * cos_mm - (x - anchor_x) * sin_mm,
                    size_mm,
                    angle_deg,
                )
                for glyph, x, y in spots
            ]
        ),
        _stroke(style, height_mm) if hand.strokes else style,
    )


def _require_height(height_mm: float) -> None:
    if not 0 < height_mm < math.inf:
        raise InputError(f"lettering {height_mm} mm high; the height must be above zero and finite")


def _stroke(style: Style, height_mm: float) -> Style:
    return Style(stroke=style.fill, width_mm=STROKE_WIDTH * height_mm, cap=Cap.ROUND)


def _set(text: str, hand: Hand) -> _Line:
    try:
        return _set_numeral(text, hand)
    except KeyError:
        return _set_shaped(text, hand)


def _set_numeral(text: str, hand: Hand) -> _Line:
    """Set a text of numeral characters alone; raise KeyError at any other."""
    numerals = hand.numerals
    advances, inked, cap_units = numerals.advances, numerals.inked, numerals.cap_units
    spots: list[_Spot] = []
    pen = 0.0
    for character in text:
        if character in inked:
            spots.append((inked[character], pen / cap_units, 0.0))
        pen += advances[character]
    return spots, pen / cap_units


def _set_shaped(text: str, hand: Hand) -> _Line:
    """Set any text, run by run, each in the first font that has its characters."""
    spots: list[_Spot] = []
    start = 0.0
    for face, run in hand.runs(text):
        cap_units = face.cap_units
        pen = 0.0
        for glyph, advance, x_units, y_units in face.shape(run):
            if glyph.path:
                spots.append((glyph, start + (pen + x_units) / cap_units, y_units / cap_units))
            pen += advance
        start += pen / cap_units
    return spots, start


def _ink_box(spots: list[_Spot]) -> tuple[float, float, float, float]:
    if not spots:
        return 0.0, 0.0, 0.0, 0.0
    left = bottom = math.inf
    right = top = -math.inf
    for glyph, x, y in spots:
        near, low, far, high = glyph.box
        # Plain comparisons, not calls of min and max: this runs for every label of a face.
        if (edge := x + near * EM_CAPS) < left:
            left = edge
        if (edge := y + low * EM_CAPS) < bottom:
            bottom = edge
        if (edge := x + far * EM_CAPS) > right:
            right = edge
        if (edge := y + high * EM_CAPS) > top:
            top = edge
    return left, bottom, right, top
