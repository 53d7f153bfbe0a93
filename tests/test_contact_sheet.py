"""The dials of the contact sheet: many, of many kinds, and nothing to remark on any of them."""

from __future__ import annotations

import math
import subprocess
import sys
import tomllib
from itertools import groupby
from pathlib import Path

import pytest
from contact_sheet.dials import DIALS, Dial

import dialgen
from dialgen.looks import LOOKS

SCRIPT = Path(__file__).parent / "contact_sheet"
COLUMNS, CELL_PX, PAPER = 6, (470, 400), (0xE4, 0xE4, 0xE4)

TABLES = [tomllib.loads(dial.text) for dial in DIALS]
SCALES = [scale for tables in TABLES for scale in tables["scale"]]


def test_there_are_enough_dials_and_each_has_its_name() -> None:
    """At least forty dials, no two of one name and no two the same."""
    assert len(DIALS) >= 40
    assert len({dial.name for dial in DIALS}) == len({dial.text for dial in DIALS}) == len(DIALS)


@pytest.mark.parametrize("dial", DIALS, ids=lambda dial: dial.name)
def test_the_review_has_nothing_to_say_of_it(dial: Dial, tmp_path: Path) -> None:
    """No dial of the sheet gives a warning, of its chain or of its face."""
    path = tmp_path / "dial.toml"
    path.write_text(dial.text, encoding="utf-8")
    assert [f"{fault.key}: {fault.message}" for fault in dialgen.load(path).warnings()] == []


def test_every_look_is_shown() -> None:
    """All six named looks are there, each several times."""
    shown = sorted(tables.get("look", {}).get("style", "plain") for tables in TABLES)
    counts = {name: len(list(of)) for name, of in groupby(shown)}
    assert set(counts) == set(LOOKS)
    assert len(LOOKS) >= 6
    assert min(counts.values()) >= 3


def test_at_least_five_laws_are_shown() -> None:
    """Even, logarithmic, decibel, square and reflection scales, and ohms by their circuit."""
    laws = [scale.get("law", "linear") for scale in SCALES]
    kinds = {law if isinstance(law, str) else law["kind"] for law in laws}
    assert {"linear", "logarithmic", "decibel", "power", "reflection"} <= kinds
    assert any(tables.get("circuit", {}).get("kind") == "series ohmmeter" for tables in TABLES)


def test_sweeps_reach_from_sixty_to_three_hundred_degrees() -> None:
    """The pointer's angles at the ends of an arc, as the file has them, span all that is promised."""
    sweeps = [
        abs(tables["movement"]["full"] - tables["movement"]["rest"])
        for tables in TABLES
        if any("radius" in scale for scale in tables["scale"])
    ]
    assert min(sweeps) <= 60
    assert max(sweeps) >= 300
    for low in range(60, 300, 60):
        assert any(low <= sweep <= low + 60 for sweep in sweeps), low


def test_radii_reach_from_twenty_to_a_hundred_and_ten_millimetres() -> None:
    """From the smallest panel meter to the large one, with sizes between."""
    radii = sorted(scale["radius"] for scale in SCALES if "radius" in scale)
    assert (radii[0], radii[-1]) == (20.0, 110.0)
    assert {math.floor(radius / 20) for radius in radii} >= {1, 2, 3, 4, 5}


def test_forms_of_plate_and_scale_are_shown() -> None:
    """Round plates, straight and curved edgewise scales, several scales and rows, zones, mirror, symbols."""
    assert any("diameter" in tables["plate"] for tables in TABLES)
    assert any("mirror" in tables["plate"] for tables in TABLES)
    assert any(len(tables["scale"]) > 1 for tables in TABLES)
    assert {"zone", "limit", "symbols", "look"} <= {key for tables in TABLES for key in tables}
    assert {"line", "curve", "also", "class", "effective", "sign"} <= {
        key for scale in SCALES for key in scale
    }
    assert any(tables["movement"]["rest"] > tables["movement"]["full"] for tables in TABLES)


def test_the_script_draws_the_dials_that_are_asked_for(tmp_path: Path) -> None:
    """Two words give a sheet of one row whose first two cells are inked, and nothing on standard error."""
    pytest.importorskip("cairo")
    image = pytest.importorskip("PIL.Image")
    out = tmp_path / "sheet.png"
    asked = ("right-hand zero", "small, 20 mm")
    assert all([word in dial.name for dial in DIALS].count(True) == 1 for word in asked)
    done = subprocess.run(
        [sys.executable, SCRIPT, out, *asked], capture_output=True, text=True, timeout=120, check=True
    )
    assert (done.stdout, done.stderr) == ("", "")
    with image.open(out) as sheet:
        width, height = CELL_PX
        assert sheet.size == (COLUMNS * width, height)
        cells = [sheet.convert("RGB").crop((i * width, 0, (i + 1) * width, height)) for i in range(COLUMNS)]
    colours = [{colour for _, colour in cell.getcolors(width * height)} for cell in cells]
    assert all({PAPER, (0, 0, 0), (255, 255, 255)} <= found for found in colours[:2])
    assert all(found == {PAPER} for found in colours[2:])


def test_the_script_begins_a_second_row_after_six_dials(tmp_path: Path) -> None:
    """Seven dials make two rows."""
    pytest.importorskip("cairo")
    image = pytest.importorskip("PIL.Image")
    out = tmp_path / "sheet.png"
    asked = [dial.name for dial in DIALS if "," in dial.name][:7]
    chosen = [dial for dial in DIALS if any(word in dial.name for word in asked)]
    subprocess.run([sys.executable, SCRIPT, out, *asked], check=True, capture_output=True, timeout=120)
    with image.open(out) as sheet:
        assert sheet.size == (COLUMNS * CELL_PX[0], math.ceil(len(chosen) / COLUMNS) * CELL_PX[1])
    assert len(chosen) >= 7
