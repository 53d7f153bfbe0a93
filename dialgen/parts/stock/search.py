"""The best network of resistors from the drawer for a wanted value.

All series-parallel networks are covered: of up to eight parts from a drawer of at most twelve values,
of up to six from one of at most 150, of up to four from a larger one.  They are not all held; see
`dialgen.parts.stock.windows`.  The windows close in on the wanted value as better networks are found, so
that the last size, with by far the most networks, costs least for each.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Mapping
from dataclasses import dataclass, field, replace

import numpy as np

from dialgen.errors import InputError
from dialgen.parts.stock.drawer import Lot, merged
from dialgen.parts.stock.networks import Network, figure, networks_of
from dialgen.parts.stock.shelves import Floats, Places, Shelves, stocked_shelves
from dialgen.parts.stock.windows import Found, Windows, found_in, look_ups, look_ups_of, reach_ohm, slabs

MOST_PARTS = ((12, 8), (150, 6), (1500, 4))
"""Up to so many values in the drawer, networks of up to so many parts are sought; for time and room."""
ALIKE = 1e-9
"""Values are told apart in steps of this share of the wanted value."""
_ROUNDING = 1e-12

Progress = Callable[[int, int], None]


@dataclass(frozen=True, slots=True, kw_only=True)
class Candidate:
    """A network from the drawer.

    Args:
        network: the parts and how they are joined.
        ohms: what it comes to.
        error: by how much of the wanted value it is too large.
        parts: how many there are.
        share: the largest share of the whole power in one part.
        drawing: the network in one line, "(10 || 10) + 3.3".
    """

    network: Network
    ohms: float
    error: float
    parts: int
    share: float
    drawing: str

    @property
    def spread(self) -> float:
        """How unevenly the power is spread: the worst part's over the mean; 1 is even."""
        return self.share * self.parts


@dataclass(frozen=True, slots=True, kw_only=True)
class Search:
    """What the drawer gives for a wanted value.

    Args:
        candidates: the best networks, each of another value and for its value with the fewest parts,
            among those the most even; by error, then parts, then spread.
        simpler: the best of one part, then what each part more gains; those that gain nothing are
            left out, so the last is the first of the candidates.
        cooler: networks of the first candidate's value with more parts, each with less power in its
            worst part than those before it.
        searched: how many different networks are covered: each wiring of each choice of values that
            the pieces last for, by `dialgen.parts.stock.networks.networks_of`.
        most_parts: the most parts that they have.
    """

    candidates: tuple[Candidate, ...]
    simpler: tuple[Candidate, ...]
    cooler: tuple[Candidate, ...]
    searched: int
    most_parts: int


def search(
    target_ohm: float,
    lots: Iterable[Lot],
    *,
    most: int = MOST_PARTS[0][1],
    wanted: int = 10,
    progress: Progress | None = None,
) -> Search:
    """Return the best networks for a value; none other that the drawer gives is better.

    Args:
        target_ohm: the wanted value.
        lots: the drawer; lots of one value are taken together.
        most: how many parts a network may have; never more than `MOST_PARTS` has for this drawer.
        wanted: how many candidates are listed, if there are so many different values.
        progress: told how much of the work is done, and how much there is, in steps of any unit.

    Raises:
        InputError: the value is not above nothing, the drawer is empty, or no part is allowed.
    """
    drawer = merged(lots)
    _check(target_ohm, drawer, most, wanted)
    counts = [lot.count for lot in drawer]
    most_parts = min(most, sum(counts), next(parts for few, parts in MOST_PARTS if len(drawer) <= few))
    room = {size: networks_of(counts, size) for size in range(1, most_parts + 1)}
    shelves = stocked_shelves(drawer, most_parts, room, least=most_parts // 2)
    least_ohm, most_ohm = reach_ohm(drawer, most_parts)
    # What is beyond reach is sought at the end of the reach: the order of closeness is the same.
    best = _Best(min(max(target_ohm, least_ohm), most_ohm), wanted)
    firsts: list[_Entry] = []
    for reached in _closing_in(shelves, best, most_parts, progress):
        best, first = reached, min(reached.entries.values(), key=_rank)
        if not firsts or abs(first.level) < abs(firsts[-1].level):
            firsts.append(first)
    listed = sorted(_fewest_parts(best.entries.values()), key=_rank)[:wanted]
    return Search(
        candidates=tuple(_candidate(entry, target_ohm) for entry in listed),
        simpler=tuple(_candidate(entry, target_ohm) for entry in firsts),
        cooler=tuple(_candidate(entry, target_ohm) for entry in _cooler(listed[0], best)),
        searched=sum(room.values()),
        most_parts=most_parts,
    )


@dataclass(frozen=True, slots=True, eq=False)
class _Entry:
    """The coolest network of one value and size; it becomes a tree only if it is listed."""

    level: float
    parts: int
    worst: float
    found: Found


@dataclass(frozen=True, slots=True, eq=False)
class _Best:
    """The networks closest to the aim so far, by value and number of parts.

    Values are counted in levels, whole steps of `ALIKE` from the aim; networks further than the bound
    are no longer sought.
    """

    aim_ohm: float
    wanted: int
    entries: Mapping[tuple[float, int], _Entry] = field(default_factory=dict)
    bound: float = math.inf

    def windows(self) -> Windows:
        """Return where the networks are that are still sought."""
        half = (self.bound + 0.5) * ALIKE + _ROUNDING
        low, high = self.aim_ohm * max(1.0 - half, 0.0), self.aim_ohm * (1.0 + half)
        return Windows(np.array([low]), np.array([high]))

    def with_found(self, found: Found, parts: int) -> _Best:
        """Return the best of these and of what was found."""
        ohms, worst = found.worked()
        levels = np.rint((ohms / self.aim_ohm - 1.0) / ALIKE)
        near = np.flatnonzero(np.abs(levels) <= self.bound)
        near = near[found.shelves.stocked(found.at(near).leaves())]
        rows = near[_leaders(levels[near], worst[near], self.wanted)]
        entries = dict(self.entries)
        for row in rows.tolist():
            new = _Entry(float(levels[row]), parts, float(worst[row]), found.at(np.array([row])))
            old = entries.get((new.level, parts))
            # Not for a last digit, so that the choice does not hang on rounding.
            if old is None or new.worst < old.worst - _ROUNDING:
                entries[new.level, parts] = new
        bound = self._bound(entries)
        return replace(self, entries={k: e for k, e in entries.items() if abs(k[0]) <= bound}, bound=bound)

    def _bound(self, entries: Mapping[tuple[float, int], _Entry]) -> float:
        away = sorted(abs(level) for level in {level for level, _ in entries})
        return away[self.wanted - 1] if len(away) >= self.wanted else math.inf


def _closing_in(shelves: Shelves, best: _Best, most_parts: int, progress: Progress | None) -> Iterator[_Best]:
    """Yield the best networks of up to so many parts, for every size."""
    sizes = range(1, most_parts + 1)
    done, whole = 0, sum(look_ups(shelves, size) for size in sizes)
    for size in sizes:
        for slab in slabs(shelves, size):
            for found in found_in(shelves, size, slab, best.windows()):
                best = best.with_found(found, size)
            done += look_ups_of(shelves, size, slab)
            if progress:
                progress(done, whole)
        yield best


def _leaders(levels: Floats, worst: Floats, wanted: int) -> Places:
    """Return the rows of the coolest network of each level, for as many levels as are wanted."""
    # Not by a last digit, as above; the first in order is taken.
    order: Places = np.lexsort((worst.round(12), levels))
    different, first = np.unique(levels[order], return_index=True)
    away = np.abs(different)
    near = away <= np.sort(away)[:wanted].max(initial=0.0)
    leaders: Places = order[first[near]]
    return leaders


def _fewest_parts(entries: Iterable[_Entry]) -> Iterable[_Entry]:
    """Return for every value the network with the fewest parts."""
    return {entry.level: entry for entry in sorted(entries, key=lambda entry: -entry.parts)}.values()


def _cooler(first: _Entry, best: _Best) -> list[_Entry]:
    """Return larger networks of the first one's value, each cooler than those before it."""
    found = [first]
    for entry in sorted(best.entries.values(), key=_rank):
        if entry.level == first.level and entry.worst < found[-1].worst - _ROUNDING:
            found.append(entry)
    return found[1:]


def _rank(entry: _Entry) -> tuple[float, float, float]:
    return abs(entry.level), entry.parts, entry.worst


def _candidate(entry: _Entry, target_ohm: float) -> Candidate:
    network = entry.found.network(0)
    shares = network.shares
    return Candidate(
        network=network,
        ohms=network.ohms,
        error=network.ohms / target_ohm - 1.0,
        parts=len(shares),
        share=max(shares),
        drawing=network.drawing,
    )


def _check(target_ohm: float, drawer: tuple[Lot, ...], most: int, wanted: int) -> None:
    if not 0.0 < target_ohm < math.inf:
        raise InputError(f"no network has {target_ohm:g} Ω; seek a resistance above nothing")
    if not drawer:
        raise InputError('there is nothing in the drawer; write for example stock = ["10 ohm x5"]')
    if len(drawer) > MOST_PARTS[-1][0]:
        raise InputError(
            f"{len(drawer)} values are too many to search; leave out those far from {figure(target_ohm)} Ω"
        )
    if not 1 <= most <= MOST_PARTS[0][1]:
        raise InputError(f"networks of {most} parts are not sought; allow from 1 to {MOST_PARTS[0][1]}")
    if wanted < 1:
        raise InputError(f"{wanted} candidates are no list; ask for at least one")
