"""Figures and signs that a dial needs, set as a printer would; fontTools reads the fonts' own tables."""

from functools import cache
from importlib.resources import files

import pytest
from fontTools.pens.recordingPen import DecomposingRecordingPen
from fontTools.ttLib import TTFont
from hypothesis import given
from hypothesis import strategies as st
from letter_fonts import DEJAVU, INK, STIX, bounds

from dialgen.lettering import PLAIN, hand, letters, measure, numeral_width, raised
from dialgen.lettering.setting import _set_numeral, _set_shaped

HANDS = {"plain": PLAIN, "strokes": hand(strokes=True), "DejaVu": hand(DEJAVU), "STIX": hand(STIX)}
every_hand = pytest.mark.parametrize("of", HANDS.values(), ids=HANDS)


@cache
def barlow(weight):
    """Return a weight of Barlow as fontTools reads it."""
    file = f"BarlowSemiCondensed-{weight}.ttf"
    return TTFont(str(files("fontpkg_barlow_semi_condensed") / "files" / file))


def names(text, of=PLAIN):
    """Return the names of a text's glyphs."""
    return [placed.glyph.name for placed in letters(text, 1.0, (0.0, 0.0), INK, hand=of).glyphs]


def widths(weight, character):
    """Return the widths of a glyph's contours, in drawing order."""
    font = barlow(weight)
    pen = DecomposingRecordingPen(font.getGlyphSet())
    font.getGlyphSet()[font.getBestCmap()[ord(character)]].draw(pen)
    found, points = [], []
    for kind, given_points in pen.value:
        points = [] if kind == "moveTo" else points
        points += [point for point in given_points if point]
        if kind == "closePath":
            found.append(max(x for x, _ in points) - min(x for x, _ in points))
    return found


class TestRaisedAndLowered:
    """Powers and indices."""

    @pytest.mark.parametrize("text", ["10³", "10⁻³", "10⁰", "m/s²", "CO₂", "R₁₂", "x⁺⁰₋₉"])
    def test_of_one_font(self, text):
        """All the small figures of a plate are of one font, whichever of them it needs."""
        small = [n for n in names(text) if "uni20" in n or n.endswith(("uni00B2", "uni00B3"))]
        assert small
        assert all(name.startswith("fira-") for name in small)

    @every_hand
    def test_sizes(self, of):
        """Raised figures are equally tall and stand above the middle; lowered ones at its foot."""
        high = [measure(c, 1.0, hand=of) for c in "⁰¹²³⁴⁵⁶⁷⁸⁹"]
        low = [measure(c, 1.0, hand=of) for c in "₀₁₂₃₄₅₆₇₈₉"]
        for row in (high, low):
            assert max(e.top for e in row) - min(e.top for e in row) < 0.08
            assert max(e.bottom for e in row) - min(e.bottom for e in row) < 0.08
        assert min(e.bottom for e in high) > 0.4
        assert all(0.55 < e.top - e.bottom < 0.72 for e in high + low)
        assert max(e.bottom for e in low) < 1e-9
        assert max(e.top for e in low) < 0.7

    def test_weight_of_fira(self):
        """Why Fira: Barlow has no ⁰, no ⁻ and no lowered figure at all."""
        has = barlow("Medium").getBestCmap()
        assert not [c for c in "⁰⁻₀₁₂₃₄₅₆₇₈₉" if ord(c) in has]


class TestFractions:
    """Figures about a fraction slash."""

    def test_numerators_and_denominators(self):
        """3⁄16 takes Barlow's small figures, by the names of its tables numr and dnom."""
        assert names("3⁄16") == [
            "barlow-three.numr",
            "barlow-fraction",
            "barlow-one.dnom",
            "barlow-six.dnom",
        ]
        hmtx = barlow("Medium")["hmtx"]
        width = sum(hmtx[name][0] for name in ("three.numr", "fraction", "one.dnom", "six.dnom"))
        assert measure("3⁄16", 700.0).width_mm == pytest.approx(width)

    def test_whole_number_before(self):
        """A whole number before a fraction that is one character stays whole."""
        assert names("2⅓")[0] == "barlow-two.tf"
        assert names("2⅓")[1:] == names("1⁄3")

    @every_hand
    @pytest.mark.parametrize("fraction", ["½", "¼", "¾", "⅓", "⅛", "1⁄3", "3⁄16", "15⁄16"])
    def test_every_hand(self, of, fraction):
        """Every hand sets every fraction within the height of a capital, and no wider than its figures."""
        extent = measure(fraction, 1.0, hand=of)
        assert -0.13 < extent.bottom < 0.03
        assert 0.97 < extent.top < 1.13
        figures = len(fraction) - 1 or 2
        assert extent.width_mm < 0.95 * figures * measure("0", 1.0, hand=of).width_mm

    def test_slash_alone(self):
        """A fraction slash between other things is just a slash."""
        assert names("m⁄s") == ["barlow-m", "barlow-fraction", "barlow-s"]


class TestSigns:
    """Signs that are taken from elsewhere, or set larger."""

    @every_hand
    @pytest.mark.parametrize("text", ["∞", "0∞", "−∞ Ω"])
    def test_infinity(self, of, text):
        """In every hand ∞ is centred on the digits' middle and nearly two thirds as tall, at least."""
        placed = letters(text, 1.0, (0.0, 0.0), INK, anchor=(0.0, 0.0), hand=of).glyphs
        (infinity,) = [p for p in placed if p.glyph.name.endswith((".large", "221e"))]
        floor = infinity.y - placed[0].y if len(placed) > 1 else 0.0
        _, bottom, _, top = (n * infinity.size_mm for n in infinity.glyph.box)
        assert floor == pytest.approx(0.0)
        assert top - bottom > 0.65 - 1e-9
        assert (top + bottom) / 2 == pytest.approx(0.5)

    def test_infinity_is_not_made_smaller(self):
        """An ∞ that is tall enough as drawn keeps its size."""
        font = TTFont(STIX)
        left, _, right, _ = bounds(font, font.getBestCmap()[ord("∞")])
        cap = bounds(font, "H")[3]
        found = measure("∞", cap, hand=hand(STIX))
        assert found.right - found.left >= right - left - 1e-9

    def test_weight_of_infinity(self):
        """Enlarged, the ∞ of Barlow Regular has strokes as thick as the digits' of Medium within a tenth."""
        outer, inner = (widths("Regular", "∞")[i] for i in (0, 1))
        font = barlow("Regular")
        _, bottom, _, top = bounds(font, font.getBestCmap()[ord("∞")])
        # The left lobe's outside and inside begin one stroke apart.
        stroke = (outer - inner - widths("Regular", "∞")[2]) / 3 * 0.65 * 700 / (top - bottom)
        assert 75 < stroke < 110

    def test_weight_of_percent(self):
        """The rings of Bold's % are nearer in weight to Medium's figures than those of Medium's own."""
        ring = {
            weight: (widths(weight, "%")[0] - widths(weight, "%")[2]) / 2 for weight in ("Medium", "Bold")
        }
        zero = widths("Medium", "0")
        stem = (zero[0] - zero[1]) / 2
        assert abs(ring["Bold"] - stem) < 0.5 * abs(ring["Medium"] - stem)
        assert names("50 %")[-1] == "barlow-bold-percent"

    @pytest.mark.parametrize(("one", "other"), [("∼", "~"), ("⋅", "·"), ("μ", "µ"), ("\u2126", "Ω")])
    def test_two_spellings(self, one, other):
        """Signs that Unicode has twice are the same on a plate."""
        assert names(one) == names(other)

    @every_hand
    @pytest.mark.parametrize("character", "ΩµA°±‰%∞−√φ·×½¼²³⁻₁~∼ΔπαβγλτéèäöüÅ–⁄+=")
    def test_every_sign_has_ink(self, of, character):
        """Every sign of a dial is there in every hand."""
        extent = measure(character, 1.0, hand=of)
        assert extent.right - extent.left > 0.05
        assert extent.width_mm > 0.1


class TestNarrowSpaces:
    """Groups of three figures."""

    @every_hand
    @pytest.mark.parametrize("space", ["\u202f", "\u2009"])
    def test_between_groups(self, of, space):
        """A narrow space is narrower than a space, and as narrow in every hand."""
        text = f"10{space}000"
        digits = sum(measure(c, 1.0, hand=of).width_mm for c in "10000")
        gap = numeral_width(text, 1.0, hand=of) - digits
        assert gap == pytest.approx(0.17)
        assert gap < 0.7 * measure(" ", 1.0, hand=of).width_mm

    @every_hand
    def test_fast_path(self, of):
        """A number in groups is set without the shaper, to the same places."""
        text = "−1\u202f250\u2009000.5"
        (quick, width), (shaped, same_width) = _set_numeral(text, of), _set_shaped(text, of)
        assert width == pytest.approx(same_width)
        assert [x for _, x, _ in quick] == pytest.approx([x for _, x, _ in shaped])
        assert [glyph for glyph, *_ in quick] == [glyph for glyph, *_ in shaped]


class TestRaised:
    """Powers written with a circumflex."""

    @pytest.mark.parametrize(
        ("text", "expected"),
        [
            ("10^3", "10³"),
            ("m/s^2", "m/s²"),
            ("10^-6", "10⁻⁶"),
            ("10^−6 Ω", "10⁻⁶ Ω"),
            ("10^+12", "10⁺¹²"),
            ("10^0", "10⁰"),
            ("kg·m^2/s^3", "kg·m²/s³"),
            ("10^3.", "10³."),
            ("x^2y", "x²y"),
        ],
    )
    def test_powers(self, text, expected):
        """Whole powers become raised figures, with their sign."""
        assert raised(text) == expected

    @pytest.mark.parametrize(
        "text", ["", "10 A", "10³", "^", "a^b", "2^0.5", "2^1,5", "10^35.5", "10^-", "5^ 2"]
    )
    def test_left_alone(self, text):
        """What is no whole power is left as it is, so that no power is read for another."""
        assert raised(text) == text

    @given(st.text(alphabet="0123456789^+-−., mkAx/", max_size=12))
    def test_only_powers_change(self, text):
        """Written back with a circumflex before each run, the text is what it was; and twice is as once."""
        once = raised(text)
        assert raised(once) == once
        back = once.translate(str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻−", "0123456789+--"))
        assert back == "".join(c for i, c in enumerate(text) if not _raises(text, i)).replace("−", "-")


def _raises(text, index):
    """Return whether the circumflex at ``index`` begins a whole power, found step by step."""
    if text[index] != "^":
        return False
    rest = text[index + 1 :]
    figures = rest[1:] if rest[:1] in ("+", "-", "−") else rest
    count = len(figures) - len(figures.lstrip("0123456789"))
    after = figures[count:]
    return count > 0 and not (after[:1] in (".", ",") and after[1:2].isdigit())
