"""A string of parts that is tapped: a universal shunt, a chain of multipliers."""

from __future__ import annotations

from dataclasses import dataclass

from dialgen.schematic.pieces import (
    GAP_MM,
    TERMINAL_MM,
    Bar,
    Item,
    Joint,
    Label,
    Pieces,
    Wire,
    stack,
)
from dialgen.schematic.placing import (
    PAD_MM,
    column,
    led_reach_mm,
    led_terminal,
    levels,
    rails,
    reach_mm,
    slot_mm,
)

_TAP_MM = 10.0


@dataclass(frozen=True, slots=True)
class Tapped:
    """A string of parts, tapped between them towards terminals at the left.

    Args:
        items: from above.
        taps: what is written at the terminal of the joint above each item; "" for no tap there.
        lower: what is written at the terminal of the string's foot.
        total: a label for some of the items together, and how many of them, from above.
        line: what leads to the lower terminal from outside.
    """

    items: tuple[Item, ...]
    taps: tuple[str, ...]
    lower: str
    total: tuple[Label, int] | None = None
    line: Item | None = None

    @property
    def depth_mm(self) -> float:
        """Room for every sign and its label."""
        return sum(slot_mm(item) for item in self.items)

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set the string, its taps, and the bracket of the total."""
        terminal_x = x + led_reach_mm(self.taps, self.lower, self.line)
        at_x = terminal_x + TERMINAL_MM + _TAP_MM
        joints_y = levels(0.0, -depth_mm, self.items)
        pieces = [*column(at_x, 0.0, -depth_mm, self.items)]
        for i, (text, y) in enumerate(zip((*self.taps, self.lower), joints_y, strict=True)):
            if text:
                line = self.line if i == len(self.items) else None
                pieces += led_terminal(text, (terminal_x, y), line)
                pieces.append(Wire(((terminal_x + TERMINAL_MM, y), (at_x, y))))
                if not last or 0 < i < len(self.items):
                    pieces.append(Joint((at_x, y)))
        right = at_x + reach_mm(self.items) + PAD_MM
        if self.total:
            label, count = self.total
            bracketed, right = _bracket(right, joints_y[0], joints_y[count], label)
            pieces += bracketed
        if not last:
            pieces += rails(at_x, right, depth_mm)
        return tuple(pieces), right


def _bracket(x: float, top: float, bottom: float, label: Label) -> tuple[Pieces, float]:
    """Return a bracket about a part of a column, and where its label ends."""
    foot, arm = 1.5, 2.0
    points = ((x, top - foot), (x + arm, top - foot), (x + arm, bottom + foot), (x, bottom + foot))
    at = x + arm + GAP_MM, (top + bottom) / 2
    return (Bar(points), *stack(label.lines, at, (0.0, 0.5))), at[0] + label.width_mm + PAD_MM
