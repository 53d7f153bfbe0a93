"""Colours by name or by their parts, and how well one is seen on another."""

from __future__ import annotations

import re
from collections.abc import Mapping
from types import MappingProxyType

from dialgen.errors import InputError

COLOURS: Mapping[str, str] = MappingProxyType(
    {
        "black": "#000000",
        "white": "#ffffff",
        "grey": "#808080",
        "red": "#c8201e",
        "orange": "#e07b00",
        "amber": "#f2b705",
        "yellow": "#f6d32d",
        "green": "#2e8b3d",
        "blue": "#1f5fae",
        "brown": "#6b3f1d",
        "ivory": "#f6efdc",
    }
)
"""Names for the inks and grounds of a plate, chosen so that marks stay readable on the bright ones."""

_HEX = re.compile(r"#[0-9a-fA-F]{6}")


def colour(text: str) -> str:
    """Return a colour as ``#rrggbb``, from a name or from itself.

    Raises:
        InputError: neither.

    >>> colour("red"), colour("#C8201E")
    ('#c8201e', '#c8201e')
    """
    found = COLOURS.get(text)
    if found is None and not _HEX.fullmatch(text):
        raise InputError(f'"{text}" is no colour; write #rrggbb or one of {", ".join(COLOURS)}')
    return found or text.lower()


def contrast(one: str, other: str) -> float:
    """Return the contrast ratio of two colours, 1 (none) to 21 (black on white).

    After the definitions of relative luminance and contrast ratio in WCAG 2.1.

    >>> round(contrast("#000000", "#ffffff"), 6), contrast("#808080", "#808080")
    (21.0, 1.0)
    """
    lights = sorted((_luminance(one), _luminance(other)))
    return (lights[1] + 0.05) / (lights[0] + 0.05)


def _luminance(hexed: str) -> float:
    red, green, blue = (_linear(int(hexed[i : i + 2], 16) / 255) for i in (1, 3, 5))
    return 0.2126 * red + 0.7152 * green + 0.0722 * blue


def _linear(part: float) -> float:
    return part / 12.92 if part <= 0.03928 else ((part + 0.055) / 1.055) ** 2.4
