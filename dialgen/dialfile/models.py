"""The dial file as a whole, and its tables as frozen models: which keys there are, what each may hold.

What several keys of one table must satisfy together stands with the table; what needs the whole
chain stands with the chain, in `dialgen.dial`.  A field's description is an example of its line.
"""

from __future__ import annotations

from collections.abc import Iterator
from datetime import date, datetime
from typing import Annotated, Any

from pydantic import BeforeValidator, Field, PlainValidator, ValidationInfo

from dialgen.dialfile.base import Table, checked, needs
from dialgen.dialfile.dividing import Entry, Every, Piece
from dialgen.dialfile.fields import Lettered, Text, at_most
from dialgen.dialfile.looks import Dress, read_dress
from dialgen.dialfile.movement import Movement, OldScale
from dialgen.dialfile.plates import FreeText, Hole, Mirror, Plate, Slot, Window
from dialgen.dialfile.rows import CircuitTable, Fiducial, Row
from dialgen.dialfile.scales import Scale
from dialgen.dialfile.signs import Symbols
from dialgen.dialfile.zones import Limit, Zone
from dialgen.errors import InputError
from dialgen.quantity import shown

__all__ = [
    "DialFile", "Dress", "Entry", "Every", "Fiducial", "FreeText", "Head", "Hole", "Limit", "Mirror",
    "Movement", "OldScale", "Piece", "Plate", "Row", "Scale", "Slot", "Symbols", "Window", "Zone",
]  # fmt: skip


_MOST_SCALES = 100
_MOST_TEXTS = 200
_MOST_ZONES = 100


def _version(given: object) -> int:
    if isinstance(given, bool) or not isinstance(given, int):
        raise ValueError(f"the version is a whole number, not {shown(given)}; write dialgen = 1")
    if given != 1:
        raise ValueError(f"version {shown(given)} of the dial file is not known; write dialgen = 1")
    return 1


def _date(given: object) -> date:
    if isinstance(given, str):
        try:
            return date.fromisoformat(given)
        except ValueError:
            pass
    if isinstance(given, date) and not isinstance(given, datetime):
        return given
    raise ValueError(f"this is a date, not {shown(given)}; write for example 2026-05-01")


def _parts(given: object, info: ValidationInfo) -> Table:
    # Only the circuit's bill asks for it; a plate is drawn without loading that room.
    from dialgen.dialfile.parts import Parts

    return checked(Parts, given, info.context)


class Head(Table):
    """What the dial is: name and serial for the people who keep it, the others to be printed."""

    name: Text | None = None
    serial: Text | None = None
    title: Lettered | None = None
    maker: Lettered | None = None
    tested: Annotated[date | None, PlainValidator(_date)] = None
    """When the insulation was tested at the voltage that a star claims."""


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
    zone: Annotated[tuple[Zone, ...], BeforeValidator(at_most(_MOST_ZONES))] = ()
    limit: Annotated[tuple[Limit, ...], BeforeValidator(at_most(_MOST_ZONES))] = ()
    parts: Annotated[Any, PlainValidator(_parts)] = None
    """The maker's drawer, a `dialgen.dialfile.parts.Parts`; None where the file has none."""
    symbols: Symbols | None = None
    look: Annotated[Dress, PlainValidator(read_dress)] = Dress()
    text: Annotated[tuple[FreeText, ...], BeforeValidator(at_most(_MOST_TEXTS))] = ()

    @needs("scale", "zone", "limit")
    def _on_a_scale(self) -> Iterator[InputError]:
        laid: dict[str, tuple[Zone | Limit, ...]] = {"zone": self.zone, "limit": self.limit}
        for name, parts in laid.items():
            for i, part in enumerate(parts):
                if part.scale > len(self.scale):
                    yield InputError(
                        f"there is no scale {part.scale}; the file has {len(self.scale)}, counted from 1",
                        (name, i, "scale"),
                    )
                    continue
                yield from (e.under(name, i) for e in part.off(self.scale[part.scale - 1]))
