"""Pictures of rectifier instruments: bridge, half bridge, half wave."""

from __future__ import annotations

from collections.abc import Callable, Mapping

from dialgen.circuit.names import COIL_SHUNT, LEG, MULTIPLIER
from dialgen.schematic.blocks import Across, Block, Ends, Series, ladder
from dialgen.schematic.diamonds import Rectifying
from dialgen.schematic.pieces import Item, Kind, Pieces
from dialgen.schematic.wording import Plan

_DIODE, _BACK = Item(Kind.DIODE), Item(Kind.DIODE, turned=True)


def rectifier(plan: Plan) -> Pieces:
    """Return multiplier, diodes and the movement, with the coil's shunt if it has one."""
    head: list[Block] = [Ends(plan.upper, plan.lower), *map(Series, plan.items(MULTIPLIER))]
    return ladder([*head, *_CONNECTED[plan.design.form](plan)])


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


def _coil(plan: Plan) -> tuple[Item, ...]:
    return (*plan.items(COIL_SHUNT), plan.movement())


_CONNECTED: Mapping[str, Callable[[Plan], list[Block]]] = {
    "bridge": _bridge,
    "half bridge": _half_bridge,
    "half wave": _half_wave,
}
"""What is behind the multiplier, by the form of the design."""
