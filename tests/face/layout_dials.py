"""Dial files of every geometry with room for all that is to be lettered, and their faces."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from pathlib import Path

from hypothesis import strategies as st

from dialgen.dial import build
from dialgen.dialfile import DialFile, Source, parse
from dialgen.drawing import Drawing, Primitive, Purpose, Style
from dialgen.face.compose import compose
from dialgen.face.parts import GROUND, MAKER, SYMBOLS, TEXT, TITLE, Part
from dialgen.face.plate import outliner
from dialgen.face.ruled.ruling import rule
from dialgen.ink import Shape, shape
from dialgen.lettering import hand
from dialgen.looks import Lettering

PLACED = (Part.UNIT.value, TITLE, TEXT, SYMBOLS, MAKER)


@dataclass(frozen=True)
class Face:
    """A file and its drawing."""

    file: DialFile
    drawing: Drawing

    def layer(self, name: str) -> tuple[Primitive, ...]:
        """What is drawn on a layer."""
        return next((layer.items for layer in self.drawing.layers if layer.name == name), ())

    def placed(self) -> list[tuple[str, list[Shape]]]:
        """The exact inks of all that was placed: the symbols as one thing, every other item by itself."""
        found: list[tuple[str, list[Shape]]] = []
        for layer in self.drawing.layers:
            if not layer.name.endswith(PLACED) or layer.purpose is not Purpose.PRINT:
                continue
            inks = [ink for item in layer.items if (ink := shape(item))]
            found += [(layer.name, inks)] if layer.name == SYMBOLS else [(layer.name, [ink]) for ink in inks]
        return found

    def laid(self) -> list[Shape]:
        """The exact areas of everything else: ink of the scales, and openings with all inside them."""
        plate = outliner(self.file.plate)
        found: list[Shape | None] = []
        for layer in self.drawing.layers:
            if layer.name.endswith(PLACED) or layer.name == GROUND or layer.purpose is Purpose.GUIDE:
                continue
            for item in layer.items:
                if layer.purpose is Purpose.PRINT:
                    found.append(shape(item))
                elif item != plate.outline(item.style):
                    found.append(shape(replace(item, style=Style(fill="#000000"))))
        return [ink for ink in found if ink]


def face_of(text: str) -> Face:
    """The face that a dial file's text describes."""
    file, _ = parse(Source(name="test.toml", folder=Path(), text=text))
    scales, errors = rule(
        build(file),
        outliner(file.plate),
        lambda look: hand(look.font, strokes=look.lettering is Lettering.STROKE),
    )
    assert not errors, errors
    return Face(file, compose(build(file), scales))


@dataclass(frozen=True)
class Site:
    """A scale line on a plate that has room to spare."""

    rest: float
    full: float
    line: str
    plate: str


@st.composite
def arcs(draw: st.DrawFn) -> Site:
    """An upright arc of 60 to 180 degrees over a pivot at the foot of a rectangular or round plate."""
    radius, half = draw(st.floats(32.0, 90.0)), draw(st.floats(30.0, 90.0))
    rim = 9.0 + 0.12 * radius
    wide = max(radius * math.sin(math.radians(half)) + rim, 0.75 * radius, 34.0)
    foot = draw(st.floats(10.0, 30.0))
    plate = (
        f"size = [{2 * wide:.2f}, {radius + rim + foot:.2f}]\npivot = [{wide:.2f}, {foot:.2f}]\ncorner = 2"
    )
    if draw(st.booleans()):
        reach = max(radius + rim, math.hypot(wide, 0.3 * radius))
        plate = f"diameter = {2 * reach:.2f}\npivot = [{reach:.2f}, {reach:.2f}]"
    return Site(-half, half, f"radius = {radius:.2f}", plate)


@st.composite
def rounds(draw: st.DrawFn) -> Site:
    """A scale of 200 to 300 degrees about a pivot in the middle of a round or square plate."""
    radius, half = draw(st.floats(34.0, 80.0)), draw(st.floats(100.0, 150.0))
    side = draw(st.sampled_from(('marks = "inward"\nnumerals = "inside"', 'numerals = "outside"')))
    reach = radius + (5.0 if "inward" in side else 10.0 + 0.12 * radius)
    outline = draw(
        st.sampled_from((f"diameter = {2 * reach:.2f}", f"size = [{2 * reach:.2f}, {2 * reach:.2f}]"))
    )
    return Site(
        -half, half, f"radius = {radius:.2f}\n{side}", f"{outline}\npivot = [{reach:.2f}, {reach:.2f}]"
    )


@st.composite
def corners(draw: st.DrawFn) -> Site:
    """A quarter circle about a pivot in the lower right or the lower left corner."""
    radius, foot = draw(st.floats(42.0, 90.0)), draw(st.floats(10.0, 18.0))
    size = radius + foot + 8.0 + 0.12 * radius
    side = draw(st.sampled_from((-1.0, 1.0)))
    pivot = foot if side > 0 else size - foot
    plate = f"size = [{size:.2f}, {size:.2f}]\npivot = [{pivot:.2f}, {foot:.2f}]"
    return Site(0.0, side * 90.0, f"radius = {radius:.2f}", plate)


@st.composite
def strips(draw: st.DrawFn) -> Site:
    """A straight scale across a low plate, or up a narrow one, the pivot off the plate."""
    half, far = draw(st.floats(26.0, 50.0)), draw(st.floats(40.0, 70.0))
    swing = math.degrees(math.atan2(half, far))
    long, below, above = 2 * half + 40.0, draw(st.floats(16.0, 24.0)), 12.0
    if draw(st.booleans()):
        plate = f"size = [{long:.2f}, {below + above:.2f}]\npivot = [{long / 2:.2f}, {below - far:.2f}]"
        return Site(-swing, swing, f"line = [[{-half:.2f}, {far:.2f}], [{half:.2f}, {far:.2f}]]", plate)
    plate = (
        f"size = [{below + above + 6:.2f}, {long + 10:.2f}]\npivot = [{below - far:.2f}, {long / 2 + 10:.2f}]"
    )
    line = f"line = [[{far:.2f}, {-half:.2f}], [{far:.2f}, {half:.2f}]]"
    return Site(90 - swing, 90 + swing, line, plate)


sites = st.one_of(arcs(), rounds(), corners(), strips())
units = st.sampled_from(("A", "V", "mV", "%", "bar", ""))
titles = st.none() | st.sampled_from(("BATTERY", "VALVE", "LATHE 1", "DYNAMO"))
said = st.lists(st.sampled_from(("75 mV shunt", "1000 Ω/V", "ABOVE OUTLET")), max_size=1)
shows = st.none() | st.sampled_from(
    ('"auto"', '["auto", "class", "vertical", "test 2 kV"]', '["horizontal"]')
)
looks = st.sampled_from(("plain", "bench", "night", "parchment", "graver"))


@st.composite
def dials(draw: st.DrawFn) -> str:
    """A dial file with room for its unit, title, a text, symbols and maker's line."""
    site = draw(sites)
    rest, full = (site.rest, site.full) if draw(st.booleans()) else (site.full, site.rest)
    title, show, texts = draw(titles), draw(shows), draw(said)
    lines = ["dialgen = 1", "[dial]", "tested = 2026-05-01"]
    lines += [f'title = "{title}"'] if title else []
    lines += ['maker = "Alder Lane Works"'] if draw(st.booleans()) else []
    lines += ["[movement]", 'current = "1 mA"', 'resistance = "75 ohm"', f"rest = {rest}", f"full = {full}"]
    lines += ["[look]", f'style = "{draw(looks)}"', "[plate]", site.plate]
    lines += ["[[scale]]", f'unit = "{draw(units)}"', "from = 0", "to = 40", "class = 1.5", site.line]
    lines += ['law = { kind = "linear", per = "25 uA" }']
    if draw(st.booleans()):
        lines += ["[[zone]]", "from = 10", "to = 30", 'colour = "green"']
    lines += ["[symbols]", f"show = {show}"] if show else []
    for text in texts:
        lines += ["[[text]]", f'say = "{text}"', "height = 1.8"]
    return "\n".join(lines) + "\n"
