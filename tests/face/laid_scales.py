"""Dial files of one scale laid out for the tests of its forms, and what is drawn as shapely figures."""

from __future__ import annotations

import math
from dataclasses import dataclass
from pathlib import Path

import numpy as np
from hypothesis import strategies as st
from shapely import LineString, Point, Polygon
from shapely.ops import unary_union

from dialgen.dial import Dial, attempt
from dialgen.dialfile import Source, parse
from dialgen.drawing import Arc, Circle, Letters, Line, Outline
from dialgen.errors import InputError
from dialgen.face.fitted.openings import check_openings
from dialgen.face.laid import check_laid, scale_layers
from dialgen.face.plate import outliner
from dialgen.face.ruled.ruling import RuledScale, rule
from dialgen.geometry.lines import ArcLine, StraightLine
from dialgen.ink import shape
from dialgen.lettering import hand
from dialgen.looks import Lettering

FINE_DEG = 0.05
PLATE = "size = [200, 200]\npivot = [100, 100]"


def dial_text(
    keys="", over="", *, line="radius = 44.0", ends=(-45.0, 45.0), look="", plate=PLATE, law="", **movement
):
    """A dial file with one scale from 0 to 40; ``over`` holds further tables."""
    head = "".join(f"{key} = {value}\n" for key, value in movement.items())
    dressed = f"[look]\n{look}\n" if look else ""
    return (
        f"dialgen = 1\n[movement]\nrest = {ends[0]}\nfull = {ends[1]}\n{head}{dressed}[plate]\n{plate}\n"
        f'[[scale]]\nunit = ""\nfrom = 0\nto = 40\n{law}\n{line}\n{keys}\n{over}\n'
    )


@dataclass(frozen=True)
class Laid:
    """A dial whose first scale is laid, or what is wrong with it."""

    dial: Dial
    scales: tuple[RuledScale, ...]
    errors: list[InputError]

    @property
    def scale(self) -> RuledScale:
        """The first scale."""
        assert not self.errors, self.errors
        return self.scales[0]

    def angle(self, value: float) -> float:
        """The pointer's angle at a value."""
        return float(self.scale.dial.chain.angle(np.array([value]))[0])

    def items(self, part: str) -> list:
        """The primitives of a part of the first scale."""
        layers = scale_layers(self.dial.file, self.scale, 1, outliner(self.dial.file.plate))
        return list({layer.name: layer for layer in layers}[f"scale 1 {part}"].items)


def laid(text: str) -> Laid:
    """The dial of a text."""
    file, _ = parse(Source(name="test.toml", folder=Path(), text=text))
    plate = outliner(file.plate)
    dial, errors = attempt(file)
    scales, more = rule(dial, plate, lambda look: hand(look.font, strokes=look.lettering is Lettering.STROKE))
    errors = [*check_openings(file.plate), *errors, *more]
    return Laid(dial, scales, errors or list(check_laid(file, scales, plate)))


# ---------------------------------------------------------------- what is drawn, as shapely figures


def arc_points(centre, radius_mm, start_deg, turn_deg):
    """Points on a circle from an angle (0 straight up) on, clockwise for a turn above zero."""
    count = max(2, math.ceil(abs(turn_deg) / FINE_DEG))
    turn = np.radians(np.linspace(start_deg, start_deg + turn_deg, count + 1))
    return np.column_stack([centre[0] + radius_mm * np.sin(turn), centre[1] + radius_mm * np.cos(turn)])


def edge_points(here, there):
    """Points along an outline's edge, by the inscribed angle: a chord is 2R·sin(turn/2) long."""
    p, q = np.array([here.x, here.y]), np.array([there.x, there.y])
    if not here.turn_deg:
        return np.array([p, q])
    half = math.radians(here.turn_deg) / 2
    chord = q - p
    radius = math.hypot(*chord) / (2 * abs(math.sin(half)))
    right = np.array([chord[1], -chord[0]]) / math.hypot(*chord)
    centre = (p + q) / 2 + right * math.copysign(radius, half) * math.cos(half)
    start = math.degrees(math.atan2(*(p - centre)))
    return arc_points(centre, radius, start, here.turn_deg)


def corners(outline):
    """The corners of an outline, its arcs as many short edges."""
    edges = zip(outline.vertices, outline.vertices[1:] + outline.vertices[:1], strict=True)
    return np.vstack([edge_points(here, there)[:-1] for here, there in edges])


def polygon(outline):
    """The area that an outline encloses."""
    return Polygon(corners(outline))


def course_of(item):
    """The middle line of a stroke."""
    if isinstance(item, Line):
        return LineString([item.start, item.end])
    return LineString(arc_points(item.centre, item.radius_mm, item.start_deg, item.end_deg - item.start_deg))


def ink(item):
    """What a primitive inks."""
    match item:
        case Letters():
            contours = [Polygon(contour).buffer(0) for contour in shape(item).contours]
            return unary_union(contours)
        case Circle():
            return Point(item.centre).buffer(item.radius_mm, quad_segs=64)
        case Outline() if item.style.fill:
            return polygon(item)
        case Outline():
            return polygon(item).exterior.buffer(item.style.width_mm / 2)
        case Line() | Arc():
            cap = "round" if item.style.cap == "round" else "flat"
            return course_of(item).buffer(item.style.width_mm / 2, cap_style=cap)


def inks(items):
    """What all of some primitives ink."""
    return unary_union([ink(item) for item in items])


def ray(angle_deg, length_mm=500.0):
    """The pointer's ray."""
    turn = math.radians(angle_deg)
    return LineString([(0, 0), (length_mm * math.sin(turn), length_mm * math.cos(turn))])


# ---------------------------------------------------------------- scale lines


centred = st.builds(ArcLine, st.floats(15, 120))
off_centre = st.builds(
    lambda radius, away, side: ArcLine(radius, (side * radius, away * radius)),
    st.floats(30, 120),
    st.floats(-0.4, 0.4),
    st.floats(-0.3, 0.3),
)
straight = st.builds(
    lambda height, tilt: StraightLine((-20.0, height - tilt), (20.0, height + tilt)),
    st.floats(25, 80),
    st.floats(-4, 4),
)
square = st.builds(
    lambda height: StraightLine((-20.0, height), (20.0, height), square=True), st.floats(25, 80)
)
flat = st.builds(
    lambda height, radius: StraightLine((-20.0, height), (20.0, height), curve_mm=radius),
    st.floats(25, 80),
    st.floats(20, 90),
)
any_line = st.one_of(centred, off_centre, straight, square, flat)
swings = st.tuples(st.floats(-50, 50), st.floats(-50, 50)).filter(lambda ends: abs(ends[0] - ends[1]) > 0.5)

LINES = {
    "arc": "radius = 44.0",
    "arc about another centre": "radius = 60.0\ncentre = [3, -18]",
    "straight": "line = [[-44, 44], [44, 44]]",
    "straight, square marks": "line = [[-44, 44], [44, 44]]\nsquare = true",
    "curved, laid flat": "line = [[-35, 44], [35, 44]]\ncurve = 44",
}
"""The line types as a scale's keys, for a swing of 90 degrees."""

ENDS = {"clockwise": (-45.0, 45.0), "anticlockwise": (45.0, -45.0)}
