"""The value of a part as it was made: measured at once, or by current and voltage at four terminals."""

from __future__ import annotations

from dialgen.quantity import AMPERE, OHM, OHM_ABOVE, VOLT_ABOVE, Amount, shown

BUILT = "a resistance as built"
BUILT_ABOVE = "a resistance above nothing as built"
BUILT_EACH = "resistances as built, one or a list"
_EXAMPLE = 'built = "1.885 mohm", or { volts = "73.1 mV", amps = "38.42 A" }'


def read_built(given: object) -> Amount:
    """Return the resistance that was measured, in ohms.

    A table is a four-wire reading: volts at the inner terminals over amps through the outer ones, so
    that neither leads nor contacts count (common practice below an ohm).

    Raises:
        ValueError: it is neither, or its keys are not volts and amps.

    >>> read_built({"volts": "73.1 mV", "amps": "38.42 A"}).value
    0.0019026548672566372
    """
    if not isinstance(given, dict):
        return OHM.read(given)
    if set(given) != {"volts", "amps"}:
        raise ValueError(f"a four-wire reading is volts and amps, nothing else; write {_EXAMPLE}")
    return Amount(VOLT_ABOVE.read(given["volts"]).value / AMPERE.read(given["amps"]).value, "Ω")


def read_built_above(given: object) -> Amount:
    """Return the measured resistance of a part that cannot be nothing; raises as `read_built` does."""
    return OHM_ABOVE.read(given) if isinstance(given, str) else read_built(given)


def read_built_each(given: object) -> tuple[Amount, ...]:
    """Return one or several measured resistances.

    Raises:
        ValueError: as `read_built` does, with the place in the list.
    """
    if not isinstance(given, list):
        return (read_built(given),)
    found = []
    for number, each in enumerate(given, 1):
        try:
            found.append(read_built(each))
        except ValueError as error:
            raise ValueError(f"number {number}: {error}") from None
    if not found:
        raise ValueError(f"{shown(given)} has no resistance in it; write for example {_EXAMPLE}")
    return tuple(found)
