"""What the keys of looks, rows, classes, zones, symbols and openings are read as."""

from __future__ import annotations

import math
import shutil
from dataclasses import fields, replace
from datetime import date
from importlib.util import find_spec
from pathlib import Path

import dialfile_samples as samples
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

import dialgen
from dialgen.circuit.multiplier import Multiplier
from dialgen.dialfile import DialFile, Source, parse
from dialgen.dialfile.looks import look_of
from dialgen.dialfile.models import Fiducial, Limit, Mirror, Slot, Symbols, Zone
from dialgen.errors import DialFileError
from dialgen.looks import COLOURS, LOOKS, Decimal, End, Lettering, LineForm, Look, MarkShape, Outside, Turn
from dialgen.symbols import Sign

SCALE = '[[scale]]\nunit = "V"\nfrom = 0\nto = 10\nradius = 44\n'
FONT = Path(find_spec("matplotlib").submodule_search_locations[0]) / "mpl-data/fonts/ttf/DejaVuSans.ttf"


def read(
    text: str = "", *, scale: str = "", plate: str = "", head: str = "", folder: Path = Path()
) -> DialFile:
    """A dial file with some keys more in its scale, its plate and its head, and other tables behind."""
    whole = (
        f"dialgen = 1\n[dial]\n{head}\n[movement]\nrest = -44\nfull = 44\n"
        f"[plate]\nsize = [84, 64]\npivot = [42, 12]\n{plate}\n{SCALE}{scale}\n{text}\n"
    )
    file, _ = parse(Source(name="dial.toml", folder=folder, text=whole))
    return file


def look(file: DialFile, number: int = 1) -> Look:
    """The look of a scale."""
    return look_of(file.look, file.scale[number - 1].look)


# ---------------------------------------------------------------- looks

LOOK_KEYS = {
    "ink": ('"red"', COLOURS["red"]),
    "ground": ('"#FaFbFc"', "#fafbfc"),
    "accent": ('"blue"', COLOURS["blue"]),
    "line": ('"double"', LineForm.DOUBLE),
    "blocks": ("true", True),
    "mark_shape": ('"taper"', MarkShape.TAPER),
    "mark_ends": ('"round"', End.ROUND),
    "outside": ('"none"', Outside.NONE),
    "turn": ('"across"', Turn.ACROSS),
    "lettering": ('"single stroke"', Lettering.STROKE),
    "font": ('"letters.ttf"', Path("letters.ttf")),
    "decimal": ('"comma"', Decimal.COMMA),
    "thousands": ("false", False),
    "fold": ("false", False),
    "letter_scale": ("1.25", 1.25),
    "length_scale": ("0.2", 0.2),
    "weight_scale": ("5", 5.0),
    "distance": ('"0.7 m"', 700.0),
    "numeral": ("3.5", 3.5),
    "unit": ('"5 mm"', 5.0),
    "numbered": ("6", 6.0),
    "middle": ("4.5", 4.5),
    "fine": ('"0.3 cm"', 3.0),
    "numbered_width": ("0.6", 0.6),
    "middle_width": ("0.4", 0.4),
    "fine_width": ('"200 um"', 0.2),
    "line_width": ("0.25", 0.25),
    "space": ("1.1", 1.1),
}
"""Every value of a look as it is written, and as it is read."""


def test_every_value_of_a_look_is_tried() -> None:
    """The table above leaves out no field, so a new one asks for a row."""
    assert list(LOOK_KEYS) == [field.name for field in fields(Look)]


@pytest.mark.parametrize("key", LOOK_KEYS)
def test_a_key_of_the_look_changes_that_value_alone(key: str, tmp_path: Path) -> None:
    """Each value can be changed in any look, for the whole dial or for one scale, and no other moves."""
    shutil.copy(FONT, tmp_path / "letters.ttf")
    written, value = LOOK_KEYS[key]
    value = tmp_path / value if key == "font" else value
    common = read(f'[look]\nstyle = "night"\n{key} = {written}', folder=tmp_path)
    own = read(scale=f'look = {{ style = "night", {key} = {written} }}', folder=tmp_path)
    assert look(common) == look(own) == replace(LOOKS["night"], **{key: value})


@pytest.mark.parametrize("name", sorted(LOOKS))
def test_a_look_goes_by_its_name(name: str) -> None:
    """A name alone stands for the table with that style, in the file as at a scale."""
    assert look(read(f'[look]\nstyle = "{name}"')) == LOOKS[name]
    assert look(read(scale=f'look = "{name}"')) == LOOKS[name]


def test_the_plain_look_is_the_default() -> None:
    """Without a word of looks every scale is plain; a changed value changes nothing else."""
    assert look(read()) == LOOKS["plain"] == Look()
    assert look(read("[look]\nline = 'none'")) == Look(line=LineForm.NONE)


def test_the_look_of_a_scale_goes_over_that_of_the_dial() -> None:
    """Own style before the common one, then the common changes, then the scale's own."""
    common = '[look]\nstyle = "bench"\nink = "blue"\nletter_scale = 1.5\n'
    own = 'look = { style = "night", letter_scale = 2 }'
    file = read(SCALE + common, scale=own)
    assert look(file, 1) == replace(LOOKS["night"], ink=COLOURS["blue"], letter_scale=2.0)
    assert look(file, 2) == replace(LOOKS["bench"], ink=COLOURS["blue"], letter_scale=1.5)


numbers = st.floats(0.2, 5.0)
lengths = st.floats(0.01, 2000.0)
changes = st.fixed_dictionaries(
    {},
    optional={
        "ink": st.sampled_from(sorted(COLOURS)),
        "ground": st.from_regex(r"\A#[0-9a-f]{6}\Z"),
        "line": st.sampled_from([str(form) for form in LineForm]),
        "turn": st.sampled_from([str(turn) for turn in Turn]),
        "blocks": st.booleans(),
        "letter_scale": numbers,
        "weight_scale": numbers,
        "distance": st.floats(50.0, 2000.0),
        "numeral": lengths,
        "fine_width": lengths,
    },
)


@settings(max_examples=100, deadline=None)
@given(st.sampled_from(sorted(LOOKS)), changes, changes)
def test_any_look_is_read_as_it_is_written(style: str, common: dict, own: dict) -> None:
    """Whatever is changed in a named look, in the file and at the scale, no more and no less is changed."""
    file = read(
        "[look]\n" + samples.toml({"style": style, **common}),
        scale=samples.toml({"look": own} if own else {}),
    )
    wanted = {
        key: COLOURS.get(value, value) if isinstance(value, str) else value
        for key, value in (common | own).items()
    }
    assert look(file) == replace(LOOKS[style], **wanted)


@pytest.mark.parametrize(
    ("written", "distance_mm"),
    [("700", 700), ('"0.7 m"', 700), ('"70 cm"', 700), ('"20 in"', 508), ('"5 cm"', 50)],
)
def test_a_reading_distance_takes_any_unit_of_length(written: str, distance_mm: float) -> None:
    """Bare millimetres or text with a unit; an inch is 25.4 mm."""
    assert look(read(f"[look]\ndistance = {written}")).distance == pytest.approx(distance_mm, rel=1e-12)


def test_a_font_lies_beside_the_dial_file(tmp_path: Path) -> None:
    """A font's path counts from the folder of the file that names it, and the face is lettered in it."""
    (tmp_path / "fonts").mkdir()
    shutil.copy(FONT, tmp_path / "fonts" / "own.ttf")
    text = samples.SHUNT.replace("[plate]", '[look]\nfont = "fonts/own.ttf"\n\n[plate]')
    (tmp_path / "dial.toml").write_text(text, encoding="utf-8")
    glyphs = {glyph.name for glyph in dialgen.load(tmp_path / "dial.toml").drawing.glyphs()}
    assert glyphs
    assert not any(name.startswith("barlow") for name in glyphs)


# ---------------------------------------------------------------- scales


def test_keys_of_a_scale_and_their_defaults() -> None:
    """Class, fiducial value, stretches, sign, ink and place of the unit; none is assumed."""
    (plain,) = read().scale
    assert (plain.accuracy_class, plain.fiducial, plain.effective, plain.heavy) == (None, None, None, None)
    assert (plain.sign, plain.ink, plain.unit_at, plain.also) == ("minus", None, None, ())
    (full,) = read(
        scale='class = 2.5\nfiducial = "value"\neffective = [1, 9]\nheavy = [0, 2.5]\nsign = "always"\n'
        'ink = "red"\nunit_at = [-8, 20]\n'
    ).scale
    assert (full.accuracy_class, full.fiducial) == (2.5, Fiducial.VALUE)
    assert (full.effective, full.heavy) == ((1.0, 9.0), (0.0, 2.5))
    assert (full.sign, full.ink, full.unit_at) == ("always", COLOURS["red"], (-8.0, 20.0))


def test_rows_are_read_in_their_order() -> None:
    """A row has a factor; its unit, circuit and side are the scale's own where it says nothing."""
    text = (
        'also = [{ times = 5 }, { times = 0.001, unit = "kV", circuit = "multiplier", numerals = "inside" }]'
    )
    first, second = read(scale=text).scale[0].also
    assert (first.times, first.unit, first.circuit, first.numerals) == (5.0, None, None, None)
    assert (second.times, second.unit, second.numerals) == (0.001, "kV", "inside")
    assert isinstance(second.circuit, Multiplier)


def test_rows_may_be_tables_of_their_own() -> None:
    """TOML's longer form of a list of tables says the same."""
    short, long = (
        read(scale="also = [{ times = 5 }, { times = 25 }]"),
        read("[[scale.also]]\ntimes = 5\n[[scale.also]]\ntimes = 25"),
    )
    assert short.scale[0].also == long.scale[0].also


@pytest.mark.parametrize("least", [0.005, 20])
def test_the_outermost_classes_are_taken(least: float) -> None:
    """A class may be as good as 0.005 and as poor as 20, both ends with it."""
    assert read(scale=f"class = {least}").scale[0].accuracy_class == least


# ---------------------------------------------------------------- zones, limits, symbols


def test_zones_and_limits_and_their_defaults() -> None:
    """A zone needs its two values and a colour, a limit its value; both lie on the first scale."""
    file = read(
        '[[zone]]\nfrom = 2\nto = 4\ncolour = "green"\n'
        '[[zone]]\nfrom = 0\nto = 10\ncolour = "#123ABC"\nscale = 2\n'
        'place = "inside"\nwidth = 1.5\nhatch = true\n'
        '[[limit]]\nat = 8\n[[limit]]\nat = 10\nscale = 2\nshape = "triangle"\ncolour = "red"\n' + SCALE
    )
    assert file.zone[0] == Zone.model_validate({"from": 2, "to": 4, "colour": "green"})
    assert (file.zone[0].colour, file.zone[0].scale, file.zone[0].hatch) == (COLOURS["green"], 1, False)
    assert (file.zone[0].place, file.zone[0].width) == (None, None)
    second = file.zone[1]
    assert (second.start, second.end, second.scale, second.colour) == (0.0, 10.0, 2, "#123abc")
    assert (second.place, second.width, second.hatch) == ("inside", 1.5, True)
    assert file.limit[0] == Limit.model_validate({"at": 8})
    assert (file.limit[0].scale, file.limit[0].shape, file.limit[0].colour) == (1, "line", None)
    assert (file.limit[1].scale, file.limit[1].shape, file.limit[1].colour) == (2, "triangle", COLOURS["red"])


def test_a_zone_may_reach_to_the_infinite_end_of_its_scale() -> None:
    """On a scale of ohms to infinity a zone may end there too."""
    ohms = '[[scale]]\nunit = "ohm"\nfrom = 0\nto = inf\nradius = 40\n'
    file = read(ohms + '[[zone]]\nfrom = 1000\nto = inf\ncolour = "red"\nscale = 2\n')
    assert file.zone[0].end == math.inf


def test_symbols_are_read_in_their_order() -> None:
    """Names become signs with their parameters; "auto" and "class" wait for the dial."""
    shown = read('[symbols]\nshow = ["vertical", "auto", "Test 2 kV", "class"]').symbols
    first, auto, star, claim = shown.show
    assert isinstance(first, Sign)
    assert (first.symbol.name, star.symbol.name, star.parameter) == ("vertical", "test", "2")
    assert (auto, claim) == ("auto", "class")


def test_no_table_of_symbols_is_not_an_empty_one() -> None:
    """Without the table nothing is shown; an empty one asks for what follows from the dial."""
    assert read().symbols is None
    assert read("[symbols]").symbols == Symbols(show="auto", at=None, height=None)
    placed = read('[symbols]\nshow = "auto"\nat = [10, -4]\nheight = 3').symbols
    assert (placed.show, placed.at, placed.height) == ("auto", (10.0, -4.0), 3.0)


@pytest.mark.parametrize("written", ["2026-05-01", '"2026-05-01"'])
def test_the_day_of_a_test_is_a_date_with_or_without_quotes(written: str) -> None:
    """TOML's own date, and the same in quotes."""
    assert read(head=f"tested = {written}").dial.tested == date(2026, 5, 1)


def test_no_test_is_assumed() -> None:
    """A dial that says nothing of a test, a title or a maker has none."""
    head = read().dial
    assert (head.tested, head.title, head.maker) == (None, None, None)
    full = read(head='title = "BATTERY"\nmaker = "Alder Lane Works"').dial
    assert (full.title, full.maker) == ("BATTERY", "Alder Lane Works")


# ---------------------------------------------------------------- openings and texts


def test_slots_along_an_arc_or_straight() -> None:
    """A slot has a width, and either a radius with two angles or two points."""
    slots = (
        "slot = [{ width = 3, radius = 30, from = -20, to = 25 }, { width = 2.5, line = [[-9, 1], [9, 2]] }]"
    )
    arc, straight = read(plate=slots).plate.slot
    assert (arc.width, arc.radius, arc.start, arc.end, arc.line) == (3.0, 30.0, -20.0, 25.0, None)
    assert straight == Slot(width=2.5, line=[[-9, 1], [9, 2]])
    assert straight.line == ((-9.0, 1.0), (9.0, 2.0))


def test_a_mirror_and_its_defaults() -> None:
    """A mirror may be asked for by an empty table; ends, radius and land can be given."""
    assert read().plate.mirror is None
    assert read(plate="mirror = {}").plate.mirror == Mirror(width=4.0, land=1.5, ends="round")
    given_ = 'mirror = { width = 5, radius = 30, from = -40, to = 41, land = 0, ends = "square" }'
    mirror = read(plate=given_).plate.mirror
    assert (mirror.width, mirror.radius, mirror.start, mirror.end) == (5.0, 30.0, -40.0, 41.0)
    assert (mirror.land, mirror.ends) == (0.0, "square")


def test_a_text_may_leave_its_place_open() -> None:
    """Without a place a text is set where the plate is free; its height is 2.2 mm and it is level."""
    (text,) = read('[[text]]\nsay = "75 mV"').text
    assert (text.at, text.height, text.angle) == (None, 2.2, 0.0)


# ---------------------------------------------------------------- everything wrong at once


def test_faults_in_all_the_new_tables_are_told_together() -> None:
    """Mistakes in several tables give a line each, in the order of the file, and nothing that follows."""
    text = (
        '[look]\nstyel = "bench"\nturn = "askew"\n[[zone]]\nfrom = 3\nto = 1\ncolour = "blak"\n'
        '[[limit]]\nat = 30\n[[limit]]\nat = 3\nscale = 4\n[symbols]\nshow = ["dc", "moving cole", 7]\n'
    )
    keys = 'class = 99\nfiducial = "limit"\nalso = [{ times = 0, nmerals = "inside" }]\nlook = { ink = 5 }\n'
    with pytest.raises(DialFileError) as caught:
        read(text, scale=keys, plate="mirror = { from = 9, to = 3 }")
    assert [fault.key for fault in caught.value.faults] == [
        "plate.mirror.to",
        "scale[1].class",
        "scale[1].also[1].times",
        "scale[1].also[1].nmerals",
        "scale[1].look.ink",
        "look.styel",
        "look.turn",
        "zone[1].to",
        "zone[1].colour",
        "symbols.show[2]",
        "symbols.show[3]",
    ]


def test_zones_and_limits_on_sound_scales_are_checked_beside_each_other() -> None:
    """Each that lies off its scale, or on one that is not there, is told of at its own key."""
    text = (
        '[[zone]]\nfrom = -1\nto = 11\ncolour = "red"\n'
        '[[zone]]\nfrom = 1\nto = 2\ncolour = "red"\nscale = 3\n'
        "[[limit]]\nat = 30\n[[limit]]\nat = 3\nscale = 4\n"
    )
    with pytest.raises(DialFileError) as caught:
        read(text)
    assert [fault.key for fault in caught.value.faults] == [
        "zone[1].from",
        "zone[1].to",
        "zone[2].scale",
        "limit[1].at",
        "limit[2].scale",
    ]
