"""Shapes of the kinds of movement."""

from __future__ import annotations

from dialgen.drawing import polar
from dialgen.symbols.additions import couple, diode
from dialgen.symbols.pen import STROKE, Figure, Pen

_FINE = 0.08


def moving_coil(pen: Pen, _: str) -> Figure:
    """Draw a horseshoe magnet, open downwards, with a coil between its poles."""
    return magnet(pen, 0.36, -0.5, 0.5) + pen.fine(_FINE).box((0.0, -0.2), 0.36, 0.42)


def ratiometer(pen: Pen, _: str) -> Figure:
    """Draw a horseshoe magnet with two crossed coils between its poles."""
    coils = pen.fine(0.06)
    return magnet(pen, 0.45, -0.5, 0.5) + tuple(
        item for turn in (-45.0, 45.0) for item in coils.box((0.0, -0.18), 0.2, 0.68, turn)
    )


def with_rectifier(pen: Pen, _: str) -> Figure:
    """Draw a small moving coil with a diode below."""
    return _small_coil(pen) + diode(pen.fine(_FINE).at(0.0, -0.31), 0.38)


def with_couple(pen: Pen, _: str) -> Figure:
    """Draw a small moving coil with a thermocouple below."""
    return _small_coil(pen) + couple(pen.fine(_FINE), -0.46, -0.17, 0.24, 0.4)


def magnet(pen: Pen, radius: float, bottom: float, top: float) -> Figure:
    """Draw a horseshoe whose limbs run on the lines ``radius`` from the middle."""
    bend = top - pen.stroke / 2 - radius
    ends = [pen.line((x, bottom), (x, bend - 0.01)) for x in (-radius, radius)]
    return ends[0] + pen.arc((0.0, bend), radius, -90.0, 90.0) + ends[1]


def moving_iron(pen: Pen, _: str) -> Figure:
    """Draw an upright bar of iron, and a coil that winds across it."""
    pitch, reach = 0.25, 0.18
    rows = [0.375, 0.125, -0.125, -0.375]
    pen = pen.fine(0.085)
    figure = pen.line((0.0, -0.5), (0.0, 0.5))
    for row in rows:
        figure += pen.line((-reach, row), (reach, row))
    for side, row in ((1, rows[1]), (-1, rows[2]), (1, rows[3])):
        start_deg = 0.0 if side > 0 else 180.0
        figure += pen.arc((side * reach, row + pitch / 2), pitch / 2, start_deg, start_deg + 180.0)
    return figure


def electrodynamic(pen: Pen, _: str) -> Figure:
    """Draw a circle with a bar inside, and a bar on either side of it."""
    return _coils(pen, 0.3)


def iron_cored(pen: Pen, _: str) -> Figure:
    """Draw the electrodynamic movement in a ring of iron."""
    return pen.ring((0.0, 0.0), (1 - STROKE) / 2) + _coils(pen.fine(0.065), 0.19)


def induction(pen: Pen, _: str) -> Figure:
    """Draw a disc, and an arc about its upper half."""
    return pen.ring((0.0, -0.1), 0.2) + pen.arc((0.0, -0.1), 0.45, -90.0, 90.0)


def electrostatic(pen: Pen, _: str) -> Figure:
    """Draw two plates that face each other."""
    return (
        pen.line((-0.12, -0.4), (-0.12, 0.4))
        + pen.line((0.12, -0.4), (0.12, 0.4))
        + pen.line((-0.5, 0.0), (-0.12, 0.0))
        + pen.line((0.12, 0.0), (0.5, 0.0))
    )


def reeds(pen: Pen, _: str) -> Figure:
    """Draw a row of reeds on a base."""
    figure = pen.line((-0.5, -0.4), (0.5, -0.4))
    for x, top in ((-0.4, 0.1), (-0.2, 0.3), (0.0, 0.5), (0.2, 0.3), (0.4, 0.1)):
        figure += pen.line((x, -0.4), (x, top))
    return figure


def bimetal(pen: Pen, _: str) -> Figure:
    """Draw a strip that stands on a foot and bends over."""
    return (
        pen.line((-0.35, -0.45), (0.25, -0.45))
        + pen.fine(_FINE).arc((0.75, -0.45), 0.9, -90.0, -20.0)
        + pen.fine(_FINE).arc((0.75, -0.45), 0.7, -90.0, -20.0)
        + pen.fine(_FINE).bent(polar((0.75, -0.45), 0.7, -20.0), polar((0.75, -0.45), 0.9, -20.0))
    )


def _coils(pen: Pen, radius: float) -> Figure:
    return (
        pen.ring((0.0, 0.0), radius - pen.stroke / 2)
        + pen.line((0.0, -radius + pen.stroke), (0.0, radius - pen.stroke))
        + pen.line((-radius - 0.12, -radius), (-radius - 0.12, radius))
        + pen.line((radius + 0.12, -radius), (radius + 0.12, radius))
    )


def _small_coil(pen: Pen) -> Figure:
    return magnet(pen.fine(_FINE), 0.31, -0.06, 0.5) + pen.fine(0.07).box((0.0, 0.12), 0.3, 0.28)
