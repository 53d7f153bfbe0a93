"""Several ranges of one instrument, and the one among them that a scale shows."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

from dialgen.errors import InputError
from dialgen.quantity import Amount, Listed, Measure, engineered

MOST_RANGES = 40
_EQUAL = 1e-9

_CURRENT = Measure("range", ("A",), "5 A", above=0.0)
_VOLTAGE = Measure("range", ("V",), "50 V", above=0.0)
AMPERE_RANGES = Listed(_CURRENT.read, 1, MOST_RANGES, '["1 A", "5 A", "10 A"]')
VOLT_RANGES = Listed(_VOLTAGE.read, 1, MOST_RANGES, '["10 V", "50 V", "250 V"]')


def check_ranges(ranges: Sequence[Amount]) -> None:
    """Refuse ranges that neither rise nor fall from the first to the last.

    Raises:
        InputError: naming the two that are out of order.
    """
    rising = len(ranges) < 2 or ranges[0].value < ranges[-1].value
    for i, (a, b) in enumerate(pairwise(ranges)):
        if (b.value > a.value) is not rising or a.value == b.value:
            raise InputError(
                f"the ranges {engineered(a.value, a.unit)} and {engineered(b.value, b.unit)} are out of "
                "order; list each range once, all rising or all falling",
                ("ranges", i + 1),
            )


def chosen(ranges: Sequence[Amount], value: float, unit: str) -> int:
    """Return which of the ranges, in ascending order, is ``value``.

    Raises:
        InputError: none is.
    """
    ascending = sorted(each.value for each in ranges)
    for i, each in enumerate(ascending):
        if abs(each - value) <= _EQUAL * each:
            return i
    known = ", ".join(engineered(each, unit) for each in ascending)
    raise InputError(
        f"{engineered(value, unit)} is not one of the ranges {known}; give range, one of them",
        ("range",),
        ("ranges",),
    )
