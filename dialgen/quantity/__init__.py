"""Values with units, in and out.

Electrical values come as text with a unit ("50 uA", "75 Ω", "4k7"), so that nobody has to guess
what a bare 50 meant.  Everything is read by hand and to the letter: the libraries probed for it
take "1,5 V" for 15 V and "4k7" for 4 of unit k7 without complaint.
"""

from dialgen.quantity.notes import Listed, Number, Written
from dialgen.quantity.reading import (
    AMPERE,
    ANY_CURRENT,
    OHM,
    OHM_ABOVE,
    SIGNAL,
    SIGNAL_ABOVE,
    VOLT,
    VOLT_ABOVE,
    Amount,
    Measure,
    bare_number,
    read_length,
    read_number,
)
from dialgen.quantity.showing import engineered, in_figures, plain_number, shown
from dialgen.quantity.temperature import TEMPERATURE, ZERO_CELSIUS_K, meant_degree
from dialgen.quantity.units import folded_unit, shown_unit, split_unit

__all__ = [
    "AMPERE",
    "ANY_CURRENT",
    "OHM",
    "OHM_ABOVE",
    "SIGNAL",
    "SIGNAL_ABOVE",
    "TEMPERATURE",
    "VOLT",
    "VOLT_ABOVE",
    "ZERO_CELSIUS_K",
    "Amount",
    "Listed",
    "Measure",
    "Number",
    "Written",
    "bare_number",
    "engineered",
    "folded_unit", "in_figures",
    "meant_degree",
    "plain_number",
    "read_length",
    "read_number",
    "shown",
    "shown_unit",
    "split_unit",
]  # fmt: skip
