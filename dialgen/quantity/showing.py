"""Numbers and values as they are printed, on a face and in a message."""

from __future__ import annotations

import json
import math
from decimal import Decimal

_LONGEST_SHOWN = 40
_BY_THOUSANDS = {-4: "p", -3: "n", -2: "µ", -1: "m", 0: "", 1: "k", 2: "M", 3: "G"}


def plain_number(value: float) -> str:
    """Return ``value`` as it is lettered: no exponent, no trailing zeros, a true minus sign, ∞.

    >>> plain_number(-2.50), plain_number(1e6), plain_number(math.inf)
    ('−2.5', '1000000', '∞')
    """
    if math.isinf(value):
        return "−∞" if value < 0 else "∞"
    text = f"{Decimal(f'{value:.12g}'):f}"
    return text.replace("-", "−") if text != "-0" else "0"


def in_figures(value: float, figures: int = 2) -> str:
    """Return a number of so many figures, as `plain_number` writes it.

    >>> in_figures(0.012345), in_figures(74.6), in_figures(1234.5, 3)
    ('0.012', '75', '1230')
    """
    return plain_number(float(f"{value:.{figures}g}"))


def engineered(value: float, unit: str, digits: int = 5) -> str:
    """Return an amount with the SI prefix that leaves one to three figures before the point.

    >>> engineered(0.001875046876, "Ω"), engineered(40.0, "A"), engineered(0.0, "W")
    ('1.875 mΩ', '40 A', '0 W')
    """
    if not value or not math.isfinite(value):
        return f"{plain_number(value)} {unit}"
    rounded = float(f"{value:.{digits}g}")
    power = min(max(math.floor(math.log10(abs(rounded)) / 3 + 1e-12), min(_BY_THOUSANDS)), max(_BY_THOUSANDS))
    mantissa = float(f"{rounded:.{digits}g}") / 10.0 ** (3 * power)
    return f"{in_figures(mantissa, digits)} {_BY_THOUSANDS[power]}{unit}"


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
