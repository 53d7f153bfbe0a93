"""Sensors of temperature on a face: their laws hold in °C, the face may be in °C, °F or K."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from dialgen.errors import InputError
from dialgen.quantity import ZERO_CELSIUS_K, meant_degree, shown
from dialgen.stage import Array, Span, Stage

_GRAIN = 9
"""To how many decimals a range is turned to the face's degrees, so that 3.15 K is not below -270 °C."""


@dataclass(frozen=True, slots=True)
class Degrees:
    """A face's degrees: (value - zero)·size is the temperature in °C."""

    zero: float
    size: float

    def celsius(self, value: Array) -> Array:
        """Return temperatures in °C."""
        return (value - self.zero) * self.size

    def face(self, celsius: Array) -> Array:
        """Return temperatures as they stand on the face."""
        return celsius / self.size + self.zero


DEGREES = {"°C": Degrees(0.0, 1.0), "°F": Degrees(32.0, 5.0 / 9.0), "K": Degrees(ZERO_CELSIUS_K, 1.0)}
"""The units that a scale of temperature may have; exact by definition (SI Brochure, 9th edition)."""


@dataclass(frozen=True, slots=True)
class _OnFace:
    """A sensor's law seen from a face: ``inner`` goes from °C to the signal."""

    degrees: Degrees
    inner: Stage
    domain: Span

    @property
    def image(self) -> Span:
        return self.inner.image

    def forward(self, x: Array) -> Array:
        return self.inner.forward(self.degrees.celsius(x))

    def inverse(self, y: Array) -> Array:
        return self.degrees.face(self.inner.inverse(y))


def on_face(inner: Stage, span: Span, unit: str, sensor: str) -> Stage:
    """Return a sensor's law for a scale that runs over ``span`` in ``unit``.

    Args:
        inner: from °C to the signal.
        span: the scale's ends, in its own degrees.
        unit: the scale's unit.
        sensor: what it is, for messages.

    Raises:
        InputError: the unit is none of temperature, or the scale leaves the sensor's range; keys are
            relative to the scale.
    """
    if unit not in DEGREES:
        # A face is lettered with the unit as it stands, so near misses are not read here either.
        found = f"not in {shown(unit)}" if unit else "not without a unit"
        raise InputError(
            f'{sensor} has its scale in °C, °F or K, {found}; write unit = "{meant_degree(unit) or "degC"}"',
            ("unit",),
        )
    degrees = DEGREES[unit]
    low, high = (round(end, _GRAIN) for end in degrees.face(np.array(inner.domain)).tolist())
    _check_within(span, (low, high), unit, sensor)
    return _OnFace(degrees, inner, (low, high))


def _check_within(span: Span, domain: Span, unit: str, sensor: str) -> None:
    low, high = domain
    reach = f"{sensor} shows {low:.6g} to {high:.6g} {unit}"
    if not low <= span[0] <= high:
        raise InputError(
            f"{reach}, and the scale begins at {span[0]:.6g}; begin it within that", ("from",), ("law",)
        )
    if not low <= span[1] <= high:
        raise InputError(
            f"{reach}, and the scale ends at {span[1]:.6g}; end it within that", ("to",), ("law",)
        )
