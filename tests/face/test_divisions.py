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
from dialgen.face.ruled.dividing import divide
from dialgen.face.ruled.divisions import Rank, legal_divisions
from dialgen.face.ruled.numbering import auto_numbered
from dialgen.face.ruled.stepping import stepped

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
    ends = end_gaps(wanted)
    placed = 0
    for (low, high), parts in wanted.items():
        inside = [(v, rank) for v, rank in marks if low < v < high]
        placed += len(inside)
        gap = ends.get((low, high))
        if gap and (parts == 1 or (ruler.is_even() and gap.is_cut_off)):
            check_going_on(ruler, gap, [v for v, _ in inside])
        elif parts == 1 and high == exact(last) and not ruler.is_even():
            assert {mantissa(v) for v, _ in inside} <= {1, 2, 5}
        else:
            assert [v for v, _ in inside] == [low + (high - low) * i / parts for i in range(1, parts)]
            assert len(inside) <= 9
            check_middles(low, high, parts, [v for v, rank in inside if rank is Rank.MIDDLE])
    assert placed == len(marks)
    check_room(ruler, numbered, [float(v) for v, _ in marks])


def check_room(ruler, numbered, marks):
    """Check that no mark stands nearer than the least gap to another or to a numeral's."""
    values = np.array(sorted([*marks, *(v for v in numbered if math.isfinite(v))]))
    near = np.diff(ruler.place_mm(values)) < ruler.gap_mm * (1 - 1e-9)
    plain = np.isin(values, np.array(numbered), invert=True)
    assert not (near & (plain[1:] | plain[:-1])).any()


@dataclasses.dataclass(frozen=True)
class End:
    """A gap at an end of the scale, from the numeral there to the next, and what stands beside it."""

    end: Fraction
    inner: Fraction
    size: Fraction
    parts: int

    @property
    def is_cut_off(self):
        """Whether it is part of a gap like that beside it, which began or ends beyond the scale."""
        return abs(self.end - self.inner) < self.size and (self.end / self.size).denominator != 1

    def multiples(self, step):
        """Values inside a whole number of steps from the inner numeral, from there outwards; 99 at most."""
        way = step if self.end > self.inner else -step
        count = math.ceil(abs(self.end - self.inner) / step) - 1
        return [self.inner + i * way for i in range(1, min(count, 99) + 1)]


def end_gaps(wanted):
    """The first and last of the gaps, each where that beside it is divided."""
    (*gaps,) = wanted
    if len(gaps) < 2:
        return {}
    first, last = gaps[0], gaps[-1]
    found = {
        first: End(*first, gaps[1][1] - gaps[1][0], wanted[gaps[1]]),
        last: End(last[1], last[0], gaps[-2][1] - gaps[-2][0], wanted[gaps[-2]]),
    }
    return {gap: end for gap, end in found.items() if end.parts > 1}


def check_going_on(ruler, gap, inside):
    """Check that an end gap has the marks of a step, all but one that would crowd an end between two of them.

    The step is that of the gap beside it, but where its marks would crowd.
    """
    outwards = inside if gap.end > gap.inner else inside[::-1]
    step = gap.size / gap.parts
    one_two_five = not ruler.is_even() and all(v > 0 and mantissa(v) in (1, 2, 5) for v in outwards)
    if not outwards or (one_two_five and gap.end > gap.inner):
        # On a scale that crowds too much to go on, marks at 1, 2 and 5·10^n stand towards its end.
        if outwards != gap.multiples(step):
            assert not all_fit(ruler, gap, gap.multiples(step))
        return
    taken = abs(outwards[0] - gap.inner)
    whole = gap.multiples(taken)
    if taken != step:
        # Some evenly cut gaps of an even scale keep their own division; else the first would crowd.
        assert mantissa(taken) in (1, 2, 5)
        assert not all_fit(ruler, gap, gap.multiples(step))
    assert outwards in (whole, whole[:-1])
    if outwards != whole:
        assert ((gap.end - gap.inner) / taken).denominator != 1
        assert near(ruler, whole[-1], gap.end)


def all_fit(ruler, gap, values):
    """Whether there are marks at values, none near another, though the last may be near the end."""
    inside = list(itertools.pairwise([gap.inner, *values]))
    bearable = 0 < len(values) < 20 and not any(near(ruler, *pair) for pair in inside)
    even_cut = values and abs(gap.end - values[-1]) == abs(values[0] - gap.inner)
    end_crowds = values and near(ruler, values[-1], gap.end)
    return bearable and not (end_crowds and (even_cut or len(values) == 1))


def near(ruler, one, other):
    """Whether marks at two values would stand nearer than the least gap."""
    places = ruler.place_mm(np.array([float(one), float(other)]))
    return abs(places[1] - places[0]) < ruler.gap_mm * (1 - 1e-9)


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


def test_gap_inside_that_nothing_fits_gets_no_marks():
    """Between 10 and 23 no division of 1, 2 or 5·10^n with at most nine marks exists; beside it there is."""
    marks = divide(even(0.0, 33.0, 300.0), [0.0, 10.0, 23.0, 33.0])
    assert [v for v, _ in marks] == [*range(1, 10), *range(24, 33)]


@pytest.mark.parametrize(
    ("numbered", "length", "inside"),
    [
        ([32, 200, 400, 600], 60.0, [40, 60, 80, 100, 120, 140, 160, 180]),
        ([32, 200, 400, 600], 40.0, [60, 80, 100, 120, 140, 160, 180]),
        ([0, 500, 1000, 1390], 69.0, [1050, 1100, 1150, 1200, 1250, 1300, 1350]),
        ([*range(0, 201, 20), 212], 160.0, [202, 204, 206, 208, 210]),
        ([*range(0, 201, 20), 212], 70.0, [205]),
    ],
)
def test_an_odd_end_goes_on_as_the_gap_beside_it(numbered, length, inside):
    """From 32 to 200 go on the twenties, from 1000 to 1390 the fifties, but none too near an end; by hand.

    At 40 mm, a least gap of 0.8 mm, 40 stands 0.56 mm from 32; at 70 mm, 210 stands 0.66 mm from 212.
    """
    marks = divide(even(float(numbered[0]), float(numbered[-1]), length), [float(v) for v in numbered])
    low, high = (numbered[0], numbered[1]) if inside[0] < numbered[1] else (numbered[-2], numbered[-1])
    assert [v for v, _ in marks if low < v < high] == inside


def test_an_odd_end_ranks_its_marks_as_the_gap_beside_it():
    """With hundreds as middle marks between 200, 400 and 600, 100 is one before them."""
    marks = divide(even(32.0, 600.0, 60.0), [32.0, 200.0, 400.0, 600.0])
    assert [v for v, rank in marks if rank is Rank.MIDDLE] == [100, 300, 500]


def test_a_cut_off_gap_of_an_even_scale_is_not_divided_more_finely_than_the_others():
    """From 32 to 40, beside gaps of 20 cut by two, stand 34, 36 and 38; units would fit."""
    numbered = [32.0, 40.0, 60.0, 80.0]
    ruler = even(32.0, 80.0, 57.6)
    assert legal_parts(Fraction(8))[0] == 8
    assert fits(ruler, 32, 40, 8)
    assert [v for v, _ in divide(ruler, numbered) if v < 40] == [34, 36, 38]


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
