"""The movement's table: its coil, its pointer's swing, and readings taken on it."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Annotated, Protocol

from pydantic import BeforeValidator, Field, PlainValidator

from dialgen.circuit.terminals import Coil
from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, needs, placed
from dialgen.dialfile.fields import Angle, CurrentA, FaceValue, LengthAbove, ResistanceOhm
from dialgen.dialfile.readings import MOST_READINGS, Reading, readings_file
from dialgen.errors import InputError
from dialgen.geometry import response
from dialgen.quantity import shown
from dialgen.stage import Stage

_LEAST_SWING_DEG = 0.01
_RESPONSES = '"linear", { power = 1.8 } or { points = [[0, 0], [0.4, 0.37], [1, 1]] }'


class HasReadings(Protocol):
    """A table with readings in the dial file or in a CSV."""

    @property
    def reading(self) -> tuple[Reading, ...]:
        """The readings in the dial file."""
        ...

    @property
    def readings(self) -> tuple[Reading, ...]:
        """The readings in the CSV."""
        ...


def readings_once(table: HasReadings) -> Iterator[InputError]:
    """Yield an error where a table has readings both in it and in a CSV."""
    if table.reading and table.readings:
        yield InputError(
            "readings stand in the dial file and in a CSV; keep one of the two", ("readings",), ("reading",)
        )


def _response(given: object) -> Stage:
    if given == "linear":
        return response.EVEN
    if not isinstance(given, dict) or len(given) != 1 or not {"power", "points"} & given.keys():
        raise ValueError(f"this is not a response: {shown(given)}; write {_RESPONSES}")
    if "power" in given:
        return response.Power(_keyed("power", fields.number("a power", 0.05, 20.0), given["power"]))
    read = fields.points(
        fields.number("a drive", -1e3, 1e3), fields.number("a deflection", -1e3, 1e3), "[[0, 0], [1, 1]]"
    )
    try:
        return response.from_points(_keyed("points", read, given["points"]))
    except InputError as error:
        raise error if error.keys else error.under("points") from None


def _keyed(key: str, read: fields.Reader, given: object) -> fields.Value:
    try:
        return read(given)
    except ValueError as error:
        raise placed(error, key) from None


class OldScale(Table):
    """The scale that was on the instrument: evenly divided, or known by points."""

    rest: FaceValue | None = None
    full: FaceValue | None = None
    points: Annotated[
        tuple[tuple[float, float], ...] | None,
        PlainValidator(fields.points(fields.face_value, fields.angle, "[[0, -44], [100, 44]]")),
    ] = None

    @needs("rest", "full", "points")
    def _one_way_to_say_it(self) -> Iterator[InputError]:
        ends = [name for name in ("rest", "full") if getattr(self, name) is not None]
        if self.points is not None and ends:
            yield InputError(
                f"the old scale is known by its points; leave out {' and '.join(ends)}", ("points",)
            )
        elif self.points is None and len(ends) < 2:
            yield InputError("the old scale needs both of its ends; give rest and full, or points instead")
        elif self.points is None and self.rest == self.full:
            yield InputError(
                f"the old scale runs from {self.rest:g} to {self.full:g}, a zero span; give two values",
                ("full",),
            )


class Movement(Table):
    """The movement, as measured on the bench."""

    kind: Annotated[str, PlainValidator(fields.one_of("moving coil", "moving iron", "other"))] = "moving coil"
    """For the dial symbols; a moving iron is left unmarked near zero."""
    current: CurrentA | None = None
    resistance: ResistanceOhm | None = None
    rest: Angle = Field(description="rest = -44.0, the angle of the pointer with no current")
    full: Angle = Field(description="full = 44.0, the angle of the pointer at full deflection")
    stops: Annotated[
        tuple[float, float] | None, PlainValidator(fields.pair(fields.angle, "[-49.0, 49.0]"))
    ] = None
    response: Annotated[Stage, PlainValidator(_response)] = response.EVEN
    pointer: LengthAbove | None = None
    """For the review and the guide layer; no mark depends on it."""
    reading: Annotated[tuple[Reading, ...], BeforeValidator(fields.at_most(MOST_READINGS))] = ()
    readings: Annotated[tuple[Reading, ...], PlainValidator(readings_file(Reading))] = ()
    old: OldScale | None = None

    @needs("rest", "full")
    def _span(self) -> Iterator[InputError]:
        if abs(self.full - self.rest) < _LEAST_SWING_DEG:
            yield InputError(
                f"rest and full are both at {self.full:g} degrees, a zero span; give two angles",
                ("full",),
                ("rest",),
            )

    @needs("stops")
    def _stops(self) -> Iterator[InputError]:
        if self.stops is not None and not self.stops[0] < self.stops[1]:
            low, high = self.stops
            yield InputError(
                f"the stops {low:g} and {high:g} leave no swing; give the lower angle first", ("stops",)
            )

    @needs("stops", "full")
    def _full_between_stops(self) -> Iterator[InputError]:
        # The rest point may lie beyond: a mechanically suppressed zero stands against its stop.
        if self.stops is not None and self.stops[0] < self.stops[1]:
            low, high = self.stops
            if not low <= self.full <= high:
                yield InputError(
                    f"full at {self.full:g} degrees is beyond the stops {low:g} and {high:g}; "
                    "widen the stops or move full",
                    ("stops",),
                    ("full",),
                )

    @needs("reading", "readings")
    def _readings_once(self) -> Iterator[InputError]:
        yield from readings_once(self)

    @property
    def coil(self) -> Coil:
        """The movement as a circuit sees it."""
        return Coil(current=self.current, resistance=self.resistance)

    def all_readings(self) -> tuple[Reading, ...]:
        """Return the readings, wherever they stand."""
        return self.reading or self.readings
