"""The two fonts: which characters they have, how a run of text is set, what a glyph looks like.

Barlow Semi Condensed Medium is the hand of the plate: narrow, plain, near to the DIN lettering of
meters.  What it lacks (phi and other Greek, subscript digits, Cyrillic) comes from Fira Sans
Condensed Regular: its stems are 93 thousandths of an em where Barlow Medium has 96, while those
of Fira's own Medium are 130 and would stand out as bold.

HarfBuzz and the font files are loaded on first use, and an outline is read once for each glyph.
"""

from __future__ import annotations

import unicodedata
from collections.abc import Iterator
from functools import cache
from typing import TYPE_CHECKING

from dialgen.drawing import Glyph, PathStep

if TYPE_CHECKING:
    import uharfbuzz

# Tabular digits are all equally wide, so a column or an arc of numerals stands even.
FEATURES = {"kern": True, "tnum": True}

Shaped = tuple[int, int, int, int]
"""A glyph id with its advance to the right and its offset in x and y, in font units."""


class Font:
    """One font file, opened.

    Args:
        name: goes before the names of its glyphs, so that glyphs of two fonts differ.
        data: the bytes of a TrueType file.
    """

    def __init__(self, name: str, data: bytes) -> None:
        import uharfbuzz as hb

        face = hb.Face(hb.Blob(data))
        self.name = name
        self._hb = hb.Font(face)
        self._units_per_em: int = face.upem
        self._pens = _outline_pens()
        self._glyphs: dict[int, Glyph] = {}
        self.cap_units: int = self._hb.get_metric_position(hb.OTMetricsTag.CAP_HEIGHT)
        """Height of a capital in font units; in both fonts a capital H is exactly this tall."""
        self.ems_per_cap: float = self._units_per_em / self.cap_units
        """The em, measured in heights of a capital."""

    def has(self, character: str) -> bool:
        """Return whether the font has a glyph for ``character``."""
        return self._hb.get_nominal_glyph(ord(character)) is not None

    def shape(self, run: str) -> Iterator[Shaped]:
        """Yield the glyphs that write ``run``, from left to right, kerned."""
        import uharfbuzz as hb

        buffer = hb.Buffer()
        buffer.add_str(run)
        # Left alone, HarfBuzz would take the language of the machine, and a plate could differ.
        buffer.language = "en"
        buffer.guess_segment_properties()
        hb.shape(self._hb, buffer, FEATURES)
        for info, place in zip(buffer.glyph_infos, buffer.glyph_positions, strict=True):
            yield info.codepoint, place.x_advance, place.x_offset, place.y_offset

    def glyph(self, glyph_id: int) -> Glyph:
        """Return the outline of a glyph; one without ink, such as the space, has an empty path."""
        found = self._glyphs.get(glyph_id)
        if found is None:
            found = self._glyphs[glyph_id] = self._read(glyph_id)
        return found

    def _read(self, glyph_id: int) -> Glyph:
        steps: list[PathStep] = []
        self._hb.draw_glyph(glyph_id, self._pens, steps)
        path = tuple((kind, tuple(n / self._units_per_em for n in numbers)) for kind, numbers in steps)
        return Glyph(f"{self.name}-{self._hb.glyph_to_string(glyph_id)}", path, ink_box(path))


_FILES = (
    ("barlow", "fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Medium.ttf"),
    ("fira", "fontpkg_fira_sans_condensed", "FiraSansCondensed-Regular.ttf"),
)


def fonts() -> Iterator[Font]:
    """Yield the fonts, the one to ask first at the front; each is opened when it is first reached."""
    yield from map(_open, range(len(_FILES)))


def main_font() -> Font:
    """Return the font that is asked first."""
    return _open(0)


@cache
def font_for(character: str) -> Font | None:
    """Return the first font that has ``character``, None when there is none.

    The fonts do map a few control and format characters to empty glyphs; on a plate such a
    character is a slip, so none counts as having it.
    """
    if unicodedata.category(character).startswith("C"):
        return None
    return next((font for font in fonts() if font.has(character)), None)


def ink_box(path: tuple[PathStep, ...]) -> tuple[float, float, float, float]:
    """Return the left, bottom, right and top of the curves themselves; zeros for an empty path.

    The box in a font file spans the control points, which may lie beyond the curve.

    >>> ink_box((("M", (0.0, 0.0)), ("Q", (1.0, 2.0, 2.0, 0.0)), ("Z", ())))
    (0.0, 0.0, 2.0, 1.0)
    """
    if not path:
        return 0.0, 0.0, 0.0, 0.0
    left, right = _span([numbers[0::2] for _, numbers in path if numbers])
    bottom, top = _span([numbers[1::2] for _, numbers in path if numbers])
    return left, bottom, right, top


def _span(steps: list[tuple[float, ...]]) -> tuple[float, float]:
    """Return the least and the greatest of one coordinate along M, L and Q steps."""
    reached = [step[-1] for step in steps]
    for start, (*control, end) in zip(reached, steps[1:], strict=False):
        # A quadratic curve turns back only if its control point lies beyond both of its ends,
        # at t = (start - c) / (start - 2 c + end); put into the curve, that gives the value below.
        for c in control:
            if not min(start, end) <= c <= max(start, end):
                reached.append((start * end - c * c) / (start - 2 * c + end))
    return min(reached), max(reached)


@cache
def _open(index: int) -> Font:
    from importlib.resources import files

    name, package, file = _FILES[index]
    return Font(name, (files(package) / "files" / file).read_bytes())


def _outline_pens() -> uharfbuzz.DrawFuncs:
    """Return HarfBuzz's callbacks that append each step to a list; TrueType has no cubic curves."""
    import uharfbuzz as hb

    pens = hb.DrawFuncs()
    pens.set_move_to_func(lambda x, y, steps: steps.append(("M", (x, y))))
    pens.set_line_to_func(lambda x, y, steps: steps.append(("L", (x, y))))
    pens.set_quadratic_to_func(lambda cx, cy, x, y, steps: steps.append(("Q", (cx, cy, x, y))))
    pens.set_close_path_func(lambda steps: steps.append(("Z", ())))
    return pens
