"""Where every mark of a scale falls: numbered values, divisions, and their points on the plate."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Mapping, Sequence
from dataclasses import dataclass, replace
from functools import partial
from typing import NamedTuple

import numpy as np

from dialgen.dial import Dial, ScaleDial
from dialgen.dialfile.looks import look_of
from dialgen.dialfile.models import DialFile, Every, Scale
from dialgen.errors import InputError, Key
from dialgen.face.plate import Outliner
from dialgen.face.ruled.captions import Caption, captions
from dialgen.face.ruled.checks import check_meets, check_on_plate, check_order
from dialgen.face.ruled.dividing import divide
from dialgen.face.ruled.divisions import MOST_MARKS, Rank
from dialgen.face.ruled.numbering import auto_numbered
from dialgen.face.ruled.precision import blank_from_zero
from dialgen.face.ruled.ruler import Ruler, multiples
from dialgen.face.ruled.sizes import Sizes, sizes_for
from dialgen.face.ruled.stepping import stepped
from dialgen.face.ruled.survey import survey
from dialgen.geometry.lines import ArcLine, ScaleLine, StraightLine
from dialgen.lettering import Hand, numeral_width
from dialgen.looks import LineForm, Look
from dialgen.stage import Array

HandFor = Callable[[Look], Hand]
"""The hand that letters a look."""


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
    further: tuple[str, ...] = ()
    """The texts of the further rows of numerals, none where the label is of the maker's own wording."""


@dataclass(frozen=True, slots=True, eq=False)
class RuledScale:
    """A scale with its line, the angles of its two ends, its marks by value, and the look of it all."""

    dial: ScaleDial
    line: ScaleLine
    ends_deg: Array
    marks: tuple[Mark, ...]
    look: Look
    sizes: Sizes
    rows: tuple[Caption, ...]
    hand: Hand

    @property
    def ink(self) -> str:
        """The colour of the scale."""
        return self.spec.ink or self.look.ink

    @property
    def spec(self) -> Scale:
        """What the dial file says of the scale."""
        return self.dial.spec


def rule(dial: Dial, plate: Outliner, hand_for: HandFor) -> tuple[tuple[RuledScale, ...], list[InputError]]:
    """Return the scales of the dial that can be divided, and what is wrong with the others.

    Wrong are values off the scale, pointers that miss the line, marks off the plate.

    Args:
        dial: the scales with their chains.
        plate: the plate's outline.
        hand_for: the hand that letters a look.
    """
    ruled: list[RuledScale] = []
    errors: list[InputError] = []
    for scale in dial.scales:
        try:
            ruled.append(_rule_scale(scale, dial.file, plate, hand_for))
        except InputError as error:
            errors.append(error)
    return _one_line_each(ruled), errors


def _one_line_each(scales: Sequence[RuledScale]) -> tuple[RuledScale, ...]:
    """Return the scales with no line drawn twice: one that runs along another's leaves it to that."""
    found: list[RuledScale] = []
    for scale in scales:
        longer = [other for other in scales if other is not scale and _carries(other, scale)]
        # Of two that run alike the first draws the line.
        drawn = any(not _carries(scale, other) or other in found for other in longer)
        plain = replace(scale, look=replace(scale.look, line=LineForm.NONE))
        found.append(plain if drawn else scale)
    return tuple(found)


def _carries(one: RuledScale, other: RuledScale) -> bool:
    """Return whether the single line of one scale is all that another needs."""
    singles = one.look.line is other.look.line is LineForm.SINGLE
    own = other.spec.heavy or other.spec.effective or one.spec.effective
    (low, high), (start, end) = np.sort(one.ends_deg), np.sort(other.ends_deg)
    return bool(one.line == other.line and singles and not own and low <= start and end <= high)


def scale_line(scale: Scale) -> ScaleLine:
    """Return the line that a scale's table describes."""
    if scale.line is not None:
        return StraightLine(*scale.line, square=scale.square, curve_mm=scale.curve)
    return ArcLine(scale.radius or 0.0, scale.centre or (0.0, 0.0))


def _rule_scale(scale: ScaleDial, file: DialFile, plate: Outliner, hand_for: HandFor) -> RuledScale:
    spec, key = scale.spec, scale.key
    try:
        line = scale_line(spec)
    except InputError as error:
        raise error.under(*key) from None
    ends = scale.chain.angle(np.array([spec.start, spec.end]))
    check_meets(line, ends, [spec.start, spec.end], spec, key)
    look = look_of(file.look, spec.look)
    sizes = sizes_for(spec, look, abs(float(np.diff(line.along(ends))[0])))
    rows, hand = captions(spec, look, _largest(scale, ends)), _hand(hand_for, look, spec, key)
    ruler = survey(scale, line, ends, look, sizes, rows, partial(numeral_width, hand=hand))
    asked = _asked(spec, key)
    bare = blank_from_zero(scale, file.movement)
    own = _own_words(spec)
    numbered = [v for v in auto_numbered(ruler) if not bare(v)] if asked is None else asked
    marks = _marks(spec, key, ruler, numbered, automatic=asked is None)
    if spec.divisions is None:
        marks = [(v, rank) for v, rank in marks if rank is Rank.NUMBERED or not bare(v)]
    labels = {v: own[v] if v in own else rows[0].text(v) for v in numbered}
    further = {v: _further(rows, v) for v in numbered if v not in own}
    placed = _placed(scale, line, plate, marks, labels, further)
    return RuledScale(scale, line, ends, placed, look, sizes, rows, hand)


def _hand(hand_for: HandFor, look: Look, spec: Scale, key: Key) -> Hand:
    try:
        return hand_for(look)
    except InputError as error:
        own = {"font", "lettering"} & spec.look.changes.keys()
        raise error.under(*(key if own else ())) from None


def _further(rows: Sequence[Caption], value: float) -> tuple[str, ...]:
    """Return what the further rows say at a value; where all say the same, as at zero, once is enough."""
    first, *texts = (row.text(value) for row in rows)
    return () if all(text == first for text in texts) else tuple(texts)


def _largest(scale: ScaleDial, ends_deg: Array) -> float:
    """Return how large values get; of a scale to infinity, the one in the middle of the pointer's way."""
    if math.isfinite(scale.spec.end):
        return max(abs(scale.spec.start), abs(scale.spec.end))
    return float(scale.chain.value(ends_deg.mean(keepdims=True))[0])


def _own_words(spec: Scale) -> dict[float, str]:
    """Return the labels that the file words itself; a blank one leaves a mark without a numeral."""
    entries = spec.numbered if isinstance(spec.numbered, tuple) else ()
    return {entry.at: entry.label.strip() for entry in entries if entry.label is not None}


def _asked(spec: Scale, key: Key) -> list[float] | None:
    """Return the values that the file asks to number; None where it leaves them open."""
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
        return multiples(asked.every, spec.start, spec.end)
    return sorted(entry.at for entry in asked)


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
    labels: Mapping[float, str],
    further: Mapping[float, tuple[str, ...]],
) -> tuple[Mark, ...]:
    values = [value for value, _ in marks]
    columns = _located(scale, line, values)
    _, angles, xs, ys, *_ = columns
    check_order(values, angles, scale.key)
    check_on_plate(plate, values, (xs, ys), scale.spec, scale.key)
    ranked = zip(_spots(values, *columns), marks, strict=True)
    return tuple(
        Mark(*spot, rank, labels.get(value) or None, further.get(value, ())) for spot, (value, rank) in ranked
    )
