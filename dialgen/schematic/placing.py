"""Parts and terminals set on level and upright wires, each with its lettering clear of it."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

from dialgen.drawing import Point
from dialgen.schematic.pieces import (
    GAP_MM,
    LETTER_MM,
    TERMINAL_MM,
    Item,
    Piece,
    Pieces,
    Sign,
    Terminal,
    Wire,
    Words,
    height_mm,
    stack,
    width_mm,
)

LEAD_MM = 3.0
"""The least length of wire at either end of a sign."""

PAD_MM = 3.0
"""Between the lettering of one part and whatever is next to it."""

_PLUS_MM = 2.2
"""How far beside its wire the plus of a movement stands."""

_ROWS_APART_MM = 4.0


def terminal(text: str, at: Point) -> Pieces:
    """Return a terminal with its text at its left; none without a text."""
    if not text:
        return ()
    place = at[0] - TERMINAL_MM - GAP_MM, at[1] - LETTER_MM / 2
    return Terminal(at, text), Words(text, place, (1.0, 0.0))


def led_terminal(text: str, at: Point, line: Item | None) -> Pieces:
    """Return a terminal to which a line leads from outside; its text stands where the line begins.

    Without a line it is a terminal like any other.
    """
    if line is None:
        return terminal(text, at)
    near = at[0] - TERMINAL_MM
    far = near - series_width_mm(line)
    return (
        Terminal(at),
        *in_line(line, (far, at[1]), near),
        *terminal(text, (far - TERMINAL_MM, at[1])),
    )


def led_reach_mm(texts: Sequence[str], lower: str, line: Item | None) -> float:
    """Return how far terminals reach to the left, the lower one of them with its line."""
    beside_mm = [width_mm(text) for text in texts]
    led_mm = 0.0 if line is None else series_width_mm(line) + 2 * TERMINAL_MM
    return max(0.0, *beside_mm, width_mm(lower) + led_mm) + GAP_MM + TERMINAL_MM


def rails(left: float, right: float, depth_mm: float) -> Pieces:
    """Return both rails from one place to another."""
    return tuple(Wire(((left, y), (right, y))) for y in (0.0, -depth_mm)) if right > left else ()


def series_width_mm(item: Item) -> float:
    """Return how long a stretch of wire must be that has the item in it."""
    return max(item.extent.length_mm + 2 * LEAD_MM, item.label.width_mm + PAD_MM)


def row_pitch_mm(items: Sequence[Item]) -> float:
    """Return how far apart rows must be for each to have its name above and its values below."""
    lines = max(len(item.label.values) for item in items)
    half = max(item.extent.half_mm for item in items)
    return 2 * (half + GAP_MM) + LETTER_MM + height_mm(lines) + _ROWS_APART_MM


def in_line(item: Item, start: Point, right: float, clear_mm: float = 0.0) -> Pieces:
    """Return a part in the middle of a level wire from ``start`` to ``right``.

    Its name is above and its values are below, clear of the sign, and at least ``clear_mm`` off the wire.
    """
    (x, y), extent = start, item.extent
    middle = (x + right) / 2
    near, far = middle - extent.length_mm / 2, middle + extent.length_mm / 2
    ends = ((far, y), (near, y)) if item.turned else ((near, y), (far, y))
    aside = max(extent.half_mm + GAP_MM, clear_mm)
    names = (item.label.name,) if item.label.name else ()
    plus = Words("+", (far + _PLUS_MM if item.turned else near - _PLUS_MM, y + _PLUS_MM / 2))
    return (
        Wire(((x, y), (near, y))),
        Sign(item.kind, *ends, item.part),
        Wire(((far, y), (right, y))),
        *stack(names, (middle, y + aside), (0.5, 0.0)),
        *stack(item.label.values, (middle, y - aside), (0.5, 1.0)),
        *((plus,) if item.plus else ()),
    )


def slot_mm(item: Item) -> float:
    """Return the height that a part takes in a column."""
    return max(item.extent.length_mm + 2 * LEAD_MM, item.label.height_mm + PAD_MM)


def levels(top: float, bottom: float, items: Sequence[Item]) -> list[float]:
    """Return the heights of the joints of a column, what is spare shared out evenly."""
    slots = [slot_mm(item) for item in items]
    spare = (top - bottom - sum(slots)) / len(slots)
    found = [top]
    for slot in slots:
        found.append(found[-1] - slot - spare)
    return found


def column(x: float, top: float, bottom: float, items: Sequence[Item], left: bool = False) -> Pieces:
    """Return parts one below the other on an upright wire, labels at the right or at the left."""
    pieces: list[Piece] = []
    for item, (above, below) in zip(items, pairwise(levels(top, bottom, items)), strict=True):
        pieces += upright(item, x, above, below, left)
    return tuple(pieces)


def upright(item: Item, x: float, above: float, below: float, left: bool = False) -> Pieces:
    """Return a part in the middle of an upright wire."""
    middle, extent = (above + below) / 2, item.extent
    high, low = middle + extent.length_mm / 2, middle - extent.length_mm / 2
    ends = ((x, low), (x, high)) if item.turned else ((x, high), (x, low))
    side = -1 if left else 1
    label_at = x + side * (extent.half_mm + GAP_MM), middle
    plus = (Words("+", (x - side * _PLUS_MM, high + _PLUS_MM / 3)),) if item.plus else ()
    return (
        Wire(((x, above), (x, high))),
        Sign(item.kind, *ends, item.part),
        Wire(((x, low), (x, below))),
        *stack(item.label.lines, label_at, (1.0 if left else 0.0, 0.5)),
        *plus,
    )


def reach_mm(items: Sequence[Item]) -> float:
    """Return how far a column reaches to the right of its wire."""
    return max(
        item.extent.half_mm + (GAP_MM + item.label.width_mm if item.label.lines else 0.0) for item in items
    )
