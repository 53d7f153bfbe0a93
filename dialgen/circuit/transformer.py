"""A current transformer: the movement, with a shunt if need be, across its secondary."""

from __future__ import annotations

import re
from collections.abc import Callable
from dataclasses import dataclass, replace
from typing import Annotated, ClassVar

import numpy as np

from dialgen.circuit.built import BUILT_ABOVE
from dialgen.circuit.design import Case, Design, Fact, Ohms, Working
from dialgen.circuit.names import SECONDARY
from dialgen.circuit.shunt import Shunt
from dialgen.circuit.terminals import Circuit, Terminals
from dialgen.errors import InputError, Remark
from dialgen.quantity import AMPERE, OHM, Amount, Written, bare_number, engineered, plain_number, shown
from dialgen.stage import Affine, Stage

_LEAST_A, _MOST_A = 1e-6, 1e6
_USUAL_A = 5.0
"""The largest secondary that is sold; 1 A is the other usual one (common practice)."""

_EXTENDED = 1.2
"""What transformers carry continuously, of their ratio, unless more is stamped on them (common practice)."""


@dataclass(frozen=True, slots=True)
class Ratio:
    """Primary and secondary amperes as they are stamped on the transformer."""

    primary_a: float
    secondary_a: float

    @property
    def step_down(self) -> float:
        """Secondary amperes for one primary ampere."""
        return self.secondary_a / self.primary_a

    @property
    def stamp(self) -> str:
        """How it is stamped."""
        return f"{plain_number(self.primary_a)}/{plain_number(self.secondary_a)}"

    @property
    def turned(self) -> Ratio:
        """The same, the other way round."""
        return Ratio(self.secondary_a, self.primary_a)


def read_ratio(text: object) -> Ratio:
    """Return the ratio written as primary/secondary.

    Raises:
        ValueError: it is not written so.

    >>> read_ratio("200/5").step_down
    0.025
    """
    parts = re.split(r"\s*/\s*", text) if isinstance(text, str) else []
    numbers = [bare_number(re.sub(r"\s*A$", "", part)) for part in parts]
    amperes = [number for number in numbers if number is not None and _LEAST_A <= number <= _MOST_A]
    if len(parts) != 2 or len(amperes) != 2:
        raise ValueError(
            f"{shown(text)} is not a transformer's ratio; write primary over secondary amperes, "
            'for example "200/5"'
        )
    return Ratio(*amperes)


RATIO = Written(read_ratio, '"200/5"')


@dataclass(frozen=True, slots=True, kw_only=True)
class CurrentTransformer(Circuit):
    """Primary amperes stepped down, then as a shunt for the secondary's.

    Where the secondary at ``range`` is the movement's own current there is no shunt.
    """

    kind: ClassVar[str] = "current transformer"
    takes: ClassVar[str | None] = "A"
    ratio: Annotated[Ratio, RATIO]
    range: Annotated[Amount | None, AMPERE] = None
    built: Annotated[Amount | None, BUILT_ABOVE] = None
    swamp: Annotated[Amount | None, OHM] = None
    leads: Annotated[Amount | None, OHM] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return the shunt's stage on signal·secondary/primary.

        Raises:
            InputError: the secondary at the range is below the movement's own current.
        """
        shunt, behind = self._behind(terminals)
        try:
            made = shunt.stage(behind)
        except InputError as error:
            raise self._in_primary(error, terminals) from None
        return Affine(self.ratio.step_down * float(made.forward(np.array(1.0))))

    def design(self, terminals: Terminals) -> Design:
        """Return the design of the shunt behind the transformer, its cases in primary amperes."""
        shunt, behind = self._behind(terminals)
        try:
            secondary = shunt.design(behind)
        except InputError as error:
            raise self._in_primary(error, terminals) from None
        range_a = self._range_a(terminals)
        case = secondary.cases[0]
        at_full = case.work(secondary.ohms, case.signal)
        burden_va = at_full.drop_v / case.signal * self.ratio.secondary_a**2
        stamped = engineered(self.ratio.secondary_a, "A")
        counted = "with its" if self.leads else "without the"
        return replace(
            secondary,
            kind=self.kind,
            range=range_a,
            cases=(Case(name=engineered(range_a, "A"), signal=range_a, work=self._stepped(case.work)),),
            stamp=self.ratio.stamp,
            facts=(
                *(replace(fact, name="leads") for fact in secondary.facts),
                Fact(name=SECONDARY, value=case.signal, unit="A"),
                Fact(
                    name="burden",
                    value=burden_va,
                    unit="VA",
                    note=f"at {stamped}, {counted} leads",
                ),
            ),
            alternating=True,
        )

    def remarks(self, terminals: Terminals) -> tuple[Remark, ...]:
        """Return that the ratio looks turned round or is gone beyond, or that what was built is far off."""
        shunt, behind = self._behind(terminals)
        return (*self._ratio_remarks(self._range_a(terminals)), *shunt.remarks(behind))

    def _ratio_remarks(self, range_a: float) -> tuple[Remark, ...]:
        ratio = self.ratio
        if ratio.secondary_a > min(ratio.primary_a, _USUAL_A):
            text = (
                f"a ratio of {ratio.stamp} makes {engineered(ratio.secondary_a, 'A')} of "
                f"{engineered(ratio.primary_a, 'A')}, and secondaries are of 5 A or 1 A (common practice); "
                f'if it is turned round, write ratio = "{ratio.turned.stamp}"'
            )
            return (Remark(text, ("ratio",)),)
        if range_a > _EXTENDED * ratio.primary_a:
            text = (
                f"at {engineered(range_a, 'A')} the secondary would give "
                f"{engineered(range_a * ratio.step_down, 'A', 3)}, and a transformer of {ratio.stamp} is "
                f"made for {engineered(ratio.secondary_a, 'A')}: it overheats, and saturates (common "
                f"practice); take a range up to {engineered(ratio.primary_a, 'A')}, or another ratio"
            )
            return (Remark(text, ("range",) if self.range else ("ratio",)),)
        return ()

    def _range_a(self, terminals: Terminals) -> float:
        return terminals.range(self.range, "A", built=bool(self.built))

    def _behind(self, terminals: Terminals) -> tuple[Shunt, Terminals]:
        """Return the circuit on the secondary side, and the terminals it sees there."""
        step_down = self.ratio.step_down
        shunt = Shunt(
            range=Amount(self._range_a(terminals) * step_down, "A"),
            built=self.built,
            swamp=self.swamp,
            leads=self.leads,
        )
        return shunt, replace(terminals, signal=lambda value: terminals.signal(value) * step_down)

    def _in_primary(self, error: InputError, terminals: Terminals) -> InputError:
        if ("range",) not in error.keys:
            return error
        own_a = terminals.coil.current_a("a current transformer") / self.ratio.step_down
        range_a = self._range_a(terminals)
        return InputError(
            f"at {engineered(range_a, 'A')} the secondary gives "
            f"{engineered(range_a * self.ratio.step_down, 'A')}, below the movement's own current; take a "
            f"range of {engineered(own_a, 'A')} or more, or a more sensitive movement",
            *error.keys,
        )

    def _stepped(self, work: Callable[[Ohms, float], Working]) -> Callable[[Ohms, float], Working]:
        return lambda ohms, signal_a: work(ohms, signal_a * self.ratio.step_down)
