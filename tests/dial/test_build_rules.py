"""What dialfile.md says of the chain, rule by rule: departure, stops, rest, prefixes, refusals."""

import math

import numpy as np
import pytest
from dial_texts import MOVEMENT, made, refusals
from scipy.interpolate import PchipInterpolator

from dialgen.errors import DialFileError, NoSuchValue, Refused

AMPERES = 'unit = "A"\nfrom = 0\nto = 40\ncircuit = { kind = "shunt" }'
PLAIN = 'unit = "%"\nfrom = 0\nto = 100'


def angle(dial, value, scale=0):
    """The angle at a value of a scale."""
    return float(dial.scales[scale].chain.angle(np.array(float(value))))


def remarks(dial):
    """All that is remarked on a dial, in one text."""
    return " | ".join(remark.message for remark in dial.remarks)


def reading(owner="movement", **given):
    """A reading's table."""
    lines = "".join(f"{key} = {value!r}\n".replace("'", '"') for key, value in given.items())
    return f"[[{owner}.reading]]\n{lines}"


# --- the departure ---------------------------------------------------------------------------


def test_contract_sample_by_hand():
    """The contract's sample: 1.885 mΩ, readings by current, by value and on the old scale."""
    scale = (
        'unit = "A"\nfrom = 0\nto = 40\ncircuit = { kind = "shunt", range = "40 A", built = "1.885 mohm" }'
    )
    movement = MOVEMENT + reading(current="0.25 mA", angle=-22.4) + reading(value=30.0, old=74.1)
    dial = made(scale, movement + "[movement.old]\nrest = 0\nfull = 100\n")

    def nominal(amperes):  # current division between 1.885 mΩ and 75 Ω, over 1 mA
        return -44.0 + 88.0 * amperes * 1.885e-3 / (1.885e-3 + 75.0) / 1e-3

    nominals = [-44.0, -22.0, nominal(30.0)]
    observed = [-44.0, -22.4, -44.0 + 0.741 * 88.0]
    curve = PchipInterpolator(nominals, observed)
    for value in (0.0, 10.0, 20.0, 30.0):
        assert angle(dial, value) == pytest.approx(float(curve(nominal(value))), abs=1e-10)
    assert angle(dial, 40.0) == pytest.approx(nominal(40.0) + observed[2] - nominals[2], abs=1e-10)
    assert "assumed to rest" in remarks(dial)


@pytest.mark.parametrize(
    ("by", "nominal"), [({"current": "0.5 mA"}, 0.0), ({"voltage": "37.5 mV"}, 0.0), ({"value": 10.0}, -22.0)]
)
def test_readings_by_current_voltage_and_value(by, nominal):
    """A reading is placed by current over Im, voltage over Im·Rm, or value through law and circuit."""
    dial = made(AMPERES, MOVEMENT + reading(angle=nominal + 0.5, **by))
    value = 40.0 * (nominal + 44.0) / 88.0
    assert angle(dial, value) == pytest.approx(nominal + 0.5, abs=1e-9)
    assert angle(dial, 0.0) == pytest.approx(-44.0)


def test_readings_need_current_and_resistance():
    """A reading by current needs the movement's current, one by voltage its resistance too."""
    bare = "rest = -44.0\nfull = 44.0\n"
    assert refusals(PLAIN, bare + reading(current="0.5 mA", angle=0.0))[0][1] == ("movement", "current")
    with_current = 'current = "1 mA"\n' + bare
    assert refusals(PLAIN, with_current + reading(voltage="30 mV", angle=0.0))[0][1] == (
        "movement",
        "resistance",
    )


def test_value_readings_go_through_the_first_scale_as_it_stands():
    """A value reading belongs to the first scale and its built circuit, on every scale."""
    first = 'unit = "A"\nfrom = 0\nto = 40\ncircuit = { kind = "shunt", built = "1.9 mohm" }'
    second = '[[scale]]\nunit = "%"\nfrom = 0\nto = 100\nradius = 30.0\n'
    nominal = -44.0 + 88.0 * 20.0 * 1.9e-3 / 75.0019 / 1e-3
    dial = made(f"{first}\n{second}", MOVEMENT + reading(value=20.0, angle=nominal + 0.7))
    share = (nominal + 44.0) / 88.0
    assert angle(dial, 100.0 * share, scale=1) == pytest.approx(nominal + 0.7, abs=1e-9)


def test_value_readings_go_through_the_response():
    """The nominal angle of a value reading is that of the movement's response."""
    movement = MOVEMENT + "response = { power = 2.0 }\n" + reading(value=20.0, angle=-21.5)
    dial = made(AMPERES, movement)
    assert angle(dial, 20.0) == pytest.approx(-21.5, abs=1e-9)  # half the current, a quarter: -22


def test_scale_readings_replace_the_movements():
    """A scale with readings of its own is corrected by those alone, through its own circuit."""
    second = '[[scale]]\nunit = "V"\nfrom = 0\nto = 10\nradius = 30.0\ncircuit = { kind = "multiplier" }\n'
    movement = MOVEMENT + reading(current="0.5 mA", angle=1.0)
    own = reading("scale", value=5.0, angle=-2.0)
    dial = made(f"{AMPERES}\n{second}{own}", movement)
    assert angle(dial, 20.0) == pytest.approx(1.0, abs=1e-9)
    assert angle(dial, 5.0, scale=1) == pytest.approx(-2.0, abs=1e-9)
    assert len(dial.scales[1].correction.points) == 1


@pytest.mark.parametrize("where", ["current", "voltage"])
def test_scale_readings_are_values(where):
    """A scale's readings are values on it; current or voltage there is refused."""
    with pytest.raises(DialFileError, match=f"write value instead of {where}"):
        made(AMPERES + "\n" + reading("scale", angle=0.0, **{where: {"current": "1 mA"}.get(where, "1 mV")}))


OLD = [
    ("rest = 0\nfull = 50\n", 20.0, -44.0 + 0.4 * 88.0),
    ("rest = 10\nfull = -10\n", 0.0, 0.0),
    ("points = [[0, -44], [5, -10], [10, 40]]\n", 5.0, -10.0),
    (
        "points = [[0, -44], [5, -10], [10, 40]]\n",
        7.0,
        float(PchipInterpolator([0, 5, 10], [-44, -10, 40])(7.0)),
    ),
]


@pytest.mark.parametrize(("old", "position", "observed"), OLD)
def test_old_positions_are_even_or_by_points(old, position, observed):
    """A position on the old scale is an angle evenly between rest and full, or by PCHIP of its points."""
    share = (observed + 44.0) / 88.0
    by_old = reading(current=f"{share:.6f} mA", old=position)
    dial = made(PLAIN, f"{MOVEMENT}{by_old}[movement.old]\n{old}")
    point = dial.scales[0].correction.points[0]
    assert point.observed_deg == pytest.approx(observed, abs=1e-10)


def test_old_positions_need_the_old_scale():
    """A position without an old scale asks for one."""
    found = refusals(PLAIN, MOVEMENT + reading(current="0.5 mA", old=50.0))
    assert found[0][1] == ("movement", "old")


@pytest.mark.parametrize(
    ("readings", "key"),
    [
        ([(0.2, -20.0), (0.4, -21.0), (0.8, 26.0)], ("movement", "reading", 1)),
        ([(0.8, 26.0), (0.4, -21.0), (0.2, -20.0)], ("movement", "reading", 1)),
    ],
)
def test_readings_that_turn_are_refused_at_the_reading(readings, key):
    """Observed angles that do not move one way are refused at the reading to look at."""
    text = "".join(reading(current=f"{drive} mA", angle=at) for drive, at in readings)
    found = refusals(PLAIN, MOVEMENT + text)
    assert "strictly" in found[0][0]
    assert found[0][1] == key


def test_up_and_down_readings_are_averaged():
    """Readings up and down at one current count as their mean."""
    text = reading(current="0.5 mA", angle=0.6, direction="up") + reading(
        current="0.5 mA", angle=1.0, direction="down"
    )
    dial = made(PLAIN, MOVEMENT + text)
    assert angle(dial, 50.0) == pytest.approx(0.8)
    assert dial.scales[0].correction.points[0].spread_deg == pytest.approx(0.4)


@pytest.mark.parametrize(
    ("readings", "words"),
    [
        ([(0.0, -43.7), (0.9, 35.0)], "set the zero"),
        ([(0.5, 0.2), (0.7, 17.8)], "less than a quarter"),
        ([(0.5, 0.2), (0.9, 35.5)], "assumed to rest"),
    ],
)
def test_remarks_on_readings_stand_at_their_key(readings, words):
    """Warnings on readings point at the movement's readings."""
    text = "".join(reading(current=f"{drive} mA", angle=at) for drive, at in readings)
    dial = made(PLAIN, MOVEMENT + text)
    assert [r.key for r in dial.remarks if words in r.message] == [("movement", "reading")]


def test_readings_beyond_the_stops_still_count():
    """A reading by value whose nominal angle lies beyond the stops is not refused for it."""
    movement = MOVEMENT + "stops = [-45.0, 45.0]\n" + reading(value=42.0, angle=44.5)
    dial = made(AMPERES, movement)
    # Straight between (rest, rest) and 44.5 observed at the nominal 48.4 of 42 A.
    assert angle(dial, 40.0) == pytest.approx(44.0 - 3.9 * 88.0 / 92.4)


# --- the stops and the sense of the pointer ----------------------------------------------------


@pytest.mark.parametrize(
    ("rest", "full", "start", "stops"),
    [
        (-44.0, 44.0, 0, (-49.0, 49.0)),
        (44.0, -44.0, 0, (-49.0, 49.0)),
        (0.0, 40.0, -100, (-45.0, 45.0)),
        (0.0, -40.0, -100, (-45.0, 45.0)),
        (10.0, 50.0, -50, (-55.0, 55.0)),
    ],
)
def test_default_stops(rest, full, start, stops):
    """Stops default to 5 degrees outside rest and full, and minus full for negative drive."""
    dial = made(f'unit = "%"\nfrom = {start}\nto = 100', f"rest = {rest}\nfull = {full}\n")
    assert dial.stops_deg == stops


def test_default_stops_on_a_centre_zero_observed_scale():
    """An observed scale's drive is its deflection, so negative ones open the stops the other way too."""
    law = 'law = { kind = "observed", points = [[-10, -40], [0, 0], [10, 41]] }'
    dial = made(f'unit = "%"\nfrom = -10\nto = 10\n{law}', "rest = 0.0\nfull = 40.0\n")
    assert dial.stops_deg == (-45.0, 45.0)
    assert angle(dial, -10.0) == -40.0


def test_stops_are_one_pair_for_all_scales():
    """One scale with negative drive opens the stops for every scale of the movement."""
    dial = made(f'{PLAIN}\n[[scale]]\nradius = 30.0\nunit = "dB"\nfrom = -5\nto = 5', "rest = 0\nfull = 40\n")
    assert dial.stops_deg == (-45.0, 45.0)


def test_scale_may_end_exactly_at_a_stop():
    """A stop at full deflection does not refuse a scale that ends there, by rounding or otherwise."""
    for top in (0.3, 0.7, 1.1, 40.0, 123.4):
        scale = f'unit = "A"\nfrom = 0\nto = {top}\ncircuit = {{ kind = "shunt", swamp = "7.7 ohm" }}'
        dial = made(scale, MOVEMENT + "stops = [-44.0, 44.0]\n")
        assert angle(dial, top) == pytest.approx(44.0)
        assert angle(dial, 0.0) == -44.0


@pytest.mark.parametrize("response", ["{ power = 1.8 }", "{ power = 0.5 }"])
def test_power_response_refuses_negative_drive(response):
    """A response by power has no sense of direction: a scale with negative drive is refused at from."""
    found = refusals('unit = "%"\nfrom = -50\nto = 100', f"rest = 0.0\nfull = 40.0\nresponse = {response}\n")
    assert found[0][1] == ("scale", 0, "from")


def test_power_response_takes_a_rest_that_rounds_below_zero():
    """A drive at rest that rounds to a hair below zero is rest, under a power response too."""
    scale = 'unit = "Hz"\nlaw = "logarithmic"\nfrom = 0.024818755215034394\nto = 2.0'
    dial = made(scale, "rest = 0.0\nfull = 20.0\nresponse = { power = 1.8 }\n")
    assert angle(dial, 0.024818755215034394) == pytest.approx(0.0, abs=1e-12)


def test_points_response_is_mirrored_for_negative_drive():
    """A response by points without negative drive is mirrored about rest."""
    movement = "rest = 5.0\nfull = 45.0\nresponse = { points = [[0, 0], [0.4, 0.37], [1, 1]] }\n"
    dial = made('unit = "%"\nfrom = -100\nto = 100', movement)
    assert angle(dial, 40.0) == pytest.approx(5.0 + 40.0 * 0.37)
    assert angle(dial, -40.0) == pytest.approx(5.0 - 40.0 * 0.37)


# --- what a direct scale rests at ---------------------------------------------------------------

RESTS = [
    ('unit = "V"\nfrom = 50\nto = 100', 50, 0.5),
    ('unit = "V"\nfrom = 50\nto = 100\ncircuit = { kind = "direct", rest = 50 }', 50, 0.0),
    ('unit = "V"\nfrom = 0\nto = 100\ncircuit = { kind = "direct", full = 200 }', 100, 0.5),
    ('unit = "V"\nfrom = 0\nto = 100\nlaw = { kind = "power", exponent = 2 }', 50, 0.25),
    ('unit = "dB"\nfrom = -20\nto = 0\nlaw = { kind = "decibel" }', -20, 0.1),
    ('unit = "dB"\nfrom = -20\nto = 0\nlaw = { kind = "decibel", of = "power" }', -10, 0.1),
    ('unit = ""\nfrom = 1\nto = 1000\nlaw = "logarithmic"', 1, 0.0),
    ('unit = ""\nfrom = 1\nto = 1000\nlaw = "logarithmic"', 10, 1 / 3),
    (
        'unit = ""\nfrom = 10\nto = 1000\nlaw = "logarithmic"\ncircuit = { kind = "direct", rest = 1 }',
        10,
        1 / 3,
    ),
    ('unit = ""\nfrom = 1\nto = inf\nlaw = "reflection"', 3, 0.5),
    ('unit = ""\nfrom = 2\nto = 3\nlaw = "reflection"', 2, 2 / 3),
    ('unit = "x"\nfrom = 1\nto = 4\nlaw = { kind = "formula", signal = "sqrt(x)" }', 1, 0.5),
    ('unit = "x"\nfrom = 2\nto = 4\nlaw = { kind = "formula", signal = "x + 1" }', 2, 0.6),
    ('unit = "x"\nfrom = 0\nto = 10\nlaw = { kind = "formula", signal = "x**2 + 4" }', 0, 0.0),
    ('unit = "x"\nfrom = 0\nto = 10\nlaw = { kind = "formula", signal = "exp(x)" }', 0, 0.0),
    ('unit = "x"\nfrom = 0\nto = 9\nlaw = { kind = "table", points = [[0, 0], [9, 5]] }', 9, 1.0),
    ('unit = "x"\nfrom = 4\nto = 9\nlaw = { kind = "table", points = [[0, 0], [4, 1], [9, 5]] }', 4, 0.2),
    ('unit = "x"\nfrom = 0\nto = 9\nlaw = { kind = "table", points = [[0, 2], [9, 5]] }', 0, 0.0),
    ('unit = "bar"\nfrom = 0\nto = 10\nlaw = { kind = "linear", per = "1.6 mA", at_zero = "4 mA" }', 0, 0.2),
]


@pytest.mark.parametrize(("scale", "value", "share"), RESTS)
def test_direct_rests_at_zero_signal_or_at_the_scales_start(scale, value, share):
    """Direct rests at zero signal, or at from for logarithms and what never reaches zero."""
    dial = made(scale, "rest = 0.0\nfull = 100.0\n")
    assert angle(dial, value) == pytest.approx(100.0 * share, abs=1e-9)


@pytest.mark.parametrize(
    ("law", "rest"),
    [('"logarithmic"', 0), ('"logarithmic"', -3), ('"reflection"', 0.5), ('"reflection"', -1),
     ('{ kind = "formula", signal = "sqrt(x)" }', -2)],
)  # fmt: skip
def test_rest_outside_the_law_is_refused_there(law, rest):
    """A rest where the law has no signal is refused at rest, without a warning or a NaN."""
    keys = f'unit = ""\nfrom = 1\nto = 3\nlaw = {law}\ncircuit = {{ kind = "direct", rest = {rest} }}'
    assert refusals(keys)[0][1] == ("scale", 0, "circuit", "rest")


# --- prefixes -----------------------------------------------------------------------------------

PREFIXES = [
    ('unit = "kW"\nfrom = 0\nto = 2\nlaw = { kind = "power", exponent = 0.5, load = "50 ohm" }\n'
     'circuit = { kind = "multiplier", range = "400 V" }', 1.5, math.sqrt(1500 * 50) / 400),
    ('unit = "mA"\nfrom = 0\nto = 5\ncircuit = { kind = "shunt", range = "10 mA" }', 5, 0.5),
    ('unit = "uA"\nfrom = 0\nto = 500\ncircuit = { kind = "shunt", range = "1 mA" }', 250, 0.25),
    ('unit = "\u03bcA"\nfrom = 0\nto = 500\ncircuit = { kind = "shunt", range = "1 mA" }', 250, 0.25),
    ('unit = "kV"\nfrom = 0\nto = 2\ncircuit = { kind = "multiplier", range = "4 kV" }', 1, 0.25),
    ('unit = "kohm"\nfrom = 0\nto = 2\ncircuit = { kind = "series ohmmeter", half = "1 kohm" }', 1, 0.5),
    ('unit = "M\u2126"\nfrom = 0\nto = 2\ncircuit = { kind = "series ohmmeter", half = "1 Mohm" }', 1, 0.5),
    ('unit = "kPa"\nfrom = 0\nto = 10\nlaw = { kind = "power", exponent = 2 }', 5, 0.25),
    ('unit = "Pa"\nfrom = 0\nto = 2\nlaw = { kind = "linear", per = "1 V" }\n'
     'circuit = { kind = "multiplier", range = "4 V" }', 1, 0.25),
    ('unit = "pH"\nfrom = 0\nto = 2\nlaw = { kind = "linear", per = "1 V" }\n'
     'circuit = { kind = "multiplier", range = "4 V" }', 1, 0.25),
    ('unit = "min"\nfrom = 0\nto = 2\nlaw = { kind = "formula", signal = "x" }\n'
     'circuit = { kind = "multiplier", range = "4 V" }', 1, 0.25),
    ('unit = "kA"\nfrom = 0\nto = 2\nlaw = { kind = "linear", per = "25 mV" }\n'
     'circuit = { kind = "multiplier", range = "100 mV" }', 1, 0.25),
    ('unit = "kA"\nfrom = 0\nto = 2\nlaw = { kind = "formula", signal = "0.025*x" }\n'
     'circuit = { kind = "multiplier", range = "100 mV" }', 1, 0.25),
    ('unit = "kA"\nfrom = 0\nto = 2\nlaw = { kind = "table", points = [[0, "0 mV"], [2, "50 mV"]] }\n'
     'circuit = { kind = "multiplier", range = "100 mV" }', 1, 0.25),
    ('unit = "kV"\nfrom = 0\nto = 2\ncircuit = { kind = "direct", full = 4 }', 1, 0.25),
]  # fmt: skip


@pytest.mark.parametrize(("scale", "value", "drive"), PREFIXES)
def test_prefixes_are_read_before_electrical_units_alone(scale, value, drive):
    """A prefix counts before A, V, W, Ω and their like, for laws that take SI values; else it is text."""
    chain = made(scale).scales[0].chain
    assert float(chain.drive(np.array(float(value)))) == pytest.approx(drive, rel=1e-12)


def test_observed_takes_face_values():
    """Observed points are face values: 1 on a kA scale is one kiloampere's mark."""
    dial = made('unit = "kA"\nfrom = 0\nto = 2\nlaw = { kind = "observed", points = [[0, -44], [2, 44]] }')
    assert angle(dial, 1.0) == pytest.approx(0.0)


def test_observed_on_the_old_scale():
    """Observed positions may stand on the old scale."""
    law = 'law = { kind = "observed", position = "old", points = [[0, 0], [1, 25], [2, 100]] }'
    dial = made(f'unit = "bar"\nfrom = 0\nto = 2\n{law}', MOVEMENT + "[movement.old]\nrest = 0\nfull = 100\n")
    assert [angle(dial, v) for v in (0, 1, 2)] == pytest.approx([-44.0, -22.0, 44.0])


# --- warnings and refusals ------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("scale", "warned"),
    [
        ('unit = "mA"\nfrom = 0\nto = 1', False),
        ('unit = "mA"\nfrom = 0\nto = 1.009', False),
        ('unit = "mA"\nfrom = 0\nto = 1.011', True),
        ('unit = "mA"\nfrom = 0\nto = 0.989', True),
        ('unit = "mV"\nfrom = 0\nto = 75', False),
        ('unit = "mV"\nfrom = 0\nto = 76', True),
        ('unit = "mA"\nfrom = 0\nto = 2\ncircuit = { kind = "direct", full = 1 }', False),
        ('unit = "%"\nfrom = 0\nto = 2', False),
        ('unit = "W"\nfrom = 0\nto = 2', False),
    ],
)
def test_direct_scale_that_is_not_the_movements_own_is_warned_of(scale, warned):
    """A direct scale in A or V whose full is over 1 % from the movement's own is warned of."""
    movement = MOVEMENT + "stops = [-60.0, 150.0]\n"
    assert ("movement's own" in remarks(made(scale, movement))) == warned


def test_direct_scale_of_an_unknown_movement_is_not_warned_of():
    """Where current, or for volts resistance, is not given there is nothing to compare with."""
    bare = "rest = -44.0\nfull = 44.0\n"
    assert remarks(made('unit = "A"\nfrom = 0\nto = 7', bare)) == ""
    assert remarks(made('unit = "V"\nfrom = 0\nto = 7', 'current = "1 mA"\n' + bare)) == ""


INFINITE = [
    ("linear", 'unit = "A"\nfrom = 0\nto = inf', ""),
    ("linear", 'unit = "A"\nfrom = 0\nto = inf', '[circuit]\nkind = "direct"\nfull = 10'),
    ("linear", 'unit = "A"\nfrom = 0\nto = inf', '[circuit]\nkind = "shunt"\nrange = "1 A"'),
    ("linear", 'unit = "V"\nfrom = 0\nto = inf', '[circuit]\nkind = "multiplier"'),
    ("decibel", 'unit = "dB"\nfrom = 0\nto = inf\nlaw = { kind = "decibel" }', ""),
    ("logarithmic", 'unit = "dB"\nfrom = 1\nto = inf\nlaw = "logarithmic"', ""),
    ("power", 'unit = "W"\nfrom = 1\nto = inf\nlaw = { kind = "power", exponent = 0.5 }', ""),
    ("formula", 'unit = "W"\nfrom = 1\nto = inf\nlaw = { kind = "formula", signal = "sqrt(x)" }', ""),
    ("table", 'unit = "W"\nfrom = 1\nto = inf\nlaw = { kind = "table", points = [[1, 0], [2, 1]] }', ""),
]


@pytest.mark.parametrize(("law", "scale", "rest"), INFINITE)
def test_scale_to_infinity_without_a_limit_is_refused_at_to(law, scale, rest):
    """A scale to inf whose law and circuit have no limit there is refused at ``to``."""
    found = refusals(scale, rest=rest)
    assert [key for _, key in found] == [("scale", 0, "to")]
    assert f"the {law} law has no signal at inf" in found[0][0]


@pytest.mark.parametrize(
    ("scale", "key"),
    [
        ('unit = "x"\nfrom = 0\nto = 10\nlaw = { kind = "formula", signal = "(x - 5)**2" }', "law"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = { kind = "formula", signal = "sin(x)" }', "law"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = { kind = "formula", signal = "x - x" }', "law"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = { kind = "formula", signal = "1/(x - 3)" }', "law"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = { kind = "formula", signal = "log(x)" }', "from"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = { kind = "formula", signal = "sqrt(5 - x)" }', "to"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = { kind = "formula", signal = "exp(200*x)" }', "to"),
        ('unit = "dB"\nfrom = 0\nto = 1e5\nlaw = { kind = "decibel" }', "to"),
        ('unit = "x"\nfrom = 0\nto = 7\nlaw = "logarithmic"', "from"),
        ('unit = "x"\nfrom = -1\nto = 7\nlaw = "logarithmic"', "from"),
        ('unit = ""\nfrom = 0.5\nto = 7\nlaw = "reflection"', "from"),
        ('unit = "W"\nfrom = -1\nto = 7\nlaw = { kind = "power", exponent = 0.5 }', "from"),
        ('unit = "W"\nfrom = 0\nto = 7\nlaw = { kind = "power", exponent = -1 }', "from"),
        ('unit = "V"\nfrom = 0\nto = 7\ncircuit = { kind = "shunt" }', "unit"),
        ('unit = "A"\nfrom = 0\nto = 7\ncircuit = { kind = "multiplier" }', "unit"),
        ('unit = "V"\nfrom = 0\nto = 7\ncircuit = { kind = "series ohmmeter", half = "1 ohm" }', "unit"),
        ('unit = "A"\nfrom = 1\nto = 7\nlaw = "logarithmic"\ncircuit = { kind = "shunt" }', "law"),
        ('unit = "A"\nfrom = 1\nto = 7\nlaw = { kind = "linear", per = "1 V" }\n'
         'circuit = { kind = "shunt" }', "law"),
        ('unit = "ohm"\nfrom = -10\nto = 7\ncircuit = { kind = "series ohmmeter", half = "10 ohm" }', "from"),
        ('unit = "A"\nfrom = 0\nto = 7\ncircuit = { kind = "direct", full = 3 }', "to"),
        ('unit = "%"\nfrom = -80\nto = 7\ncircuit = { kind = "direct", full = 7 }', "from"),
    ],
)  # fmt: skip
def test_scales_without_sense_are_refused_at_their_key(scale, key):
    """What a law or circuit cannot show over from..to is refused, the key to change first."""
    found = refusals(scale)
    assert found[0][1] == ("scale", 0, key)
    assert ";" in found[0][0]


def test_every_wrong_scale_is_told():
    """Two wrong scales are refused together, each under its own key."""
    scales = 'unit = "V"\nfrom = 0\nto = 7\ncircuit = { kind = "shunt" }\n[[scale]]\nradius = 30.0\n'
    found = refusals(scales + 'unit = "x"\nfrom = 0\nto = 7\nlaw = "logarithmic"')
    assert [key for _, key in found] == [("scale", 0, "unit"), ("scale", 1, "from")]


def test_shared_circuit_is_named_where_it_stands():
    """What is wrong in the shared [circuit] is keyed there, in a scale's own circuit there."""
    shared = '[circuit]\nkind = "shunt"\nrange = "0.1 mA"'
    assert refusals('unit = "A"\nfrom = 0\nto = 7', rest=shared)[0][1] == ("circuit", "range")
    own = 'unit = "A"\nfrom = 0\nto = 7\ncircuit = { kind = "shunt", range = "0.1 mA" }'
    assert refusals(own)[0][1] == ("scale", 0, "circuit", "range")


def test_scale_beyond_its_points_is_remarked():
    """A scale that runs past its table's points is warned that the slope is carried on."""
    law = 'law = { kind = "table", points = [[0, 0], [9, 5]] }'
    assert "last slope is carried on" in remarks(made(f'unit = "x"\nfrom = 0\nto = 10\n{law}'))


def test_observed_scale_has_no_readings_of_its_own():
    """An observed scale is its own correction: readings beside it are refused."""
    law = 'law = { kind = "observed", points = [[0, -44], [9, 44]] }'
    found = refusals(f'unit = "x"\nfrom = 0\nto = 9\n{law}\n{reading("scale", value=3.0, angle=0.0)}')
    assert found[0][1] == ("scale", 0, "reading")


def test_readings_by_value_need_a_first_scale_with_a_law():
    """A value reading beside an observed first scale is refused at the reading."""
    law = 'law = { kind = "observed", points = [[0, -44], [9, 44]] }'
    second = '[[scale]]\nradius = 30.0\nunit = "%"\nfrom = 0\nto = 9'
    found = refusals(
        f'unit = "x"\nfrom = 0\nto = 9\n{law}\n{second}', MOVEMENT + reading(value=3.0, angle=0.0)
    )
    assert found[0][1] == ("movement", "reading", 0)


def test_departure_does_not_touch_an_observed_scale():
    """The movement's readings do not move an observed scale."""
    law = 'law = { kind = "observed", points = [[0, -44], [9, 44]] }'
    dial = made(f'unit = "x"\nfrom = 0\nto = 9\n{law}', MOVEMENT + reading(current="0.5 mA", angle=2.0))
    assert angle(dial, 4.5) == pytest.approx(0.0)


def test_designed_drive_leaves_out_what_was_built():
    """The wiring tells the drive of the circuit as designed beside the one as built."""
    scale = 'unit = "A"\nfrom = 0\nto = 40\ncircuit = { kind = "shunt", built = "1.885 mohm" }'
    made_scale = made(scale).scales[0]
    assert made_scale.wiring.designed(np.array([40.0])) == pytest.approx([1.0])
    assert float(made_scale.chain.drive(np.array(40.0))) == pytest.approx(40 * 1.885e-3 / 75.001885 / 1e-3)


def test_angles_that_no_value_has_are_refused():
    """Below rest a power response has no value, and below 1 a standing-wave ratio does not exist."""
    chain = made(PLAIN, MOVEMENT + "response = { power = 2.0 }\n").scales[0].chain
    with pytest.raises(NoSuchValue, match="no value of the scale stands at -46 degrees"):
        chain.value(np.array([-46.0]))
    chain = made('unit = ""\nfrom = 1\nto = inf\nlaw = "reflection"').scales[0].chain
    for at in (-46.0, 46.0):
        with pytest.raises(NoSuchValue, match="no value of the scale"):
            chain.value(np.array([at]))


def test_refusal_is_one_error_with_all_in_it():
    """What build raises holds every error, and reads as their lines."""
    with pytest.raises(Refused) as caught:
        made('unit = "V"\nfrom = 0\nto = 7\ncircuit = { kind = "shunt" }')
    assert len(caught.value.errors) == len(str(caught.value).splitlines()) == 1


def test_what_several_circuits_lack_is_asked_for_once() -> None:
    """Two shunts behind a movement without current and resistance ask for these in one line, not two."""
    second = '\n[[scale]]\nunit = "A"\nfrom = 0\nto = 5\nradius = 30\ncircuit = "shunt"'
    found = refusals(
        'unit = "A"\nfrom = 0\nto = 40\ncircuit = "shunt"' + second, "rest = -44.0\nfull = 44.0\n"
    )
    assert [key for _, key in found] == [("movement", "current")]
