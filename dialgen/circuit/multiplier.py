"""A resistor in series with the coil, so that a small movement shows a large voltage."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.circuit.terminals import RESISTANCE_KEY, Terminals
from dialgen.errors import InputError
from dialgen.quantity import OHM, VOLT, VOLT_ABOVE, Amount
from dialgen.stage import Affine, Stage


@dataclass(frozen=True, slots=True, kw_only=True)
class Multiplier:
    """A multiplier resistor, designed or as built, with swamping, line and a suppressed zero."""

    kind: ClassVar[str] = "multiplier"
    takes: ClassVar[str | None] = "V"
    range: Annotated[Amount | None, VOLT_ABOVE] = None
    built: Annotated[Amount | None, OHM] = None
    swamp: Annotated[Amount | None, OHM] = None
    line: Annotated[Amount | None, OHM] = None
    suppress: Annotated[Amount | None, VOLT] = None

    def stage(self, terminals: Terminals) -> Stage:
        """Return (signal - suppress)/(whole resistance)/Im, by Ohm's law.

        Raises:
            InputError: the movement alone needs more voltage than the range has.
        """
        coil_a = terminals.coil.current_a("a multiplier")
        suppress_v = self.suppress.value if self.suppress else 0.0
        known_ohm = terminals.coil.resistance_ohm("a multiplier")
        known_ohm += sum(part.value for part in (self.swamp, self.line) if part)
        if self.built:
            whole_ohm = known_ohm + self.built.value
        else:
            range_v = terminals.range(self.range.value if self.range else None)
            whole_ohm = (range_v - suppress_v) / coil_a
            if whole_ohm < known_ohm * (1 - 1e-12):
                raise InputError(
                    f"a range of {range_v:g} V leaves {range_v - suppress_v:.4g} V, but the coil and "
                    f"what is in series need {known_ohm * coil_a:.4g} V; "
                    "take a larger range or a more sensitive movement",
                    ("range",),
                    RESISTANCE_KEY,
                )
        return Affine(1.0 / (whole_ohm * coil_a), -suppress_v / (whole_ohm * coil_a))
