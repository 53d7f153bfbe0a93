"""What the renderers share about a drawing's items, layers and inks."""

from __future__ import annotations

import re
from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from itertools import groupby

from dialgen.drawing import Arc, Circle, Drawing, Glyph, Letters, Line, Outline, Primitive, Style


@dataclass(frozen=True, slots=True)
class Lines:
    """Lines that follow each other in one style, to be stroked as one path."""

    lines: tuple[Line, ...]
    style: Style


Run = Lines | Arc | Circle | Outline | Letters


def runs(items: Iterable[Primitive]) -> Iterator[Run]:
    """Yield ``items`` in order, with neighbouring lines of one style put together."""
    for style, group in groupby(items, lambda item: item.style if isinstance(item, Line) else None):
        if style is None:
            yield from (item for item in group if not isinstance(item, Line))
        else:
            yield Lines(tuple(item for item in group if isinstance(item, Line)), style)


def stroke_of(run: Run) -> str | None:
    """Return the colour the run is stroked in; without a width, and on outlined letters, there is none."""
    drawn = run.style.width_mm > 0 and (not isinstance(run, Letters) or is_stroked(run))
    return run.style.stroke if drawn else None


def fill_of(run: Run) -> str | None:
    """Return the colour the run is filled with; lines, arcs and stroked letters enclose nothing."""
    enclosed = not isinstance(run, Lines | Arc) and not (isinstance(run, Letters) and is_stroked(run))
    return run.style.fill if enclosed else None


def is_stroked(letters: Letters) -> bool:
    """Return whether letters are single strokes, which one glyph of a string tells for all."""
    return bool(letters.glyphs) and letters.glyphs[0].glyph.stroked


def rgb(colour: str) -> tuple[int, int, int]:
    """Return red, green and blue of ``#rrggbb``, 0 to 255.

    >>> rgb("#ff8000")
    (255, 128, 0)
    """
    value = int(colour[1:], 16)
    return value >> 16, value >> 8 & 255, value & 255


def inked_glyphs(drawing: Drawing) -> dict[str, Glyph]:
    """Return the glyphs that have an outline, by a name fit for every format: not the space."""
    inked = (glyph for glyph in drawing.glyphs() if glyph.path)
    return {f"glyph-{number}": glyph for number, glyph in enumerate(inked)}


def layer_names(drawing: Drawing) -> list[str]:
    """Return a name for each layer made of its purpose and name, the same in every format.

    Letters, digits, hyphens and underscores alone: fit for an XML id and a DXF layer.  Two layers
    that would then read alike, capitals aside, are told apart by a number.
    """
    names: list[str] = []
    taken: set[str] = set()
    for layer in drawing.layers:
        plain = re.sub(r"[^A-Za-z0-9_-]", "_", f"{layer.purpose}-{layer.name}")
        name, count = plain, 1
        while name.casefold() in taken:
            count += 1
            name = f"{plain}-{count}"
        taken.add(name.casefold())
        names.append(name)
    return names
