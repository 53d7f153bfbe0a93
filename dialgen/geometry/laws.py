"""What the numerals mean: from the value on the face to the signal at the terminals.

Each law is a frozen dataclass with the keys of its dial-file table; the file's check is built from
these very fields, and the table `LAWS` maps a kind to its class.  To add a law, add a class here
or in a file of its own, and a row in the table.

A law gives a `Stage` (value to signal), says in which unit its signal is, and which signal stands
for nothing at the terminals, where a direct scale rests unless told otherwise.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Annotated, ClassVar, Literal, Protocol

import numpy as np

from dialgen.errors import InputError
from dialgen.quantity import OHM_ABOVE, SIGNAL, SIGNAL_ABOVE, Amount
from dialgen.stage import EVERYWHERE, POSITIVE, Affine, Array, Span, Stage


class Law(Protocol):
    """A law as the dial file states it."""

    kind: ClassVar[str]

    @property
    def takes_face_values(self) -> bool:
        """Whether the law takes values as they stand on the face, the prefix of the unit unread."""
        ...

    def signal_unit(self, unit: str) -> str | None:
        """Return the unit of the signal on a scale whose SI unit is ``unit``; None is any."""
        ...

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the law as a stage, for a scale that runs over ``span`` in ``unit``.

        A formula is inverted about the span; a sensor takes its temperature in the unit.

        Raises:
            InputError: the law has no meaning in this unit; keys are relative to the scale.
        """
        ...

    def zero(self, span: Span, unit: str) -> float | None:
        """Return the signal where nothing is applied, or None where the law never reaches it."""
        ...


@dataclass(frozen=True, slots=True, kw_only=True)
class Linear:
    """The value itself in its SI unit; or at_zero + per·value, with ``per`` the signal of one face unit."""

    kind: ClassVar[str] = "linear"
    per: Annotated[Amount | None, SIGNAL] = None
    at_zero: Annotated[Amount | None, SIGNAL] = None

    def __post_init__(self) -> None:
        if self.per is None and self.at_zero is not None:
            raise InputError("at_zero goes with per; give per, the signal of one face unit", ("at_zero",))
        if self.per is not None and self.per.value == 0:
            raise InputError(
                "per is zero, so every value looks alike; give the signal of one face unit", ("per",)
            )
        if self.per and self.at_zero and self.per.unit != self.at_zero.unit:
            raise InputError(
                f"at_zero is in {self.at_zero.unit} but per in {self.per.unit}; give both in one unit",
                ("at_zero",),
                ("per",),
            )

    @property
    def takes_face_values(self) -> bool:
        """With ``per``, which is stated for one unit of the face."""
        return self.per is not None

    def signal_unit(self, unit: str) -> str | None:
        """Return the unit of ``per``, or the scale's own."""
        return self.per.unit if self.per else unit

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the straight line."""
        if self.per is None:
            return Affine(1.0)
        return Affine(self.per.value, self.at_zero.value if self.at_zero else 0.0)

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0."""
        return 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Power:
    """value^exponent; with exponent 0.5 and a ``load``, the volts across it of a power in watts."""

    kind: ClassVar[str] = "power"
    exponent: float
    load: Annotated[Amount | None, OHM_ABOVE] = None

    def __post_init__(self) -> None:
        if self.exponent == 0:
            raise InputError("an exponent of 0 makes every value alike; give another", ("exponent",))
        if self.load is not None and self.exponent != 0.5:
            raise InputError(
                "load turns watts to volts, which needs exponent = 0.5; set it so or leave load out",
                ("load",),
                ("exponent",),
            )

    @property
    def takes_face_values(self) -> bool:
        """Never: a kW counts as 1000 W."""
        return False

    def signal_unit(self, unit: str) -> str | None:
        """Return volts across a load, else a pure number (an exponent of 1 keeps the unit)."""
        return "V" if self.load else unit if self.exponent == 1 else ""

    def stage(self, span: Span, unit: str) -> Stage:
        """Return (load·value)^exponent; odd whole exponents also take negative values."""
        odd = self.exponent > 0 and self.exponent % 2 == 1
        return _PowerStage(
            self.exponent, self.load.value if self.load else 1.0, EVERYWHERE if odd else POSITIVE
        )

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0."""
        return 0.0


@dataclass(frozen=True, slots=True)
class _PowerStage:
    exponent: float
    factor: float
    domain: Span
    image: Span = EVERYWHERE

    def forward(self, x: Array) -> Array:
        if self.domain is EVERYWHERE:
            return np.sign(x) * np.power(np.abs(x) * self.factor, self.exponent)
        with np.errstate(divide="ignore"):
            return np.power(x * self.factor, self.exponent)

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            size = np.power(np.abs(y), 1.0 / self.exponent) / self.factor
        return np.sign(y) * size if self.domain is EVERYWHERE else np.where(y < 0, np.nan, size)


@dataclass(frozen=True, slots=True, kw_only=True)
class Decibel:
    """reference·10^(value/20), or /10 of a power; of a power with ``load``, the volts across it."""

    kind: ClassVar[str] = "decibel"
    reference: Annotated[Amount | None, SIGNAL_ABOVE] = None
    of: Literal["amplitude", "power"] = "amplitude"
    load: Annotated[Amount | None, OHM_ABOVE] = None

    def __post_init__(self) -> None:
        if self.load is not None and self.of != "power":
            raise InputError('load goes with of = "power"; set it so or leave load out', ("load",), ("of",))
        if self.load is not None and (self.reference is None or self.reference.unit != "W"):
            raise InputError('with a load the reference is a power; write for example "1 mW"', ("reference",))

    @property
    def takes_face_values(self) -> bool:
        """Never; a decibel has no prefix."""
        return False

    def signal_unit(self, unit: str) -> str | None:
        """Return the unit of the reference, volts across a load, or a pure number."""
        return "V" if self.load else self.reference.unit if self.reference else ""

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the exponential."""
        reference = self.reference.value if self.reference else 1.0
        if self.load:
            return _Exponential(math.sqrt(reference * self.load.value), 20.0)
        return _Exponential(reference, 20.0 if self.of == "amplitude" else 10.0)

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0, which stands at minus infinity decibels."""
        return 0.0


@dataclass(frozen=True, slots=True)
class _Exponential:
    reference: float
    per_decade: float
    domain: Span = EVERYWHERE
    image: Span = POSITIVE

    def forward(self, x: Array) -> Array:
        return self.reference * np.power(10.0, x / self.per_decade)

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            return self.per_decade * np.log10(y / self.reference)


@dataclass(frozen=True, slots=True, kw_only=True)
class Logarithmic:
    """log10 of the value: equal ratios take equal lengths."""

    kind: ClassVar[str] = "logarithmic"

    @property
    def takes_face_values(self) -> bool:
        """Never: a prefix only moves the whole scale."""
        return False

    def signal_unit(self, unit: str) -> str | None:
        """Return a pure number."""
        return ""

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the logarithm."""
        return _Log10()

    def zero(self, span: Span, unit: str) -> float | None:
        """Return None: a logarithm has no zero signal of its own."""
        return None


@dataclass(frozen=True, slots=True)
class _Log10:
    domain: Span = POSITIVE
    image: Span = EVERYWHERE

    def forward(self, x: Array) -> Array:
        with np.errstate(divide="ignore"):
            return np.log10(x)

    def inverse(self, y: Array) -> Array:
        return np.power(10.0, y)


@dataclass(frozen=True, slots=True, kw_only=True)
class Reflection:
    """(S - 1)/(S + 1), the size of the reflection coefficient at standing-wave ratio S."""

    kind: ClassVar[str] = "reflection"

    @property
    def takes_face_values(self) -> bool:
        """Never; a ratio has no prefix."""
        return False

    def signal_unit(self, unit: str) -> str | None:
        """Return a pure number."""
        return ""

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the reflection coefficient."""
        return _Reflection()

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0, which stands at a ratio of 1."""
        return 0.0


@dataclass(frozen=True, slots=True)
class _Reflection:
    # A standing-wave ratio is never below 1.
    domain: Span = (1.0, math.inf)
    image: Span = (0.0, 1.0)

    def forward(self, x: Array) -> Array:
        return 1.0 - 2.0 / (x + 1.0)

    def inverse(self, y: Array) -> Array:
        with np.errstate(divide="ignore"):
            return (1.0 + y) / (1.0 - y)
