"""Shapes of what stands beside the movement: converters, accessories, screens, terminals."""

from __future__ import annotations

from dialgen.drawing import polar
from dialgen.symbols.pen import STROKE, Figure, Pen


def rectifier(pen: Pen, _: str) -> Figure:
    """Draw a diode in a line."""
    return diode(pen, 0.6)


def diode(pen: Pen, size: float) -> Figure:
    """Draw a diode in a line about the origin: a triangle that touches a bar, ``size`` high."""
    half = size / 2
    length = size * 0.87
    back = -length / 2
    return (
        pen.line((back - 0.25, 0.0), (-back + 0.25, 0.0))
        + pen.area((back, -half), (back, half), (-back, 0.0))
        + pen.line((-back, -half), (-back, half))
    )


def thermocouple(pen: Pen, _: str) -> Figure:
    """Draw a V that stands on a heater."""
    return couple(pen, -0.4, 0.4, 0.35, 0.5)


def insulated_thermocouple(pen: Pen, _: str) -> Figure:
    """Draw a V that stands clear of a heater."""
    return pen.line((-0.5, -0.45), (0.5, -0.45)) + pen.bent((-0.35, 0.45), (0.0, -0.2), (0.35, 0.45))


def couple(pen: Pen, bottom: float, top: float, half: float, heater: float) -> Figure:
    """Draw a V that stands on a heater."""
    return pen.line((-heater, bottom), (heater, bottom)) + pen.bent((-half, top), (0.0, bottom), (half, top))


def shunt(pen: Pen, _: str) -> Figure:
    """Draw a resistor in a line, with two taps."""
    return (
        series(pen.at(0.0, 0.2), "")
        + pen.line((-0.45, 0.2), (-0.45, -0.3))
        + pen.line((0.45, 0.2), (0.45, -0.3))
    )


def series(pen: Pen, _: str) -> Figure:
    """Draw a resistor in a line."""
    return (
        pen.box((0.0, 0.0), 0.7, 0.34)
        + pen.line((-0.65, 0.0), (-0.3, 0.0))
        + pen.line((0.3, 0.0), (0.65, 0.0))
    )


def dashed_circle(pen: Pen, _: str) -> Figure:
    """Draw a circle of dashes."""
    figure: Figure = ()
    for start in range(0, 360, 45):
        figure += pen.arc((0.0, 0.0), 0.45, start - 12.0, start + 12.0)
    return figure


def circle(pen: Pen, _: str) -> Figure:
    """Draw a whole circle."""
    return pen.ring((0.0, 0.0), (1 - STROKE) / 2)


def earth(pen: Pen, _: str) -> Figure:
    """Draw the earth sign: a lead down to three bars, each shorter than the one above."""
    figure = pen.line((0.0, 0.0), (0.0, 0.5))
    for y, half in ((0.0, 0.45), (-0.2, 0.28), (-0.4, 0.11)):
        figure += pen.line((-half, y), (half, y))
    return figure


def zero_adjuster(pen: Pen, _: str) -> Figure:
    """Draw the head of a screw, and an arc with an arrow at either end about it."""
    middle = (0.0, -0.2)
    screw = pen.ring(middle, 0.25) + pen.line((-0.14, -0.34), (0.14, -0.06))
    bow = pen.arc(middle, 0.55, -32.0, 32.0)
    heads: Figure = ()
    for side in (-1, 1):
        tip, outer, inner = ((0.592, 55.8), (0.655, 34.0), (0.445, 34.0))
        heads += pen.area(*[polar(middle, r, side * turn) for r, turn in (tip, outer, inner)])
    return screw + bow + heads
