"""The parts of a series ohmmeter, for one range or several, and how its zero follows the cell.

Why this shape.  Coil, its shunt and the series resistor make a chain, which is an ohmmeter by itself:
that of the largest range.  A smaller range puts a resistor across the whole chain, so that chain and
resistor together have its half-scale resistance.  With the test leads shorted the chain has the whole
cell across it on every range, so one zero adjuster serves all of them and need not be touched when
the range is switched (common practice in multimeters).  Where half scale is so low that the adjuster
would have to be of an ohm or less, the chain is made for a higher one than any range has.

Below, E is the cell's voltage, Im and Rm are the coil's, V = Im·Rm is the coil's voltage at full
deflection, and H is the chain's resistance.  At zero ohms the chain takes I = E/H.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace

from dialgen.circuit.cell import Adjuster, Cell, adjuster, life_facts, travel_facts
from dialgen.circuit.design import COIL, Case, Design, Fact, Load, Ohms, Part, Working
from dialgen.circuit.network import Branch, solve
from dialgen.circuit.terminals import CURRENT_KEY, RESISTANCE_KEY
from dialgen.errors import InputError
from dialgen.quantity import engineered, plain_number

SERIES, SHUNT, ZERO = "series resistor", "shunt", "zero adjuster"
_LEFT = 0.01
_FOURFOLD = 4.0
_LOWEST_TRACK_OHM = 10.0
_LIFTED = 1.5
_ROUND = 1e-9
_OWN = "the cell's own resistance counts as part of it (common practice)"


def range_name(times: float) -> str:
    """Return a range as it is written at the switch.

    >>> range_name(10.0), range_name(0.1)
    ('×10', '×0.1')
    """
    return f"×{plain_number(times)}"


@dataclass(frozen=True, slots=True, kw_only=True)
class Chain:
    """Coil, shunt, series resistor and zero adjuster: the ohmmeter of the largest range.

    Args:
        coil_a: Im.
        coil_ohm: Rm.
        cell: the battery.
        half_ohm: H.
        across: whether the zero adjuster is in the coil's shunt; else it is in series.
    """

    coil_a: float
    coil_ohm: float
    cell: Cell
    half_ohm: float
    across: bool

    @property
    def coil_v(self) -> float:
        """V, over the coil at full deflection."""
        return self.coil_a * self.coil_ohm

    @property
    def full_a(self) -> float:
        """I with a new cell, by Ohm's law."""
        return self.cell.new_v / self.half_ohm

    @property
    def series_ohm(self) -> float:
        """All that is in series with a new cell: Kirchhoff's voltage law, (E - V)/I."""
        return (self.cell.new_v - self.coil_v) / self.full_a

    @property
    def least_v(self) -> float:
        """The lowest voltage the zero can be set at.

        Across the coil: the series resistor stays, and the current (E - V)/Rs has to be Im and a
        little for the shunt.  In series: nothing is left in series, and E = V.
        """
        return self.coil_v + (self.series_ohm * self.coil_a * (1 + _LEFT) if self.across else 0.0)

    @property
    def end_v(self) -> float | None:
        """The voltage that the adjuster follows the cell down to; None where there is no adjuster.

        Where nothing is said of the worn cell, not so far that the shunt has to grow over fourfold: the
        new cell's setting would be in the first few per cent of the track.
        """
        most_v = self.cell.new_v
        fourfold_v = most_v - (1 - 1 / _FOURFOLD) * self.series_ohm * (self.full_a - self.coil_a)
        return self.cell.followed_v(max(self.least_v, fourfold_v) if self.across else self.least_v)

    def shunt_ohm(self, cell_v: float) -> float:
        """Return the shunt for full deflection at zero ohms: V/(I - Im), infinite where I is Im.

        With the adjuster in series I is the same for every cell; across the coil it is (E - V)/Rs.
        """
        full_a = self.full_a
        if self.across and cell_v != self.cell.new_v:
            full_a = (cell_v - self.coil_v) / self.series_ohm
        left_a = full_a - self.coil_a
        return self.coil_v / left_a if left_a > _ROUND * self.coil_a else math.inf

    def half_at(self, cell_v: float) -> float:
        """Return half scale with the zero set again: what cell and chain are to a shorted pair, E/I."""
        if not self.across or cell_v == self.cell.new_v:
            return cell_v / self.full_a
        return self.series_ohm * cell_v / (cell_v - self.coil_v)

    def adjusted_ohm(self, cell_v: float) -> float:
        """Return the resistance that the adjuster sets: of the whole shunt, or of all in series."""
        return self.shunt_ohm(cell_v) if self.across else (cell_v - self.coil_v) / self.full_a

    def adjuster(self) -> Adjuster | None:
        """Return the adjuster with its fixed part; None where there is none."""
        if self.end_v is None:
            return None
        return adjuster(self.adjusted_ohm(self.cell.new_v), self.adjusted_ohm(self.end_v))

    def lowest_v(self, found: Adjuster) -> float:
        """Return the voltage at which the adjuster is at the end of its track."""
        if not self.across:
            return self.coil_v + self.full_a * found.fixed_ohm
        return self.coil_v + self.series_ohm * (self.coil_a + self.coil_v / found.most_ohm)

    def check(self) -> None:
        """Refuse a cell that cannot drive the movement.

        Raises:
            InputError: the cell has less than the coil needs, or the zero cannot be set when it is worn.
        """
        if self.cell.new_v < self.coil_v * (1 - _ROUND):
            raise InputError(
                f"{engineered(self.cell.new_v, 'V')} is less than the coil alone needs, "
                f"{engineered(self.coil_v, 'V')}; take a higher battery or another movement",
                ("battery",),
                RESISTANCE_KEY,
                CURRENT_KEY,
            )
        if self.cell.worn_v is not None and self.cell.worn_v < self.least_v * (1 - _ROUND):
            mend = "a smaller half or a more sensitive movement" if self.across else "another movement"
            raise InputError(
                f"at {engineered(self.cell.worn_v, 'V')} the zero can no longer be set; "
                f"change the cell at {engineered(self.least_v, 'V')} or above, or take {mend}",
                ("worn",),
                ("half",) if self.across else RESISTANCE_KEY,
            )

    def lifted(self) -> Chain:
        """Return the chain with an adjuster that can be bought: this one, or one of more resistance.

        A track below 10 Ω is hardly sold, and its wiper is as uncertain as its ohms (common practice).
        Such a chain is made anew to take half as much again as the coil, with the worn cell where the
        adjuster is across the coil; every range then has a shunt.
        """
        found = self.adjuster()
        if found is None or self.end_v is None or found.track_ohm >= _LOWEST_TRACK_OHM:
            return self
        full_a = _LIFTED * self.coil_a
        if self.across:
            full_a *= (self.cell.new_v - self.coil_v) / (self.end_v - self.coil_v)
        return replace(self, half_ohm=max(self.half_ohm, self.cell.new_v / full_a))


def series_design(kind: str, chain: Chain, half_ohm: float, times: Sequence[float]) -> Design:
    """Return parts, cases and facts of a series ohmmeter.

    Args:
        kind: the circuit's name.
        chain: of the largest range, or above it.
        half_ohm: the half-scale resistance of the range ×1.
        times: the ranges, first the one that the scale shows.

    A range's shunt across the chain has to leave k·half of H: H·k·half/(H - k·half).
    """
    found = chain.adjuster()
    set_ohm = chain.adjusted_ohm(chain.cell.new_v)
    halves = {k: k * half_ohm for k in times}
    # A range of the chain's own resistance has no shunt.
    switched = {
        k: f"{SHUNT} {range_name(k)}" for k in sorted(times) if halves[k] < chain.half_ohm * (1 - _ROUND)
    }
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
            Part(name=name, ohms=value)
            for name, value in ohms.items()
            if name != COIL and 0 < value < math.inf
        ),
        cases=tuple(
            Case(name=range_name(k), signal=0.0, work=_worker(chain, share, switched.get(k))) for k in times
        ),
        facts=(*_current_facts(chain, halves), *_cell_facts(chain, halves, found)),
    )


def _current_facts(chain: Chain, halves: dict[float, float]) -> tuple[Fact, ...]:
    shorts = tuple(
        Fact(
            name=f"test current{_behind(k, halves)}",
            value=chain.cell.new_v / half_ohm,
            unit="A",
            note="through the unknown at zero ohms, and the battery's",
        )
        for k, half_ohm in halves.items()
    )
    return (
        Fact(name="battery", value=chain.cell.new_v, unit="V", note="new"),
        *shorts,
        Fact(name="voltage at open terminals", value=chain.cell.new_v, unit="V", note="no current flows"),
    )


def _cell_facts(chain: Chain, halves: dict[float, float], found: Adjuster | None) -> tuple[Fact, ...]:
    new = tuple(
        Fact(
            name=f"half scale{_behind(k, halves)}, new cell",
            value=half_ohm,
            unit="Ω",
            note=_OWN if half_ohm == min(halves.values()) else "",
        )
        for k, half_ohm in halves.items()
    )
    if found is None or chain.end_v is None:
        note = "that is all a new cell gives the coil; a higher battery or a smaller half makes room for one"
        return (*new, Fact(name="no zero adjuster", value=chain.full_a, unit="A", note=note))
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
        note += '; zero = "across" would let half scale drift less'
    return (
        *new,
        *life_facts(chain.cell, chain.end_v, drift),
        *travel_facts(ZERO, shares),
        Fact(name="lowest voltage for zero", value=chain.lowest_v(found), unit="V", note=note),
    )


def _behind(k: float, halves: dict[float, float]) -> str:
    """Return what stands behind a fact's name: its range, where there are several."""
    return f" {range_name(k)}" if len(halves) > 1 else ""


def _worker(chain: Chain, share: float, switched: str | None) -> Callable[[Ohms, float], Working]:
    """Return how a range works with the zero adjuster where a new cell has it.

    Args:
        chain: of the largest range.
        share: the part of the adjuster's track in use.
        switched: the shunt of this range; the others carry nothing.
    """

    def work(ohms: Ohms, signal_ohm: float) -> Working:
        zero_ohm = share * ohms[ZERO]
        solved = solve(
            (
                Branch("battery", "minus", "plus", 0.0, emf_v=chain.cell.new_v),
                Branch(SERIES, "plus", "set" if chain.across else "limited", ohms[SERIES]),
                Branch(COIL, "set", "probe", ohms[COIL]),
                Branch(SHUNT, "set", "shunted" if chain.across else "probe", ohms[SHUNT]),
                Branch(ZERO, *(("shunted", "probe") if chain.across else ("limited", "set")), zero_ohm),
                Branch("range", "plus", "probe", ohms[switched] if switched else math.inf),
                Branch("unknown", "probe", "minus", signal_ohm),
            )
        )
        loads = {name: solved.loads.get(name, Load(0.0, ohms[name])) for name in ohms}
        if switched:
            loads[switched] = solved.loads["range"]
        return Working(solved.loads[COIL].current_a / chain.coil_a, loads, solved.drop_v("probe", "minus"))

    return work
