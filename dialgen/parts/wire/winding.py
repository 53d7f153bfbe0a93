"""A shunt or bobbin made at home: how much of a wire or strip has the wanted ohms."""

from __future__ import annotations

import math
from dataclasses import dataclass

from dialgen.errors import InputError
from dialgen.parts.wire.cooling import rise_in_air_k, rise_of_bobbin_k
from dialgen.parts.wire.spool import Wire

_LONG_MM, _THICK_MM = 500.0, 0.6
_SPARE = 1.03
_INSULATION_AND_GAPS = 1.5


@dataclass(frozen=True, slots=True, kw_only=True)
class Winding:
    """So much of a wire or strip as has ``ohms``, with ``current_a`` through it."""

    wire: Wire
    ohms: float
    current_a: float

    @property
    def length_mm(self) -> float:
        """R·A/ρ, between the points where the voltage is taken."""
        return self.ohms / self.wire.ohm_per_m * 1000

    @property
    def cut_mm(self) -> float:
        """What to cut of a wire: 3 % more than the least resistivity that this metal may have needs."""
        least = self.wire.resistivity if self.wire.measured else self.wire.material.least
        return self.length_mm * self.wire.resistivity / least * _SPARE

    @property
    def ohm_per_mm(self) -> float:
        """What a millimetre of length is."""
        return self.wire.ohm_per_m / 1000

    @property
    def thousandth_mm(self) -> float:
        """The length that is 0.1 % of the resistance."""
        return self.length_mm / 1000

    @property
    def coiled(self) -> bool:
        """Whether it goes on a bobbin: a fine wire, and too long to be stretched in air.

        A thicker one is bent into an open spiral (common practice), and cools as if it were straight.
        """
        round_mm = self.wire.width_mm if self.wire.thickness_mm is None else math.inf
        return round_mm <= _THICK_MM and self.length_mm > _LONG_MM

    @property
    def watts(self) -> float:
        """Joule's law."""
        return self.current_a**2 * self.ohms

    @property
    def density_a_per_mm2(self) -> float:
        """Current over cross-section."""
        return self.current_a / self.wire.area_mm2

    @property
    def surface_w_per_cm2(self) -> float:
        """Heat over the surface of the metal, as if all of it were bare in air."""
        return self.watts / (self.wire.perimeter_mm * self.length_mm) * 100

    @property
    def room_cm3(self) -> float:
        """What the wire takes up wound close; half as much again for insulation and gaps, from memory."""
        return self.length_mm * self.wire.width_mm**2 * _INSULATION_AND_GAPS / 1000

    @property
    def rise_k(self) -> float:
        """How much warmer than the air it gets in the end: an estimate, see `dialgen.parts.wire.cooling`."""
        if self.coiled:
            return rise_of_bobbin_k(self.watts, self.room_cm3)
        return rise_in_air_k(self.surface_w_per_cm2 * 1e4, self.wire.perimeter_mm / math.pi)

    @property
    def change_percent(self) -> float:
        """What the rise does to the resistance."""
        return 100 * self.wire.material.per_k * self.rise_k

    def filed_mm(self, percent: float, share: float = 1.0) -> float:
        """Return what to file off a strip's width to raise its resistance.

        Args:
            percent: by how much it is to rise.
            share: over which part of the length the file goes.  Filed by y of the width w there, that
                part rises by y/(w - y); the spreading of the current beside a short notch is left out.
        """
        rise = percent / 100 / share
        return self.wire.width_mm * rise / (1 + rise)


def wound(ohms: float, current_a: float, wire: Wire) -> Winding:
    """Return what it takes of a wire for a value, with the current that it carries.

    Raises:
        InputError: no such resistance can be made, or the current is below nothing or not finite.
    """
    if not 0 < ohms < math.inf:
        raise InputError(f"{ohms:g} Ω is no resistance to wind; give one above 0 Ω")
    if not 0 <= current_a < math.inf:
        raise InputError(f"{current_a:g} A is no current to wind for; give 0 A or more")
    return Winding(wire=wire, ohms=ohms, current_a=current_a)
