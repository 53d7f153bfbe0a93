"""Slips in what was built: a wrong power of ten, the wrong unit, sections in the wrong order.

A part as built is never quite what was designed, and the marks follow it.  One that is off by far is
rather a slip of the pen, and it is told as that: otherwise it shows as a scale that runs beyond the
stops, or does not leave the pointer's rest.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass

from dialgen.errors import InputError, Key, Remark
from dialgen.quantity import engineered, in_figures

_NEAR = 1.5
"""Within this factor of full deflection, at the end of the range, nothing is said."""

_LEAST = 0.15
"""Below this a power of ten is wrong; above it a scale of lesser values could still be meant."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Fitted:
    """A part as built, beside its design.

    Args:
        name: what it is called.
        key: where it is given.
        designed_ohm: what it was designed for; infinite where none is needed.
        built_ohm: what was built.
        drives: of full deflection, at the end of every range that it has a part in.
    """

    name: str
    key: Key
    designed_ohm: float
    built_ohm: float
    drives: tuple[float, ...]

    @property
    def drive(self) -> float:
        """Of its drives the one that is farthest from full deflection, as a factor."""
        return max(self.drives, key=_off)

    @property
    def off(self) -> float:
        """By what factor it is off its design, 1 or more; infinite beside none."""
        if not self.built_ohm or not self.designed_ohm:
            return 1.0 if self.built_ohm == self.designed_ohm else math.inf
        return _off(self.built_ohm / self.designed_ohm)

    def told(self) -> str:
        """Return what was built beside what was designed, and what it does."""
        built, designed = (engineered(ohms, "Ω", 4) for ohms in (self.built_ohm, self.designed_ohm))
        off = "where none is needed"
        if 0 < self.designed_ohm < math.inf:
            off = f"{in_figures(self.built_ohm / self.designed_ohm, 3)} times the designed {designed}"
        return (
            f"as built {self.name} is {built}, {off}, and drives the coil to {in_figures(self.drive, 3)} "
            "times full deflection at the end of the range"
        )


def refuse_slips(fitted: Iterable[Fitted], mend: str) -> None:
    """Refuse parts with which no range can be what it is said to be: its end is beyond all stops, or at rest.

    Args:
        fitted: the parts.
        mend: what else than powers of ten to look at.

    Raises:
        InputError: at the key of a part.
    """
    for part in fitted:
        if not _LEAST <= part.drive <= _NEAR:
            raise InputError(f"{part.told()}; look at its unit and powers of ten, {mend}", part.key)


def slip_remarks(fitted: Iterable[Fitted], mend: str) -> tuple[Remark, ...]:
    """Return a remark on every part with which a range ends well before full deflection."""
    return tuple(
        Remark(f"{part.told()}; if that is not meant, look at its unit, {mend}", part.key)
        for part in fitted
        if not is_near(part.drive)
    )


def is_near(drive: float) -> bool:
    """Return whether a range as built is near enough that nothing is said of it."""
    return _off(drive) <= _NEAR


def worst_of(
    names: Sequence[str],
    key: Callable[[int], Key],
    designed_ohm: Sequence[float],
    built_ohm: Sequence[float],
    drives: Sequence[float],
) -> Fitted:
    """Return, of parts that make the ranges together, the one that is farthest off its design."""
    parts = [
        Fitted(name=name, key=key(i), designed_ohm=designed, built_ohm=built, drives=tuple(drives))
        for i, (name, designed, built) in enumerate(zip(names, designed_ohm, built_ohm, strict=True))
    ]
    return max(parts, key=lambda part: part.off)


def _off(ratio: float) -> float:
    return max(ratio, 1.0 / ratio) if ratio > 0 else math.inf
