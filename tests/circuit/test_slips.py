"""What was built or bought and cannot be meant: refused by the chain and on the bench alike, or remarked."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.rectifiers.diodes import SILICON, read_diode
from dialgen.circuit.rectifiers.rectifier import Rectifier
from dialgen.circuit.shunt import Shunt, read_rating
from dialgen.circuit.terminals import Coil, Terminals
from dialgen.circuit.transformer import CurrentTransformer, read_ratio
from dialgen.circuit.universal import UniversalShunt
from dialgen.errors import InputError
from dialgen.quantity import Amount


def behind(full, coil_a=1e-3, coil_ohm=75.0):
    """A coil before a linear scale that ends at ``full``."""
    coil = Coil(current=coil_a, resistance=coil_ohm)
    return Terminals(coil=coil, signal=lambda v: v, rest_signal=0.0, full_value=full, unit=None)


def amounts(unit, *values):
    """Several quantities."""
    return tuple(Amount(value, unit) for value in values)


def amount(unit, value):
    """One quantity."""
    return Amount(value, unit)


# 1 mA and 75 Ω: 10 A takes 7.5 mΩ, 10 V takes 9 925 Ω; 1, 5, 10 A take 7.5, 7.5 and 60 mΩ from the tap of
# the largest range outwards (each tap is 75.075 mV over its range), 1 and 10 V take 925 Ω and 9 kΩ more.
TEN_A, TEN_V = amount("A", 10.0), amount("V", 10.0)
SHUNTS = amounts("A", 1.0, 5.0, 10.0)
SLIPS = [
    (
        Shunt(range=TEN_A, built=amount("Ω", 7.5)),
        behind(10),
        ("built",),
        r"1000 times the designed 7\.501 mΩ",
    ),
    (Shunt(range=TEN_A, built=amount("Ω", 7.5e-6)), behind(10), ("built",), r"0\.001 times full deflection"),
    (
        CurrentTransformer(ratio=read_ratio("10/5"), built=amount("Ω", 15.0)),
        behind(10),
        ("built",),
        r"times the designed 15 mΩ",
    ),
    (Multiplier(range=TEN_V, built=amounts("Ω", 99.25)), behind(10), ("built",), r"designed 9\.925 kΩ"),
    (Multiplier(range=TEN_V, built=amounts("Ω", 99250.0)), behind(10), ("built",), r"10 times the designed"),
    (
        Multiplier(ranges=amounts("V", 1.0, 10.0), built=amounts("Ω", 925.0, 99250.0)),
        behind(1),
        ("built", 1),
        r"as built multiplier 10 V is 99\.25 kΩ",
    ),
    (
        Multiplier(ranges=amounts("V", 1.0, 10.0), chain=True, built=amounts("Ω", 9000.0, 925.0)),
        behind(10),
        ("built", 0),
        r"as built section 1 is 9 kΩ, .* order: the smallest range first",
    ),
    (
        UniversalShunt(ranges=SHUNTS, built=amounts("Ω", 60e-3, 7.5e-3, 7.5e-3)),
        behind(10),
        ("built", 2),
        r"as built section 3 is 7\.5 mΩ, .* order: from the tap of the largest range outwards",
    ),
    (Rectifier(range=TEN_V, built=amount("Ω", 100e3)), behind(10), ("built",), r"times the designed"),
]


@pytest.mark.parametrize(("circuit", "terminals", "key", "words"), SLIPS)
@pytest.mark.parametrize("way", ["stage", "design"])
def test_a_slip_in_built_is_refused_at_its_place(circuit, terminals, key, words, way):
    """A power of ten or a reversed list is told at what was built, beside the designed value."""
    with pytest.raises(InputError, match=words) as refusal:
        getattr(circuit, way)(terminals)
    assert refusal.value.keys[0] == key


OFF = [
    (Shunt(range=TEN_A, built=amount("Ω", 4.0e-3)), behind(10), ("built",)),
    (CurrentTransformer(ratio=read_ratio("10/5"), built=amount("Ω", 7e-3)), behind(10), ("built",)),
    (Multiplier(range=TEN_V, built=amounts("Ω", 20e3)), behind(10), ("built",)),
    (
        UniversalShunt(ranges=SHUNTS, built=amounts("Ω", 4e-3, 7.5e-3, 60e-3)),
        behind(10),
        ("built", 0),
    ),
]


@pytest.mark.parametrize(("circuit", "terminals", "key"), OFF)
def test_built_values_that_are_far_off_are_remarked(circuit, terminals, key):
    """Off by half or more, but by no power of ten, it is drawn as it is and said."""
    circuit.stage(terminals)
    (remark,) = circuit.remarks(terminals)
    assert remark.key == key
    assert "times the designed" in remark.message


@given(st.floats(0.7, 1.45))
def test_what_is_built_about_as_designed_is_silent(off):
    """As long as the reading is within a factor of one and a half, nothing is said."""
    circuits = [
        (Shunt(range=TEN_A, built=amount("Ω", 7.5e-3 * off)), behind(10)),
        (Multiplier(range=TEN_V, built=amounts("Ω", 9925.0 * off)), behind(10)),
        (
            UniversalShunt(ranges=SHUNTS, built=amounts("Ω", *(off * r for r in (7.5e-3, 7.5e-3, 60e-3)))),
            behind(5),
        ),
    ]
    assert [circuit.remarks(terminals) for circuit, terminals in circuits] == [()] * 3


@pytest.mark.parametrize("built", [None, 339.0])
def test_a_scale_that_runs_backwards_needs_a_range_only_until_it_is_built(built):
    """PH 0 to 14 is +414 mV to -414 mV: 414 Ω in all for 1 mA, given a range, or as built without one."""
    circuit = Multiplier(
        range=None if built else amount("V", 0.414), built=amounts("Ω", built) if built else ()
    )
    backwards = behind(-0.414)
    assert circuit.stage(backwards).forward(np.array([-0.414, 0.414])).tolist() == pytest.approx([-1.0, 1.0])
    assert circuit.design(backwards).range == 0.414
    assert circuit.remarks(backwards) == ()


IMPOSSIBLE = [
    (Shunt(range=amount("A", 0.5e-3), built=amount("Ω", 0.1)), behind(10), ("range",)),
    (UniversalShunt(ranges=amounts("A", 0.5e-3, 1.0), built=amounts("Ω", 1.0, 1.0)), behind(1), ("ranges",)),
    (
        CurrentTransformer(ratio=read_ratio("200/5"), range=amount("A", 0.01), built=amount("Ω", 1.0)),
        behind(0.01),
        ("range",),
    ),
    (Multiplier(range=amount("V", 50e-3), built=amounts("Ω", 10.0)), behind(1), ("range",)),
    (Multiplier(ranges=amounts("V", 50e-3, 10.0)), behind(10), ("ranges", 0)),
    (
        Multiplier(ranges=amounts("V", 50e-3, 10.0), built=amounts("Ω", 0.0, 9925.0)),
        behind(10),
        ("ranges", 0),
    ),
    (Rectifier(range=amount("V", 0.5), built=amount("Ω", 10.0)), behind(0.5), ("range",)),
]


@pytest.mark.parametrize(("circuit", "terminals", "key"), IMPOSSIBLE)
@pytest.mark.parametrize("way", ["stage", "design"])
def test_a_range_that_cannot_be_is_refused_whatever_was_built(circuit, terminals, key, way):
    """A face and a bill are refused alike where one of the ranges is below what the coil needs."""
    with pytest.raises(InputError, match=";") as refusal:
        getattr(circuit, way)(terminals)
    assert refusal.value.keys[0] == key


# --- bought parts over their ratings


def test_a_bought_shunt_over_its_rating_is_remarked():
    """Twice the current is four times the heat: 10 A in 15 mΩ are 1.5 W, 5 A were 0.375 W (Joule)."""
    circuit = Shunt(range=TEN_A, rated=read_rating("5 A/75 mV"))
    (remark,) = circuit.remarks(behind(10))
    assert remark.key == ("rated",)
    for words in ("carries 10 A of the 5 A", "4 times its heat", "1.5 W", "one for 10 A or more"):
        assert words in remark.message


@pytest.mark.parametrize("range_a", [20.0, 30.0, 40.0])
def test_a_bought_shunt_within_its_rating_is_silent(range_a):
    """Up to its rating a shunt may be used; for how much of it for good stands beside its rating."""
    circuit = Shunt(range=amount("A", range_a), rated=read_rating("40 A/160 mV"))
    assert circuit.remarks(behind(range_a)) == ()
    rated = next(fact for fact in circuit.design(behind(range_a)).facts if fact.name == "rated current")
    assert (rated.value, rated.unit) == (40.0, "A")
    # Two thirds of it (makers' data; reference values, section 7).
    assert "160 mV" in rated.note
    assert "26.7 A" in rated.note


def transformer(ratio, range_a):
    """What is remarked of a transformer's ratio."""
    circuit = CurrentTransformer(ratio=read_ratio(ratio), range=range_a and amount("A", range_a))
    return [(remark.key, remark.message) for remark in circuit.remarks(behind(40.0))]


def test_a_transformer_beyond_its_ratio_is_remarked():
    """40 A through 10/5 are 20 A in a secondary for 5 A; it is said at range, or at ratio without one."""
    for range_a, key in ((40.0, ("range",)), (None, ("ratio",))):
        ((at, message),) = transformer("10/5", range_a)
        assert at == key
        assert "secondary would give 20 A" in message
        assert "made for 5 A" in message


@pytest.mark.parametrize(("ratio", "turned"), [("5/200", "200/5"), ("1/30", "30/1"), ("10/8", "8/10")])
def test_a_transformer_typed_backwards_is_asked_about(ratio, turned):
    """No secondary is for more than 5 A, nor for more than its primary."""
    ((key, message),) = transformer(ratio, 40.0)
    assert key == ("ratio",)
    assert f'write ratio = "{turned}"' in message


@pytest.mark.parametrize(("ratio", "range_a"), [("40/5", 40.0), ("40/1", None), ("50/5", 60.0), ("5/5", 5.0)])
def test_a_transformer_within_its_ratio_is_silent(ratio, range_a):
    """Up to a fifth above its ratio, which transformers bear for good, nothing is said."""
    assert transformer(ratio, range_a) == []


# --- names


@pytest.mark.parametrize("written", ["Silicon", "silikon", "SILICON "])
def test_a_diode_nearly_named_is_guessed(written):
    """A capital or a letter wrong in a diode's name, and the name is offered."""
    with pytest.raises(ValueError, match=r'did you mean "silicon"\?$'):
        read_diode(written)


def test_a_rectifier_is_silent_about_what_was_built_as_designed():
    """The typical diode is all that is said of a multiplier built as it was designed."""
    plain = Rectifier(range=TEN_V, diode=SILICON)
    ohms = plain.design(behind(10)).parts[0].ohms
    made = Rectifier(range=TEN_V, diode=SILICON, built=amount("Ω", 1.01 * ohms))
    assert [remark.key for remark in made.remarks(behind(10))] == [("diode",)]
    assert float(made.stage(behind(10)).forward(np.array(10.0))) == pytest.approx(1 / 1.01, rel=1e-3)
