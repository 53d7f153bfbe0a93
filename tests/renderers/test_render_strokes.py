"""Letters in single strokes, in all four formats, read back in millimetres."""

from __future__ import annotations

import io
import math
import re
from itertools import groupby

import numpy as np
import pypdfium2.raw as pdf
import pytest
from hypothesis import given
from hypothesis import strategies as st
from PIL import Image
from render_readback import (
    MM_PER_POINT,
    SVG,
    XLINK,
    differences,
    dxf_document,
    dxf_figures,
    pdf_figures,
    pdf_objects,
    pdf_page,
    svg_figures,
    svg_root,
)
from render_samples import BAR, BLACK, INK, PEN, RING, STAFF, few, page

from dialgen.drawing import Cap, Letters, Line, Placed, Style
from dialgen.lettering import hand, letters
from dialgen.renderers import Options, render

MICRON_MM = 1e-3
INLINE = Options(inline_glyphs=True)
STROKES = hand(strokes=True)

placed = st.builds(
    Placed,
    st.sampled_from([STAFF, RING]),
    st.floats(-40, 40),
    st.floats(-40, 40),
    st.floats(1, 12),
    st.floats(-360, 360),
)
words = st.builds(Letters, st.just("ab"), st.lists(placed, min_size=1, max_size=3).map(tuple), st.just(PEN))


def _word(*sizes_mm: float, style: Style = PEN) -> Letters:
    """Return a staff and a ring of each size, side by side and turned."""
    return Letters(
        "ab",
        tuple(
            Placed(glyph, 12.0 * index + 5.0 * (glyph is RING), 3.0, size_mm, 15.0)
            for index, size_mm in enumerate(sizes_mm)
            for glyph in (STAFF, RING)
        ),
        style,
    )


def _svg_widths(data: bytes) -> list[float]:
    """Return the width in mm of each stroke of a letter: its own units times the scale it stands in."""
    widths = []
    for element in svg_root(data).iter(f"{SVG}path", f"{SVG}use"):
        family = [element, *element.iterancestors()]
        if any(parent.tag == f"{SVG}defs" for parent in family):
            continue
        own = next(float(e.get("stroke-width")) for e in family if e.get("stroke-width"))
        for parent in family:
            if transform := parent.get("transform"):
                a, b, c, d, _, _ = (float(n) for n in re.findall(r"[-\d.]+", transform))
                own *= math.sqrt(a * d - b * c)
        widths.append(own)
    return widths


@few
@given(st.lists(words, min_size=1, max_size=2))
def test_strokes_come_back_within_a_micron(items: list[Letters]) -> None:
    """SVG by reference and in place, and PDF, draw the strokes where the drawing has them, left open."""
    drawing = page(*items)
    found = {
        "svg": svg_figures(render(drawing, ".svg")),
        "svg in place": svg_figures(render(drawing, ".svg", INLINE)),
        "pdf": pdf_figures(render(drawing, ".pdf"), drawing),
    }
    assert {name: differences(figures, drawing, MICRON_MM) for name, figures in found.items()} == {
        name: [] for name in found
    }


@few
@given(st.lists(words, min_size=1, max_size=2))
def test_dxf_strokes_come_back_within_two_microns(items: list[Letters]) -> None:
    """DXF straightens the strokes' curves by no more than 0.002 mm."""
    drawing = page(*items)
    assert differences(dxf_figures(render(drawing, ".dxf")), drawing, 2.001e-3) == []


@pytest.mark.parametrize("options", [Options(), INLINE])
def test_svg_width_is_in_millimetres_at_any_size(options: Options) -> None:
    """Letters of three sizes in one string are all stroked 0.31 mm wide, to a tenth of a micron."""
    data = render(page(_word(2.0, 4.5, 30.0)), ".svg", options)
    widths = _svg_widths(data)
    assert len(widths) == 6
    assert widths == pytest.approx([0.31] * 6, abs=2e-4)
    assert _svg_widths(render(page(_word(3.3)), ".svg", options)) == pytest.approx([0.31] * 2, abs=5e-5)


@pytest.mark.parametrize("options", [Options(), INLINE])
def test_svg_ink_is_the_stroke(options: Options) -> None:
    """Strokes have the colour, round ends and round corners, and nothing is filled."""
    (word,) = (
        g for g in svg_root(render(page(_word(4.0)), ".svg", options)).iter(f"{SVG}g") if g.get("role")
    )
    assert {key: word.get(key) for key in ("fill", "stroke", "stroke-linecap", "stroke-linejoin")} == {
        "fill": "none",
        "stroke": "#112233",
        "stroke-linecap": "round",
        "stroke-linejoin": "round",
    }


def test_svg_defines_each_letter_once() -> None:
    """However often and large they stand, two letters are two definitions without ink of their own."""
    root = svg_root(render(page(_word(2.0, 4.5, 30.0), _word(2.0)), ".svg"))
    defined = list(root.find(f"{SVG}defs"))
    assert [sorted(path.keys()) for path in defined] == [["d", "id"], ["d", "id"]]
    assert len([use for use in root.iter(f"{SVG}use") if use.get(f"{XLINK}href")]) == 8
    assert "Z" not in "".join(path.get("d") for path in defined)


def test_pdf_width_is_in_millimetres_at_any_size() -> None:
    """Letters of three sizes are stroked 0.31 mm wide, not filled, in the colour of the stroke."""
    found = pdf_objects(render(page(_word(2.0, 4.5, 30.0)), ".pdf"))
    assert len(found) == 6
    assert [path.width * MM_PER_POINT for path in found] == pytest.approx([0.31] * 6, abs=1e-4)
    assert {(path.stroked, path.filled, path.in_form) for path in found} == {(True, False, True)}
    assert {path.stroke for path in found} == {(0x11, 0x22, 0x33)}


def test_pdf_defines_each_letter_once() -> None:
    """Two letters placed eight times are two forms."""
    data = render(page(_word(2.0, 4.5, 30.0), _word(2.0)), ".pdf")
    assert len(re.findall(rb"/Subtype\s*/Form\b", data)) == 2
    assert sum(path.in_form for path in pdf_objects(data)) == 8


def test_pdf_rounds_the_corners_of_letters_alone() -> None:
    """A line after strokes has its own width and sharp corners again; those of the letters are round."""
    data = render(page(_word(4.0), Line((0.0, 0.0), (10.0, 5.0), INK)), ".pdf")
    with pdf_page(data) as (_, shown):
        objects = [pdf.FPDFPage_GetObject(shown, i) for i in range(pdf.FPDFPage_CountObjects(shown))]
        assert pdf.FPDFPageObj_GetLineJoin(objects[-1]) == pdf.FPDF_LINEJOIN_MITER
        letter = pdf.FPDFFormObj_GetObject(objects[0], 0)
        assert pdf.FPDFPageObj_GetLineJoin(letter) == pdf.FPDF_LINEJOIN_ROUND
        assert pdf.FPDFPageObj_GetLineCap(letter) == pdf.FPDF_LINECAP_ROUND
    assert pdf_objects(data)[-1].width * MM_PER_POINT == pytest.approx(0.3, abs=1e-6)


@pytest.mark.parametrize("kind", ["png", "pdf"])
def test_ink_box_is_what_is_seen(kind: str) -> None:
    """Sharp corners are rounded: the ink seen is the box that lettering measures, to half a pixel."""
    if kind == "png":
        pytest.importorskip("cairo")
    word = letters("AMVW4Z1", 8.0, (0.0, 0.0), Style(fill="#000000"), anchor=(0.5, 0.0), hand=STROKES)
    drawing = page(word, left=-30.0, bottom=-5.0, width=60.0, height=20.0)
    scale = 600 / 25.4
    dark = _dark(kind, drawing, scale)
    rows, columns = np.nonzero(dark > 0.5)
    boxes = np.array([p.glyph.box for p in word.glyphs]) * word.glyphs[0].size_mm
    xs, ys = (np.array([getattr(p, axis) for p in word.glyphs]) for axis in "xy")
    assert drawing.left + columns.min() / scale == pytest.approx((xs + boxes[:, 0]).min(), abs=1 / scale)
    assert drawing.left + (columns.max() + 1) / scale == pytest.approx(
        (xs + boxes[:, 2]).max(), abs=1 / scale
    )
    assert drawing.top - (rows.max() + 1) / scale == pytest.approx((ys + boxes[:, 1]).min(), abs=1 / scale)
    assert drawing.top - rows.min() / scale == pytest.approx((ys + boxes[:, 3]).max(), abs=1 / scale)


@pytest.mark.parametrize("kind", ["png", "pdf"])
def test_amount_of_ink(kind: str) -> None:
    """An upright stroke 8/9 of 9 mm long and 1 mm wide with round ends covers 8 + pi/4 square mm."""
    if kind == "png":
        pytest.importorskip("cairo")
    bar = letters("I", 9.0, (0.0, 0.0), Style(fill="#000000"), hand=STROKES)
    scale = 600 / 25.4
    dark = _dark(kind, page(bar, left=-10.0, bottom=-10.0, width=20.0, height=20.0), scale)
    assert dark.sum() / scale**2 == pytest.approx(8 + math.pi / 4, rel=0.01)


def _dark(kind: str, drawing, scale: float) -> np.ndarray:
    """Return how dark each pixel is, 0 to 1, in our picture or in pdfium's of our PDF."""
    if kind == "png":
        picture = Image.open(io.BytesIO(render(drawing, ".png"))).convert("L")
        return 1 - np.asarray(picture, float) / 255
    with pdf_page(render(drawing, ".pdf")) as (_, shown):
        seen = shown.render(scale=scale * MM_PER_POINT).to_numpy()[:, :, 0]
    return 1 - seen.astype(float) / 255


def test_dxf_strokes_are_open_and_run_over_once() -> None:
    """A stroke is one polyline, open unless it comes back to its start; then it is closed, not doubled."""
    document = dxf_document(render(page(_word(4.0, 9.0)), ".dxf"))
    assert document.audit().errors == []
    staff, ring = (list(document.blocks[f"glyph-{number}"]) for number in (0, 1))
    assert [(e.dxftype(), e.closed) for e in staff] == [("LWPOLYLINE", False)] * 2
    assert [(e.dxftype(), e.closed) for e in ring] == [("LWPOLYLINE", True)]
    corners = [tuple(point[:2]) for point in ring[0]]
    assert math.dist(corners[0], corners[-1]) > 1e-3
    assert len(corners) == len(set(corners))
    assert len(document.modelspace().query("INSERT")) == 4


def test_dxf_width_follows_the_letters() -> None:
    """The nearest width that DXF knows is on each letter, and its block takes it from there."""
    document = dxf_document(render(page(_word(4.0)), ".dxf"))
    assert {entity.dxf.lineweight for entity in document.modelspace()} == {30}
    assert {entity.dxf.lineweight for entity in document.blocks["glyph-0"]} == {-2}


@pytest.mark.parametrize("suffix", [".svg", ".pdf", ".dxf"])
def test_outlines_and_strokes_side_by_side(suffix: str) -> None:
    """A drawing may hold letters of both kinds, each inked in its own way."""
    both = page(Letters("l", (Placed(BAR, -20.0, 0.0, 10.0),), BLACK), _word(4.0))
    found = {
        ".svg": svg_figures,
        ".pdf": lambda data: pdf_figures(data, both),
        ".dxf": dxf_figures,
    }[suffix](render(both, suffix))
    assert differences(found, both, 2.001e-3) == []
    if suffix == ".pdf":
        inks = [(p.stroked, p.filled) for p in pdf_objects(render(both, suffix))]
        assert [kind for kind, _ in groupby(inks)] == [(False, True), (True, False)]


@pytest.mark.parametrize(
    "style", [Style(fill="#000000"), Style(stroke="#000000"), Style(width_mm=0.3, cap=Cap.ROUND)]
)
def test_strokes_without_a_pen_draw_nothing(style: Style) -> None:
    """Strokes are never filled; without a colour or a width nothing shows."""
    drawing = page(_word(4.0, style=style))
    assert pdf_objects(render(drawing, ".pdf")) == []
    (word,) = (g for g in svg_root(render(drawing, ".svg")).iter(f"{SVG}g") if g.get("role"))
    assert (word.get("fill"), word.get("stroke")) == ("none", None)


def test_lettering_of_a_dial_comes_back() -> None:
    """What lettering makes of a dial's texts is true in every format, curves and corners and all."""
    texts = ["−0.5", "10³ Ω", "∞", "é%"]
    words = [
        letters(text, 2.2, (-35.0 + 10 * i, 20.0), Style(fill="#000000"), angle_deg=13.0 * i, hand=STROKES)
        for i, text in enumerate(texts)
    ]
    drawing = page(*words)
    assert differences(svg_figures(render(drawing, ".svg")), drawing, MICRON_MM) == []
    assert differences(svg_figures(render(drawing, ".svg", INLINE)), drawing, MICRON_MM) == []
    assert differences(pdf_figures(render(drawing, ".pdf"), drawing), drawing, MICRON_MM) == []
    assert differences(dxf_figures(render(drawing, ".dxf")), drawing, 2.001e-3) == []
    assert _svg_widths(render(drawing, ".svg")) == pytest.approx([2.2 / 9] * 11, abs=1e-4)
