"""What the cautions go by: a circuit's voltage, current and kind, as far as its design tells them."""

from __future__ import annotations

import math
from dataclasses import dataclass

from dialgen.circuit.design import COIL, Case, Design, Ohms
from dialgen.circuit.direct import Direct
from dialgen.circuit.names import SHUNT, SUPPRESS
from dialgen.circuit.ohmmeters.ohmmeter import SeriesOhmmeter, ShuntOhmmeter
from dialgen.parts.ratings import USUAL_RATINGS_V

MOST_HELPED_V = 1000.0
"""Above this the program prints no design help."""
TOUCH_AC_V, TOUCH_DC_V = 50.0, 120.0
"""The limits of extra-low voltage: IEC 60364-4-41, from memory."""

_OHMMETERS = (SeriesOhmmeter.kind, ShuntOhmmeter.kind)


@dataclass(frozen=True, slots=True, kw_only=True)
class Situation:
    """What the cautions go by.

    Args:
        kind: the circuit's kind.
        takes: the unit it takes, A, V or Ω; any other tells nothing of danger.
        range: of its largest range, in that unit; nothing goes by an ohmmeter's.
        ranges: how many it has.
        alternating: whether it takes alternating current; None where it may take either.
        movement: the movement's kind: moving coil, moving iron, or any other.
        resistor_peak_v: the highest peak voltage over one resistor.
        resistor_rating_v: what one resistor stands.
        shunt_a: the largest current through a shunt, beside the coil.
        battery: whether it has a cell of its own.
        suppressed: whether its zero is suppressed by a voltage.
    """

    kind: str
    takes: str
    range: float
    ranges: int = 1
    alternating: bool | None = None
    movement: str = "moving coil"
    resistor_peak_v: float = 0.0
    resistor_rating_v: float = min(USUAL_RATINGS_V.values())
    shunt_a: float = 0.0
    battery: bool = False
    suppressed: bool = False

    @property
    def volts(self) -> float:
        """The voltage it is made for; an ammeter's is not known, and counts as none."""
        return self.range if self.takes == "V" else 0.0

    @property
    def may_be_ac(self) -> bool:
        """Whether alternating current cannot be ruled out."""
        return self.alternating is not False

    @property
    def may_be_dc(self) -> bool:
        """Whether direct current cannot be ruled out."""
        return self.alternating is not True

    @property
    def peak_factor(self) -> float:
        """The peak over the RMS, of a sine where alternating current cannot be ruled out."""
        return math.sqrt(2) if self.may_be_ac else 1.0

    @property
    def beyond_help(self) -> bool:
        """Whether it is above 1 kV, so that no design help is to be printed."""
        return self.volts > MOST_HELPED_V

    @property
    def dangerous(self) -> bool:
        """Whether its voltage is above the limit for touch."""
        return self.volts > (TOUCH_AC_V if self.may_be_ac else TOUCH_DC_V)

    @property
    def helped(self) -> bool:
        """Whether it is dangerous, and still within what the program advises on."""
        return self.dangerous and not self.beyond_help


def situation_of(
    design: Design, movement: str, resistor_rating_v: float = min(USUAL_RATINGS_V.values())
) -> Situation:
    """Return what the cautions need to know of a design, as built, at the end of each of its ranges."""
    alternating = _alternating(design, movement)
    signals = [abs(case.signal) for case in design.cases] or [abs(design.range or 0.0)]
    return Situation(
        kind=design.kind,
        takes=design.unit,
        range=max(signals),
        ranges=len(signals),
        alternating=alternating,
        movement=movement,
        resistor_peak_v=_resistor_peak_v(design, alternating),
        resistor_rating_v=resistor_rating_v,
        shunt_a=_largest_shunt_a(design),
        battery=design.kind in _OHMMETERS,
        suppressed=any(fact.name == SUPPRESS for fact in design.facts),
    )


def _alternating(design: Design, movement: str) -> bool | None:
    """Return what the circuit can take; behind a bare coil a moving coil shows direct current alone."""
    if design.alternating:
        return True
    built_for_dc = design.kind != Direct.kind and movement == "moving coil"
    suppressed = any(fact.name == SUPPRESS for fact in design.facts)
    return False if built_for_dc or suppressed else None


def _resistor_peak_v(design: Design, alternating: bool | None) -> float:
    """Return the highest peak over one part of a voltmeter.

    Where only alternating voltage is taken it is the whole peak of the range: behind a rectifier a
    part's RMS does not tell its peak.
    """
    if design.unit != "V":
        return 0.0
    if alternating:
        return math.sqrt(2) * max((abs(case.signal) for case in design.cases), default=0.0)
    ohms = design.as_built
    volts = [
        abs(load.voltage_v)
        for case in design.cases
        for name, load in case.work(ohms, case.signal).loads.items()
        if name != COIL
    ]
    return max(volts, default=0.0) * (math.sqrt(2) if alternating is not False else 1.0)


def _largest_shunt_a(design: Design) -> float:
    if design.unit != "A":
        return 0.0
    return max((_shunt_a(case, design.as_built) for case in design.cases), default=0.0)


def _shunt_a(case: Case, ohms: Ohms) -> float:
    """Return what a shunt carries; a tapped one at most the line's current less the coil's."""
    loads = case.work(ohms, case.signal).loads
    if SHUNT in loads:
        return abs(loads[SHUNT].current_a)
    return abs(case.signal) - abs(loads[COIL].current_a)
