"""The plate as the one who letters it sees it: what may be printed on, its axis, and how large things are."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.dialfile.models import DialFile
from dialgen.drawing import Circle, Layer, Point, Purpose, Style
from dialgen.face.lettered.cover import Box
from dialgen.face.lettered.raster import Field
from dialgen.face.lettered.units import unit_height, unit_place
from dialgen.face.plate import Outliner, Rectangle
from dialgen.face.ruled.ruling import RuledScale
from dialgen.geometry.lines import ArcLine
from dialgen.lettering import Hand, hand, measure
from dialgen.looks import Lettering, Look

_EDGE_MM, _EDGE_SHARE = 1.5, 0.06
_HUB_MM, _HUB_SHARE = 5.0, 0.09
"""The margin along the edge and the radius of the hub, and their most over the plate's shorter side."""

_TITLE, _MAKER, _SIGNS = 0.9, 0.6, 1.0
"""Heights of title, maker's line and symbols, in heights of the largest numerals."""
_LEAST_MAKER_MM, _MOST_MAKER_MM = 1.2, 2.4
# Dial symbols are drawn 2.5 to 5 mm high (from memory of IEC 60051-1).
_LEAST_SIGNS_MM, _MOST_SIGNS_MM = 2.5, 5.0
_WIDE_DEG = 180.0
_ASIDE = 0.06


@dataclass(frozen=True, slots=True, eq=False)
class Page:
    """What is lettered, and on what.

    Args:
        file: what is to be said.
        look: how the lettering that belongs to no scale is drawn.
        hand: the hand of that lettering.
        plate: the plate's outline.
        fields: the areas that all must lie in: the plate, and the window of the case if it has one.
        inner: the box of what they share, less the margin along the edge.
        edge_mm: that margin.
        hub_mm: radius of the pointer's bearing; 0 where the pivot is not on the plate.
        start: where lettering begins, on the axis of the innermost scale: the place of a lone unit.
        wide: whether that scale goes round the pivot, so that there is as much room below it as above.
        strip: whether it is a straight one from side to side, with a free strip along it.
        numeral_mm: height of the largest numerals.
    """

    file: DialFile
    look: Look
    hand: Hand
    plate: Outliner
    fields: tuple[Field, ...]
    inner: Box
    edge_mm: float
    hub_mm: float
    start: Point
    wide: bool
    strip: bool
    numeral_mm: float

    @property
    def title_mm(self) -> float:
        """Height of the title."""
        return _TITLE * self.numeral_mm

    @property
    def maker_mm(self) -> float:
        """Height of the maker's line."""
        return min(max(_MAKER * self.numeral_mm, _LEAST_MAKER_MM), _MOST_MAKER_MM)

    @property
    def signs_mm(self) -> float:
        """Height of the row of symbols."""
        asked = self.file.symbols.height if self.file.symbols else None
        return asked or min(max(_SIGNS * self.numeral_mm, _LEAST_SIGNS_MM), _MOST_SIGNS_MM)

    @property
    def lopsided(self) -> bool:
        """Whether the axis is far from the middle, as it is with the pivot in a corner."""
        left, _, right, _ = self.inner
        return abs(self.start[0] - (left + right) / 2) > _ASIDE * (right - left)

    def hub(self) -> Layer:
        """Return the hub as if it were cut out: nothing is printed under it."""
        disc = Circle((0.0, 0.0), self.hub_mm, Style(fill="#000000"))
        return Layer(name="hub", purpose=Purpose.CUT, items=(disc,) if self.hub_mm else ())


def page_for(file: DialFile, look: Look, scales: Sequence[RuledScale], plate: Outliner) -> Page:
    """Return the page of a file."""
    fields = tuple(_fields(file, plate))
    shorter_mm = min(plate.box[2:])
    edge_mm = min(_EDGE_MM, _EDGE_SHARE * shorter_mm)
    innermost = min(scales, key=lambda scale: math.hypot(*_middle(scale)))
    unit_mm = unit_height(innermost, alone=True)
    unit = measure(innermost.rows[0].unit, unit_mm, hand=innermost.hand)
    return Page(
        file=file,
        look=look,
        hand=hand(look.font, strokes=look.lettering is Lettering.STROKE),
        plate=plate,
        fields=fields,
        inner=_inner_box(fields, edge_mm),
        edge_mm=edge_mm,
        hub_mm=min(_HUB_MM, _HUB_SHARE * shorter_mm) if plate.holds(0.0, 0.0) else 0.0,
        start=unit_place(innermost, unit.right - unit.left, unit_mm, alone=True),
        wide=isinstance(innermost.line, ArcLine) and float(np.ptp(innermost.ends_deg)) > _WIDE_DEG,
        strip=_runs_across(innermost),
        numeral_mm=max(scale.sizes.numeral_mm for scale in scales),
    )


def _runs_across(scale: RuledScale) -> bool:
    xs, ys = scale.line.points(scale.ends_deg)
    return not isinstance(scale.line, ArcLine) and float(np.ptp(xs)) > float(np.ptp(ys))


def _fields(file: DialFile, plate: Outliner) -> Iterator[Field]:
    yield plate
    window = file.plate.window
    if window is not None:
        (x, y), (width, height) = window.at, window.size
        yield Rectangle((x - width / 2, y - height / 2, width, height), window.corner)


def _inner_box(fields: Sequence[Field], edge_mm: float) -> Box:
    boxes = [field.box for field in fields]
    left, bottom = (max(box[i] for box in boxes) + edge_mm for i in (0, 1))
    right, top = (min(box[i] + box[i + 2] for box in boxes) - edge_mm for i in (0, 1))
    return left, bottom, right, top


def _middle(scale: RuledScale) -> Point:
    """Return the point of a scale's line at the middle of the pointer's way."""
    xs, ys = scale.line.points(scale.ends_deg.mean(keepdims=True))
    return float(xs[0]), float(ys[0])
