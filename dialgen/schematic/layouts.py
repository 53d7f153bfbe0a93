"""The table of pictures: how each kind of circuit is drawn."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from types import MappingProxyType

from dialgen.schematic.currents import current_transformer, direct, shunt, universal_shunt
from dialgen.schematic.ohmmeters import bridge, series_ohmmeter, shunt_ohmmeter
from dialgen.schematic.pieces import Pieces
from dialgen.schematic.rectifiers import rectifier
from dialgen.schematic.voltages import multiplier
from dialgen.schematic.wording import Plan

Layout = Callable[[Plan], Pieces]
"""Sets a design's parts; what it leaves out is set below the picture."""

LAYOUTS: Mapping[str, Layout] = MappingProxyType(
    {
        "direct": direct,
        "shunt": shunt,
        "universal shunt": universal_shunt,
        "current transformer": current_transformer,
        "multiplier": multiplier,
        "rectifier": rectifier,
        "series ohmmeter": series_ohmmeter,
        "shunt ohmmeter": shunt_ohmmeter,
        "bridge": bridge,
    }
)
