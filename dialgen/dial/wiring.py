"""One scale's law and circuit as links of its chain, up to the drive."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import Any

import numpy as np

from dialgen.circuit.direct import Direct
from dialgen.circuit.terminals import Circuit, Coil, Terminals
from dialgen.dial.chain import Link, quietly
from dialgen.dialfile.models import Scale
from dialgen.errors import InputError, Key, Remark
from dialgen.geometry.formula import Formula
from dialgen.geometry.laws import Law, Linear
from dialgen.geometry.points import Observed, Table
from dialgen.geometry.sampling import SAMPLES, check_moves, sample_places
from dialgen.quantity import split_unit
from dialgen.stage import Affine, Array, Span, Stage

_FORMULA_SAMPLES = 4097
_NEAR_OWN = 0.01
_HAIR = 1e-12
_UNIT_WORDS = {
    "amp": "A", "amps": "A", "ampere": "A", "amperes": "A", "a": "A", "milliamps": "mA", "ma": "mA",
    "volt": "V", "volts": "V", "v": "V", "mv": "mV", "ohms": "ohm", "kohms": "kohm", "r": "ohm",
}  # fmt: skip
"""What people write for a unit whose letter alone is read."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Wiring:
    """A scale's way from value to drive.

    Args:
        links: value to drive.
        drives: the drives over the scale, from its first value on.
        terminals: what the circuit was built from.
        circuit: the circuit itself.
        circuit_key: where it stands in the file; None where it is direct for want of one.
        remarks: what was assumed.
    """

    links: tuple[Link, ...]
    drives: Array
    terminals: Terminals
    circuit: Circuit
    circuit_key: Key | None
    remarks: tuple[Remark, ...]

    @property
    def as_designed(self) -> Circuit:
        """The circuit with every part as designed, whatever was built."""
        circuit: Any = self.circuit
        made: Circuit = replace(circuit, built=()) if self.built else circuit
        return made

    @property
    def built(self) -> bool:
        """Whether the file says what was built."""
        return bool(getattr(self.circuit, "built", None))

    def designed(self, values: Array) -> Array:
        """Return the drives at ``values`` of the circuit as designed, whatever was built."""
        return self.as_designed.stage(self.terminals).forward(self._signals(values))

    def indicated(self, values: Array) -> Array:
        """Return what a face drawn for the designed circuit shows where ``values`` are applied."""
        ideal = self.as_designed.stage(self.terminals)
        step = ideal.inverse(self.links[-1].stage.forward(self._signals(values)))
        for each in reversed(self.links[:-1]):
            step = each.stage.inverse(step)
        return step

    def _signals(self, values: Array) -> Array:
        step = values
        for each in self.links[:-1]:
            step = each.stage.forward(step)
        return step


def link(stage: Stage, values: Array) -> tuple[Link, Array]:
    """Return the stage as a link, and what it makes of ``values``, by whose size it judges rounding."""
    made = stage.forward(values)
    finite = np.abs(made[np.isfinite(made)])
    return Link(stage, float(finite.max()) if finite.size else 1.0), made


@quietly
def wire(scale: Scale, law: Law, key: Key, shared: Circuit | None, coil: Coil) -> Wiring:
    """Return the links from a scale's values to the drive.

    Args:
        scale: the scale, with its span and unit.
        law: its law.
        key: the scale's own key, ``("scale", index)``.
        shared: the circuit that serves scales without one of their own.
        coil: the movement's coil.

    Raises:
        InputError: law, circuit and span do not go together.
    """
    prefix, unit = split_unit(scale.unit)
    factor = 1.0 if law.takes_face_values else prefix
    span = (scale.start * factor, scale.end * factor)
    try:
        stage, zero = law.stage(span, unit), law.zero(span, unit)
    except InputError as error:
        raise error.under(*key) from None
    circuit = scale.circuit or shared or Direct()
    values = sample_places(
        (scale.start, scale.end), _FORMULA_SAMPLES if isinstance(law, Formula) else SAMPLES
    )
    law_link, signals = link(stage, values * factor)
    _check_law(law, stage, scale, key, span=span, takes=circuit.takes, values=values, signals=signals)
    circuit_key: Key | None = (*key, "circuit") if scale.circuit else ("circuit",) if shared else None
    signal_unit = law.signal_unit(unit)
    _check_units(circuit, signal_unit, law, key)
    terminals = Terminals(
        coil=coil,
        signal=lambda value: _signal(stage, value * factor),
        rest_signal=_signal(stage, span[0]) if zero is None else zero,
        full_value=scale.end,
        unit=signal_unit,
    )
    _check_least(circuit, scale, signals, key)
    try:
        circuit_link, drives = link(circuit.stage(terminals), signals)
    except InputError as error:
        raise _placed(error, circuit_key, key) from None
    prefix_link = [link(Affine(factor), values)[0]] if factor != 1.0 else []
    return Wiring(
        links=(*prefix_link, law_link, circuit_link),
        drives=drives,
        terminals=terminals,
        circuit=circuit,
        circuit_key=circuit_key,
        remarks=(
            *_circuit_remarks(circuit, terminals, circuit_key or key),
            *_own_current(circuit, terminals, _under(circuit_key, key, ("full",))),
            *past_points(law, scale, key),
        ),
    )


def half_value(scale: Scale, shared: Circuit | None) -> float | None:
    """Return the half-scale value in face units of the ohms circuit beside a scale, if it has one."""
    half = getattr(scale.circuit or shared, "half", None)
    return half.value / split_unit(scale.unit)[0] if half is not None else None


def _check_law(
    law: Law,
    stage: Stage,
    scale: Scale,
    key: Key,
    *,
    span: Span,
    takes: str | None,
    values: Array,
    signals: Array,
) -> None:
    low, high = stage.domain
    if not (low <= span[0] and span[1] <= high and math.isfinite(span[1]) and np.isfinite(signals).all()):
        _check_law_ends(law, stage, scale, key, span=span, takes=takes)
    try:
        check_moves(values, signals)
    except InputError as error:
        raise InputError(error.message, (*key, "law"), (*key, "from"), (*key, "to")) from None


def _check_law_ends(law: Law, stage: Stage, scale: Scale, key: Key, *, span: Span, takes: str | None) -> None:
    for name, value, at in (("from", scale.start, span[0]), ("to", scale.end, span[1])):
        # A circuit that takes ohms has a limit of its own at an open pair of terminals.
        open_ended = math.isinf(at) and takes == "Ω"
        signal = _signal(stage, at)
        if math.isnan(signal) or (math.isinf(signal) and not open_ended):
            raise InputError(
                f"the {law.kind} law has no signal at {value:g}; {_law_mend(at, stage.domain)}",
                (*key, name),
                (*key, "law"),
            )


def _signal(stage: Stage, at: float) -> float:
    """Return the law's signal at one place; NaN outside its domain."""
    low, high = stage.domain
    return float(stage.forward(np.array([at]))[0]) if low <= at <= high else math.nan


def _law_mend(at: float, domain: Span) -> str:
    low, high = domain
    if math.isinf(at):
        return "end the scale at a finite value"
    if low <= at <= high:
        return "change the law, or let the scale keep clear of it"
    return f"the scale must lie above {low:g}" if at < low else f"the scale must end below {high:g}"


def _check_units(circuit: Circuit, unit: str | None, law: Law, key: Key) -> None:
    if circuit.takes is None or unit is None or circuit.takes == unit:
        return
    plain = isinstance(law, Linear) and law.per is None
    names: dict[str, str] = {"A": "a current in A", "V": "a voltage in V", "Ω": "a resistance in Ω"}
    what = names.get(unit, f"in {unit}") if unit else "a pure number"
    letter = _UNIT_WORDS.get(unit.lower()) if plain else None
    if letter and split_unit(letter)[1] != circuit.takes:
        letter = None
    raise InputError(
        f"the {circuit.kind} takes {names.get(circuit.takes, circuit.takes)}, "
        f"but the scale's signal is {what}; "
        + (f'write unit = "{letter}"' if letter else "change the unit, the law or the circuit"),
        (*key, "unit" if plain else "law"),
    )


def _check_least(circuit: Circuit, scale: Scale, signals: Array, key: Key) -> None:
    """Refuse a scale with signals that its circuit has no meaning for, as a rectifier has none below zero."""
    first, last = float(signals[0]), float(signals[-1])
    lowest = min(first, last)
    if lowest >= circuit.least - _HAIR * abs(first - last):
        return
    name, value = ("from", scale.start) if first < last else ("to", scale.end)
    raise InputError(
        f"at {value:g} the signal is {lowest:.4g} {circuit.takes}, and a {circuit.kind} shows nothing below "
        f"{circuit.least:g} {circuit.takes}; let the scale end there, or take another circuit",
        (*key, name),
        (*key, "law"),
    )


def _placed(error: InputError, circuit_key: Key | None, key: Key) -> InputError:
    """Put a circuit's relative keys under its table; keys of the movement are whole already.

    Where there is no table the circuit is direct, full and at rest at the scale's own ends.
    """
    error.keys = tuple(k if k[:1] == ("movement",) else _under(circuit_key, key, k) for k in error.keys)
    return error


def _under(circuit_key: Key | None, key: Key, own: Key) -> Key:
    if circuit_key:
        return (*circuit_key, *own)
    return (*key, {"full": "to", "rest": "from"}.get(str(own[0]), own[0]))


def _circuit_remarks(circuit: Circuit, terminals: Terminals, key: Key) -> tuple[Remark, ...]:
    return tuple(replace(remark, key=(*key, *remark.key)) for remark in circuit.remarks(terminals))


def _own_current(circuit: Circuit, terminals: Terminals, key: Key) -> tuple[Remark, ...]:
    if not isinstance(circuit, Direct) or terminals.unit not in ("A", "V"):
        return ()
    coil = terminals.coil
    if coil.current is None or (terminals.unit == "V" and coil.resistance is None):
        return ()
    own = coil.current * (coil.resistance or 0.0) if terminals.unit == "V" else coil.current
    full = terminals.signal(terminals.full_value if circuit.full is None else circuit.full)
    if abs(full - own) <= _NEAR_OWN * own:
        return ()
    mend = "give a circuit, or full" if circuit.full is None else "give the circuit that stands between"
    text = (
        f"full deflection is at {full:.4g} {terminals.unit} but the movement's own is {own:.4g} "
        f"{terminals.unit}; {mend}"
    )
    return (Remark(text, key),)


def past_points(law: Law | Observed, scale: Scale, key: Key) -> tuple[Remark, ...]:
    """Return the remark on a scale that runs beyond the points its law was given by."""
    if not isinstance(law, (Table, Observed)):
        return ()
    first, last = law.ends()
    if first <= scale.start and scale.end <= last:
        return ()
    text = (
        f"the scale runs from {scale.start:g} to {scale.end:g} but the points only from {first:g} "
        f"to {last:g}; beyond them the last slope is carried on"
    )
    return (Remark(text, (*key, "law", "points")),)
