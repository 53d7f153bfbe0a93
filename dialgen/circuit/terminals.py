"""What a circuit needs to know of the coil behind it and of the scale before it."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import ClassVar, Protocol

from dialgen.circuit.design import Design
from dialgen.errors import InputError, Remark
from dialgen.quantity import Amount, engineered
from dialgen.stage import Stage

CURRENT_KEY = ("movement", "current")
RESISTANCE_KEY = ("movement", "resistance")


@dataclass(frozen=True, slots=True, kw_only=True)
class Coil:
    """The movement as a two-terminal part; either figure may be unknown until it is needed."""

    current: float | None = None
    resistance: float | None = None

    def current_a(self, purpose: str) -> float:
        """Return the full-deflection current, for a purpose that may go on to ask for the resistance.

        Raises:
            InputError: it is not given; the message says what needs it, and names both figures
                where neither is.
        """
        if self.current is None and self.resistance is None:
            raise InputError(
                f"{purpose} needs the full-deflection current and the coil's resistance; "
                'add current = "1 mA" and resistance = "75 ohm"',
                CURRENT_KEY,
                RESISTANCE_KEY,
            )
        if self.current is None:
            raise InputError(
                f'{purpose} needs the full-deflection current; add current = "1 mA"', CURRENT_KEY
            )
        return self.current

    def resistance_ohm(self, purpose: str) -> float:
        """Return the resistance at the terminals; raises as `current_a` does."""
        if self.resistance is None:
            raise InputError(
                f'{purpose} needs the coil\'s resistance; add resistance = "75 ohm"', RESISTANCE_KEY
            )
        return self.resistance


@dataclass(frozen=True, slots=True, kw_only=True)
class Terminals:
    """What a circuit sees: the coil on one side, the law's signals on the other.

    Args:
        coil: the movement.
        signal: the law, from a bare face value to the signal.
        rest_signal: the signal where nothing is applied, or that of the scale's start.
        full_value: the face value at the scale's end.
        unit: the SI unit of the signal.
    """

    coil: Coil
    signal: Callable[[float], float]
    rest_signal: float
    full_value: float
    unit: str | None

    def range(self, given: Amount | None, unit: str, *, built: bool = False) -> float:
        """Return the range that is given, or the signal at the scale's end, in ``unit``.

        Of what was built already only the size of it counts: a scale may run backwards, as one of pH
        does, and its marks follow what was built.

        Raises:
            InputError: none is given, and the signal at the scale's end is not finite, or not above
                nothing, so that it is no range.
        """
        if given is not None:
            return given.value
        signal = self.signal(self.full_value)
        if not abs(signal) < math.inf:
            raise InputError("the scale has no finite end to take the range from; give range", ("range",))
        if built and signal:
            return abs(signal)
        if signal <= 0:
            there, most = (engineered(each, unit) for each in (signal, -signal))
            mend = f'write range = "{most}"' if signal else "give range"
            raise InputError(
                f"the signal at the scale's end is {there}, and a range is above 0; {mend}, "
                "what drives the pointer to full deflection",
                ("range",),
            )
        return signal


class Circuit(Protocol):
    """A circuit as the dial file states it; `dialgen.circuit.kinds` has the table of them."""

    kind: ClassVar[str]
    takes: ClassVar[str | None]
    least: ClassVar[float] = -math.inf
    """The least signal that a scale may show through it."""

    def stage(self, terminals: Terminals) -> Stage:
        """Return the circuit as a stage from signal to drive, with its parts as built.

        Raises:
            InputError: it cannot be built; keys are relative to the circuit's table, or start with
                "movement" where the movement's own keys are at fault.
        """
        ...

    def design(self, terminals: Terminals) -> Design:
        """Return its parts and how it works with any values of them; raises as `stage` does."""
        ...

    def remarks(self, terminals: Terminals) -> tuple[Remark, ...]:
        """Return what was assumed or is out of the way, of a circuit that can be built.

        Keys are relative to the circuit's table.
        """
        return ()
