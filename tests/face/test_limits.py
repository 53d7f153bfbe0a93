"""Limits as ink: a line across the scale, and a triangle that points at it."""

import math

import pytest
from laid_scales import ENDS, LINES, course_of, dial_text, ink, inks, laid, polygon
from shapely import Point

from dialgen.drawing import Circle
from dialgen.looks import LOOKS

every_line = pytest.mark.parametrize("line", LINES.values(), ids=LINES)
both_ways = pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)
LINE, TRIANGLE = "[[limit]]\nat = 20\n", '[[limit]]\nat = 20\nshape = "triangle"\n'


def mark_at(found, value):
    """The mark of a value."""
    (mark,) = [m for m in found.scale.marks if abs(m.value - value) < 1e-9]
    return mark


@every_line
@both_ways
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
@pytest.mark.parametrize("numerals", ["outside", "inside"])
def test_line_covers_its_mark_and_reaches_past_it_but_not_to_the_numeral(line, ends, marks, numerals):
    """A limit's line crosses the scale line, covers the mark there and stops short of the numeral."""
    keys = f'marks = "{marks}"\nnumerals = "{numerals}"'
    found = laid(dial_text(keys, LINE, line=line, ends=ends))
    (limit,) = found.items("limits")
    mark, (numeral,) = mark_at(found, 20), [n for n in found.items("numerals") if n.text == "20"]
    drawn = [m for m in found.items("marks") if course_of(m).distance(Point(mark.x, mark.y)) < 1e-6]
    assert all(ink(limit).buffer(1e-6).contains(ink(m)) for m in drawn)
    assert ink(limit).area > sum(ink(m).area for m in drawn)
    assert ink(limit).distance(ink(numeral)) > 0.1
    assert course_of(limit).distance(Point(mark.x, mark.y)) < 1e-9


@every_line
@both_ways
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
@pytest.mark.parametrize("numerals", ["outside", "inside"])
def test_triangle_points_at_its_value_on_the_free_side(line, ends, marks, numerals):
    """A triangle's tip lies on the way of the mark there, and it is half a millimetre clear of all else."""
    keys = f'marks = "{marks}"\nnumerals = "{numerals}"'
    found = laid(dial_text(keys, TRIANGLE, line=line, ends=ends))
    (limit,) = found.items("limits")
    mark, area = mark_at(found, 20), polygon(limit)
    tip, left, right = (Point(v.x, v.y) for v in limit.vertices)
    assert math.hypot(tip.x - left.x, tip.y - left.y) == pytest.approx(
        math.hypot(tip.x - right.x, tip.y - right.y)
    )
    assert (tip.x - mark.x) * mark.direction[1] - (tip.y - mark.y) * mark.direction[0] == pytest.approx(
        0, abs=1e-9
    )
    here = Point(mark.x, mark.y)
    assert tip.distance(here) < min(left.distance(here), right.distance(here))
    rest = inks([*found.items("line"), *found.items("marks"), *found.items("numerals")])
    assert 0.4 < area.distance(rest) < 0.6


def test_triangle_stands_clear_of_a_zone():
    """Where a zone lies on the free side the triangle points at its edge."""
    zone = '[[zone]]\nfrom = 18\nto = 25\ncolour = "red"\n'
    found = laid(dial_text("", zone + TRIANGLE))
    (limit,), (band,) = found.items("limits"), found.items("zones")
    assert 0.4 < polygon(limit).distance(polygon(band)) < 0.6


def test_triangle_takes_no_notice_of_a_zone_elsewhere():
    """A zone at other values leaves the triangle at the line."""
    zone = '[[zone]]\nfrom = 30\nto = 40\ncolour = "red"\n'
    assert laid(dial_text("", zone + TRIANGLE)).items("limits") == laid(dial_text("", TRIANGLE)).items(
        "limits"
    )


def test_line_does_not_run_into_a_zone():
    """A limit's line ends at the scale line where a zone lies on its other side."""
    zone = '[[zone]]\nfrom = 18\nto = 25\ncolour = "red"\n'
    found = laid(dial_text("", zone + LINE))
    assert ink(found.items("limits")[0]).distance(polygon(found.items("zones")[0])) > 0.01


@pytest.mark.parametrize("style", sorted(LOOKS))
@pytest.mark.parametrize("shape", ["line", "triangle"])
def test_colour_is_the_looks_accent_unless_given(style, shape):
    """A limit is in the look's accent, or in the colour that it names."""
    table = f'[[limit]]\nat = 20\nshape = "{shape}"\n'
    for more, colour in (("", LOOKS[style].accent), ('colour = "blue"\n', "#1f5fae")):
        (item,) = laid(dial_text("", table + more, look=f'style = "{style}"')).items("limits")
        assert (item.style.stroke or item.style.fill) == colour


def test_triangle_and_dot_do_not_share_a_place():
    """A triangle and a dot at different values are clear of each other."""
    found = laid(dial_text("effective = [10, 40]", '[[limit]]\nat = 12\nshape = "triangle"\n'))
    (dot,) = [item for item in found.items("line") if isinstance(item, Circle)]
    assert ink(dot).distance(polygon(found.items("limits")[0])) > 0.1
