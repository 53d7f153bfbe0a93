"""What helps to fit a plate: the pivot, the window of the case, the way of the pointer's tip, its stops."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Sequence

import numpy as np

from dialgen.dial import Dial
from dialgen.dialfile.models import Zone
from dialgen.drawing import Arc, Circle, Layer, Line, Outline, Primitive, Purpose, Style, polar
from dialgen.face.inked.sides import Side, printed_reach_mm
from dialgen.face.plate import outliner, rounded_rectangle
from dialgen.face.ruled.ruling import RuledScale
from dialgen.stage import Array, Span

GUIDE = Style(stroke="#2060c0", width_mm=0.1)
_CROSS_MM = 2.0
_POST_MM = 0.6
_STOP_MM = 3.0
_STEP_MM = 0.25
_CLEAR_MM = 0.6
_BESIDE = 1.5
_SHORTEST_MM = 1.0
_PIVOT = (0.0, 0.0)

_Print = Callable[[Array], tuple[Array, Array]]
"""Tells between which radii something is printed, at each of some angles."""


def guide_layer(dial: Dial, scales: Sequence[RuledScale]) -> Layer:
    """Return a cross at the pivot, the window of the case, the path of the pointer's tip, and its stops.

    Args:
        dial: the plate, and the movement with its stops.
        scales: the scales: the path is left out where it would run over their ink.
    """
    items = (*_cross(dial), *_case(dial), *_swing(dial, scales))
    return Layer(name="fitting", purpose=Purpose.GUIDE, items=items)


def _cross(dial: Dial) -> Iterator[Line]:
    if outliner(dial.file.plate).holds(*_PIVOT):
        yield Line((-_CROSS_MM, 0.0), (_CROSS_MM, 0.0), GUIDE)
        yield Line((0.0, -_CROSS_MM), (0.0, _CROSS_MM), GUIDE)


def _case(dial: Dial) -> Iterator[Outline]:
    window = dial.file.plate.window
    if window is not None:
        (x, y), (width, height) = window.at, window.size
        yield rounded_rectangle((x - width / 2, y - height / 2, width, height), window.corner, GUIDE)


def _swing(dial: Dial, scales: Sequence[RuledScale]) -> Iterator[Primitive]:
    """Yield the path of the tip between the stops, and at each stop the pointer's end and a post beyond.

    On a curved plate laid flat the tip describes no arc, and nothing is drawn.
    """
    tip_mm, file = dial.file.movement.pointer, dial.file
    if tip_mm is None or any(scale.curve is not None for scale in file.scale):
        return
    prints = [
        _printed(scale, [zone for zone in file.zone if zone.scale == number], tip_mm)
        for number, scale in enumerate(scales, 1)
    ]
    yield from _path(tip_mm, prints, dial.stops_deg)
    yield from _posts(tip_mm, prints, dial.stops_deg)


def _path(tip_mm: float, prints: Sequence[_Print], stops_deg: Span) -> Iterator[Arc]:
    """Yield the parts of the tip's path that run clear of all that is printed of the scales."""
    low, high = stops_deg
    high = min(high, low + 360.0)
    count = math.ceil(math.radians(high - low) * tip_mm / _STEP_MM) + 1
    angles_deg = np.linspace(low, high, count + 1)
    hidden = np.zeros(count + 1, dtype=bool)
    for printed in prints:
        inner_mm, outer_mm = printed(angles_deg)
        hidden |= (inner_mm < tip_mm) & (tip_mm < outer_mm)
    # Where what is seen begins and ends: at the changes, with a hidden place before and after all.
    edges = np.flatnonzero(np.diff(np.concatenate(([True], hidden, [True])).astype(int)))
    for first, after in edges.reshape(-1, 2).tolist():
        start_deg, end_deg = angles_deg[[first, after - 1]].tolist()
        if math.radians(end_deg - start_deg) * tip_mm > _SHORTEST_MM:
            yield Arc(_PIVOT, tip_mm, start_deg, end_deg, GUIDE)


def _posts(tip_mm: float, prints: Sequence[_Print], stops_deg: Span) -> Iterator[Primitive]:
    """Yield the end of the stopped pointer at each stop, nearer the pivot than any print, and the post."""
    for stop_deg, beyond in zip(stops_deg, (-1, 1), strict=True):
        end_mm = tip_mm
        for printed in prints:
            inner_mm, outer_mm = (float(r[0]) for r in printed(np.array([stop_deg])))
            if inner_mm < end_mm and end_mm - _STOP_MM < outer_mm:
                end_mm = inner_mm
        post_mm = end_mm - _STOP_MM / 2
        if post_mm <= _POST_MM:
            continue
        heel_mm = max(end_mm - _STOP_MM, 0.0)
        yield Line(polar(_PIVOT, heel_mm, stop_deg), polar(_PIVOT, end_mm, stop_deg), GUIDE)
        # The post just touches the pointer's middle line from the far side.
        aside_deg = math.degrees(math.asin(_POST_MM / post_mm))
        yield Circle(polar(_PIVOT, post_mm, stop_deg + beyond * aside_deg), _POST_MM, GUIDE)


def _printed(scale: RuledScale, zones: Sequence[Zone], tip_mm: float) -> _Print:
    """Return what tells between which radii a scale is printed, inf and minus inf where it is not."""
    low, high = np.sort(scale.ends_deg).tolist()
    beside_deg = math.degrees((_BESIDE * scale.sizes.numeral_mm + _CLEAR_MM) / tip_mm)
    inside_mm, outside_mm = (printed_reach_mm(scale, zones, side) + _CLEAR_MM for side in Side)

    def printed(angles_deg: Array) -> tuple[Array, Array]:
        at = np.clip(angles_deg, low, high)
        stretch, radius_mm = scale.line.stretch(at), np.hypot(*scale.line.points(at))
        near = (angles_deg > low - beside_deg) & (angles_deg < high + beside_deg)
        inner_mm, outer_mm = radius_mm - inside_mm * stretch, radius_mm + outside_mm * stretch
        return np.where(near, inner_mm, np.inf), np.where(near, outer_mm, -np.inf)

    return printed
