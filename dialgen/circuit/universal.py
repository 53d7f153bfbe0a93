"""One tapped shunt for several ranges, always whole across the coil (Ayrton's universal shunt)."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from itertools import accumulate, pairwise
from typing import Annotated, ClassVar

from dialgen.circuit.built import BUILT_EACH
from dialgen.circuit.design import COIL, Case, Design, Ohms, Part, Working
from dialgen.circuit.names import SECTION, SWAMP, TOTAL
from dialgen.circuit.network import Branch, Feed, solve
from dialgen.circuit.ranges import AMPERE_RANGES, check_ranges, chosen
from dialgen.circuit.slips import Fitted, refuse_slips, slip_remarks, worst_of
from dialgen.circuit.terminals import CURRENT_KEY, Circuit, Terminals
from dialgen.errors import InputError, Remark
from dialgen.quantity import AMPERE, OHM, Amount, engineered
from dialgen.stage import Affine, Stage

_EQUAL = 1e-12
_SLIP = "and at the order: from the tap of the largest range outwards"


@dataclass(frozen=True, slots=True, kw_only=True)
class UniversalShunt(Circuit):
    """A string of sections across coil and swamping resistor, tapped once for each range.

    Sections count from the tap of the largest range outwards; ``built`` lists them so.  No switch
    contact is ever in the coil's branch, so none can let the whole current through the coil.
    """

    kind: ClassVar[str] = "universal shunt"
    takes: ClassVar[str | None] = "A"
    ranges: Annotated[tuple[Amount, ...], AMPERE_RANGES]
    range: Annotated[Amount | None, AMPERE] = None
    swamp: Annotated[Amount | None, OHM] = None
    built: Annotated[tuple[Amount, ...], BUILT_EACH] = ()

    def __post_init__(self) -> None:
        check_ranges(self.ranges)
        if self.built and len(self.built) != len(self.ranges):
            raise InputError(
                f"{len(self.built)} sections as built, for {len(self.ranges)} ranges; "
                "give one for each, from the tap of the largest range outwards",
                ("built",),
                ("ranges",),
            )
        for i, section in enumerate(self.built):
            if not section.value:
                raise InputError("a section of 0 Ω makes two ranges one; measure it again", ("built", i))

    def stage(self, terminals: Terminals) -> Stage:
        """Return signal·tap/(Rm' + Rs)/Im (current division), Rm' coil and swamp, Rs all sections.

        Raises:
            InputError: the smallest range is not above the movement's own current, the scale's range is
                none of the ranges, or what was built does not make the ranges.
        """
        coil_a, designed_ohm = self._checked(terminals)
        branch_ohm = self._branch_ohm(terminals)
        taps_ohm = list(accumulate(self._built_ohm or designed_ohm))
        at = len(taps_ohm) - 1 - self._at(terminals)
        return Affine(taps_ohm[at] / (branch_ohm + taps_ohm[-1]) / coil_a)

    def design(self, terminals: Terminals) -> Design:
        """Return the sections from the tap of the largest range outwards, then their total."""
        coil_a, sections_ohm = self._checked(terminals)
        names = _names(len(sections_ohm))
        built: list[float | None] = [*self._built_ohm] or [None] * len(names)
        sections = [
            Part(name=name, ohms=ohms, built=made)
            for name, ohms, made in zip(names, sections_ohm, built, strict=True)
        ]
        total = Part(
            name=TOTAL,
            ohms=sum(sections_ohm),
            built=sum(self._built_ohm) or None,
            sums=tuple(names),
        )
        swamp_ohm = self.swamp.value if self.swamp else 0.0
        rising_a = self._falling_a[::-1]
        cases = [
            Case(name=engineered(range_a, "A"), signal=range_a, work=_worker(coil_a, names, tap))
            for tap, range_a in zip(range(len(names), 0, -1), rising_a, strict=True)
        ]
        at = self._at(terminals)
        return Design(
            kind=self.kind,
            range=rising_a[at],
            unit="A",
            ohms={
                **dict(zip(names, sections_ohm, strict=True)),
                SWAMP: swamp_ohm,
                COIL: terminals.coil.resistance_ohm("a universal shunt"),
            },
            parts=(
                *sections,
                total,
                *([Part(name=SWAMP, ohms=swamp_ohm, given=True)] if swamp_ohm else []),
            ),
            cases=tuple(cases),
            shown=at,
        )

    def remarks(self, terminals: Terminals) -> tuple[Remark, ...]:
        """Return that what was built is far off."""
        return slip_remarks(self._fitted(terminals, *self._checked(terminals)), _SLIP)

    def _checked(self, terminals: Terminals) -> tuple[float, list[float]]:
        """Return the coil's current, and the sections as designed; refuse what is no design."""
        coil_a, sections_ohm = terminals.coil.current_a("a universal shunt"), self._sections_ohm(terminals)
        self._at(terminals)
        refuse_slips(self._fitted(terminals, coil_a, sections_ohm), _SLIP)
        return coil_a, sections_ohm

    def _fitted(self, terminals: Terminals, coil_a: float, designed_ohm: list[float]) -> tuple[Fitted, ...]:
        if not self.built:
            return ()
        taps_ohm = list(accumulate(self._built_ohm))
        ring_ohm = self._branch_ohm(terminals) + taps_ohm[-1]
        drives = [
            tap_ohm / ring_ohm * range_a / coil_a
            for tap_ohm, range_a in zip(taps_ohm, self._falling_a, strict=True)
        ]
        names = _names(len(taps_ohm))
        return (worst_of(names, lambda i: ("built", i), designed_ohm, self._built_ohm, drives),)

    @property
    def _built_ohm(self) -> tuple[float, ...]:
        return tuple(each.value for each in self.built)

    @property
    def _falling_a(self) -> list[float]:
        return sorted((each.value for each in self.ranges), reverse=True)

    def _branch_ohm(self, terminals: Terminals) -> float:
        swamp_ohm = self.swamp.value if self.swamp else 0.0
        return terminals.coil.resistance_ohm("a universal shunt") + swamp_ohm

    def _at(self, terminals: Terminals) -> int:
        """Return which of the ranges, in ascending order, the scale shows."""
        return chosen(self.ranges, terminals.range(self.range, "A", built=bool(self.built)), "A")

    def _sections_ohm(self, terminals: Terminals) -> list[float]:
        """Return the sections from the tap of the largest range outwards.

        The whole shunt is that of the smallest range, Im·Rm'/(smallest - Im).  The whole ring of coil
        and shunt is one for all ranges, so each tap is its share of it: Im·(Rm' + Rs)/range.
        """
        coil_a = terminals.coil.current_a("a universal shunt")
        branch_ohm = self._branch_ohm(terminals)
        falling_a = self._falling_a
        if falling_a[-1] <= coil_a * (1 + _EQUAL):
            raise InputError(
                f"the smallest range of {engineered(falling_a[-1], 'A')} is not above the movement's own "
                f"{engineered(coil_a, 'A')}; take larger ranges or a more sensitive movement",
                ("ranges",),
                CURRENT_KEY,
            )
        whole_ohm = coil_a * branch_ohm / (falling_a[-1] - coil_a)
        taps_ohm = [coil_a * (branch_ohm + whole_ohm) / range_a for range_a in falling_a[:-1]]
        return [b - a for a, b in pairwise([0.0, *taps_ohm, whole_ohm])]


def _names(count: int) -> list[str]:
    return [f"{SECTION} {i}" for i in range(1, count + 1)]


def _worker(coil_a: float, names: Sequence[str], tap: int) -> Callable[[Ohms, float], Working]:
    """Return how the circuit works where the current comes in behind the ``tap``-th section."""
    nodes = [f"tap {i}" for i in range(len(names) + 1)]

    def work(ohms: Ohms, signal_a: float) -> Working:
        string = [
            Branch(name, start, end, ohms[name])
            for name, (end, start) in zip(names, pairwise(nodes), strict=True)
        ]
        branch = (
            Branch(SWAMP, nodes[-1], "swamped", ohms[SWAMP]),
            Branch(COIL, "swamped", nodes[0], ohms[COIL]),
        )
        solved = solve((*string, *branch), Feed(nodes[tap], nodes[0], signal_a))
        return Working(
            solved.loads[COIL].current_a / coil_a, solved.loads, solved.drop_v(nodes[tap], nodes[0])
        )

    return work
