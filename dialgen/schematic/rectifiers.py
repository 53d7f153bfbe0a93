"""Pictures of rectifier instruments: bridge, half bridge, half wave."""

from __future__ import annotations

from dialgen.circuit.design import COIL
from dialgen.circuit.names import COIL_SHUNT, LEG, MULTIPLIER
from dialgen.schematic.blocks import Across, Block, Ends, Series, ladder
from dialgen.schematic.diamonds import Rectifying
from dialgen.schematic.pieces import Item, Kind, Pieces
from dialgen.schematic.wording import Plan

_MORE = 1.05
"""A by-pass makes the multiplier carry √2 of what the coil does; rounding and leaks are far below this."""

_DIODE, _BACK = Item(Kind.DIODE), Item(Kind.DIODE, turned=True)


def rectifier(plan: Plan) -> Pieces:
    """Return multiplier, diodes and the movement, with the coil's shunt if it has one."""
    head: list[Block] = [Ends(plan.upper, plan.lower), *map(Series, plan.items(MULTIPLIER))]
    return ladder([*head, *_connected(plan)])


def _bridge(plan: Plan) -> list[Block]:
    """Every diode points to the upper corner or away from the lower one."""
    return [Rectifying((_DIODE, _BACK, _BACK, _DIODE), _coil(plan))]


def _half_bridge(plan: Plan) -> list[Block]:
    """Two resistors at the lower corner in place of two diodes."""
    near, far = plan.items(LEG)
    return [Rectifying((_DIODE, _BACK, far, near), _coil(plan))]


def _half_wave(plan: Plan) -> list[Block]:
    """One diode in series, and one that passes the other half wave by the movement."""
    shunted = [Across((item,)) for item in plan.items(COIL_SHUNT)]
    return [Across((_BACK,)), Series(_DIODE), *shunted, Across((plan.movement(),))]


def _connected(plan: Plan) -> list[Block]:
    """Return what is behind the multiplier, as the design's own working tells it.

    Only a half bridge has legs.  In a half wave circuit the multiplier carries both half waves and the
    coil with its shunt one of them; in a bridge both carry the same.
    """
    if plan.named(LEG):
        return _half_bridge(plan)
    current_a = plan.currents_a()
    coil_a = current_a.get(COIL, 0.0) + current_a.get(COIL_SHUNT, 0.0)
    return _half_wave(plan) if current_a.get(MULTIPLIER, 0.0) > _MORE * coil_a else _bridge(plan)


def _coil(plan: Plan) -> tuple[Item, ...]:
    return (*plan.items(COIL_SHUNT), plan.movement())
