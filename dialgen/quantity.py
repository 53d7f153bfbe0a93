"""Values with units, in and out: the only place where text becomes a number.

Electrical values come as text with a unit ("50 uA", "75 Ω", "4k7"), so that nobody has to guess
what a bare 50 meant.  Everything is read by hand and to the letter: the libraries probed for it
take "1,5 V" for 15 V and "4k7" for 4 of unit k7 without complaint.
"""

from __future__ import annotations

import json
import math
import re
from dataclasses import dataclass
from decimal import Decimal
from typing import NamedTuple

PREFIXES = {
    "p": 1e-12, "n": 1e-9, "u": 1e-6, "µ": 1e-6, "m": 1e-3,
    "k": 1e3, "M": 1e6, "G": 1e9, "T": 1e12,
}  # fmt: skip
"""SI prefixes in use on meters; SI Brochure, table 7."""

_POWERS = {"": 0} | {prefix: round(math.log10(factor)) for prefix, factor in PREFIXES.items()}

PREFIXED_UNITS = ("VA", "var", "Hz", "A", "V", "W", "Ω", "F", "S")
"""The face units before which a prefix is read; every other unit text is taken whole."""

_LONGEST = 64
_LONGEST_SHOWN = 40
_SMALLEST, _LARGEST = 1e-18, 1e18
# IEC 60062: the letter stands where the decimal point would; L is a thousandth (2016 edition).
_RKM = re.compile(r"([+-]?[0-9]*)([LRkKMGT])([0-9]*)")
_RKM_EXPONENTS = {"L": -3, "R": 0, "k": 3, "K": 3, "M": 6, "G": 9, "T": 12}
_OHMS_ALONE = "LR"
_NUMBER = re.compile(r"[+-]?(?:[0-9]+\.?[0-9]*|\.[0-9]+)(?:[eE][+-]?[0-9]{1,4})?(?![0-9.])")
_SAME = str.maketrans({"\u2212": "-", "\u03bc": "µ", "\u2126": "Ω", "\u00a0": " ", "\u202f": " "})


class Amount(NamedTuple):
    """A number in an SI unit; ``unit`` is one of A, V, Ω, W or °C."""

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
        plain = text.translate(_SAME).strip()
        if len(plain) > _LONGEST:
            raise ValueError(f"a {self.name} of {len(plain)} characters; {self._example()}")
        if "," in plain:
            raise ValueError(f"{shown(text)} has a comma; {_comma_mend(plain)}")
        coded = _RKM.fullmatch(plain)
        if coded and (coded[1].strip("+-") or coded[3]) and self._takes_rkm(coded[2]):
            return Amount(_rkm_value(*coded.groups()), self.units[0])
        if not (number := _NUMBER.match(plain)):
            raise ValueError(f"{shown(text)} is not a {self.name}; {self._example()}")
        prefix, unit = _split_prefix(plain[number.end() :].strip(), self.units)
        if unit not in self.units:
            raise ValueError(f"{shown(text)} {self._wrong_unit(number[0], unit)}")
        value = _scaled(number[0], prefix)
        if abs(value) > _LARGEST or (abs(value) < _SMALLEST and not _is_zero(number[0])):
            raise ValueError(f"{shown(text)} is beyond anything a meter has; {self._example()}")
        return _in_celsius(value, unit)

    def _takes_rkm(self, letter: str) -> bool:
        # The code has no unit, so the key must leave no choice of one.
        return self.units == ("Ω",) or (len(self.units) == 1 and letter not in _OHMS_ALONE)

    def _example(self) -> str:
        return f'write for example "{self.example}"'

    def _unit_wanted(self, given: object) -> str:
        if isinstance(given, bool) or not isinstance(given, (int, float)) or abs(given) > _LARGEST:
            return f"a {self.name} is text with its unit, not {shown(given)}; {self._example()}"
        example = f"{shown(given)} {self.example.split()[1]}"
        return f'a {self.name} needs its unit, {shown(given)} has none; write for example "{example}"'

    def _wrong_unit(self, number: str, written: str) -> str:
        if not written:
            return f"has no unit; {self._example()}"
        wrong = f"is not in {' or '.join(self.units)}"
        for unit in self.units:
            meant = written[: -len(unit)] + unit
            if meant.casefold() == written.casefold() and _split_prefix(meant, self.units)[1] == unit:
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
TEMPERATURE = Measure("temperature", ("°C", "°F", "K"), "25 degC", least=-273.15)
"""Read as degrees Celsius, whichever of the three it is written in."""

_MILLIMETRES = {"mm": 1.0, "cm": 10.0, "m": 1000.0, "um": 1e-3, "µm": 1e-3, "in": 25.4}

_SPELLINGS = {
    "ohm": "Ω", "Ohm": "Ω", "ohms": "Ω", "Ohms": "Ω", "OHM": "Ω",
    "degC": "°C", "degF": "°F", "℃": "°C", "℉": "°F",
}  # fmt: skip
_WORDS = {"amp": "A", "amps": "A", "volt": "V", "volts": "V", "watt": "W", "watts": "W"}


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
    return 1.0, _SPELLINGS.get(plain, plain)


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


def plain_number(value: float) -> str:
    """Return ``value`` as it is lettered: no exponent, no trailing zeros, a true minus sign, ∞.

    >>> plain_number(-2.50), plain_number(1e6), plain_number(math.inf)
    ('−2.5', '1000000', '∞')
    """
    if math.isinf(value):
        return "−∞" if value < 0 else "∞"
    text = f"{Decimal(f'{value:.12g}'):f}"
    return text.replace("-", "−") if text != "-0" else "0"


def shown(given: object) -> str:
    """Return a value as it stands in a dial file, cut short, for messages.

    >>> shown("1,5 V"), shown(True), shown([1, [2, 3]]), shown({})
    ('"1,5 V"', 'true', '[1, [...]]', 'a table')
    """
    match given:
        case bool():
            text = str(given).lower()
        case str():
            text = json.dumps(given, ensure_ascii=False)
        case float():
            text = f"{given:.12g}"
        case list() | tuple():
            text = f"[{', '.join('[...]' if isinstance(g, list) else shown(g) for g in given[:9])}]"
        case dict():
            text = "a table"
        case int() if abs(given) >= 10**15:
            text = "a number of very many digits"
        case _:
            text = str(given)
    return text if len(text) <= _LONGEST_SHOWN else text[: _LONGEST_SHOWN - 3] + "..."


def _rkm_value(whole: str, letter: str, fraction: str) -> float:
    return float(f"{whole}.{fraction or '0'}e{_RKM_EXPONENTS[letter]}")


def _split_prefix(written: str, units: tuple[str, ...]) -> tuple[str, str]:
    words = {**_SPELLINGS, **_WORDS}
    if (whole := words.get(written, written)) in units:
        return "", whole
    unit = words.get(written[1:], written[1:])
    if written[:1] in (*PREFIXES, "K") and unit in units and unit in PREFIXED_UNITS:
        return written[0].replace("K", "k"), unit
    return "", written


def _scaled(number: str, prefix: str) -> float:
    # The decimal point is moved instead of multiplying, so "50 uA" is the double nearest 5e-5.
    mantissa, _, exponent = number.lower().partition("e")
    return float(f"{mantissa}e{int(exponent or 0) + _POWERS[prefix]}")


def _is_zero(number: str) -> bool:
    return not re.search("[1-9]", re.split("[eE]", number)[0])


def _in_celsius(value: float, unit: str) -> Amount:
    match unit:
        case "°F":
            return Amount((value - 32) / 1.8, "°C")
        case "K":
            return Amount(value - 273.15, "°C")
    return Amount(value, unit)


def _comma_mend(plain: str) -> str:
    if plain.count(",") > 1 or "." in plain:
        return "leave it out; the decimal sign is a point, and thousands are not parted"
    point = plain.replace(",", ".")
    if re.search("[0-9],[0-9]{3}(?![0-9])", plain):
        return f'the decimal sign is a point: write "{point}", or "{plain.replace(",", "")}" for thousands'
    return f'the decimal sign is a point: write "{point}"'


def _written_length(text: str, name: str) -> float:
    plain = text.translate(_SAME).strip()
    if "," in plain and len(plain) <= _LONGEST:
        raise ValueError(f"{shown(text)} has a comma; {_comma_mend(plain)}")
    number = _NUMBER.match(plain)
    unit = plain[number.end() :].strip() if number else ""
    if number is None or unit not in _MILLIMETRES:
        raise ValueError(f'{shown(text)} is not a length; write millimetres, or text such as "0.7 m"')
    return float(number[0]) * _MILLIMETRES[unit]
