"""Blocks between two rails, set from left to right: how nearly every range circuit is drawn.

The upper rail is at height 0, the lower one as far below as the deepest block needs.  Each block
takes the rails on at its left and hands them over at its right, and is as wide as its lettering
asks, so nothing is ever set over anything else.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Protocol

from dialgen.schematic.pieces import (
    GAP_MM,
    LETTER_MM,
    TERMINAL_MM,
    Item,
    Joint,
    Piece,
    Pieces,
    Wire,
    Words,
    width_mm,
)
from dialgen.schematic.placing import (
    PAD_MM,
    column,
    in_line,
    led_reach_mm,
    led_terminal,
    rails,
    reach_mm,
    series_width_mm,
    slot_mm,
    terminal,
)

_LEAST_DEPTH_MM = 26.0


class Block(Protocol):
    """A stretch of a circuit between its two rails."""

    @property
    def depth_mm(self) -> float:
        """How far apart the rails must be at least."""
        ...

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Return the pieces from ``x`` on and where they end; the last block closes the rails."""
        ...


def ladder(blocks: Sequence[Block]) -> Pieces:
    """Return blocks from left to right between one pair of rails."""
    depth_mm = max(_LEAST_DEPTH_MM, *(block.depth_mm for block in blocks))
    # Names above the rail stand on one line, and so do values below it.
    clear_mm = max((b.item.extent.half_mm for b in blocks if isinstance(b, Series)), default=0.0) + GAP_MM
    blocks = [replace(b, clear_mm=clear_mm) if isinstance(b, Series) else b for b in blocks]
    pieces: list[Piece] = []
    x = 0.0
    for i, block in enumerate(blocks):
        laid, x = block.lay(x, depth_mm, i == len(blocks) - 1)
        pieces += laid
    return tuple(pieces)


@dataclass(frozen=True, slots=True)
class Ends:
    """The two terminals, each with what is written beside it.

    Args:
        upper: the text of the upper one.
        lower: the text of the lower one.
        plain: how far the rails go on before anything is on them, mm.
        between: what is written between the two: what is connected there.
        line: what leads to the lower one from outside.
    """

    upper: str
    lower: str
    plain: float = 4.0
    between: str = ""
    line: Item | None = None
    depth_mm: float = 0.0

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set both terminals one above the other."""
        beside_mm = led_reach_mm([self.upper], self.lower, self.line)
        at_x = x + max(beside_mm, width_mm(self.between) / 2)
        right = at_x + TERMINAL_MM + self.plain
        between = Words(self.between, (at_x, -(depth_mm + LETTER_MM) / 2))
        return (
            *((between,) if self.between else ()),
            *terminal(self.upper, (at_x, 0.0)),
            *led_terminal(self.lower, (at_x, -depth_mm), self.line),
            *rails(at_x + TERMINAL_MM, right, depth_mm),
        ), right


@dataclass(frozen=True, slots=True)
class Series:
    """A part in the upper rail, its name above and its value below, ``clear_mm`` off the rail or more."""

    item: Item
    clear_mm: float = 0.0
    depth_mm: float = 20.0

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set it in the middle of a stretch wide enough for its lettering."""
        right = x + series_width_mm(self.item)
        lower = Wire(((x, -depth_mm), (right, -depth_mm)))
        return (*in_line(self.item, (x, 0.0), right, self.clear_mm), lower), right


@dataclass(frozen=True, slots=True)
class Across:
    """Parts one below the other from rail to rail, each with its label at its right."""

    items: tuple[Item, ...]

    @property
    def depth_mm(self) -> float:
        """Room for every sign and its label."""
        return sum(slot_mm(item) for item in self.items)

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set the column; labels stand clear of whatever follows."""
        half = max(item.extent.half_mm for item in self.items)
        at_x = x + half + PAD_MM
        right = at_x + reach_mm(self.items) + PAD_MM
        pieces: list[Piece] = [*rails(x, at_x, depth_mm), *column(at_x, 0.0, -depth_mm, self.items)]
        if not last:
            pieces += (Joint((at_x, 0.0)), Joint((at_x, -depth_mm)), *rails(at_x, right, depth_mm))
        return tuple(pieces), right
