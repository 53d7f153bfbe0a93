"""A scale's table: what its numerals mean, where its line lies, and how it is divided."""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Annotated, Any

from pydantic import BeforeValidator, Field, PlainValidator, ValidationInfo

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, folder_of, needs
from dialgen.dialfile.dividing import Entry, Every, Piece, read_divisions, read_numbered
from dialgen.dialfile.fields import FaceEnd, FaceValue, LengthAbove, Position, UnitText, YesNo
from dialgen.dialfile.kinds import read_kind
from dialgen.dialfile.looks import Dress, read_dress
from dialgen.dialfile.movement import readings_once
from dialgen.dialfile.readings import MOST_READINGS, Reading, ScaleReading, points_from_file, readings_file
from dialgen.dialfile.rows import CircuitTable, Fiducial, Row, Stretch, read_fiducial
from dialgen.dialfile.zones import Colour
from dialgen.errors import DialFileError, InputError
from dialgen.geometry.kinds import LAWS
from dialgen.geometry.laws import Law
from dialgen.geometry.points import Observed

_LEAST_SPAN = 1e-9
_MOST_ROWS = 6


def _law(given: object, info: ValidationInfo) -> fields.Value:
    if isinstance(given, dict) and given.get("kind") == "table" and "file" in given:
        return _law_from_file(given, info)
    law = read_kind(given, LAWS, "law")
    if isinstance(law, Observed) and len(law.points) < 2:
        raise InputError("an observed law needs its points; give at least two", ("points",))
    return law


def _law_from_file(given: dict[str, Any], info: ValidationInfo) -> fields.Value:
    if "points" in given:
        raise InputError("points stand in the dial file and in a CSV; keep one of the two", ("file",))
    try:
        points, sheet = points_from_file(given["file"], folder_of(info))
    except DialFileError:
        raise
    except ValueError as error:
        raise InputError(str(error), ("file",)) from None
    try:
        return read_kind({**{k: v for k, v in given.items() if k != "file"}, "points": points}, LAWS, "law")
    except InputError as error:
        raise sheet.fault(sheet.heads[0], "", error.message) from None


class Scale(Table):
    """One scale: what its numerals mean, and where its line lies."""

    unit: UnitText = Field(description='unit = "A" (or "" for none)')
    start: FaceValue = Field(alias="from", description="from = 0, the lowest value on the scale")
    end: FaceEnd = Field(alias="to", description="to = 40, the highest value on the scale")
    law: Annotated[Law | Observed, PlainValidator(_law)] = LAWS["linear"]()
    circuit: CircuitTable | None = None
    radius: LengthAbove | None = None
    centre: Position | None = None
    line: Annotated[
        tuple[tuple[float, float], tuple[float, float]] | None,
        PlainValidator(fields.pair(fields.pair(fields.coordinate, "[-30, 40]"), "[[-30, 40], [30, 40]]")),
    ] = None
    square: YesNo = False
    curve: LengthAbove | None = None
    numbered: Annotated[Every | tuple[Entry, ...] | None, PlainValidator(read_numbered)] = None
    divisions: Annotated[Every | tuple[Piece, ...] | None, PlainValidator(read_divisions)] = None
    marks: Annotated[str, PlainValidator(fields.one_of("outward", "inward", "across"))] = "outward"
    numerals: Annotated[str, PlainValidator(fields.one_of("outside", "inside"))] = "outside"
    gap: LengthAbove = 0.8
    accuracy_class: Annotated[float | None, PlainValidator(fields.number("a class", 0.005, 20.0))] = Field(
        default=None, alias="class"
    )
    fiducial: Annotated[Fiducial | None, PlainValidator(read_fiducial)] = None
    """What the class is a percentage of; None is the limit, or the length of a scale that has none."""
    effective: Stretch | None = None
    heavy: Stretch | None = None
    """The part along which the scale line is heavier."""
    also: Annotated[tuple[Row, ...], BeforeValidator(fields.at_most(_MOST_ROWS))] = ()
    sign: Annotated[str, PlainValidator(fields.one_of("minus", "always"))] = "minus"
    ink: Colour | None = None
    look: Annotated[Dress, PlainValidator(read_dress)] = Dress()
    unit_at: Position | None = None
    reading: Annotated[tuple[ScaleReading, ...], BeforeValidator(fields.at_most(MOST_READINGS))] = ()
    readings: Annotated[tuple[Reading, ...], PlainValidator(readings_file(ScaleReading))] = ()

    @needs("start", "end")
    def _span(self) -> Iterator[InputError]:
        start, end = self.start, self.end
        if start == end:
            fault = f"the scale runs from {start:g} to {end:g}, a zero span; give two values"
        elif start > end:
            fault = (
                f"the scale runs from {start:g} down to {end:g}; swap them, and swap the movement's rest and "
                "full instead if the pointer moves to the left"
            )
        elif math.isfinite(end) and end - start < _LEAST_SPAN * max(abs(start), abs(end)):
            fault = f"the scale runs from {start:.12g} to {end:.12g}, all but a zero span; widen it"
        else:
            return
        yield InputError(fault, ("to",), ("from",))

    @needs("radius", "line")
    def _one_line(self) -> Iterator[InputError]:
        if self.radius is None and self.line is None:
            yield InputError(
                "the scale has no line to stand on; give radius = 44.0 for an arc, or line for a straight one"
            )
        elif self.radius is not None and self.line is not None:
            yield InputError(
                "the scale line is an arc or straight, not both; keep either radius or line",
                ("line",),
                ("radius",),
            )

    @needs("line", "radius", "centre", "square", "curve")
    def _fits_line(self) -> Iterator[InputError]:
        if self.line is None and self.radius is not None:
            for name in ("square", "curve"):
                if getattr(self, name):
                    yield InputError(f"{name} is for a straight line; give line, or leave it out", (name,))
        if self.line is not None and self.radius is None and self.centre is not None:
            yield InputError("centre is for an arc; leave it out beside line", ("centre",))

    @needs("start", "end", "numbered")
    def _numbered_within(self) -> Iterator[InputError]:
        seen: set[float] = set()
        for i, entry in enumerate(self.numbered if isinstance(self.numbered, tuple) else ()):
            if self.start < self.end and not self.start <= entry.at <= self.end:
                yield InputError(
                    f"{entry.at:g} is outside the scale, {self.start:g} to {self.end:g}; "
                    "leave it out or widen the scale",
                    ("numbered", i),
                    ("to",),
                )
            if entry.at in seen:
                yield InputError(f"{entry.at:g} is numbered twice; leave one out", ("numbered", i))
            seen.add(entry.at)

    @needs("start", "end", "divisions")
    def _divisions_ascend(self) -> Iterator[InputError]:
        before = self.start
        for i, piece in enumerate(self.divisions if isinstance(self.divisions, tuple) else ()):
            if self.start < self.end and not before < piece.to <= self.end:
                yield InputError(
                    f"a piece up to {piece.to:g} does not follow {before:g} within the scale; "
                    f"let the pieces ascend up to {self.end:g}",
                    ("divisions", i, "to"),
                )
            before = piece.to

    @needs("start", "end", "effective", "heavy")
    def _stretches_within(self) -> Iterator[InputError]:
        for name in ("effective", "heavy"):
            low, high = getattr(self, name) or (self.start, self.end)
            if self.start < self.end and not self.start <= low < high <= self.end:
                yield InputError(
                    f"{low:g} to {high:g} is no part of the scale, {self.start:g} to {self.end:g}; "
                    "give two values of it, the lower first",
                    (name,),
                )

    @needs("fiducial", "accuracy_class")
    def _fiducial_of_a_class(self) -> Iterator[InputError]:
        if self.fiducial is not None and self.accuracy_class is None:
            yield InputError(
                "fiducial says what a class counts from; give class, or leave it out", ("fiducial",)
            )

    @needs("reading", "readings")
    def _readings_once(self) -> Iterator[InputError]:
        yield from readings_once(self)

    def all_readings(self) -> tuple[Reading, ...]:
        """Return the readings taken through this scale's own circuit, wherever they stand."""
        return self.reading or self.readings
