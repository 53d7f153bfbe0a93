"""Platinum resistance thermometers of 100 Ω at 0 °C."""

from __future__ import annotations

from dataclasses import dataclass
from typing import ClassVar

import numpy as np

from dialgen.geometry.temperature import on_face
from dialgen.stage import Array, Span, Stage

_R0_OHM = 100.0
_A, _B, _C = 3.9083e-3, -5.775e-7, -4.183e-12
"""Callendar and Van Dusen's constants in 1/°C, 1/°C² and 1/°C⁴; IEC 60751:2008."""

_RANGE_C: Span = (-200.0, 850.0)
_NEWTON_STEPS = 4
"""Enough from -200 °C up: the quadratic's root is 2.4 °C off there, and each step squares the miss."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Pt100:
    """The resistance of an industrial platinum thermometer, by IEC 60751, from -200 to 850 °C."""

    kind: ClassVar[str] = "pt100"

    @property
    def takes_face_values(self) -> bool:
        """Always: a unit of temperature has no prefix."""
        return True

    def signal_unit(self, unit: str) -> str | None:
        """Return ohms."""
        return "Ω"

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the thermometer over all of its range.

        Raises:
            InputError: the unit is none of temperature, or the scale leaves the range.
        """
        return on_face(_Platinum(), span, unit, "a Pt100")

    def zero(self, span: Span, unit: str) -> float | None:
        """Return None: no temperature in the range has no resistance."""
        return None


@dataclass(frozen=True, slots=True)
class _Platinum:
    """R0·(1 + A·t + B·t²), and below 0 °C R0·C·(t - 100)·t³ more; IEC 60751, from °C to ohms."""

    domain: Span = _RANGE_C

    @property
    def image(self) -> Span:
        low_ohm, high_ohm = self.forward(np.array(self.domain)).tolist()
        return low_ohm, high_ohm

    def forward(self, x: Array) -> Array:
        cold = np.minimum(x, 0.0)
        return np.asarray(_R0_OHM * (1.0 + x * (_A + x * _B) + _C * (cold - 100.0) * cold**3))

    def inverse(self, y: Array) -> Array:
        short = 1.0 - y / _R0_OHM
        # The form of the quadratic's root that loses no figures near 0 °C.
        t = -2.0 * short / (_A + np.sqrt(_A * _A - 4.0 * _B * short))
        cold = np.minimum(t, 0.0)
        for _ in range(_NEWTON_STEPS):
            miss = short + cold * (_A + cold * (_B + _C * (cold - 100.0) * cold))
            slope = _A + cold * (2.0 * _B + _C * (4.0 * cold - 300.0) * cold)
            cold = np.where(t < 0.0, cold - miss / slope, 0.0)
        return np.where(t < 0.0, cold, t)
