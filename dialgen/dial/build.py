"""From a dial file to a dial: every scale's chain, or everything that is wrong with them."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass, replace

import numpy as np

from dialgen.circuit.terminals import Circuit, Coil
from dialgen.dial.bench import NominalAngle, correction, old_angle, readings_key
from dialgen.dial.chain import Chain
from dialgen.dial.rows import row_remarks
from dialgen.dial.wiring import Wiring, half_value, link, past_points, wire
from dialgen.dialfile.models import DialFile, Movement, Scale
from dialgen.errors import InputError, Key, NoSuchValue, Refused, Remark
from dialgen.geometry.correction import NO_DEPARTURE, Correction
from dialgen.geometry.points import Observed
from dialgen.geometry.response import EVEN
from dialgen.geometry.sampling import SAMPLES, check_one_way, sample_places
from dialgen.stage import Affine, Array, Span, Stage

_STOP_ROOM_DEG = 5.0
_LEAST_TRAVEL_DEG = 0.01
_NO_DRIVE = 1e-12


@dataclass(frozen=True, slots=True, eq=False)
class ScaleDial:
    """One scale: what the file says of it, its chain, and what its correction came from."""

    spec: Scale
    key: Key
    chain: Chain
    correction: Correction
    wiring: Wiring | None


@dataclass(frozen=True, slots=True, eq=False)
class Dial:
    """All scales of one movement, and what should be known of them."""

    file: DialFile
    scales: tuple[ScaleDial, ...]
    stops_deg: Span
    remarks: tuple[Remark, ...]


def build(file: DialFile) -> Dial:
    """Return the dial that a file describes.

    Raises:
        Refused: with everything that is wrong, as far as one error does not hide another.
    """
    dial, errors = attempt(file)
    if errors:
        raise Refused(errors)
    return dial


def attempt(file: DialFile) -> tuple[Dial, list[InputError]]:
    """Return the dial with the scales that can be made, and what is wrong with the others."""
    errors: list[InputError] = []
    coil = file.movement.coil
    wirings: dict[int, Wiring | None] = {}
    for i, scale in enumerate(file.scale):
        try:
            wirings[i] = _wiring(scale, i, file.circuit, coil)
        except InputError as error:
            errors.append(error)
    stops = file.movement.stops or _default_stops(file, wirings)
    maker = _Maker(file.movement, stops, file.circuit, coil, file.scale[0], wirings.get(0))
    if 0 not in wirings and any(r.value is not None for r in file.movement.all_readings()):
        # Readings by value go through the first scale; without it the others are not made either.
        return Dial(file, (), stops, ()), _each_once(errors)
    scales: list[ScaleDial] = []
    remarks: list[Remark] = []
    for i, wiring in wirings.items():
        try:
            made, more = maker.scale(file.scale[i], i, wiring)
        except InputError as error:
            errors.append(error)
        else:
            scales.append(made)
            remarks += more
    return Dial(file, tuple(scales), stops, tuple(dict.fromkeys(remarks))), _each_once(errors)


def _each_once(errors: list[InputError]) -> list[InputError]:
    """Return the errors without those that ask for a key of the movement that another has asked for."""
    asked: set[tuple[Key, ...]] = set()
    found = []
    for error in errors:
        of_movement = bool(error.keys) and error.keys[0][:1] == ("movement",)
        if not (of_movement and error.keys in asked):
            found.append(error)
        asked.add(error.keys)
    return found


def _wiring(scale: Scale, index: int, shared: Circuit | None, coil: Coil) -> Wiring | None:
    if isinstance(scale.law, Observed):
        return None
    return wire(scale, scale.law, ("scale", index), shared, coil)


def _observed_curve(movement: Movement, scale: Scale, shared: Circuit | None, key: Key = ()) -> Stage:
    """Return where the pointer of an observed scale was seen, by value."""
    law = scale.law
    assert isinstance(law, Observed)
    positions = [at for _, at in law.points]
    if law.position == "old":
        positions = [old_angle(movement, at) for at in positions]
    try:
        half = half_value(scale, shared)
        if half is None and math.isinf(scale.end):
            raise InputError(
                "the pointer is seen at inf only beside an ohms circuit with half; add one, or end the scale"
            )
        curve = law.curve(tuple(positions), half)
        check_one_way(curve, (scale.start, scale.end), SAMPLES)
    except InputError as error:
        raise error.under(*key, "law") from None
    return curve


def _lowest_deflection(movement: Movement, scale: Scale, shared: Circuit | None) -> float:
    """Return an observed scale's least deflection; 0 where it cannot be had, which is refused later."""
    try:
        ends = _observed_curve(movement, scale, shared).forward(np.array([scale.start, scale.end]))
    except InputError:
        return 0.0
    return float(((ends - movement.rest) / (movement.full - movement.rest)).min())


def _lowest_drive(wiring: Wiring) -> float:
    finite = wiring.drives[np.isfinite(wiring.drives)]
    return float(finite.min()) if finite.size else 0.0


def _default_stops(file: DialFile, wirings: Mapping[int, Wiring | None]) -> Span:
    """Return stops a little outside rest and full, and outside minus full where a drive is negative."""
    movement = file.movement
    lowest = [
        _lowest_drive(wiring) if wiring else _lowest_deflection(movement, file.scale[i], file.circuit)
        for i, wiring in wirings.items()
    ]
    ends = [movement.rest, movement.full]
    if min(lowest, default=0.0) < -_NO_DRIVE:
        ends.append(-movement.full)
    return min(ends) - _STOP_ROOM_DEG, max(ends) + _STOP_ROOM_DEG


@dataclass(frozen=True, slots=True)
class _Maker:
    """Makes the scales of one movement."""

    movement: Movement
    stops_deg: Span
    circuit: Circuit | None
    coil: Coil
    first_scale: Scale
    first_wiring: Wiring | None

    def scale(self, scale: Scale, index: int, wiring: Wiring | None) -> tuple[ScaleDial, list[Remark]]:
        key: Key = ("scale", index)
        if wiring is None:
            made = self._observed(scale, key)
            remarks = list(past_points(scale.law, scale, key))
        else:
            made, more = self._corrected(scale, key, wiring)
            rows = row_remarks(scale, key, wiring, self.circuit, self.coil)
            remarks = [*wiring.remarks, *more, *rows]
        _check_ends(made)
        return made, remarks

    def _corrected(self, scale: Scale, key: Key, wiring: Wiring) -> tuple[ScaleDial, tuple[Remark, ...]]:
        _check_drive(self.movement, scale, key, wiring)
        plain = self._chain(scale, wiring)
        own = scale.all_readings()
        readings, owner, table = (
            (own, key, scale) if own else (self.movement.all_readings(), ("movement",), self.movement)
        )
        by_value = self._by_value(plain) if own else self._by_first_value()
        made, remarks = correction(
            self.movement,
            readings,
            readings_key(owner, table),
            by_drive=self._by_drive,
            by_value=by_value,
            stops_deg=self.stops_deg,
        )
        if readings:
            last, _ = link(made.stage, np.array(self.stops_deg))
            plain = replace(plain, links=(*plain.links, last))
        return ScaleDial(scale, key, plain, made, wiring), remarks

    def _chain(self, scale: Scale, wiring: Wiring) -> Chain:
        links = list(wiring.links)
        movement = self.movement
        needle = Affine(movement.full - movement.rest, movement.rest)
        drives = np.array([0.0, 1.0])
        if movement.response is not EVEN:
            made, drives = link(movement.response, drives)
            links.append(made)
        links.append(link(needle, drives)[0])
        return Chain(
            tuple(links), len(wiring.links), movement.rest, movement.full, self.stops_deg, scale.unit
        )

    def _observed(self, scale: Scale, key: Key) -> ScaleDial:
        if scale.all_readings():
            raise InputError(
                "an observed scale is its own correction; put the readings among its points",
                readings_key(key, scale),
            )
        stage = _observed_curve(self.movement, scale, self.circuit, key)
        made, _ = link(stage, sample_places((scale.start, scale.end), SAMPLES))
        movement = self.movement
        chain = Chain((made,), None, movement.rest, movement.full, self.stops_deg, scale.unit)
        return ScaleDial(scale, key, chain, Correction(stage=NO_DEPARTURE), None)

    def _by_drive(self, drives: Array) -> Array:
        movement = self.movement
        low, high = movement.response.domain
        outside = drives[(drives < low) | (drives > high)]
        if outside.size:
            raise NoSuchValue(
                f"a drive of {outside[0]:.4g} is outside the movement's response; leave this reading out"
            )
        deflections = movement.response.forward(drives)
        return movement.rest + deflections * (movement.full - movement.rest)

    def _by_first_value(self) -> NominalAngle:
        if self.first_wiring is None:
            return _no_first_value
        return self._by_value(self._chain(self.first_scale, self.first_wiring))

    def _by_value(self, chain: Chain) -> NominalAngle:
        # A reading may lie beyond the nominal stops: the departure is what it is there to show.
        free = replace(chain, stops_deg=(-math.inf, math.inf))
        return free.angle


def _check_drive(movement: Movement, scale: Scale, key: Key, wiring: Wiring) -> None:
    """Refuse a scale that drives the movement where its response does not reach."""
    low, _ = movement.response.domain
    drives = wiring.drives[np.isfinite(wiring.drives)]
    if drives.size and low == 0.0 and drives.min() < -_NO_DRIVE:
        name, value = ("from", scale.start) if drives[0] < 0 else ("to", scale.end)
        raise NoSuchValue(
            f"{value:g} {scale.unit} drives the movement backwards, which a power response cannot show; "
            "end the scale at rest, or give the response by points",
            (*key, name),
            ("movement", "response"),
        )


def _no_first_value(values: Array) -> Array:
    raise InputError("a reading by value needs a first scale with a law and circuit; give current or voltage")


def _check_ends(made: ScaleDial) -> None:
    """Refuse a scale whose ends the pointer cannot reach, or whose angles do not move one way."""
    scale, chain, key = made.spec, made.chain, made.key
    try:
        first, last = chain.angle(np.array([scale.start, scale.end]))
    except NoSuchValue:
        for name, value in (("from", scale.start), ("to", scale.end)):
            try:
                chain.angle(np.array([value]))
            except NoSuchValue as error:
                raise NoSuchValue(error.message, (*key, name), *error.keys) from None
        raise
    if abs(last - first) < _LEAST_TRAVEL_DEG:
        raise InputError(
            f"the whole scale takes {abs(last - first):.2g} degrees; "
            "change from, to, the circuit or its full",
            (*key, "to"),
        )
