"""Scale lines: the pointer's meeting points by independent geometry (scipy roots, complex numbers)."""

import math

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen.errors import InputError
from dialgen.geometry.lines import ArcLine, StraightLine

coordinates = st.floats(-60.0, 60.0)
angles = st.floats(-180.0, 180.0)


def pointer(angle_deg):
    """The pointer's direction as a complex number: 0 up, clockwise positive, so i·exp(-iθ)."""
    return 1j * np.exp(-1j * math.radians(angle_deg))


@given(st.floats(5.0, 90.0), coordinates, coordinates, angles)
def test_arc_is_met_at_the_farther_root(radius, cx, cy, angle):
    """The meeting point is the largest root of |t·u - c| = R for t > 0, found by scipy; or there is none."""
    centre, ray = complex(cx, cy), pointer(angle)

    def miss(t):
        return abs(t * ray - centre) - radius

    nearest = (centre * ray.conjugate()).real  # where the ray's line is nearest to the centre
    assume(abs(miss(nearest)) > 1e-3)
    line = ArcLine(radius, (cx, cy))
    far = brentq(miss, nearest, nearest + 500.0, xtol=1e-13) if miss(nearest) < 0 else None
    assume(far is None or abs(far) > 1e-3)
    assert bool(line.meets(np.array(angle))) == (far is not None and far > 0)
    if far is not None and far > 0:
        x, y = line.points(np.array(angle))
        assert complex(x, y) == pytest.approx(far * ray, abs=1e-9)


@given(coordinates, coordinates, coordinates, coordinates, angles)
def test_straight_line_is_met_where_the_complex_crossing_is(x1, y1, x2, y2, angle):
    """The crossing of pointer and line is that of solving t·u = p + s·d in complex numbers."""
    start, end, ray = complex(x1, y1), complex(x2, y2), pointer(angle)
    assume(abs(end - start) > 1.0)
    d = (end - start) / abs(end - start)
    cross = (ray.conjugate() * d).imag
    assume(abs(cross) > 1e-4)
    t = (start.conjugate() * d).imag / cross
    assume(abs(t) > 1e-6)
    line = StraightLine((x1, y1), (x2, y2))
    assert bool(line.meets(np.array(angle))) == (t > 0)
    if t > 0:
        x, y = line.points(np.array(angle))
        assert complex(x, y) == pytest.approx(t * ray, abs=1e-8 * (1 + abs(t)))


def test_marks_by_hand_on_an_arc_about_the_pivot():
    """On 44 mm at -22 degrees x = 44·sin(-22°) and y = 44·cos(-22°), as the contract prints them."""
    x, y = ArcLine(44.0).points(np.array(-22.0))
    assert (float(x), float(y)) == pytest.approx((-16.482690108, 40.796089599), abs=5e-9)


def test_edgewise_line_by_hand():
    """On a level line 30 mm above the pivot the mark at θ stands at x = 30·tan θ."""
    line = StraightLine((-20.0, 30.0), (20.0, 30.0))
    x, y = line.points(np.array([-30.0, 0.0, 45.0]))
    assert x == pytest.approx([-30.0 / math.sqrt(3.0), 0.0, 30.0])
    assert y == pytest.approx([30.0, 30.0, 30.0])


def test_parallel_and_backward_pointers_do_not_meet_a_line():
    """A pointer parallel to the line, or with the line behind the pivot, meets nothing."""
    line = StraightLine((-20.0, 30.0), (20.0, 30.0))
    assert line.meets(np.array([-90.0, 90.0, 180.0, -120.0, 89.0])).tolist() == [False] * 4 + [True]
    x, y = line.points(np.array([90.0, 180.0]))
    assert np.isnan(x).all()
    assert np.isnan(y).all()


def test_pointer_short_of_an_arc_off_the_pivot_does_not_meet_it():
    """An arc wholly to the right is not met by a pointer to the left."""
    line = ArcLine(10.0, (50.0, 0.0))
    assert line.meets(np.array([90.0, -90.0, 0.0])).tolist() == [True, False, False]
    x, _ = line.points(np.array(90.0))
    assert float(x) == pytest.approx(60.0)  # the farther crossing of 40 and 60


@given(st.floats(20.0, 200.0), st.floats(10.0, 60.0), st.floats(-60.0, 60.0))
def test_curved_plate_lies_flat_at_radius_times_angle(radius, height, angle):
    """With curve = R the distance from the foot of straight up is R·θ in radians."""
    line = StraightLine((-20.0, height), (20.0, height), curve_mm=radius)
    x, y = line.points(np.array(angle))
    assert float(x) == pytest.approx(radius * angle * math.pi / 180.0, abs=1e-12)
    assert float(y) == pytest.approx(height)
    assert bool(line.meets(np.array(angle)))


@given(st.floats(20.0, 200.0), st.floats(10.0, 60.0), st.floats(-1.2, 1.2), st.floats(-40.0, 40.0))
def test_curved_plate_on_a_sloping_line_starts_at_its_foot(radius, height, slope, angle):
    """On a sloping line the distance counts from where the line crosses straight up, along the line."""
    along = complex(math.cos(slope), math.sin(slope))
    first, second = (1j * height + s * along for s in (-15.0, 25.0))
    line = StraightLine((first.real, first.imag), (second.real, second.imag), curve_mm=radius)
    x, y = line.points(np.array(angle))
    expected = 1j * height + radius * math.radians(angle) * along
    assert complex(x, y) == pytest.approx(expected, abs=1e-9)


@given(coordinates, st.floats(5.0, 60.0), coordinates, st.floats(5.0, 60.0), st.floats(-50.0, 50.0))
def test_square_marks_stand_square_and_lead_away(x1, y1, x2, y2, angle):
    """With square the marks' direction is a unit vector at right angles to the line, away from the pivot."""
    start, end = complex(x1, y1), complex(x2, y2)
    assume(abs(end - start) > 1.0)
    area = (start.conjugate() * end).imag  # twice the triangle with the pivot
    assume(abs(area) > 1.0)
    dx, dy = StraightLine((x1, y1), (x2, y2), square=True).directions(np.array(angle))
    direction = complex(dx, dy)
    assert abs(direction) == pytest.approx(1.0)
    assert (direction.conjugate() * (end - start)).real == pytest.approx(0.0, abs=1e-9 * abs(end - start))
    assert (direction.conjugate() * start).real > 0


@given(angles)
def test_other_marks_lie_along_the_pointer(angle):
    """Without square, marks on arcs and lines lie along the pointer."""
    for line in (ArcLine(40.0, (3.0, -9.0)), StraightLine((-20.0, 30.0), (20.0, 35.0))):
        dx, dy = line.directions(np.array(angle))
        assert complex(dx, dy) == pytest.approx(pointer(angle), abs=1e-12)


@given(st.floats(20.0, 60.0), st.floats(-12.0, 12.0), st.floats(-12.0, 12.0))
def test_places_along_an_arc_are_its_length(radius, cx, cy):
    """Differences of places along an arc off the pivot are its length, summed over short chords."""
    line = ArcLine(radius, (cx, cy))
    swing = np.linspace(-80.0, 80.0, 4001)
    x, y = line.points(swing)
    chords = float(np.hypot(np.diff(x), np.diff(y)).sum())
    places = line.along(swing[[0, -1]])
    assert places[1] - places[0] == pytest.approx(chords, rel=1e-6)
    assert (np.diff(line.along(swing)) > 0).all()


@given(coordinates, st.floats(10.0, 60.0), coordinates, st.floats(10.0, 60.0))
def test_places_along_a_line_are_distances_and_rise_with_the_angle(x1, y1, x2, y2):
    """Differences of places along a straight line are distances, whichever end is given first."""
    assume(math.hypot(x2 - x1, y2 - y1) > 5 and abs(x1 * y2 - x2 * y1) > 50)
    line = StraightLine((x1, y1), (x2, y2))
    swing = np.linspace(-40.0, 40.0, 9)
    swing = swing[line.meets(swing)]
    assume(len(swing) > 1)
    x, y = line.points(swing)
    places = line.along(swing)
    assert np.diff(places) == pytest.approx(np.hypot(np.diff(x), np.diff(y)), rel=1e-9, abs=1e-9)


@given(st.floats(-170.0, 170.0), st.floats(20.0, 60.0), st.floats(-15.0, 15.0), st.floats(-15.0, 15.0))
def test_mirrored_arc_has_mirrored_points(angle, radius, cx, cy):
    """The arc with its centre mirrored meets the mirrored pointer at the mirrored point."""
    assume(math.hypot(cx, cy) < radius)  # from outside the arc, some pointers miss it
    x, y = ArcLine(radius, (cx, cy)).points(np.array(angle))
    mx, my = ArcLine(radius, (-cx, cy)).points(np.array(-angle))
    assert (float(mx), float(my)) == (-float(x), float(y))


@given(st.floats(-170.0, 170.0), st.floats(20.0, 60.0), st.floats(0.1, 10.0))
def test_lengths_scale(angle, radius, factor):
    """Every length of a line times a factor moves every point by that factor."""
    for plain, large in (
        (ArcLine(radius, (3.0, -4.0)), ArcLine(radius * factor, (3.0 * factor, -4.0 * factor))),
        (
            StraightLine((-20.0, 30.0), (20.0, 31.0)),
            StraightLine((-20.0 * factor, 30.0 * factor), (20.0 * factor, 31.0 * factor)),
        ),
    ):
        if plain.meets(np.array(angle)):
            small, big = plain.points(np.array(angle)), large.points(np.array(angle))
            assert [factor * float(v) for v in small] == pytest.approx([float(v) for v in big], rel=1e-9)


def test_line_of_one_point_is_refused():
    """A straight line needs two points."""
    with pytest.raises(InputError, match="one point"):
        StraightLine((1.0, 2.0), (1.0, 2.0))


@pytest.mark.parametrize("line", [((-20.0, -30.0), (20.0, -30.0)), ((10.0, 5.0), (10.0, 40.0))])
def test_curved_plate_below_or_beside_the_pivot_is_refused(line):
    """A curved plate's line must cross straight up above the pivot."""
    with pytest.raises(InputError, match="cross straight up"):
        StraightLine(*line, curve_mm=50.0)
