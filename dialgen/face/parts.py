"""The parts of a face, each on a layer of its own, by name."""

from __future__ import annotations

from enum import StrEnum


class Part(StrEnum):
    """What a scale is made of, in the order in which it is drawn."""

    ZONES = "zones"
    LINE = "line"
    MARKS = "marks"
    NUMERALS = "numerals"
    LIMITS = "limits"
    UNIT = "unit"


GROUND = "ground"
TITLE = "title"
SYMBOLS = "symbols"
TEXT = "text"
MAKER = "maker"


def layer_name(number: int, part: Part) -> str:
    """Return the name of the layer that holds a part of a scale; scales count from 1."""
    return f"scale {number} {part}"
