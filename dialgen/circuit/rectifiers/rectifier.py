"""A moving coil behind a rectifier, for alternating voltage, marked in RMS of a sine."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Annotated, ClassVar, Literal

import numpy as np

from dialgen.circuit.built import BUILT
from dialgen.circuit.design import COIL, Case, Design, Fact, Part
from dialgen.circuit.names import COIL_SHUNT, LEG, MULTIPLIER
from dialgen.circuit.rectifiers.connections import CONNECTIONS, coil_with_shunt
from dialgen.circuit.rectifiers.diodes import DIODE, SILICON, Diode
from dialgen.circuit.rectifiers.stage import RectifierStage
from dialgen.circuit.rectifiers.work import RectifierWork
from dialgen.circuit.slips import Fitted, is_near, refuse_slips, slip_remarks
from dialgen.circuit.terminals import RESISTANCE_KEY, Circuit, Terminals
from dialgen.errors import InputError, Remark
from dialgen.quantity import OHM_ABOVE, VOLT_ABOVE, Amount, engineered
from dialgen.roots import bracketed_roots
from dialgen.stage import Array, Stage

_LEGS = (f"{LEG} 1", f"{LEG} 2")
_PURPOSE = "a rectifier instrument"
_ROUNDING = 1e-12
_BEYOND = 10.0
"""How far beyond the range a scale may be asked for, in ranges."""
_FIRST_MOVE = 0.01
_HIGHER = np.geomspace(1.0, 1e9, 31)
_LEAST_DIGITS = 4
_SLIP = "and at range"


@dataclass(frozen=True, slots=True, kw_only=True)
class Rectifier(Circuit):
    """A multiplier, designed or as built, and diodes in one of three connections before the coil."""

    kind: ClassVar[str] = "rectifier"
    takes: ClassVar[str | None] = "V"
    least: ClassVar[float] = 0.0
    range: Annotated[Amount | None, VOLT_ABOVE] = None
    rectifier: Literal["bridge", "half bridge", "half wave"] = "bridge"
    diode: Annotated[Diode, DIODE] = SILICON
    legs: Annotated[Amount | None, OHM_ABOVE] = None
    coil_shunt: Annotated[Amount | None, OHM_ABOVE] = None
    built: Annotated[Amount | None, BUILT] = None

    def __post_init__(self) -> None:
        half_bridge = self.rectifier == "half bridge"
        if half_bridge and not self.legs:
            raise InputError(
                'a half bridge has two equal resistors in place of two diodes; add legs = "2 kohm"', ("legs",)
            )
        if self.legs and not half_bridge:
            raise InputError(
                f'a {self.rectifier} has no legs; leave them out, or write rectifier = "half bridge"',
                ("legs",),
                ("rectifier",),
            )

    def stage(self, terminals: Terminals) -> Stage:
        """Return the mean coil current over Im, for sines up to ten times the range.

        Raises:
            InputError: even without a multiplier the coil does not get its current at the range, or what
                was built does not make the range.
        """
        self._check(terminals)
        return self._stage(terminals, self.built.value if self.built else self._designed_ohm(terminals))

    def design(self, terminals: Terminals) -> Design:
        """Return multiplier, coil shunt and legs, all of which the diodes make differ from a DC meter's."""
        self._check(terminals)
        ohms = self._ohms(terminals)
        range_v, coil_a = self._range_v(terminals), terminals.coil.current_a(_PURPOSE)
        worker = RectifierWork(CONNECTIONS[self.rectifier], self.diode.junction, coil_a)
        given = tuple(name for name in (COIL_SHUNT, *_LEGS) if name in ohms)
        first_v = self._stage(terminals, ohms[MULTIPLIER]).inverse(np.array([_FIRST_MOVE]))
        return Design(
            kind=self.kind,
            range=range_v,
            unit="V",
            ohms=ohms,
            parts=(
                Part(name=MULTIPLIER, ohms=ohms[MULTIPLIER], built=self.built.value if self.built else None),
                *(Part(name=name, ohms=ohms[name], given=True) for name in given),
            ),
            cases=(Case(name=engineered(range_v, "V"), signal=range_v, work=worker.work),),
            facts=(
                *worker.facts(ohms, range_v),
                Fact(
                    name="first movement",
                    value=float(first_v[0]),
                    unit="V",
                    note="RMS, moves the pointer by 1 % of full deflection",
                ),
                *self._diode_facts(),
            ),
            form=self.rectifier,
            alternating=True,
        )

    def remarks(self, terminals: Terminals) -> tuple[Remark, ...]:
        """Return that a typical diode was assumed, where a threshold diode is dead, and a slip in built."""
        texts = []
        if self.diode.typical:
            texts.append(
                f"typical {self.diode.typical} diodes are assumed, from memory: {self.diode.described}; "
                "measure yours and give them under diode"
            )
        if self.diode.junction.threshold_v:
            behind = " behind the multiplier" if self.legs else ""
            texts.append(
                f"below {engineered(self._dead_v, 'V', 3)} RMS{behind} these diodes pass nothing and the "
                "pointer rests; diodes by saturation and ideality bend the foot of the scale as real ones do"
            )
        return (
            *(Remark(text, ("diode",)) for text in texts),
            *slip_remarks(self._fitted(terminals), _SLIP),
        )

    def _check(self, terminals: Terminals) -> None:
        """Refuse a range that no multiplier gives, and one that the multiplier as built does not."""
        range_v = self._range_v(terminals)
        most = float(self._drive(terminals, np.array(0.0), np.array(range_v)))
        if most < 1.0 - _ROUNDING:
            self._refuse(terminals, range_v, most)
        refuse_slips(self._fitted(terminals), _SLIP)

    def _fitted(self, terminals: Terminals) -> tuple[Fitted, ...]:
        """Return the multiplier as built; nothing where there is nothing to say of it."""
        if not self.built:
            return ()
        range_v, built_ohm = self._range_v(terminals), self.built.value
        drive = float(self._drive(terminals, np.array(built_ohm), np.array(range_v)))
        if is_near(drive):
            return ()
        designed_ohm = self._designed_ohm(terminals)
        return (
            Fitted(
                name=MULTIPLIER,
                key=("built",),
                designed_ohm=designed_ohm,
                built_ohm=built_ohm,
                drives=(drive,),
            ),
        )

    def _drive(self, terminals: Terminals, multiplier_ohm: Array, signal_v: Array) -> Array:
        """Return the drive with a multiplier at a signal, both of one shape."""
        coil_ohm, wanted_a = self._wanted(terminals)
        connection = CONNECTIONS[self.rectifier]
        ohms, factor = connection.seen(multiplier_ohm, coil_ohm, self._leg_ohm)
        peak_v = math.sqrt(2) * factor * signal_v
        return self.diode.junction.averages(peak_v, ohms, connection.junctions).mean_a / wanted_a

    @property
    def _dead_v(self) -> float:
        """The RMS volts behind the multiplier up to which threshold diodes pass nothing.

        In series with them it drops nothing until they do; before legs it does.
        """
        connection = CONNECTIONS[self.rectifier]
        factor = float(connection.seen(np.array(0.0), 0.0, self._leg_ohm or 1.0)[1])
        return connection.junctions * self.diode.junction.threshold_v / factor / math.sqrt(2)

    def _stage(self, terminals: Terminals, multiplier_ohm: float) -> RectifierStage:
        coil_ohm, wanted_a = self._wanted(terminals)
        connection = CONNECTIONS[self.rectifier]
        ohms, factor = connection.seen(np.array(multiplier_ohm), coil_ohm, self._leg_ohm)
        most_v = _BEYOND * max(self._range_v(terminals), abs(terminals.signal(terminals.full_value)))
        into = math.sqrt(2) * float(factor)
        curve = self.diode.junction.curve(float(ohms), connection.junctions, into * most_v)
        return RectifierStage(curve, into, 1.0 / wanted_a, most_v)

    def _designed_ohm(self, terminals: Terminals) -> float:
        """Return the multiplier with which the mean coil current at the range is the movement's."""
        range_v = self._range_v(terminals)
        if float(self._drive(terminals, np.array(0.0), np.array(range_v))) <= 1.0:
            return 0.0
        # Diodes that drop nothing, and nothing else in the way, would need this much.
        whole_ohm = 2 / math.pi * math.sqrt(2) * range_v / self._wanted(terminals)[1]
        found = bracketed_roots(
            lambda ohms: 1.0 / self._drive(terminals, ohms, np.full_like(ohms, range_v)),
            np.array([0.0, whole_ohm]),
            np.array([1.0]),
        )
        return float(found[0])

    def _refuse(self, terminals: Terminals, range_v: float, most: float) -> None:
        least_v = bracketed_roots(
            lambda v: self._drive(terminals, np.zeros_like(v), v), range_v * _HIGHER, np.array([1.0])
        )[0]
        # Rounded up, so that the range of the message works.
        least = engineered(least_v * (1 + 0.5 * 10.0 ** (1 - _LEAST_DIGITS)), "V", _LEAST_DIGITS)
        raise InputError(
            f"a range of {engineered(range_v, 'V')} drives the coil to {most:.3g} of full deflection even "
            f"without a multiplier, diodes and coil take so much; take a range of {least} "
            "or more, diodes with less drop, or a more sensitive movement",
            ("range",),
            ("diode",),
            RESISTANCE_KEY,
        )

    def _range_v(self, terminals: Terminals) -> float:
        return terminals.range(self.range, "V", built=bool(self.built))

    def _wanted(self, terminals: Terminals) -> tuple[float, float]:
        """Return the ohms of coil and shunt, and the mean of a pulse that is full deflection."""
        coil_a, coil_ohm = terminals.coil.current_a(_PURPOSE), terminals.coil.resistance_ohm(_PURPOSE)
        shunted_ohm, share = coil_with_shunt(coil_ohm, self.coil_shunt.value if self.coil_shunt else None)
        return shunted_ohm, coil_a / share * 2 / CONNECTIONS[self.rectifier].pulses

    @property
    def _leg_ohm(self) -> float:
        return self.legs.value if self.legs else 0.0

    def _ohms(self, terminals: Terminals) -> Mapping[str, float]:
        ohms = {MULTIPLIER: self._designed_ohm(terminals), COIL: terminals.coil.resistance_ohm(_PURPOSE)}
        if self.coil_shunt:
            ohms[COIL_SHUNT] = self.coil_shunt.value
        if self.legs:
            ohms |= dict.fromkeys(_LEGS, self.legs.value)
        return ohms

    def _diode_facts(self) -> tuple[Fact, ...]:
        typical = self.diode.typical
        note = f"assumed: typical {typical}, from memory" if typical else "as given"
        return tuple(
            Fact(name=name, value=value, unit=unit, note=note)
            for name, value, unit in self.diode.junction.figures
        )
