"""The spellings of signs, prefixes and units."""

from __future__ import annotations

import math
from collections.abc import Mapping

PREFIXES = {
    "p": 1e-12, "n": 1e-9, "u": 1e-6, "µ": 1e-6, "m": 1e-3,
    "k": 1e3, "M": 1e6, "G": 1e9, "T": 1e12,
}  # fmt: skip
"""SI prefixes in use on meters; SI Brochure, table 7."""

PREFIXED_UNITS = ("VA", "var", "Hz", "A", "V", "W", "Ω", "F", "S")
"""The face units before which a prefix is read; every other unit text is taken whole."""

_LONG, _SHORTEST = 1e4, 0.01
_POWER_OF = {"": 0} | {prefix: round(math.log10(factor)) for prefix, factor in PREFIXES.items()}
_FOLDED = {-9: "n", -6: "µ", -3: "m", 0: "", 3: "k", 6: "M", 9: "G"}

_SAME = str.maketrans({"\u2212": "-", "\u03bc": "µ", "\u2126": "Ω", "\u00a0": " ", "\u202f": " "})
_SIGNS = {"ohm": "Ω", "degC": "°C", "degF": "°F", "℃": "°C", "℉": "°F"}
WORDS = _SIGNS | {
    "Ohm": "Ω", "ohms": "Ω", "Ohms": "Ω", "OHM": "Ω", "amp": "A", "amps": "A", "volt": "V", "volts": "V",
    "watt": "W", "watts": "W", "K": "k",
}  # fmt: skip
"""What may be written for a unit or prefix in a quantity; on a face only names of signs are read."""


def plain_text(text: str) -> str:
    """Return ``text`` with one character for each meaning: one minus, one µ, one Ω, one space.

    >>> plain_text("\u22125 k\u2126")
    '-5 kΩ'
    """
    return text.translate(_SAME)


def prefix_and_unit(
    written: str, units: tuple[str, ...] = PREFIXED_UNITS, words: Mapping[str, str] = _SIGNS
) -> tuple[str, str]:
    """Return the SI prefix in ``written`` and the unit behind it, in its own sign.

    A prefix is read only before one of ``units``; any other text is the unit, whole.

    Args:
        written: the text.
        units: the units that a prefix may stand before.
        words: what is read as another unit or prefix, each with what it stands for.

    >>> prefix_and_unit("kohm"), prefix_and_unit("Pa"), prefix_and_unit("Kohms", words=WORDS)
    (('k', 'Ω'), ('', 'Pa'), ('k', 'Ω'))
    """
    plain = plain_text(written)
    whole = words.get(plain, plain)
    prefix, unit = (words.get(part, part) for part in (plain[:1], plain[1:]))
    if whole not in units and prefix in PREFIXES and unit in units:
        return prefix, unit
    return "", whole


def split_unit(written: str) -> tuple[float, str]:
    """Return the factor of the prefix in a scale's unit, and the unit behind it.

    >>> split_unit("kohm"), split_unit("Pa"), split_unit("mA")
    ((1000.0, 'Ω'), (1.0, 'Pa'), (0.001, 'A'))
    """
    prefix, unit = prefix_and_unit(written)
    return PREFIXES.get(prefix, 1.0), unit


def shown_unit(written: str) -> str:
    """Return a unit as it is printed on a face: signs for names ("kohm" is kΩ, "uA" is µA).

    >>> shown_unit("kohm"), shown_unit("uA"), shown_unit("pH")
    ('kΩ', 'µA', 'pH')
    """
    prefix, unit = prefix_and_unit(written)
    return prefix.replace("u", "µ") + unit


def folded_unit(written: str, largest: float) -> tuple[float, str]:
    """Return what values are multiplied by, and the unit as printed, so that numerals stay short.

    Only where the largest value has five digits or more, or is below a hundredth, and the unit takes
    an SI prefix; else the factor is 1.

    >>> folded_unit("Ω", 50_000.0), folded_unit("mA", 0.005), folded_unit("rpm", 30_000.0)
    ((0.001, 'kΩ'), (1000.0, 'µA'), (1.0, 'rpm'))
    """
    prefix, unit = prefix_and_unit(written)
    if unit not in PREFIXED_UNITS or _SHORTEST <= largest < _LONG or not largest:
        return 1.0, shown_unit(written)
    # Whole powers, so that factors come out exact.
    own = _POWER_OF[prefix]
    power = 3 * ((math.floor(math.log10(largest) + 1e-9) + own) // 3)
    power = min(max(power, min(_FOLDED)), max(_FOLDED))
    shift = own - power
    return (10.0**shift if shift >= 0 else 1 / 10.0**-shift), _FOLDED[power] + unit
