"""One thing at a time finds its place: the forms it may take, and where each would like to stand."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from typing import NamedTuple

from dialgen.drawing import Letters, Placed, Point, Primitive, Style
from dialgen.face.lettered.cover import Box, letters_box
from dialgen.face.lettered.room import Room, Wish
from dialgen.lettering import Hand, letters

CLEAR_MM = 0.6
"""Least clear space about lettering."""

SIZES = ((1.0, 0.0), (0.9, 3.0), (0.8, 7.0), (0.7, 12.0))
"""Sizes that are tried, and how far astray a thing is rather moved than made so small, in mm."""

Items = tuple[Primitive, ...]


@dataclass(frozen=True, slots=True)
class Form:
    """A form that a thing may take.

    Args:
        width_mm: of its box.
        height_mm: likewise.
        draw: returns it about a middle, at a share of the size of the box.
        rise_mm: how far the middle lies above the baseline, of what has one.
    """

    width_mm: float
    height_mm: float
    draw: Callable[[Point, float], Items]
    rise_mm: float = 0.0

    def scaled(self, share: float) -> Form:
        """Return the form at a share of its size."""
        draw = self.draw
        return Form(
            share * self.width_mm,
            share * self.height_mm,
            lambda at, more: draw(at, share * more),
            share * self.rise_mm,
        )


class Choice(NamedTuple):
    """A form that is only made when it is tried, and how much worse it is than the best, in mm astray."""

    toll: float
    make: Callable[[], Form]


@dataclass(frozen=True, slots=True)
class Thing:
    """Something that needs a place.

    Args:
        choices: what it may look like.
        wishes: where a form would like its middle, the first above all.
        air_mm: how wide a margin it likes to have free.
        beside_mm: how much more than the least must be clear at either side, so that it is not read as one
            with what stands there.
        crowd: what it costs to have none of that free, in mm astray.
        steady: whether it stays at the place it wishes for above all, if that is free, whatever its margin.
        sizes: the shares of its size that are tried, and how much worse each is.
    """

    choices: Sequence[Choice]
    wishes: Callable[[Form], Sequence[Wish]]
    air_mm: float = 2.0
    beside_mm: float = 0.0
    crowd: float = 12.0
    steady: bool = False
    sizes: Sequence[tuple[float, float]] = SIZES


@dataclass(frozen=True, slots=True)
class Settled:
    """A thing in its place: what draws it, its box, and what the place costs in mm astray.

    The cost is infinite where nothing was free and the thing stands where it would have liked to.
    """

    items: Items
    box: Box
    cost: float = 0.0

    @property
    def middle(self) -> Point:
        """The middle of the box."""
        left, bottom, right, top = self.box
        return (left + right) / 2, (bottom + top) / 2


def settle(room: Room, thing: Thing, reach_mm: float | None = None) -> Settled:
    """Return a thing at the best free place for it, or, where there is none, at the first it wished for.

    Args:
        room: what is free.
        thing: what needs a place.
        reach_mm: how far from the places it wishes for it is looked for; None looks everywhere.
    """
    first = thing.choices[0].make()
    wish, *others = thing.wishes(first)
    margin_mm = 2 * (CLEAR_MM if thing.steady else CLEAR_MM + max(thing.air_mm, thing.beside_mm))
    # Where the best place is free there is nothing to look for.
    if wish.toll <= min([other.toll for other in others], default=math.inf) and room.free(
        wish.at, first.width_mm + margin_mm, first.height_mm + margin_mm
    ):
        return settled(first, wish.at, thing.choices[0].toll + wish.toll)
    best, cost = (first, wish.at), math.inf
    whole = {0: first}
    for toll, number, share in _tries(thing):
        if cost <= toll:
            break
        if number not in whole:
            whole[number] = thing.choices[number].make()
        form = whole[number].scaled(share)
        found = room.best(
            form.width_mm + 2 * (CLEAR_MM + thing.beside_mm),
            form.height_mm + 2 * CLEAR_MM,
            thing.wishes(form),
            thing.air_mm,
            thing.crowd,
            reach_mm,
        )
        if found and found.cost + toll < cost:
            best, cost = (form, found.at), found.cost + toll
    return settled(*best, cost)


def settled(form: Form, at: Point, cost: float = 0.0) -> Settled:
    """Return a form with its middle at a place."""
    across, up = form.width_mm / 2, form.height_mm / 2
    return Settled(form.draw(at, 1.0), (at[0] - across, at[1] - up, at[0] + across, at[1] + up), cost)


def _tries(thing: Thing) -> list[tuple[float, int, float]]:
    """Return every choice at every size, by toll: the toll, the choice's number, the share of its size."""
    return sorted(
        (choice.toll + toll, number, share)
        for number, choice in enumerate(thing.choices)
        for share, toll in thing.sizes
    )


def lettered(text: str, height_mm: float, ink: str, hand: Hand, angle_deg: float = 0.0) -> Form:
    """Return a line of text."""
    word = letters(text, height_mm, (0.0, 0.0), Style(fill=ink), angle_deg=angle_deg, hand=hand)
    left, bottom, right, top = letters_box(word) or (0.0, 0.0, 0.0, 0.0)
    middle = (left + right) / 2, (bottom + top) / 2
    rise_mm = middle[1] - word.glyphs[0].y if word.glyphs and not angle_deg else 0.0
    return Form(right - left, top - bottom, lambda at, share: (_moved(word, middle, at, share),), rise_mm)


def _moved(word: Letters, middle: Point, at: Point, share: float) -> Letters:
    """Return letters made smaller about their middle, and that brought to a place."""
    glyphs = [
        Placed(
            p.glyph,
            at[0] + share * (p.x - middle[0]),
            at[1] + share * (p.y - middle[1]),
            share * p.size_mm,
            p.angle_deg,
        )
        for p in word.glyphs
    ]
    return Letters(word.text, tuple(glyphs), replace(word.style, width_mm=share * word.style.width_mm))


def stacked(forms: Sequence[Form], space_mm: float) -> Form:
    """Return forms centred one under the other, as one."""
    height_mm = sum(form.height_mm for form in forms) + space_mm * (len(forms) - 1)

    def draw(at: Point, share: float) -> Items:
        items: Items = ()
        top = at[1] + share * height_mm / 2
        for form in forms:
            items += form.draw((at[0], top - share * form.height_mm / 2), share)
            top -= share * (form.height_mm + space_mm)
        return items

    return Form(max(form.width_mm for form in forms), height_mm, draw)
