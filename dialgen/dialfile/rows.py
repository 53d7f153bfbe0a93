"""What a scale's table says of further rows of numerals, of its class, and of parts of it."""

from __future__ import annotations

from enum import StrEnum
from typing import Annotated

from pydantic import Field, PlainValidator

from dialgen.circuit.kinds import CIRCUITS
from dialgen.circuit.terminals import Circuit
from dialgen.dialfile import fields
from dialgen.dialfile.base import Table
from dialgen.dialfile.fields import UnitText
from dialgen.dialfile.kinds import read_kind

CircuitTable = Annotated[Circuit, PlainValidator(lambda given: read_kind(given, CIRCUITS, "circuit"))]

Stretch = Annotated[tuple[float, float], PlainValidator(fields.pair(fields.face_value, "[10, 40]"))]
"""Two values of a scale, and all between."""


class Fiducial(StrEnum):
    """What the figure of a class is a percentage of (IEC 60051-1)."""

    LIMIT = "limit"
    LENGTH = "length"
    VALUE = "value"


def read_fiducial(given: object) -> Fiducial:
    """Return the fiducial value that a file names."""
    return Fiducial(fields.one_of(*Fiducial)(given))


class Row(Table):
    """A further row of numerals on the same marks: the values times a factor, for another range."""

    times: Annotated[float, PlainValidator(fields.positive("a factor"))] = Field(description="times = 5")
    unit: UnitText | None = None
    """None is the scale's own."""
    circuit: CircuitTable | None = None
    numerals: Annotated[str | None, PlainValidator(fields.one_of("outside", "inside"))] = None
    """None stacks the row on the one before."""
