"""A current transformer: a bar through a core, and the winding that goes on to the instrument."""

from __future__ import annotations

from dataclasses import dataclass

from dialgen.schematic.pieces import (
    EXTENTS,
    GAP_MM,
    TERMINAL_MM,
    Bar,
    Joint,
    Kind,
    Piece,
    Pieces,
    Sign,
    Wire,
    stack,
    width_mm,
)
from dialgen.schematic.placing import LEAD_MM, PAD_MM, terminal

_STUB_MM = 6.0


@dataclass(frozen=True, slots=True)
class Transformer:
    """The block at the left of what a current transformer feeds.

    Args:
        upper: what is written where the primary's bar comes in.
        lower: what is written where it goes out.
        text: what is written beside the winding, in lines.
    """

    upper: str
    lower: str
    text: tuple[str, ...]
    depth_mm: float = 30.0

    def lay(self, x: float, depth_mm: float, last: bool) -> tuple[Pieces, float]:
        """Set bar, core and winding; the foot of the secondary is earthed."""
        bar_x = x + max(width_mm(self.upper), width_mm(self.lower)) + GAP_MM + TERMINAL_MM
        top, foot, middle = _STUB_MM, -depth_mm - _STUB_MM, -depth_mm / 2
        extent = EXTENTS[Kind.WINDING]
        winding_x, core_x = bar_x + 9.0, bar_x + 4.5
        high, low = middle + extent.length_mm / 2, middle - extent.length_mm / 2
        right = winding_x + GAP_MM + max(map(width_mm, self.text)) + PAD_MM
        earth_x = winding_x + 5.0
        ground = earth_x, -depth_mm - LEAD_MM
        pieces: list[Piece] = [
            *terminal(self.upper, (bar_x, top)),
            *terminal(self.lower, (bar_x, foot)),
            Wire(((bar_x, top - TERMINAL_MM), (bar_x, foot + TERMINAL_MM)), heavy=True),
            *(Bar(((core_x + d, high + 1.0), (core_x + d, low - 1.0)), 0.5) for d in (-0.7, 0.7)),
            Wire(((winding_x, 0.0), (winding_x, high))),
            # The loops bulge to the left of their run, so from the foot they would bulge away from the bar.
            Sign(Kind.WINDING, (winding_x, low), (winding_x, high)),
            Wire(((winding_x, low), (winding_x, -depth_mm))),
            Wire(((winding_x, 0.0), (right, 0.0))),
            Wire(((winding_x, -depth_mm), (right, -depth_mm))),
            Joint((earth_x, -depth_mm)),
            Wire(((earth_x, -depth_mm), ground)),
            Sign(Kind.EARTH, ground, ground),
            *stack(self.text, (winding_x + GAP_MM + 0.5, middle), (0.0, 0.5)),
        ]
        return tuple(pieces), right
