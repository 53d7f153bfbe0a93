"""Looks: how a face is dressed, as tables of values; nothing here draws."""

from dialgen.looks.colours import COLOURS, colour, contrast
from dialgen.looks.look import Decimal, End, Lettering, LineForm, Look, MarkShape, Outside, Turn
from dialgen.looks.table import LOOKS, dressed

__all__ = [
    "COLOURS", "LOOKS", "Decimal", "End", "Lettering", "LineForm", "Look", "MarkShape", "Outside", "Turn",
    "colour", "contrast", "dressed",
]  # fmt: skip
