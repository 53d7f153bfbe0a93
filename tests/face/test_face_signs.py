"""Which dial symbols follow from a file, and which claims it must bear out."""

from __future__ import annotations

from pathlib import Path

import pytest

from dialgen.dialfile import DialFile, Source, parse
from dialgen.face.lettered.signs import check_signs, row_choices, sign_remarks, signs
from dialgen.ink import meetings, shape
from dialgen.lettering import PLAIN
from dialgen.symbols import SYMBOLS, example

COIL = 'kind = "moving coil"\ncurrent = "1 mA"\nresistance = "75 ohm"'
IRON = 'kind = "moving iron"\ncurrent = "10 A"'
OTHER = 'kind = "other"\ncurrent = "10 A"'
SHUNT = '{ kind = "shunt", range = "40 A" }'
BOUGHT = '{ kind = "shunt", range = "40 A", rated = "40 A/75 mV" }'
TRANSFORMER = '{ kind = "current transformer", ratio = "200/5" }'
OHMS = '{ kind = "series ohmmeter", half = "1.5 kohm", battery = "1.5 V" }'
SCALE = 'unit = "A"\nfrom = 0\nto = 40\nradius = 40'


def file_of(
    symbols: str, movement: str = COIL, circuit: str = "", scales: tuple[str, ...] = (SCALE,), head: str = ""
) -> DialFile:
    """A dial file with a ``[symbols]`` table."""
    text = f"dialgen = 1\n[dial]\n{head}\n[movement]\n{movement}\nrest = -45\nfull = 45\n"
    text += "".join(
        f"[[scale]]\n{scale}\n" + (f"circuit = {circuit}\n" if circuit else "") for scale in scales
    )
    text += "[plate]\nsize = [100, 80]\npivot = [50, 14]\n"
    text += f"[symbols]\n{symbols}\n" if symbols else ""
    file, _ = parse(Source(name="test.toml", folder=Path(), text=text))
    return file


def names(file: DialFile) -> list[str]:
    """The names of the signs that are shown, each with its parameter."""
    return [f"{sign.symbol.name} {sign.parameter}".strip() for sign in signs(file)]


@pytest.mark.parametrize(
    ("movement", "circuit", "shown"),
    [
        (COIL, "", ["moving coil", "dc"]),
        (COIL, SHUNT, ["moving coil", "dc"]),
        (COIL, BOUGHT, ["moving coil", "dc", "shunt"]),
        (COIL, '{ kind = "multiplier" }', ["moving coil", "dc"]),
        (COIL, OHMS, ["moving coil", "dc"]),
        (COIL, '{ kind = "shunt ohmmeter", half = "75 ohm", battery = "1.5 V" }', ["moving coil", "dc"]),
        (IRON, "", ["moving iron", "ac and dc"]),
        (IRON, SHUNT, ["moving iron", "ac and dc"]),
        (IRON, TRANSFORMER, ["moving iron", "ac"]),
        (COIL, TRANSFORMER, ["moving coil"]),
        (OTHER, "", []),
        (OTHER, TRANSFORMER, []),
    ],
)
def test_auto_follows_from_movement_and_circuit(movement: str, circuit: str, shown: list[str]) -> None:
    """Kind of movement, kind of current and a bought shunt follow; nothing is said of what is not known."""
    assert names(file_of('show = "auto"', movement, circuit)) == shown


def test_no_table_shows_no_symbol() -> None:
    """Symbols are drawn only where the file has a table for them."""
    assert names(file_of("")) == []


def test_an_observed_scale_says_nothing_of_its_current() -> None:
    """What a moving coil was seen to do may have come through a rectifier: its kind of current is unknown."""
    observed = 'law = { kind = "observed", points = [[0, -45], [40, 45]] }'
    assert names(file_of('show = "auto"', scales=(f"{SCALE}\n{observed}",))) == ["moving coil"]


def test_auto_never_claims_a_test_nor_a_class() -> None:
    """A test on file and a class at the scale do not bring out the star or the class by themselves."""
    file = file_of('show = "auto"', scales=(f"{SCALE}\nclass = 1.5",), head="tested = 2026-05-01")
    assert names(file) == ["moving coil", "dc"]


def test_a_list_goes_in_its_own_order_with_auto_where_it_says_so() -> None:
    """Auto stands among others, a symbol named twice is drawn once."""
    file = file_of('show = ["vertical", "auto", "moving coil", "earth terminal", "vertical"]')
    assert names(file) == ["vertical", "dc", "moving coil", "earth terminal"]


def test_what_the_list_says_of_the_current_stands_in_place_of_auto() -> None:
    """A moving iron for alternating current alone is told so, and auto does not contradict it."""
    assert names(file_of('show = ["auto", "ac"]', IRON)) == ["moving iron", "ac"]


def test_each_class_in_the_form_of_its_fiducial_once() -> None:
    """Class symbols have a form for each fiducial value; scales of one class share a symbol."""
    scales = (
        f"{SCALE}\nclass = 1.5",
        f"{SCALE}\nclass = 1.5\nfiducial = 'limit'",
        f"{SCALE}\nclass = 1.5\nfiducial = 'length'",
        f"{SCALE}\nclass = 2.5\nfiducial = 'value'",
        SCALE,
    )
    assert names(file_of('show = ["class"]', scales=scales)) == [
        "class limit 1.5",
        "class length 1.5",
        "class value 2.5",
    ]


def test_a_scale_without_an_end_has_its_class_by_length() -> None:
    """Ohms to infinity have no upper limit, so the class counts from the length of the scale."""
    scale = 'unit = "ohm"\nfrom = 0\nto = inf\nradius = 40\nclass = 2.5'
    assert names(file_of('show = ["class"]', circuit=OHMS, scales=(scale,))) == ["class length 2.5"]


def test_a_class_is_lettered_with_the_decimal_sign_of_its_scale() -> None:
    """A dial with decimal commas has one in its class as well."""
    scales = (f"{SCALE}\nclass = 1.5\nlook = {{ decimal = 'comma' }}",)
    assert names(file_of('show = ["class"]', scales=scales)) == ["class limit 1,5"]


@pytest.mark.parametrize("star", ["test 500 V", "test 2 kV"])
def test_a_star_needs_the_date_of_its_test(star: str) -> None:
    """A star claims a test; without its date on file it is refused at its place in the list."""
    (error,) = check_signs(file_of(f'show = ["auto", "{star}"]'))
    assert error.keys == (("symbols", "show", 1), ("dial", "tested"))
    assert "tested = " in error.message
    assert not list(check_signs(file_of(f'show = ["auto", "{star}"]', head="tested = 2026-05-01")))


def test_the_star_of_no_test_needs_none() -> None:
    """Saying that the insulation was not tested claims nothing."""
    assert not list(check_signs(file_of('show = ["not tested"]')))


def test_class_needs_a_scale_with_one() -> None:
    """A class to be shown is read from the scales; without any there is nothing to show."""
    (error,) = check_signs(file_of('show = ["class"]'))
    assert error.keys == (("symbols", "show", 0), ("scale", 0, "class"))
    assert not list(check_signs(file_of('show = ["class"]', scales=(f"{SCALE}\nclass = 1",))))


def test_a_class_that_is_marked_gives_a_warning() -> None:
    """Marking a class is a claim: it is warned of at its place, one that is only given is not."""
    scales = (f"{SCALE}\nclass = 1", f"{SCALE}\nclass = 2.5")
    (remark,) = sign_remarks(file_of('show = ["auto", "class"]', scales=scales))
    assert remark.key == ("symbols", "show", 1)
    assert "class 1 and 2.5" in remark.message
    assert not list(sign_remarks(file_of('show = "auto"', scales=scales)))


@pytest.mark.parametrize("choice", [0, 1], ids=["one row", "two rows"])
@pytest.mark.parametrize("share", [1.0, 0.7])
def test_signs_of_a_row_stand_apart_within_its_box(choice: int, share: float) -> None:
    """Every symbol there is, in a row: exact inks do not touch each other, nor leave the row's box."""
    shown = [example(symbol) for symbol in SYMBOLS]
    form = row_choices(shown, 4.0, "#000000", PLAIN)[choice].make()
    drawn = form.scaled(share).draw((3.0, -2.0), 1.0)
    inks = [ink for item in drawn if (ink := shape(item))]
    left, bottom, right, top = (
        pick(ink.box[side] for ink in inks) for side, pick in enumerate((min, min, max, max))
    )
    slack = 1e-6
    assert left >= 3.0 - share * form.width_mm / 2 - slack
    assert right <= 3.0 + share * form.width_mm / 2 + slack
    assert bottom >= -2.0 - share * form.height_mm / 2 - slack
    assert top <= -2.0 + share * form.height_mm / 2 + slack
    assert right - left > 0.95 * share * form.width_mm


def test_signs_of_a_row_do_not_touch() -> None:
    """Each sign of a row is clear of all others, whatever strokes it is made of."""
    shown = [example(symbol) for symbol in SYMBOLS]
    alone = [
        len(row_choices([sign], 4.0, "#000000", PLAIN)[0].make().draw((0.0, 0.0), 1.0)) for sign in shown
    ]
    drawn = row_choices(shown, 4.0, "#000000", PLAIN)[0].make().draw((0.0, 0.0), 1.0)
    owner = [number for number, count in enumerate(alone) for _ in range(count)]
    inks = [shape(item) for item in drawn]
    assert len(owner) == len(inks)
    apart = [[one != other for other in range(len(shown))] for one in range(len(shown))]
    assert not meetings([ink for ink in inks if ink], owner, apart)
