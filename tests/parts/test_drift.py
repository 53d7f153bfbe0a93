"""Temperature: copper by IEC 60028, and swamping by hand.

By hand, α for copper, β for the rest, G = Rm' + Rs: a multiplier's reading falls by the mean
(α·Rcu + β·Rrest)/R; a shunt's by Rm'/G·((α·Rcu + β·swamp)/Rm' - β).
"""

import pytest
from hypothesis import given
from hypothesis import strategies as st
from parts_designs import behind, multiplier, shunt, universal

from dialgen.circuit.shunt import Rating, Shunt
from dialgen.errors import InputError
from dialgen.parts.drift import Materials, NoSwamping, Swamping, drifts, swamping
from dialgen.quantity import Amount

ALPHA, BETA = 0.00393, 1e-5
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
    found = swamping(lambda ohms: shunt(range_a, coil_ohm=coil_ohm, swamp=ohms), wanted)
    assert isinstance(found, Swamping)
    share = (range_a - 1e-3) / range_a
    expected = coil_ohm * ((ALPHA - BETA) * 100.0 / wanted * share - 1.0)
    assert found.swamp_ohm == pytest.approx(expected, rel=1e-4, abs=1e-4 * coil_ohm)
    assert found.percent_per_k == pytest.approx(-wanted, rel=1e-9)
    assert found.before_percent_per_k == pytest.approx(-(ALPHA - BETA) * 100.0 * share, rel=2e-5)
    assert found.before_drop_v == pytest.approx(1e-3 * coil_ohm)
    assert found.drop_v / found.before_drop_v == pytest.approx((coil_ohm + found.swamp_ohm) / coil_ohm)
    assert found.drive == pytest.approx(1.0)


def test_textbook_ratio_of_swamping():
    """A tenth of copper leaves about a tenth of its drift: nine times the coil, ten times the drop."""
    found = swamping(lambda ohms: shunt(100.0, coil_ohm=50.0, swamp=ohms), 0.0392)
    assert found.swamp_ohm == pytest.approx(450.0, rel=1e-3)
    assert found.drop_v == pytest.approx(0.5, rel=1e-3)


def test_no_swamp_where_the_drift_is_small_enough():
    """A circuit that is good enough gets nothing."""
    found = swamping(lambda ohms: shunt(1.0, swamp=ohms), 0.5)
    assert found.swamp_ohm == 0.0
    assert found.drop_v == found.before_drop_v


def test_a_bought_shunt_with_too_little_drop_shows():
    """Behind a shunt of fixed drop a swamp takes from full scale: 60 mV over twice what coil needs."""
    # 1 mA in 60 Ω beside 60 mV at 100 A: with the swamp S the coil gets 60 mV/(60 + S).
    rated = Rating(current_a=100.0, drop_v=0.06)
    found = swamping(
        lambda ohms: Shunt(rated=rated, swamp=Amount(ohms, "Ω")).design(behind(1e-3, 60.0, 100.0)), 0.196
    )
    assert found.swamp_ohm == pytest.approx(60.0, rel=1e-3)
    assert found.drive == pytest.approx(0.5, rel=1e-3)


@pytest.mark.parametrize("range_v", [0.5, 1.0, 10.0])
def test_swamping_does_not_help_a_multiplier(range_v):
    """Its whole resistance is range over current; a larger range or less copper helps, by hand."""

    def redesign(ohms):
        return multiplier(range_v, coil_a=1e-3, coil_ohm=500.0, swamp=ohms)

    found = swamping(redesign, 0.01)
    assert isinstance(found, NoSwamping)
    whole_ohm = range_v / 1e-3
    assert found.copper_share == pytest.approx(500.0 / whole_ohm, rel=1e-4)
    assert found.share_wanted == pytest.approx((1e-4 - BETA) / (ALPHA - BETA))
    for better in (
        multiplier(range_v * found.range_factor, coil_ohm=500.0),
        multiplier(range_v, coil_ohm=500.0 * found.coil_factor),
    ):
        assert drifts(better)[0].percent_per_k == pytest.approx(-0.01, rel=1e-4)


def test_less_drift_than_manganin_cannot_be_had():
    """A voltmeter of manganin drifts by manganin's own 0.001 %/K whatever its range."""
    found = swamping(lambda ohms: multiplier(10.0, swamp=ohms), 0.0009)
    assert (found.share_wanted, found.range_factor, found.coil_factor) == (None, None, None)


def test_no_drift_at_all_is_refused():
    """A wanted drift of nothing is no figure."""
    with pytest.raises(InputError, match="cannot be had"):
        swamping(lambda ohms: shunt(1.0, swamp=ohms), 0.0)
