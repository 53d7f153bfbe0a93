"""A design assessed for the bench: what every part carries, what to buy, and how good it then is.

All of it is the same circuit worked again, at another signal or with one value changed.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass

from dialgen.circuit.design import Design, Part, Working
from dialgen.parts.bench import Bench
from dialgen.parts.drift import Drift, drifts
from dialgen.parts.fits import Fit, Fitting, Together, fitting
from dialgen.parts.ratings import rating_w
from dialgen.parts.worked import Worked, largest, worked

_STEP = 1e-4


@dataclass(frozen=True, slots=True, kw_only=True)
class Carried:
    """What a part carries; a whole made up of others has only its heat, as they differ in current."""

    watts: float
    current_a: float | None = None
    voltage_v: float | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class PartAssessed:
    """One part.

    Args:
        part: the part.
        case: the range in which it carries most.
        full: what it carries there at full scale.
        overload: the same at the overload; None where there is no such thing, as in an ohmmeter.
        rating_w: the power rating to buy.
        sensitivity: percent of the coil's current at full scale for one percent of the part, of the worst
            range; None for a whole made up of others, and for what is set and not made to a value.
        fits: the nearest value of every series shown; none for what the file gives.
    """

    part: Part
    case: str
    full: Carried
    overload: Carried | None
    rating_w: float
    sensitivity: float | None
    fits: tuple[Fit, ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class CaseAssessed:
    """One range at full scale.

    Args:
        name: the range.
        signal: that of full scale.
        drop_v: the voltage across the terminals.
        input_ohm: that voltage over the current taken, a transformer's at its secondary; None for an
            ohmmeter, or where the coil's resistance is not known.
        ohms_per_volt: a voltmeter's input resistance over its range.
        watts: what all resistances dissipate together, the coil's too.
    """

    name: str
    signal: float
    drop_v: float
    input_ohm: float | None
    ohms_per_volt: float | None
    watts: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Assessment:
    """A design assessed: its parts and ranges in its own order."""

    bench: Bench
    parts: tuple[PartAssessed, ...]
    cases: tuple[CaseAssessed, ...]
    together: tuple[Together, ...]
    drifts: tuple[Drift, ...]


def assess(design: Design, bench: Bench | None = None) -> Assessment:
    """Return what the bench wants to know of a design."""
    by = bench or Bench()
    ranges = [_Range(each, _overloaded(design, each, by.overload)) for each in worked(design)]
    fitted = [
        fitting(design, [each.at for each in ranges], series, by.tolerance_of(series)) for series in by.shown
    ]
    return Assessment(
        bench=by,
        parts=tuple(_part(part, ranges, fitted, by) for part in design.parts),
        cases=tuple(_case(each, design.unit) for each in ranges),
        together=tuple(all_at_once for each in fitted for all_at_once in each.together()),
        drifts=drifts(design, by.materials),
    )


@dataclass(frozen=True, slots=True, eq=False)
class _Range:
    at: Worked
    overload: Working | None


def _overloaded(design: Design, at: Worked, times: float) -> Working | None:
    """Return the range at the overload: of current or voltage, as ohms cannot be overdone."""
    signal = at.case.signal
    if design.unit not in _INPUT or not 0 < abs(signal) < math.inf:
        return None
    return at.case.work(design.ohms, signal * times)


def _part(part: Part, ranges: Sequence[_Range], fitted: Sequence[Fitting], bench: Bench) -> PartAssessed:
    names = part.sums or (part.name,)
    having = [each for each in ranges if all(each.at.has(name) for name in names)]
    carried = [(each, _carried(names, each.at.full)) for each in having]
    nowhere: tuple[_Range | None, Carried] = (None, Carried(watts=0.0, current_a=0.0, voltage_v=0.0))
    worst, full = max(carried, key=lambda pair: pair[1].watts, default=nowhere)
    return PartAssessed(
        part=part,
        case=worst.at.case.name if worst else "",
        full=full,
        overload=_carried(names, worst.overload) if worst and worst.overload else None,
        rating_w=rating_w(full.watts, bench.margin),
        sensitivity=_sensitivity(part, [each.at for each in having]),
        fits=tuple(each.fit(part.name) for each in fitted) if part.is_made else (),
    )


def _carried(names: Sequence[str], working: Working) -> Carried:
    loads = [working.loads[name] for name in names]
    if len(loads) > 1:
        return Carried(watts=sum(load.watts for load in loads))
    load = loads[0]
    return Carried(watts=load.watts, current_a=abs(load.current_a), voltage_v=abs(load.voltage_v))


def _sensitivity(part: Part, ranges: Sequence[Worked]) -> float | None:
    if part.sums or part.adjustable or not 0 < part.ohms < math.inf:
        return None
    return largest([_slope(part, each) for each in ranges])


def _slope(part: Part, at: Worked) -> float:
    up, down = (at.error_percent({part.name: part.ohms * (1.0 + step)}) for step in (_STEP, -_STEP))
    return (up - down) / (200.0 * _STEP)


def _case(each: _Range, unit: str) -> CaseAssessed:
    working, signal = each.at.full, each.at.case.signal
    input_ohm = _INPUT[unit](working) if unit in _INPUT else None
    return CaseAssessed(
        name=each.at.case.name,
        signal=signal,
        drop_v=working.drop_v,
        input_ohm=input_ohm,
        ohms_per_volt=input_ohm / abs(signal) if input_ohm is not None and unit == "V" else None,
        watts=_watts(working),
    )


def _watts(working: Working) -> float:
    return sum(load.watts for load in working.loads.values())


def _ammeter_ohm(working: Working) -> float | None:
    """Return U²/P; all that an ammeter's terminals take becomes heat in it."""
    watts = _watts(working)
    return working.drop_v**2 / watts if watts else None


def _voltmeter_ohm(working: Working) -> float | None:
    """Return U/I; all that comes in goes through the multiplier, and nowhere flows more.

    Not U²/P, as a diode or a suppressed zero takes its share of the voltage.
    """
    current_a = max((abs(load.current_a) for load in working.loads.values()), default=0.0)
    return working.drop_v / current_a if current_a else None


_INPUT: Mapping[str, Callable[[Working], float | None]] = {"A": _ammeter_ohm, "V": _voltmeter_ohm}
"""The input resistance by the unit of the signal; an ohmmeter has none to speak of."""
