"""Every network of a small drawer, written out one by one with exact fractions: no code of ours.

A network is a part's place in the drawer, or ("+", members) or ("||", members) in one fixed order.
"""

from fractions import Fraction
from functools import cache
from itertools import combinations, combinations_with_replacement, product


def choices(counts, parts):
    """Every choice of so many parts from a drawer with so many pieces of each value."""
    for leaves in combinations_with_replacement(range(len(counts)), parts):
        if all(leaves.count(place) <= counts[place] for place in set(leaves)):
            yield leaves


def blocks(items):
    """Every way to part a list into unordered groups."""
    if not items:
        yield []
        return
    first, others = items[0], items[1:]
    for size in range(len(others) + 1):
        for chosen in combinations(range(len(others)), size):
            group = (first, *(others[i] for i in chosen))
            left = tuple(others[i] for i in range(len(others)) if i not in chosen)
            for rest in blocks(left):
                yield [group, *rest]


@cache
def wired(leaves, sign):
    """Every different network of exactly these parts whose outermost join is of this sign."""
    inner = "||" if sign == "+" else "+"
    found = set()
    for groups in blocks(leaves):
        if len(groups) > 1:
            ways = [{group[0]} if len(group) == 1 else wired(group, inner) for group in groups]
            found |= {(sign, tuple(sorted(members, key=repr))) for members in product(*ways)}
    return frozenset(found)


def networks(counts, parts):
    """Every different network of exactly so many parts."""
    for leaves in choices(counts, parts):
        yield from [leaves[0]] if parts == 1 else (*wired(leaves, "+"), *wired(leaves, "||"))


def worked(network, ohms):
    """The resistance of a network and the shares of power of its parts, as fractions."""
    if isinstance(network, int):
        return ohms[network], [Fraction(1)]
    sign, members = network
    each = [worked(member, ohms) for member in members]
    whole = sum(r for r, _ in each) if sign == "+" else 1 / sum(1 / r for r, _ in each)
    weight = (lambda r: r / whole) if sign == "+" else (lambda r: whole / r)
    return whole, [weight(r) * share for r, shares in each for share in shares]


def best(ohms, counts, most, target):
    """What `search` promises: (error, parts, spread, ohms) of the best network of every value, in order.

    Also the same of every value and number of parts, by ohms and parts.
    """
    coolest = {}
    for parts in range(1, most + 1):
        for network in networks(counts, parts):
            whole, shares = worked(network, ohms)
            spread = max(shares) * parts
            if spread < coolest.get((whole, parts), spread + 1):
                coolest[whole, parts] = spread
    first = {}
    for (whole, parts), spread in sorted(coolest.items()):
        first.setdefault(whole, (abs(whole / target - 1), parts, spread, whole))
    return sorted(first.values()), coolest
