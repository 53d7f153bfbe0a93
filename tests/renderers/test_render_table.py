"""The table of renderers: endings, lazy loading, refusals, purity."""

from __future__ import annotations

import hashlib
import os
import subprocess
import sys
from dataclasses import replace
from pathlib import Path

import pytest
from render_samples import INK, face, page

from dialgen.drawing import Layer, Line, Purpose
from dialgen.errors import InputError
from dialgen.renderers import RENDERERS, Options, render
from dialgen.renderers.runs import layer_names

HERE = Path(__file__).parent
ROOT = HERE.parents[1]
VECTORS = [".svg", ".pdf", ".dxf"]
LIBRARIES = ("svgwrite", "reportlab", "ezdxf", "cairo")


def _python(code: str, **env: str) -> str:
    """Return what a fresh Python prints."""
    path = os.pathsep.join([str(ROOT), str(HERE)])
    done = subprocess.run(
        [sys.executable, "-c", code],
        env=os.environ | {"PYTHONPATH": path} | env,
        capture_output=True,
        text=True,
        check=True,
    )
    return done.stdout


def _formats() -> list[str]:
    try:
        import cairo  # noqa: F401
    except ImportError:
        return VECTORS
    return list(RENDERERS)


def test_table_has_the_four_endings() -> None:
    """The endings known are exactly those the commands promise."""
    assert set(RENDERERS) == {".svg", ".pdf", ".png", ".dxf"}


def test_importing_the_room_loads_no_drawing_library() -> None:
    """The table alone costs no import of any library that draws."""
    code = f"import sys, dialgen.renderers; print([m for m in {LIBRARIES} if m in sys.modules])"
    assert _python(code).strip() == "[]"


@pytest.mark.parametrize(
    ("suffix", "library"), [(".svg", "svgwrite"), (".pdf", "reportlab"), (".dxf", "ezdxf")]
)
def test_each_format_loads_its_own_library_alone(suffix: str, library: str) -> None:
    """Drawing one format leaves the libraries of the others unloaded."""
    code = (
        "import sys, render_samples; from dialgen.renderers import render;"
        f"before = set(sys.modules); render(render_samples.face(), {suffix!r});"
        f"print([m for m in {LIBRARIES} if m in sys.modules])"
    )
    assert _python(code).strip() == f"['{library}']"


def test_unknown_ending_names_those_known() -> None:
    """A wrong ending is refused with the list of right ones."""
    with pytest.raises(InputError, match=r"'\.bmp'.*\.svg, \.pdf, \.png, \.dxf"):
        render(page(), ".bmp")


def test_capitals_in_the_ending_do_not_matter() -> None:
    """PLATE.SVG is as good as plate.svg."""
    assert render(face(), ".SVG") == render(face(), ".svg")


@pytest.mark.parametrize("width", [0.0, -1.0, float("nan"), float("inf")])
def test_page_without_a_size_is_refused(width: float) -> None:
    """A page must be wider than nothing, and finite."""
    with pytest.raises(InputError, match="width"):
        render(replace(page(), width=width), ".svg")


@pytest.mark.parametrize("suffix", _formats())
def test_same_drawing_gives_same_bytes_and_stays_as_it_was(suffix: str) -> None:
    """Rendering is pure: twice the same bytes, and nothing of the drawing changes."""
    drawing = face()
    assert render(drawing, suffix) == render(drawing, suffix)
    assert drawing == face()


@pytest.mark.parametrize("seed", ["1", "5", "4711"])
def test_bytes_do_not_depend_on_the_process(seed: str) -> None:
    """Another process, with other hashes and another clock, writes the very same files."""
    code = (
        "import hashlib, render_samples; from dialgen.renderers import render;"
        f"print([hashlib.sha256(render(render_samples.face(), s)).hexdigest() for s in {_formats()}])"
    )
    here = [hashlib.sha256(render(face(), suffix)).hexdigest() for suffix in _formats()]
    assert _python(code, PYTHONHASHSEED=seed, TZ="Asia/Tokyo").strip() == str(here)


@pytest.mark.parametrize("suffix", _formats())
def test_empty_page_is_a_file_all_the_same(suffix: str) -> None:
    """A drawing without layers, or with an empty one, is a blank page and no error."""
    assert render(replace(page(), layers=()), suffix)
    assert render(page(), suffix)


@pytest.mark.parametrize("suffix", _formats())
def test_changed_drawing_changes_the_bytes(suffix: str) -> None:
    """A mark moved by a tenth of a millimetre shows in every format."""
    files = [render(page(Line((0, 0), (x, 20.0), INK)), suffix) for x in (10.0, 10.1)]
    assert files[0] != files[1]


def test_layer_names_are_safe_and_told_apart() -> None:
    """Names that only differ in capitals or unsafe characters get different safe names."""
    names = ["scale 1", "Scale_1", "Ω", "%", "scale 1-2"]
    layers = tuple(Layer(name=name, purpose=Purpose.PRINT, items=()) for name in names)
    assert layer_names(page(layers=layers)) == [
        "print-scale_1",
        "print-Scale_1-2",
        "print-_",
        "print-_-2",
        "print-scale_1-2-2",
    ]


def test_options_have_the_promised_defaults() -> None:
    """Pictures are 600 dpi and letters are shared unless asked otherwise."""
    assert Options() == Options(resolution_dpi=600.0, inline_glyphs=False)
