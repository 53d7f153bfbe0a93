"""What a schematic is made of, before any ink: wires, joints, terminals, signs and words.

All in millimetres, y up.  Pieces say what is joined to what: a wire joins all its points, a joint
joins whatever passes through it, and wires that merely cross are not joined.  So the tests can read
the circuit back out of its picture and work it by Kirchhoff's laws.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

from dialgen.drawing import Point
from dialgen.lettering import measure

LETTER_MM = 2.5
LINE_PITCH_MM = 3.9
"""From baseline to baseline of lettering."""

GAP_MM = 1.5
"""Between ink and the lettering that belongs to it."""

TERMINAL_MM = 1.0
"""Radius of a terminal's circle."""


class Kind(StrEnum):
    """The signs that a circuit is drawn with."""

    RESISTOR = "resistor"
    ADJUSTABLE = "adjustable resistor"
    SENSOR = "sensor"
    DIODE = "diode"
    ZENER = "zener diode"
    CELL = "cell"
    MOVEMENT = "movement"
    WINDING = "winding"
    EARTH = "earth"


@dataclass(frozen=True, slots=True)
class Extent:
    """How long a sign is between its two ends, and how far it reaches to either side, in mm."""

    length_mm: float
    half_mm: float


EXTENTS = {
    Kind.RESISTOR: Extent(10.5, 2.0),
    Kind.ADJUSTABLE: Extent(10.5, 4.4),
    Kind.SENSOR: Extent(10.5, 3.4),
    Kind.DIODE: Extent(3.5, 2.8),
    Kind.ZENER: Extent(3.5, 3.6),
    Kind.CELL: Extent(1.7, 3.6),
    Kind.MOVEMENT: Extent(10.0, 5.3),
    Kind.WINDING: Extent(14.0, 2.0),
    Kind.EARTH: Extent(0.0, 2.3),
}


@dataclass(frozen=True, slots=True)
class Wire:
    """A wire from point to point; ``heavy`` carries the whole of a large current."""

    points: tuple[Point, ...]
    heavy: bool = False


@dataclass(frozen=True, slots=True)
class Joint:
    """A dot where more than two wires meet."""

    at: Point


@dataclass(frozen=True, slots=True)
class Terminal:
    """A circle to connect to, with what is written beside it; wires end at its rim."""

    at: Point
    name: str = ""


@dataclass(frozen=True, slots=True)
class Sign:
    """A sign between two points, which are as far apart as it is long.

    Args:
        kind: which sign.
        start: its first end: a diode's anode, a cell's plus.
        end: its other end.
        part: the resistance it stands for, as the design names it; "" for none.
    """

    kind: Kind
    start: Point
    end: Point
    part: str = ""


@dataclass(frozen=True, slots=True)
class Words:
    """A line of lettering; ``anchor`` as in `dialgen.lettering.letters`, from baseline to capital height."""

    text: str
    at: Point
    anchor: Point = (0.5, 0.0)
    height_mm: float = LETTER_MM


@dataclass(frozen=True, slots=True)
class Bar:
    """A line that is no wire: a bracket, a core, a switch's arm."""

    points: tuple[Point, ...]
    width_mm: float = 0.25
    arrow: bool = False


Piece = Wire | Joint | Terminal | Sign | Words | Bar
Pieces = tuple[Piece, ...]


@dataclass(frozen=True, slots=True)
class Label:
    """What stands beside a part: its name, then its value in one line or more."""

    name: str
    values: tuple[str, ...] = ()

    @property
    def lines(self) -> tuple[str, ...]:
        """All lines that have anything in them, from above."""
        return tuple(line for line in (self.name, *self.values) if line)

    @property
    def width_mm(self) -> float:
        """The width of the longest line."""
        return max((width_mm(line) for line in self.lines), default=0.0)

    @property
    def height_mm(self) -> float:
        """From the foot of the last line to the head of the first."""
        return height_mm(len(self.lines))


@dataclass(frozen=True, slots=True)
class Item:
    """A sign with its label, not placed yet.

    Args:
        kind: which sign.
        label: what stands beside it.
        part: the resistance it stands for; "" for none.
        turned: whether its end comes first, from the left or from above.
        plus: whether its start is marked with a plus.
    """

    kind: Kind
    label: Label = Label("")
    part: str = ""
    turned: bool = False
    plus: bool = False

    @property
    def extent(self) -> Extent:
        """Its size."""
        return EXTENTS[self.kind]


def width_mm(text: str, letter_mm: float = LETTER_MM) -> float:
    """Return the width of a line of lettering."""
    extent = measure(text, letter_mm)
    return extent.right - extent.left


def height_mm(lines: int) -> float:
    """Return the height of so many lines."""
    return LETTER_MM + (lines - 1) * LINE_PITCH_MM if lines else 0.0


def stack(lines: tuple[str, ...], at: Point, anchor: Point) -> Pieces:
    """Return lines one below the other.

    Args:
        lines: from above.
        at: where the anchor falls.
        anchor: of the box about all lines, as fractions of its width and height; 0 sets the lines
            flush left, 1 flush right, 0.5 centred.
    """
    foot = at[1] - anchor[1] * height_mm(len(lines))
    return tuple(
        Words(line, (at[0], foot + (len(lines) - 1 - i) * LINE_PITCH_MM), (anchor[0], 0.0))
        for i, line in enumerate(lines)
    )
