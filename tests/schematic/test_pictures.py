"""Pictures of circuits: every part is there, lettered clear, wired as the design works, at true size."""

from __future__ import annotations

import io
import math
import subprocess
import sys
from dataclasses import replace
from pathlib import Path

import numpy as np
import pypdfium2 as pdfium
import pytest
from covered import drawn
from hypothesis import given, settings
from hypothesis import strategies as st
from lxml import etree
from netlist import Net
from pictured import COIL_TEXT, DESIGNS, amps, behind, ohms, volts
from shapely import Polygon, unary_union
from shapely.geometry import LineString
from shapely.geometry import Point as Spot

import dialgen
from dialgen.circuit.design import COIL, Part
from dialgen.circuit.kinds import CIRCUITS as KINDS
from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.universal import UniversalShunt
from dialgen.drawing import Letters, Line, Outline
from dialgen.errors import InputError
from dialgen.ink import neighbours, shape
from dialgen.quantity import engineered
from dialgen.renderers import Options, render
from dialgen.schematic import LAYOUTS, draw
from dialgen.schematic.compose import MARGIN_MM, laid
from dialgen.schematic.inking import inked
from dialgen.schematic.library import SIGN_MM
from dialgen.schematic.pieces import EXTENTS, Kind, Sign

pytestmark = pytest.mark.filterwarnings("ignore::DeprecationWarning")

TEMPLATES = Path(__file__).parents[2] / "templates"

every_design = pytest.mark.parametrize("name", DESIGNS)


def texts(drawing):
    """All strings of a drawing."""
    return [item.text for layer in drawing.layers for item in layer.items if isinstance(item, Letters)]


def crowded(drawing, clear_mm):
    """Pairs of a text and any other ink, of which one must not come near the other."""
    items = [item for layer in drawing.layers for item in layer.items]
    inks = [(item, area) for item in items if (area := shape(item))]
    lettered = [0 if isinstance(item, Letters) else 1 for item, _ in inks]
    apart = [[True, True], [True, False]]
    met = neighbours([area for _, area in inks], clear_mm, lettered, apart)
    return [(inks[near.one][0], inks[near.other][0], near.gap_mm) for near in met]


# --- the table


def test_every_kind_of_circuit_has_a_picture():
    """The table of pictures and the table of circuits have the same kinds, and all are tried here."""
    assert set(LAYOUTS) == set(KINDS)
    assert {design.kind for design in DESIGNS.values()} == set(KINDS)


def test_a_kind_without_a_picture_is_refused():
    """An unknown kind is refused by name, and told which kinds can be drawn."""
    with pytest.raises(InputError, match="no picture of the circuit 'crystal set'; one of direct, shunt"):
        draw(replace(DESIGNS["direct"], kind="crystal set"), coil=COIL_TEXT)


# --- what is written


@every_design
def test_every_part_is_drawn_and_lettered(name):
    """Each part of a design is named in its picture with its value, and with the built one if another."""
    design = DESIGNS[name]
    pieces = laid(design, COIL_TEXT)
    written = texts(draw(design, coil=COIL_TEXT))
    signs = [piece.part for piece in pieces if isinstance(piece, Sign)]
    for part in design.parts:
        assert part.name in written
        assert engineered(part.ohms, "Ω") in written
        assert part.sums or signs.count(part.name) == 1
        if part.built:
            assert f"as built {engineered(part.built, 'Ω')}" in written
    assert {"1 mA", "75 Ω"} <= set(written)


def test_every_range_stands_at_its_terminal():
    """All ten ranges of a universal shunt and of a chain are written, with the polarity of the terminal."""
    for name in ("universal, ten ranges", "chain, ten ranges"):
        design = DESIGNS[name]
        written = texts(draw(design, coil=COIL_TEXT))
        assert {f"{case.name} +" for case in design.cases} <= set(written)
        assert "−" in written


def test_alternating_current_is_marked_by_its_sign():
    """A rectifier's terminals have the sign of alternating current and its movement a plus."""
    written = texts(draw(DESIGNS["rectifier"], coil=COIL_TEXT))
    assert "10 V ~" in written
    assert "~" in written
    assert "+" in written
    assert "−" not in written


def test_a_movement_on_a_transformer_has_no_polarity():
    """What sees alternating current itself has neither plus nor minus."""
    written = texts(draw(DESIGNS["transformer"], coil=COIL_TEXT))
    assert not {"+", "−"} & set(written)


@pytest.mark.parametrize(
    ("name", "stamp"),
    [("shunt bought", "100 A/75 mV"), ("transformer", "200/5"), ("transformer, no shunt", "200/0.001")],
)
def test_what_is_bought_is_lettered_with_its_stamp(name, stamp):
    """A bought shunt and a transformer carry in the picture what is stamped on them."""
    assert stamp in texts(draw(DESIGNS[name], coil=COIL_TEXT))


def test_a_part_with_no_place_is_set_below():
    """A part that the layout does not know is drawn all the same, below everything else."""
    design = DESIGNS["multiplier"]
    extra = replace(design, parts=(*design.parts, Part(name="damping resistor", ohms=470.0)))
    pieces = laid(extra, COIL_TEXT)
    (sign,) = [piece for piece in pieces if isinstance(piece, Sign) and piece.part == "damping resistor"]
    others = [piece for piece in pieces if isinstance(piece, Sign) and piece is not sign]
    assert sign.start[1] < min(min(other.start[1], other.end[1]) for other in others)
    assert {"damping resistor", "470 Ω"} <= set(texts(draw(extra, coil=COIL_TEXT)))


# --- what its voltage asks for


def ac_voltmeter(tmp_path, volts, more=""):
    """The template of a rectifier voltmeter made one of so many volts."""
    text = (TEMPLATES / "ac-volts.toml").read_text(encoding="utf-8")
    text = text.replace('range = "12 V"', f'range = "{volts} V"').replace("to = 12 ", f"to = {volts} ")
    path = tmp_path / "volts.toml"
    path.write_text(text.replace("numbered = [0, 2, 4, 6, 8, 10, 12]", 'numbered = "auto"') + more)
    face = dialgen.load(path)
    return face, face.circuits[0]


@pytest.mark.parametrize(("volts", "rated", "count"), [(300, 250, 2), (300, 150, 3), (170, 250, 1)])
def test_a_multiplier_is_lettered_as_it_is_to_be_made(tmp_path, volts, rated, count):
    """At 300 V AC, 424 V of peak, parts for 250 V are two, for 150 V three; at 170 V, 240 V, one does."""
    face, circuit = ac_voltmeter(tmp_path, volts, f'\n[parts]\nvoltage = "{rated} V"\n')
    (part,) = circuit.design.parts
    each = engineered(part.ohms / count, "Ω")
    written = texts(face.schematic(circuit))
    assert (f"{count} × {each}" if count > 1 else each) in written
    assert (engineered(part.ohms, "Ω") in written) == (count == 1)


def test_the_bench_of_the_bill_is_that_of_the_picture(tmp_path):
    """A bench given in place of the file's splits the drawn multiplier as it splits that of the bill."""
    face, circuit = ac_voltmeter(tmp_path, 300)
    bench = face.bench({"voltage": "100 V"})
    (split,) = face.bill(circuit, bench).splits
    assert split.count == 5
    assert f"5 × {engineered(split.ohms, 'Ω')}" in texts(face.schematic(circuit, bench))


@every_design
def test_any_split_is_set_clear(name):
    """Every part of every circuit made of twelve, and an earthed end, crowd no lettering."""
    design = DESIGNS[name]
    splits = {part.name: 12 for part in design.parts}
    drawing = draw(design, title="T", coil=COIL_TEXT, splits=splits, earthed=True)
    assert sum(text.startswith("12 × ") for text in texts(drawing)) >= len(splits)
    assert crowded(drawing, 0.45) == []


def test_a_split_part_keeps_its_measured_value():
    """What was measured is that of the whole, whatever it is made of."""
    design = DESIGNS["rectifier"]
    written = texts(draw(design, coil=COIL_TEXT, splits={"multiplier": 2}))
    assert "as built 5.555 kΩ" in written
    assert f"2 × {engineered(design.ohms['multiplier'] / 2, 'Ω')}" in written


@pytest.mark.parametrize(
    ("splits", "message"),
    [
        ({"shunt": 2}, "no part 'shunt' to split; there is multiplier"),
        ({"multiplier": 0}, "multiplier cannot be made of 0; give 1 or more"),
    ],
)
def test_a_split_that_makes_no_sense_is_refused(splits, message):
    """A part that is not there and a count of none are told of."""
    with pytest.raises(InputError, match=message):
        draw(DESIGNS["multiplier"], coil=COIL_TEXT, splits=splits)


@pytest.mark.parametrize(("volts", "marked"), [(40, False), (60, True), (300, True)])
def test_the_earthed_end_is_marked_where_touch_is_dangerous(tmp_path, volts, marked):
    """Above 50 V AC (IEC 60364-4-41, from memory) the end behind the movement is named."""
    face, circuit = ac_voltmeter(tmp_path, volts)
    assert ("earthed end ~" in texts(face.schematic(circuit))) == marked


def test_the_earthed_end_is_behind_the_movement():
    """Of a multiplier's two terminals the one that is joined to the coil itself is named the earthed end."""
    net = Net(laid(DESIGNS["multiplier"], COIL_TEXT, earthed=True))
    assert net.terminal("earthed end −") in net.ends_of(COIL)
    assert net.terminal("10 V +") in net.ends_of("multiplier")


# --- how it is set


@every_design
def test_nothing_touches_the_lettering(name):
    """No text comes within 0.45 mm of another or of a line."""
    assert crowded(draw(DESIGNS[name], title="A title", coil=COIL_TEXT), 0.45) == []


def test_the_check_of_lettering_can_fail():
    """A wire through a text and a text on a text are found."""
    drawing = draw(DESIGNS["shunt"], coil=COIL_TEXT)
    (letters,) = [item for la in drawing.layers for item in la.items if getattr(item, "text", "") == "shunt"]
    box = shape(letters).box
    style = next(layer for layer in drawing.layers if layer.name == "wires").items[0].style
    struck = Line((box[0], box[1] + 1), (box[2], box[1] + 1), style)
    wrong = replace(drawing.layers[0], name="more", items=(letters, struck))
    assert len(crowded(replace(drawing, layers=(*drawing.layers, wrong)), 0.45)) >= 3


@every_design
def test_all_ink_is_within_the_margin(name):
    """The page is the picture and its margin, 120 to 185 mm wide."""
    drawing = draw(DESIGNS[name], title="A title", coil=COIL_TEXT)
    inner = drawing.with_margin(1e-6 - MARGIN_MM)
    corners = [
        (inner.left, inner.bottom),
        (inner.left, inner.top),
        (inner.right, inner.top),
        (inner.right, inner.bottom),
    ]
    areas = [area for layer in drawing.layers for item in layer.items if (area := shape(item))]
    whole = Polygon(corners).buffer(1e-5)
    for area in areas:
        assert whole.covers(Polygon([(x, y) for x, y in box_corners(area.box)]))
    assert 120 <= drawing.width <= 185


def box_corners(box):
    """The four corners of a box."""
    left, bottom, right, top = box
    return [(left, bottom), (left, top), (right, top), (right, bottom)]


@settings(max_examples=25, deadline=None)
@given(
    st.lists(
        st.sampled_from([round(m * 10**d, 9) for d in range(-2, 4) for m in (1, 2, 2.5, 5)]),
        min_size=2,
        max_size=12,
        unique=True,
    ),
    st.floats(0.9, 1.1),
    st.sampled_from(["universal", "multipliers", "chain"]),
    st.booleans(),
)
def test_any_ranges_are_set_clear(ranges, off, kind, swamped):
    """Two to twelve ranges of any size, built otherwise than designed, never crowd the lettering."""
    swamp = ohms(199.5)[0] if swamped else None
    if kind == "universal":
        circuit = UniversalShunt(ranges=amps(*sorted(ranges)), swamp=swamp)
        terminals = behind(max(ranges), "A")
    else:
        circuit = Multiplier(ranges=volts(*sorted(10 * r for r in ranges)), chain=kind == "chain", swamp=None)
        terminals = behind(10 * max(ranges), "V")
    design = circuit.design(terminals)
    built = tuple(replace(part, built=part.ohms * off) for part in design.parts)
    drawing = draw(replace(design, parts=built), title="T", coil=("199.5 µA", "1.9995 kΩ"))
    assert crowded(drawing, 0.45) == []


# --- the signs


@pytest.mark.parametrize("kind", Kind)
@pytest.mark.parametrize("turn_deg", [0, 45, 90, 135, 180, 225, 270, 315])
def test_a_sign_reaches_its_ends_and_keeps_its_extent(kind, turn_deg):
    """The library's shapes end where the wires do, and stay within the room the layout gives them."""
    extent = EXTENTS[kind]
    x, y = math.cos(math.radians(turn_deg)), math.sin(math.radians(turn_deg))
    end = (3 + x * extent.length_mm, 4 + y * extent.length_mm)
    items = inked(Sign(kind, (3.0, 4.0), end))
    covered = unary_union([drawn(item) for item in items])
    for place in ((3.0, 4.0), end):
        assert covered.distance(Spot(place)) <= SIGN_MM / 2
    if kind is not Kind.EARTH:
        room = LineString([(3.0, 4.0), end]).buffer(extent.half_mm + SIGN_MM / 2, cap_style="square")
        assert room.buffer(SIGN_MM / 2).covers(covered)


def test_a_resistor_is_three_times_as_long_as_wide():
    """The box of IEC 60617 is drawn 10.5 mm by 3.5 mm between the middles of its lines."""
    (box,) = [item for item in inked(Sign(Kind.RESISTOR, (0, 0), (10.5, 0))) if isinstance(item, Outline)]
    assert {round(v.x, 9) for v in box.vertices} == {0.0, 10.5}
    assert {v.y for v in box.vertices} >= {1.75, -1.75}
    assert max(abs(v.y) for v in box.vertices) == 1.75


# --- the files


@pytest.mark.parametrize("name", ["direct", "universal, ten ranges", "bridge"])
def test_files_have_the_true_size(name):
    """SVG and PDF, read by lxml and pdfium, have the page's size in millimetres; all ink keeps the margin."""
    drawing = draw(DESIGNS[name], coil=COIL_TEXT)
    root = etree.fromstring(render(drawing, ".svg"))
    assert float(root.get("width").removesuffix("mm")) == pytest.approx(drawing.width, abs=1e-3)
    assert float(root.get("height").removesuffix("mm")) == pytest.approx(drawing.height, abs=1e-3)
    document = pdfium.PdfDocument(render(drawing, ".pdf"))
    page = document[0]
    size_mm = [side / 72 * 25.4 for side in page.get_size()]
    picture = page.render(scale=10 * 25.4 / 72, grayscale=True).to_numpy()
    page.close()
    document.close()
    assert size_mm == pytest.approx([drawing.width, drawing.height], abs=1e-2)
    rows, columns = np.nonzero(picture.reshape(picture.shape[:2]) < 128)
    # Ten pixels to the millimetre: the picture's own height fills the page but for the margins.
    assert rows.min() == pytest.approx(10 * MARGIN_MM, abs=1.5)
    assert picture.shape[0] - rows.max() - 1 == pytest.approx(10 * MARGIN_MM, abs=1.5)
    assert columns.min() >= 10 * MARGIN_MM - 1.5


def test_every_format_draws_it_the_same_every_time():
    """Each renderer takes the picture, and twice gives the same bytes where its format has no date."""
    drawing = draw(DESIGNS["half bridge"], coil=COIL_TEXT)
    again = draw(DESIGNS["half bridge"], coil=COIL_TEXT)
    for suffix in (".svg", ".pdf", ".dxf"):
        assert render(drawing, suffix) == render(again, suffix)
    assert io.BytesIO(render(drawing, ".png", Options(resolution_dpi=100))).read(4) == b"\x89PNG"


def test_the_library_of_signs_is_loaded_when_a_picture_is_asked_for():
    """Importing the room loads neither schemdraw nor matplotlib."""
    code = "import sys, dialgen.schematic; print({'schemdraw', 'matplotlib'} & set(sys.modules))"
    run = subprocess.run([sys.executable, "-c", code], check=True, capture_output=True, text=True)
    assert run.stdout.strip() == "set()"
