"""Thermocouples: the EMF of two metals between a hot junction and a reference junction.

A pyrometer is a millivoltmeter, its face marked in degrees.  What the couple gives is E(hot) -
E(reference), both from the reference function of its type; so a scale needs the temperature of the
reference junction, which is where the couple's own wire, or its compensating cable, ends.

Why a face for reference 0 °C serves every ambient.  Let the deflection be k·EMF, as it is with an
even response, and let the pointer be set by its zero screw, with the couple disconnected, to the
mark of the ambient temperature a.  That mark stands at k·E(a).  The couple adds k·(E(t) - E(a)), and
the pointer comes to k·E(t), which is where the face for reference 0 °C has its mark t.  The EMF
adds, and the zero screw shifts every deflection by the same drive.  With an uneven response it does not.
"""

from __future__ import annotations

from dataclasses import dataclass
from fractions import Fraction
from functools import cache
from typing import Annotated, ClassVar

import numpy as np

from dialgen.errors import InputError
from dialgen.geometry.its90 import REFERENCE, Letter, Piece
from dialgen.geometry.temperature import on_face
from dialgen.quantity import TEMPERATURE, ZERO_CELSIUS_K, Amount
from dialgen.stage import Array, Span, Stage

_FROM_C: dict[Letter, float] = {"B": 50.0}
"""Where a type may be read from: B has its least EMF near 21 °C and is back at nothing near 42 °C."""

_WHY = {"B": ", whose EMF turns near 21 °C,"}
_ICE = Amount(ZERO_CELSIUS_K, "K")
_NEWTON_STEPS = 4


@dataclass(frozen=True, slots=True, kw_only=True)
class Thermocouple:
    """EMF at the value minus EMF at the reference junction, by ITS-90 (NIST Monograph 175)."""

    kind: ClassVar[str] = "thermocouple"
    type: Letter
    reference: Annotated[Amount, TEMPERATURE] = _ICE

    def __post_init__(self) -> None:
        low, high = REFERENCE[self.type][0].from_c, REFERENCE[self.type][-1].to_c
        if not low <= self._reference_c <= high:
            raise InputError(
                f"a reference junction at {self._reference_c:.6g} °C is outside type {self.type}, {low:g} to "
                f'{high:g} °C; give the temperature where the couple\'s wire ends, such as "20 degC"',
                ("reference",),
            )

    @property
    def _reference_c(self) -> float:
        return self.reference.value - ZERO_CELSIUS_K

    @property
    def takes_face_values(self) -> bool:
        """Always: a unit of temperature has no prefix."""
        return True

    def signal_unit(self, unit: str) -> str | None:
        """Return volts."""
        return "V"

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the couple over all of its range.

        Raises:
            InputError: the unit is none of temperature, or the scale leaves the range of the type.
        """
        emf = emf_of(self.type)
        couple = _Couple(emf, float(emf.volts(np.array([self._reference_c]))[0]))
        return on_face(couple, span, unit, f"a type {self.type} thermocouple{_WHY.get(self.type, '')}")

    def zero(self, span: Span, unit: str) -> float | None:
        """Return 0: the pointer rests at the reference temperature."""
        return 0.0


@dataclass(frozen=True, slots=True, eq=False)
class Polynomial:
    """One piece of a reference function, in powers of the distance from its middle.

    In powers of t itself single terms near -270 °C are up to 10^5 times as large as their sum, and their
    rounding is worth 20 nK there; about the middle no term is larger than a few times the EMF.
    """

    middle_c: float
    coefficients_mv: tuple[float, ...]
    hump: tuple[float, float, float] | None

    def at(self, t: Array) -> tuple[Array, Array]:
        """Return the EMF in millivolts and its slope per °C, by Horner's rule."""
        distance = t - self.middle_c
        total, slope = np.full_like(distance, self.coefficients_mv[-1]), np.zeros_like(distance)
        for coefficient in self.coefficients_mv[-2::-1]:
            slope = slope * distance + total
            total = total * distance + coefficient
        if self.hump:
            a0, a1, a2 = self.hump
            bump = a0 * np.exp(a1 * (t - a2) ** 2)
            total, slope = total + bump, slope + 2.0 * a1 * (t - a2) * bump
        return total, slope

    def lifted(self, by_mv: float) -> Polynomial:
        """Return the piece raised by so many millivolts."""
        first, *others = self.coefficients_mv
        return Polynomial(self.middle_c, (first + by_mv, *others), self.hump)


@dataclass(frozen=True, slots=True, eq=False)
class Emf:
    """A type's reference function, with its reference junction at 0 °C.

    Args:
        polynomials: its pieces, ascending.
        joins_c: where one follows another.
        places_c: ascending places about a degree apart, over all that the type may be read.
        volts_there: the EMF at the places.
    """

    polynomials: tuple[Polynomial, ...]
    joins_c: Array
    places_c: Array
    volts_there: Array

    def volts(self, t: Array) -> Array:
        """Return the EMF at temperatures in °C."""
        return _volts_and_slope(self.polynomials, self.joins_c, t)[0]

    def celsius(self, volts: Array) -> Array:
        """Return the temperature of each EMF, which must be one of those between the places'.

        Newton's method from a chord between two places: where the function bends most, at -270 °C, the
        miss goes 0.04, 2e-4, 1e-8, 1e-16 °C.  All take the same steps, so that no root depends on
        its neighbours in the array.
        """
        t = np.interp(volts, self.volts_there, self.places_c)
        for _ in range(_NEWTON_STEPS):
            found_v, slope_v = _volts_and_slope(self.polynomials, self.joins_c, t)
            t = np.clip(t - (found_v - volts) / slope_v, self.places_c[0], self.places_c[-1])
        return t


@cache
def emf_of(letter: Letter) -> Emf:
    """Return the reference function of a type."""
    pieces = REFERENCE[letter]
    low, high = _FROM_C.get(letter, pieces[0].from_c), pieces[-1].to_c
    polynomials, joins_c = _joined(pieces), np.array([piece.from_c for piece in pieces[1:]])
    places_c = np.linspace(low, high, round(high - low) + 1)
    return Emf(polynomials, joins_c, places_c, _volts_and_slope(polynomials, joins_c, places_c)[0])


def _volts_and_slope(polynomials: tuple[Polynomial, ...], joins_c: Array, t: Array) -> tuple[Array, Array]:
    piece = np.searchsorted(joins_c, t)  # at 0 °C the lower piece, which is exactly nothing there
    volts, slope = np.empty(np.shape(t)), np.empty(np.shape(t))
    for i, polynomial in enumerate(polynomials):
        inside = piece == i
        volts[inside], slope[inside] = polynomial.at(t[inside])
    return volts * 1e-3, slope * 1e-3


def _joined(pieces: tuple[Piece, ...]) -> tuple[Polynomial, ...]:
    """Return the pieces, each lifted to where the one before ends if it would begin below that.

    By the last figure printed of their coefficients some begin up to 2.2 pV too low: then a few
    signals would stand at two temperatures.  A step up (of 75 pV at most, J at 760 °C) leaves no doubt.
    """
    made: list[Polynomial] = []
    for piece in pieces:
        fresh = _centred(piece)
        if made:
            join = np.array([piece.from_c])
            gap_mv = float((made[-1].at(join)[0] - fresh.at(join)[0])[0])
            fresh = fresh.lifted(max(gap_mv, 0.0))
        made.append(fresh)
    return tuple(made)


def _centred(piece: Piece) -> Polynomial:
    """Return a piece in powers of the distance from its middle, shifted in exact fractions."""
    # repr gives back the digits that were printed.
    shifted = [Fraction(repr(coefficient)) for coefficient in piece.coefficients]
    middle_c = (piece.from_c + piece.to_c) / 2
    middle, count = Fraction(middle_c), len(shifted)
    for first in range(count):
        for power in range(count - 2, first - 1, -1):
            shifted[power] += middle * shifted[power + 1]
    return Polynomial(middle_c, tuple(float(c) for c in shifted), piece.hump)


@dataclass(frozen=True, slots=True, eq=False)
class _Couple:
    """From the hot junction in °C to volts, with the reference junction giving ``cold_v``."""

    emf: Emf
    cold_v: float

    @property
    def domain(self) -> Span:
        return float(self.emf.places_c[0]), float(self.emf.places_c[-1])

    @property
    def image(self) -> Span:
        return float(self.emf.volts_there[0]) - self.cold_v, float(self.emf.volts_there[-1]) - self.cold_v

    def forward(self, x: Array) -> Array:
        return self.emf.volts(x) - self.cold_v

    def inverse(self, y: Array) -> Array:
        return self.emf.celsius(y + self.cold_v)
