"""Responses: from drive to deflection."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.interpolate import PchipInterpolator

from dialgen.errors import InputError
from dialgen.geometry.response import EVEN, Power, from_points

POINTS = ((0.0, 0.0), (0.4, 0.37), (1.0, 1.0))


def test_even_response_is_the_drive_itself():
    """An even field gives the drive as deflection."""
    assert EVEN.forward(np.array([0.0, 0.3, -1.0])).tolist() == [0.0, 0.3, -1.0]


# The ideal moving iron deflects by the square of the current (reference values, section 13).
@pytest.mark.parametrize(("drive", "deflection"), [(0.2, 0.04), (0.5, 0.25), (0.8, 0.64)])
def test_ideal_moving_iron(drive, deflection):
    """The ideal square-law moving iron stands at the square of its current."""
    response = Power(2.0)
    assert float(response.forward(np.array(drive))) == pytest.approx(deflection, rel=1e-12)
    assert float(response.inverse(np.array(deflection))) == pytest.approx(drive, rel=1e-12)


@given(st.floats(0.0, 1.0))
def test_points_are_joined_by_scipys_pchip(drive):
    """Between its points the response is scipy's PchipInterpolator."""
    expected = float(PchipInterpolator(*zip(*POINTS, strict=True))(drive))
    assert float(from_points(POINTS).forward(np.array(drive))) == pytest.approx(expected, abs=1e-14)


@given(st.floats(-1.5, 1.5))
def test_without_negative_drive_points_are_mirrored(drive):
    """The deflection at a drive reversed is the deflection reversed, and so with the inverse."""
    response = from_points(POINTS)
    there = float(response.forward(np.array(drive)))
    assert float(response.forward(np.array(-drive))) == -there
    assert float(response.inverse(np.array(there))) == pytest.approx(drive, abs=1e-12)


def test_points_with_negative_drive_are_taken_as_they_stand():
    """Points that cover negative drive are not mirrored."""
    response = from_points(((-1.0, -0.8), (0.0, 0.0), (1.0, 1.0)))
    assert response.forward(np.array([-1.0, 1.0])).tolist() == [-0.8, 1.0]


def test_points_go_on_along_their_end_slope():
    """Beyond the last point the response goes on along scipy's end slope, mirrored below."""
    slope = float(PchipInterpolator(*zip(*POINTS, strict=True)).derivative()(1.0))
    response = from_points(POINTS)
    assert float(response.forward(np.array(1.2))) == pytest.approx(1.0 + 0.2 * slope)
    assert float(response.forward(np.array(-1.2))) == pytest.approx(-1.0 - 0.2 * slope)


@pytest.mark.parametrize(
    "points",
    [
        ((0.0, 0.0),),
        ((0.0, 0.0), (1.0, 0.0)),
        ((0.0, 0.0), (0.5, 0.7), (1.0, 0.6)),
        ((0.0, 1.0), (1.0, 0.0)),
        ((0.0, 0.0), (0.0, 1.0)),
        ((1.0, 1.0), (0.0, 0.0)),
    ],
)
def test_points_that_do_not_rise_are_refused(points):
    """A response must rise strictly with the drive, which must ascend."""
    with pytest.raises(InputError):
        from_points(points)
