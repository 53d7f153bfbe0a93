"""Pictures of circuits for currents: the bare movement, shunts, a current transformer."""

from __future__ import annotations

from dialgen.circuit.names import LEADS, SECONDARY, SECTION, SHUNT, SWAMP, TOTAL
from dialgen.quantity import engineered
from dialgen.schematic.blocks import Across, Block, Ends, Series, ladder
from dialgen.schematic.fourterminal import four_terminal
from dialgen.schematic.pieces import Item, Pieces
from dialgen.schematic.strings import Tapped
from dialgen.schematic.transformer import Transformer
from dialgen.schematic.wording import Plan

_FOUR_TERMINALS_FROM_A = 10.0
"""From here on a shunt is drawn with its two terminals for current and two for its drop (common practice)."""


def direct(plan: Plan) -> Pieces:
    """Return the movement at its two terminals."""
    return ladder([Ends(plan.upper, plan.lower, 14.0), Across((plan.movement(),))])


def shunt(plan: Plan) -> Pieces:
    """Return the shunt across the movement's branch; a large one with four terminals."""
    shunts, branch = plan.items(SHUNT), _branch(plan)
    large = abs(plan.design.range or 0.0) >= _FOUR_TERMINALS_FROM_A or any(p.given for p in plan.named(SHUNT))
    if large and len(shunts) == 1:
        return four_terminal(plan, shunts[0], branch)
    return ladder(
        [Ends(plan.upper, plan.lower), *_across(shunts), *_series(branch), Across((plan.movement(),))]
    )


def universal_shunt(plan: Plan) -> Pieces:
    """Return the string of sections with a terminal for each range, the smallest range at its head."""
    sections = plan.items(SECTION)[::-1]
    (total,) = plan.named(TOTAL)
    string = Tapped(
        tuple(sections),
        tuple(plan.at_plus(case.name) for case in plan.design.cases),
        plan.lower,
        (plan.label(total), len(sections)),
    )
    return ladder([string, *_series(_branch(plan)), Across((plan.movement(),))])


def current_transformer(plan: Plan) -> Pieces:
    """Return the transformer with its secondary earthed, and what is across it."""
    text = plan.design.stamp, "secondary", engineered(plan.known(SECONDARY), "A"), "at full scale"
    return ladder(
        [
            Transformer(plan.upper, plan.lower, text),
            *_across(plan.items(SHUNT)),
            *_series(_branch(plan)),
            Across((plan.movement(),)),
        ]
    )


def _branch(plan: Plan) -> list[Item]:
    """Return what is in series with the coil."""
    return [*plan.items(SWAMP), *plan.wire_items(LEADS)]


def _series(items: list[Item]) -> list[Block]:
    return [Series(item) for item in items]


def _across(items: list[Item]) -> list[Block]:
    return [Across((item,)) for item in items]
