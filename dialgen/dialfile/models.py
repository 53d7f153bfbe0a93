"""The dial file as a whole, and its tables as frozen models: which keys there are, what each may hold.

What several keys of one table must satisfy together stands with the table; what needs the whole
chain stands with the chain, in `dialgen.dial`.  A field's description is an example of its line.
"""

from __future__ import annotations

from typing import Annotated

from pydantic import BeforeValidator, Field, PlainValidator

from dialgen.dialfile.base import Table
from dialgen.dialfile.fields import Text, at_most
from dialgen.dialfile.movement import Movement, OldScale
from dialgen.dialfile.plates import FreeText, Hole, Plate, Window
from dialgen.dialfile.scales import CircuitTable, Entry, Every, Piece, Scale
from dialgen.quantity import shown

__all__ = [
    "DialFile", "Entry", "Every", "FreeText", "Head", "Hole", "Movement", "OldScale", "Piece", "Plate",
    "Scale", "Window",
]  # fmt: skip


_MOST_SCALES = 100
_MOST_TEXTS = 200


def _version(given: object) -> int:
    if isinstance(given, bool) or not isinstance(given, int):
        raise ValueError(f"the version is a whole number, not {shown(given)}; write dialgen = 1")
    if given != 1:
        raise ValueError(f"version {shown(given)} of the dial file is not known; write dialgen = 1")
    return 1


class Head(Table):
    """What the dial is, for the people who keep it."""

    name: Text | None = None
    serial: Text | None = None


class DialFile(Table):
    """A whole dial file."""

    dialgen: Annotated[int, PlainValidator(_version)] = Field(description="dialgen = 1 as the first line")
    dial: Head = Head()
    movement: Movement = Field(description="a table [movement] with rest and full")
    circuit: CircuitTable | None = None
    scale: Annotated[tuple[Scale, ...], BeforeValidator(at_most(_MOST_SCALES))] = Field(
        min_length=1, description="a table [[scale]] with unit, from, to, and radius or line"
    )
    plate: Plate = Field(description="a table [plate] with pivot, and size or diameter")
    text: Annotated[tuple[FreeText, ...], BeforeValidator(at_most(_MOST_TEXTS))] = ()
