"""Which values get a numeral: the rules, checked by exact arithmetic on generated scales."""

import dataclasses
import itertools
import math
from fractions import Fraction

import numpy as np
import pytest
from face_rulers import (
    crowding_rulers,
    even,
    even_rulers,
    exact,
    logarithmic,
    mantissa,
    ohms,
    powered,
    thermistor,
)
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from dialgen.face.ruled import crowding
from dialgen.face.ruled.dividing import divide
from dialgen.face.ruled.numbering import auto_numbered, wanted_count
from dialgen.face.ruled.paths import UNLIKE, Edges, cheapest_path
from dialgen.face.ruled.ruler import decimal_value, multiples

some = settings(max_examples=60, suppress_health_check=[HealthCheck.too_slow], deadline=None)
any_ruler = st.one_of(even_rulers, crowding_rulers)

EVEN_STEPS = {Fraction(1), Fraction(2), Fraction(5), Fraction(5, 2)}


def forced_of(ruler):
    """The values that must be numbered: both ends, and zero where it lies inside."""
    return {ruler.start, ruler.end} | ({0.0} if ruler.start < 0 < ruler.end else set())


def clear(ruler, values):
    """Whether each two neighbouring numerals leave the clear space between them."""
    places, widths = ruler.place_mm(np.array(values)), ruler.width_mm(np.array(values))
    return np.diff(places) >= (widths[1:] + widths[:-1]) / 2 + ruler.clear_mm - 1e-9


@some
@given(any_ruler)
def test_ends_zero_and_infinity_are_always_numbered(ruler):
    """Both ends are numbered, infinity and zero included, in ascending order and within the scale."""
    values = auto_numbered(ruler)
    assert forced_of(ruler) <= set(values)
    assert list(values) == sorted(set(values))
    assert (values[0], values[-1]) == (ruler.start, ruler.end)


@some
@given(any_ruler)
def test_numerals_never_crowd(ruler):
    """No numeral comes nearer to the next than the clear space, but for two that must both stand."""
    values = auto_numbered(ruler)
    forced = forced_of(ruler)
    for (one, other), fits in zip(itertools.pairwise(values), clear(ruler, values), strict=True):
        assert fits or (one in forced and other in forced)


@some
@given(even_rulers)
def test_even_scale_has_one_step(ruler):
    """On an even scale the numerals are the multiples of one step of 1, 2, 5 (or 2.5)·10^n, and the ends."""
    inner = [exact(v) for v in auto_numbered(ruler)[1:-1]]
    steps = {b - a for a, b in itertools.pairwise(inner)}
    assert len(steps) <= 1
    for step in steps:
        assert mantissa(step) in EVEN_STEPS
        assert all((v / step).denominator == 1 for v in inner)


@some
@given(even_rulers)
def test_two_and_a_half_only_where_the_ends_force_it(ruler):
    """A step of 2.5·10^n stands only where no step of 1, 2 or 5·10^n fits ends, count and room."""
    values = auto_numbered(ruler)
    inner = [exact(v) for v in values[1:-1]]
    if len(inner) < 2 or mantissa(inner[1] - inner[0]) != Fraction(5, 2):
        return
    least, most = wanted_count(ruler.length_mm)
    first, last = exact(ruler.start), exact(ruler.end)
    for m, power in itertools.product((1, 2, 5), range(-6, 7)):
        step = m * Fraction(10) ** power
        count = (last - first) / step + 1
        if all((exact(v) / step).denominator == 1 for v in forced_of(ruler)) and least <= count <= most:
            others = [float(first + i * step) for i in range(int(count))]
            assert not clear(ruler, others).all()


@some
@given(crowding_rulers)
def test_gaps_of_a_crowding_scale_are_whole_units(ruler):
    """Between numerals lie 1 to 9·10^n, but towards an end, or from decade to decade where room is short."""
    values = [v for v in auto_numbered(ruler) if math.isfinite(v)]
    if ruler.is_even():
        return
    for one, other in itertools.pairwise(values):
        at_end = one == ruler.start or other == ruler.end
        decades = mantissa(abs(exact(one)) or Fraction(1)) == mantissa(abs(exact(other)) or Fraction(1)) == 1
        assert at_end or decades or mantissa(exact(other) - exact(one)) <= 9


@some
@given(crowding_rulers)
def test_numerals_of_a_crowding_scale_are_round(ruler):
    """Inside a crowding scale no numeral has more than three digits that count."""
    for value in auto_numbered(ruler)[1:-1]:
        digits = f"{abs(value):.11e}".split("e")[0].replace(".", "").rstrip("0")
        assert len(digits) <= 3


@some
@given(any_ruler)
def test_a_scale_with_room_has_numerals_inside(ruler):
    """A scale of 60 mm or more is not left with its ends alone."""
    if ruler.length_mm >= 60:
        assert len(auto_numbered(ruler)) >= 3


@some
@given(even_rulers, st.sampled_from((0.01, 1000.0)))
def test_a_power_of_ten_moves_nothing(ruler, factor):
    """An even scale in another prefix, its numerals as wide as before, is numbered at the same places."""
    start, end, length = ruler.start, ruler.end, ruler.length_mm
    plain = even(start, end, length)
    scaled = even(float(f"{start * factor:.9g}"), float(f"{end * factor:.9g}"), length)
    numbers = [auto_numbered(dataclasses.replace(r, width_mm=three_wide)) for r in (plain, scaled)]
    assert [float(f"{v * factor:.9g}") for v in numbers[0]] == pytest.approx(numbers[1], rel=1e-9)


def three_wide(values):
    """Numerals of one width, whatever they say."""
    return np.full(np.shape(values), 2.93)


@pytest.mark.parametrize(
    ("length", "counts"),
    [(20.0, (3, 5)), (50.0, (3, 5)), (50.1, (4, 6)), (100.0, (4, 6)), (149.0, (5, 8)), (200.0, (6, 10)),
     (350.0, (6, 12))],
)  # fmt: skip
def test_counts_wanted_for_a_length(length, counts):
    """Numbered marks wanted by scale length are those of GOST 27626-88 (reference values, section 15)."""
    assert wanted_count(length) == counts


@pytest.mark.parametrize(
    ("ruler", "numbers"),
    [
        (even(0.0, 40.0, 69.0), (0.0, 10.0, 20.0, 30.0, 40.0)),
        (even(0.0, 100.0, 90.0), (0.0, 20.0, 40.0, 60.0, 80.0, 100.0)),
        (even(0.0, 5.0, 60.0), (0.0, 1.0, 2.0, 3.0, 4.0, 5.0)),
        (even(-1.0, 1.0, 60.0), (-1.0, -0.5, 0.0, 0.5, 1.0)),
    ],
)
def test_plain_scales_by_hand(ruler, numbers):
    """Everyday even scales are numbered as any maker would."""
    assert auto_numbered(ruler) == numbers


def test_ohms_scale_keeps_infinity_and_its_middle_open():
    """An ohms scale ends in infinity, and its numerals spread over the whole line."""
    ruler = ohms(15.0, 90.0)
    values = auto_numbered(ruler)
    places = ruler.place_mm(np.array(values))
    assert values[-1] == math.inf
    assert np.diff(places).max() < ruler.length_mm / 3


@pytest.mark.parametrize("length", [55.0, 69.0, 94.0, 141.0, 184.0])
@pytest.mark.parametrize("low", [-20.0, -10.0])
def test_a_thermistor_is_numbered_where_it_crowds_at_its_hot_end(length, low):
    """By exp(3950 K / T): a numeral stands between 0 and 100 °C, and no fifth of the line is bare."""
    ruler = thermistor(low, 100.0, length)
    numbered = auto_numbered(ruler)
    assert any(0 < v < 100 for v in numbered)
    values = sorted([*numbered, *(v for v, _ in divide(ruler, numbered))])
    assert np.diff(ruler.place_mm(np.array(values))).max() < length / 5


# --- the shortest path ---------------------------------------------------------------------------


def path_cost(path, edges, places):
    """What a path pays by the rule: its edges, and from gap to gap for their unlike lengths."""
    steps = list(itertools.pairwise(path))
    sizes = [math.log2(places[b] - places[a]) for a, b in steps]
    unlike = sum(abs(one - other) for one, other in itertools.pairwise(sizes))
    return sum(edges[step] for step in steps) + UNLIKE * unlike


def all_paths(count):
    """Every ascending way from the first node to the last."""
    for size in range(count - 1):
        for inner in itertools.combinations(range(1, count - 1), size):
            yield (0, *inner, count - 1)


@settings(max_examples=150)
@given(st.data())
def test_the_path_found_is_the_cheapest_of_all(data):
    """On small graphs no path at all costs less than the one found."""
    count = data.draw(st.integers(2, 7))
    gaps = st.floats(0.1, 10.0)
    places = np.cumsum([0.0, *(data.draw(gaps) for _ in range(count - 1))])
    pairs = list(itertools.combinations(range(count), 2))
    edges = {pair: data.draw(st.floats(0.0, 9.0)) for pair in pairs if data.draw(st.integers(0, 4))}
    if not edges:
        return
    here, there = (np.array(ends) for ends in zip(*edges, strict=True))
    parts = [slice(0, len(here) // 2), slice(len(here) // 2, None)]
    costs = np.array(list(edges.values()))
    cost, path = cheapest_path(places, [Edges(here[p], there[p], costs[p]) for p in parts])
    ways = [
        path_cost(way, edges, places)
        for way in all_paths(count)
        if all(step in edges for step in itertools.pairwise(way))
    ]
    assert cost == pytest.approx(min(ways, default=math.inf), rel=1e-12)
    if ways:
        assert path_cost(path, edges, places) == pytest.approx(cost, rel=1e-12)


# --- candidates ----------------------------------------------------------------------------------


@given(st.integers(-9999, 9999), st.integers(-12, 12))
def test_decimal_values_are_the_nearest_doubles(count, exponent):
    """count·10^exponent is the double nearest the decimal number."""
    assert decimal_value(count, exponent) == float(Fraction(count) * Fraction(10) ** exponent)


@given(st.sampled_from((1, 2, 5, 25)), st.integers(-4, 3), st.integers(-300, 300), st.integers(0, 60))
def test_multiples_are_all_within_and_exact(mantissa_, exponent, first, count):
    """All multiples of a step between two of them, ends included, each as its decimal number."""
    step = decimal_value(mantissa_, exponent)
    unit = Fraction(mantissa_) * Fraction(10) ** exponent
    expected = [float(unit * i) for i in range(first, first + count + 1)]
    assert multiples(step, expected[0], expected[-1]) == expected


@pytest.mark.parametrize(
    "ruler", [powered(30.0, 2.0, 70.0), ohms(20.0, 80.0), logarithmic(0.1, 100.0, 120.0)]
)
def test_candidates_are_round_and_inside(ruler):
    """Candidates lie strictly inside the scale and have few digits."""
    found = crowding.round_values(ruler)
    assert all(ruler.start < v < ruler.end for v in found)
    assert all(len(f"{v:.12g}".replace(".", "").strip("0")) <= 4 for v in found)
