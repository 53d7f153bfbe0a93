"""Setting type: from a text to glyphs on a line, and from the line to its place on the plate.

The unit on the line is the height of a capital, which is what a dial file gives in millimetres.
Barlow's flat-topped digits are exactly as tall as its capitals (700 of 1000 units; round ones
overshoot by up to 11), so ``height = 2.2`` gives digits and capitals 2.2 mm tall.  Each font is
sized by its own capitals, so a letter from the second font is as tall as its neighbours.
"""

from __future__ import annotations

import math
import unicodedata
from dataclasses import dataclass
from enum import StrEnum
from functools import cache
from itertools import groupby

from dialgen.drawing import Glyph, Letters, Placed, Point, Style
from dialgen.errors import CharacterError, InputError
from dialgen.lettering.fonts import Font, font_for, main_font

NUMERAL_CHARACTERS = "0123456789+\N{MINUS SIGN}.,\N{INFINITY} "
"""The characters of numerals: no two of them kern, so they are set without the shaper."""

_Spot = tuple[Glyph, float, float, float]
"""A glyph, its x and y in capital heights, and its em in capital heights."""

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


def measure(text: str, height_mm: float) -> Extent:
    """Return the room ``text`` takes.

    Args:
        text: any characters of the two fonts.
        height_mm: height of a digit or capital, mm.

    Raises:
        CharacterError: a character that no font has.
        InputError: a height that is not above zero.

    >>> extent = measure("1H", 7.0)
    >>> round(extent.top, 6), round(extent.bottom, 6)
    (7.0, 0.0)
    """
    _require_height(height_mm)
    spots, advance = _set(text)
    left, bottom, right, top = _ink_box(spots)
    return Extent(
        advance * height_mm, left * height_mm, bottom * height_mm, right * height_mm, top * height_mm
    )


def numeral_width(text: str, height_mm: float) -> float:
    """Return ``measure(text, height_mm).width_mm``; for numerals without laying them out.

    Args:
        text: about 1 us for ``NUMERAL_CHARACTERS`` alone; any other text is measured in full.
        height_mm: height of a digit or capital, mm.

    Raises:
        CharacterError: a character that no font has.
        InputError: a height that is not above zero.

    >>> numeral_width("100", 2.2) == numeral_width("888", 2.2)
    True
    """
    advances, cap_units = _numeral_advances()
    try:
        units = sum([advances[character] for character in text])
    except KeyError:
        return measure(text, height_mm).width_mm
    _require_height(height_mm)
    return units / cap_units * height_mm


def letters(
    text: str,
    height_mm: float,
    at: Point,
    style: Style,
    *,
    anchor: Point = (0.5, 0.5),
    angle_deg: float = 0.0,
    fit: Fit = Fit.INK,
) -> Letters:
    """Return ``text`` as placed glyphs.

    Args:
        text: any characters of the two fonts.
        height_mm: height of a digit or capital, mm.
        at: where the anchor falls on the plate, mm.
        style: how the glyphs are inked.
        anchor: the point of the text's box that falls on ``at``, as fractions of its width and
            height: (0, 0) is its lower left corner, (0.5, 0.5) its centre.
        angle_deg: turn about ``at``, degrees clockwise.
        fit: which box the anchor is taken in.

    Raises:
        CharacterError: a character that no font has.
        InputError: a height that is not above zero.

    >>> letters("0", 2.2, (0.0, 40.0), Style(fill="#000000")).glyphs[0].glyph.name
    'barlow-zero.tf'
    """
    _require_height(height_mm)
    spots, _ = _set(text)
    left, bottom, right, top = _ink_box(spots)
    if fit is Fit.LINE:
        bottom, top = 0.0, 1.0
    anchor_x = left + anchor[0] * (right - left)
    anchor_y = bottom + anchor[1] * (top - bottom)
    # Turning clockwise by a takes (x, y) to (x cos a + y sin a, y cos a - x sin a).
    cos_mm = math.cos(math.radians(angle_deg)) * height_mm
    sin_mm = math.sin(math.radians(angle_deg)) * height_mm
    at_x, at_y = at
    return Letters(
        text,
        tuple(
            [
                Placed(
                    glyph,
                    at_x + (x - anchor_x) * cos_mm + (y - anchor_y) * sin_mm,
                    at_y + (y - anchor_y) * cos_mm - (x - anchor_x) * sin_mm,
                    em * height_mm,
                    angle_deg,
                )
                for glyph, x, y, em in spots
            ]
        ),
        style,
    )


def _require_height(height_mm: float) -> None:
    if not 0 < height_mm < math.inf:
        raise InputError(f"lettering {height_mm} mm high; the height must be above zero and finite")


def _set(text: str) -> _Line:
    try:
        return _set_numeral(text)
    except KeyError:
        return _set_shaped(text)


def _set_numeral(text: str) -> _Line:
    """Set a text of numeral characters alone; raise KeyError at any other."""
    advances, cap_units = _numeral_advances()
    inked = _numeral_glyphs()
    em = main_font().ems_per_cap
    spots: list[_Spot] = []
    pen = 0
    for character in text:
        if character != " ":
            spots.append((inked[character], pen / cap_units, 0.0, em))
        pen += advances[character]
    return spots, pen / cap_units


def _set_shaped(text: str) -> _Line:
    """Set any text, run by run, each in the first font that has its characters."""
    spots: list[_Spot] = []
    start = 0.0
    for font, characters in groupby(_normalised(text), key=lambda c: _font_or_refuse(c, text)):
        pen = 0
        for glyph_id, advance, x_units, y_units in font.shape("".join(characters)):
            glyph = font.glyph(glyph_id)
            if glyph.path:
                x = start + (pen + x_units) / font.cap_units
                spots.append((glyph, x, y_units / font.cap_units, font.ems_per_cap))
            pen += advance
        start += pen / font.cap_units
    return spots, start


def _ink_box(spots: list[_Spot]) -> tuple[float, float, float, float]:
    if not spots:
        return 0.0, 0.0, 0.0, 0.0
    left = bottom = math.inf
    right = top = -math.inf
    for glyph, x, y, em in spots:
        near, low, far, high = glyph.box
        # Plain comparisons, not calls of min and max: this runs for every label of a face.
        if (edge := x + near * em) < left:
            left = edge
        if (edge := y + low * em) < bottom:
            bottom = edge
        if (edge := x + far * em) > right:
            right = edge
        if (edge := y + high * em) > top:
            top = edge
    return left, bottom, right, top


def _normalised(text: str) -> str:
    """Return ``text`` with one code point for each sign that has two, and accents joined.

    Composition turns the ohm sign U+2126 into the capital omega U+03A9; the Greek mu U+03BC becomes
    the micro sign U+00B5, which is the one Barlow has.
    """
    composed = unicodedata.normalize("NFC", text)
    return composed.replace("\N{GREEK SMALL LETTER MU}", "\N{MICRO SIGN}")


def _font_or_refuse(character: str, text: str) -> Font:
    font = font_for(character)
    if font is None:
        raise CharacterError(character, text)
    return font


@cache
def _numeral_advances() -> tuple[dict[str, int], int]:
    """Return the advance of each numeral character, and the height of a capital, in font units."""
    font = main_font()
    return {c: advance for c in NUMERAL_CHARACTERS for _, advance, _, _ in font.shape(c)}, font.cap_units


@cache
def _numeral_glyphs() -> dict[str, Glyph]:
    """Return the glyph of each numeral character."""
    font = main_font()
    return {c: font.glyph(glyph_id) for c in NUMERAL_CHARACTERS for glyph_id, _, _, _ in font.shape(c)}
