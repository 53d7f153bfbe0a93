"""Hands: a text in pieces, each with the face that writes it, and the quick facts for numerals."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property, lru_cache, partial
from itertools import groupby, product
from pathlib import Path
from unicodedata import category

from dialgen.drawing import Glyph
from dialgen.errors import CharacterError, InputError
from dialgen.lettering.faces import Face, Place, outline_order, stroke_order, unreadable
from dialgen.lettering.writing import FRACTION, NARROW_SPACES, normalised, spelt_out

NUMERAL_CHARACTERS = f"0123456789+\N{MINUS SIGN}.,\N{INFINITY} {NARROW_SPACES}"
"""The characters of numerals: where no two of them kern, they are set without the shaper."""


@dataclass(frozen=True, slots=True)
class Numerals:
    """The facts for setting numerals without the shaper.

    ``advances`` has every character that may be set so, in units of which ``cap_units`` make the
    height of a capital; ``inked`` has the glyphs of those that have ink.
    """

    advances: dict[str, float]
    inked: dict[str, Glyph]
    cap_units: float


class _Chosen(dict[str, Face | None]):
    """The first face that has each character, looked for when it is first asked for.

    Fonts do map a few control and format characters to empty glyphs; on a plate such a character is
    a slip, so no face counts as having it.
    """

    def __init__(self, order: tuple[Place, ...]) -> None:
        super().__init__()
        self._order = order

    def __missing__(self, character: str) -> Face | None:
        asked = () if category(character).startswith("C") else self._order
        found = (place.face_for(character) for place in asked)
        return self.setdefault(character, next((face for face in found if face), None))


@dataclass(frozen=True, eq=False)
class Hand:
    """A way of lettering: the fonts that are asked in turn, and whether letters are single strokes.

    Get one from ``hand``; there is one for each font file and one for strokes, so two are equal
    only if they are the same.  What it holds is for this room alone.
    """

    font: Path | None = None
    strokes: bool = False

    def __reduce__(self) -> tuple[object, tuple[()]]:
        """Pickle what the hand was asked for; opened fonts cannot be."""
        return partial(hand, self.font, strokes=self.strokes), ()

    def runs(self, text: str) -> Iterator[tuple[Face, str]]:
        """Yield ``text`` in pieces, each with the face that writes it; a fraction is its own piece.

        Raises:
            CharacterError: a character that no font has.
        """
        pieces = [text] if text.isascii() else FRACTION.split(normalised(text))
        for index, piece in enumerate(pieces):
            if index % 2 and not (len(piece) == 1 and self._main.has(piece)):
                yield self._fractions, spelt_out(piece)
                continue
            for face, characters in groupby(piece, self._chosen.__getitem__):
                run = "".join(characters)
                if face is None:
                    raise CharacterError(run[0], text)
                yield face, run

    def face_for(self, character: str) -> Face | None:
        """Return the first face that has ``character``, None when there is none."""
        return self._chosen[character]

    @cached_property
    def numerals(self) -> Numerals:
        """What the quick way of setting numerals needs; nothing where two of their characters kern."""
        cap_units = self._main.cap_units
        advances: dict[str, float] = {}
        inked: dict[str, Glyph] = {}
        # No two kern in Barlow, nor are strokes of figures moved: that need not be tried each time.
        if self.font is None or not self._kerns():
            for character in NUMERAL_CHARACTERS:
                if face := self.face_for(character):
                    ((glyph, advance, *_),) = face.shape(character)
                    same = face.cap_units == cap_units
                    advances[character] = advance if same else advance * cap_units / face.cap_units
                    if glyph.path:
                        inked[character] = glyph
        return Numerals(advances, inked, cap_units)

    def _kerns(self) -> bool:
        """Return whether any two characters of numerals stand otherwise than one after the other."""
        found = ((character, self.face_for(character)) for character in NUMERAL_CHARACTERS)
        alone = [(character, face, list(face.shape(character))) for character, face in found if face]
        plain = all(len(shaped) == 1 and shaped[0][2:] == (0, 0) for *_, shaped in alone)
        return not plain or any(
            list(face.shape(one + other)) != first + second
            for (one, face, first), (other, same, second) in product(alone, repeat=2)
            if face is same
        )

    @cached_property
    def _chosen(self) -> _Chosen:
        return _Chosen(self._order)

    @cached_property
    def _main(self) -> Face:
        return next(place.open() for place in self._order if not place.only)

    @cached_property
    def _fractions(self) -> Face:
        faces = (place.open() for place in self._order if not place.only)
        return next(face for face in faces if face.sets_fractions)

    @cached_property
    def _order(self) -> tuple[Place, ...]:
        return stroke_order() if self.strokes else outline_order(self.font)


PLAIN = Hand()
"""The hand of the plate: filled outlines, from the fonts that come with dialgen."""

_ENGRAVED = Hand(strokes=True)


def hand(font: Path | None = None, *, strokes: bool = False) -> Hand:
    """Return a hand; the same one whenever the same is asked for, unless the font file has changed.

    Args:
        font: a TrueType or OpenType file to be asked first, before the fonts of the plain hand.
        strokes: single strokes instead of filled outlines, for engraving.

    Raises:
        InputError: a file that cannot be read, is no font or has no capital H; a font and strokes.

    >>> hand() is PLAIN
    True
    """
    if font is None:
        return _ENGRAVED if strokes else PLAIN
    if strokes:
        raise InputError(f"{font} has outlines, not single strokes; leave out either the font or the strokes")
    try:
        found = font.stat()
    except OSError as error:
        raise unreadable(font, error) from error
    return _hand_of(font, found.st_dev, found.st_ino, found.st_mtime_ns, found.st_size)


@lru_cache(maxsize=32)
def _hand_of(font: Path, *_stamp: int) -> Hand:
    made = Hand(font)
    made.face_for("H")  # opens the file, so that one that is no font is refused here
    return made
