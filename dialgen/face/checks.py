"""Marks that cannot be drawn: where the pointer misses the line, or off the plate, or out of order."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

import numpy as np

from dialgen.dialfile.models import Scale
from dialgen.drawing import Point
from dialgen.errors import InputError, Key, NoSuchValue
from dialgen.face.plate import Outliner
from dialgen.geometry.lines import ScaleLine
from dialgen.stage import Array


def check_meets(line: ScaleLine, angles: Array, values: Sequence[float], spec: Scale, key: Key) -> None:
    """Refuse values at which the pointer does not meet the scale line.

    Raises:
        NoSuchValue: naming the first of them.
    """
    missed = np.flatnonzero(np.logical_not(line.meets(angles)))
    if len(missed):
        at = int(missed[0])
        raise NoSuchValue(
            f"the pointer at {values[at]:g} {spec.unit} ({angles[at]:.4g} degrees) does not meet the "
            "scale line; move the line, or end the scale before it",
            (*key, _line_key(spec)),
            (*key, "to"),
        )


def check_order(values: Sequence[float], angles: Sequence[float], key: Key) -> None:
    """Refuse marks whose angles do not follow each other as their values do.

    Raises:
        InputError: naming the first two.
    """
    rising = bool(angles) and angles[-1] > angles[0]
    for (value, here), (follower, there) in pairwise(zip(values, angles, strict=True)):
        if there == here or (there > here) != rising:
            raise InputError(
                f"the marks {value:g} and {follower:g} do not follow each other; the law must move one way, "
                "and marks must stand apart",
                (*key, "law"),
            )


def check_on_plate(
    plate: Outliner, values: Sequence[float], points: Sequence[Point], spec: Scale, key: Key
) -> None:
    """Refuse marks whose points lie off the plate.

    Raises:
        InputError: naming the first of them.
    """
    for value, (x, y) in zip(values, points, strict=True):
        if not plate.holds((x, y)):
            raise InputError(
                f"the mark at {value:g} {spec.unit} would lie at {x:.4g}, {y:.4g}, off the plate; "
                "make the plate larger or move the scale line",
                (*key, _line_key(spec)),
                ("plate", "size"),
            )


def _line_key(spec: Scale) -> str:
    return "line" if spec.line is not None else "radius"
