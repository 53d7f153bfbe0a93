"""The departure of a movement, rule by rule as dialfile.md states it; scipy's PCHIP in between."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.interpolate import PchipInterpolator

from dialgen.errors import InputError
from dialgen.geometry.correction import from_readings

REST, FULL = -44.0, 44.0
SPAN = 88.0


def at(correction, nominal):
    """The observed angle where the pointer should stand at ``nominal``."""
    return float(correction.stage.forward(np.array(nominal)))


def said(correction, words):
    """Whether one of the remarks has these words."""
    return any(words in remark for remark in correction.remarks)


def test_no_readings_no_departure():
    """Without readings the pointer stands where it should, and nothing is remarked."""
    made = from_readings([], REST, FULL)
    assert at(made, 12.5) == 12.5
    assert made.remarks == ()


@given(st.floats(-44.0, 44.0))
def test_between_readings_it_is_scipys_pchip(nominal):
    """Observed against nominal is PCHIP through rest and the readings, by scipy."""
    readings = [(-22.0, -22.4), (0.0, 0.3), (22.0, 21.2), (44.0, 44.1)]
    expected = PchipInterpolator([-44.0, -22.0, 0.0, 22.0, 44.0], [-44.0, -22.4, 0.3, 21.2, 44.1])(nominal)
    assert at(from_readings(readings, REST, FULL), nominal) == pytest.approx(float(expected), abs=1e-12)


@pytest.mark.parametrize(("rest", "full"), [(REST, FULL), (FULL, REST)])
@pytest.mark.parametrize("beyond", [0.0, 0.5, 5.0, 50.0])
def test_departure_is_constant_beyond_the_outermost_readings(rest, full, beyond):
    """Beyond the outermost readings the departure is theirs, on either side, turned round or not."""
    made = from_readings([(-30.0, -29.0), (30.0, 28.5), (rest, rest + 0.1)], rest, full)
    outer = {-30.0: 1.0, 30.0: -1.5, rest: 0.1}
    low, high = min(outer), max(outer)
    assert at(made, low - beyond) - (low - beyond) == pytest.approx(outer[low], abs=1e-12)
    assert at(made, high + beyond) - (high + beyond) == pytest.approx(outer[high], abs=1e-12)


@pytest.mark.parametrize("off_rest", [0.0026, 0.1, -0.0026])
def test_rest_is_assumed_where_no_reading_stands_near_it(off_rest):
    """(rest, rest) is added, and said, where the nearest reading is over 0.25 % of the span away."""
    made = from_readings([(REST + off_rest * SPAN, REST + off_rest * SPAN + 0.1), (40.0, 40.5)], REST, FULL)
    assert at(made, REST) == pytest.approx(REST, abs=1e-12)
    assert said(made, "assumed to rest")
    assert len(made.points) == 2


@pytest.mark.parametrize("off_rest", [0.0, 0.0024, -0.0024])
def test_rest_is_not_assumed_beside_a_reading_of_it(off_rest):
    """A reading within 0.25 % of the span of rest stands for it: nothing is added or said."""
    near = REST + off_rest * SPAN
    made = from_readings([(near, near + 0.15), (40.0, 40.5)], REST, FULL)
    assert at(made, near) == pytest.approx(near + 0.15, abs=1e-12)
    assert at(made, REST - 3.0) == pytest.approx(REST - 3.0 + 0.15, abs=0.01)
    assert made.remarks == ()


@pytest.mark.parametrize(
    ("off", "warned"), [(0.0024, False), (0.0026, True), (-0.0026, True), (-0.0024, False)]
)
def test_a_zero_that_is_off_is_warned_of(off, warned):
    """A rest reading off by more than 0.25 % of the span gets the advice to set the zero and repeat."""
    made = from_readings([(REST, REST + off * SPAN), (40.0, 40.5)], REST, FULL)
    assert said(made, "set the zero and repeat") == warned
    assert not said(made, "assumed")


def test_repeats_are_averaged_and_their_spread_kept():
    """Readings at one point, up, down and again, count as their mean; their spread is reported."""
    made = from_readings([(0.0, 1.0), (40.0, 40.2), (0.0, 0.4), (40.0, 40.4), (0.0, 0.1)], REST, FULL)
    assert [(p.nominal_deg, p.count) for p in made.points] == [(0.0, 3), (40.0, 2)]
    assert [p.observed_deg for p in made.points] == pytest.approx([0.5, 40.3])
    assert [p.spread_deg for p in made.points] == pytest.approx([0.9, 0.2])
    assert at(made, 0.0) == pytest.approx(0.5)


def test_order_of_readings_does_not_matter():
    """Readings may come in any order."""
    readings = [(-20.0, -20.5), (0.0, 0.1), (20.0, 21.0), (40.0, 40.2)]
    places = np.linspace(-44.0, 44.0, 50)
    forth, back = (from_readings(r, REST, FULL).stage.forward(places) for r in (readings, readings[::-1]))
    assert (forth == back).all()


@pytest.mark.parametrize(
    ("readings", "culprit"),
    [
        ([(0.0, 5.0), (10.0, 4.0), (30.0, 31.0)], 1),
        ([(0.0, 5.0), (10.0, 5.0), (30.0, 31.0)], 1),
        ([(30.0, 31.0), (10.0, 4.0), (0.0, 5.0)], 1),
        ([(-40.0, -45.0), (40.0, 41.0)], 0),  # beyond the assumed rest point
        ([(0.0, 1.0), (0.0, 2.0), (0.5, 1.2)], 2),  # against the mean of two
    ],
)
def test_readings_that_do_not_move_one_way_are_refused(readings, culprit):
    """Observed angles that stand still or turn back are refused, naming the reading."""
    with pytest.raises(InputError, match="strictly") as caught:
        from_readings(readings, REST, FULL)
    assert caught.value.keys == ((culprit,),)


@pytest.mark.parametrize(("far", "warned"), [(-44.0 + 21.9, True), (-44.0 + 22.1, False)])
def test_readings_over_less_than_a_quarter_are_warned_of(far, warned):
    """Readings that cover less than a quarter of the span are warned of."""
    made = from_readings([(REST, REST), (far, far + 0.1)], REST, FULL)
    assert said(made, "less than a quarter") == warned


def test_one_reading_at_rest_shifts_the_whole_scale():
    """A single reading at rest is a constant departure."""
    made = from_readings([(REST, REST + 0.1)], REST, FULL)
    assert [at(made, a) - a for a in (-49.0, 0.0, 49.0)] == pytest.approx([0.1, 0.1, 0.1])


@given(st.lists(st.tuples(st.floats(-40.0, 40.0), st.floats(-0.4, 0.4)), min_size=1, max_size=6))
def test_corrected_angles_move_one_way_and_back(readings):
    """Whatever readings are accepted, the corrected angle moves one way and its inverse undoes it."""
    try:
        made = from_readings([(n, n + d) for n, d in readings], REST, FULL)
    except InputError:
        return
    places = np.linspace(-49.0, 49.0, 197)
    angles = made.stage.forward(places)
    assert (np.diff(angles) > 0).all()
    assert made.stage.forward(made.stage.inverse(angles)) == pytest.approx(angles, abs=1e-10)
