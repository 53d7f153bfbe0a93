"""Where numerals stand: everywhere equally clear of the ends of their marks, whatever they say.

The clear space is that between the ink itself of the numeral, not a box around it, and the end of its
mark.  A further row stands clear of the one before: above or below that, or a figure's width beside it,
so that the two are never read as one number.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import NamedTuple

import numpy as np

from dialgen.drawing import Letters, Placed, Point, Style
from dialgen.face.inked.clearance import (
    Row,
    clear_as_numbers,
    clear_of_ends,
    clear_of_ink,
    clear_of_others,
    slides,
)
from dialgen.face.plate import Outliner
from dialgen.face.ruled.divisions import Rank
from dialgen.face.ruled.ruling import Mark, RuledScale
from dialgen.face.ruled.sizes import Sizes
from dialgen.geometry.lines import StraightLine
from dialgen.lettering import Fit, ink_points, letters, measure
from dialgen.looks import Turn
from dialgen.stage import Array

_OTHERS = 0.6
_RIGHTWARD = 0.3
ROW_SPACE = 0.8
"""The clear space between rows of numerals, as a share of that between a mark and its numeral."""


class Numeral(NamedTuple):
    """A numeral as it stands: the mark it is for, the row it belongs to, its letters."""

    mark: Mark
    row: int
    letters: Letters


class _Stem(NamedTuple):
    """The end of a mark, and the unit vector that a numeral stands off along."""

    end: Point
    away: Point


def reaches(side: str, sizes: Sizes) -> dict[Rank, tuple[float, float]]:
    """Return how far marks of each rank reach from their point on the line, inwards (minus) and out."""
    shares = {"outward": (0.0, 1.0), "inward": (-1.0, 0.0), "across": (-0.5, 0.5)}[side]
    return {rank: (shares[0] * sizes.length_mm(rank), shares[1] * sizes.length_mm(rank)) for rank in Rank}


def mark_lines(scale: RuledScale) -> Iterator[tuple[Mark, Point, Point]]:
    """Yield every mark with its inner and its outer end."""
    ranks = reaches(scale.spec.marks, scale.sizes)
    stretches = scale.line.stretch(np.array([mark.angle_deg for mark in scale.marks])).tolist()
    for mark, stretch in zip(scale.marks, stretches, strict=True):
        inner, outer = ranks[mark.rank]
        ux, uy = mark.direction[0] * stretch, mark.direction[1] * stretch
        yield mark, (mark.x + inner * ux, mark.y + inner * uy), (mark.x + outer * ux, mark.y + outer * uy)


def numerals(scale: RuledScale, plate: Outliner) -> tuple[Numeral, ...]:
    """Return the numerals of all rows, those of the scale itself first."""
    return tuple(
        numeral
        for side, rows in sides(scale).items()
        for numeral in _beside(scale, side == "outside", rows, plate)
    )


def sides(scale: RuledScale) -> dict[str, list[int]]:
    """Return which rows stand on each side of the line, from the line outwards."""
    found: dict[str, list[int]] = {}
    side = scale.spec.numerals
    for row, said in enumerate([side, *(further.numerals for further in scale.spec.also)]):
        side = said or side
        found.setdefault(side, []).append(row)
    return found


def _beside(scale: RuledScale, outside: bool, rows: list[int], plate: Outliner) -> Iterator[Numeral]:
    """Yield the numerals on one side, row by row."""
    stems, tips = _stems(scale, outside)
    before: dict[Mark, Array] = {}
    for number in rows:
        said = [(mark, stem, text) for mark, stem in stems if (text := text_in_row(mark, number))]
        if not said:
            continue
        marks = [mark for mark, _, _ in said]
        words = [_set(scale, mark, text) for mark, _, text in said]
        row = _row([ink_points(word) for word in words], [stem for _, stem, _ in said])
        reaches_mm = _reaches(scale, words, row, tips, [before.get(mark) for mark in marks])
        shifts = row.ends + reaches_mm[:, None] * row.aways
        shifts = shifts + slides(plate, row, shifts, tips, _OTHERS * scale.sizes.space_mm + _pen_mm(words[0]))
        before.update(zip(marks, row.ink(shifts), strict=True))
        for mark, word, (dx, dy) in zip(marks, words, shifts.tolist(), strict=True):
            yield Numeral(mark, number, moved(word, dx, dy))


def _row(edges: list[Array], stems: list[_Stem]) -> Row:
    starts = np.cumsum([0, *map(len, edges[:-1])])
    return Row(
        np.concatenate(edges),
        starts,
        np.array([stem.end for stem in stems]),
        np.array([stem.away for stem in stems]),
    )


def _reaches(
    scale: RuledScale, words: list[Letters], row: Row, tips: Array, before: list[Array | None]
) -> Array:
    """Return how far from its mark's end the middle of each numeral lies.

    Args:
        scale: the scale.
        words: the numerals.
        row: their ink.
        tips: the ends of all marks, (n, 2), mm.
        before: the ink of the row before at each mark, None where there is none.
    """
    sizes = scale.sizes
    pen_mm = _pen_mm(words[0])
    reaches_mm = clear_of_ends(row, sizes.numbered_width_mm / 2, sizes.space_mm + pen_mm)
    reaches_mm = clear_of_others(row, reaches_mm, tips, _OTHERS * sizes.space_mm + pen_mm)
    space_mm, owners = ROW_SPACE * sizes.space_mm + 2 * pen_mm, row.owners
    for i, ink in enumerate(before):
        if ink is not None:
            points, obstacles = row.points[owners == i], ink - row.ends[i]
            away = (float(row.aways[i, 0]), float(row.aways[i, 1]))
            clear_mm = clear_of_ink(points, obstacles, away, space_mm)
            turn_deg, apart_mm = words[i].glyphs[0].angle_deg, (figure_mm(scale) + 2 * pen_mm, 2 * pen_mm)
            reaches_mm[i] = max(clear_mm, clear_as_numbers(points, obstacles, away, turn_deg, apart_mm))
    if isinstance(scale.line, StraightLine) or scale.look.turn is Turn.ACROSS:
        # Numerals in a row share a baseline.
        reaches_mm[:] = reaches_mm.max()
    return reaches_mm


def figure_mm(scale: RuledScale) -> float:
    """Return the width of a figure of a scale's numerals: the least space between two side by side."""
    return measure("0", scale.sizes.numeral_mm, hand=scale.hand).width_mm


def _pen_mm(word: Letters) -> float:
    return word.style.width_mm / 2 if word.style.stroke else 0.0


def text_in_row(mark: Mark, row: int) -> str | None:
    """Return what a mark says in a row of numerals; row 0 is the scale's own."""
    if row == 0:
        return mark.label
    return mark.further[row - 1] if mark.further else None


def _stems(scale: RuledScale, outside: bool) -> tuple[list[tuple[Mark, _Stem]], Array]:
    """Return the numbered marks, each with its end on one side of the line, and the ends of all, (n, 2)."""
    sign = 1.0 if outside else -1.0
    xs, ys = scale.line.away(np.array([mark.angle_deg for mark in scale.marks]))
    aways = zip((sign * xs).tolist(), (sign * ys).tolist(), strict=True)
    ends = [(mark, outer if outside else inner) for mark, inner, outer in mark_lines(scale)]
    stems = [
        (mark, _Stem(end, away))
        for (mark, end), away in zip(ends, aways, strict=True)
        if mark.label or mark.further
    ]
    return stems, np.array([end for _, end in ends])


def _set(scale: RuledScale, mark: Mark, text: str) -> Letters:
    """Return a numeral about the origin, turned as the look says, its sign hung beside the digits."""
    height_mm, hand = scale.sizes.numeral_mm, scale.hand
    turn_deg = _turn_deg(scale.look.turn, mark.direction)
    middle = 0.5
    if scale.look.turn is not Turn.ALONG and len(text) > 1 and _hangs(text[0], mark.direction):
        box, digits = (measure(part, height_mm, hand=hand) for part in (text, text[1:]))
        digits_mm = box.width_mm - digits.width_mm + (digits.left + digits.right) / 2
        middle = (digits_mm - box.left) / (box.right - box.left)
    return letters(
        text,
        height_mm,
        (0.0, 0.0),
        Style(fill=scale.ink),
        anchor=(middle, 0.5),
        angle_deg=turn_deg,
        fit=Fit.LINE,
        hand=hand,
    )


def _hangs(sign: str, direction: Point) -> bool:
    """Return whether a sign hangs beside the digits: a plus not where it would hang over the scale."""
    return sign == "−" or (sign == "+" and direction[0] < _RIGHTWARD)


def _turn_deg(turn: Turn, direction: Point) -> float:
    """Return how far a numeral is turned clockwise, so that it is never read upside down."""
    pointer_deg = math.degrees(math.atan2(direction[0], direction[1]))
    match turn:
        case Turn.UPRIGHT:
            return 0.0
        case Turn.ACROSS:
            return pointer_deg if abs(pointer_deg) <= 100 else pointer_deg - math.copysign(180, pointer_deg)
        case Turn.ALONG:
            return pointer_deg - 90 if pointer_deg >= 0 else pointer_deg + 90


def moved(word: Letters, dx: float, dy: float) -> Letters:
    """Return letters moved by (dx, dy) millimetres."""
    return Letters(
        word.text,
        tuple([Placed(p.glyph, p.x + dx, p.y + dy, p.size_mm, p.angle_deg) for p in word.glyphs]),
        word.style,
    )
