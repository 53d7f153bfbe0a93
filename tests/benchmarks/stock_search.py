"""How fast the drawer is searched: ``python tests/benchmarks/stock_search.py``.

The rival writes all values out: for every choice of parts, the set of what they come to, made by
joining the sets of all pairs of smaller choices in series and in parallel, in plain Python.  Both
take turns in one run on drawers that the rival can do; the larger drawers are ours alone.
"""

from __future__ import annotations

import resource
import statistics
import time
from collections.abc import Callable
from itertools import product

from dialgen.parts.stock.drawer import Lot
from dialgen.parts.stock.search import search

E12 = (1.0, 1.2, 1.5, 1.8, 2.2, 2.7, 3.3, 3.9, 4.7, 5.6, 6.8, 8.2)
TARGET_OHM = 7.313
Drawer = list[Lot]


def rival(target: float, lots: Drawer, most: int) -> float:
    """Return the least error, all values of all choices having been written out."""
    choices = [c for c in product(*(range(min(lot.count, most) + 1) for lot in lots)) if 0 < sum(c) <= most]
    values: dict[tuple[int, ...], set[float]] = {}
    for choice in sorted(choices, key=sum):
        if sum(choice) == 1:
            values[choice] = {lots[choice.index(1)].ohms}
            continue
        found: set[float] = set()
        for one in product(*(range(n + 1) for n in choice)):
            other = tuple(n - k for n, k in zip(choice, one, strict=True))
            if one in values and other in values and one <= other:
                for a, b in product(values[one], values[other]):
                    found.add(round(a + b, 12))
                    found.add(round(a * b / (a + b), 12))
        values[choice] = found
    return min(abs(value / target - 1) for found in values.values() for value in found)


def plenty(*ohms: float, count: int = 99) -> Drawer:
    """Return a drawer with so many of each."""
    return [Lot(value, count) for value in ohms]


def decades(number: int, count: int = 99) -> Drawer:
    """Return the E12 values over so many decades."""
    return plenty(*(round(v * 10**d, 9) for d in range(number) for v in E12), count=count)


SIDE_BY_SIDE = (
    ("8 equal, 8 parts", [Lot(10.0, 8)], 8),
    ("3 values, 6 parts", plenty(3.3, 10.0, 47.0), 6),
    ("3 values, 7 parts", plenty(3.3, 10.0, 47.0), 7),
    ("6 values, 6 parts", plenty(*E12[:6]), 6),
)
ALONE = (
    ("3 values, 8 parts, plenty", plenty(3.3, 10.0, 47.0), 8),
    ("3 values, 8 parts, 3 + 5 + 2 pieces", [Lot(3.3, 3), Lot(10.0, 5), Lot(47.0, 2)], 8),
    ("3 values, 8 parts, 1:2:4", plenty(5.0, 10.0, 20.0), 8),
    ("12 values, 6 parts", decades(1), 6),
    ("12 values, 8 parts", decades(1), 8),
    ("24 values, 6 parts, plenty", decades(2), 6),
    ("24 values, 6 parts, one piece each", decades(2, 1), 6),
    ("36 values, 6 parts", decades(3), 6),
    ("72 values, 6 parts", decades(6), 6),
)


def timed(work: Callable[[], object]) -> tuple[float, object]:
    """Return the seconds that a piece of work takes, and what it returns."""
    started = time.perf_counter()
    done = work()
    return time.perf_counter() - started, done


def side_by_side(name: str, lots: Drawer, most: int) -> str:
    """Return one line: medians of five turns each, and that both found the same."""
    ours, theirs = [], []
    for _ in range(5):
        ours.append(timed(lambda: search(TARGET_OHM, lots, most=most)))
        theirs.append(timed(lambda: rival(TARGET_OHM, lots, most)))
    error = abs(ours[0][1].candidates[0].error)
    assert abs(error - theirs[0][1]) < 1e-9, (error, theirs[0][1])
    ours_s, theirs_s = (statistics.median(s for s, _ in each) for each in (ours, theirs))
    return f"{name:38} {ours_s:8.3f} s   rival {theirs_s:8.3f} s   {theirs_s / ours_s:6.1f} times"


def alone(name: str, lots: Drawer, most: int) -> str:
    """Return one line: the time, what was covered, the error, and the most memory so far."""
    taken_s, found = timed(lambda: search(TARGET_OHM, lots, most=most))
    memory_mb = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss / 1024
    error = found.candidates[0].error
    covered = f"{found.searched:18,d} networks   error {error:+.1e}"
    return f"{name:38} {taken_s:8.3f} s   {covered}   {memory_mb:.0f} MB"


if __name__ == "__main__":
    for case in SIDE_BY_SIDE:
        print(side_by_side(*case), flush=True)
    for case in ALONE:
        print(alone(*case), flush=True)
