"""Parts as built: what they do to an old face, and whether the cure cures."""

from dataclasses import replace

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st
from parts_designs import amperes, behind, multiplier, ohm, shunt

from dialgen.circuit.shunt import Rating, Shunt
from dialgen.circuit.universal import UniversalShunt
from dialgen.errors import InputError
from dialgen.parts.trimming import indicated, misreadings, trims

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
    assert misreadings(design)[0].percent == pytest.approx(expected, abs=1e-7)
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
    assert misreadings(bought)[0].percent == pytest.approx(100.0 * (ring - 1.0), rel=1e-7)


@given(st.floats(1e-4, 1e6), st.floats(1e-6, 0.3))
def test_what_lies_across_a_part_too_large_brings_it_down(ohms, over):
    """Built and trimming resistor in parallel are the part as designed (Kirchhoff)."""
    design = shunt(10.0, coil_ohm=ohms * (10.0 / 1e-3 - 1.0), built=ohms * (1 + over))
    (trim,) = trims(design)
    assert parallel(trim.built, trim.parallel_ohm) == pytest.approx(ohms, rel=1e-9)
    assert parallel(trim.built, trim.parallel_ohm) == pytest.approx(trim.ohms, rel=1e-12)
    assert trim.parallel_w == pytest.approx((9.999 * ohms) ** 2 / trim.parallel_ohm, rel=1e-9)
    assert (trim.series_ohm, trim.filed_share, trim.longer_share) == (None, None, None)
    assert " across it" in trim.advice


@given(st.floats(1e-4, 1e6), st.floats(1e-6, 0.3))
def test_what_raises_a_part_too_small(ohms, under):
    """Resistance is length over cross-section: each of the three cures makes it as designed."""
    design = shunt(10.0, coil_ohm=ohms * (10.0 / 1e-3 - 1.0), built=ohms * (1 - under))
    (trim,) = trims(design)
    assert trim.built + trim.series_ohm == pytest.approx(ohms, rel=1e-9)
    assert trim.built / (1 - trim.filed_share) == pytest.approx(ohms, rel=1e-9)
    assert trim.built * (1 + trim.longer_share) == pytest.approx(ohms, rel=1e-9)
    assert trim.parallel_ohm is None
    assert ("file or scrape" in trim.advice) == (trim.ohms < 1.0)


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


@given(OFF, st.lists(st.floats(0.0, 1.2), min_size=1, max_size=5))
def test_an_old_face_shows_the_built_shunts_share(off, shares):
    """On an evenly divided face everything is off by the same share as full scale."""
    design = shunt(10.0, built=off * 0.5 / 9.999)
    wrong = 1.0 + misreadings(design)[0].percent / 100.0
    assert indicated(design, design.cases[0], shares) == pytest.approx([wrong * s for s in shares], abs=1e-12)


@given(OFF, st.floats(0.6, 1.0))
def test_an_old_face_with_a_suppressed_zero(off, share):
    """A 10 V face that starts at 6 V: (U - 6 V) goes by the resistance, so the error is none at 6 V."""
    design = multiplier(10.0, built=(3500.0 * off,), suppress=6.0)
    (shown,) = indicated(design, design.cases[0], [share])
    expected_v = 6.0 + (10.0 * share - 6.0) * 4000.0 / (3500.0 * off + 500.0)
    assert 10.0 * shown == pytest.approx(expected_v, rel=1e-9)


@given(st.floats(0.5, 2.0), st.floats(0.5, 2.0))
def test_several_parts_as_built_err_together(first, second):
    """All sections of a universal shunt as built count at once, each alone in its own row."""
    assume(abs(first - 1) > 1e-3 and abs(second - 1) > 1e-3)
    # 500 Ω, 1 mA to 10 and 100 mA: sections 5.5556 and 50 Ω (reference values, dc.ayrton.c).
    built = (50.0 / 9.0 * first, 50.0 * second)
    circuit = UniversalShunt(ranges=amperes(0.01, 0.1), built=tuple(map(ohm, built)))
    design = circuit.design(behind(1e-3, 500.0, 0.01))
    ring = 500.0 + sum(built)
    by_hand = {"10 mA": 10.0 * sum(built) / ring, "100 mA": 100.0 * built[0] / ring}
    for each in misreadings(design):
        assert each.percent == pytest.approx(100.0 * (by_hand[each.case] - 1.0), abs=1e-8)
    assert [trim.part for trim in trims(design)] == ["section 1", "section 2"]


def test_a_face_in_ohms_is_refused():
    """An ohmmeter's face is not evenly divided, so there is nothing to compare it with."""
    design = replace(shunt(1.0), unit="Ω")
    with pytest.raises(InputError, match="not evenly divided"):
        indicated(design, design.cases[0], [0.5])
