"""Everything wrong with a table is said in one run, also where several keys of it do not go together."""

from __future__ import annotations

from pathlib import Path

import dialfile_samples as samples
import pytest

from dialgen.dialfile import Source, parse
from dialgen.dialfile.base import nearest_key
from dialgen.errors import DialFileError

_MOVEMENT = "[movement]\nrest = -44\nfull = 44\n"
_PLATE = "[plate]\nsize = [84, 64]\npivot = [42, 12]\n"
_SCALE = '[[scale]]\nunit = "A"\nfrom = 0\nto = 40\nradius = 44\n'


def _faults(text: str, folder: Path = Path()) -> list[str]:
    """Return key and message of every fault of a dial file, in file order."""
    with pytest.raises(DialFileError) as caught:
        parse(Source(name="dial.toml", folder=folder, text="dialgen = 1\n" + text))
    return [f"{fault.key}: {fault.message}" for fault in caught.value.faults]


_SEVERAL = [
    (
        _MOVEMENT + _PLATE + '[[scale]]\nunit = "A"\nfrom = 40\nto = 40\nradios = 44\n',
        [
            "scale[1].to: the scale runs from 40 to 40",
            "scale[1].radios: not a key here; did you mean radius?",
        ],
    ),
    (
        _MOVEMENT
        + _PLATE
        + '[[scale]]\nunit = "A"\nfrom = 40\nto = 40\nradius = 44\nline = [[0, 1], [2, 3]]\nzz = 1\n',
        [
            "scale[1].to: the scale runs",
            "scale[1].line: the scale line is an arc or straight",
            "scale[1].zz: not a key",
        ],
    ),
    (
        _MOVEMENT
        + _PLATE
        + "[[scale]]\nunit = 1\nfrom = 0\nto = 40\nradius = 44\nsquare = true\ncurve = 9\nnumbered = [50, 50]"
        + "\n",
        [
            "scale[1].unit: this is text",
            "scale[1].square: square is for a straight line",
            "scale[1].curve: curve is for a straight line",
            "scale[1].numbered[1]: 50 is outside the scale",
            "scale[1].numbered[2]: 50 is outside the scale",
            "scale[1].numbered[2]: 50 is numbered twice",
        ],
    ),
    (
        "[movement]\nrest = 44\nfull = 44\nstops = [5, -5]\ncurrent = 1\nponter = 3\n" + _PLATE + _SCALE,
        [
            "movement.full: rest and full are both at 44 degrees",
            "movement.stops: the stops 5 and -5 leave no swing",
            "movement.current: a current needs its unit",
            "movement.ponter: not a key here; did you mean pointer?",
        ],
    ),
    (
        "[movement]\nrest = -60\nfull = 60\nstops = [-50, 50]\n[movement.old]\nrest = 1\nfull = 1\nzz = 1\n"
        + _PLATE
        + _SCALE,
        [
            "movement.stops: full at 60 degrees is beyond the stops",
            "movement.old.full: the old scale runs from 1 to 1",
            "movement.old.zz: not a key here",
        ],
    ),
    (
        _MOVEMENT
        + "[plate]\npivot = 1\ndiameter = 80\ncorner = 3\n[plate.window]\nat = [0, 0]\nsize = [9, 9]\n"
        "corner = 5\nzz = 1\n" + _SCALE,
        [
            "plate.pivot: this is a pair",
            "plate.corner: a round plate has no corners",
            "plate.window.corner: a corner of 5 mm does not fit the window; give at most 4.5",
            "plate.window.zz: not a key here",
        ],
    ),
    (
        _MOVEMENT + '[[movement.reading]]\ncurrent = "1 mA"\nvalue = 3\nzz = 1\n' + _PLATE + _SCALE,
        [
            "movement.reading[1]: the reading does not say where the pointer stood; add angle or old",
            "movement.reading[1].value: current already says what was applied; leave out value",
            "movement.reading[1].zz: not a key here",
        ],
    ),
    (
        _MOVEMENT + _PLATE + _SCALE + '[[scale.reading]]\ncurrent = "1 mA"\nangle = 3\nzz = 1\n',
        [
            "scale[1].reading[1].current: a scale's readings are values on it",
            "scale[1].reading[1].zz: not a key",
        ],
    ),
    (
        _MOVEMENT + _PLATE + _SCALE + 'law = { kind = "linear", at_zero = "4 mA", zz = 1 }\n',
        ["scale[1].law.at_zero: at_zero goes with per", "scale[1].law.zz: not a key here"],
    ),
    (
        _MOVEMENT
        + _PLATE
        + _SCALE
        + 'law = { kind = "table", points = [[0, 1], [5, 2], [3, 4]] }\ngap = "x"\n',
        ["scale[1].law.points: 3 follows 5", 'scale[1].gap: "x" is not a length'],
    ),
    (
        _MOVEMENT + _PLATE + _SCALE + 'law = { kind = "table", points = [[0, "x"], [5], [3, 4]] }\n',
        ['scale[1].law.points[1]: "x" is not a signal', "scale[1].law.points[2]: this is a point, not [5]"],
    ),
    (
        _MOVEMENT
        + _PLATE
        + _SCALE
        + "numbered = { evry = 3 }\ndivisions = [{ to = 3, every = 1 }, { to = 2, every = 1 }]\n",
        [
            "scale[1].numbered.evry: not a key here; did you mean every?",
            "scale[1].divisions[2].to: a piece up to 2",
        ],
    ),
    (
        _MOVEMENT
        + _PLATE
        + _SCALE
        + 'numbered = ["a", { at = "b" }, "c", { at = 1, zz = 2 }]\n'
        + 'divisions = [{ to = "d", every = 0 }, { to = 20, every = 1 }, { every = 1 }]\n',
        [
            "scale[1].numbered[1]: a value on the scale is a number",
            "scale[1].numbered[2].at: a value on the scale is a number",
            "scale[1].numbered[3]: a value on the scale is a number",
            "scale[1].numbered[4].zz: not a key here",
            "scale[1].divisions[1].to: a value on the scale is a number",
            "scale[1].divisions[1].every: a step of 0",
            "scale[1].divisions[3].to: missing",
        ],
    ),
    (
        _MOVEMENT
        + 'response = { points = [[0, 0], ["a", 1], 3] }\nstops = ["a", "b"]\n'
        + _PLATE
        + _SCALE.replace("radius = 44", 'line = [["a", "b"], [1, "c"]]'),
        [
            "movement.response.points[2]: a drive is a number",
            "movement.response.points[3]: this is a point",
            "movement.stops[1]: an angle",
            "movement.stops[2]: an angle",
            'scale[1].line[1][1]: "a" is not a length',
            'scale[1].line[1][2]: "b" is not a length',
            'scale[1].line[2][2]: "c" is not a length',
        ],
    ),
]


@pytest.mark.parametrize(("text", "expected"), _SEVERAL)
def test_checks_across_keys_run_beside_faults_of_single_keys(text: str, expected: list[str]) -> None:
    """A table's own checks run on the keys that are right, whatever else is wrong in it."""
    found = _faults(text)
    assert len(found) == len(expected), found
    for fault, beginning in zip(found, expected, strict=True):
        assert fault.startswith(beginning), found


_ONE = [
    (
        _MOVEMENT.replace("rest = -44", 'rest = "x"') + _PLATE + _SCALE,
        "movement.rest: an angle is a bare number",
    ),
    (_MOVEMENT.replace("full", "ful") + _PLATE + _SCALE, "movement.ful: not a key here; did you mean full?"),
    (_MOVEMENT + _PLATE.replace("size", "sise") + _SCALE, "plate.sise: not a key here; did you mean size?"),
    (_MOVEMENT + _PLATE.replace("size", "width") + _SCALE, "plate.width: not a key here; did you mean size?"),
    (_MOVEMENT + _PLATE + _SCALE.replace("radius = 44", "radius = 0"), "scale[1].radius: a length of 0 mm"),
    (
        _MOVEMENT + _PLATE + _SCALE.replace("to = 40", "max = 40"),
        "scale[1].max: not a key here; did you mean to?",
    ),
    (_MOVEMENT + _PLATE, "scale: missing; add a table [[scale]]"),
    (_MOVEMENT + _PLATE + "[[scale]]\n" * 101, "scale: 101 of them; give at most 100"),
    (_MOVEMENT + _PLATE + _SCALE + "hight = 3\n", "scale[1].hight: not a key here; the keys are unit, from"),
]


@pytest.mark.parametrize(("text", "expected"), _ONE)
def test_one_mistake_gives_one_line(text: str, expected: str) -> None:
    """A key that is wrong or misspelt is said once, without what would only follow from it."""
    (found,) = _faults(text)
    assert found.startswith(expected)


_TABLE_CSV = [
    ("value,signal\n0,0\n1e20,5\n", "t.csv:3:1: value: ", "is beyond what a face can show"),
    ("value,signal\n0,0\n1e999,5\n", "t.csv:3:1: value: ", "must be finite"),
    ("value,signal\n0,0\n5,x\n", "t.csv:3:3: signal: ", '"x" is not a signal'),
    ("value,signal\n0,0\n5,2\n3,4\n", "t.csv:4:1: value: ", "3 follows 5; put the rows in ascending order"),
    ("value,signal\n0,0\n", "t.csv:1:1: ", "give at least two"),
    ("value,signal\n0,0\n5,\n", "t.csv:3:1: signal: ", "the row has none"),
    ("value\n0\n5\n", "t.csv:1:1: signal: ", "the column is missing"),
    ("value,signal\n0,1 mV\n5,2\n", "t.csv:1:1: ", "in several units"),
    ("value,signal\n0,1\n5,2\n6,1.5\n", "t.csv:1:1: ", "must move strictly one way"),
    ("value,signal\n0,1\n" + "5,2\n" * 5001, "t.csv:5002:1: ", "more than 5000 rows"),
]


@pytest.mark.parametrize(("sheet", "place", "piece"), _TABLE_CSV)
def test_a_law_in_a_csv_is_refused_in_the_csv(sheet: str, place: str, piece: str, tmp_path: Path) -> None:
    """What is wrong with the points of a table law's file is placed in that file."""
    (tmp_path / "t.csv").write_text(sheet, encoding="utf-8")
    text = _MOVEMENT + _PLATE + _SCALE + 'law = { kind = "table", file = "t.csv" }\n'
    with pytest.raises(DialFileError) as caught:
        parse(Source(name="dial.toml", folder=tmp_path, text="dialgen = 1\n" + text))
    (fault,) = caught.value.faults
    assert str(fault).removeprefix(f"{tmp_path}/").startswith(place)
    assert piece in fault.message


def test_every_wrong_row_of_a_law_in_a_csv_is_said(tmp_path: Path) -> None:
    """Each row of a table law's file that cannot be read has its own line, beside the dial file's faults."""
    (tmp_path / "t.csv").write_text("value,signal\n1e20,0\nx,1\n5,1 kg\n6,2\n", encoding="utf-8")
    found = _faults(
        _MOVEMENT + _PLATE + _SCALE + 'law = { kind = "table", file = "t.csv" }\ngap = "x"\n', tmp_path
    )
    assert [fault.partition(":")[0] for fault in found] == ["scale[1].gap", "value", "value", "signal"]


@pytest.mark.parametrize(
    ("law", "expected"),
    [
        ('{ kind = "table", file = "no.csv" }', "scale[1].law.file: cannot read"),
        ('{ kind = "table", file = 3 }', "scale[1].law.file: this is text"),
        (
            '{ kind = "table", file = "t.csv", points = [[0, 0], [1, 1]] }',
            "scale[1].law.file: points stand in",
        ),
        ('{ kind = "table", file = "t.csv", zz = 1 }', "scale[1].law.zz: not a key here"),
    ],
)
def test_a_law_without_its_csv_is_refused_in_the_dial_file(law: str, expected: str, tmp_path: Path) -> None:
    """A file of points that is not there, or is beside points, is refused at its key."""
    (tmp_path / "t.csv").write_text("value,signal\n0,0\n5,2\n", encoding="utf-8")
    (found,) = _faults(f"{_MOVEMENT}{_PLATE}{_SCALE}law = {law}\n", tmp_path)
    assert found.startswith(expected)


def test_readings_and_points_come_from_a_csv_as_they_would_from_the_file(tmp_path: Path) -> None:
    """A CSV with comments, spaces, quotes, a byte-order mark and any line ends gives the same readings."""
    rows = (
        '\ufeff# by hand\r\ncurrent, angle ,direction\r\n"0.25 mA",\u221222.4,up\r\n\r\n1 mA,44.1,\r\n,,\r\n'
    )
    (tmp_path / "r.csv").write_bytes(rows.encode())
    start = samples.SHUNT.index("[[movement.reading]]")
    text = (
        samples.SHUNT[:start]
        + 'readings = "r.csv"\n'
        + samples.SHUNT[samples.SHUNT.index("[movement.old]") :]
    )
    file, source = parse(Source(name="dial.toml", folder=tmp_path, text=text))
    readings = file.movement.all_readings()
    assert [(r.current, r.angle, r.direction) for r in readings] == [
        (0.00025, -22.4, "up"),
        (0.001, 44.1, None),
    ]
    assert source.fault(("movement", "readings", 1), "x").line == 5


@pytest.mark.parametrize(
    ("written", "meant"),
    [
        ("radios", "radius"), ("RADIUS", "radius"), ("center", "centre"), ("min", "from"), ("max", "to"),
        ("uni", "unit"), ("zzz", None), ("", None), ("x" * 10_000, None),
    ],
)  # fmt: skip
def test_the_nearest_key_is_the_one_meant(written: str, meant: str | None) -> None:
    """A misspelt key, or one by another common name, leads to the key of the file."""
    assert nearest_key(written, ["unit", "from", "to", "radius", "centre"]) == meant
