"""A rectifier instrument at one signal: what every part carries, from the networks of its half cycles.

In each half cycle the current of a part is a·v + b·i, with v the signal and i the current of the
conducting junctions, and both numbers by superposition.  So its mean and its square over the sine follow
from the means of i, i² and v·i, which the junctions give.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from dialgen.circuit.design import COIL, Fact, Load, Ohms, Working
from dialgen.circuit.rectifiers.conduction import Averages, Junction
from dialgen.circuit.rectifiers.connections import Connection, Port
from dialgen.quantity import engineered, plain_number

_NOTHING = Averages(*[np.zeros(())] * 4)

SINE_FORM = math.pi / (2 * math.sqrt(2))
"""RMS over rectified mean of a sine; what a mean is marked as more than it is."""
_TRIANGLE = math.sqrt(3) / 2
"""Rectified mean over RMS of a triangle."""


@dataclass(frozen=True, slots=True)
class RectifierWork:
    """How a rectifier instrument works with any values of its parts.

    Args:
        connection: how its diodes are connected.
        junction: how they conduct.
        coil_a: the mean current of full deflection.
    """

    connection: Connection
    junction: Junction
    coil_a: float

    def work(self, ohms: Ohms, signal_v: float) -> Working:
        """Return the drive, and RMS currents, at a sine of ``signal_v`` RMS; the source's current too."""
        squares_a2: dict[str, float] = {}
        mean_a = 0.0
        for port, pulse in self._halves(ohms, signal_v):
            share = port.half.share
            for name in port.by_signal.loads:
                squares_a2[name] = squares_a2.get(name, 0.0) + share * _square_a2(port, name, pulse, signal_v)
            mean_a += share * port.currents(COIL)[1] * float(pulse.mean_a)
        loads = {
            # A leg's two currents may cancel but for rounding.
            name: Load(math.sqrt(max(square_a2, 0.0)), ohms.get(name, 0.0))
            for name, square_a2 in squares_a2.items()
        }
        return Working(mean_a / self.coil_a, loads, signal_v)

    def facts(self, ohms: Ohms, signal_v: float) -> tuple[Fact, ...]:
        """Return what is worth knowing at a signal besides what its parts carry."""
        working = self.work(ohms, signal_v)
        halves = list(self._halves(ohms, signal_v))
        peak_v = math.sqrt(2) * signal_v
        triangle = plain_number(round(100 * (SINE_FORM * _TRIANGLE - 1), 2))
        return (
            Fact(
                name="form factor",
                value=working.loads[COIL].current_a / (working.drive * self.coil_a),
                unit="",
                note=f"of the coil's current, RMS over mean; {self._plain_form:.4f} with ideal diodes",
            ),
            Fact(
                name="error on a square wave",
                value=100 * (SINE_FORM - 1),
                unit="%",
                note=f"of its RMS with ideal diodes, on a triangle {triangle} %: the scale is right on a "
                "sine alone",
            ),
            Fact(
                name="peak diode current",
                value=max(float(pulse.peak_a) for _, pulse in halves),
                unit="A",
                note="at full deflection",
            ),
            Fact(
                name="peak inverse voltage",
                value=max(self._blocked_v(port, pulse, peak_v) for port, pulse in halves),
                unit="V",
                note="across a diode at full deflection; with the coil open "
                f"at most {engineered(peak_v, 'V', 4)}",
            ),
        )

    def _halves(self, ohms: Ohms, signal_v: float) -> Iterator[tuple[Port, Averages]]:
        for half in self.connection.halves(ohms):
            port = Port.of(half)
            yield port, self._pulse(port, math.sqrt(2) * signal_v) if half.conducts else _NOTHING

    def _pulse(self, port: Port, peak_v: float) -> Averages:
        """Return the averages of the junctions' current, the power that of the whole signal times it."""
        inner_ohm, factor = port.driven()
        pulse = self.junction.averages(np.array(factor * peak_v), np.array(inner_ohm), port.half.junctions)
        return pulse._replace(power_w=pulse.power_w / factor)

    def _blocked_v(self, port: Port, pulse: Averages, peak_v: float) -> float:
        # Of several junctions in series the network has all in one place; the blocking diode sees that of
        # the others, which stand elsewhere in the loop.
        peak_a = float(pulse.peak_a)
        return port.blocked_v(peak_v, peak_a) + (port.half.junctions - 1) * self.junction.drop_v(peak_a)

    @property
    def _plain_form(self) -> float:
        return SINE_FORM * math.sqrt(2 / self.connection.pulses)


def _square_a2(port: Port, name: str, pulse: Averages, signal_v: float) -> float:
    """Return the mean square over the half cycle of a part's current, a·v + b·i."""
    by_v, by_i = port.currents(name)
    return float((by_v * signal_v) ** 2 + 2 * by_v * by_i * pulse.power_w + by_i**2 * pulse.square_a2)
