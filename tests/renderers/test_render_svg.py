"""SVG files, read back with lxml."""

from __future__ import annotations

import re

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from render_readback import SVG, XLINK, differences, svg_figures, svg_root
from render_samples import BLACK, FINE, HOOK, INK, ROUND, arcs, face, lines, many, outlines, page

from dialgen.drawing import Arc, Circle, Letters, Line, Placed, Style
from dialgen.renderers import Options, render
from dialgen.renderers.svg import number

SHARED, INLINE = Options(), Options(inline_glyphs=True)
MICRON_MM = 1e-3


def _svg(drawing, options=SHARED):
    return render(drawing, ".svg", options)


def test_page_is_in_millimetres_with_the_pivot_at_the_origin() -> None:
    """Width, height and view box say the page's size and place to 1e-5 mm."""
    root = svg_root(_svg(page(width=101.23456, height=70.1)))
    assert (root.get("width"), root.get("height")) == ("101.23456mm", "70.1mm")
    assert root.get("viewBox") == "-50 -57.6 101.23456 70.1"


@many
@given(st.lists(lines, min_size=1, max_size=20))
def test_lines_come_back_within_a_micron(items) -> None:
    """Every mark stands where the drawing has it."""
    assert differences(svg_figures(_svg(page(*items))), page(*items), MICRON_MM) == []


@many
@given(st.lists(arcs(), min_size=1, max_size=4))
def test_arcs_come_back_within_a_micron(items) -> None:
    """Arcs of any sweep, half and whole circles among them, are true along their length."""
    assert differences(svg_figures(_svg(page(*items))), page(*items), MICRON_MM) == []


@many
@given(outlines())
def test_outlines_come_back_within_a_micron(item) -> None:
    """Outlines turn the right way at every edge."""
    assert differences(svg_figures(_svg(page(item))), page(item), MICRON_MM) == []


@pytest.mark.parametrize("options", [SHARED, INLINE])
def test_face_comes_back_within_a_tenth_of_a_micron(options) -> None:
    """The whole face, letters turned in their places included, is true."""
    assert differences(svg_figures(_svg(face(), options)), face(), 1e-4) == []


def test_arcs_stay_arcs() -> None:
    """A circular stroke is written as A commands, also where it goes all the way round."""
    for sweep in (90.0, 180.0, 360.0):
        (path,) = svg_root(_svg(page(Arc((1.0, 2.0), 30.0, 0.0, sweep, INK)))).iter(f"{SVG}path")
        assert re.sub(r"[-\d., ]", "", path.get("d")) == "M" + "A" * (
            3 if sweep == 360 else 2 if sweep > 120 else 1
        )


def test_lines_of_one_style_share_a_path() -> None:
    """120 marks of one style are one element, and a change of style starts the next."""
    marks = [Line((0, 0), (float(i), 10), INK) for i in range(120)]
    root = svg_root(_svg(page(*marks, Line((0, 0), (1, 1), FINE), marks[0])))
    assert [path.get("d").count("M") for path in root.iter(f"{SVG}path")] == [120, 1, 1]


def test_each_glyph_is_defined_once_and_placed_by_reference() -> None:
    """40 numerals of two inked letters need two definitions and eighty references."""
    root = svg_root(_svg(face()))
    defined = [path.get("id") for path in root.find(f"{SVG}defs")]
    used = [use.get(f"{XLINK}href") for use in root.iter(f"{SVG}use")]
    assert defined == ["glyph-0", "glyph-1"]
    assert (used.count("#glyph-0"), used.count("#glyph-1"), len(used)) == (40, 40, 80)


def test_inline_glyphs_need_no_references() -> None:
    """On request each letter is an outline in its place, without references or transforms."""
    root = svg_root(_svg(face(), INLINE))
    assert not list(root.iter(f"{SVG}use"))
    assert len(root.find(f"{SVG}defs")) == 0
    assert not [element for element in root.iter() if element.get("transform")]


def test_layers_are_groups_with_safe_names() -> None:
    """Each layer is a group named by its purpose and name."""
    root = svg_root(_svg(face()))
    assert [group.get("id") for group in root.findall(f"{SVG}g")] == [
        "print-scale_1",
        "cut-plate",
        "guide-pivot",
    ]


def test_title_and_words_are_there_for_readers_that_cannot_see() -> None:
    """The title and every string survive, markup characters and all."""
    root = svg_root(_svg(face()))
    assert root.find(f"{SVG}title").text == "Ampères & <volts>"
    words = [group for group in root.iter(f"{SVG}g") if group.get("role") == "img"]
    assert [word.get("aria-label") for word in words] == [f"{i} A" for i in range(40)]


@pytest.mark.parametrize("text", ["a\x00b", "a\x1bb", "a\ud800b", "a\uffffb"])
def test_characters_that_xml_cannot_hold_are_replaced(text: str) -> None:
    """A control character in a title leaves the file readable."""
    drawing = page(Letters(text, (), BLACK), title=text)
    assert svg_root(_svg(drawing)).find(f"{SVG}title").text == "a\ufffdb"


def test_ink_is_as_the_style_says() -> None:
    """Colour, width, cap and fill are the style's; lines and arcs are never filled."""
    both = Style(stroke="#112233", width_mm=0.25, fill="#445566")
    items = (Line((0, 0), (1, 1), ROUND), Circle((0, 0), 3.0, both), Arc((0, 0), 3.0, 0.0, 90.0, both))
    line, circle, arc = svg_root(_svg(page(*items))).find(f"{SVG}g")
    assert dict(line.attrib) == {
        "d": "M 0,0 L 1,-1",
        "fill": "none",
        "stroke": "#0000ff",
        "stroke-width": "0.4",
        "stroke-linecap": "round",
    }
    assert (circle.get("fill"), circle.get("stroke"), circle.get("stroke-width")) == (
        "#445566",
        "#112233",
        "0.25",
    )
    assert arc.get("fill") == "none"


def test_stroke_without_width_draws_nothing() -> None:
    """A style with a colour and no width has no stroke, as in the other formats."""
    (path,) = svg_root(_svg(page(Line((0, 0), (1, 1), Style(stroke="#000000"))))).iter(f"{SVG}path")
    assert path.get("stroke") is None


def test_glyph_turns_clockwise() -> None:
    """A letter turned by 90 degrees lies on its right side: its top points right."""
    letters = Letters("h", (Placed(HOOK, 10.0, 20.0, 4.0, 90.0),), BLACK)
    seen = np.vstack(svg_figures(_svg(page(letters))))
    # Upright it would span (10, 20) to (12, 22.9); a quarter turn sends (dx, dy) to (dy, -dx).
    assert seen.min(axis=0) == pytest.approx([10.0, 18.0], abs=0.01)
    assert seen.max(axis=0) == pytest.approx([12.9, 20.0], abs=0.03)


@many
@given(st.one_of(st.floats(-2000, 2000), st.floats(-1e-4, 1e-4)))
def test_numbers_are_plain_and_true_to_five_decimals(value: float) -> None:
    """A number has no exponent, no sign on nought, at most five decimals, and no further error."""
    text = number(value)
    assert re.fullmatch(r"-?(0|[1-9]\d*)(\.\d{0,4}[1-9])?", text)
    assert text != "-0"
    assert abs(float(text) - value) <= 5.0001e-6
