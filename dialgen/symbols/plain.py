"""Shapes of the kind of current, the position of use, the test voltage and the class."""

from __future__ import annotations

import math

from dialgen.drawing import Point, polar
from dialgen.symbols.boxes import box_of
from dialgen.symbols.pen import DIGIT, STROKE, Figure, Pen, Shape

_GAP = 0.13
"""Between letters and a sine beside them."""

# Half a period of the sine is an arc that turns by this much: it leaves the middle line at 70 degrees.
_SINE_TURN_DEG = 140.0

_STAR_RADIUS = 0.472
_STAR_STROKE = 0.07
_STAR_WAIST = 0.5
"""Inner corners over points; 0.38 is the star whose edges line up, which leaves a digit no room."""


def direct(pen: Pen, _: str) -> Figure:
    """Draw a bar above three dashes."""
    return _bar(pen.at(0.0, 0.15)) + _dashes(pen.at(0.0, -0.15))


def alternating(pen: Pen, _: str) -> Figure:
    """Draw one period of a sine."""
    return sine(pen, 1.0)


def both(pen: Pen, _: str) -> Figure:
    """Draw a bar above a sine."""
    return _bar(pen.at(0.0, 0.36)) + sine(pen.at(0.0, -0.12), 1.0)


def phases(before: str, after: str = "") -> Shape:
    """Return the shape of a sine between two texts."""

    def shape(pen: Pen, _: str) -> Figure:
        figure = pen.letters(before, (-_GAP, 0.0), DIGIT, (1.0, 0.5)) + sine(pen.at(0.325, 0.0), 0.65)
        return figure + (pen.letters(after, (0.65 + _GAP, 0.0), DIGIT, (0.0, 0.5)) if after else ())

    return shape


def sine(pen: Pen, width: float) -> Figure:
    """Draw one period of a sine, as an arc up and an arc down, ``width`` wide about the origin."""
    half_turn = math.radians(_SINE_TURN_DEG / 2)
    radius = width / 4 / math.sin(half_turn)
    drop = radius * math.cos(half_turn)
    half_deg = _SINE_TURN_DEG / 2
    return pen.arc((-width / 4, -drop), radius, -half_deg, half_deg) + pen.arc(
        (width / 4, drop), radius, 180 - half_deg, 180 + half_deg
    )


def upright(pen: Pen, _: str) -> Figure:
    """Draw a stroke that stands on a base."""
    return pen.line((-0.45, 0.0), (0.45, 0.0)) + pen.line((0.0, 0.0), (0.0, 0.8))


def level(pen: Pen, _: str) -> Figure:
    """Draw a flat line with two short feet."""
    feet = [pen.line((x, -0.32), (x, 0.0)) for x in (-0.45, 0.45)]
    return feet[0] + pen.line((-0.5, 0.0), (0.5, 0.0)) + feet[1]


def inclined(pen: Pen, degrees: str) -> Figure:
    """Draw an angle sign and the angle behind it."""
    angle = pen.bent((0.46, 0.7), (0.0, 0.0), (0.6, 0.0))
    return angle + pen.letters(degrees, (0.78, -pen.stroke / 2), DIGIT, (0.0, 0.0))


def star(pen: Pen, number: str) -> Figure:
    """Draw a five-pointed star, with a number inside where there is one."""
    outline = pen.fine(_STAR_STROKE).closed(*star_corners(_STAR_RADIUS))
    if not number:
        return outline
    # At an inner corner the line reaches inwards by 0.56 of its width, and some white is left.
    room = _STAR_RADIUS * _STAR_WAIST - 0.62 * _STAR_STROKE
    return outline + pen.letters(number, (0.0, 0.0), _fitting(pen, number, 0.4, room))


def untested(pen: Pen, _: str) -> Figure:
    """Draw a star with a nought inside."""
    return star(pen, "0")


def star_corners(radius: float) -> list[Point]:
    """Return points and inner corners in turn, clockwise from the point straight up."""
    return [
        polar((0.0, 0.0), radius * (_STAR_WAIST if corner % 2 else 1.0), corner * 36.0)
        for corner in range(10)
    ]


def attention(pen: Pen, _: str) -> Figure:
    """Draw an exclamation mark in a triangle that stands on its base."""
    height = 1 - 1.5 * STROKE
    half = height / math.sqrt(3)
    triangle = pen.closed((-half, 0.0), (0.0, height), (half, 0.0))
    return triangle + pen.line((0.0, 0.27), (0.0, 0.56)) + pen.disc((0.0, 0.16), 0.055)


def of_limit(pen: Pen, number: str) -> Figure:
    """Draw the class number alone."""
    return pen.letters(number, (0.0, 0.0), DIGIT)


def of_length(pen: Pen, number: str) -> Figure:
    """Draw the class number above an open angle."""
    height = 0.54
    half = max(0.4, pen.text_width(number, height) / 2)
    angle = pen.bent((-half, -0.13), (0.0, -0.36), (half, -0.13))
    return pen.letters(number, (0.0, 0.02), height, (0.5, 0.0)) + angle


def of_value(pen: Pen, number: str) -> Figure:
    """Draw the class number in a circle."""
    room = 0.5 - 1.6 * STROKE
    return pen.ring((0.0, 0.0), (1 - STROKE) / 2) + pen.letters(
        number, (0.0, 0.0), _fitting(pen, number, 0.5, room)
    )


def panel(before: str) -> Shape:
    """Return the shape of a note on the panel: a text, and the sign's number behind it."""
    return lambda pen, number: pen.letters(f"{before} {number}".strip(), (0.0, 0.0), DIGIT)


def _bar(pen: Pen) -> Figure:
    return pen.line((-0.5, 0.0), (0.5, 0.0))


def _dashes(pen: Pen) -> Figure:
    return tuple(stroke for x in (-0.5, -0.11, 0.28) for stroke in pen.line((x, 0.0), (x + 0.22, 0.0)))


def _fitting(pen: Pen, text: str, height: float, radius: float) -> float:
    """Return the height of lettering, ``height`` at most, at which ``text`` fits in a circle."""
    left, bottom, right, top = box_of(Pen(hand=pen.hand).letters(text, (0.0, 0.0), 1.0))
    return min(height, 2 * radius / math.hypot(right - left, top - bottom))
