"""The dial file's tables as frozen models: which keys there are, and what each may hold.

Checks that concern several keys of one table stand here too; those that need the whole chain
stand with the chain, in `dialgen.dial`.  A field's description is an example of its line.
"""

from __future__ import annotations

import math
from typing import Annotated, Any, Self

from pydantic import Field, PlainValidator, ValidationInfo, model_validator

from dialgen.circuit.kinds import CIRCUITS
from dialgen.circuit.terminals import Circuit
from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, at_item, checked
from dialgen.dialfile.fields import (
    Angle,
    CurrentA,
    FaceEnd,
    FaceValue,
    Length,
    LengthAbove,
    Position,
    ResistanceOhm,
    Text,
    YesNo,
)
from dialgen.dialfile.kinds import read_kind
from dialgen.dialfile.readings import Reading, ScaleReading, readings_file, table_from_file
from dialgen.errors import InputError
from dialgen.geometry import response
from dialgen.geometry.kinds import LAWS
from dialgen.geometry.laws import Law
from dialgen.geometry.points import Observed
from dialgen.stage import Stage


class Head(Table):
    """What the dial is, for the people who keep it."""

    name: Text | None = None
    serial: Text | None = None


class OldScale(Table):
    """The scale that was on the instrument: evenly divided, or known by points."""

    rest: FaceValue | None = None
    full: FaceValue | None = None
    points: Annotated[
        tuple[tuple[float, float], ...] | None,
        PlainValidator(fields.points(fields.face_value, fields.angle, "[[0, -44], [100, 44]]")),
    ] = None

    @model_validator(mode="after")
    def _one_way_to_say_it(self) -> Self:
        ends = (self.rest, self.full)
        if (self.points is None) == (ends == (None, None)) or (self.points is None and None in ends):
            raise InputError("the old scale is rest and full, or points; give one of the two")
        if self.points is None and self.rest == self.full:
            raise InputError(
                f"the old scale runs from {self.rest:g} to {self.full:g}; give two values", ("full",)
            )
        return self


class Movement(Table):
    """The movement, as measured on the bench."""

    kind: Annotated[str, PlainValidator(fields.one_of("moving coil", "moving iron", "other"))] = "moving coil"
    current: CurrentA | None = None
    resistance: ResistanceOhm | None = None
    rest: Angle = Field(description="rest = -44.0")
    full: Angle = Field(description="full = 44.0")
    stops: Annotated[
        tuple[float, float] | None, PlainValidator(fields.pair(fields.angle, "[-49.0, 49.0]"))
    ] = None
    response: Annotated[Stage, PlainValidator(lambda given: _response(given))] = response.EVEN
    pointer: LengthAbove | None = None
    reading: tuple[Reading, ...] = ()
    readings: Annotated[tuple[Reading, ...], PlainValidator(readings_file(Reading))] = ()
    old: OldScale | None = None

    @model_validator(mode="after")
    def _ends(self) -> Self:
        if self.rest == self.full:
            raise InputError(
                f"rest and full are both {self.rest:g}, a zero span; give two angles", ("full",), ("rest",)
            )
        if self.stops is not None:
            _check_stops(self.stops, self.rest, self.full)
        if self.reading and self.readings:
            raise InputError("readings stand in the file and in a CSV; keep one of the two", ("readings",))
        return self

    def all_readings(self) -> tuple[Reading, ...]:
        """Return the readings, wherever they stand."""
        return self.reading or self.readings


class Every(Table):
    """Numbered values or divisions at every multiple of a step."""

    every: Annotated[float, PlainValidator(fields.positive("a step"))] = Field(description="every = 10")


class Piece(Every):
    """A step that holds up to a value."""

    to: FaceValue = Field(description="to = 10")


class Entry(Table):
    """A numbered value with a label of its own."""

    at: FaceEnd = Field(description="at = 20")
    label: Text | None = None


class Scale(Table):
    """One scale: what its numerals mean, and where its line lies."""

    unit: Text = Field(description='unit = "A"')
    start: FaceValue = Field(alias="from", description="from = 0")
    end: FaceEnd = Field(alias="to", description="to = 40")
    law: Annotated[Law | Observed, PlainValidator(lambda given, info: _law(given, info))] = LAWS["linear"]()
    circuit: Annotated[
        Circuit | None, PlainValidator(lambda given: read_kind(given, CIRCUITS, "circuit"))
    ] = None
    radius: LengthAbove | None = None
    centre: Position | None = None
    line: Annotated[
        tuple[tuple[float, float], tuple[float, float]] | None,
        PlainValidator(fields.pair(fields.pair(fields.coordinate, "[-30, 40]"), "[[-30, 40], [30, 40]]")),
    ] = None
    square: YesNo = False
    curve: LengthAbove | None = None
    numbered: Annotated[Every | tuple[Entry, ...] | None, PlainValidator(lambda given: _numbered(given))] = (
        None
    )
    divisions: Annotated[
        Every | tuple[Piece, ...] | None, PlainValidator(lambda given: _divisions(given))
    ] = None
    marks: Annotated[str, PlainValidator(fields.one_of("outward", "inward", "across"))] = "outward"
    numerals: Annotated[str, PlainValidator(fields.one_of("outside", "inside"))] = "outside"
    gap: LengthAbove = 0.8
    reading: tuple[ScaleReading, ...] = ()
    readings: Annotated[tuple[Reading, ...], PlainValidator(readings_file(ScaleReading))] = ()

    @model_validator(mode="after")
    def _span_and_line(self) -> Self:
        _check_span(self.start, self.end)
        if (self.radius is None) == (self.line is None):
            raise InputError(
                "a scale line is an arc or straight; give either radius or line", ("radius",), ("line",)
            )
        if self.line is None and (self.square or self.curve is not None):
            raise InputError(
                "square and curve go with a straight line; give line, or leave them out",
                ("square",) if self.square else ("curve",),
            )
        if self.line is not None and self.centre is not None:
            raise InputError("centre goes with radius; leave it out beside line", ("centre",))
        if self.reading and self.readings:
            raise InputError("readings stand in the file and in a CSV; keep one of the two", ("readings",))
        return self

    def all_readings(self) -> tuple[Reading, ...]:
        """Return the readings taken through this scale's own circuit, wherever they stand."""
        return self.reading or self.readings


class Hole(Table):
    """A hole through the plate."""

    at: Position = Field(description="at = [-32, -4]")
    diameter: LengthAbove = Field(description="diameter = 3.2")


class Window(Table):
    """What the case leaves visible of the plate, about its own middle."""

    at: Position = Field(description="at = [0, 20]")
    size: Annotated[tuple[float, float], PlainValidator(fields.pair(fields.length_above, "[70, 40]"))] = (
        Field(description="size = [70, 40]")
    )
    corner: Length = 0.0

    @model_validator(mode="after")
    def _corner_fits(self) -> Self:
        _check_corner(self.corner, self.size, "window")
        return self


class Plate(Table):
    """The plate's outline, and where the pivot stands in it."""

    pivot: Position = Field(description="pivot = [42, 12]")
    size: Annotated[
        tuple[float, float] | None, PlainValidator(fields.pair(fields.length_above, "[84, 64]"))
    ] = None
    diameter: LengthAbove | None = None
    corner: Length = 0.0
    hole: tuple[Hole, ...] = Field(default=(), max_length=200)
    window: Window | None = None

    @model_validator(mode="after")
    def _one_outline(self) -> Self:
        if (self.size is None) == (self.diameter is None):
            raise InputError(
                "a plate is a rectangle or round; give either size = [84, 64] or diameter = 80",
                ("size",),
                ("diameter",),
            )
        if self.corner and self.size is None:
            raise InputError("corner goes with size; leave it out of a round plate", ("corner",))
        if self.size is not None:
            _check_corner(self.corner, self.size, "plate")
        return self


class FreeText(Table):
    """A line of lettering anywhere on the plate, about its middle."""

    say: Text = Field(description='say = "50 mV shunt"')
    at: Position = Field(description="at = [0, 8]")
    height: LengthAbove = 2.2


class DialFile(Table):
    """A whole dial file."""

    dialgen: Annotated[int, PlainValidator(lambda given: _version(given))] = Field(description="dialgen = 1")
    dial: Head = Head()
    movement: Movement = Field(description="[movement]")
    circuit: Annotated[
        Circuit | None, PlainValidator(lambda given: read_kind(given, CIRCUITS, "circuit"))
    ] = None
    scale: tuple[Scale, ...] = Field(min_length=1, max_length=20, description="[[scale]]")
    plate: Plate = Field(description="[plate]")
    text: tuple[FreeText, ...] = Field(default=(), max_length=200)


def _version(given: object) -> int:
    if given is True or given != 1 or isinstance(given, float):
        raise ValueError(f"version {str(given)[:20]} of the dial file is not known; write dialgen = 1")
    return 1


def _check_corner(corner_mm: float, size_mm: tuple[float, float], what: str) -> None:
    most = min(size_mm) / 2
    if corner_mm > most:
        raise InputError(
            f"a corner of {corner_mm:g} mm does not fit the {what}; at most {most:g}", ("corner",)
        )


def _check_stops(stops: tuple[float, float], rest: float, full: float) -> None:
    low, high = stops
    if not low < high:
        raise InputError(
            f"the stops {low:g} and {high:g} leave no swing; give the lower angle first", ("stops",)
        )
    for name, at in (("rest", rest), ("full", full)):
        if not low <= at <= high:
            raise InputError(
                f"{name} at {at:g} degrees is beyond the stops {low:g} and {high:g}; widen the stops or move {name}",
                ("stops",),
                (name,),
            )


def _check_span(start: float, end: float) -> None:
    if not start < end:
        raise InputError(
            f"the scale runs from {start:g} to {end:g}; from must be below to "
            "(for a meter that reads right to left swap rest and full)",
            ("to",),
            ("from",),
        )
    if math.isfinite(end) and end - start < 1e-9 * max(abs(start), abs(end)):
        raise InputError(
            f"the scale runs from {start:.12g} to {end:.12g}, all but a zero span; widen it",
            ("to",),
            ("from",),
        )


def _response(given: object) -> Stage:
    example = 'write "linear", { power = 1.8 } or { points = [[0, 0], [0.4, 0.37], [1, 1]] }'
    if given == "linear":
        return response.EVEN
    if not isinstance(given, dict) or len(given) != 1 or not {"power", "points"} & given.keys():
        raise ValueError(f"this is not a response; {example}")
    if "power" in given:
        return response.Power(_keyed("power", fields.positive("a power"), given["power"]))
    read = fields.points(
        fields.number("a drive", -1e3, 1e3), fields.number("a deflection", -1e3, 1e3), "[[0, 0], [1, 1]]"
    )
    try:
        return response.from_points(_keyed("points", read, given["points"]))
    except InputError as error:
        raise error if error.keys else error.under("points") from None


def _keyed(key: str, read: fields.Reader, given: object) -> Any:
    try:
        return read(given)
    except InputError:
        raise
    except ValueError as error:
        raise InputError(str(error), (key,)) from None


def _law(given: object, info: ValidationInfo) -> Any:
    if isinstance(given, dict) and given.get("kind") == "table" and "file" in given:
        given = table_from_file(given, info.context["folder"])
    law = read_kind(given, LAWS, "law")
    if isinstance(law, Observed) and len(law.points) < 2:
        raise InputError("an observed law needs its points; give at least two", ("points",))
    return law


def _numbered(given: object) -> Every | tuple[Entry, ...] | None:
    if given == "auto":
        return None
    if isinstance(given, dict):
        return checked(Every, given)
    if isinstance(given, list) and len(given) <= 500:
        return tuple(_entry(i, item) for i, item in enumerate(given))
    raise ValueError(
        'numbered is "auto", { every = 10 } or a list of values such as [0, 10, 20]; write one of them'
    )


def _entry(index: int, given: object) -> Entry:
    if isinstance(given, dict):
        return checked(Entry, given, index)
    try:
        return Entry(at=fields.face_end(given))
    except ValueError as error:
        raise at_item(index, error) from None


def _divisions(given: object) -> Every | tuple[Piece, ...] | None:
    if given == "auto":
        return None
    if isinstance(given, dict):
        return checked(Every, given)
    if isinstance(given, list) and len(given) <= 100:
        return tuple(checked(Piece, item, i) for i, item in enumerate(given))
    raise ValueError('divisions is "auto", { every = 2 } or [{ to = 10, every = 1 }, ...]; write one of them')
