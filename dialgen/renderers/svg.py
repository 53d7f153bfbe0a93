"""Drawing to SVG: millimetres throughout, the pivot at the origin, y turned downwards."""

from __future__ import annotations

import math
import re
from collections.abc import Iterable, Iterator, Mapping, Sequence
from functools import lru_cache
from itertools import groupby
from typing import assert_never
from xml.etree import ElementTree

import svgwrite

from dialgen.drawing import Arc, Cap, Circle, Drawing, Glyph, Letters, Outline, PathStep, Placed, Point
from dialgen.renderers import Options
from dialgen.renderers.curves import placed_steps, stops
from dialgen.renderers.runs import Lines, Run, fill_of, inked_glyphs, layer_names, runs, stroke_of

# An A command gives an arc by its ends.  Near half a turn the centre that follows from them swings
# wildly: ends rounded by 5e-6 mm move it by 0.02 mm.  Up to 120 degrees it moves no more than they do.
_WIDEST_DEG = 120.0
# Less than this, in ems, is rounding: a line of lettering is level.
_LEVEL = 1e-9

# What XML 1.0 cannot hold, escaped or not.
_NOT_XML = re.compile("[^\t\n\r -\ud7ff\ue000-\ufffd\U00010000-\U0010ffff]")


def render(drawing: Drawing, options: Options) -> bytes:
    """Return ``drawing`` as an SVG file in UTF-8.

    Args:
        drawing: what to write.
        options: ``inline_glyphs`` writes every letter in place instead of by reference.
    """
    width, height = number(drawing.width), number(drawing.height)
    sheet = svgwrite.Drawing(
        size=(f"{width}mm", f"{height}mm"),
        viewBox=f"{number(drawing.left)} {number(-drawing.top)} {width} {height}",
        # What PDF does with sharp corners by itself.
        stroke_miterlimit=10,
        debug=False,
    )
    if drawing.title:
        sheet.set_desc(title=_xml_text(drawing.title))
    defined = {} if options.inline_glyphs else inked_glyphs(drawing)
    for name, glyph in defined.items():
        sheet.defs.add(sheet.path(_glyph_data(glyph), id=name))
    glyph_ids = {glyph.name: name for name, glyph in defined.items()}
    for name, layer in zip(layer_names(drawing), drawing.layers, strict=True):
        group = sheet.add(sheet.g(id=name))
        for run in runs(layer.items):
            _add(sheet, group, run, glyph_ids)
    text = ElementTree.tostring(sheet.get_xml(), encoding="unicode")
    return f'<?xml version="1.0" encoding="utf-8"?>\n{text}\n'.encode()


def number(value: float) -> str:
    """Return ``value`` to five decimals, with no exponent, no needless zeros and no ``-0``.

    >>> number(-0.000004), number(44.0), number(1e-5)
    ('0', '44', '0.00001')
    """
    text = f"{value:.5f}".rstrip("0").rstrip(".")
    return "0" if text == "-0" else text


def _add(sheet: svgwrite.Drawing, group: svgwrite.container.Group, run: Run, ids: Mapping[str, str]) -> None:
    match run:
        case Lines():
            pieces = (f"M {_at(line.start)} L {_at(line.end)}" for line in run.lines)
            group.add(sheet.path(" ".join(pieces), **_paint(run)))
        case Arc():
            group.add(sheet.path(" ".join(_arc(run)), **_paint(run)))
        case Circle():
            group.add(
                sheet.circle(
                    (number(run.centre[0]), number(-run.centre[1])),
                    number(run.radius_mm),
                    **_paint(run),
                )
            )
        case Outline():
            group.add(sheet.path(" ".join(_outline(run)), **_paint(run)))
        case Letters():
            group.add(_Word(run, ids))
        case _:
            assert_never(run)


class _Word:
    """A string as a group, made ready for svgwrite, which takes whatever has ``get_xml``.

    Nine elements of ten on a face are letters, and svgwrite's own take as long to make as all the
    rest of the file.
    """

    elementname = "g"

    def __init__(self, letters: Letters, ids: Mapping[str, str]) -> None:
        fill = fill_of(letters) or "none"
        self._xml = ElementTree.Element(
            "g", {"aria-label": _xml_text(letters.text), "fill": fill, "role": "img"}
        )
        stroke = stroke_of(letters)
        if stroke:
            self._xml.attrib |= {"stroke": stroke, "stroke-linejoin": "round"}
            self._xml.attrib |= {"stroke-linecap": "round"} if letters.style.cap is Cap.ROUND else {}
        inked = [placed for placed in letters.glyphs if placed.glyph.path]
        if not ids:
            if stroke:
                self._xml.set("stroke-width", number(letters.style.width_mm))
            for placed in inked:
                ElementTree.SubElement(self._xml, "path", {"d": _data(placed_steps(placed))})
            return
        # Letters of one size and turn, most often the whole string, share one matrix.
        sets = [list(group) for _, group in groupby(inked, lambda p: (p.size_mm, p.angle_deg))]
        for group in sets:
            home = self._xml if len(sets) == 1 else ElementTree.SubElement(self._xml, "g")
            home.set("transform", _matrix(group[0]))
            if stroke:
                # In ems, as everything under the matrix is.
                home.set("stroke-width", number(letters.style.width_mm / group[0].size_mm))
            _use(home, group, ids)

    def get_xml(self) -> ElementTree.Element:
        """Return the group."""
        return self._xml


def _use(home: ElementTree.Element, group: Sequence[Placed], ids: Mapping[str, str]) -> None:
    """Add letters of one size and turn, each by how many ems it stands along and above the first."""
    first = group[0]
    turn = math.radians(first.angle_deg)
    cos, sin = math.cos(turn) / first.size_mm, math.sin(turn) / first.size_mm
    for placed in group:
        place = {"xlink:href": f"#{ids[placed.glyph.name]}"}
        dx, dy = placed.x - first.x, placed.y - first.y
        if along := dx * cos - dy * sin:
            place["x"] = number(along)
        if abs(above := dx * sin + dy * cos) > _LEVEL:
            place["y"] = number(-above)
        ElementTree.SubElement(home, "use", place)


def _paint(run: Run) -> dict[str, str]:
    paint = {"fill": fill_of(run) or "none"}
    if stroke := stroke_of(run):
        paint |= {"stroke": stroke, "stroke_width": number(run.style.width_mm)}
        if run.style.cap is Cap.ROUND:
            paint["stroke_linecap"] = "round"
    return paint


def _arc(arc: Arc) -> Iterator[str]:
    first, *rest = stops(arc, _WIDEST_DEG)
    yield f"M {_at(first)}"
    yield from (_turn(arc, point, clockwise=True) for point in rest)


def _outline(outline: Outline) -> Iterator[str]:
    yield f"M {_at((outline.vertices[0].x, outline.vertices[0].y))}"
    for here, there, arc in outline.edges():
        corner = there.x, there.y
        if arc is None:
            yield f"L {_at(corner)}"
        else:
            clockwise = here.turn_deg > 0
            # The last stop is the corner but for rounding; the corner itself closes the figure.
            for point in [*stops(arc, _WIDEST_DEG, backwards=not clockwise)[1:-1], corner]:
                yield _turn(arc, point, clockwise=clockwise)
    yield "Z"


def _turn(arc: Arc, end: Point, *, clockwise: bool) -> str:
    radius = number(arc.radius_mm)
    return f"A {radius} {radius} 0 0 {int(clockwise)} {_at(end)}"


def _at(point: Point) -> str:
    return f"{number(point[0])},{number(-point[1])}"


@lru_cache(maxsize=4096)
def _glyph_data(glyph: Glyph) -> str:
    """Return a letter's outline; it belongs to the font, and every face that uses it shares it."""
    return _data(glyph.path)


def _data(path: Iterable[PathStep]) -> str:
    return "".join(
        code + " ".join(_at(pair) for pair in zip(values[::2], values[1::2], strict=True))
        for code, values in path
    )


def _matrix(placed: Placed) -> str:
    turn = _turned(placed.size_mm, placed.angle_deg)
    return f"matrix({turn} {number(placed.x)} {number(-placed.y)})"


@lru_cache(maxsize=64)
def _turned(size_mm: float, angle_deg: float) -> str:
    """Return the first four numbers of a matrix; all the letters of a string share them."""
    turn = math.radians(angle_deg)
    along, across = number(size_mm * math.cos(turn)), size_mm * math.sin(turn)
    return f"{along} {number(across)} {number(-across)} {along}"


def _xml_text(text: str) -> str:
    return _NOT_XML.sub("\ufffd", text)
