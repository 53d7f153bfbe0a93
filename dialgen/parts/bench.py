"""What the maker has: how designs are judged, what lies in the drawer and on the spool."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from dialgen.errors import InputError
from dialgen.parts.drift import Materials
from dialgen.parts.preferred import SERIES, Series, series_named
from dialgen.parts.ratings import MARGIN, USUAL_RATINGS_V
from dialgen.parts.stock.drawer import Lot
from dialgen.parts.wire.spool import Wire
from dialgen.quantity import Number

OVERLOAD = 1.2
"""Times full scale (common practice)."""
TOLERANCES = Number("a tolerance", 0.001, 50.0)
MARGINS = Number("a margin", 1.0, 100.0)
OVERLOADS = Number("an overload", 1.0, 100.0)
DRIFTS = Number("a drift", 1e-4, 10.0)
"""What may be asked for: percent, times, times full scale, percent for a kelvin.  The check of
dial files reads with them too."""


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
        for name, bounds in _BOUNDS.items():
            given = getattr(self, name)
            if given is not None:
                _check(name, bounds, given)
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


_BOUNDS: Mapping[str, Number] = {
    "tolerance_percent": TOLERANCES,
    "margin": MARGINS,
    "overload": OVERLOADS,
    "drift_wanted_percent_per_k": DRIFTS,
}


def _check(name: str, bounds: Number, given: object) -> None:
    try:
        bounds.read(given)
    except ValueError as error:
        raise InputError(str(error), (name,)) from None
