"""Series-parallel networks of resistors: what they come to, who carries the power, how many there are.

A network is a part, a series of parts and parallel groups, or a parallel of parts and series groups.
Kept in this form, with the members in one order, two networks are equal where they are wired alike.
"""

from __future__ import annotations

import math
from collections import Counter
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import cache
from itertools import product

from dialgen.quantity import engineered


@dataclass(frozen=True, slots=True)
class Single:
    """One resistor."""

    ohms: float

    @property
    def shares(self) -> tuple[float, ...]:
        """All of the power is its own."""
        return (1.0,)

    @property
    def drawing(self) -> str:
        """Its value as it is written on the bench; see `figure`."""
        return figure(self.ohms)


@dataclass(frozen=True, slots=True)
class Series:
    """Two or more single resistors or parallel groups in series; made by `in_series`."""

    members: tuple[Network, ...]

    @property
    def ohms(self) -> float:
        """The sum."""
        return math.fsum(member.ohms for member in self.members)

    @property
    def shares(self) -> tuple[float, ...]:
        """Each part's share of the power, as drawn: one current for all, so as the ohms."""
        whole_ohm = self.ohms
        return tuple(m.ohms / whole_ohm * share for m in self.members for share in m.shares)

    @property
    def drawing(self) -> str:
        """One line, groups in brackets."""
        return _drawn(self.members, " + ")


@dataclass(frozen=True, slots=True)
class Parallel:
    """Two or more single resistors or series groups in parallel; made by `in_parallel`."""

    members: tuple[Network, ...]

    @property
    def ohms(self) -> float:
        """The inverse of the sum of the inverses."""
        return 1.0 / math.fsum(1.0 / member.ohms for member in self.members)

    @property
    def shares(self) -> tuple[float, ...]:
        """Each part's share of the power, as drawn: one voltage for all, so as the inverse ohms."""
        whole_ohm = self.ohms
        return tuple(whole_ohm / m.ohms * share for m in self.members for share in m.shares)

    @property
    def drawing(self) -> str:
        """One line, groups in brackets."""
        return _drawn(self.members, " || ")


Network = Single | Series | Parallel


def in_series(*networks: Network) -> Series:
    """Return the networks in series.

    >>> in_series(Single(3.3), in_parallel(Single(10.0), Single(10.0))).drawing
    '(10 || 10) + 3.3'
    """
    return Series(_ordered(m for n in networks for m in (n.members if isinstance(n, Series) else (n,))))


def in_parallel(*networks: Network) -> Parallel:
    """Return the networks in parallel.

    >>> in_parallel(in_parallel(Single(10.0), Single(22.0)), Single(4700.0)).drawing
    '4.7k || 22 || 10'
    """
    return Parallel(_ordered(m for n in networks for m in (n.members if isinstance(n, Parallel) else (n,))))


def figure(ohms: float) -> str:
    """Return a resistance without its unit, as short as the trade writes it.

    >>> [figure(ohms) for ohms in (10.0, 4700.0, 0.47, 0.005, 2.2e6)]
    ['10', '4.7k', '0.47', '5m', '2.2M']
    """
    return f"{ohms:.12g}" if 0.1 <= ohms < 1.0 else engineered(ohms, "", digits=12).replace(" ", "")


def networks_of(counts: Sequence[int], parts: int) -> int:
    """Return how many different networks of so many parts a drawer gives.

    Two networks differ where they are wired differently or a part in one has another value; the order
    within a series or a parallel, and which of several equal pieces is taken, make no difference.

    Args:
        counts: how many pieces there are of each value.
        parts: how many of them the network has, all of them counted.

    >>> [networks_of([8], parts) for parts in range(1, 9)]  # OEIS A000084
    [1, 2, 4, 10, 24, 66, 180, 522]
    """
    return sum(_wirings(shape) * _choices(shape, counts) for shape in _shapes(parts, parts))


def _ordered(members: Iterator[Network]) -> tuple[Network, ...]:
    """Return the members as they are drawn: groups before single parts, large before small."""
    return tuple(sorted(members, key=lambda m: (-len(m.shares), -m.ohms, m.drawing)))


def _drawn(members: tuple[Network, ...], sign: str) -> str:
    return sign.join(m.drawing if isinstance(m, Single) else f"({m.drawing})" for m in members)


def _shapes(parts: int, largest: int) -> Iterator[tuple[int, ...]]:
    """Yield every way to part a number: how many pieces of one value, of another, and so on."""
    if not parts:
        yield ()
    for first in range(min(parts, largest), 0, -1):
        for others in _shapes(parts - first, first):
            yield (first, *others)


def _choices(shape: tuple[int, ...], counts: Sequence[int]) -> int:
    """Return in how many ways the values can be chosen, each with pieces enough for its place."""
    ways, taken = 1, 0
    for pieces, places in sorted(Counter(shape).items(), reverse=True):
        ways *= math.comb(max(sum(count >= pieces for count in counts) - taken, 0), places)
        taken += places
    return ways


@cache
def _wirings(shape: tuple[int, ...]) -> int:
    """Return how many networks have exactly so many pieces of one value, of another, and so on.

    By duality half of them are series and half parallel.  A series is a multiset of single parts and
    parallel groups, so the numbers are each other's Euler transform, here in several variables
    (Riordan and Shannon, J. Math. and Phys. 21 (1942) 83, for one): with g(u) groups or parts of content u,
    v₁·all(v) is the sum over u of all(v − u) times the sum over d dividing u of u₁/d·g(u/d).
    """
    if sum(shape) <= 1:
        return 1
    whole = 0
    for taken in product(*(range(pieces + 1) for pieces in shape)):
        if not taken[0]:
            continue
        left = _shape(pieces - used for pieces, used in zip(shape, taken, strict=True))
        shared = math.gcd(*taken)
        whole += _wirings(left) * sum(
            taken[0] // d * _groups(_shape(used // d for used in taken))
            for d in range(1 if left else 2, shared + 1)
            if not shared % d
        )
    # Left out was the group that is all of it, shape[0] times half of what is sought.
    return 2 * whole // shape[0]


def _groups(shape: tuple[int, ...]) -> int:
    return _wirings(shape) // 2 if sum(shape) > 1 else 1


def _shape(pieces: Iterator[int]) -> tuple[int, ...]:
    return tuple(sorted((count for count in pieces if count), reverse=True))
