"""Values with units: every spelling that is read, every one that is refused, and how numbers are shown."""

from __future__ import annotations

import math
from decimal import Decimal

import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.constants import convert_temperature

from dialgen.quantity import (
    AMPERE,
    ANY_CURRENT,
    OHM,
    OHM_ABOVE,
    SIGNAL,
    SIGNAL_ABOVE,
    TEMPERATURE,
    VOLT,
    VOLT_ABOVE,
    Measure,
    bare_number,
    plain_number,
    read_length,
    read_number,
    shown,
    shown_unit,
    split_unit,
)

READ = [
    (OHM, "75 ohm", 75.0, "Ω"),
    (OHM, "75 ohms", 75.0, "Ω"),
    (OHM, "75Ohm", 75.0, "Ω"),
    (OHM, "75 \u03a9", 75.0, "Ω"),
    (OHM, "75 \u2126", 75.0, "Ω"),
    (OHM, "2 kohm", 2000.0, "Ω"),
    (OHM, "2 kΩ", 2000.0, "Ω"),
    (OHM, "2 Kohm", 2000.0, "Ω"),
    (OHM, "2.2 MΩ", 2.2e6, "Ω"),
    (OHM, "1.885 mohm", 0.001885, "Ω"),
    (OHM, "5 \u00b5Ω", 5e-6, "Ω"),
    (OHM, "5 \u03bcΩ", 5e-6, "Ω"),
    (OHM, "5 uohm", 5e-6, "Ω"),
    (OHM, "0 ohm", 0.0, "Ω"),
    (OHM, "1e3 ohm", 1000.0, "Ω"),
    (OHM, "  75 ohm  ", 75.0, "Ω"),
    (OHM, "75\u00a0ohm", 75.0, "Ω"),
    (OHM, "75\u202fohm", 75.0, "Ω"),
    (OHM, "+75 ohm", 75.0, "Ω"),
    (OHM, ".5 ohm", 0.5, "Ω"),
    (OHM, "4k7", 4700.0, "Ω"),
    (OHM, "4K7", 4700.0, "Ω"),
    (OHM, "R47", 0.47, "Ω"),
    (OHM, "4R7", 4.7, "Ω"),
    (OHM, "100R", 100.0, "Ω"),
    (OHM, "5L0", 0.005, "Ω"),
    (OHM, "2M2", 2.2e6, "Ω"),
    (OHM, "1G", 1e9, "Ω"),
    (OHM, "1k", 1000.0, "Ω"),
    (AMPERE, "1 mA", 0.001, "A"),
    (AMPERE, "50 uA", 5e-5, "A"),
    (AMPERE, "50 \u00b5A", 5e-5, "A"),
    (AMPERE, "50 \u03bcA", 5e-5, "A"),
    (AMPERE, "100 nA", 1e-7, "A"),
    (AMPERE, "1 kA", 1000.0, "A"),
    (AMPERE, "2 amps", 2.0, "A"),
    (AMPERE, "1k5", 1500.0, "A"),
    (ANY_CURRENT, "-0.25 mA", -0.00025, "A"),
    (ANY_CURRENT, "\u22120.25 mA", -0.00025, "A"),
    (ANY_CURRENT, "0 A", 0.0, "A"),
    (VOLT, "60 mV", 0.06, "V"),
    (VOLT, "-5 volts", -5.0, "V"),
    (SIGNAL, "12.28 mV", 0.01228, "V"),
    (SIGNAL, "4 mA", 0.004, "A"),
    (SIGNAL, "100 ohm", 100.0, "Ω"),
    (SIGNAL, "1 mW", 0.001, "W"),
    (TEMPERATURE, "25 degC", 298.15, "K"),
    (TEMPERATURE, "25 °C", 298.15, "K"),
    (TEMPERATURE, "25\u2103", 298.15, "K"),
    (TEMPERATURE, "25\u00a0°C", 298.15, "K"),
    (TEMPERATURE, "77 degF", 298.15, "K"),
    (TEMPERATURE, "77°F", 298.15, "K"),
    (TEMPERATURE, "77 \u2109", 298.15, "K"),
    (TEMPERATURE, "298.15 K", 298.15, "K"),
    (TEMPERATURE, "298.15 \u212a", 298.15, "K"),
    (TEMPERATURE, "0 degC", 273.15, "K"),
    (TEMPERATURE, "32 degF", 273.15, "K"),
    (TEMPERATURE, "\u221240 degC", 233.15, "K"),
    (TEMPERATURE, "-40 degF", 233.15, "K"),
    (TEMPERATURE, "1e3 K", 1000.0, "K"),
    (TEMPERATURE, "660.323 degC", 933.473, "K"),
]


@pytest.mark.parametrize(("measure", "text", "value", "unit"), READ)
def test_quantities_are_read_to_the_last_digit(measure: Measure, text: str, value: float, unit: str) -> None:
    """Each spelling gives the double nearest to what it says, in its SI unit."""
    assert measure.read(text) == (value, unit)


REFUSED = [
    (OHM, "75", "has no unit"),
    (OHM, "", "is not a resistance"),
    (OHM, "ohm", "is not a resistance"),
    (OHM, "seventy ohm", "is not a resistance"),
    (OHM, "75 mA", "is not in Ω"),
    (OHM, "75 k", "is not in Ω"),
    (OHM, "4k7 ohm", "is not in Ω"),
    (OHM, "5 OHMS/V", "is not in Ω"),
    (OHM, "5 cohm", "is not in Ω"),
    (OHM, "1_000 ohm", "is not in Ω"),
    (OHM, "1 000 ohm", "is not in Ω"),
    (OHM, "0x10 ohm", "is not in Ω"),
    (OHM, "75 ohm -- measured", "is not in Ω"),
    (OHM, "\u0663 ohm", "is not a resistance"),
    (OHM, "1.5.2 ohm", "is not a resistance"),
    (OHM, "--5 ohm", "is not a resistance"),
    (OHM, "nan ohm", "is not a resistance"),
    (OHM, "inf ohm", "is not a resistance"),
    (OHM, "1e400 ohm", "beyond anything a meter has"),
    (OHM, "1e-400 ohm", "beyond anything a meter has"),
    (OHM, "-1 ohm", "is below 0"),
    (OHM, "1" * 100 + " ohm", "of 104 characters"),
    (OHM, "1,5 ohm", 'write "1.5 ohm"'),
    (OHM, "4,7k", 'write "4.7k"'),
    (OHM, "1,000 ohm", 'write "1.000 ohm", or "1000 ohm" for thousands'),
    (OHM, "1,000.5 ohm", "thousands are not parted"),
    (OHM_ABOVE, "0 ohm", "is not above 0"),
    (AMPERE, "0 A", "is not above 0"),
    (AMPERE, "-1 mA", "is not above 0"),
    (AMPERE, "50 ua", 'did you mean "50 uA"?'),
    (AMPERE, "1 ma", 'did you mean "1 mA"?'),
    (AMPERE, "4R7", "is not in A"),
    (VOLT_ABOVE, "0 V", "is not above 0"),
    (SIGNAL, "4k7", "is not in V or A or Ω or W"),
    (SIGNAL, "12 mS", "is not in V or A or Ω or W"),
    (SIGNAL_ABOVE, "0 V", "is not above 0"),
    (TEMPERATURE, 25, '25 has none; write for example "25 degC"'),
    (TEMPERATURE, -4.5, 'write for example "-4.5 degC"'),
    (TEMPERATURE, "25", "has no unit"),
    (TEMPERATURE, "25,5 degC", 'write "25.5 degC"'),
    (TEMPERATURE, "25 C", 'did you mean "25 degC"?'),
    (TEMPERATURE, "77 F", 'did you mean "77 degF"?'),
    (TEMPERATURE, "300 °K", 'did you mean "300 K"?'),
    (TEMPERATURE, "300 k", 'did you mean "300 K"?'),
    (TEMPERATURE, "25 deg. Celsius", 'did you mean "25 degC"?'),
    (TEMPERATURE, "25 mK", "is not in °C, °F or K"),
    (TEMPERATURE, "4K7", "is not in °C, °F or K"),
    (TEMPERATURE, "25 kohm", 'write for example "25 degC"'),
    (TEMPERATURE, "0 K", "is not above absolute zero"),
    (TEMPERATURE, "-273.15 degC", "is not above absolute zero"),
    (TEMPERATURE, "-459.67 degF", "is not above absolute zero"),
    (TEMPERATURE, "1e-400 K", "is not above absolute zero"),
    (TEMPERATURE, "-1 K", "is not above absolute zero"),
    (TEMPERATURE, "1e400 degC", "hotter than anything a meter shows"),
    (TEMPERATURE, "nan degC", "is not a temperature"),
    (TEMPERATURE, "warm", "is not a temperature"),
    (TEMPERATURE, True, "is text with its unit, not true"),
    (AMPERE, 1, 'write for example "1 mA"'),
    (AMPERE, 0.05, 'write for example "0.05 mA"'),
    (OHM, 75, 'write for example "75 ohm"'),
    (AMPERE, True, "is text with its unit, not true"),
    (AMPERE, [1], "is text with its unit, not [1]"),
    (AMPERE, {"a": 1}, "is text with its unit, not a table"),
    (AMPERE, None, "is text with its unit"),
    (AMPERE, 10**400, "is text with its unit"),
    (AMPERE, math.inf, "is text with its unit, not inf"),
    (AMPERE, math.nan, 'is text with its unit, not nan; write for example "1 mA"'),
]


@pytest.mark.parametrize(("measure", "given", "piece"), REFUSED)
def test_what_is_no_quantity_is_refused_with_the_mend(measure: Measure, given: object, piece: str) -> None:
    """Everything else is refused in one line that says what would be right behind a semicolon."""
    with pytest.raises(ValueError, match=r".") as caught:
        measure.read(given)
    message = str(caught.value)
    assert piece in message
    assert "; " in message
    assert "\n" not in message
    assert len(message) < 200


@given(st.text(max_size=80))
def test_no_text_gives_anything_but_an_amount_or_a_refusal(text: str) -> None:
    """Whatever is written, the answer is a finite amount or a ValueError."""
    for measure in (OHM, AMPERE, SIGNAL, TEMPERATURE):
        try:
            assert math.isfinite(measure.read(text).value)
        except ValueError as error:
            assert str(error)  # noqa: PT017


@given(
    st.decimals(min_value="0.001", max_value="999", places=3),
    st.sampled_from([("", 0), ("m", -3), ("u", -6), ("µ", -6), ("n", -9), ("p", -12), ("k", 3), ("M", 6)]),
)
def test_a_prefix_moves_the_point_and_rounds_once(number: object, prefix: tuple[str, int]) -> None:
    """A number with a prefix is the double nearest to the decimal, as Python itself reads it."""
    letter, exponent = prefix
    assert VOLT.read(f"{number} {letter}V").value == float(f"{number}e{exponent}")


@given(
    st.decimals(min_value="-273", max_value="3000", places=3),
    st.sampled_from([("degC", "Celsius"), ("degF", "Fahrenheit"), ("K", "Kelvin")]),
)
def test_temperatures_are_read_as_scipy_converts_them(number: Decimal, unit: tuple[str, str]) -> None:
    """In each unit a temperature is the kelvin that scipy makes of it, to rounding."""
    written, name = unit
    kelvin = float(convert_temperature(float(number), name, "Kelvin"))
    if kelvin > 0.001:
        assert TEMPERATURE.read(f"{number} {written}").value == pytest.approx(kelvin, rel=1e-12, abs=1e-12)


@pytest.mark.parametrize(
    ("given", "mm"),
    [
        (44, 44.0),
        (0.5, 0.5),
        (0, 0.0),
        (2000, 2000.0),
        ("0.7 m", 700.0),
        ("70 cm", 70.0 * 10),
        ("44mm", 44.0),
        ("1 in", 25.4),
        ("500 um", 0.5),
        ("500 µm", 0.5),
    ],
)
def test_lengths_are_millimetres(given: object, mm: float) -> None:
    """A bare length is millimetres; with a unit, m is a metre and no milli."""
    assert read_length(given, "a length") == pytest.approx(mm, rel=1e-15)


@pytest.mark.parametrize(
    ("given", "piece"),
    [
        (-1, "not from 0 to 2000 mm"),
        (2001, "not from 0 to 2000 mm"),
        ("3 m", "not from 0 to 2000 mm"),
        ("1e999 mm", "not from 0 to 2000 mm"),
        (math.nan, "must be finite"),
        (math.inf, "must be finite"),
        (True, "is a number, not true"),
        ([1], "is a number, not [1]"),
        (10**400, "is too large"),
        ("44", "is not a length"),
        ("44 A", "is not a length"),
        ("x", "is not a length"),
        ("0,7 m", 'write "0.7 m"'),
    ],
)
def test_what_is_no_length_is_refused(given: object, piece: str) -> None:
    """A length out of bounds, not finite, or in no unit of length is refused."""
    with pytest.raises(ValueError, match=r".") as caught:
        read_length(given, "a length")
    assert piece in str(caught.value)


@pytest.mark.parametrize(
    ("given", "piece"),
    [
        ("5", "without quotes"),
        (True, "not true"),
        (None, "write a bare number"),
        (math.nan, "not nan"),
        (-math.inf, "-inf"),
    ],
)
def test_what_is_no_bare_number_is_refused(given: object, piece: str) -> None:
    """A bare number is neither text, nor a truth value, nor infinite."""
    with pytest.raises(ValueError, match=r".") as caught:
        read_number(given, "a value")
    assert piece in str(caught.value)


@pytest.mark.parametrize(
    ("text", "number"),
    [
        ("-2.5", -2.5), ("\u22122.5", -2.5), (" 1e3\u00a0", 1000.0), (".5", 0.5), ("5.", 5.0),
        ("", None), ("2,5", None), ("2.5 mA", None), ("nan", None), ("inf", None), ("1_0", None),
        ("1.2.3", None),
    ],
)  # fmt: skip
def test_a_text_is_a_bare_number_or_is_not(text: str, number: float | None) -> None:
    """A number alone in a text is read, with either minus; anything beside it makes it no bare number."""
    assert bare_number(text) == number


@pytest.mark.parametrize(
    ("unit", "factor", "si", "face"),
    [
        ("A", 1.0, "A", "A"),
        ("mA", 1e-3, "A", "mA"),
        ("uA", 1e-6, "A", "µA"),
        ("\u03bcA", 1e-6, "A", "µA"),
        ("kV", 1e3, "V", "kV"),
        ("kW", 1e3, "W", "kW"),
        ("MVA", 1e6, "VA", "MVA"),
        ("kvar", 1e3, "var", "kvar"),
        ("ohm", 1.0, "Ω", "Ω"),
        ("kohm", 1e3, "Ω", "kΩ"),
        ("M\u2126", 1e6, "Ω", "MΩ"),
        ("MHz", 1e6, "Hz", "MHz"),
        ("pF", 1e-12, "F", "pF"),
        ("mS", 1e-3, "S", "mS"),
        ("dB", 1.0, "dB", "dB"),
        ("pH", 1.0, "pH", "pH"),
        ("Pa", 1.0, "Pa", "Pa"),
        ("kPa", 1.0, "kPa", "kPa"),
        ("min", 1.0, "min", "min"),
        ("%", 1.0, "%", "%"),
        ("", 1.0, "", ""),
        ("m", 1.0, "m", "m"),
        ("degC", 1.0, "°C", "°C"),
        ("℃", 1.0, "°C", "°C"),
        ("ohms", 1.0, "ohms", "ohms"),
        ("kOhm", 1.0, "kOhm", "kOhm"),
        ("OHM", 1.0, "OHM", "OHM"),
        ("KV", 1.0, "KV", "KV"),
        ("AMPERES", 1.0, "AMPERES", "AMPERES"),
        ("volt", 1.0, "volt", "volt"),
        ("Volts AC", 1.0, "Volts AC", "Volts AC"),
    ],
)
def test_a_prefix_is_read_before_the_named_units_alone(unit: str, factor: float, si: str, face: str) -> None:
    """The unit of a scale gives its factor and SI unit, and the signs drawn on the face."""
    assert (split_unit(unit), shown_unit(unit)) == ((factor, si), face)


@pytest.mark.parametrize(
    ("value", "text"),
    [
        (0.0, "0"),
        (-0.0, "0"),
        (-2.5, "−2.5"),
        (0.1 + 0.2, "0.3"),
        (1e6, "1000000"),
        (1e15, "1000000000000000"),
        (1e-7, "0.0000001"),
        (math.inf, "∞"),
        (-math.inf, "−∞"),
    ],
)
def test_numbers_are_lettered_plainly(value: float, text: str) -> None:
    """A numeral has no exponent, no trailing zeros and a true minus sign."""
    assert plain_number(value) == text


@pytest.mark.parametrize(
    ("value", "text"),
    [
        ("a", '"a"'),
        (True, "true"),
        (0.5, "0.5"),
        ([1, "a", [2]], '[1, "a", [...]]'),
        ({}, "a table"),
        ("x" * 99, '"' + "x" * 36 + "..."),
    ],
)
def test_values_are_shown_as_the_file_has_them(value: object, text: str) -> None:
    """A message shows a value as TOML writes it, cut short."""
    assert shown(value) == text
