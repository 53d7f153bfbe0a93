"""Scales that share a line: it is drawn once, by the scale that needs all of it."""

from __future__ import annotations

from pathlib import Path

import pytest

import dialgen

FILE = """
dialgen = 1
[movement]
rest = -45
full = 45
stops = [-60, 60]
{scales}
[plate]
size = [110, 84]
pivot = [55, 12]
"""
SCALE = """
[[scale]]
unit = "{unit}"
from = 0
to = {to}
circuit = {{ kind = "direct", full = {full} }}
{keys}
"""
INSIDE = 'marks = "inward"\nnumerals = "inside"\n'


def scale(unit: str, to: float, full: float, keys: str = "", radius: float = 42.0) -> str:
    """Return a scale from 0 on a line of some radius."""
    return SCALE.format(unit=unit, to=to, full=full, keys=f"radius = {radius}\n{keys}")


@pytest.mark.parametrize(
    ("scales", "drawn"),
    [
        ((scale("psi", 60, 60), scale("kPa", 400, 413.685, INSIDE)), [1]),
        ((scale("kPa", 400, 413.685), scale("psi", 60, 60, INSIDE)), [2]),
        ((scale("psi", 60, 60), scale("bar", 4, 4, INSIDE)), [1]),
        ((scale("psi", 60, 60), scale("bar", 4, 4, INSIDE + "heavy = [1, 2]")), [2]),
        ((scale("psi", 60, 60), scale("bar", 4, 4, radius=30.0)), [1, 2]),
    ],
    ids=["the longer first", "the longer second", "alike", "one is heavy", "two lines"],
)
def test_a_shared_line_is_drawn_once(scales: tuple[str, ...], drawn: list[int], tmp_path: Path) -> None:
    """Of scales on one line only the one whose line holds the other's draws it; the first of two alike."""
    path = tmp_path / "dial.toml"
    path.write_text(FILE.format(scales="".join(scales)), encoding="utf-8")
    face = dialgen.load(path)
    names = [layer.name for layer in face.drawing.layers]
    assert [number for number in (1, 2) if f"scale {number} line" in names] == drawn
    assert all(f"scale {number} marks" in names for number in (1, 2))
