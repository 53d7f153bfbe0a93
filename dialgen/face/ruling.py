"""Where every mark of a scale falls: numbered values, divisions, and their points on the plate."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np

from dialgen.dial import Dial, ScaleDial
from dialgen.dialfile.models import Every, Scale
from dialgen.errors import InputError, Key
from dialgen.face.checks import check_meets, check_on_plate, check_order
from dialgen.face.divisions import MOST_MARKS, Rank, divide, stepped
from dialgen.face.looks import Look, look_for
from dialgen.face.numbering import auto_numbered
from dialgen.face.plate import Outliner
from dialgen.face.ruler import Ruler, multiples
from dialgen.face.survey import NumeralWidth, survey
from dialgen.geometry.lines import ArcLine, ScaleLine, StraightLine
from dialgen.quantity import plain_number
from dialgen.stage import Array


class Spot(NamedTuple):
    """Where a value falls: its drive, the pointer's angle, and the point where that meets the line.

    ``direction`` is the unit vector along which a mark there is drawn, away from the pivot.
    """

    value: float
    drive: float
    angle_deg: float
    x: float
    y: float
    direction: tuple[float, float]


class Mark(NamedTuple):
    """A mark on the face: where its value falls, how much it stands out, and the text at it, if any."""

    value: float
    drive: float
    angle_deg: float
    x: float
    y: float
    direction: tuple[float, float]
    rank: Rank
    label: str | None


@dataclass(frozen=True, slots=True, eq=False)
class RuledScale:
    """A scale with its line, the angles of its two ends, its marks by value, and the look of it all."""

    dial: ScaleDial
    line: ScaleLine
    ends_deg: Array
    marks: tuple[Mark, ...]
    look: Look

    @property
    def spec(self) -> Scale:
        """What the dial file says of the scale."""
        return self.dial.spec


def rule(
    dial: Dial, plate: Outliner, numeral_width: NumeralWidth
) -> tuple[tuple[RuledScale, ...], list[InputError]]:
    """Return the scales of the dial that can be divided, and what is wrong with the others.

    Wrong are values off the scale, pointers that miss the line, marks off the plate.
    """
    ruled: list[RuledScale] = []
    errors: list[InputError] = []
    for scale in dial.scales:
        try:
            ruled.append(_rule_scale(scale, plate, numeral_width))
        except InputError as error:
            errors.append(error)
    return tuple(ruled), errors


def scale_line(scale: Scale) -> ScaleLine:
    """Return the line that a scale's table describes."""
    if scale.line is not None:
        return StraightLine(*scale.line, square=scale.square, curve_mm=scale.curve)
    return ArcLine(scale.radius or 0.0, scale.centre or (0.0, 0.0))


def _rule_scale(scale: ScaleDial, plate: Outliner, numeral_width: NumeralWidth) -> RuledScale:
    spec, key = scale.spec, scale.key
    try:
        line = scale_line(spec)
    except InputError as error:
        raise error.under(*key) from None
    ends = scale.chain.angle(np.array([spec.start, spec.end]))
    check_meets(line, ends, [spec.start, spec.end], spec, key)
    look = look_for(spec, abs(float(np.diff(line.along(ends))[0])))
    asked = _asked(spec, key)
    ruler = survey(scale, line, ends, look, numeral_width)
    labels = {v: plain_number(v) for v in auto_numbered(ruler)} if asked is None else asked
    marks = _marks(spec, key, ruler, sorted(labels), automatic=asked is None)
    return RuledScale(scale, line, ends, _placed(scale, line, plate, marks, labels), look)


def _asked(spec: Scale, key: Key) -> dict[float, str] | None:
    """Return the values that the file asks to number with their labels; None where it leaves them open."""
    asked = spec.numbered
    if asked is None:
        return None
    if isinstance(asked, Every):
        if math.isinf(spec.end):
            raise InputError(
                'a step never reaches inf; write a list of values, or "auto"', (*key, "numbered", "every")
            )
        if not (spec.end - spec.start) / asked.every <= MOST_MARKS:
            raise InputError(
                f"a step of {asked.every:g} gives over {MOST_MARKS} numerals; take a larger one",
                (*key, "numbered", "every"),
            )
        return {value: plain_number(value) for value in multiples(asked.every, spec.start, spec.end)}
    return {e.at: plain_number(e.at) if e.label is None else e.label for e in asked}


def _marks(
    spec: Scale, key: Key, ruler: Ruler, numbered: Sequence[float], *, automatic: bool
) -> list[tuple[float, Rank]]:
    """Return every mark's value and rank, ascending."""
    marks = [(v, Rank.NUMBERED) for v in numbered]
    if spec.divisions is None:
        ends = [] if automatic else [v for v in (spec.start, spec.end) if v not in numbered]
        marks += [(v, Rank.MIDDLE) for v in ends]
        marks += divide(ruler, sorted([*numbered, *ends]))
        return sorted(marks)
    alone = isinstance(spec.divisions, Every)
    if isinstance(spec.divisions, Every):
        pieces = [(spec.end, spec.divisions.every)]
    else:
        pieces = [(piece.to, piece.every) for piece in spec.divisions]
    try:
        return sorted([*marks, *stepped(spec.start, spec.end, pieces, numbered)])
    except InputError as error:
        index, name = error.keys[0]
        place = (name,) if alone else (index, name)
        raise InputError(error.message, (*key, "divisions", *place)) from None


def spots(scale: ScaleDial, line: ScaleLine, values: Sequence[float]) -> tuple[Spot, ...]:
    """Return where each value falls.

    Raises:
        NoSuchValue: a value that the scale cannot show, or where the pointer misses the line.
    """
    return tuple(_spots(values, *_located(scale, line, values)))


def _located(scale: ScaleDial, line: ScaleLine, values: Sequence[float]) -> tuple[Array, ...]:
    """Return drives, angles, x and y of points, and x and y of the directions there."""
    array = np.array(values)
    drives, angles = scale.chain.drive(array), scale.chain.angle(array)
    check_meets(line, angles, values, scale.spec, scale.key)
    return drives, angles, *line.points(angles), *line.directions(angles)


def _spots(values: Sequence[float], *columns: Array) -> Iterator[Spot]:
    for value, drive, angle, x, y, ux, uy in zip(values, *(c.tolist() for c in columns), strict=True):
        yield Spot(value, drive, angle, x, y, (ux, uy))


def _placed(
    scale: ScaleDial,
    line: ScaleLine,
    plate: Outliner,
    marks: Sequence[tuple[float, Rank]],
    labels: dict[float, str],
) -> tuple[Mark, ...]:
    values = [value for value, _ in marks]
    columns = _located(scale, line, values)
    _, angles, xs, ys, *_ = columns
    check_order(values, angles, scale.key)
    check_on_plate(plate, values, (xs, ys), scale.spec, scale.key)
    ranked = zip(_spots(values, *columns), marks, strict=True)
    return tuple(Mark(*spot, rank, labels.get(value) or None) for spot, (value, rank) in ranked)
