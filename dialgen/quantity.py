"""Values with units, in and out: the only place where text becomes a number.

Electrical values come as text with a unit ("50 uA", "75 Ω", "4k7"), so that nobody has to guess
what a bare 50 meant.  The number and its SI prefix are read by quantiphy; what it would take
without complaint although it is wrong ("1,5 V" as 15 V, "4k7" as 4 of unit k7) is handled here.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from typing import NamedTuple

PREFIXES = {
    "p": 1e-12, "n": 1e-9, "u": 1e-6, "µ": 1e-6, "m": 1e-3,
    "k": 1e3, "M": 1e6, "G": 1e9, "T": 1e12,
}  # fmt: skip
"""SI prefixes in use on meters; SI Brochure, table 7."""

PREFIXED_UNITS = ("VA", "var", "Hz", "A", "V", "W", "Ω", "F", "S")
"""The face units before which a prefix is read; every other unit text is taken whole."""

_LONGEST = 64
_RKM = re.compile(r"^([+-]?\d*)([RkKMGT])(\d*)$")
_RKM_EXPONENTS = {"R": 0, "k": 3, "K": 3, "M": 6, "G": 9, "T": 12}
_NUMBER = re.compile(r"^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?(?![\d.])")
_SAME = str.maketrans({"\u2212": "-", "\u03bc": "µ", "\u2126": "Ω", "\u00a0": " ", "\u202f": " "})


class Amount(NamedTuple):
    """A number in an SI unit; ``unit`` is one of A, V, Ω, W, °C or m."""

    value: float
    unit: str


@dataclass(frozen=True, slots=True)
class Measure:
    """What a key holds: the units it may be written in, and an example to show.

    Used as the note of an annotated field, ``Annotated[float, OHM]``; the dial file's check is
    built from it.  ``least`` is the smallest value allowed, ``above`` one it must exceed.
    """

    name: str
    units: tuple[str, ...]
    example: str
    above: float | None = None
    least: float | None = None

    def read(self, text: object) -> Amount:
        """Return the amount that ``text`` states, in SI units.

        Raises:
            ValueError: not text, no unit, the wrong unit, a decimal comma, or out of bounds.

        >>> OHM.read("4k7")
        Amount(value=4700.0, unit='Ω')
        >>> AMPERE.read("50 µA").value
        5e-05
        """
        if isinstance(text, bool) or not isinstance(text, str):
            raise ValueError(f"a {self.name} needs its unit: {_shown(text)}; {self._hint(text)}")
        amount = self._parse(text)
        if self.above is not None and not amount.value > self.above:
            raise ValueError(f"{text!r} is not above {self.above:g}; write for example {self.example!r}")
        if self.least is not None and amount.value < self.least:
            raise ValueError(f"{text!r} is below {self.least:g}; write for example {self.example!r}")
        return amount

    def _parse(self, text: str) -> Amount:
        plain = text.translate(_SAME).strip()
        if len(plain) > _LONGEST:
            raise ValueError(f"a {self.name} of {len(plain)} characters; write for example {self.example!r}")
        if "," in plain:
            point = plain.replace(",", ".", 1)
            raise ValueError(f"{text!r} has a comma; the decimal sign is a point: {point!r}")
        coded = _RKM.match(plain)
        if coded and (coded[1].strip("+-") or coded[3]) and self._takes_rkm(coded[2]):
            return Amount(_rkm_value(*coded.groups()), self.units[0])
        if not _NUMBER.match(plain):
            raise ValueError(f"{text!r} is not a {self.name}; write for example {self.example!r}")
        value, unit = _split_quantity(plain)
        if unit not in self.units:
            wrong = f"is not in {' or '.join(self.units)}" if unit else "has no unit"
            raise ValueError(f"{text!r} {wrong}; write for example {self.example!r}")
        if not math.isfinite(value):
            raise ValueError(f"{text!r} is too large; write for example {self.example!r}")
        return Amount(value, unit)

    def _takes_rkm(self, letter: str) -> bool:
        return letter != "R" or "Ω" in self.units

    def _hint(self, given: object) -> str:
        if isinstance(given, (int, float)) and not isinstance(given, bool):
            unit = self.example.lstrip("0123456789. -")
            return f'write "{given:g} {unit}" if that is what is meant' if unit else f"write {self.example!r}"
        return f'write for example "{self.example}"'


AMPERE = Measure("current", ("A",), "1 mA", above=0.0)
VOLT = Measure("voltage", ("V",), "60 mV")
VOLT_ABOVE = Measure("voltage", ("V",), "1.5 V", above=0.0)
OHM = Measure("resistance", ("Ω",), "75 ohm", least=0.0)
OHM_ABOVE = Measure("resistance", ("Ω",), "75 ohm", above=0.0)
SIGNAL = Measure("signal", ("V", "A", "Ω", "W"), "12.28 mV")
SIGNAL_ABOVE = Measure("reference", ("V", "A", "Ω", "W"), "0.775 V", above=0.0)
ANY_CURRENT = Measure("current", ("A",), "0.25 mA")

_MILLIMETRES = {"mm": 1.0, "cm": 10.0, "m": 1000.0, "um": 1e-3, "µm": 1e-3, "in": 25.4}

_SPELLINGS = {
    "ohm": "Ω", "Ohm": "Ω", "ohms": "Ω", "Ohms": "Ω", "OHM": "Ω",
    "degC": "°C", "degF": "°F", "amp": "A", "volt": "V", "watt": "W",
}  # fmt: skip


def split_unit(written: str, units: tuple[str, ...] = PREFIXED_UNITS) -> tuple[float, str]:
    """Return the factor of the prefix in ``written`` and the unit behind it.

    A prefix is read only before one of ``units``; any other text is the unit, whole, with factor 1.

    >>> split_unit("kohm"), split_unit("Pa"), split_unit("mA")
    ((1000.0, 'Ω'), (1.0, 'Pa'), (0.001, 'A'))
    """
    plain = written.translate(_SAME)
    if (whole := _SPELLINGS.get(plain, plain)) in units:
        return 1.0, whole
    rest = _SPELLINGS.get(plain[1:], plain[1:])
    if plain[:1] in PREFIXES and rest in units:
        return PREFIXES[plain[0]], rest
    return 1.0, plain


def shown_unit(written: str) -> str:
    """Return a unit as it is printed on a face: signs for names ("kohm" is kΩ, "uA" is µA).

    >>> shown_unit("kohm"), shown_unit("uA"), shown_unit("pH")
    ('kΩ', 'µA', 'pH')
    """
    plain = written.translate(_SAME)
    _, unit = split_unit(plain)
    if unit not in PREFIXED_UNITS:
        return _SPELLINGS.get(plain, plain) if plain.startswith("deg") else plain
    prefix = plain[0] if plain[:1] in PREFIXES and _SPELLINGS.get(plain, plain) not in PREFIXED_UNITS else ""
    return ("µ" if prefix == "u" else prefix) + unit


def read_number(given: object, name: str) -> float:
    """Return a bare number as a finite float.

    Raises:
        ValueError: text, a truth value, not finite, or too large for a double.
    """
    if isinstance(given, bool) or not isinstance(given, (int, float)):
        hint = "write it bare, without quotes" if isinstance(given, str) else "write a bare number"
        raise ValueError(f"{name} is a number, not {_shown(given)}; {hint}")
    try:
        number = float(given)
    except OverflowError:
        raise ValueError(f"{name} is too large; write a smaller number") from None
    if not math.isfinite(number):
        raise ValueError(f"{name} must be finite, not {_shown(given)}; write a bare number")
    return number


def read_length(given: object, name: str, least: float = 0.0) -> float:
    """Return a length in millimetres, from a bare number of millimetres or text with a unit.

    Raises:
        ValueError: not a length, or not within ``least`` and 2000 mm.
    """
    number = _written_length(given, name) if isinstance(given, str) else read_number(given, name)
    if not least <= number <= 2000.0:
        raise ValueError(f"{name} of {number:g} mm is not within {least:g} and 2000 mm; write millimetres")
    return number


def plain_number(value: float) -> str:
    """Return ``value`` as it is lettered: no exponent, no trailing zeros, a true minus sign, ∞.

    >>> plain_number(-2.50), plain_number(1e6), plain_number(math.inf)
    ('−2.5', '1000000', '∞')
    """
    if math.isinf(value):
        return "−∞" if value < 0 else "∞"
    text = f"{value:.12g}"
    if "e" in text:
        text = f"{value:.30f}".rstrip("0").rstrip(".") if abs(value) < 1 else f"{value:.0f}"
    return text.replace("-", "−") if text != "-0" else "0"


def _rkm_value(whole: str, letter: str, fraction: str) -> float:
    return float(f"{whole}.{fraction or '0'}e{_RKM_EXPONENTS[letter]}")


def _split_quantity(plain: str) -> tuple[float, str]:
    # quantiphy moves the decimal point instead of multiplying, so "50 uA" is the double nearest
    # 5e-5.  It takes any word for a unit; which are right is for the caller to say.
    from quantiphy import QuantiPhyError, Quantity

    try:
        quantity = Quantity(plain)
    except QuantiPhyError:
        return 0.0, plain
    return quantity.real, _SPELLINGS.get(quantity.units, quantity.units)


def _written_length(text: str, name: str) -> float:
    # Not through quantiphy: it reads the m of "0.7 m" as milli.
    plain = text.translate(_SAME).strip()
    number = _NUMBER.match(plain)
    unit = plain[number.end() :].strip() if number else ""
    if number is None or unit not in _MILLIMETRES:
        raise ValueError(
            f"{name} is not a length: {_shown(text)}; write millimetres, or text such as '0.7 m'"
        )
    return float(number[0]) * _MILLIMETRES[unit]


def _shown(given: object) -> str:
    text = repr(given)
    return text if len(text) <= 40 else text[:37] + "..."
