"""The chain of one scale: from a value on the face to the pointer's angle, and back.

    face value --law--> signal --circuit--> drive --response--> deflection --correction--> angle

The links are `Stage`s; this composes them, keeps every array within each link's domain, and turns
what does not fit into an error that names the value.  Nothing yields NaN, nothing is clamped.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from dialgen.errors import NoSuchValue
from dialgen.stage import EVERYWHERE, Array, Span, Stage

_BLOCK = 8192
_GRAIN = 1e-12
_AT_STOP = 1e-9

quietly = np.errstate(over="ignore", divide="ignore", invalid="ignore")
"""A step too large for a double comes out infinite or NaN, which is refused with the value named."""


@dataclass(frozen=True, slots=True)
class Link:
    """One stage of a chain, and the size of its results over the scale, for judging rounding."""

    stage: Stage
    size: float


@dataclass(frozen=True, slots=True, eq=False)
class Chain:
    """Links from value to angle, in order; drive is what leaves the ``drive_after``-th of them.

    Args:
        links: value to angle.
        drive_after: how many links lead to the drive; None where the chain was observed as a
            whole, and the deflection stands for the drive.
        rest_deg, full_deg: the pointer's nominal ends.
        stops_deg: how far it can swing.
        unit: the scale's unit, for messages.
    """

    links: tuple[Link, ...]
    drive_after: int | None
    rest_deg: float
    full_deg: float
    stops_deg: Span
    unit: str

    def angle(self, value: Array) -> Array:
        """Return the pointer's angle in degrees at each value.

        Raises:
            NoSuchValue: a value outside the law's domain, or whose angle is beyond the stops.
        """
        return _in_blocks(self._angle, value)

    def _angle(self, value: Array) -> Array:
        angle_deg = self._forward(value, len(self.links))
        low, high = self.stops_deg
        if _within(angle_deg, (low, high)):
            return angle_deg
        # A scale may end at a stop: what lies a hair beyond it by rounding stands at it.
        hair = _AT_STOP * abs(self.full_deg - self.rest_deg)
        bad = (angle_deg < low - hair) | (angle_deg > high + hair)
        if bad.any():
            first = int(np.flatnonzero(bad)[0])
            raise NoSuchValue(
                f"{self._named(value.flat[first])} would stand at {angle_deg.flat[first]:.4g} degrees, "
                f"beyond the stops {low:g} and {high:g}; "
                "change the range, or the stops if the pointer swings farther",
                ("movement", "stops"),
            )
        return np.clip(angle_deg, low, high)

    def value(self, angle_deg: Array) -> Array:
        """Return the value shown at each angle.

        Raises:
            NoSuchValue: an angle beyond the stops, or where the scale has no value.
        """
        return _in_blocks(self._value, angle_deg)

    def _value(self, angle_deg: Array) -> Array:
        low, high = self.stops_deg
        outside = ~((angle_deg >= low) & (angle_deg <= high))
        if outside.any():
            raise NoSuchValue(
                f"{angle_deg[outside][0]:.6g} degrees is beyond the stops {low:g} and {high:g}; "
                "give an angle that the pointer can take",
                ("movement", "stops"),
            )
        step = angle_deg
        for link in reversed(self.links):
            step = self._back(link, step, angle_deg)
        return step

    def drive(self, value: Array) -> Array:
        """Return the drive (1 = full-deflection current), or the deflection of an observed scale."""
        if self.drive_after is None:
            return (self.angle(value) - self.rest_deg) / (self.full_deg - self.rest_deg)
        count = self.drive_after
        return _in_blocks(lambda values: self._forward(values, count), value)

    @quietly
    def _forward(self, value: Array, count: int) -> Array:
        step: Array = value
        size: float | Array | None = None
        for link in self.links[:count]:
            low, high = link.stage.domain
            if link.stage.domain is not EVERYWHERE and not _within(step, (low, high)):
                # A hair beyond the domain is the rounding of the links before, as a drive of -1e-17; of
                # a value itself, that of the way back to it from its angle.
                hair = _GRAIN * (_finite_size(step) if size is None else size)
                outside = ~((step >= low - hair) & (step <= high + hair))
                if outside.any():
                    raise self._refusal(value, outside)
                step = np.clip(step, low, high)
            step, size = link.stage.forward(step), link.size
        if not np.isfinite(step).all():
            raise self._refusal(value, ~np.isfinite(step))
        return step

    @quietly
    def _back(self, link: Link, step: Array, angle_deg: Array) -> Array:
        low, high = link.stage.image
        if link.stage.image is not EVERYWHERE and not _within(step, (low, high)):
            # A hair beyond the last possible result is the rounding of the links already undone.
            hair = _GRAIN * link.size
            outside = ~((step >= low - hair) & (step <= high + hair))
            if outside.any():
                raise NoSuchValue(
                    f"no value of the scale stands at {angle_deg[outside][0]:.6g} degrees; "
                    "give an angle nearer the scale"
                )
            step = np.clip(step, low, high)
        result = link.stage.inverse(step)
        if np.isnan(result).any():
            raise NoSuchValue(
                f"no value of the scale stands at {angle_deg[np.isnan(result)][0]:.6g} degrees; "
                "give an angle nearer the scale"
            )
        return result

    def _refusal(self, value: Array, bad: NDArray[np.bool_]) -> NoSuchValue:
        first = value[bad].flat[0]
        if math.isnan(first):
            return NoSuchValue("a value that is not a number has no angle; give a number")
        return NoSuchValue(
            f"{self._named(first)} is outside what the law and the circuit can show; give another value"
        )

    def _named(self, value: float) -> str:
        return f"{value:.6g} {self.unit}".rstrip()


def _finite_size(step: Array) -> Array:
    return np.where(np.isfinite(step), np.abs(step), 0.0)


def _within(step: Array, span: Span) -> bool:
    return bool(step.size == 0 or (step.min() >= span[0] and step.max() <= span[1]))


def _in_blocks(function: Callable[[Array], Array], values: Array) -> Array:
    """Return the function of a long array block by block, so that every block stays in the cache."""
    flat = np.atleast_1d(np.asarray(values, dtype=float))
    if flat.size <= _BLOCK:
        return function(flat).reshape(np.shape(values))
    flat = flat.reshape(-1)
    out = np.empty_like(flat)
    for start in range(0, flat.size, _BLOCK):
        out[start : start + _BLOCK] = function(flat[start : start + _BLOCK])
    return out.reshape(np.shape(values))
