"""Further rows of numerals on one set of marks: do they read true with their own circuits?"""

from __future__ import annotations

import math
from collections.abc import Iterator

import numpy as np

from dialgen.circuit.terminals import Circuit, Coil
from dialgen.dial.chain import quietly
from dialgen.dial.wiring import Wiring, half_value, wire
from dialgen.dialfile.models import Row, Scale
from dialgen.errors import InputError, Key, Remark
from dialgen.geometry.laws import Law
from dialgen.geometry.points import Observed
from dialgen.geometry.sampling import SAMPLES, sample_places
from dialgen.stage import Array

_OFF = 0.001


def row_remarks(scale: Scale, key: Key, own: Wiring, shared: Circuit | None, coil: Coil) -> Iterator[Remark]:
    """Yield a remark for every row whose circuit would move the pointer to other places than the marks.

    Raises:
        InputError: a row's circuit does not go with its law and range.
    """
    values = sample_places((scale.start, scale.end), SAMPLES)
    if math.isinf(scale.end) and (half := half_value(scale, shared)):
        # By the pointer's way, whatever the unit.
        values = scale.start + half * (values - scale.start)
    drives = _drives(own, values)
    for i, row in enumerate(scale.also):
        if row.circuit is None or isinstance(scale.law, Observed):
            continue
        there = (*key, "also", i)
        wiring = row_wiring(scale, scale.law, row, there, shared, coil)
        off = float(np.nanmax(np.abs(_drives(wiring, values * row.times) - drives)))
        if off > _OFF:
            yield Remark(
                f"numerals times {row.times:g} are off by up to {100 * off:.2g} % of full deflection on "
                "these marks; match the row's circuit, or give it a scale of its own",
                (*there, "circuit"),
            )


def row_wiring(scale: Scale, law: Law, row: Row, there: Key, shared: Circuit | None, coil: Coil) -> Wiring:
    """Return the way from a row's values to the drive, as if it were a scale of its own.

    Raises:
        InputError: its circuit does not go with the scale's law and the row's range.
    """
    ranged = scale.model_copy(
        update={
            "start": scale.start * row.times,
            "end": scale.end * row.times,
            "unit": row.unit or scale.unit,
            "circuit": row.circuit,
        }
    )
    try:
        return wire(ranged, law, there, shared, coil)
    except InputError as error:
        # A row has neither law nor ends of its own: what is wrong with them is wrong with its factor.
        error.keys = tuple(
            (*there, "times") if k[: len(there)] == there and k[-1] in ("law", "from", "to") else k
            for k in error.keys
        )
        raise


@quietly
def _drives(wiring: Wiring, values: Array) -> Array:
    step = values
    for each in wiring.links:
        step = each.stage.forward(step)
    return step
