"""The departure of one movement from its nominal angles, from readings taken on it."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise

from dialgen.errors import InputError
from dialgen.geometry.monotone import through
from dialgen.stage import Affine, Stage

_AT_REST = 0.0025
_FEW = 0.25
_SAME_POINT = 1e-9

NO_DEPARTURE: Stage = Affine(1.0)


@dataclass(frozen=True, slots=True)
class Point:
    """Readings at one point, averaged: where the pointer should and did stand, in degrees.

    ``first`` is the index of the first of them among the readings given.
    """

    nominal_deg: float
    observed_deg: float
    spread_deg: float
    count: int
    first: int = 0


@dataclass(frozen=True, slots=True, kw_only=True)
class Correction:
    """The correction stage (nominal to observed angle), and what stands behind it."""

    stage: Stage
    points: tuple[Point, ...] = ()
    remarks: tuple[str, ...] = ()


def from_readings(readings: Sequence[tuple[float, float]], rest_deg: float, full_deg: float) -> Correction:
    """Return the correction through (nominal angle, observed angle) readings, in degrees.

    Readings at one point are averaged.  The rest point is added as assumed unless a reading stands
    within 0.25 % of the span of it.  Beyond the outermost points the departure is held constant.

    Raises:
        InputError: observed angles that do not move strictly the pointer's way; its key is the index
            of the reading to look at first.
    """
    if not readings:
        return Correction(stage=NO_DEPARTURE)
    span = abs(full_deg - rest_deg)
    points = _averaged(readings, _SAME_POINT * span)
    remarks = list(_rest_remarks(points, rest_deg, span))
    if points[-1].nominal_deg - points[0].nominal_deg < _FEW * span:
        remarks.append("the readings cover less than a quarter of the span; take more, up to full scale")
    knots = list(points)
    if not any(abs(p.nominal_deg - rest_deg) <= _AT_REST * span for p in points):
        knots.append(Point(rest_deg, rest_deg, 0.0, 0))
    knots.sort(key=lambda p: p.nominal_deg)
    _check_order(knots)
    stage = through([p.nominal_deg for p in knots], [p.observed_deg for p in knots], ends=1.0)
    return Correction(stage=stage, points=points, remarks=tuple(remarks))


def _averaged(readings: Sequence[tuple[float, float]], same_deg: float) -> tuple[Point, ...]:
    groups: list[list[int]] = []
    for i in sorted(range(len(readings)), key=lambda i: readings[i]):
        if groups and readings[i][0] - readings[groups[-1][0]][0] <= same_deg:
            groups[-1].append(i)
        else:
            groups.append([i])
    return tuple(_mean(group, readings) for group in groups)


def _mean(group: Sequence[int], readings: Sequence[tuple[float, float]]) -> Point:
    seen = [readings[i][1] for i in group]
    mean = math.fsum(seen) / len(seen)
    return Point(readings[group[0]][0], mean, max(seen) - min(seen), len(seen), min(group))


def _rest_remarks(points: Sequence[Point], rest_deg: float, span_deg: float) -> Sequence[str]:
    near = [p for p in points if abs(p.nominal_deg - rest_deg) <= _AT_REST * span_deg]
    if not near:
        return (f"no reading at rest: the pointer is assumed to rest at {rest_deg:g} degrees as written",)
    off = max(abs(p.observed_deg - p.nominal_deg) for p in near)
    if off > _AT_REST * span_deg:
        return (f"the pointer rests {off:.2f} degrees off zero; set the zero and repeat the readings",)
    return ()


def _check_order(knots: Sequence[Point]) -> None:
    for here, there in pairwise(knots):
        if not there.observed_deg > here.observed_deg:
            culprit = there if there.count else here
            raise InputError(
                f"the pointer was seen at {here.observed_deg:g} and {there.observed_deg:g} degrees where it "
                f"should stand at {here.nominal_deg:g} and {there.nominal_deg:g}; readings must move "
                "strictly the pointer's way",
                (culprit.first,),
            )
