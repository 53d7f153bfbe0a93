"""Several ranges of one instrument, and the one among them that a scale shows."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

from dialgen.errors import InputError
from dialgen.quantity import AMPERE, VOLT_ABOVE, Amount, Measure, engineered, shown

AMPERE_RANGES = "several ranges in amperes"
VOLT_RANGES = "several ranges in volts"
MOST_RANGES = 12
_EQUAL = 1e-9


def read_current_ranges(given: object) -> tuple[Amount, ...]:
    """Return a list of currents; raises ValueError with the place of the one that is wrong."""
    return _read(given, AMPERE, '["1 A", "5 A", "10 A"]')


def read_voltage_ranges(given: object) -> tuple[Amount, ...]:
    """Return a list of voltages; raises ValueError with the place of the one that is wrong."""
    return _read(given, VOLT_ABOVE, '["10 V", "50 V", "250 V"]')


def _read(given: object, measure: Measure, example: str) -> tuple[Amount, ...]:
    if not isinstance(given, list) or not 1 < len(given) <= MOST_RANGES:
        raise ValueError(
            f"this is a list of 2 to {MOST_RANGES} ranges, not {shown(given)}; write for example {example}"
        )
    found = []
    for number, each in enumerate(given, 1):
        try:
            found.append(measure.read(each))
        except ValueError as error:
            raise ValueError(f"range {number}: {error}") from None
    return tuple(found)


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
