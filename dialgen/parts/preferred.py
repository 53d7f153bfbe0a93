"""The values that resistors are made in: the E series of IEC 60063."""

from __future__ import annotations

import math
from bisect import bisect_right
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache

from dialgen.errors import InputError

_E24 = (10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91)
"""Two figures; eight of them (27 to 47, and 82) are older than the rule of the finer series."""


LEAST_BOUGHT_OHM = 1.0
"""Below about an ohm a part is a few turns of wire or a strip, wound or filed to its value, and not bought
from a series (common practice)."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Series:
    """One E series.

    Args:
        name: "E24".
        tolerance_percent: the tolerance it is made for, either way.
        values: the values of one decade as whole numbers of three figures, 100 to below 1000.
    """

    name: str
    tolerance_percent: float
    values: tuple[int, ...]


def _ruled(count: int) -> tuple[int, ...]:
    """Return 100·10^(i/count) to three figures; IEC 60063 has 920 where the rule has 919."""
    rounded = (round(100 * 10 ** (i / count)) for i in range(count))
    return tuple(920 if value == 919 else value for value in rounded)


def _coarse(count: int) -> tuple[int, ...]:
    return tuple(10 * value for value in _E24[:: len(_E24) // count])


SERIES: Mapping[str, Series] = {
    f"E{count}": Series(name=f"E{count}", tolerance_percent=tolerance, values=values)
    for count, tolerance, values in (
        (6, 20.0, _coarse(6)),
        (12, 10.0, _coarse(12)),
        (24, 5.0, _coarse(24)),
        (48, 2.0, _ruled(48)),
        (96, 1.0, _ruled(96)),
        (192, 0.5, _ruled(192)),
    )
}
"""The series from the coarsest to the finest, by name."""


def series_named(name: str) -> Series:
    """Return the series of that name.

    Raises:
        InputError: there is none.
    """
    if name not in SERIES:
        raise InputError(f"{name} is not a series of IEC 60063 here; write one of {', '.join(SERIES)}")
    return SERIES[name]


def nearest(ohms: float, series: str) -> float:
    """Return the value of a series that is nearest by ratio, in any decade.

    By ratio a value that is too large by a factor counts like one too small by the same, whether the
    part is a shunt or a multiplier.  Midway between two, the smaller is taken.

    Args:
        ohms: what is wanted.
        series: "E6" to "E192".

    Raises:
        InputError: there is no such series, or ohms is not a finite value above nothing.

    >>> nearest(9500.0, "E24"), nearest(0.001875046876, "E12")
    (9100.0, 0.0018)
    """
    below, above = neighbours(ohms, series)
    return above if ohms / below > above / ohms else below


def neighbours(ohms: float, series: str) -> tuple[float, float]:
    """Return the last value of a series not above ``ohms`` and the next one; raises as `nearest` does.

    >>> neighbours(9500.0, "E24")
    (9100.0, 10000.0)
    """
    if not 0 < ohms < math.inf:
        raise InputError(f"no resistor has {ohms:g} Ω; ask for a finite value above nothing")
    scale = _about(series_named(series), math.floor(math.log10(ohms)))
    at = bisect_right(scale, ohms)
    return scale[at - 1], scale[at]


@cache
def _about(series: Series, decade: int) -> tuple[float, ...]:
    """Return a decade's values, with those on both sides, as a logarithm may round either way."""
    powers = range(decade - 3, decade + 1)
    return tuple(_decimal(value, power) for power in powers for value in series.values)


def _decimal(figures: int, power: int) -> float:
    """Return figures·10^power as the double nearest to it: 4700.0, never 4699.999..."""
    return float(f"{figures}e{power}")
