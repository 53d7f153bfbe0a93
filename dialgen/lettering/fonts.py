"""Fonts: which characters one has, how it sets a run of text, what its letters look like.

HarfBuzz is loaded on first use, and an outline is read once for each glyph.  Every font is scaled
so that a capital is seven tenths of its em, as it is in Barlow; letters of all fonts are then
placed at one size.
"""

from __future__ import annotations

from collections.abc import Iterator
from functools import cached_property
from typing import TYPE_CHECKING

from dialgen.drawing import Glyph, PathStep
from dialgen.errors import InputError
from dialgen.lettering.paths import ink_box, moved
from dialgen.lettering.writing import FRACTION_SLASH

if TYPE_CHECKING:
    import uharfbuzz

EM_CAPS = 10 / 7
"""The em in heights of a capital, the same for every letter."""

INFINITY_CAPS = 0.65
"""How tall ∞ is at least, in heights of a capital; most fonts draw it no taller than a small letter."""

# Tabular digits are all equally wide, so a column or an arc of numerals stands even.
FEATURES = {"kern": True, "tnum": True}

Shaped = tuple[Glyph, float, float, float]
"""A glyph with its advance to the right and its offset in x and y, in font units."""

# Where a font lacks the first it may have the second, which looks the same.
_TWINS = {
    "\N{MICRO SIGN}": "\N{GREEK SMALL LETTER MU}",
    "\N{GREEK CAPITAL LETTER OMEGA}": "\N{OHM SIGN}",
    "\N{GREEK CAPITAL LETTER DELTA}": "\N{INCREMENT}",
}


class Font:
    """One font file, opened; its letters are filled outlines.

    Args:
        name: goes before the names of its glyphs, so that glyphs of two fonts differ.
        data: the bytes of a TrueType or OpenType file.

    Raises:
        InputError: what was given is no font, or has no capital H to be sized by.
    """

    def __init__(self, name: str, data: bytes) -> None:
        import uharfbuzz as hb

        face = hb.Face(hb.Blob(data))
        if not face.glyph_count:
            raise InputError(f"{name} is not a font; give a TrueType or OpenType file (.ttf or .otf)")
        self.name = name
        self._hb = hb.Font(face)
        self._pens = _outline_pens()
        self._glyphs: dict[int, Glyph] = {}
        self._taken: dict[int, tuple[Glyph, float]] = {}
        self._infinity = self._nominal("\N{INFINITY}")
        self._respelt = {
            ord(sign): twin
            for sign, twin in _TWINS.items()
            if self._nominal(sign) is None and self._nominal(twin) is not None
        }
        self.cap_units: float = self._height_of_h()
        """Height of a capital in font units."""
        self._em_units = self.cap_units * EM_CAPS

    def has(self, character: str) -> bool:
        """Return whether the font has a glyph for ``character``."""
        return ord(character) in self._respelt or self._nominal(character) is not None

    @cached_property
    def sets_fractions(self) -> bool:
        """Whether figures about a fraction slash come out small, raised before it and lowered after."""
        if not self.has(FRACTION_SLASH):
            return False
        names = [glyph.name for glyph, *_ in self.shape(f"1{FRACTION_SLASH}1")]
        return len(set(names)) == 3

    def shape(self, run: str) -> Iterator[Shaped]:
        """Yield the glyphs that write ``run``, from left to right, kerned."""
        import uharfbuzz as hb

        buffer = hb.Buffer()
        buffer.add_str(run.translate(self._respelt) if self._respelt else run)
        # Left alone, HarfBuzz would take the language of the machine, and a plate could differ.
        buffer.language = "en"
        buffer.guess_segment_properties()
        hb.shape(self._hb, buffer, FEATURES)
        for info, place in zip(buffer.glyph_infos, buffer.glyph_positions, strict=True):
            glyph, widening = self._taken.get(info.codepoint) or self._take(info.codepoint)
            yield glyph, place.x_advance * widening, place.x_offset, place.y_offset

    def glyph(self, glyph_id: int) -> Glyph:
        """Return the outline of a glyph; one without ink, such as the space, has an empty path."""
        found = self._glyphs.get(glyph_id)
        if found is None:
            path = tuple(
                (kind, tuple(n / self._em_units for n in numbers)) for kind, numbers in self._steps(glyph_id)
            )
            name = f"{self.name}-{self._hb.glyph_to_string(glyph_id)}"
            found = self._glyphs[glyph_id] = Glyph(name, path, ink_box(path))
        return found

    def _take(self, glyph_id: int) -> tuple[Glyph, float]:
        """Return a glyph as it is set, and how much wider it is set than drawn."""
        glyph = self.glyph(glyph_id)
        taken = _large(glyph) if glyph_id == self._infinity and glyph.path else (glyph, 1)
        return self._taken.setdefault(glyph_id, taken)

    def _nominal(self, character: str) -> int | None:
        found: int | None = self._hb.get_nominal_glyph(ord(character))
        return found

    def _steps(self, glyph_id: int) -> list[PathStep]:
        steps: list[PathStep] = []
        self._hb.draw_glyph(glyph_id, self._pens, steps)
        return steps

    def _height_of_h(self) -> float:
        """Return how tall a capital H is drawn, which some fonts' own tables tell wrongly or not at all."""
        glyph_id = self._nominal("H")
        height = 0.0 if glyph_id is None else ink_box(tuple(self._steps(glyph_id)))[3]
        if height <= 0:
            raise InputError(f"{self.name} has no outline of a capital H; choose a font of Latin letters")
        return height


def _large(infinity: Glyph) -> tuple[Glyph, float]:
    """Return ∞ as tall as it should be, about the middle of the digits, and how much wider it became."""
    _, bottom, _, top = infinity.box
    by = max(1.0, INFINITY_CAPS / EM_CAPS / (top - bottom))
    path = moved(infinity.path, (by, by), (0.0, 0.5 / EM_CAPS - by * (bottom + top) / 2))
    return Glyph(f"{infinity.name}.large", path, ink_box(path)), by


def _outline_pens() -> uharfbuzz.DrawFuncs:
    """Return HarfBuzz's callbacks that append each step to a list."""
    import uharfbuzz as hb

    pens = hb.DrawFuncs()
    pens.set_move_to_func(lambda x, y, steps: steps.append(("M", (x, y))))
    pens.set_line_to_func(lambda x, y, steps: steps.append(("L", (x, y))))
    pens.set_quadratic_to_func(lambda cx, cy, x, y, steps: steps.append(("Q", (cx, cy, x, y))))
    pens.set_cubic_to_func(lambda *numbers: numbers[6].append(("C", numbers[:6])))
    pens.set_close_path_func(lambda steps: steps.append(("Z", ())))
    return pens
