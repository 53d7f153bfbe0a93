"""Where numerals stand: upright, and everywhere equally clear of the ends of their marks."""

from __future__ import annotations

import math
from collections.abc import Iterator

import numpy as np

from dialgen.drawing import Letters, Point, Style
from dialgen.face.divisions import Rank
from dialgen.face.looks import Look
from dialgen.face.ruling import Mark, RuledScale
from dialgen.lettering import letters, measure

_INFINITY = 1.35
"""How much larger ∞ is set: in the fonts it is no taller than a small letter."""


def reaches(side: str, look: Look) -> dict[Rank, tuple[float, float]]:
    """Return how far marks of each rank reach from their point on the line, inwards (minus) and out."""
    shares = {"outward": (0.0, 1.0), "inward": (-1.0, 0.0), "across": (-0.5, 0.5)}[side]
    return {rank: (shares[0] * look.length_mm(rank), shares[1] * look.length_mm(rank)) for rank in Rank}


def mark_lines(scale: RuledScale) -> Iterator[tuple[Mark, Point, Point]]:
    """Yield every mark with its inner and its outer end."""
    ranks = reaches(scale.spec.marks, scale.look)
    stretches = scale.line.stretch(np.array([mark.angle_deg for mark in scale.marks])).tolist()
    for mark, stretch in zip(scale.marks, stretches, strict=True):
        inner, outer = ranks[mark.rank]
        ux, uy = mark.direction[0] * stretch, mark.direction[1] * stretch
        yield mark, (mark.x + inner * ux, mark.y + inner * uy), (mark.x + outer * ux, mark.y + outer * uy)


def numerals(scale: RuledScale) -> Iterator[Letters]:
    """Yield the numeral of every labelled mark."""
    spec, look = scale.spec, scale.look
    style = Style(fill=look.ink)
    sign = 1.0 if spec.numerals == "outside" else -1.0
    xs, ys = scale.line.away(np.array([mark.angle_deg for mark in scale.marks]))
    aways = zip((sign * xs).tolist(), (sign * ys).tolist(), strict=True)
    for (mark, inner, outer), away in zip(mark_lines(scale), aways, strict=True):
        if mark.label:
            start = outer if spec.numerals == "outside" else inner
            height_mm = look.numeral_mm * (_INFINITY if mark.label == "∞" else 1.0)
            box = measure(mark.label, height_mm)
            half = ((box.right - box.left) / 2, (box.top - box.bottom) / 2)
            reach = clear_reach(half, away, look.space_mm)
            at = (start[0] + reach * away[0], start[1] + reach * away[1])
            yield letters(mark.label, height_mm, at, style)


def clear_reach(half: tuple[float, float], away: tuple[float, float], space_mm: float) -> float:
    """Return how far along ``away`` a box's middle must lie to be just ``space_mm`` clear of the start.

    Args:
        half: half the box's width and height.
        away: the unit vector from the start towards the box.
        space_mm: the distance wanted between the start and the nearest point of the box.

    >>> clear_reach((3.0, 1.0), (0.0, 1.0), 0.5)
    1.5
    """
    (a, b), ux, uy = half, abs(away[0]), abs(away[1])
    if ux > 0 and (side := (a + space_mm) / ux) * uy <= b:
        return side
    if uy > 0 and (side := (b + space_mm) / uy) * ux <= a:
        return side
    # Nearest is a corner: |reach·u - corner| = space, the farther root.
    along = ux * a + uy * b
    return along + math.sqrt(max(along**2 - (a * a + b * b) + space_mm**2, 0.0))
