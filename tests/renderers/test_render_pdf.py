"""PDF files, read back with pdfium."""

from __future__ import annotations

import ctypes
import math
import re

import numpy as np
import pypdfium2.raw as pdf
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st
from render_readback import MM_PER_POINT, differences, pdf_figures, pdf_objects, pdf_page
from render_samples import BAR, BLACK, FINE, INK, ROUND, arcs, face, lines, many, outlines, page

from dialgen.drawing import Arc, Circle, Glyph, Letters, Line, Placed, Style
from dialgen.renderers import render

MICRON_MM = 1e-3


def _pdf(drawing):
    return render(drawing, ".pdf")


def _back(drawing):
    return pdf_figures(_pdf(drawing), drawing)


@many
@given(st.floats(10, 1500), st.floats(10, 1500))
def test_page_is_the_drawings_size_to_a_micron(width: float, height: float) -> None:
    """The media box starts at nought and is as large as the page."""
    data = _pdf(page(Line((0, 0), (1, 1), INK), width=width, height=height))
    (box,) = re.findall(rb"/MediaBox \[\s*([-\d.\s]+)\]", data)
    left, bottom, right, top = (float(n) * MM_PER_POINT for n in box.split())
    assert (left, bottom) == (0, 0)
    assert abs(right - width) < MICRON_MM
    assert abs(top - height) < MICRON_MM


def test_page_asks_not_to_be_scaled() -> None:
    """The viewer preference PrintScaling is None, in a PDF version that has it."""
    with pdf_page(_pdf(face())) as (document, _):
        assert not pdf.FPDF_VIEWERREF_GetPrintScaling(document)
        name = ctypes.create_string_buffer(20)
        assert pdf.FPDF_VIEWERREF_GetName(document, b"PrintScaling", name, 20)
        assert name.value == b"None"
        assert document.get_version() >= 16


def test_title_is_in_the_metadata() -> None:
    """The title comes back with its accents; the date is always the same."""
    with pdf_page(_pdf(page(title="Ampères Ω & <volts>"))) as (document, _):
        assert document.get_metadata_value("Title") == "Ampères Ω & <volts>"
        assert document.get_metadata_value("CreationDate").startswith("D:20000101")


def test_page_is_compressed() -> None:
    """No drawing operator stands in the file in clear."""
    data = _pdf(face())
    assert b"/FlateDecode" in data
    assert b" l n " not in data


@many
@given(st.lists(lines, min_size=1, max_size=20))
def test_lines_come_back_within_a_micron(items) -> None:
    """Every mark stands where the drawing has it."""
    assert differences(_back(page(*items)), page(*items), MICRON_MM) == []


@many
@given(outlines())
def test_outlines_come_back_within_a_micron(item) -> None:
    """Outlines turn the right way at every edge."""
    assert differences(_back(page(item)), page(item), MICRON_MM) == []


@many
@given(arcs())
def test_arcs_are_whole(item) -> None:
    """An arc covers its whole sweep and no more."""
    assert differences(_back(page(item)), page(item), MICRON_MM) == []


@many
@given(arcs())
def test_radius_is_true_to_a_tenth_of_a_micron_all_along(item) -> None:
    """No point of the curves leaves the circle by more than 0.1 µm."""
    # pdfium reads in single precision, and far from the pivot that alone is a tenth of a micron.
    assume(math.hypot(*item.centre) + item.radius_mm < 100)
    (figure,) = _back(page(item))
    radius = np.hypot(*(figure - item.centre).T)
    assert np.abs(radius - item.radius_mm).max() < 1e-4


def test_face_comes_back_within_a_micron() -> None:
    """The whole face, letters turned in their places included, is true."""
    assert differences(_back(face()), face(), MICRON_MM) == []


def test_lines_of_one_style_share_a_path() -> None:
    """120 marks of one style are one path, and a change of style starts the next."""
    marks = [Line((0, 0), (float(i), 10), INK) for i in range(120)]
    found = pdf_objects(_pdf(page(*marks, Line((0, 0), (1, 1), FINE), marks[0])))
    assert [len(path.contours) for path in found] == [120, 1, 1]


def test_each_glyph_is_a_form_defined_once() -> None:
    """40 numerals of two inked letters need two forms and eighty placements."""
    data = _pdf(face())
    assert len(re.findall(rb"/Subtype\s*/Form\b", data)) == 2
    assert sum(found.in_form for found in pdf_objects(data)) == 80


def test_glyph_is_not_cut_off_where_its_box_is_too_small() -> None:
    """The form's box comes from the outline, not from what the glyph says of itself."""
    small = Glyph("small", BAR.path, (0.1, 0.0, 0.2, 0.1))
    data = _pdf(page(Letters("l", (Placed(small, 0.0, 0.0, 10.0),), BLACK)))
    with pdf_page(data) as (_, shown):
        picture = shown.render(scale=10).to_numpy()
    # 10 mm ems: the bar is 2 by 7 mm.
    ink = (picture[:, :, 0] < 128).sum() * (MM_PER_POINT / 10) ** 2
    assert ink == pytest.approx(14.0, rel=0.02)


def test_ink_is_as_the_style_says() -> None:
    """Colour, width and fill are the style's; lines and arcs are never filled."""
    both = Style(stroke="#112233", width_mm=0.25, fill="#445566")
    items = (
        Line((0, 0), (1, 1), ROUND),
        Circle((0, 0), 3.0, both),
        Arc((0, 0), 3.0, 0.0, 90.0, both),
        Letters("l", (Placed(BAR, 0.0, 0.0, 10.0),), Style(fill="#00ff00")),
    )
    line, circle, arc, letter = pdf_objects(_pdf(page(*items)))
    assert (line.stroked, line.filled, line.stroke) == (True, False, (0, 0, 255))
    assert line.width * MM_PER_POINT == pytest.approx(0.4, abs=1e-6)
    assert (circle.stroked, circle.filled) == (True, True)
    assert (circle.stroke, circle.fill) == ((0x11, 0x22, 0x33), (0x44, 0x55, 0x66))
    assert (arc.stroked, arc.filled) == (True, False)
    assert (letter.stroked, letter.filled) == (False, True)


def test_letters_take_the_colour_of_their_style() -> None:
    """A form has no colour of its own: one glyph shows green here and black there."""
    green, black = (
        Letters("l", (Placed(BAR, x, 0.0, 20.0),), Style(fill=fill))
        for x, fill in ((-20.0, "#00ff00"), (10.0, "#000000"))
    )
    with pdf_page(_pdf(page(green, black))) as (_, shown):
        picture = shown.render(scale=2, rev_byteorder=True).to_numpy()[:, :, :3].reshape(-1, 3)
    colours = {tuple(pixel) for pixel in picture}
    assert {(0, 255, 0), (0, 0, 0), (255, 255, 255)} <= colours


def test_invisible_things_are_left_out() -> None:
    """A stroke without width is not PDF's thinnest possible line; it is nothing."""
    hidden = Style(stroke="#000000")
    assert pdf_objects(_pdf(page(Line((0, 0), (1, 1), hidden), Circle((0, 0), 1.0, Style())))) == []
