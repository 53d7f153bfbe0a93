"""The table of laws: a row for each kind that a dial file may name."""

from __future__ import annotations

from dialgen.geometry.formula import Formula
from dialgen.geometry.laws import Decibel, Linear, Logarithmic, Power, Reflection
from dialgen.geometry.nernst import Nernst
from dialgen.geometry.points import Observed, Table
from dialgen.geometry.pt100 import Pt100
from dialgen.geometry.thermistor import Thermistor
from dialgen.geometry.thermocouple import Thermocouple

LAWS: dict[str, type] = {
    law.kind: law
    for law in (
        *(Linear, Power, Decibel, Logarithmic, Reflection),
        *(Thermocouple, Pt100, Thermistor, Nernst),
        *(Table, Formula, Observed),
    )
}
