"""A resistor across the coil, so that a small movement shows a large current."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.circuit.terminals import CURRENT_KEY, Terminals
from dialgen.errors import InputError
from dialgen.quantity import AMPERE, OHM, OHM_ABOVE, VOLT_ABOVE, Amount, shown
from dialgen.stage import Affine, Stage

RATED = 'a bought shunt, "100 A/75 mV"'
_EQUAL = 1e-12
_NEAR_MATCH = 0.005


@dataclass(frozen=True, slots=True, kw_only=True)
class Rating:
    """What is stamped on a bought shunt: this current through it drops this voltage."""

    current_a: float
    drop_v: float

    @property
    def resistance_ohm(self) -> float:
        """Drop over current."""
        return self.drop_v / self.current_a


def read_rating(text: object) -> Rating:
    """Return the rating written as current/voltage.

    Raises:
        ValueError: it is not written so.

    >>> read_rating("100 A/75 mV").resistance_ohm
    0.00075
    """
    if not isinstance(text, str) or len(parts := re.split(r"\s*/\s*", text)) != 2:
        raise ValueError(f'{shown(text)} is not a shunt\'s rating; write for example "100 A/75 mV"')
    current, drop = AMPERE.read(parts[0]), VOLT_ABOVE.read(parts[1])
    return Rating(current_a=current.value, drop_v=drop.value)


@dataclass(frozen=True, slots=True, kw_only=True)
class Shunt:
    """A shunt across coil, swamping resistor and leads: designed, as built, or bought by its rating."""

    kind: ClassVar[str] = "shunt"
    takes: ClassVar[str | None] = "A"
    range: Annotated[Amount | None, AMPERE] = None
    built: Annotated[Amount | None, OHM_ABOVE] = None
    swamp: Annotated[Amount | None, OHM] = None
    leads: Annotated[Amount | None, OHM] = None
    rated: Annotated[Rating | None, RATED] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return signal·Rs/(Rs + Rm')/Im (current division; Kirchhoff), Rm' the whole coil branch.

        Raises:
            InputError: the range is below the movement's own current, or a bought shunt drops less
                than the coil branch needs.
        """
        coil_a = terminals.coil.current_a("a shunt")
        if self.built and not self.rated:
            shunt_ohm, branch_ohm = self.built.value, self._branch_ohm(terminals)
            return Affine(shunt_ohm / (shunt_ohm + branch_ohm) / coil_a)
        range_a = terminals.range(self.range.value if self.range else None)
        if range_a < coil_a * (1 - _EQUAL):
            raise InputError(
                f"a range of {range_a:g} A is below the movement's own {coil_a:g} A; "
                "a shunt only widens the range: take a larger range or a more sensitive movement",
                ("range",),
                CURRENT_KEY,
            )
        if self.rated:
            return self._rated_stage(self.rated, terminals, coil_a, range_a)
        if range_a <= coil_a * (1 + _EQUAL):
            return Affine(1.0 / coil_a)
        branch_ohm = self._branch_ohm(terminals)
        shunt_ohm = coil_a * branch_ohm / (range_a - coil_a)
        return Affine(shunt_ohm / (shunt_ohm + branch_ohm) / coil_a)

    def _branch_ohm(self, terminals: Terminals) -> float:
        """Return the resistance of coil, leads and swamping resistor in series."""
        parts = sum(part.value for part in (self.swamp, self.leads) if part)
        return terminals.coil.resistance_ohm("a shunt") + parts

    def _rated_stage(self, rated: Rating, terminals: Terminals, coil_a: float, range_a: float) -> Stage:
        known_ohm = self._branch_ohm(terminals)
        swamp_ohm = 0.0 if self.swamp else self._designed_swamp(rated, coil_a, range_a, known_ohm)
        shunt_ohm = self.built.value if self.built else rated.resistance_ohm
        return Affine(shunt_ohm / (shunt_ohm + known_ohm + swamp_ohm) / coil_a)

    def _designed_swamp(self, rated: Rating, coil_a: float, range_a: float, known_ohm: float) -> float:
        swamp_ohm = rated.resistance_ohm * (range_a - coil_a) / coil_a - known_ohm
        if -_NEAR_MATCH * known_ohm <= swamp_ohm < 0:
            # A shunt made for this very movement: nothing is fitted, and the marks say by how
            # little (the movement's own share of the current) it then reads low.
            return 0.0
        if swamp_ohm < 0:
            raise InputError(
                f"at {range_a:g} A this shunt drops {rated.resistance_ohm * range_a:.6g} V, less than the "
                f"{coil_a * known_ohm:.6g} V that coil and leads need; take a shunt with more drop",
                ("rated",),
                ("range",),
            )
        return swamp_ohm
