"""Laws known only by points: a table of value and signal, and what a finished circuit was seen to do."""

from __future__ import annotations

import math
from dataclasses import dataclass
from itertools import pairwise
from typing import Annotated, ClassVar, Literal

import numpy as np

from dialgen.errors import InputError
from dialgen.geometry.monotone import Monotone, through
from dialgen.quantity import Amount
from dialgen.stage import Array, Span, Stage

SIGNAL_POINTS = "points of [value, signal]"
FACE_POINTS = "points of [value, position]"
CALIBRATION = "points of [temperature, resistance]"


@dataclass(frozen=True, slots=True, kw_only=True)
class Table:
    """The signal at given face values, interpolated so that it moves strictly one way.

    Signals are numbers in the SI unit that the circuit takes, or all in one unit of their own.
    """

    kind: ClassVar[str] = "table"
    points: Annotated[tuple[tuple[float, float | Amount], ...], SIGNAL_POINTS] = ()

    def __post_init__(self) -> None:
        units = {signal.unit for _, signal in self.points if isinstance(signal, Amount)}
        bare = any(not isinstance(signal, Amount) for _, signal in self.points)
        if len(units) + bare > 1:
            raise InputError("the signals are in several units; give all of them in one", ("points",))
        self._curve()

    @property
    def takes_face_values(self) -> bool:
        """Always: the points hold the numbers on the face."""
        return True

    def signal_unit(self, unit: str) -> str | None:
        """Return the points' unit, or None where they are bare."""
        _, signal = self.points[0]
        return signal.unit if isinstance(signal, Amount) else None

    def _curve(self) -> Monotone:
        signals = [s.value if isinstance(s, Amount) else s for _, s in self.points]
        try:
            return through([value for value, _ in self.points], signals)
        except InputError as error:
            raise error.under("points") from None

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the curve through the points, going on along its end slopes."""
        return self._curve()

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0 where the signals reach it, else None."""
        signals = self._curve().values
        return 0.0 if signals.min() <= 0 <= signals.max() else None

    def ends(self) -> Span:
        """Return the first and last value of the points."""
        return self.points[0][0], self.points[-1][0]


@dataclass(frozen=True, slots=True, kw_only=True)
class Observed:
    """Where the pointer of the finished circuit was seen to stand, in place of circuit and movement."""

    kind: ClassVar[str] = "observed"
    points: Annotated[tuple[tuple[float, float], ...], FACE_POINTS] = ()
    position: Literal["angle", "old"] = "angle"

    def curve(self, positions_deg: tuple[float, ...], half: float | None) -> Stage:
        """Return the stage from face value to pointer angle.

        Args:
            positions_deg: the points' positions as angles.
            half: the half-scale value of an ohms circuit beside it, in face units; then the curve
                is interpolated in half/(half + value), which is even where the scale crowds.

        Raises:
            InputError: points that are too few, out of order or not one way, or a last value of
                infinity with no half-scale value to interpolate by.
        """
        values = [value for value, _ in self.points]
        try:
            if half is None:
                if values and math.isinf(values[-1]):
                    raise InputError("a point at inf needs an ohms circuit with half beside it; add one")
                return through(values, positions_deg)
            if any(not b > a for a, b in pairwise(values)):
                raise InputError("the points must stand in ascending order of value; sort them")
            if values[0] <= -half:
                raise InputError(
                    f"an ohms circuit with half {half:g} shows nothing at {values[0]:g}; leave it out"
                )
            shares = [half / (half + value) for value in values]
            return _OhmsWise(through(shares[::-1], positions_deg[::-1]), half)
        except InputError as error:
            raise error.under("points") from None

    def ends(self) -> Span:
        """Return the first and last value of the points."""
        return self.points[0][0], self.points[-1][0]


@dataclass(frozen=True, slots=True)
class _OhmsWise:
    """A curve in half/(half + value) seen as one in the value itself."""

    inner: Monotone
    half: float

    @property
    def domain(self) -> Span:
        first, last = self.inner.domain
        return (self._value(last), self._value(max(first, 0.0)))

    @property
    def image(self) -> Span:
        # Nothing stands beyond infinity.
        limit = float(self.inner.forward(np.array(max(self.inner.domain[0], 0.0))))
        falls = self.inner.values[-1] < self.inner.values[0]
        low, high = self.inner.image
        return (low, limit) if falls else (limit, high)

    def _value(self, share: float) -> float:
        return (
            math.inf if share == 0 else self.half / share - self.half if math.isfinite(share) else -self.half
        )

    def forward(self, x: Array) -> Array:
        return self.inner.forward(self.half / (self.half + x))

    def inverse(self, y: Array) -> Array:
        share = self.inner.inverse(y)
        with np.errstate(divide="ignore"):
            return np.where(share <= 1e-15, math.inf, self.half / np.maximum(share, 1e-15) - self.half)
