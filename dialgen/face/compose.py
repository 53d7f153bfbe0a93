"""A ruled dial as a drawing: scale lines, marks, numerals, units, free text and the plate."""

from __future__ import annotations

import math
from collections.abc import Sequence
from enum import StrEnum

import numpy as np

from dialgen.dial import Dial
from dialgen.dialfile.models import FreeText
from dialgen.drawing import Arc, Cap, Drawing, Layer, Letters, Line, Point, Primitive, Purpose, Style, polar
from dialgen.face.divisions import Rank
from dialgen.face.numerals import mark_lines, numerals
from dialgen.face.plate import cut_layer, guide_layer, outliner
from dialgen.face.ruling import RuledScale
from dialgen.geometry.lines import ArcLine
from dialgen.lettering import letters
from dialgen.quantity import shown_unit

_INK = "#000000"
_UPRIGHT_DEG = 12.0


class ScalePart(StrEnum):
    """What a scale is made of, each on a layer of its own."""

    LINE = "line"
    MARKS = "marks"
    NUMERALS = "numerals"
    UNIT = "unit"


def compose(dial: Dial, scales: Sequence[RuledScale]) -> Drawing:
    """Return the face as a drawing whose page is exactly the plate's bounding box."""
    left, bottom, width, height = outliner(dial.file.plate).box
    layers: list[Layer] = []
    for i, scale in enumerate(scales, 1):
        layers += _scale_layers(scale, i, alone=len(scales) == 1)
    if dial.file.text:
        layers.append(_layer("text", [_free_text(text) for text in dial.file.text]))
    layers += [cut_layer(dial.file.plate), guide_layer(dial.file.plate)]
    return Drawing(
        left=left,
        bottom=bottom,
        width=width,
        height=height,
        layers=tuple(layer for layer in layers if layer.items),
        title=" ".join(part for part in (dial.file.dial.name, dial.file.dial.serial) if part),
    )


def scale_layer(number: int, part: ScalePart) -> str:
    """Return the name of the layer that holds a part of a scale; scales count from 1."""
    return f"scale {number} {part}"


def _scale_layers(scale: RuledScale, number: int, *, alone: bool) -> list[Layer]:
    parts: dict[ScalePart, Sequence[Primitive]] = {
        ScalePart.LINE: [_scale_line(scale)],
        ScalePart.MARKS: _mark_lines(scale),
        ScalePart.NUMERALS: list(numerals(scale)),
        ScalePart.UNIT: _unit(scale, alone=alone),
    }
    return [_layer(scale_layer(number, part), items) for part, items in parts.items()]


def _layer(name: str, items: Sequence[Primitive]) -> Layer:
    return Layer(name=name, purpose=Purpose.PRINT, items=tuple(items))


def _scale_line(scale: RuledScale) -> Primitive:
    """Return the line from the first mark to the last, its ends flush with their widths."""
    look, line = scale.look, scale.line
    style = Style(stroke=look.ink, width_mm=look.line_width_mm)
    ends_deg = np.sort(scale.ends_deg)
    if isinstance(line, ArcLine):
        first, last = line.about_centre(ends_deg).tolist()
        first, last = min(first, last), max(first, last)
        flush_deg = math.degrees(look.numbered_width_mm / 2 / line.radius_mm)
        return Arc(line.centre, line.radius_mm, first - flush_deg, last + flush_deg, style)
    xs, ys = line.points(ends_deg)
    (x1, x2), (y1, y2) = xs.tolist(), ys.tolist()
    flush = look.numbered_width_mm / 2 / max(math.hypot(x2 - x1, y2 - y1), 1e-9)
    dx, dy = (x2 - x1) * flush, (y2 - y1) * flush
    return Line((x1 - dx, y1 - dy), (x2 + dx, y2 + dy), style)


def _mark_lines(scale: RuledScale) -> list[Line]:
    """Return a line for each mark, those of one rank together so that a renderer may join them."""
    look = scale.look
    styles = {rank: Style(stroke=look.ink, width_mm=look.width_mm(rank), cap=Cap.BUTT) for rank in Rank}
    lines = [(mark.rank, Line(inner, outer, styles[mark.rank])) for mark, inner, outer in mark_lines(scale)]
    return [line for rank in Rank for of, line in lines if of is rank]


def _unit(scale: RuledScale, *, alone: bool) -> list[Letters]:
    text = shown_unit(scale.spec.unit)
    if not text:
        return []
    height_mm = scale.look.unit_mm * (1.0 if alone else 0.75) * (1.0 if len(text) == 1 else 0.85)
    return [letters(text, height_mm, _unit_place(scale, height_mm, alone=alone), Style(fill=scale.look.ink))]


def _unit_place(scale: RuledScale, height_mm: float, *, alone: bool) -> Point:
    """Return the middle of the unit: between pivot and arc, or on the free side of a straight line."""
    spec, look = scale.spec, scale.look
    ends_deg = scale.ends_deg
    taken = look.numeral_mm + look.space_mm if spec.numerals == "inside" else 0.0
    taken += look.numbered_mm if spec.marks != "outward" else 0.0
    if isinstance(scale.line, ArcLine):
        middle_deg = float(scale.line.about_centre(ends_deg).mean())
        # A scale that is all but upright has its unit on the plate's own middle line.
        middle_deg = 0.0 if abs(middle_deg) < _UPRIGHT_DEG else middle_deg
        room_mm = scale.line.radius_mm - taken
        below_mm = 0.38 * look.base_mm if alone else 0.9 * height_mm + look.space_mm
        reach_mm = max(room_mm - below_mm, 0.3 * room_mm)
        return polar(scale.line.centre, reach_mm, middle_deg)
    xs, ys = scale.line.points(ends_deg)
    ux, uy = (float(u[0]) for u in scale.line.directions(ends_deg.mean(keepdims=True)))
    drop_mm = taken + 0.8 * height_mm + look.space_mm
    return float(xs.mean()) - drop_mm * ux, float(ys.mean()) - drop_mm * uy


def _free_text(text: FreeText) -> Letters:
    return letters(text.say, text.height, text.at, Style(fill=_INK))
