"""Ohmmeters as they are built: textbook instruments, and Kirchhoff's equations solved by numpy.linalg.

LIEC is T. R. Kuphaldt, Lessons in Electric Circuits, vol. I, chapter 8; Bell is D. A. Bell, Electronic
Instrumentation and Measurements, by the FOSSEE Scilab Textbook Companion 182; SS0602 a US Army course.
Nothing here is worked by our own network solver but what is under test.
"""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen.circuit.design import COIL
from dialgen.circuit.kinds import CIRCUITS
from dialgen.circuit.ohmmeters.cell import adjuster
from dialgen.circuit.ohmmeters.ohmmeter import TIMES, SeriesOhmmeter, ShuntOhmmeter
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.dialfile.fields import list_of
from dialgen.dialfile.kinds import read_kind
from dialgen.quantity import Amount

E3 = (1.0, 2.2, 4.7)


def terminals(coil_a=1e-3, coil_ohm=500.0):
    """A coil before an ohms scale."""
    coil = Coil(current=coil_a, resistance=coil_ohm)
    return Terminals(coil=coil, signal=lambda v: v, rest_signal=0.0, full_value=math.inf, unit="Ω")


def ohm(value):
    """A resistance."""
    return Amount(value, "Ω")


def volt(value):
    """A voltage, or none."""
    return None if value is None else Amount(value, "V")


def series(half_ohm, battery_v, worn_v=None, times=(1.0,), zero="across"):
    """A series ohmmeter."""
    return SeriesOhmmeter(
        half=ohm(half_ohm), battery=volt(battery_v), worn=volt(worn_v), times=times, zero=zero
    )


def shunt(half_ohm, battery_v, worn_v=None):
    """A shunt ohmmeter."""
    return ShuntOhmmeter(half=ohm(half_ohm), battery=volt(battery_v), worn=volt(worn_v))


def parts_of(design):
    """The ohms of the parts, as one would buy them."""
    return {part.name: part.ohms for part in design.parts}


def fact(design, name):
    """The value of a fact."""
    (value,) = (fact.value for fact in design.facts if fact.name == name)
    return value


def series_coil_a(parts, coil_ohm, cell_v, unknown_ohm, *, set_ohm=0.0, zero="across", name="×1"):
    """The coil's current in a series ohmmeter, by Kirchhoff's laws for its three loops.

    Unknown are the currents of coil, shunt and range shunt; a path that is not fitted carries nothing.
    """
    across = zero == "across"
    in_series = parts.get("series resistor", 0.0) + (0.0 if across else set_ohm)
    shunted = "shunt" in parts or (across and "zero adjuster" in parts)
    shunt_ohm = parts.get("shunt", 0.0) + (set_ohm if across else 0.0)
    range_ohm = parts.get(f"shunt {name}")
    chain = [in_series + coil_ohm, in_series, 0.0]
    rows = [
        [a + unknown_ohm for a in chain],
        [coil_ohm, -shunt_ohm, 0.0] if shunted else [0.0, 1.0, 0.0],
        [chain[0], chain[1], -range_ohm] if range_ohm else [0.0, 0.0, 1.0],
    ]
    return np.linalg.solve(np.array(rows), [cell_v, 0.0, 0.0])[0]


def shunt_coil_a(parts, coil_ohm, cell_v, unknown_ohm, set_ohm=0.0):
    """The coil's current in a shunt ohmmeter, by Kirchhoff's laws: currents of coil, shunt and unknown."""
    feed = parts.get("feed resistor", 0.0) + set_ohm
    behind = parts.get("series resistor", 0.0)
    across = parts.get("shunt")
    rows = [
        [feed + behind + coil_ohm, feed + behind, feed],
        [coil_ohm, -across, 0.0] if across else [0.0, 1.0, 0.0],
        [0.0, 0.0, 1.0] if math.isinf(unknown_ohm) else [behind + coil_ohm, behind, -unknown_ohm],
    ]
    return np.linalg.solve(np.array(rows), [cell_v, 0.0, 0.0])[0]


# LIEC, "Ohmmeter design": 9 V, 1 mA, 500 ohm: 8.5 kΩ in series, a quarter at 27 kΩ, three at 3 kΩ.
# Bell ex. 3-14: 1.5 V, 15 kΩ inside, so 100 µA; its coil is not given. Worked problem: 24 V, 100 µA,
# 240 kΩ inside, a quarter at 720 kΩ. SS0602, p. 26: 1 mA, 5 kΩ inside, so 5 V; half at 5 kΩ.
TEXTBOOK = [
    (9.0, 1e-3, 500.0, 9e3, {27e3: 0.25, 9e3: 0.5, 3e3: 0.75}),
    (1.5, 100e-6, 1e3, 15e3, {45e3: 0.25, 15e3: 0.5, 5e3: 0.75}),
    (24.0, 100e-6, 1e3, 240e3, {720e3: 0.25}),
    (5.0, 1e-3, 50.0, 5e3, {5e3: 0.5}),
]


@pytest.mark.parametrize(("cell_v", "coil_a", "coil_ohm", "half_ohm", "places"), TEXTBOOK)
def test_textbook_series_ohmmeters_have_one_resistor(cell_v, coil_a, coil_ohm, half_ohm, places):
    """Where a new cell just drives the coil, all there is to fit is what the books put in series."""
    design = series(half_ohm, cell_v).design(terminals(coil_a, coil_ohm))
    assert parts_of(design) == {"series resistor": pytest.approx(half_ohm - coil_ohm, rel=1e-12)}
    (case,) = design.cases
    assert (case.name, case.signal) == ("×1", 0.0)
    for unknown_ohm, share in places.items():
        assert case.work(design.ohms, unknown_ohm).drive == pytest.approx(share, rel=1e-9)
    assert fact(design, "test current") == pytest.approx(coil_a, rel=1e-12)
    assert fact(design, "battery") == cell_v
    assert fact(design, "no zero adjuster") == pytest.approx(coil_a, rel=1e-12)


def test_textbook_shunted_series_ohmmeter():
    """Rh = E·R2/(If·R2 + If·Rm): 15.5 V, a coil of 0.2 A and 75 Ω with 36 Ω across it is 25.1351 Ω.

    The published worked example of a half-scale resistance (reference values, ohm.rh), turned round:
    for that half scale the whole shunt, with its adjuster as a new cell sets it, is 36 Ω.
    """
    design = series(25.135135135, 15.5).design(terminals(0.2, 75.0))
    loads = design.cases[0].work(design.ohms, 0.0).loads
    assert loads["shunt"].ohms + loads["zero adjuster"].ohms == pytest.approx(36.0, rel=1e-6)
    assert loads[COIL].current_a == pytest.approx(0.2, rel=1e-9)


coils = st.floats(math.log(20e-6), math.log(10e-3)).map(math.exp)
cells = st.floats(1.0, 30.0)
ranges = st.lists(st.sampled_from([0.1, 1.0, 10.0, 100.0, 1000.0]), min_size=1, max_size=4, unique=True)


@st.composite
def series_meters(draw):
    """A series ohmmeter that can be built: figures, circuit, and how far its worn cell falls."""
    coil_a, cell_v = draw(coils), draw(cells)
    coil_v = draw(st.floats(0.01, 0.6)) * cell_v
    # What the coil takes of the chain's current with a new cell.
    taken = math.exp(draw(st.floats(math.log(1e-3), math.log(0.9))))
    times = list_of(TIMES)(draw(ranges))
    zero = draw(st.sampled_from(["across", "series"]))
    half_ohm = taken * cell_v / coil_a / max(times)
    # The chain's current is (E - V)/Rs: with the worn cell the coil needs its own and a hundredth.
    least_v = coil_v + ((cell_v - coil_v) * taken * 1.01 if zero == "across" else 0.0)
    worn_v = least_v + draw(st.floats(1e-3, 0.98)) * (cell_v - least_v)
    return coil_a, coil_v / coil_a, series(half_ohm, cell_v, worn_v, times, zero)


@given(series_meters())
def test_series_ohmmeters_work_on_every_range_new_and_worn(meter):
    """With the parts as bought, Kirchhoff's equations give full, half and the drift that is told.

    The zero adjuster is set with the leads shorted on one range, as a user does it, and found well
    inside its travel, new and worn, even where the potentiometer has 20 % less than its mark.  All
    ranges are then right at once: full at a short, and half where the new cell's or the worn one's
    half scale is told to be.
    """
    coil_a, coil_ohm, circuit = meter
    design = circuit.design(terminals(coil_a, coil_ohm))
    parts = parts_of(design)
    assert list(circuit.times) == [float(case.name[1:]) for case in design.cases]

    def coil_share(cell_v, unknown_ohm, set_ohm, name):
        keys = {"set_ohm": set_ohm, "zero": circuit.zero, "name": name}
        return series_coil_a(parts, coil_ohm, cell_v, unknown_ohm, **keys) / coil_a

    for life, cell in (("new", circuit.battery), ("worn", circuit.worn)):

        def short(set_ohm, cell_v=cell.value):
            return coil_share(cell_v, 0.0, set_ohm, design.cases[0].name) - 1.0

        set_ohm = brentq(short, 1e-9, 0.8 * parts["zero adjuster"], xtol=1e-13, rtol=1e-13)
        told = fact(design, f"zero adjuster, {life}")
        assert 100.0 * set_ohm / parts["zero adjuster"] == pytest.approx(told, rel=1e-6, abs=1e-6)
        for case, times in zip(design.cases, circuit.times, strict=True):
            behind = f" {case.name}" if len(circuit.times) > 1 else ""
            half_ohm = times * circuit.half.value
            if life == "worn":
                # At half scale the scale says times·half: the error is that over what is measured, less one.
                half_ohm /= 1 + fact(design, f"error{behind}, worn") / 100
            assert coil_share(cell.value, 0.0, set_ohm, case.name) == pytest.approx(1.0, rel=1e-7)
            assert coil_share(cell.value, half_ohm, set_ohm, case.name) == pytest.approx(0.5, rel=1e-7)


@given(series_meters(), st.floats(0.0, 20.0))
def test_series_ohmmeters_are_worked_as_kirchhoff_has_it(meter, x):
    """The network of every range has the loops' currents, loses what the cell gives, follows 1/(1 + x)."""
    coil_a, coil_ohm, circuit = meter
    design = circuit.design(terminals(coil_a, coil_ohm))
    parts, cell_v = parts_of(design), circuit.battery.value
    for case, times in zip(design.cases, circuit.times, strict=True):
        unknown_ohm = x * times * circuit.half.value
        working = case.work(design.ohms, unknown_ohm)
        set_ohm = working.loads["zero adjuster"].ohms
        keys = {"set_ohm": set_ohm, "zero": circuit.zero, "name": case.name}
        expected = series_coil_a(parts, coil_ohm, cell_v, unknown_ohm, **keys) / coil_a
        assert working.drive == pytest.approx(expected, rel=1e-9)
        assert working.drive == pytest.approx(1 / (1 + x), rel=1e-9)
        terminal_a = cell_v / (times * circuit.half.value * (1 + x))
        assert working.drop_v == pytest.approx(terminal_a * unknown_ohm, rel=1e-9, abs=1e-9)
        lost_w = sum(load.watts for load in working.loads.values()) + terminal_a * working.drop_v
        assert lost_w == pytest.approx(cell_v * terminal_a, rel=1e-9)
        others = {name for name in parts if name.startswith("shunt ×")} - {f"shunt {case.name}"}
        assert set(working.loads) == set(design.ohms) - others


@given(series_meters())
def test_the_better_place_for_the_zero_adjuster_is_told(meter):
    """In series half scale goes with the voltage; across is advised only where it does drift less."""
    coil_a, coil_ohm, full = meter
    half_ohm = full.half.value * max(full.times)
    errors, advised = {}, False
    for zero in ("across", "series"):
        worn_v = full.worn.value if full.zero == "across" else None
        circuit = series(half_ohm, full.battery.value, worn_v, zero=zero)
        design = circuit.design(terminals(coil_a, coil_ohm))
        # A chain made for a higher half scale than any range has drifts by less than its own measure.
        if worn_v and not any(part.name.startswith("shunt ×") for part in design.parts):
            errors[zero] = fact(design, "error, worn")
        advised = any("would let readings drift less" in fact.note for fact in design.facts)
    if "series" in errors:
        wanted = 100.0 * (full.battery.value / full.worn.value - 1)
        assert errors["series"] == pytest.approx(wanted, rel=1e-9)
    if len(errors) == 2:
        assert errors["across"] < 0 < errors["series"]
        if abs(errors["across"] + errors["series"]) > 1e-9:
            assert advised is (-errors["across"] < errors["series"])


@given(series_meters())
def test_without_a_worn_cell_the_adjuster_follows_the_usual_fall(meter):
    """Nothing said of the worn cell, no drift is told; an adjuster that is fitted reaches what is assumed."""
    coil_a, coil_ohm, full = meter
    circuit = series(full.half.value, full.battery.value, None, full.times, full.zero)
    design = circuit.design(terminals(coil_a, coil_ohm))
    names = {fact.name for fact in design.facts}
    assert not any(name.startswith("error") for name in names)
    assert ("battery, worn" in names) == ("zero adjuster" in parts_of(design))
    if "battery, worn" in names:
        end_v = fact(design, "battery, worn")
        assert 0.8 * full.battery.value * (1 - 1e-12) <= end_v < full.battery.value
        keys = {"zero": circuit.zero, "name": design.cases[0].name}

        def short(set_ohm):
            return series_coil_a(parts_of(design), coil_ohm, end_v, 0.0, set_ohm=set_ohm, **keys) - coil_a

        track_ohm = parts_of(design)["zero adjuster"]
        assert short(1e-9) * short(0.8 * track_ohm) < 0
    assert [case.work(design.ohms, 0.0).drive for case in design.cases] == pytest.approx(
        [1.0] * len(circuit.times), rel=1e-9
    )


@given(series_meters())
def test_lowest_voltage_puts_the_zero_adjuster_at_the_end_of_its_track(meter):
    """At the lowest voltage that is told the leads still give full deflection, with the track at its end."""
    coil_a, coil_ohm, circuit = meter
    design = circuit.design(terminals(coil_a, coil_ohm))
    parts, lowest_v = parts_of(design), fact(design, "battery, lowest")
    end_ohm = parts["zero adjuster"] if circuit.zero == "across" else 0.0
    got = series_coil_a(parts, coil_ohm, lowest_v, 0.0, set_ohm=end_ohm, zero=circuit.zero)
    assert got == pytest.approx(coil_a, rel=1e-9)
    assert lowest_v <= circuit.worn.value * (1 + 1e-9)


def test_low_half_scale_gets_an_adjuster_that_can_be_bought():
    """A 50 µA movement at half scale 15 Ω: its own shunt would be 0.9 Ω, so a range has one."""
    design = series(15.0, 1.5, 1.2).design(terminals(50e-6, 2000.0))
    parts = parts_of(design)
    assert parts["zero adjuster"] >= 10.0
    assert parts["shunt ×1"] == pytest.approx(15.0, rel=5e-3)
    assert parts["shunt"] > 100.0


@given(st.floats(1e-2, 1e6), st.floats(1.02, 50.0))
def test_adjusters_are_potentiometers_as_they_are_sold(low_ohm, ratio):
    """The track is 1, 2.2 or 4.7 of a decade (E3 of IEC 60063), the next that spares a fifth at both ends."""
    found = adjuster(low_ohm * ratio, low_ohm)
    need_ohm = low_ohm * (ratio - 1)
    mantissa = found.track_ohm / 10 ** math.floor(math.log10(found.track_ohm * (1 + 1e-12)))
    assert min(abs(mantissa - each) for each in E3) < 1e-9
    # No more than the step of E3 above what is needed, which is at most 22/10.
    assert 0.6 * found.track_ohm / 2.2 <= need_ohm * (1 + 1e-9) <= 0.6 * found.track_ohm * (1 + 2e-9)
    assert found.fixed_ohm == 0 or found.share(low_ohm) >= 0.2 * (1 - 1e-9)
    assert 0 < found.share(low_ohm) < found.share(low_ohm * ratio) <= 0.8 * (1 + 1e-9)


@st.composite
def shunt_meters(draw):
    """A shunt ohmmeter that can be built."""
    coil_a, cell_v, coil_part = draw(coils), draw(cells), draw(st.floats(0.01, 0.9))
    coil_ohm = coil_part * cell_v / coil_a
    # A bare coil beside its feed is Rm·(1 - V/E); two equal halves of E/Im side by side are E/(4·Im).
    most_ohm = coil_ohm * (1 - coil_part) if coil_part > 0.5 else cell_v / (4 * coil_a)
    half_ohm = draw(st.floats(1e-3, 0.999)) * most_ohm
    # The branch has the coil's voltage, or at most half the cell's where something is in series.
    least = max(0.5, coil_part)
    worn_v = cell_v * (least + draw(st.floats(0.02, 0.95)) * (1 - least))
    return coil_a, coil_ohm, shunt(half_ohm, cell_v, worn_v)


@given(shunt_meters())
def test_shunt_ohmmeters_work_new_and_worn(meter):
    """With the parts as bought, Kirchhoff's equations give full with nothing connected, half, and the drift.

    The full-scale adjuster is found inside its travel, new and worn, by the open terminals alone.
    """
    coil_a, coil_ohm, circuit = meter
    design = circuit.design(terminals(coil_a, coil_ohm))
    parts = parts_of(design)
    assert not {"shunt", "series resistor"} <= set(parts)
    for life, cell in (("new", circuit.battery), ("worn", circuit.worn)):

        def opened(set_ohm, cell_v=cell.value):
            return shunt_coil_a(parts, coil_ohm, cell_v, math.inf, set_ohm) / coil_a - 1.0

        set_ohm = brentq(opened, 0.0, 0.8 * parts["full-scale adjuster"], xtol=1e-13, rtol=1e-13)
        told = fact(design, f"full-scale adjuster, {life}")
        assert 100.0 * set_ohm / parts["full-scale adjuster"] == pytest.approx(told, rel=1e-5, abs=1e-6)
        half_ohm = circuit.half.value
        if life == "worn":
            half_ohm /= 1 + fact(design, "error, worn") / 100
        got = shunt_coil_a(parts, coil_ohm, cell.value, half_ohm, set_ohm)
        assert got == pytest.approx(0.5 * coil_a, rel=1e-7)
    lowest_v = fact(design, "battery, lowest")
    assert shunt_coil_a(parts, coil_ohm, lowest_v, math.inf, 0.0) == pytest.approx(coil_a, rel=1e-9)


@given(shunt_meters(), st.sampled_from([0.0, 0.01, 0.5, 1.0, 7.0, math.inf]))
def test_shunt_ohmmeters_are_worked_as_kirchhoff_has_it(meter, x):
    """The network has the loops' currents, loses what the cell gives, and follows x/(1 + x)."""
    coil_a, coil_ohm, circuit = meter
    design = circuit.design(terminals(coil_a, coil_ohm))
    (case,) = design.cases
    assert math.isinf(case.signal)
    unknown_ohm = x * circuit.half.value
    working = case.work(design.ohms, unknown_ohm)
    loads, cell_v = working.loads, circuit.battery.value
    set_ohm = loads["full-scale adjuster"].ohms
    if x:  # at a short every voltage is rounding
        expected = shunt_coil_a(parts_of(design), coil_ohm, cell_v, unknown_ohm, set_ohm)
        assert working.drive == pytest.approx(expected / coil_a, rel=1e-9)
    assert working.drive == pytest.approx(1.0 if math.isinf(x) else x / (1 + x), rel=1e-9, abs=1e-12)
    fed_a = loads["feed resistor"].current_a
    unknown_w = working.drop_v**2 / unknown_ohm if x else 0.0
    assert sum(load.watts for load in loads.values()) + unknown_w == pytest.approx(cell_v * fed_a, rel=1e-9)
    if math.isinf(x):
        assert working.drop_v == pytest.approx(fact(design, "test voltage"), rel=1e-9)
        assert fed_a == pytest.approx(fact(design, "battery current, open"), rel=1e-9)
    if not x:
        assert fed_a == pytest.approx(fact(design, "test current"), rel=1e-9)


def test_bare_coil_and_feed_need_nothing_else():
    """At half scale Rm·(1 - V/E) the shunt ohmmeter is the coil and its feed: 1 mA, 75 Ω, 1.5 V, 71.25 Ω."""
    design = shunt(71.25, 1.5, 1.2).design(terminals(1e-3, 75.0))
    assert set(parts_of(design)) == {"feed resistor", "full-scale adjuster"}


def test_two_ranges_are_told_in_a_few_lines():
    """What a bench needs of two ranges: battery, test current, drift of each, adjuster and lowest voltage."""
    design = series(150.0, 3.0, 2.4, times=(1.0, 10.0)).design(terminals())
    assert [each.name for each in design.facts] == [
        "battery",
        "test current ×1",
        "error ×1, worn",
        "error ×10, worn",
        "zero adjuster, new",
        "zero adjuster, worn",
        "battery, lowest",
    ]


@pytest.mark.parametrize("given", [0, -1, "10", [], [1, 1], [1, "10"], True, math.inf, 1e9, [1] * 13, None])
def test_ranges_written_wrongly_are_refused(given):
    """Ranges are different numbers above zero."""
    with pytest.raises(ValueError, match=";"):
        list_of(TIMES)(given)


def test_dial_files_name_cell_zero_and_ranges():
    """The keys of the contract are read from a dial file's table."""
    keys = {"half": "15 ohm", "battery": "1.5 V", "worn": "1.2 V", "times": [1, 10], "zero": "series"}
    got = read_kind({"kind": "series ohmmeter", **keys}, CIRCUITS, "circuit")
    assert got == series(15.0, 1.5, 1.2, (1.0, 10.0), "series")
    got = read_kind({"kind": "shunt ohmmeter", **dict(list(keys.items())[:3])}, CIRCUITS, "circuit")
    assert got == shunt(15.0, 1.5, 1.2)
