"""The samples: finished faces kept in the repository, which must be what the code draws today."""

from __future__ import annotations

import re
from itertools import zip_longest
from pathlib import Path

import pytest
from redraw_samples import COMMAND, RESOLUTION_DPI, SAMPLES, SCHEMATICS, dial_files, redraw

import dialgen
from dialgen.renderers import render

FILES = dial_files()
NAMES = [path.stem for path in FILES]
LAST_DIGIT_MM = 1.5e-5  # an SVG has five decimals; the last may turn over with another processor
_NUMBER = re.compile(r"-?\d+(?:\.\d+)?")


def difference(kept: str, drawn: str) -> str | None:
    """Return in words where two SVG files first differ, or None: words to the letter, numbers to 15 nm."""
    for i, (one, other) in enumerate(zip_longest(kept.split(">"), drawn.split(">"), fillvalue="")):
        if _NUMBER.sub("0", one) == _NUMBER.sub("0", other):
            pairs = zip(_NUMBER.findall(one), _NUMBER.findall(other), strict=True)
            if all(abs(float(a) - float(b)) < LAST_DIGIT_MM for a, b in pairs):
                continue
        return f"element {i} is kept as {one.strip()[:200]!r} but drawn as {other.strip()[:200]!r}"
    return None


def _check_kept(kept: Path, drawn: str) -> None:
    found = difference(kept.read_text(encoding="utf-8"), drawn)
    assert found is None, f"{kept.name}: {found}; if the change is meant, run: {COMMAND}"


def test_the_five_kinds_asked_for_are_there() -> None:
    """An ammeter with eleven readings, ohms to infinity, decibels, a square law and an edgewise one."""
    faces = {path.stem: dialgen.load(path).dial.file for path in FILES}
    assert len(faces["battery-ammeter"].movement.all_readings()) == 11
    assert faces["battery-ammeter"].circuit.kind == "shunt"
    firsts = {name: file.scale[0] for name, file in faces.items()}
    assert firsts["bench-ohmmeter"].end == float("inf")
    assert firsts["platform-level"].law.kind == "decibel"
    assert firsts["heater-power"].law.exponent == 0.5
    assert firsts["water-tower"].line is not None


@pytest.mark.parametrize("path", FILES, ids=NAMES)
def test_sample_loads_without_a_warning(path: Path) -> None:
    """A sample is a good dial file: no error, and nothing to remark on."""
    assert dialgen.load(path).warnings() == ()


@pytest.mark.parametrize("path", FILES, ids=NAMES)
def test_sample_says_that_it_is_invented(path: Path) -> None:
    """The head of every sample says that its data are invented."""
    head = path.read_text(encoding="utf-8").partition("dialgen = 1")[0]
    assert "# Invented data:" in head


@pytest.mark.parametrize("path", FILES, ids=NAMES)
def test_kept_drawing_is_what_the_code_draws(path: Path) -> None:
    """The SVG in the repository is the one that today's code draws of the dial file beside it."""
    _check_kept(path.with_suffix(".svg"), dialgen.load(path).render(".svg").decode())


@pytest.mark.parametrize("path", FILES, ids=NAMES)
def test_every_format_is_kept_and_small(path: Path) -> None:
    """Beside every dial file lie its SVG, PDF and PNG, none over 250 kB."""
    for suffix in (".svg", ".pdf", ".png"):
        assert 1_000 < path.with_suffix(suffix).stat().st_size < 250_000


def test_nothing_else_lies_among_the_samples() -> None:
    """Every sample has a folder of its own name with its dial file, readings and drawings, no more."""
    for folder in SAMPLES.iterdir():
        names = {item.name for item in folder.iterdir()}
        wanted = {f"{folder.name}{suffix}" for suffix in (".toml", ".svg", ".pdf", ".png")}
        if folder.name in SCHEMATICS:
            wanted |= {f"{folder.name}-circuit.svg", f"{folder.name}-circuit.png"}
        assert wanted <= names <= wanted | {f"{folder.name}.csv"}


@pytest.mark.parametrize("name", SCHEMATICS)
def test_kept_schematic_is_what_the_code_draws(name: str) -> None:
    """The schematic in the repository is the one that today's code draws of the dial file beside it."""
    face = dialgen.load(SAMPLES / name / f"{name}.toml")
    drawing = face.schematic(face.circuits[SCHEMATICS[name] - 1])
    _check_kept(SAMPLES / name / f"{name}-circuit.svg", render(drawing, ".svg").decode())


def test_comparison_can_fail(tmp_path: Path) -> None:
    """A mark moved by 0.1 µm, another word and a missing end are found, with the command that redraws."""
    drawn = dialgen.load(FILES[0]).render(".svg").decode()
    place = re.search(r"M (-?\d+\.\d{5}),", drawn)
    assert place is not None
    moved = f"{float(place[1]) + 1e-4:.5f}"
    nudged = f"{float(place[1]) + 1e-5:.5f}"
    kept = tmp_path / "kept.svg"
    for wrong in (drawn.replace(place[1], moved), drawn.replace("mm", "cm", 1), drawn[:-9], drawn + "<g/>"):
        kept.write_text(wrong, encoding="utf-8")
        with pytest.raises(AssertionError, match=COMMAND):
            _check_kept(kept, drawn)
    for same in (drawn, drawn.replace(place[1], nudged)):
        assert difference(drawn, same) is None


def test_redrawing_writes_the_three_drawings(tmp_path: Path) -> None:
    """The redraw command writes SVG, PDF and PNG beside a dial file, the PNG at 300 dpi."""
    pytest.importorskip("cairo")
    image = pytest.importorskip("PIL.Image")
    original = SAMPLES / "bench-ohmmeter" / "bench-ohmmeter.toml"
    copy = tmp_path / original.name
    copy.write_bytes(original.read_bytes())
    written = redraw(copy)
    assert sorted(path.name for path in tmp_path.iterdir()) == sorted([copy.name, *(p.name for p in written)])
    with image.open(copy.with_suffix(".png")) as picture:
        assert picture.info["dpi"][0] == pytest.approx(RESOLUTION_DPI, abs=0.02)
