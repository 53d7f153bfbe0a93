"""The bill of a circuit in words and columns, as it is laid on the bench."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence

from dialgen.circuit.design import Fact
from dialgen.cli.columns import columns, table, wrapped
from dialgen.parts.assessed import Assessment, Carried, CaseAssessed, PartAssessed, Together
from dialgen.parts.bill import Bill
from dialgen.parts.caution.cautions import CAUTIONS
from dialgen.parts.drift import NoSwamping, Swamping
from dialgen.parts.stock.search import Candidate, Search
from dialgen.parts.wire.workshop import advice, objections, summary
from dialgen.quantity import engineered, plain_number

_EXACT_DIGITS = 7
_SHOWN_CANDIDATES = 5
_FAR = 0.2
"""A network farther off than this share is of no use, nor are the next ones."""
_ROUNDING = 1e-6
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


def percent(value: float) -> str:
    """Return a signed percentage of three figures.

    >>> percent(0.0), percent(-1.2345), percent(12.345)
    ('0 %', '−1.23 %', '+12.3 %')
    """
    rounded = float(f"{value:.3g}") if abs(value) >= 5e-7 else 0.0
    return ("+" if rounded > 0 else "") + f"{plain_number(rounded)} %"


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
        engineered(assessed.rating_w, "W", 3) if assessed.rating_w else "",
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
    yield ("" if alone else "  at worst", *(f"±{_figure(each.worst_percent)} %" for each in together))
    if not alone:
        yield ("  likely", *(f"±{_figure(each.likely_percent)} %" for each in together))


def _figure(value: float) -> str:
    return plain_number(float(f"{value:.2g}"))


def _trims(bill: Bill) -> Iterator[str]:
    for trim in bill.trims:
        off, reads = percent(trim.off_percent), percent(trim.reading_percent)
        yield from wrapped(
            f"{trim.part} as built: {off} off, which alone reads {reads} at full scale. The marks follow it. "
            f"To keep a face drawn for the exact value: {trim.advice}."
        )


def _splits(bill: Bill) -> Iterator[str]:
    for split in bill.splits:
        yield from wrapped(
            f"{split.part}: make it of {split.count} times {engineered(split.ohms, 'Ω')} in series, so that "
            f"each has at most {engineered(split.voltage_v, 'V', 3)} at the peak."
        )


def _swamping(bill: Bill) -> Iterator[str]:
    match bill.swamping:
        case Swamping() as found:
            yield from wrapped(f"Swamping: {_swamped(found)}.")
        case NoSwamping() as found:
            mend = (
                f"; a range {_figure(found.range_factor)} times as large would have the wanted drift"
                if found.range_factor
                else ""
            )
            yield from wrapped(
                "Swamping does not help: range and movement fix the whole resistance, of which "
                f"{_figure(100 * found.copper_share)} % is copper{mend}."
            )


def _swamped(found: Swamping) -> str:
    before, after = percent(found.before_percent_per_k), percent(found.percent_per_k)
    if found.swamp_ohm == 0:
        return f"not needed, the drift is {before} per kelvin without"
    share = percent(100 * found.drive).lstrip("+")
    short = (
        f"; full scale then drives only {share} of the movement: take a shunt of more drop"
        if found.drive < 1 - _ROUNDING
        else ""
    )
    return (
        f'swamp = "{engineered(found.swamp_ohm, "ohm", 4)}" brings the drift from {before} to {after} per '
        f"kelvin, and the drop from {engineered(found.before_drop_v, 'V', 4)} to "
        f"{engineered(found.drop_v, 'V', 4)}{short}"
    )


def _searches(bill: Bill) -> Iterator[str]:
    for name, found in bill.searches:
        yield from _search(name, found)


def _search(name: str, found: Search) -> Iterator[str]:
    count = f"{found.searched:,}".replace(",", " ")
    yield f"{name} from the drawer: {count} networks of up to {found.most_parts} parts searched"
    best = found.candidates[: 1 if abs(found.candidates[0].error) > _FAR else _SHOWN_CANDIDATES]
    near = len(best) > 1
    rows: list[tuple[str, ...]] = [("  network", "value", "error", "parts", "worst part")]
    for head, listed in (
        ("", best),
        ("  with fewer parts", [each for each in found.simpler if each not in best and near]),
        ("  the best value, with less heat in one part", found.cooler if near else ()),
    ):
        if head and listed:
            rows.append((head, "", "", "", ""))
        rows += [_candidate(each) for each in listed]
    yield from columns(rows)
    if not near:
        yield "  Nothing in the drawer comes near."


def _candidate(found: Candidate) -> tuple[str, ...]:
    return (
        f"  {found.drawing}",
        engineered(found.ohms, "Ω", 6),
        percent(100 * found.error),
        str(found.parts),
        f"{_figure(100 * found.share)} % of the power",
    )


def _windings(bill: Bill) -> Iterator[str]:
    for name, winding in bill.windings:
        yield from wrapped(f"{name} made at home: {summary(winding)}.", rest="")
        for text in (*objections(winding), *advice(winding)):
            yield from wrapped(text, "- ")


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


_SECTIONS = (
    _parts,
    _ranges,
    _facts,
    _bought,
    _trims,
    _splits,
    _swamping,
    _searches,
    _windings,
)


def old_face_lines(unit: str, rows: Sequence[tuple[float, float]]) -> Iterator[str]:
    """Yield what a face drawn for the designed circuit shows at its numbered marks, as it was built."""
    yield "On a face drawn for the exact values, as built:"
    heads = (f"applied {unit}".rstrip(), "indicated", "error", "of full scale")
    top = max(abs(value) for value, _ in rows)
    yield from columns(
        [
            heads,
            *(
                (
                    plain_number(value),
                    plain_number(float(f"{shown:.5g}")),
                    plain_number(float(f"{shown - value:.3g}")),
                    percent(100 * (shown - value) / top),
                )
                for value, shown in rows
            ),
        ],
        left=0,
    )
