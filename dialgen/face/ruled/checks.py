"""Marks that cannot be drawn: where the pointer misses the line, or off the plate, or out of order."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np

from dialgen.dialfile.models import Scale
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


def check_order(values: Sequence[float], angles: Array, key: Key) -> None:
    """Refuse marks whose angles do not follow each other as their values do.

    Raises:
        InputError: naming the first two.
    """
    steps = angles[1:] - angles[:-1]
    turned = np.flatnonzero(steps <= 0 if angles.size and angles[-1] > angles[0] else steps >= 0)
    if len(turned):
        at = int(turned[0])
        if angles[at] == angles[at + 1]:
            raise InputError(
                f"the marks {values[at]:g} and {values[at + 1]:g} both stand at {angles[at]:.4g} degrees, as "
                "the pointer does not move between them; leave one out",
                (*key, "divisions"),
                (*key, "numbered"),
            )
        raise InputError(
            f"the marks {values[at]:g} and {values[at + 1]:g} do not follow each other; "
            "the law must move one way, and marks must stand apart",
            (*key, "law"),
        )


def check_on_plate(
    plate: Outliner, values: Sequence[float], points: tuple[Array, Array], spec: Scale, key: Key
) -> None:
    """Refuse marks whose points, given by their x and y, lie off the plate.

    Raises:
        InputError: naming the first of them.
    """
    off = np.flatnonzero(np.logical_not(plate.holds(*points)))
    if len(off):
        at = int(off[0])
        x, y = points[0][at], points[1][at]
        raise InputError(
            f"the mark at {values[at]:g} {spec.unit} would lie at {x:.4g}, {y:.4g}, off the plate; "
            "make the plate larger or move the scale line",
            (*key, _line_key(spec)),
            ("plate", "size"),
        )


def _line_key(spec: Scale) -> str:
    return "line" if spec.line is not None else "radius"
