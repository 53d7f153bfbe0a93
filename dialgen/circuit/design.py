"""A circuit as it is built: its parts, and how it works with any values of them.

A `Design` is all that the bench needs to know of a circuit.  What a part warms to, what the nearest
bought value does to the reading, what a degree or a tolerance does: each is the same circuit worked
again with one value changed (`dialgen.parts`), so no circuit has formulas for these of its own.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass

Ohms = Mapping[str, float]
"""The resistance of every part by its name, the coil's own under `COIL`."""

COIL = "coil"


@dataclass(frozen=True, slots=True)
class Load:
    """What a resistance carries: amperes (RMS where it alternates), in ohms; infinite ohms carry nothing."""

    current_a: float
    ohms: float

    @property
    def voltage_v(self) -> float:
        """Ohm's law."""
        return self.current_a * self.ohms if math.isfinite(self.ohms) else 0.0

    @property
    def watts(self) -> float:
        """Joule's law."""
        return self.current_a * self.voltage_v


@dataclass(frozen=True, slots=True, eq=False)
class Working:
    """A circuit at one signal.

    Args:
        drive: the coil's mean current over that for full deflection.
        loads: what every part carries, by name.
        drop_v: the voltage across the instrument's terminals (RMS where it alternates).
    """

    drive: float
    loads: Mapping[str, Load]
    drop_v: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Part:
    """One resistor of a circuit, its ohms as designed or as the file gives them.

    Args:
        name: what it is called on the bench and in the picture.
        ohms: the exact value.
        built: the value measured on the part that was made, if the file gives it.
        given: whether the file states it, so that there is nothing to buy or to wind for the design.
        sums: the parts it stands for as a whole, such as the total of a tapped shunt.
        adjustable: whether it is a potentiometer, that is set and not made to a value.
    """

    name: str
    ohms: float
    built: float | None = None
    given: bool = False
    sums: tuple[str, ...] = ()
    adjustable: bool = False

    @property
    def is_made(self) -> bool:
        """Whether a resistor of this value is to be bought, found or wound."""
        return not (self.given or self.sums or self.adjustable) and 0 < self.ohms < math.inf


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class Case:
    """One range of a circuit: as designed, ``signal`` drives the movement fully.

    Args:
        name: the range as it is written, "40 A" or "×10".
        signal: in the unit of the design.
        work: how the circuit works with these ohms at such a signal.
        judged_at: where full deflection itself is set with an adjuster, the signal at which errors are
            looked for; None is at full deflection.
    """

    name: str
    signal: float
    work: Callable[[Ohms, float], Working]
    judged_at: float | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Fact:
    """Something a circuit has besides resistors: a burden, a cell's drift, an assumed diode."""

    name: str
    value: float
    unit: str
    note: str = ""


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class Design:
    """A circuit with everything the bench needs to know of it.

    Args:
        kind: the circuit's kind.
        range: the signal of full deflection; an ohmmeter's half-scale resistance.
        unit: of the signal, A, V or Ω.
        ohms: every resistance of the circuit as designed, the coil's and the leads' too.
        parts: the resistors, first what was designed.
        cases: its ranges, ascending; none where nothing was designed.
        shown: which of the cases the scale shows.
        facts: what else there is to know.
        form: which of the connections that the kind has: "half bridge", "across"; empty where it has one.
        stamp: what is stamped on a part that is bought, "100 A/75 mV" or "200/5"; empty where none is.
        alternating: whether it is meant for alternating current alone.
    """

    kind: str
    range: float | None
    unit: str
    ohms: Ohms
    parts: tuple[Part, ...] = ()
    cases: tuple[Case, ...] = ()
    shown: int = 0
    facts: tuple[Fact, ...] = ()
    form: str = ""
    stamp: str = ""
    alternating: bool = False

    @property
    def case(self) -> Case | None:
        """The range that the scale shows, where anything was designed."""
        return self.cases[self.shown] if self.cases else None

    @property
    def as_built(self) -> Ohms:
        """Every resistance, as measured where it was."""
        return {**self.ohms, **{part.name: part.built for part in self.parts if part.built is not None}}
