"""Current transformers: the ampere-turns law, and the shunt behind them by Kirchhoff."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from kirchhoff import coil_current

from dialgen.circuit.terminals import Coil, Terminals
from dialgen.circuit.transformer import CurrentTransformer, read_ratio
from dialgen.errors import InputError
from dialgen.quantity import Amount


def behind(coil_a, coil_ohm, full):
    """A coil before a scale that ends at ``full``."""
    return Terminals(
        coil=Coil(current=coil_a, resistance=coil_ohm),
        signal=lambda v: v,
        rest_signal=0.0,
        full_value=full,
        unit="A",
    )


@given(
    st.floats(1e-3, 1.0),
    st.floats(0.05, 500.0),
    st.sampled_from(("200/5", "100 / 1", "30A/5A", "4/500")),
    st.floats(1.01, 50.0),
    st.floats(0.0, 1.2),
)
def test_secondary_current_divides_between_shunt_and_coil(coil_a, coil_ohm, ratio, widening, share):
    """The secondary carries primary·secondary turns, and the coil its share of that by nodal analysis."""
    primary, secondary = (float(part.strip().removesuffix("A")) for part in ratio.split("/"))
    range_a = widening * coil_a * primary / secondary
    circuit = CurrentTransformer(
        ratio=read_ratio(ratio), range=Amount(range_a, "A"), swamp=Amount(0.3 * coil_ohm, "Ω")
    )
    terminals = behind(coil_a, coil_ohm, range_a)
    design = circuit.design(terminals)
    shunt_ohm = design.parts[0].ohms
    brought_a = share * range_a * secondary / primary
    coil = (1, 0, 1.0 / (1.3 * coil_ohm))
    drive = coil_current([(1, 0, 1.0 / shunt_ohm), coil], [(1, brought_a)], coil) / coil_a
    assert drive == pytest.approx(share, rel=1e-9)
    stage = circuit.stage(terminals)
    assert float(stage.forward(np.array(share * range_a))) == pytest.approx(drive, rel=1e-9)
    assert design.cases[0].work(design.ohms, share * range_a).drive == pytest.approx(drive, rel=1e-9)


def test_a_five_ampere_movement_takes_the_secondary_directly():
    """A 200/5 transformer and a 5 A movement for 200 A need no shunt, nor the coil's resistance."""
    circuit = CurrentTransformer(ratio=read_ratio("200/5"))
    design = circuit.design(behind(5.0, None, 200.0))
    assert design.parts == ()
    stage = circuit.stage(behind(5.0, None, 200.0))
    assert float(stage.forward(np.array(150.0))) == pytest.approx(0.75, rel=1e-12)


def test_the_burden_is_the_apparent_power_at_the_secondary_rating():
    """5 A through 0.05 Ω of shunt and coil together is 1.25 VA (current squared times resistance)."""
    circuit = CurrentTransformer(ratio=read_ratio("200/5"))
    design = circuit.design(behind(0.1, 2.5, 200.0))
    # 0.1 A in 2.5 Ω drops 0.25 V at 5 A: 0.05 Ω in all.
    burden = next(fact for fact in design.facts if fact.name == "burden")
    assert (burden.value, burden.unit) == (pytest.approx(1.25, rel=1e-9), "VA")


def test_a_secondary_below_the_movements_own_current_is_refused():
    """At 100 A a 200/5 transformer gives 2.5 A, which cannot drive a 5 A movement fully."""
    circuit = CurrentTransformer(ratio=read_ratio("200/5"), range=Amount(100.0, "A"))
    with pytest.raises(InputError, match=r"gives 2\.5 A, .* range of 200 A or more") as refusal:
        circuit.stage(behind(5.0, 0.05, 100.0))
    assert refusal.value.keys[0] == ("range",)


@pytest.mark.parametrize("text", [200, "200", "200/", "200/5/1", "200 V/5 A", "-200/5", "200/0", "2,5/1"])
def test_what_is_not_a_ratio_is_refused(text):
    """A ratio is two positive numbers of amperes, and is told how to be written."""
    with pytest.raises(ValueError, match='for example "200/5"'):
        read_ratio(text)
