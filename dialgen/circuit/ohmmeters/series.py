"""The parts of a series ohmmeter, for one range or several, and how its zero follows the cell.

Why this shape.  Coil, its shunt and the series resistor make a chain, which is an ohmmeter by itself:
that of the largest range.  A smaller range puts a resistor across the whole chain, so that chain and
resistor together have its half-scale resistance.  With the test leads shorted the chain has the whole
cell across it on every range, so one zero adjuster serves all of them and need not be touched when
the range is switched (common practice in multimeters).  Where half scale is so low that the adjuster
would be of a few ohms, the chain is made for a higher one than any range has.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence

from dialgen.circuit.design import COIL, Case, Design, Fact, Ohms, Part, Working
from dialgen.circuit.names import BATTERY, SERIES, SHUNT, ZERO
from dialgen.circuit.network import Branch, solve
from dialgen.circuit.ohmmeters.cell import Adjuster, life_facts, travel_facts
from dialgen.circuit.ohmmeters.chain import OhmChain
from dialgen.quantity import plain_number

_ROUND = 1e-9
_OWN = "new; its own resistance counts as part of half scale (common practice)"


def range_name(times: float) -> str:
    """Return a range as it is written at the switch.

    >>> range_name(10.0), range_name(0.1)
    ('×10', '×0.1')
    """
    return f"×{plain_number(times)}"


def series_design(kind: str, chain: OhmChain, half_ohm: float, times: Sequence[float]) -> Design:
    """Return parts, cases and facts of a series ohmmeter.

    Args:
        kind: the circuit's name.
        chain: of the largest range, or above it.
        half_ohm: the half-scale resistance of the range ×1.
        times: the ranges, ascending; the scale shows ×1, or else the first.

    A range's shunt across the chain has to leave k·half of its H: H·k·half/(H - k·half).
    """
    found = chain.adjuster()
    set_ohm = chain.adjusted_ohm(chain.cell.new_v)
    halves = {k: k * half_ohm for k in times}
    # A range of the chain's own resistance has no shunt.
    switched = {k: f"{SHUNT} {range_name(k)}" for k in times if halves[k] < chain.half_ohm * (1 - _ROUND)}
    ohms = {
        SERIES: chain.series_ohm if chain.across or not found else found.fixed_ohm,
        SHUNT: found.fixed_ohm if chain.across and found else chain.shunt_ohm(chain.cell.new_v),
        ZERO: found.track_ohm if found else 0.0,
        **{name: chain.half_ohm * halves[k] / (chain.half_ohm - halves[k]) for k, name in switched.items()},
        COIL: chain.coil_ohm,
    }
    share = found.share(set_ohm) if found else 0.0
    return Design(
        kind=kind,
        range=half_ohm,
        unit="Ω",
        ohms=ohms,
        parts=tuple(
            Part(name=name, ohms=value, adjustable=name == ZERO)
            for name, value in ohms.items()
            if name != COIL and 0 < value < math.inf
        ),
        cases=tuple(
            Case(
                name=range_name(k),
                signal=0.0,
                work=_worker(chain, share, switched.get(k)),
                judged_at=halves[k],
            )
            for k in times
        ),
        shown=times.index(1.0) if 1.0 in times else 0,
        facts=(*_current_facts(chain, halves), *_cell_facts(chain, halves, found)),
        form="across" if chain.across else "series",
    )


def _current_facts(chain: OhmChain, halves: dict[float, float]) -> tuple[Fact, ...]:
    times, half_ohm = min(halves.items())
    least = "; less on the others" if len(halves) > 1 else ""
    return (
        Fact(name=BATTERY, value=chain.cell.new_v, unit="V", note=_OWN),
        Fact(
            name=f"test current{_behind(times, halves)}",
            value=chain.cell.new_v / half_ohm,
            unit="A",
            note=f"through the unknown at zero ohms, and out of the battery{least}",
        ),
    )


def _cell_facts(chain: OhmChain, halves: dict[float, float], found: Adjuster | None) -> tuple[Fact, ...]:
    if found is None or chain.end_v is None:
        note = "that is all a new cell gives the coil; a higher battery or a smaller half makes room for one"
        return (Fact(name="no zero adjuster", value=chain.full_a, unit="A", note=note),)
    worn_ohm = chain.half_at(chain.end_v)
    drift = {
        _behind(k, halves): (half_ohm, 1.0 / (1.0 / worn_ohm + 1.0 / half_ohm - 1.0 / chain.half_ohm))
        for k, half_ohm in halves.items()
    }
    shares = {
        "new": found.share(chain.adjusted_ohm(chain.cell.new_v)),
        "worn": found.share(chain.adjusted_ohm(chain.end_v)),
    }
    note = "where the zero adjuster is at the end of its track"
    if not chain.across and 2 * chain.coil_v < chain.cell.new_v:
        # In series half scale drifts by 1 - Ew/E; across the coil by V/(E - V) of that.
        note += '; zero = "across" would let readings drift less'
    return (
        *life_facts(chain.cell, chain.end_v, drift),
        *travel_facts(ZERO, shares),
        Fact(name=f"{BATTERY}, lowest", value=chain.lowest_v(found), unit="V", note=note),
    )


def _behind(k: float, halves: dict[float, float]) -> str:
    """Return what stands behind a fact's name: its range, where there are several."""
    return f" {range_name(k)}" if len(halves) > 1 else ""


def _worker(chain: OhmChain, share: float, switched: str | None) -> Callable[[Ohms, float], Working]:
    """Return how a range works with the zero adjuster where a new cell has it.

    Args:
        chain: of the largest range.
        share: the part of the adjuster's track in use.
        switched: the shunt of this range; those of the others are no part of the working.
    """

    def work(ohms: Ohms, signal_ohm: float) -> Working:
        zero_ohm = share * ohms[ZERO]
        solved = solve(
            (
                Branch(BATTERY, "minus", "plus", 0.0, emf_v=chain.cell.new_v),
                Branch(SERIES, "plus", "set" if chain.across else "limited", ohms[SERIES]),
                Branch(COIL, "set", "probe", ohms[COIL]),
                Branch(SHUNT, "set", "shunted" if chain.across else "probe", ohms[SHUNT]),
                Branch(ZERO, *(("shunted", "probe") if chain.across else ("limited", "set")), zero_ohm),
                Branch("range", "plus", "probe", ohms[switched] if switched else math.inf),
                Branch("unknown", "probe", "minus", signal_ohm),
            )
        )
        loads = {name: solved.loads[name] for name in (SERIES, SHUNT, ZERO, COIL)}
        if switched:
            loads[switched] = solved.loads["range"]
        return Working(solved.loads[COIL].current_a / chain.coil_a, loads, solved.drop_v("probe", "minus"))

    return work
