"""The E series of IEC 60063, against the package eseries 1.2.1 and the published lists."""

import math
from decimal import Decimal

import eseries
import pytest
from hypothesis import example, given
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.parts.preferred import SERIES, nearest, neighbours

NAMES = ("E6", "E12", "E24", "E48", "E96", "E192")
DECADES = range(-6, 10)
OHMS = st.floats(-6.0, 9.5).map(lambda power: 10.0**power)


def published(name):
    """One decade of a series from eseries, as whole numbers of three figures."""
    values = eseries.series(getattr(eseries, name))
    return tuple(int(value * (10 if max(values) < 100 else 1)) for value in values)


@pytest.mark.parametrize("name", NAMES)
def test_every_series_is_that_of_another_library(name):
    """The values of every series are those of the package eseries."""
    assert SERIES[name].values == published(name)
    assert len(published(name)) == int(name[1:])


@pytest.mark.parametrize(
    ("name", "percent"), [("E6", 20), ("E12", 10), ("E24", 5), ("E48", 2), ("E96", 1), ("E192", 0.5)]
)
def test_nominal_tolerances(name, percent):
    """The series are made for these tolerances (IEC 60063; eseries says the same as shares)."""
    assert SERIES[name].tolerance_percent == percent
    assert eseries.tolerance(getattr(eseries, name)) == pytest.approx(percent / 100)


def test_what_the_rule_does_not_give():
    """E24 has 27 to 47 and 82 against its rule, E192 has 920 (reference values, section 6)."""
    ruled = {round(10 ** (1 + i / 24)) for i in range(24)}
    assert {v // 10 for v in SERIES["E24"].values} - ruled == {27, 30, 33, 36, 39, 43, 47, 82}
    assert 920 in SERIES["E192"].values
    assert 919 not in SERIES["E192"].values
    assert 298 in SERIES["E192"].values  # where the package iec60063 0.2 has 297


@pytest.mark.parametrize("power", DECADES)
@pytest.mark.parametrize("name", NAMES)
def test_a_value_of_the_series_is_its_own_nearest_in_every_decade(name, power):
    """From micro-ohms to giga-ohms a value of the series comes back as the double nearest to it."""
    for figures in published(name):
        exact = Decimal(figures).scaleb(power - 2)
        assert nearest(float(exact), name) == float(exact)
        assert nearest(float(exact) * (1 + 1e-12), name) == float(exact)
        assert nearest(float(exact) * (1 - 1e-12), name) == float(exact)


@given(OHMS, st.sampled_from(NAMES))
@example(4699.999, "E24")
@example(9.9999999, "E192")
def test_nearest_by_ratio_of_all_values(ohms, name):
    """No value within two decades is nearer by ratio, and what is found has three figures at most."""
    decade = math.floor(math.log10(ohms))
    every = [float(f"{v}e{p - 2}") for p in range(decade - 1, decade + 3) for v in published(name)]
    found = nearest(ohms, name)
    assert found in every
    assert abs(math.log(found / ohms)) <= min(abs(math.log(v / ohms)) for v in every) + 1e-15
    assert len(Decimal(repr(found)).normalize().as_tuple().digits) <= 3


@given(OHMS, st.sampled_from(NAMES))
def test_neighbours_lie_about_a_value_with_nothing_between(ohms, name):
    """The two neighbours of a value are consecutive in the series."""
    below, above = neighbours(ohms, name)
    assert below <= ohms < above
    values = published(name)
    figures = [round(v / 10.0 ** (math.floor(math.log10(v) + 1e-9) - 2)) for v in (below, above)]
    assert (values.index(figures[0]) + 1) % len(values) == values.index(figures[1])


def test_the_border_is_the_geometric_mean():
    """Between 1 and 1.5 kΩ the border is 1224.7 Ω; by difference it would be 1250 Ω."""
    assert nearest(1224.7, "E6") == 1000.0
    assert nearest(1224.8, "E6") == 1500.0


@pytest.mark.parametrize("ohms", [0.0, -1.0, math.inf, math.nan])
def test_no_value_for_what_is_no_resistor(ohms):
    """Nothing, less than nothing and an open place have no nearest value."""
    with pytest.raises(InputError, match="finite value above nothing"):
        nearest(ohms, "E24")


def test_a_series_that_is_not_there():
    """A wrong name is answered with the right ones."""
    with pytest.raises(InputError, match=r"E20 is not a series.*E6, E12, E24"):
        nearest(1.0, "E20")
