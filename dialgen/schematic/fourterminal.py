"""A shunt with four terminals: two for the current, and two within them for the drop."""

from __future__ import annotations

from collections.abc import Sequence

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
    stack,
)
from dialgen.schematic.placing import in_line, series_width_mm
from dialgen.schematic.wording import Plan

_BUS_MM = 12.0
_RISE_MM = 27.0
_JOG_MM = 6.0
_INNER_MM = 5.0
"""From the end of the shunt's sign to the middle of the terminal for its drop."""


def four_terminal(plan: Plan, shunt: Item, branch: Sequence[Item]) -> Pieces:
    """Return the shunt in its bus, and above it the movement's branch between the sense leads."""
    row = (plan.movement(), *branch)
    half_mm = shunt.extent.length_mm / 2 + _INNER_MM
    needed_mm = sum(series_width_mm(item) for item in row)
    row_half_mm = half_mm if needed_mm <= 2 * half_mm else needed_mm / 2
    end_mm = max(half_mm + _BUS_MM, row_half_mm)
    return (
        *_bus(shunt, half_mm, end_mm),
        *_text(plan.upper, -end_mm, -1),
        *_text(plan.lower, end_mm, 1),
        *_sense_lead(-half_mm, -row_half_mm),
        *_sense_lead(half_mm, row_half_mm),
        *_row(row, -row_half_mm, (2 * row_half_mm - needed_mm) / len(row)),
    )


def _bus(shunt: Item, inner_mm: float, outer_mm: float) -> Pieces:
    """Return the heavy conductor with the shunt in its middle and the terminals for its drop."""
    half = shunt.extent.length_mm / 2
    pieces: list[Piece] = [Sign(shunt.kind, (-half, 0.0), (half, 0.0), shunt.part)]
    for side in (-1, 1):
        pieces += (
            Terminal((side * inner_mm, 0.0)),
            Wire(((side * half, 0.0), (side * (inner_mm - TERMINAL_MM), 0.0)), heavy=True),
            Wire(
                ((side * (inner_mm + TERMINAL_MM), 0.0), (side * (outer_mm - TERMINAL_MM), 0.0)), heavy=True
            ),
        )
    pieces += stack(shunt.label.lines, (0.0, -shunt.extent.half_mm - GAP_MM), (0.5, 1.0))
    return tuple(pieces)


def _text(text: str, x: float, side: int) -> Pieces:
    """Return a terminal for the current with its text beyond it."""
    place = x + side * (TERMINAL_MM + GAP_MM), -LETTER_MM / 2
    return Terminal((x, 0.0), text), Words(text, place, ((1 - side) / 2, 0.0))


def _sense_lead(inner: float, outer: float) -> Pieces:
    """Return the wire from a terminal for the drop up to the end of the movement's branch."""
    points = ((inner, TERMINAL_MM), (inner, _JOG_MM), (outer, _JOG_MM), (outer, _RISE_MM))
    return (Wire(points if inner != outer else (points[0], points[-1])),)


def _row(row: Sequence[Item], left: float, spare_mm: float) -> Pieces:
    """Return the movement's branch above the bus."""
    pieces: list[Piece] = []
    for item in row:
        right = left + series_width_mm(item) + spare_mm
        pieces += in_line(item, (left, _RISE_MM), right)
        left = right
    return tuple(pieces)
