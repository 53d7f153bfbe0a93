"""Home-made shunts and bobbins: published wire tables, R = ρ·L/A by hand, and filing worked out again."""

import itertools
import math
import re

import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.errors import InputError
from dialgen.parts.wire import cooling, workshop
from dialgen.parts.wire.cooling import rise_in_air_k, rise_of_bobbin_k
from dialgen.parts.wire.gauges import awg_diameter_mm
from dialgen.parts.wire.materials import MATERIALS
from dialgen.parts.wire.spool import read_wire
from dialgen.parts.wire.winding import wound

AMPERE_SHUNT = wound(1.875e-3, 40.0, read_wire("manganin 20 x 1 mm"))
BOBBIN = wound(9500.0, 1e-3, read_wire("manganin 0.05 mm"))

AWG_TABLE = (
    ("4/0", 11.684, 0.1608), ("0", 8.251463, 0.32242), ("4", 5.189396, 0.81517), ("10", 2.588187, 3.27711),
    ("12", 2.052525, 5.21081), ("14", 1.627727, 8.28551), ("18", 1.023687, 20.94824),
    ("20", 0.811821, 33.309), ("24", 0.510559, 84.21508), ("28", 0.321094, 212.92082),
    ("30", 0.254639, 338.55737), ("32", 0.201938, 538.32731), ("36", 0.127, 1361.05189),
    ("40", 0.079871, 3441.14486), ("44", 0.050231, 8700.23989),
)  # fmt: skip
"""Gauge, mm and Ω/km at 20 °C: reference_values.md section 8 (law of ASTM B258, IEC 60028; the diameters
agree with the table of Kuphaldt, Lessons in Electric Circuits V)."""


@pytest.mark.parametrize(("gauge", "diameter_mm", "ohm_per_km"), AWG_TABLE)
def test_gauges_have_published_diameters_and_ohms(gauge, diameter_mm, ohm_per_km):
    """A copper wire by its AWG gauge has the tabled diameter and the tabled ohms per kilometre."""
    wire = read_wire(f"copper AWG {gauge}")
    assert wire.width_mm == pytest.approx(diameter_mm, abs=0.51e-6)
    assert wire.ohm_per_m * 1000 == pytest.approx(ohm_per_km, rel=1e-4)


@pytest.mark.parametrize(("gauge", "printed"), [(20, 10.15), (24, 25.67), (30, 103.2)])
def test_copper_has_the_printed_ohms_for_a_thousand_feet(gauge, printed):
    """Ω/1000 ft as printed in a stored wire table (reference_values.md section 8), to its last digit."""
    thousand_feet_m = 304.8
    assert read_wire(f"{gauge} AWG copper").ohm_per_m * thousand_feet_m == pytest.approx(printed, rel=5e-4)


@pytest.mark.parametrize(
    ("ours", "ohm_mm2_per_m"), [("manganin", 0.4821), ("constantan", 0.4538), ("nichrome", 1.122)]
)
def test_alloys_lie_within_what_is_published(ours, ohm_mm2_per_m):
    """Kuphaldt's resistivities (LIEC V) lie within each alloy's bounds, and so does what we reckon with."""
    material = MATERIALS[ours]
    assert material.least <= ohm_mm2_per_m <= material.most
    assert material.least <= material.resistivity <= material.most


@pytest.mark.parametrize(
    ("name", "per_k"),
    [("manganin", 1.5e-5), ("constantan", -7.4e-5), ("nichrome", 1.7e-4), ("copper", 3.93e-3)],
)
def test_temperature_coefficients_are_published(name, per_k):
    """Alloys as in Kuphaldt, LIEC V; copper by IEC 60028."""
    assert MATERIALS[name].per_k == per_k


def test_length_is_ohms_times_area_over_resistivity():
    """1.875 mΩ of 20 mm² at 0.43 is 87.209 mm; 9500 Ω of 0.05 mm is 43.379 m: worked by hand."""
    assert AMPERE_SHUNT.length_mm == pytest.approx(87.20930, abs=1e-4)
    # 9500 · (π/4 · 0.0025) / 0.43 = 9500 · 0.001963495 / 0.43
    assert BOBBIN.length_mm == pytest.approx(43379.5, abs=0.1)


@given(st.floats(1e-6, 1e6), st.sampled_from(sorted(MATERIALS)), st.floats(0.02, 10.0), st.floats(0.02, 10.0))
def test_wound_length_has_the_wanted_ohms(ohms, name, width_mm, thickness_mm):
    """ρ·L/A with the length found and the sides given returns the ohms that were asked for."""
    wire = read_wire(f"{name} {width_mm:.6f} x {thickness_mm:.6f} mm")
    area_m2 = float(f"{width_mm:.6f}") * float(f"{thickness_mm:.6f}") * 1e-6
    length_m = wound(ohms, 0.0, wire).length_mm / 1000
    assert MATERIALS[name].resistivity * 1e-6 * length_m / area_m2 == pytest.approx(ohms, rel=1e-9)


@pytest.mark.parametrize(
    ("one", "other"),
    [
        ("manganin AWG 36", "manganin 0.127 mm"),
        ("AWG24 constantan", "constantan wire, #24 AWG"),
        ("copper AWG 00", "AWG 2/0 copper"),
        ("Manganin strip 20 x 1 mm", "1 mm × 20 mm manganin"),
        ("manganin 10 x 0.5 mm", "manganin 10mm*500um"),
        ("nichrome 0.02 in", "nichrome ø0.508mm"),
        ("copper 1.5 mm2", "copper 1.5 mm²"),
        ("manganin 0.5 mm", "round manganin wire of 0.5 mm"),
    ],
)
def test_a_wire_may_be_written_in_several_ways(one, other):
    """Both spellings are one size of one metal."""
    a, b = read_wire(one), read_wire(other)
    assert a.material is b.material
    assert (a.thickness_mm is None) is (b.thickness_mm is None)
    assert a.area_mm2 == pytest.approx(b.area_mm2, rel=1e-9)
    assert a.perimeter_mm == pytest.approx(b.perimeter_mm, rel=1e-9)


def test_a_cross_section_is_taken_as_solid():
    """1.5 mm² of copper is a round wire of that area: 2·sqrt(1.5/π) = 1.38198 mm."""
    wire = read_wire("copper 1.5 mm2")
    assert (wire.width_mm, wire.area_mm2) == pytest.approx((1.381977, 1.5), rel=1e-6)


@pytest.mark.parametrize(
    ("spool", "ohm_per_m"),
    [
        ("manganin 0.5 mm 2.3 ohm/m", 2.3),
        ("manganin 0.5 mm, 2300 mΩ per metre", 2.3),
        ("manganin 0.5 mm 0.45 ohm mm2/m", 0.45 / (math.pi / 16)),
        ("manganin 20 x 1 mm 0.48 Ω·mm²/m", 0.024),
    ],
)
def test_a_spool_of_its_own_stands_before_the_table(spool, ohm_per_m):
    """Ohms per metre measured on the spool, or its own resistivity, are what lengths are worked with."""
    wire = read_wire(spool)
    assert wire.measured
    assert wire.ohm_per_m == pytest.approx(ohm_per_m, rel=1e-9)
    assert wound(2 * ohm_per_m, 0.0, wire).length_mm == pytest.approx(2000.0)


@pytest.mark.parametrize(
    ("written", "wrong", "right"),
    [
        (5, "a wire is text, not 5", "manganin 0.5 mm"),
        ("", "no size", "constantan AWG 24"),
        ("manganin", "no size", "manganin 20 x 1 mm"),
        ("manganin 0.5", "no size with its unit", "manganin 0.5 mm"),
        ("0.5 mm", "names no metal", "manganin, constantan, nichrome or copper"),
        ("gold 1 mm", '"gold" says nothing', "manganin, constantan, nichrome or copper"),
        ("mangain 0.5 mm", '"mangain" says nothing', "did you mean manganin"),
        ("manganin 0,5 mm", "comma", "point"),
        ("manganin 1 mm AWG 24", "more than one size", "write"),
        ("manganin 1 mm 2 mm", "more than one size", "write"),
        ("manganin copper 1 mm", "more than one metal", "write one of"),
        ("manganin strip 5 mm", "width and a thickness", "manganin 20 x 1 mm"),
        ("manganin AWG 60", "no gauge 60", "4/0 to 50"),
        ("manganin AWG 23.5", "no gauge 23.5", "4/0 to 50"),
        ("manganin 500 mm", "500 mm is no wire", "0.01 to 100 mm"),
        ("manganin 0 x 1 mm", "0 mm is no wire", "0.01 to 100 mm"),
        ("copper 0 mm2", "0 mm is no wire", "0.01 to 100 mm"),
        ("manganin 0.5 mm 219 ohm/m", "makes 43 Ω·mm²/m", "check metal, size and ohms"),
        ("manganin 0.5 mm 0 ohm/m", "not above 0", "write"),
        ("manganin " + "0.5 mm " * 40, "288 characters", "write"),
    ],
)
def test_what_is_no_wire_is_refused_with_what_would_be_right(written, wrong, right):
    """Each message says what is wrong; and after a semicolon, what to write."""
    with pytest.raises(ValueError, match=";") as refused:
        read_wire(written)
    before, _, after = str(refused.value).partition("; ")
    assert wrong in before
    assert right in after


@given(st.text(alphabet="manginco pert0123456789.x/ AWGohm²×", max_size=40))
def test_any_text_is_a_wire_or_a_plain_refusal(text):
    """Whatever is written, it is a wire of some size or a ValueError of the house's form."""
    wire, refusal = None, ""
    try:
        wire = read_wire(text)
    except ValueError as refused:
        refusal = str(refused)
    assert 0 < wire.ohm_per_m < math.inf if wire else ";" in refusal


@pytest.mark.parametrize(("ohms", "current_a"), [(0.0, 1.0), (-1.0, 1.0), (math.inf, 1.0), (math.nan, 1.0)])
def test_no_length_has_these_ohms(ohms, current_a):
    """Nothing, less than nothing and infinity cannot be wound."""
    with pytest.raises(InputError, match="no resistance to wind; give"):
        wound(ohms, current_a, read_wire("manganin 0.5 mm"))


@pytest.mark.parametrize("current_a", [-1.0, math.inf, math.nan])
def test_no_such_current(current_a):
    """A current below nothing, or without an end, is refused."""
    with pytest.raises(InputError, match="no current to wind for; give"):
        wound(1.0, current_a, read_wire("manganin 0.5 mm"))


def test_gauges_outside_the_standard_are_refused():
    """There is no gauge above 50 or thicker than 4/0."""
    for gauge in (51, -4):
        with pytest.raises(ValueError, match="AWG has no gauge"):
            awg_diameter_mm(gauge)


def test_density_and_heat_of_the_shunt():
    """40 A in 20 mm² are 2 A/mm²; 3 W on 2·21·87.209 mm² of surface are 0.0819 W/cm²: by hand."""
    assert AMPERE_SHUNT.density_a_per_mm2 == pytest.approx(2.0)
    assert AMPERE_SHUNT.watts == pytest.approx(3.0)
    assert AMPERE_SHUNT.surface_w_per_cm2 == pytest.approx(3.0 / 36.6279, rel=1e-5)


@given(st.floats(0.5, 200.0), st.floats(0.05, 3.0), st.sampled_from((0.05, 0.1, 0.5, 1.0)))
def test_filing_raises_the_ohms_as_told(width_mm, percent, share):
    """A strip cut into slices, those in the share narrower by what is filed, has the wanted rise."""
    strip = wound(1.0, 0.0, read_wire(f"manganin {min(width_mm, 100.0):.4f} x 0.5 mm"))
    filed_mm = strip.filed_mm(percent, share)
    width_mm, slices = strip.wire.width_mm, 1000
    each_mm = strip.length_mm / slices / 1000
    ohms = sum(
        0.43 * each_mm / (0.5 * (width_mm - filed_mm if i < share * slices else width_mm))
        for i in range(slices)
    )
    assert 100 * (ohms - 1.0) == pytest.approx(percent, rel=1e-6)


def test_a_thousandth_by_length_and_by_millimetre():
    """Shortened by the length that is told for 0.1 %, the ohms fall by 0.1 %, a millimetre at a time."""
    assert BOBBIN.thousandth_mm * BOBBIN.ohm_per_mm == pytest.approx(9.5)
    assert wound(9490.5, 1e-3, BOBBIN.wire).length_mm == pytest.approx(
        BOBBIN.length_mm - BOBBIN.thousandth_mm
    )


@pytest.mark.parametrize("name", sorted(MATERIALS))
def test_what_is_cut_is_long_enough_for_any_batch(name):
    """Of the least resistivity that is published for the metal, the cut length still has 2 % to spare."""
    cut = wound(10.0, 0.0, read_wire(f"{name} 0.2 mm"))
    least = MATERIALS[name].least * cut.cut_mm / 1000 / (math.pi / 4 * 0.04)
    assert least > 10.2
    measured = wound(10.0, 0.0, read_wire(f"{name} 0.2 mm {cut.wire.ohm_per_m:.6g} ohm/m"))
    assert measured.cut_mm == pytest.approx(1.03 * measured.length_mm)


def test_the_convection_table_has_no_steps():
    """The rows of Morgan's table meet within 1 % at their bounds, as those of one curve must."""
    for (bound, factor, exponent), (_, after, power) in itertools.pairwise(cooling._CYLINDER):
        assert factor * bound**exponent == pytest.approx(after * bound**power, rel=0.01)


@given(st.floats(0.5, 500.0), st.floats(0.05, 40.0))
def test_cooling_agrees_with_another_published_correlation(rise_k, diameter_mm):
    """The heat by Churchill and Chu (1975) gives back the rise within 40 %, from fine wire to thick bar."""
    # Int. J. Heat Mass Transfer 18 (1975) 1049, the laminar formula; from memory.
    across_m = diameter_mm / 1000
    rayleigh = 9.81 / 323 * rise_k * across_m**3 / (1.80e-5 * 2.57e-5)
    nusselt = 0.36 + 0.518 * rayleigh**0.25 / (1 + (0.559 / 0.70) ** (9 / 16)) ** (4 / 9)
    flux = nusselt * 0.028 / across_m * rise_k
    assert 0.6 < rise_in_air_k(flux, diameter_mm) / rise_k < 1.4


@given(st.floats(1e-3, 1e6), st.floats(1.01, 100.0), st.floats(0.02, 60.0))
def test_more_heat_is_more_rise(flux, times, diameter_mm):
    """The rise grows with the heat, and less than in proportion: warm air rises faster."""
    cold, warm = rise_in_air_k(flux, diameter_mm), rise_in_air_k(flux * times, diameter_mm)
    assert cold < warm < cold * times * 1.02


def test_nothing_heats_nothing():
    """Without a current there is no rise, on a bobbin or in air."""
    assert rise_in_air_k(0.0, 1.0) == 0.0
    assert rise_of_bobbin_k(0.0, 1.0) == 0.0


def test_a_bobbin_cools_by_its_outside():
    """A cube of 1 cm³ has 6 cm²: at 12 W/m²K, 72 mW warm it by 10 K."""
    assert rise_of_bobbin_k(0.072, 1.0) == pytest.approx(10.0)


def test_a_strip_is_filed_and_a_bobbin_shortened():
    """The advice for a strip is of sliding and filing, that for a bobbin of folding and cutting."""
    strip, bobbin = (" ".join(workshop.advice(each)) for each in (AMPERE_SHUNT, BOBBIN))
    for word in (
        "four wires",
        "21.5 µΩ",
        "2 % too low",
        "file",
        "20 µm",
        "198 µm",
        "Hard-solder",
    ):
        assert word in strip
        assert word not in bobbin
    for word in ("bifilar", "Cut 44.7 m", "43.4 mm is 0.1 %", "219 ohm/m"):
        assert word in bobbin
        assert word not in strip
    assert "140 °C" in strip
    assert "140 °C" in bobbin


@pytest.mark.parametrize("text", ["manganin 0.5 mm", "manganin 4 x 1 mm"])
def test_what_is_too_short_to_trim_gets_no_steps(text):
    """1.875 mΩ of these is below 20 mm: the one word on it is to take more cross-section."""
    winding = wound(1.875e-3, 40.0, read_wire(text))
    assert winding.length_mm < 20.0
    assert workshop.advice(winding) == ()
    assert "too short to trim" in " ".join(workshop.objections(winding))


@pytest.mark.parametrize(
    "text", ["manganin 0.05 mm", "constantan AWG 20", "nichrome 0.3 mm", "copper 1.5 mm2"]
)
def test_the_example_of_a_measured_metre_can_be_read(text):
    """What the advice shows to write behind the wire is read back as such, and stops the advice."""
    winding = wound(5.0, 0.1, read_wire(text))
    shown = re.search(r'as in "([^"]+)"', " ".join(workshop.advice(winding)))[1]
    spool = read_wire(f"{text} {shown}")
    assert spool.ohm_per_m == pytest.approx(winding.wire.ohm_per_m, rel=0.01)
    assert "Measure the ohms of one metre" not in " ".join(workshop.advice(wound(5.0, 0.1, spool)))


@pytest.mark.parametrize(
    ("ohms", "current_a", "text", "words"),
    [
        (1.875e-3, 40.0, "manganin 40 x 1 mm", ()),
        (9500.0, 1e-3, "manganin 0.05 mm", ()),
        (1.875e-3, 40.0, "manganin 20 x 1 mm", ("precise",)),
        (1.875e-3, 40.0, "manganin 4 x 1 mm", ("too hot", "A/mm²", "too short")),
        (0.1, 5.0, "constantan 1.6 mm", ("falls by", "two ends give 400 µV")),
        (95.0, 0.05, "copper 0.1 mm", ("A/mm²", "rises by", "Copper changes")),
        (0.05, 1.0, "nichrome 1 mm", ("rises by", "Take manganin")),
        (1e6, 1e-5, "manganin 0.1 mm", ("very long",)),
        (0.05, 1.0, "manganin 1 mm", ()),
        (0.002, 1.0, "manganin 50 x 1 mm", ("Keep both ends equally warm",)),
    ],
)
def test_what_is_too_much_is_said_and_nothing_else(ohms, current_a, text, words):
    """Each design that is wrong in a known way is told of just that, and a sound one of nothing."""
    told = workshop.objections(wound(ohms, current_a, read_wire(text)))
    assert len(told) == len(words)
    for line, word in zip(told, words, strict=True):
        assert word in line


def test_drift_is_told_in_its_direction():
    """Constantan falls as it warms, by its coefficient times the rise; nichrome rises."""
    for name, way in (("constantan", "falls"), ("nichrome", "rises")):
        winding = wound(0.5, 2.3, read_wire(f"{name} 0.8 mm"))
        assert winding.change_percent == pytest.approx(100 * MATERIALS[name].per_k * winding.rise_k)
        assert f"the value {way}" in " ".join(workshop.objections(winding))


@pytest.mark.parametrize("name", sorted(MATERIALS))
@pytest.mark.parametrize("size", ["0.02 mm", "0.3 mm", "AWG 10", "5 x 0.1 mm", "60 x 3 mm"])
@pytest.mark.parametrize("ohms", [1e-5, 0.01, 10.0, 1e5])
@pytest.mark.parametrize("current_a", [0.0, 1e-4, 1.0, 500.0])
def test_every_line_is_whole_sentences_without_odd_figures(name, size, ohms, current_a):
    """Advice ends in a full stop, has three sentences at most, and no exponent or infinity in it."""
    winding = wound(ohms, current_a, read_wire(f"{name} {size}"))
    lines = (*workshop.advice(winding), *workshop.objections(winding))
    assert lines
    for line in lines:
        assert line.endswith("."), line
        assert 1 <= len(re.findall(r"[.:](?= [A-Z]|$)", line)) <= 3, line
        assert not re.search(r"[0-9]e[+-]?[0-9]|inf|nan\b|∞|None", line), line
    assert winding.wire.name in workshop.summary(winding)
