"""Parts of which a switch takes one: in a row of multipliers, or among the shunts of an ohmmeter."""

from __future__ import annotations

import math
from dataclasses import dataclass

from dialgen.drawing import Point
from dialgen.schematic.pieces import (
    GAP_MM,
    TERMINAL_MM,
    Bar,
    Item,
    Joint,
    Piece,
    Pieces,
    Terminal,
    Wire,
    Words,
    width_mm,
)
from dialgen.schematic.placing import (
    PAD_MM,
    in_line,
    led_reach_mm,
    led_terminal,
    rails,
    reach_mm,
    row_pitch_mm,
    series_width_mm,
    slot_mm,
    terminal,
    upright,
)

_ARM_MM = (9.0, 5.0)
"""How far a switch's pivot stands from the contact it is on, along the contacts' rows and across them."""

_CONTACT_MM = 13.0
"""How far below the upper rail the contacts of a switch across the rails are."""


@dataclass(frozen=True, slots=True)
class Switched:
    """Parts one below the other, of which a switch at the left takes one into the upper rail.

    Args:
        items: from above.
        chosen: which of them the switch stands on.
        upper: what is written at the terminal of the switch.
        lower: what is written at the terminal of the lower rail.
        line: what leads to that one from outside.
    """

    items: tuple[Item, ...]
    chosen: int
    upper: str
    lower: str
    line: Item | None = None

    @property
    def depth_mm(self) -> float:
        """Room for all rows, and for the lower terminal below them."""
        return row_pitch_mm(self.items) * len(self.items)

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set terminals, arm, contacts, rows and the bus behind them."""
        pitch = row_pitch_mm(self.items)
        terminal_x = x + led_reach_mm([self.upper], self.lower, self.line)
        pivot_x = terminal_x + TERMINAL_MM + 6.0
        contact_x = pivot_x + _ARM_MM[0]
        bus_x = contact_x + TERMINAL_MM + max(series_width_mm(item) for item in self.items)
        rows_y = [-pitch * i for i, _ in enumerate(self.items)]
        pivot_y = rows_y[self.chosen] + _ARM_MM[1] * (-1 if self.chosen < len(rows_y) - 1 else 1)
        pieces: list[Piece] = [
            *terminal(self.upper, (terminal_x, pivot_y)),
            Wire(((terminal_x + TERMINAL_MM, pivot_y), (pivot_x - TERMINAL_MM, pivot_y))),
            *_arm((pivot_x, pivot_y), (contact_x, rows_y[self.chosen])),
            *led_terminal(self.lower, (terminal_x, -depth_mm), self.line),
            Wire(((terminal_x + TERMINAL_MM, -depth_mm), (bus_x, -depth_mm))),
            Wire(((bus_x, 0.0), (bus_x, rows_y[-1]))),
        ]
        for i, (item, y) in enumerate(zip(self.items, rows_y, strict=True)):
            pieces += (Terminal((contact_x, y)), *in_line(item, (contact_x + TERMINAL_MM, y), bus_x))
            if i < len(rows_y) - 1:
                pieces.append(Joint((bus_x, y)))
        return tuple(pieces), bus_x


@dataclass(frozen=True, slots=True)
class Position:
    """What a switch across the rails takes: the text at its contact, and a part or none."""

    text: str
    item: Item | None


@dataclass(frozen=True, slots=True)
class SwitchedAcross:
    """Parts from rail to rail, side by side, of which a switch at the upper rail takes one.

    Args:
        positions: from the left.
        chosen: which of them the switch stands on.
    """

    positions: tuple[Position, ...]
    chosen: int

    @property
    def depth_mm(self) -> float:
        """Room for the switch, and below it for every part."""
        return _CONTACT_MM + max((slot_mm(p.item) for p in self.positions if p.item), default=0.0) + PAD_MM

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set contacts in a row, the arm above the chosen one, and the parts below them."""
        pieces: list[Piece] = []
        contacts_x: list[float] = []
        contact_x = right = x + _ARM_MM[0]
        for position in self.positions:
            # The contacts are above the parts' labels, so one without a part may stand over a label.
            at_x = (right if position.item else contact_x) + PAD_MM
            contacts_x.append(at_x)
            contact_x = at_x + TERMINAL_MM + GAP_MM + width_mm(position.text)
            pieces += (Terminal((at_x, -_CONTACT_MM)), *_contact_text(position.text, at_x))
            if position.item:
                pieces += upright(position.item, at_x, -_CONTACT_MM - TERMINAL_MM, -depth_mm)
                pieces.append(Joint((at_x, -depth_mm)))
                right = at_x + reach_mm((position.item,))
            right = max(right, contact_x) + PAD_MM
        pivot = contacts_x[self.chosen] - _ARM_MM[1], -_CONTACT_MM + _ARM_MM[1] + 1.0
        pieces += (
            Joint((pivot[0], 0.0)),
            Wire(((pivot[0], 0.0), (pivot[0], pivot[1] + TERMINAL_MM))),
            *_arm(pivot, (contacts_x[self.chosen], -_CONTACT_MM)),
            *rails(x, right, depth_mm),
        )
        return tuple(pieces), right


def _contact_text(text: str, x: float) -> Pieces:
    return (Words(text, (x + TERMINAL_MM + GAP_MM / 2, -_CONTACT_MM + GAP_MM / 2), (0.0, 0.0)),)


def _arm(pivot: Point, contact: Point) -> Pieces:
    """Return a switch's arm from its pivot to the rim of a contact."""
    length_mm = math.dist(pivot, contact)
    x, y = (contact[0] - pivot[0]) / length_mm, (contact[1] - pivot[1]) / length_mm
    start = pivot[0] + x * TERMINAL_MM, pivot[1] + y * TERMINAL_MM
    end = contact[0] - x * TERMINAL_MM, contact[1] - y * TERMINAL_MM
    return Terminal(pivot), Bar((start, end), 0.5, arrow=True)
