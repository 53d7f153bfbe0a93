"""Quantities, lengths and bare numbers from what people write."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from typing import NamedTuple

from dialgen.quantity.showing import shown
from dialgen.quantity.units import PREFIXES, WORDS, plain_text, prefix_and_unit

_POWERS = {"": 0} | {prefix: round(math.log10(factor)) for prefix, factor in PREFIXES.items()}
_LONGEST = 64
_SMALLEST, _LARGEST = 1e-18, 1e18
# IEC 60062: the letter stands where the decimal point would; L is a thousandth (2016 edition).
_RKM = re.compile(r"([+-]?[0-9]*)([LRkKMGT])([0-9]*)")
_RKM_EXPONENTS = {"L": -3, "R": 0, "k": 3, "K": 3, "M": 6, "G": 9, "T": 12}
_OHMS_ALONE = "LR"
_NUMBER = re.compile(r"[+-]?(?:[0-9]+\.?[0-9]*|\.[0-9]+)(?:[eE][+-]?[0-9]{1,4})?(?![0-9.])")


class Amount(NamedTuple):
    """A number in an SI unit; ``unit`` is one of A, V, Ω, W or K."""

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
        if not isinstance(text, str):
            raise ValueError(self._unit_wanted(text))
        amount = self._parse(text)
        if self.above is not None and not amount.value > self.above:
            raise ValueError(f"{shown(text)} is not above {self.above:g}; {self._example()}")
        if self.least is not None and amount.value < self.least:
            raise ValueError(f"{shown(text)} is below {self.least:g}; {self._example()}")
        return amount

    def _parse(self, text: str) -> Amount:
        plain = self._plain(text)
        coded = _RKM.fullmatch(plain)
        if coded and (coded[1].strip("+-") or coded[3]) and self._takes_rkm(coded[2]):
            return Amount(_rkm_value(*coded.groups()), self.units[0])
        number, written = self._parted(plain, text)
        prefix, unit = prefix_and_unit(written, self.units, WORDS)
        if unit not in self.units:
            raise ValueError(f"{shown(text)} {self._wrong_unit(number, unit)}")
        value = _scaled(number, prefix)
        if abs(value) > _LARGEST or (abs(value) < _SMALLEST and not _is_zero(number)):
            raise ValueError(f"{shown(text)} is beyond anything a meter has; {self._example()}")
        return Amount(value, unit)

    def _plain(self, text: str) -> str:
        """Return the text with one character for each meaning, and no decimal comma."""
        plain = plain_text(text).strip()
        if len(plain) > _LONGEST:
            raise ValueError(f"a {self.name} of {len(plain)} characters; {self._example()}")
        if "," in plain:
            raise ValueError(f"{shown(text)} has a comma; {_comma_mend(plain)}")
        return plain

    def _parted(self, plain: str, text: str) -> tuple[str, str]:
        """Return the number in front, and what is written behind it."""
        if not (number := _NUMBER.match(plain)):
            raise ValueError(f"{shown(text)} is not a {self.name}; {self._example()}")
        return number[0], plain[number.end() :].strip()

    def _takes_rkm(self, letter: str) -> bool:
        # The code has no unit, so the key must leave no choice of one.
        return self.units == ("Ω",) or (len(self.units) == 1 and letter not in _OHMS_ALONE)

    def _example(self) -> str:
        return f'write for example "{self.example}"'

    def _unit_wanted(self, given: object) -> str:
        # Not a number is not within the largest either.
        if isinstance(given, bool) or not isinstance(given, (int, float)) or not abs(given) <= _LARGEST:
            return f"a {self.name} is text with its unit, not {shown(given)}; {self._example()}"
        example = f"{shown(given)} {self.example.split()[1]}"
        return f'a {self.name} needs its unit, {shown(given)} has none; write for example "{example}"'

    def _wrong_unit(self, number: str, written: str) -> str:
        if not written:
            return f"has no unit; {self._example()}"
        wrong = f"is not in {' or '.join(self.units)}"
        for unit in self.units:
            meant = written[: -len(unit)] + unit
            read = prefix_and_unit(meant, self.units, WORDS)[1]
            if meant.casefold() == written.casefold() and read == unit:
                return f'{wrong}, capitals count; did you mean "{number} {meant}"?'
        return f"{wrong}; {self._example()}"


AMPERE = Measure("current", ("A",), "1 mA", above=0.0)
VOLT = Measure("voltage", ("V",), "60 mV")
VOLT_ABOVE = Measure("voltage", ("V",), "1.5 V", above=0.0)
OHM = Measure("resistance", ("Ω",), "75 ohm", least=0.0)
OHM_ABOVE = Measure("resistance", ("Ω",), "75 ohm", above=0.0)
SIGNAL = Measure("signal", ("V", "A", "Ω", "W"), "12.28 mV")
SIGNAL_ABOVE = Measure("reference", ("V", "A", "Ω", "W"), "0.775 V", above=0.0)
ANY_CURRENT = Measure("current", ("A",), "0.25 mA")

_MILLIMETRES = {"mm": 1.0, "cm": 10.0, "m": 1000.0, "um": 1e-3, "µm": 1e-3, "in": 25.4}


def bare_number(text: str) -> float | None:
    """Return the number that ``text`` is, or None where it is anything else.

    >>> bare_number("\u22122.5"), bare_number("2,5"), bare_number("2.5 mA")
    (-2.5, None, None)
    """
    plain = plain_text(text).strip()
    return float(plain) if _NUMBER.fullmatch(plain) else None


def read_number(given: object, name: str) -> float:
    """Return a bare number as a finite float.

    Raises:
        ValueError: text, a truth value, not finite, or too large for a double.
    """
    if isinstance(given, bool) or not isinstance(given, (int, float)):
        hint = "write it bare, without quotes" if isinstance(given, str) else "write a bare number"
        raise ValueError(f"{name} is a number, not {shown(given)}; {hint}")
    try:
        number = float(given)
    except OverflowError:
        raise ValueError(f"{name} is too large; write a smaller number") from None
    if not math.isfinite(number):
        raise ValueError(f"{name} must be finite, not {shown(given)}; write a bare number")
    return number


def read_length(given: object, name: str, least: float = 0.0) -> float:
    """Return a length in millimetres, from a bare number of millimetres or text with a unit.

    Raises:
        ValueError: not a length, or not within ``least`` and 2000 mm.
    """
    number = _written_length(given, name) if isinstance(given, str) else read_number(given, name)
    if not least <= number <= 2000.0:
        raise ValueError(f"{name} of {number:g} mm is not from {least:g} to 2000 mm; write millimetres")
    return number


def _rkm_value(whole: str, letter: str, fraction: str) -> float:
    return float(f"{whole}.{fraction or '0'}e{_RKM_EXPONENTS[letter]}")


def _scaled(number: str, prefix: str) -> float:
    # The decimal point is moved instead of multiplying, so "50 uA" is the double nearest 5e-5.
    mantissa, _, exponent = number.lower().partition("e")
    return float(f"{mantissa}e{int(exponent or 0) + _POWERS[prefix]}")


def _is_zero(number: str) -> bool:
    return not re.search("[1-9]", re.split("[eE]", number)[0])


def _comma_mend(plain: str) -> str:
    if plain.count(",") > 1 or "." in plain:
        return "leave it out; the decimal sign is a point, and thousands are not parted"
    point = plain.replace(",", ".")
    if re.search("[0-9],[0-9]{3}(?![0-9])", plain):
        return f'the decimal sign is a point: write "{point}", or "{plain.replace(",", "")}" for thousands'
    return f'the decimal sign is a point: write "{point}"'


def _written_length(text: str, name: str) -> float:
    plain = plain_text(text).strip()
    if "," in plain and len(plain) <= _LONGEST:
        raise ValueError(f"{shown(text)} has a comma; {_comma_mend(plain)}")
    number = _NUMBER.match(plain)
    unit = plain[number.end() :].strip() if number else ""
    if number is None or unit not in _MILLIMETRES:
        raise ValueError(f'{shown(text)} is not a length; write millimetres, or text such as "0.7 m"')
    return float(number[0]) * _MILLIMETRES[unit]
