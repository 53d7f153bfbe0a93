"""DXF files, read back with ezdxf's reader."""

from __future__ import annotations

import math
from concurrent.futures import ThreadPoolExecutor

import ezdxf
import pytest
from hypothesis import given
from hypothesis import strategies as st
from render_readback import differences, dxf_document, dxf_figures
from render_samples import BLACK, CUT, FINE, HOOK, INK, ZONE, arcs, face, few, lines, outlines, page

from dialgen.drawing import Arc, Circle, Layer, Letters, Line, Outline, Placed, Purpose, Style, Vertex
from dialgen.renderers import render


def _dxf(drawing):
    return render(drawing, ".dxf")


def test_file_has_no_faults() -> None:
    """Ezdxf's audit finds no error and mends nothing."""
    auditor = dxf_document(_dxf(face())).audit()
    assert (auditor.errors, auditor.fixes) == ([], [])


def test_unit_is_the_millimetre() -> None:
    """The header says millimetres and metric, and where the page lies."""
    header = dxf_document(_dxf(face())).header
    assert (header["$INSUNITS"], header["$MEASUREMENT"]) == (4, 1)
    assert header["$EXTMIN"] == pytest.approx((-50.0, -12.5, 0.0))
    assert header["$EXTMAX"] == pytest.approx((53.7, 58.8, 0.0))


@few
@given(st.lists(lines, min_size=1, max_size=20))
def test_lines_come_back_exactly(items) -> None:
    """Every mark is a LINE with the drawing's own coordinates."""
    found = list(dxf_document(_dxf(page(*items))).modelspace())
    assert [entity.dxftype() for entity in found] == ["LINE"] * len(items)
    for entity, item in zip(found, items, strict=True):
        assert tuple(entity.dxf.start.vec2) == pytest.approx(item.start, abs=1e-9)
        assert tuple(entity.dxf.end.vec2) == pytest.approx(item.end, abs=1e-9)


@few
@given(arcs())
def test_arcs_stay_arcs_and_come_back_exactly(item) -> None:
    """An arc is an ARC, or a CIRCLE where it goes all the way round, true to a micron."""
    data = _dxf(page(item))
    (entity,) = dxf_document(data).modelspace()
    assert entity.dxftype() == ("CIRCLE" if item.end_deg - item.start_deg >= 360 else "ARC")
    assert entity.dxf.radius == item.radius_mm
    assert differences(dxf_figures(data), page(item), 1e-3) == []


@few
@given(outlines())
def test_outlines_are_one_closed_polyline(item) -> None:
    """An outline is one LWPOLYLINE whose bulges turn the right way."""
    data = _dxf(page(item))
    (entity,) = dxf_document(data).modelspace()
    assert (entity.dxftype(), entity.closed, len(entity)) == ("LWPOLYLINE", True, len(item.vertices))
    assert differences(dxf_figures(data), page(item), 1e-3) == []


def test_clockwise_quarter_has_the_bulge_of_the_handbook() -> None:
    """DXF's bulge is tan(turn / 4), anticlockwise positive: -0.41421 for a clockwise quarter."""
    corners = (Vertex(0, 0, 90.0), Vertex(1, 1), Vertex(1, 0))
    (entity,) = dxf_document(_dxf(page(Outline(corners, CUT)))).modelspace()
    assert entity[0][4] == pytest.approx(-(math.sqrt(2) - 1))


def test_arc_without_length_is_not_a_circle() -> None:
    """An arc that ends where it starts is left out; DXF would read it as the whole circle."""
    assert not list(dxf_document(_dxf(page(Arc((0, 0), 5.0, 30.0, 30.0, INK)))).modelspace())


def test_face_comes_back_with_letters_within_two_microns() -> None:
    """The whole face is true; letters are flattened by at most 0.002 mm at the size placed."""
    assert differences(dxf_figures(_dxf(face())), face(), 2.001e-3) == []
    assert differences(dxf_figures(_dxf(face())), face(), 1e-4) != []


def test_large_letters_are_flattened_as_finely_as_small_ones() -> None:
    """A glyph placed at two sizes is true at the larger."""
    letters = Letters("hh", tuple(Placed(HOOK, 0.0, 0.0, size) for size in (2.0, 60.0)), BLACK)
    assert differences(dxf_figures(_dxf(page(letters))), page(letters), 2.001e-3) == []


def test_each_glyph_is_a_block_defined_once() -> None:
    """40 numerals of two inked letters need two blocks and eighty insertions."""
    document = dxf_document(_dxf(face()))
    assert sorted(block.name for block in document.blocks if not block.is_any_layout) == [
        "glyph-0",
        "glyph-1",
    ]
    assert len(document.modelspace().query("INSERT")) == 80
    assert all(entity.closed for entity in document.blocks["glyph-0"])


def test_layers_are_named_and_coloured_by_purpose() -> None:
    """Print is black or white, what is cut is red, guides are blue, and each item is on its layer."""
    document = dxf_document(_dxf(face()))
    colours = {layer.dxf.name: layer.color for layer in document.layers}
    assert {name: colours[name] for name in ("print-scale_1", "cut-plate", "guide-pivot")} == {
        "print-scale_1": 7,
        "cut-plate": 1,
        "guide-pivot": 5,
    }
    assert [e.dxftype() for e in document.modelspace().query('*[layer=="cut-plate"]')] == [
        "LWPOLYLINE",
        "CIRCLE",
    ]
    assert len(document.modelspace().query('*[layer=="print-scale_1"]')) == 1 + 120 + 3 + 80


def test_width_is_the_nearest_that_dxf_knows() -> None:
    """0.3 mm is kept, 0.33 mm becomes 0.35 mm."""
    styles = [Style(stroke="#000000", width_mm=width) for width in (0.3, 0.33)]
    found = dxf_document(_dxf(page(*(Line((0, 0), (1, 1), style) for style in styles)))).modelspace()
    assert [entity.dxf.lineweight for entity in found] == [30, 35]


def test_colour_of_print_is_kept_and_black_is_the_layers() -> None:
    """A red zone stays red; black follows the layer, so that it shows on a dark screen."""
    circles = (Circle((0, 0), 3.0, ZONE), Circle((0, 0), 3.0, FINE))
    zone, black = dxf_document(_dxf(page(*circles))).modelspace()
    assert zone.rgb == (0xCC, 0x22, 0x00)
    assert black.rgb is None
    cut = Layer(name="edge", purpose=Purpose.CUT, items=(Circle((0, 0), 3.0, ZONE),))
    (edge,) = dxf_document(_dxf(page(layers=(cut,)))).modelspace()
    assert edge.rgb is None


def test_library_switch_is_put_back_even_by_many_threads() -> None:
    """Ezdxf's global switch for fixed dates is as it was, and files drawn side by side are equal."""
    before = ezdxf.options.write_fixed_meta_data_for_testing
    with ThreadPoolExecutor(4) as pool:
        files = list(pool.map(_dxf, [face()] * 6))
    assert len(set(files)) == 1
    assert ezdxf.options.write_fixed_meta_data_for_testing == before


def test_library_switch_is_put_back_after_a_failure() -> None:
    """An error while drawing leaves the switch as it was."""
    with pytest.raises(AttributeError):
        _dxf(page("no primitive"))
    assert ezdxf.options.write_fixed_meta_data_for_testing is False
