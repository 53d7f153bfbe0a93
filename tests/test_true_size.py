"""True size against published figures: sheets of ISO 216, and the inch of CSS and PDF."""

from __future__ import annotations

import io
import re
from pathlib import Path

import pypdfium2
import pytest

from dialgen.drawing import Drawing, Layer, Line, Purpose, Style
from dialgen.renderers import Options, render

# Sizes in millimetres: A3 to A6 by ISO 216, Letter and Legal by definition in inches; in points as
# published for PDF and PostScript page sizes (A4 595.2756 x 841.8898, Letter 612 x 792).
SHEETS = {
    "A3": (297.0, 420.0, 841.8898, 1190.5512),
    "A4": (210.0, 297.0, 595.2756, 841.8898),
    "A5": (148.0, 210.0, 419.5276, 595.2756),
    "A6": (105.0, 148.0, 297.6378, 419.5276),
    "Letter": (215.9, 279.4, 612.0, 792.0),
    "Legal": (215.9, 355.6, 612.0, 1008.0),
}


def sheet(width_mm: float, height_mm: float) -> Drawing:
    """A page with one line corner to corner."""
    line = Line((0.0, 0.0), (width_mm, height_mm), Style(stroke="#000000", width_mm=0.2))
    layer = Layer(name="line", purpose=Purpose.PRINT, items=(line,))
    return Drawing(left=0.0, bottom=0.0, width=width_mm, height=height_mm, layers=(layer,))


@pytest.mark.parametrize(("width", "height", "points_wide", "points_high"), SHEETS.values(), ids=SHEETS)
def test_pdf_pages_have_the_published_sizes(
    width: float, height: float, points_wide: float, points_high: float
) -> None:
    """A page of a standard sheet measures its published points, read back by pdfium."""
    page = pypdfium2.PdfDocument(render(sheet(width, height), ".pdf"))[0]
    assert page.get_size() == pytest.approx((points_wide, points_high), abs=3e-4)


@pytest.mark.parametrize(("width", "height", "_w", "_h"), SHEETS.values(), ids=SHEETS)
def test_svg_pages_are_in_millimetres(width: float, height: float, _w: float, _h: float) -> None:
    """An SVG states its size in mm, and its user unit is a millimetre."""
    head = render(sheet(width, height), ".svg").decode()[:400]
    assert re.search(rf'width="{width:g}mm"', head)
    assert re.search(rf'height="{height:g}mm"', head)
    assert f'viewBox="0 {-height:g} {width:g} {height:g}"' in head


@pytest.mark.parametrize("dpi", [96.0, 300.0, 600.0])
def test_an_inch_has_its_dots(dpi: float) -> None:
    """A square inch (25.4 mm) at n dots per inch is n by n pixels, and says so (CSS: 1 in = 96 px)."""
    pytest.importorskip("cairo")
    image_module = pytest.importorskip("PIL.Image")
    image = image_module.open(io.BytesIO(render(sheet(25.4, 25.4), ".png", Options(resolution_dpi=dpi))))
    assert image.size == (dpi, dpi)
    # PNG (RFC 2083, pHYs) holds whole dots to the metre: half of one is 0.0127 to the inch.
    assert image.info["dpi"] == pytest.approx((dpi, dpi), abs=0.0127)


def test_a_sample_keeps_its_size_in_print() -> None:
    """The battery ammeter's plate of 84 by 66 mm with 3 mm of paper around is 90 by 72 mm in its PDF."""
    path = Path(__file__).parents[1] / "samples" / "battery-ammeter" / "battery-ammeter.pdf"
    width, height = pypdfium2.PdfDocument(path)[0].get_size()
    assert (width / 72 * 25.4, height / 72 * 25.4) == pytest.approx((90.0, 72.0), abs=1e-3)
