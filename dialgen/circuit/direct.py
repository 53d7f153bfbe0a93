"""No circuit at all: the movement takes the signal as it comes."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.circuit.design import COIL, Case, Design, Fact, Load, Ohms, Working
from dialgen.circuit.terminals import Circuit, Coil, Terminals
from dialgen.errors import InputError
from dialgen.quantity import engineered
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
        """Return a design without parts: there is nothing to build.

        Its one case is the bare coil on amperes or volts, where its resistance is known.
        """
        full = terminals.signal(terminals.full_value if self.full is None else self.full)
        unit, coil_ohm = terminals.unit or "", terminals.coil.resistance
        bare = unit in _CURRENT_A and coil_ohm is not None and 0 < full < math.inf
        return Design(
            kind=self.kind,
            range=full,
            unit=unit,
            ohms={} if coil_ohm is None else {COIL: coil_ohm},
            cases=(Case(name=engineered(full, unit), signal=full, work=_worker(unit, full, coil_ohm or 0.0)),)
            if bare
            else (),
            facts=_between(terminals.coil, unit, abs(full)),
        )


_NEAR_OWN = 0.01


def _between(coil: Coil, unit: str, full: float) -> tuple[Fact, ...]:
    """Return the movement's own full deflection where the scale's is another."""
    factor = {"A": 1.0, "V": coil.resistance}.get(unit)
    if coil.current is None or factor is None:
        return ()
    own = coil.current * factor
    if abs(full - own) <= _NEAR_OWN * own:
        return ()
    note = f"not {engineered(full, unit)}: an amplifier or sender stands between, and is not designed here"
    return (Fact(name="the movement takes", value=own, unit=unit, note=note),)


_CURRENT_A: Mapping[str, Callable[[float, float], float]] = {
    "A": lambda signal, ohms: signal,
    "V": lambda signal, ohms: signal / ohms,
}
"""The coil's current by the unit of the signal, of signal and resistance."""


def _worker(unit: str, full: float, coil_ohm: float) -> Callable[[Ohms, float], Working]:
    full_a = _CURRENT_A[unit](full, coil_ohm)

    def work(ohms: Ohms, signal: float) -> Working:
        load = Load(_CURRENT_A[unit](signal, ohms[COIL]), ohms[COIL])
        return Working(load.current_a / full_a, {COIL: load}, load.voltage_v)

    return work
