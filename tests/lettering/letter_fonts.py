"""Small fonts built with fontTools, and other ways to look at letters, for the tests of lettering."""

from __future__ import annotations

from pathlib import Path

import matplotlib
from fontTools.feaLib.builder import addOpenTypeFeaturesFromString
from fontTools.fontBuilder import FontBuilder
from fontTools.pens.boundsPen import BoundsPen
from fontTools.pens.t2CharStringPen import T2CharStringPen
from fontTools.pens.ttGlyphPen import TTGlyphPen

from dialgen.drawing import Style

INK = Style(fill="#000000")
FONTS = Path(matplotlib.get_data_path()) / "fonts" / "ttf"
DEJAVU = FONTS / "DejaVuSans.ttf"
"""A whole font: raised and lowered figures, Greek, no tabular figures needed, no small fractions."""

STIX = FONTS / "STIXGeneral.ttf"
"""A font with ¹ ² ³ and no other raised figure."""

EM = 2048
CAPITAL = 1400


def box(pen, left, bottom, right, top):
    """Draw a rectangle."""
    pen.moveTo((left, bottom))
    pen.lineTo((right, bottom))
    pen.lineTo((right, top))
    pen.lineTo((left, top))
    pen.closePath()


def bowl(pen, top=CAPITAL):
    """Draw a figure of two cubic curves that reach beyond all their ends."""
    pen.moveTo((100, top / 2))
    pen.curveTo((100, top * 1.2), (900, top * 1.2), (900, top / 2))
    pen.curveTo((900, -top * 0.2), (100, -top * 0.2), (100, top / 2))
    pen.closePath()


def build(path, characters, *, cubic=True, capital_table=True, kerns="", capital=CAPITAL):
    """Write a font that has ``characters``, all rectangles but O and 0 if cubic; return its path.

    A rectangle is as tall as a capital, 200 + 10 times its place in the list wide.
    """
    names = {c: f"uni{ord(c):04X}" for c in characters}
    builder = FontBuilder(EM, isTTF=not cubic)
    builder.setupGlyphOrder([".notdef", *names.values()])
    builder.setupCharacterMap({ord(c): name for c, name in names.items()})
    glyphs, metrics = {}, {}
    for index, (character, name) in enumerate([("", ".notdef"), *names.items()]):
        pen = T2CharStringPen(1000, None) if cubic else TTGlyphPen(None)
        if cubic and character in "O0" and character:
            bowl(pen, capital)
        elif character != " ":
            box(pen, 50, 0, 250 + 10 * index, capital)
        glyphs[name] = pen.getCharString() if cubic else pen.glyph()
        metrics[name] = (1000 if cubic and character in "O0" and character else 300 + 10 * index, 50)
    if cubic:
        builder.setupCFF("Own", {}, glyphs, {})
    else:
        builder.setupGlyf(glyphs)
    builder.setupHorizontalMetrics(metrics)
    builder.setupHorizontalHeader(ascent=1600, descent=-400)
    builder.setupNameTable({"familyName": "Own", "styleName": "Regular"})
    builder.setupOS2(**({"version": 4, "sCapHeight": capital} if capital_table else {"version": 1}))
    builder.setupPost()
    if kerns:
        addOpenTypeFeaturesFromString(builder.font, f"feature kern {{ {kerns} }} kern;")
    builder.save(path)
    return path


def bounds(font, name):
    """Return a glyph's exact bounds in font units, by fontTools."""
    outlines = font.getGlyphSet()
    pen = BoundsPen(outlines)
    outlines[name].draw(pen)
    return pen.bounds
