"""How a remark is put: what is wrong and where; what would mend it."""

from __future__ import annotations

from collections.abc import Hashable, Iterable, Mapping, Sequence
from typing import TypeVar

from dialgen.drawing import Point
from dialgen.face.parts import MAKER, SYMBOLS, TEXT, TITLE, Part
from dialgen.face.review.things import Thing

_T = TypeVar("_T")

_TOLD_FIRST: Sequence[str] = (
    TEXT, MAKER, TITLE, SYMBOLS, Part.UNIT, Part.NUMERALS, Part.LIMITS, Part.ZONES, Part.MARKS, Part.LINE,
)  # fmt: skip

_MANY = 7
"""As many are not counted: nobody counts them, and not all were looked for."""

MOVE: Mapping[str, str] = {
    TITLE: "make it shorter, or leave it more room",
    SYMBOLS: "give the symbols another place with at",
    MAKER: "make it shorter, or leave it more room",
    Part.UNIT: "give it another place with unit_at",
}
"""How what has a way of its own to be moved is moved; the rest is simply moved."""


def weight(thing: Thing) -> tuple[int, int]:
    """Return what orders things by how plainly they are pointed at: lettering before marks."""
    part = thing.sort.part
    rank = _TOLD_FIRST.index(part) if part in _TOLD_FIRST else len(_TOLD_FIRST)
    return rank, thing.sort.number or 0


def move(thing: Thing) -> str:
    """Return how a thing is moved."""
    return MOVE.get(thing.sort.part, "move it")


def at(place: Point) -> str:
    """Return a place in words: millimetres from the pivot, right and up."""
    # Adding zero turns the minus zero of a rounded place into zero.
    x, y = (round(part, 1) + 0.0 for part in place)
    return f"at {x:.1f}, {y:.1f}"


def and_so(count: int, what: str = "of its parts", verbs: tuple[str, str] = ("does", "do")) -> str:
    """Return that there are more of what was told, with the comma before it; nothing where there are none.

    >>> and_so(0), and_so(1), and_so(4, "of its pairs", ("is", "are"))
    ('', ', and so does one more of its parts', ', and so are 4 more of its pairs')
    """
    one, several = verbs
    if not count:
        return ""
    if count == 1:
        return f", and so {one} one more {what}"
    return f", and so {several} {count if count < _MANY else 'many'} more {what}"


def grouped(items: Iterable[tuple[Hashable, _T]]) -> list[list[_T]]:
    """Return items by their keys, keys and items in the order they came in."""
    found: dict[Hashable, list[_T]] = {}
    for key, item in items:
        found.setdefault(key, []).append(item)
    return list(found.values())
