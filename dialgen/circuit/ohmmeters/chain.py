"""The chain of a series ohmmeter: coil, shunt, series resistor and zero adjuster, and a cell that wears.

E is the cell's voltage, Im and Rm are the coil's, V = Im·Rm is the coil's voltage at full deflection,
and H is the chain's resistance.  With the test leads shorted the chain takes I = E/H.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, replace

from dialgen.circuit.ohmmeters.cell import Adjuster, Cell, adjuster
from dialgen.circuit.terminals import CURRENT_KEY, RESISTANCE_KEY
from dialgen.errors import InputError
from dialgen.quantity import engineered

_LEFT = 0.01
_FOURFOLD = 4.0
_LOWEST_TRACK_OHM = 10.0
_LIFTED = 1.5
_ROUND = 1e-9


@dataclass(frozen=True, slots=True, kw_only=True)
class OhmChain:
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

    def lifted(self) -> OhmChain:
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
