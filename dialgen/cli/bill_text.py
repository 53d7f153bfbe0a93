"""The bill of a circuit in words and columns, as it is laid on the bench."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence

from dialgen.circuit.design import Design, Fact
from dialgen.cli.bill_making import MAKING
from dialgen.cli.columns import columns, listed, percent, table, wrapped
from dialgen.parts.assessed import Assessment, Carried, CaseAssessed, PartAssessed
from dialgen.parts.bill import Bill
from dialgen.parts.caution.cautions import CAUTIONS
from dialgen.parts.fits import Together, is_bought, is_there, is_wound
from dialgen.parts.preferred import LEAST_BOUGHT_OHM
from dialgen.quantity import engineered, in_figures, plain_number

_PREFIXED = ("A", "V", "Ω", "W", "Ω/V")


def heading(design: Design, serves: str) -> str:
    """Return the line that stands over a circuit's bill: its kind, its ranges, and what it serves."""
    return f"{design.kind}{_size(design)} ({serves})"


def is_mute(bill: Bill) -> bool:
    """Return whether there is nothing to tell of a circuit but its cautions."""
    return bill.assessment is not None and not (bill.design.parts or bill.design.cases or bill.design.facts)


def bill_lines(bill: Bill) -> Iterator[str]:
    """Yield the lines of one circuit's bill, its sections parted by empty ones."""
    for section in _SECTIONS:
        if lines := list(section(bill)):
            yield ""
            yield from lines


def closing_lines(bills: Sequence[Bill]) -> Iterator[str]:
    """Yield what goes for all circuits: how to read the columns, and the cautions, gravest first."""
    assessments = [bill.assessment for bill in bills if bill.assessment and bill.assessment.cases]
    if assessments:
        yield "How to read it"
        cases = [case for bill in bills for case in bill.design.cases]
        for note in _notes(assessments, adjusted=any(case.judged_at is not None for case in cases)):
            yield from wrapped(note, "- ")
        yield ""
    heeded = {caution.id for bill in bills for caution in bill.cautions}
    if heeded:
        yield "Cautions"
    for caution in CAUTIONS:
        if caution.id in heeded:
            yield from wrapped(f"{caution.text} ({caution.source})", "- ")


def _size(design: Design) -> str:
    whole, cases = design.range, design.cases
    if whole is None or design.unit not in ("A", "V", "Ω"):
        return ""
    size = engineered(whole, design.unit)
    if any(case.judged_at is not None for case in cases):
        return f", {size} at half scale"
    if design.unit == "Ω":
        return f", {size} at the scale's end"
    if len(cases) < 2:
        return f" for {size}"
    return f", {cases[0].name} to {cases[-1].name}, the scale shows {size}"


def _notes(assessments: Sequence[Assessment], *, adjusted: bool) -> Iterator[str]:
    bench = assessments[0].bench
    if any(assessment.parts for assessment in assessments):
        yield (
            "Current, voltage and power are at full scale, of several ranges where each is worst. Rating is "
            f"what to buy or make a part for, at least {plain_number(bench.margin)} times that power (common "
            "practice); what is given or built has none."
        )
        yield "1 % more moves it: how far a part with 1 % more ohms moves the pointer at full scale."
    yield (
        "How far the pointer moves, errors, tolerance and drift are in percent of the coil's current at full "
        "scale, which in a moving coil is percent of the pointer's deflection there. On a scale that rises "
        "evenly from zero that is percent of full scale."
    )
    copper, others = (
        f"{100 * each:.3g} %" for each in (bench.materials.copper_per_k, bench.materials.others_per_k)
    )
    yield (
        f"Heat is that of coil and resistors together. Drift is what the coil's copper does, {copper} per "
        f"kelvin (IEC 60028), against resistors of {others}; magnet and springs are not counted."
    )
    if any(assessment.together for assessment in assessments):
        yield (
            "Below each nearest value (IEC 60063) stands the error at full scale with it alone, then that "
            "with all of them, and what their tolerance does to full scale: at worst, and likely (root of "
            "the sum of squares)."
        )
    if adjusted:
        yield (
            "In an ohmmeter errors, tolerance, drift and how far the pointer moves are those at half scale, "
            "once the adjuster is set again, in percent of the whole deflection."
        )


def _parts(bill: Bill) -> Iterator[str]:
    assessment = bill.assessment
    if assessment is None:
        return
    if not assessment.parts:
        yield "Nothing to buy or to make."
        return
    times = plain_number(assessment.bench.overload)
    heads = ("part", "exact", "current", "voltage", "power", f"at {times}×", "rating", "1 % more moves it")
    yield from table(heads, [row for part in assessment.parts for row in _part_rows(part)])


def _part_rows(assessed: PartAssessed) -> Iterator[tuple[str, ...]]:
    part, full, slope = assessed.part, assessed.full, assessed.sensitivity
    yield (
        part.name,
        engineered(part.ohms, "Ω"),
        _amount(full.current_a, "A"),
        _amount(full.voltage_v, "V"),
        engineered(full.watts, "W", 3),
        _watts(assessed.overload),
        # Ratings are sold as 0.125 W and 0.25 W, not in milliwatts.
        "" if part.sums or is_there(part) else f"{plain_number(assessed.rating_w)} W",
        "" if slope is None else percent(slope, 2),
    )
    if part.built is not None:
        yield ("  as built", engineered(part.built, "Ω"), *[""] * 6)


def _amount(value: float | None, unit: str) -> str:
    return "" if value is None else engineered(abs(value), unit, 4)


def _watts(carried: Carried | None) -> str:
    return "" if carried is None else engineered(carried.watts, "W", 3)


def _ranges(bill: Bill) -> Iterator[str]:
    assessment = bill.assessment
    if assessment is None or not assessment.cases:
        return
    several = len(assessment.cases) > 1
    heads = ("range", "at the terminals", "resistance", "per volt", "heat", "drift per K")
    rows = [
        (
            f"{case.name}, on the scale" if several and i == bill.design.shown else case.name,
            _drop(bill, case),
            _resistance(case.input_ohm),
            "" if case.ohms_per_volt is None else f"{engineered(case.ohms_per_volt, 'Ω', 4)}/V",
            engineered(case.watts, "W", 3),
            percent(drift.percent_per_k),
        )
        for i, (case, drift) in enumerate(zip(assessment.cases, assessment.drifts, strict=True))
    ]
    yield from table(heads, rows)


def _drop(bill: Bill, case: CaseAssessed) -> str:
    # Across a voltmeter's terminals stands its range, across an ohmmeter's nothing of its own.
    return engineered(case.drop_v, "V", 4) if bill.design.unit == "A" else ""


def _resistance(ohms: float | None) -> str:
    return "" if ohms is None else engineered(ohms, "Ω", 4)


def _bought(bill: Bill) -> Iterator[str]:
    assessment = bill.assessment
    bought = [part for part in assessment.parts if is_bought(part.part)] if assessment else []
    if assessment is None or not bought:
        return
    series = [fit.series for fit in bought[0].fits]
    yield from columns(
        [
            ("nearest value", *series),
            *(
                row
                for part in bought
                for row in (
                    (part.part.name, *(engineered(fit.ohms, "Ω") for fit in part.fits)),
                    ("", *(percent(fit.error_percent) for fit in part.fits)),
                )
            ),
            *_all_together(assessment.together, alone=len(bought) == 1),
        ]
    )


def _all_together(together: Sequence[Together], *, alone: bool) -> Iterator[tuple[str, ...]]:
    if not alone:
        yield ("all fitted", *(percent(each.error_percent) for each in together))
    yield ("tolerance", *(f"±{plain_number(each.tolerance_percent)} %" for each in together))
    yield (
        "  moves it" if alone else "  at worst",
        *(f"±{in_figures(each.worst_percent)} %" for each in together),
    )
    if not alone:
        yield ("  likely", *(f"±{in_figures(each.likely_percent)} %" for each in together))


def _wound(bill: Bill) -> Iterator[str]:
    told = {name for name, _ in bill.windings}
    assessed = bill.assessment.parts if bill.assessment else ()
    names = [each.part.name for each in assessed if is_wound(each.part) and each.part.name not in told]
    if names:
        yield from wrapped(
            f"{listed(names)}: below {plain_number(LEAST_BOUGHT_OHM)} Ω, so wound or filed to value, not "
            'bought from a series (common practice); --wire "manganin 1 mm" tells how.'
        )


def _facts(bill: Bill) -> Iterator[str]:
    if bill.assessment is None:
        return
    for fact in bill.design.facts:
        yield from wrapped(f"{fact.name}: {_fact(fact)}")


def _fact(fact: Fact) -> str:
    if not math.isfinite(fact.value):
        return fact.note
    # A burden is 0.5 VA in the trade, and a share has no prefix.
    whole = in_figures(fact.value, 3)
    value = engineered(fact.value, fact.unit, 4) if fact.unit in _PREFIXED else f"{whole} {fact.unit}".strip()
    return f"{value}, {fact.note}" if fact.note else value


_SECTIONS = (_parts, _ranges, _facts, _bought, _wound, *MAKING)
