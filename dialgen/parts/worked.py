"""The ranges of a design worked as designed, so that every change can be held against that."""

from __future__ import annotations

from dataclasses import dataclass

from dialgen.circuit.design import Case, Design, Ohms, Working

_RESTING = 1e-9


@dataclass(frozen=True, slots=True, eq=False)
class Worked:
    """One range at full scale, with every part as designed.

    Args:
        case: the range.
        ohms: every resistance as designed.
        full: how it works at full scale.
    """

    case: Case
    ohms: Ohms
    full: Working

    def has(self, name: str) -> bool:
        """Return whether a part carries anything in this range."""
        return name in self.full.loads

    def error_percent(self, changed: Ohms) -> float:
        """Return by how many percent the pointer goes farther at full scale than it does as designed.

        Of full deflection, where as designed it does not go from rest: a bridge balanced there.

        Args:
            changed: the resistances that are not as designed, by name.
        """
        drive = self.case.work({**self.ohms, **changed}, self.case.signal).drive
        whole = self.full.drive if abs(self.full.drive) > _RESTING else 1.0
        return (drive - self.full.drive) / whole * 100.0


def worked(design: Design) -> tuple[Worked, ...]:
    """Return every range of a design at full scale."""
    return tuple(Worked(case, design.ohms, case.work(design.ohms, case.signal)) for case in design.cases)


def largest(values: list[float]) -> float:
    """Return the value that is farthest from nothing, with its sign; nothing where there are none."""
    return max(values, key=abs, default=0.0)
