"""How the diodes of a rectifier instrument are connected.

Each connection is two terminals, "in" and "out", the multiplier from "in" to node "a", and the coil, with
its shunt if it has one, from node "p" to node "n":

- *bridge*: four diodes, out of "a" and "out" into "p", out of "n" into "a" and "out".  Both half cycles
  pass two of them in series.
- *half wave*: one diode from "a" into "p", "n" being "out"; a second one, from "out" into "a", passes the
  other half cycle by the coil, so that the first never sees the signal in reverse.  Where there is no
  multiplier the second would short the terminals and is left out.
- *half bridge*: two diodes, out of "a" and "out" into "p"; two legs in place of the other two, leg 1 from
  "n" to "a", leg 2 from "n" to "out".  Both half cycles pass one diode, and the legs pass current that the
  coil never sees.

Diodes that do not conduct are taken as open: the saturation current that a real one leaks is left out, as it
is in the instrument's usual formulas.  With the others conducting, everything else is resistors.  So a half
cycle is a resistor network that the junctions see through one port, and it is held here in two ways: as
`Connection.seen`, the closed formulas that stage and design follow, and as `Connection.halves`, the
network itself, from which the load of every part is worked.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass

from dialgen.circuit.design import Ohms
from dialgen.circuit.names import MULTIPLIER
from dialgen.circuit.network import Branch, Feed, Solution, solve
from dialgen.stage import Array

SOURCE = "source"


@dataclass(frozen=True, slots=True)
class Half:
    """A half cycle's network, in the direction in which current flows out of its source.

    Args:
        branches: its resistors.
        conducts: the nodes before and behind the conducting junctions; None where none conducts.
        junctions: how many of them are in series there.
        blocks: the nodes behind and before a diode that bears the highest voltage in reverse.
        share: of the cycle.
    """

    branches: tuple[Branch, ...]
    conducts: tuple[str, str] | None
    junctions: int
    blocks: tuple[str, str]
    share: float


@dataclass(frozen=True, slots=True)
class Connection:
    """What tells one connection from another.

    Args:
        junctions: how many diodes conduct in series.
        pulses: half cycles that reach the coil in each cycle.
        seen: from multiplier, coil (with its shunt) and leg in ohms to the resistance in series with the
            conducting junctions, and the share of the signal that drives it.
        halves: the networks of a cycle.
    """

    junctions: int
    pulses: int
    seen: Callable[[Array, float, float], tuple[Array, Array]]
    halves: Callable[[Ohms], tuple[Half, ...]]


@dataclass(frozen=True, slots=True, eq=False)
class Port:
    """A half cycle's network as its junctions see it, by superposition of signal and junction current.

    Args:
        half: the network.
        by_signal: what one volt of signal does with the junctions open.
        by_current: what one ampere through the junctions does with the terminals shorted.
    """

    half: Half
    by_signal: Solution
    by_current: Solution

    @classmethod
    def of(cls, half: Half) -> Port:
        """Return the port of a half cycle's network."""
        before, behind = half.conducts or ("in", "in")
        return cls(
            half,
            solve([*half.branches, Branch(SOURCE, "out", "in", 0.0, 1.0)]),
            solve([*half.branches, Branch(SOURCE, "out", "in", 0.0)], Feed(behind, before, 1.0)),
        )

    def driven(self) -> tuple[float, float]:
        """Return the resistance in series with the junctions, and the share of the signal that drives it."""
        assert self.half.conducts is not None
        return -self.by_current.drop_v(*self.half.conducts), self.by_signal.drop_v(*self.half.conducts)

    def currents(self, name: str) -> tuple[float, float]:
        """Return a part's current by a volt of signal, and by an ampere through the junctions."""
        return self.by_signal.loads[name].current_a, self.by_current.loads[name].current_a

    def blocked_v(self, signal_v: float, current_a: float) -> float:
        """Return the voltage across the nodes of the blocking diode."""
        blocks = self.half.blocks
        return signal_v * self.by_signal.drop_v(*blocks) + current_a * self.by_current.drop_v(*blocks)


def _in_series(multiplier_ohm: Array, coil_ohm: float, leg_ohm: float) -> tuple[Array, Array]:
    return multiplier_ohm + coil_ohm, multiplier_ohm * 0.0 + 1.0


def _between_legs(multiplier_ohm: Array, coil_ohm: float, leg_ohm: float) -> tuple[Array, Array]:
    """Return Thévenin's source: i·(Rm + R/2 + Rx/(4k)) + drop = v/(2k), with k = 1 + Rx/(2R)."""
    k = 1.0 + multiplier_ohm / (2.0 * leg_ohm)
    return coil_ohm + leg_ohm / 2.0 + multiplier_ohm / (4.0 * k), 0.5 / k


def _parts(ohms: Ohms, **ends: tuple[str, str]) -> tuple[Branch, ...]:
    """Return a branch for each part that there is; names have underscores for spaces."""
    named = {name.replace("_", " "): nodes for name, nodes in ends.items()}
    return tuple(Branch(name, *nodes, ohms[name]) for name, nodes in named.items() if name in ohms)


def _bridge(ohms: Ohms) -> tuple[Half, ...]:
    # Both conducting diodes at the upper node: where in the loop they are changes no current.
    parts = _parts(ohms, multiplier=("in", "a"), coil=("p", "out"), coil_shunt=("p", "out"))
    return (Half(parts, ("a", "p"), 2, ("p", "out"), 1.0),)


def _half_wave(ohms: Ohms) -> tuple[Half, ...]:
    parts = _parts(ohms, multiplier=("in", "a"), coil=("p", "out"), coil_shunt=("p", "out"))
    by_pass = ("a", "out") if ohms[MULTIPLIER] else None
    return Half(parts, ("a", "p"), 1, ("a", "out"), 0.5), Half(parts, by_pass, 1, ("a", "p"), 0.5)


def _half_bridge(ohms: Ohms) -> tuple[Half, ...]:
    coil = _parts(ohms, coil=("p", "n"), coil_shunt=("p", "n"))
    forth = _parts(ohms, multiplier=("in", "a"), leg_1=("a", "n"), leg_2=("n", "out"))
    # The other half cycle enters at the terminal without the multiplier and leaves through it.
    back = _parts(ohms, leg_2=("in", "n"), leg_1=("n", "a"), multiplier=("a", "out"))
    return (
        Half((*forth, *coil), ("a", "p"), 1, ("p", "out"), 0.5),
        Half((*back, *coil), ("in", "p"), 1, ("p", "a"), 0.5),
    )


CONNECTIONS: Mapping[str, Connection] = {
    "bridge": Connection(2, 2, _in_series, _bridge),
    "half bridge": Connection(1, 2, _between_legs, _half_bridge),
    "half wave": Connection(1, 1, _in_series, _half_wave),
}


def coil_with_shunt(coil_ohm: float, shunt_ohm: float | None) -> tuple[float, float]:
    """Return the resistance of a coil with its shunt, and the coil's share of the current."""
    share = 1.0 if shunt_ohm is None else shunt_ohm / (shunt_ohm + coil_ohm)
    return coil_ohm * share, share
