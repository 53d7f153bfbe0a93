"""What the maker has: how designs are judged, what lies in the drawer and on the spool."""

from __future__ import annotations

import math
from dataclasses import dataclass, field

from dialgen.errors import InputError
from dialgen.parts.drift import Materials
from dialgen.parts.preferred import SERIES, Series, series_named
from dialgen.parts.ratings import MARGIN, USUAL_RATINGS_V
from dialgen.parts.stock.drawer import Lot
from dialgen.parts.wire.spool import Wire

OVERLOAD = 1.2
"""Times full scale (common practice)."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Bench:
    """What the maker has, and how a design is to be judged.

    Args:
        tolerance_percent: the tolerance of the parts either way; None takes that of each series.
        margin: how many times its dissipation a resistor is rated for.
        overload: the overload that is looked at, times full scale.
        series: the E series that parts are bought in; None shows all.
        drift_wanted_percent_per_k: the largest drift, for the swamping resistor; None asks for none.
        materials: what the parts are made of.
        lots: resistors in the drawer.
        wires: wires and strips to make parts of.
        voltage_v: what one resistor stands, for the splitting of a multiplier.

    Raises:
        InputError: a figure makes no sense; its key is its name.
    """

    tolerance_percent: float | None = None
    margin: float = MARGIN
    overload: float = OVERLOAD
    series: str | None = None
    drift_wanted_percent_per_k: float | None = None
    materials: Materials = field(default_factory=Materials)
    lots: tuple[Lot, ...] = ()
    wires: tuple[Wire, ...] = ()
    voltage_v: float = min(USUAL_RATINGS_V.values())

    def __post_init__(self) -> None:
        for name, least in (("margin", 1.0), ("overload", 1.0)):
            if not least <= getattr(self, name) < math.inf:
                raise InputError(f"{name} is a number of times; write {least:g} or more", (name,))
        for name in ("tolerance_percent", "drift_wanted_percent_per_k"):
            given = getattr(self, name)
            if given is not None and not 0 < given < 100:
                raise InputError(f"{given:g} % is no such figure; write one above 0 and below 100", (name,))
        if self.series is not None:
            try:
                series_named(self.series)
            except InputError as error:
                raise error.under("series") from None

    @property
    def shown(self) -> tuple[Series, ...]:
        """The series to show."""
        return tuple(SERIES.values()) if self.series is None else (series_named(self.series),)

    def tolerance_of(self, series: Series) -> float:
        """Return the tolerance of parts of a series, in percent."""
        return series.tolerance_percent if self.tolerance_percent is None else self.tolerance_percent
