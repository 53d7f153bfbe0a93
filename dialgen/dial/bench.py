"""Readings from the bench as pairs of nominal and observed angles, and the correction through them."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from typing import TypeVar

import numpy as np

from dialgen.dialfile.models import Movement, OldScale
from dialgen.dialfile.readings import Reading
from dialgen.errors import InputError, Key, Remark
from dialgen.geometry.correction import Correction, from_readings
from dialgen.geometry.monotone import through
from dialgen.stage import Array, Span

Read = TypeVar("Read")

_FAR = 0.1

NominalAngle = Callable[[Array], Array]
"""From drives, or from values of a scale, to the angles where the pointer should stand."""


def correction(
    movement: Movement,
    readings: Sequence[Reading],
    key: Key,
    *,
    by_drive: NominalAngle,
    by_value: NominalAngle,
    stops_deg: Span,
) -> tuple[Correction, tuple[Remark, ...]]:
    """Return the correction through the readings, and the remarks on it.

    Args:
        movement: the movement they were taken on.
        readings: what was applied and seen.
        key: the readings' key: a list of tables, or the name of a CSV file.
        by_drive: the nominal angle at a drive.
        by_value: the nominal angle at a value of the scale the readings belong to.
        stops_deg: how far the pointer can swing.

    Raises:
        InputError: a reading that cannot be placed, or readings that do not move one way.
    """
    applied = _each(key, readings, lambda reading: _applied(movement, reading))
    observed = _each(key, readings, lambda reading: _observed(movement, reading))
    nominal = np.zeros(len(readings))
    for by_scale, angles in ((False, by_drive), (True, by_value)):
        chosen = [i for i, (is_value, _) in enumerate(applied) if is_value is by_scale]
        if chosen:
            nominal[chosen] = _together(key, chosen, np.array([applied[i][1] for i in chosen]), angles)
    pairs = list(zip(nominal.tolist(), observed, strict=True))
    try:
        made = from_readings(pairs, movement.rest, movement.full)
    except InputError as error:
        raise InputError(error.message, (*key, int(error.keys[0][0]))) from None
    low, high = stops_deg
    far_deg = _FAR * abs(movement.full - movement.rest)
    pinned = [i for i, at in enumerate(nominal.tolist()) if not low - far_deg <= at <= high + far_deg]
    return made, (
        *(Remark(text, key) for text in made.remarks),
        *(Remark(_pinned(float(nominal[i])), (*key, i)) for i in pinned),
    )


def _pinned(nominal_deg: float) -> str:
    return (
        f"the pointer should stand at {nominal_deg:.4g} degrees here, far beyond its stops; "
        "look again at what was applied"
    )


def readings_key(owner: Key, table: object) -> Key:
    """Return the key under which an owner's readings stand."""
    return (*owner, "reading") if getattr(table, "reading", ()) else (*owner, "readings")


def _each(key: Key, readings: Sequence[Reading], read: Callable[[Reading], Read]) -> list[Read]:
    """Return what ``read`` makes of each reading; an error is placed at the reading it is about."""
    found = []
    for i, reading in enumerate(readings):
        try:
            found.append(read(reading))
        except InputError as error:
            raise _placed(error, (*key, i)) from None
    return found


def _together(key: Key, indices: Sequence[int], amounts: Array, angles: NominalAngle) -> Array:
    """Return the nominal angles of several readings, asked for at once."""
    try:
        return angles(amounts)
    except InputError:
        # One of them is wrong; asked one by one, it can be named.
        for i, amount in zip(indices, amounts, strict=True):
            try:
                angles(np.array([amount]))
            except InputError as error:
                raise _placed(error, (*key, i)) from None
        raise


def _placed(error: InputError, key: Key) -> InputError:
    if not error.keys or error.keys[0][:1] != ("movement",):
        error.keys = (key,)
    return error


def _applied(movement: Movement, reading: Reading) -> tuple[bool, float]:
    """Return whether a reading was taken by value, and that value, or else the drive it stands for."""
    if reading.value is not None:
        return True, reading.value
    coil = movement.coil
    if reading.current is not None:
        return False, reading.current / coil.current_a("a reading by current")
    drop_v = coil.current_a("a reading by voltage") * coil.resistance_ohm("a reading by voltage")
    return False, (reading.voltage or 0.0) / drop_v


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
