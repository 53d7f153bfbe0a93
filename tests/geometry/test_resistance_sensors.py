"""Platinum thermometers and thermistors: standard tables, data-sheet figures, and scipy's root finder."""

import math
from pathlib import Path

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st
from scipy.optimize import brentq

from dialgen import api
from dialgen.errors import DialFileError
from dialgen.geometry.pt100 import Pt100
from dialgen.geometry.steinhart_hart import SteinhartHart, falling_resistance
from dialgen.geometry.thermistor import Thermistor
from dialgen.quantity import OHM, TEMPERATURE, Amount

UNITS = st.sampled_from(["°C", "°F", "K"])


def span_of(unit):
    """A span of scale that every sensor here has."""
    return (280.0, 300.0) if unit == "K" else (40.0, 60.0)


def stage_of(law, unit="°C"):
    """The stage of a sensor."""
    return law.stage(span_of(unit), unit)


def ohms(law, celsius):
    """The resistance of a sensor at one temperature."""
    return float(stage_of(law).forward(np.array([float(celsius)]))[0])


def celsius_of(law, ohm):
    """The temperature of a sensor with one resistance."""
    return float(stage_of(law).inverse(np.array([float(ohm)]))[0])


# IEC 60751:2008 and ASTM E1137 (reference values, section 5; the package rtd-sensor gives the same).
PT100 = {
    -200: 18.5201, -150: 39.7232, -100: 60.2558, -50: 80.3063, -20: 92.1599, 0: 100.0, 10: 103.9025,
    25: 109.7347, 50: 119.3971, 100: 138.5055, 150: 157.3251, 200: 175.8560, 300: 212.0515, 400: 247.0920,
    500: 280.9775, 600: 313.7080, 700: 345.2835, 800: 375.7040, 850: 390.4811,
}  # fmt: skip


@pytest.mark.parametrize(("celsius", "ohm"), PT100.items())
def test_platinum_by_the_standard(celsius, ohm):
    """Every tabled resistance is met to half its last figure, and goes back to its temperature."""
    assert ohms(Pt100(), celsius) == pytest.approx(ohm, abs=5.1e-5)
    assert celsius_of(Pt100(), min(max(ohm, 18.52008), 390.481125)) == pytest.approx(celsius, abs=2e-4)


# A widely copied table on the web is of another platinum, or misprinted (reference values, section 5).
@pytest.mark.parametrize(("celsius", "wrong_ohm"), [(100, 138.50), (-100, 60.20), (750, 360.55)])
def test_platinum_is_not_the_copied_table(celsius, wrong_ohm):
    """What we give is not that table's resistance even when rounded as it is."""
    assert abs(ohms(Pt100(), celsius) - wrong_ohm) > 0.005


@given(st.floats(-200.0, 850.0))
def test_platinum_back_from_ohms(celsius):
    """The way back is the root that scipy finds of the standard's equation as it is printed."""

    def printed(t):
        cold = -4.183e-12 * (t - 100) * t**3 if t < 0 else 0.0
        return 100 * (1 + 3.9083e-3 * t - 5.775e-7 * t**2 + cold)

    ohm = printed(celsius)
    expected = brentq(lambda t: printed(t) - ohm, -201.0, 851.0, xtol=1e-12)
    assert celsius_of(Pt100(), ohm) == pytest.approx(expected, abs=2e-11)


@given(UNITS, st.floats(0.0, 1.0))
def test_platinum_goes_back_in_every_unit(unit, share):
    """inverse(forward(t)) is t to 1e-11 degrees from end to end, in °C, °F and K."""
    stage = stage_of(Pt100(), unit)
    low, high = stage.domain
    value = min(low + share * (high - low), high)
    assert float(stage.inverse(stage.forward(np.array([value])))[0]) == pytest.approx(value, abs=1e-11)


# Coefficients of a module's data sheet, and the temperatures they give, computed apart (section 5).
SHEET = Thermistor(a=1.129148e-3, b=2.34125e-4, c=8.76741e-8)


@pytest.mark.parametrize(
    ("ohm", "celsius"), [(10_000, 24.9997), (32_650, 0.0002), (1_000, 87.1681), (100_000, -20.5229)]
)
def test_steinhart_hart(ohm, celsius):
    """Resistances give the temperatures computed apart, and the temperatures these resistances."""
    assert celsius_of(SHEET, ohm) == pytest.approx(celsius, abs=5.1e-5)
    assert ohms(SHEET, celsius) == pytest.approx(ohm, rel=4e-6)


@pytest.mark.parametrize(
    ("celsius", "ohm"), [(0, 33_620.6), (50, 3_588.18), (100, 697.520), (-40, 401_859.7), (25, 10_000.0)]
)
def test_beta(celsius, ohm):
    """Beta 3950 with 10 kohm at 25 °C gives the resistances computed apart (section 5)."""
    assert ohms(Thermistor(r25=Amount(1e4, "Ω"), beta=3950.0), celsius) == pytest.approx(ohm, rel=2e-6)


def test_three_points_are_met():
    """The curve through three points goes through them, and its coefficients solve the three equations."""
    points = (("100 degC", "973 ohm"), ("0 degC", "32.65 kohm"), ("25 degC", "10 kohm"))
    law = Thermistor(points=tuple((TEMPERATURE.read(t), OHM.read(r)) for t, r in points))
    for celsius, ohm in ((0.0, 32_650.0), (25.0, 10_000.0), (100.0, 973.0)):
        assert ohms(law, celsius) == pytest.approx(ohm, rel=1e-12)
    logs = np.log([32_650.0, 10_000.0, 973.0])
    wanted = 1.0 / np.array([273.15, 298.15, 373.15])
    expected = np.linalg.solve(np.stack([np.ones(3), logs, logs**3], axis=1), wanted)
    equation = law.equation()
    assert (equation.a, equation.b, equation.c) == pytest.approx(tuple(expected), rel=1e-9)


def test_points_of_a_beta_law_give_beta():
    """Three points that lie on a beta law give its curve back, without a cubic term and beyond them."""
    law = Thermistor(r25=Amount(4700.0, "Ω"), beta=3977.0)
    points = tuple((Amount(t + 273.15, "K"), Amount(ohms(law, t), "Ω")) for t in (-20.0, 25.0, 110.0))
    fitted = Thermistor(points=points)
    assert abs(fitted.equation().c) < 1e-16
    assert ohms(fitted, 150.0) == pytest.approx(ohms(law, 150.0), rel=1e-9)


COEFFICIENTS = st.builds(SteinhartHart, st.floats(5e-4, 3e-3), st.floats(1e-4, 4e-4), st.floats(-2e-7, 5e-7))


@given(COEFFICIENTS, st.floats(0.0, 1.0))
def test_thermistors_go_back(equation, share):
    """Over -100 to 400 °C, as far as the law holds, inverse(forward(t)) is t to 1e-9 °C."""
    stage = falling_resistance(equation)
    low, high = max(stage.domain[0], -100.0), min(stage.domain[1], 400.0)
    assume(low < high)
    value = np.array([low + share * (high - low)])
    assert np.abs(stage.inverse(stage.forward(value)) - value).max() <= 1e-9


@given(UNITS, st.floats(0.0, 1.0))
def test_thermistors_go_back_in_every_unit(unit, share):
    """Through a face in °C, °F and K a data sheet's curve goes back from end to end, to 1e-9 degrees."""
    stage = stage_of(SHEET, unit)
    low, high = stage.domain
    value = np.array([min(low + share * (high - low), high)])
    assert np.abs(stage.inverse(stage.forward(value)) - value).max() <= 1e-9


@given(COEFFICIENTS)
def test_a_thermistor_falls_over_all_it_says(equation):
    """Whatever the coefficients, over the whole domain the resistance falls without a stop."""
    stage = falling_resistance(equation)
    ohm = stage.forward(np.linspace(stage.domain[0] + 1e-3, stage.domain[1] - 1e-3, 400))
    assert (np.diff(ohm) < 0).all()
    assert stage.image[0] < ohm[-1]
    assert ohm[0] < stage.image[1]


@given(COEFFICIENTS, st.floats(-60.0, 150.0))
def test_a_thermistor_meets_its_own_equation(equation, celsius):
    """The ohms given back satisfy 1/T = a + b·ln R + c·(ln R)³ to rounding."""
    stage = falling_resistance(equation)
    assume(stage.domain[0] <= celsius <= stage.domain[1])
    log = math.log(float(stage.forward(np.array([celsius]))[0]))
    kelvin = 1.0 / (equation.a + equation.b * log + equation.c * log**3)
    assert kelvin == pytest.approx(celsius + 273.15, rel=1e-12)


# Where 1/T = a + b·x + c·x³ turns, its slope b + 3c·x² is zero: x² = -b/3c, worked by hand.
@pytest.mark.parametrize(
    ("b", "c", "low", "high"),
    [
        (3e-4, -1e-6, -10.0, 10.0),
        (-3e-4, 1e-6, 10.0, math.log(1e18)),
        (0.0, 1e-6, 0.0, math.log(1e18)),
        (3e-4, 0.0, -math.log(1e18), math.log(1e18)),
    ],
)
def test_a_curve_that_turns_is_used_up_to_its_turn(b, c, low, high):
    """Of an equation that turns only the stretch is used on which the resistance falls."""
    assert SteinhartHart(1e-3, b, c).falling() == pytest.approx((low, high), abs=1e-12)


@pytest.mark.parametrize(("b", "c"), [(-3e-4, -1e-6), (0.0, 0.0), (-3e-4, 0.0), (0.0, -1e-6)])
def test_a_curve_that_never_falls_is_none(b, c):
    """Without a positive coefficient no stretch falls."""
    assert SteinhartHart(1e-3, b, c).falling() is None
    assert falling_resistance(SteinhartHart(1e-3, b, c)) is None


@pytest.mark.parametrize("law", [Pt100(), SHEET, Thermistor(r25=Amount(1e4, "Ω"), beta=3950.0)])
def test_every_unit_gives_one_resistance(law):
    """25 °C, 77 °F and 298.15 K are one resistance."""
    ohm = [
        float(stage_of(law, unit).forward(np.array([value]))[0])
        for unit, value in (("°C", 25.0), ("°F", 77.0), ("K", 298.15))
    ]
    assert ohm == pytest.approx([ohm[0]] * 3, rel=1e-13)


def test_what_a_sensor_of_ohms_rests_at():
    """No sensor of ohms has a zero of its own, so a direct scale rests at its start; all take ohms."""
    for law in (Pt100(), SHEET):
        assert law.zero((0.0, 100.0), "°C") is None
        assert law.signal_unit("°C") == "Ω"


def dial(tmp_path: Path, scale: str):
    """Load a dial of one scale."""
    path = tmp_path / "thermometer.toml"
    text = """dialgen = 1
[movement]
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


def test_a_direct_platinum_scale(tmp_path):
    """From -50 to 150 °C the mark of 50 °C stands at its share of the tabled ohms.

    (119.3971 - 80.3063)/(157.3251 - 80.3063) = 0.507549 of 90 degrees, by the table above.
    """
    face = dial(tmp_path, 'unit = "degC"\nfrom = -50\nto = 150\nlaw = "pt100"\n')
    assert face.angle([-50.0, 50.0, 150.0]).tolist() == pytest.approx(
        [-45.0, -45.0 + 90.0 * 0.507549, 45.0], abs=2e-4
    )


T = 'law = { kind = "thermistor", '
REFUSED = [
    ("degC", -250, 100, 'law = "pt100"', "11:1: scale[1].from: ", "a Pt100 shows -200 to 850 °C, and"),
    ("degF", 0, 1600, 'law = "pt100"', "12:1: scale[1].to: ", "-328 to 1562 °F"),
    ("ohm", 20, 300, 'law = "pt100"', "10:1: scale[1].unit: ", 'not in "Ω"; write unit = "degC"'),
    ("degC", 0, 9, 'law = { kind = "pt100", r0 = 1 }', "13:25: scale[1].law.r0: ", "not a key here"),
    ("degC", 0, 9, 'law = "thermistor"', "13:1: scale[1].law: ", "give r25 and beta, or a, b and c, or"),
    ("degC", 0, 9, T + 'r25 = "10 kohm" }', "13:30: scale[1].law.r25: ", "r25 without beta; add beta = 3950"),
    ("degC", 0, 9, T + "beta = 3950 }", "13:30: scale[1].law.beta: ", 'without r25; add r25 = "10 kohm"'),
    ("degC", 0, 9, T + 'beta = "3950 K" }', "13:30: scale[1].law.beta: ", "write it bare"),
    ("degC", 0, 9, T + 'r25 = "1 kohm", beta = -3 }', "13:46: scale[1].law.beta: ", "from 1 to 1000000"),
    ("degC", 0, 9, T + "a = 1e-3, c = 8e-8 }", "13:30: scale[1].law.a: ", "c without b; add b = 2.34125e-4"),
    (
        "degC", 0, 9, T + 'a = 1e-3, b = 2e-4, c = 8e-8, r25 = "9 ohm" }', "13:30: scale[1].law.a: ",
        "r25, a, b and c are figures of 2 laws; keep r25 and beta, or",
    ),
    (
        "degC", 0, 9, T + "a = 1e-3, b = -2e-4, c = -8e-8 }", "13:30: scale[1].law.a: ",
        "the resistance falls at no temperature up to 1000 °C; check signs",
    ),
    ("degC", 0, 9, T + "a = 1.1, b = 2e-4, c = 8e-8 }", "13:30: scale[1].law.a: ", "from -1 to 1"),
    ("degC", 0, 9, T + "a = 0.11, b = 2e-4, c = 8e-8 }", "11:1: scale[1].from: ", "this thermistor shows -2"),
    ("degC", 0, 1001, T + 'r25 = "1 kohm", beta = 3950 }', "12:1: scale[1].to: ", "to 1000 °C, and the"),
    ("degC", -274, 9, T + 'r25 = "1 kohm", beta = 3950 }', "11:1: scale[1].from: ", "begin it within that"),
    (
        "degC", 0, 9, T + 'points = [["0 degC", "9 ohm"], ["1 degC", "8 ohm"]] }',
        "13:30: scale[1].law.points: ", "through three points, not 2; give three, or a table",
    ),
    (
        "degC", 0, 9, T + 'points = [["0 degC", "9 ohm"], [1, "8 ohm"], ["2 degC", "7 ohm"]] }',
        "13:61: scale[1].law.points[2]: ", '1 has none; write for example "1 degC"',
    ),
    (
        "degC", 0, 9, T + 'points = [["0 degC", "9 ohm"], ["1 degC", "8 ohm"], ["2 degC", "8.5 ohm"]] }',
        "13:30: scale[1].law.points: ", "does not fall from point to point as it warms; check the points",
    ),
    (
        "degC", 0, 9, T + 'points = [["0 degC", "9 ohm"], ["0 degC", "8 ohm"], ["2 degC", "7 ohm"]] }',
        "13:30: scale[1].law.points: ", "does not fall from point to point",
    ),
    (
        "degC", 0, 9, T + 'points = [["0 degC", "30 kohm"], ["1 degC", "10 kohm"], ["99 degC", "9 kohm"]] }',
        "13:30: scale[1].law.points: ", "no curve of Steinhart and Hart that falls throughout",
    ),
]  # fmt: skip


@pytest.mark.parametrize(("unit", "start", "end", "law", "place", "piece"), REFUSED)
def test_what_no_sensor_of_ohms_can_show_is_refused(unit, start, end, law, place, piece, tmp_path):
    """Each refusal is one line with its place, what is wrong and what would be right."""
    with pytest.raises(DialFileError) as caught:
        dial(tmp_path, f'unit = "{unit}"\nfrom = {start}\nto = {end}\n{law}\n')
    (line,) = str(caught.value).splitlines()
    assert line.startswith(f"{tmp_path / 'thermometer.toml'}:{place}")
    assert piece in line
    assert "; " in line
