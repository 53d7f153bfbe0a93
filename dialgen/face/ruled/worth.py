"""What a linear face would have been wrong by: the worth of a face made for its movement."""

from __future__ import annotations

import math
from collections.abc import Sequence

import numpy as np

from dialgen.dial import ScaleDial
from dialgen.errors import InputError
from dialgen.face.ruled.ruling import Mark, RuledScale, Spot


def linear_errors(ruled: RuledScale, spots: Sequence[Spot | Mark]) -> list[float | None]:
    """Return the errors that a linear face would have had at some values, in face units.

    The linear face is divided evenly between the nominal angles of the scale's ends, for the
    circuit as designed; None where the scale has no finite end, or for infinity itself.
    """
    spec = ruled.spec
    nominal = nominal_ends(ruled.dial)
    if nominal is None or math.isinf(spec.end):
        return [None] * len(spots)
    first, last = nominal
    per_degree = (spec.end - spec.start) / (last - first)
    return [
        None if math.isinf(spot.value) else spec.start + (spot.angle_deg - first) * per_degree - spot.value
        for spot in spots
    ]


def nominal_ends(scale: ScaleDial) -> tuple[float, float] | None:
    """Return the angles of the scale's ends by the circuit as designed and an ideal movement.

    None where there is no such circuit: a scale without a finite end, or a range that only the
    part as built can serve.
    """
    chain, spec = scale.chain, scale.spec
    if scale.wiring is None:
        return chain.rest_deg, chain.full_deg
    try:
        drives = scale.wiring.designed(np.array([spec.start, spec.end]))
    except InputError:
        return None
    if not np.isfinite(drives).all():
        return None
    first, last = (chain.rest_deg + float(d) * (chain.full_deg - chain.rest_deg) for d in drives)
    return first, last
