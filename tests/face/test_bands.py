"""Bands and slots along scale lines, by the formulas of plane geometry and by shapely."""

import itertools
import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from laid_scales import any_line, centred, corners, flat, off_centre, polygon, straight, swings
from shapely import LineString, Point

from dialgen.drawing import Style
from dialgen.errors import InputError
from dialgen.face.inked.bands import band, bands, slot
from dialgen.face.inked.courses import ArcCourse, LineCourse, course
from dialgen.geometry.lines import ArcLine, StraightLine

INK = Style(fill="#000000")
some = settings(max_examples=50, deadline=None)
sides = st.tuples(st.floats(-6, 6), st.floats(0.2, 5)).map(lambda s: (s[0], s[0] + s[1]))


def rows(outline):
    """The vertices of an outline as numbers."""
    return np.array([(v.x, v.y, v.turn_deg) for v in outline.vertices])


@some
@given(centred, st.floats(-170, 170), st.floats(0.5, 360), sides)
def test_area_about_the_pivot_is_that_of_an_annular_sector(line, start, sweep, pair):
    """A band of an arc about the pivot has the area (R² - r²)·θ/2, up to a whole turn."""
    r, outer = (line.radius_mm + side for side in pair)
    area = polygon(band(line, start, start + sweep, *pair, INK)).area
    assert area == pytest.approx((outer**2 - r**2) * math.radians(sweep) / 2, rel=1e-5)


@some
@given(straight, swings, sides)
def test_area_beside_a_straight_line_is_that_of_a_trapezium(line, ends, pair):
    """A band of a straight line between two rays has the area of a trapezium, its widths in proportion."""
    ux, uy = np.subtract(line.end, line.start) / math.dist(line.start, line.end)
    height = line.start[1] * ux - line.start[0] * uy
    tilt = math.atan2(uy, ux)
    # A ray at the angle a meets the parallel at the distance h·tan(a + tilt) from its foot.
    turned = [math.tan(math.radians(a) + tilt) for a in ends]
    widths = [(height + side) * abs(turned[1] - turned[0]) for side in pair]
    area = polygon(band(line, *ends, *pair, INK)).area
    assert area == pytest.approx(sum(widths) / 2 * (pair[1] - pair[0]), rel=1e-9)


@some
@given(flat, swings, sides)
def test_area_on_a_curved_plate_is_that_of_a_rectangle(line, ends, pair):
    """On a curved plate laid flat a band is R·θ long and has square ends."""
    length = line.curve_mm * math.radians(abs(ends[1] - ends[0]))
    area = polygon(band(line, *ends, *pair, INK)).area
    assert area == pytest.approx(length * (pair[1] - pair[0]), rel=1e-9)


@some
@given(st.one_of(centred, off_centre, straight), swings, sides)
def test_ends_lie_along_the_pointer(line, ends, pair):
    """Both corners at each end lie on the pointer's ray, whatever the arc's centre."""
    outline = band(line, *ends, *pair, INK)
    ends_deg = {v: math.degrees(math.atan2(v.x, v.y)) for v in outline.vertices}
    first, last = sorted(ends)
    outer_first, outer_last, inner_last, inner_first = outline.vertices
    for vertex, angle in ((outer_first, first), (inner_first, first), (outer_last, last), (inner_last, last)):
        assert ends_deg[vertex] == pytest.approx(angle, abs=1e-9)


@some
@given(off_centre, swings, sides)
def test_long_sides_are_arcs_about_the_lines_own_centre(line, ends, pair):
    """Every point of the long sides is as far from the arc's centre as the side is to be."""
    outline = band(line, *ends, *pair, INK)
    assert [bool(v.turn_deg) for v in outline.vertices] == [True, False, True, False]
    distances = np.hypot(*(corners(outline) - line.centre).T)
    for side in pair:
        near = np.abs(distances - line.radius_mm - side) < 1e-6
        assert near.sum() > 2
    on_a_side = np.min([np.abs(distances - line.radius_mm - side) for side in pair], axis=0)
    assert on_a_side.max() < 1e-6


@some
@given(any_line, swings, sides)
def test_a_band_has_no_direction(line, ends, pair):
    """A meter that turns anticlockwise has the same band between the same two angles."""
    assert band(line, *ends, *pair, INK) == band(line, *ends[::-1], *pair, INK)


@some
@given(any_line, swings, sides)
def test_outlines_are_simple_and_clockwise(line, ends, pair):
    """No band crosses itself, and each runs clockwise."""
    figure = polygon(band(line, *ends, *pair, INK))
    assert figure.is_valid
    assert not figure.exterior.is_ccw


@some
@given(any_line, st.lists(st.floats(-50, 50), min_size=3, max_size=6, unique=True))
def test_many_bands_are_as_if_made_one_by_one(line, angles):
    """Bands made together are those made alone."""
    pairs = list(itertools.pairwise(angles))
    together = bands(line, [a for a, _ in pairs], [b for _, b in pairs], -1.0, 1.5, INK)
    alone = [band(line, a, b, -1.0, 1.5, INK) for a, b in pairs]
    for one, other in zip(together, alone, strict=True):
        assert rows(one) == pytest.approx(rows(other), abs=1e-9)


@pytest.mark.parametrize(
    ("line", "inner"),
    [
        pytest.param(ArcLine(5.0), -6.0, id="past the centre"),
        pytest.param(ArcLine(20.0, (0.0, 18.0)), -5.0, id="a circle that the pointer misses"),
        pytest.param(StraightLine((-20.0, 5.0), (20.0, 5.0)), -6.0, id="behind the pivot"),
    ],
)
def test_no_room_is_refused(line, inner):
    """A band that would come out behind the centre or the pivot is an error, never a figure turned over."""
    with pytest.raises(InputError, match="meets nothing"):
        band(line, -60.0, 60.0, inner, 0.0, INK)


@some
@given(st.floats(10, 100), st.floats(-180, 180), st.floats(1, 300), st.floats(0.2, 8))
def test_curved_slot_has_its_width_and_round_ends(radius, start, sweep, width):
    """A slot along an arc has the area w·R·θ + π·w²/4 and every point of its rim w/2 from its course."""
    run = ArcCourse((1.0, 2.0), radius, start, start + sweep)
    if width >= run.room_mm:
        return
    figure = polygon(slot(run, width, INK))
    assert figure.is_valid
    area = width * radius * math.radians(sweep) + math.pi * width**2 / 4
    assert figure.area == pytest.approx(area, rel=1e-5)
    middle = LineString([run.point(at) for at in np.linspace(run.low, run.high, 1000)])
    rim = [middle.distance(Point(p)) for p in corners(slot(run, width, INK))[::200]]
    assert rim == pytest.approx([width / 2] * len(rim), abs=1e-3)


@some
@given(st.floats(-60, 60), st.floats(-60, 60), st.floats(0.5, 80), st.floats(0, 360), st.floats(0.2, 8))
def test_straight_slot_is_what_shapely_makes_of_its_course(x, y, length, angle, width):
    """A straight slot is the buffer of its course with round caps."""
    turn = math.radians(angle)
    ux, uy = math.cos(turn), math.sin(turn)
    run = LineCourse((ux, uy), y * ux - x * uy, x * ux + y * uy, x * ux + y * uy + length)
    figure = polygon(slot(run, width, INK))
    truth = LineString([(x, y), (x + length * ux, y + length * uy)]).buffer(width / 2, quad_segs=90)
    assert figure.symmetric_difference(truth).area < 1e-4 * truth.area


def test_slot_wider_than_its_arc_is_refused():
    """A slot that would reach its own centre or its own other end is an error."""
    for run in (ArcCourse((0.0, 0.0), 2.0, -10.0, 10.0), ArcCourse((0.0, 0.0), 20.0, -175.0, 175.0)):
        with pytest.raises(InputError, match="does not fit"):
            slot(run, 4.5, INK)


@some
@given(any_line, st.floats(-50, 50), st.floats(-50, 50))
def test_courses_of_one_line_share_their_places(line, start, end):
    """What stands at one place of two courses beside a line lies square across, as far as they are apart."""
    near, far = course(line, start, end, 0.0), course(line, start, end, 3.0)
    for at in (near.low, near.high):
        assert math.dist(near.point(at), far.point(at)) == pytest.approx(3.0, abs=1e-9)
        assert near.point(at, 3.0) == pytest.approx(far.point(at), abs=1e-9)
