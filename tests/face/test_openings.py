"""What is cut of a plate: slots and the window for a mirror, measured by shapely and read back."""

import math
import re

import numpy as np
import pytest
from laid_scales import ENDS, LINES, corners, dial_text, inks, laid, polygon, ray
from lxml import etree
from shapely import LineString, Point, box

import dialgen
from dialgen.drawing import Purpose
from dialgen.errors import DialFileError
from dialgen.face.fitted.openings import cut_layer
from dialgen.face.laid import mirror, scale_layers
from dialgen.face.plate import outliner

every_line = pytest.mark.parametrize("line", LINES.values(), ids=LINES)
both_ways = pytest.mark.parametrize("ends", ENDS.values(), ids=ENDS)
PLATE = "size = [200, 200]\npivot = [100, 100]\n"


def window(found):
    """The window for a mirror, and the ink of the first scale."""
    layers = scale_layers(found.dial.file, found.scale, 1, outliner(found.dial.file.plate))
    outline = mirror(found.dial.file, found.scale, layers)
    assert outline is not None
    return outline, inks([item for layer in layers for item in layer.items])


def refused(**keys):
    """What is refused of a dial: messages, and their first keys."""
    return [(str(error), error.keys[0]) for error in laid(dial_text(**keys)).errors]


@pytest.mark.parametrize("shape", ["round", "square"])
@every_line
@both_ways
@pytest.mark.parametrize(
    "keys",
    [
        "",
        'marks = "inward"',
        'numerals = "inside"',
        'marks = "across"\nnumerals = "inside"\neffective = [10, 30]',
    ],
)
def test_mirror_leaves_its_land(shape, line, ends, keys):
    """Between the window and the nearest ink of the scale there is the land, no less and hardly more."""
    plate = f'{PLATE}mirror = {{ land = 2, width = 3, ends = "{shape}" }}'
    outline, ink = window(laid(dial_text(keys, line=line, ends=ends, plate=plate)))
    # Ink as near the middle of the window's arc as at its ends is 2 mm off; leaning ends may be farther.
    assert 1.99 < polygon(outline).distance(ink) < 2.6


@pytest.mark.parametrize(
    "over",
    [
        '[[zone]]\nfrom = 10\nto = 30\ncolour = "red"\n',
        '[[zone]]\nfrom = 10\nto = 30\ncolour = "red"\nwidth = 5\nhatch = true\n',
        '[[limit]]\nat = 20\nshape = "triangle"\n',
    ],
)
def test_land_counts_from_zones_and_limits(over):
    """What is laid over the scale is clear of the window by the land, to the 0.005 mm that ink is true to."""
    outline, ink = window(laid(dial_text("", over, plate=f"{PLATE}mirror = {{ land = 1.5 }}")))
    assert polygon(outline).distance(ink) == pytest.approx(1.5, abs=0.006)


@pytest.mark.parametrize("shape", ["round", "square"])
@every_line
@both_ways
def test_mirror_shows_the_pointer_at_both_ends(shape, line, ends):
    """At both ends of the scale the pointer's ray crosses the window over its whole width."""
    found = laid(dial_text(line=line, ends=ends, plate=f'{PLATE}mirror = {{ ends = "{shape}" }}'))
    outline, _ = window(found)
    if "curve" in line:
        rays = [LineString([(m.x, 0), (m.x, 100)]) for m in (found.scale.marks[0], found.scale.marks[-1])]
    else:
        rays = [ray(angle) for angle in ends]
    for pointer in rays:
        assert polygon(outline).intersection(pointer).length > 3.9
    if shape == "round":
        a, b, c, d = ((v.x, v.y) for v in outline.vertices)
        for middle in (np.add(a, d) / 2, np.add(b, c) / 2):
            assert min(pointer.distance(Point(middle)) for pointer in rays) < 1e-6


def test_round_window_about_the_pivot():
    """With its radius and ends given the window is a slot of that radius, round about the ends' middles."""
    plate = f"{PLATE}mirror = {{ radius = 36, width = 4, from = -30, to = 20 }}"
    outline, _ = window(laid(dial_text(plate=plate)))
    turn = np.radians(np.linspace(-30, 20, 2000))
    truth = LineString(36 * np.column_stack([np.sin(turn), np.cos(turn)])).buffer(2, quad_segs=90)
    assert polygon(outline).symmetric_difference(truth).area < 1e-3 * truth.area


def test_square_window_about_the_pivot():
    """A window with square ends is an annular sector: (R² - r²)·θ/2 between the two angles given."""
    plate = f'{PLATE}mirror = {{ radius = 36, width = 4, from = -30, to = 20, ends = "square" }}'
    outline, _ = window(laid(dial_text(plate=plate)))
    assert polygon(outline).area == pytest.approx((38**2 - 34**2) * math.radians(50) / 2, rel=1e-6)


def test_window_of_a_straight_scale_is_parallel_to_it():
    """Below a straight scale the window's long sides are parallel to the line."""
    plate = f"{PLATE}mirror = {{}}"
    outline, _ = window(laid(dial_text(line="line = [[-44, 40], [44, 48]]", plate=plate)))
    turns = [v.turn_deg for v in outline.vertices]
    assert turns == [0.0, 180.0, 0.0, 180.0]
    a, b, c, d = ((v.x, v.y) for v in outline.vertices)
    for p, q in ((a, b), (c, d)):
        assert (q[1] - p[1]) / (q[0] - p[0]) == pytest.approx(8 / 88, abs=1e-9)


@pytest.mark.parametrize(
    ("keys", "said", "key"),
    [
        pytest.param(
            {"plate": PLATE + "mirror = { radius = 99 }"}, "off the plate", ("plate", "mirror"), id="edge"
        ),
        pytest.param(
            {
                "plate": PLATE
                + "mirror = {}\nhole = [{ at = [-50, 50], diameter = 2 }, { at = [0, 39], diameter = 3 }]"
            },
            "meets a hole",
            ("plate", "mirror"),
            id="hole",
        ),
        pytest.param(
            {"plate": PLATE + "mirror = { width = 8 }\nhole = [{ at = [0, 38], diameter = 1 }]"},
            "meets a hole",
            ("plate", "mirror"),
            id="hole within it",
        ),
        pytest.param(
            {"plate": PLATE + "mirror = {}\nslot = [{ width = 2, line = [[0, 30], [0, 38]] }]"},
            "meets a slot",
            ("plate", "mirror"),
            id="slot",
        ),
        pytest.param(
            {"plate": PLATE + "mirror = { land = 60 }"}, "no room", ("plate", "mirror"), id="no room"
        ),
        pytest.param(
            {"plate": PLATE + "mirror = { width = 90 }"}, "no room", ("plate", "mirror"), id="too wide"
        ),
        pytest.param(
            {"plate": PLATE + "mirror = { radius = 30 }", "line": LINES["straight"]},
            "give land instead",
            ("plate", "mirror", "radius"),
            id="radius on a straight scale",
        ),
        pytest.param(
            {"plate": PLATE + "slot = [{ width = 2, line = [[0, 0], [150, 0]] }]"},
            "runs off the plate",
            ("plate", "slot", 0),
            id="slot off the plate",
        ),
        pytest.param(
            {"plate": PLATE + "slot = [{ width = 12, radius = 5, from = 0, to = 90 }]"},
            "does not fit",
            ("plate", "slot", 0, "width"),
            id="slot too wide",
        ),
        pytest.param(
            {"plate": PLATE + "hole = [{ at = [150, 0], diameter = 2 }]"},
            "off the plate",
            ("plate", "hole", 0, "at"),
            id="hole off the plate",
        ),
    ],
)
def test_refusals(keys, said, key):
    """An opening that cannot be cut is refused with its key."""
    ((message, first),) = refused(**keys)
    assert said in message
    assert ";" in message
    assert first == key


@pytest.mark.parametrize(
    "table", ["mirror = { from = 20, to = -20 }", "slot = [{ width = 2, radius = 9, from = 5, to = 5 }]"]
)
def test_ends_must_ascend(table, tmp_path):
    """A window or slot from a higher to a lower angle is refused where the file says so."""
    path = tmp_path / "dial.toml"
    path.write_text(dial_text(plate=PLATE + table))
    with pytest.raises(DialFileError, match="covers nothing"):
        dialgen.load(path)


def test_refusal_of_a_mirror_has_its_place(tmp_path):
    """What is wrong with a mirror is told at its line of the file."""
    path = tmp_path / "dial.toml"
    path.write_text(dial_text(plate=PLATE + "mirror = { land = 60 }"))
    with pytest.raises(DialFileError) as refused:
        dialgen.load(path)
    (fault,) = refused.value.faults
    assert path.read_text().splitlines()[fault.line - 1].startswith("mirror")
    assert fault.key == "plate.mirror"


SLOTS = (
    "slot = [{ width = 3, radius = 30, from = -20, to = 10 }, { width = 2.5, line = [[-20, 5], [10, -5]] }]"
)


def test_slots_are_closed_and_round():
    """Slots are closed outlines: what shapely makes of their courses with round caps."""
    items = cut_layer(laid(dial_text(plate=PLATE + SLOTS)).dial.file.plate).items
    turn = np.radians(np.linspace(-20, 10, 2000))
    bent = LineString(30 * np.column_stack([np.sin(turn), np.cos(turn)])).buffer(1.5, quad_segs=90)
    straight = LineString([(-20, 5), (10, -5)]).buffer(1.25, quad_segs=90)
    for item, truth in zip(items[1:], (bent, straight), strict=True):
        assert polygon(item).symmetric_difference(truth).area < 1e-3 * truth.area


def test_openings_are_on_the_cut_layer_of_the_file(tmp_path):
    """Read back by lxml, outline, hole, two slots and the window stand in the cut group, each closed."""
    path = tmp_path / "dial.toml"
    plate = f"{PLATE}{SLOTS}\nmirror = {{}}\nhole = [{{ at = [0, -20], diameter = 4 }}]"
    path.write_text(dial_text(plate=plate))
    face = dialgen.load(path)
    root = etree.fromstring(face.render(".svg"))
    (group,) = [g for g in root.iter("{*}g") if (g.get("id") or "").startswith("cut")]
    paths = [p.get("d") for p in group.iter("{*}path")]
    assert len(list(group.iter("{*}circle"))) == 1
    assert len(paths) == 4
    assert all(d.strip().endswith("Z") and d.count("M") == 1 for d in paths)
    assert [len(re.findall("A ", d)) > 0 for d in paths] == [False, True, True, True]
    (layer,) = [layer for layer in face.drawing.layers if layer.purpose is Purpose.CUT]
    assert len(layer.items) == 5


def test_a_window_lies_on_its_plate():
    """The window that is given is wholly on the plate and clear of holes."""
    plate = f"{PLATE}mirror = {{}}\nhole = [{{ at = [0, 60], diameter = 4 }}]"
    outline, _ = window(laid(dial_text(plate=plate)))
    assert box(-100, -100, 100, 100).contains(polygon(outline))
    assert polygon(outline).distance(Point(0, 60)) > 2


def test_a_round_window_ends_at_the_ends_of_the_scale():
    """Left to itself the middles of the round ends stand at the ends of the scale."""
    outline, _ = window(laid(dial_text(plate=f"{PLATE}mirror = {{}}")))
    radii = np.hypot(*corners(outline).T)
    middle = (radii.max() + radii.min()) / 2
    ends = [math.degrees(math.atan2(v.x, v.y)) for v in outline.vertices]
    assert sorted(round(end, 9) for end in ends) == [-45.0, -45.0, 45.0, 45.0]
    assert radii.max() - middle == pytest.approx(2.0, abs=1e-6)
