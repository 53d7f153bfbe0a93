"""No circuit at all: the movement takes the signal as it comes."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.circuit.design import COIL, Design
from dialgen.circuit.terminals import Circuit, Terminals
from dialgen.errors import InputError
from dialgen.stage import Affine, Stage

FACE_VALUE = "a bare value of the scale"
FACE_END = "a bare value of the scale, or inf"


@dataclass(frozen=True, slots=True, kw_only=True)
class Direct(Circuit):
    """Deflection in proportion to the signal, from the resting value to the full one."""

    kind: ClassVar[str] = "direct"
    takes: ClassVar[str | None] = None
    full: Annotated[float | None, FACE_END] = None
    rest: Annotated[float | None, FACE_VALUE] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return (signal - r)/(signal at full - r), r being the signal at rest.

        Raises:
            InputError: the signals at rest and at full are one, or not finite.
        """
        full = terminals.full_value if self.full is None else self.full
        rest_signal = terminals.rest_signal if self.rest is None else terminals.signal(self.rest)
        if not math.isfinite(rest_signal):
            raise InputError(f"there is no signal at rest, {self.rest:g}; set rest within the law", ("rest",))
        width = terminals.signal(full) - rest_signal
        if width == 0:
            raise InputError(
                f"the pointer rests where it should stand full, at {full:g}; set full or rest",
                ("full",),
                ("rest",),
            )
        if not math.isfinite(width):
            raise InputError(f"there is no finite signal at full deflection, {full:g}; set full", ("full",))
        return Affine(1.0 / width, -rest_signal / width)

    def design(self, terminals: Terminals) -> Design:
        """Return a design without parts: there is nothing to build."""
        full = terminals.full_value if self.full is None else self.full
        coil = terminals.coil
        ohms = {} if coil.resistance is None else {COIL: coil.resistance}
        return Design(kind=self.kind, range=terminals.signal(full), unit=terminals.unit or "", ohms=ohms)
