"""Numerals where they stand, with shapely as the referee: clear of marks, hung, on the plate, row by row."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace

import numpy as np
import pytest
from hypothesis import example, given, settings
from hypothesis import strategies as st
from laid_scales import Laid, ink, laid
from shapely import LineString, MultiPoint, Point, affinity, box

from dialgen.face.inked.numerals import ROW_SPACE, Numeral, numerals
from dialgen.face.plate import outliner
from dialgen.lettering import measure
from dialgen.looks import LOOKS

TRUE_MM, TRUE_CAPS, ROWS_TRUE_CAPS = 0.03, 0.01, 0.015
"""How true distances are: in millimetres, or in heights of a large numeral; between rows in heights."""
EDGE_MM = 0.8
LARGE = "size = [600, 600]\npivot = [300, 300]"
ALONG_ARCS = ("upright", "along")

VALUES = {
    "amperes": "from = 0\nto = 40",
    "centre zero": "from = -40\nto = 40",
    "tenths": "from = -0.3\nto = 0.3",
    "narrow and wide": "from = 0\nto = 1111\nnumbered = [0, 1, 71, 400, 1111]",
    "thousands": "from = 0\nto = 12000",
    "words": 'from = 0\nto = 4\nnumbered = [{ at = 0, label = "OFF" }, 1, { at = 3, label = "½" }, 4]',
}
OHMS = 'from = 0\nto = inf\ncircuit = { kind = "series ohmmeter", half = "15 kohm" }'
COIL = 'current = "1 mA"\nresistance = "75 ohm"'


def dial(
    values: str = VALUES["amperes"],
    *,
    ends: tuple[float, float] = (-45.0, 45.0),
    line: str = "radius = 44.0",
    style: str = "plain",
    look: str = "",
    side: str = "outside",
    marks: str = "outward",
    keys: str = "",
    plate: str = LARGE,
) -> str:
    """A dial file of one scale whose lowest value stands at the first end."""
    unit, circuit = ("kohm", "") if "ohmmeter" in values else ("", f"circuit = {_direct(values)}")
    return (
        f"dialgen = 1\n[movement]\n{COIL}\nrest = {ends[0]}\nfull = {ends[1]}\n"
        f'[look]\nstyle = "{style}"\n{look}\n[plate]\n{plate}\n'
        f'[[scale]]\nunit = "{unit}"\n{values}\n{line}\nmarks = "{marks}"\nnumerals = "{side}"\n'
        f"{circuit}\n{keys}\n"
    )


def _direct(values: str) -> str:
    start = values.partition("from = ")[2].partition("\n")[0]
    return f'{{ kind = "direct", rest = {start} }}'


@dataclass(frozen=True)
class Stood:
    """A numeral, and how far its ink is from the end of its own mark, corners and all, and from others.

    ``others_mm`` is from the middles of the ends of all other marks, ``any_mm`` from that of its own too.
    """

    numeral: Numeral
    own_mm: float
    others_mm: float
    any_mm: float


def true_mm(made: Laid) -> float:
    """How true the distance from a mark is to be: a little more for the large numerals of large scales."""
    return max(TRUE_MM, TRUE_CAPS * made.scale.sizes.numeral_mm)


def ends_of(made: Laid) -> dict[float, Point]:
    """Where every mark ends on the side of the numerals: where its ray meets the line moved that far."""
    scale = made.scale
    sign = 1 if scale.spec.numerals == "outside" else -1
    share = {"outward": max(sign, 0), "inward": min(sign, 0), "across": sign / 2}[scale.spec.marks]
    found = {}
    for mark in scale.marks:
        moved_mm = share * scale.sizes.length_mm(mark.rank)
        found[mark.value] = Point(_crossing(scale.spec, mark, moved_mm))
    return found


def _crossing(spec, mark, moved_mm: float) -> tuple[float, float]:
    """Where a mark crosses the scale line moved away from the pivot: by the quadratic, or by height."""
    (x, y), (ux, uy) = (mark.x, mark.y), mark.direction
    if spec.line is not None:
        (x1, y1), (x2, y2) = spec.line
        nx, ny = (y1 - y2) / math.dist(*spec.line), (x2 - x1) / math.dist(*spec.line)
        sign = math.copysign(1, nx * x1 + ny * y1)
        t = sign * moved_mm / (ux * nx + uy * ny)
        return x + t * ux, y + t * uy
    cx, cy = spec.centre or (0.0, 0.0)
    radius_mm = spec.radius + moved_mm
    along = ux * cx + uy * cy
    t = along + math.sqrt(along**2 - cx**2 - cy**2 + radius_mm**2)
    return t * ux, t * uy


def stood(made: Laid, found: tuple[Numeral, ...] | None = None) -> list[Stood]:
    """The numerals of the first row, each with its distances."""
    scale, ends = made.scale, ends_of(made)
    half_mm = scale.sizes.numbered_width_mm / 2
    stood = []
    for numeral in found or drawn(made):
        if numeral.row:
            continue
        shape, (ux, uy) = ink(numeral.letters), numeral.mark.direction
        end = ends[numeral.mark.value]
        edge = LineString(
            [(end.x - half_mm * uy, end.y + half_mm * ux), (end.x + half_mm * uy, end.y - half_mm * ux)]
        )
        others = MultiPoint([point for value, point in ends.items() if value != numeral.mark.value])
        others_mm = shape.distance(others)
        stood.append(Stood(numeral, shape.distance(edge), others_mm, min(others_mm, shape.distance(end))))
    return stood


def drawn(made: Laid) -> tuple[Numeral, ...]:
    """The numerals of a scale."""
    return numerals(made.scale, outliner(made.dial.file.plate))


def assert_evenly_clear(made: Laid, found: list[Stood]) -> None:
    """Every numeral is as far from its mark as the sizes say, unless the end of another holds it off."""
    space_mm, off_mm = made.scale.sizes.space_mm, true_mm(made)
    for one in found:
        assert one.own_mm > space_mm - off_mm, one.numeral.letters.text
        assert one.others_mm > 0.5 * space_mm, one.numeral.letters.text
        held = one.others_mm < 0.75 * space_mm
        assert held or one.own_mm < space_mm + off_mm, one.numeral.letters.text


@st.composite
def arcs(draw: st.DrawFn, turns: tuple[str, ...] = ALONG_ARCS) -> str:
    """A dial of an arc of 60 to 300 degrees about the pivot, dressed in any way."""
    half_deg = draw(st.floats(30, 150))
    side, marks = draw(
        st.sampled_from(
            (
                ("outside", "outward"),
                ("inside", "inward"),
                ("inside", "outward"),
                ("outside", "across"),
                ("inside", "across"),
            )
        )
    )
    decimal = draw(st.sampled_from(("point", "comma")))
    return dial(
        draw(st.sampled_from((*VALUES.values(), OHMS))),
        ends=draw(st.sampled_from(((-half_deg, half_deg), (half_deg, -half_deg)))),
        line=f"radius = {draw(st.floats(20, 110)):.2f}",
        style=draw(st.sampled_from(sorted(LOOKS))),
        look=f'turn = "{draw(st.sampled_from(turns))}"\ndecimal = "{decimal}"',
        side=side,
        marks=marks,
        keys=draw(st.sampled_from(("", 'sign = "always"'))),
    )


# ---------------------------------------------------------------- clear of the marks


@settings(max_examples=120, deadline=None)
@given(arcs())
def test_the_space_between_numeral_and_mark_is_even_along_any_arc(text: str) -> None:
    """Ink stands one distance from the end of its mark all along, whatever it says and whichever way."""
    made = laid(text)
    assert_evenly_clear(made, stood(made))


@pytest.mark.parametrize("style", sorted(LOOKS))
@pytest.mark.parametrize("turn", ALONG_ARCS)
def test_wide_and_narrow_numerals_are_equally_clear(style: str, turn: str) -> None:
    """From a 1 to four digits and a sign with a point, no numeral is nearer or farther, with no exception."""
    values = "from = -200\nto = 2000\nnumbered = [-200, 1, 300.25, 700, 1111, 1600, 2000]"
    made = laid(dial(values, ends=(-80, 80), line="radius = 70", style=style, look=f'turn = "{turn}"'))
    found = stood(made)
    assert len(found) == 7
    assert [one.own_mm for one in found] == pytest.approx([made.scale.sizes.space_mm] * 7, abs=TRUE_MM)


@pytest.mark.parametrize("centre", [(10, 0), (0, -20), (15, 10), (-15, -25)])
@pytest.mark.parametrize("side", ["outside", "inside"])
def test_the_space_is_even_on_an_arc_about_another_centre(centre: tuple[float, float], side: str) -> None:
    """Where marks lean against the arc the numerals are as far from their ends as elsewhere."""
    line = f"radius = 50\ncentre = [{centre[0]}, {centre[1]}]"
    made = laid(dial(VALUES["centre zero"], line=line, side=side))
    assert_evenly_clear(made, stood(made))


def assert_one_baseline(made: Laid, found: list[Stood], heights_mm: list[float]) -> None:
    """All stand equally high above the line, and the one that is nearest to its mark sets the height."""
    space_mm = made.scale.sizes.space_mm
    assert heights_mm == pytest.approx([heights_mm[0]] * len(heights_mm), abs=1e-6)
    nearest_mm = min(one.own_mm for one in found)
    held = min(one.others_mm for one in found) < 0.75 * space_mm
    assert nearest_mm > space_mm - true_mm(made)
    assert held or nearest_mm < space_mm + true_mm(made)
    assert min(one.others_mm for one in found) > 0.5 * space_mm


@settings(max_examples=60, deadline=None)
@given(arcs(("across",)))
def test_numerals_across_the_pointer_share_a_baseline(text: str) -> None:
    """Their middles lie on one circle about the pivot, as near to the marks as the nearest of them may be."""
    made = laid(text)
    found = stood(made)
    heights = []
    for one in found:
        spot = one.numeral.letters.glyphs[0]
        # Half a capital up from the first letter's origin, square to the line of writing.
        turn = math.radians(spot.angle_deg)
        half_mm = made.scale.sizes.numeral_mm / 2
        x, y = spot.x + half_mm * math.sin(turn), spot.y + half_mm * math.cos(turn)
        ux, uy = one.numeral.mark.direction
        heights.append(x * ux + y * uy)
    assert_one_baseline(made, found, heights)


STRAIGHT = {
    "level": ((-40.0, 40.0), "line = [[-46, 55], [46, 55]]\nsquare = true"),
    "level, to the left": ((40.0, -40.0), "line = [[-46, 55], [46, 55]]\nsquare = true"),
    "laid flat": ((-40.0, 40.0), "line = [[-46, 55], [46, 55]]\ncurve = 60"),
    "under the pivot": ((140.0, 220.0), "line = [[-46, -55], [46, -55]]\nsquare = true"),
}
UPRIGHT = "line = [[55, -40], [55, 40]]\nsquare = true"


@pytest.mark.parametrize("style", sorted(LOOKS))
@pytest.mark.parametrize("side", ["outside", "inside"])
@pytest.mark.parametrize("name", sorted(STRAIGHT))
def test_numerals_along_a_straight_line_share_a_baseline(name: str, side: str, style: str) -> None:
    """All stand equally high, and the least space between one and the end of its mark is that wanted."""
    ends, line = STRAIGHT[name]
    made = laid(dial(VALUES["centre zero"], ends=ends, line=line, side=side, style=style))
    found = stood(made)
    assert_one_baseline(made, found, [one.numeral.letters.glyphs[0].y for one in found])


@pytest.mark.parametrize("side", ["outside", "inside"])
def test_numerals_beside_an_upright_line_share_a_column(side: str) -> None:
    """Their digits have their middles above each other, and the widest sets how far that is off."""
    made = laid(dial(VALUES["centre zero"], ends=(60, 120), line=UPRIGHT, side=side))
    found = stood(made)
    middles = [digits_middle_mm(one.numeral) for one in found]
    assert middles == pytest.approx([middles[0]] * len(found), abs=0.02)
    assert min(one.own_mm for one in found) == pytest.approx(made.scale.sizes.space_mm, abs=TRUE_MM)


@pytest.mark.parametrize("half_deg", [15, 30, 45])
@pytest.mark.parametrize("side", ["outside", "inside"])
def test_marks_that_lean_against_a_straight_line_are_cleared_but_for_their_corners(
    half_deg: float, side: str
) -> None:
    """Along the pointer a mark's corner rises over its end by half its width times the sine of its lean."""
    reach = 40 * math.tan(math.radians(half_deg))
    line = f"line = [[{-reach}, 40], [{reach}, 40]]"
    made = laid(dial(VALUES["centre zero"], ends=(-half_deg, half_deg), line=line, side=side))
    corner_mm = made.scale.sizes.numbered_width_mm / 2 * math.sin(math.radians(half_deg))
    assert min(one.own_mm for one in stood(made)) > made.scale.sizes.space_mm - corner_mm - TRUE_MM


def test_the_referee_tells_a_numeral_out_of_place() -> None:
    """The same assertion finds a numeral 0.05 mm too near its mark, and one as much too far."""
    made = laid(dial(VALUES["centre zero"]))
    found = drawn(made)
    assert_evenly_clear(made, stood(made, found))
    for moved_mm in (-0.05, 0.05):
        first, *others = found
        ux, uy = first.mark.direction
        spots = [
            replace(spot, x=spot.x + moved_mm * ux, y=spot.y + moved_mm * uy) for spot in first.letters.glyphs
        ]
        spoiled = first._replace(letters=replace(first.letters, glyphs=tuple(spots)))
        with pytest.raises(AssertionError):
            assert_evenly_clear(made, stood(made, (spoiled, *others)))


def test_a_blank_label_leaves_a_mark_without_a_numeral() -> None:
    """A label of spaces draws nothing, wherever it stands, and moves no other numeral."""
    plain = stood(laid(dial("from = 0\nto = 40\nnumbered = [0, 20]")))
    for blank in ('[0, 20, { at = 40, label = " " }]', '[0, { at = 10, label = "\u00a0" }, 20]'):
        found = stood(laid(dial(f"from = 0\nto = 40\nnumbered = {blank}")))
        assert [one.numeral.letters for one in found] == [one.numeral.letters for one in plain]


# ---------------------------------------------------------------- middles and turns


def digits_middle_mm(numeral: Numeral) -> float:
    """The middle of a numeral's ink without its sign, in the direction of writing."""
    word = numeral.letters
    if word.text[0] in "−+" and len(word.text) > 1:
        word = replace(word, glyphs=word.glyphs[1:])
    level = affinity.rotate(ink(word), word.glyphs[0].angle_deg, origin=(0, 0))
    left, _, right, _ = level.bounds
    return (left + right) / 2


@settings(max_examples=80, deadline=None)
@given(arcs(("upright", "across")))
def test_digits_stand_centred_on_the_pointer_with_their_sign_hung_beside_them(text: str) -> None:
    """The pointer's ray goes through the middle of the digits, as if the minus or plus were not there."""
    made = laid(text)
    for numeral in drawn(made):
        if numeral.letters.text.startswith("+") and numeral.mark.direction[0] > 0.29:
            continue  # there the plus would hang over the scale, and stands with its digits instead
        spot = numeral.letters.glyphs[-1]
        turn = math.radians(spot.angle_deg)
        # In the numeral's own frame, turned back: its base line, and half a capital above it.
        base = spot.y * math.cos(turn) + spot.x * math.sin(turn)
        x, y = digits_middle_mm(numeral), base + made.scale.sizes.numeral_mm / 2
        pointer = math.radians(numeral.mark.angle_deg) - turn
        assert abs(x * math.cos(pointer) - y * math.sin(pointer)) < 0.02, numeral.letters.text


@settings(max_examples=60, deadline=None)
@given(arcs(("along", "across")))
def test_no_numeral_is_read_upside_down(text: str) -> None:
    """Along the pointer none is turned past a quarter, across it a few degrees past at most."""
    made = laid(text)
    most_deg = 90 if 'turn = "along"' in text else 100
    for numeral in drawn(made):
        angle_deg = numeral.letters.glyphs[0].angle_deg
        assert abs(angle_deg) <= most_deg + 1e-9
        askew = (angle_deg - numeral.mark.angle_deg) % 180
        assert min(askew, 180 - askew) == pytest.approx(90 if most_deg == 90 else 0, abs=1e-6)


def test_both_ends_of_a_half_circle_are_turned_alike() -> None:
    """Across the pointer the numerals at ±90 degrees, and a little beyond, all face the same way."""
    made = laid(dial(VALUES["amperes"], ends=(-95, 95), look='turn = "across"'))
    angles = [numeral.letters.glyphs[0].angle_deg for numeral in drawn(made)]
    assert angles == pytest.approx([numeral.mark.angle_deg for numeral in drawn(made)])


def test_upright_numerals_are_upright() -> None:
    """The ordinary numeral is not turned at all."""
    made = laid(dial(VALUES["amperes"], ends=(-150, 150)))
    assert {numeral.letters.glyphs[0].angle_deg for numeral in drawn(made)} == {0.0}


# ---------------------------------------------------------------- on the plate


@st.composite
def tight_dials(draw: st.DrawFn) -> str:
    """A dial whose plate ends near the ends of its outermost marks."""
    half_deg, radius_mm = draw(st.floats(30, 150)), draw(st.floats(25, 100))
    side, marks = draw(st.sampled_from((("outside", "outward"), ("inside", "inward"))))
    reach = radius_mm + (2 + 0.07 * radius_mm if side == "outside" else 0.5)
    wide = reach * math.sin(math.radians(min(half_deg, 90))) + draw(st.floats(0.2, 6))
    low = 5 + max(0.0, -reach * math.cos(math.radians(half_deg))) + draw(st.floats(0.2, 6))
    high = reach + draw(st.floats(3, 20))
    return dial(
        draw(st.sampled_from(tuple(VALUES.values()))),
        ends=(-half_deg, half_deg),
        line=f"radius = {radius_mm:.2f}",
        style=draw(st.sampled_from(sorted(LOOKS))),
        side=side,
        marks=marks,
        keys=draw(st.sampled_from(("", 'sign = "always"'))),
        plate=f"size = [{2 * wide:.2f}, {low + high:.2f}]\npivot = [{wide:.2f}, {low:.2f}]",
    )


def plate_of(made: Laid):
    """The plate as a shapely figure."""
    left, bottom, width, height = outliner(made.dial.file.plate).box
    return box(left, bottom, left + width, bottom + height)


def ways_along(numeral: Numeral, longest_mm: float) -> list[tuple[float, float]]:
    """Ways along the scale, right and up, as far as a numeral of that length may be slid."""
    most_mm, (ux, uy) = longest_mm + 2 * EDGE_MM - 0.2, numeral.mark.direction
    return [(t * uy, -t * ux) for t in np.arange(-most_mm, most_mm, 0.05).tolist()]


@settings(max_examples=100, deadline=None)
@given(tight_dials())
def test_no_numeral_leaves_the_plate_where_it_has_room_to_slide(text: str) -> None:
    """A numeral over the edge is one that no slide by its own length along the scale could bring back."""
    made = laid(text)
    plate = plate_of(made)
    for numeral in drawn(made):
        shape = ink(numeral.letters)
        if plate.covers(shape):
            continue
        x1, y1, x2, y2 = shape.bounds
        # A tenth is left for the steps in which it is slid.
        rim = box(x1, y1, x2, y2).buffer(EDGE_MM + 0.1, join_style="mitre")
        ways = ways_along(numeral, max(x2 - x1, y2 - y1))
        assert not any(plate.covers(affinity.translate(rim, *way)) for way in ways), numeral.letters.text


WIDE_INSIDE = dial(
    "from = 0\nto = 12000\nnumbered = { every = 2000 }",
    ends=(-30, 30),
    line="radius = 60",
    style="night",
    side="inside",
    marks="inward",
    keys='sign = "always"',
    plate="size = [61, 85]\npivot = [30.5, 15]",
)
"""A flat arc on a narrow plate, whose last numeral is wide."""


@settings(max_examples=100, deadline=None)
@given(tight_dials())
@example(WIDE_INSIDE)
def test_a_numeral_slid_back_onto_the_plate_stays_clear_of_the_marks(text: str) -> None:
    """One nearer than half the usual space to a mark's end has no clear place on the plate to slide to."""
    made = laid(text)
    space_mm, ends = made.scale.sizes.space_mm, MultiPoint(list(ends_of(made).values()))
    plate = plate_of(made)
    for one in stood(made):
        if one.any_mm > 0.5 * space_mm:
            continue
        x1, y1, x2, y2 = ink(one.numeral.letters).bounds
        for right, up in ways_along(one.numeral, max(x2 - x1, y2 - y1)):
            there = box(x1 + right, y1 + up, x2 + right, y2 + up)
            fits = plate.covers(there.buffer(EDGE_MM + 0.1, join_style="mitre"))
            # The program asks for the pen's width besides, in single strokes.
            assert not fits or there.distance(ends) < space_mm + 0.2, one.numeral.letters.text


def test_end_numerals_slide_inwards_and_the_others_stand() -> None:
    """On a plate just wide enough for its marks the two end numerals move inwards, the others nowhere."""
    values = "from = 1000\nto = 5000\nnumbered = [1000, 2000, 3000, 4000, 5000]"
    free, tight = (
        [numeral.letters.glyphs[0] for numeral in drawn(laid(dial(values, ends=(-30, 30), plate=plate)))]
        for plate in (LARGE, "size = [54, 70]\npivot = [27, 15]")
    )
    assert [one == other for one, other in zip(free, tight, strict=True)] == [False, True, True, True, False]
    # Along the scale: square to the pointer, which stands at 30 degrees to either side.
    for number, sign in ((0, 1), (-1, -1)):
        right = tight[number].x - free[number].x
        assert sign * right > 0
        assert tight[number].y - free[number].y == pytest.approx(sign * right * math.tan(math.radians(30)))


# ---------------------------------------------------------------- further rows


@st.composite
def rowed_dials(draw: st.DrawFn) -> str:
    """A dial with two or three rows of numerals, on one side of its line or on both."""
    half_deg, side = draw(st.floats(30, 150)), draw(st.sampled_from(("outside", "inside")))
    own = draw(st.sampled_from(("", ', numerals = "inside"', ', numerals = "outside"')))
    rows = draw(st.sampled_from(("{ times = 5 }", "{ times = 0.1 }, { times = 30 }")))
    return dial(
        draw(st.sampled_from((VALUES["amperes"], VALUES["centre zero"], VALUES["tenths"]))),
        ends=(-half_deg, half_deg),
        line=f"radius = {draw(st.floats(30, 110)):.2f}",
        style=draw(st.sampled_from(sorted(LOOKS))),
        look=f'turn = "{draw(st.sampled_from(("upright", "along", "across")))}"',
        side=side,
        keys=f"also = [{rows.replace(' }', own + ' }', 1)}]",
    )


def pairs_of_rows(made: Laid) -> list[tuple[Numeral, Numeral]]:
    """Each numeral of a further row with that of the row before it on its side, at the same mark."""
    sides = [made.scale.spec.numerals]
    for row in made.scale.spec.also:
        sides.append(row.numerals or sides[-1])
    found = {(one.mark.value, one.row): one for one in drawn(made)}
    pairs = []
    for (value, number), numeral in found.items():
        before = [row for row in range(number) if sides[row] == sides[number] and (value, row) in found]
        if before:
            pairs.append((found[value, before[-1]], numeral))
    return pairs


def clear_by(made: Laid, one: Numeral, other: Numeral, back_mm: float = 0.0) -> float:
    """By how much a row's numeral, moved back towards the line, is clear of that before it; below zero not.

    It needs the space between rows, and to be above the other or the width of a 0 beside it.
    """
    scale, turn_deg = made.scale, other.letters.glyphs[0].angle_deg
    (ux, uy), outside = other.mark.direction, made.scale.spec.numerals == "outside"
    away_mm = -back_mm if outside else back_mm
    inks = ink(one.letters), affinity.translate(ink(other.letters), away_mm * ux, away_mm * uy)
    (l1, b1, r1, t1), (l2, b2, r2, t2) = (affinity.rotate(i, turn_deg, origin=(0, 0)).bounds for i in inks)
    figure_mm = measure("0", scale.sizes.numeral_mm, hand=scale.hand).width_mm
    apart = max(l2 - r1 - figure_mm, l1 - r2 - figure_mm, b2 - t1, b1 - t2)
    return min(apart, inks[0].distance(inks[1]) - ROW_SPACE * scale.sizes.space_mm)


@settings(max_examples=80, deadline=None)
@given(rowed_dials())
def test_each_row_is_clear_of_the_one_before_it(text: str) -> None:
    """At every mark a row's ink keeps the space between rows, above that before or well beside it."""
    made = laid(text)
    off_mm = ROWS_TRUE_CAPS * made.scale.sizes.numeral_mm
    clear = [clear_by(made, *pair) for pair in pairs_of_rows(made)]
    assert min(clear, default=0.0) > -off_mm


@settings(max_examples=80, deadline=None)
@given(rowed_dials())
def test_no_row_stands_farther_off_than_it_must(text: str) -> None:
    """Moved back by little more than what is true, no numeral is clear; across the pointer, not all are."""
    made = laid(text)
    if "numerals = " in text.partition("also")[2]:
        return  # a row on the other side starts from the marks, and moves the other way
    back_mm = 2 * ROWS_TRUE_CAPS * made.scale.sizes.numeral_mm
    clear = [clear_by(made, *pair, back_mm) for pair in pairs_of_rows(made)]
    assert (min if 'turn = "across"' in text else max)(clear, default=-1.0) < 0


@pytest.mark.parametrize("half_deg", [45, 60, 75, 90, 120])
@pytest.mark.parametrize("side", ["outside", "inside"])
def test_rows_of_one_figure_never_read_as_one_number(half_deg: float, side: str) -> None:
    """A 1 and a 5 at the end of a wide arc are above each other, or a figure's width apart."""
    keys = "also = [{ times = 5 }]"
    made = laid(dial("from = 0\nto = 1\nnumbered = [0, 1]", ends=(-half_deg, half_deg), side=side, keys=keys))
    ((one, five),) = pairs_of_rows(made)
    assert (one.letters.text, five.letters.text) == ("1", "5")
    (l1, b1, r1, t1), (l2, b2, r2, t2) = ink(one.letters).bounds, ink(five.letters).bounds
    # A figure is at least four tenths of its height wide in any hand that is legible.
    assert max(b2 - t1, b1 - t2) > -TRUE_MM or max(l2 - r1, l1 - r2) > 0.4 * (t2 - b2)


def test_rows_say_their_own_multiples_and_zero_once() -> None:
    """Each further row letters the value times its factor; where all rows say the same, one is enough."""
    keys = 'also = [{ times = 5 }, { times = 0.5, numerals = "inside" }]'
    found = drawn(laid(dial("from = 0\nto = 40\nnumbered = { every = 10 }", keys=keys)))
    said = {row: [n.letters.text for n in found if n.row == row] for row in range(3)}
    assert said == {
        0: ["0", "10", "20", "30", "40"],
        1: ["50", "100", "150", "200"],
        2: ["5", "10", "15", "20"],
    }


def test_a_row_on_the_other_side_keeps_clear_of_the_marks_there() -> None:
    """A second row inside stands as far from the inner ends of the marks as the first from the outer."""
    made = laid(dial("from = 10\nto = 40", keys='also = [{ times = 5, numerals = "inside" }]'))
    space_mm, radius_mm = made.scale.sizes.space_mm, made.scale.spec.radius
    inner = [numeral for numeral in drawn(made) if numeral.row == 1]
    assert len(inner) >= 4
    for numeral in inner:
        half_mm, (ux, uy) = made.scale.sizes.numbered_width_mm / 2, numeral.mark.direction
        foot = LineString(
            [(radius_mm * ux + s * half_mm * uy, radius_mm * uy - s * half_mm * ux) for s in (-1, 1)]
        )
        assert ink(numeral.letters).distance(foot) == pytest.approx(space_mm, abs=TRUE_MM)
