"""Zones of a scale as ink: plain bands or hatched ones; their ends follow the chain like every mark."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

import numpy as np

from dialgen.dialfile.models import Zone
from dialgen.drawing import Cap, Line, Primitive, Style
from dialgen.errors import InputError
from dialgen.face.inked.bands import between
from dialgen.face.inked.courses import Course, course
from dialgen.face.inked.hatch import hatch, slants
from dialgen.face.inked.sides import zone_span_mm
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import LineForm

_PITCH = 4.5


def zone_items(zones: Sequence[Zone], scale: RuledScale) -> list[Primitive]:
    """Return the bands of all zones of a scale.

    Neighbours of different colours that are hatched are hatched in different directions.

    Raises:
        InputError: a band with no room inside the scale line.
    """
    if not zones:
        return []
    hatched = sorted((zone for zone in zones if zone.hatch), key=lambda zone: zone.start)
    leans = dict(zip(map(id, hatched), slants([zone.colour for zone in hatched]), strict=True))
    angles = scale.dial.chain.angle(np.array([(zone.start, zone.end) for zone in zones])).tolist()
    return [
        item
        for zone, ends_deg in zip(zones, angles, strict=True)
        for item in _zone(zone, scale, ends_deg, leans.get(id(zone), 0.0))
    ]


def _zone(zone: Zone, scale: RuledScale, ends_deg: Sequence[float], slant: float) -> list[Primitive]:
    """Return a band, and its strokes if they have a slant."""
    start_deg, end_deg = ends_deg
    try:
        inner, outer = (course(scale.line, start_deg, end_deg, side) for side in zone_span_mm(zone, scale))
    except InputError as error:
        raise error.under("width") from None
    if not slant:
        return [between(outer, inner, Style(fill=zone.colour))]
    # As wide as the outline, the strokes have their square ends covered by it.
    width_mm = scale.sizes.fine_width_mm
    style = Style(stroke=zone.colour, width_mm=width_mm)
    return [*hatch(outer, inner, _PITCH * width_mm, slant, style), *_edges(zone, scale, outer, inner, style)]


def _edges(zone: Zone, scale: RuledScale, outer: Course, inner: Course, style: Style) -> list[Primitive]:
    """Return the outline of a hatched band; where it lies on the scale line, that is one of its sides."""
    near_mm, far = min(
        (abs(edge), other) for edge, other in zip(zone_span_mm(zone, scale), (outer, inner), strict=True)
    )
    if near_mm > scale.sizes.line_width_mm or scale.look.line is LineForm.NONE:
        return [between(outer, inner, style)]
    rounded = replace(style, cap=Cap.ROUND)
    ends = [
        (inner.point(inner.low), outer.point(outer.low)),
        (inner.point(inner.high), outer.point(outer.high)),
    ]
    return [far.piece(far.low, far.high, rounded), *(Line(*end, rounded) for end in ends)]
