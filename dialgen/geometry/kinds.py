"""The table of laws: a row for each kind that a dial file may name."""

from __future__ import annotations

from dialgen.lazy import LoadedOnUse

LAWS = LoadedOnUse(
    "dialgen.geometry",
    {
        "linear": "laws:Linear",
        "power": "laws:Power",
        "decibel": "laws:Decibel",
        "logarithmic": "laws:Logarithmic",
        "reflection": "laws:Reflection",
        "thermocouple": "thermocouple:Thermocouple",
        "pt100": "pt100:Pt100",
        "thermistor": "thermistor:Thermistor",
        "nernst": "nernst:Nernst",
        "table": "points:Table",
        "formula": "formula:Formula",
        "observed": "points:Observed",
    },
)
