"""What a bill tells of making its parts: as built, split, swamped, from the drawer and from wire."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence

from dialgen.circuit.design import Design
from dialgen.cli.columns import columns, listed, percent, wrapped
from dialgen.parts.bill import Bill
from dialgen.parts.drift import NoSwamping, Remade, Swamping
from dialgen.parts.stock.search import Candidate, Search
from dialgen.parts.wire.workshop import advice, objections, summary
from dialgen.quantity import engineered, in_figures, plain_number

_SHOWN_CANDIDATES = 5
_FAR = 0.2
"""A network farther off than this share is of no use, nor are the next ones."""


def _trims(bill: Bill) -> Iterator[str]:
    for trim in bill.trims:
        off, moved = percent(trim.off_percent), percent(trim.reading_percent)
        yield from wrapped(
            f"{trim.part} as built: {off} off, which alone moves the pointer by {moved} at full scale. "
            f"The marks follow it. To keep a face drawn for the exact value: {trim.advice}."
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
            yield from wrapped(f"Swamping: {_swamped(bill.design, found)}.")
        case NoSwamping() as found:
            mend = (
                f"; with this movement a signal {in_figures(found.range_factor)} times as large at full "
                "scale would have the wanted drift"
                if found.range_factor
                else ""
            )
            yield from wrapped(
                "Swamping does not help: full scale and movement fix the whole resistance, of which "
                f"{in_figures(100 * found.copper_share)} % is copper{mend}."
            )


def _swamped(design: Design, found: Swamping) -> str:
    before, after = percent(found.before_percent_per_k), percent(found.percent_per_k)
    if found.swamp_ohm == 0:
        return f"not needed, the drift is {before} per kelvin as it is"
    ohms, drop = engineered(found.swamp_ohm, "ohm", 4), engineered(found.drop_v, "V", 4)
    anew = [_anew(each) for each in found.remade(design)]
    with_it = f" with {listed(anew)}" if anew else ""
    return (
        f'swamp = "{ohms}"{with_it} brings the drift from {before} to {after} per kelvin, and the drop from '
        f"{engineered(found.before_drop_v, 'V', 4)} to {drop}"
    )


def _anew(part: Remade) -> str:
    numbered = part.name[-1].isdigit()
    now, before = (engineered(each, "Ω", 4) for each in (part.ohms, part.before_ohm))
    return f"{'' if numbered else 'a '}{part.name} of {now} in place of {before}"


def _searches(bill: Bill) -> Iterator[str]:
    for name, found in bill.searches:
        yield from _search(name, found)


def _search(name: str, found: Search) -> Iterator[str]:
    count = f"{found.searched:,}".replace(",", " ")
    yield f"{name} from the drawer: {count} networks of up to {found.most_parts} parts searched"
    best = found.candidates[: 1 if abs(found.candidates[0].error) > _FAR else _SHOWN_CANDIDATES]
    near = len(best) > 1
    rows: list[tuple[str, ...]] = [("  network", "value", "error", "parts", "worst part")]
    for head, group in (
        ("", best),
        ("  with fewer parts", [each for each in found.simpler if each not in best and near]),
        ("  the best value, with less heat in one part", found.cooler if near else ()),
    ):
        if head and group:
            rows.append((head, "", "", "", ""))
        rows += [_candidate(each) for each in group]
    yield from columns(rows)
    if not near:
        yield "  Nothing in the drawer comes near."


def _candidate(found: Candidate) -> tuple[str, ...]:
    return (
        f"  {found.drawing}",
        engineered(found.ohms, "Ω"),
        percent(100 * found.error),
        str(found.parts),
        f"{in_figures(100 * found.share)} % of the power",
    )


def _windings(bill: Bill) -> Iterator[str]:
    for name, winding in bill.windings:
        yield from wrapped(f"{name} made at home: {summary(winding)}.", rest="")
        for text in (*objections(winding), *advice(winding)):
            yield from wrapped(text, "- ")


def old_face_lines(unit: str, whole: float, rows: Sequence[tuple[float, float]]) -> Iterator[str]:
    """Yield what a face drawn for the designed circuit shows at its numbered marks, as it was built.

    Args:
        unit: the scale's unit as it is printed.
        whole: what errors are shares of, the larger of the scale's ends; infinite for none.
        rows: applied and indicated values.
    """
    yield "On a face drawn for the exact values, as built:"
    share = "of full scale" if math.isfinite(whole) else ""
    heads = (f"applied {unit}".rstrip(), "indicated", "error", share)
    yield from columns(
        [
            heads,
            *(
                (
                    plain_number(value),
                    in_figures(shown, 5),
                    in_figures(shown - value, 3),
                    percent(100 * (shown - value) / whole) if share else "",
                )
                for value, shown in rows
            ),
        ],
        left=0,
    )


MAKING = (_trims, _splits, _swamping, _searches, _windings)
"""The sections, in order."""
