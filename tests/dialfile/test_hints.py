"""What a dial file's author is told to write instead, for the slips that are made most."""

from __future__ import annotations

from pathlib import Path

import pytest

from dialgen import api
from dialgen.errors import DialFileError

GOOD = """\
dialgen = 1
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -44
full = 44
[[scale]]
unit = "A"
from = 0
to = 40
radius = 44
circuit = "shunt"
[plate]
size = [84, 64]
pivot = [42, 12]
"""

SLIPS = [
    ('unit = "A"', 'unit = "Amps"', "8:1: scale[1].unit: ", 'write unit = "A"'),
    (
        'circuit = "shunt"',
        'circuit = "ohmmeter"',
        "12:1: scale[1].circuit.kind: ",
        '"series ohmmeter" or "shunt ohm',
    ),
    (
        'circuit = "shunt"',
        'circuit = { kind = "direct", range = "3 A" }',
        "12:30: scale[1].circuit.range: ",
        'it goes with kind = "shunt" or "universal shunt" or "',
    ),
    (
        "radius = 44",
        'radius = 44\nlaw = { kind = "formula", signal = "x^2" }',
        "12:27: scale[1].law.signal: ",
        "column 2",
    ),
    ("from = 0", "from = -40", "9:1: scale[1].from: ", "beyond the stops -49 and 49"),
]


@pytest.mark.parametrize(("was", "now", "place", "hint"), SLIPS)
def test_a_common_slip_is_answered_with_its_mend(
    was: str, now: str, place: str, hint: str, tmp_path: Path
) -> None:
    """The one line names the place of the slip and what to write instead."""
    path = tmp_path / "slip.toml"
    path.write_text(GOOD.replace(was, now), encoding="utf-8")
    with pytest.raises(DialFileError) as caught:
        api.load(path)
    (line,) = str(caught.value).splitlines()
    assert line.startswith(f"{path}:{place}")
    assert hint in line


def test_a_power_response_is_named_where_the_drive_is_negative(tmp_path: Path) -> None:
    """A moving iron cannot show current reversed: the scale's start is refused, and the reason said."""
    path = tmp_path / "iron.toml"
    text = GOOD.replace("full = 44", "full = 44\nresponse = { power = 2 }").replace("from = 0", "from = -40")
    path.write_text(text, encoding="utf-8")
    with pytest.raises(DialFileError, match=r":10:1: scale\[1\]\.from: -40 A drives the movement backwards"):
        api.load(path)


def test_every_scale_and_the_plate_are_judged_in_one_run(tmp_path: Path) -> None:
    """A wiring error in one scale hides neither the next scale's nor a hole off the plate."""
    path = tmp_path / "many.toml"
    second = '[[scale]]\nunit = "V"\nfrom = 0\nto = 5\nradius = 40\ncircuit = "shunt"\n'
    third = '[[scale]]\nunit = "A"\nfrom = 0\nto = 40\nradius = 200\ncircuit = "shunt"\n'
    hole = "hole = [{ at = [90, 0], diameter = 3 }]\n"
    path.write_text(GOOD.replace("[plate]", second + third + "[plate]") + hole, encoding="utf-8")
    with pytest.raises(DialFileError) as caught:
        api.load(path)
    keys = [fault.key for fault in caught.value.faults]
    assert keys == ["scale[2].unit", "scale[3].radius", "plate.hole[1].at"]


def test_a_reading_that_pins_the_pointer_is_warned_of(tmp_path: Path) -> None:
    """A reading typed ten times too large is drawn through, but pointed at."""
    path = tmp_path / "typed.toml"
    readings = "".join(
        f'[[movement.reading]]\ncurrent = "{current}"\nangle = {angle}\n'
        for current, angle in (("0 mA", -44), ("0.5 mA", 0.4), ("10 mA", 44.2))
    )
    path.write_text(GOOD.replace("[[scale]]", readings + "[[scale]]"), encoding="utf-8")
    warnings = [str(fault) for fault in api.load(path).warnings()]
    assert [w for w in warnings if "far beyond its stops" in w and "movement.reading[3]" in w]
