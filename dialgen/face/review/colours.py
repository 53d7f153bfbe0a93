"""Colours too like each other to be told apart, by the contrast ratio of WCAG 2.1."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np

from dialgen.dialfile.models import Zone
from dialgen.drawing import Point
from dialgen.errors import Key, Remark
from dialgen.face.inked.numerals import reaches
from dialgen.face.inked.sides import zone_span_mm
from dialgen.face.parts import TEXT, Part
from dialgen.face.review.finished import Finished
from dialgen.face.review.rules import LEAST_CONTRAST, LEAST_ON_GROUND, LEAST_OVER_ZONE, over_zone
from dialgen.face.review.things import Thing, scale_name
from dialgen.face.review.wording import at, grouped, weight
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import COLOURS, contrast

_FEET = 0.2
"""How much of the shortest marks a zone may lie under that only begins at the line."""

_NAMES = {hexed: name for name, hexed in COLOURS.items()}


def weak_on_ground(face: Finished) -> Iterator[Remark]:
    """Yield a remark on each colour that is not seen well enough on the plate."""
    seen = {colour: contrast(colour, face.ground) for colour in {thing.colour for thing in face.things}}
    weak = [thing for thing in face.things if seen[thing.colour] < _least(thing)]
    for things in grouped((thing.colour, thing) for thing in weak):
        told = min(things, key=weight)
        more = f" and {len(things) - 1} more" if len(things) > 1 else ""
        yield Remark(
            f"{_named(told.colour)} on {_named(face.ground)} has a contrast of {seen[told.colour]:.2g}, too "
            f"little for {told.name}{more}; take colours with at least {_least(told):.3g} (WCAG 2.1)",
            _colour_key(face, told),
        )


def weak_over_zone(face: Finished) -> Iterator[Remark]:
    """Yield a remark on each zone over which marks or lettering are not seen well enough."""
    for i, zone in enumerate(face.file.zone):
        scale = face.scales[zone.scale - 1]
        if not zone.hatch and _under_marks(zone, scale):
            name = f"the marks of {scale_name(zone.scale, scale)}" if len(face.scales) > 1 else "the marks"
            place = _middle(zone, scale)
            yield from _over_zone(name, scale.ink, zone.colour, LEAST_OVER_ZONE, ("zone", i), place)
    met = [pair for pair in face.pairs if pair.touches and over_zone(pair.one.sort, pair.other.sort)]
    for pairs in grouped((frozenset((pair.one.sort, pair.other.sort)), pair) for pair in met):
        one, other = sorted((pairs[0].one, pairs[0].other), key=weight)
        yield from _over_zone(
            one.name, one.colour, other.colour, LEAST_CONTRAST, other.sort.key, pairs[0].place
        )


def _over_zone(name: str, ink: str, zone: str, least: float, key: Key, place: Point) -> Iterator[Remark]:
    ratio = contrast(ink, zone)
    if ratio < least:
        yield Remark(
            f"{_named(ink)} over a zone in {_named(zone)} has a contrast of {ratio:.2g}, "
            f"too little for {name} {at(place)}; give the zone a colour with at least {least:g} (WCAG 2.1)",
            (*key, "colour"),
            place=place,
        )


def _under_marks(zone: Zone, scale: RuledScale) -> bool:
    """Return whether a zone lies under a good part of a scale's marks, not just at their feet."""
    (inner, outer), (low, high) = zone_span_mm(zone, scale), reaches(scale.spec.marks, scale.sizes)[Rank.FINE]
    return min(outer, high) - max(inner, low) > _FEET * (high - low)


def _middle(zone: Zone, scale: RuledScale) -> Point:
    """Return the middle of the part of the scale line that a zone goes along."""
    ends_deg = scale.dial.chain.angle(np.array([zone.start, zone.end]))
    (x,), (y,) = (part.tolist() for part in scale.line.points(ends_deg.mean(keepdims=True)))
    return x, y


def _least(thing: Thing) -> float:
    return LEAST_ON_GROUND.get(thing.sort.part, LEAST_CONTRAST)


def _named(colour: str) -> str:
    return f"{_NAMES[colour]} ({colour})" if colour in _NAMES else colour


def _colour_key(face: Finished, thing: Thing) -> Key:
    """Return where the dial file gives a thing its colour, or could."""
    sort = thing.sort
    if sort.part in (Part.ZONES, Part.LIMITS):
        return (*sort.key, "colour")
    if sort.part == TEXT or sort.scale is None:
        return face.look_key(None, "ink", "ground")
    if sort.scale.spec.ink:
        return (*sort.scale.dial.key, "ink")
    return face.look_key(sort.scale, "ink", "ground")
