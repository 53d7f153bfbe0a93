"""Drawing to PDF: a page of exactly the drawing's size that asks not to be scaled in printing."""

from __future__ import annotations

import io
import math
from collections.abc import Iterable, Mapping
from functools import lru_cache
from typing import assert_never

from reportlab.pdfbase.pdfdoc import PDFObject
from reportlab.pdfgen.canvas import FILL_NON_ZERO, Canvas
from reportlab.pdfgen.pathobject import PDFPathObject

from dialgen.drawing import Arc, Cap, Circle, Drawing, Glyph, Letters, Outline, PathStep, Placed
from dialgen.renderers import Options
from dialgen.renderers.curves import cubic, steps
from dialgen.renderers.runs import Lines, Run, fill_of, inked_glyphs, rgb, runs, stroke_of

POINTS_PER_MM = 72 / 25.4
_MITRE_JOIN, _ROUND_JOIN = 0, 1


def render(drawing: Drawing, options: Options) -> bytes:
    """Return ``drawing`` as a PDF of one page."""
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
        # The canvas makes forms of its own only; its document takes any object.
        canvas._doc.addForm(name, _Form(glyph))
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
            if stroke:
                canvas.setLineJoin(_ROUND_JOIN)
            for placed in run.glyphs:
                if placed.glyph.path:
                    _place(canvas, placed, forms[placed.glyph.name], run.style.width_mm if stroke else 0.0)
            if stroke:
                canvas.setLineJoin(_MITRE_JOIN)
        case _:
            assert_never(run)


def _path(path_steps: Iterable[PathStep]) -> PDFPathObject:
    path = PDFPathObject()
    draw = {"M": path.moveTo, "L": path.lineTo, "C": path.curveTo, "Z": path.close}
    for code, values in path_steps:
        draw[code](*values)
    return path


class _Form(PDFObject):  # type: ignore[misc]  # reportlab has no types
    """A letter as a Form XObject, ready written.

    reportlab's own form names a font at the head of its stream and lists every resource of the
    document, which for fifteen letters takes longer than the rest of the face.
    """

    def __init__(self, glyph: Glyph) -> None:
        self.glyph = glyph

    def format(self, document: object) -> bytes:
        """Return the object as it stands in the file."""
        return _glyph_form(self.glyph)


@lru_cache(maxsize=4096)
def _glyph_form(glyph: Glyph) -> bytes:
    """Return a letter's form; it belongs to the font, and every face that uses it shares it."""
    # Curves stay inside the box of their control points, and strokes of any sense within half an em
    # of them, so nothing is cut off.
    clear = 0.5 if glyph.stroked else 0.01
    xs = [x for _, values in glyph.path for x in values[::2]]
    ys = [y for _, values in glyph.path for y in values[1::2]]
    box = f"{min(xs) - clear:.4f} {min(ys) - clear:.4f} {max(xs) + clear:.4f} {max(ys) + clear:.4f}"
    stream = f"{_path(cubic(glyph.path)).getCode()} {'S' if glyph.stroked else 'f'}"
    head = f"<< /Type /XObject /Subtype /Form /BBox [ {box} ] /Resources << >> /Length {len(stream)} >>"
    return f"{head}\nstream\n{stream}\nendstream".encode("ascii")


def _place(canvas: Canvas, placed: Placed, form: str, width_mm: float) -> None:
    turn = math.radians(placed.angle_deg)
    along, across = placed.size_mm * math.cos(turn), placed.size_mm * math.sin(turn)
    canvas.saveState()
    canvas.transform(along, -across, across, along, placed.x, placed.y)
    if width_mm:
        # In ems, as everything under the matrix is.
        canvas.setLineWidth(width_mm / placed.size_mm)
    canvas.doForm(form)
    canvas.restoreState()
