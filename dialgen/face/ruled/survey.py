"""A scale measured for its divider: places along its line, and the room its numerals take there."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence

import numpy as np

from dialgen.dial import ScaleDial
from dialgen.dialfile.models import Scale
from dialgen.errors import InputError
from dialgen.face.ruled.captions import Caption
from dialgen.face.ruled.precision import least_gap_mm, least_step
from dialgen.face.ruled.ruler import UNEVEN, Ruler
from dialgen.face.ruled.sizes import Sizes
from dialgen.geometry.lines import ScaleLine
from dialgen.looks import Look, Turn
from dialgen.stage import Array

_STEPS = 96
_FEW_STEPS = 32
_LEAST_STEP, _LARGEST_VALUE = 1e-30, 1e30
_AT_REST = 0.0025
_SLOW = 1.5
"""So many times the mean step of value in the first step of place, and the scale has a foot."""

NumeralWidth = Callable[[str, float], float]
"""The width in mm of a numeral's text at a height in mm."""


def survey(
    scale: ScaleDial,
    line: ScaleLine,
    ends_deg: Array,
    look: Look,
    sizes: Sizes,
    rows: Sequence[Caption],
    numeral_width: NumeralWidth,
) -> Ruler:
    """Return the ruler of a scale on its line.

    Args:
        scale: the scale and its chain.
        line: the line its marks stand on.
        ends_deg: the pointer's angles at its first and last value.
        look: how its numerals stand.
        sizes: the sizes of its numerals.
        rows: how each row of numerals is written.
        numeral_width: what a numeral's text takes.
    """
    spec, chain = scale.spec, scale.chain
    first, last = (float(p) for p in line.along(ends_deg))
    sign = 1.0 if last > first else -1.0

    def place_mm(values: Array) -> Array:
        return sign * (line.along(chain.angle(values)) - first)

    crowding = _crowding(spec, sizes)

    def widest(value: float) -> float:
        return max([numeral_width(row.text(value), sizes.numeral_mm) for row in rows])

    def width_mm(values: Array) -> Array:
        if look.turn is Turn.ALONG:
            return np.full(len(values), sizes.numeral_mm * crowding)
        # Two upright boxes are clear of each other as soon as they are beside or above each other,
        # whichever comes first along the line.
        widths = np.array([widest(v) for v in values.tolist()])
        if look.turn is Turn.ACROSS:
            return (widths + sizes.clear_mm) * crowding - sizes.clear_mm
        across, upward = (np.abs(d) for d in line.directions(chain.angle(values)))
        with np.errstate(divide="ignore", over="ignore"):
            beside = (widths + sizes.clear_mm) / upward
            above = (sizes.numeral_mm + sizes.stacked_mm) / across
        return np.minimum(beside, above) * crowding - sizes.clear_mm

    along = _along(scale, line, ends_deg, place_mm)
    return Ruler(
        start=spec.start,
        end=spec.end,
        place_mm=place_mm,
        along=along,
        width_mm=width_mm,
        digit_mm=min(numeral_width("0", sizes.numeral_mm), sizes.numeral_mm) * crowding,
        gap_mm=least_gap_mm(spec, abs(last - first), sizes.gap_mm),
        clear_mm=sizes.clear_mm,
        least_step=least_step(spec),
        foot=_has_foot(scale, ends_deg, along),
    )


def _has_foot(scale: ScaleDial, ends_deg: Array, along: Array) -> bool:
    """Return whether a scale starts from rest and its first values scarcely move the pointer."""
    chain = scale.chain
    at_rest = abs(ends_deg[0] - chain.rest_deg) <= _AT_REST * abs(chain.full_deg - chain.rest_deg)
    steps = np.diff(along)
    return bool(at_rest and math.isfinite(along[-1]) and steps[0] > _SLOW * steps.mean())


def _along(scale: ScaleDial, line: ScaleLine, ends_deg: Array, place_mm: Callable[[Array], Array]) -> Array:
    """Return values at all but equal steps of place."""
    spec = scale.spec
    if math.isfinite(spec.end):
        values = np.linspace(spec.start, spec.end, _FEW_STEPS + 1)
        places = place_mm(values)
        steps = places[1:] - places[:-1]
        if steps.max() <= UNEVEN * steps.min():
            # All but even: the places between are near enough, and the inverse need not be asked.
            return np.interp(np.linspace(0.0, places[-1], _FEW_STEPS + 1), places, values)
    angles = np.linspace(ends_deg[0], ends_deg[1], _STEPS + 1)
    places = np.abs(line.along(angles) - line.along(ends_deg[:1]))
    along = scale.chain.value(np.interp(np.linspace(0.0, places[-1], _STEPS + 1), places, angles))
    along[0], along[-1] = spec.start, spec.end
    if np.abs(along[1:-1]).max() > _LARGEST_VALUE or not (np.diff(along) > _LEAST_STEP).all():
        raise InputError(
            "equal steps along the scale stand for values too near or too large to tell; "
            "choose a law or circuit that spreads them",
            (*scale.key, "law"),
        )
    return along


def _crowding(spec: Scale, sizes: Sizes) -> float:
    """Return how much farther apart places on the line are than at the numerals' distance."""
    if spec.radius is None:
        return 1.0
    reach = sizes.numbered_mm + sizes.space_mm + sizes.numeral_mm / 2
    numerals = spec.radius + (reach if spec.numerals == "outside" else -reach)
    return spec.radius / max(numerals, 0.1 * spec.radius)
