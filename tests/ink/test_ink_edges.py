"""Pairs of edges, exactly, and winding about a point."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from shapely import LineString, Point, Polygon

from dialgen.ink.edges import gaps, turns

# Whole numbers make parallel, collinear and touching edges common.
ends = st.one_of(st.integers(-3, 3).map(float), st.floats(-3, 3))
edges = st.tuples(ends, ends, ends, ends).filter(lambda e: abs(e[0] - e[2]) + abs(e[1] - e[3]) > 1e-6)


@given(pairs=st.lists(st.tuples(edges, edges), min_size=1, max_size=6))
def test_gap_of_edges(pairs) -> None:
    """Edges are as far apart as shapely's segments; the place is half way between the two."""
    one, other = (np.array(side).T for side in zip(*pairs, strict=True))
    distances, places = gaps(one, other)
    for (a, b), distance, place in zip(pairs, distances, places.T, strict=True):
        first, second = LineString([a[:2], a[2:]]), LineString([b[:2], b[2:]])
        assert distance == pytest.approx(first.distance(second), abs=1e-9)
        for line in (first, second):
            assert line.distance(Point(place)) == pytest.approx(distance / 2, abs=1e-7)


@pytest.mark.parametrize("length", [1e-9, 1e-4, 1e-2])
def test_short_edge(length) -> None:
    """Above the end of however short an edge, the foot is that end."""
    distance, place = gaps(np.array([[0, 0, length, 0]]).T, np.array([[length, 1.0, length, 2.0]]).T)
    assert distance[0] == pytest.approx(1.0, abs=1e-12)
    assert place[:, 0] == pytest.approx([length, 0.5], abs=1e-12)


def test_edge_of_no_length() -> None:
    """An edge of no length counts as the point it is."""
    distance, place = gaps(np.array([[0.0, 3.0, 0.0, 3.0]]).T, np.array([[-1.0, 0.0, 1.0, 0.0]]).T)
    assert (distance.tolist(), place.T.tolist()) == ([3.0], [[0.0, 1.5]])


STAR = [(0, 3), (2, -3), (-3, 1), (3, 1), (-2, -3)]


@given(x=st.floats(-4, 4), y=st.one_of(st.floats(-4, 4), st.sampled_from([1.0, 3.0, -3.0])))
def test_winding_in_and_out_of_a_square(x, y) -> None:
    """A square is wound about once where shapely has the point within, and not at all outside it."""
    square = [(-1, -3), (3, -3), (3, 3), (-1, 3)]
    area = Polygon(square)
    if area.exterior.distance(Point(x, y)) > 1e-9:
        assert winding(square, x, y) == int(area.contains(Point(x, y)))


def test_winding_of_a_star() -> None:
    """The middle of a five-pointed star drawn in one stroke is wound about twice, its tips once."""
    assert [winding(STAR, 0, 0), winding(STAR, 0, 2.5), winding(STAR, 0, -2.5)] == [-2, -1, 0]


def winding(corners, x, y) -> int:
    """Return the sum of the turns of a closed contour about a point."""
    rows = np.array(corners, dtype=float).T
    around = np.concatenate((rows, np.roll(rows, -1, axis=1)))
    return int(turns(around, np.array([[x], [y]])).sum())
