"""Faces: whoever writes characters, and the order in which the built-in ones are asked.

Barlow Semi Condensed Medium is the letter of the plate: narrow, plain, near to the DIN lettering of
meters.  A few signs are better taken elsewhere:

- % from its Bold: Medium draws the rings 57 units thick beside figures of 83 to 96, Bold 79;
  ‰, with narrower rings, from its SemiBold;
- ∞ from its Regular, which, made as tall as it should be, has strokes of 82;
- raised and lowered figures, Greek and Cyrillic from Fira Sans Condensed Regular.  Barlow has no
  ⁰, no ⁻ and nothing lowered, and the figures of a plate must match.  Fira Regular's stems are 93
  thousandths of an em where Barlow Medium has 96; those of its own Medium are 130.

Files are opened when they are first reached.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator
from dataclasses import dataclass
from functools import cache, partial
from importlib.resources import files
from pathlib import Path
from typing import Protocol

from dialgen.drawing import Glyph
from dialgen.errors import InputError
from dialgen.lettering.fonts import Font, Shaped
from dialgen.lettering.writing import LOWERED, NARROW_SPACES, RAISED

NARROW_SPACE = 0.17
"""What a narrow space advances, in heights of a capital: it parts groups of three figures."""


class Face(Protocol):
    """What a hand asks for letters: an outline font, or the strokes."""

    name: str
    cap_units: float

    def has(self, character: str) -> bool:
        """Return whether it can write ``character``."""

    def shape(self, run: str) -> Iterable[Shaped]:
        """Return the glyphs that write ``run``, from left to right."""

    @property
    def sets_fractions(self) -> bool:
        """Whether figures about a fraction slash, shaped alone, come out as a fraction."""


@dataclass(frozen=True, slots=True)
class Place:
    """A place in the order: who is asked there, for which characters alone, and for which never."""

    open: Callable[[], Face]
    only: str = ""
    never: str = ""

    def face_for(self, character: str) -> Face | None:
        """Return the face if it is to write ``character``, opened for that."""
        if character in self.never or (self.only and character not in self.only):
            return None
        face = self.open()
        return face if face.has(character) else None


def stroke_order() -> tuple[Place, ...]:
    """Return who is asked for single strokes."""
    return _GAPS, Place(_strokes)


def outline_order(font: Path | None) -> tuple[Place, ...]:
    """Return who is asked for outlines, a font of one's own before the built-in ones.

    Raises:
        InputError: a file that cannot be read, is no font or has no capital H.
    """
    own = () if font is None else (_own_place(_from_file(font)),)
    return (
        _GAPS,
        *own,
        Place(partial(_opened, "barlow-bold"), only="%"),
        Place(partial(_opened, "barlow-semibold"), only="‰"),
        Place(partial(_opened, "barlow-regular"), only="\N{INFINITY}"),
        Place(partial(_opened, "fira"), only=RAISED + LOWERED),
        Place(partial(_opened, "barlow")),
        Place(partial(_opened, "fira")),
    )


def unreadable(font: Path, error: OSError) -> InputError:
    """Return what to tell of a font file that cannot be read."""
    reason = (error.strerror or "it cannot be read").lower()
    return InputError(f"the font {font} cannot be read: {reason}; give the path of a .ttf or .otf file")


def _own_place(font: Font) -> Place:
    # Many fonts have ² and ³ and no other: then all raised figures come from elsewhere.
    never = "".join(row for row in (RAISED, LOWERED) if not all(map(font.has, row)))
    return Place(lambda: font, never=never)


def _from_file(path: Path) -> Font:
    try:
        data = path.read_bytes()
    except OSError as error:
        raise unreadable(path, error) from error
    return Font(str(path), data)


class _Gaps:
    """Narrow spaces, which few fonts have: equally narrow in every hand."""

    name = "gaps"
    cap_units = 1.0
    sets_fractions = False

    def has(self, character: str) -> bool:
        return character in NARROW_SPACES

    def shape(self, run: str) -> Iterator[Shaped]:
        for _ in run:
            yield Glyph(self.name, (), (0.0, 0.0, 0.0, 0.0)), NARROW_SPACE, 0.0, 0.0


_GAPS = Place(_Gaps, only=NARROW_SPACES)

_FILES = {
    "barlow": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Medium.ttf"),
    "barlow-bold": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Bold.ttf"),
    "barlow-semibold": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-SemiBold.ttf"),
    "barlow-regular": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Regular.ttf"),
    "fira": ("fontpkg_fira_sans_condensed", "FiraSansCondensed-Regular.ttf"),
}


@cache
def _opened(name: str) -> Font:
    package, file = _FILES[name]
    return Font(name, (files(package) / "files" / file).read_bytes())


@cache
def _strokes() -> Face:
    from dialgen.lettering.strokes import Strokes

    return Strokes()
