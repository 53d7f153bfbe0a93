"""What a degree does to the pointer: the copper of coil and leads against resistors that stay.

Only resistance is counted here.  Magnet and springs drift too, by less, and largely against each
other (common practice); the diodes of a rectifier are taken as they are.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from dialgen.circuit.design import COIL, Design, Ohms
from dialgen.circuit.names import SWAMP
from dialgen.errors import InputError
from dialgen.parts.wire.materials import MATERIALS
from dialgen.parts.worked import largest, worked
from dialgen.roots import Array, bracketed_roots

COPPER = frozenset({COIL, "leads", "line"})
_PROBE = 0.01
_UNMOVED = 1e-6
_NEAR = 1e-3
"""A drift within this share of the wanted one is as wanted: resistors are written in four figures."""
_DOUBLINGS = 30


@dataclass(frozen=True, slots=True, kw_only=True)
class Materials:
    """How resistances rise with temperature.

    Args:
        copper: the names of what is wound or drawn of copper.
        copper_per_k: copper's rise for a kelvin, as a share.
        others_per_k: that of every other part: manganin, or metal film as good.
    """

    copper: frozenset[str] = COPPER
    copper_per_k: float = MATERIALS["copper"].per_k
    others_per_k: float = MATERIALS["manganin"].per_k

    def warmed(self, ohms: Ohms, kelvin: float) -> Ohms:
        """Return every resistance ``kelvin`` warmer, R·(1 + α·ΔT).

        >>> round(Materials().warmed({"coil": 100.0}, 40.0 - 20.0)["coil"], 6)
        107.86
        """
        return {name: each * (1.0 + self._per_k(name) * kelvin) for name, each in ohms.items()}

    def _per_k(self, name: str) -> float:
        return self.copper_per_k if name in self.copper else self.others_per_k


@dataclass(frozen=True, slots=True, kw_only=True)
class Drift:
    """How the coil's current at full scale changes for a kelvin, in percent; negative is less when warm."""

    case: str
    percent_per_k: float


def drifts(design: Design, materials: Materials | None = None) -> tuple[Drift, ...]:
    """Return the drift of every range: half of what it changes from a kelvin below to one above."""
    of = materials or Materials()
    warm, cold = of.warmed(design.ohms, 1.0), of.warmed(design.ohms, -1.0)
    return tuple(
        Drift(
            case=each.case.name,
            percent_per_k=(each.error_percent(warm) - each.error_percent(cold)) / 2.0,
        )
        for each in worked(design)
    )


@dataclass(frozen=True, slots=True)
class Remade:
    """A part that another swamping resistor asks to be made anew: what it is, and what it has to be."""

    name: str
    before_ohm: float
    ohms: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Swamping:
    """A swamping resistor for a wanted drift, and what it costs.

    Args:
        design: the circuit with it, its other parts made for it; as it is where it is good enough.
        swamp_ohm: the resistor, 0 where the circuit is good enough as it is.
        percent_per_k: the drift with it, of the worst range.
        before_percent_per_k: the drift of the circuit as it is.
        drop_v: the voltage across the terminals at full scale with it, of the scale's own range.
        before_drop_v: that of the circuit as it is.
    """

    design: Design
    swamp_ohm: float
    percent_per_k: float
    before_percent_per_k: float
    drop_v: float
    before_drop_v: float

    def remade(self, before: Design) -> tuple[Remade, ...]:
        """Return the other parts that are no longer what they are in the circuit as it is, as built."""
        there = before.as_built
        return tuple(
            Remade(part.name, there[part.name], part.ohms)
            for part in self.design.parts
            if part.is_made
            and part.name != SWAMP
            and 0 < there.get(part.name, 0.0) < math.inf
            and abs(part.ohms / there[part.name] - 1.0) > _NEAR
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class NoSwamping:
    """A circuit that swamping does not help: the whole resistance is fixed by range and movement.

    Args:
        percent_per_k: the drift, as it is.
        copper_share: what share of the whole resistance is copper.
        range_factor: how many times the range would have to be larger, with this movement; None where
            no range has the wanted drift, as the other parts drift as much.
    """

    percent_per_k: float
    copper_share: float
    range_factor: float | None


def swamping(
    design: Design,
    redesign: Callable[[float], Design],
    wanted_percent_per_k: float,
    materials: Materials | None = None,
) -> Swamping | NoSwamping:
    """Return the smallest swamping resistor with which no range drifts more than is wanted.

    Args:
        design: the circuit as it is.
        redesign: the circuit with a swamping resistor of so many ohms, all else designed anew.
        wanted_percent_per_k: the largest drift, either way.
        materials: what the parts are made of.

    Raises:
        InputError: the wanted drift is not above nothing, or no swamping resistor brings it.
    """
    if not wanted_percent_per_k > 0:
        raise InputError(f"a drift of {wanted_percent_per_k:g} %/K cannot be had; write for example 0.1")
    of = materials or Materials()
    before = _worst(design, of)
    if abs(before) <= wanted_percent_per_k * (1.0 + _NEAR):
        return _swamping(design, design, 0.0, of)
    bare = redesign(0.0)
    if not _moves(redesign, bare, of):
        return _no_swamping(before, wanted_percent_per_k, of)

    def sizes(ohms: Array) -> Array:
        return np.array([abs(_worst(redesign(float(each)), of)) for each in ohms])

    high_ohm = _enough_ohm(sizes, bare.ohms[COIL], wanted_percent_per_k)
    found = bracketed_roots(sizes, np.array([0.0, high_ohm]), np.array([wanted_percent_per_k]))
    return _swamping(redesign(float(found[0])), design, float(found[0]), of)


def _worst(design: Design, materials: Materials) -> float:
    return largest([each.percent_per_k for each in drifts(design, materials)])


def _moves(redesign: Callable[[float], Design], bare: Design, materials: Materials) -> bool:
    """Return whether a little swamping lessens the drift; where there is no room for any, it does not."""
    try:
        after = _worst(redesign(_PROBE * bare.ohms[COIL]), materials)
    except InputError:
        return False
    return abs(after) < abs(_worst(bare, materials)) * (1.0 - _UNMOVED)


def _enough_ohm(sizes: Callable[[Array], Array], coil_ohm: float, wanted: float) -> float:
    high_ohm = coil_ohm
    for _ in range(_DOUBLINGS):
        if sizes(np.array([high_ohm]))[0] <= wanted:
            return high_ohm
        high_ohm *= 2.0
    raise InputError(f"no swamping resistor brings the drift to {wanted:g} %/K; ask for more")


def _swamping(swamped: Design, design: Design, swamp_ohm: float, materials: Materials) -> Swamping:
    with_it, without = worked(swamped)[swamped.shown], worked(design)[design.shown]
    return Swamping(
        design=swamped,
        swamp_ohm=swamp_ohm,
        percent_per_k=_worst(swamped, materials),
        before_percent_per_k=_worst(design, materials),
        drop_v=with_it.full.drop_v,
        before_drop_v=without.full.drop_v,
    )


def _no_swamping(percent_per_k: float, wanted_percent_per_k: float, materials: Materials) -> NoSwamping:
    """Return what else would do: of R_copper in R, the drift is others + (copper - others)·R_copper/R."""
    others, apart = materials.others_per_k, materials.copper_per_k - materials.others_per_k
    share = (abs(percent_per_k) / 100.0 - others) / apart
    wanted = (wanted_percent_per_k / 100.0 - others) / apart
    return NoSwamping(
        percent_per_k=percent_per_k,
        copper_share=share,
        range_factor=share / wanted if wanted > 0 else None,
    )
