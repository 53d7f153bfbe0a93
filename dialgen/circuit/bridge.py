"""Wheatstone's bridge off balance: a coil between two dividers, one of them with the sensor in it."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import Annotated, ClassVar

import numpy as np

from dialgen.circuit.design import COIL, Case, Design, Fact, Load, Ohms, Part, Working
from dialgen.circuit.names import ARM, BALANCE, SUPPLY
from dialgen.circuit.network import Branch, Solution, solve
from dialgen.circuit.terminals import Circuit, Terminals
from dialgen.errors import InputError
from dialgen.quantity import OHM_ABOVE, VOLT, Amount, Listed, engineered
from dialgen.stage import POSITIVE, Array, Span, Stage

ARM_NAMES = (f"{ARM} R1", f"{ARM} R2", f"{ARM} R3")
ARMS = Listed(OHM_ABOVE.read, 3, 3, '["100 ohm", "1 kohm", "1 kohm"], R1 above the sensor, R2 above R3')


@dataclass(frozen=True, slots=True, kw_only=True)
class Bridge(Circuit):
    """A sensor X below R1, beside R3 below R2, the coil from the one middle to the other.

    Balance, and rest, is at X = R1·R3/R2; more ohms drive forwards.  A supply below zero is one whose
    poles are changed over, so that fewer ohms drive forwards.
    """

    kind: ClassVar[str] = "bridge"
    takes: ClassVar[str | None] = "Ω"
    least: ClassVar[float] = 0.0
    supply: Annotated[Amount, VOLT]
    arms: Annotated[tuple[Amount, Amount, Amount], ARMS]

    def __post_init__(self) -> None:
        if not self.supply.value:
            raise InputError(
                'a bridge on 0 V does not move whatever the sensor does; write supply = "1.5 V"', ("supply",)
            )

    def stage(self, terminals: Terminals) -> Stage:
        """Return the coil's current over Im, by Thévenin's theorem for what the coil sees.

        Open, the middles differ by E·(X/(R1 + X) - R3/(R2 + R3)); the coil sees R1∥X + R2∥R3.  Over
        (R1 + X) both are linear in X, so with P = R2∥R3 + Rm the drive is

            E/Im · (R2·X - R1·R3)/(R2 + R3) / ((R1 + P)·X + P·R1)

        Raises:
            InputError: the drive is the same for every X.
        """
        coil_a, coil_ohm = self._coil(terminals)
        r1, r2, r3 = (arm.value for arm in self.arms)
        # Both the slope's sign and whether there is one: with R1 = 0 or R2 = R3 = 0 X sees a source.
        if not r1 * (r2 + r3) > 0:
            raise InputError(
                "the sensor does not change what the coil gets; every arm must be above 0 Ω", ("arms",)
            )
        behind_ohm = r2 * r3 / (r2 + r3) + coil_ohm
        per_a = self.supply.value / coil_a / (r2 + r3)
        return _Mobius(per_a * r2, -per_a * r1 * r3, r1 + behind_ohm, behind_ohm * r1)

    def design(self, terminals: Terminals) -> Design:
        """Return the arms, worked at the scale's end; the sensor is no part of them."""
        coil_a, coil_ohm = self._coil(terminals)
        self.stage(terminals)
        ohms = {**{name: arm.value for name, arm in zip(ARM_NAMES, self.arms, strict=True)}, COIL: coil_ohm}
        end_ohm = terminals.signal(terminals.full_value)
        case = Case(name=engineered(end_ohm, "Ω"), signal=end_ohm, work=_worker(coil_a, self.supply.value))
        return Design(
            kind=self.kind,
            range=end_ohm,
            unit="Ω",
            ohms=ohms,
            parts=tuple(Part(name=name, ohms=ohms[name], given=True) for name in ARM_NAMES),
            cases=(case,),
            facts=self._facts(case, ohms, terminals.rest_signal),
        )

    def _coil(self, terminals: Terminals) -> tuple[float, float]:
        return terminals.coil.current_a("a bridge"), terminals.coil.resistance_ohm("a bridge")

    @property
    def _balance_ohm(self) -> float:
        r1, r2, r3 = (arm.value for arm in self.arms)
        return r1 * r3 / r2

    def _facts(self, case: Case, ohms: Ohms, rest_ohm: float) -> tuple[Fact, ...]:
        supply_v, end_ohm = self.supply.value, case.signal
        places = [x for x in (rest_ohm, self._balance_ohm, end_ohm) if 0 <= x < math.inf]
        sensors = [_sensor(x, ohms, supply_v) for x in places]
        most = max(sensors, key=lambda load: abs(load.current_a))
        hottest = max(sensors, key=lambda load: load.watts)
        return (
            Fact(name=SUPPLY, value=supply_v, unit="V", note="off balance the deflection follows it"),
            Fact(name=BALANCE, value=self._balance_ohm, unit="Ω", note="R1·R3/R2, pointer at rest"),
            *_full_facts(case, ohms, supply_v),
            Fact(
                name="sensor current",
                value=abs(most.current_a),
                unit="A",
                note=f"at most, at {engineered(most.ohms, 'Ω')}; 1 mA or less through a Pt100 is usual "
                "(common practice)",
            ),
            Fact(
                name="sensor self-heating",
                value=hottest.watts,
                unit="W",
                note=f"at most, at {engineered(hottest.ohms, 'Ω')}",
            ),
            *_lead_facts(case, ohms),
        )


def _sensor(sensor_ohm: float, ohms: Ohms, supply_v: float) -> Load:
    """Return what the sensor carries, from the network."""
    return _solved(ohms, sensor_ohm, supply_v).loads["sensor"]


def _full_facts(case: Case, ohms: Ohms, supply_v: float) -> tuple[Fact, ...]:
    """Return the drive at the scale's end, and the supply that would make it full deflection."""
    drive = case.work(ohms, case.signal).drive
    share = Fact(name="drive at the scale's end", value=100.0 * drive, unit="%", note="of full deflection")
    if not drive > 0:
        return (share,)
    note = "for full deflection just at the scale's end"
    return (share, Fact(name="supply for full scale", value=supply_v / drive, unit="V", note=note))


def _lead_facts(case: Case, ohms: Ohms) -> tuple[Fact, ...]:
    """Return what an ohm of leads does at the scale's end."""
    if not math.isfinite(case.signal):
        return ()
    added = case.work(ohms, case.signal + 1.0).drive - case.work(ohms, case.signal).drive
    note = (
        "of full deflection; two-wire leads count as sensor: allow for them, or take three (common practice)"
    )
    return (Fact(name="1 Ω of leads, at the scale's end", value=100.0 * added, unit="%", note=note),)


def _solved(ohms: Ohms, sensor_ohm: float, supply_v: float) -> Solution:
    return solve(
        (
            Branch(SUPPLY, "minus", "plus", 0.0, emf_v=supply_v),
            Branch(ARM_NAMES[0], "plus", "sensed", ohms[ARM_NAMES[0]]),
            Branch(ARM_NAMES[1], "plus", "fixed", ohms[ARM_NAMES[1]]),
            Branch(ARM_NAMES[2], "fixed", "minus", ohms[ARM_NAMES[2]]),
            Branch("sensor", "sensed", "minus", sensor_ohm),
            Branch(COIL, "sensed", "fixed", ohms[COIL]),
        )
    )


def _worker(coil_a: float, supply_v: float) -> Callable[[Ohms, float], Working]:
    def work(ohms: Ohms, signal_ohm: float) -> Working:
        solved = _solved(ohms, signal_ohm, supply_v)
        loads = {name: solved.loads[name] for name in ohms}
        return Working(loads[COIL].current_a / coil_a, loads, solved.drop_v("sensed", "minus"))

    return work


@dataclass(frozen=True, slots=True)
class _Mobius:
    """y = (a·x + b)/(c·x + d) for x from 0 to infinity, with c and d above zero."""

    a: float
    b: float
    c: float
    d: float

    @property
    def domain(self) -> Span:
        return POSITIVE

    @property
    def image(self) -> Span:
        ends = (self.b / self.d, self.a / self.c)
        return (min(ends), max(ends))

    def forward(self, x: Array) -> Array:
        with np.errstate(invalid="ignore"):
            return np.where(np.isinf(x), self.a / self.c, (self.a * x + self.b) / (self.c * x + self.d))

    def inverse(self, y: Array) -> Array:
        # Over c, so that the end of the image is infinity and not what rounding leaves of it.
        with np.errstate(divide="ignore"):
            return (self.d * y - self.b) / self.c / (self.a / self.c - y)
