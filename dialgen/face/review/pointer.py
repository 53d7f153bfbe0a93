"""What the pointer does on the face: it must reach its marks and leave its numerals to be read."""

from __future__ import annotations

from collections.abc import Iterator
from statistics import median

import numpy as np

from dialgen.errors import Remark
from dialgen.face.inked.numerals import mark_lines
from dialgen.face.parts import Part
from dialgen.face.review.finished import Finished
from dialgen.face.review.things import Thing
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale

SHORT_MM = 1.0
"""How far the tip may stay short of the marks; common practice is to reach just to the fine ones or under."""
COVERED = 1.0
"""How much of a numeral's height it may cover: a slim tip hides one when it crosses it whole."""

_KEY = ("movement", "pointer")
_HAIR_MM = 1e-9


def too_short(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where the pointer ends before it reaches a scale's shortest marks.

    A straight line is nearer in the middle than at its ends, where a pointer that is right in the
    middle must fall short; there the nearest mark counts.  On a curved plate laid flat lengths from
    the pivot are not those of the instrument, and nothing is said.
    """
    tip_mm = face.file.movement.pointer
    if tip_mm is None or scale.spec.curve is not None or not scale.marks:
        return
    reach_mm = _inner_end_mm(scale)
    if tip_mm < reach_mm - SHORT_MM - _HAIR_MM:
        yield Remark(
            f"the pointer ends {reach_mm - tip_mm:.2g} mm before the marks{name}; "
            f"draw the scale line {reach_mm - tip_mm:.2g} mm nearer, or lengthen the pointer",
            _KEY,
        )


def hides_numerals(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where the pointer reaches into numerals outside the marks.

    It may where it must: to reach the marks of another scale farther out.  Numerals inside are
    crossed on most meters.
    """
    tip_mm = face.file.movement.pointer
    if tip_mm is None or scale.spec.curve is not None or not scale.marks:
        return
    marks_mm = _inner_end_mm(scale)
    found = [(_nearest_mm(thing), thing) for thing in face.things if _is_numeral(thing, scale)]
    outside = sorted((pair for pair in found if pair[0] > marks_mm), key=lambda pair: pair[0])
    if not outside:
        return
    # Of numerals at unequal distances, as along a straight line, the middle one counts.
    near_mm = median(distance_mm for distance_mm, _ in outside)
    over_mm = tip_mm - near_mm
    if over_mm > COVERED * scale.sizes.numeral_mm and not _reaches_on(face, scale, near_mm):
        left, bottom, right, top = outside[0][1].shape.box
        yield Remark(
            f"the pointer reaches {over_mm:.2g} mm into the numerals{name} and hides them; "
            f"draw the scale line {over_mm:.2g} mm farther out, or the numerals inside",
            _KEY,
            place=((left + right) / 2, (bottom + top) / 2),
        )


def _reaches_on(face: Finished, scale: RuledScale, numerals_mm: float) -> bool:
    """Return whether the marks of another scale lie beyond the numerals of this one."""
    others = (other for other in face.scales if other is not scale and other.marks)
    return any(_inner_end_mm(other) > numerals_mm for other in others)


def _is_numeral(thing: Thing, scale: RuledScale) -> bool:
    return thing.sort.scale is scale and thing.sort.part == Part.NUMERALS


def _nearest_mm(thing: Thing) -> float:
    """Return how near to the pivot the ink of a thing comes."""
    return float(np.hypot(*thing.shape.corners).min())


def _inner_end_mm(scale: RuledScale) -> float:
    """Return how far from the pivot the pointer meets the inner end of the nearest of the shortest marks."""
    shortest = max((mark.rank for mark in scale.marks), key=list(Rank).index)
    return min(float(np.hypot(*inner)) for mark, inner, _ in mark_lines(scale) if mark.rank is shortest)
