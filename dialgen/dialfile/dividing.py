"""What a scale's table says of its numerals and divisions: a step, pieces with steps, or values."""

from __future__ import annotations

from typing import Annotated

from pydantic import Field, PlainValidator

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, checked, each
from dialgen.dialfile.fields import FaceEnd, FaceValue, Lettered
from dialgen.quantity import shown

_MOST_NUMBERED = 500
_MOST_PIECES = 100


class Every(Table):
    """Numbered values or divisions at every multiple of a step."""

    every: Annotated[float, PlainValidator(fields.positive("a step"))] = Field(description="every = 10")


class Piece(Every):
    """A step that holds up to a value."""

    to: FaceValue = Field(description="to = 10")


class Entry(Table):
    """A numbered value with a label of its own."""

    at: FaceEnd = Field(description="at = 20")
    label: Lettered | None = None


def read_numbered(given: object) -> Every | tuple[Entry, ...] | None:
    """Return which values are numbered; None leaves it to the program."""
    if given == "auto":
        return None
    if isinstance(given, dict):
        return checked(Every, given)
    if not isinstance(given, list):
        choices = '"auto", { every = 10 } or [0, 10, 20]'
        raise ValueError(f"{shown(given)} does not say what to number; write {choices}")
    if len(given) > _MOST_NUMBERED:
        raise ValueError(f"{len(given)} values to number; give at most {_MOST_NUMBERED}")
    return each(given, _entry)


def _entry(given: object) -> Entry:
    return checked(Entry, given) if isinstance(given, dict) else Entry(at=fields.face_end(given))


def read_divisions(given: object) -> Every | tuple[Piece, ...] | None:
    """Return how the scale is divided; None leaves it to the program."""
    if given == "auto":
        return None
    if isinstance(given, dict):
        return checked(Every, given)
    if not isinstance(given, list):
        choices = '"auto", { every = 2 } or [{ to = 10, every = 1 }]'
        raise ValueError(f"{shown(given)} does not say how to divide; write {choices}")
    if not 1 <= len(given) <= _MOST_PIECES:
        raise ValueError(f"{len(given)} pieces of divisions; give 1 to {_MOST_PIECES}")
    return each(given, lambda piece: checked(Piece, piece))
