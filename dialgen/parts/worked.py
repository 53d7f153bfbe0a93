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

        Of full deflection, where as designed it does not go from rest: a bridge balanced there.  Of an
        ohmmeter, whose full deflection is set with an adjuster, by how many percent of it the pointer
        stands too far at half scale, once that is set.

        Args:
            changed: the resistances that are not as designed, by name.
        """
        ohms = {**self.ohms, **changed}
        if self.case.judged_at is not None:
            return (
                self._share(ohms, self.case.judged_at) - self._share(self.ohms, self.case.judged_at)
            ) * 100.0
        drive = self.case.work(ohms, self.case.signal).drive
        whole = self.full.drive if abs(self.full.drive) > _RESTING else 1.0
        return (drive - self.full.drive) / whole * 100.0

    def _share(self, ohms: Ohms, signal: float) -> float:
        """Return the drive at a signal as a share of that at full scale with the same ohms.

        What little the adjuster changes of the inner resistance when it is set again is left out.
        """
        return self.case.work(ohms, signal).drive / self.case.work(ohms, self.case.signal).drive


def worked(design: Design) -> tuple[Worked, ...]:
    """Return every range of a design at full scale."""
    return tuple(Worked(case, design.ohms, case.work(design.ohms, case.signal)) for case in design.cases)


def largest(values: list[float]) -> float:
    """Return the value that is farthest from nothing, with its sign; nothing where there are none."""
    return max(values, key=abs, default=0.0)
