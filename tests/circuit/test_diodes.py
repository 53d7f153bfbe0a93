"""Diodes in a loop with a resistance and a sine: scipy's quadrature over the angle, and closed forms.

The reference solves the loop at each angle with Wright's omega function, or scipy's root finder, and
integrates over the angle; the program never does either.
"""

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.integrate import quad
from scipy.optimize import brentq
from sine_loops import VT, knee, log_floats, loop_current, quarter_mean

from dialgen.circuit.rectifiers.conduction import Ideal, Threshold
from dialgen.circuit.rectifiers.diodes import TYPICAL, read_diode
from dialgen.circuit.rectifiers.junction import THERMAL_V, Exponential

DIODES = st.one_of(
    st.sampled_from(list(TYPICAL.values())),
    st.builds(Exponential, log_floats(1e-15, 1e-4), st.floats(1.0, 4.0), st.floats(0.0, 200.0)),
)
LOOPS = {
    "diode": DIODES,
    "ohms": log_floats(20.0, 5e7),
    "peak_v": log_floats(1e-3, 1.4e3),
    "count": st.sampled_from([1, 2]),
}


def test_thermal_voltage_is_from_the_exact_constants():
    """kT/q at 25 °C agrees with the constants that scipy takes from CODATA."""
    assert pytest.approx(VT, rel=1e-15) == THERMAL_V


@pytest.mark.filterwarnings("ignore::scipy.integrate.IntegrationWarning")
@settings(max_examples=60, deadline=None)
@given(**LOOPS)
def test_averages_of_a_real_junction_are_those_of_its_current_over_the_angle(diode, ohms, peak_v, count):
    """Mean, mean square and power equal scipy's integrals of the current solved at each angle."""
    found = diode.averages(np.array(peak_v), np.array(ohms), count)
    knee_v = knee(diode, ohms, peak_v, count)

    def current(volts):
        return loop_current(volts, ohms, diode, count)

    assert found.peak_a == pytest.approx(current(peak_v), rel=1e-12, abs=1e-15 * diode.saturation_a)
    # Wright's function less one rounds to the diode's saturation current.
    grain = 1e-14 * diode.saturation_a
    assert found.mean_a == pytest.approx(quarter_mean(current, peak_v, knee_v), rel=1e-11, abs=grain)
    square = quarter_mean(lambda v: current(v) ** 2, peak_v, knee_v)
    assert found.square_a2 == pytest.approx(square, rel=1e-11, abs=grain * float(found.peak_a))
    power = quarter_mean(lambda v: v * current(v), peak_v, knee_v)
    assert found.power_w == pytest.approx(power, rel=1e-11, abs=grain * peak_v)


@pytest.mark.parametrize("name", TYPICAL)
def test_a_millivolt_drives_the_current_of_the_junctions_slope(name):
    """Far below n·kT/q a diode is the resistance n·kT/q/Is, by Shockley's equation at zero."""
    diode = TYPICAL[name]
    ohms = 50.0 + 2 * (diode.ideality * VT / diode.saturation_a + diode.resistance_ohm)
    found = diode.averages(np.array(1e-6), np.array(50.0), 2)
    assert found.mean_a == pytest.approx(2 / math.pi * 1e-6 / ohms, rel=2e-5)


@settings(max_examples=60, deadline=None)
@given(share=st.floats(0.0, 1.0), **LOOPS)
def test_the_interpolated_curve_is_the_quadrature(diode, ohms, peak_v, count, share):
    """For the whole scale at once the mean current is what quadrature gives at each place."""
    curve = diode.curve(ohms, count, peak_v)
    at = np.array([share * peak_v, peak_v])
    exact = diode.averages(at, np.array(ohms), count).mean_a
    assert curve.mean_a(at) == pytest.approx(exact, rel=2e-12, abs=1e-300)


def test_the_interpolated_curve_holds_for_the_smallest_saturation_current():
    """The least current that can be written, an attoampere, needs no more than the polynomial has."""
    diode = Exponential(1e-18, 1.0)
    at = np.geomspace(1e-3, 1e3, 200)
    exact = diode.averages(at, np.array(30.0), 1).mean_a
    assert diode.curve(30.0, 1, 1e3).mean_a(at) == pytest.approx(exact, rel=1e-11)


@settings(max_examples=60, deadline=None)
@given(**LOOPS)
def test_a_real_curve_rises_and_comes_back(diode, ohms, peak_v, count):
    """The mean current rises with the peak, and the peak comes back from it to rounding."""
    curve = diode.curve(ohms, count, peak_v)
    peaks = np.concatenate(([0.0], np.geomspace(1e-6, 1.0, 200) * peak_v))
    means = curve.mean_a(peaks)
    assert means[0] == 0.0
    assert (np.diff(means) > 0).all()
    assert curve.peak_v(means) == pytest.approx(peaks, rel=1e-12)


def test_a_place_of_a_curve_does_not_depend_on_its_neighbours():
    """Each value of an array comes out as it does alone, forth and back, to the last bit."""
    for diode in (TYPICAL["silicon"], Threshold(0.7)):
        curve = diode.curve(1500.0, 2, 45.0)
        peaks = np.linspace(0.0, 45.0, 57)
        means = curve.mean_a(peaks)
        assert [float(curve.mean_a(np.array([p]))[0]) for p in peaks] == means.tolist()
        alone = [float(curve.peak_v(np.array([m]))[0]) for m in means]
        assert alone == curve.peak_v(means).tolist()


@given(
    drop_v=log_floats(0.01, 2.0), ohms=log_floats(20.0, 1e7), ratio=log_floats(0.2, 1e3),
    count=st.sampled_from([1, 2]),
)  # fmt: skip
@settings(max_examples=60, deadline=None)
def test_averages_of_a_threshold_are_those_of_the_clipped_sine(drop_v, ohms, ratio, count):
    """Mean, mean square and power equal scipy's integrals of (E sin θ - D)/R where that is positive."""
    whole_v = count * drop_v
    peak_v = ratio * whole_v
    found = Threshold(drop_v).averages(np.array(peak_v), np.array(ohms), count)
    peak_a = peak_v / ohms
    start = math.asin(min(whole_v / peak_v, 1.0))

    def mean(function, floor):
        area = quad(lambda t: function(peak_v * math.sin(t)), start, math.pi / 2, epsrel=1e-12, epsabs=floor)[
            0
        ]
        return area / (math.pi / 2)

    def current(volts):
        return max(volts - whole_v, 0.0) / ohms

    assert found.peak_a == pytest.approx(current(peak_v), rel=1e-12)
    assert found.mean_a == pytest.approx(mean(current, 1e-14 * peak_a), abs=1e-12 * peak_a)
    assert found.square_a2 == pytest.approx(
        mean(lambda v: current(v) ** 2, 1e-14 * peak_a**2), abs=1e-12 * peak_a**2
    )
    assert found.power_w == pytest.approx(
        mean(lambda v: v * current(v), 1e-14 * peak_a * peak_v), abs=1e-12 * peak_a * peak_v
    )
    curve = Threshold(drop_v).curve(ohms, count, peak_v)
    assert curve.mean_a(np.array(peak_v)) == pytest.approx(float(found.mean_a), abs=1e-14 * peak_a)


@given(share=st.floats(0.0, 1.0), drop_v=log_floats(0.01, 2.0))
def test_a_threshold_comes_back_to_its_peak(share, drop_v):
    """Above the drop the peak comes back from the mean; no current at all comes back as no voltage."""
    curve = Threshold(drop_v).curve(100.0, 2, 1e3)
    peaks = np.array([0.0, share * 2 * drop_v, 2 * drop_v * (1.001 + 1e3 * share)])
    means = curve.mean_a(peaks)
    assert (means[:2] == 0.0).all()
    assert curve.peak_v(means) == pytest.approx([0.0, 0.0, peaks[2]], rel=1e-12)


def test_the_inverse_of_a_threshold_is_the_root_that_scipy_finds():
    """Brent's method on the printed closed form gives the same peak for currents of all sizes."""
    drop_v, ohms = 1.2, 1000.0

    def mean(peak_v):
        a = math.asin(drop_v / peak_v)
        return 2 / math.pi * (peak_v * math.cos(a) - drop_v * (math.pi / 2 - a)) / ohms

    curve = Threshold(drop_v).curve(ohms, 1, 1e3)
    for wanted_a in (1e-7, 1e-6, 1e-5, 1e-4, 1e-3, 0.1):
        root = brentq(lambda v, wanted_a=wanted_a: mean(v) - wanted_a, drop_v, 1e4, xtol=1e-14)
        assert curve.peak_v(np.array(wanted_a)) == pytest.approx(root, rel=1e-10)


def test_an_ideal_diode_leaves_half_a_sine():
    """Half a sine's mean is 2/π and its RMS 1/√2 of the peak; rect.ff: their ratio is π/(2√2)."""
    found = Ideal().averages(np.array(10.0), np.array(5.0), 2)
    assert found.mean_a == pytest.approx(4 / math.pi, rel=1e-15)
    assert math.sqrt(found.square_a2) / found.mean_a == pytest.approx(1.1107207345395915, rel=1e-14)
    assert found.power_w == pytest.approx(10.0, rel=1e-15)


def test_typical_diodes_have_the_figures_of_the_contract():
    """dialfile.md: what is assumed of silicon, germanium, Schottky and copper-oxide diodes."""
    contract = {
        "silicon": Exponential(2.5e-9, 1.75, 0.6),
        "germanium": Exponential(1e-6, 1.2, 8.0),
        "schottky": Exponential(200e-9, 1.05, 5.0),
        "copper oxide": Exponential(5e-6, 2.0, 100.0),
    }
    assert contract == TYPICAL


@pytest.mark.parametrize(
    ("written", "junction", "typical"),
    [
        ({"saturation": "2.5 nA", "ideality": 1.75, "resistance": "0.6 ohm"}, TYPICAL["silicon"], ""),
        ({"saturation": "1 uA", "ideality": 2}, Exponential(1e-6, 2.0, 0.0), ""),
        ({"drop": "0.7 V"}, Threshold(0.7), ""),
        ({"drop": "0 V"}, Ideal(), ""),
        ("ideal", Ideal(), ""),
        ("copper oxide", TYPICAL["copper oxide"], "copper oxide"),
    ],
)
def test_a_diode_is_read_by_figures_drop_or_name(written, junction, typical):
    """Each way of the contract to state a diode gives its figures, and only a typical one is assumed."""
    diode = read_diode(written)
    assert diode.junction == junction
    assert diode.typical == typical


@pytest.mark.parametrize(
    ("written", "fault"),
    [
        ("selenium", '"selenium" is not a diode known here'),
        (0.7, "a diode is a name or a table, not 0.7"),
        ({"drop": "-0.7 V"}, "is below 0"),
        ({"drop": 0.7}, "needs its unit"),
        ({"drop": "0.7 V", "ideality": 2}, "ideality is not a key of such a diode"),
        ({"saturation": "1 uA"}, "has no ideality"),
        ({}, "has no saturation and no ideality"),
        ({"saturation": "0 A", "ideality": 1.5}, "is not above 0"),
        ({"saturation": "1 uA", "ideality": "2"}, "write it bare"),
        ({"saturation": "1 uA", "ideality": 0}, "ideality of 0 is out of bounds"),
        ({"saturation": "1 uA", "ideality": 2, "drop_v": "1 V"}, "drop_v is not a key"),
    ],
)
def test_what_is_no_diode_is_refused(written, fault):
    """Names not known, bare numbers, missing and strange figures: each says what is wrong."""
    with pytest.raises(ValueError, match=fault):
        read_diode(written)
