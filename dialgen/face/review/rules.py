"""Which inks must stay apart, and how much contrast is enough.

Contrast ratios are those of WCAG 2.1, `dialgen.looks.contrast`: 4.5 for text and 3 for graphics, its
level AA.  That of a zone on the ground is ours: a yellow band on white, which nobody misses, has 1.5.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from enum import Enum, auto
from itertools import combinations_with_replacement

from dialgen.face.parts import SYMBOLS, Part
from dialgen.face.review.things import LETTERING, OPENING, Sort
from dialgen.face.ruled.ruling import RuledScale
from dialgen.looks import contrast

LEAST_CONTRAST = 4.5
"""Of lettering and marks on the ground, and of lettering over a zone."""
LEAST_OVER_ZONE = 3.0
"""Of marks over a zone of their own scale."""

LEAST_ON_GROUND: Mapping[str, float] = {Part.ZONES: 1.15, Part.LIMITS: 3.0, SYMBOLS: 3.0}
"""On the ground, of what needs less than lettering."""


class _Kin(Enum):
    """How two sorts belong together."""

    PLATE = auto()
    """Both are of no scale."""
    OWN = auto()
    """Both are of one scale."""
    BACK_TO_BACK = auto()
    """Of two scales that share one line, on its two sides."""
    STRANGERS = auto()


def _pairs(parts: Iterable[str]) -> frozenset[frozenset[str]]:
    return frozenset(frozenset(pair) for pair in combinations_with_replacement(parts, 2))


_FRAME = (Part.ZONES, Part.LINE, Part.MARKS, Part.LIMITS)
_MAY_MEET: Mapping[_Kin, frozenset[frozenset[str]]] = {
    _Kin.PLATE: _pairs([SYMBOLS]) | _pairs([OPENING]),
    _Kin.OWN: _pairs(_FRAME),
    _Kin.BACK_TO_BACK: _pairs(_FRAME),
    _Kin.STRANGERS: frozenset(),
}


def apart(a: Sort, b: Sort) -> bool:
    """Return whether ink of two sorts must not meet.

    Lettering may lie over a zone of its own scale, or if it is of none over any, where it is seen well.
    """
    if over_zone(a, b):
        return not _seen(a, b)
    return frozenset((a.part, b.part)) not in _MAY_MEET[_kin(a, b)]


def over_zone(a: Sort, b: Sort) -> bool:
    """Return whether two sorts are a zone and lettering of the same scale, or of none."""
    zone, other = (a, b) if a.part == Part.ZONES else (b, a)
    return zone.part == Part.ZONES and other.part in LETTERING and other.scale in (None, zone.scale)


def _seen(a: Sort, b: Sort) -> bool:
    return not (a.colour and b.colour) or contrast(a.colour, b.colour) >= LEAST_CONTRAST


def _kin(a: Sort, b: Sort) -> _Kin:
    if a.scale is None and b.scale is None:
        return _Kin.PLATE
    if a.scale is b.scale:
        return _Kin.OWN
    if a.scale and b.scale and back_to_back(a.scale, b.scale):
        return _Kin.BACK_TO_BACK
    return _Kin.STRANGERS


def back_to_back(one: RuledScale, other: RuledScale) -> bool:
    """Return whether two scales share one line, on its two sides."""
    return one.line == other.line and {one.spec.marks, other.spec.marks} == {"outward", "inward"}
