"""What is laid over a scale: coloured zones between two values, and limits at one."""

from __future__ import annotations

from collections.abc import Iterator
from typing import Annotated, Protocol

from pydantic import Field, PlainValidator

from dialgen.dialfile import fields
from dialgen.dialfile.base import Table, needs
from dialgen.dialfile.fields import FaceEnd, FaceValue, LengthAbove, ScaleNumber, YesNo
from dialgen.dialfile.looks import colour
from dialgen.errors import InputError

Colour = Annotated[str, PlainValidator(colour)]


class Ranged(Protocol):
    """What a zone lies on: anything with a first and a last value."""

    @property
    def start(self) -> float:
        """The first value."""
        ...

    @property
    def end(self) -> float:
        """The last value."""
        ...


def _off(value: float, scale: Ranged, key: str) -> Iterator[InputError]:
    if scale.start < scale.end and not scale.start <= value <= scale.end:
        yield InputError(
            f"{value:g} is outside the scale, {scale.start:g} to {scale.end:g}; keep it within", (key,)
        )


class Zone(Table):
    """A band between two values of a scale, on its line or beside it."""

    start: FaceValue = Field(alias="from", description="from = 30")
    end: FaceEnd = Field(alias="to", description="to = 40")
    colour: Colour = Field(description='colour = "green"')
    scale: ScaleNumber = 1
    place: Annotated[str | None, PlainValidator(fields.one_of("line", "inside", "outside"))] = None
    """On the line, under the marks; or inside or outside of it.  None is the side free of marks."""
    width: LengthAbove | None = None
    hatch: YesNo = False

    @needs("start", "end")
    def _ascends(self) -> Iterator[InputError]:
        if not self.start < self.end:
            yield InputError(
                f"a zone from {self.start:g} to {self.end:g} covers nothing; give the lower value first",
                ("to",),
                ("from",),
            )

    def off(self, scale: Ranged) -> Iterator[InputError]:
        """Yield what of the zone lies off its scale."""
        yield from _off(self.start, scale, "from")
        yield from _off(self.end, scale, "to")


class Limit(Table):
    """One value of a scale that is not to be passed, or at which something is rated or set."""

    at: FaceValue = Field(description="at = 35")
    scale: ScaleNumber = 1
    shape: Annotated[str, PlainValidator(fields.one_of("line", "triangle"))] = "line"
    colour: Colour | None = None

    def off(self, scale: Ranged) -> Iterator[InputError]:
        """Yield an error where the limit lies off its scale."""
        yield from _off(self.at, scale, "at")
