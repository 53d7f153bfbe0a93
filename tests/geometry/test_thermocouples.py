"""Thermocouples: the printed reference tables, an independent package, and what a pyrometer does."""

from pathlib import Path

import numpy as np
import pytest
import thermocouple_its90
from hypothesis import given
from hypothesis import strategies as st

from dialgen import api
from dialgen.errors import DialFileError, InputError
from dialgen.geometry.its90 import REFERENCE
from dialgen.geometry.thermocouple import Thermocouple
from dialgen.quantity import TEMPERATURE

TYPES = sorted(REFERENCE)
LOWEST = {letter: 50.0 if letter == "B" else REFERENCE[letter][0].from_c for letter in TYPES}
HIGHEST = {letter: REFERENCE[letter][-1].to_c for letter in TYPES}
JOINS = [(letter, piece.from_c) for letter in TYPES for piece in REFERENCE[letter][1:]]


def couple(letter, reference="0 degC", unit="°C"):
    """The stage of a couple on a scale of 100 to 200 degrees, which every type has."""
    span = (400.0, 500.0) if unit == "K" else (150.0, 200.0)
    return Thermocouple(type=letter, reference=TEMPERATURE.read(reference)).stage(span, unit)


# Millivolts with the reference junction at 0 °C, ITS-90: NIST Monograph 175 (1993), IEC 60584-1:2013, as two
# packages agree on them to 4e-16 mV (reference values, section 5).
MILLIVOLTS = {
    "K": {
        -200: -5.891404, -100: -3.553631, -50: -1.889383, 0: 0, 25: 1.000242, 50: 2.023078, 100: 4.096230,
        200: 8.138473, 300: 12.208566, 400: 16.397142, 600: 24.905467, 800: 33.275380, 1000: 41.275606,
        1200: 48.838238, 1370: 54.818569,
    },
    "J": {
        -200: -7.890483, -100: -4.632524, -50: -2.431276, 0: 0, 25: 1.277288, 50: 2.585315, 100: 5.268916,
        200: 10.778746, 300: 16.327206, 400: 21.848065, 600: 33.102410, 760: 42.918641, 800: 45.494394,
        1000: 57.953410, 1200: 69.553180,
    },
    "T": {
        -250: -6.180433, -200: -5.602961, -100: -3.378582, -50: -1.819036, 0: 0, 25: 0.991977, 50: 2.035722,
        100: 4.278519, 200: 9.288102, 300: 14.861928, 400: 20.871970,
    },
    "N": {
        -200: -3.990376, -100: -2.406811, -50: -1.268598, 0: 0, 25: 0.658646, 50: 1.339830, 100: 2.774124,
        200: 5.913415, 300: 9.341152, 400: 12.973686, 600: 20.613107, 800: 28.454520, 1000: 36.255538,
        1200: 43.846360, 1300: 47.512772,
    },
    "R": {
        -50: -0.226465, 0: 0, 25: 0.140579, 100: 0.647396, 200: 1.468583, 300: 2.400552, 400: 3.407685,
        600: 5.583451, 800: 7.949838, 1000: 10.505958, 1200: 13.227965, 1768: 21.101477,
    },
    "S": {
        -50: -0.235555, 0: 0, 25: 0.142598, 100: 0.645913, 200: 1.440783, 300: 2.323042, 400: 3.259357,
        600: 5.238690, 800: 7.344982, 1000: 9.587098, 1200: 11.950549, 1768: 18.692510,
    },
    "E": {
        -200: -8.824581, -100: -5.237184, 25: 1.495112, 100: 6.318930, 200: 13.421296, 400: 28.945964,
        600: 45.093357, 800: 61.017372, 1000: 76.372826,
    },
    "B": {
        100: 0.033204, 250: 0.291280, 500: 1.241850, 800: 3.153610, 1000: 4.834339, 1200: 6.786427,
        1500: 10.099061, 1800: 13.591303,
    },
}  # fmt: skip


@pytest.mark.parametrize("letter", TYPES)
def test_tabled_millivolts(letter):
    """Every tabled EMF is met to half its last figure, far within the microvolt of the printed tables."""
    celsius = np.array(list(MILLIVOLTS[letter]), dtype=float)
    made_mv = couple(letter).forward(celsius) * 1e3
    assert np.abs(made_mv - list(MILLIVOLTS[letter].values())).max() <= 6e-7


# First and last lines of the printed tables, to the microvolt; from memory.
ENDS = [
    ("K", -270, -6.458), ("K", 1372, 54.886), ("J", -210, -8.095), ("J", 1200, 69.553), ("T", -270, -6.258),
    ("T", 400, 20.872), ("E", -270, -9.835), ("E", 1000, 76.373), ("N", -270, -4.345), ("N", 1300, 47.513),
    ("R", -50, -0.226), ("R", 1768, 21.101), ("S", -50, -0.236), ("S", 1768, 18.693), ("B", 1820, 13.820),
]  # fmt: skip


@pytest.mark.parametrize(("letter", "celsius", "millivolts"), ENDS)
def test_printed_ends(letter, celsius, millivolts):
    """A type reaches to both ends of its printed table, with the printed EMF there."""
    made_mv = float(couple(letter).forward(np.array([float(celsius)]))[0]) * 1e3
    assert made_mv == pytest.approx(millivolts, abs=5.1e-4)


@pytest.mark.parametrize("letter", TYPES)
@pytest.mark.parametrize("reference_c", [0.0, 25.0, 43.7])
def test_another_package_at_every_degree(letter, reference_c):
    """Over its whole range, in fractions of a degree and beside the joins, each type is thermocouple-its90's.

    3e-12 V leaves room for what a piece is lifted so that it does not begin below the one before.
    """
    low, high = LOWEST[letter], HIGHEST[letter]
    joins = [at + step for other, at in JOINS if other == letter for step in (-1e-3, 0.0, 1e-3)]
    celsius = np.array([*np.arange(low, high, 0.25), high, *[at for at in joins if at >= low]])
    package = thermocouple_its90.get(letter)
    expected_v = np.array([package.emf(t, reference_c) for t in celsius.tolist()]) * 1e-3
    assert np.abs(couple(letter, f"{reference_c} degC").forward(celsius) - expected_v).max() <= 3e-12


def test_cold_junction():
    """A K couple from 25 to 100 °C gives 3.095988 mV; read without its cold junction that is 75.892 °C.

    Reference values, section 5.
    """
    volts = couple("K", "25 degC").forward(np.array([100.0]))
    assert volts[0] * 1e3 == pytest.approx(3.095988, abs=6e-7)
    assert couple("K").inverse(volts)[0] == pytest.approx(75.892, abs=5e-4)


@given(st.sampled_from(TYPES), st.floats(0.0, 1.0), st.floats(0.0, 50.0))
def test_a_face_for_ice_serves_every_ambient(letter, share, ambient_c):
    """Set to the mark of the ambient, the pointer comes to the right mark of a face for reference 0 °C."""
    hot_c = np.array([LOWEST[letter] + share * (HIGHEST[letter] - LOWEST[letter])])
    face, real = couple(letter), couple(letter, f"{ambient_c:.6f} degC")
    set_by_hand_v = face.forward(np.array([round(ambient_c, 6)]))
    assert set_by_hand_v + real.forward(hot_c) == pytest.approx(face.forward(hot_c), abs=1e-15)


@pytest.mark.parametrize("letter", TYPES)
def test_every_unit_gives_one_signal(letter):
    """The same heat in °C, °F and K gives the same volts, from end to end of the type."""
    celsius = np.linspace(LOWEST[letter], HIGHEST[letter], 101)
    volts = couple(letter, "20 degC").forward(celsius)
    fahrenheit = couple(letter, "68 degF", "°F").forward(celsius * 1.8 + 32.0)
    kelvin = couple(letter, "293.15 K", "K").forward(celsius + 273.15)
    assert np.abs(fahrenheit - volts).max() <= 1e-16
    assert np.abs(kelvin - volts).max() <= 1e-16


@given(st.sampled_from(TYPES), st.sampled_from(["°C", "°F", "K"]), st.floats(0.0, 1.0), st.floats(0.0, 50.0))
def test_a_signal_goes_back_to_its_temperature(letter, unit, share, reference_c):
    """inverse(forward(t)) is t to 1e-10 degrees, over the whole of the domain, in every unit."""
    stage = couple(letter, f"{reference_c:.6f} degC", unit)
    low, high = stage.domain
    value = np.array([min(low + share * (high - low), high)])
    assert np.abs(stage.inverse(stage.forward(value)) - value).max() <= 1e-10


@pytest.mark.parametrize("letter", TYPES)
def test_a_signal_goes_back_where_the_couple_hardly_answers(letter):
    """Down to the last nanokelvin above the coldest end, where the slope is least, the way back is exact."""
    stage = couple(letter)
    values = np.concatenate(([0.0], np.geomspace(1e-9, 30.0, 200))) + LOWEST[letter]
    assert np.abs(stage.inverse(stage.forward(values)) - values).max() <= 1e-10


@pytest.mark.parametrize(("letter", "join_c"), [(letter, at) for letter, at in JOINS if at > LOWEST[letter]])
def test_joins_have_neither_step_back_nor_hole(letter, join_c):
    """Within a microkelvin of a join the EMF still rises from nanokelvin to nanokelvin, and goes back."""
    stage = couple(letter)
    values = join_c + np.linspace(-1e-6, 1e-6, 1001)
    volts = stage.forward(values)
    assert (np.diff(volts) > 0).all()
    assert np.abs(stage.inverse(volts) - values).max() <= 1e-10


def test_a_signal_in_a_step_up_goes_to_the_join():
    """Type J steps up by 75 pV at 760 °C; an EMF within the step is the join's, to the size of the step."""
    stage = couple("J")
    below, above = stage.forward(np.array([760.0, 760.0 + 1e-9])).tolist()
    assert above - below > 5e-11
    found = stage.inverse(np.linspace(below, above, 101))
    assert np.abs(found - 760.0).max() <= 2e-6


@pytest.mark.parametrize("letter", TYPES)
def test_the_emf_rises_over_the_whole_domain(letter):
    """In steps of a hundredth of a degree the EMF only rises, as a scale needs."""
    count = round((HIGHEST[letter] - LOWEST[letter]) * 100) + 1
    assert (np.diff(couple(letter).forward(np.linspace(LOWEST[letter], HIGHEST[letter], count))) > 0).all()


def test_a_reference_of_type_b_may_lie_below_its_scale():
    """A reference junction of B at 20 °C is allowed, and gives what the package gives."""
    made_v = float(couple("B", "20 degC").forward(np.array([1000.0]))[0])
    assert made_v * 1e3 == pytest.approx(thermocouple_its90.get("B").emf(1000.0, 20.0), abs=3e-9)


def dial(tmp_path: Path, scale: str):
    """Load a dial of one scale."""
    path = tmp_path / "pyrometer.toml"
    text = """dialgen = 1
[movement]
current = "200 uA"
resistance = "100 ohm"
rest = -45
full = 45
[plate]
size = [90, 70]
pivot = [45, 14]
[[scale]]
radius = 46
"""
    path.write_text(text + scale, encoding="utf-8")
    return api.load(path)


def test_a_pyrometer_through_its_line(tmp_path):
    """The pointer rests at the reference and stands at EMF/(whole resistance)/Im, worked by hand.

    K at 20 °C has 0.798 mV in the printed table.  With built = 134.19 ohm, coil 100 ohm and
    line 10 ohm the whole is 244.19 ohm; 1000 °C drives (41.275606 - 0.798) mV/244.19 ohm/200 uA = 0.82882.
    """
    face = dial(
        tmp_path,
        'unit = "degC"\nfrom = 0\nto = 1200\n'
        'law = { kind = "thermocouple", type = "K", reference = "20 degC" }\n'
        'circuit = { kind = "multiplier", built = "134.19 ohm", line = "10 ohm" }\n',
    )
    assert face.angle(20.0) == pytest.approx(-45.0, abs=1e-9)
    assert face.angle(1000.0) == pytest.approx(-45.0 + 90.0 * 0.82882, abs=2e-3)


def test_a_direct_scale_rests_at_the_reference(tmp_path):
    """Without rest, the pointer of a direct scale rests at the reference temperature."""
    law = 'law = { kind = "thermocouple", type = "N", reference = "77 degF" }\n'
    face = dial(tmp_path, f'unit = "degF"\nfrom = 77\nto = 1800\n{law}')
    assert face.angle(77.0) == pytest.approx(-45.0, abs=1e-9)
    assert face.angle(1800.0) == pytest.approx(45.0, abs=1e-9)


K = 'law = { kind = "thermocouple", type = "K" }'
B = 'law = { kind = "thermocouple", type = "B" }'
REFUSED = [
    ("degC", 0, 1400, K, "14:1: scale[1].to: ", "-270 to 1372 °C, and the scale ends at 1400; end it within"),
    ("degF", -460, 0, K, "13:1: scale[1].from: ", "-454 to 2501.6 °F, and the scale begins at -460"),
    ("K", 0, 300, K, "13:1: scale[1].from: ", "3.15 to 1645.15 K"),
    ("degC", 0, "inf", K, "14:1: scale[1].to: ", "ends at inf; end it within that"),
    ("degC", 0, 1700, B, "13:1: scale[1].from: ", "whose EMF turns near 21 °C, shows 50 to 1820 °C"),
    ("C", 0, 1200, K, "12:1: scale[1].unit: ", 'in °C, °F or K, not in "C"; write unit = "degC"'),
    ("F", 0, 1200, K, "12:1: scale[1].unit: ", 'not in "F"; write unit = "degF"'),
    ("°K", 300, 1200, K, "12:1: scale[1].unit: ", 'write unit = "K"'),
    ("mV", 0, 50, K, "12:1: scale[1].unit: ", "a type K thermocouple has its scale in °C, °F or K"),
    ("", 0, 50, K, "12:1: scale[1].unit: ", 'not without a unit; write unit = "degC"'),
    ("degC", 0, 50, K.replace('"K"', '"k"'), "15:32: scale[1].law.type: ", 'did you mean "K"?'),
    ("degC", 0, 50, 'law = "thermocouple"', "15:1: scale[1].law.type: ", "missing; add type = "),
    (
        "degC", 0, 50, K.replace(" }", ", reference = 20 }"), "15:44: scale[1].law.reference: ",
        '20 has none; write for example "20 degC"',
    ),
    (
        "degC", 0, 50, K.replace(" }", ', reference = "20 C" }'), "15:44: scale[1].law.reference: ",
        'did you mean "20 degC"?',
    ),
    (
        "degC", 0, 50, K.replace(" }", ', reference = "2000 degC" }'), "15:44: scale[1].law.reference: ",
        "a reference junction at 2000 °C is outside type K, -270 to 1372 °C; give the temperature where",
    ),
    (
        "degC", 100, 500, B.replace(" }", ', reference = "-5 degC" }'), "15:44: scale[1].law.reference: ",
        "outside type B, 0 to 1820 °C",
    ),
]  # fmt: skip


@pytest.mark.parametrize(("unit", "start", "end", "law", "place", "piece"), REFUSED)
def test_what_no_couple_can_show_is_refused(unit, start, end, law, place, piece, tmp_path):
    """Each refusal is one line with its place, what is wrong and what would be right."""
    with pytest.raises(DialFileError) as caught:
        dial(tmp_path, f'unit = "{unit}"\nfrom = {start}\nto = {end}\n{law}\n')
    (line,) = str(caught.value).splitlines()
    assert line.startswith(f"{tmp_path / 'pyrometer.toml'}:{place}")
    assert piece in line


def test_keys_of_a_refusal_are_relative_to_the_scale():
    """In Python the law names the scale's own key that is wrong."""
    with pytest.raises(InputError) as caught:
        Thermocouple(type="S").stage((0.0, 100.0), "mV")
    assert caught.value.keys == (("unit",),)
