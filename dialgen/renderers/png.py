"""Drawing to PNG: a picture at an exact scale that knows its own resolution."""

from __future__ import annotations

import io
import math
import struct
import zlib
from collections.abc import Callable, Iterable
from types import ModuleType
from typing import TYPE_CHECKING, Any, assert_never

from dialgen.drawing import Arc, Cap, Circle, Drawing, Letters, Outline, PathStep
from dialgen.errors import InputError, MissingExtra
from dialgen.renderers import Options
from dialgen.renderers.curves import cubic, placed_steps, steps
from dialgen.renderers.runs import Lines, Run, fill_of, is_stroked, rgb, runs, stroke_of

if TYPE_CHECKING:
    from cairo import Context

MM_PER_INCH = 25.4
LARGEST_PX = 20_000
"""The longest side of a picture that is still worth the memory it takes."""

_TOLERANCE_PX = 0.02
_IHDR_END = 33  # signature 8, then IHDR: length 4, kind 4, data 13, check 4


def render(drawing: Drawing, options: Options) -> bytes:
    """Return ``drawing`` as a PNG on white, ``resolution_dpi`` to the inch.

    The page's upper left corner is the picture's.  A page that is no whole number of pixels is
    given the next larger picture; it is never stretched.

    Raises:
        InputError: when the resolution is not above 0, or the picture would be absurdly large.
        MissingExtra: when pycairo is not installed.
    """
    cairo = _cairo()
    width_px, height_px = _size_px(drawing, options.resolution_dpi)
    surface = cairo.ImageSurface(cairo.FORMAT_RGB24, width_px, height_px)
    context = cairo.Context(surface)
    context.set_source_rgb(1, 1, 1)
    context.paint()
    context.set_tolerance(_TOLERANCE_PX)
    scale = options.resolution_dpi / MM_PER_INCH
    context.transform(cairo.Matrix(scale, 0, 0, -scale, -drawing.left * scale, drawing.top * scale))
    for layer in drawing.layers:
        for run in runs(layer.items):
            _draw(cairo, context, run)
    file = io.BytesIO()
    surface.write_to_png(file)
    return _with_resolution(file.getvalue(), options.resolution_dpi)


def _cairo() -> ModuleType:
    """Return the module ``cairo``, which is an extra."""
    try:
        import cairo
    except ImportError as error:
        raise MissingExtra(
            "PNG needs pycairo; pip install 'dialgen[png]' (on Debian first: "
            "apt-get install libcairo2-dev pkg-config build-essential python3-dev)"
        ) from error
    return cairo


def _size_px(drawing: Drawing, resolution_dpi: float) -> tuple[int, int]:
    if not (math.isfinite(resolution_dpi) and resolution_dpi > 0):
        raise InputError(f"the resolution is {resolution_dpi:g} dpi; it must be above 0")
    longest_mm = max(drawing.width, drawing.height)
    if longest_mm * resolution_dpi / MM_PER_INCH > LARGEST_PX:
        fitting_dpi = math.floor(LARGEST_PX * MM_PER_INCH / longest_mm)
        raise InputError(
            f"{longest_mm:g} mm at {resolution_dpi:g} dpi is more than {LARGEST_PX} pixels; "
            f"a resolution up to {fitting_dpi} dpi fits"
        )
    # 25.4 mm at 600 dpi is 600 pixels, whatever the last bit of the product says.
    width_px, height_px = (
        max(1, math.ceil(side * resolution_dpi / MM_PER_INCH - 1e-6))
        for side in (drawing.width, drawing.height)
    )
    return width_px, height_px


def _draw(cairo: ModuleType, context: Context[Any], run: Run) -> None:
    match run:
        case Lines() | Arc() | Circle() | Outline():
            _trace(context, steps(run))
        case Letters():
            for placed in run.glyphs:
                _trace(context, cubic(placed_steps(placed)))
        case _:
            assert_never(run)
    if fill := fill_of(run):
        context.set_source_rgb(*(part / 255 for part in rgb(fill)))
        context.fill_preserve()
    if stroke := stroke_of(run):
        context.set_source_rgb(*(part / 255 for part in rgb(stroke)))
        context.set_line_width(run.style.width_mm)
        context.set_line_cap(cairo.LINE_CAP_ROUND if run.style.cap is Cap.ROUND else cairo.LINE_CAP_BUTT)
        lettered = isinstance(run, Letters) and is_stroked(run)
        context.set_line_join(cairo.LINE_JOIN_ROUND if lettered else cairo.LINE_JOIN_MITER)
        context.stroke_preserve()
    context.new_path()


def _trace(context: Context[Any], path_steps: Iterable[PathStep]) -> None:
    draw: dict[str, Callable[..., None]] = {
        "M": context.move_to,
        "L": context.line_to,
        "C": context.curve_to,
        "Z": context.close_path,
    }
    for code, values in path_steps:
        draw[code](*values)


def _with_resolution(picture: bytes, resolution_dpi: float) -> bytes:
    """Return a PNG with its resolution stored; cairo's own writer stores none."""
    per_metre = round(resolution_dpi / MM_PER_INCH * 1000)
    body = b"pHYs" + struct.pack(">IIB", per_metre, per_metre, 1)
    chunk = struct.pack(">I", 9) + body + struct.pack(">I", zlib.crc32(body))
    return picture[:_IHDR_END] + chunk + picture[_IHDR_END:]
