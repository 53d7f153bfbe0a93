"""Where every mark of a scale falls: numbered values, divisions, and their points on the plate."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from itertools import pairwise

import numpy as np

from dialgen.dial import Dial, ScaleDial
from dialgen.dialfile.models import Entry, Every, Scale
from dialgen.errors import InputError, Key, NoSuchValue, Refused
from dialgen.face.divisions import MOST_MARKS, Rank, divide, stepped
from dialgen.face.looks import Look, look_for
from dialgen.face.numbering import auto_numbered
from dialgen.face.plate import Outliner
from dialgen.face.ruler import UNEVEN, Ruler, multiples
from dialgen.geometry.lines import ArcLine, ScaleLine, StraightLine
from dialgen.quantity import plain_number
from dialgen.stage import Array

_STEPS = 96
_FEW_STEPS = 32

NumeralWidth = Callable[[str, float], float]
"""The width in mm of a numeral's text at a height in mm."""


@dataclass(frozen=True, slots=True)
class Mark:
    """One mark: its value and rank, the text at it, and where the pointer meets the line there."""

    value: float
    rank: Rank | None
    label: str | None
    drive: float
    angle_deg: float
    x: float
    y: float
    direction: tuple[float, float]


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
    _check_meets(line, ends, [spec.start, spec.end], spec, key)
    look = look_for(spec, abs(float(np.diff(line.along(ends))[0])))
    entries = _entries(spec, key)
    ruler = _ruler(scale, line, ends, look, numeral_width)
    labels = (
        {v: plain_number(v) for v in auto_numbered(ruler)}
        if entries is None
        else {e.at: e.label if e.label is not None else plain_number(e.at) for e in entries}
    )
    marks = _marks(spec, key, ruler, sorted(labels), automatic=entries is None)
    return RuledScale(scale, line, ends, _placed(scale, line, plate, marks, labels), look)


def _ruler(scale: ScaleDial, line: ScaleLine, ends: Array, look: Look, numeral_width: NumeralWidth) -> Ruler:
    spec, chain = scale.spec, scale.chain
    first, last = (float(p) for p in line.along(ends))
    sign = 1.0 if last > first else -1.0

    def place_mm(values: Array) -> Array:
        return sign * (line.along(chain.angle(values)) - first)

    def width_mm(values: Array) -> Array:
        # Two upright boxes are clear of each other as soon as they are beside or above each other,
        # whichever comes first along the line.
        widths = np.array([numeral_width(plain_number(v), look.numeral_mm) for v in values.tolist()])
        across, upward = (np.abs(d) for d in line.directions(chain.angle(values)))
        with np.errstate(divide="ignore"):
            beside = (widths + look.clear_mm) / upward
            above = (look.numeral_mm + look.clear_mm) / across
        return np.minimum(beside, above) * _crowding(spec, look) - look.clear_mm

    return Ruler(
        start=spec.start,
        end=spec.end,
        place_mm=place_mm,
        along=_along(scale, line, ends, place_mm),
        width_mm=width_mm,
        digit_mm=min(numeral_width("0", look.numeral_mm), look.numeral_mm) * _crowding(spec, look),
        gap_mm=spec.gap,
        clear_mm=look.clear_mm,
    )


def _along(scale: ScaleDial, line: ScaleLine, ends: Array, place_mm: Callable[[Array], Array]) -> Array:
    """Return values at all but equal steps of place."""
    spec = scale.spec
    if math.isfinite(spec.end):
        values = np.linspace(spec.start, spec.end, _FEW_STEPS + 1)
        places = place_mm(values)
        steps = places[1:] - places[:-1]
        if steps.max() <= UNEVEN * steps.min():
            # All but even: the places between are near enough, and the inverse need not be asked.
            return np.interp(np.linspace(0.0, places[-1], _FEW_STEPS + 1), places, values)
    angles = np.linspace(ends[0], ends[1], _STEPS + 1)
    places = np.abs(line.along(angles) - line.along(ends[:1]))
    along = scale.chain.value(np.interp(np.linspace(0.0, places[-1], _STEPS + 1), places, angles))
    along[0], along[-1] = spec.start, spec.end
    return along


def _crowding(spec: Scale, look: Look) -> float:
    """Return how much farther apart places on the line are than at the numerals' distance."""
    if spec.radius is None:
        return 1.0
    reach = look.numbered_mm + look.space_mm + look.numeral_mm / 2
    numerals = spec.radius + (reach if spec.numerals == "outside" else -reach)
    return spec.radius / max(numerals, 0.1 * spec.radius)


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
                f"{entry.at:g} is outside the scale, {spec.start:g} to {spec.end:g}; leave it out or widen the scale",
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


def marks_at(scale: RuledScale, values: Sequence[float]) -> tuple[Mark, ...]:
    """Return where a mark at each value would fall, of no rank and without a label.

    Raises:
        NoSuchValue: a value that the scale cannot show, or where the pointer misses the line.
    """
    return _located(scale.dial, scale.line, [(v, None) for v in values], {})


def _placed(
    scale: ScaleDial,
    line: ScaleLine,
    plate: Outliner,
    marks: Sequence[tuple[float, Rank]],
    labels: dict[float, str],
) -> tuple[Mark, ...]:
    placed = _located(scale, line, marks, labels)
    _check_order(placed, scale)
    _check_on_plate(plate, placed, scale)
    return placed


def _located(
    scale: ScaleDial, line: ScaleLine, marks: Sequence[tuple[float, Rank | None]], labels: dict[float, str]
) -> tuple[Mark, ...]:
    values = np.array([v for v, _ in marks])
    angles = scale.chain.angle(values)
    _check_meets(line, angles, values.tolist(), scale.spec, scale.key)
    xs, ys = line.points(angles)
    drives = scale.chain.drive(values)
    ux, uy = line.directions(angles)
    rows = zip(
        marks,
        drives.tolist(),
        angles.tolist(),
        xs.tolist(),
        ys.tolist(),
        ux.tolist(),
        uy.tolist(),
        strict=True,
    )
    return tuple(Mark(v, rank, labels.get(v), d, a, x, y, (dx, dy)) for (v, rank), d, a, x, y, dx, dy in rows)


def _check_meets(line: ScaleLine, angles: Array, values: Sequence[float], spec: Scale, key: Key) -> None:
    missed = np.flatnonzero(~line.meets(angles))
    if len(missed):
        at = int(missed[0])
        name = "line" if spec.line is not None else "radius"
        raise NoSuchValue(
            f"the pointer at {values[at]:g} {spec.unit} ({angles[at]:.4g} degrees) does not meet the scale line; "
            "move the line, or end the scale before it",
            (*key, name),
            (*key, "to"),
        )


def _check_order(marks: Sequence[Mark], scale: ScaleDial) -> None:
    rising = bool(marks) and marks[-1].angle_deg > marks[0].angle_deg
    for here, there in pairwise(marks):
        if (there.angle_deg > here.angle_deg) != rising or there.angle_deg == here.angle_deg:
            raise InputError(
                f"the marks {here.value:g} and {there.value:g} do not follow each other; the law must move one "
                "way, and marks must stand apart",
                (*scale.key, "law"),
            )


def _check_on_plate(plate: Outliner, marks: Sequence[Mark], scale: ScaleDial) -> None:
    for mark in marks:
        if not plate.holds((mark.x, mark.y)):
            name = "line" if scale.spec.line is not None else "radius"
            raise InputError(
                f"the mark at {mark.value:g} {scale.spec.unit} would lie at {mark.x:.4g}, {mark.y:.4g}, off the "
                "plate; make the plate larger or move the scale line",
                (*scale.key, name),
                ("plate", "size"),
            )


def linear_error(ruled: RuledScale, mark: Mark) -> float | None:
    """Return the error that a linear face would have had at a mark, in face units.

    The linear face is divided evenly between the nominal angles of the scale's ends, for the
    circuit as designed; None where the scale has no finite end.
    """
    spec = ruled.spec
    nominal = nominal_ends(ruled.dial)
    if nominal is None or math.isinf(mark.value) or math.isinf(spec.end):
        return None
    first, last = nominal
    return spec.start + (mark.angle_deg - first) / (last - first) * (spec.end - spec.start) - mark.value


def nominal_ends(scale: ScaleDial) -> tuple[float, float] | None:
    """Return the angles of the scale's ends by the circuit as designed and an ideal movement."""
    chain, spec = scale.chain, scale.spec
    if scale.wiring is None:
        return chain.rest_deg, chain.full_deg
    drives = scale.wiring.designed(np.array([spec.start, spec.end]))
    if not np.isfinite(drives).all():
        return None
    first, last = (chain.rest_deg + float(d) * (chain.full_deg - chain.rest_deg) for d in drives)
    return first, last
