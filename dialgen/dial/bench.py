"""Readings from the bench as pairs of nominal and observed angles, and the correction through them."""

from __future__ import annotations

from collections.abc import Callable, Sequence

import numpy as np

from dialgen.circuit.terminals import Coil
from dialgen.dialfile.models import Movement, OldScale
from dialgen.dialfile.readings import Reading
from dialgen.errors import InputError, Key, Remark
from dialgen.geometry.correction import Correction, from_readings
from dialgen.geometry.monotone import through

NominalAngle = Callable[[float], float]


def correction(
    movement: Movement, readings: Sequence[Reading], key: Key, by_drive: NominalAngle, by_value: NominalAngle
) -> tuple[Correction, tuple[Remark, ...]]:
    """Return the correction through the readings, and the remarks on it.

    Args:
        movement: the movement they were taken on.
        readings: what was applied and seen.
        key: the readings' key: a list of tables, or the name of a CSV file.
        by_drive: the nominal angle at a drive.
        by_value: the nominal angle at a value of the scale the readings belong to.

    Raises:
        InputError: a reading that cannot be placed, or readings that do not move one way.
    """
    pairs = []
    for i, reading in enumerate(readings):
        try:
            pairs.append((_nominal(movement, reading, by_drive, by_value), _observed(movement, reading)))
        except InputError as error:
            if not error.keys or error.keys[0][:1] != ("movement",):
                error.keys = (_item(key, i),)
            raise
    try:
        made = from_readings(pairs, movement.rest, movement.full)
    except InputError as error:
        raise InputError(error.message, _item(key, int(error.keys[0][0]))) from None
    return made, tuple(Remark(text, key) for text in made.remarks)


def readings_key(owner: Key, table: object) -> Key:
    """Return the key under which an owner's readings stand."""
    return (*owner, "reading") if getattr(table, "reading", ()) else (*owner, "readings")


def _item(key: Key, index: int) -> Key:
    return (*key, index)


def _nominal(movement: Movement, reading: Reading, by_drive: NominalAngle, by_value: NominalAngle) -> float:
    if reading.value is not None:
        return by_value(reading.value)
    coil = Coil(current=movement.current, resistance=movement.resistance)
    if reading.current is not None:
        return by_drive(reading.current / coil.current_a("a reading by current"))
    drop_v = coil.current_a("a reading by voltage") * coil.resistance_ohm("a reading by voltage")
    return by_drive((reading.voltage or 0.0) / drop_v)


def _observed(movement: Movement, reading: Reading) -> float:
    if reading.angle is not None:
        return reading.angle
    return old_angle(movement, reading.old or 0.0)


def old_angle(movement: Movement, position: float) -> float:
    """Return the angle of a position on the old scale.

    Raises:
        InputError: the old scale is not given, or its points do not move one way.
    """
    old = movement.old
    if old is None:
        raise InputError(
            "a position on the old scale needs that scale; add [movement.old] with rest and full, or points",
            ("movement", "old"),
        )
    if old.points is None:
        return _even(old, movement, position)
    try:
        curve = through([p for p, _ in old.points], [a for _, a in old.points])
    except InputError as error:
        raise InputError(error.message, ("movement", "old", "points")) from None
    return float(curve.forward(np.array(position)))


def _even(old: OldScale, movement: Movement, position: float) -> float:
    first, last = old.rest or 0.0, old.full or 0.0
    return movement.rest + (position - first) / (last - first) * (movement.full - movement.rest)
