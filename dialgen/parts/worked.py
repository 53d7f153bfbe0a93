"""The ranges of a design worked as designed, so that every change can be held against that."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np

from dialgen.circuit.design import Case, Design, Ohms, Working
from dialgen.roots import Array, bracketed_roots

_RESTING = 1e-9
_SETTINGS = np.array([0.0, 1.0, 20.0])
"""Where an adjuster is looked for, times its designed ohms: shorted, as it is, and far beyond."""


@dataclass(frozen=True, slots=True, eq=False)
class Worked:
    """One range at full scale, with every part as designed.

    Args:
        case: the range.
        ohms: every resistance as designed.
        full: how it works at full scale.
        judged: the drive as designed where errors are looked for.
        adjuster: the name of what sets full deflection; None where nothing does.
    """

    case: Case
    ohms: Ohms
    full: Working
    judged: float
    adjuster: str | None

    def has(self, name: str) -> bool:
        """Return whether a part carries anything in this range."""
        return name in self.full.loads

    def error_percent(self, changed: Ohms) -> float:
        """Return by how many percent the coil's current at full scale is larger than as designed.

        Of that for full deflection, where as designed there is none: a bridge balanced there.  Of an
        ohmmeter, whose full deflection is set with an adjuster, by how many percent of full deflection
        the drive is too large at half scale, once that is set.  Where no setting of the adjuster brings
        full deflection, or there is no adjuster, half scale counts as a share of what full scale has.

        Args:
            changed: the resistances that are not as designed, by name.
        """
        ohms = {**self.ohms, **changed}
        if self.case.judged_at is not None:
            return (self._once_set(ohms, self.case.judged_at) - self.judged) * 100.0
        drive = self._drive(ohms)
        whole = self.full.drive if abs(self.full.drive) > _RESTING else 1.0
        return (drive - self.full.drive) / whole * 100.0

    def _once_set(self, ohms: Ohms, signal: float) -> float:
        """Return the drive at a signal once the adjuster brings full scale to what it is as designed."""
        set_ohm = self._set_ohm(ohms)
        if self.adjuster is None or math.isnan(set_ohm):
            return self.case.work(ohms, signal).drive / self._drive(ohms) * self.full.drive
        return self.case.work({**ohms, self.adjuster: set_ohm}, signal).drive

    def _set_ohm(self, ohms: Ohms) -> float:
        """Return the adjuster's ohms for that; NaN where there is none.

        `Case.work` counts the same share of its track at any ohms, so that other ohms are another setting.
        """
        if (name := self.adjuster) is None:
            return math.nan

        def drives(settings: Array) -> Array:
            return np.array([self._drive({**ohms, name: each}) for each in settings.tolist()])

        places = self.ohms[name] * _SETTINGS
        return float(bracketed_roots(drives, places, np.array([self.full.drive]))[0])

    def _drive(self, ohms: Ohms) -> float:
        return self.case.work(ohms, self.case.signal).drive


def worked(design: Design) -> tuple[Worked, ...]:
    """Return every range of a design at full scale."""
    adjuster = next((part.name for part in design.parts if part.adjustable), None)
    return tuple(_worked(case, design.ohms, adjuster) for case in design.cases)


def _worked(case: Case, ohms: Ohms, adjuster: str | None) -> Worked:
    full = case.work(ohms, case.signal)
    judged = full if case.judged_at is None else case.work(ohms, case.judged_at)
    return Worked(case, ohms, full, judged.drive, adjuster)


def largest(values: list[float]) -> float:
    """Return the value that is farthest from nothing, with its sign; nothing where there are none."""
    return max(values, key=abs, default=0.0)
