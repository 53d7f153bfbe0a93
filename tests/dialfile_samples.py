"""Good dial files for the tests to break, and a writer of TOML to write the broken ones with."""

from __future__ import annotations

import copy
import math
import tomllib
from collections.abc import Iterator

SHUNT = """\
dialgen = 1

[dial]
name = "House battery, port bank"
serial = "PB-07"

[movement]
kind = "moving coil"
current = "1 mA"
resistance = "75 ohm"
rest = -44.0
full = 44.0
stops = [-49.0, 49.0]
response = "linear"
pointer = 50.0

[[movement.reading]]
current = "0.25 mA"
angle = -22.4
[[movement.reading]]
value = 30.0
old = 74.1
direction = "up"
[movement.old]
rest = 0
full = 100

[circuit]
kind = "shunt"
range = "40 A"
built = "1.885 mohm"

[[scale]]
unit = "A"
from = 0
to = 40
law = "linear"
radius = 44.0
centre = [0, 0]
numbered = [0, 10, 20, 30, 40]
divisions = "auto"
marks = "outward"
numerals = "outside"

[plate]
size = [84, 64]
pivot = [42, 12]
corner = 2
hole = [{ at = [-32, -4], diameter = 3.2 }, { at = [32, -4], diameter = 3.2 }]

[[text]]
say = "50 mV shunt"
at = [0, 8]
height = 2.2
"""

OHMS_AND_VOLTS = """\
dialgen = 1
[movement]
current = "50 uA"
resistance = "2 kohm"
rest = -45
full = 45
stops = [-50, 50]
response = { points = [[0, 0], [0.4, 0.37], [1, 1]] }
[[scale]]
unit = "kohm"
from = 0
to = inf
circuit = { kind = "series ohmmeter", half = "30 kohm", battery = "3 V" }
radius = 60
numbered = [0, 5, 10, 20, 50, 100, { at = inf, label = "open" }]
[[scale]]
unit = "V"
from = 0
to = 10
circuit = { kind = "multiplier", range = "10 V", line = "10 ohm" }
radius = 50
numbered = { every = 2 }
divisions = [{ to = 4, every = 0.5 }, { to = 10, every = 1 }]
[[scale.reading]]
value = 5
angle = 0.4
[[scale]]
unit = "dB"
from = -20
to = 3
law = { kind = "decibel", reference = "5 V" }
circuit = { kind = "multiplier", range = "10 V" }
radius = 40
numerals = "inside"
marks = "across"
[plate]
diameter = 150
pivot = [75, 40]
window = { at = [0, 40], size = [120, 60], corner = 3 }
"""

EDGEWISE = """\
dialgen = 1
[movement]
rest = 30
full = -30
response = { power = 1.8 }
[[scale]]
unit = "W"
from = 0
to = 50
law = { kind = "table", points = [[0, "0 mV"], [20, "4 mV"], [50, "9 mV"]] }
circuit = { kind = "direct", full = 50, rest = 0 }
line = [[-40, 60], [40, 60]]
square = true
gap = 1.2
[[scale]]
unit = "%"
from = 0
to = 100
law = { kind = "formula", signal = "x/100 + x**2/20000" }
line = [[-40, 50], [40, 52]]
curve = 55
[[scale]]
unit = "min"
from = 1
to = 60
law = "logarithmic"
line = [[-40, 40], [40, 40]]
[[scale]]
unit = ""
from = 0
to = 5
law = { kind = "observed", points = [[0, 30], [2, 10], [5, -25]] }
line = [[-40, 30], [40, 30]]
[plate]
size = [120, 90]
pivot = [60, 10]
[[text]]
say = "RELAY 7 · µΩ"
at = [0, 8]
"""

GOOD = {"shunt": SHUNT, "ohms and volts": OHMS_AND_VOLTS, "edgewise": EDGEWISE}

Path = tuple[str | int, ...]


def toml(tables: dict[str, object]) -> str:
    """Return the TOML text of some tables, each top-level key on a line of its own."""
    return "".join(f"{_key(k)} = {_value(v)}\n" for k, v in tables.items())


def paths(value: object, prefix: Path = ()) -> Iterator[Path]:
    """Yield the path of every key and list item below ``value``."""
    items = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    for key, inner in items:
        yield (*prefix, key)
        yield from paths(inner, (*prefix, key))


def at(tables: object, path: Path) -> object:
    """Return what stands at a path."""
    for key in path:
        tables = tables[key]  # type: ignore[index]
    return tables


def replaced(tables: dict[str, object], path: Path, value: object) -> dict[str, object]:
    """Return the tables with another value at a path."""
    made = copy.deepcopy(tables)
    at(made, path[:-1])[path[-1]] = copy.deepcopy(value)  # type: ignore[index]
    return made


def removed(tables: dict[str, object], path: Path) -> dict[str, object]:
    """Return the tables without what stands at a path."""
    made = copy.deepcopy(tables)
    del at(made, path[:-1])[path[-1]]  # type: ignore[attr-defined]
    return made


def tables_of(name: str) -> dict[str, object]:
    """Return the tables of a good dial file."""
    return tomllib.loads(GOOD[name])


def _key(key: str) -> str:
    return _text(key)


def _value(value: object) -> str:
    match value:
        case bool():
            return str(value).lower()
        case str():
            return _text(value)
        case float() if not math.isfinite(value):
            return "nan" if math.isnan(value) else "inf" if value > 0 else "-inf"
        case dict():
            return "{" + ", ".join(f"{_key(k)} = {_value(v)}" for k, v in value.items()) + "}"
        case list():
            return "[" + ", ".join(map(_value, value)) + "]"
    return repr(value)


def _text(text: str) -> str:
    return '"' + "".join(_character(c) for c in text) + '"'


def _character(c: str) -> str:
    plain = c.isprintable() and c not in '"\\'
    return c if plain else f"\\u{ord(c):04X}" if ord(c) < 0x10000 else f"\\U{ord(c):08X}"
