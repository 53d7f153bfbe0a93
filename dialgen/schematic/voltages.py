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
    resistors = plan.items(MULTIPLIER)
    head: list[Block]
    if len(resistors) > 1:
        names = [item.part for item in resistors]
        chosen = names.index(f"{MULTIPLIER} {plan.design.cases[0].name}")
        head = [Switched(tuple(resistors), chosen, plan.at_plus(""), plan.lower)]
    else:
        head = [Ends(plan.upper, plan.lower), *map(Series, resistors)]
    return ladder([*head, *map(Series, _behind(plan)), Across((plan.movement(),))])


def _chain(plan: Plan) -> Pieces:
    """Return sections, what is in series and the movement in one string, the largest range at its head."""
    sections = plan.items(SECTION)[::-1]
    falling = sorted(plan.design.cases, key=lambda case: -case.signal)
    behind = _behind(plan)
    string = Tapped(
        (*sections, *behind, plan.movement()),
        (*(plan.at_plus(case.name) for case in falling), *[""] * (len(behind) + 1)),
        plan.lower,
    )
    return ladder([string])


def _behind(plan: Plan) -> list[Item]:
    """Return what is in series with the coil besides its multiplier."""
    return [*plan.wire_items(LINE), *plan.items(SWAMP), *_suppressor(plan)]


def _suppressor(plan: Plan) -> list[Item]:
    """Return the zener diode of a suppressed zero, which conducts against its arrow."""
    fact = plan.fact(SUPPRESS)
    if not fact:
        return []
    label = Label("zener", (engineered(fact.value, fact.unit),))
    return [Item(Kind.ZENER, label, turned=True)]
