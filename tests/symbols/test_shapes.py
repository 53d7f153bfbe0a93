"""What is drawn for a symbol is what the words for it say, and stays in its room."""

from __future__ import annotations

import math
import re
from importlib.resources import files
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from lxml import etree
from symbol_ink import FURTHER, INK, SIGNS, holes, inked, label, pieces, seen, span

from dialgen.drawing import Circle, Drawing, Layer, Letters, Line, Outline, Purpose
from dialgen.lettering import PLAIN, Hand, hand
from dialgen.renderers import render
from dialgen.symbols import Sign, class_sign, items, parse, width

PX_PER_MM = 50.0
BOLD = Path(str(files("fontpkg_fira_sans_condensed") / "files" / "FiraSansCondensed-Bold.ttf"))
LETTERED = [s for s in SIGNS if any(isinstance(i, Letters) for i in items(s, (0.0, 0.0), 1.0, INK))]
ROW_MM = 4.0


@pytest.mark.parametrize("sign", SIGNS, ids=label)
def test_ink_fills_its_stated_width_and_keeps_to_its_row(sign: Sign) -> None:
    """As pdfium draws it, a sign is as wide as stated, no higher than its row, and in the middle."""
    _keeps_to_its_room(sign, PLAIN)


@pytest.mark.parametrize("lettering", [hand(BOLD), hand(strokes=True)], ids=["bold", "strokes"])
@pytest.mark.parametrize("sign", LETTERED, ids=label)
def test_a_sign_in_another_hand_keeps_to_its_room_too(sign: Sign, lettering: Hand) -> None:
    """In a bold font of one's own or in single strokes, a sign fills its stated width and no more."""
    _keeps_to_its_room(sign, lettering)


def _keeps_to_its_room(sign: Sign, lettering: Hand) -> None:
    left, bottom, right, top = span(seen(sign, ROW_MM, PX_PER_MM, lettering))
    half_px = width(sign, ROW_MM, lettering) / 2 * PX_PER_MM
    assert left == pytest.approx(-half_px, abs=1.5)
    assert right == pytest.approx(half_px, abs=1.5)
    assert top == pytest.approx(-bottom, abs=1.5)
    assert top <= ROW_MM / 2 * PX_PER_MM + 0.5


def test_letters_for_engraving_are_strokes() -> None:
    """In the hand of single strokes the letters of a sign are stroked in its ink, not filled."""
    for sign in LETTERED:
        figure = items(sign, (0.0, 0.0), ROW_MM, INK, hand(strokes=True))
        texts = [item for item in figure if isinstance(item, Letters)]
        assert texts
        assert all((text.style.stroke, text.style.fill) == (INK, None) for text in texts)


MADE_OF = {
    "dc": (4, 0),  # a bar and three dashes: IEC 60417-5031
    "ac": (1, 0),
    "ac and dc": (2, 0),
    "3~": (2, 0),
    "3~1E": (4, 0),
    "3N~3E": (5, 0),
    "test 500 V": (1, 1),  # empty
    "test 2 kV": (2, 1),
    "test 1.5 kV": (4, 1),
    "not tested": (2, 2),
    "attention": (3, 1),  # a triangle, a stroke and a dot
    "vertical": (1, 0),
    "horizontal": (1, 0),
    "moving coil": (2, 1),  # magnet and coil
    "moving coil with rectifier": (3, 1),
    "moving coil with thermocouple": (3, 1),
    "moving coil ratiometer": (2, 5),  # two crossed boxes shut in their crossing and four ends
    "moving iron": (1, 3),  # a bar shuts in what three bends of the coil embrace
    "electrodynamic": (3, 2),
    "electrodynamic iron-cored": (4, 3),
    "electrostatic": (2, 0),
    "vibrating reed": (1, 0),
    "thermocouple": (1, 0),
    "insulated thermocouple": (2, 0),
    "rectifier": (1, 0),  # the triangle touches its bar
    "series resistor": (1, 1),
    "magnetic screen": (1, 1),
    "earth terminal": (3, 0),
    "Fe": (2, 1),
}


@pytest.mark.parametrize("text", MADE_OF)
def test_a_symbol_is_made_of_the_pieces_its_description_names(text: str) -> None:
    """Pieces of ink and white areas shut in are those of the symbol's description in words."""
    mask = seen(parse(text))
    assert (pieces(mask), holes(mask)) == MADE_OF[text]


def test_the_pieces_of_a_class_are_its_number_and_its_sign() -> None:
    """A class of actual value stands in a circle, one of scale length above an open angle."""
    assert pieces(seen(class_sign("1.5", "limit"))) == 3
    assert pieces(seen(class_sign("1.5", "length"))) == 4
    ring = seen(class_sign("1.5", "value"))
    assert (pieces(ring), holes(ring)) == (4, 1)


@pytest.mark.parametrize("sign", FURTHER, ids=label)
def test_a_number_in_a_star_or_circle_touches_nothing(sign: Sign) -> None:
    """Whatever the number, its signs stay apart from the line around them."""
    around = 1 if sign.symbol.name in ("test", "class value", "class length") else 0
    if around or sign.symbol.name == "class limit":
        assert pieces(seen(sign)) == len(sign.parameter) + around


def test_the_horseshoe_opens_downwards() -> None:
    """Above the coil the magnet spans the middle; below it only the two limbs are left."""
    mask = seen(parse("moving coil"))
    first, last = np.nonzero(mask.any(axis=1))[0][[0, -1]]
    middle = mask.shape[1] // 2
    assert mask[first + 5, middle]
    assert pieces(mask[last - 5 : last]) == 2
    assert not mask[last - 5, middle]


@pytest.mark.parametrize(
    "text", ["moving coil", "ac and dc", "vertical", "earth terminal", "test 500 V", "bimetal"]
)
def test_symbols_that_are_alike_on_both_sides_are_so(text: str) -> None:
    """Mirrored about its middle, a symmetrical symbol is the same; one that bends is not."""
    mask = seen(parse(text))
    differs = (mask ^ mask[:, ::-1]).sum() / mask.sum()
    assert (differs < 0.05) == (text not in ("ac and dc", "bimetal"))


def test_the_sine_goes_up_first_and_is_its_own_half_turn() -> None:
    """One period of a sine: its left half above the middle, its right half below, point for point."""
    mask = seen(parse("ac"))
    assert (mask ^ mask[::-1, ::-1]).sum() < 0.03 * mask.sum()
    upper = mask[: mask.shape[0] // 2]
    half = mask.shape[1] // 2
    assert upper[:, :half].sum() > 5 * upper[:, half:].sum()


@pytest.mark.parametrize("text", ["test 500 V", "test 2 kV", "not tested"])
def test_stars_have_five_even_points(text: str) -> None:
    """Read back from SVG, five tips stand on one circle 72 degrees apart, the first straight up."""
    corners = _star(text)
    tips = corners[::2]
    middle = tips.mean(axis=0)
    across, up = (tips - middle).T
    radii = np.hypot(across, up)
    assert len(tips) == 5
    assert radii == pytest.approx(radii[0], abs=2e-5)
    assert np.degrees(np.arctan2(across, up)) % 360 == pytest.approx([0, 72, 144, 216, 288], abs=1e-3)
    waist = np.hypot(*(corners[1::2] - middle).T)
    assert waist == pytest.approx(waist[0], abs=2e-5)
    assert 0.35 < waist[0] / radii[0] < 0.6


def _star(text: str) -> np.ndarray:
    """Return the ten corners of a star as they stand in an SVG, y up."""
    layer = Layer(name="star", purpose=Purpose.PRINT, items=items(parse(text), (3.0, 2.0), 5.0, INK))
    page = Drawing(left=0, bottom=0, width=6, height=6, layers=(layer,))
    root = etree.fromstring(render(page, ".svg"))
    (path,) = [p.get("d") for p in root.iter("{*}path") if p.get("stroke") == INK]
    assert path.endswith("Z")
    return np.array(re.findall(r"(-?[\d.]+),(-?[\d.]+)", path), dtype=float)[:-1] * (1, -1)


@given(
    st.sampled_from(SIGNS),
    st.floats(1, 30),
    st.floats(0.2, 5),
    st.floats(-100, 100),
    st.floats(-100, 100),
)
def test_a_sign_grows_in_proportion_and_moves_as_a_whole(
    sign: Sign, height_mm: float, times: float, x: float, y: float
) -> None:
    """Every length is a part of the row's height, and the place shifts the drawing and no more."""
    assert width(sign, times * height_mm) == pytest.approx(times * width(sign, height_mm))
    here = _points(items(sign, (0.0, 0.0), height_mm, INK))
    there = _points(items(sign, (x, y), times * height_mm, INK))
    assert there == pytest.approx(times * here + (x, y), abs=1e-9)


def _points(figure: tuple[object, ...]) -> np.ndarray:
    found: list[tuple[float, float]] = []
    for item in figure:
        match item:
            case Line():
                found += [item.start, item.end]
            case Outline():
                found += [(v.x, v.y) for v in item.vertices]
            case Letters():
                found += [(placed.x, placed.y) for placed in item.glyphs]
            case _:
                found.append(item.centre)
    return np.array(found)


@pytest.mark.parametrize("sign", SIGNS, ids=label)
def test_lines_are_even_and_in_the_one_ink(sign: Sign) -> None:
    """No line is wider than a tenth of the height or thinner than half of that, and all are in one ink."""
    for item in items(sign, (0.0, 0.0), 3.5, "#123456"):
        style = item.style
        assert {style.stroke, style.fill} == {None, "#123456"}
        if style.stroke:
            assert 0.175 <= style.width_mm <= 0.35 + 1e-12


def test_the_check_of_widths_can_fail() -> None:
    """A circle half as large as stated would be seen to be."""
    sign = parse("magnetic screen")
    (ring,) = items(sign, (0.0, 0.0), ROW_MM, INK)
    assert isinstance(ring, Circle)
    small = Circle(ring.centre, ring.radius_mm / 2, ring.style)
    left, *_ = span(inked((small,), 3.0, 3.0, PX_PER_MM))
    assert not math.isclose(left, -width(sign, ROW_MM) / 2 * PX_PER_MM, abs_tol=1.5)
