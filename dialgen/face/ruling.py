"""Where every mark of a scale falls: numbered values, divisions, and their points on the plate."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from dialgen.dial import Dial, ScaleDial
from dialgen.dialfile.models import Entry, Every, Scale
from dialgen.errors import InputError, Key, Refused
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


@dataclass(frozen=True, slots=True)
class Spot:
    """Where a value falls: its drive, the pointer's angle, and the point where that meets the line.

    ``direction`` is the unit vector along which a mark there is drawn, away from the pivot.
    """

    value: float
    drive: float
    angle_deg: float
    x: float
    y: float
    direction: tuple[float, float]


@dataclass(frozen=True, slots=True)
class Mark(Spot):
    """A mark on the face: its spot, how much it stands out, and the text at it, if any."""

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


def rule(dial: Dial, plate: Outliner, numeral_width: NumeralWidth) -> tuple[RuledScale, ...]:
    """Return every scale of the dial, divided.

    Raises:
        Refused: values off the scale, pointers that miss the line, marks off the plate.
    """
    ruled, errors = [], []
    for scale in dial.scales:
        try:
            ruled.append(_rule_scale(scale, plate, numeral_width))
        except InputError as error:
            errors.append(error)
    if errors:
        raise Refused(errors)
    return tuple(ruled)


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
    entries = _entries(spec, key)
    ruler = survey(scale, line, ends, look, numeral_width)
    labels = (
        {v: plain_number(v) for v in auto_numbered(ruler)}
        if entries is None
        else {e.at: e.label if e.label is not None else plain_number(e.at) for e in entries}
    )
    marks = _marks(spec, key, ruler, sorted(labels), automatic=entries is None)
    return RuledScale(scale, line, ends, _placed(scale, line, plate, marks, labels), look)


def _entries(spec: Scale, key: Key) -> Sequence[Entry] | None:
    """Return the values that the file asks to number, checked; None where it leaves them open."""
    asked = spec.numbered
    if asked is None:
        return None
    if isinstance(asked, Every):
        count = (spec.end - spec.start) / asked.every
        if not count <= MOST_MARKS:
            raise InputError(
                f"a step of {asked.every:g} gives over {MOST_MARKS} numerals; take a larger one",
                (*key, "numbered", "every"),
            )
        return [Entry(at=v) for v in multiples(asked.every, spec.start, spec.end)]
    seen: set[float] = set()
    for i, entry in enumerate(asked):
        if not spec.start <= entry.at <= spec.end:
            raise InputError(
                f"{entry.at:g} is outside the scale, {spec.start:g} to {spec.end:g}; "
                "leave it out or widen the scale",
                (*key, "numbered", i),
                (*key, "to"),
            )
        if entry.at in seen:
            raise InputError(f"{entry.at:g} is numbered twice; leave one out", (*key, "numbered", i))
        seen.add(entry.at)
    return asked


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
    if isinstance(spec.divisions, Every):
        pieces, where = [(spec.end, spec.divisions.every)], ()
    else:
        pieces, where = [(p.to, p.every) for p in spec.divisions], None
    try:
        return sorted([*marks, *stepped(spec.start, spec.end, pieces, numbered)])
    except InputError as error:
        index, name = error.keys[0]
        raise InputError(
            error.message, (*key, "divisions", *((index,) if where is None else where), name)
        ) from None


def spots(scale: ScaleDial, line: ScaleLine, values: Sequence[float]) -> tuple[Spot, ...]:
    """Return where each value falls.

    Raises:
        NoSuchValue: a value that the scale cannot show, or where the pointer misses the line.
    """
    array = np.array(values)
    drives, angles = scale.chain.drive(array), scale.chain.angle(array)
    check_meets(line, angles, values, scale.spec, scale.key)
    points = zip(*(axis.tolist() for axis in line.points(angles)), strict=True)
    directions = zip(*(axis.tolist() for axis in line.directions(angles)), strict=True)
    rows = zip(values, drives.tolist(), angles.tolist(), points, directions, strict=True)
    return tuple(Spot(value, drive, angle, x, y, along) for value, drive, angle, (x, y), along in rows)


def _placed(
    scale: ScaleDial,
    line: ScaleLine,
    plate: Outliner,
    marks: Sequence[tuple[float, Rank]],
    labels: dict[float, str],
) -> tuple[Mark, ...]:
    values = [value for value, _ in marks]
    found = spots(scale, line, values)
    check_order(values, [spot.angle_deg for spot in found], scale.key)
    check_on_plate(plate, values, [(spot.x, spot.y) for spot in found], scale.spec, scale.key)
    return tuple(
        Mark(s.value, s.drive, s.angle_deg, s.x, s.y, s.direction, rank, labels.get(s.value))
        for s, (_, rank) in zip(found, marks, strict=True)
    )
