"""Rows of numerals as lines on the plate: where they run, where they end, how far a place is from one."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np

from dialgen.drawing import Letters, Point
from dialgen.face.inked.numerals import ROW_SPACE, reaches, sides, text_in_row
from dialgen.face.lettered.cover import letters_box
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import RuledScale
from dialgen.stage import Array

OFF_LINE = 2.0
"""How much more a millimetre up or down sets a word apart from a numeral than one beside it."""

_SAMPLES = 25
_TINY = 1e-9


class End(NamedTuple):
    """The numeral at an end of a row, as a box about its middle.

    Args:
        at: its middle.
        size: its width and height.
        onward: the unit vector along which the row would go on.
        outer: straight up or down, away from the scale line.
        bare: whether no numeral of the row stands there.
        baseline: the height of its baseline.
    """

    at: Point
    size: tuple[float, float]
    onward: Point
    outer: Point
    bare: bool
    baseline: float

    def clear(self, way: Point, size: tuple[float, float], space_mm: float) -> Point:
        """Return where the middle of a box is just clear of the numeral, some way from it."""
        # Two boxes are clear of each other where they are along either axis.
        reach_mm = space_mm + min(
            (own + other) / 2 / max(abs(part), _TINY)
            for own, other, part in zip(self.size, size, way, strict=True)
        )
        return self.at[0] + reach_mm * way[0], self.at[1] + reach_mm * way[1]


@dataclass(frozen=True, slots=True, eq=False)
class NumeralRow:
    """A row of numerals of a scale.

    Args:
        scale: the scale.
        number: 0 for its own numerals, then the further rows.
        left, right: the row's ends; of an upright row the lower and the upper one.
        course: points along it (2, n).
    """

    scale: RuledScale
    number: int
    left: End
    right: End
    course: Array

    def distance(self, place: Point) -> float:
        """Return how far a place is from the row, what lies off the line of a numeral being farther."""
        x, y = self.course
        return float(np.hypot(x - place[0], OFF_LINE * (y - place[1])).min())


def numeral_rows(scale: RuledScale, words: Sequence[Letters]) -> tuple[NumeralRow, ...]:
    """Return the rows of numerals of a scale, its own first.

    Args:
        scale: the scale.
        words: its numerals as they stand, side by side and row by row.
    """
    first_deg, last_deg = scale.ends_deg.tolist()
    angles = np.linspace(first_deg, last_deg, _SAMPLES)
    line, away = np.array(scale.line.points(angles)), np.array(scale.line.away(angles))
    standing = _by_row(scale, words)
    return tuple(_row(scale, n, line, away, standing.get(n, ())) for n in range(len(scale.rows)))


def _by_row(scale: RuledScale, words: Sequence[Letters]) -> dict[int, Sequence[Letters]]:
    """Return the numerals of each row."""
    found: dict[int, Sequence[Letters]] = {}
    at = 0
    for number in (row for rows in sides(scale).values() for row in rows):
        count = sum(text_in_row(mark, number) is not None for mark in scale.marks)
        found[number] = words[at : at + count]
        at += count
    return found


def _row(scale: RuledScale, number: int, line: Array, away: Array, words: Sequence[Letters]) -> NumeralRow:
    level_mm = _level(scale, number)
    course = line + level_mm * away
    left, right = sorted(_ends(scale, number, course, level_mm * away, words))
    return NumeralRow(scale, number, left, right, course)


def _ends(
    scale: RuledScale, number: int, course: Array, outward: Array, words: Sequence[Letters]
) -> Iterator[End]:
    """Yield both ends of a row: the numerals there as they stand, or where they would."""
    height_mm = scale.sizes.numeral_mm
    for end, inner in ((0, 1), (-1, -2)):
        text = text_in_row(scale.marks[end], number) if scale.marks else None
        (x, y), (back_x, back_y) = course[:, end].tolist(), course[:, inner].tolist()
        step = math.dist((x, y), (back_x, back_y)) or 1.0
        box = letters_box(words[end]) if text and words else None
        left, bottom, right, top = box or (x, y - height_mm / 2, x, y + height_mm / 2)
        yield End(
            at=((left + right) / 2, (bottom + top) / 2),
            size=(right - left, top - bottom),
            onward=((x - back_x) / step, (y - back_y) / step),
            outer=(0.0, math.copysign(1.0, float(outward[1, end]))),
            bare=not text,
            baseline=words[end].glyphs[0].y if box else bottom,
        )


def _level(scale: RuledScale, number: int) -> float:
    """Return how far outside the line the middle of a row of numerals runs; inside is below zero."""
    sizes = scale.sizes
    side, rows = next((side, rows) for side, rows in sides(scale).items() if number in rows)
    inner, outer = reaches(scale.spec.marks, sizes)[Rank.NUMBERED]
    each_mm = sizes.numeral_mm + ROW_SPACE * sizes.stacked_mm
    stands_mm = sizes.space_mm + sizes.numeral_mm / 2 + rows.index(number) * each_mm
    return outer + stands_mm if side == "outside" else inner - stands_mm
