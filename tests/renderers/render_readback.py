"""Reads files back with libraries that did not write them, and compares them with the drawing.

A reader gives a list of figures in drawing order: one array of points for each stroke or contour,
in plate coordinates (millimetres, y up), close enough together to stand for the curve.  The
comparator works out each figure's exact distance from what the drawing says, by formulas of its own.
"""

from __future__ import annotations

import ctypes
import io
import math
import re
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from itertools import pairwise

import ezdxf.document
import numpy as np
import pypdfium2 as pdfium
import pypdfium2.raw as pdf
from ezdxf.entities import DXFGraphic
from ezdxf.filemanagement import read
from lxml import etree

from dialgen.drawing import Arc, Circle, Drawing, Letters, Line, Outline

STEP_DEG = 0.2
PIECES = 100
SVG = "{http://www.w3.org/2000/svg}"
XLINK = "{http://www.w3.org/1999/xlink}"
MM_PER_POINT = 25.4 / 72

Figure = np.ndarray


# ---------------------------------------------------------------- SVG, by lxml


def svg_root(data: bytes) -> etree._Element:
    """Return the root of an SVG file."""
    return etree.fromstring(data)


def svg_figures(data: bytes) -> list[Figure]:
    """Return every figure of an SVG file outside its definitions."""
    root = svg_root(data)
    ids = {element.get("id"): element for element in root.iter() if element.get("id")}
    figures: list[Figure] = []
    for element in root.iter(f"{SVG}path", f"{SVG}circle", f"{SVG}use"):
        if any(parent.tag == f"{SVG}defs" for parent in element.iterancestors()):
            continue
        if element.tag == f"{SVG}circle":
            cx, cy, r = (float(element.get(key)) for key in ("cx", "cy", "r"))
            turn = np.radians(np.arange(0, 360 + STEP_DEG, STEP_DEG))
            figures.append(np.column_stack([cx + r * np.cos(turn), cy + r * np.sin(turn)]))
            continue
        source = ids[element.get(f"{XLINK}href")[1:]] if element.tag == f"{SVG}use" else element
        moved = [float(element.get(axis, 0)) for axis in "xy"] if source is not element else [0.0, 0.0]
        for contour in svg_path(source.get("d")):
            figure = contour + moved
            for outer in (element, *element.iterancestors()):
                a, b, c, d, e, f = _svg_matrix(outer.get("transform"))
                figure = figure @ [[a, b], [c, d]] + [e, f]
            figures.append(figure)
    return [figure * (1, -1) for figure in figures]


def svg_path(data: str) -> list[Figure]:
    """Return the contours of path data, in its own coordinates."""
    contours: list[list[Figure]] = []
    here = np.zeros(2)
    for code, numbers in re.findall(r"([MLQCAZ])([^MLQCAZ]*)", data):
        values = np.array([float(n) for n in re.findall(r"[-+.\d]+", numbers)])
        if code == "M":
            contours.append([values[None]])
        elif code == "Z":
            values = contours[-1][0][0]
            contours[-1].append(values[None])
        elif code == "A":
            contours[-1].append(_svg_arc(here, values))
        else:
            contours[-1].append(bezier(np.vstack([here, values.reshape(-1, 2)])))
        here = values[-2:]
    return [np.vstack(contour) for contour in contours]


def _svg_arc(start: Figure, values: Figure) -> Figure:
    """Sample an arc as SVG 1.1, appendix F.6.5, finds its centre from its ends."""
    r, _, _, large, sweep = values[:5]
    end = values[5:]
    half = (start - end) / 2
    root = math.sqrt(max(0.0, r * r / (half @ half) - 1)) * (-1 if large == sweep else 1)
    centre = (start + end) / 2 + root * np.array([half[1], -half[0]])
    first, last = (math.atan2(*(point - centre)[::-1]) for point in (start, end))
    if sweep and last < first:
        last += 2 * math.pi
    if not sweep and last > first:
        last -= 2 * math.pi
    turn = np.linspace(first, last, PIECES + int(abs(math.degrees(last - first)) / STEP_DEG))
    return centre + r * np.column_stack([np.cos(turn), np.sin(turn)])


def _svg_matrix(transform: str | None) -> tuple[float, ...]:
    if transform is None:
        return 1, 0, 0, 1, 0, 0
    return tuple(float(n) for n in re.fullmatch(r"matrix\((.*)\)", transform)[1].split())


# ---------------------------------------------------------------- PDF, by pdfium


@dataclass
class PdfObject:
    """A path of a page, with its matrix to points, its width in points and its contours."""

    contours: list[Figure]
    width: float
    stroke: tuple[int, ...]
    fill: tuple[int, ...]
    stroked: bool
    filled: bool
    in_form: bool


@contextmanager
def pdf_page(data: bytes) -> Iterator[tuple[pdfium.PdfDocument, pdfium.PdfPage]]:
    """Open the first page of a PDF."""
    document = pdfium.PdfDocument(data)
    page = document[0]
    try:
        yield document, page
    finally:
        page.close()
        document.close()


def pdf_objects(data: bytes) -> list[PdfObject]:
    """Return the paths of a PDF page, those inside forms where they are placed, in points."""
    with pdf_page(data) as (_, page):
        count = pdf.FPDFPage_CountObjects(page)
        return [
            found
            for index in range(count)
            for found in _pdf_object(pdf.FPDFPage_GetObject(page, index), np.eye(3), in_form=False)
        ]


def pdf_figures(data: bytes, drawing: Drawing) -> list[Figure]:
    """Return every figure of a PDF page; the drawing says where on the page the pivot is."""
    corner = drawing.left, drawing.bottom
    return [contour * MM_PER_POINT + corner for found in pdf_objects(data) for contour in found.contours]


def _pdf_object(handle: object, outer: np.ndarray, *, in_form: bool) -> Iterator[PdfObject]:
    raw = pdf.FS_MATRIX()
    assert pdf.FPDFPageObj_GetMatrix(handle, raw)
    matrix = np.array([[raw.a, raw.b, 0], [raw.c, raw.d, 0], [raw.e, raw.f, 1]]) @ outer
    kind = pdf.FPDFPageObj_GetType(handle)
    if kind == pdf.FPDF_PAGEOBJ_FORM:
        for index in range(pdf.FPDFFormObj_CountObjects(handle)):
            yield from _pdf_object(pdf.FPDFFormObj_GetObject(handle, index), matrix, in_form=True)
        return
    assert kind == pdf.FPDF_PAGEOBJ_PATH
    width, mode, stroked = ctypes.c_float(), ctypes.c_int(), ctypes.c_int()
    pdf.FPDFPageObj_GetStrokeWidth(handle, width)
    pdf.FPDFPath_GetDrawMode(handle, mode, stroked)
    scale = math.sqrt(abs(np.linalg.det(matrix)))
    contours = [np.column_stack([c, np.ones(len(c))]) @ matrix[:, :2] for c in _pdf_contours(handle)]
    yield PdfObject(
        contours,
        width.value * scale,
        _pdf_colour(pdf.FPDFPageObj_GetStrokeColor, handle),
        _pdf_colour(pdf.FPDFPageObj_GetFillColor, handle),
        bool(stroked.value),
        mode.value != pdf.FPDF_FILLMODE_NONE,
        in_form,
    )


def _pdf_contours(handle: object) -> list[Figure]:
    contours: list[list[Figure]] = []
    pending: list[Figure] = []
    here = np.zeros(2)
    for index in range(pdf.FPDFPath_CountSegments(handle)):
        segment = pdf.FPDFPath_GetPathSegment(handle, index)
        x, y = ctypes.c_float(), ctypes.c_float()
        assert pdf.FPDFPathSegment_GetPoint(segment, x, y)
        point = np.array([x.value, y.value])
        kind = pdf.FPDFPathSegment_GetType(segment)
        if kind == pdf.FPDF_SEGMENT_MOVETO:
            contours.append([point[None]])
        elif kind == pdf.FPDF_SEGMENT_LINETO:
            contours[-1].append(np.vstack([here, point]))
        else:
            pending.append(point)
            if len(pending) < 3:
                continue
            contours[-1].append(bezier(np.vstack([here, *pending])))
            pending = []
        here = point
        if pdf.FPDFPathSegment_GetClose(segment):
            contours[-1].append(contours[-1][0][:1])
    return [np.vstack(contour) for contour in contours]


def _pdf_colour(get: Callable[..., int], handle: object) -> tuple[int, ...]:
    parts = [ctypes.c_uint() for _ in range(4)]
    get(handle, *parts)
    return tuple(part.value for part in parts[:3])


# ---------------------------------------------------------------- DXF, by ezdxf's reader


def dxf_document(data: bytes) -> ezdxf.document.Drawing:
    """Return a DXF file as ezdxf reads it."""
    return read(io.StringIO(data.decode()))


def dxf_figures(data: bytes) -> list[Figure]:
    """Return every figure of a DXF file's model space, blocks where they are inserted."""
    return [figure for entity in dxf_document(data).modelspace() for figure in _dxf_entity(entity)]


def _dxf_entity(entity: DXFGraphic) -> Iterator[Figure]:
    kind, dxf = entity.dxftype(), entity.dxf
    if kind == "INSERT":
        for inner in entity.virtual_entities():
            yield from _dxf_entity(inner)
    elif kind == "LWPOLYLINE":
        # Every piece is its own figure; together they are the outline, whichever way each runs.
        yield np.vstack([figure for inner in entity.virtual_entities() for figure in _dxf_entity(inner)])
    elif kind == "LINE":
        yield np.array([dxf.start.vec2, dxf.end.vec2])
    else:
        first, last = (dxf.start_angle, dxf.end_angle) if kind == "ARC" else (0.0, 360.0)
        last += 360.0 * (last < first)
        turn = np.radians(np.linspace(first, last, PIECES + int((last - first) / STEP_DEG)))
        circle = np.column_stack([np.cos(turn), np.sin(turn)])
        yield np.array(dxf.center.vec2) + dxf.radius * circle


# ---------------------------------------------------------------- the comparator


@dataclass(frozen=True)
class Shape:
    """What the drawing says of one figure: points on it, and how far any point is from it."""

    name: str
    points: Figure
    distance: Callable[[Figure], np.ndarray]


def differences(figures: list[Figure], drawing: Drawing, tolerance_mm: float) -> list[str]:
    """Return in words where ``figures`` leave ``drawing`` by more than ``tolerance_mm``."""
    shapes = list(expected(drawing))
    if len(shapes) != len(figures):
        return [f"{len(figures)} figures instead of {len(shapes)}"]
    found: list[str] = []
    for number, (figure, shape) in enumerate(zip(figures, shapes, strict=True)):
        outside = shape.distance(figure).max()
        missing = segments_distance(shape.points, figure).max()
        if max(outside, missing) > tolerance_mm:
            found.append(f"{shape.name} {number}: {outside:.6f} mm outside, {missing:.6f} mm missing")
    return found


def expected(drawing: Drawing) -> Iterator[Shape]:
    """Yield the exact shape of every figure of ``drawing``, in drawing order."""
    for item in (item for layer in drawing.layers for item in layer.items):
        match item:
            case Line():
                ends = np.array([item.start, item.end])
                yield Shape("line", ends, lambda points, ends=ends: segments_distance(points, ends))
            case Arc():
                yield _arc_shape(item)
            case Circle():
                yield _arc_shape(Arc(item.centre, item.radius_mm, 0, 360, item.style))
            case Outline():
                yield _outline_shape(item)
            case Letters():
                for placed in item.glyphs:
                    turn = math.radians(-placed.angle_deg)
                    rotation = np.array([[math.cos(turn), math.sin(turn)], [-math.sin(turn), math.cos(turn)]])
                    data = "".join(
                        code + " ".join(f"{value:.15f}" for value in values)
                        for code, values in placed.glyph.path
                    )
                    for contour in svg_path(data):
                        whole = contour if placed.glyph.stroked else np.vstack([contour, contour[:1]])
                        there = whole @ rotation * placed.size_mm + (placed.x, placed.y)
                        yield Shape(
                            "glyph", there, lambda points, there=there: segments_distance(points, there)
                        )


def _arc_shape(arc: Arc) -> Shape:
    angles = np.radians(np.linspace(arc.start_deg, arc.end_deg, 25))
    spokes = np.column_stack([np.sin(angles), np.cos(angles)])
    points = np.array(arc.centre) + arc.radius_mm * spokes

    def distance(seen: Figure) -> np.ndarray:
        offset = seen - arc.centre
        bearing = np.degrees(np.arctan2(offset[:, 0], offset[:, 1]))
        along = np.mod(bearing - arc.start_deg, 360)
        off_circle = np.abs(np.hypot(*offset.T) - arc.radius_mm)
        off_ends = np.minimum(*(np.hypot(*(seen - end).T) for end in (points[0], points[-1])))
        return np.where(along <= arc.end_deg - arc.start_deg, off_circle, off_ends)

    return Shape("arc", points, distance)


def _outline_shape(outline: Outline) -> Shape:
    edges = []
    for here, there, arc in outline.edges():
        if arc is not None:
            edges.append(_arc_shape(arc))
            continue
        ends = np.array([(here.x, here.y), (there.x, there.y)])
        edges.append(Shape("edge", ends, lambda points, ends=ends: segments_distance(points, ends)))
    points = np.vstack([edge.points for edge in edges])
    return Shape("outline", points, lambda seen: np.min([edge.distance(seen) for edge in edges], axis=0))


def bezier(control: Figure) -> Figure:
    """Return points along the line, quadratic or cubic curve with these control points."""
    if len(control) == 2:
        return control
    t = np.linspace(0, 1, PIECES + 1)[:, None]
    points = [np.broadcast_to(point, (len(t), 2)) for point in control]
    while len(points) > 1:
        points = [(1 - t) * a + t * b for a, b in pairwise(points)]
    return points[0]


def segments_distance(points: Figure, corners: Figure) -> np.ndarray:
    """Return the distance of each point from the broken line through ``corners``."""
    start, along = corners[:-1], np.diff(corners, axis=0)
    length2 = np.maximum((along**2).sum(axis=1), 1e-300)
    from_start = points[:, None, :] - start
    t = np.clip((from_start * along).sum(axis=2) / length2, 0, 1)
    gap = from_start - t[:, :, None] * along
    return np.hypot(gap[:, :, 0], gap[:, :, 1]).min(axis=1)
