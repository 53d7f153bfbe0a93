"""Laws: decibel, reflection and power values from standards and textbooks, and by mpmath."""

import math

import mpmath
import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.geometry.kinds import LAWS
from dialgen.geometry.laws import Decibel, Linear, Logarithmic, Power, Reflection
from dialgen.geometry.points import Observed, Table
from dialgen.geometry.sampling import check_one_way, sample_places
from dialgen.quantity import Amount
from dialgen.stage import Affine

ANY_SPAN = (0.0, 1.0)


def signal(law, value):
    """The signal of a law at one value."""
    return float(law.stage(ANY_SPAN, "").forward(np.array(value)))


# 0 dBu is the voltage of 1 mW in 600 ohm; computed from the definition in arithmetic apart from this
# project (reference values, section 4: 0.7745967 V; +4 dBu = 0 VU = 1.227653 V, printed 1.228 V).
DBU = [(0.0, 0.7745967), (4.0, 1.227653), (-12.0, 0.1946), (-8.0, 0.3084), (-4.0, 0.4887)]
# PPM type IIa, IEC 60268-10: mark n stands at 4(n - 4) dBu; 1.2277, 1.9457, 3.0837 V for marks 5 to 7.
DBU += [(8.0, 1.9457), (12.0, 3.0837)]


@pytest.mark.parametrize(("dbu", "volts"), DBU)
def test_dbu_in_volts(dbu, volts):
    """Decibels over 0.7745967 V, and over 1 mW in 600 ohm, give the volts of the published tables."""
    amplitude = Decibel(reference=Amount(0.7745966692414834, "V"))
    power = Decibel(reference=Amount(1e-3, "W"), of="power", load=Amount(600.0, "Ω"))
    assert signal(amplitude, dbu) == pytest.approx(volts, abs=6e-5)
    assert signal(power, dbu) == pytest.approx(volts, abs=6e-5)
    assert power.signal_unit("dBu") == amplitude.signal_unit("dBu") == "V"


@pytest.mark.parametrize(("ohms", "volts"), [(50.0, 0.2236068), (75.0, 0.2738613)])
def test_dbm_in_volts(ohms, volts):
    """0 dBm in 50 and 75 ohm, from the definition P = V²/R (reference values, section 4)."""
    law = Decibel(reference=Amount(1e-3, "W"), of="power", load=Amount(ohms, "Ω"))
    assert signal(law, 0.0) == pytest.approx(volts, abs=5e-8)


# IARU Region 1 Technical Recommendation R.1 (1981): S9 = -73 dBm in 50 ohm = 50.06 µV, 6 dB per S unit.
@pytest.mark.parametrize(
    ("dbm", "microvolts"), [(-73.0, 50.06), (-79.0, 25.09), (-97.0, 3.159), (-121.0, 0.1993), (-93.0, 5.006)]
)
def test_s_meter_levels(dbm, microvolts):
    """The S meter's levels in dBm give the recommendation's microvolts."""
    law = Decibel(reference=Amount(1e-3, "W"), of="power", load=Amount(50.0, "Ω"))
    assert signal(law, dbm) * 1e6 == pytest.approx(microvolts, rel=2e-4)


# VU law of a linear average meter with +3 VU at full scale, fractions from 10^((v-3)/20) computed apart
# (reference values, section 4); R. Chinn, D. K. Gannett, R. M. Morris, Proc. IRE 28 (1940): about 71 % at 0.
VU = {
    -20: 0.07079, -10: 0.22387, -7: 0.31623, -6: 0.35481, -5: 0.39811, -4: 0.44668, -3: 0.50119,
    -2: 0.56234, -1: 0.63096, 0: 0.70795, 1: 0.79433, 2: 0.89125, 3: 1.0,
}  # fmt: skip


@pytest.mark.parametrize(("vu", "fraction"), VU.items())
def test_vu_fractions_of_full_scale(vu, fraction):
    """Signals at VU marks over the signal at +3 are the published fractions."""
    assert signal(Decibel(), float(vu)) / signal(Decibel(), 3.0) == pytest.approx(fraction, abs=6e-6)


@pytest.mark.parametrize(("db", "ratio"), [(10.0, 10.0), (-3.0, 0.501187), (20.0, 100.0)])
def test_decibels_of_power_without_load(db, ratio):
    """Of a power, 10 dB is ten times the reference (definition; -3 dB is 0.501187 by mpmath)."""
    law = Decibel(reference=Amount(2.0, "W"), of="power")
    assert signal(law, db) == pytest.approx(2.0 * ratio, rel=1e-6)
    assert law.signal_unit("dB") == "W"


# Standing-wave ratio and reflection, rounded as in two published tables (reference values, section 13).
SWR = [
    (1.05, 0.02439, 32.256),
    (1.1, 0.04762, 26.444),
    (1.2, 0.09091, 20.828),
    (1.5, 0.2, 13.979),
    (1.7, 0.25926, 11.725),
    (2.0, 0.33333, 9.542),
    (3.0, 0.5, 6.021),
    (5.0, 0.66667, 3.522),
    (10.0, 0.81818, 1.743),
]


@pytest.mark.parametrize(("ratio", "gamma", "return_loss_db"), SWR)
def test_reflection_of_standing_wave_ratios(ratio, gamma, return_loss_db):
    """Standing-wave ratios give the tables' reflection coefficients and return losses."""
    made = signal(Reflection(), ratio)
    assert made == pytest.approx(gamma, abs=6e-6)
    assert -20.0 * math.log10(made) == pytest.approx(return_loss_db, abs=6e-4)


def test_reflection_ends():
    """A ratio of 1 reflects nothing and an infinite one everything, both ways round."""
    stage = Reflection().stage(ANY_SPAN, "")
    assert stage.forward(np.array([1.0, math.inf])).tolist() == [0.0, 1.0]
    assert stage.inverse(np.array([0.0, 1.0])).tolist() == [1.0, math.inf]


# Linear voltage detector with a power scale: deflection is the square root of power (section 13).
@pytest.mark.parametrize(
    ("share", "deflection"),
    [(0.01, 0.1), (0.04, 0.2), (0.1, 0.316228), (0.25, 0.5), (0.5, 0.707107), (0.75, 0.866025)],
)
def test_power_scale_of_a_voltage_detector(share, deflection):
    """A share of full power stands at the root of that share of the full voltage."""
    law = Power(exponent=0.5, load=Amount(50.0, "Ω"))
    assert signal(law, 100.0 * share) / signal(law, 100.0) == pytest.approx(deflection, abs=5e-7)
    assert law.signal_unit("W") == "V"


def test_volts_of_a_power_in_a_load():
    """100 W in 50 ohm is 70.71068 V (P = V²/R)."""
    assert signal(Power(exponent=0.5, load=Amount(50.0, "Ω")), 100.0) == pytest.approx(70.71068, abs=5e-6)


@given(st.floats(1e-3, 1e3), st.floats(0.1, 5.0), st.booleans())
def test_power_equals_mpmath(value, exponent, falls):
    """value^exponent, exponents below zero included, is mpmath's."""
    exponent = -exponent if falls else exponent
    expected = float(mpmath.mpf(value) ** mpmath.mpf(exponent))
    assert signal(Power(exponent=exponent), value) == pytest.approx(expected, rel=1e-13)


@given(st.sampled_from((1.0, 3.0, 5.0)), st.floats(-10.0, 10.0))
def test_odd_powers_take_both_signs(exponent, value):
    """An odd whole exponent takes negative values too, and its inverse gives them back."""
    stage = Power(exponent=exponent).stage(ANY_SPAN, "")
    made = float(stage.forward(np.array(value)))
    assert made == pytest.approx(value ** int(exponent), rel=1e-13)
    assert float(stage.inverse(np.array(made))) == pytest.approx(value, rel=1e-13, abs=1e-60)


@given(st.floats(1e-6, 1e6))
def test_logarithmic_equals_mpmath(value):
    """The logarithm is mpmath's, and its inverse gives the value back."""
    stage = Logarithmic().stage(ANY_SPAN, "")
    made = float(stage.forward(np.array(value)))
    assert made == pytest.approx(float(mpmath.log10(value)), rel=1e-14, abs=1e-16)
    assert float(stage.inverse(np.array(made))) == pytest.approx(value, rel=1e-13)


def test_linear_with_per_and_at_zero():
    """A 4 to 20 mA loop over 0 to 100: at_zero 4 mA and 0.16 mA for one face unit."""
    law = Linear(per=Amount(0.16e-3, "A"), at_zero=Amount(4e-3, "A"))
    assert [signal(law, v) for v in (0.0, 50.0, 100.0)] == pytest.approx([4e-3, 12e-3, 20e-3])
    assert law.takes_face_values
    assert law.signal_unit("degC") == "A"


def test_linear_alone_is_the_value_in_its_unit():
    """Without per the signal is the value itself, in the scale's unit."""
    assert signal(Linear(), 3.5) == 3.5
    assert Linear().signal_unit("V") == "V"
    assert not Linear().takes_face_values


def test_table_passes_through_its_points_in_their_unit():
    """A table gives its own signals at its own values, and tells their unit."""
    law = Table(
        points=((0.0, Amount(0.0, "V")), (100.0, Amount(5.269e-3, "V")), (200.0, Amount(0.0108, "V")))
    )
    assert [signal(law, v) for v in (0.0, 100.0, 200.0)] == pytest.approx([0.0, 5.269e-3, 0.0108])
    assert law.signal_unit("degC") == "V"
    assert Table(points=((0.0, 1.0), (1.0, 2.0))).signal_unit("degC") is None


@pytest.mark.parametrize(
    ("points", "zero"),
    [
        (((0.0, 0.0), (1.0, 2.0)), 0.0),
        (((0.0, -1.0), (1.0, 2.0)), 0.0),
        (((0.0, 1.0), (1.0, 2.0)), None),
        (((0.0, 3.0), (1.0, 0.0)), 0.0),
    ],
)
def test_table_has_a_zero_only_where_its_points_reach_it(points, zero):
    """A table's zero signal is 0 where its points reach it, and None elsewhere."""
    assert Table(points=points).zero(ANY_SPAN, "") == zero


def test_other_zeros():
    """Every other law rests at zero signal, but the logarithm, which has none."""
    for law in (Linear(), Power(exponent=0.5), Decibel(), Reflection()):
        assert law.zero(ANY_SPAN, "") == 0.0
    assert Logarithmic().zero(ANY_SPAN, "") is None


@pytest.mark.parametrize(
    "make",
    [
        lambda: Linear(at_zero=Amount(4e-3, "A")),
        lambda: Linear(per=Amount(0.0, "A")),
        lambda: Linear(per=Amount(1e-3, "V"), at_zero=Amount(4e-3, "A")),
        lambda: Power(exponent=0.0),
        lambda: Power(exponent=2.0, load=Amount(50.0, "Ω")),
        lambda: Decibel(load=Amount(600.0, "Ω")),
        lambda: Decibel(of="power", load=Amount(600.0, "Ω")),
        lambda: Decibel(of="power", load=Amount(600.0, "Ω"), reference=Amount(1.0, "V")),
        lambda: Table(points=((0.0, 0.0),)),
        lambda: Table(points=((0.0, 0.0), (1.0, 1.0), (2.0, 0.5))),
        lambda: Table(points=((0.0, Amount(1.0, "V")), (1.0, 2.0))),
        lambda: Table(points=((0.0, Amount(1.0, "V")), (1.0, Amount(2.0, "A")))),
        lambda: Table(points=((0.0, 0.0), (0.0, 1.0))),
    ],
)
def test_laws_that_make_no_sense_are_refused_with_their_key(make):
    """A law whose keys contradict each other, or that gives every value one signal, is refused."""
    with pytest.raises(InputError) as caught:
        make()
    assert caught.value.keys
    assert ";" in caught.value.message


def test_observed_in_half_over_half_plus_value():
    """Beside an ohms circuit the points are joined in half/(half + value): two points give its own law."""
    law = Observed(points=((0.0, 44.0), (math.inf, -44.0)))
    stage = law.curve((44.0, -44.0), 15.0)
    # Even in half/(half + R), so at R = half the pointer stands in the middle, at 3·half at a quarter.
    assert stage.forward(np.array([0.0, 15.0, 45.0, math.inf])) == pytest.approx([44.0, 0.0, -22.0, -44.0])
    assert stage.inverse(np.array([44.0, 0.0, -22.0, -44.0])) == pytest.approx([0.0, 15.0, 45.0, math.inf])


def test_observed_at_inf_needs_an_ohms_circuit():
    """A last point at infinity is refused where no half-scale value stands beside it."""
    with pytest.raises(InputError, match="half beside it"):
        Observed(points=((0.0, 44.0), (math.inf, -44.0))).curve((44.0, -44.0), None)


@pytest.mark.parametrize("values", [(0.0, 0.0), (5.0, 1.0)])
def test_observed_out_of_order_is_refused(values):
    """Observed values must ascend, with a half-scale value and without."""
    law = Observed(points=((values[0], 0.0), (values[1], 1.0)))
    for half in (None, 15.0):
        with pytest.raises(InputError, match="ascending"):
            law.curve((0.0, 1.0), half)


def test_table_of_laws_names_each_by_its_kind():
    """Every law stands in the table under its own kind."""
    assert all(law.kind == kind for kind, law in LAWS.items())
    assert {"linear", "power", "decibel", "logarithmic", "reflection", "table", "formula", "observed"} <= set(
        LAWS
    )


@pytest.mark.parametrize("span", [(0.0, 10.0), (-5.0, 3.0), (2.0, math.inf), (0.0, math.inf)])
def test_sampled_places_ascend_within_the_span(span):
    """Sampled places ascend strictly from the start, and stay within the span."""
    places = sample_places(span, 65)
    assert places[0] == span[0]
    assert (np.diff(places) > 0).all()
    assert places[-1] <= span[1]


def test_a_law_that_stands_still_is_refused():
    """A law that gives one signal all along is refused, naming values."""
    with pytest.raises(InputError, match="turns or stands still between 0 and"):
        check_one_way(Affine(0.0, 1.0), (0.0, 1.0), 9)
