"""What a part that is off does to an ohmmeter, whose zero is set again before it is read.

The truth is scipy's: the adjuster that brings full deflection, and then the pointer at half scale.
"""

import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen.circuit.design import COIL
from dialgen.circuit.ohmmeters.ohmmeter import SeriesOhmmeter, ShuntOhmmeter
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.parts.assessed import assess
from dialgen.parts.drift import Materials, drifts
from dialgen.parts.worked import worked
from dialgen.quantity import Amount


def behind(coil_a, coil_ohm):
    """A coil behind an ohm scale to infinity."""
    return Terminals(
        coil=Coil(current=coil_a, resistance=coil_ohm),
        signal=lambda v: v,
        rest_signal=0.0,
        full_value=math.inf,
        unit="Ω",
    )


def ohmmeter(times=(1.0,), half=1.5e3, worn=1.3, zero="across", coil=(50e-6, 1800.0)):
    """A series ohmmeter on a 1.5 V cell."""
    circuit = SeriesOhmmeter(
        half=Amount(half, "Ω"),
        battery=Amount(1.5, "V"),
        worn=Amount(worn, "V"),
        times=tuple(times),
        zero=zero,
    )
    return circuit.design(behind(*coil))


def shunt_ohmmeter():
    """1 mA, 100 Ω with the unknown across the coil, 40 Ω at half scale."""
    circuit = ShuntOhmmeter(half=Amount(40.0, "Ω"), battery=Amount(1.5, "V"), worn=Amount(1.2, "V"))
    return circuit.design(behind(1e-3, 100.0))


TESTED = ohmmeter(half=1.2e3, worn=1.2, zero="series", coil=(1e-3, 300.0))
"""1 mA, 300 Ω, 1.2 kΩ at half scale, the zero adjuster in series with all."""
KINDS = {
    "across": (ohmmeter((1.0, 10.0)), "zero adjuster"),
    "series": (TESTED, "zero adjuster"),
    "shunt ohmmeter": (shunt_ohmmeter(), "full-scale adjuster"),
}


def truly(design, adjuster, changed):
    """Percent of the whole deflection that half scale is off once scipy has set the adjuster."""
    case = design.cases[0]
    ohms = {**design.ohms, **changed}

    def full(adjuster_ohm):
        return case.work({**ohms, adjuster: adjuster_ohm}, case.signal).drive - 1.0

    set_ohm = brentq(full, 0.01 * design.ohms[adjuster], 15 * design.ohms[adjuster], xtol=1e-12)
    return (case.work({**ohms, adjuster: set_ohm}, case.judged_at).drive - 0.5) * 100


@pytest.mark.parametrize("kind", KINDS)
@settings(max_examples=40)
@given(data=st.data(), off=st.floats(-0.05, 0.05))
def test_the_error_is_that_at_half_scale_once_the_zero_is_set(kind, data, off):
    """With the adjuster found by scipy that brings full deflection, half scale is off by what is told."""
    design, adjuster = KINDS[kind]
    fixed = [part.name for part in design.parts if not part.adjustable and part.name != "shunt ×10"]
    name = data.draw(st.sampled_from([*fixed, COIL]))
    changed = {name: design.ohms[name] * (1 + off)}
    told = worked(design)[0].error_percent(changed)
    assert told == pytest.approx(truly(design, adjuster, changed), rel=1e-6, abs=1e-9)


@pytest.mark.parametrize("kind", KINDS)
def test_the_drift_is_that_once_the_zero_is_set(kind):
    """A kelvin warmer and colder, each with the adjuster set again by scipy."""
    design, adjuster = KINDS[kind]
    warm, cold = (truly(design, adjuster, Materials().warmed(design.ohms, k)) for k in (1.0, -1.0))
    assert drifts(design)[0].percent_per_k == pytest.approx((warm - cold) / 2, rel=1e-6, abs=1e-9)


def test_an_adjuster_in_series_takes_up_what_its_resistor_is_off():
    """In series with the adjuster 1 % more, and 680 Ω of E6, are nothing once it is set (Ohm's law)."""
    (part,) = [part for part in assess(TESTED).parts if part.part.name == "series resistor"]
    assert part.sensitivity == pytest.approx(0.0, abs=1e-9)
    assert part.fits[0].ohms == 680.0
    assert [fit.error_percent for fit in part.fits] == pytest.approx([0.0] * 6, abs=1e-9)


def test_the_drift_of_a_tested_ohmmeter_by_hand():
    """Set again, half scale is E/I, with I = Im + V/Rs for coil and shunt: -0.0196 % of deflection a kelvin.

    V rises by copper's rise a kelvin, the shunt by manganin's: of I = 1.25 mA the shunt's quarter
    milliampere rises by their difference.  A current dI/I higher lowers half scale by as much, and the
    pointer at the old half scale by a quarter of it.
    """
    rise = 0.25 / 1.25 * (0.00393 - 1.5e-5)
    assert drifts(TESTED)[0].percent_per_k == pytest.approx(-100 * rise / 4, rel=1e-3)


def test_what_no_setting_takes_up_is_told_as_a_share_of_full_scale():
    """With 3 kΩ in series 1.5 V drive no full deflection; half scale then counts against what there is.

    By hand: 3 kΩ, 355 Ω of the track in use and the parallel 240 Ω of coil and shunt make R in all, and
    behind 1.2 kΩ the coil has R/(R + 1.2 kΩ) of what it has at zero ohms.
    """
    whole = 3000.0 + (1200.0 - 240.0 - TESTED.ohms["series resistor"]) + 240.0
    told = worked(TESTED)[0].error_percent({"series resistor": 3000.0})
    assert told == pytest.approx(100 * (whole / (whole + 1200.0) - 0.5), rel=1e-9)


def test_an_adjuster_is_not_bought_to_a_value():
    """The potentiometer gets no nearest value and no share in the tolerance: it is set."""
    parts = {part.part.name: part for part in assess(ohmmeter()).parts}
    assert parts["zero adjuster"].fits == ()
    assert parts["series resistor"].fits
