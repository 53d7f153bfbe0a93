"""Marks as ink: their shapes and ends, by the formulas of plane geometry and by shapely."""

import itertools
import math

import numpy as np
import pytest
from laid_scales import ENDS, LINES, dial_text, ink, laid, polygon
from shapely import Point

from dialgen.drawing import Cap, Line, Outline
from dialgen.face.inked.numerals import mark_lines
from dialgen.face.ruled.divisions import Rank


def ranked(found):
    """The marks of a scale in the order in which they are drawn."""
    return [mark for rank in Rank for mark in found.scale.marks if mark.rank is rank]


@pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)
@pytest.mark.parametrize("line", LINES.values(), ids=LINES)
@pytest.mark.parametrize(("marks", "share"), [("outward", 0.0), ("inward", 1.0), ("across", 0.5)])
def test_plain_look_draws_one_line_for_each_mark(marks, share, line, ends):
    """In the plain look each mark is one line that starts, ends or is centred on its point."""
    found = laid(dial_text(f'marks = "{marks}"', line=line, ends=ends))
    items = found.items("marks")
    assert all(isinstance(item, Line) for item in items)
    for mark, item in zip(ranked(found), items, strict=True):
        at = [a + share * (b - a) for a, b in zip(item.start, item.end, strict=True)]
        assert at == pytest.approx((mark.x, mark.y), abs=1e-9)


@pytest.mark.parametrize("look", ["", 'mark_shape = "taper"', 'mark_ends = "round"'])
def test_marks_of_a_rank_stand_together_in_one_style(look):
    """Lines of one style are neighbours, so that a renderer can join them to one path."""
    styles = [item.style for item in laid(dial_text(look=look)).items("marks") if isinstance(item, Line)]
    assert len(list(itertools.groupby(styles))) == len(set(styles))


@pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
@pytest.mark.parametrize("line", LINES.values(), ids=LINES)
def test_wedge_narrows_towards_the_scale_line_to_the_width_of_fine_marks_at_least(line, marks, ends):
    """A numbered wedge is a trapezium (a + b)/2·L as long as the bar, broad where numerals stand."""
    found = laid(dial_text(f'marks = "{marks}"', line=line, ends=ends, look='mark_shape = "taper"'))
    sizes = found.scale.sizes
    lines = {mark: (inner, outer) for mark, inner, outer in mark_lines(found.scale)}
    narrow = max(0.45 * sizes.numbered_width_mm, sizes.fine_width_mm)
    wedges = [pair for pair in zip(ranked(found), found.items("marks"), strict=True) if pair[0].label]
    assert wedges
    for mark, item in wedges:
        assert isinstance(item, Outline)
        (a, b, c, d), (inner, outer) = [(v.x, v.y) for v in item.vertices], lines[mark]
        free, foot = sizes.numbered_width_mm, narrow
        widths = (free, foot) if marks == "inward" else (foot, free)
        assert (math.dist(a, d), math.dist(b, c)) == pytest.approx(widths, abs=1e-9)
        assert np.add(a, d) / 2 == pytest.approx(inner, abs=1e-9)
        assert np.add(b, c) / 2 == pytest.approx(outer, abs=1e-9)
        area = (narrow + sizes.numbered_width_mm) / 2 * math.dist(inner, outer)
        assert polygon(item).area == pytest.approx(area, rel=1e-9)


def test_fine_marks_of_a_tapering_look_stay_lines():
    """A fine mark that tapered would break up in print, so it stays a line."""
    items = laid(dial_text(look='mark_shape = "taper"')).items("marks")
    lines = [item for item in items if isinstance(item, Line)]
    assert len(lines) == sum(mark.rank is Rank.FINE for mark in laid(dial_text()).scale.marks)


@pytest.mark.parametrize("shape", ["bar", "taper"])
def test_rounded_marks_reach_as_far_as_square_ones(shape):
    """The ink of a rounded mark ends where that of a square one does, at its free end."""
    square, rounded = (
        laid(dial_text(look=f'mark_shape = "{shape}"\nmark_ends = "{ends}"')) for ends in ("square", "round")
    )
    for (mark, one), other in zip(
        zip(ranked(square), square.items("marks"), strict=True), rounded.items("marks"), strict=True
    ):
        u = np.array(mark.direction)
        reach = [max(np.array(ink(item).exterior.coords) @ u) for item in (one, other)]
        assert reach[0] == pytest.approx(reach[1], abs=2e-3)


def test_rounded_bars_have_round_caps():
    """A rounded bar is a line with round caps, which an engraver follows in one stroke."""
    items = laid(dial_text(look='mark_ends = "round"')).items("marks")
    assert {(type(item), item.style.cap) for item in items} == {(Line, Cap.ROUND)}


@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
def test_rounded_wedge_is_the_hull_of_two_discs(marks):
    """A rounded wedge is what its two end discs and their common tangents enclose."""
    found = laid(dial_text(f'marks = "{marks}"', look='mark_shape = "taper"\nmark_ends = "round"'))
    sizes = found.scale.sizes
    near = max(0.45 * sizes.numbered_width_mm, sizes.fine_width_mm) / 2
    far = sizes.numbered_width_mm / 2
    narrow, wide = (far, near) if marks == "inward" else (near, far)
    lines = {mark: (inner, outer) for mark, inner, outer in mark_lines(found.scale)}
    free = {"outward": (False, True), "inward": (True, False), "across": (True, True)}[marks]
    for mark, item in zip(ranked(found), found.items("marks"), strict=True):
        if mark.rank is not Rank.NUMBERED:
            continue
        inner, outer = (np.array(end) for end in lines[mark])
        u = (outer - inner) / math.dist(inner, outer)
        discs = [
            Point(inner + (narrow * u if free[0] else 0)).buffer(narrow, quad_segs=128),
            Point(outer - (wide * u if free[1] else 0)).buffer(wide, quad_segs=128),
        ]
        hull = discs[0].union(discs[1]).convex_hull
        assert polygon(item).symmetric_difference(hull).area < 1e-3 * hull.area


def test_marks_too_short_for_round_ends_are_still_drawn():
    """Marks shorter than they are wide keep their ends apart, however odd they look."""
    look = 'mark_shape = "taper"\nmark_ends = "round"\nnumbered = 0.3\nnumbered_width = 1.2\nmiddle = 0.2'
    figures = [ink(item) for item in laid(dial_text(look=look)).items("marks")]
    assert all(figure.is_valid and figure.area > 0 for figure in figures)


@pytest.mark.parametrize("line", LINES.values(), ids=LINES)
def test_marks_of_a_rank_end_on_one_line_beside_the_scale_line(line):
    """All numbered marks end equally far from the scale line, however they lean, to 0.02 mm."""
    found = laid(dial_text(line=line))
    long = found.scale.sizes.numbered_mm
    ends = np.array([outer for mark, _, outer in mark_lines(found.scale) if mark.rank is Rank.NUMBERED])
    scale_line = found.scale.line
    if hasattr(scale_line, "centre"):
        away = np.hypot(*(ends - scale_line.centre).T) - scale_line.radius_mm
    else:
        away = ends[:, 1] - 44.0
    assert away == pytest.approx([long] * len(ends), abs=0.02)
