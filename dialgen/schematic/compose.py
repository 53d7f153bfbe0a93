"""A design as a drawing: its layout, further parts, title, and a page about them."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

from dialgen.circuit.design import Design
from dialgen.drawing import Drawing
from dialgen.errors import InputError
from dialgen.ink import shape
from dialgen.schematic.inking import inked, layers
from dialgen.schematic.layouts import LAYOUTS
from dialgen.schematic.pieces import GAP_MM, Piece, Pieces, Sign, Words
from dialgen.schematic.placing import in_line, series_width_mm
from dialgen.schematic.wording import Plan

MARGIN_MM = 8.0
LEAST_WIDTH_MM = 120.0
TITLE_MM = 3.0
_TITLE_GAP_MM = 7.0
_FURTHER_GAP_MM = 10.0
_NO_SPLITS: Mapping[str, int] = MappingProxyType({})

Box = tuple[float, float, float, float]
"""Left, bottom, right and top in millimetres."""


def draw(
    design: Design,
    *,
    title: str = "",
    coil: tuple[str, ...] = (),
    splits: Mapping[str, int] = _NO_SPLITS,
    earthed: bool = False,
) -> Drawing:
    """Return the schematic of a design, on a page as large as it needs.

    Args:
        design: the circuit.
        title: what is written above it.
        coil: what is written beside the movement, in lines: "1 mA", "75 Ω".
        splits: of how many equal resistors in series a part is made, by its name; of one where left out.
        earthed: whether the lower terminal, behind the movement, is marked as the earthed end.

    Raises:
        InputError: no layout is known for the circuit's kind, or a split is of no part or into nothing.
        CharacterError: a text has a character that no font has.
    """
    pieces = laid(design, coil, splits, earthed)
    left, bottom, right, top = _box(pieces)
    if title:
        heading = Words(title, ((left + right) / 2, top + _TITLE_GAP_MM), (0.5, 0.0), TITLE_MM)
        over = _box((heading,))
        left, right, top = min(left, over[0]), max(right, over[2]), over[3]
        pieces = (*pieces, heading)
    spare_mm = max(0.0, LEAST_WIDTH_MM - 2 * MARGIN_MM - (right - left)) / 2
    return Drawing(
        left=left - spare_mm,
        bottom=bottom,
        width=right - left + 2 * spare_mm,
        height=top - bottom,
        layers=layers(pieces),
        title=title or design.kind,
    ).with_margin(MARGIN_MM)


def laid(
    design: Design, coil: tuple[str, ...], splits: Mapping[str, int] = _NO_SPLITS, earthed: bool = False
) -> Pieces:
    """Return the pieces of a design's picture; raises as `draw` does."""
    if design.kind not in LAYOUTS:
        raise InputError(
            f"there is no picture of the circuit {design.kind!r}; one of {', '.join(LAYOUTS)} can be drawn"
        )
    plan = Plan(design, coil, splits, earthed)
    pieces = LAYOUTS[design.kind](plan)
    return (*pieces, *_further(plan, pieces))


def _further(plan: Plan, pieces: Pieces) -> Pieces:
    """Return a row of the parts that the layout has no place for, below the picture."""
    shown = {piece.part for piece in pieces if isinstance(piece, Sign)}
    left_out = [
        p for p in plan.design.parts if p.name not in shown and not shown.issuperset(p.sums or [p.name])
    ]
    if not left_out:
        return ()
    left, bottom, _, _ = _box(pieces)
    y = bottom - _FURTHER_GAP_MM
    found: list[Piece] = []
    for part in left_out:
        item = plan.item(part)
        end = left + series_width_mm(item)
        found += in_line(item, (left, y), end)
        left = end + 2 * GAP_MM
    return tuple(found)


def _box(pieces: Pieces) -> Box:
    """Return the box about all ink."""
    boxes = [area.box for piece in pieces for item in inked(piece) if (area := shape(item))]
    lefts, bottoms, rights, tops = zip(*boxes, strict=True)
    return min(lefts), min(bottoms), max(rights), max(tops)
