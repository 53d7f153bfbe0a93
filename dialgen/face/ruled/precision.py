"""What a scale's class justifies: no division finer than twice the permitted error.

ASME B40.100 ties the smallest graduation to twice the permitted error; the fiducial values are those
of IEC 60051-1.
"""

from __future__ import annotations

import math
from collections.abc import Callable

import numpy as np

from dialgen.dial import ScaleDial
from dialgen.dialfile.models import Fiducial, Movement, Scale

_GRADUATION = 2.0
_MOVING_IRON = "moving iron"
_BLANK_SHARE = 0.15
_AT_REST = 0.0025

LeastStep = Callable[[float, float], float]
"""The least step of value that is justified between two values."""


def fiducial(scale: Scale) -> Fiducial:
    """Return what the class counts from: what the file says, or the limit, or the length without one."""
    return scale.fiducial or (Fiducial.LENGTH if math.isinf(scale.end) else Fiducial.LIMIT)


def fiducial_value(scale: Scale) -> float:
    """Return the fiducial value of a scale whose class counts from its limit.

    The upper limit of the effective range; where zero lies inside, both limits together without
    their signs (EN 60051, as quoted by a maker).
    """
    low, high = scale.effective or (scale.start, scale.end)
    return abs(low) + abs(high) if low < 0 < high else max(abs(low), abs(high))


def least_step(scale: Scale) -> LeastStep:
    """Return the least justified step, as a function of where on the scale it is taken."""
    share = _GRADUATION * (scale.accuracy_class or 0.0) / 100
    if not share:
        return _any_step
    match fiducial(scale):
        case Fiducial.LIMIT:
            step = share * fiducial_value(scale)
            return lambda low, high: step
        case Fiducial.VALUE:
            return lambda low, high: share * min(abs(low), abs(high))
        case Fiducial.LENGTH:
            return _any_step


def least_gap_mm(scale: Scale, length_mm: float, gap_mm: float) -> float:
    """Return the least distance between marks: the given one, or what a class by length justifies."""
    if scale.accuracy_class is None or fiducial(scale) is not Fiducial.LENGTH:
        return gap_mm
    return max(gap_mm, _GRADUATION * scale.accuracy_class / 100 * length_mm)


def _any_step(low: float, high: float) -> float:
    return 0.0


def blank_from_zero(scale: ScaleDial, movement: Movement) -> Callable[[float], bool]:
    """Return which values of a scale are left without marks of its own accord.

    A moving iron scarcely moves at the bottom of its scale: that is left unmarked below 15 percent
    unless readings reach there or the file gives an effective range (common practice).
    """
    spec = scale.spec
    seen = scale.wiring is None or spec.effective is not None
    if movement.kind != _MOVING_IRON or seen or spec.start != 0 or math.isinf(spec.end):
        return lambda value: False
    first = _BLANK_SHARE * spec.end
    low, high = sorted(scale.chain.angle(np.array([0.0, first])).tolist())
    hair = _AT_REST * (high - low)
    if any(low + hair < point.nominal_deg < high for point in scale.correction.points):
        return lambda value: False
    return lambda value: 0 < value < first
