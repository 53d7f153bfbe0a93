"""The diodes of a rectifier instrument, as a dial file describes them."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from difflib import get_close_matches

from dialgen.circuit.rectifiers.conduction import Ideal, Junction, Threshold
from dialgen.circuit.rectifiers.junction import Exponential
from dialgen.quantity import AMPERE, OHM, Measure, Written, engineered, read_number, shown

TYPICAL: Mapping[str, Exponential] = {
    "silicon": Exponential(2.5e-9, 1.75, 0.6),
    "germanium": Exponential(1e-6, 1.2, 8.0),
    "schottky": Exponential(200e-9, 1.05, 5.0),
    "copper oxide": Exponential(5e-6, 2.0, 100.0),
}
"""What such diodes are like, from memory: single specimens differ much."""

_DROP = Measure("voltage", ("V",), "0.7 V", least=0.0)
_LEAST_IDEALITY, _MOST_IDEALITY = 0.5, 100.0
_NAMES = ", ".join(f'"{name}"' for name in (*TYPICAL, "ideal"))
_EXAMPLE = (
    'diode = { saturation = "2.5 nA", ideality = 1.75, resistance = "0.6 ohm" }, or { drop = "0.7 V" }, '
    f"or one of {_NAMES}"
)


@dataclass(frozen=True, slots=True)
class Diode:
    """A diode.

    Args:
        junction: how it conducts.
        typical: the name by which its figures were assumed; empty where they are known.
    """

    junction: Junction
    typical: str = ""

    @property
    def described(self) -> str:
        """Its figures in a row, as a message gives them."""
        return ", ".join(
            f"{name.removeprefix('diode ')} {engineered(value, unit).strip()}"
            for name, value, unit in self.junction.figures
        )


ASSUMED: Mapping[str, Diode] = {name: Diode(junction, name) for name, junction in TYPICAL.items()}
SILICON = ASSUMED["silicon"]

_NAMED: Mapping[str, Diode] = {**ASSUMED, "ideal": Diode(Ideal())}


def read_diode(given: object) -> Diode:
    """Return the diode that a dial file gives: a table of figures, a drop alone, or a name.

    Raises:
        ValueError: it is none of these, a figure is missing or wrong, or the name is not known.

    >>> read_diode({"drop": "0.7 V"}).junction
    Threshold(drop=0.7)
    """
    if isinstance(given, dict):
        return Diode(_by_drop(given) if "drop" in given else _by_figures(given))
    if not isinstance(given, str):
        raise ValueError(f"a diode is a name or a table, not {shown(given)}; write for example {_EXAMPLE}")
    if given not in _NAMED:
        raise ValueError(f"{shown(given)} is not a diode known here; {_name_mend(given)}")
    return _NAMED[given]


DIODE = Written(read_diode, '"silicon"')


def _name_mend(given: str) -> str:
    near = get_close_matches(given.strip().lower(), _NAMED, n=1)
    return f'did you mean "{near[0]}"?' if near else f"write for example {_EXAMPLE}"


def _by_drop(given: Mapping[str, object]) -> Junction:
    _check_keys(given, ("drop",))
    drop_v = _DROP.read(given["drop"]).value
    return Threshold(drop_v) if drop_v else Ideal()


def _by_figures(given: Mapping[str, object]) -> Junction:
    _check_keys(given, ("saturation", "ideality", "resistance"))
    if missing := [name for name in ("saturation", "ideality") if name not in given]:
        raise ValueError(f"this diode has no {' and no '.join(missing)}; write for example {_EXAMPLE}")
    ideality = read_number(given["ideality"], "ideality")
    if not _LEAST_IDEALITY <= ideality <= _MOST_IDEALITY:
        raise ValueError(
            f"ideality of {ideality:g} is out of bounds; a junction has 1 to 2, a stack of several their sum"
        )
    return Exponential(
        AMPERE.read(given["saturation"]).value, ideality, OHM.read(given.get("resistance", "0 ohm")).value
    )


def _check_keys(given: Mapping[str, object], known: tuple[str, ...]) -> None:
    if strange := [name for name in given if name not in known]:
        raise ValueError(f"{strange[0]} is not a key of such a diode; write for example {_EXAMPLE}")
