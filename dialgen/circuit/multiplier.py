"""A resistor in series with the coil, so that a small movement shows a large voltage.

Of several ranges each has a resistor of its own, or all share a chain that is tapped.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass
from itertools import pairwise
from typing import Annotated, ClassVar

from dialgen.circuit.built import BUILT_EACH
from dialgen.circuit.design import COIL, Case, Design, Fact, Ohms, Part, Working
from dialgen.circuit.names import LINE, MULTIPLIER, SECTION, SUPPRESS, SWAMP
from dialgen.circuit.network import Branch, solve
from dialgen.circuit.ranges import VOLT_RANGES, check_ranges, chosen
from dialgen.circuit.terminals import RESISTANCE_KEY, Circuit, Terminals
from dialgen.errors import InputError
from dialgen.quantity import OHM, VOLT, VOLT_ABOVE, Amount, engineered
from dialgen.stage import Affine, Stage

_ROUNDING = 1e-12


@dataclass(frozen=True, slots=True, kw_only=True)
class Multiplier(Circuit):
    """A multiplier, designed or as built, with swamping, line and a suppressed zero.

    With ``ranges`` there is one for each, or with ``chain`` one string of sections from the coil
    outwards; ``range`` is the one that the scale shows, ``built`` lists the resistors in ascending order
    of range.
    """

    kind: ClassVar[str] = "multiplier"
    takes: ClassVar[str | None] = "V"
    range: Annotated[Amount | None, VOLT_ABOVE] = None
    ranges: Annotated[tuple[Amount, ...], VOLT_RANGES] = ()
    chain: bool = False
    built: Annotated[tuple[Amount, ...], BUILT_EACH] = ()
    swamp: Annotated[Amount | None, OHM] = None
    line: Annotated[Amount | None, OHM] = None
    suppress: Annotated[Amount | None, VOLT] = None

    def __post_init__(self) -> None:
        check_ranges(self.ranges)
        if self.chain and not self.ranges:
            raise InputError('a chain has several ranges; give ranges = ["10 V", "50 V"]', ("chain",))
        if self.built and len(self.built) != max(len(self.ranges), 1):
            raise InputError(
                f"{len(self.built)} resistors as built, for {max(len(self.ranges), 1)} ranges; "
                "give one for each range, the smallest range first",
                ("built",),
                ("ranges",),
            )

    def stage(self, terminals: Terminals) -> Stage:
        """Return (signal - suppress)/(whole resistance)/Im, by Ohm's law.

        Raises:
            InputError: the movement alone needs more voltage than the range has.
        """
        coil_a = terminals.coil.current_a("a multiplier")
        known_ohm = sum(self._known(terminals).values())
        if self.built:
            at = self._at(terminals) if self.ranges else 0
            ohms = [each.value for each in self.built]
            whole_ohm = known_ohm + (sum(ohms[: at + 1]) if self.chain else ohms[at])
        else:
            whole_ohm = known_ohm + self._designed_ohm(terminals, self._range_v(terminals))
        return Affine(1.0 / (whole_ohm * coil_a), -self._suppress_v / (whole_ohm * coil_a))

    def design(self, terminals: Terminals) -> Design:
        """Return one resistor for each range, or the sections of the chain."""
        coil_a = terminals.coil.current_a("a multiplier")
        ranges_v = sorted(each.value for each in self.ranges) or [self._range_v(terminals)]
        wanted_ohm = [self._designed_ohm(terminals, range_v) for range_v in ranges_v]
        values_ohm = _sections(wanted_ohm) if self.chain else wanted_ohm
        names = self._names(ranges_v)
        built: list[float | None] = [each.value for each in self.built] or [None] * len(names)
        known = self._known(terminals)
        work = [
            _worker(coil_a, self._suppress_v, names[: i + 1] if self.chain else names[i : i + 1])
            for i, _ in enumerate(names)
        ]
        cases = [
            Case(name=engineered(v, "V"), signal=v, work=each) for v, each in zip(ranges_v, work, strict=True)
        ]
        at = self._at(terminals) if self.ranges else 0
        swamp = Part(name=SWAMP, ohms=known[SWAMP], given=True)
        return Design(
            kind=self.kind,
            range=ranges_v[at],
            unit="V",
            ohms={**dict(zip(names, values_ohm, strict=True)), **known},
            parts=(
                *(
                    Part(name=name, ohms=ohms, built=made)
                    for name, ohms, made in zip(names, values_ohm, built, strict=True)
                ),
                *([swamp] if swamp.ohms else []),
            ),
            cases=(cases[at], *cases[:at], *cases[at + 1 :]),
            facts=self._facts(known),
        )

    @property
    def _suppress_v(self) -> float:
        return self.suppress.value if self.suppress else 0.0

    def _range_v(self, terminals: Terminals) -> float:
        return terminals.range(self.range.value if self.range else None)

    def _at(self, terminals: Terminals) -> int:
        """Return which of the ranges, in ascending order, the scale shows."""
        return chosen(self.ranges, self._range_v(terminals), "V")

    def _names(self, ranges_v: Sequence[float]) -> list[str]:
        if self.chain:
            return [f"{SECTION} {i}" for i, _ in enumerate(ranges_v, 1)]
        return [f"{MULTIPLIER} {engineered(v, 'V')}" for v in ranges_v] if self.ranges else [MULTIPLIER]

    def _known(self, terminals: Terminals) -> Mapping[str, float]:
        """Return the ohms of what is in series with the multiplier."""
        return {
            SWAMP: self.swamp.value if self.swamp else 0.0,
            LINE: self.line.value if self.line else 0.0,
            COIL: terminals.coil.resistance_ohm("a multiplier"),
        }

    def _designed_ohm(self, terminals: Terminals, range_v: float) -> float:
        coil_a = terminals.coil.current_a("a multiplier")
        known_ohm = sum(self._known(terminals).values())
        ohms = (range_v - self._suppress_v) / coil_a - known_ohm
        if ohms < -_ROUNDING * known_ohm:
            raise InputError(
                f"a range of {engineered(range_v, 'V')} leaves "
                f"{engineered(range_v - self._suppress_v, 'V')}, but the coil and what is in series need "
                f"{engineered(known_ohm * coil_a, 'V')}; take a larger range or a more sensitive movement",
                ("range",),
                RESISTANCE_KEY,
            )
        return max(ohms, 0.0)

    def _facts(self, known: Ohms) -> tuple[Fact, ...]:
        facts = []
        if self.suppress:
            note = "the pointer starts to move here; true DC only"
            facts.append(Fact(name=SUPPRESS, value=self.suppress.value, unit="V", note=note))
        if known[LINE]:
            note = "copper, counted in the design"
            facts.append(Fact(name="line resistance", value=known[LINE], unit="Ω", note=note))
        return tuple(facts)


def _sections(wanted_ohm: Sequence[float]) -> list[float]:
    """Return the sections of a chain whose sums from the coil outwards are the wanted resistances."""
    return [wanted_ohm[0], *(b - a for a, b in pairwise(wanted_ohm))]


def _worker(coil_a: float, suppress_v: float, names: Sequence[str]) -> Callable[[Ohms, float], Working]:
    def work(ohms: Ohms, signal_v: float) -> Working:
        string = [*names, SWAMP, LINE, COIL]
        ends = ["in", *(f"after {name}" for name in string[:-1]), "out"]
        branches = [
            Branch(name, start, end, ohms[name])
            for name, (start, end) in zip(string, pairwise(ends), strict=True)
        ]
        source = Branch("source", "out", "in", 0.0, signal_v - suppress_v)
        loads = solve([*branches, source]).loads
        return Working(loads[COIL].current_a / coil_a, loads, signal_v)

    return work
