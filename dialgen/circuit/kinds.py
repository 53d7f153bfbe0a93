"""The table of circuits: a row for each kind that a dial file may name."""

from __future__ import annotations

from typing import Any

from dialgen.circuit.bridge import Bridge
from dialgen.circuit.direct import Direct
from dialgen.circuit.multiplier import Multiplier
from dialgen.circuit.ohmmeter import SeriesOhmmeter, ShuntOhmmeter
from dialgen.circuit.rectifier import Rectifier
from dialgen.circuit.shunt import Shunt
from dialgen.circuit.transformer import CurrentTransformer
from dialgen.circuit.universal import UniversalShunt

CIRCUITS: dict[str, type[Any]] = {
    circuit.kind: circuit
    for circuit in (
        Direct,
        Shunt,
        UniversalShunt,
        CurrentTransformer,
        Multiplier,
        Rectifier,
        SeriesOhmmeter,
        ShuntOhmmeter,
        Bridge,
    )
}
