"""What a key may hold: readers of single values, as pydantic fields.

Every reader takes what TOML gave and returns what the program works with, or raises ValueError
with one line: what is wrong; what would be right.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import Annotated, Any

from pydantic import PlainValidator

from dialgen.dialfile.base import each
from dialgen.lettering import measure
from dialgen.quantity import (
    AMPERE,
    ANY_CURRENT,
    OHM_ABOVE,
    SIGNAL,
    VOLT,
    Amount,
    Listed,
    Measure,
    Number,
    read_length,
    read_number,
    shown,
    shown_unit,
)

_MOST_POINTS = 5000
_LONGEST_TEXT = 200
_LARGEST_VALUE = 1e15
_SMALLEST_VALUE = 1e-15
_LEAST_LENGTH_MM = 0.01

Value = Any
"""What a reader gives: of the type that its field says."""

Reader = Callable[[Any], Value]


def number(name: str, least: float, most: float) -> Reader:
    """Return a reader of bare numbers within bounds."""
    return Number(name, least, most).read


def positive(name: str) -> Reader:
    """Return a reader of bare numbers above zero."""

    def read(given: object) -> float:
        value = read_number(given, name)
        if not value >= _SMALLEST_VALUE:
            raise ValueError(f"{name} of {value:g} is not above zero; write a positive number")
        if value > _LARGEST_VALUE:
            raise ValueError(f"{name} of {value:g} is beyond what a face can show; write a smaller number")
        return value

    return read


def angle(given: object) -> float:
    """Return an angle in degrees, within a turn either way."""
    if isinstance(given, str):
        raise ValueError(
            f"an angle is a bare number of degrees, not {shown(given)}; leave out quotes and unit"
        )
    return float(number("an angle", -360.0, 360.0)(given))


def length(given: object) -> float:
    """Return a length in millimetres, 0 to 2000."""
    return read_length(given, "a length")


def length_above(given: object) -> float:
    """Return a length in millimetres that can be seen."""
    value = read_length(given, "a length")
    if value < _LEAST_LENGTH_MM:
        raise ValueError(f"a length of {value:g} mm is nothing to see; write {_LEAST_LENGTH_MM} mm or more")
    return value


def coordinate(given: object) -> float:
    """Return a coordinate in millimetres, which may be negative."""
    return read_length(given, "a coordinate", least=-2000.0)


def face_value(given: object) -> float:
    """Return a finite value on a scale."""
    value = read_number(given, "a value on the scale")
    size = abs(value)
    if size > _LARGEST_VALUE or 0 < size < _SMALLEST_VALUE:
        raise ValueError(
            f"{value:g} is beyond what a face can show; put a prefix such as k or m before the unit instead"
        )
    return value


def face_end(given: object) -> float:
    """Return a value on a scale, or infinity."""
    if isinstance(given, float) and given == math.inf:
        return math.inf
    return face_value(given)


def text(given: object) -> str:
    """Return a line of text."""
    if not isinstance(given, str):
        raise ValueError(f"this is text, not {shown(given)}; write it in quotes")
    if len(given) > _LONGEST_TEXT:
        raise ValueError(f"a text of {len(given)} characters; at most {_LONGEST_TEXT} fit a plate")
    if any(ord(c) < 32 or 0x7F <= ord(c) < 0xA0 for c in given):
        raise ValueError("a line break or control character in a text; write each line as a text of its own")
    return given


def lettered(given: object) -> str:
    """Return a line of text whose every character can be lettered."""
    value = text(given)
    if not value.isascii():
        measure(value, 1.0)
    return value


def unit_text(given: object) -> str:
    """Return a unit that can be lettered, as it is written in the file."""
    value = text(given)
    lettered(shown_unit(value))
    return value


def formula_text(given: object) -> str:
    """Return a formula's text; what it may say is for the formula to check."""
    if not isinstance(given, str):
        raise ValueError(f"a formula is text, not {shown(given)}; write it in quotes")
    return given


def pair(read: Reader, example: str) -> Reader:
    """Return a reader of two values in brackets."""

    def read_pair(given: object) -> tuple[Value, ...]:
        if not isinstance(given, list) or len(given) != 2:
            raise ValueError(
                f"this is a pair of values in brackets, not {shown(given)}; write for example {example}"
            )
        return each(given, read)

    return read_pair


def points(first: Reader, second: Reader, example: str, least: int = 2) -> Reader:
    """Return a reader of a list of pairs."""

    def read_point(given: object) -> tuple[Value, Value]:
        if not isinstance(given, list) or len(given) != 2:
            raise ValueError(f"this is a point, not {shown(given)}; write the points as {example}")
        return first(given[0]), second(given[1])

    def read_points(given: object) -> tuple[tuple[Value, Value], ...]:
        if not isinstance(given, list):
            raise ValueError(f"this is a list of pairs, not {shown(given)}; write for example {example}")
        if not least <= len(given) <= _MOST_POINTS:
            raise ValueError(f"{len(given)} points; give {least} to {_MOST_POINTS}, such as {example}")
        return each(given, read_point)

    return read_points


def list_of(listed: Listed) -> Reader:
    """Return a reader of a list whose every value is read alike, an error at its own place."""

    def read(given: object) -> tuple[Value, ...]:
        if listed.alone and not isinstance(given, list):
            return listed.then((listed.read(given),))
        if not isinstance(given, list):
            raise ValueError(f"this is a list, not {shown(given)}; write for example {listed.example}")
        if not listed.least <= len(given) <= listed.most:
            count = f"{listed.least} to {listed.most}" if listed.most > listed.least else f"{listed.least}"
            raise ValueError(f"{len(given)} of them; give {count}, such as {listed.example}")
        return listed.then(each(given, listed.read))

    return read


def one_of(*words: str) -> Reader:
    """Return a reader of one word of a list."""

    def read(given: object) -> str:
        if not isinstance(given, str) or given not in words:
            if meant := [w for w in words if isinstance(given, str) and w.casefold() == given.casefold()]:
                raise ValueError(f'{shown(given)} is not known here; did you mean "{meant[0]}"?')
            choices = [f'"{word}"' for word in words]
            raise ValueError(f"{shown(given)} is not known here; write {' or '.join(choices)}")
        return given

    return read


def at_most(most: int) -> Reader:
    """Return a check of how long a list of tables is, before any of them is looked at."""

    def check(given: object) -> object:
        if isinstance(given, list) and len(given) > most:
            raise ValueError(f"{len(given)} of them; give at most {most}")
        return given

    return check


def scale_number(given: object) -> int:
    """Return the number of a scale, counted from 1."""
    if isinstance(given, bool) or not isinstance(given, int) or given < 1:
        raise ValueError(f"a scale goes by its number from 1 up, not {shown(given)}; write scale = 1")
    return given


def true_or_false(given: object) -> bool:
    """Return a truth value."""
    if not isinstance(given, bool):
        raise ValueError(f"this is true or false, not {shown(given)}; write it without quotes")
    return given


def signal(given: object) -> float | Amount:
    """Return a table's signal: a bare number, or text with a unit."""
    return SIGNAL.read(given) if isinstance(given, str) else number("a signal", -1e18, 1e18)(given)


def _quantity(measure: Measure) -> Reader:
    return lambda given: measure.read(given).value


Angle = Annotated[float, PlainValidator(angle)]
Length = Annotated[float, PlainValidator(length)]
LengthAbove = Annotated[float, PlainValidator(length_above)]
Position = Annotated[tuple[float, float], PlainValidator(pair(coordinate, "[0, 8]"))]
FaceValue = Annotated[float, PlainValidator(face_value)]
FaceEnd = Annotated[float, PlainValidator(face_end)]
Text = Annotated[str, PlainValidator(text)]
Lettered = Annotated[str, PlainValidator(lettered)]
UnitText = Annotated[str, PlainValidator(unit_text)]
ScaleNumber = Annotated[int, PlainValidator(scale_number)]
YesNo = Annotated[bool, PlainValidator(true_or_false)]
CurrentA = Annotated[float, PlainValidator(_quantity(AMPERE))]
AppliedA = Annotated[float, PlainValidator(_quantity(ANY_CURRENT))]
AppliedV = Annotated[float, PlainValidator(_quantity(VOLT))]
ResistanceOhm = Annotated[float, PlainValidator(_quantity(OHM_ABOVE))]
