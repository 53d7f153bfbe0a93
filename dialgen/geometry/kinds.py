"""The table of laws: a row for each kind that a dial file may name."""

from __future__ import annotations

from dialgen.geometry.formula import Formula
from dialgen.geometry.laws import Decibel, Linear, Logarithmic, Power, Reflection
from dialgen.geometry.points import Observed, Table

LAWS: dict[str, type] = {
    law.kind: law for law in (Linear, Power, Decibel, Logarithmic, Reflection, Table, Formula, Observed)
}
