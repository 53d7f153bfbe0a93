"""Bracketed roots: scipy.optimize.brentq is the outside truth."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen.roots import bracketed_roots

FUNCTIONS = {
    "cubic": lambda x: x**3 + x,
    "falling": lambda x: -np.exp(x / 2),
    "kinked": lambda x: np.where(x < 0.3, x, 0.3 + 50 * (x - 0.3)),
    "flat spot": lambda x: (x - 0.5) ** 5,
    "root-like": np.cbrt,
}


@given(
    st.sampled_from(sorted(FUNCTIONS)),
    st.lists(st.floats(0.001, 0.999), min_size=1, max_size=8),
    st.integers(2, 9),
)
def test_roots_are_brentqs(name, shares, count):
    """Each root satisfies the equation as well as brentq's does."""
    function = FUNCTIONS[name]
    places = np.linspace(-2.0, 3.0, count)
    low, high = sorted((float(function(np.array(-2.0))), float(function(np.array(3.0)))))
    wanted = low + np.array(shares) * (high - low)
    for root, target in zip(bracketed_roots(function, places, wanted), wanted, strict=True):
        other = brentq(lambda x, t=target: float(function(np.array(x))) - t, -2.0, 3.0, xtol=1e-15)
        miss = abs(float(function(root)) - target)
        assert miss <= abs(float(function(np.array(other))) - target) + 1e-12


def test_values_outside_the_bracket_give_nan():
    """A value that the places do not bracket has no root: NaN, for the chain to refuse."""
    roots = bracketed_roots(lambda x: 2 * x, np.array([0.0, 1.0]), np.array([-0.1, 1.0, 2.1]))
    assert np.isnan(roots).tolist() == [True, False, True]
    assert roots[1] == pytest.approx(0.5)


@given(st.lists(st.floats(0.0, 1.0), max_size=6), st.sampled_from(sorted(FUNCTIONS)))
def test_each_root_stands_alone(shares, name):
    """The roots of an array are, bit for bit, the roots of its elements one by one."""
    function = FUNCTIONS[name]
    places = np.linspace(-2.0, 3.0, 5)
    ends = function(places[[0, -1]])
    wanted = ends.min() + np.array(shares) * np.ptp(ends)
    one_by_one = [float(bracketed_roots(function, places, np.array([w]))[0]) for w in wanted]
    np.testing.assert_array_equal(bracketed_roots(function, places, wanted), one_by_one)


def test_shape_is_kept():
    """Roots come in the shape of the wanted values, none at all included."""
    places = np.array([0.0, 1.0])
    for shape in ((), (0,), (2, 3), (2, 0, 1)):
        assert bracketed_roots(lambda x: x, places, np.full(shape, 0.25)).shape == shape
