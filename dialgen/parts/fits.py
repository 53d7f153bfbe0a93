"""What of a design comes from an E series: nearest values, and what they and their tolerance do."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass

from dialgen.circuit.design import Design, Part
from dialgen.parts.preferred import LEAST_BOUGHT_OHM, Series, nearest
from dialgen.parts.worked import Worked, largest


@dataclass(frozen=True, slots=True, kw_only=True)
class Fit:
    """The nearest value of a series, fitted in place of the exact one.

    Args:
        series: its name.
        ohms: the value.
        error_percent: the error at full scale with it alone, of the worst range; above 0 the pointer goes
            too far.
        tolerance_percent: the tolerance of the part.
        spread_percent: what that tolerance does to full scale, either way, of the worst range.
    """

    series: str
    ohms: float
    error_percent: float
    tolerance_percent: float
    spread_percent: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Together:
    """All that is bought at once, of one series; percent of full scale, of the worst range.

    Args:
        series: its name.
        tolerance_percent: the tolerance of the parts.
        error_percent: the error with every nearest value fitted.
        worst_percent: the tolerances all at their worst.
        likely_percent: the root of the sum of their squares.
    """

    series: str
    tolerance_percent: float
    error_percent: float
    worst_percent: float
    likely_percent: float


def is_there(part: Part) -> bool:
    """Return whether a part is there already: stated in the file, bought by its rating, or built."""
    return part.given or part.built is not None


def is_bought(part: Part) -> bool:
    """Return whether a part is yet to be bought at a value of a series."""
    return part.is_made and not is_there(part) and part.ohms >= LEAST_BOUGHT_OHM


def is_wound(part: Part) -> bool:
    """Return whether a part is yet to be wound or filed, as nothing so small is bought from a series."""
    return part.is_made and not is_there(part) and part.ohms < LEAST_BOUGHT_OHM


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class Fitting:
    """The parts of a design as of one series: nearest values, and for each range the spreads, by name."""

    series: Series
    tolerance_percent: float
    ranges: Sequence[Worked]
    nearest_ohm: Mapping[str, float]
    spreads: Sequence[Mapping[str, float]]
    bought: frozenset[str]

    def fit(self, name: str) -> Fit:
        """Return the nearest value of one part fitted alone."""
        ohms = self.nearest_ohm[name]
        return Fit(
            series=self.series.name,
            ohms=ohms,
            error_percent=largest(
                [each.error_percent({name: ohms}) for each in self.ranges if each.has(name)]
            ),
            tolerance_percent=self.tolerance_percent,
            spread_percent=max((spread.get(name, 0.0) for spread in self.spreads), default=0.0),
        )

    def together(self) -> Iterator[Together]:
        """Yield what all that is bought does at once, where anything is."""
        if not self.bought:
            return
        fitted = {name: self.nearest_ohm[name] for name in self.bought}
        spreads = [[spread[name] for name in self.bought if name in spread] for spread in self.spreads]
        yield Together(
            series=self.series.name,
            tolerance_percent=self.tolerance_percent,
            error_percent=largest([each.error_percent(fitted) for each in self.ranges]),
            worst_percent=max(map(sum, spreads), default=0.0),
            likely_percent=max((math.hypot(*spread) for spread in spreads), default=0.0),
        )


def fitting(design: Design, ranges: Sequence[Worked], series: Series, tolerance_percent: float) -> Fitting:
    """Return the parts of a design as of one series, of that tolerance."""
    made = [part for part in design.parts if part.is_made]
    return Fitting(
        series=series,
        tolerance_percent=tolerance_percent,
        ranges=ranges,
        nearest_ohm={part.name: nearest(part.ohms, series.name) for part in made},
        spreads=[
            {
                part.name: _spread_percent(part, each, tolerance_percent)
                for part in made
                if each.has(part.name)
            }
            for each in ranges
        ],
        bought=frozenset(part.name for part in made if is_bought(part)),
    )


def _spread_percent(part: Part, at: Worked, tolerance_percent: float) -> float:
    """Return the larger of the errors at full scale at the part's two limits."""
    share = tolerance_percent / 100.0
    return max(abs(at.error_percent({part.name: part.ohms * (1.0 + off)})) for off in (share, -share))
