"""The parts of a shunt ohmmeter: the unknown across the coil, which a cell feeds all the time.

Below, E is the cell's voltage, R the feed, Rb the coil's branch with what is around the coil, Im and
Rm are the coil's.  With the terminals open the branch has the voltage V = E·Rb/(R + Rb), for full
deflection; seen from the terminals R and Rb are side by side, so half scale is R∥Rb (Thévenin).
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

from dialgen.circuit.design import COIL, Case, Design, Fact, Ohms, Part, Working
from dialgen.circuit.names import BATTERY, FEED, FULL, SERIES, SHUNT
from dialgen.circuit.network import Branch, solve
from dialgen.circuit.ohmmeters.cell import Adjuster, Cell, adjuster, life_facts, travel_facts
from dialgen.circuit.terminals import RESISTANCE_KEY
from dialgen.errors import InputError
from dialgen.quantity import engineered

OPEN = "open terminals"
_ROUND = 1e-9


@dataclass(frozen=True, slots=True, kw_only=True)
class Fed:
    """A coil's branch behind a feed resistor.

    Args:
        coil_a: Im.
        coil_ohm: Rm.
        cell: the battery.
        half_ohm: the half-scale resistance.
        branch_ohm: Rb.
    """

    coil_a: float
    coil_ohm: float
    cell: Cell
    half_ohm: float
    branch_ohm: float

    @property
    def series_ohm(self) -> float:
        """What is in series with the coil, where its branch has more than the coil."""
        return max(0.0, self.branch_ohm - self.coil_ohm)

    @property
    def shunt_ohm(self) -> float:
        """What is across the coil, where its branch has less: 1/(1/Rb - 1/Rm); infinite for nothing."""
        left_s = 1.0 / self.branch_ohm - 1.0 / self.coil_ohm
        return 1.0 / left_s if left_s > _ROUND / self.coil_ohm else math.inf

    @property
    def branch_v(self) -> float:
        """V, over the branch at full deflection: the coil's own, and what is in series with it."""
        return self.coil_a * (self.coil_ohm + self.series_ohm)

    @property
    def full_a(self) -> float:
        """The current into the branch at full deflection, by Ohm's law."""
        return self.branch_v / self.branch_ohm

    def feed_ohm(self, cell_v: float) -> float:
        """Return R for full deflection with this cell: Kirchhoff's voltage law, (E - V)·Rb/V."""
        return (cell_v - self.branch_v) / self.full_a

    def half_at(self, cell_v: float) -> float:
        """Return half scale with the feed set again, R∥Rb."""
        feed_ohm = self.feed_ohm(cell_v)
        return feed_ohm * self.branch_ohm / (feed_ohm + self.branch_ohm)

    @property
    def end_v(self) -> float | None:
        """The voltage that the adjuster follows the cell down to; with none left in the feed it is V."""
        return self.cell.followed_v(self.branch_v)

    def check(self) -> None:
        """Refuse a worn cell that the feed cannot be set for.

        Raises:
            InputError: it has less than the branch needs.
        """
        if self.cell.worn_v is not None and self.cell.worn_v < self.branch_v * (1 - _ROUND):
            raise InputError(
                f"at {engineered(self.cell.worn_v, 'V')} the coil's branch no longer gets its "
                f"{engineered(self.branch_v, 'V')}; change the cell there or above, "
                "or take a smaller half or a higher battery",
                ("worn",),
                ("half",),
            )


def fed(coil_a: float, coil_ohm: float, cell: Cell, half_ohm: float) -> Fed:
    """Return the branch and feed for a half-scale resistance.

    R∥Rb = half and V = E·Rb/(R + Rb) give Rb = half·E/(E - V).  With nothing but a shunt across it
    the coil sets V = Im·Rm, and Rb is at most Rm.  Where that asks for more than Rm a resistor goes in
    series with the coil, so V = Im·Rb, and R + Rb = S = E/Im, R·Rb = half·S: the smaller root of
    x² - S·x + half·S, the one that is Rm where no resistor is needed.

    Raises:
        InputError: no branch has this half-scale resistance with this battery; says what would do.
    """
    coil_v, most_ohm = coil_a * coil_ohm, cell.new_v / coil_a
    shunted_ohm = half_ohm * cell.new_v / (cell.new_v - coil_v) if cell.new_v > coil_v else math.inf
    if shunted_ohm <= coil_ohm * (1 + _ROUND):
        branch_ohm = min(shunted_ohm, coil_ohm)
    elif 2 * coil_ohm <= most_ohm and 4 * half_ohm <= most_ohm * (1 + _ROUND):
        # The root in the form that loses no figures where half is small.
        branch_ohm = 2 * half_ohm / (1 + math.sqrt(max(0.0, 1 - 4 * half_ohm / most_ohm)))
    else:
        raise InputError(
            f"{engineered(cell.new_v, 'V')} cannot give half scale at {engineered(half_ohm, 'Ω')}; "
            f"take a battery of {engineered(_least_v(coil_a, coil_ohm, half_ohm), 'V')} or more, "
            "or a smaller half",
            ("half",),
            ("battery",),
            RESISTANCE_KEY,
        )
    return Fed(coil_a=coil_a, coil_ohm=coil_ohm, cell=cell, half_ohm=half_ohm, branch_ohm=branch_ohm)


def _least_v(coil_a: float, coil_ohm: float, half_ohm: float) -> float:
    """Return the lowest voltage with a solution.

    The largest half for a voltage is Rm·(1 - V/E) up to E = 2·V, from a bare coil, and E/(4·Im) from
    there on, where feed and branch are equal.
    """
    if 2 * half_ohm <= coil_ohm:
        return coil_a * coil_ohm / (1 - half_ohm / coil_ohm)
    return 4 * half_ohm * coil_a


def shunt_design(kind: str, made: Fed) -> Design:
    """Return parts, the one case and the facts of a shunt ohmmeter."""
    end_v, new_ohm = made.end_v, made.feed_ohm(made.cell.new_v)
    found = adjuster(new_ohm, made.feed_ohm(end_v)) if end_v is not None else None
    ohms = {
        FEED: found.fixed_ohm if found else new_ohm,
        FULL: found.track_ohm if found else 0.0,
        SERIES: made.series_ohm,
        SHUNT: made.shunt_ohm,
        COIL: made.coil_ohm,
    }
    share = found.share(new_ohm) if found else 0.0
    return Design(
        kind=kind,
        range=made.half_ohm,
        unit="Ω",
        ohms=ohms,
        parts=tuple(
            Part(name=name, ohms=value, adjustable=name == FULL)
            for name, value in ohms.items()
            if name != COIL and 0 < value < math.inf
        ),
        cases=(Case(name=OPEN, signal=math.inf, work=_worker(made, share), judged_at=made.half_ohm),),
        facts=(*_current_facts(made), *_cell_facts(made, found)),
    )


def _current_facts(made: Fed) -> tuple[Fact, ...]:
    return (
        Fact(
            name=BATTERY,
            value=made.cell.new_v,
            unit="V",
            note="new; its own resistance is part of the feed: take it off (common practice)",
        ),
        Fact(
            name="test current",
            value=made.cell.new_v / made.feed_ohm(made.cell.new_v),
            unit="A",
            note="through the unknown at zero ohms, and out of the battery",
        ),
        Fact(name="test voltage", value=made.branch_v, unit="V", note="at open terminals"),
        Fact(
            name="battery current, open",
            value=made.full_a,
            unit="A",
            note="flows as long as the meter is on; it needs a switch",
        ),
    )


def _cell_facts(made: Fed, found: Adjuster | None) -> tuple[Fact, ...]:
    if found is None or made.end_v is None:
        return ()
    shares = {
        "new": found.share(made.feed_ohm(made.cell.new_v)),
        "worn": found.share(made.feed_ohm(made.end_v)),
    }
    return (
        *life_facts(made.cell, made.end_v, {"": (made.half_ohm, made.half_at(made.end_v))}),
        *travel_facts(FULL, shares),
        Fact(
            name=f"{BATTERY}, lowest",
            value=made.branch_v + made.full_a * found.fixed_ohm,
            unit="V",
            note="where the full-scale adjuster is at the end of its track",
        ),
    )


def _worker(made: Fed, share: float) -> Callable[[Ohms, float], Working]:
    """Return how it works with the adjuster where a new cell has it; ``share`` of its track is in use."""

    def work(ohms: Ohms, signal_ohm: float) -> Working:
        solved = solve(
            (
                Branch(BATTERY, "minus", "plus", 0.0, emf_v=made.cell.new_v),
                Branch(FEED, "plus", "fed", ohms[FEED]),
                Branch(FULL, "fed", "probe", share * ohms[FULL]),
                Branch(SERIES, "probe", "coil", ohms[SERIES]),
                Branch(COIL, "coil", "minus", ohms[COIL]),
                Branch(SHUNT, "coil", "minus", ohms[SHUNT]),
                Branch("unknown", "probe", "minus", signal_ohm),
            )
        )
        loads = {name: solved.loads[name] for name in ohms}
        return Working(solved.loads[COIL].current_a / made.coil_a, loads, solved.drop_v("probe", "minus"))

    return work
