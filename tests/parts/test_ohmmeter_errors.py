"""What a part that is off does to an ohmmeter, whose zero is set again before it is read."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen.circuit.ohmmeter import SeriesOhmmeter
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.parts.assessed import assess
from dialgen.parts.worked import worked
from dialgen.quantity import Amount

TERMINALS = Terminals(
    coil=Coil(current=50e-6, resistance=1800.0),
    signal=lambda v: v,
    rest_signal=0.0,
    full_value=math.inf,
    unit="Ω",
)


def ohmmeter(times=(1.0,)):
    """A 50 µA movement on a 1.5 V cell, 1.5 kΩ at half scale."""
    circuit = SeriesOhmmeter(
        half=Amount(1.5e3, "Ω"), battery=Amount(1.5, "V"), worn=Amount(1.3, "V"), times=tuple(times)
    )
    return circuit.design(TERMINALS)


@given(
    st.sampled_from(["series resistor", "shunt ×1"]), st.floats(-0.05, 0.05).filter(lambda v: abs(v) > 1e-4)
)
def test_the_error_is_that_at_half_scale_once_the_zero_is_set(name, off):
    """With the adjuster found by scipy that brings full deflection, half scale is off by what is told."""
    design = ohmmeter((1.0, 10.0))
    (case, *_), (first, *_) = design.cases, worked(design)
    changed = {**design.ohms, name: design.ohms[name] * (1 + off)}

    def full(adjuster_ohm):
        return case.work({**changed, "zero adjuster": adjuster_ohm}, 0.0).drive - 1.0

    adjuster_ohm = brentq(
        full, 0.2 * design.ohms["zero adjuster"], 5 * design.ohms["zero adjuster"], xtol=1e-9
    )
    half = case.work({**changed, "zero adjuster": adjuster_ohm}, 1.5e3).drive
    told = first.error_percent({name: changed[name]})
    # The adjuster's own change of the inner resistance is left out: a part in ten of the error.
    assert told == pytest.approx((half - 0.5) * 100, rel=0.1, abs=2e-4)


def test_an_adjuster_is_not_bought_to_a_value():
    """The potentiometer gets no nearest value and no share in the tolerance: it is set."""
    parts = {part.part.name: part for part in assess(ohmmeter()).parts}
    assert parts["zero adjuster"].fits == ()
    assert parts["series resistor"].fits
