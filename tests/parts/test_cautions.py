"""Which caution stands beside which circuit: every row where it belongs, and nowhere else."""

import math
import re

import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.circuit.direct import Direct
from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.ohmmeters.ohmmeter import SeriesOhmmeter, ShuntOhmmeter
from dialgen.circuit.rectifiers.rectifier import Rectifier
from dialgen.circuit.shunt import Shunt
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.circuit.transformer import CurrentTransformer, read_ratio
from dialgen.circuit.universal import UniversalShunt
from dialgen.errors import InputError
from dialgen.parts.caution.cautions import CAUTIONS, cautions, split_count
from dialgen.parts.caution.situation import Situation, situation_of
from dialgen.parts.ratings import USUAL_RATINGS_V
from dialgen.quantity import Amount

GENERAL = ("radium", "sealed meters", "marks lost", "codes")
LIVE = ("touch", "zero screw")
HEAVY = ("sense fuse", "heavy shunt")

BATTERY_SHUNT = Situation(kind="shunt", takes="A", range=40.0, alternating=False, shunt_a=39.999)
AC_VOLTS = Situation(kind="rectifier", takes="V", range=250.0, alternating=True, resistor_peak_v=353.6)
IRON = {"movement": "moving iron", "alternating": None}

TABLE = {
    "a shunt for 40 A from a battery": (
        BATTERY_SHUNT,
        ("ammeter on live line", "shunt before leads", *HEAVY),
    ),
    "a shunt for 10 A": (
        Situation(kind="shunt", takes="A", range=10.0, alternating=False, shunt_a=9.999),
        ("ammeter on live line", "shunt before leads"),
    ),
    "a shunt for 20 mA": (
        Situation(kind="shunt", takes="A", range=0.02, alternating=False, shunt_a=0.019),
        ("shunt before leads",),
    ),
    "a movement that takes its own current": (
        Situation(kind="direct", takes="A", range=1e-3, alternating=None),
        (),
    ),
    "a movement across a bought shunt's 60 mV, scaled by itself": (
        Situation(kind="direct", takes="V", range=0.06, alternating=None),
        (),
    ),
    "a universal shunt for 1, 5 and 10 A": (
        Situation(kind="universal shunt", takes="A", range=10.0, ranges=3, alternating=False, shunt_a=9.999),
        ("ammeter on live line", "highest range first"),
    ),
    "a universal shunt up to 30 A": (
        Situation(kind="universal shunt", takes="A", range=30.0, ranges=3, alternating=False, shunt_a=29.9),
        ("ammeter on live line", *HEAVY, "highest range first"),
    ),
    "a moving iron ammeter by itself": (
        Situation(kind="direct", takes="A", range=30.0, **IRON),
        ("ammeter on live line",),
    ),
    "a moving iron with a shunt": (
        Situation(kind="shunt", takes="A", range=30.0, shunt_a=25.0, **IRON),
        ("ammeter on live line", "shunt before leads", *HEAVY, "moving iron with shunt"),
    ),
    "a moving iron on a transformer": (
        Situation(
            kind="current transformer", takes="A", range=200.0, alternating=True, movement="moving iron"
        ),
        ("secondary open", "primary dead"),
    ),
    "a moving coil on a transformer": (
        Situation(kind="current transformer", takes="A", range=200.0, alternating=True),
        ("secondary open", "primary dead", "moving coil on AC"),
    ),
    "a moving iron with a shunt on a transformer": (
        Situation(
            kind="current transformer",
            takes="A",
            range=200.0,
            alternating=True,
            movement="moving iron",
            shunt_a=4.0,
        ),
        ("secondary open", "primary dead", "moving iron with shunt"),
    ),
    "a moving iron with a shunt on a transformer of 20 A": (
        Situation(
            kind="current transformer",
            takes="A",
            range=200.0,
            alternating=True,
            movement="moving iron",
            shunt_a=19.0,
        ),
        # No fuse in any lead: no supply feeds a fault there, and a secondary must not be opened.
        ("secondary open", "primary dead", "heavy shunt", "moving iron with shunt"),
    ),
    "10 V DC": (
        Situation(kind="multiplier", takes="V", range=10.0, alternating=False, resistor_peak_v=9.9),
        (),
    ),
    "120 V DC": (
        Situation(kind="multiplier", takes="V", range=120.0, alternating=False, resistor_peak_v=119.9),
        (),
    ),
    "125 V DC": (
        Situation(kind="multiplier", takes="V", range=125.0, alternating=False, resistor_peak_v=124.9),
        (*LIVE, "live leads", "direct current arc", "earthy end"),
    ),
    "600 V DC with resistors that stand 700 V": (
        Situation(
            kind="multiplier",
            takes="V",
            range=600.0,
            alternating=False,
            resistor_peak_v=599.9,
            resistor_rating_v=700.0,
        ),
        (*LIVE, "live leads", "direct current arc", "earthy end"),
    ),
    "200 V DC with resistors that stand 150 V": (
        Situation(
            kind="multiplier",
            takes="V",
            range=200.0,
            alternating=False,
            resistor_peak_v=199.9,
            resistor_rating_v=150.0,
        ),
        (*LIVE, "live leads", "direct current arc", "earthy end", "split"),
    ),
    "600 V DC": (
        Situation(kind="multiplier", takes="V", range=600.0, alternating=False, resistor_peak_v=599.9),
        (*LIVE, "live leads", "direct current arc", "earthy end", "split"),
    ),
    "10 to 15 V with a suppressed zero": (
        Situation(kind="multiplier", takes="V", range=15.0, alternating=False, suppressed=True),
        ("suppressed zero",),
    ),
    "10, 50 and 250 V DC": (
        Situation(
            kind="multiplier", takes="V", range=250.0, ranges=3, alternating=False, resistor_peak_v=249.9
        ),
        (*LIVE, "live leads", "direct current arc", "earthy end", "highest range first"),
    ),
    "50 V AC": (
        Situation(kind="rectifier", takes="V", range=50.0, alternating=True, resistor_peak_v=70.0),
        (),
    ),
    "60 V AC": (
        Situation(kind="rectifier", takes="V", range=60.0, alternating=True, resistor_peak_v=84.9),
        (*LIVE, "live leads", "earthy end"),
    ),
    "150 V AC": (
        Situation(kind="rectifier", takes="V", range=150.0, alternating=True, resistor_peak_v=212.1),
        (*LIVE, "live leads", "earthy end"),
    ),
    "250 V AC": (AC_VOLTS, (*LIVE, "live leads", "split", "earthy end")),
    "a moving iron voltmeter for 300 V": (
        Situation(kind="direct", takes="V", range=300.0, **IRON),
        (*LIVE, "live leads", "direct current arc"),
    ),
    "a moving iron with a multiplier for 500 V": (
        Situation(kind="multiplier", takes="V", range=500.0, resistor_peak_v=600.0, **IRON),
        (*LIVE, "live leads", "direct current arc", "split", "earthy end"),
    ),
    "a moving iron voltmeter for 60 V": (
        Situation(kind="direct", takes="V", range=60.0, **IRON),
        (*LIVE, "live leads"),
    ),
    "1 kV AC": (
        Situation(kind="rectifier", takes="V", range=1000.0, alternating=True, resistor_peak_v=1414.0),
        (*LIVE, "live leads", "split", "earthy end"),
    ),
    "2 kV DC": (
        Situation(kind="multiplier", takes="V", range=2000.0, alternating=False, resistor_peak_v=1999.0),
        ("above 1 kV", *LIVE),
    ),
    "3 kV AC": (
        Situation(kind="rectifier", takes="V", range=3000.0, alternating=True, resistor_peak_v=4243.0),
        ("above 1 kV", *LIVE),
    ),
    "a series ohmmeter": (
        Situation(kind="series ohmmeter", takes="Ω", range=1500.0, alternating=False, battery=True),
        ("ohmmeter on live circuit",),
    ),
    "a shunt ohmmeter with three ranges": (
        Situation(kind="shunt ohmmeter", takes="Ω", range=1e5, ranges=3, alternating=False, battery=True),
        ("ohmmeter on live circuit",),
    ),
    "a bridge thermometer": (Situation(kind="bridge", takes="Ω", range=200.0, alternating=False), ()),
    "a wattmeter for 5 kW": (Situation(kind="direct", takes="W", range=5000.0, alternating=None), ()),
}


@pytest.mark.parametrize("case", sorted(TABLE))
def test_each_circuit_reads_its_own_cautions_and_no_other(case):
    """The cautions of a situation are just those that a careful practitioner would give, and the general."""
    situation, wanted = TABLE[case]
    assert {caution.id for caution in cautions(situation)} == {*wanted, *GENERAL}


def test_every_row_is_reached_and_every_row_is_missed():
    """No row is dead: each stands beside some circuit, and only the general ones beside all."""
    seen = [{caution.id for caution in cautions(situation)} for situation, _ in TABLE.values()]
    rows = {caution.id for caution in CAUTIONS}
    assert set.union(*seen) == rows
    assert set.intersection(*seen) == set(GENERAL)
    assert len(rows) == len(CAUTIONS)


@pytest.mark.parametrize("caution", CAUTIONS, ids=lambda caution: caution.id)
def test_each_text_is_short_and_has_a_source(caution):
    """One or two sentences that end in a full stop, no longer than two lines of a letter, and a source."""
    assert 1 <= len(re.findall(r"\.(?= [A-Z]|$)", caution.text)) <= 2
    assert caution.text.endswith(".")
    assert len(caution.text) <= 230
    assert "  " not in caution.text
    assert re.search(r"common practice|UFC|NEETS|EPA|limit of this program", caution.source)


def test_what_kills_comes_before_what_burns_and_what_is_only_wrong():
    """The order is gravest first, and the line on codes closes every list."""
    order = [caution.id for caution in CAUTIONS]
    ranks = ("above 1 kV", "touch", "live leads", "shunt before leads", "moving iron with shunt", "codes")
    assert [order.index(each) for each in ranks] == sorted(order.index(each) for each in ranks)
    for situation, _ in TABLE.values():
        assert cautions(situation)[-1].id == "codes"


def test_the_fuse_in_each_live_lead_says_nothing_of_mains():
    """The row stands beside a DC supply too, which is no mains."""
    row = next(caution for caution in CAUTIONS if caution.id == "live leads")
    assert "fuse in each live lead" in row.text
    assert "clearance and creepage" in row.text
    assert "mains" not in row.text


def test_the_transformer_names_its_published_source():
    """Shorting before opening is UFC 3-560-01 (2006) §9-5.2 (reference_values.md section 16)."""
    row = next(caution for caution in CAUTIONS if caution.id == "secondary open")
    assert row.source == "UFC 3-560-01 (2006) §9-5.2"
    assert "Never open" in row.text
    assert "Short the secondary" in row.text


def test_above_a_kilovolt_there_is_no_help():
    """The flag is up above 1 kV, not at it, and only for volts."""
    for takes, value, beyond in (("V", 1000.0, False), ("V", 1000.1, True), ("A", 2000.0, False)):
        assert Situation(kind="direct", takes=takes, range=value).beyond_help is beyond


@given(st.floats(0, 1e5), st.floats(10, 3000))
def test_no_split_resistor_has_more_than_its_rating(peak_v, rating_v):
    """With the resistors told each is within its rating (to a billionth), with one fewer it would not be."""
    count = split_count(peak_v, rating_v)
    assert peak_v / count <= rating_v * (1 + 2e-9)
    assert count == 1 or peak_v / (count - 1) > rating_v


@pytest.mark.parametrize(
    ("peak_v", "rating_v", "count"),
    [(250 * math.sqrt(2), 250, 2), (600 * math.sqrt(2), 350, 3), (250, 250, 1), (-600, 250, 3), (0, 250, 1)],
)
def test_splits_by_hand(peak_v, rating_v, count):
    """353.6 V on 250 V parts are two, 848.5 V on 350 V parts three; the sense does not count."""
    assert split_count(peak_v, rating_v) == count


@pytest.mark.parametrize(
    ("peak_v", "rating_v"), [(1, 0), (1, -5), (1, math.nan), (math.inf, 250), (math.nan, 1)]
)
def test_no_split_of_nonsense(peak_v, rating_v):
    """A rating of nothing, or a voltage without an end, is refused with what to give."""
    with pytest.raises(InputError, match="; give"):
        split_count(peak_v, rating_v)


def test_the_ratings_told_are_those_worked_with():
    """The text tells the very volts of the table of usual ratings."""
    text = next(caution.text for caution in CAUTIONS if caution.id == "split")
    for watts, volts in USUAL_RATINGS_V.items():
        assert f"{volts:g} V for {watts:g} W" in text


def behind(coil_a, coil_ohm, full, unit):
    """A coil before a scale that ends at ``full``."""
    return Terminals(
        coil=Coil(current=coil_a, resistance=coil_ohm),
        signal=lambda v: v,
        rest_signal=0.0,
        full_value=full,
        unit=unit,
    )


def of(circuit, full, unit, movement="moving coil"):
    """The situation of a circuit behind a coil of 1 mA, 75 Ω."""
    return situation_of(circuit.design(behind(1e-3, 75.0, full, unit)), movement)


def test_a_shunt_tells_its_current():
    """A 40 A shunt before a 1 mA coil carries 39.999 A of direct current."""
    found = of(Shunt(), 40.0, "A")
    assert found.shunt_a == pytest.approx(39.999, rel=1e-9)
    assert (found.kind, found.takes, found.range, found.alternating) == ("shunt", "A", 40.0, False)


def test_no_shunt_no_current_beside_the_coil():
    """A range of the movement's own current has no shunt, and no caution of one."""
    found = of(Shunt(), 1e-3, "A")
    assert found.shunt_a == 0.0
    assert [caution.id for caution in cautions(found)] == list(GENERAL)


def test_a_tapped_shunt_tells_its_largest_range():
    """Of 1, 5 and 20 A, nearly 20 A go through the tap, whichever range the scale shows."""
    ranges = tuple(Amount(value, "A") for value in (1.0, 5.0, 20.0))
    found = of(UniversalShunt(ranges=ranges, range=ranges[0]), 1.0, "A")
    assert (found.range, found.ranges) == (20.0, 3)
    assert found.shunt_a == pytest.approx(19.999, rel=1e-9)


def test_a_transformer_tells_its_secondary():
    """Of 200 A at 200/5, the shunt carries what of the secondary's 5 A the coil leaves."""
    found = of(CurrentTransformer(ratio=read_ratio("200/5")), 200.0, "A")
    assert (found.range, found.alternating) == (200.0, True)
    assert found.shunt_a == pytest.approx(4.999, rel=1e-9)


def test_a_multiplier_tells_the_peak_of_its_resistor():
    """Of 600 V all but the coil's 75 mV are across the resistor; a moving iron may have 1.414 times it."""
    assert of(Multiplier(), 600.0, "V").resistor_peak_v == pytest.approx(599.925, rel=1e-9)
    iron = of(Multiplier(), 600.0, "V", "moving iron")
    assert iron.alternating is None
    assert iron.resistor_peak_v == pytest.approx(599.925 * math.sqrt(2), rel=1e-9)


def test_a_chain_tells_the_peak_of_its_worst_section():
    """In a chain for 10, 100 and 500 V at 1 mA the last section, 400 kΩ, has 400 V on it."""
    ranges = tuple(Amount(value, "V") for value in (10.0, 100.0, 500.0))
    found = of(Multiplier(ranges=ranges, chain=True), 10.0, "V")
    assert found.resistor_peak_v == pytest.approx(400.0, rel=1e-9)
    assert (found.range, found.ranges) == (500.0, 3)


def test_a_suppressed_zero_is_for_direct_current():
    """A multiplier with a suppressed zero says so, with any movement."""
    found = of(Multiplier(suppress=Amount(10.0, "V")), 15.0, "V", "other")
    assert found.suppressed
    assert found.alternating is False


def test_a_rectifier_has_the_peak_of_the_sine():
    """A 250 V rectifier instrument alternates, and its resistor may see 353.55 V."""
    found = of(Rectifier(), 250.0, "V")
    assert found.alternating is True
    assert found.resistor_peak_v == pytest.approx(353.5534, rel=1e-6)
    assert {"live leads", "split", "earthy end"} <= {caution.id for caution in cautions(found)}


def test_a_direct_scale_may_be_of_any_current():
    """What is inside a movement that is scaled as it stands is not known, nor whether it takes AC."""
    found = of(Direct(), 300.0, "V")
    assert (found.kind, found.takes, found.range, found.alternating) == ("direct", "V", 300.0, None)


@pytest.mark.parametrize(("kind", "half_ohm"), [(SeriesOhmmeter, 1500.0), (ShuntOhmmeter, 70.0)])
def test_an_ohmmeter_has_a_battery_and_no_dangerous_voltage(kind, half_ohm):
    """Both ohmmeters are told of live circuits, and of nothing else but the general."""
    found = of(kind(half=Amount(half_ohm, "Ω"), battery=Amount(1.5, "V")), math.inf, "Ω")
    assert found.battery
    assert [caution.id for caution in cautions(found)] == ["ohmmeter on live circuit", *GENERAL]
