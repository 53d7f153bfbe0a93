"""From pieces to ink: each piece as primitives of the display list, in layers by what they are."""

from __future__ import annotations

from itertools import pairwise
from typing import assert_never

from dialgen.drawing import Cap, Circle, Layer, Line, Primitive, Purpose, Style
from dialgen.lettering import Fit, letters
from dialgen.schematic.library import INK, arrowhead, ink
from dialgen.schematic.pieces import TERMINAL_MM, Bar, Joint, Piece, Pieces, Sign, Terminal, Wire, Words

WIRE_MM, HEAVY_MM = 0.35, 0.9
_DOT_MM = 0.75

_LAYERS: dict[type[Piece], str] = {
    Wire: "wires",
    Joint: "joints",
    Terminal: "terminals",
    Sign: "parts",
    Bar: "lines",
    Words: "lettering",
}


def layers(pieces: Pieces) -> tuple[Layer, ...]:
    """Return the layers in which a picture is drawn, those that have anything in them."""
    found: dict[str, list[Primitive]] = {name: [] for name in _LAYERS.values()}
    for piece in pieces:
        found[_LAYERS[type(piece)]] += inked(piece)
    return tuple(
        Layer(name=name, purpose=Purpose.PRINT, items=tuple(items)) for name, items in found.items() if items
    )


def inked(piece: Piece) -> tuple[Primitive, ...]:
    """Return what a piece is drawn with."""
    match piece:
        case Wire():
            # A heavy wire is straight and ends at the rim of a terminal, which a round end would run into.
            width_mm, cap = (HEAVY_MM, Cap.BUTT) if piece.heavy else (WIRE_MM, Cap.ROUND)
            style = Style(stroke=INK, width_mm=width_mm, cap=cap)
            return tuple(Line(a, b, style) for a, b in pairwise(piece.points) if a != b)
        case Joint():
            return (Circle(piece.at, _DOT_MM, Style(fill=INK)),)
        case Terminal():
            return (Circle(piece.at, TERMINAL_MM, Style(stroke=INK, width_mm=WIRE_MM)),)
        case Sign():
            return ink(piece)
        case Bar():
            return _bar(piece)
        case Words():
            style = Style(fill=INK)
            return (letters(piece.text, piece.height_mm, piece.at, style, anchor=piece.anchor, fit=Fit.LINE),)
        case _:
            assert_never(piece)


def _bar(bar: Bar) -> tuple[Primitive, ...]:
    style = Style(stroke=INK, width_mm=bar.width_mm, cap=Cap.ROUND)
    points = list(bar.points)
    heads: tuple[Primitive, ...] = ()
    if bar.arrow:
        points[-1], head = arrowhead(points[-2], points[-1])
        heads = (head,)
    return (*(Line(a, b, style) for a, b in pairwise(points)), *heads)
