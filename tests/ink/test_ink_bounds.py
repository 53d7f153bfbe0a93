"""Ink that leaves a figure."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from ink_reference import BLACK, covered, primitives
from shapely import box

from dialgen.drawing import Circle, Line, Style
from dialgen.ink import shape, strays

INK = Style(stroke=BLACK, width_mm=1.0)


def on_disc(x, y):
    """Return whether points lie on a disc of 10 mm radius."""
    return np.hypot(x, y) <= 10.0


def on_square(x, y):
    """Return whether points lie on a square of 20 mm."""
    return (np.abs(x) <= 10.0) & (np.abs(y) <= 10.0)


def test_width_counts() -> None:
    """A line with its end on the plate's edge strays by the corners of its width."""
    within, over = Line((0, 0), (9.9, 0), INK), Line((0, 0), (10.0, 0), INK)
    ((number, place),) = strays([shape(within), shape(over)], on_disc)
    assert number == 1
    assert (place[0], abs(place[1])) == pytest.approx((10.0, 0.5))


def test_numbers_and_first_corners() -> None:
    """Each shape that strays is named once, by its number, and so is none that does not."""
    dots = [shape(Circle((x, 0), 1.0, INK)) for x in (0.0, 9.5, 3.0, -30.0)]
    found = strays(dots, on_disc)
    assert [number for number, _ in found] == [1, 3]
    assert not on_disc(*np.array([place for _, place in found]).T).any()


def test_nothing_strays() -> None:
    """No shapes, and shapes within, give nothing."""
    assert strays([], on_disc) == strays([shape(Circle((0, 0), 9.4, INK))], on_disc) == []


@settings(max_examples=40, deadline=None)
@given(items=st.lists(primitives, max_size=5))
def test_against_shapely(items) -> None:
    """What leaves a square is what shapely has outside it, to 0.01 mm of its edge."""
    found = {number for number, _ in strays([shape(item) for item in items], on_square)}
    for number, item in enumerate(items):
        area = covered(item)
        if number in found:
            assert not box(-9.99, -9.99, 9.99, 9.99).contains(area)
        else:
            assert box(-10.01, -10.01, 10.01, 10.01).contains(area)
