"""Glass electrodes: pH by Nernst's slope."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.quantity import TEMPERATURE, ZERO_CELSIUS_K, Amount
from dialgen.stage import Affine, Span, Stage

# Exact since 2019: SI Brochure, 9th edition, table 1.
_BOLTZMANN_J_K = 1.380649e-23
_AVOGADRO_PER_MOL = 6.02214076e23
_CHARGE_C = 1.602176634e-19
_GAS_J_MOL_K = _BOLTZMANN_J_K * _AVOGADRO_PER_MOL
_FARADAY_C_MOL = _CHARGE_C * _AVOGADRO_PER_MOL

_ROOM = Amount(ZERO_CELSIUS_K + 25.0, "K")


@dataclass(frozen=True, slots=True, kw_only=True)
class Nernst:
    """-(R·T·ln 10 / F)·(pH - isopotential), the volts of an ideal electrode: -59.159 mV per pH at 25 °C.

    The signal is 0 at the isopotential, whatever the temperature; a scale is true at one temperature.
    """

    kind: ClassVar[str] = "nernst"
    temperature: Annotated[Amount, TEMPERATURE] = _ROOM
    isopotential: float = 7.0

    @property
    def takes_face_values(self) -> bool:
        """Always: a pH has no prefix."""
        return True

    @property
    def slope_v(self) -> float:
        """The volts for one pH more, below zero."""
        return -_GAS_J_MOL_K * self.temperature.value * math.log(10.0) / _FARADAY_C_MOL

    def signal_unit(self, unit: str) -> str | None:
        """Return volts."""
        return "V"

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the straight line."""
        return Affine(self.slope_v, -self.slope_v * self.isopotential)

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0: the pointer rests at the isopotential."""
        return 0.0
