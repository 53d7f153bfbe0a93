"""Splitting circles into Bezier curves and letters into chords, by formulas of their own."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from render_readback import bezier, segments_distance, svg_path
from render_samples import BAR, HOOK, INK, arcs, many

from dialgen.drawing import Arc, Placed
from dialgen.renderers.curves import cubic, flattened, placed_steps, steps, stops


def _points(path) -> np.ndarray:
    """Return points along one contour of path steps, by de Casteljau."""
    return np.vstack(svg_path(_data(path)))


@many
@given(st.floats(0.1, 5000), st.floats(0.1, 360))
def test_curves_follow_circles_of_any_size(radius_mm: float, sweep_deg: float) -> None:
    """No curve leaves its circle by more than 0.02 µm, edgewise meters' flat arcs included."""
    seen = _points(steps(Arc((0.0, 0.0), radius_mm, 0.0, sweep_deg, INK)))
    # A point's own rounding is a few times 1e-16 of the radius.
    assert np.abs(np.hypot(*seen.T) - radius_mm).max() <= 2e-5 + 1e-12


def test_quarter_circle_in_one_curve_would_be_a_hundredth_out() -> None:
    """The measure above can fail: a quarter of 45 mm in one Bezier curve is 0.012 mm off."""
    handle = 45.0 * 4 / 3 * (math.sqrt(2) - 1)
    quarter = bezier(np.array([(0.0, 45.0), (handle, 45.0), (45.0, handle), (45.0, 0.0)]))
    assert np.abs(np.hypot(*quarter.T) - 45.0).max() == pytest.approx(0.0123, abs=1e-4)


@many
@given(arcs(), st.floats(1, 180))
def test_stops_are_even_and_run_from_end_to_end(arc: Arc, widest_deg: float) -> None:
    """Stops begin and end with the arc, are never wider apart than asked, and turn round on request."""
    points = stops(arc, widest_deg)
    assert points[0] == pytest.approx(arc.point(arc.start_deg))
    assert points[-1] == pytest.approx(arc.point(arc.end_deg))
    assert (arc.end_deg - arc.start_deg) / (len(points) - 1) <= widest_deg + 1e-6
    assert stops(arc, widest_deg, backwards=True) == points[::-1]


def test_quadratic_curves_are_the_same_as_cubic_ones() -> None:
    """Degree elevation moves no point, after a closing and a new start as well."""
    path = (*HOOK.path, ("Z", ()), ("Q", (0.4, 0.5, 0.6, 0.2)))
    assert {code for code, _ in cubic(path)} == {"M", "L", "C", "Z"}
    assert _points(cubic(path)) == pytest.approx(_points(path), abs=1e-12)


@pytest.mark.parametrize("sagitta", [0.1, 0.01, 0.0001])
def test_flattened_letters_keep_to_the_sagitta(sagitta: float) -> None:
    """The chords leave the curves by no more than asked, and by not much less: no corner is wasted."""
    first, second = flattened(HOOK.path, sagitta)
    for chords, curve in zip((first, second), svg_path(_data(HOOK.path)), strict=True):
        gap = segments_distance(curve, np.array([*chords, chords[0]])).max()
        assert gap <= sagitta
    assert len(first) < 4 + 2 / math.sqrt(sagitta)


def test_flattening_closes_contours_without_doubling_the_corner() -> None:
    """A contour that returns to its start by itself has that corner once; a lone move is nothing."""
    path = (("M", (0, 0)), ("L", (1, 0)), ("L", (1, 1)), ("L", (0, 0)), ("Z", ()), ("M", (5, 5)))
    assert flattened(path, 0.1) == [[(0, 0), (1, 0), (1, 1)]]


def test_glyph_placed_by_hand() -> None:
    """The bar's corner (0.1, 0.7), 10 mm to the em, turned by 90 degrees about (3, 4), is at (10, 3)."""
    corners = [values for code, values in placed_steps(Placed(BAR, 3.0, 4.0, 10.0, 90.0)) if code != "Z"]
    assert corners[3] == pytest.approx((10.0, 3.0))


def _data(path) -> str:
    return "".join(code + " ".join(f"{value:.15f}" for value in values) for code, values in path)
