"""Temperatures in the units that people use, read as kelvin.

A temperature has no prefix, and K is kelvin here, not the k of a sloppily written "4K7".
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from fractions import Fraction

from dialgen.quantity.reading import Amount, Measure
from dialgen.quantity.showing import shown

ZERO_CELSIUS_K = 273.15
"""The ice point of the Celsius scale in kelvin, exact by definition (SI Brochure, 9th edition)."""

_KELVIN = {
    "°C": (Fraction("273.15"), Fraction(1)),
    "°F": (Fraction("459.67"), Fraction(5, 9)),
    "K": (Fraction(0), Fraction(1)),
}
"""(written + first)·second is the temperature in kelvin; exact by definition."""

_WORDS = {"degC": "°C", "℃": "°C", "degF": "°F", "℉": "°F", "\u212a": "K", "kelvin": "K"}
_MEANT = {
    "c": "degC", "celsius": "degC", "centigrade": "degC", "f": "degF", "fahrenheit": "degF", "k": "K",
    "kelvin": "K", "kelvins": "K",
}  # fmt: skip
_DEGREE = re.compile(r"[°º\s]|deg(rees?)?\.?")
_COLDEST_K, _HOTTEST_K = Fraction(1, 10**9), 100_000


@dataclass(frozen=True, slots=True)
class _Temperature(Measure):
    """A temperature; what is read is in kelvin, the double nearest to what is written."""

    def _parse(self, text: str) -> Amount:
        number, written = self._parted(self._plain(text), text)
        unit = _WORDS.get(written, written)
        if unit not in _KELVIN:
            raise ValueError(f"{shown(text)} {self._no_degree(number, written)}")
        shift, size = _KELVIN[unit]
        kelvin = (Fraction(number) + shift) * size
        if kelvin < _COLDEST_K:
            raise ValueError(f"{shown(text)} is not above absolute zero; {self._example()}")
        if kelvin > _HOTTEST_K:
            raise ValueError(f"{shown(text)} is hotter than anything a meter shows; {self._example()}")
        return Amount(float(kelvin), "K")

    def _no_degree(self, number: str, written: str) -> str:
        if not written:
            return f"has no unit; {self._example()}"
        meant = meant_degree(written)
        mend = f'did you mean "{number} {meant}"?' if meant else self._example()
        return f"is not in °C, °F or K; {mend}"


TEMPERATURE = _Temperature("temperature", ("°C", "°F", "K"), "25 degC")


def meant_degree(written: str) -> str | None:
    """Return the unit of temperature that a text most likely means, as a file spells it, or None.

    >>> meant_degree("C"), meant_degree("deg F"), meant_degree("°K"), meant_degree("kohm")
    ('degC', 'degF', 'K', None)
    """
    return _MEANT.get(_DEGREE.sub("", written.casefold()))
