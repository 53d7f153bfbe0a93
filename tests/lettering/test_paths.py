"""The box of a path is that of its curves; fontTools works it out in its own way."""

import pytest
from fontTools.misc.bezierTools import calcCubicBounds, calcQuadraticBounds
from hypothesis import given
from hypothesis import strategies as st

from dialgen.lettering.paths import ink_box, moved

points = st.tuples(st.floats(-2, 2), st.floats(-2, 2))


def test_quadratic_that_turns_back():
    """A quadratic reaches half way to its control point when that lies square off its chord."""
    path = (("M", (0.0, 0.0)), ("Q", (-1.0, 1.0, 0.0, 2.0)), ("L", (3.0, 1.0)), ("Z", ()))
    assert ink_box(path) == (-0.5, 0.0, 3.0, 2.0)


def test_cubic_that_turns_back():
    """A cubic whose control points stand square off its ends reaches three quarters of the way to them."""
    path = (("M", (0.0, 0.0)), ("C", (0.0, 4.0, 2.0, 4.0, 2.0, 0.0)), ("Z", ()))
    assert ink_box(path) == (0.0, 0.0, 2.0, 3.0)


def test_control_point_between():
    """A control point between the ends adds nothing, even one at an end."""
    path = (("M", (0.0, 0.0)), ("Q", (0.0, 1.0, 1.0, 1.0)), ("C", (1.0, 1.2, 2.0, 1.4, 2.0, 2.0)), ("Z", ()))
    assert ink_box(path) == (0.0, 0.0, 2.0, 2.0)


@given(points, points, points)
def test_quadratics(start, control, end):
    """Any quadratic curve has the bounds that fontTools finds."""
    found = ink_box((("M", start), ("Q", control + end)))
    assert found == pytest.approx(calcQuadraticBounds(start, control, end), abs=1e-9)


@given(points, points, points, points)
def test_cubics(start, one, two, end):
    """Any cubic curve has the bounds that fontTools finds."""
    found = ink_box((("M", start), ("C", one + two + end)))
    assert found == pytest.approx(calcCubicBounds(start, one, two, end), abs=1e-7)


def test_nothing():
    """A path without steps has an empty box at the origin."""
    assert ink_box(()) == (0.0, 0.0, 0.0, 0.0)


def test_moved():
    """Every point of a path is stretched about the origin, then moved; closings stay."""
    path = (("M", (1.0, 2.0)), ("C", (0.0, 0.0, 1.0, 1.0, -1.0, 3.0)), ("Z", ()))
    assert moved(path, (2.0, 3.0), (10.0, 20.0)) == (
        ("M", (12.0, 26.0)),
        ("C", (10.0, 20.0, 12.0, 23.0, 8.0, 29.0)),
        ("Z", ()),
    )
