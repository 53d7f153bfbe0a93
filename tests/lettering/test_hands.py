"""Hands from font files: fontTools, which wrote or reads the same files, is the outside truth."""

import os
import pickle

import pytest
from fontTools.ttLib import TTFont
from hypothesis import given
from hypothesis import strategies as st
from letter_fonts import CAPITAL, DEJAVU, INK, STIX, bounds, build

from dialgen.errors import CharacterError, InputError
from dialgen.lettering import NUMERAL_CHARACTERS, PLAIN, hand, letters, measure, numeral_width

EM_CAPS = 10 / 7
LATIN = "H0123456789O −+.,"


def faces(text, of):
    """Return the font that each glyph of a text is from, by its name's beginning."""
    placed = letters(text, 1.0, (0.0, 0.0), INK, hand=of).glyphs
    return ["own" if "/" in p.glyph.name else p.glyph.name.rsplit("-", 1)[0] for p in placed]


class TestFontFiles:
    """A font of one's own is read as it is drawn."""

    @pytest.mark.parametrize("cubic", [True, False])
    def test_outlines(self, tmp_path, cubic):
        """PostScript's cubic curves and TrueType's alike have fontTools' exact bounds and advance."""
        font = build(tmp_path / "own.otf", LATIN, cubic=cubic)
        truth = TTFont(font)
        for character in "H0O7":
            name = truth.getBestCmap()[ord(character)]
            (placed,) = letters(character, 1.0, (0.0, 0.0), INK, anchor=(0.0, 0.0), hand=hand(font)).glyphs
            expected = [n / CAPITAL for n in bounds(truth, name)]
            assert [n * EM_CAPS for n in placed.glyph.box] == pytest.approx(expected, abs=1e-9)
            width = truth["hmtx"][name][0] / CAPITAL
            assert measure(character, 1.0, hand=hand(font)).width_mm == pytest.approx(width)
        kinds = {kind for kind, _ in letters("O", 1.0, (0.0, 0.0), INK, hand=hand(font)).glyphs[0].glyph.path}
        assert kinds == ({"M", "C", "Z"} if cubic else {"M", "L", "Z"})

    def test_height_without_a_table(self, tmp_path):
        """A font that does not tell the height of its capitals is sized by its H."""
        fonts = (
            build(tmp_path / f"{told}.otf", LATIN, capital=1234, capital_table=told) for told in (True, False)
        )
        for font in fonts:
            assert measure("H", 7.0, hand=hand(font)).top == pytest.approx(7.0)

    def test_height_told_wrongly(self, tmp_path):
        """Where the table and the H disagree, the H is what is seen."""
        path = build(tmp_path / "own.otf", LATIN)
        font = TTFont(path)
        font["OS/2"].sCapHeight = 900
        font.save(path)
        assert measure("H", 7.0, hand=hand(path)).top == pytest.approx(7.0)

    def test_small_capitals(self, tmp_path):
        """Letters of any font are placed at one size, however small its capitals are in its em."""
        small = hand(build(tmp_path / "small.otf", LATIN, capital=500))
        (placed,) = letters("H", 3.0, (0.0, 0.0), INK, hand=small).glyphs
        assert placed.size_mm == pytest.approx(30 / 7)
        assert (placed.glyph.box[3] - placed.glyph.box[1]) * placed.size_mm == pytest.approx(3.0)

    def test_real_font(self):
        """DejaVu Sans, whose OS/2 table tells no height of capitals, comes out as hmtx and glyf say."""
        truth = TTFont(DEJAVU)
        cap = bounds(truth, "H")[3]
        assert not hasattr(truth["OS/2"], "sCapHeight")
        for character in "HgΩµ%0":
            name = truth.getBestCmap()[ord(character)]
            extent = measure(character, 1.0, hand=hand(DEJAVU))
            assert extent.width_mm == pytest.approx(truth["hmtx"][name][0] / cap)
            expected = [n / cap for n in bounds(truth, name)]
            assert [extent.left, extent.bottom, extent.right, extent.top] == pytest.approx(expected, abs=1e-9)


class TestOrder:
    """The font is asked first, then those of the plain hand."""

    def test_own_letters_first(self, tmp_path):
        """What the font has is its own, what it lacks is Barlow's or Fira's."""
        own = hand(build(tmp_path / "own.otf", LATIN))
        assert faces("H0", own) == ["own", "own"]
        assert faces("kΩφ", own) == ["barlow", "barlow", "fira"]
        assert faces("%∞", own) == ["barlow-bold", "barlow-regular"]

    def test_own_signs_before_the_borrowed(self):
        """A font that has % and ∞ keeps them."""
        assert faces("%∞‰", hand(DEJAVU)) == ["own"] * 3

    def test_missing_everywhere(self, tmp_path):
        """A character that neither the font nor the built-in ones have is named."""
        own = hand(build(tmp_path / "own.otf", LATIN))
        with pytest.raises(CharacterError, match="漢"):
            measure("漢", 1.0, hand=own)

    def test_raised_figures_match(self):
        """A font with ² and ³ alone gives none of them: 10² and 10⁻³ must be of one size."""
        assert ord("³") in TTFont(STIX).getBestCmap()
        assert ord("⁻") not in TTFont(STIX).getBestCmap()
        assert faces("10³", hand(STIX)) == ["own", "own", "fira"]
        assert faces("10⁻³", hand(STIX)) == ["own", "own", "fira", "fira"]

    def test_own_raised_figures(self):
        """A font that has them all gives them all."""
        assert faces("10⁻³₂", hand(DEJAVU)) == ["own"] * 5

    def test_fractions_whole_from_one_font(self):
        """Fractions that a font cannot set come whole from one that can; its own ½ stays."""
        assert faces("3⁄16", hand(STIX)) == ["barlow"] * 4
        assert faces("½", hand(STIX)) == ["own"]

    def test_twins(self, tmp_path):
        """A font that has only the Greek mu or the ohm sign has the micro sign and omega."""
        own = hand(build(tmp_path / "own.otf", LATIN + "\u03bc\u2126"))
        assert faces("µΩ", own) == ["own", "own"]
        assert faces("μ\u2126", own) == ["own", "own"]


class TestNumerals:
    """Numerals of any font are measured as they are set."""

    @pytest.mark.parametrize("kerns", ["", "pos uni0031 uni002E -80; pos uni0037 uni0030 40;"])
    def test_kerned_numerals(self, tmp_path, kerns):
        """A font that kerns figures has them kerned in numerals too, by as much as it says."""
        own = hand(build(tmp_path / "own.otf", LATIN, kerns=kerns))
        apart = sum(measure(c, CAPITAL, hand=own).width_mm for c in "71.70")
        by = -80 + 40 if kerns else 0
        assert measure("71.70", CAPITAL, hand=own).width_mm == pytest.approx(apart + by)
        assert numeral_width("71.70", CAPITAL, hand=own) == measure("71.70", CAPITAL, hand=own).width_mm

    @given(st.text(alphabet=NUMERAL_CHARACTERS, max_size=8), st.sampled_from([DEJAVU, STIX]))
    def test_quick_width(self, text, font):
        """The quick width of a numeral is its measured advance, where some signs are borrowed too."""
        of = hand(font)
        assert numeral_width(text, 2.2, hand=of) == measure(text, 2.2, hand=of).width_mm
        apart = sum(measure(character, 2.2, hand=of).width_mm for character in text)
        assert numeral_width(text, 2.2, hand=of) == pytest.approx(apart)


class TestTheHandItself:
    """Hands are few, kept, and can be handed about."""

    def test_same_hand(self, tmp_path):
        """The same file gives the same hand, and hands can be told apart and kept in sets."""
        font = build(tmp_path / "own.otf", LATIN)
        assert hand(font) is hand(font)
        assert hand() is PLAIN
        assert hand(strokes=True) is hand(strokes=True)
        assert len({hand(font), hand(font), PLAIN, hand(strokes=True), hand(DEJAVU)}) == 4

    def test_changed_file(self, tmp_path):
        """A file that is written anew gives a new hand, with the new letters."""
        font = build(tmp_path / "own.otf", LATIN)
        before = hand(font)
        width = measure("H", 1.0, hand=before).width_mm
        build(font, LATIN[1:] + "H")
        os.utime(font, ns=(1, 1))
        assert hand(font) is not before
        assert measure("H", 1.0, hand=hand(font)).width_mm > width

    def test_pickled(self, tmp_path):
        """A hand sent to another process is asked for there again; in this one it is the same."""
        for of in (PLAIN, hand(strokes=True), hand(build(tmp_path / "own.otf", LATIN))):
            assert pickle.loads(pickle.dumps(of)) is of

    def test_glyphs_of_two_fonts_differ(self, tmp_path):
        """The same letter of two fonts has two names, so a drawing may hold both."""
        names = {
            letters("H", 1.0, (0.0, 0.0), INK, hand=hand(build(tmp_path / file, LATIN))).glyphs[0].glyph.name
            for file in ("one.otf", "two.otf")
        }
        assert len(names) == 2


class TestRefused:
    """Files that no hand can be made of are refused in one plain line."""

    def test_missing(self, tmp_path):
        """A file that is not there is named."""
        with pytest.raises(InputError, match=r"gone\.ttf cannot be read: no such file.*; give the path of a"):
            hand(tmp_path / "gone.ttf")

    def test_folder(self, tmp_path):
        """A folder is no font."""
        with pytest.raises(InputError, match="cannot be read: is a directory"):
            hand(tmp_path)

    @pytest.mark.parametrize("content", [b"", b"not a font at all", b"wOF2" + bytes(200), bytes(4000)])
    def test_no_font(self, tmp_path, content):
        """Bytes that are no font are refused, a packed web font among them."""
        file = tmp_path / "own.ttf"
        file.write_bytes(content)
        with pytest.raises(InputError, match=r"own\.ttf is not a font; give a TrueType or OpenType"):
            hand(file)

    @pytest.mark.parametrize("share", [0.2, 0.5, 0.9])
    def test_cut_short(self, tmp_path, share):
        """A font cut short in copying is refused in plain words, or still writes; it never crashes."""
        data = DEJAVU.read_bytes()
        file = tmp_path / "own.ttf"
        file.write_bytes(data[: int(len(data) * share)])
        try:
            told = f"{measure('H', 1.0, hand=hand(file)).top:.6f}"
        except InputError as error:
            told = error.message
        assert told == "1.000000" or told.startswith(f"{file} ")

    def test_no_letters(self, tmp_path):
        """A font of signs, without a capital to size it by, is refused."""
        font = build(tmp_path / "signs.otf", "★☆")
        with pytest.raises(InputError, match=r"no outline of a capital H; choose a font of Latin letters"):
            hand(font)

    def test_outlines_are_no_strokes(self):
        """A font file and strokes together are refused: a font has outlines."""
        with pytest.raises(InputError, match="outlines, not single strokes; leave out"):
            hand(DEJAVU, strokes=True)
