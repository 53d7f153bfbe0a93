"""What numerals say: signs, decimal signs, thousands, folded prefixes, further rows."""

from __future__ import annotations

import math
import re

import pytest
from hypothesis import given
from hypothesis import strategies as st

from dialgen.dialfile.models import Scale
from dialgen.face.ruled.captions import Caption, captions
from dialgen.looks import Decimal, Look
from dialgen.quantity import folded_unit

THIN = "\u202f"


def scale(**keys: object) -> Scale:
    """Return a scale with a line to stand on."""
    return Scale.model_validate({"unit": "A", "from": 0, "to": 40, "radius": 44} | keys)


def only(made: Scale, look: Look = Look(), largest: float = 40.0) -> Caption:  # noqa: B008  (frozen)
    """Return how the scale's own numerals are written."""
    return captions(made, look, largest)[0]


def test_signs_always_gives_plus_to_what_is_above_zero_alone() -> None:
    """With sign = "always" +3 and −3 have signs and 0 has none."""
    made = only(scale(unit="dB", **{"from": -20, "to": 3}, sign="always"))
    assert [made.text(v) for v in (-20.0, 0.0, 3.0)] == ["−20", "0", "+3"]


def test_minus_alone_is_the_default() -> None:
    """Without the key no plus sign is drawn."""
    assert only(scale()).text(3.0) == "3"


def test_decimal_comma() -> None:
    """The decimal sign is the look's; nothing else of the number changes."""
    made = only(scale(), Look(decimal=Decimal.COMMA))
    assert [made.text(v) for v in (0.5, -1.25, 10.0)] == ["0,5", "−1,25", "10"]


def test_thousands_are_parted_from_five_digits_on() -> None:
    """ISO 80000-1: groups of three, four digits may stand together; decimals are left alone."""
    made = only(scale(unit="rpm", to=2_000_000))
    texts = [made.text(v) for v in (1000.0, 12_000.0, -250_000.0, 2e6, 12_345.25)]
    assert texts == ["1000", f"12{THIN}000", f"−250{THIN}000", f"2{THIN}000{THIN}000", f"12{THIN}345.25"]


def test_thousands_can_be_left_together() -> None:
    """``thousands = false`` leaves the digits together."""
    assert only(scale(unit="rpm", to=30_000), Look(thousands=False)).text(30_000.0) == "30000"


@given(st.floats(-1e9, 1e9).map(lambda v: float(f"{v:.6g}")))
def test_a_numeral_says_its_value(value: float) -> None:
    """Spaces taken out and the minus and comma put back, every numeral is the number it stands for."""
    made = only(scale(unit="rpm", sign="always"), Look(decimal=Decimal.COMMA))
    text = made.text(value).replace(THIN, "").replace("−", "-").replace(",", ".")
    assert float(text) == pytest.approx(value, rel=1e-12, abs=0)


@pytest.mark.parametrize(
    ("unit", "end", "printed", "last"),
    [
        ("Ω", 50_000, "kΩ", "50"),
        ("ohm", 2_000_000, "MΩ", "2"),
        ("mV", 60_000, "V", "60"),
        ("A", 0.0005, "µA", "500"),
        ("A", 40, "A", "40"),
        ("V", 1000, "V", "1000"),
        ("rpm", 30_000, "rpm", f"30{THIN}000"),
        ("Pa", 20_000, "Pa", f"20{THIN}000"),
    ],
)
def test_prefix_is_folded_where_the_range_asks_for_it(unit: str, end: float, printed: str, last: str) -> None:
    """Five digits or hundredths fold an SI prefix into a unit that takes one, and no other."""
    made = only(scale(unit=unit, to=end), largest=end)
    assert (made.unit, made.text(float(end))) == (printed, last)


def test_folding_can_be_left() -> None:
    """``fold = false`` keeps the unit as the file has it."""
    made = only(scale(unit="Ω", to=50_000), Look(fold=False, thousands=False), largest=50_000.0)
    assert (made.unit, made.text(50_000.0)) == ("Ω", "50000")


def test_a_scale_without_end_folds_by_its_middle() -> None:
    """A scale to infinity folds by the value it is given for it, and keeps its ∞."""
    made = only(scale(unit="Ω", to=math.inf), largest=15_000.0)
    assert (made.unit, made.text(15_000.0), made.text(math.inf)) == ("kΩ", "15", "∞")


@given(st.sampled_from(["Ω", "mV", "kW", "uA", "A", "Hz"]), st.floats(1e-12, 1e12))
def test_folding_keeps_the_quantity(unit: str, largest: float) -> None:
    """Value times factor in the printed unit is the quantity it was."""
    powers = {"": 0, "n": -9, "µ": -6, "u": -6, "m": -3, "k": 3, "M": 6, "G": 9}
    factor, printed = folded_unit(unit, largest)
    base = re.sub("^[numkµMG](?=[ΩVWAH])", "", printed)
    own, new = (powers[text[: len(text) - len(base)]] for text in (unit, printed))
    assert factor * 10.0**new == pytest.approx(10.0**own, rel=1e-12)


def test_further_rows_say_the_value_times_their_factor() -> None:
    """A row times 5 in mA stands for five times the value, folded and signed by itself."""
    rows = captions(scale(also=[{"times": 5}, {"times": 0.1, "unit": "kV"}]), Look(), 40.0)
    assert [row.text(40.0) for row in rows] == ["40", "200", "4"]
    assert [row.unit for row in rows] == ["A", "A", "kV"]


def test_a_row_is_written_in_the_unit_it_names() -> None:
    """40 A in a row times 1000 of mA is lettered 40 000 mA, not folded back to 40 A."""
    (_, row) = captions(scale(also=[{"times": 1000, "unit": "mA"}]), Look(), 40.0)
    assert (row.text(40.0).replace("\N{NARROW NO-BREAK SPACE}", " "), row.unit) == ("40 000", "mA")


def test_tenths_come_out_exact() -> None:
    """3 times 0.1 is lettered 0.3."""
    (_, row) = captions(scale(also=[{"times": 0.1}]), Look(), 40.0)
    assert row.text(3.0) == "0.3"
