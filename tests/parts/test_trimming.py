"""Parts as built: what they do to the reading, and whether the cure cures."""

import re

import pytest
from hypothesis import given
from hypothesis import strategies as st
from parts_designs import amperes, behind, multiplier, ohm, shunt

from dialgen.circuit.shunt import Rating, Shunt
from dialgen.circuit.universal import UniversalShunt
from dialgen.parts.trimming import trims

OFF = st.floats(0.8, 1.25)


def parallel(*ohms):
    """Resistances in parallel."""
    return 1.0 / sum(1.0 / each for each in ohms)


@given(st.floats(0.01, 50.0), st.floats(10.0, 2000.0), OFF)
def test_a_shunt_as_built_by_current_division(range_a, coil_ohm, off):
    """The reading's error is that of Rs/(Rs + Rm), by hand."""
    exact = 1e-3 * coil_ohm / (range_a - 1e-3)
    design = shunt(range_a, coil_ohm=coil_ohm, built=exact * off)
    expected = 100.0 * (exact * off / (exact * off + coil_ohm) * range_a / 1e-3 - 1.0)
    (trim,) = trims(design)
    assert trim.reading_percent == pytest.approx(expected, abs=1e-7)
    assert trim.off_percent == pytest.approx(100.0 * (off - 1.0), abs=1e-9)


def test_a_bought_shunt_that_reads_low_as_designed():
    """The error is that of the reading, where full scale as designed is short of full deflection too.

    60 mV at 100 A, 60 Ω with 60 Ω of swamp: 0.6 mΩ drives half; 0.606 mΩ drives 1 % more of that.
    """
    bought = Shunt(rated=Rating(current_a=100.0, drop_v=0.06), swamp=ohm(60.0), built=ohm(0.606e-3)).design(
        behind(1e-3, 60.0, 100.0)
    )
    ring = (120.0006 / 120.000606) * 1.01
    (trim,) = trims(bought)
    assert trim.reading_percent == pytest.approx(100.0 * (ring - 1.0), rel=1e-7)


@given(st.floats(1e-4, 1e6), st.floats(1e-6, 0.3))
def test_what_lies_across_a_part_too_large_brings_it_down(ohms, over):
    """Built and trimming resistor in parallel are the part as designed (Kirchhoff)."""
    design = shunt(10.0, coil_ohm=ohms * (10.0 / 1e-3 - 1.0), built=ohms * (1 + over))
    (trim,) = trims(design)
    assert parallel(trim.built, trim.parallel_ohm) == pytest.approx(ohms, rel=1e-9)
    assert parallel(trim.built, trim.parallel_ohm) == pytest.approx(trim.ohms, rel=1e-12)
    assert trim.parallel_w == pytest.approx((9.999 * ohms) ** 2 / trim.parallel_ohm, rel=1e-9)
    assert (trim.series_ohm, trim.filed_share, trim.longer_share) == (None, None, None)
    assert (" across it" in trim.advice) == (trim.off_percent <= 5)
    assert ("anew" in trim.advice) == (trim.off_percent > 5)


@given(st.floats(1e-4, 1e6), st.floats(1e-6, 0.3))
def test_what_raises_a_part_too_small(ohms, under):
    """Resistance is length over cross-section: each of the three cures makes it as designed."""
    design = shunt(10.0, coil_ohm=ohms * (10.0 / 1e-3 - 1.0), built=ohms * (1 - under))
    (trim,) = trims(design)
    assert trim.built + trim.series_ohm == pytest.approx(ohms, rel=1e-9)
    assert trim.built / (1 - trim.filed_share) == pytest.approx(ohms, rel=1e-9)
    assert trim.built * (1 + trim.longer_share) == pytest.approx(ohms, rel=1e-9)
    assert trim.parallel_ohm is None
    assert ("file or scrape" in trim.advice) == (trim.ohms < 1.0 and trim.off_percent >= -5)
    assert ("in series with it" in trim.advice) == (trim.ohms >= 1.0)


def test_a_part_that_came_out_right_needs_nothing():
    """A part within a billionth of its design is left alone."""
    design = multiplier(10.0, built=(9500.0 * (1 + 1e-12),))
    assert trims(design)[0].advice == "nothing to do"
    assert trims(multiplier(10.0)) == ()


def test_the_cures_of_a_worked_shunt():
    """1 mA, 75 Ω to 40 A is 1.875047 mΩ; built 1.885 mΩ it takes 355.1 mΩ across, at 15.8 mW.

    By hand: 1.885·1.875046876/(1.885 - 1.875046876) = 355.11 mΩ, and (75 mV)²/355.11 mΩ = 15.84 mW.
    """
    (trim,) = trims(shunt(40.0, coil_ohm=75.0, built=1.885e-3))
    assert trim.advice == "put 355.1 mΩ across it, which takes 16 mW"
    (small,) = trims(shunt(40.0, coil_ohm=75.0, built=1.865e-3))
    # 1 - 1.865/1.875046876 = 0.5358 %, and 1.875046876/1.865 - 1 = 0.5387 %.
    assert "file or scrape 0.54 % off" in small.advice
    (short,) = trims(multiplier(10.0, built=(9450.0,)))
    assert short.advice == "put 50 Ω in series with it"


def test_each_section_as_built_has_its_own_row():
    """Of a universal shunt each section alone, on the range where it does most, by current division."""
    # 500 Ω, 1 mA to 10 and 100 mA: sections 5.5556 and 50 Ω (reference values, dc.ayrton.c).
    exact = (50.0 / 9.0, 50.0)
    built = (exact[0] * 1.02, exact[1] * 0.97)
    circuit = UniversalShunt(ranges=amperes(0.01, 0.1), built=tuple(map(ohm, built)))
    first, second = trims(circuit.design(behind(1e-3, 500.0, 0.01)))
    assert (first.part, second.part) == ("section 1", "section 2")
    alone = 100.0 * built[0] / (500.0 + built[0] + exact[1])  # of 100 mA, whose tap it is
    assert first.reading_percent == pytest.approx(100.0 * (alone - 1.0), rel=1e-7)
    both = 10.0 * (exact[0] + built[1]) / (500.0 + exact[0] + built[1])
    assert second.reading_percent == pytest.approx(100.0 * (both - 1.0), rel=1e-7)


@pytest.mark.parametrize("times", [0.26, 0.94, 1.06, 1.25])
def test_a_shunt_far_off_is_not_filed(times):
    """No one files three quarters off a strip, nor has most of the current go through what lies across it."""
    (trim,) = trims(shunt(40.0, coil_ohm=75.0, built=times * 75e-3 / 39.999))
    assert trim.advice == "make it anew, as this one is too far off to be trimmed"


def test_a_multiplier_far_off_is_bought_or_gets_what_it_lacks():
    """Of 9.5 kΩ a 12 kΩ is the wrong part; an 8.2 kΩ (13.7 % short) is right with 1.3 kΩ in series."""
    (large,) = trims(multiplier(10.0, built=(12e3,)))
    assert large.advice == "buy it anew, as this one is too far off to be trimmed"
    (small,) = trims(multiplier(10.0, built=(8.2e3,)))
    assert small.advice == "put 1.3 kΩ in series with it"


@given(st.floats(-8.0, -0.2))
def test_advice_is_written_in_plain_figures(power):
    """No figure of the advice has an exponent, however little or much the part lacks."""
    (trim,) = trims(shunt(40.0, coil_ohm=75.0, built=75e-3 / 39.999 * (1 - 10.0**power)))
    assert not re.search(r"\de[+-]?\d", trim.advice)
