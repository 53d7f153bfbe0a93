"""Zones as ink: their ends on the chain's angles, their places, and their hatching."""

import itertools
import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from laid_scales import ENDS, LINES, any_line, corners, course_of, dial_text, ink, inks, laid, polygon
from lxml import etree
from shapely import LineString, Point

import dialgen
from dialgen.drawing import Arc, Line, Style
from dialgen.face.inked.bands import between
from dialgen.face.inked.courses import course
from dialgen.face.inked.hatch import hatch, slants
from dialgen.face.ruled.divisions import Rank

every_line = pytest.mark.parametrize("line", LINES.values(), ids=LINES)
both_ways = pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)
THIN = Style(stroke="#c8201e", width_mm=0.2)


def zone(start, end, more="", colour="red"):
    """A zone's table."""
    return f'[[zone]]\nfrom = {start}\nto = {end}\ncolour = "{colour}"\n{more}\n'


@both_ways
@pytest.mark.parametrize(
    ("response", "angle"),
    [
        pytest.param('"linear"', lambda share: share, id="even"),
        pytest.param("{ power = 1.8 }", lambda share: share**1.8, id="power"),
    ],
)
def test_ends_lie_where_the_chain_says(ends, response, angle):
    """A zone ends at the angles of its two values, worked out here from the movement's response."""
    found = laid(dial_text("", zone(12, 33.5), ends=ends, response=response))
    (band,) = found.items("zones")
    seen = sorted({round(math.degrees(math.atan2(v.x, v.y)), 9) for v in band.vertices})
    due = sorted(ends[0] + (ends[1] - ends[0]) * angle(value / 40) for value in (12, 33.5))
    assert seen == pytest.approx(due, abs=1e-8)


def test_ends_follow_a_corrected_movement():
    """On a movement with readings the zone ends on the marks that the readings moved."""
    reading = "".join(
        f"[[movement.reading]]\nvalue = {v}\nangle = {a}\n" for v, a in ((0, -45), (20, 3.0), (40, 45))
    )
    keys = "numbered = [0, 20, 40]"
    text = dial_text(keys, zone(20, 40)).replace("[plate]", reading + "[plate]", 1)
    found = laid(text)
    (band,) = found.items("zones")
    first = min(math.degrees(math.atan2(v.x, v.y)) for v in band.vertices)
    assert first == pytest.approx(3.0, abs=1e-9)


@every_line
@both_ways
def test_a_zone_ends_on_the_marks_there(line, ends):
    """Both ends of a zone lie on the lines along the marks of its values, on every line."""
    found = laid(dial_text("", zone(10, 30), line=line, ends=ends))
    (band,) = found.items("zones")
    marks = [m for m in found.scale.marks if m.value in (10, 30)]
    for vertex in band.vertices:
        offs = [abs((vertex.x - m.x) * m.direction[1] - (vertex.y - m.y) * m.direction[0]) for m in marks]
        assert min(offs) < 1e-9


def test_area_of_a_zone_in_the_file(tmp_path):
    """Read back by lxml, a zone of the SVG encloses the annular sector (R² - r²)·θ/2."""
    path = tmp_path / "zone.toml"
    path.write_text(dial_text("", zone(10, 30, 'place = "inside"\nwidth = 3')))
    root = etree.fromstring(dialgen.load(path).render(".svg"))
    (group,) = [g for g in root.iter("{*}g") if g.get("id") == "print-scale_1_zones"]
    (figure,) = group.iter("{*}path")
    assert figure.get("fill") == "#c8201e"
    radii = sorted(
        {float(word) for word in figure.get("d").split() if word.count(".") == 1 and "," not in word}
    )
    inner, outer = radii
    assert outer - inner == pytest.approx(3.0, abs=1e-5)
    band = polygon(laid(path.read_text()).items("zones")[0])
    assert band.area == pytest.approx((outer**2 - inner**2) * math.radians(45) / 2, rel=1e-5)


@every_line
@both_ways
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
@pytest.mark.parametrize("numerals", ["outside", "inside"])
def test_default_place_is_free_of_marks_and_numerals(line, ends, marks, numerals):
    """Left to itself a zone covers no mark or numeral, but for the feet of leaning marks under the line."""
    keys = f'marks = "{marks}"\nnumerals = "{numerals}"'
    found = laid(dial_text(keys, zone(5, 35), line=line, ends=ends))
    (band,) = found.items("zones")
    others = inks([*found.items("marks"), *found.items("numerals")])
    covered = polygon(band).intersection(others.difference(inks(found.items("line"))))
    assert covered.area < 0.02


@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
def test_on_the_line_a_zone_is_as_high_as_the_fine_marks(marks):
    """A zone on the line covers the fine marks of its values, and is no higher than they are."""
    found = laid(dial_text(f'marks = "{marks}"', zone(0, 40, 'place = "line"')))
    (band,) = found.items("zones")
    area = polygon(band)
    fine = [m for m in found.items("marks") if m.style.width_mm == found.scale.sizes.fine_width_mm]
    assert all(area.buffer(1e-3).contains(course_of(mark)) for mark in fine)
    radii = np.hypot(*corners(band).T)
    assert radii.max() - radii.min() == pytest.approx(found.scale.sizes.fine_mm, abs=1e-6)


@pytest.mark.parametrize("place", ["inside", "outside", "line"])
@pytest.mark.parametrize("marks", ["outward", "inward", "across"])
def test_width_is_as_given(place, marks):
    """A zone is as wide as the file says, wherever it lies."""
    found = laid(dial_text(f'marks = "{marks}"', zone(0, 40, f'place = "{place}"\nwidth = 2.5')))
    radii = np.hypot(*corners(found.items("zones")[0]).T)
    assert radii.max() - radii.min() == pytest.approx(2.5, abs=1e-6)


@pytest.mark.parametrize(("place", "side"), [("inside", -1), ("outside", 1)])
def test_zone_lies_on_the_side_that_it_names(place, side):
    """A zone said to be inside lies nearer the pivot than the line, one outside farther away."""
    found = laid(dial_text("", zone(0, 40, f'place = "{place}"')))
    radii = np.hypot(*corners(found.items("zones")[0]).T)
    assert (side * (radii - 44.0)).min() > 0


def test_between_two_rows_of_numerals_a_zone_lies_on_the_line():
    """With numerals on both sides there is no free side, and the zone lies under the marks."""
    keys = 'also = [{ times = 5, numerals = "inside" }]'
    own, on_line = (laid(dial_text(keys, zone(0, 40, more))) for more in ("", 'place = "line"'))
    assert own.items("zones") == on_line.items("zones")


def test_zone_may_run_to_infinity():
    """A zone up to inf ends where the scale does."""
    text = dial_text("", zone(100, "inf")).replace("to = 40\n", "to = inf\n", 1)
    found = laid(
        text.replace('unit = ""', 'unit = "ohm"\ncircuit = { kind = "series ohmmeter", half = "50 ohm" }')
    )
    (band,) = found.items("zones")
    angles = sorted(math.degrees(math.atan2(v.x, v.y)) for v in band.vertices)
    assert angles[0] == pytest.approx(min(found.scale.ends_deg), abs=1e-9)
    # 100 Ω on a series ohmmeter of 50 Ω: a third of the way from rest.
    assert angles[-1] == pytest.approx(-45 + 90 * 50 / 150, abs=1e-9)


def test_zones_are_drawn_under_the_rest_of_the_scale(tmp_path):
    """The layer of the zones comes before the line, the marks and the numerals, that of the limits after."""
    path = tmp_path / "order.toml"
    path.write_text(dial_text("", zone(10, 30) + "[[limit]]\nat = 20"))
    names = [layer.name for layer in dialgen.load(path).drawing.layers if layer.name.startswith("scale")]
    assert names[:5] == [f"scale 1 {part}" for part in ("zones", "line", "marks", "numerals", "limits")]


def test_zone_without_room_is_refused_at_its_width():
    """A zone wider than the circle that it lies in is an error that names its width."""
    (error,) = laid(dial_text("", zone(10, 30) + zone(10, 30, "width = 50"))).errors
    assert error.keys == (("zone", 1, "width"),)


# ---------------------------------------------------------------- hatching

wide = st.tuples(st.floats(-4, 4), st.floats(1, 5)).map(lambda s: (s[0], s[0] + s[1]))
swings = st.tuples(st.floats(-50, 50), st.floats(-50, 50)).filter(lambda e: abs(e[0] - e[1]) > 2)
some = settings(max_examples=50, deadline=None)


@some
@given(any_line, swings, wide, st.sampled_from([1.0, -1.0]))
def test_strokes_stay_within_the_band(line, ends, pair, slant):
    """No stroke leaves the band, and each has both its ends on the rim."""
    inner, outer = (course(line, *ends, side) for side in pair)
    area = polygon(between(outer, inner, THIN))
    for stroke in hatch(outer, inner, 0.9, slant, THIN):
        way = LineString([stroke.start, stroke.end])
        assert area.buffer(2e-3).contains(way)
        assert max(area.exterior.distance(Point(end)) for end in way.coords) < 2e-3


@some
@given(any_line, swings, wide, st.sampled_from([1.0, -1.0]))
def test_outline_covers_the_ends_of_the_strokes(line, ends, pair, slant):
    """The square end of every stroke lies under the outline: nothing sticks out, so the cut is clean."""
    inner, outer = (course(line, *ends, side) for side in pair)
    outline = between(outer, inner, THIN)
    covered = polygon(outline).buffer(THIN.width_mm / 2 + 2e-3, join_style="mitre")
    assert all(covered.contains(ink(stroke)) for stroke in hatch(outer, inner, 0.9, slant, THIN))


@pytest.mark.parametrize("slant", [1.0, -1.0])
def test_strokes_on_a_straight_band_are_parallel_and_even(slant):
    """On a straight band strokes lie at 45 degrees, as far from each other as they are to be."""
    line = any_straight()
    inner, outer = (course(line, -40.0, 40.0, side) for side in (-3.0, 0.0))
    strokes = [s for s in hatch(outer, inner, 0.9, slant, THIN) if abs(s.end[1] - s.start[1]) > 2.999]
    turns = [math.degrees(math.atan2(s.end[0] - s.start[0], s.end[1] - s.start[1])) for s in strokes]
    assert turns == pytest.approx([45.0 * slant] * len(turns), abs=1e-6)
    lines = [LineString([s.start, s.end]) for s in strokes]
    apart = [a.distance(b) for a, b in itertools.pairwise(lines)]
    assert len(apart) > 20
    assert apart == pytest.approx([0.9] * len(apart), abs=1e-6)


def any_straight():
    """A straight scale line 40 mm above the pivot."""
    return laid(dial_text(line=LINES["straight"])).scale.line


@pytest.mark.parametrize("slant", [1.0, -1.0])
def test_strokes_on_a_bent_band_follow_it(slant):
    """About the pivot every whole stroke is the next one turned, and leans by 45 degrees to within a few."""
    found = laid(dial_text())
    inner, outer = (course(found.scale.line, -40.0, 40.0, side) for side in (-3.0, 0.0))
    strokes = [s for s in hatch(outer, inner, 0.9, slant, THIN) if abs(math.hypot(*s.start) - 41) < 1e-6]
    whole = [s for s in strokes if abs(math.hypot(*s.end) - 44) < 1e-6]
    at = [math.degrees(math.atan2(*s.start)) for s in whole]
    steps = np.diff(at)
    assert steps == pytest.approx([steps[0]] * len(steps), rel=1e-6)
    for stroke in whole:
        along = math.degrees(math.atan2(stroke.end[0] - stroke.start[0], stroke.end[1] - stroke.start[1]))
        middle = math.degrees(math.atan2(*np.add(stroke.start, stroke.end)))
        assert (along - middle) * slant == pytest.approx(45.0, abs=3.0)


@every_line
@both_ways
def test_hatched_zone_is_an_outline_and_strokes_in_its_colour(line, ends):
    """A hatched zone is strokes of its colour within three sides; the scale line is the fourth."""
    found = laid(dial_text("", zone(10, 30, "hatch = true"), line=line, ends=ends))
    *strokes, far, near_end, far_end = found.items("zones")
    assert isinstance(far, Line if found.scale.spec.line else Arc)
    assert all(isinstance(stroke, Line) for stroke in (*strokes, near_end, far_end))
    assert {(item.style.stroke, item.style.fill) for item in found.items("zones")} == {("#c8201e", None)}
    (plain,) = laid(dial_text("", zone(10, 30), line=line, ends=ends)).items("zones")
    area = polygon(plain)
    assert len(strokes) > 5
    # The scale line is the fourth side: the three strokes lie on the band's edge, all but what is along it.
    edge = area.exterior
    assert all(edge.buffer(2e-3).contains(course_of(side)) for side in (far, near_end, far_end))
    assert all(area.buffer(2e-3).contains(course_of(stroke)) for stroke in strokes)


def leans(found, low, high):
    """The signs by which strokes between two angles lean."""
    signs = set()
    for item in found.items("zones"):
        if not isinstance(item, Line):
            continue
        middle = math.degrees(math.atan2(*np.add(item.start, item.end)))
        if low + 2 < middle < high - 2:
            outer, inner = sorted((item.start, item.end), key=lambda p: -math.hypot(*p))
            signs.add(math.copysign(1, math.atan2(*outer) - math.atan2(*inner)))
    return signs


def test_neighbours_of_different_colours_are_hatched_differently():
    """Two hatched zones side by side differ in direction exactly where they differ in colour."""
    hatched = "hatch = true"
    tables = [zone(30, 40, hatched), zone(0, 10, hatched, "green"), zone(10, 20, hatched, "amber")]
    tables.append(zone(20, 30, hatched, "amber"))
    found = laid(dial_text("", "".join(tables)))
    signs = [leans(found, a, a + 22.5) for a in (-45, -22.5, 0, 22.5)]
    assert all(len(sign) == 1 for sign in signs)
    green, amber, same, red = (sign.pop() for sign in signs)
    assert green == -amber
    assert amber == same
    assert same == -red


@given(st.lists(st.sampled_from(["a", "b", "c"]), max_size=8))
def test_slants_change_with_the_colour(colours):
    """In any row of bands the slant turns where the colour does, and nowhere else."""
    found = slants(colours)
    assert len(found) == len(colours)
    for (a, b), (s, t) in zip(itertools.pairwise(colours), itertools.pairwise(found), strict=True):
        assert (s == t) is (a == b)


def test_zone_arcs_are_arcs():
    """The long sides of a zone reach the renderers as arcs, not as many short edges."""
    (band,) = laid(dial_text("", zone(10, 30))).items("zones")
    arcs = [arc for _, _, arc in band.edges() if isinstance(arc, Arc)]
    assert len(band.vertices) == 4
    assert [round(arc.end_deg - arc.start_deg, 6) for arc in arcs] == [45.0, 45.0]


def test_rank_of_the_fine_marks_is_there():
    """The tests above look at fine marks; the scale they use has some."""
    assert any(mark.rank is Rank.FINE for mark in laid(dial_text()).scale.marks)
