"""What is laid on a plate as plain numbers: boxes, thick strokes, and the edges of filled figures.

This is for finding room, so it may cover a little too much and never too little: a letter counts as
the box of its glyph, and a chord of an arc is as thick as the arc's bulge on top of its stroke.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator, Sequence
from dataclasses import dataclass, replace
from itertools import pairwise
from typing import assert_never

import numpy as np

from dialgen.drawing import (
    Arc,
    Circle,
    Layer,
    Letters,
    Line,
    Outline,
    Placed,
    Point,
    Primitive,
    Purpose,
    polar,
)
from dialgen.face.plate import Outliner
from dialgen.stage import Array

Box = tuple[float, float, float, float]
"""Left, bottom, right and top in millimetres."""

_CHORD_MM = 1.5
_BROAD_MM, _MOST_BANDS = 1.0, 64
_CREEP_MM = 1e-9
_LEAST_CHORD_DEG, _MOST_CHORD_DEG = 0.5, 30.0
_MITRE = 2.0
"""How far a stroke's corner may reach, in half widths: that of a corner of 60 degrees."""


@dataclass(frozen=True, slots=True, eq=False)
class Cover:
    """What is covered.

    Args:
        boxes: (n, 4), left, bottom, right and top of whole boxes.
        strokes: (m, 5), the ends x1, y1, x2, y2 of straight strokes and half their width.
        edges: (k, 4), the ends of the edges of filled figures, each figure anticlockwise.
    """

    boxes: Array
    strokes: Array
    edges: Array

    def with_box(self, box: Box) -> Cover:
        """Return the cover with a box more."""
        return replace(self, boxes=np.concatenate([self.boxes, [box]]))

    def meets(self, box: Box) -> bool:
        """Return whether a box has anything in common with what is covered."""
        left, bottom, right, top = self.boxes.T
        over = (left < box[2]) & (right > box[0]) & (bottom < box[3]) & (top > box[1])
        middle = (box[0] + box[2]) / 2, (box[1] + box[3]) / 2
        enters, leaves = _passage(self.strokes, box)
        return bool(over.any() or (enters < leaves).any() or _lies_in(middle, self.edges))

    def strokes_within(self, box: Box) -> Array:
        """Return the parts of the strokes within a box."""
        enters, leaves = _passage(self.strokes, box)
        met = enters <= leaves
        x1, y1, x2, y2, half = self.strokes[met].T
        cuts = [(x1 + t * (x2 - x1), y1 + t * (y2 - y1)) for t in (enters[met], leaves[met])]
        return np.column_stack([*cuts[0], *cuts[1], half])


def cover(layers: Iterable[Layer], plate: Outliner, more: Iterable[Box] = ()) -> Cover:
    """Return what ink and cuts cover.

    What is cut is gone with all that lies inside it, but for the plate's own outline.  The guide
    layer is neither ink nor cut.

    Args:
        layers: what is laid.
        plate: its outline.
        more: boxes that are taken as well.
    """
    gathered = _Gathered()
    for box in more:
        gathered.boxes.append(box)
    for layer in layers:
        if layer.purpose is Purpose.GUIDE:
            continue
        hollow = layer.purpose is Purpose.CUT
        for item in layer.items:
            if not (hollow and isinstance(item, (Outline, Circle)) and item == plate.outline(item.style)):
                gathered.add(item, filled=hollow)
    return gathered.cover()


def letters_box(letters: Letters) -> Box | None:
    """Return the box around the ink of some lettering; None where it has none."""
    boxes = list(_glyph_boxes(letters))
    if not boxes:
        return None
    lefts, bottoms, rights, tops = zip(*boxes, strict=True)
    return min(lefts), min(bottoms), max(rights), max(tops)


def _passage(strokes: Array, box: Box) -> tuple[Array, Array]:
    """Return where each stroke enters a box and where it leaves it, as shares of its length.

    Liang and Barsky's way, with the box grown by half the stroke's width: ends and sides count as
    square.  A stroke that leaves before it enters does not meet the box.
    """
    x1, y1, x2, y2, half = strokes.T
    enters, leaves = np.zeros(len(strokes)), np.ones(len(strokes))
    sides = ((x1, x2, box[0] - half, box[2] + half), (y1, y2, box[1] - half, box[3] + half))
    for start, end, low, high in sides:
        # What runs along an axis all but exactly is as if it crept.
        way = end - start
        way = np.where(np.abs(way) < _CREEP_MM, _CREEP_MM, way)
        first, second = (low - start) / way, (high - start) / way
        enters = np.maximum(enters, np.minimum(first, second))
        leaves = np.minimum(leaves, np.maximum(first, second))
    return enters, leaves


def _lies_in(place: Point, edges: Array) -> bool:
    """Return whether a place is in a filled figure: a ray to the right meets more edges up than down."""
    x1, y1, x2, y2 = edges.T
    x, y = place
    left_of = (x2 - x1) * (y - y1) - (x - x1) * (y2 - y1)
    up = (y1 <= y) & (y < y2) & (left_of > 0)
    down = (y2 <= y) & (y < y1) & (left_of < 0)
    return int(up.sum()) > int(down.sum())


class _Gathered:
    """Plain lists that are filled item by item: a face has hundreds, and each would be a small array."""

    def __init__(self) -> None:
        self.boxes: list[Box] = []
        self.strokes: list[tuple[float, float, float, float, float]] = []
        self.edges: list[tuple[float, float, float, float]] = []

    def cover(self) -> Cover:
        return Cover(
            np.array(self.boxes, dtype=float).reshape(-1, 4),
            np.array(self.strokes, dtype=float).reshape(-1, 5),
            np.array(self.edges, dtype=float).reshape(-1, 4),
        )

    def add(self, item: Primitive, *, filled: bool) -> None:
        """Add a primitive; ``filled`` is for closed figures whose inside counts, whatever their style."""
        match item:
            case Line():
                self._add_line(item)
            case Letters():
                self.boxes.extend(_glyph_boxes(item))
            case Arc():
                self._add_arc(item)
            case Circle():
                points, bulge_mm = _chords(item.centre, item.radius_mm, 0.0, 360.0)
                self._closed(points, _half_stroke(item) + bulge_mm, filled=filled or bool(item.style.fill))
            case Outline():
                points, bulge_mm = _corners(item)
                half = _MITRE * _half_stroke(item)
                self._closed(points, half + bulge_mm, filled=filled or bool(item.style.fill))
            case _:
                assert_never(item)

    def _add_line(self, line: Line) -> None:
        (x1, y1), (x2, y2) = line.start, line.end
        length_mm = math.dist(line.start, line.end) or 1.0
        away_x, away_y = (y1 - y2) / length_mm, (x2 - x1) / length_mm
        for aside_mm, half_mm in _bands(line.style.width_mm):
            dx, dy = aside_mm * away_x, aside_mm * away_y
            self.strokes.append((x1 + dx, y1 + dy, x2 + dx, y2 + dy, half_mm))

    def _add_arc(self, arc: Arc) -> None:
        for aside_mm, half_mm in _bands(arc.style.width_mm):
            points, bulge_mm = _chords(arc.centre, arc.radius_mm + aside_mm, arc.start_deg, arc.end_deg)
            self._chain(points, half_mm + bulge_mm)

    def _closed(self, points: list[Point], half_mm: float, *, filled: bool) -> None:
        self._chain(points, half_mm)
        if filled:
            self._fill(points)

    def _chain(self, points: Sequence[Point], half_mm: float) -> None:
        self.strokes += [(*one, *other, half_mm) for one, other in pairwise(points)]

    def _fill(self, points: Sequence[Point]) -> None:
        pairs = list(pairwise(points))
        area = sum(x1 * y2 - x2 * y1 for (x1, y1), (x2, y2) in pairs)
        self.edges += [(*one, *other) if area > 0 else (*other, *one) for one, other in pairs]


def _bands(width_mm: float) -> list[tuple[float, float]]:
    """Return a broad stroke as narrow ones, so that what lies beside it is not covered with it.

    Each is how far it runs from the middle, and half its width.
    """
    count = min(max(1, math.ceil(width_mm / _BROAD_MM)), _MOST_BANDS)
    half_mm = width_mm / count / 2
    return [((2 * i + 1 - count) * half_mm, half_mm) for i in range(count)]


def _chords(centre: Point, radius_mm: float, start_deg: float, end_deg: float) -> tuple[list[Point], float]:
    """Return points along a circle, clockwise, and how far the circle leaves the chords between them."""
    step_deg = math.degrees(_CHORD_MM / max(radius_mm, 1e-6))
    step_deg = min(max(step_deg, _LEAST_CHORD_DEG), _MOST_CHORD_DEG)
    count = max(1, math.ceil((end_deg - start_deg) / step_deg))
    each_deg = (end_deg - start_deg) / count
    points = [polar(centre, radius_mm, start_deg + i * each_deg) for i in range(count + 1)]
    return points, radius_mm * (1 - math.cos(math.radians(each_deg / 2)))


def _corners(outline: Outline) -> tuple[list[Point], float]:
    """Return the corners of an outline, arcs split, the first again at the end; and the largest bulge."""
    points: list[Point] = []
    most_mm = 0.0
    for here, _, arc in outline.edges():
        if arc is None:
            points.append((here.x, here.y))
            continue
        run, bulge_mm = _chords(arc.centre, arc.radius_mm, arc.start_deg, arc.end_deg)
        points += (run if here.turn_deg > 0 else run[::-1])[:-1]
        most_mm = max(most_mm, bulge_mm)
    return [*points, points[0]], most_mm


def _half_stroke(item: Circle | Outline) -> float:
    return item.style.width_mm / 2 if item.style.stroke else 0.0


def _glyph_boxes(letters: Letters) -> Iterator[Box]:
    """Yield the box of each glyph where it stands; those of single strokes allow for the pen already."""
    for placed in letters.glyphs:
        yield _standing(placed)


def _standing(placed: Placed) -> Box:
    left, bottom, right, top = (edge * placed.size_mm for edge in placed.glyph.box)
    if not placed.angle_deg:
        return placed.x + left, placed.y + bottom, placed.x + right, placed.y + top
    turn = math.radians(placed.angle_deg)
    sin, cos = math.sin(turn), math.cos(turn)
    corners = [(x * cos + y * sin, y * cos - x * sin) for x in (left, right) for y in (bottom, top)]
    xs, ys = [x for x, _ in corners], [y for _, y in corners]
    return placed.x + min(xs), placed.y + min(ys), placed.x + max(xs), placed.y + max(ys)
