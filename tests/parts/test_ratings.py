"""The power rating to buy: the contract's example, textbook shunts, and a list of what is sold."""

import pytest
from hypothesis import example, given
from hypothesis import strategies as st

from dialgen.parts.ratings import rating_w

SOLD_W = [0.125, 0.25, 0.5, *range(1, 100), *range(100, 1000, 10)]
SOLD_W += [*range(1000, 10_000, 100), *range(10_000, 20_000, 1000)]
"""What is sold, written out: halves of a watt, whole watts, then two figures."""

# The contract (dialfile.md): a shunt with 2.999925 W is rated 6 W.  The shunts of LIEC (T. R. Kuphaldt,
# Lessons in Electric Circuits I, chapter 8) dissipate 0.0495, 0.4995, 4.9995 and 49.9995 W.
RATED = [
    (2.999925, 6.0),
    (0.0495, 0.125),
    (0.4995, 1.0),
    (4.9995, 10.0),
    (49.9995, 100.0),
    (0.25, 0.5),
    (0.5, 1.0),
    (0.51, 2.0),
    (61.5, 130.0),
    (0.0, 0.125),
]


@pytest.mark.parametrize(("watts", "rating"), RATED)
def test_ratings_at_twice_the_dissipation(watts, rating):
    """Known dissipations get the rating that is sold at or above twice of them."""
    assert rating_w(watts) == rating


@given(st.floats(0.0, 5000.0), st.floats(1.0, 3.0))
@example(49.5, 2.0)
@example(49.51, 2.0)
@example(0.0625, 2.0)
def test_the_rating_is_the_smallest_that_is_sold(watts, margin):
    """The rating is the first on the list that bears the margin, but for a billionth of rounding."""
    enough = [sold for sold in SOLD_W if sold >= watts * margin * (1 - 1e-9)]
    assert rating_w(watts, margin) in (enough[0], next(s for s in SOLD_W if s >= watts * margin))


def test_rounding_in_the_working_buys_no_larger_part():
    """3·0.1 and 0.1 + 0.2 are above 0.3 in doubles, and twice a solved 0.25 W may be above 0.5."""
    assert rating_w(0.25 * (1 + 1e-15)) == 0.5
    assert rating_w(0.1 + 0.2, 10.0) == 3.0
    assert rating_w(0.25 * 1.00001) == 1.0
