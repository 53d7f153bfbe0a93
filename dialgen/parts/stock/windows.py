"""Every network within a window of ohms, also where there are far too many networks to hold.

A network of six parts is two smaller ones in series or in parallel.  With the smaller of the two
taken from its shelf, the window that the other must lie in follows, and the other is looked up on its
own shelf, which is in order, or sought in the same way where that shelf is not filled.  No network
of a window is missed: any network of two parts or more can be parted so, its smaller side having at
most half of the parts.  Most are met several times.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from dialgen.parts.stock.drawer import Lot
from dialgen.parts.stock.networks import Network
from dialgen.parts.stock.shelves import (
    KINDS,
    SERIES,
    SINGLE,
    Floats,
    Leaves,
    Places,
    Shelves,
    joined,
    runs,
    wired,
)

_AT_ONCE = 300_000
_ROUNDING = 1e-9


@dataclass(frozen=True, slots=True, eq=False)
class Step:
    """Networks from one shelf, each joined to what is found behind it."""

    kind: int
    size: int
    places: Places

    def at(self, rows: Places) -> Step:
        """Return some of them."""
        return Step(self.kind, self.size, self.places[rows])


@dataclass(frozen=True, slots=True, eq=False)
class Windows:
    """What is sought: for every row of the steps taken so far, ohms from low to high."""

    low: Floats
    high: Floats
    steps: tuple[Step, ...] = ()


@dataclass(frozen=True, slots=True, eq=False)
class Found:
    """Networks that were found, as places on a shelf and the steps that lead from there outwards."""

    shelves: Shelves
    size: int
    places: Places
    steps: tuple[Step, ...]

    def at(self, rows: Places) -> Found:
        """Return some of them."""
        return Found(self.shelves, self.size, self.places[rows], tuple(step.at(rows) for step in self.steps))

    def worked(self) -> tuple[Floats, Floats]:
        """Return what each comes to, and the largest share of the power in one part."""
        shelf = self.shelves[self.size]
        whole = shelf.ohms[self.places], shelf.worst[self.places]
        for step in reversed(self.steps):
            shelf = self.shelves[step.size]
            whole = joined(step.kind, whole, (shelf.ohms[step.places], shelf.worst[step.places]))
        return whole

    def leaves(self) -> Leaves:
        """Return the lots that the parts of each are from."""
        pieces = [(self.size, self.places), *((step.size, step.places) for step in self.steps)]
        return np.concatenate([self.shelves[size].leaves[places] for size, places in pieces], axis=1)

    def network(self, row: int) -> Network:
        """Return one of them as a tree."""
        tree = self.shelves.network(self.shelves[self.size].first + int(self.places[row]))
        for step in reversed(self.steps):
            number = self.shelves[step.size].first + int(step.places[row])
            tree = wired(step.kind, tree, self.shelves.network(number))
        return tree


@dataclass(frozen=True, slots=True)
class Slab:
    """A part of the work: one side of the join is from these places of this shelf.

    ``size`` is nought where the whole network is looked up at once.
    """

    kind: int = SINGLE
    size: int = 0
    start: int = 0
    stop: int = 1


WHOLE = Slab()


def slabs(shelves: Shelves, size: int, outer: Slab = WHOLE, windows: int = 1) -> Iterator[Slab]:
    """Yield the parts of the work for networks of a size, none too large to be done at once.

    Args:
        shelves: what is held.
        size: the number of parts.
        outer: what the networks are to be joined to.
        windows: in how many windows they are sought.
    """
    if size <= len(shelves):
        yield WHOLE
        return
    rows = max(_AT_ONCE // windows, 1)
    for kind, smaller in _splits(size, outer):
        length = len(shelves[smaller].ohms)
        for start in range(0, length, rows):
            yield Slab(kind, smaller, start, min(start + rows, length))


def _splits(size: int, outer: Slab) -> Iterator[tuple[int, int]]:
    """Yield how a network is parted: the kind of the join and the smaller side's number of parts.

    A join within one of the same kind, to s parts, is asked for only where the two together cannot be
    parted more evenly, so where no member has fewer than size − s parts.
    """
    for kind in KINDS:
        least = max(size - outer.size, 1) if kind == outer.kind else 1
        yield from ((kind, smaller) for smaller in range(least, size // 2 + 1))


def look_ups(shelves: Shelves, size: int, outer: Slab = WHOLE) -> int:
    """Return how many times a shelf is looked into for a size, at most."""
    if size <= len(shelves):
        return 1
    return sum(
        len(shelves[smaller].ohms) * look_ups(shelves, size - smaller, Slab(kind, smaller))
        for kind, smaller in _splits(size, outer)
    )


def look_ups_of(shelves: Shelves, size: int, slab: Slab) -> int:
    """Return how many of them are for one part of the work."""
    return (slab.stop - slab.start) * look_ups(shelves, size - slab.size, slab)


def found_in(shelves: Shelves, size: int, slab: Slab, windows: Windows) -> Iterator[Found]:
    """Yield all networks of a size, in the windows, that are in one part of the work.

    Whether there are pieces enough for the sides together is not asked.
    """
    if not slab.size:
        yield from _looked_up(shelves, size, windows)
        return
    rest = size - slab.size
    narrowed = _narrowed(shelves, rest, slab, windows)
    if len(narrowed.low):
        for inner in slabs(shelves, rest, slab, len(narrowed.low)):
            yield from found_in(shelves, rest, inner, narrowed)


def reach_ohm(lots: tuple[Lot, ...], size: int) -> tuple[float, float]:
    """Return the least and the most that networks of so many parts come to, as far as pieces last."""
    pieces = [lot.ohms for lot in lots for _ in range(min(lot.count, size))]
    return 1.0 / sum(1.0 / ohms for ohms in pieces[:size]), sum(pieces[-size:])


def _looked_up(shelves: Shelves, size: int, windows: Windows) -> Iterator[Found]:
    ohms = shelves[size].ohms
    starts = np.searchsorted(ohms, windows.low)
    # Most windows are empty, so the other end is worth looking up for few.
    some = np.flatnonzero(ohms.take(starts, mode="clip") <= windows.high)
    lengths = np.searchsorted(ohms, windows.high[some], side="right") - starts[some]
    full = np.flatnonzero(np.diff(np.cumsum(lengths) // _AT_ONCE)) + 1
    for rows, counts in zip(np.split(some, full), np.split(lengths, full), strict=True):
        if counts.any():
            each = np.repeat(rows, counts)
            places = runs(starts[rows], counts)
            yield Found(shelves, size, places, tuple(step.at(each) for step in windows.steps))


def _narrowed(shelves: Shelves, rest: int, slab: Slab, windows: Windows) -> Windows:
    """Return the windows of what is joined to each network of the slab, where anything can be."""
    one = shelves[slab.size].ohms[slab.start : slab.stop]
    part = _beside if slab.kind == SERIES else _across
    low, high = part(windows.low[:, None], one), part(windows.high[:, None], one)
    least, most = reach_ohm(shelves.lots, rest)
    rows, places = np.nonzero((high >= least * (1 - _ROUNDING)) & (low <= most * (1 + _ROUNDING)))
    step = Step(slab.kind, slab.size, places + slab.start)
    steps = (*(step.at(rows) for step in windows.steps), step)
    return Windows(low[rows, places], high[rows, places], steps)


def _beside(whole: Floats, one: Floats) -> Floats:
    """Return what is in series with one where both come to the whole; nought where nothing does."""
    return np.maximum(whole - one, 0.0)


def _across(whole: Floats, one: Floats) -> Floats:
    """Return what is in parallel with one where both come to the whole; infinite where nothing does."""
    with np.errstate(divide="ignore"):
        siemens = 1.0 / whole - 1.0 / one
        return np.where(siemens > 0.0, 1.0 / siemens, np.inf)
