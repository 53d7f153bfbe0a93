"""Wire gauges: the American one, by its law."""

from __future__ import annotations

import re

FINEST, THICKEST = 50, -3


def awg_diameter_mm(gauge: int) -> float:
    """Return the diameter of a gauge of ASTM B258; 0, -1, -2 and -3 stand for 1/0 to 4/0.

    The law is 0.005 in at gauge 36, and 39 equal ratios from there up to 0.46 in at gauge 4/0.

    Raises:
        ValueError: there is no such gauge.

    >>> awg_diameter_mm(36), round(awg_diameter_mm(24), 4), round(awg_diameter_mm(-3), 3)
    (0.127, 0.5106, 11.684)
    """
    if not THICKEST <= gauge <= FINEST:
        raise ValueError(f"AWG has no gauge {gauge}; it runs from 4/0 (11.7 mm) to {FINEST} (0.025 mm)")
    return float(0.127 * 92.0 ** ((36 - gauge) / 39))


def read_gauge(text: str) -> int:
    """Return the gauge that is written as a number, as 2/0 or as 00.

    Raises:
        ValueError: it is none of these.

    >>> read_gauge("24"), read_gauge("0"), read_gauge("2/0"), read_gauge("0000")
    (24, 0, -1, -3)
    """
    if aughts := re.fullmatch(r"([1-4])/0", text):
        return 1 - int(aughts[1])
    if re.fullmatch(r"0{1,4}", text):
        return 1 - len(text)
    if re.fullmatch(r"[1-9][0-9]?", text) and int(text) <= FINEST:
        return int(text)
    raise ValueError(f'AWG has no gauge {text}; write "AWG 24", from 4/0 to {FINEST}')


def gauge_name(gauge: int) -> str:
    """Return a gauge as it is written.

    >>> gauge_name(24), gauge_name(0), gauge_name(-3)
    ('AWG 24', 'AWG 1/0', 'AWG 4/0')
    """
    return f"AWG {gauge}" if gauge > 0 else f"AWG {1 - gauge}/0"
