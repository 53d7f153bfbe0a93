"""Thermistors, by whichever figures their data sheet or the bench gives."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Annotated, ClassVar

from dialgen.errors import InputError
from dialgen.geometry.points import CALIBRATION
from dialgen.geometry.steinhart_hart import (
    HOTTEST_C,
    FallingResistance,
    SteinhartHart,
    by_beta,
    falling_resistance,
    through_points,
)
from dialgen.geometry.temperature import on_face
from dialgen.quantity import OHM_ABOVE, Amount, Number
from dialgen.stage import Span, Stage

BETA = Number("beta in kelvin", 1.0, 1e6)
COEFFICIENT = Number("a coefficient of Steinhart and Hart", -1.0, 1.0)

_POINTS = 3
_EXAMPLES = {
    "r25": 'r25 = "10 kohm"', "beta": "beta = 3950", "a": "a = 1.129148e-3", "b": "b = 2.34125e-4",
    "c": "c = 8.76741e-8", "points": 'points = [["0 degC", "32.65 kohm"], ["25 degC", ...], ...]',
}  # fmt: skip
_CHOICE = "r25 and beta, or a, b and c, or three points"


@dataclass(frozen=True, slots=True, kw_only=True)
class Thermistor:
    """The resistance of an NTC thermistor: by r25 and beta, by a, b and c, or through three points."""

    kind: ClassVar[str] = "thermistor"
    r25: Annotated[Amount | None, OHM_ABOVE] = None
    beta: Annotated[float | None, BETA] = None
    a: Annotated[float | None, COEFFICIENT] = None
    b: Annotated[float | None, COEFFICIENT] = None
    c: Annotated[float | None, COEFFICIENT] = None
    points: Annotated[tuple[tuple[Amount, Amount], ...] | None, CALIBRATION] = None

    def __post_init__(self) -> None:
        self._resistance()

    @property
    def takes_face_values(self) -> bool:
        """Always: a unit of temperature has no prefix."""
        return True

    def signal_unit(self, unit: str) -> str | None:
        """Return ohms."""
        return "Ω"

    def stage(self, span: Span, unit: str) -> Stage:
        """Return the thermistor as far as its resistance falls, up to 1000 °C.

        Raises:
            InputError: the unit is none of temperature, or the scale leaves that range.
        """
        return on_face(self._resistance(), span, unit, "this thermistor")

    def zero(self, span: Span, unit: str) -> float | None:
        """Return None: at no temperature is there no resistance."""
        return None

    def equation(self) -> SteinhartHart:
        """Return Steinhart and Hart's equation, however its figures are given.

        Raises:
            InputError: none of the three ways is given, or several, or one in part; or no such
                equation goes through the points.
        """
        given = self._given()
        used = [way for way in _WAYS if any(key in given for key in way)]
        if not used:
            raise InputError(f"a thermistor needs figures for its law; give {_CHOICE}")
        if len(used) > 1:
            raise InputError(
                f"{_listed(given)} are figures of {len(used)} laws; keep {_CHOICE}",
                *((key,) for way in used[::-1] for key in way if key in given),
            )
        if absent := [key for key in used[0] if key not in given]:
            raise InputError(
                f"no law follows from {_listed(given)} without {_listed(absent)}; "
                f"add {_listed([_EXAMPLES[key] for key in absent])}",
                (given[0],),
            )
        return _WAYS[used[0]](self)

    def _given(self) -> list[str]:
        return [key for key in _EXAMPLES if getattr(self, key) is not None]

    def _resistance(self) -> FallingResistance:
        found = falling_resistance(self.equation())
        if found is None:
            raise InputError(
                f"with these figures the resistance falls at no temperature up to {HOTTEST_C:g} °C; "
                f"check signs and powers of ten, such as {_listed([_EXAMPLES[key] for key in 'abc'])}",
                (self._given()[0],),
            )
        return found


def _of_beta(law: Thermistor) -> SteinhartHart:
    assert law.r25 is not None
    assert law.beta is not None
    return by_beta(law.r25.value, law.beta)


def _of_coefficients(law: Thermistor) -> SteinhartHart:
    assert law.a is not None
    assert law.b is not None
    assert law.c is not None
    return SteinhartHart(law.a, law.b, law.c)


def _of_points(law: Thermistor) -> SteinhartHart:
    points = sorted(law.points or ())
    if len(points) != _POINTS:
        raise InputError(
            f"a thermistor's law goes through three points, not {len(points)}; "
            f"give three, or a table for more",
            ("points",),
        )
    kelvins, ohms = ([amount.value for amount in column] for column in zip(*points, strict=True))
    if not (kelvins[0] < kelvins[1] < kelvins[2] and ohms[0] > ohms[1] > ohms[2]):
        raise InputError(
            "the resistance does not fall from point to point as it warms; check the points", ("points",)
        )
    equation = through_points(kelvins, ohms)
    if equation is None:
        raise InputError(
            "no curve of Steinhart and Hart that falls throughout goes through these points; "
            "check them, or give r25 and beta",
            ("points",),
        )
    return equation


def _listed(words: list[str]) -> str:
    return " and ".join([", ".join(words[:-1]), words[-1]] if len(words) > 1 else words)


_WAYS: dict[tuple[str, ...], Callable[[Thermistor], SteinhartHart]] = {
    ("r25", "beta"): _of_beta,
    ("a", "b", "c"): _of_coefficients,
    ("points",): _of_points,
}
"""The keys of each way to give the law, and what makes the equation of them."""
