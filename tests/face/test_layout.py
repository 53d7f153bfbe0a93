"""Where units, title, texts, symbols and maker's line stand on the plate."""

from __future__ import annotations

import math
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import given, settings
from layout_dials import Face, dials, face_of

from dialgen.drawing import Letters
from dialgen.face.lettered.cover import Box, letters_box
from dialgen.face.parts import MAKER, SYMBOLS, TEXT, TITLE
from dialgen.face.plate import Rectangle, outliner
from dialgen.ink import clearance, meetings, shape, strays
from dialgen.lettering import measure

PLATE = "size = [100, 80]\npivot = [50, 16]"
HEAD = 'title = "BATTERY"\nmaker = "Alder Lane Works"\ntested = 2026-05-01'
ARC = 'unit = "A"\nfrom = 0\nto = 40\nradius = 50\nlaw = { kind = "linear", per = "25 uA" }'
INNER = 'unit = "V"\nfrom = 0\nto = 30\nradius = 36\nlaw = { kind = "linear", per = "33.3 uA" }'


def dial(
    *scales: str,
    plate: str = PLATE,
    head: str = "",
    rest: str = "",
    ends: tuple[float, float] = (-45.0, 45.0),
) -> Face:
    """A face with some scales and other tables."""
    return face_of(
        f"dialgen = 1\n[dial]\n{head}\n[movement]\ncurrent = '1 mA'\nresistance = '75 ohm'\n"
        f"rest = {ends[0]}\nfull = {ends[1]}\n[plate]\n{plate}\n"
        + "".join(f"[[scale]]\n{keys}\n" for keys in scales or (ARC,))
        + rest
    )


def box(face: Face, name: str, number: int = 0) -> Box:
    """The box of a thing on a layer: left, bottom, right and top."""
    item = face.layer(name)[number]
    assert isinstance(item, Letters)
    found = letters_box(item)
    assert found is not None
    return found


def middle(box: Box) -> tuple[float, float]:
    """The middle of a box."""
    return (box[0] + box[2]) / 2, (box[1] + box[3]) / 2


def clashes(face: Face) -> list[tuple[str, str]]:
    """Which placed things touch others or what was laid before, by exact areas."""
    placed, laid = face.placed(), face.laid()
    inks = [(number, ink) for number, (_, parts) in enumerate(placed, 1) for ink in parts]
    shapes = [*laid, *(ink for _, ink in inks)]
    groups = [*(0 for _ in laid), *(number for number, _ in inks)]
    names = ["what is laid", *(name for name, _ in placed)]
    apart = [[one != other for other in range(len(names))] for one in range(len(names))]
    return sorted({(names[groups[a]], names[groups[b]]) for a, b, _ in meetings(shapes, groups, apart)})


def off_plate(face: Face) -> list[int]:
    """Which inks leave the plate."""
    inks = [ink for _, parts in face.placed() for ink in parts]
    return [number for number, _ in strays(inks, outliner(face.file.plate).holds)]


@settings(max_examples=80, deadline=None)
@given(dials())
def test_nothing_that_is_placed_touches_anything(text: str) -> None:
    """On every plate with room all is lettered, clear of ink, openings and each other, within the plate."""
    face = face_of(text)
    assert not clashes(face)
    assert not off_plate(face)
    assert bool(face.layer(TITLE)) == bool(face.file.dial.title)
    assert bool(face.layer(MAKER)) == bool(face.file.dial.maker)
    assert bool(face.layer(SYMBOLS)) == bool(face.file.symbols)
    assert len(face.layer(TEXT)) == len(face.file.text)
    assert bool(face.layer("scale 1 unit")) == bool(face.file.scale[0].unit)


@settings(max_examples=15, deadline=None)
@given(dials())
def test_one_file_gives_one_face(text: str) -> None:
    """Drawn twice from the same text, everything stands in the same place to the last bit."""
    assert face_of(text).drawing == face_of(text).drawing


def test_the_referee_sees_a_clash() -> None:
    """The check of the tests above can fail: texts on each other are found, one off the plate too."""
    on_unit = dial(rest='[[text]]\nsay = "HERE"\nat = [0, 30]\n[[text]]\nsay = "HERE"\nat = [0, 31]\n')
    assert clashes(on_unit) == [("text", "text")]
    assert off_plate(dial(rest='[[text]]\nsay = "HERE"\nat = [50, 0]\n'))


def test_a_lone_unit_stands_on_the_axis_between_pivot_and_arc() -> None:
    """With nothing in the way the unit is exactly in the middle, whatever else is lettered."""
    alone, crowded = dial(), dial(head=HEAD, rest='[symbols]\n[[text]]\nsay = "75 mV shunt"\n')
    x, y = middle(box(alone, "scale 1 unit"))
    assert x == pytest.approx(0.0, abs=1e-9)
    assert 0.4 * 50 < y < 0.8 * 50
    assert box(crowded, "scale 1 unit") == box(alone, "scale 1 unit")


def test_what_is_on_the_axis_is_centred_on_it_line_under_line() -> None:
    """Unit, title and text stand centred one under the other, the maker's line at the foot."""
    face = dial(head=HEAD, rest='[[text]]\nsay = "75 mV shunt"\n')
    stack = [box(face, name) for name in ("scale 1 unit", TITLE, TEXT, MAKER)]
    assert [middle(one)[0] for one in stack] == pytest.approx([0.0] * 4, abs=1e-6)
    assert all(upper[1] > lower[3] for upper, lower in pairwise(stack))
    assert stack[-1][1] < -16 + 4


def test_a_wide_scale_has_its_title_under_the_pivot() -> None:
    """Where the scale goes round the pivot, unit and title balance each other above and below it."""
    face = dial(
        ARC.replace("50", "36"), plate="diameter = 100\npivot = [50, 50]", head=HEAD, ends=(-120, 120)
    )
    unit, title = middle(box(face, "scale 1 unit")), middle(box(face, TITLE))
    assert title[1] == pytest.approx(-unit[1])
    assert title[0] == pytest.approx(unit[0])


def test_what_the_file_gives_a_place_stands_exactly_there() -> None:
    """Unit, text and symbols that are given a place have their middles there, clear of the rest."""
    rest = '[[text]]\nsay = "BATTERY"\nat = [0, 31]\n[symbols]\nshow = ["moving coil"]\nat = [20, 5]\n'
    face = dial(ARC + "\nunit_at = [-12.5, 20]", head=HEAD, rest=rest)
    assert middle(box(face, "scale 1 unit")) == pytest.approx((-12.5, 20.0))
    assert middle(box(face, TEXT)) == pytest.approx((0.0, 31.0))
    (symbols,) = [parts for name, parts in face.placed() if name == SYMBOLS]
    boxes = np.array([ink.box for ink in symbols])
    assert (boxes[:, 0].min() + boxes[:, 2].max()) / 2 == pytest.approx(20.0, abs=0.005)
    assert (boxes[:, 1].min() + boxes[:, 3].max()) / 2 == pytest.approx(5.0, abs=0.005)
    assert not clashes(face)


def test_texts_keep_the_order_of_the_file() -> None:
    """The n-th item of the layer is the n-th text of the file, whether it has a place or not."""
    rest = "".join(
        f'[[text]]\nsay = "{say}"\n{at}\n'
        for say, at in (("ONE", ""), ("TWO", "at = [30, 0]"), ("THREE", ""), ("FOUR", "at = [-30, 0]"))
    )
    items = dial(rest=rest).layer(TEXT)
    assert [item.text for item in items if isinstance(item, Letters)] == ["ONE", "TWO", "THREE", "FOUR"]


def test_the_hub_stays_free() -> None:
    """Nothing that is placed comes within the disc that the pointer's bearing covers."""
    for foot in (8, 12, 20):
        face = dial(plate=f"size = [100, {62 + foot}]\npivot = [50, {foot}]", head=HEAD, rest="[symbols]\n")
        for _, parts in face.placed():
            assert all(math.hypot(*corner) > 5.0 for ink in parts for c in ink.contours for corner in c)


def test_what_the_case_hides_is_left_free() -> None:
    """With a window in the case everything stands within it, and not at its very edge."""
    window = "window = { at = [0, 31], size = [90, 48], corner = 4 }"
    face = dial(plate=f"{PLATE}\n{window}", head=HEAD, rest="[symbols]\n")
    inks = [ink for _, parts in face.placed() for ink in parts]
    assert not strays(inks, Rectangle((-44.0, 8.0, 88.0, 46.0), 3.0).holds)


@pytest.mark.parametrize("ends", [(-45.0, 45.0), (45.0, -45.0)])
def test_units_of_several_scales_stand_each_nearest_to_its_own_numerals(ends: tuple[float, float]) -> None:
    """Each unit is nearer to a numeral of its own scale than to any of the other's, either way round."""
    face = dial(ARC, INNER, ends=ends)
    assert not clashes(face)
    for number in (1, 2):
        unit = shape(face.layer(f"scale {number} unit")[0])
        assert unit is not None
        gaps = [
            min(
                clearance(unit, ink) for item in face.layer(f"scale {scale} numerals") if (ink := shape(item))
            )
            for scale in (number, 3 - number)
        ]
        assert gaps[0] < gaps[1]


def test_units_of_several_scales_are_placed_alike() -> None:
    """Both units stand behind the last numeral, on its baseline, or both under the middle of their lines."""
    face = dial(ARC, INNER)
    under, behind = [], []
    for number, last in ((1, "40"), (2, "30")):
        (numeral,) = [
            n for n in face.layer(f"scale {number} numerals") if isinstance(n, Letters) and n.text == last
        ]
        (unit,) = [n for n in face.layer(f"scale {number} unit") if isinstance(n, Letters)]
        where, place = letters_box(numeral), letters_box(unit)
        assert where is not None
        assert place is not None
        under.append(abs(middle(place)[0]) < 0.01)
        behind.append(place[0] > where[2] and abs(unit.glyphs[0].y - numeral.glyphs[0].y) < 0.01)
    assert all(under) or all(behind)


def test_a_further_row_in_another_unit_has_it_at_its_end() -> None:
    """A row in per cent has its sign nearest to its own last numeral; a row in the same unit has none."""
    face = dial(ARC.replace("50", "44") + '\nalso = [{ times = 2.5, unit = "%" }]')
    _, sign = face.layer("scale 1 unit")
    assert isinstance(sign, Letters)
    assert sign.text == "%"
    ink = shape(sign)
    assert ink is not None
    gap = {
        n.text: clearance(ink, numeral)
        for n in face.layer("scale 1 numerals")
        if isinstance(n, Letters) and (numeral := shape(n))
    }
    assert min(gap, key=lambda text: gap[text]) == "100"
    assert not clashes(face)
    assert len(dial(ARC + "\nalso = [{ times = 2.5 }]").layer("scale 1 unit")) == 1


def test_a_title_is_made_smaller_or_broken_where_it_does_not_fit() -> None:
    """A long title on a small plate keeps all its words, clear of everything, at 70 per cent or more."""
    plate = "size = [56, 46]\npivot = [28, 12]"
    said = "MAIN SWITCHBOARD BATTERY CURRENT"
    face = dial(ARC.replace("50", "24"), plate=plate, head=f'title = "{said}"')
    lines = [item for item in face.layer(TITLE) if isinstance(item, Letters)]
    assert " ".join(line.text for line in lines) == said
    assert not clashes(face)
    whole = face_of_title_height(ARC.replace("50", "24"), plate)
    for line in lines:
        (_, bottom, _, top) = letters_box(line) or (0.0, 0.0, 0.0, 0.0)
        assert top - bottom >= 0.7 * whole - 1e-6


def face_of_title_height(scale: str, plate: str) -> float:
    """How high a title is that has all the room it wants."""
    _, bottom, _, top = box(dial(scale, plate=plate, head='title = "I"'), TITLE)
    return top - bottom


def test_what_finds_no_room_is_drawn_all_the_same() -> None:
    """Nothing is dropped: on a plate that is all hole the title and the unit still stand on their axis."""
    plate = PLATE + "\nhole = [{ at = [0, 24], diameter = 140 }]"
    face = dial(plate=plate, head='title = "BATTERY"')
    assert middle(box(face, TITLE))[0] == pytest.approx(0.0, abs=1e-6)
    assert face.layer("scale 1 unit")
    assert ("what is laid", TITLE) in clashes(face)


@pytest.mark.parametrize("text", ["DYNAMO", "Ölpumpe gq"])
def test_lettering_stands_at_the_height_that_is_asked_for(text: str) -> None:
    """A text that finds room is set at its own height, as the lettering measures it."""
    face = dial(rest=f'[[text]]\nsay = "{text}"\nheight = 3.3\n')
    left, bottom, right, top = box(face, TEXT)
    asked = measure(text, 3.3)
    assert right - left == pytest.approx(asked.right - asked.left)
    assert top - bottom == pytest.approx(asked.top - asked.bottom)


def test_a_turned_text_without_a_place_is_placed_as_it_is_turned() -> None:
    """The angle of a text is kept where the place is found for it."""
    face = dial(rest='[[text]]\nsay = "FRAGILE"\nangle = -90\n')
    left, bottom, right, top = box(face, TEXT)
    assert top - bottom > 3 * (right - left)
    assert not clashes(face)


def test_symbols_and_maker_balance_each_other() -> None:
    """Symbols low at the left have the maker's line low at the right."""
    face = dial(head=HEAD, plate="size = [140, 90]\npivot = [70, 22]", rest="[symbols]\n")
    (symbols,) = [parts for name, parts in face.placed() if name == SYMBOLS]
    assert all(ink.box[2] < -20 and ink.box[3] < -10 for ink in symbols)
    maker = box(face, MAKER)
    assert maker[0] > 20
    assert maker[3] < -10
