"""Letters as an engraver draws them, on a grid: our own signs, the stroke font's letters, accents.

Letters are those of hershey-fonts (MIT), the set named futural, which is the plainest of it: no
serifs, and no line doubled but in signs that are drawn anew in ``signs``.  They come as short
straight pieces on a grid of whole numbers; wherever the pieces turn a little they are rounded here
into one curve, and they are narrowed, which costs a stroke no weight.  The other Greek letters are
those of its set greeks.
"""

from __future__ import annotations

import math
import unicodedata
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache
from typing import Any

from dialgen.drawing import PathStep, Point
from dialgen.lettering.paths import Steps, ink_box, moved
from dialgen.lettering.signs import BELOW, CLEAR, DOT, MARKS, SIGNS, steps

_NARROWED = 0.85
_GENTLE_DEG = 62.0  # up to here a turn is part of a curve, above it is a corner
_STRAIGHT = 7.0  # a turn between two pieces longer than this is a corner too: the fork of a Y
_SAME = 1e-9
_LIFT = 3.2  # from the top of a letter to the foot of its accent

_GREEK = "ΑΒΓΔΕΖΗΘΙΚΛΜΝΞΟΠΡΣΤΥΦΧΨΩ"
_IN_PLACE_OF = "ABCDEFGHIJKLMNOPQRSTUVWX"


@dataclass(frozen=True, slots=True)
class Drawn:
    """A sign's strokes on the grid, and the width it takes there."""

    width: float
    path: Steps


@cache
def drawn(character: str) -> Drawn | None:
    """Return a character as it is drawn, None where there are no strokes for it."""
    base, *marks = list(unicodedata.normalize("NFD", character))
    if not marks:
        return _own(base) or _lettered(base)
    if not all(mark in MARKS or mark in BELOW for mark in marks):
        return None
    if any(mark in MARKS for mark in marks):
        # An accent stands in the place of the dot.
        base = {"i": "ı", "j": "ȷ"}.get(base, base)
    letter = drawn(base)
    return letter and Drawn(letter.width, _accented(letter.path, marks))


def _accented(path: Steps, marks: list[str]) -> Steps:
    left, _, right, _ = ink_box(path)
    middle = (left + right) / 2
    for mark in marks:
        foot = ink_box(path)[3] + _LIFT if mark in MARKS else 0.0
        strokes = steps(MARKS.get(mark) or BELOW[mark])
        path += moved(tuple(strokes), (1, 1), (middle, foot))
    return path


def _own(character: str) -> Drawn | None:
    sign = SIGNS.get(character)
    return sign and Drawn(sign[0], tuple(steps(sign[1])))


def _lettered(character: str) -> Drawn | None:
    """Return a letter of the stroke font, narrowed and rounded."""
    name, key = _letter_of(character)
    letter = _set(name).get(key)
    if letter is None:
        return None
    path: list[PathStep] = []
    for stroke in letter.strokes:
        # Their y runs down from 12 above the middle; the baseline is 9 below it.
        points = [(CLEAR + (x - letter.left_offset - CLEAR) * _NARROWED, 9.0 - y) for x, y in stroke]
        path += _dot(points) if _is_dot(points) else _rounded(points)
    return Drawn(2 * CLEAR + (letter.char_width - 2 * CLEAR) * _NARROWED, tuple(path))


def _letter_of(character: str) -> tuple[str, str]:
    """Return which of the library's sets has a character, and in the place of which it stands there."""
    place = _GREEK.find(character.upper())
    if place < 0 or character == "ς":
        return "futural", character
    latin = _IN_PLACE_OF[place]
    return "greeks", latin if character.isupper() else latin.lower()


@cache
def _set(name: str) -> dict[str, Any]:
    """Return the letters of one of the library's sets, by the ASCII character in whose place they stand."""
    from HersheyFonts import HersheyFonts

    library = HersheyFonts()
    library.load_default_font(name)
    return {key: letter for key, letter in library.all_glyphs.items() if " " < key < "\x7f"}


def _is_dot(points: list[Point]) -> bool:
    xs, ys = zip(*points, strict=True)
    return points[0] == points[-1] and max(xs) - min(xs) < 3 and max(ys) - min(ys) < 3


def _dot(points: list[Point]) -> list[PathStep]:
    xs, ys = zip(*points, strict=True)
    return steps(f"O {(min(xs) + max(xs)) / 2} {(min(ys) + max(ys)) / 2} {DOT}")


def _rounded(points: list[Point]) -> Iterator[PathStep]:
    """Yield a stroke through ``points``, its gentle turns made into curves."""
    if points[0] == points[-1]:
        # A ring begins half way along its first piece, so that every corner is between two pieces.
        start = _towards(points[0], points[1], 0.5)
        points = [start, *points[1:], start]
    yield "M", points[0]
    here = points[0]
    for before, corner, after in zip(points, points[1:], points[2:], strict=False):
        into, out_of = math.dist(before, corner), math.dist(corner, after)
        if _turn_deg(before, corner, after) > _GENTLE_DEG or min(into, out_of) > _STRAIGHT:
            start = end = corner
        else:
            # From one middle to the next, but no farther along a long piece than the short one is.
            start = _towards(corner, before, min(0.5, out_of / into))
            end = _towards(corner, after, min(0.5, into / out_of))
        if math.dist(here, start) > _SAME:
            yield "L", start
        if start != end:
            yield "Q", (*corner, *end)
        here = end
    if math.dist(here, points[-1]) > _SAME:
        yield "L", points[-1]


def _towards(start: Point, end: Point, share: float) -> Point:
    return start[0] + (end[0] - start[0]) * share, start[1] + (end[1] - start[1]) * share


def _turn_deg(before: Point, corner: Point, after: Point) -> float:
    first = math.atan2(corner[1] - before[1], corner[0] - before[0])
    second = math.atan2(after[1] - corner[1], after[0] - corner[0])
    return abs((math.degrees(second - first) + 180) % 360 - 180)
