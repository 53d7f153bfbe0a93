"""Where units stand: that of a lone scale below its arc, those of several each by its own numerals."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import replace
from functools import partial

from dialgen.drawing import Letters, Point, polar
from dialgen.face.lettered.room import Room, Wish
from dialgen.face.lettered.rowends import OFF_LINE, End, NumeralRow, numeral_rows
from dialgen.face.lettered.settle import Choice, Form, Settled, Thing, lettered, settle, settled
from dialgen.face.ruled.ruling import RuledScale
from dialgen.geometry.lines import ArcLine

_UPRIGHT_DEG = 12.0
_WORD = 0.85
"""Size of a lone unit that is a word."""
_WORD_SPACE = 0.15
"""What is added to the least clear space between a numeral and its unit, in heights of the numeral."""
_ROW_UNIT = 0.85
"""Size of the unit of a further row, in heights of its numerals."""
_ACROSS = 3.0
"""What a millimetre off the axis costs, in millimetres up or down it."""
_ENDS_TOLL, _BESIDE_TOLL, _BARE_TOLL, _STRAY_TOLL = 14.0, 8.0, 4.0, 20.0
"""Costs of a lone unit at an end, of a row's unit beside the scale's, of one at an end without a numeral,
and of one nearer to other numerals.
"""
_NEAR_MM, _NEAR_ROW_MM = 8.0, 4.0
"""How far from its place the unit of one of several scales is looked for, and that of a row."""
_GOOD_ENOUGH = 1.5
_SIZES = ((1.0, 0.0), (0.8, 3.0))

Kind = Callable[[NumeralRow, Form], Wish]
"""A way to place a unit beside a row of numerals."""

Wishes = Callable[[Form], Sequence[Wish]]
"""Where a form would like its middle."""


def unit_height(scale: RuledScale, *, alone: bool) -> float:
    """Return the height of a scale's unit, mm: among several that of numerals, alone less for a word."""
    if not alone:
        return scale.sizes.numeral_mm
    return scale.sizes.unit_mm * (1.0 if len(scale.rows[0].unit) == 1 else _WORD)


def unit_place(scale: RuledScale, width_mm: float, height_mm: float, *, alone: bool) -> Point:
    """Return the middle of a unit: between pivot and arc, or on the free side of a straight line."""
    spec, sizes = scale.spec, scale.sizes
    ends_deg = scale.ends_deg
    taken = sizes.numeral_mm + sizes.space_mm if spec.numerals == "inside" else 0.0
    taken += sizes.numbered_mm if spec.marks != "outward" else 0.0
    if isinstance(scale.line, ArcLine):
        middle_deg = float(scale.line.about_centre(ends_deg).mean())
        # A scale that is all but upright has its unit on the plate's own middle line.
        middle_deg = 0.0 if abs(middle_deg) < _UPRIGHT_DEG else middle_deg
        room_mm = scale.line.radius_mm - taken
        below_mm = 0.38 * sizes.base_mm if alone else 0.9 * height_mm + sizes.space_mm
        reach_mm = max(room_mm - below_mm, 0.3 * room_mm)
        return polar(scale.line.centre, reach_mm, middle_deg)
    xs, ys = scale.line.points(ends_deg)
    ux, uy = (float(u[0]) for u in scale.line.directions(ends_deg.mean(keepdims=True)))
    half_mm = abs(ux) * width_mm / 2 + abs(uy) * height_mm / 2
    drop_mm = taken + sizes.space_mm + 0.3 * height_mm + half_mm
    return float(xs.mean()) - drop_mm * ux, float(ys.mean()) - drop_mm * uy


def given_unit(scale: RuledScale, at: Point, *, alone: bool) -> Settled:
    """Return the unit of a scale at the place that the file gives it."""
    return settled(_unit(scale, 0, unit_height(scale, alone=alone)), at)


def lone_unit(room: Room, scale: RuledScale, words: Sequence[Letters]) -> Settled:
    """Return the unit of a scale that is alone: large, in its usual place if that is free.

    Args:
        room: what is free.
        scale: the scale.
        words: its numerals as they stand.
    """
    height_mm = unit_height(scale, alone=True)

    def wishes(form: Form) -> list[Wish]:
        own = numeral_rows(scale, words)[0]
        ends = [replace(kind(own, form), toll=_ENDS_TOLL) for kind in (_at_right, _at_left)]
        at = unit_place(scale, form.width_mm, height_mm, alone=True)
        return [Wish(at, across=_ACROSS), *ends]

    return settle(room, Thing([Choice(0.0, partial(_unit, scale, 0, height_mm))], wishes, steady=True))


def several_units(
    room: Room, scales: Sequence[RuledScale], others: Sequence[RuledScale], words: Sequence[Sequence[Letters]]
) -> tuple[Settled, ...]:
    """Return the units of several scales, all in the same way, each nearer to its own than to others.

    Args:
        room: what is free.
        scales: those whose unit needs a place.
        others: all scales of the face.
        words: the numerals of each of these as they stand.
    """
    rows = [numeral_rows(scale, said) for scale, said in zip(others, words, strict=True)]
    own = {others.index(scale): _unit(scale, 0, unit_height(scale, alone=False)) for scale in scales}
    best: tuple[Settled, ...] = ()
    least = math.inf
    for kind in (_under, _at_right, _at_left, _past_right, _past_left):
        way = tuple(_placed(room, rows, own, kind, least))
        cost = sum(unit.cost for unit in way)
        if not best or cost < least:
            best, least = way, cost
        if least <= _GOOD_ENOUGH * len(scales):
            break
    return best


def row_units(room: Room, scale: RuledScale, unit: Settled | None, words: Sequence[Letters]) -> list[Settled]:
    """Return small units for the further rows of numerals that are read in another one than the scale's.

    Each stands at an end of its row, nearer to it than to other rows; where that cannot be, beside
    the unit of the scale.

    Args:
        room: what is free.
        scale: the scale.
        unit: its own unit, None where it has none.
        words: its numerals as they stand.
    """
    found: list[Settled] = []
    strange = [n for n, row in enumerate(scale.rows) if n and row.unit not in ("", scale.rows[0].unit)]
    rows = numeral_rows(scale, words) if strange else ()
    for number in strange:
        made = _row_unit(room, rows, number, unit)
        room = room.with_box(made.box)
        found.append(made)
    return found


def _row_unit(room: Room, rows: Sequence[NumeralRow], number: int, unit: Settled | None) -> Settled:
    scale = rows[number].scale
    form = _unit(scale, number, _ROW_UNIT * scale.sizes.numeral_mm)

    def tried(wishes: Wishes, reach_mm: float | None) -> Settled:
        return settle(room, _thing(form, wishes), reach_mm)

    tries = []
    for kind in (_at_right, _at_left, _beyond_right, _beyond_left):
        made = tried(partial(_single, kind, rows[number]), _NEAR_ROW_MM)
        tries.append(_judged(made, [row.distance(made.middle) for row in rows], number))
    if unit is not None:
        beside = tried(partial(_beside, unit), None)
        tries.append(replace(beside, cost=beside.cost + _BESIDE_TOLL))
    return min(tries, key=lambda made: made.cost)


def _placed(
    room: Room, rows: Sequence[Sequence[NumeralRow]], units: Mapping[int, Form], kind: Kind, most: float
) -> Iterator[Settled]:
    """Yield the unit of each scale, placed in one way, until they cost more than ``most`` together.

    Args:
        room: what is free.
        rows: the rows of numerals of every scale.
        units: the units that need a place, by the number of their scale.
        kind: the way.
        most: what another way costs.
    """
    whole = 0.0
    for number, form in units.items():
        wishes = partial(_single, kind, rows[number][0])
        unit = settle(room, _thing(form, wishes), _NEAR_MM)
        room = room.with_box(unit.box)
        distances = [min(row.distance(unit.middle) for row in of_scale) for of_scale in rows]
        unit = _judged(unit, distances, number)
        yield unit
        whole += unit.cost
        if whole > most:
            return


def _judged(made: Settled, distances: Sequence[float], own: int) -> Settled:
    """Return a unit at a higher cost where it is not nearest to its own."""
    strays = distances[own] > min(distances)
    return replace(made, cost=made.cost + _STRAY_TOLL) if strays else made


def _unit(scale: RuledScale, row: int, height_mm: float) -> Form:
    return lettered(scale.rows[row].unit, height_mm, scale.ink, scale.hand)


def _thing(form: Form, wishes: Wishes) -> Thing:
    """Return a small unit: it keeps to its place, and asks for no more space than it must have."""
    return Thing([Choice(0.0, lambda: form)], wishes, air_mm=0.0, crowd=0.0, sizes=_SIZES)


def _single(kind: Kind, row: NumeralRow, form: Form) -> list[Wish]:
    return [kind(row, form)]


def _beside(unit: Settled, form: Form) -> list[Wish]:
    """Return the places beside a scale's own unit, on its baseline."""
    left, bottom, right, _ = unit.box
    across, y = form.width_mm / 2 + form.height_mm, bottom + form.height_mm / 2
    return [Wish((right + across, y)), Wish((left - across, y), toll=1.0)]


def _under(row: NumeralRow, form: Form) -> Wish:
    """Return the place below the middle of the line."""
    at = unit_place(row.scale, form.width_mm, form.height_mm, alone=False)
    return Wish(at, across=_ACROSS)


def _at_right(row: NumeralRow, form: Form) -> Wish:
    """Return the place behind the numeral at the right end of a row, on its line."""
    return _off(row, row.right, (1.0, 0.0), form, 1.5)


def _at_left(row: NumeralRow, form: Form) -> Wish:
    """Return the place before the numeral at the left end of a row, on its line."""
    return _off(row, row.left, (-1.0, 0.0), form, 3.5)


def _past_right(row: NumeralRow, form: Form) -> Wish:
    """Return the place where a row of numerals would go on past its right end."""
    return _off(row, row.right, row.right.onward, form, 3.0)


def _past_left(row: NumeralRow, form: Form) -> Wish:
    """Return the place where a row of numerals would go on past its left end."""
    return _off(row, row.left, row.left.onward, form, 5.0)


def _beyond_right(row: NumeralRow, form: Form) -> Wish:
    """Return the place over or under the numeral at the right end of a row, away from the line."""
    return _off(row, row.right, row.right.outer, form, 1.5)


def _beyond_left(row: NumeralRow, form: Form) -> Wish:
    """Return the place over or under the numeral at the left end of a row, away from the line."""
    return _off(row, row.left, row.left.outer, form, 3.5)


def _off(row: NumeralRow, end: End, way: Point, form: Form, toll: float) -> Wish:
    at = end.clear(way, (form.width_mm, form.height_mm), row.scale.sizes.clear_mm)
    if not way[1]:
        # Behind a numeral a unit is read with it: a word's space away, and on its baseline.
        at = (at[0] + way[0] * _WORD_SPACE * row.scale.sizes.numeral_mm, end.baseline + form.rise_mm)
    return Wish(at, toll + (_BARE_TOLL if end.bare else 0.0), up=OFF_LINE)
