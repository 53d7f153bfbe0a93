"""Diodes in a loop with a resistance and a sine, solved at each angle with scipy: no code of ours."""

import math
from itertools import pairwise

from hypothesis import strategies as st
from scipy import constants
from scipy.integrate import quad
from scipy.special import wrightomega

VT = constants.k * (constants.zero_Celsius + 25) / constants.e


def loop_current(volts, ohms, diode, count):
    """The current of R·i + count·(n·Vt·ln(1 + i/Is) + r·i) = volts, by Wright's omega function."""
    whole_ohm = ohms + count * diode.resistance_ohm
    width_v = count * diode.ideality * VT
    a = whole_ohm * diode.saturation_a / width_v
    return diode.saturation_a * (wrightomega(volts / width_v + a + math.log(a)) / a - 1.0)


def knee(diode, ohms, peak_v, count):
    """About where a loop begins to conduct well."""
    return count * diode.ideality * VT * math.log1p(peak_v / (ohms * diode.saturation_a))


def quarter_mean(function, peak_v, knee_v):
    """The mean over a quarter of the cycle of a function of the sine's value, with breaks where it bends."""
    ratios = [share * knee_v / peak_v for share in (0.25, 0.5, 0.75, 1.0, 1.25, 2.0)]
    breaks = [0.0, *(math.asin(r) for r in ratios if r < 0.999), math.pi / 2]
    parts = [
        quad(lambda t: function(peak_v * math.sin(t)), low, high, epsabs=0, epsrel=1e-13, limit=200)[0]
        for low, high in pairwise(breaks)
    ]
    return sum(parts) / (math.pi / 2)


def log_floats(low, high):
    """Numbers spread evenly over the decades."""
    return st.floats(math.log10(low), math.log10(high)).map(lambda x: 10.0**x)
