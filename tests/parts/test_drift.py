"""Temperature: copper by IEC 60028, and swamping by hand.

By hand, α for copper, β for the rest, G = Rm' + Rs: a multiplier's reading falls by the mean
(α·Rcu + β·Rrest)/R; a shunt's by Rm'/G·((α·Rcu + β·swamp)/Rm' - β).
"""

from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st
from parts_designs import amperes, behind, multiplier, ohm, shunt, universal

from dialgen.circuit.shunt import Rating, Shunt
from dialgen.circuit.universal import UniversalShunt
from dialgen.errors import InputError
from dialgen.parts.drift import Materials, NoSwamping, Swamping, drifts, swamping

ALPHA, BETA = 0.00393, 1.5e-5  # copper by IEC 60028, manganin as in Kuphaldt, LIEC V
OHMS = st.floats(1.0, 3000.0)


@pytest.mark.parametrize(
    ("at_deg", "ratio"),
    [(0, 0.92140), (10, 0.96070), (25, 1.01965), (30, 1.03930), (40, 1.07860), (60, 1.15720)],
)
def test_copper_of_iec_60028(at_deg, ratio):
    """R(t)/R20 of annealed copper, IEC 60028 (reference values, section 8)."""
    warm = Materials().warmed({"coil": 1.0, "leads": 1.0, "line": 1.0}, at_deg - 20.0)
    assert list(warm.values()) == pytest.approx([ratio] * 3, abs=1e-9)
    assert ratio == pytest.approx((234.45 + at_deg) / 254.45, abs=1e-5)


def test_swamped_copper_in_a_voltmeter():
    """50 Ω of copper with 450 Ω that stays drifts by 0.0393 %/K (reference values, section 8)."""
    design = multiplier(0.5, coil_a=1e-3, coil_ohm=50.0)
    (drift,) = drifts(design, Materials(others_per_k=0.0))
    assert drift.percent_per_k == pytest.approx(-0.0393, abs=1e-7)


def test_textbook_voltmeter_of_moving_iron():
    """dc.swamp.mi: 400 Ω of copper in 3 000 Ω, 0.004 and 1e-5 a kelvin: 0.0542 %/K (FOSSEE, ex. 5-10)."""
    design = multiplier(150.0, coil_a=0.05, coil_ohm=400.0)
    (drift,) = drifts(design, Materials(copper_per_k=0.004, others_per_k=1e-5))
    assert drift.percent_per_k == pytest.approx(-0.0542, abs=1e-7)


@given(st.floats(0.01, 50.0), OHMS, st.floats(0.0, 3000.0), st.floats(0.0, 10.0))
def test_a_shunt_drifts_by_its_copper(range_a, coil_ohm, swamp_ohm, leads_ohm):
    """The derivative of the current division by temperature, by hand; leads are copper too."""
    design = shunt(range_a, coil_ohm=coil_ohm, swamp=swamp_ohm, leads=leads_ohm)
    branch, shunt_ohm = coil_ohm + swamp_ohm + leads_ohm, design.ohms["shunt"]
    branch_per_k = (ALPHA * (coil_ohm + leads_ohm) + BETA * swamp_ohm) / branch
    expected = -100.0 * branch / (branch + shunt_ohm) * (branch_per_k - BETA)
    # Half the change over two kelvins differs from the derivative by the square of the rise.
    assert drifts(design)[0].percent_per_k == pytest.approx(expected, rel=2e-5, abs=1e-9)


def test_every_range_of_a_universal_shunt_drifts_alike():
    """The ring of a universal shunt is one for all ranges, and its division alone drifts."""
    found = drifts(universal((0.1, 1.0, 10.0), 1e-3, 100.0))
    ring = 100.0 + 0.1 / 0.099
    for drift in found:
        # Sections in the coil's branch are manganin; what counts is copper over the whole ring.
        assert drift.percent_per_k == pytest.approx(-100 * (ALPHA - BETA) * 100.0 / ring, rel=2e-5)
    assert len(found) == 3


@given(st.floats(0.05, 50.0), OHMS, st.floats(0.01, 0.3))
def test_swamping_of_a_shunt_by_hand(range_a, coil_ohm, wanted):
    """The swamp for a drift: of the ring of coil, swamp and shunt copper may be wanted/(α - β).

    The ring is (Rm + S)·range/(range - Im), so S = Rm·((α - β)/wanted·(range - Im)/range - 1); the drop
    rises as coil and swamp over the coil.
    """

    def redesign(ohms):
        return shunt(range_a, coil_ohm=coil_ohm, swamp=ohms)

    found = swamping(redesign(0.0), redesign, wanted)
    assert isinstance(found, Swamping)
    share = (range_a - 1e-3) / range_a
    expected = coil_ohm * ((ALPHA - BETA) * 100.0 / wanted * share - 1.0)
    assert found.swamp_ohm == pytest.approx(expected, rel=1e-4, abs=1e-4 * coil_ohm)
    assert found.percent_per_k == pytest.approx(-wanted, rel=1e-9)
    assert found.before_percent_per_k == pytest.approx(-(ALPHA - BETA) * 100.0 * share, rel=2e-5)
    assert found.before_drop_v == pytest.approx(1e-3 * coil_ohm)
    assert found.drop_v / found.before_drop_v == pytest.approx((coil_ohm + found.swamp_ohm) / coil_ohm)


def swamped(ohms):
    """A shunt of 100 A before 1 mA in 50 Ω, with a swamping resistor."""
    return shunt(100.0, coil_ohm=50.0, swamp=ohms)


def test_textbook_ratio_of_swamping():
    """A tenth of copper leaves a tenth of its drift: nine times the coil, ten times the drop."""
    found = swamping(swamped(0.0), swamped, 0.0393, Materials(others_per_k=0.0))
    assert found.swamp_ohm == pytest.approx(450.0, rel=1e-4)
    assert found.drop_v == pytest.approx(0.5, rel=1e-4)


def test_no_swamp_where_the_drift_is_small_enough():
    """A circuit that is good enough gets nothing."""
    found = swamping(swamped(0.0), swamped, 0.5)
    assert found.swamp_ohm == 0.0
    assert found.drop_v == found.before_drop_v


def test_the_shunt_that_goes_with_the_swamp_is_told():
    """The new shunt carries the branch's drop over range less coil, Im·(Rm + S)/(range - Im) (Kirchhoff)."""
    found = swamping(swamped(0.0), swamped, 0.1)
    (part,) = found.remade(swamped(0.0))
    assert part.name == "shunt"
    assert part.before_ohm == pytest.approx(0.05 / 99.999, rel=1e-9)
    assert part.ohms == pytest.approx(1e-3 * (50.0 + found.swamp_ohm) / 99.999, rel=1e-9)
    (measured,) = found.remade(shunt(100.0, coil_ohm=50.0, built=0.51e-3))
    assert measured.before_ohm == 0.51e-3
    assert found.remade(found.design) == ()


@pytest.mark.parametrize(("over", "needed"), [(0.0009, False), (0.0011, True)])
def test_a_drift_within_a_thousandth_is_as_wanted(over, needed):
    """Advice printed in four figures must not be corrected when it is followed."""
    wanted = abs(drifts(swamped(100.0))[0].percent_per_k) / (1 + over)
    assert (swamping(swamped(100.0), swamped, wanted).swamp_ohm > 0) == needed


def bought(swamp_ohm=None):
    """A bought shunt of 100 A/75 mV before 1 mA in 20 Ω; its swamp makes up 75 Ω (about)."""
    rated = Rating(current_a=100.0, drop_v=0.075)
    return Shunt(rated=rated, swamp=ohm(swamp_ohm)).design(behind(1e-3, 20.0, 100.0))


def test_a_bought_shunt_is_judged_as_it_is():
    """20 of 75 Ω are copper, so it drifts by 0.1044 %/K: 0.15 %/K is met already, by the swamp designed."""
    found = swamping(bought(), swamped, 0.15)
    assert found.swamp_ohm == 0.0
    expected = -100.0 * (ALPHA - BETA) * 20.0 / 75.0
    assert found.percent_per_k == pytest.approx(expected, rel=1e-4)
    assert found.percent_per_k == found.before_percent_per_k


def test_a_bought_shunt_that_drifts_too_much_needs_another():
    """For 0.05 %/K of 20 Ω the branch has (α - β)·20/0.0005 Ω, and drops that times 1 mA."""

    def redesign(ohms):
        return shunt(100.0, coil_ohm=20.0, swamp=ohms)

    found = swamping(bought(), redesign, 0.05)
    whole_ohm = (ALPHA - BETA) * 20.0 / 0.0005
    assert found.swamp_ohm == pytest.approx(whole_ohm - 20.0, rel=1e-3)
    assert found.drop_v == pytest.approx(1e-3 * whole_ohm, rel=1e-3)
    assert found.before_drop_v == pytest.approx(0.075, rel=1e-4)
    (part,) = found.remade(bought())
    assert (part.name, part.before_ohm) == ("shunt", pytest.approx(0.75e-3, rel=1e-12))


@pytest.mark.parametrize("range_v", [0.5, 1.0, 10.0])
def test_swamping_does_not_help_a_multiplier(range_v):
    """Its whole resistance is range over current; a larger range or less copper helps, by hand."""

    def redesign(ohms):
        return multiplier(range_v, coil_a=1e-3, coil_ohm=500.0, swamp=ohms)

    found = swamping(redesign(0.0), redesign, 0.01)
    assert isinstance(found, NoSwamping)
    whole_ohm = range_v / 1e-3
    assert found.copper_share == pytest.approx(500.0 / whole_ohm, rel=1e-4)
    better = multiplier(range_v * found.range_factor, coil_ohm=500.0)
    assert drifts(better)[0].percent_per_k == pytest.approx(-0.01, rel=1e-4)


def voltmeter(ohms):
    """10 V with a swamping resistor."""
    return multiplier(10.0, swamp=ohms)


def test_less_drift_than_manganin_cannot_be_had():
    """A voltmeter of manganin drifts by manganin's own 0.0015 %/K whatever its range."""
    found = swamping(voltmeter(0.0), voltmeter, 0.0014)
    assert isinstance(found, NoSwamping)
    assert found.range_factor is None


def test_no_drift_at_all_is_refused():
    """A wanted drift of nothing is no figure."""
    with pytest.raises(InputError, match="cannot be had"):
        swamping(swamped(0.0), swamped, 0.0)


def test_the_range_of_the_scale_is_the_one_whose_drop_is_told():
    """Of a universal shunt for 1 and 10 A on the 10 A scale the drop is that of 10 A, by hand."""
    circuit = UniversalShunt(ranges=amperes(1.0, 10.0))

    def redesign(ohms):
        return replace(circuit, swamp=ohm(ohms)).design(behind(1e-3, 50.0, 10.0))

    found = swamping(redesign(0.0), redesign, 0.1)
    # The whole shunt Im·Rm/(1 A - Im) and the ring; from the 10 A tap to the foot is ring·Im/10 A, and
    # the drop that times what does not go round through the coil, or Im times the rest of the ring.
    ring = 50.0 + 0.05 / 0.999
    assert found.before_drop_v == pytest.approx(1e-3 * (ring - ring * 1e-3 / 10.0), rel=1e-9)
