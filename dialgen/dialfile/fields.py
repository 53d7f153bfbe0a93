"""What a key may hold: readers of single values, as pydantic fields.

Every reader takes what TOML gave and returns what the program works with, or raises ValueError
with one line: what is wrong; what would be right.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import Annotated, Any

from pydantic import PlainValidator

from dialgen.circuit.direct import FACE_VALUE
from dialgen.circuit.shunt import RATED, read_rating
from dialgen.geometry.points import FACE_POINTS, SIGNAL_POINTS
from dialgen.quantity import (
    AMPERE,
    ANY_CURRENT,
    OHM_ABOVE,
    SIGNAL,
    VOLT,
    Amount,
    Measure,
    read_length,
    read_number,
)

_MOST_POINTS = 2000
_LONGEST_TEXT = 200
_LARGEST_VALUE = 1e15
_SMALLEST_VALUE = 1e-15

Reader = Callable[[Any], Any]


def number(name: str, least: float = -math.inf, most: float = math.inf) -> Reader:
    """Return a reader of bare numbers within bounds."""

    def read(given: object) -> float:
        value = read_number(given, name)
        if not least <= value <= most:
            raise ValueError(
                f"{name} of {value:g} is not within {least:g} and {most:g}; {_mend(least, most)}"
            )
        return value

    return read


def positive(name: str) -> Reader:
    """Return a reader of bare numbers above zero."""

    def read(given: object) -> float:
        value = read_number(given, name)
        if not value > 0:
            raise ValueError(f"{name} of {value:g} is not above zero; write a positive number")
        return value

    return read


def angle(given: object) -> float:
    """Return an angle in degrees, within a turn either way."""
    if isinstance(given, str):
        raise ValueError(
            f"an angle is a bare number of degrees, not {given[:40]!r}; leave out quotes and unit"
        )
    return number("an angle", -360.0, 360.0)(given)


def length(given: object) -> float:
    """Return a length in millimetres, 0 to 2000."""
    return read_length(given, "a length")


def length_above(given: object) -> float:
    """Return a length in millimetres, above 0."""
    value = read_length(given, "a length")
    if value <= 0:
        raise ValueError(f"a length of {value:g} mm is nothing; write millimetres above 0")
    return value


def coordinate(given: object) -> float:
    """Return a coordinate in millimetres, which may be negative."""
    return read_length(given, "a coordinate", least=-2000.0)


def face_value(given: object) -> float:
    """Return a finite value on a scale."""
    value = read_number(given, "a value on the scale")
    size = abs(value)
    if size > _LARGEST_VALUE or 0 < size < _SMALLEST_VALUE:
        raise ValueError(f"{value:g} is beyond what a face can show; put a prefix before the unit")
    return value


def face_end(given: object) -> float:
    """Return a value on a scale, or infinity."""
    if isinstance(given, float) and given == math.inf:
        return math.inf
    return face_value(given)


def text(given: object) -> str:
    """Return a line of text."""
    if not isinstance(given, str):
        raise ValueError(f"this is text, not {_short(given)}; write it in quotes")
    if len(given) > _LONGEST_TEXT:
        raise ValueError(f"a text of {len(given)} characters; at most {_LONGEST_TEXT} fit a plate")
    if any(ord(c) < 32 or 0x7F <= ord(c) < 0xA0 for c in given):
        raise ValueError("a line break or control character in a text; write each line as a text of its own")
    return given


def formula_text(given: object) -> str:
    """Return a formula's text; what it may say is for the formula to check."""
    if not isinstance(given, str):
        raise ValueError(f"a formula is text, not {_short(given)}; write it in quotes")
    return given


def pair(read: Reader, example: str) -> Reader:
    """Return a reader of two values in brackets."""

    def read_pair(given: object) -> tuple[Any, Any]:
        if not isinstance(given, list) or len(given) != 2:
            raise ValueError(
                f"this is a pair such as {example}, not {_short(given)}; write two values in brackets"
            )
        return read(given[0]), read(given[1])

    return read_pair


def points(first: Reader, second: Reader, example: str, least: int = 2) -> Reader:
    """Return a reader of a list of pairs."""

    def read_points(given: object) -> tuple[tuple[Any, Any], ...]:
        if not isinstance(given, list):
            raise ValueError(f"this is a list of pairs such as {example}, not {_short(given)}; write it so")
        if not least <= len(given) <= _MOST_POINTS:
            raise ValueError(f"{len(given)} points; give {least} to {_MOST_POINTS}, such as {example}")
        return tuple(_read_point(i, p, first, second, example) for i, p in enumerate(given, 1))

    return read_points


def _read_point(at: int, given: object, first: Reader, second: Reader, example: str) -> tuple[Any, Any]:
    if not isinstance(given, list) or len(given) != 2:
        raise ValueError(f"point {at} is {_short(given)}, not a pair; write the points as {example}")
    try:
        return first(given[0]), second(given[1])
    except ValueError as error:
        raise ValueError(f"point {at}: {error}") from None


def one_of(*words: str) -> Reader:
    """Return a reader of one word of a list."""

    def read(given: object) -> str:
        if not isinstance(given, str) or given not in words:
            choices = ", ".join(f'"{w}"' for w in words)
            raise ValueError(f"{_short(given)} is not known here; write one of {choices}")
        return given

    return read


def true_or_false(given: object) -> bool:
    """Return a truth value."""
    if not isinstance(given, bool):
        raise ValueError(f"this is true or false, not {_short(given)}; write it without quotes")
    return given


def signal(given: object) -> float | Amount:
    """Return a table's signal: a bare number, or text with a unit."""
    return SIGNAL.read(given) if isinstance(given, str) else read_number(given, "a signal")


NOTES: dict[str, Reader] = {
    FACE_VALUE: face_value,
    RATED: read_rating,
    SIGNAL_POINTS: points(face_value, signal, '[[0, "0 mV"], [100, "12 mV"]]'),
    FACE_POINTS: points(face_end, number("a position"), "[[0, -44], [10, -20.5]]"),
}
"""Readers for the notes that laws and circuits put on their fields; a `Measure` reads itself."""


def reader_for(note: object) -> Reader:
    """Return the reader for the note on a law's or circuit's field."""
    if isinstance(note, Measure):
        return note.read
    return NOTES[str(note)]


def _mend(least: float, most: float) -> str:
    return (
        f"write a number from {least:g} to {most:g}" if math.isfinite(most) else f"write at least {least:g}"
    )


def _short(given: object) -> str:
    shown = repr(given)
    return shown if len(shown) <= 40 else shown[:37] + "..."


def _quantity(measure: Measure) -> Reader:
    return lambda given: measure.read(given).value


Angle = Annotated[float, PlainValidator(angle)]
Length = Annotated[float, PlainValidator(length)]
LengthAbove = Annotated[float, PlainValidator(length_above)]
Position = Annotated[tuple[float, float], PlainValidator(pair(coordinate, "[0, 8]"))]
FaceValue = Annotated[float, PlainValidator(face_value)]
FaceEnd = Annotated[float, PlainValidator(face_end)]
Text = Annotated[str, PlainValidator(text)]
YesNo = Annotated[bool, PlainValidator(true_or_false)]
CurrentA = Annotated[float, PlainValidator(_quantity(AMPERE))]
AppliedA = Annotated[float, PlainValidator(_quantity(ANY_CURRENT))]
AppliedV = Annotated[float, PlainValidator(_quantity(VOLT))]
ResistanceOhm = Annotated[float, PlainValidator(_quantity(OHM_ABOVE))]
