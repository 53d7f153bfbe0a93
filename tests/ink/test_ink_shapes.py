"""The area of a primitive, against closed formulas and against shapely."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given, settings
from ink_reference import (
    BLACK,
    arcs,
    circles,
    covered,
    lines,
    polygon_of,
    single_strokes,
    wedges,
    words,
    zones,
)

from dialgen.drawing import Arc, Cap, Circle, Glyph, Letters, Line, Outline, Placed, Style, Vertex, polar
from dialgen.ink import shape
from dialgen.lettering import letters

INK = Style(stroke=BLACK, width_mm=0.4)
BLOT = Style(stroke=BLACK, width_mm=0.4, cap=Cap.ROUND)
FILLED = Style(fill=BLACK)


def agree(item, within_mm=0.006) -> None:
    """Check a shape's area, reach and box against shapely's."""
    ours, theirs = shape(item), covered(item)
    polygon = polygon_of(ours)
    assert polygon.area == pytest.approx(theirs.area, rel=0.01)
    # What one covers and the other does not is nowhere wider than the arcs are true.
    assert polygon.difference(theirs.buffer(within_mm)).area < 1e-9
    assert theirs.difference(polygon.buffer(within_mm)).area < 1e-9
    assert ours.box == pytest.approx(theirs.bounds, abs=within_mm)
    assert ours.box == pytest.approx(polygon.bounds, abs=1e-6)


class TestAgainstShapely:
    """Each kind of primitive covers what shapely says it does, to 1 % and 0.006 mm."""

    @given(item=lines())
    def test_line(self, item) -> None:
        """A line is a rectangle of its width, with round ends where its cap is round."""
        agree(item)

    @given(item=arcs())
    def test_arc(self, item) -> None:
        """An arc is a band along its circle, over half a turn as well."""
        agree(item)

    @given(item=circles())
    def test_circle(self, item) -> None:
        """A circle is a ring, a disc, or a disc enlarged by half its stroke."""
        agree(item)

    @given(item=wedges())
    def test_triangle(self, item) -> None:
        """A triangle has mitred corners outside its stroke, whichever way round it is written."""
        agree(item)

    @given(item=zones())
    def test_zone(self, item) -> None:
        """An outline with a clockwise and an anticlockwise arc covers the band between them."""
        # Shapely leaves out corners on which a stroke bends by less than 1 % of half its width.
        agree(item, within_mm=0.006 + 0.01 * item.style.width_mm / 2)

    @settings(max_examples=30, deadline=None)
    @given(item=words())
    def test_letters(self, item) -> None:
        """Letters cover their outlines where they stand, without the holes of 0, 8 and %."""
        agree(item)

    @settings(max_examples=30, deadline=None)
    @given(item=single_strokes())
    def test_single_stroke_letters(self, item) -> None:
        """A letter of a single stroke covers the stroke's width about its path, rounded."""
        agree(item)


class TestByFormula:
    """Areas and boxes that a formula gives."""

    def test_broad_arc_about_its_centre(self) -> None:
        """A quarter turn of radius 1 and width 4 is a sector of radius 3 and one of radius 1 across."""
        wide = shape(Arc((5.0, 5.0), 1.0, 0.0, 90.0, Style(stroke=BLACK, width_mm=4.0)))
        assert polygon_of(wide).area == pytest.approx(math.pi / 4 * (3**2 + 1**2), rel=0.01)
        assert wide.box == pytest.approx((4.0, 4.0, 8.0, 8.0), abs=1e-9)

    def test_whole_turn(self) -> None:
        """An arc of a whole turn is a ring of two contours, its ends nowhere."""
        ring = shape(Arc((0.0, 0.0), 10.0, 30.0, 390.0, INK))
        assert [len(c) > 30 for c in ring.contours] == [True, True]
        assert polygon_of(ring).area == pytest.approx(2 * math.pi * 10 * 0.4, rel=0.001)

    def test_stroke_that_closes_its_ring(self) -> None:
        """A ring whose stroke is wider than its circle has no hole."""
        (rim,) = shape(Circle((0.0, 0.0), 0.15, INK)).contours
        assert polygon_of(shape(Circle((0.0, 0.0), 0.15, INK))).area == pytest.approx(
            math.pi * 0.35**2, rel=0.01
        )
        assert np.hypot(*rim.T) == pytest.approx(0.35)

    def test_sharp_corner_is_cut(self) -> None:
        """A mitre over ten widths long is cut off at the corner: a needle of 4 degrees ends near it."""
        needle = (Vertex(0.0, 0.0), Vertex(20.0, 0.7), Vertex(20.0, -0.7))
        assert shape(Outline(needle, INK)).box[0] > -0.2001

    def test_sharp_corner_within_the_limit(self) -> None:
        """A mitre of a 30 degree corner stands out by half a width over the sine of 15 degrees."""
        y = 20.0 * math.tan(math.radians(15))
        wedge = Outline((Vertex(0.0, 0.0), Vertex(20.0, y), Vertex(20.0, -y)), INK)
        assert shape(wedge).box[0] == pytest.approx(-0.2 / math.sin(math.radians(15)))

    def test_stroke_that_fills_its_triangle(self) -> None:
        """A stroke that meets itself within leaves no hole.

        A regular triangle of inradius 0.5 and half width 0.8 is one of inradius r = 1.3, and its area
        is 3·sqrt(3)·r^2.
        """
        corners = [polar((0, 0), 1.0, angle) for angle in (0, 120, 240)]
        for order in (1, -1):
            figure = tuple(Vertex(x, y) for x, y in corners[::order])
            broad = shape(Outline(figure, Style(stroke=BLACK, width_mm=1.6)))
            assert polygon_of(broad).area == pytest.approx(3 * math.sqrt(3) * 1.3**2)

    def test_ring_runs_both_ways(self) -> None:
        """Ink is wound anticlockwise and a hole clockwise, so that a winding number of 0 is the hole."""
        rim, hole = shape(Circle((3.0, 4.0), 5.0, INK)).contours
        assert signed_area(rim) == pytest.approx(math.pi * 5.2**2, rel=0.01)
        assert signed_area(hole) == pytest.approx(-math.pi * 4.8**2, rel=0.01)

    def test_dot_of_a_single_stroke_letter(self) -> None:
        """A path of one point is a dot as wide as the stroke where the cap is round, else nothing."""
        dot = Glyph("test-dot", (("M", (0.5, 0.5)), ("L", (0.5, 0.5))), (0.5, 0.5, 0.5, 0.5), stroked=True)
        placed = (Placed(dot, 1.0, 2.0, 4.0),)
        assert shape(Letters(".", placed, BLOT)).box == pytest.approx((2.8, 3.8, 3.2, 4.2))
        assert shape(Letters(".", placed, INK)) is None


def signed_area(contour) -> float:
    """Return the shoelace sum of a contour."""
    x, y = contour.T
    return float((x * np.roll(y, -1) - y * np.roll(x, -1)).sum() / 2)


BARE = Style(width_mm=1.0)
NO_INK = {
    "line without a colour": Line((0, 0), (1, 1), BARE),
    "line without a width": Line((0, 0), (1, 1), Style(stroke=BLACK)),
    "line only filled": Line((0, 0), (1, 1), FILLED),
    "line of no length": Line((1, 1), (1, 1), INK),
    "arc of no length": Arc((0, 0), 5, 10, 10, INK),
    "arc only filled": Arc((0, 0), 5, 10, 20, FILLED),
    "circle without a colour": Circle((0, 0), 5, BARE),
    "circle of no radius": Circle((0, 0), 0, FILLED),
    "outline without a colour": Outline((Vertex(0, 0), Vertex(1, 0), Vertex(0, 1)), BARE),
    "outline in one point": Outline((Vertex(1, 1), Vertex(1, 1)), INK),
    "letters without a fill": letters("8", 2, (0, 0), INK),
    "no letters": Letters("", (), FILLED),
}


@pytest.mark.parametrize("item", NO_INK.values(), ids=NO_INK.keys())
def test_what_inks_nothing(item) -> None:
    """What no renderer would ink has no shape."""
    assert shape(item) is None


def test_round_dot() -> None:
    """A line of no length with round caps is a dot of its width."""
    assert shape(Line((1.0, 1.0), (1.0, 1.0), BLOT)).box == pytest.approx((0.8, 0.8, 1.2, 1.2))


def test_shapes_cannot_be_changed() -> None:
    """The corners handed out are read-only, for they may be shared."""
    for item in (Line((0, 0), (1, 1), INK), Circle((0, 0), 1, INK), letters("8", 2, (0, 0), FILLED)):
        for contour in shape(item).contours:
            with pytest.raises(ValueError, match="read-only"):
                contour[0, 0] = 1.0
