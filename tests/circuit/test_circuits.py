"""Circuits: textbook examples, and Kirchhoff's equations solved by numpy.linalg.

LIEC is T. R. Kuphaldt, Lessons in Electric Circuits, vol. I, chapter 8; NEETS the US Navy Electricity
and Electronics Training Series, module 3 (NAVEDTRA 14175); Bell is D. A. Bell, Electronic
Instrumentation and Measurements, by the FOSSEE Scilab Textbook Companion 182.
"""

import math
from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from kirchhoff import coil_current

from dialgen.circuit.direct import Direct
from dialgen.circuit.kinds import CIRCUITS
from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.ohmmeters.ohmmeter import SeriesOhmmeter, ShuntOhmmeter
from dialgen.circuit.shunt import Rating, Shunt, read_rating
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.errors import InputError
from dialgen.quantity import Amount


def terminals(coil_a=1e-3, coil_ohm=500.0, full=10.0, rest_signal=0.0, signal=lambda v: v):
    """A coil before a scale that ends at ``full``."""
    return Terminals(
        coil=Coil(current=coil_a, resistance=coil_ohm),
        signal=signal,
        rest_signal=rest_signal,
        full_value=full,
        unit=None,
    )


def drive(circuit, signal, **given_terminals):
    """The drive of a circuit at a signal."""
    return float(circuit.stage(terminals(**given_terminals)).forward(np.array(signal)))


def ohm(value):
    """A resistance."""
    return Amount(value, "Ω")


def volt(value):
    """A voltage."""
    return Amount(value, "V")


def ampere(value):
    """A current."""
    return Amount(value, "A")


# LIEC, "Ammeter design": 1 mA, 500 ohm; the shunts for 0.1, 1, 5, 10 and 100 A (5.00005 mΩ printed).
LIEC_SHUNTS = [
    (0.1, 5.050505),
    (1.0, 0.5005005),
    (5.0, 0.100020004),
    (10.0, 0.05000500),
    (100.0, 0.005000050),
]


@pytest.mark.parametrize(("range_a", "shunt_ohm"), LIEC_SHUNTS)
def test_textbook_shunts_give_full_deflection(range_a, shunt_ohm):
    """The printed shunt, as built, drives the coil fully at its range, as does the designed one."""
    built = Shunt(range=ampere(range_a), built=ohm(shunt_ohm))
    assert drive(built, range_a) == pytest.approx(1.0, rel=2e-7)
    designed = Shunt(range=ampere(range_a))
    for signal in (0.0, 0.3 * range_a, range_a, -range_a):
        assert drive(designed, signal) == pytest.approx(drive(built, signal), rel=2e-7, abs=1e-12)


# LIEC, "Voltmeter design": 1 mA, 500 ohm; NEETS fig. 1-28: 10 V, 1 kΩ meter to 100 V takes 9 kΩ;
# Bell ex. 3-7: 50 µA, 1 700 ohm.
MULTIPLIERS = [
    (1e-3, 500.0, 1.0, 500.0),
    (1e-3, 500.0, 10.0, 9_500.0),
    (1e-3, 500.0, 100.0, 99_500.0),
    (1e-3, 500.0, 1000.0, 999_500.0),
    (10e-3, 1_000.0, 100.0, 9_000.0),
    (50e-6, 1_700.0, 10.0, 198.3e3),
    (50e-6, 1_700.0, 50.0, 998.3e3),
    (50e-6, 1_700.0, 100.0, 1_998.3e3),
]


@pytest.mark.parametrize(("coil_a", "coil_ohm", "range_v", "multiplier_ohm"), MULTIPLIERS)
def test_textbook_multipliers_give_full_deflection(coil_a, coil_ohm, range_v, multiplier_ohm):
    """The printed multiplier, as built, drives the coil fully at its range, as does the designed one."""
    coil = {"coil_a": coil_a, "coil_ohm": coil_ohm}
    built = Multiplier(range=volt(range_v), built=(ohm(multiplier_ohm),))
    assert drive(built, range_v, **coil) == pytest.approx(1.0, rel=1e-12)
    assert drive(Multiplier(range=volt(range_v)), range_v / 4, **coil) == pytest.approx(0.25, rel=1e-12)


def test_bare_movement_as_a_voltmeter():
    """LIEC: 1 mA in 500 ohm is a 0.5 V voltmeter, so its multiplier is nothing."""
    assert drive(Multiplier(range=volt(0.5)), 0.5) == pytest.approx(1.0)
    assert drive(Multiplier(range=volt(0.5), built=(ohm(0.0),)), 0.5) == pytest.approx(1.0)


# LIEC, "Ohmmeter design": 9 V, 1 mA: half scale 9 kΩ, a quarter at 27 kΩ, three quarters at 3 kΩ.
# Bell ex. 3-14: 1.5 V, 15 kΩ. Worked problem: 24 V, 100 µA, a quarter at 720 kΩ with 240 kΩ inside.
SERIES = [(9e3, 27e3, 0.25), (9e3, 9e3, 0.5), (9e3, 3e3, 0.75), (9e3, 0.0, 1.0), (9e3, math.inf, 0.0)]
SERIES += [(15e3, 45e3, 0.25), (15e3, 15e3, 0.5), (15e3, 5e3, 0.75), (240e3, 720e3, 0.25)]


@pytest.mark.parametrize(("half_ohm", "unknown_ohm", "share"), SERIES)
def test_textbook_series_ohmmeters(half_ohm, unknown_ohm, share):
    """The pointer of a series ohmmeter stands where the textbooks print it."""
    assert drive(SeriesOhmmeter(half=ohm(half_ohm)), unknown_ohm) == pytest.approx(share, rel=1e-12)


# Universal ohms curve by definition, x = R/half (reference values, section 2).
SERIES_CURVE = [
    (0.1, 0.909091),
    (0.25, 0.8),
    (1 / 3, 0.75),
    (2.0, 0.333333),
    (4.0, 0.2),
    (9.0, 0.1),
    (19.0, 0.05),
]
SHUNT_CURVE = [
    (0.1, 0.090909),
    (0.25, 0.2),
    (1 / 3, 0.25),
    (1.0, 0.5),
    (3.0, 0.75),
    (9.0, 0.9),
    (math.inf, 1.0),
]


@pytest.mark.parametrize(("x", "share"), SERIES_CURVE)
def test_series_ohms_curve(x, share):
    """A series ohmmeter follows 1/(1 + x)."""
    assert drive(SeriesOhmmeter(half=ohm(50.0)), 50.0 * x) == pytest.approx(share, abs=5e-7)


@pytest.mark.parametrize(("x", "share"), SHUNT_CURVE)
def test_shunt_ohms_curve(x, share):
    """A shunt ohmmeter follows x/(1 + x): nothing at a short, full when open (NEETS 3, answer 47)."""
    assert drive(ShuntOhmmeter(half=ohm(50.0)), 50.0 * x) == pytest.approx(share, abs=5e-7)


positive = st.floats(0.05, 2.0)


@given(st.floats(0.01, 50.0), st.floats(10.0, 2000.0), positive, st.floats(0.0, 3000.0), st.floats(-1.5, 1.5))
def test_shunt_with_swamp_and_leads_obeys_kirchhoff(range_a, coil_ohm, lead_ohm, swamp_ohm, share):
    """A designed shunt behind leads and swamping resistor carries what Kirchhoff's equations say."""
    circuit = Shunt(range=ampere(range_a), leads=ohm(lead_ohm), swamp=ohm(swamp_ohm))
    # The designed shunt from the condition at full scale: the same voltage over both branches.
    shunt_ohm = 1e-3 * (coil_ohm + lead_ohm + swamp_ohm) / (range_a - 1e-3)
    applied = share * range_a
    branches = [(1, 0, 1 / shunt_ohm), (1, 2, 1 / (lead_ohm + swamp_ohm)), (2, 0, 1 / coil_ohm)]
    expected = coil_current(branches, [(1, applied)], (2, 0, 1 / coil_ohm)) / 1e-3
    got = drive(circuit, applied, coil_ohm=coil_ohm)
    assert got == pytest.approx(expected, rel=1e-8, abs=1e-10)
    assert got == pytest.approx(share, rel=1e-8, abs=1e-10)


@given(
    st.floats(1e-4, 10.0),
    st.floats(10.0, 2000.0),
    positive,
    st.floats(1.0, 3000.0),
    st.floats(0.0, 5.0),
    st.floats(0.2, 1.4),
)
def test_shunt_as_built_obeys_kirchhoff(shunt_ohm, coil_ohm, lead_ohm, swamp_ohm, applied, off):
    """A built shunt, well off its design or not, divides the current as Kirchhoff's equations say."""
    full_a = 1e-3 * (1 + (coil_ohm + lead_ohm + swamp_ohm) / shunt_ohm)
    circuit = Shunt(
        range=ampere(max(1e-3, off * full_a)), built=ohm(shunt_ohm), leads=ohm(lead_ohm), swamp=ohm(swamp_ohm)
    )
    branches = [(1, 0, 1 / shunt_ohm), (1, 2, 1 / (lead_ohm + swamp_ohm)), (2, 0, 1 / coil_ohm)]
    expected = coil_current(branches, [(1, applied)], (2, 0, 1 / coil_ohm)) / 1e-3
    assert drive(circuit, applied, coil_ohm=coil_ohm) == pytest.approx(expected, rel=1e-8, abs=1e-12)


@given(st.floats(0.5, 200.0), st.floats(0.06, 0.15), st.floats(1.0, 50.0), st.floats(0.01, 1.0))
def test_rated_shunt_gets_a_swamp_that_gives_full_deflection(range_a, drop_v, coil_ohm, lead_ohm):
    """Beside a bought shunt the swamp that Kirchhoff's equations ask for at full scale is designed."""
    circuit = Shunt(
        range=ampere(range_a), rated=Rating(current_a=range_a, drop_v=drop_v), leads=ohm(lead_ohm)
    )
    # At full scale the coil branch takes 1 mA, so the shunt takes the rest and sets the voltage.
    branch_v = (range_a - 1e-3) * drop_v / range_a
    swamp_ohm = branch_v / 1e-3 - coil_ohm - lead_ohm
    shunt_s = range_a / drop_v
    branches = [(1, 0, shunt_s), (1, 2, 1 / (swamp_ohm + lead_ohm)), (2, 0, 1 / coil_ohm)]
    for share in (1.0, 0.4):
        expected = coil_current(branches, [(1, share * range_a)], (2, 0, 1 / coil_ohm)) / 1e-3
        assert drive(circuit, share * range_a, coil_ohm=coil_ohm) == pytest.approx(expected, rel=1e-7)
        assert expected == pytest.approx(share, rel=1e-7)


def test_rated_shunt_made_for_the_movement_gets_no_swamp():
    """A 75 mV shunt beside a movement of just 75 mV needs no swamp, and reads low by the coil's own share."""
    circuit = Shunt(range=ampere(100.0), rated=read_rating("100 A/75 mV"))
    branches = [(1, 0, 100 / 0.075), (1, 0, 1 / 75.0)]
    expected = coil_current(branches, [(1, 100.0)], (1, 0, 1 / 75.0)) / 1e-3
    assert drive(circuit, 100.0, coil_ohm=75.0) == pytest.approx(expected, rel=1e-10)
    assert expected == pytest.approx(0.99999, abs=1e-8)


def test_rated_shunt_with_a_given_swamp_reads_what_it_reads():
    """A swamp that is given beside a bought shunt is kept, whatever it makes of full scale."""
    circuit = Shunt(range=ampere(100.0), rated=read_rating("100 A/75 mV"), swamp=ohm(20.0))
    branches = [(1, 0, 100 / 0.075), (1, 2, 1 / 20.0), (2, 0, 1 / 50.0)]
    expected = coil_current(branches, [(1, 100.0)], (2, 0, 1 / 50.0)) / 1e-3
    assert drive(circuit, 100.0, coil_ohm=50.0) == pytest.approx(expected, rel=1e-10)


@given(
    st.floats(1.0, 500.0),
    st.floats(0.1, 900.0),
    st.floats(0.0, 400.0),
    st.floats(0.1, 100.0),
    st.floats(-0.5, 1.2),
)
def test_multiplier_with_line_and_suppressed_zero_obeys_kirchhoff(span_v, suppress_v, swamp, line, share):
    """Source, zener, line, multiplier, swamp and coil in one loop obey Kirchhoff's voltage law."""
    range_v = suppress_v + span_v
    circuit = Multiplier(range=volt(range_v), swamp=ohm(swamp), line=ohm(line), suppress=volt(suppress_v))
    # Design condition at full scale; then the loop at another voltage as a network of conductances:
    # the net electromotive force over the whole resistance, as a current source beside it.
    rx = (range_v - suppress_v) / 1e-3 - 100.0 - swamp - line
    applied = suppress_v + share * span_v
    outside = rx + line + swamp
    net = [(1, 0, 1 / outside), (1, 0, 1 / 100.0)]
    expected = coil_current(net, [(1, (applied - suppress_v) / outside)], (1, 0, 1 / 100.0)) / 1e-3
    assert drive(circuit, applied, coil_ohm=100.0) == pytest.approx(expected, rel=1e-8, abs=1e-8)
    assert drive(circuit, suppress_v, coil_ohm=100.0) == pytest.approx(0.0, abs=1e-9)
    assert drive(circuit, range_v, coil_ohm=100.0) == pytest.approx(1.0, rel=1e-9)


@given(st.floats(10.0, 1e5), st.floats(0.0, 1e6))
def test_series_ohmmeter_obeys_ohms_law(half_ohm, unknown_ohm):
    """Cell, inner resistance and unknown in one loop: the current over that at a short circuit."""
    cell_v = 1.5
    short_a = np.linalg.solve([[half_ohm]], [cell_v])[0]
    through_a = np.linalg.solve([[half_ohm + unknown_ohm]], [cell_v])[0]
    got = drive(SeriesOhmmeter(half=ohm(half_ohm)), unknown_ohm)
    assert got == pytest.approx(through_a / short_a, rel=1e-12)


@given(st.floats(10.0, 1e4), st.floats(1.0, 1e5), st.floats(0.01, 1e5))
def test_shunt_ohmmeter_obeys_kirchhoff(coil_ohm, feed_ohm, unknown_ohm):
    """With half = coil beside feed, the coil's current over that with nothing connected is the drive."""
    half_ohm = coil_ohm * feed_ohm / (coil_ohm + feed_ohm)
    coil_branch = (1, 0, 1 / coil_ohm)
    feed = (1, 0, 1 / feed_ohm)  # the cell behind the feed, as a current source beside it
    open_a = coil_current([coil_branch, feed], [(1, 1.5 / feed_ohm)], coil_branch)
    loaded_a = coil_current([coil_branch, feed, (1, 0, 1 / unknown_ohm)], [(1, 1.5 / feed_ohm)], coil_branch)
    got = drive(ShuntOhmmeter(half=ohm(half_ohm)), unknown_ohm, coil_ohm=coil_ohm)
    assert got == pytest.approx(loaded_a / open_a, rel=1e-9)


@pytest.mark.parametrize(
    ("rest", "full", "expected"), [(None, None, 0.75), (50.0, None, 0.5), (50.0, 150.0, 0.25)]
)
def test_direct_by_hand(rest, full, expected):
    """(75 - r)/(full - r): 75 of 0 to 100 is 0.75, of 50 to 100 half, of 50 to 150 a quarter."""
    assert drive(Direct(rest=rest, full=full), 75.0, full=100.0) == pytest.approx(expected)


def test_range_left_out_is_the_signal_at_the_scales_end():
    """Without range the scale's own end is full deflection."""
    assert drive(Shunt(), 10.0) == pytest.approx(1.0)
    assert drive(Multiplier(), 10.0) == pytest.approx(1.0)


def test_range_of_the_movement_itself_needs_no_shunt():
    """A range equal to the movement's own current is the bare movement."""
    assert drive(Shunt(range=ampere(1e-3)), 0.5e-3) == pytest.approx(0.5, rel=1e-15)


def test_swamp_and_leads_do_not_matter_without_a_shunt():
    """In series with the bare movement a swamp changes no current."""
    assert drive(Shunt(range=ampere(1e-3), swamp=ohm(900.0)), 1e-3) == 1.0


NAN = math.nan


@pytest.mark.parametrize(
    ("circuit", "given_terminals", "keys"),
    [
        (Shunt(range=ampere(0.5e-3)), {}, [("range",), ("movement", "current")]),
        (Shunt(), {"full": 0.5e-3}, [("range",), ("movement", "current")]),
        (Shunt(range=ampere(1.0)), {"coil_a": None}, [("movement", "current")]),
        (Shunt(range=ampere(1.0)), {"coil_ohm": None}, [("movement", "resistance")]),
        (Shunt(), {"full": math.inf}, [("range",)]),
        (Shunt(range=ampere(1.0), rated=Rating(current_a=1.0, drop_v=0.05)), {}, [("rated",), ("range",)]),
        (Multiplier(range=volt(0.4)), {}, [("range",), ("movement", "resistance")]),
        (
            Multiplier(range=volt(10.0), suppress=volt(9.9)),
            {},
            [("range",), ("suppress",), ("movement", "resistance")],
        ),
        (Multiplier(range=volt(10.0), suppress=volt(10.0)), {}, [("suppress",), ("range",)]),
        (Multiplier(range=volt(0.51), line=ohm(20.0)), {}, [("line",), ("range",)]),
        (
            Multiplier(range=volt(0.51), line=ohm(20.0), swamp=ohm(1.0)),
            {},
            [("line",), ("swamp",), ("range",)],
        ),
        (
            Multiplier(range=volt(10.0), ranges=(volt(10.0), volt(0.4))),
            {},
            [("ranges", 1), ("movement", "resistance")],
        ),
        (Multiplier(range=volt(10.0)), {"coil_a": None}, [("movement", "current")]),
        (Multiplier(range=volt(10.0)), {"coil_ohm": None}, [("movement", "resistance")]),
        (Multiplier(), {"full": -5.0}, [("range",)]),
        (Multiplier(built=(ohm(4500.0),)), {"full": 0.0}, [("range",)]),
        (Shunt(), {"full": 0.0}, [("range",)]),
        (SeriesOhmmeter(half=ohm(2e3), battery=volt(1.5)), {}, [("half",), ("battery",)]),
        (Direct(full=0.0), {}, [("full",), ("rest",)]),
        (Direct(rest=10.0), {}, [("full",), ("rest",)]),
        (Direct(), {"full": math.inf}, [("full",)]),
        (Direct(rest=3.0), {"signal": lambda v: NAN if v == 3.0 else v}, [("rest",)]),
        (Direct(full=3.0), {"signal": lambda v: NAN if v == 3.0 else v}, [("full",)]),
    ],
)
def test_circuits_that_cannot_be_built_are_refused_with_their_keys(circuit, given_terminals, keys):
    """A circuit that cannot be built names the keys to change, the first one first."""
    with pytest.raises(InputError, match=";") as caught:
        circuit.stage(terminals(**given_terminals))
    assert list(caught.value.keys) == keys


def test_an_end_below_nothing_is_told_which_range_to_write():
    """PH 0 to 14 is +414 mV to -414 mV, so full deflection is at a range of 414 mV."""
    with pytest.raises(InputError, match=r'is −414 mV, .* write range = "414 mV"'):
        Multiplier().stage(terminals(full=-0.414))


def test_the_line_that_a_refusal_allows_is_allowed():
    """41 mV drive 1 mA through 41 Ω: with a coil of 35 Ω a line may have 6 Ω, which the message says."""
    coil = {"coil_ohm": 35.0, "full": 0.041}
    with pytest.raises(InputError, match=r"35 mV for the coil; .* line may have 6 Ω at most") as caught:
        Multiplier(line=ohm(20.0)).stage(terminals(**coil))
    assert caught.value.keys[0] == ("line",)
    assert drive(Multiplier(line=ohm(6.0)), 0.041, **coil) == pytest.approx(1.0, rel=1e-12)


@pytest.mark.parametrize(
    "text",
    ["75 mV", "100/75", "100 A/75 mV/2", "75 mV/100 A", "100 A/-75 mV", "0 A/75 mV", "100 A/0 mV", 100],
)
def test_ratings_written_wrongly_are_refused(text):
    """A rating is current/voltage, both above zero, and the message shows a whole one."""
    with pytest.raises(ValueError, match=r'; write for example "100 A/75 mV"$'):
        read_rating(text)


def test_rating_is_drop_over_current():
    """A 100 A, 75 mV shunt is 0.75 mΩ."""
    assert read_rating("100 A / 75 mV").resistance_ohm == pytest.approx(0.75e-3)


def test_table_of_circuits_names_each_by_its_kind():
    """Every circuit stands in the table under its own kind and says what it takes."""
    assert all(circuit.kind == kind for kind, circuit in CIRCUITS.items())
    takes = {kind: circuit.takes for kind, circuit in CIRCUITS.items()}
    assert takes["shunt"] == "A"
    assert takes["multiplier"] == "V"
    assert takes["series ohmmeter"] == takes["shunt ohmmeter"] == "Ω"
    assert takes["direct"] is None


def test_a_bare_movement_with_another_full_scale_has_something_before_it():
    """A 1 mA, 500 Ω movement takes 0.5 V (Ohm's law); on a scale to 10 V that is told, at 0.5 V nothing."""
    (fact,) = Direct().design(replace(terminals(), unit="V")).facts
    assert (fact.value, fact.unit) == (pytest.approx(0.5), "V")
    assert Direct().design(replace(terminals(full=0.5), unit="V")).facts == ()
    assert Direct().design(replace(terminals(), unit="")).facts == ()
