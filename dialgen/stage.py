"""What every stage of the chain is: a strictly monotone function with an inverse.

Why this shape.  A value becomes an angle in four steps (law, circuit, response, correction).  Each
step is described in the dial file by what a maker knows of it (a battery, a shunt, some readings)
and turned once, when the dial is loaded, into a `Stage`: two pure functions on arrays and the
intervals they hold on.  The chain composes stages and knows nothing else about them.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Protocol

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
Span = tuple[float, float]
"""The closed interval from the first to the second number."""

EVERYWHERE: Span = (-math.inf, math.inf)
POSITIVE: Span = (0.0, math.inf)


class Stage(Protocol):
    """A strictly monotone function of arrays of any shape, and its inverse."""

    @property
    def domain(self) -> Span:
        """The closed interval that `forward` may be asked for."""
        ...

    @property
    def image(self) -> Span:
        """The closed interval that `inverse` may be asked for."""
        ...

    def forward(self, x: Array) -> Array:
        """Return the step taken towards the angle."""
        ...

    def inverse(self, y: Array) -> Array:
        """Return the step taken back towards the value."""
        ...


@dataclass(frozen=True, slots=True)
class Affine:
    """y = offset + gain·x, with a gain that is not zero."""

    gain: float
    offset: float = 0.0
    domain: Span = EVERYWHERE
    image: Span = EVERYWHERE

    def forward(self, x: Array) -> Array:
        """Return offset + gain·x."""
        return x * self.gain + self.offset

    def inverse(self, y: Array) -> Array:
        """Return (y - offset)/gain."""
        return (y - self.offset) / self.gain
