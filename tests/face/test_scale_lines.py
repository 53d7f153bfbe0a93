"""Scale lines as ink: single, double, filled, heavy and broken, and the dots of the effective range."""

import itertools
import math
import re

import numpy as np
import pytest
from laid_scales import ENDS, LINES, course_of, dial_text, ink, inks, laid, polygon, ray
from lxml import etree
from shapely import LineString, Point

import dialgen
from dialgen.drawing import Arc, Cap, Circle, Line, Outline
from dialgen.face.inked.dashes import even_dashes, mark_dashes

every_line = pytest.mark.parametrize("line", LINES.values(), ids=LINES)
both_ways = pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)


def strokes(found):
    """The arcs and straight strokes of the line, without blocks and dots."""
    return [item for item in found.items("line") if isinstance(item, Arc | Line)]


def spans(items):
    """From where to where each arc about the pivot runs, by rising angle."""
    return sorted((item.start_deg, item.end_deg) for item in items)


def half_deg(width_mm, radius_mm=44.0):
    """The angle that half a width takes on a circle."""
    return math.degrees(width_mm / 2 / radius_mm)


@every_line
@both_ways
def test_single_line_is_one_stroke_from_the_first_mark_to_the_last(line, ends):
    """The single line runs through every mark's point and ends at the sides of the outermost marks."""
    found = laid(dial_text(line=line, ends=ends))
    (stroke,) = strokes(found)
    way = course_of(stroke)
    assert max(way.distance(Point(mark.x, mark.y)) for mark in found.scale.marks) < 1e-4
    marks = inks([item for item in found.items("marks") if item.style.width_mm > 0.3])
    for end in (way.coords[0], way.coords[-1]):
        assert (
            marks.exterior.distance(Point(end)) < 5e-3
            if marks.geom_type == "Polygon"
            else (marks.boundary.distance(Point(end)) < 5e-3)
        )


@every_line
@both_ways
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
def test_double_line_encloses_the_fine_marks(line, ends, marks):
    """Both ends of every fine mark lie on one of the two lines, to a hundredth of a millimetre or two."""
    found = laid(dial_text(f'marks = "{marks}"', line=line, ends=ends, look='line = "double"'))
    tracks = [course_of(stroke) for stroke in strokes(found)]
    assert len(tracks) == 2
    fine = [m for m in found.items("marks") if m.style.width_mm == found.scale.sizes.fine_width_mm]
    assert fine
    for mark in fine:
        near = [min(track.distance(Point(end)) for track in tracks) for end in (mark.start, mark.end)]
        assert max(near) < 0.02
        assert tracks[0].distance(Point(mark.start)) > 1 or tracks[1].distance(Point(mark.start)) > 1


@every_line
def test_numbered_marks_stand_beyond_a_double_line(line):
    """Numbered marks reach past the second line."""
    found = laid(dial_text(line=line, look='line = "double"'))
    outer = strokes(found)[1]
    for mark in found.items("marks"):
        if mark.style.width_mm == found.scale.sizes.numbered_width_mm:
            assert course_of(mark).crosses(course_of(outer))


def test_no_line():
    """A look without a line draws none."""
    assert laid(dial_text(look='line = "none"')).items("line") == []


def test_double_line_without_room_is_refused():
    """A second line that the pointer does not meet is an error at the scale's look."""
    text = dial_text(
        'marks = "inward"',
        line="radius = 20.0\ncentre = [0, 19.6]",
        ends=(-80.0, 80.0),
        look='line = "double"\nfine = 3',
    )
    (error,) = laid(text).errors
    assert error.keys[0] == ("scale", 0, "look")


# ---------------------------------------------------------------- filled blocks


@every_line
@both_ways
@pytest.mark.parametrize("response", ["linear", "{ power = 1.6 }"])
def test_blocks_fill_each_second_gap_between_marks(line, ends, response):
    """Blocks fill each second gap exactly from mark to mark, and the gaps between are left open."""
    response = response if "{" in response else f'"{response}"'
    found = laid(dial_text(line=line, ends=ends, look='line = "double"\nblocks = true', response=response))
    blocks = [polygon(item) for item in found.items("line") if isinstance(item, Outline)]
    marks = found.scale.marks
    gaps = [
        LineString([(a.x, a.y), (b.x, b.y)]).interpolate(0.5, normalized=True)
        for a, b in itertools.pairwise(marks)
    ]
    filled = [any(block.buffer(0.1).contains(gap) for block in blocks) for gap in gaps]
    assert all(one is not other for one, other in itertools.pairwise(filled))
    assert abs(2 * len(blocks) - len(gaps)) <= 1
    points = [Point(mark.x, mark.y) for mark in marks]
    for block in blocks:
        assert sum(block.exterior.distance(point) < 1e-4 for point in points) == 2


def test_blocks_have_the_area_of_their_sectors():
    """The blocks of an arc about the pivot have the area (R² - r²)·θ/2 of the gaps that they fill."""
    found = laid(dial_text(look='line = "double"\nblocks = true'))
    angles = np.array([mark.angle_deg for mark in found.scale.marks])
    steps = np.radians(np.diff(angles))[1::2]
    outer = 44.0 + found.scale.sizes.fine_mm
    areas = [polygon(item).area for item in found.items("line") if isinstance(item, Outline)]
    assert areas == pytest.approx((outer**2 - 44.0**2) * steps / 2, rel=1e-6)


def test_blocks_need_a_double_line():
    """Along a single line nothing is filled."""
    assert not [i for i in laid(dial_text(look="blocks = true")).items("line") if isinstance(i, Outline)]


# ---------------------------------------------------------------- heavy


@both_ways
@pytest.mark.parametrize("line", ["single", "double"])
def test_heavy_part_runs_from_mark_to_mark(ends, line):
    """The heavy part reaches from side to side of the marks at its ends, which are where the chain says."""
    found = laid(dial_text("heavy = [10, 30]", ends=ends, look=f'line = "{line}"'))
    width = found.scale.sizes.line_width_mm
    (heavy,) = [stroke for stroke in strokes(found) if stroke.style.width_mm > 1.5 * width]
    flush = half_deg(found.scale.sizes.numbered_width_mm)
    first, last = sorted((found.angle(10), found.angle(30)))
    assert (heavy.start_deg, heavy.end_deg) == pytest.approx((first - flush, last + flush), abs=1e-9)
    assert heavy.radius_mm == 44.0


def test_line_goes_on_beside_its_heavy_part():
    """The thinner line takes up the heavy one at both ends, and nothing of the scale is left out."""
    found = laid(dial_text("heavy = [12.5, 30]"))
    whole = laid(dial_text())
    assert inks(strokes(found)).buffer(1e-3).contains(inks(strokes(whole)))


def test_heavy_part_without_a_mark_ends_on_its_value():
    """Where no mark stands the heavy part ends at the very angle of its value."""
    found = laid(dial_text("heavy = [12.3, 30]"))
    heavy = max(strokes(found), key=lambda stroke: stroke.style.width_mm)
    assert heavy.start_deg == pytest.approx(found.angle(12.3), abs=1e-9)


# ---------------------------------------------------------------- outside the effective range

BARE = "numbered = [0, 10, 20, 30, 40]\ndivisions = { every = 10 }"


@pytest.mark.parametrize("radius", [30.0, 44.0, 70.0])
@both_ways
def test_dashes_are_even_and_add_up(radius, ends):
    """Without marks among them dashes are equal, gaps are equal, and together they fill the stretch."""
    found = laid(dial_text(f"effective = [9.5, 40]\n{BARE}", line=f"radius = {radius}", ends=ends))
    edge = found.angle(9.5)
    arcs = [a for a in spans(strokes(found)) if max(abs(a[0] - edge), abs(a[1] - edge)) < 45]
    if ends[0] > ends[1]:
        arcs, edge = sorted((-b, -a) for a, b in arcs), -edge
    dashes = [a for a in arcs if a[1] < edge - 1e-9]
    lengths = [b - a for a, b in dashes]
    gaps = [there[0] - here[1] for here, there in itertools.pairwise([*dashes, (edge, edge)])]
    assert len(dashes) > 2
    assert lengths == pytest.approx([lengths[0]] * len(lengths), rel=1e-9)
    assert gaps == pytest.approx([gaps[0]] * len(gaps), rel=1e-9)
    flush = half_deg(found.scale.sizes.numbered_width_mm, radius)
    assert sum(lengths) + sum(gaps) == pytest.approx(edge + 45 + flush, abs=1e-9)
    assert dashes[0][0] == pytest.approx(-45 - flush, abs=1e-9)


def test_the_last_gap_is_as_wide_as_the_others():
    """Before a mark where the line goes on whole the gap counts from that mark's side."""
    found = laid(dial_text(f"effective = [10, 40]\n{BARE}"))
    gaps = [there[0] - here[1] for here, there in itertools.pairwise(spans(strokes(found)))]
    assert len(gaps) > 2
    assert gaps == pytest.approx([gaps[0]] * len(gaps), rel=1e-9)


def test_dashes_of_a_straight_line_are_lines():
    """On a straight line the dashes are straight strokes of equal length."""
    found = laid(dial_text(f"effective = [9.5, 40]\n{BARE}", line=LINES["straight"]))
    lengths = sorted(course_of(stroke).length for stroke in strokes(found))[:-1]
    assert len(lengths) > 2
    assert lengths == pytest.approx([lengths[0]] * len(lengths), rel=1e-9)


def test_both_sides_of_a_double_line_have_as_many_dashes():
    """The dashes of the two lines stand above each other."""
    found = laid(dial_text("effective = [8, 36]", look='line = "double"'))
    counts = [
        len([s for s in strokes(found) if s.radius_mm == r]) for r in {s.radius_mm for s in strokes(found)}
    ]
    assert len(counts) == 2
    assert counts[0] == counts[1] > 5


@every_line
@both_ways
@pytest.mark.parametrize("ends_of_marks", ["square", "round"])
def test_every_even_mark_stands_on_a_dash(line, ends, ends_of_marks):
    """Where marks are even no mark of a broken line stands in a gap."""
    look = f'mark_ends = "{ends_of_marks}"'
    found = laid(dial_text("effective = [8, 32]\nnumbered = {every = 10}", line=line, ends=ends, look=look))
    line_ink = inks(strokes(found)).buffer(1e-3)
    assert all(line_ink.contains(Point(mark.x, mark.y)) for mark in found.scale.marks)


@every_line
@both_ways
def test_line_is_whole_within_the_effective_range(line, ends):
    """One stroke covers the effective range, and the gaps before it begin outside."""
    found = laid(dial_text("effective = [10, 30]", line=line, ends=ends))
    whole = max(strokes(found), key=lambda stroke: course_of(stroke).length)
    outline = ink(whole).buffer(1e-3)
    for mark in found.scale.marks:
        assert outline.contains(Point(mark.x, mark.y)) is (10 <= mark.value <= 30)


def test_outside_none_draws_no_line_there():
    """With nothing outside, the line is one stroke from one end of the effective range to the other."""
    found = laid(dial_text("effective = [10, 30]", look='outside = "none"'))
    (stroke,) = strokes(found)
    flush = half_deg(found.scale.sizes.numbered_width_mm)
    assert (stroke.start_deg, stroke.end_deg) == pytest.approx((-22.5 - flush, 22.5 + flush), abs=1e-9)


def test_outside_plain_draws_the_whole_line():
    """With a plain line outside, the effective range changes nothing of the line."""
    found = laid(dial_text("effective = [10, 30]", look='outside = "plain"'))
    assert strokes(found) == strokes(laid(dial_text()))


def test_rounded_dashes_are_as_long_as_square_ones():
    """A rounded dash covers the same length as a square one, caps and all."""
    text = f"effective = [9.5, 40]\n{BARE}"
    square, rounded = (strokes(laid(dial_text(text, look=f'mark_ends = "{e}"'))) for e in ("square", "round"))
    width = square[0].style.width_mm
    dash = [min(course_of(stroke).length for stroke in group) for group in (square, rounded)]
    assert rounded[0].style.cap is Cap.ROUND
    assert dash[1] == pytest.approx(dash[0] - width, abs=1e-4)


def test_dashes_reach_the_file_as_arcs(tmp_path):
    """Read back by lxml, the SVG has as many arcs about the pivot as the line has strokes."""
    path = tmp_path / "broken.toml"
    path.write_text(dial_text("effective = [10, 30]"))
    root = etree.fromstring(dialgen.load(path).render(".svg"))
    (group,) = [g for g in root.iter("{*}g") if g.get("id") == "print-scale_1_line"]
    radii = re.findall(r"A ([\d.]+) ", " ".join(path.get("d") for path in group.iter("{*}path")))
    assert len(radii) == len(strokes(laid(dial_text("effective = [10, 30]"))))
    assert {float(radius) for radius in radii} == {44.0}


def test_marks_too_near_or_too_uneven_are_not_followed():
    """Dashes that kept to such marks would run into each other or be of any length."""
    assert mark_dashes([0.0, 0.5, 1.0, 1.5], 2.0, 0.1, 0.2, 0.3) == []
    assert mark_dashes([0.0, 1.0, 5.0], 2.0, 0.1, 0.2, 0.1) == []
    assert mark_dashes([0.0, 5.0], 2.0, 0.1, 0.2, 0.1) == []


def test_dashes_between_two_whole_parts_are_centred():
    """Between two whole parts the first gap is as wide as the last."""
    found = even_dashes(10.0, 3.2, None, 0.2)
    assert found[0][0] - 0.2 == pytest.approx(10.0 - 0.2 - found[-1][1])


# ---------------------------------------------------------------- dots


@every_line
@both_ways
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
@pytest.mark.parametrize("numerals", ["outside", "inside"])
def test_dots_stand_on_the_ray_clear_of_all_else(line, ends, marks, numerals):
    """A dot stands in line with the mark of its value, clear of line, marks and numerals."""
    keys = f'marks = "{marks}"\nnumerals = "{numerals}"\neffective = [10, 30]'
    found = laid(dial_text(keys, line=line, ends=ends))
    dots = [item for item in found.items("line") if isinstance(item, Circle)]
    rest = inks([*strokes(found), *found.items("marks"), *found.items("numerals")])
    assert len(dots) == 2
    for dot, value in zip(dots, (10.0, 30.0), strict=True):
        assert ink(dot).distance(rest) > 0.15
        (mark,) = [m for m in found.scale.marks if abs(m.value - value) < 1e-9]
        (x, y), (ux, uy) = dot.centre, mark.direction
        assert (x - mark.x) * uy - (y - mark.y) * ux == pytest.approx(0.0, abs=1e-9)


@pytest.mark.parametrize(
    ("effective", "values"), [("[0, 30]", [30.0]), ("[10, 40]", [10.0]), ("[0, 40]", []), (None, [])]
)
def test_no_dot_at_the_end_of_the_scale(effective, values):
    """A dot marks where the effective range differs from the scale, and only there."""
    found = laid(dial_text(f"effective = {effective}" if effective else ""))
    dots = [item for item in found.items("line") if isinstance(item, Circle)]
    assert len(dots) == len(values)
    for dot, value in zip(dots, values, strict=True):
        assert ray(found.angle(value)).distance(Point(dot.centre)) < 1e-9


def test_dot_keeps_clear_of_a_zone():
    """A dot does not lie on a zone."""
    zone = '[[zone]]\nfrom = 5\nto = 12\ncolour = "red"'
    found = laid(dial_text("effective = [10, 40]", zone))
    (dot,) = [item for item in found.items("line") if isinstance(item, Circle)]
    assert ink(dot).distance(inks(found.items("zones"))) > 0.15
