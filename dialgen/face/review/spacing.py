"""How a scale is divided: marks too near to be told apart, too many or too few to be counted."""

from __future__ import annotations

import math
from collections.abc import Iterator
from itertools import pairwise

import numpy as np

from dialgen.errors import Key, Remark
from dialgen.face.review.finished import Finished
from dialgen.face.review.wording import at
from dialgen.face.ruled.divisions import MOST_PARTS, Rank
from dialgen.face.ruled.numbering import wanted_count
from dialgen.face.ruled.precision import fiducial, least_gap_mm, least_step
from dialgen.face.ruled.ruler import UNEVEN
from dialgen.face.ruled.ruling import Mark, RuledScale
from dialgen.face.ruled.sizes import GAP_MINUTES, LEAST_WHITE, seen_mm
from dialgen.quantity import plain_number
from dialgen.stage import Array

LEAST_GAP_MM = 0.45
"""The least distance of marks that is told apart from near; common practice."""
FEWEST, MOST = 0.5, 1.5
"""How far from the published counts of numbered marks is clearly outside, as shares of them."""
JUSTIFIED = 0.5
"""Divisions down to the permitted error itself, half of what is chosen, are common practice."""

_TABLE_ENDS_MM = 200.0
_STEPS = 32
_HAIR = 1e-6


def marks_too_near(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where marks are too near to be told apart.

    With a reading distance the least is 4.4 minutes of arc (0.9 mm from 710 mm in MIL-STD-1472, from
    memory), without one 0.45 mm; and white at least three quarters of a mark wide in any case.
    """
    distance_mm = scale.look.distance
    floor_mm = LEAST_GAP_MM if distance_mm is None else seen_mm(GAP_MINUTES, distance_mm)
    gaps_mm = _gaps_mm(scale)
    widths = np.array([scale.sizes.width_mm(mark.rank) for mark in scale.marks])
    pairs = np.stack((widths[:-1], widths[1:]))
    needed_mm = np.maximum(floor_mm, pairs.mean(axis=0) + LEAST_WHITE * pairs.min(axis=0))
    short = needed_mm * (1 - _HAIR) - gaps_mm
    if not len(short) or short.max() <= 0:
        return
    worst = int(short.argmax())
    one, other = scale.marks[worst], scale.marks[worst + 1]
    place = ((one.x + other.x) / 2, (one.y + other.y) / 2)
    seen = f" from {distance_mm / 1000:g} m" if distance_mm is not None else ""
    yield Remark(
        f"the marks {_value(one)} and {_value(other)}{name} stand {gaps_mm[worst]:.2g} mm apart {at(place)}, "
        f"too near to tell apart{seen}; leave at least {needed_mm[worst]:.2g} mm",
        _density_key(scale, one, other),
        place=place,
    )


def numbered_count(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where far too few or too many numbered marks are asked for on an even scale.

    The counts for a length are those of GOST 27626-88; beyond its longest they grow with the length.
    """
    asked = scale.spec.numbered
    in_words = isinstance(asked, tuple) and any(entry.label is not None for entry in asked)
    if not asked or in_words or not _is_even(scale):
        return
    length_mm = float(abs(np.diff(scale.line.along(scale.ends_deg))[0]))
    least, most = wanted_count(length_mm)
    count = sum(mark.rank is Rank.NUMBERED for mark in scale.marks)
    upper = MOST * most * max(1.0, length_mm / _TABLE_ENDS_MM)
    if FEWEST * least <= count <= upper:
        return
    marks, much = "mark is" if count == 1 else "marks are", "few" if count < least else "many"
    yield Remark(
        f"{count} numbered {marks} too {much} for the line{name}, {length_mm:.0f} mm long; "
        f"number {least} to {most}",
        (*scale.dial.key, "numbered"),
    )


def marks_between(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark where more than nine marks stand between numbered ones (MIL-HDBK-759B)."""
    if scale.spec.divisions is None:
        return
    shown = [i for i, mark in enumerate(scale.marks) if mark.rank is Rank.NUMBERED]
    counts = [(high - low - 1, low, high) for low, high in pairwise(shown)]
    count, low, high = max(counts, default=(0, 0, 0))
    if count >= MOST_PARTS:
        between = f"{_value(scale.marks[low])} and {_value(scale.marks[high])}"
        yield Remark(
            f"{count} marks{name} stand between {between}; "
            f"let at most {MOST_PARTS - 1} stand between numbered ones, as no more are counted at a glance",
            (*scale.dial.key, "divisions"),
        )


def finer_than_class(face: Finished, scale: RuledScale, name: str) -> Iterator[Remark]:
    """Yield a remark on divisions asked for that are finer than the error which the class permits."""
    spec = scale.spec
    if spec.divisions is None or spec.accuracy_class is None or len(scale.marks) < 2:
        return
    step = least_step(spec)
    length_mm = float(abs(np.diff(scale.line.along(scale.ends_deg))[0]))
    least_mm = JUSTIFIED * least_gap_mm(spec, length_mm, 0.0) * (1 - _HAIR)
    gaps = zip(pairwise(scale.marks), _gaps_mm(scale).tolist(), strict=True)
    for (one, other), gap_mm in gaps:
        least = JUSTIFIED * step(one.value, other.value) * (1 - _HAIR)
        if other.value - one.value < least or gap_mm < least_mm:
            yield Remark(
                f"the division from {_value(one)} to {_value(other)}{name} is finer than class "
                f"{spec.accuracy_class:g} justifies, counted from the {fiducial(spec)}; "
                "divide more coarsely",
                (*scale.dial.key, "divisions"),
                place=(one.x, one.y),
            )
            return


def _gaps_mm(scale: RuledScale) -> Array:
    angles = np.array([mark.angle_deg for mark in scale.marks])
    return np.asarray(np.abs(np.diff(scale.line.along(angles))))


def _is_even(scale: RuledScale) -> bool:
    """Return whether equal steps of value take about equal lengths all along."""
    spec = scale.spec
    if math.isinf(spec.end):
        return False
    values = np.linspace(spec.start, spec.end, _STEPS + 1)
    steps = np.abs(np.diff(scale.line.along(scale.dial.chain.angle(values))))
    return bool(steps.max() <= UNEVEN * steps.min())


def _density_key(scale: RuledScale, one: Mark, other: Mark) -> Key:
    """Return the key that says how near marks stand."""
    both = one.rank is other.rank is Rank.NUMBERED
    name = "numbered" if both else "gap" if scale.spec.divisions is None else "divisions"
    return (*scale.dial.key, name)


def _value(mark: Mark) -> str:
    return plain_number(mark.value)
