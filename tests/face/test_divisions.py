"""Marks between the numerals: an independent checker in exact arithmetic over generated scales."""

import dataclasses
import itertools
import math
from fractions import Fraction

import numpy as np
import pytest
from face_rulers import crowding_rulers, even, even_rulers, exact, legal_parts, mantissa, ohms, powered
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.face.ruled.divisions import Rank, divide, legal_divisions, stepped
from dialgen.face.ruled.numbering import auto_numbered

some = settings(max_examples=60, suppress_health_check=[HealthCheck.too_slow], deadline=None)
any_ruler = st.one_of(even_rulers, crowding_rulers)


def fits(ruler, low, high, parts):
    """Whether no two marks of a gap cut into parts, numerals included, stand nearer than the least gap."""
    cuts = [float(low + (high - low) * i / parts) for i in range(parts + 1)]
    return np.diff(ruler.place_mm(np.array(cuts))).min() >= ruler.gap_mm * (1 - 1e-9)


def finest(ruler, low, high):
    """The parts of the finest legal division that fits a gap; 1 for none."""
    return next((n for n in legal_parts(high - low) if fits(ruler, low, high, n)), 1)


def gaps_of(numbered):
    """Neighbouring finite values as exact numbers."""
    return list(itertools.pairwise(exact(v) for v in numbered if math.isfinite(v)))


def check(ruler, numbered):
    """Check every rule of the marks between ``numbered``."""
    # Beyond the last finite numeral no division holds: see the test of marks towards infinity.
    last = max(v for v in numbered if math.isfinite(v))
    marks = [(exact(v), rank) for v, rank in divide(ruler, numbered) if v <= last]
    assert marks == sorted(marks)
    assert not {v for v, _ in marks} & {exact(v) for v in numbered if math.isfinite(v)}
    wanted = {gap: finest(ruler, *gap) for gap in gaps_of(numbered)}
    if ruler.is_even():
        # On an even scale gaps of one size are divided alike, by the coarsest that any of them needs.
        sizes = {high - low for low, high in wanted}
        least = {size: min(n for (low, high), n in wanted.items() if high - low == size) for size in sizes}
        wanted = {(low, high): least[high - low] for low, high in wanted}
    placed = 0
    for (low, high), parts in wanted.items():
        inside = [(v, rank) for v, rank in marks if low < v < high]
        placed += len(inside)
        assert [v for v, _ in inside] == [low + (high - low) * i / parts for i in range(1, parts)]
        assert len(inside) <= 9
        check_middles(low, high, parts, [v for v, rank in inside if rank is Rank.MIDDLE])
    assert placed == len(marks)


def check_middles(low, high, parts, middles):
    """Middle marks make a legal division of the gap themselves, or are the only mark, or there are none."""
    if parts == 2:
        assert len(middles) == 1
    elif middles:
        count = len(middles) + 1
        assert count in legal_parts(high - low)
        assert count < parts
        assert middles == [low + (high - low) * i / count for i in range(1, count)]


@some
@given(any_ruler)
def test_marks_between_automatic_numerals_obey_the_rules(ruler):
    """Each gap has the finest division of 1, 2 or 5·10^n with at most nine marks and none too near."""
    check(ruler, auto_numbered(ruler))


@some
@given(any_ruler, st.data())
def test_marks_between_any_numerals_obey_the_rules(ruler, data):
    """So they do between numerals that somebody chose."""
    top = ruler.end if math.isfinite(ruler.end) else 40 * float(ruler.along[48])
    inner = st.floats(0.02, 0.98).map(lambda s: float(f"{ruler.start + s * (top - ruler.start):.2g}"))
    chosen = data.draw(st.sets(inner, max_size=6))
    check(ruler, sorted({ruler.start, ruler.end, *(v for v in chosen if ruler.start < v < ruler.end)}))


@given(st.integers(1, 9999), st.integers(-9, 9))
def test_legal_divisions_are_those_of_exact_arithmetic(count, exponent):
    """The legal divisions of a gap are all its cuts into 2 to 10 parts of 1, 2 or 5·10^n, finest first."""
    gap = Fraction(count) * Fraction(10) ** exponent
    assert [d.parts for d in legal_divisions(float(gap))] == legal_parts(gap)


@pytest.mark.parametrize(
    ("gap", "parts"),
    [(1.0, [10, 5, 2]), (2.0, [10, 4, 2]), (3.0, [6, 3]), (4.0, [8, 4, 2]), (5.0, [10, 5]), (7.0, [7]),
     (11.0, []), (13.0, []), (0.3, [6, 3]), (2.5, [5]), (15.0, [3]), (60.0, [6, 3])],
)  # fmt: skip
def test_legal_divisions_by_hand(gap, parts):
    """Worked by hand: a gap of 3 goes into halves and ones, one of 11 or 13 into nothing."""
    assert [d.parts for d in legal_divisions(gap)] == parts


def test_explicit_gap_that_nothing_fits_gets_no_marks():
    """Between 0 and 13 no division of 1, 2 or 5·10^n with at most nine marks exists; beside it there is."""
    marks = divide(even(0.0, 23.0, 200.0), [0.0, 13.0, 23.0])
    assert [v for v, _ in marks] == [14.0 + i for i in range(9)]


@pytest.mark.parametrize("numbered", [[], [0.0], [math.inf]])
def test_no_gap_no_marks(numbered):
    """Fewer than two numerals leave nothing to divide."""
    assert divide(ohms(10.0, 80.0), numbered) == []


def test_crowding_scale_coarsens_from_numeral_to_numeral():
    """On an ohms scale each gap is at most as finely spaced, in value, as the one before it."""
    ruler = ohms(20.0, 90.0)
    numbered = auto_numbered(ruler)
    values = sorted([*(v for v, _ in divide(ruler, numbered)), *(v for v in numbered if math.isfinite(v))])
    steps = [exact(b) - exact(a) for a, b in itertools.pairwise(values)]
    assert steps == sorted(steps)


def test_least_gap_moves_the_division():
    """A larger least gap gives a coarser division, until there is none."""
    for gap, count in ((0.9, 9), (1.1, 4), (2.1, 1), (5.1, 0)):
        ruler = dataclasses.replace(even(0.0, 10.0, 10.0), gap_mm=gap)
        assert len(divide(ruler, [0.0, 10.0])) == count


# --- steps that the file gives -------------------------------------------------------------------


def test_given_steps_win_in_their_pieces():
    """Each piece has marks at the multiples of its own step, numbered values left out."""
    marks = stepped(0.0, 40.0, [(10.0, 1.0), (40.0, 5.0)], [0.0, 10.0, 20.0, 40.0])
    assert [v for v, _ in marks] == [1, 2, 3, 4, 5, 6, 7, 8, 9, 15, 25, 30, 35]


def test_given_step_is_counted_from_zero_not_from_the_start():
    """Marks stand at multiples of the step, also where the scale starts between two."""
    assert [v for v, _ in stepped(3.0, 11.0, [(11.0, 2.0)], [])] == [4.0, 6.0, 8.0, 10.0]


def test_given_steps_take_marks_that_no_rule_would():
    """A step of 3 is nobody's rule, and is drawn as asked."""
    assert [v for v, _ in stepped(0.0, 12.0, [(12.0, 3.0)], [0.0, 12.0])] == [3.0, 6.0, 9.0]


def test_given_steps_round_no_mark_onto_a_numeral():
    """A numbered value that a step meets but for rounding is not marked twice."""
    marks = stepped(0.0, 1.0, [(1.0, 0.1)], [0.0, 0.1 + 0.2, 0.6, 1.0])
    assert [v for v, _ in marks] == [0.1, 0.2, 0.4, 0.5, 0.7, 0.8, 0.9]


def test_middle_marks_of_given_steps():
    """In a gap of ten steps the fifth is a middle mark; in one that nothing divides there is none."""
    marks = dict(stepped(0.0, 20.0, [(20.0, 1.0)], [0.0, 10.0, 20.0]))
    assert [v for v, rank in marks.items() if rank is Rank.MIDDLE] == [5.0, 15.0]
    assert set(stepped(0.0, 13.0, [(13.0, 1.0)], [0.0, 13.0])) == {
        (float(v), Rank.FINE) for v in range(1, 13)
    }


def test_marks_beyond_the_last_numeral_go_on_as_before_it():
    """With 4 and 8 numbered and a mark at every unit, 2 and 10 are middle marks as 6 is."""
    marks = dict(stepped(0.0, 11.0, [(11.0, 1.0)], [4.0, 8.0]))
    assert {v for v, rank in marks.items() if rank is Rank.MIDDLE} == {0.0, 2.0, 6.0, 10.0}


def test_marks_towards_infinity_stand_at_one_two_and_five():
    """After the last finite numeral, 1-2-5 values follow while there is room; then infinity stands alone."""
    ruler = ohms(10.0, 80.0)
    marks = [(v, rank) for v, rank in divide(ruler, [0.0, 20.0, math.inf]) if v > 20]
    values = [v for v, _ in marks]
    assert values == [50.0, 100.0, 200.0, 500.0][: len(values)]
    assert len(values) >= 2
    assert {rank for _, rank in marks} == {Rank.MIDDLE}
    places = ruler.place_mm(np.array([20.0, *values, math.inf]))
    assert (np.diff(places) >= 2 * ruler.gap_mm).all()


@pytest.mark.parametrize(
    ("pieces", "where"),
    [
        ([(10.0, 1e-3)], (0, "every")),
        ([(5.0, 1.0), (5.0, 1.0)], (1, "to")),
        ([(5.0, 1.0), (3.0, 1.0)], (1, "to")),
        ([(11.0, 1.0)], (0, "to")),
        ([(0.0, 1.0)], (0, "to")),
        ([(5.0, 1.0), (10.0, 1e-9)], (1, "every")),
    ],
)
def test_pieces_that_make_no_sense_are_refused(pieces, where):
    """Pieces must ascend within the scale and give a bearable number of marks."""
    with pytest.raises(InputError, match=";") as caught:
        stepped(0.0, 10.0, pieces, [])
    assert caught.value.keys == (where,)


@given(st.sampled_from((1, 2, 5)), st.integers(-3, 2), st.integers(2, 40))
def test_given_steps_are_exact_decimals(m, power, count):
    """Marks of a given step are the decimal numbers themselves, not sums of rounded ones."""
    step = float(Fraction(m) * Fraction(10) ** power)
    end = float(Fraction(m) * Fraction(10) ** power * count)
    values = [v for v, _ in stepped(0.0, end, [(end, step)], [])]
    assert values == [float(Fraction(m) * Fraction(10) ** power * i) for i in range(count + 1)]


@some
@given(st.floats(20.0, 200.0), st.sampled_from((2.0, 3.0)))
def test_square_law_leaves_the_crowded_start_bare(length, exponent):
    """Where a square law crowds, no marks stand nearer than the least gap."""
    ruler = powered(30.0, exponent, length)
    numbered = auto_numbered(ruler)
    values = np.array(sorted([*(v for v, _ in divide(ruler, numbered)), *numbered]))
    marks = np.isin(values, numbered, invert=True)
    near = np.diff(ruler.place_mm(values)) < ruler.gap_mm * (1 - 1e-9)
    assert not (near & (marks[1:] | marks[:-1])).any()


def test_mantissa_helper_fails_where_it_should():
    """The checker's own arithmetic tells legal steps from others."""
    assert mantissa(Fraction(3, 10)) == 3
    assert mantissa(Fraction(1, 40)) == Fraction(5, 2)
    assert legal_parts(Fraction(13)) == []
