"""The bill of a circuit in words and columns, as it is laid on the bench."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence

from dialgen.circuit.design import Fact
from dialgen.cli.bill_making import MAKING
from dialgen.cli.columns import columns, figure, percent, table, wrapped
from dialgen.parts.assessed import Assessment, Carried, CaseAssessed, PartAssessed, Together
from dialgen.parts.bill import Bill
from dialgen.parts.caution.cautions import CAUTIONS
from dialgen.quantity import engineered, plain_number

_EXACT_DIGITS = 7
_PREFIXED = ("A", "V", "Ω", "W", "VA", "Ω/V")


def bill_lines(bill: Bill) -> Iterator[str]:
    """Yield the lines of one circuit's bill, its sections parted by empty ones."""
    for section in _SECTIONS:
        if lines := list(section(bill)):
            yield ""
            yield from lines


def closing_lines(bills: Sequence[Bill]) -> Iterator[str]:
    """Yield what goes for all circuits: how to read the columns, and the cautions, gravest first."""
    assessments = [bill.assessment for bill in bills if bill.assessment and bill.assessment.parts]
    if assessments:
        yield "How to read it"
        cases = [case for bill in bills for case in bill.design.cases]
        for note in _notes(assessments, adjusted=any(case.judged_at is not None for case in cases)):
            yield from wrapped(note, "- ")
        yield ""
    yield "Cautions"
    heeded = {caution.id: caution for bill in bills for caution in bill.cautions}
    for caution in CAUTIONS:
        if caution.id in heeded:
            yield from wrapped(f"{caution.text} ({caution.source})", "- ")


def _notes(assessments: Sequence[Assessment], *, adjusted: bool) -> Iterator[str]:
    margin = plain_number(assessments[0].bench.margin)
    yield (
        "Current, voltage and power are at full scale, of several ranges where each is worst; to buy is a "
        f"rating of at least {margin} times that power (common practice)."
    )
    yield (
        "Heat is that of coil and resistors together. Drift is what the coil's copper does, 0.393 % per "
        "kelvin (IEC 60028), against resistors of 0.001 %; magnet and springs are not counted."
    )
    if any(part.fits for assessment in assessments for part in assessment.parts):
        yield (
            "Below each nearest value (IEC 60063) stands the error at full scale with it alone, then that "
            "with all of them, and what their tolerance does to full scale: at worst, and likely (root of "
            "the sum of squares)."
        )
    if adjusted:
        yield (
            "In an ohmmeter errors are those at half scale once the zero is set, in percent of the whole "
            "deflection; so is its drift."
        )


def _parts(bill: Bill) -> Iterator[str]:
    assessment = bill.assessment
    if assessment is None:
        return
    if not assessment.parts:
        yield "Nothing to buy or to make."
        return
    times = plain_number(assessment.bench.overload)
    heads = ("part", "exact", "current", "voltage", "power", f"at {times}×", "to buy")
    yield from table(heads, [row for part in assessment.parts for row in _part_rows(part)])


def _part_rows(assessed: PartAssessed) -> Iterator[tuple[str, ...]]:
    part, full = assessed.part, assessed.full
    yield (
        part.name,
        engineered(part.ohms, "Ω", _EXACT_DIGITS),
        _amount(full.current_a, "A"),
        _amount(full.voltage_v, "V"),
        engineered(full.watts, "W", 3),
        _watts(assessed.overload),
        "" if part.sums else engineered(assessed.rating_w, "W", 3),
    )
    if part.built is not None:
        yield ("  as built", engineered(part.built, "Ω", _EXACT_DIGITS), *[""] * 5)


def _amount(value: float | None, unit: str) -> str:
    return "" if value is None else engineered(abs(value), unit, 4)


def _watts(carried: Carried | None) -> str:
    return "" if carried is None else engineered(carried.watts, "W", 3)


def _ranges(bill: Bill) -> Iterator[str]:
    assessment = bill.assessment
    if assessment is None or not assessment.cases:
        return
    heads = ("range", "at the terminals", "resistance", "per volt", "heat", "drift per K")
    rows = [
        (
            case.name,
            _drop(bill, case),
            _resistance(case.input_ohm),
            "" if case.ohms_per_volt is None else f"{engineered(case.ohms_per_volt, 'Ω', 4)}/V",
            engineered(case.watts, "W", 3),
            percent(drift.percent_per_k),
        )
        for case, drift in zip(assessment.cases, assessment.drifts, strict=True)
    ]
    yield from table(heads, rows)


def _drop(bill: Bill, case: CaseAssessed) -> str:
    # Across an ohmmeter's terminals stands what is measured, at full scale nothing.
    return "" if bill.design.unit == "Ω" else engineered(case.drop_v, "V", 4)


def _resistance(ohms: float | None) -> str:
    return "" if ohms is None else engineered(ohms, "Ω", 4)


def _bought(bill: Bill) -> Iterator[str]:
    assessment = bill.assessment
    bought = [part for part in assessment.parts if part.fits] if assessment else []
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
    yield ("" if alone else "  at worst", *(f"±{figure(each.worst_percent)} %" for each in together))
    if not alone:
        yield ("  likely", *(f"±{figure(each.likely_percent)} %" for each in together))


def _facts(bill: Bill) -> Iterator[str]:
    if bill.assessment is None:
        return
    for fact in bill.design.facts:
        yield from wrapped(f"{fact.name}: {_fact(fact)}")


def _fact(fact: Fact) -> str:
    if not math.isfinite(fact.value):
        return fact.note
    whole = plain_number(float(f"{fact.value:.3g}"))
    value = engineered(fact.value, fact.unit, 4) if fact.unit in _PREFIXED else f"{whole} {fact.unit}".strip()
    return f"{value}, {fact.note}" if fact.note else value


_SECTIONS = (_parts, _ranges, _facts, _bought, *MAKING)
