"""The bill of a circuit as JSON: full figures, never rounded."""

from __future__ import annotations

import math
from typing import Any

from dialgen.circuit.design import Design
from dialgen.parts.assessed import CaseAssessed, PartAssessed
from dialgen.parts.bill import Bill
from dialgen.parts.drift import NoSwamping, Swamping
from dialgen.parts.stock.search import Candidate
from dialgen.parts.wire.winding import Winding

Fields = dict[str, Any]


def circuit_json(bill: Bill) -> Fields:
    """Return a circuit as the contract has it, and what else the bill says."""
    design, assessment = bill.design, bill.assessment
    cases = assessment.cases if assessment else ()
    drifts = assessment.drifts if assessment else ()
    return {
        "kind": design.kind,
        "range": _number(design.range),
        "unit": design.unit,
        "drop": _drop(design, cases[design.shown]) if cases else None,
        "parts": [_part(part) for part in assessment.parts] if assessment else [],
        "cautions": [f"{each.text} ({each.source})" for each in bill.cautions],
        "ranges": [
            {
                "range": case.name,
                "signal": _number(case.signal),
                "drop": _drop(design, case),
                "resistance": _number(case.input_ohm),
                "ohms_per_volt": _number(case.ohms_per_volt),
                "watts": case.watts,
                "drift_percent_per_k": drift.percent_per_k,
            }
            for case, drift in zip(cases, drifts, strict=True)
        ],
        "facts": [
            {"name": fact.name, "value": _number(fact.value), "unit": fact.unit, "note": fact.note}
            for fact in (design.facts if assessment else ())
        ],
        "together": [
            {
                "series": each.series,
                "tolerance_percent": each.tolerance_percent,
                "error_percent": each.error_percent,
                "worst_percent": each.worst_percent,
                "likely_percent": each.likely_percent,
            }
            for each in (assessment.together if assessment else ())
        ],
        "as_built": [
            {
                "part": trim.part,
                "off_percent": trim.off_percent,
                "reading_percent": trim.reading_percent,
                "parallel": _number(trim.parallel_ohm),
                "parallel_watts": trim.parallel_w,
                "series": _number(trim.series_ohm),
                "filed_share": trim.filed_share,
                "longer_share": trim.longer_share,
            }
            for trim in bill.trims
        ],
        "splits": [
            {"part": each.part, "count": each.count, "ohms": each.ohms, "volts": each.voltage_v}
            for each in bill.splits
        ],
        "swamping": _swamping(bill),
        "stock": [
            {
                "part": name,
                "searched": found.searched,
                "most_parts": found.most_parts,
                "candidates": [_candidate(each) for each in found.candidates],
                "simpler": [_candidate(each) for each in found.simpler],
                "cooler": [_candidate(each) for each in found.cooler],
            }
            for name, found in bill.searches
        ],
        "wire": [{"part": name, **_winding(winding)} for name, winding in bill.windings],
    }


def _number(value: float | None) -> float | str | None:
    if value is None or math.isfinite(value):
        return value
    return "inf" if value > 0 else "-inf"


def _drop(design: Design, case: CaseAssessed) -> float | None:
    # Across an ohmmeter's terminals stands what is measured: it has no drop of its own.
    return None if design.unit == "Ω" else case.drop_v


def _part(assessed: PartAssessed) -> Fields:
    part, full, over = assessed.part, assessed.full, assessed.overload
    return {
        "name": part.name,
        "ohms": _number(part.ohms),
        "watts": full.watts,
        "rating": assessed.rating_w,
        "built": part.built,
        "given": part.given,
        "current": full.current_a,
        "voltage": full.voltage_v,
        "overload_watts": over.watts if over else None,
        "sensitivity": assessed.sensitivity,
        "nearest": [
            {
                "series": fit.series,
                "ohms": fit.ohms,
                "error_percent": fit.error_percent,
                "tolerance_percent": fit.tolerance_percent,
                "spread_percent": fit.spread_percent,
            }
            for fit in assessed.fits
        ],
    }


def _swamping(bill: Bill) -> Fields | None:
    match bill.swamping:
        case Swamping() as found:
            return {
                "ohms": found.swamp_ohm,
                "drift_percent_per_k": found.percent_per_k,
                "before_percent_per_k": found.before_percent_per_k,
                "drop": found.drop_v,
                "before_drop": found.before_drop_v,
                "parts": [
                    {"name": each.name, "ohms": _number(each.ohms), "before": _number(each.before_ohm)}
                    for each in found.remade(bill.design)
                ],
            }
        case NoSwamping() as found:
            return {
                "ohms": None,
                "drift_percent_per_k": found.percent_per_k,
                "copper_share": found.copper_share,
                "range_factor": found.range_factor,
            }
    return None


def _candidate(found: Candidate) -> Fields:
    return {
        "network": found.drawing,
        "ohms": found.ohms,
        "error_percent": 100 * found.error,
        "parts": found.parts,
        "worst_share": found.share,
    }


def _winding(winding: Winding) -> Fields:
    return {
        "wire": winding.wire.name,
        "length_mm": winding.length_mm,
        "ohm_per_m": winding.wire.ohm_per_m,
        "density_a_per_mm2": winding.density_a_per_mm2,
        "rise_k": winding.rise_k,
    }
