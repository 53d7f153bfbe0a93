"""Monotone interpolation: scipy's PchipInterpolator is the outside truth."""

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.interpolate import PchipInterpolator

from dialgen.errors import InputError
from dialgen.geometry.monotone import pchip_slopes, through

# RPN 14: F. N. Fritsch, R. E. Carlson, "Monotone Piecewise Cubic Interpolation", SIAM J. Numer.
# Anal. 17 (1980) 238-246; data as printed in the GNU Scientific Library's example source.
RPN_X = (7.99, 8.09, 8.19, 8.7, 9.2, 10.0, 12.0, 15.0, 20.0)
RPN_Y = (0.0, 2.76429e-5, 4.37498e-2, 0.169183, 0.469428, 0.943740, 0.998636, 0.999919, 0.999994)
# Values of scipy 1.17.1 PchipInterpolator between the RPN 14 points, run apart from this project.
RPN_BETWEEN = (
    (8.0, 2.767433863e-7),
    (8.05, 9.956474181e-6),
    (8.14, 0.01769716738),
    (8.4, 0.09666880561),
    (8.9, 0.2713755846),
    (9.6, 0.7602476393),
    (11.0, 0.9860433625),
    (13.0, 0.9993618221),
    (17.0, 0.9999680258),
)
RPN_SLOPES = (
    0.0,
    5.525086819e-4,
    0.3358768346,
    0.3494491677,
    0.5969582389,
    0.06032184552,
    9.003953828e-4,
    3.142468e-5,
)


@st.composite
def one_way_points(draw, least=2):
    """Points that ascend in x and move strictly one way in y, with steps that differ up to 1000 times."""
    count = draw(st.integers(least, 9))
    steps = st.floats(0.001, 1.0)
    x = np.cumsum([draw(st.floats(-5.0, 5.0)), *(draw(steps) for _ in range(count - 1))])
    y = np.cumsum([draw(st.floats(-5.0, 5.0)), *(draw(steps) for _ in range(count - 1))])
    return x, y * draw(st.sampled_from((-1.0, 1.0)))


@pytest.mark.parametrize(("x", "y"), RPN_BETWEEN)
def test_rpn_14_is_interpolated_as_scipy_does(x, y):
    """The curve through the RPN 14 data passes where scipy's does, to the printed digits."""
    assert float(through(RPN_X, RPN_Y).forward(np.array(x))) == pytest.approx(y, abs=1e-10)


def test_rpn_14_slopes_are_those_of_fritsch_and_butland():
    """The slopes at the RPN 14 points are those scipy prints, whose formula is Fritsch and Butland's."""
    assert pchip_slopes(np.array(RPN_X), np.array(RPN_Y))[:-1] == pytest.approx(RPN_SLOPES, rel=1e-6)


@given(one_way_points(), st.lists(st.floats(0.0, 1.0), min_size=1, max_size=20))
def test_curve_equals_scipy_pchip(points, shares):
    """Between any one-way points the curve is scipy's PchipInterpolator."""
    x, y = points
    places = x[0] + np.array(shares) * (x[-1] - x[0])
    expected = PchipInterpolator(x, y)(places)
    assert through(x, y).forward(places) == pytest.approx(expected, abs=1e-12 * (1 + np.abs(y).max()))


@given(one_way_points(), st.floats(0.0, 100.0))
def test_ends_go_on_straight_along_scipys_end_slopes(points, beyond):
    """Beyond the outermost points the curve is the straight line of scipy's own end slope."""
    x, y = points
    slope = PchipInterpolator(x, y).derivative()
    curve = through(x, y)
    for end, away in ((0, -beyond), (-1, beyond)):
        expected = y[end] + float(slope(x[end])) * away
        got = float(curve.forward(np.array(x[end] + away)))
        assert got == pytest.approx(expected, rel=1e-9, abs=1e-9)


@given(one_way_points(), st.floats(0.0, 100.0))
def test_given_end_slopes_are_kept(points, beyond):
    """With ``ends`` the curve goes on at that slope beyond both outermost points."""
    x, y = points
    slope = math.copysign(2.0, y[-1] - y[0])
    curve = through(x, y, ends=slope)
    assert float(curve.forward(np.array(x[-1] + beyond))) == pytest.approx(y[-1] + slope * beyond)
    assert float(curve.forward(np.array(x[0] - beyond))) == pytest.approx(y[0] - slope * beyond)


@given(one_way_points(), st.lists(st.floats(0.0, 1.0), min_size=1, max_size=20))
def test_inverse_undoes_the_curve(points, shares):
    """Forward of inverse of y is y, within rounding, between the outermost points."""
    x, y = points
    curve = through(x, y)
    wanted = y[0] + np.array(shares) * (y[-1] - y[0])
    back = curve.forward(curve.inverse(wanted))
    assert np.abs(back - wanted).max() <= 1e-13 * (1 + np.abs(y).max() + np.abs(x).max() * 1e3)


@given(one_way_points())
def test_points_themselves_are_exact_both_ways(points):
    """At its own points the curve and its inverse are exact."""
    x, y = points
    curve = through(x, y)
    assert (curve.forward(x) == y).all()
    assert curve.inverse(y) == pytest.approx(x, rel=1e-14, abs=1e-14)


@given(one_way_points(), st.integers(2, 300))
def test_curve_never_turns(points, count):
    """Densely sampled, the curve moves one way only, its straight ends included."""
    x, y = points
    curve = through(x, y)
    low, high = (max(x[0] - 1, curve.domain[0]), min(x[-1] + 1, curve.domain[1]))
    steps = np.diff(curve.forward(np.linspace(low, high, count))) * np.sign(y[-1] - y[0])
    assert (steps >= -1e-14 * (1 + np.abs(y).max())).all()


@settings(max_examples=50)
@given(one_way_points(), st.lists(st.floats(0.0, 1.0), min_size=1, max_size=12))
def test_array_inverse_equals_one_by_one(points, shares):
    """The inverse of an array is, bit for bit, that of its elements one by one."""
    x, y = points
    curve = through(x, y)
    wanted = y[0] + (np.array(shares) * 1.2 - 0.1) * (y[-1] - y[0])
    wanted = wanted[(wanted >= curve.image[0]) & (wanted <= curve.image[1])]
    assert [float(curve.inverse(np.array([w]))[0]) for w in wanted] == curve.inverse(wanted).tolist()


def test_one_point_with_a_slope_is_a_straight_line():
    """One point and an end slope make the straight line through it."""
    line = through([3.0], [4.0], ends=1.0)
    assert line.forward(np.array([3.0, -1.0, 7.0])).tolist() == [4.0, 0.0, 8.0]
    assert line.inverse(np.array([4.0, 0.0, 8.0])).tolist() == [3.0, -1.0, 7.0]


def test_flat_end_slope_ends_the_domain_there():
    """Where the three-point end slope is zero the curve has no way on, and says so by its domain."""
    # The end formula gives (3·1 - 3)/2 = 0 for equal steps with chords 1 and 3.
    curve = through([0.0, 1.0, 2.0], [0.0, 1.0, 4.0])
    assert curve.domain == (0.0, math.inf)
    assert curve.image == (0.0, math.inf)


@pytest.mark.parametrize(
    ("x", "y", "said"),
    [
        ([1.0], [1.0], "at least two"),
        ([1.0, 1.0], [1.0, 2.0], "ascending"),
        ([2.0, 1.0], [1.0, 2.0], "ascending"),
        ([0.0, 1.0], [1.0, 1.0], "strictly one way"),
        ([0.0, 1.0, 2.0], [1.0, 2.0, 1.5], "turn at 2, 1.5"),
        ([0.0, 1.0, 2.0], [1.0, 2.0, 2.0], "strictly one way"),
        ([0.0, 1e-14], [0.0, 1e300], "too steep"),
        ([0.0, 1.0], [-1e308, 1e308], "too steep"),
    ],
)
def test_points_that_give_no_one_way_curve_are_refused(x, y, said):
    """Too few points, places out of order, values that turn or overflow raise an error that says so."""
    with pytest.raises(InputError, match=said):
        through(x, y)
