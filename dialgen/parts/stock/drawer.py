"""What lies in the drawer, from what the maker wrote on a list."""

from __future__ import annotations

import math
import re
from collections.abc import Iterable
from dataclasses import dataclass

from dialgen.quantity import OHM_ABOVE, shown

_COUNTED = re.compile(r"(?s)(.*?)\s*[xX×]\s*(.*?)\s*")
_COUNT = re.compile("[0-9]{1,6}")
_EXAMPLE = 'write for example "3.3 ohm x12"'
_SAME = 1e-12


@dataclass(frozen=True, slots=True)
class Lot:
    """Resistors of one value: so many pieces of so many ohms."""

    ohms: float
    count: int = 1


def read_stock(given: object) -> Lot:
    """Return the lot that an entry of ``stock`` states; without a count it is one piece.

    Raises:
        ValueError: it is no resistance above nothing, or the count is not a whole number from 1.

    >>> read_stock("3.3 ohm x12"), read_stock("4k7 × 3"), read_stock("10 ohm")
    (Lot(ohms=3.3, count=12), Lot(ohms=4700.0, count=3), Lot(ohms=10.0, count=1))
    """
    counted = _COUNTED.fullmatch(given) if isinstance(given, str) else None
    if counted is None:
        return Lot(OHM_ABOVE.read(given).value)
    ohms, count = counted.groups()
    if not _COUNT.fullmatch(count) or not int(count):
        raise ValueError(f"{shown(given)} has no count of pieces from 1 to 999999 after its x; {_EXAMPLE}")
    if not ohms.strip():
        raise ValueError(f"{shown(given)} counts pieces of no value; {_EXAMPLE}")
    return Lot(OHM_ABOVE.read(ohms).value, int(count))


def merged(lots: Iterable[Lot]) -> tuple[Lot, ...]:
    """Return the lots by ascending value, those of the same value as one.

    >>> merged([Lot(10.0, 5), Lot(3.3, 2), Lot(10.0)])
    (Lot(ohms=3.3, count=2), Lot(ohms=10.0, count=6))
    """
    found: list[Lot] = []
    for lot in sorted(lots, key=lambda lot: lot.ohms):
        if found and math.isclose(found[-1].ohms, lot.ohms, rel_tol=_SAME):
            found[-1] = Lot(found[-1].ohms, found[-1].count + lot.count)
        else:
            found.append(lot)
    return tuple(found)
