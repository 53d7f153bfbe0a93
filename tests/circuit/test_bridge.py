"""The bridge off balance, against nodal analysis by numpy.linalg."""

import math

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from dialgen.circuit.bridge import ARM_NAMES, ARMS, Bridge
from dialgen.circuit.design import COIL
from dialgen.circuit.kinds import CIRCUITS
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.dialfile.fields import list_of
from dialgen.dialfile.kinds import read_kind
from dialgen.errors import InputError
from dialgen.quantity import Amount

PT100_0, PT100_100 = 100.0, 138.5055
"""A Pt100 at 0 and 100 °C, IEC 60751:2008 (reference values, section 5)."""


def bridge(supply_v, *arms_ohm):
    """A bridge."""
    return Bridge(supply=Amount(supply_v, "V"), arms=tuple(Amount(arm, "Ω") for arm in arms_ohm))


def terminals(coil_a=100e-6, coil_ohm=1000.0, end_ohm=PT100_100, rest_ohm=PT100_0):
    """A coil before a scale of ohms."""
    coil = Coil(current=coil_a, resistance=coil_ohm)
    return Terminals(coil=coil, signal=lambda v: v, rest_signal=rest_ohm, full_value=end_ohm, unit="Ω")


def nodes_v(supply_v, arms_ohm, coil_ohm, sensor_ohm):
    """The voltages of the two middles, from the sum of the currents that leave each."""
    r1, r2, r3 = arms_ohm
    sensor_s = 0.0 if math.isinf(sensor_ohm) else 1 / sensor_ohm
    matrix = [
        [1 / r1 + sensor_s + 1 / coil_ohm, -1 / coil_ohm],
        [-1 / coil_ohm, 1 / r2 + 1 / r3 + 1 / coil_ohm],
    ]
    return np.linalg.solve(matrix, [supply_v / r1, supply_v / r2])


def nodal_drive(supply_v, arms_ohm, sensor_ohm, coil_a=100e-6, coil_ohm=1000.0):
    """The coil's current over that for full deflection."""
    sensed, fixed = nodes_v(supply_v, arms_ohm, coil_ohm, sensor_ohm)
    return (sensed - fixed) / coil_ohm / coil_a


def forward(circuit, sensor_ohm, **coil):
    """The drive by the stage."""
    return float(circuit.stage(terminals(**coil)).forward(np.array(sensor_ohm)))


arms = st.tuples(*[st.floats(1.0, 1e5)] * 3)
supplies = st.floats(0.1, 30.0) | st.floats(-30.0, -0.1)
sensors = st.floats(1e-3, 1e7) | st.just(math.inf)


@given(supplies, arms, sensors, st.floats(10.0, 1e4))
def test_bridge_obeys_kirchhoff(supply_v, arms_ohm, sensor_ohm, coil_ohm):
    """Formula and network give the current that nodal analysis gives, for any sensor, an open one too."""
    circuit, coil = bridge(supply_v, *arms_ohm), {"coil_ohm": coil_ohm}
    expected = nodal_drive(supply_v, arms_ohm, sensor_ohm, **coil)
    # Near balance the difference of two voltages is all there is, so by the supply's own share.
    close = 1e-9 * abs(supply_v) / coil_ohm / 100e-6
    assert forward(circuit, sensor_ohm, **coil) == pytest.approx(expected, rel=1e-9, abs=close)
    design = circuit.design(terminals(**coil))
    working = design.cases[0].work(design.ohms, sensor_ohm)
    assert working.drive == pytest.approx(expected, rel=1e-9, abs=close)
    sensed, fixed = nodes_v(supply_v, arms_ohm, coil_ohm, sensor_ohm)
    assert working.drop_v == pytest.approx(sensed, rel=1e-8)
    currents = [(supply_v - sensed) / arms_ohm[0], (supply_v - fixed) / arms_ohm[1], fixed / arms_ohm[2]]
    for name, arm_ohm, current_a in zip(ARM_NAMES, arms_ohm, currents, strict=True):
        most_a = abs(supply_v) / arm_ohm
        assert working.loads[name].current_a == pytest.approx(current_a, rel=1e-8, abs=1e-9 * most_a)
    assert working.loads[COIL].current_a == pytest.approx(100e-6 * working.drive, rel=1e-9)


@given(supplies, arms, st.floats(0.0, 1e6), st.floats(10.0, 1e4))
def test_bridge_has_an_inverse(supply_v, arms_ohm, sensor_ohm, coil_ohm):
    """The sensor comes back from the drive, within what the drive's own rounding leaves of it."""
    stage = bridge(supply_v, *arms_ohm).stage(terminals(coil_ohm=coil_ohm))
    drive = stage.forward(np.array([sensor_ohm]))
    low, high = stage.image
    assert low <= drive[0] <= high
    slope = abs(stage.forward(np.array([sensor_ohm * (1 + 1e-6) + 1e-9])) - drive)[0] / (
        sensor_ohm * 1e-6 + 1e-9
    )
    assume(slope > 0)
    rounding_ohm = 1e-14 * max(abs(low), abs(high)) / slope
    assert stage.inverse(drive)[0] == pytest.approx(sensor_ohm, rel=1e-9, abs=10 * rounding_ohm)


@given(supplies, arms)
def test_bridge_goes_one_way_from_a_shorted_to_an_open_sensor(supply_v, arms_ohm):
    """The image runs from a shorted to an open sensor; more ohms drive on, or back with a negative supply."""
    stage = bridge(supply_v, *arms_ohm).stage(terminals())
    shorted, opened = stage.forward(np.array([0.0, math.inf])).tolist()
    assert (shorted < opened) is (supply_v > 0)
    assert stage.image == (min(shorted, opened), max(shorted, opened))
    assert stage.domain == (0.0, math.inf)
    assert stage.inverse(np.array([opened]))[0] in (math.inf, -math.inf)
    assert stage.inverse(np.array([shorted]))[0] == pytest.approx(0.0, abs=1e-9)
    rising = np.diff(stage.forward(np.geomspace(1e-2, 1e6, 200)))
    assert np.all(rising * supply_v > 0)


@given(arms, st.floats(1.0, 1e4))
def test_bridge_rests_at_balance(arms_ohm, coil_ohm):
    """Wheatstone's condition, X·R2 = R1·R3: nothing flows in the coil, whatever its resistance."""
    r1, r2, r3 = arms_ohm
    circuit = bridge(1.5, *arms_ohm)
    assert forward(circuit, r1 * r3 / r2, coil_ohm=coil_ohm) == pytest.approx(0.0, abs=1e-9)
    facts = {fact.name: fact.value for fact in circuit.design(terminals(coil_ohm=coil_ohm)).facts}
    assert facts["balance"] == pytest.approx(r1 * r3 / r2, rel=1e-12)


def test_pt100_bridge_by_hand():
    """Equal ratio arms, sensor 100 Ω: E·(X - R)/(...) of the deflection bridge, worked by hand.

    1 V, R1 = R2 = R3 = 100 Ω, X = 300 Ω: open the middles stand at 0.75 and 0.5 V; the coil sees
    75 + 50 Ω and its own 875 Ω, so 0.25 V/1000 Ω = 250 µA.
    """
    circuit = bridge(1.0, 100.0, 100.0, 100.0)
    assert forward(circuit, 300.0, coil_a=250e-6, coil_ohm=875.0) == pytest.approx(1.0, rel=1e-12)
    assert forward(circuit, 100.0, coil_a=250e-6, coil_ohm=875.0) == pytest.approx(0.0, abs=1e-15)


def test_pt100_bridge_tells_what_the_bench_needs():
    """Supply for full scale, sensor current, its heat and the leads, each against nodal analysis."""
    arms_ohm = (1000.0, 1000.0, 100.0)
    design = bridge(1.0, *arms_ohm).design(terminals())
    facts = {fact.name: fact.value for fact in design.facts}
    assert [part.name for part in design.parts] == list(ARM_NAMES)
    assert all(part.given for part in design.parts)
    assert design.cases[0].signal == design.range == PT100_100
    assert nodal_drive(facts["supply for full scale"], arms_ohm, PT100_100) == pytest.approx(1.0, rel=1e-12)
    end = nodal_drive(1.0, arms_ohm, PT100_100)
    assert facts["drive at the scale's end"] == pytest.approx(100 * end, rel=1e-12)
    leads = 100 * (nodal_drive(1.0, arms_ohm, PT100_100 + 1.0) - end)
    assert facts["1 Ω of leads, at the scale's end"] == pytest.approx(leads, rel=1e-9)
    sensed_v = {x: nodes_v(1.0, arms_ohm, 1000.0, x)[0] for x in (PT100_0, PT100_100)}
    heat_w = {x: volts**2 / x for x, volts in sensed_v.items()}
    assert facts["sensor self-heating"] == pytest.approx(max(heat_w.values()), rel=1e-9)
    # The current is largest where the sensor has fewest ohms, at rest; its heat here at the other end.
    most_a = max(volts / x for x, volts in sensed_v.items())
    assert facts["sensor current"] == pytest.approx(most_a, rel=1e-9)


def test_bridge_whose_scale_ends_at_rest_or_open():
    """No supply makes full deflection at balance; an open sensor has no leads to speak of."""
    ends_at_rest = bridge(1.0, 1000.0, 1000.0, 100.0).design(terminals(end_ohm=100.0))
    assert "supply for full scale" not in {fact.name for fact in ends_at_rest.facts}
    opened = bridge(1.0, 1000.0, 1000.0, 100.0).design(terminals(end_ohm=math.inf))
    assert not any("leads" in fact.name for fact in opened.facts)
    expected = nodal_drive(1.0, (1000.0, 1000.0, 100.0), math.inf)
    assert opened.cases[0].work(opened.ohms, math.inf).drive == pytest.approx(expected, rel=1e-12)


@pytest.mark.parametrize(
    ("arms_ohm", "supply_v", "keys"),
    [
        ((0.0, 100.0, 100.0), 1.0, (("arms",),)),
        ((100.0, 0.0, 0.0), 1.0, (("arms",),)),
        ((100.0, 100.0, 100.0), 0.0, (("supply",),)),
    ],
)
def test_bridges_that_do_not_move_are_refused(arms_ohm, supply_v, keys):
    """Without a supply, or with the sensor across it, the drive is the same for every sensor."""
    with pytest.raises(InputError, match=";") as caught:
        bridge(supply_v, *arms_ohm).stage(terminals())
    assert caught.value.keys == keys


@pytest.mark.parametrize(
    ("coil", "missing"),
    [
        (Coil(current=1e-3), ("movement", "resistance")),
        (Coil(resistance=75.0), ("movement", "current")),
    ],
)
def test_bridge_needs_the_coil(coil, missing):
    """Both of the movement's figures are in the formula."""
    bare = Terminals(coil=coil, signal=lambda v: v, rest_signal=0.0, full_value=1.0, unit="Ω")
    with pytest.raises(InputError) as caught:
        bridge(1.0, 1.0, 1.0, 1.0).stage(bare)
    assert caught.value.keys[0] == missing


@pytest.mark.parametrize(
    "given", ["100 ohm", ["100 ohm"] * 2, ["100 ohm"] * 4, ["100 ohm", "0 ohm", "1k"], [100, 100, 100], None]
)
def test_arms_written_wrongly_are_refused(given):
    """Three resistances above zero, each with its unit."""
    with pytest.raises(ValueError, match=";"):
        list_of(ARMS)(given)


def test_dial_files_name_supply_and_arms():
    """The keys of the contract are read from a dial file's table, R1 first."""
    table = {"kind": "bridge", "supply": "1.5 V", "arms": ["100 ohm", "1k", "220R"]}
    assert read_kind(table, CIRCUITS, "circuit") == bridge(1.5, 100.0, 1000.0, 220.0)
