"""The table of circuits: a row for each kind that a dial file may name."""

from __future__ import annotations

from dialgen.lazy import LoadedOnUse

CIRCUITS = LoadedOnUse(
    "dialgen.circuit",
    {
        "direct": "direct:Direct",
        "shunt": "shunt:Shunt",
        "universal shunt": "universal:UniversalShunt",
        "current transformer": "transformer:CurrentTransformer",
        "multiplier": "multiplier:Multiplier",
        "rectifier": "rectifiers.rectifier:Rectifier",
        "series ohmmeter": "ohmmeters.ohmmeter:SeriesOhmmeter",
        "shunt ohmmeter": "ohmmeters.ohmmeter:ShuntOhmmeter",
        "bridge": "bridge:Bridge",
    },
)
