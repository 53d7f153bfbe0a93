"""A resistor across the coil, so that a small movement shows a large current."""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.circuit.built import BUILT_ABOVE
from dialgen.circuit.design import COIL, Case, Design, Fact, Ohms, Part, Working
from dialgen.circuit.names import LEADS, RATED_CURRENT, SHUNT, SWAMP
from dialgen.circuit.network import Branch, Feed, solve
from dialgen.circuit.slips import Fitted, refuse_slips, slip_remarks
from dialgen.circuit.terminals import CURRENT_KEY, Circuit, Terminals
from dialgen.errors import InputError, Remark
from dialgen.quantity import (
    AMPERE,
    OHM,
    Amount,
    Measure,
    Written,
    engineered,
    in_figures,
    shown,
)
from dialgen.stage import Affine, Stage

_EQUAL = 1e-12
_NEAR_MATCH = 0.005
_STAMP = "100 A/75 mV"
_STAMPED = (
    Measure("current", ("A",), _STAMP, above=0.0),
    Measure("voltage", ("V",), _STAMP, above=0.0),
)
_CONTINUOUS = 2 / 3
_SLIP = "and at range"


@dataclass(frozen=True, slots=True, kw_only=True)
class Rating:
    """What is stamped on a bought shunt: this current through it drops this voltage."""

    current_a: float
    drop_v: float

    @property
    def resistance_ohm(self) -> float:
        """Drop over current."""
        return self.drop_v / self.current_a

    @property
    def stamp(self) -> str:
        """How it is stamped."""
        return f"{engineered(self.current_a, 'A')}/{engineered(self.drop_v, 'V')}"


def read_rating(text: object) -> Rating:
    """Return the rating written as current/voltage.

    Raises:
        ValueError: it is not written so.

    >>> read_rating("100 A/75 mV").resistance_ohm
    0.00075
    """
    if not isinstance(text, str) or len(parts := re.split(r"\s*/\s*", text)) != 2:
        raise ValueError(f'{shown(text)} is not a shunt\'s rating; write for example "{_STAMP}"')
    current, drop = (measure.read(part) for measure, part in zip(_STAMPED, parts, strict=True))
    return Rating(current_a=current.value, drop_v=drop.value)


RATED = Written(read_rating, f'"{_STAMP}"')


@dataclass(frozen=True, slots=True, kw_only=True)
class Shunt(Circuit):
    """A shunt across coil, swamping resistor and leads: designed, as built, or bought by its rating."""

    kind: ClassVar[str] = "shunt"
    takes: ClassVar[str | None] = "A"
    range: Annotated[Amount | None, AMPERE] = None
    built: Annotated[Amount | None, BUILT_ABOVE] = None
    swamp: Annotated[Amount | None, OHM] = None
    leads: Annotated[Amount | None, OHM] = None
    rated: Annotated[Rating | None, RATED] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return signal·Rs/(Rs + Rm')/Im (current division; Kirchhoff), Rm' the whole coil branch.

        Raises:
            InputError: the range is below the movement's own current, a bought shunt drops less than the
                coil branch needs, or what was built is no shunt for the range.
        """
        coil_a, ohms = self._checked(terminals)
        shunt_ohm = self.built.value if self.built else ohms[SHUNT]
        if math.isinf(shunt_ohm):
            return Affine(1.0 / coil_a)
        return Affine(shunt_ohm / (shunt_ohm + _branch_ohm(ohms)) / coil_a)

    def design(self, terminals: Terminals) -> Design:
        """Return shunt and swamping resistor; the shunt is infinite where the movement needs none."""
        coil_a, ohms = self._checked(terminals)
        range_a = self._range_a(terminals)
        built = self.built.value if self.built else None
        shunt = Part(name=SHUNT, ohms=ohms[SHUNT], built=built, given=self.rated is not None)
        swamp = Part(name=SWAMP, ohms=ohms[SWAMP], given=self.swamp is not None)
        return Design(
            kind=self.kind,
            range=range_a,
            unit="A",
            ohms=ohms,
            parts=tuple(part for part in (shunt, swamp) if 0 < part.ohms < math.inf),
            cases=(Case(name=engineered(range_a, "A"), signal=range_a, work=_worker(coil_a)),),
            facts=(*_rating_fact(self.rated), *_leads_fact(ohms)),
            stamp=self.rated.stamp if self.rated else "",
        )

    def remarks(self, terminals: Terminals) -> tuple[Remark, ...]:
        """Return that a bought shunt carries more than its rating, or that what was built is far off."""
        coil_a, ohms = self._checked(terminals)
        return (
            *self._overload(ohms, self._range_a(terminals) - coil_a),
            *slip_remarks(self._fitted(terminals, coil_a, ohms), _SLIP),
        )

    def _range_a(self, terminals: Terminals) -> float:
        return terminals.range(self.range, "A", built=bool(self.built))

    def _checked(self, terminals: Terminals) -> tuple[float, Ohms]:
        """Return the coil's current, and the ohms of every part as designed; refuse what is no design."""
        coil_a, ohms = terminals.coil.current_a("a shunt"), self._designed(terminals)
        refuse_slips(self._fitted(terminals, coil_a, ohms), _SLIP)
        return coil_a, ohms

    def _fitted(self, terminals: Terminals, coil_a: float, ohms: Ohms) -> tuple[Fitted, ...]:
        if not self.built:
            return ()
        built_ohm = self.built.value
        drive = built_ohm / (built_ohm + _branch_ohm(ohms)) * self._range_a(terminals) / coil_a
        return (
            Fitted(
                name=SHUNT, key=("built",), designed_ohm=ohms[SHUNT], built_ohm=built_ohm, drives=(drive,)
            ),
        )

    def _overload(self, ohms: Ohms, shunt_a: float) -> tuple[Remark, ...]:
        if not self.rated or shunt_a <= self.rated.current_a * (1 + _NEAR_MATCH):
            return ()
        over, shunt_ohm = shunt_a / self.rated.current_a, self.built.value if self.built else ohms[SHUNT]
        text = (
            f"at full deflection this shunt carries {engineered(shunt_a, 'A', 3)} of the "
            f"{engineered(self.rated.current_a, 'A')} it is made for, and has {in_figures(over**2)} times "
            f"its heat to get rid of, {engineered(shunt_a**2 * shunt_ohm, 'W', 3)}; take one for "
            f"{engineered(shunt_a, 'A', 2)} or more"
        )
        return (Remark(text, ("rated",)),)

    def _designed(self, terminals: Terminals) -> Mapping[str, float]:
        """Return the ohms of every part as designed: a bought shunt's by its rating."""
        coil_a = terminals.coil.current_a("a shunt")
        range_a = self._range_a(terminals)
        if range_a < coil_a * (1 - _EQUAL):
            raise InputError(
                f"a range of {engineered(range_a, 'A')} is below the movement's own "
                f"{engineered(coil_a, 'A')}; a shunt only widens the range: take a larger range or a more "
                "sensitive movement",
                ("range",),
                CURRENT_KEY,
            )
        none_needed = range_a <= coil_a * (1 + _EQUAL) and not self.rated
        if none_needed and terminals.coil.resistance is None and not self.built:
            # The whole current goes through the coil, whatever its resistance.
            return {SHUNT: math.inf, SWAMP: 0.0, LEADS: 0.0, COIL: 0.0}
        coil_ohm = terminals.coil.resistance_ohm("a shunt")
        leads_ohm = self.leads.value if self.leads else 0.0
        swamp_ohm = self.swamp.value if self.swamp else 0.0
        branch_ohm = coil_ohm + leads_ohm + swamp_ohm
        if none_needed:
            shunt_ohm = math.inf
        elif self.rated:
            shunt_ohm = self.rated.resistance_ohm
            if not self.swamp:
                swamp_ohm = self._designed_swamp(self.rated, coil_a, range_a, branch_ohm)
        else:
            shunt_ohm = coil_a * branch_ohm / (range_a - coil_a)
        return {SHUNT: shunt_ohm, SWAMP: swamp_ohm, LEADS: leads_ohm, COIL: coil_ohm}

    def _designed_swamp(self, rated: Rating, coil_a: float, range_a: float, known_ohm: float) -> float:
        swamp_ohm = rated.resistance_ohm * (range_a - coil_a) / coil_a - known_ohm
        if -_NEAR_MATCH * known_ohm <= swamp_ohm < 0:
            # A shunt made for this very movement: nothing is fitted, and the marks say by how
            # little (the movement's own share of the current) it then reads low.
            return 0.0
        if swamp_ohm < 0:
            raise InputError(
                f"at {engineered(range_a, 'A')} this shunt drops "
                f"{engineered(rated.resistance_ohm * range_a, 'V', 6)}, less than the "
                f"{engineered(coil_a * known_ohm, 'V', 6)} that coil and leads need; "
                "take a shunt with more drop",
                ("rated",),
                ("range",),
            )
        return swamp_ohm


def _branch_ohm(ohms: Ohms) -> float:
    """Return the resistance of coil, leads and swamping resistor in series."""
    return ohms[COIL] + ohms[SWAMP] + ohms[LEADS]


def _rating_fact(rated: Rating | None) -> tuple[Fact, ...]:
    if rated is None:
        return ()
    continuous = engineered(_CONTINUOUS * rated.current_a, "A", 3)
    drop = engineered(rated.drop_v, "V")
    note = f"drops {drop}; continuously at most two thirds of it, {continuous} (common practice)"
    return (Fact(name=RATED_CURRENT, value=rated.current_a, unit="A", note=note),)


def _leads_fact(ohms: Ohms) -> tuple[Fact, ...]:
    if not ohms[LEADS]:
        return ()
    return (Fact(name="sense leads", value=ohms[LEADS], unit="Ω", note="copper, counted in the design"),)


def _worker(coil_a: float) -> Callable[[Ohms, float], Working]:
    def work(ohms: Ohms, signal_a: float) -> Working:
        solved = solve(
            (
                Branch(SHUNT, "in", "out", ohms[SHUNT]),
                Branch(SWAMP, "in", "swamped", ohms[SWAMP]),
                Branch(LEADS, "swamped", "led", ohms[LEADS]),
                Branch(COIL, "led", "out", ohms[COIL]),
            ),
            Feed("in", "out", signal_a),
        )
        return Working(solved.loads[COIL].current_a / coil_a, solved.loads, solved.drop_v("in", "out"))

    return work
