"""Single strokes: the library's own rendering, and what an engraver's tool must be able to do."""

import math
from itertools import pairwise

import numpy as np
import pytest
from fontTools.pens.boundsPen import BoundsPen
from HersheyFonts import HersheyFonts
from hypothesis import given
from hypothesis import strategies as st
from letter_fonts import INK

from dialgen.drawing import Cap, Style
from dialgen.errors import CharacterError
from dialgen.lettering import (
    NUMERAL_CHARACTERS,
    PLAIN,
    STROKE_WIDTH,
    Fit,
    hand,
    letters,
    measure,
    numeral_width,
)
from dialgen.lettering.setting import _set_numeral, _set_shaped

STROKES = hand(strokes=True)
ASCII = "".join(map(chr, range(0x21, 0x7F)))
SIGNS = "−∞Ωµ°±~√φ·×÷‰ΔπαβγλτθΣδ–—⁄≈≤≥’ßøØ" + "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻₀₁₂₃₄₅₆₇₈₉₊₋" + "éèäöüñçåÅÉÖÜîïšőÿíij"
EVERYTHING = ASCII + SIGNS
FLAT = "HEFILTZ147"


def glyph(character):
    """Return the one glyph that a character is drawn with."""
    (placed,) = letters(character, 1.0, (0.0, 0.0), INK, hand=STROKES).glyphs
    return placed.glyph


def curves(path, pieces=24):
    """Return each stroke as arrays of points along its lines and curves, in capital heights."""
    strokes = []
    for kind, numbers in path:
        points = np.array(numbers).reshape(-1, 2) * (10 / 7)
        if kind == "M":
            strokes.append([points])
            continue
        level = [np.broadcast_to(p, (pieces + 1, 2)) for p in [strokes[-1][-1][-1], *points]]
        t = np.linspace(0, 1, pieces + 1)[:, None]
        while len(level) > 1:
            level = [(1 - t) * a + t * b for a, b in pairwise(level)]
        strokes[-1].append(level[0])
    return [np.vstack(stroke) for stroke in strokes]


def distance(points, corners):
    """Return the distance of each point from the broken line through ``corners``."""
    start, along = corners[:-1], np.diff(corners, axis=0)
    length2 = np.maximum((along**2).sum(axis=1), 1e-300)
    t = np.clip(((points[:, None] - start) * along).sum(axis=2) / length2, 0, 1)
    return np.linalg.norm(points[:, None] - start - t[:, :, None] * along, axis=2).min(axis=1)


class TestShapes:
    """What is drawn."""

    @pytest.mark.parametrize("character", EVERYTHING)
    def test_open_strokes(self, character):
        """Every sign is strokes that are never closed or filled, with ink of some size."""
        found = glyph(character)
        assert found.stroked
        assert {kind for kind, _ in found.path} <= {"M", "L", "Q", "C"}
        assert found.path[0][0] == "M"
        assert measure(character, 1.0, hand=STROKES).right > 0

    @pytest.mark.parametrize("character", [c for c in ASCII if c.isalpha()])
    def test_letters_are_the_librarys(self, character):
        """Letters are the library's strokes, nowhere off by a fortieth of a capital, from end to end."""
        library = HersheyFonts()
        library.load_default_font("futural")
        # Theirs is 21 units to the capital, y down, and is narrowed to 0.85; a centre line is 8/9 tall.
        unit = (1 - STROKE_WIDTH) / 21
        theirs = [
            np.array(stroke) * (0.85 * unit, -unit) + (0, 9 * unit + STROKE_WIDTH / 2)
            for stroke in library.all_glyphs[character].strokes
        ]
        ours = curves(glyph(character).path)
        shift = np.vstack(ours)[:, 0].min() - np.vstack(theirs)[:, 0].min()
        for mine, stroke in zip(ours, theirs, strict=True):
            there = np.add(stroke, (shift, 0))
            assert distance(mine, there).max() < 1 / 40
            assert distance(there, mine).max() < 1 / 40
            if not np.array_equal(stroke[0], stroke[-1]):
                assert mine[-1] - mine[0] == pytest.approx(there[-1] - there[0], abs=1e-9)

    @pytest.mark.parametrize("character", "036895OCGQSDBaeosΩ∞φθµ°")
    def test_round_where_round(self, character):
        """On a round stroke no two neighbouring pieces meet at an angle, but where one is meant."""
        meant = {"3": 2, "5": 2, "Ω": 4, "B": 2, "D": 2, "G": 1, "e": 2}
        sharp = 0
        for stroke in curves(glyph(character).path, pieces=60):
            steps = np.diff(stroke, axis=0)
            steps = steps[np.hypot(*steps.T) > 1e-9]
            ends = np.vstack([steps, steps[:1]]) if np.allclose(stroke[0], stroke[-1]) else steps
            turns = np.degrees(np.abs(np.diff(np.unwrap(np.arctan2(ends[:, 1], ends[:, 0])))))
            sharp += int((turns > 12).sum())
        assert sharp <= meant.get(character, 0)

    @pytest.mark.parametrize("character", EVERYTHING)
    def test_no_line_twice(self, character):
        """No two strokes, nor two parts of one, run along each other: a laser would burn twice."""
        pieces = []
        for stroke in curves(glyph(character).path):
            steps = np.diff(stroke, axis=0)
            long = np.hypot(*steps.T) > 1e-9
            middles, ways = (stroke[:-1] + steps / 2)[long], steps[long] / np.hypot(*steps[long].T)[:, None]
            pieces += zip(middles, ways, np.hypot(*steps[long].T), strict=True)
        middles, ways = np.array([p[0] for p in pieces]), np.array([p[1] for p in pieces])
        lengths = np.array([p[2] for p in pieces])
        (x, y) = ways.T
        across = np.abs(x[:, None] * y - y[:, None] * x)
        near = np.linalg.norm(middles[:, None] - middles, axis=2)
        together = (across < 0.02) & (near < np.minimum(lengths[:, None], lengths) * 0.45)
        np.fill_diagonal(together, False)
        assert not together.any()

    @pytest.mark.parametrize(
        ("accented", "plain"), [("é", "e"), ("Ö", "O"), ("ü", "u"), ("å", "a"), ("ç", "c")]
    )
    def test_accents(self, accented, plain):
        """An accented letter is the letter itself with its accent clear of it, and as wide."""
        base, whole = glyph(plain), glyph(accented)
        assert whole.path[: len(base.path)] == base.path
        mark = np.vstack(curves(whole.path[len(base.path) :]))
        clear = distance(mark, np.vstack(curves(base.path))).min()
        assert clear > STROKE_WIDTH or accented == "ç"
        assert measure(accented, 1.0, hand=STROKES).width_mm == measure(plain, 1.0, hand=STROKES).width_mm

    def test_accent_in_place_of_the_dot(self):
        """The i with two dots has just these two, and one with an accent below would keep its own."""
        assert len(curves(glyph("ï").path)) == 3
        assert len(curves(glyph("i").path)) == 2

    @pytest.mark.parametrize(
        ("small", "plain"), list(zip("⁰¹²³⁴⁵⁶⁷⁸⁹₀₁₂₃₄₅₆₇₈₉", "0123456789" * 2, strict=True))
    )
    def test_small_figures(self, small, plain):
        """Raised and lowered figures are the figures themselves, evenly smaller and moved."""
        large = np.vstack(curves(glyph(plain).path))
        found = np.vstack(curves(glyph(small).path))
        by = np.ptp(found[:, 1]) / np.ptp(large[:, 1])
        assert by == pytest.approx((0.64 - STROKE_WIDTH) / (1 - STROKE_WIDTH))
        assert found - found[0] == pytest.approx((large - large[0]) * by)

    @pytest.mark.parametrize("character", ["漢", "Я", "ệ", "\n", "\u200b"])
    def test_missing(self, character):
        """A character without strokes is an error that names it; no outline stands in for it."""
        with pytest.raises(CharacterError) as caught:
            letters(f"5 {character}", 1.0, (0.0, 0.0), INK, hand=STROKES)
        assert caught.value.character == character


class TestSetting:
    """How strokes are set."""

    def test_colour_and_width(self):
        """Strokes take the colour of the fill, a ninth of the height, and round ends."""
        found = letters("10", 2.7, (0.0, 0.0), Style(fill="#336699"), hand=STROKES)
        assert found.style == Style(stroke="#336699", width_mm=pytest.approx(0.3), cap=Cap.ROUND)
        plain = letters("10", 2.7, (0.0, 0.0), Style(fill="#336699"))
        assert plain.style == Style(fill="#336699")

    @pytest.mark.parametrize("character", FLAT)
    def test_height_with_the_stroke(self, character):
        """With its stroke a capital or digit is exactly as tall as asked, as in the plain hand."""
        extent = measure(character, 2.2, hand=STROKES)
        assert (extent.bottom, extent.top) == pytest.approx((0.0, 2.2), abs=1e-9)

    @pytest.mark.parametrize("character", "0235689OCGSQ")
    def test_height_of_round_ones(self, character):
        """Round capitals and digits reach both lines too, within a hundredth."""
        extent = measure(character, 1.0, hand=STROKES)
        assert extent.top == pytest.approx(1.0, abs=0.01)
        assert extent.bottom == pytest.approx(0.0, abs=0.01) or character == "Q"

    @pytest.mark.parametrize("character", EVERYTHING)
    def test_box_has_half_the_stroke(self, character):
        """The ink box is fontTools' exact bounds of the centre line and half a stroke all round."""
        pen = BoundsPen(None)
        draw = {"M": pen.moveTo, "L": pen.lineTo, "Q": pen.qCurveTo, "C": pen.curveTo}
        found = glyph(character)
        for kind, numbers in found.path:
            if kind == "M" and pen.bounds:
                pen.endPath()
            draw[kind](*zip(numbers[::2], numbers[1::2], strict=True))
        half = STROKE_WIDTH / 2 * 0.7
        left, bottom, right, top = pen.bounds
        assert found.box == pytest.approx((left - half, bottom - half, right + half, top + half), abs=1e-9)

    def test_even_figures(self):
        """All digits are equally wide, and their ink is clear of its neighbours."""
        assert len({numeral_width(digit, 1.0, hand=STROKES) for digit in "0123456789"}) == 1
        for digit in "0123456789":
            extent = measure(digit, 1.0, hand=STROKES)
            assert extent.left > 0.04
            assert extent.width_mm - extent.right > 0.04

    @given(st.text(alphabet=NUMERAL_CHARACTERS, max_size=10))
    def test_fast_path(self, text):
        """Numerals are set by the fast path as in full."""
        (quick, width), (shaped, same) = _set_numeral(text, STROKES), _set_shaped(text, STROKES)
        assert width == pytest.approx(same, abs=1e-12)
        assert [g.name for g, *_ in quick] == [g.name for g, *_ in shaped]
        assert [x for _, x, _ in quick] == pytest.approx([x for _, x, _ in shaped], abs=1e-12)

    def test_pairs_that_gape(self):
        """AV stands nearer than its letters' widths, and still does not touch."""
        apart = measure("A", 1.0, hand=STROKES).width_mm + measure("V", 1.0, hand=STROKES).width_mm
        assert apart - measure("AV", 1.0, hand=STROKES).width_mm == pytest.approx(2 / 21 * (1 - STROKE_WIDTH))
        a, v = letters("AV", 1.0, (0.0, 0.0), INK, hand=STROKES).glyphs
        legs = [np.add(np.vstack(curves(p.glyph.path)), (p.x, p.y)) for p in (a, v)]
        assert distance(legs[0], legs[1]).min() > 1.5 * STROKE_WIDTH

    def test_fits_share_the_line(self):
        """With Fit.LINE strokes stand on the same lines as outlines."""
        for of in (STROKES, PLAIN):
            (placed,) = letters("H", 3.0, (0.0, 5.0), INK, anchor=(0.5, 0.0), fit=Fit.LINE, hand=of).glyphs
            assert placed.y + placed.glyph.box[1] * placed.size_mm == pytest.approx(5.0)
            assert placed.y + placed.glyph.box[3] * placed.size_mm == pytest.approx(8.0)
            assert math.isclose(placed.size_mm, 30 / 7)
