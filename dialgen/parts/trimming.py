"""Parts as they were made: what they do to the pointer, and what cures them."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace

from dialgen.circuit.design import Design, Part
from dialgen.parts.preferred import LEAST_BOUGHT_OHM
from dialgen.parts.worked import Worked, largest, worked
from dialgen.quantity import engineered, in_figures

_SAME = 1e-9
_TRIMMED_PERCENT = 5.0
"""What is farther off is not filed, nor brought down by what lies across it (common practice)."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Trim:
    """A part that was made, against what was designed.

    Args:
        part: its name.
        ohms: as designed.
        built: as measured.
        off_percent: how much larger it came out.
        reading_percent: what that alone does to the coil's current at full scale, of the worst range.
        parallel_ohm: the resistor across it that brings it down, where it came out too large.
        parallel_w: what that one dissipates at full scale, of the worst range.
        series_ohm: what it lacks, where it came out too small.
        filed_share: the share of its cross-section to file off along its whole length for that.
        longer_share: by what share of its length to make it longer instead.
    """

    part: str
    ohms: float
    built: float
    off_percent: float
    reading_percent: float
    parallel_ohm: float | None = None
    parallel_w: float | None = None
    series_ohm: float | None = None
    filed_share: float | None = None
    longer_share: float | None = None

    @property
    def advice(self) -> str:
        """What to do about it, in a line."""
        bought = self.ohms >= LEAST_BOUGHT_OHM
        # Of what is bought, any that is missing may stand in series.
        if abs(self.off_percent) > _TRIMMED_PERCENT and not (bought and self.series_ohm is not None):
            return f"{'buy' if bought else 'make'} it anew, as this one is too far off to be trimmed"
        if self.parallel_ohm is not None:
            heat = f", which takes {engineered(self.parallel_w, 'W', 2)}" if self.parallel_w else ""
            return f"put {engineered(self.parallel_ohm, 'Ω', 4)} across it{heat}"
        if self.series_ohm is None or self.filed_share is None or self.longer_share is None:
            return "nothing to do"
        if bought:
            return f"put {engineered(self.series_ohm, 'Ω', 4)} in series with it"
        filed, longer = (in_figures(share * 100) for share in (self.filed_share, self.longer_share))
        return (
            f"file or scrape {filed} % off its cross-section along the whole length between the sense "
            f"points, or set these {longer} % farther apart"
        )


def trims(design: Design) -> tuple[Trim, ...]:
    """Return every part that was measured, with its cure.

    Wholes that others make up are left out, and parts that are a wire or an open place by design.
    """
    ranges = worked(design)
    return tuple(
        _trim(part, part.built, [each for each in ranges if each.has(part.name)])
        for part in design.parts
        if part.built and not part.sums and 0 < part.ohms < math.inf
    )


def _trim(part: Part, built: float, ranges: Sequence[Worked]) -> Trim:
    trim = Trim(
        part=part.name,
        ohms=part.ohms,
        built=built,
        off_percent=(built / part.ohms - 1.0) * 100.0,
        reading_percent=largest([each.error_percent({part.name: built}) for each in ranges]),
    )
    if built > part.ohms * (1 + _SAME):
        parallel_ohm = built * part.ohms / (built - part.ohms)
        # Once cured the part drops what it was designed to, and so does what lies across it.
        volts = largest([each.full.loads[part.name].voltage_v for each in ranges])
        return replace(trim, parallel_ohm=parallel_ohm, parallel_w=volts**2 / parallel_ohm)
    if built < part.ohms * (1 - _SAME):
        share = built / part.ohms  # resistance is length over cross-section
        return replace(
            trim, series_ohm=part.ohms - built, filed_share=1.0 - share, longer_share=1.0 / share - 1.0
        )
    return trim
