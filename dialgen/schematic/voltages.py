"""Pictures of circuits for voltages: one multiplier, several on a switch, a chain with taps."""

from __future__ import annotations

from dialgen.circuit.names import LINE, MULTIPLIER, SECTION, SUPPRESS, SWAMP
from dialgen.quantity import engineered
from dialgen.schematic.blocks import Across, Block, Ends, Series, ladder
from dialgen.schematic.pieces import Item, Kind, Label, Pieces
from dialgen.schematic.strings import Tapped
from dialgen.schematic.switches import Switched
from dialgen.schematic.wording import Plan


def multiplier(plan: Plan) -> Pieces:
    """Return the multiplier between the upper terminal and the movement, which is at the earthy end."""
    if plan.named(SECTION):
        return _chain(plan)
    resistors, line = plan.items(MULTIPLIER), _line(plan)
    head: list[Block]
    if len(resistors) > 1:
        head = [Switched(tuple(resistors), plan.design.shown, plan.at_plus(""), plan.lower, line)]
    else:
        head = [Ends(plan.upper, plan.lower, line=line), *map(Series, resistors)]
    return ladder([*head, *map(Series, _behind(plan)), Across((plan.movement(),))])


def _chain(plan: Plan) -> Pieces:
    """Return sections, what is in series and the movement in one string, the largest range at its head."""
    sections = plan.items(SECTION)[::-1]
    behind = _behind(plan)
    string = Tapped(
        (*sections, *behind, plan.movement()),
        (*(plan.at_plus(case.name) for case in plan.design.cases[::-1]), *[""] * (len(behind) + 1)),
        plan.lower,
        line=_line(plan),
    )
    return ladder([string])


def _line(plan: Plan) -> Item | None:
    """Return the resistance of the line, which is no part of the instrument and leads to it from outside."""
    return next(iter(plan.wire_items(LINE)), None)


def _behind(plan: Plan) -> list[Item]:
    """Return what is in series with the coil besides its multiplier."""
    return [*plan.items(SWAMP), *_suppressor(plan)]


def _suppressor(plan: Plan) -> list[Item]:
    """Return the zener diode of a suppressed zero, which conducts against its arrow."""
    fact = plan.fact(SUPPRESS)
    if not fact:
        return []
    label = Label("zener", (engineered(fact.value, fact.unit),))
    return [Item(Kind.ZENER, label, turned=True)]
