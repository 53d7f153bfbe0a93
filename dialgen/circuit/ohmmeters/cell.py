"""An ohmmeter's cell, new and worn, and the adjuster that sets the zero again as it wears."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass

from dialgen.circuit.design import Fact
from dialgen.circuit.names import BATTERY
from dialgen.errors import InputError
from dialgen.quantity import Amount, engineered

USUAL_END = 0.8
"""A cell's voltage at the end of its life over that when new, where none is given (common practice)."""

_SPARE = 0.2
_TRACKS = (1.0, 2.2, 4.7, 10.0)
_ROUND = 1e-9


@dataclass(frozen=True, slots=True)
class Cell:
    """What the battery gives when new, and at the end of its life if that is said."""

    new_v: float
    worn_v: float | None = None

    def followed_v(self, least_v: float) -> float | None:
        """Return how far down the adjuster is to follow it; None where it could not follow at all.

        Where nothing is said, that is the usual fall, or as much of it as the circuit leaves.
        """
        if self.worn_v is not None:
            return self.worn_v
        end_v = max(USUAL_END * self.new_v, least_v)
        return end_v if end_v < self.new_v * (1 - _ROUND) else None


def cell_of(battery: Amount, worn: Amount | None) -> Cell:
    """Return the cell that two keys of a dial file describe."""
    return Cell(battery.value, worn.value if worn else None)


def check_cell(battery: Amount | None, worn: Amount | None) -> None:
    """Refuse a worn cell that is not below the new one, or stands alone.

    Raises:
        InputError: naming the keys worn and battery.
    """
    if worn is None or (battery is not None and worn.value < battery.value):
        return
    if battery is None:
        message = 'worn says how far the battery falls; add battery = "1.5 V", its voltage when new'
    else:
        message = (
            f"a worn cell of {engineered(worn.value, 'V')} is not below the new one's "
            f"{engineered(battery.value, 'V')}; give worn the voltage at the end of its life"
        )
    raise InputError(message, ("worn",), ("battery",))


@dataclass(frozen=True, slots=True, kw_only=True)
class Adjuster:
    """A variable resistor with a fixed one in series: from ``fixed_ohm`` to the two together."""

    fixed_ohm: float
    track_ohm: float

    @property
    def most_ohm(self) -> float:
        """Both together."""
        return self.fixed_ohm + self.track_ohm

    def share(self, ohms: float) -> float:
        """Return how much of the track is in use where the two together have ``ohms``."""
        return (ohms - self.fixed_ohm) / self.track_ohm


def adjuster(one_ohm: float, other_ohm: float) -> Adjuster:
    """Return an adjuster that goes from one value to another well inside its travel.

    The track is the next of 1, 2.2, 4.7 (E3 of IEC 60063, in which potentiometers are sold: common
    practice) that leaves a fifth of it spare at either end, so that one that is 20 % below its mark
    still reaches both; the fixed resistor puts them in the middle, or is left out where it would
    have to be less than nothing.

    >>> adjuster(300.0, 420.0)
    Adjuster(fixed_ohm=250.0, track_ohm=220.0)
    """
    track_ohm = _next_track(abs(other_ohm - one_ohm) / (1 - 2 * _SPARE))
    return Adjuster(fixed_ohm=max(0.0, (one_ohm + other_ohm - track_ohm) / 2), track_ohm=track_ohm)


def _next_track(least_ohm: float) -> float:
    decade = math.floor(math.log10(least_ohm))
    # Written as text, so that 220 is 220 and not a product near it.
    tracks = (float(f"{mantissa}e{decade}") for mantissa in _TRACKS)
    return next(track for track in tracks if track >= least_ohm * (1 - _ROUND))


def life_facts(cell: Cell, end_v: float, halves: Mapping[str, tuple[float, float]]) -> tuple[Fact, ...]:
    """Return by how much readings drift from a new cell to one at ``end_v``, with the adjuster set again.

    Args:
        cell: the cell.
        end_v: its voltage at the end.
        halves: what is behind the names of the facts, such as " ×10", and the half-scale resistance
            new and worn, in ohms.

    The pointer at half scale means the worn half, and the scale says the new one: an error of
    new/worn - 1 of the resistance that is measured.
    """
    if cell.worn_v is None:
        note = (
            f"{100 * (1 - end_v / cell.new_v):.0f} % below new: assumed, common practice; "
            "give worn to be told how readings drift"
        )
        return (Fact(name=f"{BATTERY}, worn", value=end_v, unit="V", note=note),)
    note = f"of the resistance at half scale, on {engineered(end_v, 'V')} with the adjuster set again"
    return tuple(
        Fact(name=f"error{behind}, worn", value=100.0 * (new_ohm / worn_ohm - 1.0), unit="%", note=note)
        for behind, (new_ohm, worn_ohm) in halves.items()
    )


def travel_facts(name: str, settings: Mapping[str, float]) -> tuple[Fact, ...]:
    """Return where on its track an adjuster stands, new and worn."""
    return tuple(
        Fact(name=f"{name}, {life}", value=100.0 * share, unit="%", note="of its track in use")
        for life, share in settings.items()
    )


def undesigned(half_ohm: float) -> tuple[Fact, ...]:
    """Return what an ohmmeter without a battery has: its half scale, and what a design would need."""
    note = 'add battery = "1.5 V" for a design of its parts'
    return (Fact(name="half scale", value=half_ohm, unit="Ω", note=note),)
