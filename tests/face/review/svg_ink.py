"""The ink of a face as shapely sees it, read back from the SVG that is drawn: an outside truth."""

from __future__ import annotations

import math
import re
from collections.abc import Iterator
from functools import lru_cache

import numpy as np
import shapely
from lxml import etree
from shapely import LineString, Polygon, affinity
from shapely.geometry.base import BaseGeometry

SVG = "{http://www.w3.org/2000/svg}"
HREF = "{http://www.w3.org/1999/xlink}href"
_STEPS = 12
_STEP_DEG = 1.0


def svg_ink(data: bytes) -> dict[str, list[BaseGeometry]]:
    """Return what each group of an SVG file inks, thing by thing, in plate coordinates (mm, y up)."""
    root = etree.fromstring(data)
    outlines = {path.get("id"): path.get("d") for path in root.find(f"{SVG}defs")}
    return {
        group.get("id"): [
            affinity.scale(ink, 1, -1, origin=(0, 0)) for item in group for ink in _inked(item, outlines)
        ]
        for group in root.findall(f"{SVG}g")
    }


def _inked(item: etree._Element, outlines: dict[str, str]) -> Iterator[BaseGeometry]:
    if item.tag == f"{SVG}g":
        yield shapely.union_all(list(_word(item, outlines)))
    elif item.tag == f"{SVG}circle":
        centre = shapely.Point(float(item.get("cx")), float(item.get("cy")))
        yield _painted(centre.buffer(float(item.get("r")), quad_segs=64).exterior, item)
    else:
        for path in _paths(item.get("d")):
            yield _painted(path, item)


def _word(group: etree._Element, outlines: dict[str, str]) -> Iterator[BaseGeometry]:
    """Yield the ink of letters; those of one size and turn stand under a matrix of their own."""
    for home in group.iter(f"{SVG}g"):
        numbers = re.findall(r"[-.\d]+", home.get("transform", ""))
        width = float(home.get("stroke-width", 0))
        for use in home.findall(f"{SVG}use"):
            ink = _letter(outlines[use.get(HREF)[1:]], width)
            ink = affinity.translate(ink, float(use.get("x", 0)), float(use.get("y", 0)))
            a, b, c, d, e, f = map(float, numbers)
            yield affinity.affine_transform(ink, (a, c, b, d, e, f))


@lru_cache
def _letter(data: str, width: float) -> BaseGeometry:
    """Return a letter in ems: strokes of a width, or an outline whose inner contours are holes."""
    ink: BaseGeometry = Polygon()
    for path in _paths(data):
        ink = ink.union(path.buffer(width / 2)) if width else ink ^ Polygon(path)
    return ink


def _painted(path: LineString, item: etree._Element) -> BaseGeometry:
    width, fill = float(item.get("stroke-width", 0)), item.get("fill")
    cap = "round" if item.get("stroke-linecap") == "round" else "flat"
    stroke = path.buffer(width / 2, quad_segs=16, cap_style=cap, join_style="mitre", mitre_limit=10)
    return stroke if fill == "none" else Polygon(path).union(stroke)


def _paths(data: str) -> Iterator[LineString]:
    """Yield the lines of path data, curves as points close together."""
    points: list[np.ndarray] = []
    for code, rest in re.findall(r"([MLQCAZ])([^MLQCAZ]*)", data):
        values = np.array([float(number) for number in re.findall(r"[-.\d]+", rest)])
        if code == "M":
            if len(points) > 1:
                yield LineString(np.array(points))
            points = [values]
        elif code == "Z":
            points.append(points[0])
        elif code == "A":
            points += _arc(points[-1], values[5:], values[0], int(values[4]))
        else:
            points += _bezier(np.array([points[-1], *values.reshape(-1, 2)]))
    if len(points) > 1:
        yield LineString(np.array(points))


def _bezier(poles: np.ndarray) -> list[np.ndarray]:
    degree = len(poles) - 1
    ts = np.linspace(0, 1, _STEPS + 1)[1:] if degree > 1 else np.ones(1)
    weights = [math.comb(degree, i) * ts**i * (1 - ts) ** (degree - i) for i in range(degree + 1)]
    return list(np.array(weights).T @ poles)


def _arc(start: np.ndarray, end: np.ndarray, radius: float, sweep: int) -> list[np.ndarray]:
    """Return points along an arc of less than half a turn, by its ends; y is down, so sweep is clockwise."""
    chord = end - start
    half = np.hypot(*chord) / 2
    height = math.sqrt(max(radius**2 - half**2, 0.0)) * (1 if sweep else -1)
    centre = (start + end) / 2 + height * np.array([-chord[1], chord[0]]) / (2 * half)
    first, last = (math.atan2(*(point - centre)[::-1]) for point in (start, end))
    turn = math.remainder(last - first, 2 * math.pi)
    count = 1 + math.ceil(abs(math.degrees(turn)) / _STEP_DEG)
    angles = first + np.linspace(0, turn, count + 1)[1:]
    return list(centre + radius * np.column_stack((np.cos(angles), np.sin(angles))))
