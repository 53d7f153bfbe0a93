"""Lettering: text to placed glyph outlines, and how much room it takes.

``measure`` tells the room a text takes, ``letters`` places it, and ``numeral_width`` is the quick
answer for numerals.  All three take the height of a digit or capital in millimetres.  Nothing is
kept by text: only facts of the fonts are, so the same call always does the same work.
"""

from dialgen.lettering.setting import NUMERAL_CHARACTERS, Extent, Fit, letters, measure, numeral_width

__all__ = ["NUMERAL_CHARACTERS", "Extent", "Fit", "letters", "measure", "numeral_width"]
