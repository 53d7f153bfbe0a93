"""Circuits of every kind, designed, for the tests of their pictures."""

from __future__ import annotations

import math
from dataclasses import replace

from dialgen.circuit.bridge import Bridge
from dialgen.circuit.direct import Direct
from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.ohmmeters.ohmmeter import SeriesOhmmeter, ShuntOhmmeter
from dialgen.circuit.rectifiers.rectifier import Rectifier
from dialgen.circuit.shunt import Rating, Shunt
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.circuit.transformer import CurrentTransformer, Ratio
from dialgen.circuit.universal import UniversalShunt
from dialgen.quantity import Amount

COIL_A, COIL_OHM = 1e-3, 75.0
COIL_TEXT = ("1 mA", "75 Ω")


def amps(*values):
    """Amounts in amperes."""
    return tuple(Amount(value, "A") for value in values)


def volts(*values):
    """Amounts in volts."""
    return tuple(Amount(value, "V") for value in values)


def ohms(*values):
    """Amounts in ohms."""
    return tuple(Amount(value, "Ω") for value in values)


def behind(full, unit):
    """What a circuit sees: a coil of 1 mA and 75 Ω, and a linear scale up to ``full``."""
    coil = Coil(current=COIL_A, resistance=COIL_OHM)
    return Terminals(coil=coil, signal=lambda value: value, rest_signal=0.0, full_value=full, unit=unit)


def as_built(circuit, terminals):
    """The circuit with each of its parts as built, five figures long and a little off its design."""
    parts = [part for part in circuit.design(terminals).parts if not (part.given or part.sums)]
    made = [float(f"{part.ohms * (1.00512 + k / 1e4):.5g}") for k, part in enumerate(parts)]
    return replace(circuit, built=ohms(*made)), terminals


TEN_A = amps(0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10)
TEN_V = volts(1, 2.5, 5, 10, 25, 50, 100, 250, 500, 1000)

CIRCUITS = {
    "direct": (Direct(), behind(1e-3, "A")),
    "direct, no unit": (Direct(), behind(100.0, None)),
    "shunt": (Shunt(range=amps(0.5)[0]), behind(0.5, "A")),
    "shunt not needed": (Shunt(range=amps(1e-3)[0]), behind(1e-3, "A")),
    "shunt with all": (
        Shunt(range=amps(0.5)[0], swamp=ohms(300)[0], leads=ohms(0.2)[0], built=ohms(0.755)[0]),
        behind(0.5, "A"),
    ),
    "shunt bought": (Shunt(range=amps(100)[0], rated=Rating(current_a=100, drop_v=0.075)), behind(100, "A")),
    "shunt bought, leads": (
        Shunt(range=amps(100)[0], rated=Rating(current_a=100, drop_v=0.15), leads=ohms(0.05)[0]),
        behind(100, "A"),
    ),
    "shunt of 40 A": (Shunt(range=amps(40)[0], built=ohms(0.001885)[0]), behind(40, "A")),
    "universal": (UniversalShunt(ranges=amps(1, 0.1, 0.01)), behind(1, "A")),
    "universal, ten ranges": as_built(UniversalShunt(ranges=TEN_A, swamp=ohms(225)[0]), behind(1, "A")),
    "transformer": (CurrentTransformer(ratio=Ratio(200, 5), range=amps(200)[0]), behind(200, "A")),
    "transformer, no shunt": (CurrentTransformer(ratio=Ratio(200, 0.001)), behind(200, "A")),
    "transformer, swamp and leads": (
        CurrentTransformer(ratio=Ratio(200, 5), swamp=ohms(225)[0], leads=ohms(0.1)[0]),
        behind(200, "A"),
    ),
    "multiplier": (Multiplier(range=volts(10)[0]), behind(10, "V")),
    "multiplier with all": (
        Multiplier(range=volts(16)[0], swamp=ohms(300)[0], line=ohms(3)[0], built=ohms(15555)),
        behind(16, "V"),
    ),
    "multiplier, suppressed": (
        Multiplier(range=volts(16)[0], suppress=volts(10)[0], swamp=ohms(300)[0]),
        behind(16, "V"),
    ),
    "multipliers": (Multiplier(ranges=volts(10, 50, 250), range=volts(50)[0]), behind(50, "V")),
    "multipliers, ten ranges": as_built(Multiplier(ranges=TEN_V), behind(1000, "V")),
    "chain": (Multiplier(ranges=volts(10, 50, 250), chain=True), behind(50, "V")),
    "multipliers, line": (Multiplier(ranges=volts(10, 50), line=ohms(20)[0]), behind(10, "V")),
    "chain, ten ranges": as_built(
        Multiplier(ranges=TEN_V, chain=True, swamp=ohms(200)[0], line=ohms(2)[0]), behind(1, "V")
    ),
    "rectifier": (Rectifier(range=volts(10)[0], built=ohms(5555)[0]), behind(10, "V")),
    "rectifier, coil shunt": (Rectifier(range=volts(10)[0], coil_shunt=ohms(150)[0]), behind(10, "V")),
    "half bridge": (
        Rectifier(range=volts(10)[0], rectifier="half bridge", legs=ohms(2000)[0]),
        behind(10, "V"),
    ),
    "half bridge, coil shunt": (
        Rectifier(range=volts(10)[0], rectifier="half bridge", legs=ohms(2000)[0], coil_shunt=ohms(75)[0]),
        behind(10, "V"),
    ),
    "half wave": (Rectifier(range=volts(10)[0], rectifier="half wave"), behind(10, "V")),
    "half wave, coil shunt": (
        Rectifier(range=volts(10)[0], rectifier="half wave", coil_shunt=ohms(100)[0]),
        behind(10, "V"),
    ),
    "series ohmmeter": (
        SeriesOhmmeter(half=ohms(1000)[0], battery=volts(1.5)[0], worn=volts(1.2)[0]),
        behind(math.inf, "Ω"),
    ),
    "series ohmmeter, zero in series": (
        SeriesOhmmeter(half=ohms(1000)[0], battery=volts(1.5)[0], worn=volts(1.2)[0], zero="series"),
        behind(math.inf, "Ω"),
    ),
    "series ohmmeter, three ranges": (
        SeriesOhmmeter(half=ohms(10)[0], battery=volts(1.5)[0], times=(1.0, 10.0, 100.0)),
        behind(math.inf, "Ω"),
    ),
    "series ohmmeter, low": (
        SeriesOhmmeter(half=ohms(5)[0], battery=volts(1.5)[0], worn=volts(1.2)[0]),
        behind(math.inf, "Ω"),
    ),
    "series ohmmeter, no battery": (SeriesOhmmeter(half=ohms(10)[0]), behind(math.inf, "Ω")),
    "shunt ohmmeter": (ShuntOhmmeter(half=ohms(30)[0], battery=volts(1.5)[0]), behind(math.inf, "Ω")),
    "shunt ohmmeter, series resistor": (
        ShuntOhmmeter(half=ohms(100)[0], battery=volts(1.5)[0]),
        behind(math.inf, "Ω"),
    ),
    "shunt ohmmeter, no battery": (ShuntOhmmeter(half=ohms(30)[0]), behind(math.inf, "Ω")),
    "bridge": (Bridge(supply=volts(1.5)[0], arms=ohms(100, 1000, 1000)), behind(150, "Ω")),
    "bridge, poles changed": (Bridge(supply=volts(-1.5)[0], arms=ohms(100, 1000, 2000)), behind(150, "Ω")),
}

DESIGNS = {name: circuit.design(terminals) for name, (circuit, terminals) in CIRCUITS.items()}
