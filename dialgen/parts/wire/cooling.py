"""How warm a wire, a strip or a bobbin gets in still air: an estimate."""

from __future__ import annotations

from math import inf

_CYLINDER = (
    (1e-2, 0.675, 0.058),
    (1e2, 1.02, 0.148),
    (1e4, 0.850, 0.188),
    (1e7, 0.480, 0.250),
    (inf, 0.125, 0.333),
)
"""Nusselt's number C·Ra^n of a level cylinder in still air, up to each Rayleigh number: Morgan, Advances
in Heat Transfer 11 (1975) 199, as in Incropera and DeWitt, table 9.1; from memory."""

# Air at a mean film temperature of 50 °C, handbook values from memory.
_CONDUCTIVITY = 0.028
_RAYLEIGH_PER_K_M3 = 9.81 / 323 / (1.80e-5 * 2.57e-5)
_BOBBIN_W_PER_M2_K = 12.0


def rise_in_air_k(flux_w_per_m2: float, diameter_mm: float) -> float:
    """Return how much warmer than still air a level cylinder gets.

    It loses heat by convection alone: radiation, and copper at its ends, make it cooler.

    Args:
        flux_w_per_m2: heat over surface.
        diameter_mm: of the cylinder; of a strip, its perimeter over π.
    """
    across_m = diameter_mm / 1000
    if not flux_w_per_m2:
        return 0.0
    rise_k = 0.0
    for most, factor, exponent in _CYLINDER:
        # h = C·Ra^n·k/d and flux = h·rise, with Ra in proportion to the rise, so rise^(1 + n) is known.
        per_rise = factor * (_RAYLEIGH_PER_K_M3 * across_m**3) ** exponent * _CONDUCTIVITY / across_m
        rise_k = (flux_w_per_m2 / per_rise) ** (1 / (1 + exponent))
        if _RAYLEIGH_PER_K_M3 * across_m**3 * rise_k <= most:
            break
    return float(rise_k)


def rise_of_bobbin_k(watts: float, room_cm3: float) -> float:
    """Return how much warmer than the air a winding of this volume gets, taken as a cube.

    12 W/m²K for convection and radiation together is common practice, from memory.
    """
    surface_m2 = 6 * (room_cm3 * 1e-6) ** (2 / 3)
    return float(watts / (_BOBBIN_W_PER_M2_K * surface_m2))
