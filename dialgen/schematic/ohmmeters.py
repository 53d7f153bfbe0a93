"""Pictures of what measures resistance: ohmmeters with their cell, and Wheatstone's bridge."""

from __future__ import annotations

from dataclasses import replace

from dialgen.circuit.design import Part
from dialgen.circuit.names import ARM, BALANCE, BATTERY, FEED, FULL, SERIES, SHUNT, SUPPLY, ZERO
from dialgen.quantity import engineered
from dialgen.schematic.blocks import Across, Block, Ends, Series, ladder
from dialgen.schematic.diamonds import wheatstone
from dialgen.schematic.pieces import Item, Kind, Label, Pieces
from dialgen.schematic.switches import Position, SwitchedAcross
from dialgen.schematic.wording import MINUS, PLUS, Plan

_UNKNOWN = "unknown"
_PLAIN_MM = 6.0
"""Wire behind the test terminals, beside which the word between them has room."""


def series_ohmmeter(plan: Plan) -> Pieces:
    """Return cell, range shunts, series resistor, zero adjuster and movement behind the test terminals.

    The cell drives current out of the lower terminal, so that one is positive.
    """
    across = [part for part in plan.named(SHUNT) if part.name == SHUNT]
    ranged = [part for part in plan.named(SHUNT) if part.name != SHUNT]
    zero = plan.items(ZERO)
    in_shunt = zero if plan.design.form == "across" else []
    column = (*map(plan.item, across), *in_shunt)
    in_series = [*_at_least(plan, SERIES), *([] if in_shunt else zero)]
    return ladder(
        [
            Ends(MINUS, PLUS, _PLAIN_MM, _UNKNOWN),
            Series(_cell(plan, turned=True)),
            *_ranges(plan, ranged),
            *map(Series, in_series),
            *([Across(column)] if column else []),
            Across((plan.movement(),)),
        ]
    )


def shunt_ohmmeter(plan: Plan) -> Pieces:
    """Return the movement's branch across the test terminals, and the cell that feeds it at the right."""
    series, shunts = plan.items(SERIES), plan.items(SHUNT)
    feed = [*plan.items(FULL), *_at_least(plan, FEED)]
    return ladder(
        [
            Ends(PLUS, MINUS, _PLAIN_MM, _UNKNOWN),
            *([] if series else [Across((item,)) for item in shunts]),
            Across((*series, plan.movement())),
            *map(Series, feed),
            Across((_cell(plan),)),
        ]
    )


def bridge(plan: Plan) -> Pieces:
    """Return the bridge, its sensor at the right below R1, R2 and R3 at the side of the supply."""
    first, second, third = plan.items(ARM)
    balance_ohm, supply_v = plan.known(BALANCE), plan.known(SUPPLY)
    sensor = Item(Kind.SENSOR, Label("sensor", (f"balance {engineered(balance_ohm, 'Ω')}",)), "sensor")
    label = Label("supply", (engineered(abs(supply_v), "V"),))
    # Clockwise from the left corner: R2 to the top, R1 to the right, the sensor to the foot, R3 back.
    return wheatstone(
        (second, first, sensor, third),
        replace(plan.movement(), turned=True),
        Item(Kind.CELL, label, "supply", turned=supply_v < 0),
    )


def _at_least(plan: Plan, name: str) -> list[Item]:
    """Return the parts of that name, or one without a value where nothing was designed."""
    return plan.items(name) or ([] if plan.design.parts else [Item(Kind.RESISTOR, Label(name))])


def _cell(plan: Plan, turned: bool = False) -> Item:
    """Return the battery with its voltage, where the design tells it."""
    fact = plan.fact(BATTERY)
    values = (engineered(fact.value, fact.unit),) if fact else ()
    return Item(Kind.CELL, Label("battery", values), "battery", turned)


def _ranges(plan: Plan, shunts: list[Part]) -> list[Block]:
    """Return the switch for the shunts of the smaller ranges; the largest may have none."""
    if len(plan.design.cases) == 1:
        return [Across((plan.item(part),)) for part in shunts]
    if not shunts:
        return []
    by_range = {part.name.removeprefix(f"{SHUNT} "): plan.item(part) for part in shunts}
    positions = tuple(Position(case.name, by_range.get(case.name)) for case in plan.design.cases)
    return [SwitchedAcross(positions, plan.design.shown)]
