"""Single strokes: letters for an engraver's tool or a laser, which runs over each line once.

A letter is so scaled that with its stroke it is as tall as a capital of the other hands: the
centre line of an H runs from half a stroke's width above the baseline to half a width below the
capital height.  Raised and lowered figures are drawn with the same stroke as the rest.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from functools import cache
from itertools import repeat

from dialgen.drawing import Glyph
from dialgen.lettering.drawn import drawn
from dialgen.lettering.fonts import EM_CAPS, Shaped
from dialgen.lettering.paths import Steps, ink_box, moved
from dialgen.lettering.signs import CAPITAL, CLEAR, KERNS
from dialgen.lettering.writing import FRACTION, FRACTION_SLASH, LOWERED, RAISED

STROKE_WIDTH = 1 / 9
"""The width of a stroke in heights of a capital.

DOD-HDBK-791 recommends a sixth to an eighth for print (from memory); engravers cut a little finer.
"""

_BEARING = 0.07  # clear of ink to either side of a letter, in heights of a capital
_BLANKS = " \N{NO-BREAK SPACE}"
_BLANK = 0.42  # what a space advances, in heights of a capital
_KERNS = {pair: nearer * (1 - STROKE_WIDTH) / CAPITAL for pair, nearer in KERNS.items()}


@dataclass(frozen=True, slots=True)
class _Row:
    """Where figures of one kind stand: their foot, and how tall they are, in heights of a capital."""

    name: str
    foot: float
    tall: float


_ON_LINE = _Row("", 0.0, 1.0)
_ABOVE = _Row(".raised", 0.44, 0.64)
_BENEATH = _Row(".lowered", -0.24, 0.64)
_OVER = _Row(".over", 0.4, 0.6)
_UNDER = _Row(".under", 0.0, 0.6)

_PLAIN_FIGURES = "0123456789+−"
_SMALL_FIGURES = {
    **{sign: (plain, _ABOVE) for sign, plain in zip(RAISED, _PLAIN_FIGURES, strict=True)},
    **{sign: (plain, _BENEATH) for sign, plain in zip(LOWERED, _PLAIN_FIGURES, strict=True)},
}


class Strokes:
    """The stroke font, with the manners of a ``Font``."""

    name = "strokes"
    cap_units = 1.0
    sets_fractions = True

    def has(self, character: str) -> bool:
        """Return whether there are strokes for ``character``."""
        return character in _BLANKS or character in _SMALL_FIGURES or drawn(character) is not None

    def shape(self, run: str) -> Iterator[Shaped]:
        """Yield the glyphs that write ``run``, from left to right."""
        rows: Iterable[_Row | None] = repeat(None)
        if FRACTION.fullmatch(run):
            over, _, under = run.partition(FRACTION_SLASH)
            rows = (*[_OVER] * len(over), None, *[_UNDER] * len(under))
        for character, follower, row in zip(run, run[1:] + " ", rows, strict=False):
            glyph, advance = _glyph(character, row)
            yield glyph, advance + _KERNS.get(character + follower, 0.0), 0.0, 0.0


@cache
def _glyph(character: str, row: _Row | None) -> tuple[Glyph, float]:
    """Return a character's glyph in its own row, or the given one, and its advance."""
    plain, own = _SMALL_FIGURES.get(character, (character, _ON_LINE))
    row = row or own
    name = f"strokes-{ord(plain):04x}{row.name}"
    sign = drawn(plain)
    if sign is None:
        return Glyph(name, (), (0.0, 0.0, 0.0, 0.0), stroked=True), _BLANK
    # From the grid to heights of a capital; the stroke's own width comes on top of what is drawn.
    unit = (row.tall - STROKE_WIDTH) / CAPITAL
    left = _BEARING + STROKE_WIDTH / 2
    path = moved(sign.path, (unit, unit), (left - CLEAR * unit, row.foot + STROKE_WIDTH / 2))
    path = moved(path, (1 / EM_CAPS, 1 / EM_CAPS))
    return Glyph(name, path, _inked(path), stroked=True), 2 * left + (sign.width - 2 * CLEAR) * unit


def _inked(path: Steps) -> tuple[float, float, float, float]:
    """Return the box of a centre line widened by half a stroke."""
    left, bottom, right, top = ink_box(path)
    half = STROKE_WIDTH / 2 / EM_CAPS
    return left - half, bottom - half, right + half, top + half
