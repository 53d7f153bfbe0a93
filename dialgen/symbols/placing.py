"""Signs in their place: how wide one is, and what draws it."""

from __future__ import annotations

from dialgen.drawing import Point, Primitive
from dialgen.lettering import PLAIN, Hand
from dialgen.symbols.boxes import box_of
from dialgen.symbols.pen import Figure, Pen
from dialgen.symbols.signs import Sign


def width(sign: Sign, height_mm: float, hand: Hand = PLAIN) -> float:
    """Return the width of a sign's ink in a row ``height_mm`` high, lettered in ``hand``, mm."""
    left, _, right, _ = box_of(_drawn(sign, Pen(unit_mm=height_mm, hand=hand)))
    return right - left


def items(sign: Sign, at: Point, height_mm: float, ink: str, hand: Hand = PLAIN) -> tuple[Primitive, ...]:
    """Return what draws a sign.

    Args:
        sign: which.
        at: the middle of its ink, mm.
        height_mm: of the row it stands in; some, such as the bars of direct current, are lower.
        ink: colour, ``#rrggbb``.
        hand: the hand of its letters.
    """
    pen = Pen(unit_mm=height_mm, ink=ink, hand=hand)
    left, bottom, right, top = box_of(_drawn(sign, pen))
    return _drawn(sign, pen.moved(at[0] - (left + right) / 2, at[1] - (bottom + top) / 2))


def _drawn(sign: Sign, pen: Pen) -> Figure:
    return sign.symbol.shape(pen, sign.parameter)
