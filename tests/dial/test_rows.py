"""Further rows of numerals on one set of marks: what they say, and whether they read true by hand."""

from __future__ import annotations

import json
import math
from pathlib import Path

import pytest
from click.testing import CliRunner
from dial_texts import MOVEMENT, dial_text, made, refusals
from hypothesis import given, settings
from hypothesis import strategies as st

from dialgen.cli.table import command as table_command

MOVEMENT_A, MOVEMENT_OHM = 1e-3, 75.0
AMPERES = 'unit = "A"\nfrom = 0\nto = 10\ncircuit = { kind = "shunt" }'
VOLTS = 'unit = "V"\nfrom = 0\nto = 10\ncircuit = { kind = "multiplier" }'
DECADES = 'unit = "mbar"\nfrom = 1\nto = 1000\nlaw = "logarithmic"\ncircuit = "direct"'
OHMS = 'unit = "ohm"\nfrom = 0\nto = inf\ncircuit = { kind = "series ohmmeter", half = "1500 ohm" }'


def row(times: float, circuit: str = "", unit: str = "") -> str:
    """The key of a scale with one further row."""
    parts = [f"times = {times}", unit and f'unit = "{unit}"', circuit and f"circuit = {{ {circuit} }}"]
    return f"\nalso = [{{ {', '.join(part for part in parts if part)} }}]"


def remarked(scale: str, movement: str = MOVEMENT) -> list[tuple[str, tuple]]:
    """What is remarked on the rows of a scale: the words and the key of each."""
    found = made(scale, movement).remarks
    return [(remark.message, remark.key) for remark in found if "also" in remark.key]


def percent(remark: tuple[str, tuple]) -> float:
    """How far off a remark says that numerals are, in per cent of full deflection."""
    return float(remark[0].partition("up to ")[2].partition(" %")[0])


# --- what they say -------------------------------------------------------------------------


def table(folder: Path, scale: str) -> list[dict]:
    """The marks that ``dialgen table --json`` prints for a scale."""
    path = folder / "dial.toml"
    path.write_text(dial_text(scale), encoding="utf-8")
    done = CliRunner().invoke(table_command, [str(path), "--json"])
    assert done.exit_code == 0, done.output
    return json.loads(done.stdout)["scales"][0]["marks"]


def test_the_table_lists_what_each_row_says(tmp_path: Path) -> None:
    """Every numbered mark has its label and, in the rows' order, what the further rows say there."""
    scale = 'unit = "A"\nfrom = 0\nto = 5\ncircuit = { kind = "shunt" }\nnumbered = { every = 1 }\n'
    marks = table(tmp_path, scale + 'also = [{ times = 5 }, { times = 1000, unit = "mA" }, { times = 0.25 }]')
    said = {mark["value"]: (mark["label"], mark["also"]) for mark in marks if mark["label"]}
    assert said == {
        0.0: ("0", []),
        1.0: ("1", ["5", "1000", "0.25"]),
        2.0: ("2", ["10", "2000", "0.5"]),
        3.0: ("3", ["15", "3000", "0.75"]),
        4.0: ("4", ["20", "4000", "1"]),
        5.0: ("5", ["25", "5000", "1.25"]),
    }


def test_marks_without_a_numeral_say_nothing_in_any_row(tmp_path: Path) -> None:
    """Fine and middle marks, and those with words of the maker's own, have no further texts."""
    marks = table(
        tmp_path, f'{AMPERES}\nnumbered = [0, {{ at = 5, label = "HALF" }}, 10]{row(5)}\ndivisions = "auto"'
    )
    said = {mark["value"]: mark["also"] for mark in marks}
    assert said[5.0] == []
    assert said[10.0] == ["50"]
    assert all(mark["also"] == [] for mark in marks if mark["label"] is None)
    assert any(mark["label"] is None for mark in marks)


def test_a_scale_of_one_row_has_no_such_key(tmp_path: Path) -> None:
    """The table of a scale without further rows is as it was before there were any."""
    assert all("also" not in mark for mark in table(tmp_path, AMPERES))


def test_a_row_moves_no_mark(tmp_path: Path) -> None:
    """Marks stand where the scale's own circuit puts them, whatever the circuits of its rows."""
    plain, rowed = (
        [
            (mark["value"], mark["angle"])
            for mark in table(tmp_path, f"{AMPERES}\nnumbered = {{ every = 2 }}{more}")
        ]
        for more in ("", row(5, 'kind = "shunt", range = "60 A"'))
    )
    assert plain == rowed


# --- whether they read true ----------------------------------------------------------------


def shunt_drive(amperes: float, shunt_ohm: float) -> float:
    """The drive behind a shunt by current division."""
    return amperes * shunt_ohm / (shunt_ohm + MOVEMENT_OHM) / MOVEMENT_A


@pytest.mark.parametrize(
    ("scale", "more"),
    [
        (AMPERES, row(5)),
        (AMPERES, row(5, 'kind = "shunt", range = "50 A"')),
        (AMPERES, row(5, 'kind = "shunt"')),
        (AMPERES, row(1000, 'kind = "shunt", range = "10 A"', "mA")),
        (AMPERES, row(5, 'kind = "shunt", range = "50 A", rated = "50 A/100 mV"')),
        (VOLTS, row(25, 'kind = "multiplier", range = "250 V"')),
        (VOLTS, row(0.1, 'kind = "multiplier", range = "1 V"')),
        (VOLTS, row(0.001, 'kind = "multiplier", range = "10 V"', "kV")),
        (DECADES, row(10, 'kind = "direct"')),
        (OHMS, row(10, 'kind = "series ohmmeter", half = "15 kohm"')),
        (OHMS, row(0.01, 'kind = "series ohmmeter", half = "15 kohm"', "kohm")),
    ],
)
def test_rows_with_matching_circuits_are_silent(scale: str, more: str) -> None:
    """A 50 A shunt reads five times 10 A, a 15 kΩ half scale ten times 1.5 kΩ: nothing is remarked."""
    assert remarked(scale + more) == []


def test_a_shunt_built_one_per_cent_high_is_told_of() -> None:
    """50 A through a shunt one per cent above its design drives the pointer about one per cent too far."""
    designed_ohm = MOVEMENT_A * MOVEMENT_OHM / (50 - MOVEMENT_A)
    built_ohm = 1.01 * designed_ohm
    off = shunt_drive(50, built_ohm) - 1
    (remark,) = remarked(AMPERES + row(5, f'kind = "shunt", range = "50 A", built = "{built_ohm:.9f} ohm"'))
    assert percent(remark) == pytest.approx(100 * off, rel=0.05)
    assert remark[1] == ("scale", 0, "also", 0, "circuit")
    assert remark[0].startswith("numerals times 5 are off by up to ")
    assert "; " in remark[0]


@pytest.mark.parametrize(("share", "told"), [(1.0008, 0), (1.0013, 1), (0.9987, 1), (0.9992, 0)])
def test_a_thousandth_of_full_deflection_is_the_least_that_is_told(share: float, told: int) -> None:
    """A tenth of a per cent is finer than a plate can be printed: below it nothing is remarked."""
    built_ohm = share * MOVEMENT_A * MOVEMENT_OHM / (50 - MOVEMENT_A)
    circuit = f'kind = "shunt", range = "50 A", built = "{built_ohm:.12f} ohm"'
    assert len(remarked(AMPERES + row(5, circuit))) == told


def test_a_shunt_for_another_range_is_told_of() -> None:
    """Marks up to 50 A on a 60 A shunt would be passed over: at 50 A the pointer is at five sixths."""
    (remark,) = remarked(AMPERES + row(5, 'kind = "shunt", range = "60 A"'))
    assert percent(remark) == pytest.approx(100 / 6, rel=0.05)


@settings(max_examples=40, deadline=None)
@given(st.floats(0.9, 1.1), st.integers(2, 50))
def test_how_far_a_row_is_off_is_right_for_any_shunt(share: float, times: int) -> None:
    """The remark gives the greatest difference of drives; below 0.1 per cent there is none."""
    designed_ohm = MOVEMENT_A * MOVEMENT_OHM / (10 * times - MOVEMENT_A)
    built_ohm = float(f"{share * designed_ohm:.12f}")
    off = 100 * abs(shunt_drive(10 * times, built_ohm) - 1)
    if abs(off - 0.1) < 0.005:
        return
    circuit = f'kind = "shunt", range = "{10 * times} A", built = "{built_ohm:.12f} ohm"'
    found = remarked(AMPERES + row(times, circuit))
    assert len(found) == (off > 0.1)
    if found:
        assert percent(found[0]) == pytest.approx(off, rel=0.06)


@settings(max_examples=40, deadline=None)
@given(st.floats(1.05, 3.0), st.booleans())
def test_an_ohmmeter_row_with_another_half_scale_is_off_in_the_middle(ratio: float, larger: bool) -> None:
    """half/(half + R) of two half scales differs most at their mean: by the quotient of their roots."""
    half = 15e3 * ratio if larger else 15e3 / ratio
    (remark,) = remarked(OHMS + row(10, f'kind = "series ohmmeter", half = "{half:.6f} ohm"'))
    root = math.sqrt(ratio)
    assert percent(remark) == pytest.approx(100 * (root - 1) / (root + 1), rel=0.06)


def test_each_row_is_judged_by_itself() -> None:
    """Of three rows the second alone is off, and the remark stands at its circuit."""
    rows = ", ".join(
        f'{{ times = {times}, circuit = {{ kind = "shunt", range = "{amperes} A" }} }}'
        for times, amperes in ((5, 50), (10, 110), (25, 250))
    )
    (remark,) = remarked(f"{AMPERES}\nalso = [{rows}]")
    assert remark[1] == ("scale", 0, "also", 1, "circuit")


def test_a_row_without_a_circuit_of_its_own_is_never_judged() -> None:
    """Without a circuit the person at the bench knows what the factor is for."""
    assert remarked(AMPERES + row(7)) == []


def test_a_row_of_an_observed_scale_is_not_judged() -> None:
    """What was observed stands in place of the circuit, and there is nothing to compare."""
    observed = 'unit = "A"\nfrom = 0\nto = 10\nlaw = { kind = "observed", points = [[0, -44], [10, 44]] }'
    assert remarked(observed + row(5, 'kind = "shunt", range = "90 A"')) == []


def test_a_row_is_compared_with_the_circuit_that_serves_every_scale() -> None:
    """A scale without a circuit of its own uses the file's, and its rows are judged against that."""
    scale = 'unit = "A"\nfrom = 0\nto = 10'
    shared = '[circuit]\nkind = "shunt"\nrange = "10 A"'
    for amperes, wrong in ((50, 0), (45, 1)):
        text = scale + row(5, f'kind = "shunt", range = "{amperes} A"')
        found = [remark for remark in made(text, rest=shared).remarks if "also" in remark.key]
        assert len(found) == wrong


# --- refusals ------------------------------------------------------------------------------

ALSO = ("scale", 0, "also", 0)


@pytest.mark.parametrize(
    ("scale", "more", "key", "piece"),
    [
        (AMPERES, row(5, 'kind = "multiplier", range = "50 V"'), (*ALSO, "unit"), "takes a voltage in V"),
        (AMPERES, row(5, 'kind = "shunt"', "V"), (*ALSO, "unit"), "takes a current in A"),
        (AMPERES, row(5, 'kind = "shunt", range = "0.5 mA"'), (*ALSO, "circuit", "range"), "only widens"),
        (VOLTS, row(5, 'kind = "multiplier", range = "10 mV"'), (*ALSO, "circuit", "range"), "take a larger"),
        (
            'unit = "dB"\nfrom = -20\nto = 3\nlaw = { kind = "decibel", reference = "1 V" }',
            row(1e6, 'kind = "multiplier", range = "5 V"'),
            (*ALSO, "times"),
            "no signal",
        ),
        (
            'unit = "A"\nfrom = 0\nto = 10\ncircuit = { kind = "shunt" }\n'
            'law = { kind = "formula", signal = "x - 0.01*x**2" }',
            row(10, 'kind = "shunt", range = "50 A"'),
            (*ALSO, "times"),
            "must move strictly one way",
        ),
    ],
)
def test_a_row_that_does_not_go_with_its_circuit_is_refused_at_its_key(
    scale: str, more: str, key: tuple, piece: str
) -> None:
    """The fault is placed in the row's own table: its unit, its circuit's key, or its factor."""
    ((message, first),) = refusals(scale + more)
    assert first == key
    assert piece in message


def test_a_row_needs_the_movement_as_a_scale_does() -> None:
    """A row's shunt without the movement's current is refused at the movement, not at the row."""
    found = refusals(
        'unit = "A"\nfrom = 0\nto = 10' + row(5, 'kind = "shunt", range = "50 A"'),
        movement='rest = -44\nfull = 44\nresistance = "75 ohm"',
    )
    assert [key for _, key in found] == [("movement", "current")]
