"""The circuits that a dial's scales and rows stand on, each once, with their designs."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass, fields, replace
from typing import Any

from dialgen.circuit.design import Design
from dialgen.circuit.terminals import Circuit, Coil, Terminals
from dialgen.dial.build import Dial, ScaleDial
from dialgen.dial.rows import row_wiring
from dialgen.dial.wiring import Wiring
from dialgen.dialfile.models import Scale
from dialgen.errors import InputError, Key, Refused
from dialgen.geometry.points import Observed
from dialgen.quantity import Amount, split_unit


@dataclass(frozen=True, slots=True, eq=False)
class Designed:
    """One circuit of a dial.

    Args:
        key: where it stands in the file; a scale's own place where it is direct for want of one.
        serves: the scales and rows that stand on it, first the one it was designed for: a scale's
            number, and that of its further row, 0 for the scale itself.
        wiring: the scale's way through it; None where the finished circuit was observed.
        design: its parts.
        reswamped: the design with another swamping resistor, in ohms, and with a shunt made for it;
            None where it takes none.
    """

    key: Key
    serves: tuple[tuple[int, int], ...]
    wiring: Wiring | None
    design: Design
    reswamped: Callable[[float], Design] | None

    @property
    def scale(self) -> int:
        """The first scale that it serves, counted from 1."""
        return self.serves[0][0]

    @property
    def also(self) -> int:
        """The further row of that scale that it serves, 0 where it is the scale itself."""
        return self.serves[0][1]


def designs(dial: Dial) -> tuple[Designed, ...]:
    """Return the circuits of a dial in the order of its scales, each once.

    What is described alike and designed for the same signal is one; so are the ranges of one that
    has several.

    Raises:
        Refused: circuits that cannot be designed, each with its keys.
    """
    found: dict[object, Designed] = {}
    errors: list[InputError] = []
    for number, scale in enumerate(dial.scales, 1):
        for also, key, circuit, terminals, wiring in _circuits(dial, scale):
            try:
                made = _designed(key, (number, also), circuit, terminals, wiring)
            except InputError as error:
                errors.append(_placed(error, key))
            else:
                what = _sameness(circuit, made.design)
                first = found.get(what)
                found[what] = replace(first, serves=(*first.serves, *made.serves)) if first else made
    if errors:
        raise Refused(errors)
    return tuple(found.values())


def _sameness(circuit: Circuit, design: Design) -> tuple[object, ...]:
    """Return what two places in a file have in common if one circuit stands for both."""
    described: Any = circuit
    alike = replace(described, range=None) if hasattr(circuit, "range") else circuit
    return alike, design.unit, None if getattr(circuit, "ranges", ()) else design.range


def _circuits(dial: Dial, scale: ScaleDial) -> Iterator[tuple[int, Key, Circuit, Terminals, Wiring | None]]:
    """Yield the circuit of a scale and those of its further rows."""
    file, spec, own = dial.file, scale.spec, scale.wiring
    coil = file.movement.coil
    if own is not None:
        yield 0, own.circuit_key or scale.key, own.circuit, own.terminals, own
    elif (circuit := spec.circuit or file.circuit) is not None:
        key: Key = (*scale.key, "circuit") if spec.circuit else ("circuit",)
        yield 0, key, circuit, _seen_only(circuit, coil, spec), None
    for i, row in enumerate(spec.also):
        if row.circuit is not None and not isinstance(spec.law, Observed):
            there = (*scale.key, "also", i)
            wiring = row_wiring(spec, spec.law, row, there, file.circuit, coil)
            yield i + 1, (*there, "circuit"), row.circuit, wiring.terminals, wiring


def _seen_only(circuit: Circuit, coil: Coil, scale: Scale) -> Terminals:
    """Return the terminals behind an observed scale, whose law is not known: only its own values are."""
    factor, unit = split_unit(scale.unit)

    def signal(value: float) -> float:
        if circuit.takes not in (None, unit):
            raise InputError(
                "the scale was observed, so no signal is known to take the range from; give range", ("range",)
            )
        return value * factor

    return Terminals(coil=coil, signal=signal, rest_signal=0.0, full_value=scale.end, unit=unit)


def _designed(
    key: Key, place: tuple[int, int], circuit: Circuit, terminals: Terminals, wiring: Wiring | None
) -> Designed:
    def reswamped(swamp_ohm: float) -> Design:
        changed: Any = circuit
        # What was built or bought was for the circuit without it.
        anew = {f.name: f.default for f in fields(changed) if f.name in ("built", "rated")}
        made: Design = replace(changed, **anew, swamp=Amount(swamp_ohm, "Ω")).design(terminals)
        return made

    takes_swamp = hasattr(circuit, "swamp")
    return Designed(key, (place,), wiring, circuit.design(terminals), reswamped if takes_swamp else None)


def _placed(error: InputError, key: Key) -> InputError:
    error.keys = tuple(k if k[:1] == ("movement",) else (*key, *k) for k in error.keys)
    return error
