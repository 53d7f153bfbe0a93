"""The finished face as the checks see it: file, scales, plate and drawing, and what lies where."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import NamedTuple

from dialgen.dialfile.looks import Dress, look_of
from dialgen.dialfile.models import DialFile
from dialgen.drawing import Drawing, Point
from dialgen.errors import Key
from dialgen.face.inked.numerals import figure_mm
from dialgen.face.parts import GROUND, TEXT
from dialgen.face.plate import Outliner
from dialgen.face.review.openings import openings
from dialgen.face.review.rules import apart
from dialgen.face.review.things import OPENING, Sort, Thing, colour_of, printed
from dialgen.face.ruled.ruling import RuledScale
from dialgen.ink import neighbours, strays
from dialgen.looks import Look

ROW_GAP = 0.2
"""Numerals in a row that stand nearer than this share of their height read as one number."""
FIGURE_GAP = 0.8
"""Numerals of two rows that stand side by side read as one nearer than this share of a figure's width."""
OWN_SPACE = 0.8
"""A numeral must not stand nearer to another scale's marks than this share of its space from its own."""
_ALIKE = (TEXT, OPENING)
"""Parts of which each thing is a sort of its own, but which are all alike in what they may meet."""
_EFFORT = 400_000
"""Pairs of edges to compare between two sorts: a dozen numerals on each other, or a line and 500 marks."""


class Pair(NamedTuple):
    """Two things that must stand apart and do not: how far apart they are, and where."""

    one: Thing
    other: Thing
    gap_mm: float
    place: Point

    @property
    def touches(self) -> bool:
        """Whether they touch."""
        return self.gap_mm == 0


class Stray(NamedTuple):
    """A thing that leaves a figure, and where."""

    thing: Thing
    place: Point


@dataclass(frozen=True, eq=False)
class Finished:
    """A face that is drawn, looked over once for all checks."""

    file: DialFile
    scales: tuple[RuledScale, ...]
    plate: Outliner
    drawing: Drawing

    @cached_property
    def things(self) -> tuple[Thing, ...]:
        """Everything printed but the ground, in drawing order."""
        return tuple(printed(self.file, self.scales, self.drawing))

    @cached_property
    def sorts(self) -> tuple[Sort, ...]:
        """The sorts of the things, in drawing order."""
        return tuple(dict.fromkeys(thing.sort for thing in self.things))

    @cached_property
    def pairs(self) -> tuple[Pair, ...]:
        """All things and openings that touch, or all but do, and must not."""
        things = [*self.things, *openings(self.file, self.plate, self.drawing)]
        groups = {
            thing.sort: thing.sort.part if thing.sort.part in _ALIKE else thing.sort for thing in things
        }
        firsts = {group: sort for sort, group in reversed(groups.items())}
        numbers = {group: i for i, group in enumerate(firsts)}
        matrix = [[apart(a, b) for b in firsts.values()] for a in firsts.values()]
        within_mm = max(map(_within_mm, self.scales))
        found = neighbours(
            [thing.shape for thing in things],
            within_mm,
            [numbers[groups[thing.sort]] for thing in things],
            matrix,
            effort=_EFFORT,
        )
        return tuple(Pair(things[i], things[j], gap_mm, place) for i, j, gap_mm, place in found)

    @cached_property
    def over_edge(self) -> tuple[Stray, ...]:
        """The things that leave the plate."""
        return self.leaving(self.things, self.plate)

    def leaving(self, things: tuple[Thing, ...], figure: Outliner) -> tuple[Stray, ...]:
        """Return those of some things that leave a figure, each with a place where it does."""
        found = strays([thing.shape for thing in things], figure.holds)
        return tuple(Stray(things[i], place) for i, place in found)

    @cached_property
    def look(self) -> Look:
        """The look that all scales have in common."""
        return look_of(self.file.look, Dress())

    @cached_property
    def ground(self) -> str:
        """The colour of the plate."""
        laid = [layer.items[0] for layer in self.drawing.layers if layer.name == GROUND]
        return colour_of(laid[0]) if laid else "#ffffff"

    def look_key(self, scale: RuledScale | None, *names: str) -> Key:
        """Return the key of the first of some of the look's values that the file gives, or its table."""
        own = {} if scale is None else scale.spec.look.changes
        for name in names:
            if scale is not None and name in own:
                return (*scale.dial.key, "look", name)
            if name in self.file.look.changes:
                return ("look", name)
        return ("look",) if scale is None or not scale.spec.look.style else (*scale.dial.key, "look")


def _within_mm(scale: RuledScale) -> float:
    """Return how near things come to each other that any check of a scale asks for."""
    rows = FIGURE_GAP * figure_mm(scale) if scale.spec.also else 0.0
    return max(OWN_SPACE * scale.sizes.space_mm, ROW_GAP * scale.sizes.numeral_mm, rows)
