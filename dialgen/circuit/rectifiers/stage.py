"""The stage of a rectifier instrument: from RMS volts at its terminals to the coil's mean current."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from dialgen.circuit.rectifiers.conduction import Curve
from dialgen.stage import Array, Span


@dataclass(frozen=True, slots=True, eq=False)
class RectifierStage:
    """Drive by RMS volts, which have no sign.

    Args:
        curve: the mean current of a pulse by the peak that drives it.
        into: that peak by a volt RMS at the terminals.
        gain: drive by the mean current of a pulse.
        most_v: the largest signal.
    """

    """What to tell of a signal that is not in the domain."""

    curve: Curve
    into: float
    gain: float
    most_v: float

    @property
    def domain(self) -> Span:
        """Nothing to the largest signal."""
        return (0.0, self.most_v)

    @property
    def image(self) -> Span:
        """Rest to what the largest signal drives."""
        return (0.0, float(self.forward(np.array(self.most_v))))

    def forward(self, x: Array) -> Array:
        """Return the drive; NaN for what is no RMS voltage here."""
        within = (x >= 0) & (x <= self.most_v)
        return np.where(within, self.curve.mean_a(np.where(within, x, 0.0) * self.into) * self.gain, np.nan)

    def inverse(self, y: Array) -> Array:
        """Return the least voltage of each drive."""
        return self.curve.peak_v(y / self.gain) / self.into
