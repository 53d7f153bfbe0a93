"""Everything the bench is told of one circuit, put together."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from dialgen.circuit.design import Design, Part
from dialgen.errors import InputError
from dialgen.parts.assessed import Assessment, assess
from dialgen.parts.bench import Bench
from dialgen.parts.caution.cautions import Caution, cautions, split_count
from dialgen.parts.caution.situation import Situation, situation_of
from dialgen.parts.drift import NoSwamping, Swamping, swamping
from dialgen.parts.stock.search import Progress, Search, search
from dialgen.parts.trimming import Trim, trims
from dialgen.parts.wire.winding import Winding, wound
from dialgen.parts.worked import Worked, worked

Reswamped = Callable[[float], Design]


@dataclass(frozen=True, slots=True, kw_only=True)
class Split:
    """One resistor made of several in series, so that none has more than its rated voltage."""

    part: str
    count: int
    ohms: float
    voltage_v: float


@dataclass(frozen=True, slots=True, kw_only=True, eq=False)
class Bill:
    """Everything the bench is told of one circuit.

    Args:
        design: the circuit; above 1 kV nothing is told of it but the cautions.
        assessment: what its parts carry, and how good they are.
        trims: parts as built, and their cures.
        splits: resistors to be made of several for their voltage.
        searches: what the drawer gives for a part, by its name.
        windings: what it takes of each wire, by the part's name.
        swamping: a resistor for the wanted drift, or why none helps.
        cautions: what to beware of.
    """

    design: Design
    assessment: Assessment | None
    trims: tuple[Trim, ...] = ()
    splits: tuple[Split, ...] = ()
    searches: tuple[tuple[str, Search], ...] = ()
    windings: tuple[tuple[str, Winding], ...] = ()
    swamping: Swamping | NoSwamping | None = None
    cautions: tuple[Caution, ...] = ()


def bill(
    design: Design,
    bench: Bench,
    movement: str,
    *,
    reswamped: Reswamped | None = None,
    progress: Callable[[str], Progress] | None = None,
) -> Bill:
    """Return what the bench is told of a circuit.

    Args:
        design: the circuit.
        bench: what the maker has.
        movement: the movement's kind.
        reswamped: the circuit designed with another swamping resistor, where it takes one.
        progress: given a part's name, what is told of the search for it in the drawer.

    Raises:
        InputError: a wanted drift that no resistor brings; its key is "drift".
    """
    situation = situation_of(design, movement, bench.voltage_v)
    heeded = cautions(situation)
    if situation.beyond_help:
        return Bill(design=design, assessment=None, cautions=heeded)
    assessment = assess(design, bench)
    made = [part for part in assessment.parts if part.part.is_made]
    return Bill(
        design=design,
        assessment=assessment,
        trims=trims(design),
        splits=splits_of(design, situation),
        searches=tuple(
            (
                each.part.name,
                search(each.part.ohms, bench.lots, progress=progress and progress(each.part.name)),
            )
            for each in made
            if bench.lots
        ),
        windings=tuple(
            (each.part.name, wound(each.part.ohms, current_a, wire))
            for each in made
            if (current_a := each.full.current_a) is not None
            for wire in bench.wires
        ),
        swamping=_swamping(design, reswamped, bench),
        cautions=heeded,
    )


def splits_of(design: Design, situation: Situation) -> tuple[Split, ...]:
    """Return the resistors to be made of several for their voltage; none of what is no voltmeter."""
    if situation.takes != "V":
        return ()
    ranges = worked(design)
    found = [_split(part, _most_v(part, ranges), situation) for part in design.parts if part.is_made]
    return tuple(each for each in found if each.count > 1)


def _most_v(part: Part, ranges: Sequence[Worked]) -> float:
    """Return the voltage over a part in the range in which it has most."""
    return max(
        (abs(each.full.loads[part.name].voltage_v) for each in ranges if each.has(part.name)), default=0.0
    )


def _split(part: Part, voltage_v: float, situation: Situation) -> Split:
    peak_v = voltage_v * situation.peak_factor
    if situation.alternating:
        peak_v = max(peak_v, situation.resistor_peak_v)
    count = split_count(peak_v, situation.resistor_rating_v)
    return Split(part=part.name, count=count, ohms=part.ohms / count, voltage_v=peak_v / count)


def _swamping(design: Design, reswamped: Reswamped | None, bench: Bench) -> Swamping | NoSwamping | None:
    wanted = bench.drift_wanted_percent_per_k
    if wanted is None or reswamped is None:
        return None
    try:
        return swamping(design, reswamped, wanted, bench.materials)
    except InputError as error:
        raise InputError(error.message, ("parts", "drift")) from None
