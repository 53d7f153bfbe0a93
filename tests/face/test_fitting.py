"""The guide layer: what helps to fit a plate."""

import math

import pytest
from laid_scales import ENDS, LINES, course_of, dial_text, inks, laid
from shapely import Point

from dialgen.drawing import Arc, Circle, Line, Outline, Purpose
from dialgen.face.fitted.fitting import guide_layer


def guides(**keys):
    """The items of the guide layer."""
    found = laid(dial_text(**keys))
    layer = guide_layer(found.dial, found.scales)
    assert layer.purpose is Purpose.GUIDE
    return layer.items


def test_cross_at_the_pivot():
    """Without a pointer's length the guide layer is a cross about the pivot."""
    assert [(item.start, item.end) for item in guides()] == [
        ((-2.0, 0.0), (2.0, 0.0)),
        ((0.0, -2.0), (0.0, 2.0)),
    ]


def test_no_cross_beside_the_plate():
    """A pivot off the plate has no cross."""
    assert guides(plate="size = [120, 60]\npivot = [60, -20]") == ()


def test_window_of_the_case():
    """The window of the case is an outline of its own size."""
    plate = "size = [200, 200]\npivot = [100, 100]\nwindow = { at = [0, 20], size = [70, 40], corner = 2 }"
    (outline,) = [item for item in guides(plate=plate) if isinstance(item, Outline)]
    xs, ys = [v.x for v in outline.vertices], [v.y for v in outline.vertices]
    assert (max(xs) - min(xs), max(ys) - min(ys)) == pytest.approx((70, 40))


@pytest.mark.parametrize("ends", [(-45.0, 45.0), (45.0, -45.0)])
def test_path_of_the_tip_runs_from_stop_to_stop(ends):
    """The tip's path is an arc of the pointer's length about the pivot, from one stop to the other."""
    (arc,) = [i for i in guides(ends=ends, pointer=38.0, stops="[-50, 52]") if isinstance(i, Arc)]
    assert (arc.centre, arc.radius_mm, arc.start_deg, arc.end_deg) == ((0.0, 0.0), 38.0, -50.0, 52.0)


@pytest.mark.parametrize("pointer", [10.0, 40.0, 90.0])
def test_posts_touch_the_pointer_from_beyond_its_swing(pointer):
    """Each post touches the stopped pointer's middle line near its tip, and lies outside the swing."""
    items = guides(pointer=pointer, stops="[-50, 52]")
    posts = [item for item in items if isinstance(item, Circle)]
    lines = [item for item in items if isinstance(item, Line)][2:]
    assert len(posts) == len(lines) == 2
    for post, line, stop, side in zip(posts, lines, (-50, 52), (-1, 1), strict=True):
        assert course_of(line).distance(Point(post.centre)) == pytest.approx(post.radius_mm, abs=1e-9)
        assert math.degrees(math.atan2(*line.end)) == pytest.approx(stop)
        assert math.hypot(*line.end) == pytest.approx(pointer)
        assert (math.degrees(math.atan2(*post.centre)) - stop) * side > 0


def test_full_turn_closes():
    """A pointer free to turn all the way round describes a whole circle, once."""
    items = guides(ends=(-170.0, 170.0), pointer=40.0, stops="[-200, 200]")
    (arc,) = [item for item in items if isinstance(item, Arc)]
    assert arc.end_deg - arc.start_deg == pytest.approx(360.0)


@pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)
@pytest.mark.parametrize("line", [v for k, v in LINES.items() if "flat" not in k])
@pytest.mark.parametrize("pointer", [40.0, 43.0, 45.5, 47.0, 60.0])
@pytest.mark.parametrize("numerals", ["outside", "inside"])
@pytest.mark.parametrize("stops", ["[-50, 50]", "[-45, 45]"])
def test_guides_keep_off_the_scale(ends, line, pointer, numerals, stops):
    """Whatever the pointer's length, no help for fitting crosses what is printed of the scale."""
    over = '[[zone]]\nfrom = 10\nto = 30\ncolour = "red"\n'
    text = dial_text(f'numerals = "{numerals}"', over, line=line, ends=ends, pointer=pointer, stops=stops)
    found = laid(text)
    printed = inks([item for part in ("zones", "line", "marks", "numerals") for item in found.items(part)])
    for item in guide_layer(found.dial, found.scales).items:
        course = Point(item.centre).buffer(item.radius_mm) if isinstance(item, Circle) else course_of(item)
        assert course.distance(printed) > 0.1


def test_the_path_is_drawn_beside_the_scale():
    """A tip that runs over the marks leaves its path drawn outside the scale, at both ends."""
    arcs = [i for i in guides(pointer=45.0, stops="[-60, 60]") if isinstance(i, Arc)]
    assert len(arcs) == 2
    assert (arcs[0].start_deg, arcs[1].end_deg) == (-60.0, 60.0)
    assert arcs[0].end_deg < -45 < 45 < arcs[1].start_deg


def test_nothing_is_said_of_the_tip_on_a_curved_plate_laid_flat():
    """Laid flat, a curved plate has no place for the arc of the tip."""
    assert len(guides(line=LINES["curved, laid flat"], pointer=40.0)) == 2
