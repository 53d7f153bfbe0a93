"""Designs assessed: textbook heat, and closed formulas worked by hand.

LIEC is T. R. Kuphaldt, Lessons in Electric Circuits, vol. I, chapter 8; NEETS the US Navy Electricity
and Electronics Training Series, module 3 (NAVEDTRA 14175).
"""

import math
from dataclasses import replace

import eseries
import pytest
from hypothesis import given
from hypothesis import strategies as st
from parts_designs import behind, multiplier, multipliers, ohm, shunt, universal, volts

from dialgen.circuit.bridge import Bridge
from dialgen.circuit.rectifiers.diodes import read_diode
from dialgen.circuit.rectifiers.rectifier import Rectifier
from dialgen.errors import InputError
from dialgen.parts.assessed import assess
from dialgen.parts.bench import Bench

RANGE_A = st.floats(0.005, 100.0)
COIL_OHM = st.floats(10.0, 2000.0)


def only(design, bench=None):
    """The assessment of a design's first part."""
    return assess(design, bench).parts[0]


# LIEC: 1 mA, 500 Ω; the power in the shunts for 0.1, 1, 10 and 100 A (1/8, 1/2, 5, 50 W printed).
@pytest.mark.parametrize(
    ("range_a", "watts", "rating"),
    [(0.1, 0.0495, 0.125), (1.0, 0.4995, 1.0), (10.0, 4.9995, 10.0), (100.0, 49.9995, 100.0)],
)
def test_textbook_heat_of_shunts(range_a, watts, rating):
    """The printed power, twice of it as it is sold, and all of it with the coil's half a milliwatt."""
    found = assess(shunt(range_a))
    assert found.parts[0].full.watts == pytest.approx(watts, rel=1e-9)
    assert found.parts[0].rating_w == rating
    assert found.cases[0].watts == pytest.approx(watts + 0.0005, rel=1e-9)
    assert found.cases[0].drop_v == pytest.approx(0.5, rel=1e-9)
    assert found.cases[0].input_ohm == pytest.approx(0.5 / range_a, rel=1e-9)
    assert found.cases[0].ohms_per_volt is None


def test_the_contracts_shunt():
    """dialfile.md: 1 mA, 75 Ω to 40 A: 1.875046876 mΩ, 2.999925 W, rated 6 W, 75 mV."""
    found = assess(shunt(40.0, coil_ohm=75.0, built=1.885e-3))
    assert found.parts[0].part.ohms == pytest.approx(0.001875046876, rel=1e-9)
    assert found.parts[0].full.watts == pytest.approx(2.999925, rel=1e-12)
    assert found.parts[0].rating_w == 6.0
    assert found.cases[0].drop_v == pytest.approx(0.075)


# LIEC and NEETS 3 p. 1-28: 1 mA is 1 000 Ω/V, 50 µA is 20 000 Ω/V, on every range.
@pytest.mark.parametrize(
    ("coil_a", "coil_ohm", "ohms_per_volt"), [(1e-3, 500.0, 1000.0), (50e-6, 960.0, 20_000.0)]
)
@pytest.mark.parametrize("chain", [False, True])
def test_ohms_per_volt(coil_a, coil_ohm, ohms_per_volt, chain):
    """A voltmeter's sensitivity is that of its movement, whatever the range."""
    for case in assess(multipliers((1.0, 10.0, 100.0), coil_a, coil_ohm, chain=chain)).cases:
        assert case.ohms_per_volt == pytest.approx(ohms_per_volt, rel=1e-9)
        assert case.input_ohm == pytest.approx(ohms_per_volt * case.signal, rel=1e-9)


def test_a_bare_movement_as_a_voltmeter():
    """NEETS: 50 µA in 960 Ω is a 48 mV voltmeter of 20 kΩ/V; nothing is bought for it."""
    found = assess(multiplier(0.048, coil_a=50e-6, coil_ohm=960.0))
    assert found.cases[0].ohms_per_volt == pytest.approx(20_000.0)
    assert found.cases[0].input_ohm == pytest.approx(960.0)
    assert found.parts[0].fits == ()


def test_a_suppressed_zero_takes_the_movements_current():
    """6 V taken off 10 V, 1 mA: at 10 V the source gives 1 mA, which is 1 000 Ω/V."""
    assert assess(multiplier(10.0, suppress=6.0)).cases[0].ohms_per_volt == pytest.approx(1000.0)


# FOSSEE Scilab Textbook Companion 182, ex. 3-10: full wave, 100 µA, 100 V: 9 kΩ/V (0.9 of a DC meter's
# 10 kΩ/V); half wave is half of that.  With the exact form factors 0.9003163 and 0.4501582.
@pytest.mark.parametrize(("wave", "ohms_per_volt"), [("bridge", 9003.163), ("half wave", 4501.582)])
def test_textbook_ohms_per_volt_on_ac(wave, ohms_per_volt):
    """With ideal diodes the RMS current is the mean one by the form factor.

    The coil has next to no resistance, as half of a half wave goes by it.
    """
    circuit = Rectifier(range=volts(100.0)[0], rectifier=wave, diode=read_diode("ideal"))
    (case,) = assess(circuit.design(behind(100e-6, 0.1, 100.0))).cases
    assert case.ohms_per_volt == pytest.approx(ohms_per_volt, rel=1e-6)


def test_a_bridge_balanced_at_the_end_of_its_scale():
    """Where the pointer rests as designed an error is in percent of full deflection.

    Balanced arms of R behind E: R3 up by d moves the middle by E·d/4, which drives d·E/4/(R + Rm)/Im.
    """
    arms = tuple(map(ohm, (100.0, 100.0, 100.0)))
    design = Bridge(supply=volts(1.0)[0], arms=arms).design(behind(1e-3, 900.0, 100.0))
    found = {each.part.name: each for each in assess(design).parts}
    assert found["arm R3"].sensitivity == pytest.approx(-1.0 / 4 / 1000.0 / 1e-3, rel=1e-6)


@given(RANGE_A, COIL_OHM, st.floats(0.0, 2000.0), st.floats(1.0, 3.0))
def test_loads_of_a_shunt(range_a, coil_ohm, swamp_ohm, times):
    """Full scale and overload by Ohm's law: the coil's branch has Im, the shunt the rest."""
    found = assess(shunt(range_a, coil_ohm=coil_ohm, swamp=swamp_ohm), Bench(overload=times))
    drop_v = 1e-3 * (coil_ohm + swamp_ohm)
    part = found.parts[0]
    assert part.full.current_a == pytest.approx(range_a - 1e-3, rel=1e-8)
    assert part.full.voltage_v == pytest.approx(drop_v, rel=1e-8)
    assert part.full.watts == pytest.approx((range_a - 1e-3) * drop_v, rel=1e-8)
    assert part.overload.current_a == pytest.approx(times * (range_a - 1e-3), rel=1e-8)
    assert part.overload.watts == pytest.approx(times**2 * (range_a - 1e-3) * drop_v, rel=1e-8)


def shunted(shunt_ohm, branch_ohm):
    """The share of the current that the coil's branch takes."""
    return shunt_ohm / (shunt_ohm + branch_ohm)


@given(RANGE_A, COIL_OHM)
def test_a_shunts_value_in_the_reading(range_a, coil_ohm):
    """The logarithm of Rs/(Rs + Rm) has the derivative Rm/(Rm + Rs) by that of Rs."""
    part = only(shunt(range_a, coil_ohm=coil_ohm))
    exact = part.part.ohms
    assert part.sensitivity == pytest.approx(coil_ohm / (coil_ohm + exact), rel=1e-6)
    for fit in part.fits:
        factor = shunted(fit.ohms, coil_ohm) / shunted(exact, coil_ohm)
        assert fit.error_percent == pytest.approx(100.0 * (factor - 1.0), abs=1e-7)
        share = fit.tolerance_percent / 100.0
        # Down by the tolerance does more than up by it.
        low = shunted(exact * (1 - share), coil_ohm) / shunted(exact, coil_ohm)
        assert fit.spread_percent == pytest.approx(100.0 * (1.0 - low), abs=1e-7)
    assert [fit.tolerance_percent for fit in part.fits] == [20.0, 10.0, 5.0, 2.0, 1.0, 0.5]


@given(st.floats(2.0, 1000.0), st.floats(10.0, 1500.0), st.floats(0.1, 30.0))
def test_a_multipliers_value_in_the_reading(range_v, coil_ohm, tolerance_percent):
    """The reading goes by 1/(Rx + Rm), so a larger multiplier reads low; low by tolerance does most."""
    part = only(multiplier(range_v, coil_ohm=coil_ohm), Bench(tolerance_percent=tolerance_percent))
    whole, exact = range_v / 1e-3, range_v / 1e-3 - coil_ohm
    assert part.sensitivity == pytest.approx(-exact / whole, rel=1e-6)
    for fit in part.fits:
        expected = 100.0 * (whole / (fit.ohms + coil_ohm) - 1.0)
        assert fit.error_percent == pytest.approx(expected, abs=1e-7)
        assert (fit.ohms > exact) == (fit.error_percent < 0) or math.isclose(fit.ohms, exact)
        least = coil_ohm + exact * (1.0 - tolerance_percent / 100.0)
        assert fit.spread_percent == pytest.approx(100.0 * (whole / least - 1.0), rel=1e-6)
        assert fit.tolerance_percent == tolerance_percent


def test_a_multiplier_from_the_drawer():
    """LIEC's 9.5 kΩ for 10 V: E24 has 9.1 kΩ (eseries agrees), which reads 10/9.6 - 1 = 4.17 % high."""
    part = only(multiplier(10.0), Bench(series="E24"))
    (fit,) = part.fits
    assert fit.ohms == 9100.0 == eseries.find_nearest(eseries.E24, 9500.0)
    assert fit.error_percent == pytest.approx(100.0 / 9.6 * 0.4, rel=1e-9)
    assert fit.spread_percent == pytest.approx(100.0 * (10_000 / (500 + 9500 * 0.95) - 1.0), rel=1e-9)


def test_one_series_and_one_tolerance():
    """A maker's series alone is shown, at its own tolerance or at the one that is given."""
    assert [fit.series for fit in only(shunt(1.0), Bench(series="E96")).fits] == ["E96"]
    (fit,) = only(shunt(1.0), Bench(series="E96", tolerance_percent=0.1)).fits
    assert fit.tolerance_percent == 0.1
    exact = 0.5 / 0.999
    low = shunted(exact * 0.999, 500.0) / shunted(exact, 500.0)
    assert fit.spread_percent == pytest.approx(100.0 * (1.0 - low), rel=1e-9)


def test_heat_in_a_tapped_shunt():
    """dc.ayrton.a: 50 Ω, 1 mA to 1, 5, 10 A: every section has most where it stands before the tap.

    On the 10 A range section 1 carries 9.999 A; on 5 A section 2 carries 4.999 A; on 1 A section 3
    carries 0.999 A.  The whole has most at 10 A, the other two sections being in the coil's branch.
    """
    found = {each.part.name: each for each in assess(universal((1.0, 5.0, 10.0), 1e-3, 50.0)).parts}
    sections = [("section 1", "10 A", 9.999), ("section 2", "5 A", 4.999), ("section 3", "1 A", 0.999)]
    ohms = [0.005005005005, 0.005005005005, 0.04004004004]
    for (name, case, current_a), each in zip(sections, ohms, strict=True):
        assert found[name].case == case
        assert found[name].full.current_a == pytest.approx(current_a, rel=1e-9)
        assert found[name].full.watts == pytest.approx(current_a**2 * each, rel=1e-9)
    whole = found["total"]
    expected_w = 9.999**2 * ohms[0] + 1e-6 * (ohms[1] + ohms[2])
    assert whole.full.watts == pytest.approx(expected_w, rel=1e-9)
    assert (whole.case, whole.full.current_a, whole.fits, whole.sensitivity) == ("10 A", None, (), None)
    assert whole.overload.watts == pytest.approx(1.44 * expected_w, rel=1e-9)


def test_a_tapped_shunts_sections_in_the_reading():
    """Of tap/(Rm + Rs) by a section: s/tap - s/ring before the tap, -s/ring behind it; the worst counts."""
    design = universal((1.0, 5.0, 10.0), 1e-3, 50.0)
    first, second, third = (design.ohms[f"section {i}"] for i in (1, 2, 3))
    ring = 50.0 + first + second + third
    found = {each.part.name: each.sensitivity for each in assess(design).parts}
    assert found["section 1"] == pytest.approx(1.0 - first / ring, rel=1e-6)
    assert found["section 2"] == pytest.approx(second / (first + second) - second / ring, rel=1e-6)
    assert found["section 3"] == pytest.approx(third / (first + second + third) - third / ring, rel=1e-6)


def test_a_resistor_of_one_range_does_nothing_on_another():
    """Of separate multipliers each is judged on its own range alone."""
    found = assess(multipliers((10.0, 100.0), 1e-3, 500.0))
    for part, whole in zip(found.parts, (10_000.0, 100_000.0), strict=True):
        assert part.sensitivity == pytest.approx(-(whole - 500.0) / whole, rel=1e-6)
        assert part.full.watts == pytest.approx(1e-6 * (whole - 500.0), rel=1e-9)


def test_a_chains_tolerances_together():
    """LIEC's chain 9, 90 and 900 kΩ: worst sum and root of squares at 5 %, of the range where they are most.

    On the range of R the sections low by 5 % read whole/(whole - 0.05·section) - 1 high, each alone.
    """
    design = multipliers((1.0, 10.0, 100.0, 1000.0), 1e-3, 500.0, chain=True)
    assert [part.ohms for part in design.parts] == pytest.approx([500.0, 9e3, 9e4, 9e5])
    (found,) = assess(design, Bench(series="E24")).together
    sums, roots = [], []
    for count, whole in enumerate((1e3, 1e4, 1e5, 1e6), 1):
        singles = [100.0 * (whole / (whole - 0.05 * s) - 1.0) for s in (500.0, 9e3, 9e4, 9e5)[:count]]
        sums.append(sum(singles))
        roots.append(math.sqrt(sum(single**2 for single in singles)))
    assert found.worst_percent == pytest.approx(max(sums), rel=1e-9)
    assert found.likely_percent == pytest.approx(max(roots), rel=1e-9)
    # All nearest values at once: 510, 9 100, 91 000 and 910 000 Ω, about 1 % low on every range.
    fitted = [510.0, 9.1e3, 9.1e4, 9.1e5]
    errors = [
        100.0 * (whole / (500.0 + sum(fitted[:count])) - 1.0)
        for count, whole in enumerate((1e3, 1e4, 1e5, 1e6), 1)
    ]
    assert found.error_percent == pytest.approx(min(errors), rel=1e-9)


def test_a_given_part_is_loaded_but_not_sought():
    """A swamping resistor in the file has its heat and what 1 % of it does, and no other value."""
    found = assess(shunt(1.0, swamp=1500.0), Bench(series="E24"))
    swamp = found.parts[1]
    assert swamp.fits == ()
    assert swamp.full.watts == pytest.approx(1e-6 * 1500.0, rel=1e-9)
    assert swamp.sensitivity == pytest.approx(-0.75 * 0.999, rel=1e-6)


@pytest.mark.parametrize("signal", [0.0, math.inf])
def test_an_ohmmeter_has_no_overload(signal):
    """Ohms at the terminals cannot be overdone, and such a meter has no input resistance to speak of."""
    design = shunt(1.0)
    (case,) = design.cases

    def work(ohms, given):
        assert given == signal
        return case.work(ohms, 1.0)

    found = assess(replace(design, unit="Ω", cases=(replace(case, signal=signal, work=work),)))
    assert found.parts[0].overload is None
    assert found.parts[0].full.watts == pytest.approx(0.4995)
    assert found.cases[0].input_ohm is None


def test_a_circuit_without_parts():
    """A movement that is taken as it is has nothing to buy, and still a drop and a drift."""
    found = assess(shunt(1e-3))
    assert (found.parts, found.together) == ((), ())
    assert found.cases[0].drop_v == pytest.approx(0.5)
    assert found.cases[0].input_ohm == pytest.approx(500.0)


@pytest.mark.parametrize(
    ("keys", "message"),
    [
        ({"margin": 0.5}, "margin of 0.5 is out of bounds; write a number from 1 to 100"),
        ({"overload": math.inf}, "overload must be finite"),
        ({"tolerance_percent": 0.0}, "tolerance of 0 is out of bounds"),
        ({"drift_wanted_percent_per_k": -0.1}, "drift of -0.1 is out of bounds"),
        ({"series": "E20"}, "E20 is not a series"),
    ],
)
def test_a_bench_that_makes_no_sense(keys, message):
    """Settings are refused with their own name as the key."""
    with pytest.raises(InputError, match=message) as caught:
        Bench(**keys)
    assert caught.value.keys == (tuple(keys),)
