"""PNG pictures, read back with Pillow."""

from __future__ import annotations

import io
import sys

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from PIL import Image
from render_samples import INK, few, page

from dialgen.drawing import Arc, Circle, Line, Style
from dialgen.errors import InputError, MissingExtra
from dialgen.renderers import Options, render

DOT = Style(fill="#000000")


def _png(drawing, resolution_dpi=600.0):
    return render(drawing, ".png", Options(resolution_dpi=resolution_dpi))


def _open(data):
    return Image.open(io.BytesIO(data))


def _centroid_mm(data, drawing, resolution_dpi):
    """Return where the ink's middle is in plate coordinates; a pixel's own middle is at its half."""
    ink = 255.0 - np.asarray(_open(data).convert("L"), dtype=float)
    rows, columns = np.indices(ink.shape) + 0.5
    scale = resolution_dpi / 25.4
    column, row = (ink * columns).sum() / ink.sum(), (ink * rows).sum() / ink.sum()
    return drawing.left + column / scale, drawing.top - row / scale


def test_missing_cairo_says_what_to_install(monkeypatch) -> None:
    """Without pycairo there is one line that names the extra and Debian's packages."""
    monkeypatch.setitem(sys.modules, "cairo", None)
    with pytest.raises(MissingExtra) as caught:
        _png(page())
    message = str(caught.value)
    assert "pip install 'dialgen[png]'" in message
    assert "apt-get install libcairo2-dev pkg-config build-essential python3-dev" in message
    assert "\n" not in message


@pytest.mark.parametrize("resolution_dpi", [96.0, 300.0, 600.0, 1200.0])
def test_resolution_is_stored(resolution_dpi: float) -> None:
    """The picture knows its pixels per metre, so it prints at true size."""
    pytest.importorskip("cairo")
    picture = _open(_png(page(width=20.0, height=10.0), resolution_dpi))
    assert picture.info["dpi"] == pytest.approx((resolution_dpi, resolution_dpi), abs=0.02)
    picture.load()  # checks every chunk


@pytest.mark.parametrize(
    ("width", "height", "size"),
    [
        (25.4, 50.8, (600, 1200)),
        (25.41, 50.79, (601, 1200)),
        (100.0, 80.0, (2363, 1890)),
        (0.01, 0.01, (1, 1)),
    ],
)
def test_size_is_the_page_rounded_up(width: float, height: float, size: tuple[int, int]) -> None:
    """The picture holds the whole page and less than a pixel more."""
    pytest.importorskip("cairo")
    assert _open(_png(page(width=width, height=height))).size == size


@few
@given(st.floats(-19, 19), st.floats(-9, 9), st.floats(100, 700))
def test_mark_stands_within_half_a_pixel(x: float, y: float, resolution_dpi: float) -> None:
    """A mark's middle is where the drawing has it, at any resolution, anywhere on the page."""
    pytest.importorskip("cairo")
    drawing = page(
        Line((x - 0.3, y), (x + 0.3, y + 0.2), INK), left=-20.0, bottom=-10.0, width=40.3, height=20.7
    )
    seen = _centroid_mm(_png(drawing, resolution_dpi), drawing, resolution_dpi)
    assert np.abs(np.subtract(seen, (x, y + 0.1))).max() < 0.5 * 25.4 / resolution_dpi


def test_far_corner_is_not_stretched() -> None:
    """On a page of 2362.2 pixels a dot near the far corner is within a tenth of a pixel."""
    pytest.importorskip("cairo")
    drawing = page(Circle((98.0, -78.0), 0.8, DOT), left=0.0, bottom=-80.0, width=100.0, height=80.0)
    seen = _centroid_mm(_png(drawing), drawing, 600.0)
    assert np.abs(np.subtract(seen, (98.0, -78.0))).max() < 0.1 * 25.4 / 600


def test_arc_is_round_within_half_a_pixel() -> None:
    """Along a whole arc the middle of the stroke is at its radius."""
    pytest.importorskip("cairo")
    drawing = page(Arc((0.0, 0.0), 40.0, -45.0, 45.0, INK))
    ink = 255.0 - np.asarray(_open(_png(drawing)).convert("L"), dtype=float)
    scale = 600 / 25.4
    rows, columns = np.nonzero(ink)
    x, y = drawing.left + (columns + 0.5) / scale, drawing.top - (rows + 0.5) / scale
    bearing, radius = np.degrees(np.arctan2(x, y)), np.hypot(x, y)
    for start in range(-44, 44):
        sector = (bearing >= start) & (bearing < start + 1)
        weight = ink[rows, columns][sector]
        assert abs((radius[sector] * weight).sum() / weight.sum() - 40.0) < 0.5 / scale


def test_ground_is_white_and_colours_are_true() -> None:
    """Where nothing is drawn the picture is white; a filled circle has its own colour."""
    pytest.importorskip("cairo")
    picture = _open(_png(page(Circle((0.0, 0.0), 3.0, Style(fill="#cc2200"))), 100.0)).convert("RGB")
    assert picture.getpixel((0, 0)) == (255, 255, 255)
    assert picture.getpixel((round(50 / 0.254), round(58.8 / 0.254))) == (0xCC, 0x22, 0x00)


def test_absurd_picture_is_refused_with_a_resolution_that_fits() -> None:
    """A metre at 600 dpi is refused; the resolution proposed is then accepted."""
    pytest.importorskip("cairo")
    poster = page(width=1000.0, height=1.0)
    with pytest.raises(InputError, match="up to 508 dpi"):
        _png(poster)
    assert _open(_png(poster, 508.0)).size[0] == 20_000


@pytest.mark.parametrize("resolution_dpi", [0.0, -300.0, float("nan"), float("inf")])
def test_resolution_must_be_above_nought(resolution_dpi: float) -> None:
    """A resolution that is none is refused."""
    pytest.importorskip("cairo")
    with pytest.raises(InputError, match="resolution"):
        _png(page(), resolution_dpi)
