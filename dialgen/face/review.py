"""What a look at the finished drawing finds: ink over the edge, and numerals over each other."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence

import numpy as np

from dialgen.drawing import Arc, Drawing, Layer, Letters, Line, Placed, Point, Purpose
from dialgen.errors import Key, Remark
from dialgen.face.compose import ScalePart, scale_layer
from dialgen.face.plate import Outliner
from dialgen.face.ruling import RuledScale

Box = tuple[float, float, float, float]

_ARC_STEP_DEG = 1.0
_PAST_MM = 0.1


def review(drawing: Drawing, scales: Sequence[RuledScale], plate: Outliner) -> tuple[Remark, ...]:
    """Return remarks on ink over the plate's edge and on overlapping numerals."""
    keys: dict[str, Key] = {}
    for number, scale in enumerate(scales, 1):
        keys |= {scale_layer(number, part): scale.dial.key for part in ScalePart}
    found: list[Remark] = [remark for scale in scales for remark in _past_line(scale)]
    for layer in drawing.layers:
        if layer.purpose is Purpose.PRINT:
            found += _over_edge(layer, plate, keys.get(layer.name))
        if layer.name in keys and layer.name.endswith(ScalePart.NUMERALS):
            found += _overlaps(layer, (*keys[layer.name], "numbered"))
    return tuple(found)


def _past_line(scale: RuledScale) -> Iterator[Remark]:
    """Yield a remark where marks stand beyond the ends that a straight scale line was given."""
    if scale.spec.line is None or not scale.marks:
        return
    start, end = np.array(scale.spec.line)
    along = (end - start) / math.dist(start, end)
    places = (np.array([(mark.x, mark.y) for mark in scale.marks]) - start) @ along
    past_mm = max(-float(places.min()), float(places.max()) - math.dist(start, end))
    if past_mm > _PAST_MM:
        message = f"marks stand up to {past_mm:.2g} mm past the ends given to the line; move the ends"
        yield Remark(message, (*scale.dial.key, "line"))


def ink_box(letters: Letters) -> Box:
    """Return the box around the ink of some lettering: left, bottom, right, top."""
    corners = [corner for placed in letters.glyphs for corner in _corners(placed)]
    xs, ys = [x for x, _ in corners], [y for _, y in corners]
    return min(xs), min(ys), max(xs), max(ys)


def _corners(placed: Placed) -> Iterator[Point]:
    left, bottom, right, top = placed.glyph.box
    if not placed.angle_deg:
        yield placed.x + left * placed.size_mm, placed.y + bottom * placed.size_mm
        yield placed.x + right * placed.size_mm, placed.y + top * placed.size_mm
        return
    turn = math.radians(placed.angle_deg)
    sin, cos = math.sin(turn) * placed.size_mm, math.cos(turn) * placed.size_mm
    for x, y in ((left, bottom), (right, bottom), (right, top), (left, top)):
        yield placed.x + x * cos + y * sin, placed.y - x * sin + y * cos


def _overlaps(layer: Layer, key: tuple[str | int, ...]) -> Iterator[Remark]:
    boxes = [(item.text, ink_box(item)) for item in layer.items if isinstance(item, Letters) and item.glyphs]
    # The last numeral of a full turn is the first one's neighbour.
    for (one, a), (other, b) in zip(
        boxes, boxes[1:] + boxes[:1] if len(boxes) > 2 else boxes[1:], strict=False
    ):
        if a[0] < b[2] and b[0] < a[2] and a[1] < b[3] and b[1] < a[3]:
            yield Remark(f"the numerals {one} and {other} overlap; number fewer values", key)


def _over_edge(layer: Layer, plate: Outliner, key: Key | None) -> Iterator[Remark]:
    """Yield a remark for what is over the edge: once for each thing of a scale, or at each text's place."""
    seen: set[Remark] = set()
    for i, item in enumerate(layer.items):
        match item:
            case Letters() if item.glyphs:
                left, bottom, right, top = ink_box(item)
                points = [(left, bottom), (left, top), (right, bottom), (right, top)]
                what = f"{item.text!r}"
            case Line():
                points, what = [item.start, item.end], "a mark"
            case Arc():
                points, what = _along(item), "the scale line"
            case _:
                continue
        message = f"{what} runs over the plate's edge; move it or enlarge the plate"
        remark = Remark(message, ("text", i) if key is None else key)
        if remark not in seen and not plate.holds(*zip(*points, strict=True)).all():
            seen.add(remark)
            yield remark


def _along(arc: Arc) -> list[Point]:
    steps = max(2, math.ceil((arc.end_deg - arc.start_deg) / _ARC_STEP_DEG) + 1)
    return [arc.point(angle) for angle in np.linspace(arc.start_deg, arc.end_deg, steps).tolist()]
