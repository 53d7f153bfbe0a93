"""Whether inks touch and how near they come, against shapely and against plain geometry."""

from __future__ import annotations

import math
from itertools import combinations

import numpy as np
import pytest
import shapely
from hypothesis import example, given, settings
from hypothesis import strategies as st
from ink_reference import BLACK, angles, covered, points, primitives

from dialgen.drawing import Arc, Circle, Line, Outline, Style, Vertex, polar
from dialgen.ink import clearance, meetings, neighbours, shape, touch
from dialgen.lettering import letters

INK = Style(stroke=BLACK, width_mm=0.4)
THIN = Style(stroke=BLACK, width_mm=0.1)
FILLED = Style(fill=BLACK)
DOUBT_MM = 0.01


def verdict(one, other) -> bool | None:
    """Return whether shapely has two areas touch; None where moving an edge by 0.01 mm may change it."""
    if one.distance(other) > DOUBT_MM:
        return False
    return True if one.buffer(-DOUBT_MM / 2).intersects(other.buffer(-DOUBT_MM / 2)) else None


class TestAgainstShapely:
    """The same verdicts and distances as shapely's."""

    @settings(max_examples=150, deadline=None)
    @given(one=primitives, other=primitives)
    def test_touch(self, one, other) -> None:
        """Two areas touch where shapely's do, but for tangencies; the place is on both of them."""
        areas = covered(one), covered(other)
        place = touch(shape(one), shape(other))
        assert verdict(*areas) in (None, place is not None)
        if place is not None:
            assert all(area.distance(shapely.Point(place)) < DOUBT_MM for area in areas)

    @settings(max_examples=150, deadline=None)
    @given(one=primitives, other=primitives)
    def test_clearance(self, one, other) -> None:
        """Two areas are as far apart as shapely's, to 0.01 mm, and equally so from either side."""
        expected = covered(one).distance(covered(other))
        assert clearance(shape(one), shape(other)) == pytest.approx(expected, abs=DOUBT_MM)
        assert clearance(shape(other), shape(one)) == pytest.approx(clearance(shape(one), shape(other)))

    @settings(max_examples=40, deadline=None)
    @given(items=st.lists(primitives, min_size=2, max_size=8), within_mm=st.floats(0, 5))
    def test_many_at_once(self, items, within_mm) -> None:
        """Among many shapes every pair is found that shapely has within a distance, and no other."""
        shapes, areas = [shape(item) for item in items], [covered(item) for item in items]
        met = {(i, j) for i, j, _ in meetings(shapes)}
        close = {(i, j): (gap, place) for i, j, gap, place in neighbours(shapes, within_mm)}
        for i, j in combinations(range(len(items)), 2):
            assert verdict(areas[i], areas[j]) in (None, (i, j) in met)
            distance = areas[i].distance(areas[j])
            if abs(distance - within_mm) > DOUBT_MM:
                assert ((i, j) in close) == (distance < within_mm)
            if (i, j) in close:
                gap_mm, place = close[i, j]
                assert gap_mm == pytest.approx(distance, abs=DOUBT_MM)
                # Half way between them.
                for area in (areas[i], areas[j]):
                    assert area.distance(shapely.Point(place)) == pytest.approx(gap_mm / 2, abs=DOUBT_MM)


def bar(turn_deg, at, start, end, width_mm=0.4):
    """Return a line given along and across a frame that is turned about and moved to ``at``."""
    turn = math.radians(turn_deg)
    ends = [
        (at[0] + x * math.cos(turn) + y * math.sin(turn), at[1] - x * math.sin(turn) + y * math.cos(turn))
        for x, y in (start, end)
    ]
    return shape(Line(*ends, Style(stroke=BLACK, width_mm=width_mm)))


class TestTangencies:
    """What only just touches touches, in whatever direction it lies; what only just does not is clear."""

    @example(turn_deg=24.927889754113068, at=(-3.5, 0.0))
    @given(turn_deg=angles, at=points)
    def test_end_to_end(self, turn_deg, at) -> None:
        """Two bars that share an end touch, and a micrometre between them is seen.

        In the example, rounding puts the ends of each long edge on two sides of the other's line.
        """
        one = bar(turn_deg, at, (0, 0), (5, 0))
        assert touch(one, bar(turn_deg, at, (5, 0), (9, 0))) is not None
        apart = bar(turn_deg, at, (5.001, 0), (9, 0))
        assert touch(one, apart) is None
        assert clearance(one, apart) == pytest.approx(0.001, abs=1e-9)

    @given(turn_deg=angles, at=points, along=st.floats(-4.9, 4.9))
    def test_side_by_side(self, turn_deg, at, along) -> None:
        """Two bars that share a part of their long edges touch, thin as they are."""
        one = bar(turn_deg, at, (0, 0), (5, 0), 0.1)
        assert touch(one, bar(turn_deg, at, (along, 0.1), (along + 5, 0.1), 0.1)) is not None
        assert touch(one, bar(turn_deg, at, (along, 0.1001), (along + 5, 0.1001), 0.1)) is None

    @given(turn_deg=angles, at=points)
    def test_corner_on_edge(self, turn_deg, at) -> None:
        """A bar that stands with its end on another's long edge touches it."""
        stands = bar(turn_deg, at, (2, 0.2), (2, 5))
        assert touch(bar(turn_deg, at, (0, 0), (5, 0)), stands) is not None

    @given(turn_deg=angles, at=points)
    def test_corner_on_corner(self, turn_deg, at) -> None:
        """Two bars that have a single corner in common touch in that corner."""
        one, other = bar(turn_deg, at, (0, 0), (5, 0)), bar(turn_deg, at, (5, 0.4), (9, 0.4))
        turn = math.radians(turn_deg)
        x, y = 5.0, 0.2
        corner = x * math.cos(turn) + y * math.sin(turn), -x * math.sin(turn) + y * math.cos(turn)
        assert touch(one, other) == pytest.approx((at[0] + corner[0], at[1] + corner[1]), abs=1e-8)

    @given(turn_deg=angles, at=points)
    def test_the_same_ink_twice(self, turn_deg, at) -> None:
        """Two inks that are the same, every edge on an edge, touch."""
        one = bar(turn_deg, at, (0, 0), (5, 0))
        assert touch(one, bar(turn_deg, at, (0, 0), (5, 0))) is not None

    def test_far_from_the_pivot(self) -> None:
        """Two metres from the pivot, rounding does not keep what shares an edge apart."""
        one = bar(33.3, (2000, -2000), (0, 0), (5, 0))
        assert touch(one, bar(33.3, (2000, -2000), (5, 0), (9, 0))) is not None

    def test_mark_on_the_end_of_its_arc(self) -> None:
        """A mark whose side is the end of an arc touches it along that end."""
        arc = shape(Arc((0, 0), 40, -45, 0, INK))
        mark = shape(Line((0.2, 38), (0.2, 42), INK))
        assert touch(arc, mark) == pytest.approx((0.0, 40.0), abs=0.21)
        assert touch(arc, shape(Line((0.201, 38), (0.201, 42), INK))) is None

    def test_crossing_without_corners_inside(self) -> None:
        """Two thin bars that cross share no corner with each other, and meet where they cross."""
        across, upward = Line((-5, 1), (5, 1), THIN), Line((2, -5), (2, 5), THIN)
        assert touch(shape(across), shape(upward)) == pytest.approx((2, 1), abs=0.051)


class TestInside:
    """One ink within another touches it, unless it stands in a hole."""

    BAND = Outline(
        (Vertex(*polar((0, 0), 40, -30), 60), Vertex(*polar((0, 0), 40, 30)),
         Vertex(*polar((0, 0), 30, 30), -60), Vertex(*polar((0, 0), 30, -30))), FILLED
    )  # fmt: skip

    def test_numeral_within_a_band(self) -> None:
        """A numeral printed wholly within a coloured band touches it, whichever is named first."""
        band, numeral = shape(self.BAND), shape(letters("20", 2.5, (0, 35), FILLED))
        for place in (touch(band, numeral), touch(numeral, band)):
            assert 30 < math.hypot(*place) < 40

    def test_numeral_under_a_band(self) -> None:
        """What stands within the band's box but nearer to the pivot is clear of it."""
        numeral = shape(letters("20", 2.5, (0, 27.5), FILLED))
        assert touch(shape(self.BAND), numeral) is None
        mark = shape(Line((0, 25), (0, 28), INK))
        assert clearance(shape(self.BAND), mark) == pytest.approx(30 - math.hypot(28, 0.2), abs=0.003)

    def test_the_second_letter_alone(self) -> None:
        """Of a word with its first letter clear of a disc and its last within it, the last is found."""
        word = shape(letters("I" + 20 * " " + "I", 3, (0, 0), FILLED))
        disc = shape(Circle((word.box[2] - 0.2, 0), 2.0, FILLED))
        assert touch(word, disc)[0] > 0

    @pytest.mark.parametrize("text", ["0", "8", "%", "6"])
    def test_dot_in_a_counter(self, text) -> None:
        """A dot in the counter of a large letter is clear of it, and one on its stem is not."""
        letter = letters(text, 20, (0, 0), FILLED)
        area, ours = covered(letter), shape(letter)
        parts = [area] if area.geom_type == "Polygon" else list(area.geoms)
        holes = [shapely.Polygon(hole) for part in parts for hole in part.interiors]
        assert len(holes) == {"0": 1, "8": 2, "%": 2, "6": 1}[text]
        for hole in holes:
            middle = hole.representative_point()
            dot = Circle((middle.x, middle.y), 0.2, FILLED)
            assert touch(ours, shape(dot)) is None
            assert clearance(ours, shape(dot)) == pytest.approx(area.distance(covered(dot)), abs=0.01)
        on_stem = area.representative_point()
        assert touch(ours, shape(Circle((on_stem.x, on_stem.y), 0.05, FILLED))) is not None

    @given(angle_deg=angles, off_mm=st.floats(0, 2.7))
    def test_disc_in_a_ring(self, angle_deg, off_mm) -> None:
        """A disc of radius 2 in a ring of inner radius 4.8 keeps 2.8 less its offset from the middle."""
        ring = shape(Circle((1, 2), 5, INK))
        disc = shape(Circle(polar((1, 2), off_mm, angle_deg), 2, FILLED))
        assert clearance(ring, disc) == pytest.approx(2.8 - off_mm, abs=0.006)
        assert touch(disc, ring) is None

    def test_in_the_mouth_of_an_arc(self) -> None:
        """What stands in the opening or in the middle of an arc of 300 degrees is clear of it."""
        arc = shape(Arc((0, 0), 10, 30, 330, INK))
        for at in ((0, 0), (0, 10), (0, 9)):
            assert touch(arc, shape(Circle(at, 1, FILLED))) is None

    def test_filled_and_stroked_at_once(self) -> None:
        """Where fill and stroke overlap the area is covered, not cancelled."""
        style = Style(stroke=BLACK, width_mm=2, fill=BLACK)
        for order in (1, -1):
            corners = (Vertex(0, 0), Vertex(0, 10), Vertex(10, 10), Vertex(10, 0))[::order]
            for x in (-0.5, 0.5, 5.0):
                assert touch(shape(Outline(corners, style)), shape(Circle((x, 5), 0.1, FILLED))) is not None


def dot(x, y=0.0):
    """Return a disc of 1 mm radius."""
    return shape(Circle((x, y), 1.0, FILLED))


class TestGroups:
    """The caller says which pairs must stand apart."""

    ROW = (dot(0), dot(1.5), dot(3), dot(4.5))
    GROUPS = (0, 0, 1, 1)

    @pytest.mark.parametrize(
        ("apart", "expected"),
        [
            (None, [(0, 1), (1, 2), (2, 3)]),
            ([[True, False], [False, False]], [(0, 1)]),
            ([[False, True], [False, False]], [(1, 2)]),
            ([[False, False], [True, False]], [(1, 2)]),
            ([[True, True], [True, True]], [(0, 1), (1, 2), (2, 3)]),
            ([[False, False], [False, False]], []),
        ],
    )
    def test_only_what_must_stand_apart(self, apart, expected) -> None:
        """Pairs are reported within a group or between two as the matrix says, from either side."""
        found = meetings(self.ROW, self.GROUPS, apart)
        assert [(one, other) for one, other, _ in found] == expected
        close = neighbours(self.ROW, 0.1, self.GROUPS, apart)
        assert [(near.one, near.other, near.gap_mm) for near in close] == [(*p, 0.0) for p in expected]

    def test_distance_and_place(self) -> None:
        """Two discs 2.5 mm apart between centres are 0.5 mm apart, and half way is between them."""
        (near,) = neighbours((dot(0), dot(2.5), dot(9)), 1.0)
        assert (near.one, near.other) == (0, 1)
        assert near.gap_mm == pytest.approx(0.5, abs=1e-9)
        assert near.place == pytest.approx((1.25, 0.0), abs=0.1)

    def test_few(self) -> None:
        """No shape and one shape have no neighbours."""
        assert meetings(()) == meetings((dot(0),)) == neighbours((), 1.0) == []

    def test_blocks_lose_nothing(self, monkeypatch) -> None:
        """However few pairs are looked at together, the same ones are found."""
        places = np.random.default_rng(7).uniform(-12, 12, (60, 2)).tolist()
        shapes = [dot(x, y) for x, y in places] + [shape(Arc((0, 0), 8, -170, 170, INK))]
        at_once = neighbours(shapes, 0.5)
        assert len(at_once) > 50
        for few in (1, 10, 100):
            monkeypatch.setattr("dialgen.ink.pairs._AT_ONCE", few)
            assert neighbours(shapes, 0.5) == at_once
