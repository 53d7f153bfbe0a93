"""Drawing to DXF: millimetres, the pivot at the origin, y up, so coordinates are the drawing's own."""

from __future__ import annotations

import io
import math
import threading
from collections.abc import Iterator, Mapping
from contextlib import contextmanager
from functools import lru_cache
from typing import Any, assert_never

from ezdxf import options as library_options  # type: ignore[attr-defined] # public, if not marked so
from ezdxf import units
from ezdxf.colors import rgb2int
from ezdxf.document import Drawing as Document
from ezdxf.filemanagement import new
from ezdxf.layouts.base import BaseLayout
from ezdxf.lldxf.const import LINEWEIGHT_BYBLOCK, VALID_DXF_LINEWEIGHTS

from dialgen.drawing import Arc, Circle, Drawing, Letters, Line, Outline, Primitive, Purpose, Style
from dialgen.renderers import Options
from dialgen.renderers.curves import chorded, flattened, is_closed
from dialgen.renderers.runs import inked_glyphs, layer_names, rgb

SAGITTA_MM = 0.002
"""How far a letter's straightened outline may leave its curves, at the largest size it is placed."""

_RED, _BLUE, _BLACK_OR_WHITE, _BY_BLOCK = 1, 5, 7, 0
_LAYER_COLOURS = {Purpose.PRINT: _BLACK_OR_WHITE, Purpose.CUT: _RED, Purpose.GUIDE: _BLUE}

_options_lock = threading.Lock()


def render(drawing: Drawing, options: Options) -> bytes:
    """Return ``drawing`` as a DXF file of release R2010 (AC1024).

    Lines, arcs and circles stay what they are; an outline is one closed polyline with bulges; a
    letter is a block of closed polylines, or of one polyline for each single stroke, inserted
    wherever it stands.  Areas are given by their edge, not filled: a cutter follows edges.
    """
    with _fixed_metadata():
        document = new("R2010", units=units.MM)
        model = document.modelspace()
        model.reset_extents((drawing.left, drawing.bottom, 0), (drawing.right, drawing.top, 0))
        middle = drawing.left + drawing.width / 2, drawing.bottom + drawing.height / 2
        document.set_modelspace_vport(height=drawing.height * 1.1, center=middle)
        blocks = _define_glyphs(document, drawing)
        for name, layer in zip(layer_names(drawing), drawing.layers, strict=True):
            document.layers.add(name, color=_LAYER_COLOURS[layer.purpose])
            for item in layer.items:
                look = _look(item.style, layer.purpose) | {"layer": name}
                _add(model, item, look, blocks)
        # ezdxf would list the classes in the order of a set, which changes from process to process.
        for kind in sorted(document.entitydb.dxf_types_in_use()):
            document.classes.add_class(kind)
        file = io.StringIO()
        document.write(file)
        return file.getvalue().encode(document.output_encoding)


def _add(model: BaseLayout, item: Primitive, look: dict[str, Any], blocks: Mapping[str, str]) -> None:
    match item:
        case Line():
            model.add_line(item.start, item.end, look)
        case Arc() if item.end_deg - item.start_deg >= 360:
            model.add_circle(item.centre, item.radius_mm, look)
        case Arc() if item.end_deg - item.start_deg < 1e-9:
            pass  # an ARC that ends where it starts would be read as the whole circle
        case Arc():
            # DXF counts anticlockwise from the x axis, and arcs run that way.
            model.add_arc(
                item.centre, item.radius_mm, 90 - item.end_deg, 90 - item.start_deg, dxfattribs=look
            )
        case Circle():
            model.add_circle(item.centre, item.radius_mm, look)
        case Outline():
            # A bulge is the tangent of a quarter of the turn, anticlockwise positive.
            corners = [(v.x, v.y, -math.tan(math.radians(v.turn_deg) / 4)) for v in item.vertices]
            model.add_lwpolyline(corners, "xyb", close=True, dxfattribs=look)
        case Letters():
            for placed in item.glyphs:
                if placed.glyph.name in blocks:
                    place = {"rotation": -placed.angle_deg}
                    place |= dict.fromkeys(("xscale", "yscale", "zscale"), placed.size_mm)
                    model.add_blockref(blocks[placed.glyph.name], (placed.x, placed.y), look | place)
        case _:
            assert_never(item)


def _define_glyphs(document: Document, drawing: Drawing) -> dict[str, str]:
    """Add a block for every glyph that has ink, one em large, and return its name by the glyph's."""
    largest_mm: dict[str, float] = {}
    for layer in drawing.layers:
        for item in layer.items:
            if isinstance(item, Letters):
                for placed in item.glyphs:
                    name = placed.glyph.name
                    largest_mm[name] = max(placed.size_mm, largest_mm.get(name, 0.0))
    blocks: dict[str, str] = {}
    for block_name, glyph in inked_glyphs(drawing).items():
        block = document.blocks.new(block_name)
        sagitta = SAGITTA_MM / largest_mm[glyph.name]
        if glyph.stroked:
            look = {"color": _BY_BLOCK, "lineweight": LINEWEIGHT_BYBLOCK}
            for stroke in chorded(glyph.path, sagitta):
                closed = is_closed(stroke)
                block.add_lwpolyline(stroke[:-1] if closed else stroke, "xy", close=closed, dxfattribs=look)
        else:
            for contour in flattened(glyph.path, sagitta):
                block.add_lwpolyline(contour, "xy", close=True, dxfattribs={"color": _BY_BLOCK})
        blocks[glyph.name] = block_name
    return blocks


def _look(style: Style, purpose: Purpose) -> dict[str, Any]:
    """Return the attributes of an entity; colours other than black are kept, but on print alone."""
    look: dict[str, Any] = {"lineweight": _lineweight(style.width_mm)}
    ink = style.stroke or style.fill
    if purpose is Purpose.PRINT and ink is not None and ink != "#000000":
        look["true_color"] = rgb2int(rgb(ink))
    return look


@lru_cache(maxsize=64)
def _lineweight(width_mm: float) -> int:
    """Return the nearest of the widths that DXF knows, in hundredths of a millimetre."""
    return min(VALID_DXF_LINEWEIGHTS, key=lambda valid: abs(valid - width_mm * 100))


@contextmanager
def _fixed_metadata() -> Iterator[None]:
    """Keep dates and random ids out of what ezdxf writes meanwhile.

    The switch is global in ezdxf; the lock keeps two threads from restoring it under each other.
    """
    with _options_lock:
        before = library_options.write_fixed_meta_data_for_testing
        library_options.write_fixed_meta_data_for_testing = True
        try:
            yield
        finally:
            library_options.write_fixed_meta_data_for_testing = before
