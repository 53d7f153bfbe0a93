"""The plate's table: its outline, holes and window, and lettering anywhere on it."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Annotated

from pydantic import BeforeValidator, Field, PlainValidator

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, needs
from dialgen.dialfile.fields import Angle, Length, LengthAbove, Lettered, Position
from dialgen.errors import InputError

_MOST_HOLES = 200


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

    @needs("corner", "size")
    def _corner_fits(self) -> Iterator[InputError]:
        yield from _corner_too_large(self.corner, self.size, "window")


class Slot(Table):
    """A slot through the plate, round at both ends: along an arc about the pivot, or straight.

    ``from`` and ``to``, or the ends of ``line``, are the middles of its round ends.
    """

    width: LengthAbove = Field(description="width = 3")
    radius: LengthAbove | None = None
    start: Angle | None = Field(default=None, alias="from")
    end: Angle | None = Field(default=None, alias="to")
    line: Annotated[
        tuple[tuple[float, float], tuple[float, float]] | None,
        PlainValidator(fields.pair(fields.pair(fields.coordinate, "[-30, 40]"), "[[-30, 40], [30, 40]]")),
    ] = None

    @needs("radius", "start", "end", "line")
    def _one_course(self) -> Iterator[InputError]:
        arc = (self.radius, self.start, self.end)
        if self.line is None and None in arc:
            yield InputError(
                "the slot has no course; give radius, from and to for an arc, or line = [[x, y], [x, y]]"
            )
        elif self.line is not None and arc != (None, None, None):
            yield InputError(
                "a slot is an arc or straight, not both; keep line, or radius, from and to", ("line",)
            )
        elif self.start is not None and self.end is not None:
            yield from _ascending(self.start, self.end, "slot")


class Mirror(Table):
    """The window for an anti-parallax mirror: a slot along the first scale, below its marks."""

    width: LengthAbove = 4.0
    radius: LengthAbove | None = None
    """Of its middle; None leaves ``land`` of plate between it and what is printed of the scale."""
    start: Angle | None = Field(default=None, alias="from")
    end: Angle | None = Field(default=None, alias="to")
    """The pointer's angles at its ends, which are the middles of round ones.  None is at the scale's
    end for round ends, which thus pass beyond it, and as far beyond it for square ones."""
    land: Length = 1.5
    ends: Annotated[str, PlainValidator(fields.one_of("round", "square"))] = "round"

    @needs("start", "end")
    def _ascends(self) -> Iterator[InputError]:
        if self.start is not None and self.end is not None:
            yield from _ascending(self.start, self.end, "mirror")


class Plate(Table):
    """The plate's outline, and where the pivot stands in it."""

    pivot: Position = Field(description="pivot = [42, 12], from the plate's lower left corner")
    size: Annotated[
        tuple[float, float] | None, PlainValidator(fields.pair(fields.length_above, "[84, 64]"))
    ] = None
    diameter: LengthAbove | None = None
    corner: Length = 0.0
    hole: Annotated[tuple[Hole, ...], BeforeValidator(fields.at_most(_MOST_HOLES))] = ()
    window: Window | None = None
    slot: Annotated[tuple[Slot, ...], BeforeValidator(fields.at_most(_MOST_HOLES))] = ()
    mirror: Mirror | None = None

    @needs("size", "diameter")
    def _one_outline(self) -> Iterator[InputError]:
        if self.size is None and self.diameter is None:
            yield InputError(
                "the plate has no outline; give size = [84, 64], or diameter = 80 for a round one"
            )
        elif self.size is not None and self.diameter is not None:
            yield InputError(
                "a plate is a rectangle or round, not both; keep either size or diameter",
                ("diameter",),
                ("size",),
            )

    @needs("size", "diameter", "corner")
    def _corner_fits(self) -> Iterator[InputError]:
        if self.size is not None:
            yield from _corner_too_large(self.corner, self.size, "plate")
        elif self.corner and self.diameter is not None:
            yield InputError("a round plate has no corners; leave corner out", ("corner",))


class FreeText(Table):
    """A line of lettering about its middle; without a place it is set where the plate is free."""

    say: Lettered = Field(description='say = "50 mV shunt"')
    at: Position | None = None
    height: LengthAbove = 2.2
    angle: Angle = 0.0


def _ascending(start_deg: float, end_deg: float, what: str) -> Iterator[InputError]:
    if end_deg <= start_deg:
        yield InputError(
            f"a {what} from {start_deg:g} to {end_deg:g} degrees covers nothing; give the lower angle first",
            ("to",),
            ("from",),
        )


def _corner_too_large(corner_mm: float, size_mm: tuple[float, float], what: str) -> Iterator[InputError]:
    most_mm = min(size_mm) / 2
    if corner_mm > most_mm:
        yield InputError(
            f"a corner of {corner_mm:g} mm does not fit the {what}; give at most {most_mm:g}",
            ("corner",),
            ("size",),
        )
