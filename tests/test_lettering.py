"""Lettering: fontTools, reading the same font files, is the outside truth."""

import math
import subprocess
import sys
import unicodedata
from functools import cache
from importlib.resources import files
from itertools import product

import pytest
from fontTools.pens.basePen import BasePen
from fontTools.pens.boundsPen import BoundsPen
from fontTools.ttLib import TTFont
from hypothesis import given
from hypothesis import strategies as st

from dialgen.drawing import Glyph, Letters, Style
from dialgen.errors import CharacterError, InputError
from dialgen.lettering import NUMERAL_CHARACTERS, PLAIN, Extent, Fit, letters, measure, numeral_width
from dialgen.lettering.fonts import Font
from dialgen.lettering.setting import _set_numeral, _set_shaped

INK = Style(fill="#000000")
CAP_UNITS = {"barlow-bold": 700, "barlow-semibold": 700, "barlow-regular": 700, "barlow": 700, "fira": 688}
FILES = {
    "barlow": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Medium.ttf"),
    "barlow-bold": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Bold.ttf"),
    "barlow-semibold": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-SemiBold.ttf"),
    "barlow-regular": ("fontpkg_barlow_semi_condensed", "BarlowSemiCondensed-Regular.ttf"),
    "fira": ("fontpkg_fira_sans_condensed", "FiraSansCondensed-Regular.ttf"),
}
# Barlow lettering of this height has one millimetre to the font unit.
UNIT_HEIGHT_MM = float(CAP_UNITS["barlow"])

numerals = st.text(alphabet=NUMERAL_CHARACTERS, max_size=12)
# Every font, accents, kerning pairs and blanks.
words = st.text(alphabet="0123456789−.,∞ \u202f+AVToygkΩµ°%‰φ₁²½⅓⁄ÄЯ", max_size=12)
heights = st.floats(0.5, 50.0)
places = st.tuples(st.floats(-200.0, 200.0), st.floats(-200.0, 200.0))
fractions = st.tuples(st.floats(0.0, 1.0), st.floats(0.0, 1.0))
angles = st.floats(-360.0, 360.0)


@cache
def truth(font_name):
    """Return the font file as fontTools reads it."""
    package, file = FILES[font_name]
    return TTFont(str(files(package) / "files" / file))


@cache
def opened(font_name):
    """Return the font file as lettering opens it."""
    package, file = FILES[font_name]
    return Font(font_name, (files(package) / "files" / file).read_bytes())


def only_glyph(text):
    """Return the one glyph that ``text`` is drawn with."""
    (placed,) = letters(text, 1.0, (0.0, 0.0), INK).glyphs
    return placed.glyph


def font_and_name(glyph):
    """Return a glyph's font, its name there, and the name of the font."""
    font_name = next(name for name in CAP_UNITS if glyph.name.startswith(f"{name}-"))
    return truth(font_name), glyph.name.removeprefix(f"{font_name}-"), font_name


def true_bounds(glyph):
    """Return a glyph's exact bounds in ems of 10/7 capitals, by fontTools.

    An enlarged ∞ is 0.65 capitals tall about the middle of the digits, and wider by as much.
    """
    font, name, font_name = font_and_name(glyph)
    outlines = font.getGlyphSet()
    pen = BoundsPen(outlines)
    outlines[name.removesuffix(".large")].draw(pen)
    left, bottom, right, top = (n / CAP_UNITS[font_name] * 0.7 for n in pen.bounds or (0, 0, 0, 0))
    if name.endswith(".large"):
        by = 0.65 * 0.7 / (top - bottom)
        left, bottom, right, top = left * by, 0.35 - 0.325 * 0.7, right * by, 0.35 + 0.325 * 0.7
    return left, bottom, right, top


def true_ink(set_text: Letters):
    """Return the ink box of upright letters, from fontTools' bounds of each glyph."""
    boxes = []
    for placed in set_text.glyphs:
        left, bottom, right, top = (n * placed.size_mm for n in true_bounds(placed.glyph))
        boxes.append((placed.x + left, placed.y + bottom, placed.x + right, placed.y + top))
    lefts, bottoms, rights, tops = zip(*boxes, strict=True)
    return min(lefts), min(bottoms), max(rights), max(tops)


class PathPen(BasePen):
    """Write an outline down as PathStep does; fontTools puts in the implied on-curve points."""

    def __init__(self, glyphs):
        super().__init__(glyphs)
        self.path = []

    def _moveTo(self, point):  # noqa: N802 (the name is fontTools')
        self.path.append(("M", point))

    def _lineTo(self, point):  # noqa: N802
        self.path.append(("L", point))

    def _qCurveToOne(self, control, point):  # noqa: N802
        self.path.append(("Q", control + point))

    def _closePath(self):  # noqa: N802
        self.path.append(("Z", ()))


def contours(path):
    """Return each contour's edges with both their ends, from its least edge on.

    A contour may be written down from any of its points, and its last straight edge left to Z.
    """
    done = []
    for kind, numbers in path:
        if kind == "M":
            edges, home, here = [], numbers, numbers
        elif kind == "Z":
            edges += [("L", here, home)] if here != home else []
            least = edges.index(min(edges))
            done.append(edges[least:] + edges[:least])
        else:
            edges.append((kind, here, numbers))
            here = numbers[-2:]
    return done


def true_kern(font, left, right):
    """Return the kerning of two glyphs by the font's GPOS pair tables, in font units."""
    gpos = font["GPOS"].table
    wanted = {
        i for r in gpos.FeatureList.FeatureRecord if r.FeatureTag == "kern" for i in r.Feature.LookupListIndex
    }
    return sum(pair_kern(gpos.LookupList.Lookup[index], left, right) for index in wanted)


def pair_kern(lookup, left, right):
    """Return what one lookup's first subtable for the pair adds between its glyphs."""
    for subtable in lookup.SubTable:
        pair = getattr(subtable, "ExtSubTable", subtable)
        if left not in pair.Coverage.glyphs:
            continue
        if pair.Format == 1:
            for record in pair.PairSet[pair.Coverage.glyphs.index(left)].PairValueRecord:
                if record.SecondGlyph == right:
                    return record.Value1.XAdvance
        else:
            row = pair.Class1Record[pair.ClassDef1.classDefs.get(left, 0)]
            return row.Class2Record[pair.ClassDef2.classDefs.get(right, 0)].Value1.XAdvance
    return 0


class TestFonts:
    """The outlines, advances and kerns are those in the font files."""

    @pytest.mark.parametrize("font_name", ["barlow", "fira"])
    def test_outlines_and_boxes(self, font_name):
        """Every glyph of both fonts has fontTools' outline and, to the exact curve, its bounds."""
        font, file = opened(font_name), truth(font_name)
        outlines = file.getGlyphSet()
        em = CAP_UNITS[font_name] * (10 / 7)
        for glyph_id, name in enumerate(file.getGlyphOrder()):
            glyph = font.glyph(glyph_id)
            pen = PathPen(outlines)
            outlines[name].draw(pen)
            expected = [(kind, tuple(n / em for n in numbers)) for kind, numbers in pen.path]
            assert glyph.name == f"{font_name}-{name}"
            assert contours(glyph.path) == contours(expected), name
            assert glyph.box == pytest.approx(true_bounds(glyph), abs=1e-12), name

    @pytest.mark.parametrize("font_name", ["barlow", "fira"])
    def test_glyph_names_differ(self, font_name):
        """No two glyphs of a font share a name, so a drawing can tell them apart by it."""
        font = opened(font_name)
        count = len(truth(font_name).getGlyphOrder())
        assert len({font.glyph(i).name for i in range(count)}) == count

    def test_an_outline_is_read_once(self):
        """Two texts with the same letter share one Glyph object."""
        assert only_glyph("Ω") is only_glyph("Ω")

    @pytest.mark.parametrize("font_name", ["barlow", "fira"])
    def test_advances(self, font_name):
        """A character alone is as wide as hmtx says, each font sized to the same capital height."""
        hmtx = truth(font_name)["hmtx"]
        checked = 0
        for code in truth(font_name).getBestCmap():
            character = chr(code)
            written_otherwise = character in "μ⋅" or unicodedata.normalize("NFC", character) != character
            face = PLAIN.face_for(character)
            if written_otherwise or not face or face.name != font_name or not only_or_none(character):
                continue
            _, name, _ = font_and_name(only_glyph(character))
            expected = hmtx[name][0] / CAP_UNITS[font_name]
            assert measure(character, 1.0).width_mm == pytest.approx(expected, abs=1e-12)
            checked += 1
        assert checked > 300

    @pytest.mark.parametrize("pair", ["AV", "VA", "To", "Ty", "kV", "mV", "V.", "A/", ".-", "Hz", "dB", "µA"])
    def test_kerning(self, pair):
        """A pair is closed up or opened by exactly what the font's GPOS table says."""
        first, second = (font_and_name(only_glyph(c))[1] for c in pair)
        apart = sum(measure(c, UNIT_HEIGHT_MM).width_mm for c in pair)
        kern = measure(pair, UNIT_HEIGHT_MM).width_mm - apart
        assert kern == pytest.approx(true_kern(truth("barlow"), first, second), abs=1e-9)

    def test_kerning_is_there(self):
        """The kerning test is not idle: AV really is closed up, and in the fallback font too."""
        assert measure("AV", UNIT_HEIGHT_MM).width_mm == pytest.approx(533 - 50 + 529)
        apart = measure("Г", 1.0).width_mm + measure("д", 1.0).width_mm
        assert measure("Гд", 1.0).width_mm < apart

    @pytest.mark.parametrize("name", CAP_UNITS)
    def test_capital_height(self, name):
        """Both fonts' capitals and Barlow's digits are exactly as tall as the font says."""
        file = truth(name)
        glyf, cmap = file["glyf"], file.getBestCmap()
        assert file["OS/2"].sCapHeight == CAP_UNITS[name]
        for character in "HEI" + ("147" if name.startswith("barlow") else ""):
            assert (glyf[cmap[ord(character)]].yMin, glyf[cmap[ord(character)]].yMax) == (0, CAP_UNITS[name])

    def test_import_is_cheap(self):
        """Importing the room loads neither HarfBuzz nor a font."""
        code = "import sys, dialgen.lettering; sys.exit('uharfbuzz' in sys.modules)"
        assert subprocess.run([sys.executable, "-c", code], check=False).returncode == 0


def only_or_none(text):
    """Return the glyph of a text that is drawn with one, else None."""
    placed = letters(text, 1.0, (0.0, 0.0), INK).glyphs
    return placed[0].glyph if len(placed) == 1 else None


class TestCharacters:
    """The characters of a meter's face, and those that no font has."""

    @pytest.mark.parametrize("character", "−ΩµA°±√+/~≈·½kVmd")
    def test_barlow_has(self, character):
        """The signs of a face come from the first font, by the name its cmap gives."""
        glyph = only_glyph(character)
        assert glyph.name == f"barlow-{truth('barlow').getBestCmap()[ord(character)]}"

    @pytest.mark.parametrize("character", "φαθΣЯ")
    def test_fallback_has(self, character):
        """What Barlow lacks comes from the second font."""
        assert ord(character) not in truth("barlow").getBestCmap()
        assert only_glyph(character).name == f"fira-{truth('fira').getBestCmap()[ord(character)]}"

    @pytest.mark.parametrize(
        ("one", "other"), [("\u2126", "\u03a9"), ("\u03bc", "\u00b5"), ("U\u0308", "\u00dc")]
    )
    def test_two_spellings(self, one, other):
        """Both ohms, both micros and an accent written apart give the same glyph and measure."""
        assert only_glyph(one) is only_glyph(other)
        assert measure(f"5 {one}A", 2.2) == measure(f"5 {other}A", 2.2)

    @pytest.mark.parametrize("character", ["⏚", "⎓", "漢", "\n", "\r", "\u200b", "\ufeff", "\ud800"])
    @pytest.mark.parametrize("call", [measure, numeral_width])
    def test_missing_character(self, character, call):
        """A character no font draws is an error that names it and the text, controls included."""
        with pytest.raises(CharacterError) as caught:
            call(f"5 {character}A", 2.2)
        assert caught.value.character == character
        assert f"U+{ord(character):04X}" in caught.value.message
        assert repr(f"5 {character}A") in caught.value.message

    def test_missing_character_when_placing(self):
        """Placing refuses the same characters as measuring."""
        with pytest.raises(CharacterError, match=r"U\+23DA"):
            letters("⏚", 2.2, (0.0, 0.0), INK)

    def test_mixed_fonts_share_a_line(self):
        """A word in two fonts runs on without a gap, on one baseline, capitals equally tall."""
        together = measure("cosφ₁", 2.0).width_mm
        assert together == pytest.approx(measure("cos", 2.0).width_mm + measure("φ₁", 2.0).width_mm)
        assert measure("Σ", 2.0).top == pytest.approx(2.0)
        placed = letters("HΣ", 2.0, (0.0, 0.0), INK, anchor=(0.0, 0.0)).glyphs
        assert [p.glyph.name.split("-")[0] for p in placed] == ["barlow", "fira"]
        assert [p.y for p in placed] == pytest.approx([0.0, 0.0], abs=1e-12)


def assert_same_line(text):
    """Check that the fast path and the shaper set ``text`` alike."""
    (quick, quick_width), (shaped, width) = _set_numeral(text, PLAIN), _set_shaped(text, PLAIN)
    assert quick_width == pytest.approx(width, abs=1e-12)
    assert [glyph for glyph, *_ in quick] == [glyph for glyph, *_ in shaped]
    places = [n for _, *at in shaped for n in at]
    assert [n for _, *at in quick for n in at] == pytest.approx(places, abs=1e-12)


class TestNumerals:
    """Numerals: tabular, never kerned, and measured without the shaper."""

    def test_tabular_digits(self):
        """All digits are equally wide, 495 units, as the font's tabular glyphs are."""
        widths = [numeral_width(digit, UNIT_HEIGHT_MM) for digit in "0123456789"]
        assert len(set(widths)) == 1
        assert widths[0] == pytest.approx(495.0)
        assert only_glyph("1").name == "barlow-one.tf"

    def test_no_pair_kerns(self):
        """The shaper sets any two numeral characters exactly as far apart as each is wide."""
        for pair in product(NUMERAL_CHARACTERS, repeat=2):
            assert_same_line("".join(pair))

    @given(numerals)
    def test_fast_path_is_the_shaper(self, text):
        """Any numeral set by the fast path is what the shaper makes of it."""
        assert_same_line(text)

    @given(numerals, heights)
    def test_numeral_width(self, text, height_mm):
        """The quick width of a numeral is its measured advance."""
        assert numeral_width(text, height_mm) == measure(text, height_mm).width_mm

    @given(words, heights)
    def test_numeral_width_of_words(self, text, height_mm):
        """The quick width also answers, rightly, for a text that is no numeral."""
        assert numeral_width(text, height_mm) == measure(text, height_mm).width_mm


class TestMeasure:
    """The room a text takes."""

    def test_height_is_that_of_capitals_and_digits(self):
        """Lettering of 2.2 mm has H, 1 and 4 reaching from the baseline to 2.2 mm."""
        for text in ("H", "1", "4", "HE14"):
            extent = measure(text, 2.2)
            assert (extent.bottom, extent.top) == pytest.approx((0.0, 2.2), abs=1e-12)

    def test_worked_by_hand(self):
        """A minus of 2.1 mm lettering is 3 mm to the em: 468 units wide, ink as in glyf."""
        minus = truth("barlow")["glyf"][truth("barlow").getBestCmap()[0x2212]]
        expected = Extent(
            1.404, minus.xMin * 0.003, minus.yMin * 0.003, minus.xMax * 0.003, minus.yMax * 0.003
        )
        found = measure("−", 2.1)
        for name in Extent.__dataclass_fields__:
            assert getattr(found, name) == pytest.approx(getattr(expected, name), abs=1e-12)

    @given(words.filter(str.strip), heights)
    def test_ink_is_that_of_the_glyphs(self, text, height_mm):
        """The ink box is what fontTools' bounds of the placed glyphs add up to."""
        extent = measure(text, height_mm)
        left, bottom, right, top = true_ink(letters(text, height_mm, (0.0, 0.0), INK, anchor=(0.0, 0.0)))
        assert right - left == pytest.approx(extent.right - extent.left, abs=1e-9)
        assert top - bottom == pytest.approx(extent.top - extent.bottom, abs=1e-9)

    @given(words, heights)
    def test_doubling(self, text, height_mm):
        """Lettering twice as high takes twice the room every way."""
        one, two = measure(text, height_mm), measure(text, 2 * height_mm)
        for name in Extent.__dataclass_fields__:
            assert getattr(two, name) == pytest.approx(2 * getattr(one, name), abs=1e-9)

    def test_no_ink(self):
        """A blank advances but has an empty box at its origin; an empty text does neither."""
        assert measure("", 2.2) == Extent(0.0, 0.0, 0.0, 0.0, 0.0)
        assert measure(" ", UNIT_HEIGHT_MM) == Extent(200.0, 0.0, 0.0, 0.0, 0.0)
        assert (measure("\u202f", 1.0).right, measure("\u2009", 1.0).right) == (0.0, 0.0)
        assert letters(" ", 2.2, (1.0, 2.0), INK, angle_deg=30.0) == Letters(" ", (), INK)

    @pytest.mark.parametrize("height_mm", [0.0, -1.0, math.nan, math.inf])
    @pytest.mark.parametrize("text", ["10", "mA"])
    def test_refused_heights(self, text, height_mm):
        """A height that is not above zero and finite is refused, never made into NaN."""
        with pytest.raises(InputError, match="above zero"):
            measure(text, height_mm)
        with pytest.raises(InputError, match="above zero"):
            numeral_width(text, height_mm)
        with pytest.raises(InputError, match="above zero"):
            letters(text, height_mm, (0.0, 0.0), INK)


class TestLetters:
    """Where the glyphs fall."""

    @given(words.filter(str.strip), heights, places, fractions)
    def test_anchor_in_the_ink_box(self, text, height_mm, at, anchor):
        """The asked point of the true ink box falls on the asked place."""
        left, bottom, right, top = true_ink(letters(text, height_mm, at, INK, anchor=anchor))
        assert left + anchor[0] * (right - left) == pytest.approx(at[0], abs=1e-9)
        assert bottom + anchor[1] * (top - bottom) == pytest.approx(at[1], abs=1e-9)

    @given(words.filter(str.strip), heights, places, st.floats(0.0, 1.0))
    def test_anchor_on_the_line(self, text, height_mm, at, along):
        """With Fit.LINE the baseline, or the capital height, falls on the place, whatever the ink."""
        low = letters(text, height_mm, at, INK, anchor=(along, 0.0), fit=Fit.LINE)
        high = letters(text, height_mm, at, INK, anchor=(along, 1.0), fit=Fit.LINE)
        assert [p.y for p in low.glyphs] == pytest.approx([at[1]] * len(low.glyphs), abs=1e-9)
        assert [p.y for p in high.glyphs] == pytest.approx([at[1] - height_mm] * len(high.glyphs), abs=1e-9)
        left, _, right, _ = true_ink(low)
        assert left + along * (right - left) == pytest.approx(at[0], abs=1e-9)

    def test_centre_is_the_default(self):
        """Without an anchor the middle of the ink falls on the place."""
        left, bottom, right, top = true_ink(letters("gΩ", 3.0, (4.0, 5.0), INK))
        assert ((left + right) / 2, (bottom + top) / 2) == pytest.approx((4.0, 5.0))

    @given(words, heights, places, fractions, angles)
    def test_turning(self, text, height_mm, at, anchor, angle_deg):
        """Turning takes each glyph's origin clockwise about the place, as a rigid body."""
        upright = letters(text, height_mm, at, INK, anchor=anchor)
        turned = letters(text, height_mm, at, INK, anchor=anchor, angle_deg=angle_deg)
        clockwise = complex(math.cos(math.radians(angle_deg)), -math.sin(math.radians(angle_deg)))
        centre = complex(*at)
        for before, after in zip(upright.glyphs, turned.glyphs, strict=True):
            expected = centre + (complex(before.x, before.y) - centre) * clockwise
            assert (after.x, after.y) == pytest.approx((expected.real, expected.imag), abs=1e-9)
            assert after.angle_deg == angle_deg
            assert (after.glyph, after.size_mm) == (before.glyph, before.size_mm)

    @given(words, heights, angles)
    def test_turning_keeps_distances(self, text, height_mm, angle_deg):
        """Glyph origins keep their distances from one another under any turn."""

        def steps(angle):
            placed = letters(text, height_mm, (3.0, 40.0), INK, angle_deg=angle).glyphs
            return [math.dist((a.x, a.y), (b.x, b.y)) for a, b in product(placed, repeat=2)]

        assert steps(angle_deg) == pytest.approx(steps(0.0), abs=1e-9)

    def test_clockwise(self):
        """A text turned by 90 degrees reads downwards."""
        first, last = letters("10", 2.2, (0.0, 0.0), INK, angle_deg=90.0).glyphs
        assert first.x == pytest.approx(last.x)
        assert first.y > last.y

    def test_what_is_kept(self):
        """The letters keep the text as it was written, and the style."""
        found = letters("5 \u2126", 2.2, (0.0, 0.0), INK)
        assert (found.text, found.style) == ("5 \u2126", INK)
        assert all(isinstance(placed.glyph, Glyph) for placed in found.glyphs)


def test_forty_labels(benchmark):
    """Laying out forty labels, warm, takes well under a millisecond (run with --benchmark-only)."""
    texts = [str(5 * i) for i in range(36)] + ["µA", "kΩ", "−20", "dB"]
    benchmark(lambda: [letters(text, 2.2, (1.0, 40.0), INK, angle_deg=10.0) for text in texts])
    assert benchmark.stats.stats.min < 1e-3
