"""The plate's table: its outline, holes and window, and lettering anywhere on it."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Annotated

from pydantic import BeforeValidator, Field, PlainValidator

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, needs
from dialgen.dialfile.fields import Length, LengthAbove, Lettered, Position
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
    """A line of lettering anywhere on the plate, about its middle."""

    say: Lettered = Field(description='say = "50 mV shunt"')
    at: Position = Field(description="at = [0, 8]")
    height: LengthAbove = 2.2


def _corner_too_large(corner_mm: float, size_mm: tuple[float, float], what: str) -> Iterator[InputError]:
    most_mm = min(size_mm) / 2
    if corner_mm > most_mm:
        yield InputError(
            f"a corner of {corner_mm:g} mm does not fit the {what}; give at most {most_mm:g}",
            ("corner",),
            ("size",),
        )
