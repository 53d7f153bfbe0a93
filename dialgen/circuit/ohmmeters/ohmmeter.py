"""Ohmmeters: the unknown in series with the coil and a cell, or across the coil."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated, ClassVar, Literal

import numpy as np

from dialgen.circuit.design import COIL, Design
from dialgen.circuit.ohmmeters.cell import cell_of, check_cell, undesigned
from dialgen.circuit.ohmmeters.chain import OhmChain
from dialgen.circuit.ohmmeters.series import range_name, series_design
from dialgen.circuit.ohmmeters.shunted import Fed, fed, shunt_design
from dialgen.circuit.ranges import MOST_RANGES
from dialgen.circuit.terminals import Circuit, Coil, Terminals
from dialgen.errors import InputError
from dialgen.quantity import OHM_ABOVE, VOLT_ABOVE, Amount, Listed, Number, engineered
from dialgen.stage import Array, Span, Stage

_ROUND = 1e-9


def _in_order(times: tuple[float, ...]) -> tuple[float, ...]:
    """Return the ranges ascending."""
    if len(set(times)) < len(times):
        raise ValueError("a range is there twice; list each once, such as [1, 10, 100]")
    return tuple(sorted(times))


TIMES = Listed(Number("times", 1e-3, 1e6).read, 1, MOST_RANGES, "[1, 10, 100]", alone=True, then=_in_order)
"""What the scale's readings are multiplied by on each range."""


@dataclass(frozen=True, slots=True, kw_only=True)
class SeriesOhmmeter(Circuit):
    """Full deflection at zero ohms, half of it where the unknown equals the inner resistance.

    The scale is that of the range ×1; on ×k half scale is k times ``half``.  ``zero`` says where the
    zero adjuster is, across the coil or in series with it, and ``worn`` what the battery gives at the
    end of its life.
    """

    kind: ClassVar[str] = "series ohmmeter"
    takes: ClassVar[str | None] = "Ω"
    least: ClassVar[float] = 0.0
    half: Annotated[Amount, OHM_ABOVE]
    battery: Annotated[Amount | None, VOLT_ABOVE] = None
    worn: Annotated[Amount | None, VOLT_ABOVE] = None
    times: Annotated[tuple[float, ...], TIMES] = (1.0,)
    zero: Literal["across", "series"] = "across"

    def __post_init__(self) -> None:
        check_cell(self.battery, self.worn)

    def stage(self, terminals: Terminals) -> Stage:
        """Return half/(half + signal), by Ohm's law with full deflection set at zero ohms.

        Raises:
            InputError: the battery cannot give full deflection on every range, as far as the
                movement's figures are known.
        """
        self._check_drive(terminals.coil)
        if self.battery and terminals.coil.current is not None and terminals.coil.resistance is not None:
            self._chain(self.battery, terminals.coil).check()
        return _SeriesStage(self.half.value)

    def design(self, terminals: Terminals) -> Design:
        """Return chain, range shunts and zero adjuster; no parts without a battery."""
        if not self.battery:
            return _undesigned(self.kind, self.half, terminals.coil)
        chain = self._chain(self.battery, terminals.coil)
        self._check_drive(terminals.coil)
        chain.check()
        return series_design(self.kind, chain.lifted(), self.half.value, sorted(self.times))

    def _chain(self, battery: Amount, coil: Coil) -> OhmChain:
        """Return the ohmmeter of the largest range."""
        return OhmChain(
            coil_a=coil.current_a("an ohmmeter's design"),
            coil_ohm=coil.resistance_ohm("an ohmmeter's design"),
            cell=cell_of(battery, self.worn),
            half_ohm=self.half.value * max(self.times),
            across=self.zero == "across",
        )

    def _check_drive(self, coil: Coil) -> None:
        """Refuse a half scale, on any range, through which a new cell gives less than the coil's current."""
        if not self.battery or coil.current is None:
            return
        most_ohm = self.battery.value / coil.current
        times = max(self.times)
        if self.half.value * times <= most_ohm * (1 + _ROUND):
            return
        through = (
            f"{engineered(self.battery.value, 'V')} drives full deflection through at most "
            f"{engineered(most_ohm, 'Ω')}, not "
        )
        if self.half.value > most_ohm * (1 + _ROUND) or times <= 1.0:
            raise InputError(
                f"{through}{engineered(self.half.value * times, 'Ω')}; "
                "take a smaller half or a higher battery",
                ("half",),
                ("battery",),
            )
        needed_v = self.half.value * times * coil.current
        raise InputError(
            f"{through}the {engineered(self.half.value * times, 'Ω')} of {range_name(times)}; "
            f"leave that range out or take a battery of {engineered(needed_v, 'V')} or more",
            ("times",),
            ("battery",),
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class ShuntOhmmeter(Circuit):
    """Rest at zero ohms (a shorted coil), full deflection with nothing connected."""

    kind: ClassVar[str] = "shunt ohmmeter"
    takes: ClassVar[str | None] = "Ω"
    least: ClassVar[float] = 0.0
    half: Annotated[Amount, OHM_ABOVE]
    battery: Annotated[Amount | None, VOLT_ABOVE] = None
    worn: Annotated[Amount | None, VOLT_ABOVE] = None

    def __post_init__(self) -> None:
        check_cell(self.battery, self.worn)

    def stage(self, terminals: Terminals) -> Stage:
        """Return signal/(signal + half), by current division.

        Raises:
            InputError: where the movement's figures are known, the battery cannot give this half scale.
        """
        if self.battery and terminals.coil.current is not None and terminals.coil.resistance is not None:
            self._fed(self.battery, terminals.coil).check()
        return _ShuntStage(self.half.value)

    def design(self, terminals: Terminals) -> Design:
        """Return the feed, its adjuster and what is around the coil; no parts without a battery."""
        if not self.battery:
            return _undesigned(self.kind, self.half, terminals.coil)
        made = self._fed(self.battery, terminals.coil)
        made.check()
        return shunt_design(self.kind, made)

    def _fed(self, battery: Amount, coil: Coil) -> Fed:
        coil_a = coil.current_a("an ohmmeter's design")
        coil_ohm = coil.resistance_ohm("an ohmmeter's design")
        return fed(coil_a, coil_ohm, cell_of(battery, self.worn), self.half.value)


def _undesigned(kind: str, half: Amount, coil: Coil) -> Design:
    """Return the design of an ohmmeter whose battery is not known: nothing to build yet."""
    ohms = {} if coil.resistance is None else {COIL: coil.resistance}
    return Design(kind=kind, range=half.value, unit="Ω", ohms=ohms, facts=undesigned(half.value))


@dataclass(frozen=True, slots=True)
class _SeriesStage:
    half_ohm: float

    @property
    def domain(self) -> Span:
        # Below zero ohms down to -half: a pointer beyond full scale, with the zero set too high.
        return (-self.half_ohm, math.inf)

    @property
    def image(self) -> Span:
        return (0.0, math.inf)

    def forward(self, x: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.half_ohm / (self.half_ohm + x)

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.half_ohm / y - self.half_ohm


@dataclass(frozen=True, slots=True)
class _ShuntStage:
    half_ohm: float

    @property
    def domain(self) -> Span:
        return (-self.half_ohm, math.inf)

    @property
    def image(self) -> Span:
        return (-math.inf, 1.0)

    def forward(self, x: Array) -> Array:
        with np.errstate(divide="ignore", invalid="ignore"):
            return np.where(np.isinf(x), 1.0, x / (x + self.half_ohm))

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.half_ohm * y / (1.0 - y)
