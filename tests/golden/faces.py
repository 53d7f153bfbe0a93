"""The faces of the golden images: each by the fact that its picture keeps, in words."""

from __future__ import annotations

import io
import tempfile
from collections.abc import Mapping
from pathlib import Path

from PIL import Image

import dialgen
from dialgen.drawing import Drawing, Purpose
from dialgen.renderers import Options, render

FOLDER = Path(__file__).parent
RESOLUTION_DPI = 150.0


def _dial(scale: str, rest: str = "", *, ends: str = "rest = -40\nfull = 40", circuit: str = "") -> str:
    return (
        f"dialgen = 1\n[movement]\ncurrent = '1 mA'\nresistance = '75 ohm'\n{ends}\n{circuit}\n"
        f"[plate]\nsize = [52, 27]\npivot = [26, -3]\n[[scale]]\nradius = 22\n{scale}\n{rest}\n"
    )


FACES: Mapping[str, str] = {
    "hung-minus-and-plus": _dial(
        "unit = 'A'\nfrom = -30\nto = 30\nnumbered = { every = 10 }\nsign = 'always'",
        ends="rest = 0\nfull = 40",
        circuit="[circuit]\nkind = 'shunt'\nrange = '30 A'",
    ),
    "blocks-alternate-along-a-double-line": _dial(
        "unit = 'bar'\nfrom = 0\nto = 10\nnumbered = { every = 2 }\ndivisions = { every = 0.5 }",
        "[look]\nstyle = 'parchment'",
    ),
    "hatch-and-triangle": _dial(
        "unit = 'V'\nfrom = 0\nto = 40\nnumbered = { every = 10 }",
        "[[zone]]\nfrom = 20\nto = 30\ncolour = 'black'\nhatch = true\nwidth = 1.6\n"
        "[[zone]]\nfrom = 30\nto = 40\ncolour = 'red'\nwidth = 1.6\n"
        "[[limit]]\nat = 30\nshape = 'triangle'\n[[limit]]\nat = 40",
    ),
    "rows-of-numerals": _dial(
        "unit = 'V'\nfrom = 0\nto = 10\nnumbered = { every = 2 }\nmarks = 'inward'\n"
        "also = [{ times = 5 }, { times = 25, numerals = 'inside' }]",
    ).replace("[52, 27]", "[52, 29]"),
    "symbols-in-a-row": _dial(
        "unit = 'V'\nfrom = 0\nto = 10\nnumbered = [0, 5, 10]\nclass = 1.5",
        "[symbols]\nshow = ['auto', 'class', 'vertical', 'test 2 kV']\nat = [0, 7]\nheight = 3.6\n"
        "[dial]\ntested = 2026-05-01",
    ),
    "single-strokes-and-a-broken-line-outside-the-effective-range": _dial(
        "unit = 'Ω'\nfrom = 0\nto = 60\nnumbered = [0, 20, 30, 40, 50, 60]\neffective = [20, 50]",
        "[look]\nstyle = 'graver'",
    ),
}
"""Dial files by the name of their image."""


def drawing(text: str) -> Drawing:
    """Return what is drawn of a dial file."""
    with tempfile.TemporaryDirectory() as folder:
        path = Path(folder) / "dial.toml"
        path.write_text(text, encoding="utf-8")
        return dialgen.load(path).drawing


def picture(drawn: Drawing) -> Image.Image:
    """Return the print layers of a drawing as a picture."""
    printed = drawn.only(frozenset({Purpose.PRINT}))
    data = render(printed, ".png", Options(resolution_dpi=RESOLUTION_DPI))
    return Image.open(io.BytesIO(data)).convert("RGB")
