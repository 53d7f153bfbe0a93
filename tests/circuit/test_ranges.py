"""Instruments of several ranges: textbook values, and Kirchhoff's equations at every tap.

LIEC is T. R. Kuphaldt, Lessons in Electric Circuits, vol. I, chapter 8; Bell is D. A. Bell, Electronic
Instrumentation and Measurements, ex. 3-7, by the FOSSEE Scilab Textbook Companion 182.
"""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from kirchhoff import coil_current

from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.ranges import AMPERE_RANGES
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.circuit.universal import UniversalShunt
from dialgen.dialfile.base import Several
from dialgen.dialfile.fields import list_of
from dialgen.errors import InputError
from dialgen.quantity import Amount


def behind(coil_a, coil_ohm, full):
    """A coil before a scale that ends at ``full``."""
    return Terminals(
        coil=Coil(current=coil_a, resistance=coil_ohm),
        signal=lambda v: v,
        rest_signal=0.0,
        full_value=full,
        unit=None,
    )


def amounts(values, unit):
    """Several quantities."""
    return tuple(Amount(value, unit) for value in values)


# A common exercise, its inputs seen in two places, worked exactly (reference values, dc.ayrton.a); and
# one worked from the law alone (dc.ayrton.c).  Sections from the smallest range inwards.
AYRTON = [
    (1e-3, 50.0, (1.0, 5.0, 10.0), (0.04004004004004004, 0.005005005005005005, 0.005005005005005005)),
    (1e-3, 500.0, (0.01, 0.1, 1.0), (50.0, 5.0, 0.5555555555555556)),
]


@pytest.mark.parametrize(("coil_a", "coil_ohm", "ranges_a", "sections_ohm"), AYRTON)
@pytest.mark.parametrize("falling", [False, True])
def test_published_universal_shunts(coil_a, coil_ohm, ranges_a, sections_ohm, falling):
    """Sections from the tap of the largest range outwards, then the total, are the published ones."""
    given_a = ranges_a[::-1] if falling else ranges_a
    design = UniversalShunt(ranges=amounts(given_a, "A")).design(behind(coil_a, coil_ohm, ranges_a[0]))
    assert [part.name for part in design.parts] == ["section 1", "section 2", "section 3", "total"]
    wanted = [*sections_ohm[::-1], sum(sections_ohm)]
    assert [part.ohms for part in design.parts] == pytest.approx(wanted, rel=1e-9)


@st.composite
def tapped(draw):
    """A movement and two to five ranges above its own current."""
    coil_a, coil_ohm = draw(st.floats(20e-6, 20e-3)), draw(st.floats(5.0, 5000.0))
    steps = draw(st.lists(st.floats(1.3, 20.0), min_size=2, max_size=5))
    ranges_a = list(np.cumprod([coil_a * steps[0], *steps[1:]]))
    swamp_ohm = draw(st.sampled_from((0.0, 0.7))) * coil_ohm
    built = draw(
        st.one_of(st.none(), st.lists(st.floats(0.9, 1.1), min_size=len(steps), max_size=len(steps)))
    )
    return coil_a, coil_ohm, ranges_a, swamp_ohm, built


@given(tapped(), st.floats(0.05, 1.2))
def test_current_divides_at_every_tap_as_kirchhoff_says(case, share):
    """At each tap the coil takes what nodal analysis gives, and all of its current at that range."""
    coil_a, coil_ohm, ranges_a, swamp_ohm, factors = case
    count = len(ranges_a)
    plain = UniversalShunt(ranges=amounts(ranges_a, "A"), swamp=Amount(swamp_ohm, "Ω"))
    designed = plain.design(behind(coil_a, coil_ohm, ranges_a[0]))
    sections = [part.ohms for part in designed.parts[:count]]
    built = None if factors is None else [ohm * f for ohm, f in zip(sections, factors, strict=True)]
    circuit = UniversalShunt(
        ranges=plain.ranges, swamp=plain.swamp, built=amounts(built, "Ω") if built else ()
    )
    fitted = built or sections
    for i, range_a in enumerate(sorted(ranges_a, reverse=True), 1):
        # Node 0 is the common end, node i the tap behind the i-th section, the coil at the last.
        ring = [(k, k + 1, 1.0 / ohm) for k, ohm in enumerate(fitted)]
        coil = (count, 0, 1.0 / (coil_ohm + swamp_ohm))
        drive = coil_current([*ring, coil], [(i, share * range_a)], coil) / coil_a
        stage = circuit.stage(behind(coil_a, coil_ohm, range_a))
        assert float(stage.forward(np.array(share * range_a))) == pytest.approx(drive, rel=1e-9)
        if built is None:
            assert drive == pytest.approx(share, rel=1e-9)


@given(tapped())
def test_the_worked_circuit_is_the_stage(case):
    """What a design works out by its network is what the chain makes of the same signal."""
    coil_a, coil_ohm, ranges_a, swamp_ohm, _ = case
    circuit = UniversalShunt(ranges=amounts(ranges_a, "A"), swamp=Amount(swamp_ohm, "Ω"))
    for range_a in ranges_a:
        terminals = behind(coil_a, coil_ohm, range_a)
        design = circuit.design(terminals)
        assert design.case.signal == design.range == range_a
        assert [case.signal for case in design.cases] == sorted(ranges_a)
        working = design.case.work(design.ohms, 0.7 * range_a)
        assert working.drive == pytest.approx(
            float(circuit.stage(terminals).forward(np.array(0.7 * range_a))), rel=1e-9
        )
        # Power brought in at the terminals is what all parts together turn into heat.
        heat_w = sum(load.watts for load in working.loads.values())
        assert heat_w == pytest.approx(0.7 * range_a * working.drop_v, rel=1e-9)


# LIEC "Voltmeter design" (dc.mult.individual, dc.mult.chain) and Bell ex. 3-7 (dc.bell.mult_*).
SEVERAL = [
    (1e-3, 500.0, (1.0, 10.0, 100.0, 1000.0), False, (500.0, 9_500.0, 99_500.0, 999_500.0)),
    (1e-3, 500.0, (1.0, 10.0, 100.0, 1000.0), True, (500.0, 9_000.0, 90_000.0, 900_000.0)),
    (50e-6, 1_700.0, (10.0, 50.0, 100.0), False, (198.3e3, 998.3e3, 1_998.3e3)),
    (50e-6, 1_700.0, (10.0, 50.0, 100.0), True, (198.3e3, 800e3, 1e6)),
]


@pytest.mark.parametrize(("coil_a", "coil_ohm", "ranges_v", "chain", "values_ohm"), SEVERAL)
def test_published_multipliers_of_several_ranges(coil_a, coil_ohm, ranges_v, chain, values_ohm):
    """Each range's own resistor, or the sections of a chain, are the printed ones, and give full scale."""
    circuit = Multiplier(ranges=amounts(ranges_v, "V"), chain=chain)
    for range_v in ranges_v:
        terminals = behind(coil_a, coil_ohm, range_v)
        design = circuit.design(terminals)
        assert [part.ohms for part in design.parts] == pytest.approx(values_ohm, rel=1e-9)
        assert design.range == range_v
        assert design.case.work(design.ohms, range_v).drive == pytest.approx(1.0, rel=1e-12)
        assert float(circuit.stage(terminals).forward(np.array(range_v))) == pytest.approx(1.0, rel=1e-12)


@pytest.mark.parametrize("chain", [False, True])
def test_multipliers_as_built_are_taken_in_the_order_of_ranges(chain):
    """With resistors as built the drive is volts over all that is then in series (Ohm's law)."""
    built = (600.0, 9_400.0, 91_000.0)
    circuit = Multiplier(
        ranges=amounts((1.0, 10.0, 100.0), "V"),
        chain=chain,
        built=amounts(built, "Ω"),
        swamp=Amount(20.0, "Ω"),
    )
    for i, range_v in enumerate((1.0, 10.0, 100.0)):
        series_ohm = 500.0 + 20.0 + (sum(built[: i + 1]) if chain else built[i])
        stage = circuit.stage(behind(1e-3, 500.0, range_v))
        assert float(stage.forward(np.array(range_v))) == pytest.approx(
            range_v / series_ohm / 1e-3, rel=1e-12
        )


REFUSED = [
    (lambda: UniversalShunt(ranges=amounts((1.0, 10.0, 5.0), "A")), ("ranges", 2), "out of order"),
    (lambda: UniversalShunt(ranges=amounts((1.0, 1.0), "A")), ("ranges", 1), "out of order"),
    (
        lambda: UniversalShunt(ranges=amounts((1.0, 5.0), "A"), built=amounts((0.01,), "Ω")),
        ("built",),
        "give one for each",
    ),
    (
        lambda: UniversalShunt(ranges=amounts((1.0, 5.0), "A"), built=amounts((0.01, 0.0), "Ω")),
        ("built", 1),
        "two ranges one",
    ),
    (
        lambda: UniversalShunt(ranges=amounts((1e-3, 5.0), "A")).stage(behind(1e-3, 75.0, 5.0)),
        ("ranges",),
        "not above the movement's own 1 mA",
    ),
    (
        lambda: UniversalShunt(ranges=amounts((1.0, 5.0), "A")).stage(behind(1e-3, 75.0, 3.0)),
        ("range",),
        "is not one of the ranges 1 A, 5 A",
    ),
    (lambda: Multiplier(chain=True), ("chain",), "several ranges"),
    (lambda: Multiplier(built=amounts((1.0, 2.0), "Ω")), ("built",), "2 resistors as built, for 1 ranges"),
]


@pytest.mark.parametrize(("make", "key", "words"), REFUSED)
def test_a_bad_set_of_ranges_is_refused_at_its_key(make, key, words):
    """Ranges out of order, below the movement or not matched by what was built are told at their key."""
    with pytest.raises(InputError, match=words) as refusal:
        make()
    assert refusal.value.keys[0] == key


@pytest.mark.parametrize(
    ("given_ranges", "words"),
    [("1 A", "this is a list"), ([], "0 of them; give 1 to 40"), (["1 A"] * 41, "41 of them; give 1 to 40")],
)
def test_what_is_not_a_list_of_ranges_is_refused(given_ranges, words):
    """Ranges are a list of one to forty, and it is told how to write them."""
    with pytest.raises(ValueError, match=words):
        list_of(AMPERE_RANGES)(given_ranges)


@pytest.mark.parametrize("given_ranges", [["1 A", 5], ["1 A", "5 V"]])
def test_what_is_no_range_is_refused_at_its_place(given_ranges):
    """What is not a current is told at its own place in the list."""
    with pytest.raises(Several) as refusal:
        list_of(AMPERE_RANGES)(given_ranges)
    assert [each.keys for each in refusal.value.errors] == [((1,),)]
