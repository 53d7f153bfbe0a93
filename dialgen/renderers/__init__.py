"""Drawing to file: one renderer per format, all with the same protocol.

A renderer is a module with one public function, ``render(drawing, options) -> bytes``.  It is
pure: the same drawing gives the same bytes, with no dates and no random ids.  The table below
names the modules instead of importing them, so that drawing an SVG never loads the PDF library.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from importlib import import_module
from types import MappingProxyType

from dialgen.drawing import Drawing
from dialgen.errors import InputError

__all__ = ["RENDERERS", "Options", "render"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Options:
    """What a file format leaves open.

    Args:
        resolution_dpi: pixels per inch of a picture.
        inline_glyphs: write every letter's outline in place, for programs that cannot follow
            a reference to a shape defined once.
    """

    resolution_dpi: float = 600.0
    inline_glyphs: bool = False


RENDERERS: Mapping[str, str] = MappingProxyType(
    {
        ".svg": "dialgen.renderers.svg",
        ".pdf": "dialgen.renderers.pdf",
        ".png": "dialgen.renderers.png",
        ".dxf": "dialgen.renderers.dxf",
    }
)
"""The module that writes each file ending."""


def render(drawing: Drawing, suffix: str, options: Options = Options()) -> bytes:
    """Return the file that shows ``drawing`` at true size.

    Args:
        drawing: what to write.
        suffix: the file's ending with its dot, such as ``".svg"``; capitals do not matter.
        options: what the format leaves open.

    Raises:
        InputError: when no renderer writes that ending, or the page has no size.
        MissingExtra: when the format needs a part that is not installed.
    """
    module = RENDERERS.get(suffix.lower())
    if module is None:
        raise InputError(f"no file of the kind {suffix!r} can be drawn; use one of {', '.join(RENDERERS)}")
    for name, side_mm in (("width", drawing.width), ("height", drawing.height)):
        if not (math.isfinite(side_mm) and side_mm > 0):
            raise InputError(f"the page's {name} is {side_mm:g} mm; it must be above 0")
    data: bytes = import_module(module).render(drawing, options)
    return data
