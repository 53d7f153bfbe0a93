"""Every network of so many parts, as arrays: a shelf each for one part, two parts, three parts.

Each network is on its shelf once: it is built from its largest member (by the order of shelves and
places, which is any fixed order) and the network of all the others, whose own largest member must
not come after it.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, replace
from types import MappingProxyType

import numpy as np
from numpy.typing import NDArray

from dialgen.parts.stock.drawer import Lot
from dialgen.parts.stock.networks import Network, Single, in_parallel, in_series

Floats = NDArray[np.float64]
Places = NDArray[np.intp]
Kinds = NDArray[np.int8]
Leaves = NDArray[np.int16]

SINGLE, SERIES, PARALLEL = 0, 1, 2
KINDS = (SERIES, PARALLEL)
LONGEST = 300_000
"""A shelf of more networks is not filled unless there is no way without it."""


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class Shelf:
    """All networks of so many parts, by ascending ohms, a column for each thing known of them.

    Args:
        size: the number of parts.
        first: the number of networks on the smaller shelves, where the running number starts.
        ohms: what each comes to.
        worst: the largest share of the power in one part.
        kinds: `SINGLE`, `SERIES` or `PARALLEL`.
        heads: the running number of the largest member.
        rests: the running number of all other members together.
        leaves: the lots that its parts are from, ascending along each row.
    """

    size: int
    first: int
    ohms: Floats
    worst: Floats
    kinds: Kinds
    heads: Places
    rests: Places
    leaves: Leaves

    def largest_members(self, kind: int) -> Places:
        """Return the running number of each one's largest member in a network of this kind."""
        return np.where(self.kinds == kind, self.heads, self.first + np.arange(len(self.ohms)))


@dataclass(frozen=True, slots=True, eq=False)
class Shelves:
    """The shelves from one part up, and the drawer they were filled from."""

    lots: tuple[Lot, ...]
    filled: tuple[Shelf, ...]

    def __getitem__(self, size: int) -> Shelf:
        return self.filled[size - 1]

    def __len__(self) -> int:
        return len(self.filled)

    def stocked(self, leaves: Leaves) -> NDArray[np.bool_]:
        """Return for each row of lots whether there are pieces enough."""
        counts = np.array([min(lot.count, leaves.shape[1]) for lot in self.lots])
        ordered = np.sort(leaves, axis=1)
        # One too many shows as the same lot that many places before.
        before = np.arange(leaves.shape[1]) - counts[ordered]
        same = np.take_along_axis(ordered, np.maximum(before, 0), axis=1) == ordered
        short: NDArray[np.bool_] = (same & (before >= 0)).any(axis=1)
        return ~short

    def network(self, number: int) -> Network:
        """Return the network of a running number as a tree."""
        shelf = next(shelf for shelf in reversed(self.filled) if number >= shelf.first)
        place = number - shelf.first
        if shelf.size == 1:
            return Single(self.lots[place].ohms)
        members = (self.network(int(of[place])) for of in (shelf.heads, shelf.rests))
        return wired(int(shelf.kinds[place]), *members)


def wired(kind: int, *members: Network) -> Network:
    """Return the networks joined in series or in parallel."""
    return _WIRED[kind](*members)


def joined(kind: int, one: tuple[Floats, Floats], other: tuple[Floats, Floats]) -> tuple[Floats, Floats]:
    """Return ohms and worst share of pairs of networks, each given as ohms and worst share."""
    (a, worst_a), (b, worst_b) = one, other
    sum_ohm = a + b
    # In series the power is as the ohms, in parallel as those of the other one.
    share_a, share_b = (a / sum_ohm, b / sum_ohm) if kind == SERIES else (b / sum_ohm, a / sum_ohm)
    ohms = sum_ohm if kind == SERIES else a * share_a
    return ohms, np.maximum(worst_a * share_a, worst_b * share_b)


def stocked_shelves(lots: tuple[Lot, ...], most: int, room: Mapping[int, int], least: int) -> Shelves:
    """Return as many shelves as are asked for, fewer where the next would be too long.

    Args:
        lots: the drawer, all values different.
        most: the number of shelves.
        room: how many networks each of them would have.
        least: how many shelves there must be.
    """
    shelves = Shelves(lots, (_singles(lots),))
    for size in range(2, most + 1):
        if size > least and room[size] > LONGEST:
            break
        shelves = replace(shelves, filled=(*shelves.filled, _next(shelves)))
    return shelves


def _singles(lots: Sequence[Lot]) -> Shelf:
    count = len(lots)
    none = np.full(count, -1, np.intp)
    return Shelf(
        size=1,
        first=0,
        ohms=np.array([lot.ohms for lot in lots]),
        worst=np.ones(count),
        kinds=np.full(count, SINGLE, np.int8),
        heads=none,
        rests=none,
        leaves=np.arange(count, dtype=np.int16)[:, None],
    )


def _next(shelves: Shelves) -> Shelf:
    """Return the shelf above the last one."""
    size = len(shelves) + 1
    made = [_made(shelves, kind, size) for kind in KINDS]
    ohms, worst, kinds, heads, rests, leaves = (np.concatenate(column) for column in zip(*made, strict=True))
    order = np.argsort(ohms, kind="stable")
    last = shelves[size - 1]
    return Shelf(
        size=size,
        first=last.first + len(last.ohms),
        ohms=ohms[order],
        worst=worst[order],
        kinds=kinds[order],
        heads=heads[order],
        rests=rests[order],
        leaves=leaves[order],
    )


Columns = tuple[Floats, Floats, Kinds, Places, Places, Leaves]


def _made(shelves: Shelves, kind: int, size: int) -> Columns:
    """Return all networks of one kind and size."""
    splits = [_split(shelves[head], shelves[size - head], kind, shelves) for head in range(1, size)]
    ohms, worst, kinds, heads, rests, leaves = (
        np.concatenate(column) for column in zip(*splits, strict=True)
    )
    return ohms, worst, kinds, heads, rests, leaves


def _split(head: Shelf, rest: Shelf, kind: int, shelves: Shelves) -> Columns:
    """Return all networks of one kind whose largest member is from one shelf, the rest from another."""
    members = np.flatnonzero(head.kinds != kind)
    largest = rest.largest_members(kind)
    order = np.argsort(largest, kind="stable")
    allowed = np.searchsorted(largest[order], head.first + members, side="right")
    ones, others = np.repeat(members, allowed), order[runs(np.zeros_like(allowed), allowed)]
    leaves = np.concatenate((head.leaves[ones], rest.leaves[others]), axis=1)
    kept = np.flatnonzero(shelves.stocked(leaves))
    ones, others = ones[kept], others[kept]
    ohms, worst = joined(kind, (head.ohms[ones], head.worst[ones]), (rest.ohms[others], rest.worst[others]))
    kinds = np.full(len(kept), kind, np.int8)
    return ohms, worst, kinds, head.first + ones, rest.first + others, np.sort(leaves[kept], axis=1)


def runs(starts: Places, lengths: Places) -> Places:
    """Return the runs of whole numbers, one after another.

    >>> runs(np.array([5, 0]), np.array([2, 3])).tolist()
    [5, 6, 0, 1, 2]
    """
    ends = np.cumsum(lengths)
    return np.arange(ends[-1] if len(ends) else 0) + np.repeat(starts - ends + lengths, lengths)


_WIRED: Mapping[int, Callable[..., Network]] = MappingProxyType({SERIES: in_series, PARALLEL: in_parallel})
