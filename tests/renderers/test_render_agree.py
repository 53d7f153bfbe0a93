"""The four formats show the same drawing, and the comparator that says so can fail."""

from __future__ import annotations

import io
from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from PIL import Image
from render_readback import differences, dxf_figures, pdf_figures, svg_figures
from render_samples import BAR, BLACK, CUT, HOOK, INK, arcs, face, few, lines, outlines, page

from dialgen.drawing import Arc, Circle, Drawing, Letters, Line, Outline, Placed, Vertex
from dialgen.renderers import Options, render

MICRON_MM = 1e-3

placed = st.builds(
    Placed,
    st.just(BAR),
    st.floats(-40, 40),
    st.floats(-40, 40),
    st.floats(1, 12),
    st.floats(-360, 360),
)
letters = st.builds(Letters, st.just("11"), st.lists(placed, max_size=3).map(tuple), st.just(BLACK))


def _figures(drawing: Drawing) -> dict[str, list[np.ndarray]]:
    return {
        "svg": svg_figures(render(drawing, ".svg")),
        "svg in place": svg_figures(render(drawing, ".svg", Options(inline_glyphs=True))),
        "pdf": pdf_figures(render(drawing, ".pdf"), drawing),
        "dxf": dxf_figures(render(drawing, ".dxf")),
    }


@few
@given(
    st.lists(st.one_of(lines, arcs(), outlines(), letters), min_size=1, max_size=8),
    st.floats(-80, 20),
    st.floats(-80, 20),
)
def test_vector_formats_show_the_drawing_within_a_micron(items, left: float, bottom: float) -> None:
    """Whatever is drawn, and wherever the page lies, SVG, PDF and DXF agree with it and so together."""
    drawing = page(*items, left=left, bottom=bottom)
    assert {name: differences(found, drawing, MICRON_MM) for name, found in _figures(drawing).items()} == {
        name: [] for name in ("svg", "svg in place", "pdf", "dxf")
    }


def test_picture_agrees_with_the_vectors_within_half_a_pixel() -> None:
    """The middle of each dot of a grid is the same in the picture and in the three vector files."""
    pytest.importorskip("cairo")
    middles = [(x, y) for x in range(-45, 50, 15) for y in range(-5, 56, 15)]
    drawing = page(*(Circle((x + 0.013 * y, y - 0.017 * x), 0.7, BLACK) for x, y in middles))
    scale = 600 / 25.4
    ink = 255.0 - np.asarray(Image.open(io.BytesIO(render(drawing, ".png"))).convert("L"), dtype=float)
    rows, columns = np.nonzero(ink)
    x, y = drawing.left + (columns + 0.5) / scale, drawing.top - (rows + 0.5) / scale
    for figures in _figures(drawing).values():
        assert len(figures) == len(middles)
        for figure in figures:
            centre = (figure.min(axis=0) + figure.max(axis=0)) / 2
            near = np.hypot(x - centre[0], y - centre[1]) < 1.5
            weight = ink[rows, columns][near]
            seen = (x[near] * weight).sum() / weight.sum(), (y[near] * weight).sum() / weight.sum()
            assert np.abs(seen - centre).max() < 0.5 / scale


def test_picture_has_ink_all_along_every_stroke_of_the_face() -> None:
    """Every point of every stroke read from the SVG is dark in the picture."""
    pytest.importorskip("cairo")
    drawing = replace(face(), layers=face().layers[:1])
    scale = 600 / 25.4
    picture = np.asarray(Image.open(io.BytesIO(render(drawing, ".png"))).convert("RGB")).min(axis=2)
    for figure in svg_figures(render(drawing, ".svg"))[1:124]:
        # Off the very ends, where a butt cap stops half way through a pixel.
        points = figure[5:-5] if len(figure) > 20 else figure.mean(axis=0)[None]
        columns = ((points[:, 0] - drawing.left) * scale).astype(int)
        rows = ((drawing.top - points[:, 1]) * scale).astype(int)
        assert picture[rows, columns].max() < 128


ITEMS = (
    Line((0.0, 0.0), (10.0, 20.0), INK),
    Arc((1.0, 2.0), 30.0, -45.0, 45.0, INK),
    Circle((3.0, 4.0), 5.0, CUT),
    Outline((Vertex(0, 0, 60.0), Vertex(10, 0), Vertex(5, 8)), CUT),
    Letters("h", (Placed(HOOK, 1.0, 2.0, 5.0, 30.0),), BLACK),
)
WRONG = (
    replace(ITEMS[0], end=(10.0, 20.0015)),
    replace(ITEMS[1], end_deg=45.01),
    replace(ITEMS[2], radius_mm=5.0015),
    replace(ITEMS[3], vertices=(Vertex(0, 0, -60.0), *ITEMS[3].vertices[1:])),
    replace(ITEMS[4], glyphs=(Placed(HOOK, 1.0, 2.0, 5.0, -30.0),)),
)


@pytest.mark.parametrize("index", range(len(ITEMS)))
def test_comparator_fails_where_one_figure_is_out(index: int) -> None:
    """A line, arc, circle, outline or letter that is off by little more than a micron is found, it alone."""
    true = page(*ITEMS)
    wrong = page(*ITEMS[:index], WRONG[index], *ITEMS[index + 1 :])
    for name in ("svg", "svg in place", "pdf"):
        assert differences(_figures(true)[name], true, MICRON_MM) == []
        found = differences(_figures(wrong)[name], true, MICRON_MM)
        assert found
        assert len({text.split(":")[0] for text in found}) == (
            2 if index == 4 else 1
        )  # a hook has two contours


def test_comparator_fails_where_something_is_missing_moved_or_scaled() -> None:
    """A figure too few, a page shifted by 2 µm and one larger by a ten-thousandth are all found."""
    drawing = page(*ITEMS)
    figures = _figures(drawing)["pdf"]
    assert differences(figures[1:], drawing, MICRON_MM) == ["5 figures instead of 6"]
    assert len(differences([figure + np.array([0.002, 0]) for figure in figures], drawing, MICRON_MM)) == 6
    assert differences([figure * 1.0001 for figure in figures], drawing, MICRON_MM)
    half = [figures[0], figures[1][: len(figures[1]) // 2], *figures[2:]]
    assert len(differences(half, drawing, MICRON_MM)) == 1
