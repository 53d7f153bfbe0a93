"""Ohmmeters: the unknown in series with the coil and a cell, or across the coil."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated, ClassVar

import numpy as np

from dialgen.circuit.terminals import Terminals
from dialgen.errors import InputError
from dialgen.quantity import OHM_ABOVE, VOLT_ABOVE, Amount
from dialgen.stage import Array, Span, Stage


@dataclass(frozen=True, slots=True, kw_only=True)
class SeriesOhmmeter:
    """Full deflection at zero ohms, half of it where the unknown equals the inner resistance."""

    kind: ClassVar[str] = "series ohmmeter"
    takes: ClassVar[str | None] = "Ω"
    half: Annotated[Amount, OHM_ABOVE]
    battery: Annotated[Amount | None, VOLT_ABOVE] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return half/(half + signal), by Ohm's law with full deflection set at zero ohms.

        Raises:
            InputError: the battery cannot give full deflection through the half-scale resistance.
        """
        if self.battery and terminals.coil.current is not None:
            most_ohm = self.battery.value / terminals.coil.current
            if self.half.value > most_ohm * (1 + 1e-9):
                raise InputError(
                    f"{self.battery.value:g} V drives full deflection through at most {most_ohm:.6g} Ω, "
                    f"not {self.half.value:g} Ω; take a smaller half or a higher battery",
                    ("half",),
                    ("battery",),
                )
        return _SeriesStage(self.half.value)


@dataclass(frozen=True, slots=True, kw_only=True)
class ShuntOhmmeter:
    """Rest at zero ohms (a shorted coil), full deflection with nothing connected."""

    kind: ClassVar[str] = "shunt ohmmeter"
    takes: ClassVar[str | None] = "Ω"
    half: Annotated[Amount, OHM_ABOVE]
    battery: Annotated[Amount | None, VOLT_ABOVE] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return signal/(signal + half), by current division; ``battery`` is for the design of its feed."""
        return _ShuntStage(self.half.value)


@dataclass(frozen=True, slots=True)
class _SeriesStage:
    half_ohm: float

    @property
    def domain(self) -> Span:
        # Below zero ohms down to -half: a pointer beyond full scale, with the zero set too high.
        return (-self.half_ohm, math.inf)

    @property
    def image(self) -> Span:
        return (0.0, math.inf)

    def forward(self, x: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.half_ohm / (self.half_ohm + x)

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.half_ohm / y - self.half_ohm


@dataclass(frozen=True, slots=True)
class _ShuntStage:
    half_ohm: float

    @property
    def domain(self) -> Span:
        return (-self.half_ohm, math.inf)

    @property
    def image(self) -> Span:
        return (-math.inf, 1.0)

    def forward(self, x: Array) -> Array:
        with np.errstate(divide="ignore", invalid="ignore"):
            return np.where(np.isinf(x), 1.0, x / (x + self.half_ohm))

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.half_ohm * y / (1.0 - y)
