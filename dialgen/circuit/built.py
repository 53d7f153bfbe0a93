"""The value of a part as it was made: measured at once, or by current and voltage at four terminals."""

from __future__ import annotations

from dialgen.errors import InputError
from dialgen.quantity import OHM, OHM_ABOVE, Amount, Listed, Measure, Written

_EXAMPLE = '"1.885 mohm", or { volts = "73.1 mV", amps = "38.42 A" }'
_MOST = 40
_READING = {
    "volts": Measure("voltage", ("V",), "73.1 mV", above=0.0),
    "amps": Measure("current", ("A",), "38.42 A", above=0.0),
}


def read_built(given: object) -> Amount:
    """Return the resistance that was measured, in ohms.

    A table is a four-wire reading: volts at the inner terminals over amps through the outer ones, so
    that neither leads nor contacts count (common practice below an ohm).

    Raises:
        ValueError: it is neither; an InputError with the key, where one of the reading is wrong.

    >>> read_built({"volts": "73.1 mV", "amps": "38.42 A"}).value
    0.0019026548672566372
    """
    if not isinstance(given, dict):
        return OHM.read(given)
    if strange := [key for key in given if key not in _READING]:
        raise InputError(f"not a key of a four-wire reading; write built = {_EXAMPLE}", (strange[0],))
    if missing := [key for key in _READING if key not in given]:
        raise InputError(f"a four-wire reading has volts and amps, {missing[0]} is missing; write {_EXAMPLE}")
    found = {}
    for key, measure in _READING.items():
        try:
            found[key] = measure.read(given[key]).value
        except ValueError as error:
            raise InputError(str(error), (key,)) from None
    return Amount(found["volts"] / found["amps"], "Ω")


def read_built_above(given: object) -> Amount:
    """Return the measured resistance of a part that cannot be nothing; raises as `read_built` does."""
    return OHM_ABOVE.read(given) if isinstance(given, str) else read_built(given)


BUILT = Written(read_built, '"9.5 kohm"')
BUILT_ABOVE = Written(read_built_above, '"1.885 mohm"')
BUILT_EACH = Listed(read_built, 1, _MOST, '["1.9 mohm", "7.5 mohm"]', alone=True)
