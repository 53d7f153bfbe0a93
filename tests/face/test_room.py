"""The free area of a plate, against exact areas of ink and against a slow search."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from dialgen.drawing import (
    Arc,
    Circle,
    Layer,
    Letters,
    Line,
    Outline,
    Primitive,
    Purpose,
    Style,
    Vertex,
    polar,
)
from dialgen.face.lettered.cover import cover, letters_box
from dialgen.face.lettered.room import Found, Room, Wish
from dialgen.face.plate import Disc, Outliner, Rectangle, rounded_rectangle
from dialgen.ink import clearance, shape, touch
from dialgen.lettering import PLAIN, Fit, hand, letters

CUT = Style(stroke="#d00000", width_mm=0.1)
INK = "#000000"
NARROW, WIDE = st.floats(0.1, 0.6), st.floats(0.1, 5.0)
places = st.tuples(st.floats(-34.0, 34.0), st.floats(-24.0, 24.0))
turns = st.floats(-180.0, 180.0)


def stroked(width_mm: float) -> Style:
    """Ink along a line."""
    return Style(stroke=INK, width_mm=width_mm)


@st.composite
def bands(draw: st.DrawFn) -> Outline:
    """A zone: two arcs about one centre, joined by straight ends, filled."""
    (x, y), inner, wide = draw(places), draw(st.floats(4.0, 20.0)), draw(st.floats(0.5, 6.0))
    start, turn = draw(turns), draw(st.floats(10.0, 170.0))
    low, high = math.radians(start), math.radians(start + turn)
    corners = [(inner + wide, low, turn), (inner + wide, high, 0.0), (inner, high, -turn), (inner, low, 0.0)]
    return Outline(
        tuple(Vertex(x + r * math.sin(a), y + r * math.cos(a), t) for r, a, t in corners), Style(fill=INK)
    )


printed: st.SearchStrategy[Primitive] = st.one_of(
    st.builds(
        lambda a, turn, r, w: Line(a, polar(a, r, turn), stroked(w)),
        places,
        turns,
        st.floats(0.5, 50.0),
        WIDE,
    ),
    st.builds(
        lambda c, r, a, b, w: Arc(c, r, a, a + b, stroked(w)),
        places,
        st.floats(1.0, 40.0),
        turns,
        st.floats(1.0, 359.0),
        NARROW,
    ),
    st.builds(lambda c, r, w: Circle(c, r, stroked(w)), places, st.floats(0.5, 15.0), NARROW),
    st.builds(lambda c, r: Circle(c, r, Style(fill=INK)), places, st.floats(0.2, 12.0)),
    st.builds(
        lambda at, w, h, c: rounded_rectangle((*at, w, h), c * min(w, h), Style(fill=INK)),
        places,
        st.floats(0.5, 20.0),
        st.floats(0.5, 20.0),
        st.sampled_from((0.0, 0.3, 0.5)),
    ),
    st.builds(
        lambda at, text, h, turn: letters(text, h, at, Style(fill=INK), angle_deg=turn),
        places,
        st.sampled_from(("40", "BATTERY", "µA")),
        st.floats(1.0, 6.0),
        turns,
    ),
    bands(),
)
plates: st.SearchStrategy[Outliner] = st.one_of(
    st.builds(lambda c: Rectangle((-36.0, -26.0, 72.0, 52.0), c), st.floats(0.0, 20.0)),
    st.builds(lambda r, x: Disc((x, 1.0), r), st.floats(20.0, 45.0), st.floats(-5.0, 5.0)),
)
windows = st.none() | st.builds(
    lambda at, w, h: Rectangle((at[0] - w / 2, at[1] - h / 2, w, h), 1.0),
    st.tuples(st.floats(-6.0, 6.0), st.floats(-6.0, 6.0)),
    st.floats(20.0, 70.0),
    st.floats(15.0, 50.0),
)
sizes = st.tuples(st.floats(0.5, 25.0), st.floats(0.5, 12.0))


def layer(items: list[Primitive], purpose: Purpose = Purpose.PRINT) -> Layer:
    """Some primitives on a layer."""
    return Layer(name="laid", purpose=purpose, items=tuple(items))


def room_of(items: list[Primitive], plate: Outliner, window: Rectangle | None, margin_mm: float) -> Room:
    """The room that some ink leaves on a plate."""
    fields = [plate, window] if window else [plate]
    return Room(tuple(fields), cover([layer(items)], plate), margin_mm)


def box_around(at: tuple[float, float], size: tuple[float, float], grown_mm: float = 0.0) -> Outline:
    """A box about its middle, inked."""
    wide, high = size[0] + 2 * grown_mm, size[1] + 2 * grown_mm
    return rounded_rectangle((at[0] - wide / 2, at[1] - high / 2, wide, high), 0.0, Style(fill=INK))


def within(box: Outline, fields: list[Outliner]) -> bool:
    """Whether all corners of a box lie in all of some convex figures."""
    xs, ys = [v.x for v in box.vertices], [v.y for v in box.vertices]
    return all(field.holds(xs, ys).all() for field in fields)


@settings(max_examples=150, deadline=None)
@given(st.lists(printed, max_size=6), plates, windows, st.floats(0.0, 2.0), places, sizes)
def test_what_is_free_touches_nothing_and_keeps_its_margin(
    items: list[Primitive],
    plate: Outliner,
    window: Rectangle | None,
    margin_mm: float,
    at: tuple[float, float],
    size: tuple[float, float],
) -> None:
    """A box called free touches no exact area of ink, and with its margin lies on plate and window."""
    if not room_of(items, plate, window, margin_mm).free(at, *size):
        return
    box = shape(box_around(at, size))
    assert box is not None
    for item in items:
        ink = shape(item)
        assert ink is None or touch(ink, box) is None
    fields = [plate, window] if window else [plate]
    assert within(box_around(at, size, margin_mm - 1e-9), fields)


@settings(max_examples=150, deadline=None)
@given(st.lists(printed, max_size=3), plates, windows, st.floats(0.0, 2.0), places, sizes)
def test_what_is_well_clear_is_free(
    items: list[Primitive],
    plate: Outliner,
    window: Rectangle | None,
    margin_mm: float,
    at: tuple[float, float],
    size: tuple[float, float],
) -> None:
    """A box with two and a half cells and half a millimetre to spare all around is called free."""
    room = room_of(items, plate, window, margin_mm)
    # Broad strokes are covered in pieces up to a millimetre wide, and each as a row of squares.
    spare_mm = 2.5 * room.raster.cell_mm + 0.5
    fields = [plate, window] if window else [plate]
    if not within(box_around(at, size, margin_mm + spare_mm), fields):
        return
    grown = shape(box_around(at, size, spare_mm + 0.01))
    assert grown is not None
    covers = cover([layer(items)], plate)
    solid = [ink for item in _as_boxes(items) if (ink := shape(item))]
    assert len(covers.boxes) == sum(len(i.glyphs) for i in items if isinstance(i, Letters))
    if all(touch(ink, grown) is None for ink in solid):
        assert room.free(at, *size)
        assert room.best(*size, [Wish(at)]) == Found(at, 0.0)


def _as_boxes(items: list[Primitive]) -> list[Primitive]:
    """The primitives, letters as the boxes of their glyphs, which is what they count as."""
    found: list[Primitive] = []
    for item in items:
        if not isinstance(item, Letters):
            found.append(item)
            continue
        for placed in item.glyphs:
            left, bottom, right, top = letters_box(Letters("", (placed,), item.style)) or (0, 0, 0, 0)
            found.append(rounded_rectangle((left, bottom, right - left, top - bottom), 0.0, Style(fill=INK)))
    return found


wishes = st.lists(
    st.builds(Wish, places, st.floats(0.0, 9.0), st.floats(0.5, 4.0), st.floats(0.5, 4.0)),
    min_size=1,
    max_size=3,
)


@settings(max_examples=60, deadline=None)
@given(
    st.lists(printed, max_size=5),
    plates,
    sizes,
    wishes,
    st.just(0.0) | st.floats(0.1, 3.0),
    st.floats(0.0, 20.0),
)
def test_the_best_place_is_that_of_a_slow_search(
    items: list[Primitive],
    plate: Outliner,
    size: tuple[float, float],
    wished: list[Wish],
    air_mm: float,
    crowd: float,
) -> None:
    """The place found is free, and none of many others, counted cell by cell, is free and costs less."""
    room = room_of(items, plate, None, 0.5)
    found = room.best(*size, wished, air_mm, crowd)
    rows, columns = room.raster.taken.shape
    eighths = [
        (room.raster.left + i * room.raster.cell_mm, room.raster.bottom + j * room.raster.cell_mm)
        for i in range(8, columns, 8)
        for j in range(8, rows, 8)
    ]
    tried = [*eighths, *(wish.at for wish in wished)]
    costs = [
        cost_of(room, at, size, wished, air_mm, crowd) for at in tried if cells_under(room, at, size) == 0
    ]
    if found is None:
        assert not costs
        return
    assert cells_under(room, found.at, size) == 0
    assert room.free(found.at, *size)
    assert found.cost == pytest.approx(cost_of(room, found.at, size, wished, air_mm, crowd))
    assert found.cost <= min(costs, default=math.inf) + 1e-9


def cells_under(room: Room, at: tuple[float, float], size: tuple[float, float]) -> int:
    """How many taken cells a box touches, counted one by one; off the raster there is one that is."""
    cells = 0
    low_x, high_x = ((at[0] + s * size[0] / 2 - room.raster.left) / room.raster.cell_mm for s in (-1, 1))
    low_y, high_y = ((at[1] + s * size[1] / 2 - room.raster.bottom) / room.raster.cell_mm for s in (-1, 1))
    rows, columns = room.raster.taken.shape
    if low_x >= columns or low_y >= rows or high_x <= 0 or high_y <= 0:
        return 1
    for row in range(max(math.floor(low_y), 0), min(math.ceil(high_y), rows)):
        for column in range(max(math.floor(low_x), 0), min(math.ceil(high_x), columns)):
            cells += bool(room.raster.taken[row, column])
    return cells


def cost_of(
    room: Room,
    at: tuple[float, float],
    size: tuple[float, float],
    wished: list[Wish],
    air_mm: float,
    crowd: float,
) -> float:
    """What a place costs, by the words of `Room.best`."""
    astray = min(w.toll + w.across * abs(at[0] - w.at[0]) + w.up * abs(at[1] - w.at[1]) for w in wished)
    grown = size[0] + 2 * air_mm, size[1] + 2 * air_mm
    margin_cells = (grown[0] * grown[1] - size[0] * size[1]) / room.raster.cell_mm**2
    taken = cells_under(room, at, grown)
    return astray + (crowd * taken / margin_cells if taken else 0.0)


@settings(max_examples=60, deadline=None)
@given(st.lists(printed, max_size=4), plates, st.lists(st.tuples(places, sizes), min_size=1, max_size=4))
def test_a_box_more_is_as_if_it_had_been_there_from_the_start(
    items: list[Primitive], plate: Outliner, boxes: list[tuple[tuple[float, float], tuple[float, float]]]
) -> None:
    """Taking boxes out one by one leaves the cells and the sums of the room that was laid with them."""
    given_boxes = [(x - w / 2, y - h / 2, x + w / 2, y + h / 2) for (x, y), (w, h) in boxes]
    early, late = (Room((plate,), cover([layer(items)], plate), 0.5) for _ in range(2))
    assert early.raster.taken.any()
    for box in given_boxes:
        early, late = early.with_box(box), late.with_box(box)
    whole = Room((plate,), cover([layer(items)], plate, given_boxes), 0.5)
    # The one had its raster before the boxes came, the other lays it out only now.
    for room in (early, late):
        assert np.array_equal(room.raster.taken, whole.raster.taken)
        assert np.array_equal(room.raster.sums, whole.raster.sums)


def test_what_is_cut_is_taken_with_all_inside_it() -> None:
    """A hole's middle is not there to be printed on; the same circle as a line of ink has a free middle."""
    plate = Rectangle((-30.0, -30.0, 60.0, 60.0), 0.0)
    ring = Circle((0.0, 0.0), 10.0, CUT)
    cut = Room((plate,), cover([layer([plate.outline(CUT), ring], Purpose.CUT)], plate), 0.5)
    inked = Room((plate,), cover([layer([ring])], plate), 0.5)
    assert not cut.free((0.0, 0.0), 4.0, 4.0)
    assert inked.free((0.0, 0.0), 4.0, 4.0)
    assert cut.free((20.0, 0.0), 4.0, 4.0)


def test_guides_are_neither_ink_nor_cut() -> None:
    """Lettering may stand on a line that only helps to fit the plate."""
    plate = Rectangle((-30.0, -30.0, 60.0, 60.0), 0.0)
    guide = layer([Line((-20.0, 0.0), (20.0, 0.0), CUT)], Purpose.GUIDE)
    assert Room((plate,), cover([guide], plate), 0.5).free((0.0, 0.0), 10.0, 3.0)


@pytest.mark.parametrize("at", [(400.0, 0.0), (-400.0, 0.0), (0.0, 400.0), (0.0, -400.0), (-31.0, -31.0)])
def test_nothing_is_free_off_the_plate(at: tuple[float, float]) -> None:
    """A box that is off the raster altogether, or hangs over its corner, is not free."""
    plate = Rectangle((-30.0, -30.0, 60.0, 60.0), 0.0)
    room = Room((plate,), cover([], plate), 0.5)
    assert not room.free(at, 3.0, 3.0)


def test_a_window_that_misses_the_plate_leaves_no_room() -> None:
    """Where plate and window share nothing, no place is found."""
    plate, window = Rectangle((-30.0, -30.0, 60.0, 60.0), 0.0), Rectangle((50.0, 50.0, 20.0, 20.0), 0.0)
    assert Room((plate, window), cover([], plate), 0.5).best(0.1, 0.1, [Wish((0.0, 0.0))]) is None


@pytest.mark.parametrize("style", [PLAIN, hand(None, strokes=True)], ids=["outline", "strokes"])
@pytest.mark.parametrize("turn_deg", [0.0, 37.0])
def test_the_box_of_lettering_holds_its_ink(style: object, turn_deg: float) -> None:
    """The box is that of the exact ink of upright letters, and never smaller for turned ones."""
    word = letters("10 kΩ", 4.0, (3.0, 2.0), Style(fill=INK), angle_deg=turn_deg, fit=Fit.LINE, hand=style)
    box, ink = letters_box(word), shape(word)
    assert box is not None
    assert ink is not None
    outside = [ink.box[0] - box[0], ink.box[1] - box[1], box[2] - ink.box[2], box[3] - ink.box[3]]
    assert min(outside) > -0.005
    if not turn_deg:
        assert max(outside) < 0.15


def test_a_letter_without_ink_has_no_box() -> None:
    """A space takes no room."""
    assert letters_box(letters(" ", 4.0, (0.0, 0.0), Style(fill=INK))) is None


def test_clearance_of_a_place_found_beside_a_mark() -> None:
    """A box that wants to be where a mark is moves off it, and no farther than two cells need."""
    plate = Rectangle((-30.0, -30.0, 60.0, 60.0), 0.0)
    mark = Line((0.0, -10.0), (0.0, 10.0), stroked(0.4))
    room = Room((plate,), cover([layer([mark])], plate), 0.5)
    found = room.best(4.0, 2.0, [Wish((0.5, 0.0))])
    assert found is not None
    box, ink = shape(box_around(found.at, (4.0, 2.0))), shape(mark)
    assert box is not None
    assert ink is not None
    assert 0 < clearance(box, ink) < 4 * room.raster.cell_mm
