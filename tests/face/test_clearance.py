"""How far numerals are moved from ends of marks and back onto the plate: shapely and search as referees."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st
from shapely import LineString, MultiPoint, Point, affinity, box

from dialgen.drawing import Style
from dialgen.face.inked.clearance import Row, clear_of_ends, clear_of_ink, clear_of_others, slides
from dialgen.face.plate import Disc, Outliner, Rectangle

EDGE_MM = 0.8
SLIDE_MM = 0.1

coordinates = st.floats(-4, 4).map(lambda x: round(x, 4))
clouds = st.lists(st.tuples(coordinates, coordinates), min_size=1, max_size=12).map(np.array)
ways_deg = st.floats(0, 360)
spaces_mm = st.floats(0.1, 3.0)


def unit(angle_deg: float) -> tuple[float, float]:
    """The unit vector of an angle, 0 straight up and clockwise."""
    return math.sin(math.radians(angle_deg)), math.cos(math.radians(angle_deg))


def row_of(numerals: list[np.ndarray], ends: list, ways: list[float]) -> Row:
    """A row of numerals given as points about the origin, each with the end of its mark and its way."""
    starts = np.cumsum([0, *(len(points) for points in numerals[:-1])])
    return Row(np.concatenate(numerals), starts, np.array(ends, float), np.array([unit(w) for w in ways]))


def assert_just_clear(points, obstacle, way: tuple[float, float], reach_mm: float, space_mm: float) -> None:
    """Moved that far all is clear, and moved farther; moved less, if it was moved at all, it is not."""

    def distance(moved_mm: float) -> float:
        return affinity.translate(points, moved_mm * way[0], moved_mm * way[1]).distance(obstacle)

    assert reach_mm >= 0
    for farther_mm in np.linspace(0.0, 12.0, 25):
        assert distance(reach_mm + farther_mm) >= space_mm - 1e-7
    if reach_mm > 0:
        assert distance(reach_mm) == pytest.approx(space_mm, abs=1e-7)


@settings(max_examples=200, deadline=None)
@given(st.lists(st.tuples(clouds, ways_deg), min_size=1, max_size=4), st.floats(0.05, 1.0), spaces_mm)
def test_numerals_are_just_clear_of_the_ends_of_their_marks(given, half_width_mm: float, space_mm) -> None:
    """Each numeral of a row moves until its nearest point is the wanted space from the edge of its mark."""
    numerals, ways = zip(*given, strict=True)
    ends = [(30.0 * i, -7.0 * i) for i in range(len(given))]
    found = clear_of_ends(row_of(numerals, ends, ways), half_width_mm, space_mm)
    for points, way_deg, reach_mm in zip(numerals, ways, found.tolist(), strict=True):
        (x, y), edge = unit(way_deg), half_width_mm
        mark = LineString([(-edge * y, edge * x), (edge * y, -edge * x)])
        assert_just_clear(MultiPoint(points), mark, (x, y), reach_mm, space_mm)


@settings(max_examples=300, deadline=None)
@given(clouds, clouds, ways_deg, spaces_mm)
def test_ink_is_just_clear_of_other_ink(points, obstacles, way_deg: float, space_mm: float) -> None:
    """The same between two clouds of points: shapely's least distance is the space wanted, or more."""
    reach_mm = clear_of_ink(points, obstacles, unit(way_deg), space_mm)
    assert_just_clear(MultiPoint(points), MultiPoint(obstacles), unit(way_deg), reach_mm, space_mm)


@st.composite
def numerals_on_rings(draw: st.DrawFn) -> tuple[Row, np.ndarray]:
    """Boxes of several widths over the ends of the marks of an arc, outside or inside of it."""
    radius_mm, step_deg = draw(st.floats(15, 110)), draw(st.floats(1, 6))
    angles = np.arange(-90, 90, step_deg)
    tips = radius_mm * np.array([unit(angle) for angle in angles])
    chosen = draw(st.lists(st.integers(0, len(angles) - 1), min_size=1, max_size=4, unique=True))
    turned = draw(st.sampled_from((0.0, 180.0)))
    boxes = []
    for _ in chosen:
        wide, high = draw(st.floats(0.5, 7.0)), draw(st.floats(0.8, 2.5))
        edge = box(-wide, -high, wide, high).exterior
        boxes.append(
            np.array([edge.interpolate(at, normalized=True).coords[0] for at in np.arange(0, 1, 0.01)])
        )
    return row_of(boxes, [tips[i] for i in chosen], [angles[i] + turned for i in chosen]), tips


@settings(max_examples=100, deadline=None)
@given(numerals_on_rings(), st.floats(0.2, 1.5))
def test_numerals_clear_the_ends_of_their_neighbours(made, space_mm: float) -> None:
    """On an arc a wide numeral moves on until it is clear of every mark's end, and not a hair farther."""
    row, tips = made
    start = clear_of_ends(row, 0.1, space_mm / 0.6)
    found = clear_of_others(row, start, tips, space_mm)
    parts = np.split(row.points, row.starts[1:])
    for points, end, away, was, now in zip(parts, row.ends, row.aways, start, found, strict=True):
        distances = [Point(end + now * away + point).distance(MultiPoint(tips)) for point in points]
        assert min(distances) >= space_mm - 1e-7
        assert now >= was
        if now > was:
            assert min(distances) == pytest.approx(space_mm, abs=1e-7)


def test_a_numeral_that_is_clear_stays_where_it_is() -> None:
    """The ends of other marks that are far off move nothing."""
    row = row_of([np.array([[-1.0, 0.0], [1.0, 0.0]])], [(0.0, 40.0)], [0.0])
    tips = np.array([[0.0, 40.0], [4.0, 39.8]])
    assert clear_of_others(row, np.array([2.0]), tips, 0.5).tolist() == [2.0]


# ---------------------------------------------------------------- back onto the plate

FAR = np.array([[1e4, 1e4]])
"""The end of a mark that is in nobody's way."""

plates = st.one_of(
    st.builds(
        lambda w, h, c: Rectangle((-w / 2, -h / 3, w, h), c),
        st.floats(30, 90),
        st.floats(30, 90),
        st.one_of(st.just(0.0), st.floats(0.1, 12)),
    ),
    st.builds(lambda x, y, r: Disc((x, y), r), st.floats(-5, 5), st.floats(-5, 5), st.floats(15, 50)),
)


def area(plate: Outliner):
    """A plate as a shapely polygon, a little larger for rounding."""
    if isinstance(plate, Disc):
        return Point(plate.centre).buffer(plate.radius_mm, quad_segs=2000).buffer(2e-5)
    left, bottom, width, height = plate.box
    c = plate.corner_mm
    core = box(left + c, bottom + c, left + width - c, bottom + height - c)
    return (core.buffer(c, quad_segs=2000) if c else core).buffer(2e-5)


@settings(max_examples=200, deadline=None)
@given(plates, st.floats(0.5, 8), st.floats(0.5, 2.5), st.floats(-60, 60), st.floats(-60, 60), ways_deg)
def test_a_numeral_slides_no_farther_than_it_must(
    plate, wide: float, high: float, x: float, y: float, way_deg: float
) -> None:
    """A numeral on the plate stays; one off it slides by the least tenth that brings it and its rim on."""
    corners = np.array([[-wide, -high], [wide, -high], [wide, high], [-wide, high]])
    row = row_of([corners], [(0.0, 0.0)], [way_deg])
    (slid,) = slides(plate, row, np.array([[x, y]]), FAR, 0.0)
    ux, uy = unit(way_deg)
    assert slid @ (ux, uy) == pytest.approx(0.0, abs=1e-9)
    rim = box(x - wide - EDGE_MM, y - high - EDGE_MM, x + wide + EDGE_MM, y + high + EDGE_MM)
    length_steps = 2 * (max(wide, high) + EDGE_MM) / SLIDE_MM
    assume(abs(length_steps - round(length_steps)) > 1e-6)
    steps = [0.0, *(sign * i * SLIDE_MM for i in range(1, math.ceil(length_steps)) for sign in (1, -1))]

    def wanted_mm(whole) -> float:
        rims = ((abs(t), affinity.translate(rim, t * uy, -t * ux)) for t in steps)
        return next((moved for moved, there in rims if whole.covers(there)), 0.0)

    # What just touches the edge may be called on the plate or off it.
    either = [wanted_mm(area(plate).buffer(by_mm)) for by_mm in (1e-4, -1e-4)]
    moved_mm = float(np.hypot(*slid))
    assert min(abs(moved_mm - wanted) for wanted in either) < 1e-6
    assert moved_mm == 0 or area(plate).covers(affinity.translate(rim, *slid))


def test_each_numeral_of_a_row_slides_by_itself() -> None:
    """Of three numerals only the one over the edge moves, and it moves along the edge of its scale."""
    plate = Rectangle((-30.0, -10.0, 60.0, 60.0), 0.0)
    word = np.array([[-3.0, -1.0], [3.0, 1.0]])
    row = row_of([word] * 3, [(0.0, 0.0)] * 3, [-45.0, 0.0, 45.0])
    shifts = np.array([[-20.0, 20.0], [0.0, 40.0], [27.5, 20.0]])
    slid = slides(plate, row, shifts, FAR, 0.0)
    assert slid[:2].tolist() == [[0.0, 0.0], [0.0, 0.0]]
    # 1.3 mm over the edge with its rim: 1.3·√2 along a slope of 45 degrees, in whole tenths.
    assert np.hypot(*slid[2]) == pytest.approx(1.9, abs=1e-9)
    assert slid[2, 0] == pytest.approx(-slid[2, 1])
    assert slid[2, 0] < 0


def test_the_points_of_a_row_belong_to_their_numerals() -> None:
    """Ink of a row comes back numeral by numeral, each moved by its own shift."""
    row = row_of([np.zeros((2, 2)), np.ones((3, 2)), np.full((1, 2), 5.0)], [(0, 0)] * 3, [0, 0, 0])
    assert row.owners.tolist() == [0, 0, 1, 1, 1, 2]
    first, second, third = row.ink(np.array([[1.0, 0.0], [0.0, 2.0], [0.0, 0.0]]))
    assert first.tolist() == [[1.0, 0.0]] * 2
    assert second.tolist() == [[1.0, 3.0]] * 3
    assert third.tolist() == [[5.0, 5.0]]


@pytest.mark.parametrize("plate", [Rectangle((-40.0, -20.0, 80.0, 70.0), 6.0), Disc((1.0, 2.0), 33.0)])
def test_the_referees_plate_is_the_plate(plate: Outliner) -> None:
    """The polygon that the sliding is judged by is the outline that is cut."""
    outline = plate.outline(Style(stroke="#000000", width_mm=0.1))
    points = (
        [(vertex.x, vertex.y) for vertex in outline.vertices]
        if isinstance(plate, Rectangle)
        else [
            (plate.centre[0] + plate.radius_mm * x, plate.centre[1] + plate.radius_mm * y)
            for x, y in map(unit, range(0, 360, 30))
        ]
    )
    assert all(area(plate).boundary.distance(Point(point)) < 1e-4 for point in points)


def test_a_numeral_slides_past_a_mark_rather_than_over_it() -> None:
    """Off the edge a numeral slides on until it is clear of a mark's end; without one, only back on."""
    plate = Rectangle((-30.0, -10.0, 60.0, 60.0), 0.0)
    row = row_of([np.array([[-3.0, -1.0], [3.0, 1.0]])], [(0.0, 0.0)], [0.0])
    at = np.array([[28.5, 20.0]])
    free = slides(plate, row, at, FAR, 0.5)[0]
    past = slides(plate, row, at, np.array([[24.8, 20.0]]), 0.5)[0]
    assert free == pytest.approx((-2.3, 0.0))
    assert 28.5 + past[0] + 3.0 + 0.5 <= 24.8 + 1e-9
