"""Every mark of every template and sample is found again in the files drawn, where the dial says.

The files are read with libraries that did not write them.  What is compared are the figures of the
dial (`dialgen table --json`) with the lines on the page; the drawing in between is not looked at.
"""

from __future__ import annotations

import ctypes
import io
import json
import math
import re
import tomllib
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache
from pathlib import Path

import ezdxf.filemanagement
import numpy as np
import pypdfium2 as pdfium
import pytest
from click.testing import CliRunner
from lxml import etree
from pypdfium2 import raw

import dialgen
from dialgen.api import DEFAULT_MARGIN_MM, Face
from dialgen.cli.table import command as table_command
from dialgen.renderers import Options

ROOT = Path(__file__).parents[1]
FILES = sorted([*ROOT.glob("templates/*.toml"), *ROOT.glob("samples/*/*.toml")])
SAMPLES = [path for path in FILES if path.parents[1].name == "samples"]
MICRON_MM = 1e-3
MM_PER_POINT = 25.4 / 72
RESOLUTION_DPI = 600.0

_COLOURED = ("[look]", "[[zone]]", "[[limit]]", "ink =")
PLAIN_FILES = [
    p for p in FILES if not any(f"\n{word}" in p.read_text(encoding="utf-8") for word in _COLOURED)
]
"""The faces whose ink is all black on white, so that a picture of them can be weighed."""
PLAIN_SAMPLES = [path for path in PLAIN_FILES if path in SAMPLES]

every_file = pytest.mark.parametrize("path", FILES, ids=[path.stem for path in FILES])
every_plain_file = pytest.mark.parametrize("path", PLAIN_FILES, ids=[path.stem for path in PLAIN_FILES])
every_plain_sample = pytest.mark.parametrize("path", PLAIN_SAMPLES, ids=[p.stem for p in PLAIN_SAMPLES])
every_sample = pytest.mark.parametrize("path", SAMPLES, ids=[path.stem for path in SAMPLES])

Lines = np.ndarray
"""Straight strokes, a row each: x and y of both ends, mm from the pivot, y up."""


@dataclass(frozen=True)
class Page:
    """The paper: its left, upper edge and size in mm, worked out from the dial file alone."""

    left: float
    top: float
    width: float
    height: float


@cache
def _face(path: Path) -> Face:
    return dialgen.load(path)


@cache
def _drawn(path: Path, suffix: str) -> bytes:
    return _face(path).render(suffix, options=Options(resolution_dpi=RESOLUTION_DPI))


def _page(path: Path, margin_mm: float = DEFAULT_MARGIN_MM) -> Page:
    plate = tomllib.loads(path.read_text(encoding="utf-8"))["plate"]
    width, height = plate.get("size", [plate.get("diameter")] * 2)
    x, y = plate["pivot"]
    return Page(-x - margin_mm, height - y + margin_mm, width + 2 * margin_mm, height + 2 * margin_mm)


# ---------------------------------------------------------------- the readers


def _svg_lines(data: bytes) -> Lines:
    """Return the strokes of the groups for marks."""
    root = etree.fromstring(data)
    groups = [g for g in root.iter("{*}g") if "marks" in g.get("id", "")]
    paths = [path.get("d") for group in groups for path in group.iter("{*}path")]
    contours = [piece for d in paths for piece in d.replace("Z", "").split("M")[1:]]
    corners = [np.array(re.findall(r"-?\d+(?:\.\d+)?", c), dtype=float).reshape(-1, 2) for c in contours]
    return np.array([_midline(points) for points in corners]) * (1, -1, 1, -1)


def _midline(corners: np.ndarray) -> np.ndarray:
    """Return the ends of a stroke, or of the middle line of a wedge that goes round from its inner end."""
    if len(corners) == 2:
        return corners.reshape(4)
    left_inner, left_outer, right_outer, right_inner = corners[:4]  # which may come back to the first
    return np.concatenate([(left_inner + right_inner) / 2, (left_outer + right_outer) / 2])


def _pdf_lines(data: bytes, page: Page) -> Lines:
    """Return every straight stroke and wedge, the page's lower left corner taken for the plate's."""
    document = pdfium.PdfDocument(data)
    sheet = document[0]
    points = [
        line
        for index in range(raw.FPDFPage_CountObjects(sheet))
        for line in _pdf_strokes(raw.FPDFPage_GetObject(sheet, index))
    ]
    sheet.close()
    document.close()
    corner = page.left, page.top - page.height
    return np.array(points) * MM_PER_POINT + (*corner, *corner)


def _pdf_strokes(handle: object) -> Iterator[tuple[float, ...]]:
    if raw.FPDFPageObj_GetType(handle) != raw.FPDF_PAGEOBJ_PATH:
        return
    matrix = raw.FS_MATRIX()
    assert raw.FPDFPageObj_GetMatrix(handle, matrix)
    contours: list[list[tuple[float, float]]] = []
    kinds: list[set[int]] = []
    for index in range(raw.FPDFPath_CountSegments(handle)):
        segment = raw.FPDFPath_GetPathSegment(handle, index)
        x, y = ctypes.c_float(), ctypes.c_float()
        assert raw.FPDFPathSegment_GetPoint(segment, x, y)
        kind = raw.FPDFPathSegment_GetType(segment)
        if kind == raw.FPDF_SEGMENT_MOVETO:
            contours.append([])
            kinds.append(set())
        else:
            kinds[-1].add(kind)
        contours[-1].append(
            (
                matrix.a * x.value + matrix.c * y.value + matrix.e,
                matrix.b * x.value + matrix.d * y.value + matrix.f,
            )
        )
    for contour, kind in zip(contours, kinds, strict=True):
        if len(contour) in (2, 4, 5) and kind == {raw.FPDF_SEGMENT_LINETO}:
            yield tuple(_midline(np.array(contour)))


def _dxf_lines(data: bytes) -> Lines:
    """Return the LINE entities, and the middle lines of the wedges, on the layers for marks."""
    document = ezdxf.filemanagement.read(io.StringIO(data.decode()))
    marks = [e for e in document.modelspace() if "marks" in e.dxf.layer]
    lines = [(*e.dxf.start.vec2, *e.dxf.end.vec2) for e in marks if e.dxftype() == "LINE"]
    wedges = [_midline(np.array(list(e.vertices()))) for e in marks if e.dxftype() == "LWPOLYLINE"]
    return np.array([*lines, *wedges])


def _lines(path: Path, suffix: str, data: bytes) -> Lines:
    if suffix == ".pdf":
        return _pdf_lines(data, _page(path))
    return {".svg": _svg_lines, ".dxf": _dxf_lines}[suffix](data)


# ---------------------------------------------------------------- marks and lines


def _marks(path: Path) -> Iterator[tuple[str, str, np.ndarray, np.ndarray]]:
    """Yield every mark's rank with its scale, its side of the line, point and direction."""
    for number, scale in enumerate(_face(path).scales):
        for mark in scale.marks:
            yield (
                f"{number} {mark.rank}",
                scale.spec.marks,
                np.array((mark.x, mark.y)),
                np.array(mark.direction),
            )


def _line_at(lines: Lines, side: str, point: np.ndarray, direction: np.ndarray) -> np.ndarray:
    """Return the one line that starts, ends or is centred on the point, inner end first.

    Raises:
        AssertionError: there is none along the direction within a micron, or there are several.
    """
    turned = (lines[:, 2:] - lines[:, :2]) @ direction < 0
    inner = np.where(turned[:, None], lines[:, 2:], lines[:, :2])
    outer = np.where(turned[:, None], lines[:, :2], lines[:, 2:])
    anchor = {"outward": inner, "inward": outer, "across": (inner + outer) / 2}[side]
    along = outer - inner
    straight = np.abs(along[:, 0] * direction[1] - along[:, 1] * direction[0]) < MICRON_MM
    near = np.flatnonzero(straight & (np.hypot(*(anchor - point).T) < MICRON_MM))
    assert len(near) == 1, f"{len(near)} lines at {point} along {direction}"
    return np.concatenate([inner[near[0]], outer[near[0]]])


def _found(path: Path, lines: Lines) -> np.ndarray:
    """Return the line of every mark, a row each; those of a rank reach equally far, finer ones less.

    From a straight scale line all of a rank end at one height, so marks that lean are longer.
    """
    rows, lengths = [], {}
    for rank, side, point, direction in _marks(path):
        rows.append(_line_at(lines, side, point, direction))
        length = math.dist(rows[-1][:2], rows[-1][2:])
        straight = _face(path).scales[int(rank.split()[0])].spec.line
        if straight is not None:
            along = np.subtract(straight[1], straight[0])
            along = along / math.hypot(*along)
            length *= abs(along[0] * direction[1] - along[1] * direction[0])
        assert lengths.setdefault(rank, length) == pytest.approx(length, abs=2 * MICRON_MM)
    for number in {rank.split()[0] for rank in lengths}:
        ranked = [
            lengths[f"{number} {r}"] for r in ("numbered", "middle", "fine") if f"{number} {r}" in lengths
        ]
        assert ranked == sorted(set(ranked), reverse=True)
    return np.array(rows)


@every_file
@pytest.mark.parametrize("suffix", [".svg", ".pdf", ".dxf"])
def test_every_mark_is_one_line(path: Path, suffix: str) -> None:
    """Each mark of the dial is exactly one line, on its point within 1 µm and along the pointer."""
    lines = _lines(path, suffix, _drawn(path, suffix))
    found = _found(path, lines)
    if suffix != ".pdf":  # whose lines bear no names
        assert len(found) == len(lines)


@every_file
def test_vector_formats_agree(path: Path) -> None:
    """Both ends of every mark are the same in SVG, PDF and DXF within 1 µm."""
    found = [_found(path, _lines(path, s, _drawn(path, s))) for s in (".svg", ".pdf", ".dxf")]
    assert np.ptp(found, axis=0).max() < MICRON_MM


@every_file
def test_table_gives_the_marks_drawn(path: Path) -> None:
    """``table --json`` lists the same marks at the same points, to the last bit."""
    listed = json.loads(CliRunner().invoke(table_command, [str(path), "--json"]).stdout)["scales"]
    for scale, shown in zip(_face(path).scales, listed, strict=True):
        assert [(m["x"], m["y"], m["rank"], m["label"]) for m in shown["marks"]] == [
            (m.x, m.y, m.rank, m.label) for m in scale.marks
        ]


@every_sample
def test_marks_of_kept_files(path: Path) -> None:
    """The SVG and PDF kept beside a sample have today's marks."""
    for suffix in (".svg", ".pdf"):
        _found(path, _lines(path, suffix, path.with_suffix(suffix).read_bytes()))


@pytest.mark.parametrize("side", ["outward", "inward", "across"])
def test_marks_start_end_or_are_centred_on_their_points(side: str, tmp_path: Path) -> None:
    """Outward marks start on their points, inward ones end there and marks across are centred there."""
    text = (ROOT / "templates" / "square-panel.toml").read_text(encoding="utf-8")
    path = tmp_path / "turned.toml"
    path.write_text(text.replace('marks = "outward"', f'marks = "{side}"'), encoding="utf-8")
    found = [_found(path, _lines(path, s, _drawn(path, s))) for s in (".svg", ".pdf", ".dxf")]
    assert np.ptp(found, axis=0).max() < MICRON_MM
    inner, outer = (np.hypot(*found[0][:, columns].T) for columns in (slice(0, 2), slice(2, 4)))
    wanted = {"outward": inner, "inward": outer, "across": (inner + outer) / 2}[side]
    assert np.abs(wanted - 45.0).max() < MICRON_MM


# ---------------------------------------------------------------- the page


@every_file
def test_svg_page_is_the_plate_and_margin(path: Path) -> None:
    """An SVG is as large as plate and margin in mm, and its user units are mm from the pivot."""
    root, page = etree.fromstring(_drawn(path, ".svg")), _page(path)
    box = [float(n) for n in root.get("viewBox").split()]
    assert box == pytest.approx([page.left, -page.top, page.width, page.height], abs=MICRON_MM)
    for name, wanted in (("width", page.width), ("height", page.height)):
        assert root.get(name).endswith("mm")
        assert float(root.get(name)[:-2]) == pytest.approx(wanted, abs=MICRON_MM)


@every_file
@pytest.mark.parametrize("margin_mm", [0.0, DEFAULT_MARGIN_MM])
def test_pdf_page_is_the_plate_and_margin(path: Path, margin_mm: float) -> None:
    """A PDF's page is plate and margin to 1 µm."""
    document = pdfium.PdfDocument(_face(path).render(".pdf", margin_mm=margin_mm))
    assert len(document) == 1
    size = np.array(document[0].get_size()) * MM_PER_POINT
    document.close()
    page = _page(path, margin_mm)
    assert np.abs(size - (page.width, page.height)).max() < MICRON_MM


# ---------------------------------------------------------------- the picture


def _picture(data: bytes) -> tuple[np.ndarray, float]:
    """Return the ink of a picture, 0 to 1, row by row from above, and its stored pixels per mm."""
    image = pytest.importorskip("PIL.Image")
    with image.open(io.BytesIO(data)) as opened:
        # The chunk holds whole pixels per metre; the resolution itself is a whole number of dpi.
        dpi = round(opened.info["dpi"][0])
        return 1.0 - np.asarray(opened.convert("L"), dtype=float) / 255.0, dpi / 25.4


def _ink_offsets(ink: np.ndarray, scale: float, page: Page, root: np.ndarray, tip: np.ndarray) -> tuple:
    """Return how far, in pixels, a mark's ink is beside its line, and beyond its tip.

    Args:
        ink: the picture.
        scale: its pixels per mm.
        page: where it lies.
        root: the mark's end at the scale line.
        tip: its free end.
    """
    length = math.dist(root, tip)
    ux, uy = (tip - root) / length
    step = 0.2 / scale
    beside = np.arange(-0.36 + step / 2, 0.36, step)
    beyond = np.arange(0.3 * length, length + 0.4, step)
    s, t = np.meshgrid(beyond, beside)
    columns = np.floor((root[0] + s * ux + t * uy - page.left) * scale).astype(int)
    rows = np.floor((page.top - root[1] - s * uy + t * ux) * scale).astype(int)
    dark = ink[rows, columns]
    on_mark = dark[:, beyond < 0.7 * length]
    assert on_mark.sum() > 0, f"no ink at {root}"
    middle_mm = (on_mark * beside[:, None]).sum() / on_mark.sum()
    thickness = on_mark.sum() / on_mark.shape[1]
    reach_mm = 0.3 * length + dark.sum() / thickness * step
    return middle_mm * scale, (reach_mm - length) * scale


def _check_picture(path: Path, data: bytes, lines: np.ndarray) -> None:
    ink, scale = _picture(data)
    page = _page(path)
    assert ink.shape == tuple(math.ceil(side * scale - 1e-6) for side in (page.height, page.width))
    for (_, side, point, _), line in zip(_marks(path), lines, strict=True):
        root, tip = (line[2:], line[:2]) if side == "inward" else (line[:2], line[2:])
        beside, beyond = _ink_offsets(ink, scale, page, root, tip)
        assert abs(beside) < 0.5, f"ink {beside:.2f} pixels beside the mark at {point}"
        assert abs(beyond) < 0.5, f"ink {beyond:.2f} pixels beyond the mark at {point}"


@every_plain_file
def test_picture_has_its_ink_at_every_mark(path: Path) -> None:
    """In the PNG each mark's ink lies along the SVG's line, and ends with it, within half a pixel."""
    pytest.importorskip("cairo")
    _check_picture(path, _drawn(path, ".png"), _found(path, _svg_lines(_drawn(path, ".svg"))))


@every_plain_sample
def test_kept_picture_has_its_ink_at_every_mark(path: Path) -> None:
    """So does the PNG kept beside a sample."""
    _check_picture(
        path, path.with_suffix(".png").read_bytes(), _found(path, _svg_lines(_drawn(path, ".svg")))
    )


# ---------------------------------------------------------------- the tests can fail


def test_a_mark_off_by_little_is_found() -> None:
    """A line 1.1 µm off its point, turned by 2 µm, drawn twice or missing is refused."""
    path = SAMPLES[0]
    lines = _svg_lines(_drawn(path, ".svg"))
    assert len(_found(path, lines)) == len(lines)
    moved, turned = lines.copy(), lines.copy()
    moved[3] += (0.0011, 0, 0.0011, 0)
    turned[3, 2:] += (0.002, 0)
    for wrong in (moved, turned, lines[1:], np.vstack([lines, lines[:1]]), lines * 1.0001):
        with pytest.raises(AssertionError):
            _found(path, wrong)


def test_ink_off_by_a_pixel_is_found() -> None:
    """A picture shifted by one pixel, across or along, or one with a mark wiped out, is refused."""
    pytest.importorskip("cairo")
    path = SAMPLES[0]
    lines = _found(path, _svg_lines(_drawn(path, ".svg")))
    ink, scale = _picture(_drawn(path, ".png"))
    page = _page(path)
    middle = lines[len(lines) // 2]
    root, tip = middle[:2], middle[2:]
    assert np.abs(_ink_offsets(ink, scale, page, root, tip)).max() < 0.5
    assert abs(_ink_offsets(np.roll(ink, 1, axis=1), scale, page, root, tip)[0]) > 0.5
    assert abs(_ink_offsets(np.roll(ink, 1, axis=0), scale, page, root, tip)[1]) > 0.5
    with pytest.raises(AssertionError, match="no ink"):
        _ink_offsets(np.zeros_like(ink), scale, page, root, tip)
