"""Networks of resistors: how many there are, what they come to, and where the power goes."""

import re
from fractions import Fraction

import numpy as np
import pytest
import stock_enumerated as enumerated
from hypothesis import given
from hypothesis import strategies as st

from dialgen.parts.stock.drawer import Lot
from dialgen.parts.stock.networks import Parallel, Series, Single, figure, in_parallel, in_series, networks_of
from dialgen.parts.stock.shelves import stocked_shelves

WIRINGS = (1, 2, 4, 10, 24, 66, 180, 522)
"""OEIS A000084, series-parallel networks with n unlabelled edges."""
LABELLED = (1, 2, 8, 52, 472, 5504, 78416, 1320064)
"""OEIS A006351, series-parallel networks with n labelled edges."""
VALUES = (1, 2, 4, 9, 22, 53, 131, 337)
"""OEIS A048211, different resistances from n equal resistors."""
SCALES = {"m": Fraction(1, 1000), "": Fraction(1), "k": Fraction(1000), "M": Fraction(10**6)}


class Ohms:
    """A resistance that Python's own + and | join, so that a drawing can be worked as it stands."""

    def __init__(self, value):
        self.value = value

    def __add__(self, other):
        return Ohms(self.value + other.value)

    def __or__(self, other):
        return Ohms(1 / (1 / self.value + 1 / other.value))


def drawn_ohms(drawing):
    """What a drawing says, in exact fractions."""
    code = re.sub(r"([0-9.]+)([mkM]?)", r'Ohms(Fraction("\1") * SCALES["\2"])', drawing).replace("||", "|")
    return eval(code, {"Ohms": Ohms, "Fraction": Fraction, "SCALES": SCALES}).value


def shares_by_kirchhoff(network):
    """Each part's share of the power, by nodal analysis of the network at one volt."""
    edges, nodes = [], 2

    def wire(part, start, end):
        nonlocal nodes
        match part:
            case Single(ohms=ohms):
                edges.append((start, end, ohms))
            case Parallel(members=members):
                for member in members:
                    wire(member, start, end)
            case Series(members=members):
                inner = list(range(nodes, nodes + len(members) - 1))
                nodes += len(inner)
                for member, (a, b) in zip(
                    members, zip([start, *inner], [*inner, end], strict=True), strict=True
                ):
                    wire(member, a, b)

    wire(network, 0, 1)
    matrix = np.zeros((nodes, nodes))
    for a, b, ohms in edges:
        matrix[[a, b], [a, b]] += 1 / ohms
        matrix[[a, b], [b, a]] -= 1 / ohms
    volts = np.zeros(nodes)
    volts[1] = 1.0
    if nodes > 2:
        volts[2:] = np.linalg.solve(matrix[2:, 2:], -matrix[2:, 1])
    watts = np.array([(volts[a] - volts[b]) ** 2 / ohms for a, b, ohms in edges])
    return watts / watts.sum()


parts = st.sampled_from([0.005, 0.47, 1.0, 3.3, 10.0, 47.0, 4700.0, 2.2e6]).map(Single)
trees = st.recursive(
    parts,
    lambda inner: st.builds(
        lambda join, members: join(*members),
        st.sampled_from([in_series, in_parallel]),
        st.lists(inner, min_size=2, max_size=3),
    ),
    max_leaves=8,
)


def test_equal_resistors_are_wired_in_as_many_ways_as_published():
    """With one value the count of networks is OEIS A000084, up to eight parts."""
    assert tuple(networks_of([8], n) for n in range(1, 9)) == WIRINGS


def test_different_resistors_are_wired_in_as_many_ways_as_published():
    """With one piece of each of n values the count of networks of n parts is OEIS A006351."""
    assert tuple(networks_of([1] * n, n) for n in range(1, 9)) == LABELLED


def test_equal_resistors_give_as_many_values_as_published():
    """The different resistances of exactly n equal resistors are OEIS A048211, up to eight."""
    room = {n: WIRINGS[n - 1] for n in range(1, 9)}
    shelves = stocked_shelves((Lot(1.0, 8),), 8, room, least=8)
    assert tuple(len(set(shelves[n].ohms.round(10))) for n in range(1, 9)) == VALUES


@pytest.mark.parametrize(
    ("counts", "most"), [((5,), 5), ((1, 1, 1, 1), 4), ((2, 9, 1), 5), ((9, 9), 6), ((3, 2, 2, 1), 5)]
)
def test_networks_from_a_drawer_are_counted_as_they_are_written_out(counts, most):
    """The count by formula and the shelves' length are those of all networks written out one by one."""
    written = {n: sum(1 for _ in enumerated.networks(counts, n)) for n in range(1, most + 1)}
    lots = tuple(Lot(float(7 + 3 * i), count) for i, count in enumerate(counts))
    shelves = stocked_shelves(lots, most, written, least=most)
    assert {n: networks_of(counts, n) for n in written} == written
    assert {n: len(shelves[n].ohms) for n in written} == written


@pytest.mark.parametrize(("counts", "size"), [((2, 2, 1), 5), ((9, 9), 5)])
def test_shelves_hold_every_network_once(counts, size):
    """The trees of a shelf are all different, and their values and worst shares are the shelf's."""
    lots = tuple(Lot(float(3 + 4 * i), count) for i, count in enumerate(counts))
    shelves = stocked_shelves(lots, size, dict.fromkeys(range(9), 0), least=size)
    shelf = shelves[size]
    found = [shelves.network(shelf.first + place) for place in range(len(shelf.ohms))]
    assert len(set(found)) == len(found) == networks_of(counts, size)
    assert [tree.ohms for tree in found] == pytest.approx(shelf.ohms.tolist(), rel=1e-12)
    assert [max(tree.shares) for tree in found] == pytest.approx(shelf.worst.tolist(), rel=1e-12)


@given(trees)
def test_a_drawing_says_what_the_network_comes_to(network):
    """A drawing worked as an expression, by another evaluator and in fractions, gives the ohms."""
    assert float(drawn_ohms(network.drawing)) == pytest.approx(network.ohms, rel=1e-12)


@given(trees)
def test_power_is_shared_by_kirchhoffs_laws(network):
    """The shares of all parts agree with nodal analysis and make a whole."""
    assert sum(network.shares) == pytest.approx(1.0, rel=1e-12)
    # A milliohm beside a megohm costs the matrix nine digits.
    np.testing.assert_allclose(network.shares, shares_by_kirchhoff(network), rtol=1e-5, atol=1e-7)


@given(trees, trees, trees)
def test_the_order_of_joining_leaves_no_trace(a, b, c):
    """Networks that are wired alike are equal, however they were put together."""
    assert in_series(in_series(a, b), c) == in_series(c, in_series(b, a))
    assert in_parallel(in_parallel(a, b), c) == in_parallel(c, in_parallel(b, a))


@pytest.mark.parametrize(
    ("ohms", "written"),
    [
        (10.0, "10"),
        (4700.0, "4.7k"),
        (0.47, "0.47"),
        (0.005, "5m"),
        (1e6, "1M"),
        (999.0, "999"),
        (0.1, "0.1"),
    ],
)
def test_figures_are_as_the_trade_writes_them(ohms, written):
    """A value is drawn without its unit, with k, M and m."""
    assert figure(ohms) == written
