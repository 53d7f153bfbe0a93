"""Designs for the tests of parts."""

from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.shunt import Shunt
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.circuit.universal import UniversalShunt
from dialgen.quantity import Amount


def amperes(*values):
    """Currents."""
    return tuple(Amount(value, "A") for value in values)


def volts(*values):
    """Voltages."""
    return tuple(Amount(value, "V") for value in values)


def ohm(value):
    """A resistance, or none."""
    return None if value is None else Amount(value, "Ω")


def behind(coil_a, coil_ohm, full):
    """A coil before a scale that ends at ``full``."""
    coil = Coil(current=coil_a, resistance=coil_ohm)
    return Terminals(coil=coil, signal=lambda value: value, rest_signal=0.0, full_value=full, unit=None)


def shunt(range_a, coil_a=1e-3, coil_ohm=500.0, **keys):
    """A single shunt's design; keys in ohms."""
    circuit = Shunt(**{key: ohm(value) for key, value in keys.items()})
    return circuit.design(behind(coil_a, coil_ohm, range_a))


def universal(ranges_a, coil_a, coil_ohm):
    """A universal shunt's design."""
    circuit = UniversalShunt(ranges=amperes(*ranges_a))
    return circuit.design(behind(coil_a, coil_ohm, ranges_a[0]))


def multiplier(range_v, coil_a=1e-3, coil_ohm=500.0, built=(), suppress=None, **keys):
    """A multiplier's design; keys in ohms but for ``suppress`` in volts."""
    circuit = Multiplier(
        built=tuple(ohm(each) for each in built),
        suppress=None if suppress is None else Amount(suppress, "V"),
        **{key: ohm(value) for key, value in keys.items()},
    )
    return circuit.design(behind(coil_a, coil_ohm, range_v))


def multipliers(ranges_v, coil_a, coil_ohm, *, chain=False):
    """A multiplier's design of several ranges."""
    circuit = Multiplier(ranges=volts(*ranges_v), chain=chain)
    return circuit.design(behind(coil_a, coil_ohm, ranges_v[0]))
