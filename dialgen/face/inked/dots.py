"""The dots at the ends of the effective range, as the trade sets them."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from dialgen.dialfile.models import Zone
from dialgen.drawing import Circle, Style
from dialgen.face.inked.sides import free_side, place_of, taken_mm
from dialgen.face.ruled.ruling import RuledScale

_DIAMETER = 0.33
_CLEAR = 0.45


def dot_items(scale: RuledScale, zones: Sequence[Zone]) -> Iterator[Circle]:
    """Yield a dot at each end of the effective range that is not the end of the scale itself.

    It stands on the side free of numerals, clear of line, marks and zones.  Common practice.

    Args:
        scale: the scale.
        zones: the zones that are laid over it.
    """
    spec = scale.spec
    low, high = spec.effective or (spec.start, spec.end)
    side, radius_mm = free_side(scale), _DIAMETER * scale.sizes.numeral_mm / 2
    gap_mm = _CLEAR * 2 * radius_mm
    for value in [v for v, end in ((low, spec.start), (high, spec.end)) if v != end]:
        reach_mm = taken_mm(scale, zones, side, value, radius_mm + gap_mm) + gap_mm + radius_mm
        yield Circle(place_of(scale, value).beside(side * reach_mm), radius_mm, Style(fill=scale.ink))
