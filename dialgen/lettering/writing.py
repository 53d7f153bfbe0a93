"""What is written before it is set: one code point for each sign, powers raised, fractions found."""

from __future__ import annotations

import re
import unicodedata

FRACTION_SLASH = "\N{FRACTION SLASH}"
NARROW_SPACES = "\N{THIN SPACE}\N{NARROW NO-BREAK SPACE}"
RAISED = "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻"
LOWERED = "₀₁₂₃₄₅₆₇₈₉₊₋"

FRACTION = re.compile(f"([0-9]+{FRACTION_SLASH}[0-9]+|[¼½¾⅐-⅞])")
"""Splits a text into what is no fraction and, at every odd place, what is one."""

_POWER = re.compile(r"\^([+\-−]?[0-9]+)(?![.,]?[0-9])")
_RAISE = str.maketrans("0123456789+-−", RAISED + "⁻")

# Signs that Unicode has twice and the fonts once.
_SAME = str.maketrans(
    {
        "\N{GREEK SMALL LETTER MU}": "\N{MICRO SIGN}",
        "\N{TILDE OPERATOR}": "~",
        "\N{DOT OPERATOR}": "\N{MIDDLE DOT}",
    }
)


def raised(text: str) -> str:
    """Return ``text`` with every power that is written with ``^`` in raised figures.

    A power is a whole number with or without a sign; anything else after ``^`` is left as it is.

    >>> raised("10^-6 m/s^2, 2^0.5")
    '10⁻⁶ m/s², 2^0.5'
    """
    return _POWER.sub(lambda found: found[1].translate(_RAISE), text)


def normalised(text: str) -> str:
    """Return ``text`` with one code point for each sign that has two, and accents joined.

    Composition turns the ohm sign U+2126 into the capital omega U+03A9; the Greek mu U+03BC becomes
    the micro sign U+00B5, which is the one Barlow has.
    """
    return unicodedata.normalize("NFC", text).translate(_SAME)


def spelt_out(fraction: str) -> str:
    """Return a fraction as figures about a slash, also where it is written as one character.

    >>> spelt_out("⅓"), spelt_out("3⁄16")
    ('1⁄3', '3⁄16')
    """
    return unicodedata.normalize("NFKC", fraction)
