"""Pictures of what measures resistance: ohmmeters with their cell, and Wheatstone's bridge."""

from __future__ import annotations

from dataclasses import replace

from dialgen.circuit.design import Part
from dialgen.quantity import engineered
from dialgen.schematic.blocks import Across, Block, Ends, Series, ladder
from dialgen.schematic.diamonds import wheatstone
from dialgen.schematic.pieces import Item, Kind, Label, Pieces
from dialgen.schematic.switches import Position, SwitchedAcross
from dialgen.schematic.wording import MINUS, PLUS, Plan

_UNKNOWN = "unknown"
_PLAIN_MM = 6.0
"""Wire behind the test terminals, beside which the word between them has room."""

_ALL = 0.999


def series_ohmmeter(plan: Plan) -> Pieces:
    """Return cell, range shunts, series resistor, zero adjuster and movement behind the test terminals.

    The cell drives current out of the lower terminal, so that one is positive.
    """
    across = [part for part in plan.named("shunt") if part.name == "shunt"]
    ranged = [part for part in plan.named("shunt") if part.name != "shunt"]
    zero = plan.items("zero adjuster", kind=Kind.ADJUSTABLE)
    in_shunt = zero if _zero_is_across(plan) else []
    column = (*map(plan.item, across), *in_shunt)
    in_series = [*_at_least(plan, "series resistor"), *([] if in_shunt else zero)]
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
    series, shunts = plan.items("series resistor"), plan.items("shunt")
    feed = [*plan.items("full-scale adjuster", kind=Kind.ADJUSTABLE), *_at_least(plan, "feed resistor")]
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
    first, second, third = plan.items("arm")
    balance = plan.fact("balance")
    values = (f"balance {engineered(balance.value, 'Ω')}",) if balance else ()
    sensor = Item(Kind.SENSOR, Label("sensor", values), "sensor")
    supply = plan.fact("supply")
    volts = supply.value if supply else 0.0
    label = Label("supply", (engineered(abs(volts), "V"),) if supply else ())
    # Clockwise from the left corner: R2 to the top, R1 to the right, the sensor to the foot, R3 back.
    return wheatstone(
        (second, first, sensor, third),
        replace(plan.movement(), turned=True),
        Item(Kind.CELL, label, "supply", turned=volts < 0),
    )


def _at_least(plan: Plan, name: str) -> list[Item]:
    """Return the parts of that name, or one without a value where nothing was designed."""
    return plan.items(name) or ([] if plan.design.parts else [Item(Kind.RESISTOR, Label(name))])


def _zero_is_across(plan: Plan) -> bool:
    """Tell where the zero adjuster is: in series it carries all that the series resistor does."""
    current_a = plan.currents_a()
    return current_a.get("zero adjuster", 0.0) < _ALL * current_a.get("series resistor", 0.0)


def _cell(plan: Plan, turned: bool = False) -> Item:
    """Return the battery with its voltage, where the design tells it."""
    fact = plan.fact("battery")
    if fact is None and plan.design.kind == "series ohmmeter":
        fact = plan.fact("voltage at open terminals")
    values = (engineered(fact.value, fact.unit),) if fact else ()
    return Item(Kind.CELL, Label("battery", values), "battery", turned)


def _ranges(plan: Plan, shunts: list[Part]) -> list[Block]:
    """Return the switch for the shunts of the smaller ranges; the largest has none."""
    if not shunts:
        return []
    names = [case.name for case in sorted(plan.design.cases, key=lambda case: float(case.name.lstrip("×")))]
    by_range = {part.name.removeprefix("shunt "): plan.item(part) for part in shunts}
    positions = [Position(name, by_range.pop(name, None)) for name in names]
    positions += [Position(name, item) for name, item in by_range.items()]
    shown = plan.design.cases[0].name if plan.design.cases else ""
    return [SwitchedAcross(tuple(positions), names.index(shown) if shown in names else 0)]
