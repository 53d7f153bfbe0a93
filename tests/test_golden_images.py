"""Pictures that were looked at and kept: drawn again they are the same, and a small change is found."""

from __future__ import annotations

import subprocess
import sys
from collections.abc import Callable
from dataclasses import replace
from pathlib import Path

import numpy as np
import pytest

pytest.importorskip("cairo")
pytest.importorskip("PIL")

from golden.faces import FACES, FOLDER, RESOLUTION_DPI, drawing, picture
from PIL import Image

from dialgen.drawing import Drawing, Letters, Line, Outline, Primitive

MOST, MOST_BYTES = 6, 30_000
DIFFERENT, SHARE = 40, 1e-4
"""How far a part of a pixel's colour may be off, of 255, and the share of pixels that may be farther off."""

PIXEL_MM = 25.4 / RESOLUTION_DPI


def difference(kept: Path, drawn: Image.Image, folder: Path) -> str | None:
    """Say how a picture differs from the one that is kept, and where it was put to be looked at."""
    with Image.open(kept) as image:
        wanted = np.asarray(image.convert("RGB"), dtype=int)
    found = np.asarray(drawn, dtype=int)
    if found.shape != wanted.shape:
        what = f"is {drawn.width} by {drawn.height} pixels, not {wanted.shape[1]} by {wanted.shape[0]}"
    else:
        off = (np.abs(found - wanted) > DIFFERENT).any(axis=2)
        if off.mean() <= SHARE:
            return None
        rows, columns = np.nonzero(off)
        what = (
            f"differs in {off.sum()} pixels, from column {columns.min()} and row {rows.min()} "
            f"to {columns.max()} and {rows.max()}"
        )
    put = folder / kept.name
    drawn.save(put)
    return f"{kept.name} {what}; see {put}, and draw it again with {FOLDER / 'redraw.py'} if that is meant"


@pytest.mark.parametrize("name", FACES)
def test_a_face_is_drawn_as_it_was_kept(name: str, tmp_path: Path) -> None:
    """The face has the size that was kept, and hardly a pixel of another colour."""
    assert difference(FOLDER / f"{name}.png", picture(drawing(FACES[name])), tmp_path) is None


def test_the_images_are_few_small_and_all_named() -> None:
    """At most six, each below 30 kB, and none without its face."""
    images = sorted(FOLDER.glob("*.png"))
    assert [image.stem for image in images] == sorted(FACES)
    assert 1 <= len(images) <= MOST
    assert max(image.stat().st_size for image in images) < MOST_BYTES


def test_the_command_that_draws_them_again_runs() -> None:
    """With a word that is in no name it starts, draws nothing and changes nothing."""
    before = {image: image.read_bytes() for image in FOLDER.glob("*.png")}
    done = subprocess.run(
        [sys.executable, FOLDER / "redraw.py", "no such name"], capture_output=True, text=True, check=True
    )
    assert (done.stdout, done.stderr) == ("", "")
    assert {image: image.read_bytes() for image in FOLDER.glob("*.png")} == before


# ---------------------------------------------------------------- the comparison can fail

NAME = "hung-minus-and-plus"
Spoil = Callable[[Primitive], Primitive]


def spoiled(layer_name: str, number: int, spoil: Spoil) -> Drawing:
    """The drawing of one face with a single thing of a layer spoiled."""
    drawn = drawing(FACES[NAME])
    layers = []
    for layer in drawn.layers:
        if layer.name == layer_name:
            items = list(layer.items)
            items[number] = spoil(items[number])
            layer = replace(layer, items=tuple(items))  # noqa: PLW2901  (the same layer, spoiled)
        layers.append(layer)
    return replace(drawn, layers=tuple(layers))


def moved(item: Primitive, right_mm: float, up_mm: float) -> Primitive:
    """A mark or a numeral moved."""
    match item:
        case Line(start, end):
            ends = [(x + right_mm, y + up_mm) for x, y in (start, end)]
            return replace(item, start=ends[0], end=ends[1])
        case Letters():
            spots = [replace(spot, x=spot.x + right_mm, y=spot.y + up_mm) for spot in item.glyphs]
            return replace(item, glyphs=tuple(spots))
        case Outline():
            corners = [replace(corner, x=corner.x + right_mm, y=corner.y + up_mm) for corner in item.vertices]
            return replace(item, vertices=tuple(corners))
    raise TypeError(item)


def coloured(item: Primitive) -> Primitive:
    """A mark in a dark grey instead of black."""
    return replace(item, style=replace(item.style, stroke="#404040"))


SPOILED = {
    "a numbered mark moved by a pixel": lambda: spoiled(
        "scale 1 marks", 2, lambda it: moved(it, PIXEL_MM, 0)
    ),
    "a fine mark moved by a pixel": lambda: spoiled("scale 1 marks", -6, lambda it: moved(it, PIXEL_MM, 0)),
    "a numeral moved up by a pixel": lambda: spoiled(
        "scale 1 numerals", 0, lambda it: moved(it, 0, PIXEL_MM)
    ),
    "a mark in another colour": lambda: spoiled("scale 1 marks", 1, coloured),
    "another numeral": lambda: drawing(
        FACES[NAME].replace(
            "numbered = { every = 10 }", 'numbered = [-30, -20, -10, 0, 10, { at = 20, label = "+28" }, 30]'
        )
    ),
    "a minus that is not hung": lambda: spoiled(
        "scale 1 numerals", 1, lambda it: moved(it, it.glyphs[1].x - it.glyphs[0].x, 0)
    ),
    "another ground": lambda: drawing(FACES[NAME] + "[look]\nground = '#d0d0d0'"),
}


@pytest.mark.parametrize("what", SPOILED)
def test_the_comparison_finds(what: str, tmp_path: Path) -> None:
    """A change that an eye would see at the bench fails, and the picture is put where the message says."""
    found = difference(FOLDER / f"{NAME}.png", picture(SPOILED[what]()), tmp_path)
    assert found is not None
    assert "differs in " in found
    put = tmp_path / f"{NAME}.png"
    assert str(put) in found
    with Image.open(put) as image:
        assert image.size == picture(drawing(FACES[NAME])).size


def test_the_comparison_finds_another_size(tmp_path: Path) -> None:
    """A plate one millimetre wider is not scaled to fit: its size alone fails."""
    wider = drawing(FACES[NAME].replace("size = [52, 27]", "size = [53, 27]"))
    found = difference(FOLDER / f"{NAME}.png", picture(wider), tmp_path)
    assert found is not None
    assert "313 by 160 pixels, not 308 by 160" in found
    assert (tmp_path / f"{NAME}.png").exists()


def test_what_a_printer_would_not_show_is_let_pass(tmp_path: Path) -> None:
    """A mark moved by a thousandth of a millimetre, or a hair of another black, is the same picture."""
    for number in range(3):
        drawn = spoiled("scale 1 marks", number, lambda item: moved(item, 0.001, 0.0))
        assert difference(FOLDER / f"{NAME}.png", picture(drawn), tmp_path) is None
    assert not list(tmp_path.iterdir())
