"""The search in the drawer: nothing that it gives is better than what was found."""

import time
from collections import Counter
from fractions import Fraction

import pytest
import stock_enumerated as enumerated
from hypothesis import given, settings
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.parts.stock import shelves as shelves_module
from dialgen.parts.stock.drawer import Lot
from dialgen.parts.stock.networks import Single, networks_of
from dialgen.parts.stock.search import search

E12 = (1.0, 1.2, 1.5, 1.8, 2.2, 2.7, 3.3, 3.9, 4.7, 5.6, 6.8, 8.2)
PLENTY = 99

drawers = st.lists(
    st.tuples(st.integers(1, 40), st.integers(1, 5)), min_size=1, max_size=3, unique_by=lambda lot: lot[0]
)
targets = st.fractions(Fraction(1, 4), 120, max_denominator=200)


def plenty(*ohms):
    """A drawer with pieces enough of every value."""
    return [Lot(value, PLENTY) for value in ohms]


def singles(network):
    """The values of all parts of a network."""
    if isinstance(network, Single):
        return [network.ohms]
    return [ohms for member in network.members for ohms in singles(member)]


def row(candidate):
    """What a candidate is ranked by, and its value."""
    return abs(candidate.error), candidate.parts, candidate.spread, candidate.ohms


@pytest.fixture(params=["every shelf", "few shelves"])
def shelved(request, monkeypatch):
    """All shelves filled, or no more than there must be, so that the search goes by windows."""
    monkeypatch.setattr(shelves_module, "LONGEST", 10**9 if request.param == "every shelf" else 0)


def assert_best(drawer, most, target, wanted=10):
    """The search finds what is best among all networks written out one by one."""
    ohms, counts = [Fraction(value) for value, _ in drawer], [count for _, count in drawer]
    found = search(
        float(target), [Lot(float(o), n) for o, n in zip(ohms, counts, strict=True)], most=most, wanted=wanted
    )
    expected, coolest = enumerated.best(ohms, counts, min(most, sum(counts)), target)
    # Of two values as far above as below either may be first where all else is equal.
    assert [row(c)[:3] for c in found.candidates] == [
        pytest.approx([float(x) for x in e[:3]], rel=1e-9, abs=1e-11) for e in expected[:wanted]
    ]
    assert all(c.ohms == pytest.approx(target * (1 + Fraction(c.error)), rel=1e-12) for c in found.candidates)
    for fewer in range(1, found.most_parts + 1):
        error, parts = enumerated_first(coolest, fewer, target)
        gained = [c for c in found.simpler if c.parts <= fewer][-1]
        assert (abs(gained.error), gained.parts) == pytest.approx((float(error), parts), rel=1e-9, abs=1e-11)
    first = found.candidates[0]
    for cooler in found.cooler:
        (spread,) = (s for (o, n), s in coolest.items() if n == cooler.parts and abs(o - first.ohms) < 1e-9)
        assert cooler.spread == pytest.approx(float(spread), rel=1e-9)
        assert cooler.ohms == pytest.approx(first.ohms, rel=1e-9)
    least_share = min(float(s) / n for (o, n), s in coolest.items() if abs(o - first.ohms) < 1e-9)
    assert (first, *found.cooler)[-1].share == pytest.approx(least_share, rel=1e-9)


def enumerated_first(coolest, most, target):
    """The least error with so many parts, and the fewest parts that give it."""
    return min((abs(ohms / target - 1), parts) for ohms, parts in coolest if parts <= most)


@settings(max_examples=40, deadline=None)
@given(drawers, st.integers(1, 5), targets)
def test_nothing_in_a_small_drawer_is_better(drawer, most, target):
    """Candidates, simpler and cooler ones are the true best of all networks, worked in fractions."""
    assert_best(drawer, most, target)


@pytest.mark.parametrize("target", [Fraction(731, 100), Fraction(10), Fraction(1, 50), Fraction(999)])
@pytest.mark.parametrize(
    ("drawer", "most"),
    [([(3, 9), (10, 9)], 6), ([(3, 2), (10, 1), (47, 4)], 6), ([(2, 1), (5, 1), (11, 2), (23, 1)], 5)],
)
@pytest.mark.usefixtures("shelved")
def test_windows_find_what_shelves_hold(drawer, most, target):
    """Up to six parts the true best is found, with shelves of every size and with half as many."""
    assert_best(drawer, most, target)


@pytest.mark.parametrize("lots", [plenty(3.3, 10.0, 47.0), [Lot(3.3, 3), Lot(10.0, 5), Lot(47.0, 1)]])
@pytest.mark.parametrize("target", [7.31, 10.0, 0.9])
def test_eight_parts_are_found_by_windows_as_by_shelves(lots, target, monkeypatch):
    """With eight parts two ways of searching, shelves up to four parts and up to eight, agree."""
    found = []
    for longest in (0, 10**9):
        monkeypatch.setattr(shelves_module, "LONGEST", longest)
        found.append(search(target, lots))
    for named in ("candidates", "simpler", "cooler"):
        one, other = ([row(c)[:3] for c in getattr(each, named)] for each in found)
        assert one == [pytest.approx(each, rel=1e-9, abs=1e-12) for each in other]
    assert any(c.parts == 8 for c in found[0].candidates + found[0].cooler)


@given(drawers, targets)
@settings(max_examples=30, deadline=None)
def test_no_more_is_taken_than_there_is(drawer, target):
    """No candidate has more pieces of a value than the drawer."""
    stock = {float(ohms): count for ohms, count in drawer}
    found = search(float(target), [Lot(ohms, count) for ohms, count in stock.items()], most=6)
    for candidate in (*found.candidates, *found.simpler, *found.cooler):
        taken = Counter(singles(candidate.network))
        assert all(taken[ohms] <= stock[ohms] for ohms in taken)
        assert sum(taken.values()) == candidate.parts <= found.most_parts


def test_a_drawer_of_single_pieces_is_respected():
    """From one piece each of 24 values no candidate takes a value twice, and six parts are used."""
    found = search(7.317, [Lot(v * decade, 1) for v in E12 for decade in (1, 10)])
    taken = [singles(candidate.network) for candidate in found.candidates]
    assert all(len(set(values)) == len(values) for values in taken)
    assert max(map(len, taken)) == 6
    assert abs(found.candidates[-1].error) < 1e-6


def test_candidates_are_ranked_by_error_parts_and_spread():
    """The list ascends in error to rounding; every value is in it once."""
    found = search(10.0, plenty(5.0, 10.0, 20.0), most=6, wanted=40)
    rows = [(round(abs(c.error) / 1e-9), c.parts, round(c.spread, 9)) for c in found.candidates]
    assert rows == sorted(rows)
    assert len({round(c.ohms, 7) for c in found.candidates}) == len(rows) == 40


def test_a_value_in_the_drawer_is_found_as_itself():
    """A stocked value is one part; four of them share the power evenly, and are named as cooler."""
    found = search(10.0, [Lot(10.0, 4)])
    assert (found.candidates[0].drawing, found.candidates[0].share) == ("10", 1.0)
    (cooler,) = found.cooler
    assert (cooler.drawing, cooler.share, cooler.spread) == ("(10 || 10) + (10 || 10)", 0.25, 1.0)


def test_the_issues_own_drawing():
    """Two 10 Ω in parallel and 3.3 Ω make 8.3 Ω, drawn as the issue draws it; 3.3 Ω takes 3.3/8.3."""
    first = search(8.3, [Lot(3.3, 12), Lot(10.0, 5)]).candidates[0]
    assert (first.drawing, first.parts) == ("(10 || 10) + 3.3", 3)
    assert first.share == pytest.approx(3.3 / 8.3)
    assert first.spread == pytest.approx(3 * 3.3 / 8.3)
    assert abs(first.error) < 1e-12


@pytest.mark.parametrize(
    ("target", "drawing"), [(1e9, "10 + 10 + 10 + 3.3 + 3.3"), (1e-9, "10 || 10 || 10 || 3.3 || 3.3")]
)
def test_beyond_reach_the_end_of_the_reach_is_nearest(target, drawing):
    """Far above all that the drawer gives it is all in series, far below all in parallel."""
    found = search(target, [Lot(3.3, 2), Lot(10.0, 3)])
    assert found.candidates[0].drawing == drawing
    assert found.candidates[0].error == pytest.approx(found.candidates[0].ohms / target - 1)
    assert found.most_parts == 5


def test_milliohms_beside_megohms():
    """Over nine decades a value that needs both ends is met: 1 MΩ + 2 Ω, and 5 mΩ ‖ 5 mΩ."""
    lots = plenty(0.005, 1.0, 1e6)
    assert search(1000002.0, lots).candidates[0].drawing == "1M + 1 + 1"
    assert search(0.0025, lots).candidates[0].drawing == "5m || 5m"
    # Nothing lies between eight ohms and an eighth of a megohm, so the lower end is nearest.
    assert search(100.0, lots).candidates[0].ohms == pytest.approx(8.0)


def test_one_part():
    """With one part allowed, or one there, it is the nearest value of the drawer."""
    assert [c.drawing for c in search(9.0, plenty(3.3, 10.0, 47.0), most=1).candidates] == ["10", "3.3", "47"]
    found = search(9.0, [Lot(3.3)])
    assert (found.most_parts, found.searched, len(found.candidates)) == (1, 1, 1)


@pytest.mark.parametrize(("values", "most_parts"), [(3, 8), (12, 8), (13, 6), (30, 6)])
def test_what_was_covered_is_told(values, most_parts):
    """Up to three values, and up to twelve, eight parts are covered, and more values with six."""
    found = search(7.3, plenty(*(1.0 + 0.37 * i for i in range(values))))
    assert found.most_parts == most_parts
    assert found.searched == sum(networks_of([PLENTY] * values, n) for n in range(1, most_parts + 1))


def test_lots_of_one_value_are_searched_as_one():
    """Lots of one value count together, in what is searched and in what is found."""
    assert search(15.0, [Lot(10.0, 2), Lot(10.0, 1)]) == search(15.0, [Lot(10.0, 3)])


def test_progress_runs_to_the_end():
    """Progress ascends to the whole."""
    told = []
    search(7.3, plenty(*(v * d for v in E12 for d in (1, 10))), progress=lambda *done: told.append(done))
    done = [d for d, _ in told]
    assert done == sorted(done)
    assert told[-1][0] == told[-1][1]
    assert len({whole for _, whole in told}) == 1


@pytest.mark.parametrize(
    ("change", "said"),
    [
        ({"target_ohm": 0.0}, "above nothing"),
        ({"target_ohm": float("nan")}, "above nothing"),
        ({"target_ohm": float("inf")}, "above nothing"),
        ({"lots": []}, "nothing in the drawer"),
        ({"most": 0}, "allow from 1 to 8"),
        ({"most": 9}, "allow from 1 to 8"),
        ({"wanted": 0}, "at least one"),
        ({"lots": plenty(*(1.0 + 0.001 * i for i in range(1501)))}, "leave out"),
    ],
)
def test_what_cannot_be_searched_is_refused(change, said):
    """A value, a drawer or a count that makes no sense is refused with what would."""
    asked = {"target_ohm": 7.3, "lots": plenty(3.3), "most": 8, "wanted": 10} | change
    with pytest.raises(InputError, match=f"; .*{said}|{said}.*; "):
        search(asked.pop("target_ohm"), asked.pop("lots"), **asked)


@pytest.mark.parametrize(
    ("lots", "most_s"),
    [([Lot(10.0, 8)], 2.0), (plenty(3.3, 10.0, 47.0), 10.0), (plenty(5.0, 10.0, 20.0), 10.0)],
)
def test_the_issues_times_are_kept(lots, most_s):
    """Eight equal resistors take under two seconds of the processor, three values under ten."""
    started_s = time.process_time()
    assert search(7.31, lots).most_parts == 8
    assert time.process_time() - started_s < most_s
