"""Which circuits a dial stands on, and what a face as designed would show behind parts as built."""

import numpy as np
import pytest
from dial_texts import made

from dialgen.dial.designs import designs
from dialgen.errors import Refused

SCALE = 'unit = "A"\nfrom = 0\nto = 40\n'


def circuits(scale):
    """The circuits of a dial with one scale, behind 1 mA and 75 Ω."""
    return designs(made(scale))


def test_a_circuit_of_its_own_is_designed_at_its_place():
    """The contract's example: a 40 A shunt of 1.875 mΩ, found at the scale's own circuit."""
    (found,) = circuits(SCALE + 'circuit = { kind = "shunt", range = "40 A" }')
    assert (found.key, found.scale, found.also) == (("scale", 0, "circuit"), 1, 0)
    assert found.design.parts[0].ohms == pytest.approx(0.001875046876, rel=1e-9)


def test_rows_have_circuits_of_their_own():
    """A further row of numerals with its own circuit is one circuit more, designed for its own range."""
    keys = 'circuit = "shunt"\nalso = [{ times = 5, circuit = { kind = "shunt" } }, { times = 2 }]'
    first, second = circuits(SCALE + keys)
    assert (second.key, second.also) == (("scale", 0, "also", 0, "circuit"), 1)
    assert [first.design.range, second.design.range] == [40.0, 200.0]


def test_a_scale_without_circuit_is_direct_and_has_no_parts():
    """Where the movement takes the signal as it comes there is nothing to buy."""
    (found,) = circuits('unit = "mA"\nfrom = 0\nto = 1')
    assert (found.design.kind, found.design.parts, found.reswamped) == ("direct", (), None)


def test_a_shunt_too_large_reads_too_high_by_its_ratio():
    """Behind a shunt 1 % too large a face for the designed one shows k·x, k by current division."""
    designed = 1e-3 * 75.0 / (40.0 - 1e-3)
    built = designed * 1.01
    (found,) = circuits(SCALE + f'circuit = {{ kind = "shunt", range = "40 A", built = "{built!r} ohm" }}')
    factor = (built / (built + 75.0)) / (designed / (designed + 75.0))
    values = np.array([0.0, 10.0, 39.0])
    assert found.wiring.indicated(values) == pytest.approx(factor * values, rel=1e-12)


def test_swamping_by_another_value_redesigns_the_shunt():
    """With 25 Ω of swamping the same shunt is designed for a branch of 100 Ω."""
    (found,) = circuits(SCALE + 'circuit = "shunt"')
    design = found.reswamped(25.0)
    assert design.parts[0].ohms == pytest.approx(1e-3 * 100.0 / (40.0 - 1e-3), rel=1e-12)


def test_an_observed_scale_is_designed_by_its_stated_range_alone():
    """Points that were seen say nothing of the signal: a circuit beside them must state its range."""
    seen = 'unit = "degC"\nfrom = 0\nto = 40\nlaw = { kind = "observed", points = [[0, -44], [40, 40]] }\n'
    (found,) = circuits(seen + 'circuit = { kind = "multiplier", range = "10 V" }')
    assert found.design.parts[0].ohms == pytest.approx(9925.0)
    assert found.wiring is None
    with pytest.raises(Refused, match="give range") as refusal:
        circuits(seen + 'circuit = "multiplier"')
    assert refusal.value.errors[0].keys[0] == ("scale", 0, "circuit", "range")


def test_a_bare_voltmeter_drifts_with_its_copper_and_a_bare_ammeter_does_not():
    """Volts across a copper coil drive less current by 0.393 % per kelvin (IEC 60028); amperes do not."""
    (volts,) = circuits('unit = "mV"\nfrom = 0\nto = 75')
    (amperes,) = circuits('unit = "mA"\nfrom = 0\nto = 1')
    for found, drive in ((volts, 1 / 1.00393), (amperes, 1.0)):
        case = found.design.cases[0]
        assert case.work({"coil": 75 * 1.00393}, case.signal).drive == pytest.approx(drive, rel=1e-12)
        assert case.work(found.design.ohms, case.signal).drop_v == pytest.approx(0.075, rel=1e-12)


def test_swamping_a_bought_shunt_is_worked_for_a_shunt_of_more_drop():
    """With a bought shunt another swamp asks for another shunt, Im·(Rm + swamp) at its range."""
    (found,) = circuits(SCALE + 'circuit = { kind = "shunt", rated = "40 A/75 mV", built = "1.9 mohm" }')
    design = found.reswamped(225.0)
    assert design.parts[0].ohms == pytest.approx(1e-3 * 300.0 / (40.0 - 1e-3), rel=1e-12)
    assert design.cases[0].work(design.ohms, 40.0).drop_v == pytest.approx(0.3, rel=1e-9)
