"""A resistor in series with the coil, so that a small movement shows a large voltage.

Of several ranges each has a resistor of its own, or all share a chain that is tapped.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass
from itertools import accumulate, pairwise
from typing import Annotated, ClassVar

from dialgen.circuit.built import BUILT_EACH
from dialgen.circuit.design import COIL, Case, Design, Fact, Ohms, Part, Working
from dialgen.circuit.names import LINE, MULTIPLIER, SECTION, SUPPRESS, SWAMP
from dialgen.circuit.network import Branch, solve
from dialgen.circuit.ranges import VOLT_RANGES, check_ranges, chosen
from dialgen.circuit.slips import Fitted, refuse_slips, slip_remarks, worst_of
from dialgen.circuit.terminals import RESISTANCE_KEY, Circuit, Terminals
from dialgen.errors import InputError, Key, Remark
from dialgen.quantity import OHM, VOLT, VOLT_ABOVE, Amount, engineered
from dialgen.stage import Affine, Stage

_ROUNDING = 1e-12
_SLIP = "and at range"
_SLIPS = "and at the order: the smallest range first"


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
            InputError: the movement alone needs more voltage than one of the ranges has, or what was
                built does not make the ranges.
        """
        coil_a, wanted_ohm = self._checked(terminals)
        whole_ohm = self._wholes(terminals, self._built_ohm or self._parts_ohm(wanted_ohm))[
            self._at(terminals)
        ]
        return Affine(1.0 / (whole_ohm * coil_a), -self._suppress_v / (whole_ohm * coil_a))

    def design(self, terminals: Terminals) -> Design:
        """Return one resistor for each range, or the sections of the chain."""
        coil_a, wanted_ohm = self._checked(terminals)
        ranges_v, values_ohm = self._ranges_v(terminals), self._parts_ohm(wanted_ohm)
        names = self._names(ranges_v)
        built: list[float | None] = [*self._built_ohm] or [None] * len(names)
        known = self._known(terminals)
        work = [
            _worker(coil_a, self._suppress_v, names[: i + 1] if self.chain else names[i : i + 1])
            for i, _ in enumerate(names)
        ]
        cases = [
            Case(name=engineered(v, "V"), signal=v, work=each) for v, each in zip(ranges_v, work, strict=True)
        ]
        at = self._at(terminals)
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
            cases=tuple(cases),
            shown=at,
            facts=self._facts(known),
        )

    def remarks(self, terminals: Terminals) -> tuple[Remark, ...]:
        """Return that what was built is far off."""
        return slip_remarks(self._fitted(terminals, *self._checked(terminals)), self._slip)

    def _checked(self, terminals: Terminals) -> tuple[float, list[float]]:
        """Return the coil's current, and what each range wants in series; refuse what is no design."""
        coil_a = terminals.coil.current_a("a multiplier")
        wanted_ohm = [self._designed_ohm(terminals, range_v) for range_v in self._ranges_v(terminals)]
        self._at(terminals)
        refuse_slips(self._fitted(terminals, coil_a, wanted_ohm), self._slip)
        return coil_a, wanted_ohm

    def _fitted(self, terminals: Terminals, coil_a: float, wanted_ohm: list[float]) -> tuple[Fitted, ...]:
        if not self.built:
            return ()
        ranges_v = self._ranges_v(terminals)
        drives = [
            (range_v - self._suppress_v) / whole_ohm / coil_a
            for range_v, whole_ohm in zip(ranges_v, self._wholes(terminals, self._built_ohm), strict=True)
        ]
        names, designed_ohm = self._names(ranges_v), self._parts_ohm(wanted_ohm)

        def key(i: int) -> Key:
            return ("built", i) if self.ranges else ("built",)

        if self.chain:
            return (worst_of(names, key, designed_ohm, self._built_ohm, drives),)
        rows = enumerate(zip(names, designed_ohm, self._built_ohm, drives, strict=True))
        return tuple(
            Fitted(name=name, key=key(i), designed_ohm=designed, built_ohm=built, drives=(drive,))
            for i, (name, designed, built, drive) in rows
        )

    @property
    def _slip(self) -> str:
        return _SLIPS if self.ranges else _SLIP

    @property
    def _built_ohm(self) -> tuple[float, ...]:
        return tuple(each.value for each in self.built)

    def _parts_ohm(self, wanted_ohm: Sequence[float]) -> list[float]:
        """Return the resistors that put the wanted ohms in series: the sections of a chain."""
        if not self.chain:
            return list(wanted_ohm)
        return [wanted_ohm[0], *(b - a for a, b in pairwise(wanted_ohm))]

    def _wholes(self, terminals: Terminals, parts_ohm: Sequence[float]) -> list[float]:
        """Return the whole resistance of every range with these resistors, coil and all."""
        known_ohm = sum(self._known(terminals).values())
        return [known_ohm + ohms for ohms in (accumulate(parts_ohm) if self.chain else parts_ohm)]

    def _ranges_v(self, terminals: Terminals) -> list[float]:
        return sorted(each.value for each in self.ranges) or [self._range_v(terminals)]

    @property
    def _suppress_v(self) -> float:
        return self.suppress.value if self.suppress else 0.0

    def _range_v(self, terminals: Terminals) -> float:
        return terminals.range(self.range, "V", built=bool(self.built))

    def _at(self, terminals: Terminals) -> int:
        """Return which of the ranges, in ascending order, the scale shows."""
        return chosen(self.ranges, self._range_v(terminals), "V") if self.ranges else 0

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
        coil_a, known = terminals.coil.current_a("a multiplier"), self._known(terminals)
        left_v, known_ohm = range_v - self._suppress_v, sum(known.values())
        if left_v <= 0:
            raise InputError(
                f"the zero is suppressed up to {engineered(self._suppress_v, 'V')}, which leaves nothing of "
                f"a range of {engineered(range_v, 'V')}; take a smaller suppress or a larger range",
                ("suppress",),
                ("range",),
            )
        ohms = left_v / coil_a - known_ohm
        if ohms < -_ROUNDING * known_ohm:
            raise self._too_small(coil_a, known, range_v)
        return max(ohms, 0.0)

    def _too_small(self, coil_a: float, known: Ohms, range_v: float) -> InputError:
        """Return why a range has no multiplier, and the keys that would mend it."""
        left_v = range_v - self._suppress_v
        needed = ", ".join(
            f"{engineered(ohms * coil_a, 'V', 4)} for the {name}" for name, ohms in known.items() if ohms
        )
        leaves = f" leaves {engineered(left_v, 'V', 4)}" if self.suppress else ""
        lacks = f"a range of {engineered(range_v, 'V', 4)}{leaves} has too little: it takes {needed}"
        spare_ohm = left_v / coil_a - known[COIL]
        others = [name for name in (LINE, SWAMP) if known[name]]
        if others and spare_ohm > 0:
            names = " and ".join(others)
            return InputError(
                f"{lacks}; with this movement {names} may have {_floored(spare_ohm)} at most",
                *((name,) for name in others),
                ("range",),
            )
        index = [i for i, each in enumerate(self.ranges) if each.value == range_v]
        keys: list[Key] = [("ranges", index[0])] if index else [("range",)]
        keys += [("suppress",)] if self.suppress else []
        mend = "take a larger range" if self.range or self.ranges else "give a range that has enough"
        return InputError(f"{lacks}; {mend}, or take a more sensitive movement", *keys, RESISTANCE_KEY)

    def _facts(self, known: Ohms) -> tuple[Fact, ...]:
        facts = []
        if self.suppress:
            note = "the pointer starts to move here; true DC only"
            facts.append(Fact(name=SUPPRESS, value=self.suppress.value, unit="V", note=note))
        if known[LINE]:
            note = "copper, counted in the design"
            facts.append(Fact(name="line resistance", value=known[LINE], unit="Ω", note=note))
        return tuple(facts)


def _floored(ohms: float) -> str:
    """Return a resistance in three digits, rounded down so that it is still enough."""
    step = 10.0 ** (math.floor(math.log10(ohms)) - 2)
    return engineered(math.floor(ohms / step) * step, "Ω", 3)


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
