"""The commands as a user runs them, and the same from Python."""

from __future__ import annotations

import json
import math
import os
import signal
import subprocess
import sys
import time
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from pathlib import Path

import numpy as np
import pytest

import dialgen
from dialgen.api import DEFAULT_MARGIN_MM
from dialgen.cli.draw import _stamps
from dialgen.cli.draw import command as draw_command
from dialgen.drawing import Purpose
from dialgen.errors import InputError, NoSuchValue
from dialgen.renderers import RENDERERS, Options

SAMPLE = """\
dialgen = 1
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = -44.0
full = 44.0
[circuit]
kind = "shunt"
range = "40 A"
[[scale]]
unit = "A"
from = 0
to = 40
radius = 44.0
[plate]
size = [84, 64]
pivot = [42, 12]
corner = 2
"""


@pytest.fixture
def dial_file(tmp_path: Path) -> Path:
    """A small dial file."""
    path = tmp_path / "meter.toml"
    path.write_text(SAMPLE, encoding="utf-8")
    return path


def run(*words: str | Path, status: int = 0, module: bool = True) -> subprocess.CompletedProcess[str]:
    """Run the program in a process of its own, and check its exit status."""
    start = [sys.executable, "-m", "dialgen"] if module else [str(Path(sys.executable).parent / "dialgen")]
    done = subprocess.run([*start, *map(str, words)], capture_output=True, text=True, timeout=60, check=False)
    assert done.returncode == status, done.stderr
    return done


def test_draw_writes_several_formats_in_one_call(dial_file: Path) -> None:
    """Each -o gets its own format, told by its ending."""
    outputs = {ending: dial_file.with_suffix(ending) for ending in (".svg", ".pdf", ".dxf")}
    run("draw", dial_file, *[word for path in outputs.values() for word in ("-o", path)])
    assert outputs[".svg"].read_bytes().startswith(b"<?xml")
    assert outputs[".pdf"].read_bytes().startswith(b"%PDF")
    assert b"SECTION" in outputs[".dxf"].read_bytes()[:40]


def test_module_and_script_do_the_same(dial_file: Path) -> None:
    """``python -m dialgen`` prints exactly what ``dialgen`` prints."""
    script = Path(sys.executable).parent / "dialgen"
    if not script.exists():
        pytest.skip("the package is not installed in this environment")
    for words in (("--help",), ("table", dial_file, "--json"), ("--version",), ("draw", "--help")):
        assert run(*words).stdout == run(*words, module=False).stdout


def test_table_json_has_the_contracts_keys(dial_file: Path) -> None:
    """The JSON of a linear scale gives drive = value/40 and the angle between rest and full."""
    (scale,) = json.loads(run("table", dial_file, "--json").stdout)["scales"]
    assert (scale["unit"], scale["from"], scale["to"]) == ("A", 0.0, 40.0)
    assert [m["label"] for m in scale["marks"] if m["rank"] == "numbered"] == ["0", "10", "20", "30", "40"]
    for mark in scale["marks"]:
        assert set(mark) >= {"value", "rank", "label", "drive", "angle", "x", "y"}
        assert mark["drive"] == pytest.approx(mark["value"] / 40, abs=1e-12)
        assert mark["angle"] == pytest.approx(-44 + 88 * mark["value"] / 40, abs=1e-9)
        assert math.hypot(mark["x"], mark["y"]) == pytest.approx(44, abs=1e-9)
        assert (mark["label"] is None) == (mark["rank"] != "numbered")


def test_table_writes_infinity_as_text_and_sign(tmp_path: Path) -> None:
    """A scale to infinity ends in the string "inf" labelled ∞, and the JSON has no bare Infinity."""
    path = tmp_path / "ohms.toml"
    text = SAMPLE.replace('kind = "shunt"\nrange = "40 A"', 'kind = "series ohmmeter"\nhalf = "10 ohm"')
    path.write_text(
        text.replace('unit = "A"', 'unit = "ohm"').replace("to = 40", "to = inf"), encoding="utf-8"
    )
    out = run("table", path, "--json").stdout
    assert "Infinity" not in out
    (scale,) = json.loads(out)["scales"]
    assert scale["to"] == "inf"
    assert (scale["marks"][-1]["value"], scale["marks"][-1]["label"]) == ("inf", "∞")


def test_table_at_answers_for_any_value(dial_file: Path) -> None:
    """``--at`` answers for values that have no mark, and in the order asked."""
    (scale,) = json.loads(run("table", dial_file, "--json", "--at", "12.5", "--at", "1").stdout)["scales"]
    assert [m["value"] for m in scale["marks"]] == [12.5, 1.0]
    assert scale["marks"][0]["angle"] == pytest.approx(-44 + 88 * 12.5 / 40, abs=1e-9)


def test_table_at_answers_for_the_scales_that_can(tmp_path: Path) -> None:
    """A value beyond one scale's stops is told there and answered on the other; a comma is hinted at."""
    path = tmp_path / "two.toml"
    circuit = 'circuit = { kind = "shunt", range = "400 A" }'
    second = f'[[scale]]\nunit = "A"\nfrom = 0\nto = 400\nradius = 36\n{circuit}\n'
    path.write_text(SAMPLE.replace("[plate]", second + "[plate]"), encoding="utf-8")
    done = run("table", path, "--json", "--at", "300")
    (scale,) = json.loads(done.stdout)["scales"]
    assert (scale["to"], scale["marks"][0]["drive"]) == (400.0, pytest.approx(0.75))
    assert "scale 1: 300 A would stand at" in done.stderr
    assert "beyond the stops" in run("table", path, "--at", "3000", status=2).stderr
    assert "the decimal sign is a point: 1.5" in run("table", path, "--at", "1,5", status=2).stderr
    assert run("table", path, "--at", "\u22121").stdout


def test_readable_table_shows_values_and_labels(dial_file: Path) -> None:
    """The first column is the value, −4 to 20; labels have a column of their own where they differ."""
    labels = '[{ at = -4, label = "0" }, { at = 8, label = "half way" }, 20]'
    text = SAMPLE.replace("from = 0\nto = 40", "from = -4\nto = 20").replace(
        'kind = "shunt"\nrange = "40 A"', 'kind = "direct"\nrest = -4'
    )
    heads, rows = [], []
    for numbered in ("[-4, 8, 20]", labels):
        dial_file.write_text(
            text.replace(
                "radius = 44.0", f"radius = 44.0\nnumbered = {numbered}\ndivisions = {{ every = 4 }}"
            ),
            encoding="utf-8",
        )
        lines = run("table", dial_file).stdout.splitlines()
        heads.append(lines[1].split()[:2])
        rows.append([line.split()[:2] for line in lines[3:]])
    assert heads == [["value", "drive"], ["value", "label"]]
    values = ["−4", "0", "4", "8", "12", "16", "20"]
    assert [row[0] for row in rows[0]] == [row[0] for row in rows[1]] == values
    assert [rows[1][i][1] for i in (0, 3, 6)] == ["0", "half", "20"]


def test_spreads_are_of_the_chosen_scales_and_said_once(dial_file: Path) -> None:
    """Repeats of the movement's readings are said once for all scales; a scale's own only with it."""
    scale = SAMPLE[SAMPLE.index("[[scale]]") : SAMPLE.index("[plate]")]
    of_movement = "".join(f'[[movement.reading]]\ncurrent = "0.5 mA"\nangle = {a}\n' for a in (0.2, 0.6))
    own = "".join(f"[[scale.reading]]\nvalue = 10\nangle = {a}\n" for a in (-22.0, -21.0))
    text = SAMPLE.replace("[circuit]", of_movement + "[circuit]")
    third = scale.replace("44.0", "34.0") + own
    dial_file.write_text(
        text.replace("[plate]", scale.replace("44.0", "39.0") + third + "[plate]"), encoding="utf-8"
    )
    shared = "2 readings at 0 deg nominal, spread 0.4 deg, averaged"
    of_third = "scale 3: 2 readings at -22 deg nominal, spread 1 deg, averaged"
    for words, expected in (
        ([], [shared, of_third]),
        (["--scale", "1"], [shared]),
        (["--scale", "3"], [of_third]),
    ):
        lines = run("table", dial_file, *words).stdout.splitlines()
        assert [line for line in lines if "spread" in line] == expected


def test_readable_table_shows_the_worth_of_the_correction(tmp_path: Path) -> None:
    """A shunt built 1 % high reads high by 1 % less its share on a linear face: worked by hand at 40 A.

    With Rs = 1.89375 mΩ for a designed 1.875046876 mΩ the coil takes 40·Rs/(Rs + 75) A.
    """
    path = tmp_path / "built.toml"
    path.write_text(
        SAMPLE.replace('range = "40 A"', 'range = "40 A"\nbuilt = "1.89375 mohm"'), encoding="utf-8"
    )
    line = next(row for row in run("table", path).stdout.splitlines() if row.split()[:1] == ["40"])
    by_hand = 40 * (40 * 1.89375e-3 / (1.89375e-3 + 75) / 1e-3) - 40
    assert float(line.split()[-1]) == pytest.approx(by_hand, rel=1e-3)


def test_new_writes_a_template_that_draws(tmp_path: Path) -> None:
    """``new`` gives a file that draws as it stands, and never overwrites one unasked."""
    path = tmp_path / "new.toml"
    run("new", "square-panel", path)
    run("draw", path, "-o", tmp_path / "new.svg")
    path.write_text("mine", encoding="utf-8")
    run("new", "square-panel", path, status=2)
    assert path.read_text(encoding="utf-8") == "mine"
    run("new", "square-panel", path, "--force")
    assert path.read_text(encoding="utf-8") != "mine"


def test_warnings_go_to_standard_error_with_status_0(tmp_path: Path) -> None:
    """An assumed rest point is said on standard error, and the plate is drawn all the same."""
    path = tmp_path / "assumed.toml"
    reading = '[[movement.reading]]\ncurrent = "0.5 mA"\nangle = 0.4\n'
    path.write_text(SAMPLE.replace("[circuit]", reading + "[circuit]"), encoding="utf-8")
    done = run("draw", path, "-o", tmp_path / "assumed.svg")
    assert f"{path}:7:3: warning: movement.reading" in done.stderr
    assert "assumed" in done.stderr
    assert not done.stdout


def test_each_text_over_the_edge_is_warned_of_at_its_own_place(dial_file: Path) -> None:
    """Two texts of the same words, both off the plate, are two warnings; one on it is none."""
    text = '[[text]]\nsay = "SAME"\nat = [{x}, 5]\n'
    dial_file.write_text(SAMPLE + "".join(text.format(x=x) for x in (0, 42, -42)), encoding="utf-8")
    keys = [fault.key for fault in dialgen.load(dial_file).warnings()]
    assert keys == ["text[2]", "text[3]"]


def test_a_failed_draw_leaves_the_old_file(dial_file: Path) -> None:
    """Where the dial file is wrong, an output already there is left as it was, and nothing beside it."""
    output = dial_file.with_suffix(".svg")
    output.write_text("old", encoding="utf-8")
    dial_file.write_text(SAMPLE.replace("to = 40", "to = -1"), encoding="utf-8")
    run("draw", dial_file, "-o", output, status=2)
    assert output.read_text(encoding="utf-8") == "old"
    assert sorted(p.name for p in dial_file.parent.iterdir()) == ["meter.svg", "meter.toml"]


def test_an_output_that_is_a_link_is_written_through(dial_file: Path) -> None:
    """Drawing to a symbolic link replaces the file it leads to and keeps the link."""
    target = dial_file.with_name("real.svg")
    target.write_text("old", encoding="utf-8")
    link = dial_file.with_name("link.svg")
    link.symlink_to(target)
    run("draw", dial_file, "-o", link)
    assert link.is_symlink()
    assert target.read_bytes().startswith(b"<?xml")


@contextmanager
def watching(dial_file: Path, output: Path) -> Iterator[Callable[[str], None]]:
    """Draw with ``--watch``; give a function that waits until the program has said some words."""
    words = [sys.executable, "-m", "dialgen", "draw", str(dial_file), "-o", str(output), "--watch"]
    process = subprocess.Popen(
        words, stderr=subprocess.PIPE, text=True, env={**os.environ, "PYTHONUNBUFFERED": "1"}
    )
    assert process.stderr

    def until(words: str) -> None:
        for line in process.stderr:
            if words in line:
                return
        pytest.fail(f"the program ended before it said {words!r}")

    try:
        yield until
    finally:
        process.send_signal(signal.SIGINT)
        process.stderr.close()
        assert process.wait(timeout=20) == 0


def test_watch_draws_again_when_the_file_changes(dial_file: Path) -> None:
    """``--watch`` draws, survives a mistake, draws again once it is mended, and ends at Ctrl-C."""
    output = dial_file.with_suffix(".svg")
    with watching(dial_file, output) as until:
        until("drawn at")
        first = output.read_bytes()
        dial_file.write_text(SAMPLE.replace("radius = 44.0", "radius = -1"), encoding="utf-8")
        until("scale[1].radius")
        assert output.read_bytes() == first
        time.sleep(0.02)  # a file system may tell times apart only so finely
        dial_file.write_text(SAMPLE.replace("radius = 44.0", "radius = 40.0"), encoding="utf-8")
        until("drawn at")
        assert output.read_bytes() != first


@pytest.mark.parametrize(
    ("old", "new", "before", "after"),
    [
        (
            "full = 44.0\n",
            'full = 44.0\nreadings = "../data/x.csv"\n',
            "current,angle\n0.5 mA,0.4\n",
            "current,angle\n0.5 mA,4.0\n",
        ),
        (
            'kind = "shunt"\nrange = "40 A"\n[[scale]]\nunit = "A"\n',
            "kind = \"direct\"\n[[scale]]\nunit = \"%\"\nlaw = { kind = 'table', file = '../data/x.csv' }\n",
            "value,signal\n0,0\n20,1\n40,4\n",
            "value,signal\n0,0\n20,3\n40,4\n",
        ),
    ],
    ids=["readings", "table law"],
)
def test_watch_sees_the_csv_wherever_it_lies(
    tmp_path: Path, old: str, new: str, before: str, after: str
) -> None:
    """A CSV in another folder that the dial file names is watched too, also when saved by renaming."""
    assert old in SAMPLE
    sheet, path, output = tmp_path / "data" / "x.csv", tmp_path / "meter" / "m.toml", tmp_path / "m.svg"
    for file, text in ((sheet, before), (path, SAMPLE.replace(old, new))):
        file.parent.mkdir()
        file.write_text(text, encoding="utf-8")
    with watching(path, output) as until:
        until("drawn at")
        first = output.read_bytes()
        sheet.with_name("new").write_text(after + "\n", encoding="utf-8")
        sheet.with_name("new").replace(sheet)
        until("drawn at")
        assert output.read_bytes() != first


def test_a_watched_file_may_be_away(dial_file: Path) -> None:
    """A file that is gone between two looks, as when an editor renames, is no error."""
    dial_file.write_text('readings = "gone.csv"\nreadings = "a\0b.csv"\n', encoding="utf-8")
    assert [name for name, _, _ in _stamps(dial_file)] == [str(dial_file)]
    assert list(_stamps(dial_file.with_name("none.toml"))) == []


def test_layers_and_margin_are_the_users(dial_file: Path) -> None:
    """``--layers print`` leaves out cut and guide, and ``--margin 0`` makes the page the plate."""
    output = dial_file.with_suffix(".svg")
    run("draw", dial_file, "-o", output, "--layers", "print", "--margin", "0")
    text = output.read_text(encoding="utf-8")
    assert 'width="84mm"' in text
    assert 'id="print-' in text
    assert 'id="cut-' not in text
    assert 'id="guide-' not in text


def test_python_gives_angles_values_and_drawings(dial_file: Path) -> None:
    """The object from ``load`` answers for numbers and arrays, both ways, and draws by the ending."""
    dial = dialgen.load(dial_file)
    assert dial.angle(10.0) == pytest.approx(-22.0, abs=1e-12)
    assert isinstance(dial.angle(10.0), float)
    values = np.array([[0.0, 10.0], [20.0, 40.0]])
    angles = dial.angle(values)
    assert np.allclose(angles, -44 + 88 * values / 40, atol=1e-12)
    assert np.allclose(dial.value(angles), values, atol=1e-12)
    dial.draw(dial_file.with_suffix(".pdf"))
    assert dial_file.with_suffix(".pdf").read_bytes().startswith(b"%PDF")
    with pytest.raises(NoSuchValue, match="beyond the stops"):
        dial.angle(60.0)
    with pytest.raises(InputError, match="no scale 2"):
        dial.angle(1.0, scale=2)


def test_every_command_has_help_with_an_example() -> None:
    """The help of each command shows at least one line that could be typed."""
    listing = run("--help").stdout
    for name in ("new", "draw", "table"):
        assert f"  {name} " in listing
        assert f"  dialgen {name} " in run(name, "--help").stdout
    assert "_DIALGEN_COMPLETE" in listing


def test_defaults_of_draw_are_those_of_python() -> None:
    """What ``draw`` writes out, so that its help loads nothing, is what the library takes by default."""
    options = {option.name: option for option in draw_command.params}
    assert options["margin"].default == DEFAULT_MARGIN_MM
    assert options["resolution"].default == Options().resolution_dpi
    assert options["layers"].default == ",".join(Purpose)
    assert all(f" {ending}" in options["outputs"].help for ending in RENDERERS)
