"""Drawing to PDF: a page of exactly the drawing's size that asks not to be scaled in printing."""

from __future__ import annotations

import io
import math
from collections.abc import Iterable, Mapping
from functools import lru_cache
from typing import assert_never

from reportlab.pdfbase.pdfdoc import BasicFonts, PDFDictionary, PDFObjectReference
from reportlab.pdfgen.canvas import FILL_NON_ZERO, Canvas
from reportlab.pdfgen.pathobject import PDFPathObject

from dialgen.drawing import Arc, Cap, Circle, Drawing, Glyph, Letters, Outline, PathStep, Placed
from dialgen.renderers import Options
from dialgen.renderers.curves import cubic, steps
from dialgen.renderers.runs import Lines, Run, fill_of, inked_glyphs, rgb, runs, stroke_of

POINTS_PER_MM = 72 / 25.4
_FORM_RESOURCES = PDFDictionary({"Font": PDFObjectReference(BasicFonts)})


def render(drawing: Drawing, options: Options) -> bytes:
    """Return ``drawing`` as a PDF of one page.

    Letters are filled outlines; their stroke is not looked at.
    """
    scale = POINTS_PER_MM
    canvas = Canvas(
        io.BytesIO(),
        pagesize=(drawing.width * scale, drawing.height * scale),
        pageCompression=1,
        invariant=1,
        pdfVersion=(1, 6),  # the first with the preference PrintScaling
    )
    canvas.setTitle(drawing.title)
    canvas.setViewerPreference("PrintScaling", "None")
    glyphs = inked_glyphs(drawing)
    for name, glyph in glyphs.items():
        _define(canvas, glyph, name)
    forms = {glyph.name: name for name, glyph in glyphs.items()}
    # reportlab writes six digits, so the scale is set once and every coordinate then is in
    # millimetres, with four decimals at least.
    canvas.transform(scale, 0, 0, scale, -drawing.left * scale, -drawing.bottom * scale)
    for layer in drawing.layers:
        for run in runs(layer.items):
            _draw(canvas, run, forms)
    canvas.showPage()
    data: bytes = canvas.getpdfdata()
    return data


def _draw(canvas: Canvas, run: Run, forms: Mapping[str, str]) -> None:
    stroke, fill = stroke_of(run), fill_of(run)
    if fill:
        canvas.setFillColorRGB(*(part / 255 for part in rgb(fill)))
    if stroke:
        canvas.setStrokeColorRGB(*(part / 255 for part in rgb(stroke)))
        canvas.setLineWidth(run.style.width_mm)
        canvas.setLineCap(1 if run.style.cap is Cap.ROUND else 0)
    if not (stroke or fill):
        return
    match run:
        case Lines() | Arc() | Circle() | Outline():
            path = _path(steps(run))
            canvas.drawPath(path, stroke=bool(stroke), fill=bool(fill), fillMode=FILL_NON_ZERO)
        case Letters():
            for placed in run.glyphs:
                if placed.glyph.path:
                    _place(canvas, placed, forms[placed.glyph.name])
        case _:
            assert_never(run)


@lru_cache(maxsize=4096)
def _glyph_path(glyph: Glyph) -> PDFPathObject:
    """Return a letter's outline; it belongs to the font, and every face that uses it shares it."""
    return _path(cubic(glyph.path))


def _path(path_steps: Iterable[PathStep]) -> PDFPathObject:
    path = PDFPathObject()
    draw = {"M": path.moveTo, "L": path.lineTo, "C": path.curveTo, "Z": path.close}
    for code, values in path_steps:
        draw[code](*values)
    return path


def _define(canvas: Canvas, glyph: Glyph, form: str) -> None:
    # Curves stay inside the box of their control points, so nothing is cut off.
    xs = [x for _, values in glyph.path for x in values[::2]]
    ys = [y for _, values in glyph.path for y in values[1::2]]
    canvas.beginForm(form, min(xs) - 0.01, min(ys) - 0.01, max(xs) + 0.01, max(ys) + 0.01)
    canvas.drawPath(_glyph_path(glyph), stroke=0, fill=1, fillMode=FILL_NON_ZERO)
    # A letter needs no more than the font that reportlab names at the head of every stream; its
    # few hundred bytes are not worth a compressor.
    canvas.endForm(Resources=_FORM_RESOURCES, compression=0)


def _place(canvas: Canvas, placed: Placed, form: str) -> None:
    turn = math.radians(placed.angle_deg)
    along, across = placed.size_mm * math.cos(turn), placed.size_mm * math.sin(turn)
    canvas.saveState()
    canvas.transform(along, -across, across, along, placed.x, placed.y)
    canvas.doForm(form)
    canvas.restoreState()
