"""What is cut of the plate: its outline, holes, slots, and the window for a mirror."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import replace

import numpy as np

from dialgen.dialfile.models import Mirror, Plate, Slot
from dialgen.drawing import Circle, Layer, Outline, Primitive, Purpose, Style
from dialgen.errors import InputError
from dialgen.face.inked.bands import band, slot
from dialgen.face.inked.courses import ArcCourse, Course, LineCourse, course
from dialgen.face.plate import outliner
from dialgen.face.ruled.ruling import RuledScale
from dialgen.geometry.lines import ArcLine, ScaleLine, StraightLine
from dialgen.ink import Shape, shape, strays, touch
from dialgen.stage import Array

CUT = Style(stroke="#d00000", width_mm=0.1)
_SOLID = Style(fill="#000000")
_STEP_MM = 0.5
_TINY = 1e-30


def cut_layer(plate: Plate, mirror: Outline | None = None) -> Layer:
    """Return what is cut: outline, holes and slots, and the window for a mirror if there is one.

    Raises:
        InputError: a slot that closes on itself.
    """
    holes = [Circle(hole.at, hole.diameter / 2, CUT) for hole in plate.hole]
    slots = [_slot(given, i, CUT) for i, given in enumerate(plate.slot)]
    windows = [mirror] if mirror else []
    return Layer(
        name="outline", purpose=Purpose.CUT, items=(outliner(plate).outline(CUT), *holes, *slots, *windows)
    )


def check_openings(plate: Plate) -> Iterator[InputError]:
    """Yield an error for every hole whose middle is off the plate, and every slot whose course is."""
    figure = outliner(plate)
    for i, hole in enumerate(plate.hole):
        if not figure.holds(*hole.at):
            yield InputError(
                f"the hole at {hole.at[0]:g}, {hole.at[1]:g} is off the plate; "
                "coordinates count from the pivot",
                ("plate", "hole", i, "at"),
                ("plate", "pivot"),
            )
    for i, given in enumerate(plate.slot):
        try:
            _slot(given, i, CUT)
        except InputError as error:
            yield error
            continue
        if not figure.holds(*_middle_line(_course(given))).all():
            yield InputError(
                "the slot runs off the plate; coordinates count from the pivot",
                ("plate", "slot", i),
                ("plate", "pivot"),
            )


def mirror_window(plate: Plate, scale: RuledScale, printed: Sequence[Primitive]) -> Outline | None:
    """Return the window for a mirror below a scale, None where none is asked for.

    Args:
        plate: the plate.
        scale: the scale; the window runs beside its line.
        printed: what is printed of the scale: the window leaves ``land`` between it and all that.

    Raises:
        InputError: there is no room for it, or it is not clear of the plate's edge and other openings.
    """
    given = plate.mirror
    if given is None:
        return None
    outward_mm = _mirror_place_mm(given, scale, printed)
    try:
        window = _window(given, scale, outward_mm)
    except InputError as error:
        raise InputError(
            f"there is no room for a mirror: {error.message}",
            ("plate", "mirror"),
            ("plate", "mirror", "width"),
        ) from None
    _check_clear(window, plate)
    return window


def _mirror_place_mm(given: Mirror, scale: RuledScale, printed: Sequence[Primitive]) -> float:
    """Return how far outwards from the scale line the window's middle runs."""
    line = scale.line
    if given.radius is None:
        return _inner_reach_mm(line, scale.ends_deg, printed) - given.land - given.width / 2
    if not isinstance(line, ArcLine):
        raise InputError(
            "the first scale is straight, and its mirror with it; give land instead of radius",
            ("plate", "mirror", "radius"),
        )
    return given.radius - line.radius_mm


def _inner_reach_mm(line: ScaleLine, ends_deg: Array, printed: Sequence[Primitive]) -> float:
    """Return how far outwards from the line the innermost ink lies: most often below zero."""
    contours = [c for item in printed if (ink := shape(item)) is not None for c in ink.contours]
    starts = np.concatenate(contours)
    if isinstance(line, ArcLine):
        # A straight edge may be nearer the centre than both of its corners.
        ways = np.concatenate([np.roll(c, -1, axis=0) for c in contours]) - starts
        from_centre = starts - line.centre
        share = -(from_centre * ways).sum(axis=1) / np.maximum((ways**2).sum(axis=1), _TINY)
        feet = from_centre + np.clip(share, 0.0, 1.0)[:, None] * ways
        return float(np.hypot(*feet.T).min()) - line.radius_mm
    (x, y), (away_x, away_y) = (
        (float(xs[0]), float(ys[0])) for xs, ys in (line.points(ends_deg), line.away(ends_deg))
    )
    return float(((starts - (x, y)) @ (away_x, away_y)).min())


def _window(given: Mirror, scale: RuledScale, outward_mm: float) -> Outline:
    low_deg, high_deg = np.sort(scale.ends_deg).tolist()
    # What is seen in the mirror is the pointer, whichever way the marks stand.
    line = replace(scale.line, square=False) if isinstance(scale.line, StraightLine) else scale.line
    if given.ends == "round":
        ends_deg = _or(given.start, low_deg), _or(given.end, high_deg)
        return slot(course(line, *ends_deg, outward_mm), given.width, CUT)
    beyond_deg = math.degrees(given.width / 2 / _reach_mm(line, (low_deg + high_deg) / 2, outward_mm))
    ends_deg = _or(given.start, low_deg - beyond_deg), _or(given.end, high_deg + beyond_deg)
    sides = outward_mm - given.width / 2, outward_mm + given.width / 2
    return band(line, *ends_deg, *sides, CUT)


def _or(given: float | None, otherwise: float) -> float:
    return otherwise if given is None else given


def _reach_mm(line: ScaleLine, angle_deg: float, outward_mm: float) -> float:
    """Return how far from the pivot what runs beside the line is at an angle."""
    run = course(line, angle_deg, angle_deg, outward_mm)
    return math.hypot(*run.point(run.low))


def _check_clear(window: Outline, plate: Plate) -> None:
    """Raise an error where a window is not wholly on the plate, or meets another opening."""
    area = _area(window)
    if strays([area], outliner(plate).holds):
        raise InputError(
            "the mirror runs off the plate; give it from and to, or a smaller radius", ("plate", "mirror")
        )
    others: list[tuple[str, Sequence[Circle | Outline]]] = [
        ("hole", [Circle(hole.at, hole.diameter / 2, CUT) for hole in plate.hole]),
        ("slot", [_slot(given, i, CUT) for i, given in enumerate(plate.slot)]),
    ]
    for name, openings in others:
        for i, opening in enumerate(openings):
            if touch(area, _area(opening)):
                raise InputError(
                    f"the mirror meets a {name}; move one, or give the mirror from and to",
                    ("plate", "mirror"),
                    ("plate", name, i),
                )


def _area(opening: Circle | Outline) -> Shape:
    found = shape(replace(opening, style=_SOLID))
    assert found is not None
    return found


def _slot(given: Slot, index: int, style: Style) -> Outline:
    try:
        return slot(_course(given), given.width, style)
    except InputError as error:
        raise error.under("plate", "slot", index, "width") from None


def _course(given: Slot) -> Course:
    if given.line is None:
        return ArcCourse((0.0, 0.0), given.radius or 0.0, given.start or 0.0, given.end or 0.0)
    (x1, y1), (x2, y2) = given.line
    length_mm = math.dist(*given.line)
    x, y = ((x2 - x1) / length_mm, (y2 - y1) / length_mm) if length_mm else (1.0, 0.0)
    return LineCourse((x, y), y1 * x - x1 * y, x1 * x + y1 * y, x2 * x + y2 * y)


def _middle_line(run: Course) -> tuple[Array, Array]:
    """Return points along a course, near enough together to stand for it."""
    count = 2 + math.ceil((run.high - run.low) * run.unit_mm / _STEP_MM)
    xs, ys = zip(*(run.point(at) for at in np.linspace(run.low, run.high, count).tolist()), strict=True)
    return np.array(xs), np.array(ys)
