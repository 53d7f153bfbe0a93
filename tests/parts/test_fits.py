"""What is bought from an E series and what is not: by current division, worked by hand."""

import pytest
from hypothesis import given
from hypothesis import strategies as st
from parts_designs import amperes, behind, multiplier, ohm, shunt, universal

from dialgen.circuit.design import Part
from dialgen.circuit.shunt import Rating, Shunt
from dialgen.circuit.universal import UniversalShunt
from dialgen.parts.assessed import assess
from dialgen.parts.bench import Bench
from dialgen.parts.fits import is_bought, is_there, is_wound

E24 = Bench(series="E24")
SERIES = ["E6", "E12", "E24", "E48", "E96", "E192"]


def bought_shunt(swamp_ohm=None, built_ohm=None):
    """A bought shunt of 100 A/75 mV before 1 mA in 20 Ω."""
    rated = Rating(current_a=100.0, drop_v=0.075)
    circuit = Shunt(rated=rated, swamp=ohm(swamp_ohm), built=ohm(built_ohm))
    return circuit.design(behind(1e-3, 20.0, 100.0))


def test_a_bought_shunt_has_no_tolerance_of_a_series():
    """Only the swamping resistor, 55 Ω in a ring of 75, is yet to be bought; low by 5 % it reads high."""
    (found,) = assess(bought_shunt(), E24).together
    swamp_ohm = 0.75e-3 * 99.999 / 1e-3 - 20.0
    ring = 20.0 + swamp_ohm + 0.75e-3
    expected = 100.0 * (ring / (ring - 0.05 * swamp_ohm) - 1.0)
    assert found.worst_percent == pytest.approx(expected, rel=1e-9)
    assert found.likely_percent == pytest.approx(expected, rel=1e-9)
    fitted = 100.0 * (ring / (ring + 56.0 - swamp_ohm) - 1.0)  # E24: 51 or 56 Ω
    assert found.error_percent == pytest.approx(fitted, rel=1e-9)


@pytest.mark.parametrize(
    "design",
    [
        bought_shunt(swamp_ohm=55.0),
        shunt(40.0),
        shunt(40.0, built=12.6e-3),
        multiplier(10.0, built=(9450.0,)),
    ],
    ids=["bought, with its swamp in the drawer", "wound", "wound and built", "built"],
)
def test_what_is_there_or_wound_is_not_bought_together(design):
    """Where nothing is left to buy no tolerance of a series is told."""
    assert assess(design).together == ()


@pytest.mark.parametrize("design", [shunt(40.0), multiplier(10.0, built=(9450.0,))], ids=["wound", "built"])
def test_the_nearest_values_of_all_series_are_still_known(design):
    """A wound or built part keeps its nearest values, for who wants to compare."""
    assert [fit.series for fit in assess(design).parts[0].fits] == SERIES


def test_of_a_tapped_shunt_the_sections_above_an_ohm_are_bought():
    """Of 100 mA to 5 A (1 mA, 150 Ω) section 4 alone, 1.2121 Ω, and by hand what 5 % less of it does."""
    found = assess(universal((0.1, 0.5, 1.0, 5.0), 1e-3, 150.0), E24)
    whole = 0.15 / 0.099
    ring = 150.0 + whole
    section_ohm = whole - ring * 1e-3 / 0.5
    assert [part.part.name for part in found.parts if is_bought(part.part)] == ["section 4"]
    assert [part.part.name for part in found.parts if is_wound(part.part)] == [
        "section 1",
        "section 2",
        "section 3",
    ]
    low = whole - 0.05 * section_ohm
    expected = 100.0 * (1.0 - low / (ring - 0.05 * section_ohm) * ring / whole)
    assert found.together[0].worst_percent == pytest.approx(expected, rel=1e-6)
    near = whole - section_ohm + 1.2
    error = 100.0 * (near / (near + 150.0) * ring / whole - 1.0)
    assert found.together[0].error_percent == pytest.approx(error, rel=1e-6)


def test_sections_as_built_are_there():
    """Built sections have nothing to be bought, their total neither."""
    circuit = UniversalShunt(ranges=amperes(0.01, 0.1), built=(ohm(5.55), ohm(50.1)))
    parts = circuit.design(behind(1e-3, 500.0, 0.01)).parts
    assert [is_there(part) for part in parts] == [True, True, True]
    assert not any(is_bought(part) or is_wound(part) for part in parts)


@given(
    st.floats(0.0, 1e7),
    st.one_of(st.none(), st.floats(1e-3, 1e6)),
    st.booleans(),
    st.booleans(),
)
def test_a_part_is_one_thing_at_most(ohms, built, given_, adjustable):
    """There already, bought, or wound: never two of them, and a potentiometer is none of the last two."""
    part = Part(name="x", ohms=ohms, built=built, given=given_, adjustable=adjustable)
    assert is_there(part) + is_bought(part) + is_wound(part) <= 1
    assert not (adjustable and (is_bought(part) or is_wound(part)))
