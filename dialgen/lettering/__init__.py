"""Lettering: text to placed glyphs, and how much room it takes.

``measure`` tells the room a text takes, ``letters`` places it, and ``numeral_width`` is the quick
answer for numerals.  All three take the height of a digit or capital in millimetres, and the hand
to letter in: ``PLAIN``, or one that ``hand`` makes of a font file or of single strokes for
engraving.  Nothing is kept by text: only facts of the fonts are, so the same call always does the
same work.
"""

from dialgen.lettering.edges import ink_points
from dialgen.lettering.fonts import EM_CAPS
from dialgen.lettering.hands import NUMERAL_CHARACTERS, PLAIN, Hand, hand
from dialgen.lettering.setting import Extent, Fit, letters, measure, numeral_width
from dialgen.lettering.strokes import STROKE_WIDTH
from dialgen.lettering.writing import raised

__all__ = [
    "EM_CAPS",
    "NUMERAL_CHARACTERS",
    "PLAIN",
    "STROKE_WIDTH",
    "Extent",
    "Fit",
    "Hand",
    "hand",
    "ink_points",
    "letters",
    "measure",
    "numeral_width",
    "raised",
]
